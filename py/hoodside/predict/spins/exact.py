"""Exact line list of a spin system: one symmetric eigenproblem per total Fz, without perturbation theory.

High-field Hamiltonian H = sum nu_i Iz_i + sum J_ij I_i . I_j in Hz, real and symmetric in the product basis.
Couplings to heteronuclei keep only J Iz Sz, so each state of a heteronucleus is a fixed shift of the lines.
Corio, Structure of High-Resolution NMR Spectra, 1966.
"""

from __future__ import annotations

from array import array
from collections.abc import Sequence
from math import sqrt

from hoodside.numerics import eigh, product, transitions, zeros
from hoodside.predict.spins.basis import Blocks, blocks, combinations, flip_flops, lowering_matrix
from hoodside.predict.spins.model import Heap, LineList, SpinSystem
from hoodside.predict.spins.surroundings import Hamiltonian, second_order, surrounded

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
    add_cluster(heap, system, part, part if detected is None else detected, ())


def add_cluster(
    heap: Heap, system: SpinSystem, inside: Sequence[int], detected: Sequence[int], outer: Sequence[int]
) -> None:
    """Add the signal of some groups of a cluster.

    Args:
        heap: where the lines go.
        system: all groups.
        inside: observed groups that enter the Hamiltonian.
        detected: those of ``inside`` whose signal is wanted.
        outer: groups that act on those inside in second order (see ``surroundings``).
    """
    counts = [system.groups[g].count for g in inside]
    seen = None if len(detected) == len(inside) else [inside.index(g) for g in detected]
    for around in surrounded(system, system.matrix(), inside, outer):
        for twice, weight in combinations(counts):
            scale = around.share * weight / 2 ** (sum(counts) - 1)
            _add_composite(heap, twice, around, scale, seen)


def _add_composite(
    heap: Heap, twice: tuple[int, ...], around: Hamiltonian, scale: float, detected: Sequence[int] | None
) -> None:
    """Add the lines of composite spins of the given 2 F, intensities times ``scale``."""
    basis = blocks(twice)
    diagonal = _diagonal(basis, around)
    least = sqrt(_NO_INTENSITY / scale)
    every = range(len(twice))
    below: tuple[array[float], array[float]] | None = None
    for level, codes in enumerate(basis.codes):
        here = eigh(len(codes), _block(basis, level, diagonal, around.flips))
        if below is not None:
            total = _transition(basis, level, below[1], here[1], every, around.weights)
            own = total
            if detected is not None:
                own = _transition(basis, level, below[1], here[1], detected, around.weights)
            heap.add(transitions((below[0], here[0]), (total, own), scale, least))
        below = here


def _transition(
    basis: Blocks,
    level: int,
    below: array[float],
    here: array[float],
    groups: Sequence[int],
    weights: Sequence[float],
) -> array[float]:
    """Amplitudes between eigenstates of two neighbouring blocks: rows below, columns here."""
    n, m = len(basis.codes[level - 1]), len(basis.codes[level])
    lowered = product(n, m, m, lowering_matrix(basis.twice, level, groups, weights), here)
    return product(n, n, m, below, lowered, turned=True)


def _diagonal(basis: Blocks, around: Hamiltonian) -> list[float]:
    """Diagonal element of every state, by code: sum nu m + sum J m m', and what outer spins do to it."""
    energies, levels = [0.0], [()]  # type: tuple[list[float], list[tuple[float, ...]]]
    for g, twice in enumerate(basis.twice):
        row, shift = around.along[g], around.shifts[g]
        fields = [shift + sum(hz * m for hz, m in zip(row, state, strict=False) if hz) for state in levels]
        ms = [k - twice / 2 for k in range(twice + 1)]
        energies = [e + f * m for m in ms for e, f in zip(energies, fields, strict=True)]
        levels = [(*state, m) for m in ms for state in levels]
    squares = [t / 2 * (t / 2 + 1) for t in basis.twice]
    for outer in around.outer:
        energies = [
            e + second_order(outer, around, squares, ms) for e, ms in zip(energies, levels, strict=True)
        ]
    return energies


def _block(basis: Blocks, level: int, diagonal: list[float], flips: list[list[float]]) -> array[float]:
    """The Hamiltonian of one block, row-major."""
    codes = basis.codes[level]
    n = len(codes)
    matrix = zeros(n * n)
    for at, code in enumerate(codes):
        matrix[at * (n + 1)] = diagonal[code]
    for (a, b), elements in flip_flops(basis.twice, level).items():
        hz = flips[a][b]
        for above, below, coefficient in elements if hz else ():
            matrix[above] = matrix[below] = hz * coefficient
    return matrix
