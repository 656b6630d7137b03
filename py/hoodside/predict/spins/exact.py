"""Exact line list of a spin system: one symmetric eigenproblem per total Fz, without perturbation theory.

High-field Hamiltonian H = sum nu_i Iz_i + sum J_ij I_i . I_j in Hz, real and symmetric in the product basis.
Couplings to heteronuclei keep only J Iz Sz, so each state of a heteronucleus is a fixed shift of the lines.
Corio, Structure of High-Resolution NMR Spectra, 1966.
"""

from __future__ import annotations

from array import array
from collections.abc import Sequence
from dataclasses import dataclass
from math import sqrt

from hoodside.numerics import eigh, product, transitions, zeros
from hoodside.predict.spins.basis import Blocks, blocks, combinations, flip_flops, lowering_matrix
from hoodside.predict.spins.model import Heap, LineList, SpinSystem
from hoodside.predict.spins.surroundings import Hamiltonian, second_order, surrounded
from hoodside.predict.spins.symmetry import Exchange, exchange_of, fold, folded_block, folded_lowering

#: Hz within which lines are one.
COINCIDENT = 1e-7
#: Share of the strongest line below which a line is left out.
NEGLIGIBLE = 1e-7
#: States of composite spins from which it pays to look for a symmetry (eight spins of 1/2).
_WORTH_FOLDING = 200
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
    exchange = exchange_of(around, twice) if len(diagonal) >= _WORTH_FOLDING else None
    for sector in [None] if exchange is None else [(exchange, 1), (exchange, -1)]:
        _add_sector(heap, _Levels(basis, around, diagonal, sector), scale, detected)


def _add_sector(heap: Heap, levels: _Levels, scale: float, detected: Sequence[int] | None) -> None:
    """Add the lines between the states of one symmetry."""
    least = sqrt(_NO_INTENSITY / scale)
    every = range(len(levels.basis.twice))
    below: tuple[array[float], array[float]] | None = None
    for level in range(len(levels.basis.codes)):
        size = levels.size(level)
        here = eigh(size, levels.block(level)) if size else None
        if below is not None and here is not None:
            total = levels.amplitudes(level, below[1], here[1], every)
            own = total if detected is None else levels.amplitudes(level, below[1], here[1], detected)
            heap.add(transitions((below[0], here[0]), (total, own), scale, least))
        below = here


@dataclass(frozen=True, slots=True)
class _Levels:
    """The states of some composite spins, or those of one symmetry: an exchange and the sign under it."""

    basis: Blocks
    around: Hamiltonian
    diagonal: list[float]
    sector: tuple[Exchange, int] | None

    def size(self, level: int) -> int:
        """Number of states of a level."""
        if self.sector is None:
            return len(self.basis.codes[level])
        return fold(self.basis.twice, level, *self.sector).size

    def block(self, level: int) -> array[float]:
        """The Hamiltonian of one level, row-major."""
        if self.sector is None:
            return _block(self.basis, level, self.diagonal, self.around.flips)
        return folded_block(self.basis.twice, level, *self.sector, self.diagonal, self.around.flips)

    def amplitudes(
        self, level: int, below: array[float], here: array[float], groups: Sequence[int]
    ) -> array[float]:
        """F- of some groups between eigenstates of two neighbouring levels: rows below, columns here."""
        n, m = self.size(level - 1), self.size(level)
        if self.sector is None:
            lowering = lowering_matrix(self.basis.twice, level, groups, self.around.weights)
        else:
            lowering = folded_lowering(self.basis.twice, level, *self.sector, groups, self.around.weights)
        return product(n, n, m, below, product(n, m, m, lowering, here), turned=True)


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
