"""Product states of composite spins, sorted by total Fz.

Magnetically equivalent nuclei act as particles of total spin n/2, n/2 - 1, ... (Pople, Schneider and
Bernstein, High-resolution Nuclear Magnetic Resonance, 1959, chapter 6; Corio, Structure of High-Resolution
NMR Spectra, 1966). A level k of a spin F has m = k - F.
"""

from __future__ import annotations

from array import array
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import cache, lru_cache
from itertools import product
from math import comb, sqrt

from hoodside.numerics import zeros

#: Blocks whose structure is kept for the next system of the same kind.
KEPT = 1024


@cache
def total_spins(count: int) -> tuple[tuple[int, int], ...]:
    """(2 F, number of times it occurs) for ``count`` spins of 1/2."""
    found = []
    for lost in range(count // 2 + 1):
        times = comb(count, lost) - (comb(count, lost - 1) if lost else 0)
        found.append((count - 2 * lost, times))
    return tuple(found)


def combinations(counts: Sequence[int]) -> Iterator[tuple[tuple[int, ...], int]]:
    """(2 F per group, weight) of every choice of total spins."""
    for choice in product(*(total_spins(n) for n in counts)):
        weight = 1
        for _, times in choice:
            weight *= times
        yield tuple(twice for twice, _ in choice), weight


@cache
def lowering(twice: int) -> tuple[float, ...]:
    """<k - 1 | F- | k> per level k of a spin F (``twice`` = 2 F); 0 for the lowest."""
    spin = twice / 2
    values = [0.0]
    for k in range(1, twice + 1):
        m = k - spin
        values.append(sqrt(spin * (spin + 1) - m * (m - 1)))
    return tuple(values)


@dataclass(frozen=True, slots=True)
class Blocks:
    """States of some composite spins in blocks of equal total level (total Fz).

    Attributes:
        twice: 2 F per group.
        strides: weight of each group's level in the code of a state.
        codes: per block, the codes of its states.
        places: code -> place within its block.
    """

    twice: tuple[int, ...]
    strides: tuple[int, ...]
    codes: tuple[list[int], ...]
    places: dict[int, int]


@lru_cache(maxsize=KEPT)
def blocks(twice: tuple[int, ...]) -> Blocks:
    """All states of composite spins of the given 2 F."""
    strides, width = [], 1
    for t in twice:
        strides.append(width)
        width *= t + 1
    sums = [0]
    for t in twice:
        sums = [s + k for k in range(t + 1) for s in sums]
    # With the last group varying slowest, the place in ``sums`` is the code itself.
    codes: list[list[int]] = [[] for _ in range(sum(twice) + 1)]
    places = {}
    for code, level in enumerate(sums):
        places[code] = len(codes[level])
        codes[level].append(code)
    return Blocks(twice, tuple(strides), tuple(codes), places)


def largest_block(counts: Sequence[int]) -> int:
    """Number of states in the largest block of groups of these sizes (their highest total spins)."""
    ways = [1]
    for n in counts:
        longer = [0] * (len(ways) + n)
        for at, value in enumerate(ways):
            for k in range(n + 1):
                longer[at + k] += value
        ways = longer
    return max(ways)


@lru_cache(maxsize=KEPT)
def lowerings(twice: tuple[int, ...], level: int) -> tuple[tuple[tuple[int, float], ...], ...]:
    """F- of every group from block ``level`` to the one below: (element, coefficient) of those it fills."""
    basis = blocks(twice)
    here, places = basis.codes[level], basis.places
    width, found = len(here), []
    for g, stride in enumerate(basis.strides):
        size, coefficients = twice[g] + 1, lowering(twice[g])
        found.append(
            tuple(
                (places[code - stride] * width + column, coefficients[k])
                for column, code in enumerate(here)
                if (k := code // stride % size)
            )
        )
    return tuple(found)


def lowering_matrix(
    twice: tuple[int, ...], level: int, groups: Sequence[int], weights: Sequence[float]
) -> array[float]:
    """Weighted sum of F- over groups, from block ``level`` to the one below: rows below, columns here."""
    basis = blocks(twice)
    matrix = zeros(len(basis.codes[level]) * len(basis.codes[level - 1]))
    terms = lowerings(twice, level)
    for g in groups:
        weight = weights[g]
        for element, coefficient in terms[g]:
            matrix[element] += weight * coefficient
    return matrix


#: Elements of a block that one flip-flop term fills: place above and below the diagonal, coefficient.
Flip = tuple[int, int, float]


@lru_cache(maxsize=KEPT)
def flip_flops(twice: tuple[int, ...], level: int) -> dict[tuple[int, int], tuple[Flip, ...]]:
    """(Fa- Fb+ + Fa+ Fb-)/2 for every pair a < b within one block, as the elements it fills."""
    basis = blocks(twice)
    codes, places = basis.codes[level], basis.places
    n, found = len(codes), {}
    for a in range(len(twice)):
        down, stride_a, size_a = lowering(twice[a]), basis.strides[a], twice[a] + 1
        for b in range(a + 1, len(twice)):
            up = (*lowering(twice[b])[1:], 0.0)
            stride_b, size_b = basis.strides[b], twice[b] + 1
            step = stride_b - stride_a
            found[a, b] = tuple(
                (at * n + to, to * n + at, flip / 2)
                for at, code in enumerate(codes)
                if (flip := down[code // stride_a % size_a] * up[code // stride_b % size_b])
                for to in (places[code + step],)
            )
    return found
