"""Made-up multiplets with noise and overlap, as a printout gives them."""

from __future__ import annotations

import random
from dataclasses import dataclass
from itertools import pairwise, product

from hoodside.predict.multiplet import Splitting, lines, name_of

#: Hz two lines must be apart to be printed as two; noise of positions, Hz, and of heights, share.
RESOLVED, POSITION_NOISE, HEIGHT_NOISE = 0.8, 0.2, 0.15
#: Smallest and largest J, Hz, least difference between two, most coupled spins.
J_RANGE, APART, MOST_PARTNERS = (2.0, 16.0), 1.5, 5
MOST_OVERLAPS = 2


@dataclass(frozen=True)
class Synthetic:
    """A made-up multiplet: what it is, and what the printout shows."""

    pattern: str
    j: tuple[float, ...]
    hz: tuple[float, ...]
    heights: tuple[float, ...]
    overlaps: int


def synthetic(rng: random.Random, letters: int | None = None, overlaps: int | None = None) -> Synthetic:
    """A first-order multiplet of 2 to 4 couplings with at most two overlapped lines, or as many as asked."""
    while True:
        counts = [rng.choices([1, 2, 3], [6, 3, 1])[0] for _ in range(letters or rng.randint(2, 4))]
        j = sorted((rng.uniform(*J_RANGE) for _ in counts), reverse=True)
        if sum(counts) > MOST_PARTNERS or any(a - b < APART for a, b in pairwise(j)):
            continue
        name = name_of([Splitting(hz, n) for hz, n in zip(j, counts, strict=True)])
        printed = _overlapped(lines(name, j))
        hidden = len(lines(name, j)) - len(printed)
        if hidden == overlaps if overlaps is not None else hidden <= MOST_OVERLAPS:
            return _noisy(rng, name, j, printed, hidden)


def mixture(rng: random.Random, size: int) -> list[Synthetic]:
    """As many of 2 as of 3 and 4 couplings, and as many without as with one and two overlapped lines."""
    kinds = list(product((2, 3, 4), range(MOST_OVERLAPS + 1)))
    return [synthetic(rng, *kinds[k % len(kinds)]) for k in range(size)]


def _overlapped(sharp: list[tuple[float, float]]) -> list[tuple[float, float]]:
    joined: list[tuple[float, float]] = []
    for hz, share in sharp:
        if joined and hz - joined[-1][0] < RESOLVED:
            before, size = joined[-1]
            joined[-1] = ((before * size + hz * share) / (size + share), size + share)
        else:
            joined.append((hz, share))
    return joined


def _noisy(
    rng: random.Random, name: str, j: list[float], printed: list[tuple[float, float]], overlaps: int
) -> Synthetic:
    hz = tuple(1000 + at + rng.uniform(-POSITION_NOISE, POSITION_NOISE) for at, _ in printed)
    heights = tuple(share * rng.uniform(1 - HEIGHT_NOISE, 1 + HEIGHT_NOISE) for _, share in printed)
    return Synthetic(name, tuple(j), hz, heights, overlaps)
