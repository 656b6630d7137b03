"""Exact line list of a spin system: one symmetric eigenproblem per total Fz, without perturbation theory.

High-field Hamiltonian H = sum nu_i Iz_i + sum J_ij I_i . I_j in Hz, real and symmetric in the product basis.
Couplings to heteronuclei keep only J Iz Sz, so each state of a heteronucleus is a fixed shift of the lines.
Corio, Structure of High-Resolution NMR Spectra, 1966.
"""

from __future__ import annotations

from array import array
from collections.abc import Iterator, Sequence
from itertools import product as choices
from math import comb, sqrt

from hoodside.numerics import eigh, product, transitions, zeros
from hoodside.predict.spins.basis import Blocks, blocks, combinations, flip_flops, lowering_matrix
from hoodside.predict.spins.model import Heap, LineList, SpinSystem

#: Hz within which lines are one.
COINCIDENT = 1e-7
#: Share of the strongest line below which a line is left out.
NEGLIGIBLE = 1e-7
#: Intensity below which a transition is not looked at.
_NO_INTENSITY = 1e-9


def exact_lines(system: SpinSystem) -> LineList:
    """Every line of a system, whatever its size; the cost grows as the cube of the largest block.

    Returns: lines in Hz whose intensities add up to the number of observed nuclei.
    """
    heap = Heap()
    for part in independent_parts(system):
        add_part(heap, system, part)
    return heap.sorted(COINCIDENT, NEGLIGIBLE)


def independent_parts(system: SpinSystem) -> list[list[int]]:
    """Observed groups in sets that no coupling connects (heteronuclei connect nothing)."""
    j = system.matrix()
    left = [g for g, nuclei in enumerate(system.groups) if nuclei.observed]
    parts = []
    while left:
        part = [left.pop(0)]
        for g in part:
            near = [h for h in left if j[g][h]]
            part += near
            left = [h for h in left if h not in near]
        parts.append(sorted(part))
    return parts


def add_part(
    heap: Heap, system: SpinSystem, part: Sequence[int], detected: Sequence[int] | None = None
) -> None:
    """Add the lines of some observed groups, couplings to other observed groups left out.

    Args:
        heap: where the lines go.
        system: all groups.
        part: observed groups that enter the Hamiltonian.
        detected: those of ``part`` whose signal is wanted (all when None).
    """
    j = system.matrix()
    counts = [system.groups[g].count for g in part]
    inner = [[j[a][b] for b in part] for a in part]
    seen = None if detected is None else [part.index(g) for g in detected]
    for offsets, share in _heteronuclear(system, part, j):
        shifts = [system.groups[g].hz + offset for g, offset in zip(part, offsets, strict=True)]
        for twice, weight in combinations(counts):
            scale = share * weight / 2 ** (sum(counts) - 1)
            _add_composite(heap, twice, shifts, inner, scale, seen)


def _heteronuclear(
    system: SpinSystem, part: Sequence[int], j: list[list[float]]
) -> Iterator[tuple[list[float], float]]:
    """(shift of each group of ``part`` in Hz, share) for every state of the heteronuclei coupled to it."""
    others = [h for h, n in enumerate(system.groups) if not n.observed and any(j[g][h] for g in part)]
    sizes = [system.groups[h].count for h in others]
    for levels in choices(*(range(n + 1) for n in sizes)):
        share = 1.0
        for k, n in zip(levels, sizes, strict=True):
            share *= comb(n, k) / 2**n
        yield (
            [sum(j[g][h] * (k - n / 2) for h, k, n in zip(others, levels, sizes, strict=True)) for g in part],
            share,
        )


def _add_composite(
    heap: Heap,
    twice: tuple[int, ...],
    shifts: Sequence[float],
    j: list[list[float]],
    scale: float,
    detected: Sequence[int] | None,
) -> None:
    """Add the lines of composite spins of the given 2 F, intensities times ``scale``."""
    basis = blocks(twice)
    diagonal = _diagonal(basis, shifts, j)
    least = sqrt(_NO_INTENSITY / scale)
    below: tuple[array[float], array[float]] | None = None
    for level, codes in enumerate(basis.codes):
        here = eigh(len(codes), _block(basis, level, diagonal, j))
        if below is not None:
            total = _transition(basis, level, below[1], here[1], range(len(twice)))
            own = total if detected is None else _transition(basis, level, below[1], here[1], detected)
            heap.add(transitions((below[0], here[0]), (total, own), scale, least))
        below = here


def _transition(
    basis: Blocks, level: int, below: array[float], here: array[float], groups: Sequence[int]
) -> array[float]:
    """Amplitudes between eigenstates of two neighbouring blocks: rows below, columns here."""
    n, m = len(basis.codes[level - 1]), len(basis.codes[level])
    lowered = product(n, m, m, lowering_matrix(basis.twice, level, tuple(groups)), here)
    return product(n, n, m, below, lowered, turned=True)


def _diagonal(basis: Blocks, shifts: Sequence[float], j: list[list[float]]) -> list[float]:
    """Diagonal element of every state, by code: sum nu m + sum J m m'."""
    energies, levels = [0.0], [()]  # type: tuple[list[float], list[tuple[float, ...]]]
    for g, twice in enumerate(basis.twice):
        row, shift = j[g], shifts[g]
        fields = [shift + sum(hz * m for hz, m in zip(row, state, strict=False) if hz) for state in levels]
        ms = [k - twice / 2 for k in range(twice + 1)]
        energies = [e + f * m for m in ms for e, f in zip(energies, fields, strict=True)]
        levels = [(*state, m) for m in ms for state in levels]
    return energies


def _block(basis: Blocks, level: int, diagonal: list[float], j: list[list[float]]) -> array[float]:
    """The Hamiltonian of one block, row-major."""
    codes = basis.codes[level]
    n = len(codes)
    matrix = zeros(n * n)
    for at, code in enumerate(codes):
        matrix[at * (n + 1)] = diagonal[code]
    for (a, b), flips in flip_flops(basis.twice, level).items():
        hz = j[a][b]
        for above, below, coefficient in flips if hz else ():
            matrix[above] = matrix[below] = hz * coefficient
    return matrix
