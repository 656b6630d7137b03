"""How spins outside a cluster act on the spins inside it.

An outer spin K that differs much in frequency from those inside keeps its own Fz, so that each of its states
gives the cluster a Hamiltonian of its own. Its flip-flops enter in second order (Van Vleck's transformation):
every product state is repelled by the state that a flip leads to; two spins A and B inside get the flip-flop

    -m J_A J_B (1/D_A + 1/D_B)/4 (A+ B- + A- B+),  D = nu_A - nu_K,

and the lowering operator of A is weighted so that multiplets roof towards K, as in the closed form of AX.
Corio, Structure of High-Resolution NMR Spectra, 1966, perturbation theory of weak coupling.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import product
from math import copysign, hypot, sqrt

from hoodside.predict.spins.basis import total_spins
from hoodside.predict.spins.model import SpinSystem


@dataclass(frozen=True, slots=True)
class Outer:
    """One state of an outer spin: F(F+1), m, its frequency, and J to each group inside, Hz."""

    square: float
    m: float
    hz: float
    first: tuple[float, ...]


@dataclass(frozen=True, slots=True)
class Hamiltonian:
    """The Hamiltonian of some groups for one state of what surrounds them, Hz.

    Attributes:
        shifts: coefficient of Iz per group.
        along: of Iz Iz per two groups.
        flips: of (I+ I- + I- I+)/2 per two groups.
        outer: spins whose flips with the groups shift levels in second order.
        weights: of I- per group in the signal.
        share: of the molecules in this state.
    """

    shifts: list[float]
    along: list[list[float]]
    flips: list[list[float]]
    outer: tuple[Outer, ...]
    weights: list[float]
    share: float


#: (F(F+1), m, share of the molecules) of a composite spin.
State = tuple[float, float, float]


def outer_states(count: int) -> list[State]:
    """Every state of ``count`` equivalent spins of 1/2 that acts differently on others."""
    return [
        (twice / 2 * (twice / 2 + 1), k - twice / 2, times / 2**count)
        for twice, times in total_spins(count)
        for k in range(twice + 1)
    ]


def hetero_states(count: int) -> list[State]:
    """The same for heteronuclei, of which m alone matters."""
    shares: dict[float, float] = {}
    for _, m, share in outer_states(count):
        shares[m] = shares.get(m, 0.0) + share
    return [(0.0, m, share) for m, share in sorted(shares.items())]


def surrounded(
    system: SpinSystem, j: list[list[float]], inside: Sequence[int], outer: Sequence[int] = ()
) -> Iterator[Hamiltonian]:
    """The Hamiltonian of the groups ``inside`` for every state of the outer groups and the heteronuclei."""
    hetero = [h for h, n in enumerate(system.groups) if not n.observed and any(j[g][h] for g in inside)]
    kinds = [outer_states(system.groups[k].count) for k in outer]
    kinds += [hetero_states(system.groups[h].count) for h in hetero]
    around = [*outer, *hetero]
    inner = [[j[a][b] for b in inside] for a in inside]
    for states in product(*kinds):
        found = _plain(system, inside, inner)
        for k, state in zip(around, states, strict=True):
            # What the other outer spins do to the frequency of this one.
            hz = system.groups[k].hz + sum(j[k][x] * s[1] for x, s in zip(around, states, strict=True))
            found = _under(found, system, j, inside, k, hz, state)
        yield found


def _plain(system: SpinSystem, inside: Sequence[int], inner: list[list[float]]) -> Hamiltonian:
    n = len(inside)
    return Hamiltonian([system.groups[g].hz for g in inside], inner, inner, (), [1.0] * n, 1.0)


def _under(
    h: Hamiltonian,
    system: SpinSystem,
    j: list[list[float]],
    inside: Sequence[int],
    k: int,
    hz: float,
    state: State,
) -> Hamiltonian:
    """The Hamiltonian under one state of one more group outside."""
    square, m, share = state
    first = [j[g][k] for g in inside]
    shifts = [nu + c * m for nu, c in zip(h.shifts, first, strict=True)]
    if not system.groups[k].observed:  # so far away that its flip-flops do nothing
        return Hamiltonian(shifts, h.along, h.flips, h.outer, h.weights, h.share * share)
    apart = [system.groups[g].hz - system.groups[k].hz for g in inside]
    ratio = [c * d / (c * c + d * d) if c else 0.0 for c, d in zip(first, apart, strict=True)]
    return Hamiltonian(
        shifts,
        h.along,
        _flips(h.flips, first, ratio, m),
        (*h.outer, Outer(square, m, hz, tuple(first))),
        [w * _roof(m, c, d) for w, c, d in zip(h.weights, first, apart, strict=True)],
        h.share * share,
    )


def _roof(m: float, c: float, d: float) -> float:
    """Factor of the amplitude of a line of a group under a neighbour with m, J and difference in Hz given."""
    return sqrt(max(0.05, 1 - 2 * m * c / copysign(hypot(c, d), d))) if c else 1.0


def second_order(outer: Outer, around: Hamiltonian, squares: Sequence[float], ms: Sequence[float]) -> float:
    """Shift in Hz of one product state by flips with an outer spin.

    Args:
        outer: the outer spin.
        around: the Hamiltonian it belongs to.
        squares, ms: F(F+1) and m of every group inside.
    """
    total, own, k = 0.0, outer.hz + _weighted(outer.first, ms), outer.m
    for g, c in enumerate(outer.first):
        if c:
            m, half = ms[g], c * c / 4
            # How far the two resonances lie apart, without what each does to the other.
            apart = around.shifts[g] + _weighted(around.along[g], ms) - own + c * (m - k)
            down = half * (outer.square - k * (k + 1)) * (squares[g] - m * (m - 1))
            up = half * (outer.square - k * (k - 1)) * (squares[g] - m * (m + 1))
            total += _repelled(apart + c * (k - m + 1), down) if down > 0 else 0.0
            total += _repelled(-apart + c * (m - k + 1), up) if up > 0 else 0.0
    return total


def _weighted(couplings: Sequence[float], ms: Sequence[float]) -> float:
    return sum([hz * m for hz, m in zip(couplings, ms, strict=True)])


def _repelled(gap: float, flip: float) -> float:
    """How far a level moves off another one ``gap`` below it, joined by an element of square ``flip``."""
    moved = (sqrt(gap * gap + 4 * flip) - abs(gap)) / 2
    return moved if gap >= 0 else -moved


def _flips(flips: list[list[float]], first: list[float], ratio: list[float], m: float) -> list[list[float]]:
    near = [a for a, c in enumerate(first) if c]
    if len(near) < 2 or not m:
        return flips
    found = [list(row) for row in flips]
    for a in near:
        for b in near:
            if a != b:
                found[a][b] -= m * (first[a] * ratio[b] + ratio[a] * first[b]) / 2
    return found
