"""Exchange symmetry: pairs of groups that change places without any change of the Hamiltonian.

Chemically equivalent groups, such as A and A' of AA'XX', have states that are even or odd under the exchange.
The two kinds do not mix, so each block falls into two of half its size, a quarter of the work (Corio,
Structure of High-Resolution NMR Spectra, 1966, on symmetry factoring).
"""

from __future__ import annotations

from array import array
from collections.abc import Sequence
from dataclasses import dataclass
from functools import lru_cache
from math import sqrt

from hoodside.numerics import zeros
from hoodside.predict.spins.basis import KEPT, blocks, flip_flops, lowerings
from hoodside.predict.spins.surroundings import Hamiltonian

#: Where each group goes.
Exchange = tuple[int, ...]
#: Element of a matrix and its value.
Element = tuple[int, float]
#: Hz within which shifts and J are the same.
_SAME = 1e-9


def exchange_of(around: Hamiltonian, twice: Sequence[int]) -> Exchange | None:
    """An exchange of groups in pairs under which the Hamiltonian stays as it is; None when there is none."""
    n = len(twice)
    own = [
        (twice[g], around.shifts[g], around.weights[g], *(outer.first[g] for outer in around.outer))
        for g in range(n)
    ]
    partners = [[h for h in range(n) if h == g or _alike(own[g], own[h])] for g in range(n)]
    if all(len(found) == 1 for found in partners):
        return None
    found = _extended({}, partners, around)
    return (
        None if found is None or all(found[g] == g for g in range(n)) else tuple(found[g] for g in range(n))
    )


def _alike(a: Sequence[float], b: Sequence[float]) -> bool:
    return all(abs(x - y) <= _SAME for x, y in zip(a, b, strict=True))


def _extended(
    image: dict[int, int], partners: Sequence[Sequence[int]], around: Hamiltonian
) -> dict[int, int] | None:
    """The exchange with all groups placed, those that can move moved first; None when there is none."""
    g = next((k for k in range(len(partners)) if k not in image), None)
    if g is None:
        return image
    for h in sorted(partners[g], key=lambda h: h == g):
        if h in image:
            continue
        longer = {**image, g: h, h: g}
        if all(_kept(around, a, b, longer) for a in (g, h) for b in longer):
            found = _extended(longer, partners, around)
            if found is not None:
                return found
    return None


def _kept(around: Hamiltonian, a: int, b: int, image: dict[int, int]) -> bool:
    c, d = image[a], image[b]
    return all(abs(j[a][b] - j[c][d]) <= _SAME for j in (around.along, around.flips))


@dataclass(frozen=True, slots=True)
class Fold:
    """Even or odd states of a block: per product state, its column and its coefficient there (0 for none)."""

    size: int
    columns: tuple[tuple[int, float], ...]


@lru_cache(maxsize=KEPT)
def fold(twice: tuple[int, ...], level: int, exchange: Exchange, sign: int) -> Fold:
    """The states of a block that are even (``sign`` 1) or odd (-1) under an exchange."""
    basis = blocks(twice)
    codes = basis.codes[level]
    columns: list[tuple[int, float]] = [(0, 0.0)] * len(codes)
    size = 0
    for at, code in enumerate(codes):
        other = basis.places[_exchanged(code, basis.strides, twice, exchange)]
        if other == at and sign > 0:
            columns[at] = size, 1.0
            size += 1
        elif other > at:
            columns[at], columns[other] = (size, sqrt(0.5)), (size, sign * sqrt(0.5))
            size += 1
    return Fold(size, tuple(columns))


def _exchanged(code: int, strides: Sequence[int], twice: Sequence[int], exchange: Exchange) -> int:
    return sum(code // strides[g] % (twice[g] + 1) * strides[h] for g, h in enumerate(exchange))


@lru_cache(maxsize=KEPT)
def _folded_flips(
    twice: tuple[int, ...], level: int, exchange: Exchange, sign: int
) -> dict[tuple[int, int], tuple[Element, ...]]:
    """``flip_flops`` between even or odd states."""
    here = fold(twice, level, exchange, sign)
    n = len(here.columns)
    return {
        pair: tuple(
            (row * here.size + column, value * a * b)
            for above, below, value in elements
            for place in (above, below)
            for (row, a), (column, b) in ((here.columns[place // n], here.columns[place % n]),)
            if a and b
        )
        for pair, elements in flip_flops(twice, level).items()
    }


def folded_block(
    twice: tuple[int, ...],
    level: int,
    exchange: Exchange,
    sign: int,
    diagonal: Sequence[float],
    flips: Sequence[Sequence[float]],
) -> array[float]:
    """The Hamiltonian between the even or odd states of a block, row-major."""
    here = fold(twice, level, exchange, sign)
    matrix = zeros(here.size * here.size)
    for code, (column, coefficient) in zip(blocks(twice).codes[level], here.columns, strict=True):
        matrix[column * (here.size + 1)] += coefficient * coefficient * diagonal[code]
    for (a, b), elements in _folded_flips(twice, level, exchange, sign).items():
        hz = flips[a][b]
        for place, value in elements if hz else ():
            matrix[place] += hz * value
    return matrix


@lru_cache(maxsize=KEPT)
def _folded_lowerings(
    twice: tuple[int, ...], level: int, exchange: Exchange, sign: int
) -> tuple[tuple[Element, ...], ...]:
    """``lowerings`` between even or odd states."""
    here, below = fold(twice, level, exchange, sign), fold(twice, level - 1, exchange, sign)
    width = len(here.columns)
    return tuple(
        tuple(
            (row * here.size + column, value * a * b)
            for place, value in elements
            for (row, a), (column, b) in ((below.columns[place // width], here.columns[place % width]),)
            if a and b
        )
        for elements in lowerings(twice, level)
    )


def folded_lowering(
    twice: tuple[int, ...],
    level: int,
    exchange: Exchange,
    sign: int,
    groups: Sequence[int],
    weights: Sequence[float],
) -> array[float]:
    """Weighted sum of F- over groups between even or odd states: rows of the block below, columns here."""
    sizes = [fold(twice, k, exchange, sign).size for k in (level - 1, level)]
    matrix = zeros(sizes[0] * sizes[1])
    terms = _folded_lowerings(twice, level, exchange, sign)
    for g in groups:
        for place, value in terms[g]:
            matrix[place] += weights[g] * value
    return matrix
