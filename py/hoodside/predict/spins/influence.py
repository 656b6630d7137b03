"""How much each coupling of a spin system matters for the lines of one of its groups.

A coupling J between spins that differ by D mixes their states by J^2/(J^2 + D^2). What happens at the far end
of a path of couplings reaches the lines of the first spin as the product of the mixings along the path; one
coupling on the way enters in full, as the splitting that the mixing carries along (virtual coupling, Musher
and Corey, Tetrahedron 1962, 18, 791). Estimates of perturbation theory, in Hz, up to a factor.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from math import hypot, sqrt

from hoodside.predict.spins.model import SpinSystem

#: Two groups that couple.
Edge = tuple[int, int]
#: Place of a group: in the Hamiltonian of a cluster, acting on it in second order, or left out.
INSIDE, OUTER, REST = 0, 1, 2
#: Share of the splittings by third spins that brings two shifts nearer to each other.
_SPREAD = 0.5
#: What second order leaves of the flips with an outer group, as a multiple of the estimate.
_THIRD_ORDER = 2.0
#: Relative and absolute gain (Hz) below which a longer path is not followed.
_GAIN, _FAINT = 1 + 1e-6, 1e-8


@dataclass(frozen=True, slots=True)
class Influence:
    """What the couplings of a part do to one group, the centre. All in Hz.

    Attributes:
        flips: per pair, for its flip-flops.
        losses: per pair, for the whole coupling.
        strength: per group, the largest splitting that reaches the centre from there.
    """

    flips: dict[Edge, float]
    losses: dict[Edge, float]
    strength: dict[int, float]

    def error(self, place: Mapping[int, int]) -> float:
        """Hz that lines of the centre may be off, from the place of every group."""
        return sum(self.edge_error(edge, place) for edge in self.flips)

    def edge_error(self, edge: Edge, place: Mapping[int, int]) -> float:
        """The share of one coupling in ``error``."""
        a, b = sorted((place[edge[0]], place[edge[1]]))
        if b == INSIDE:
            return 0.0
        if a == INSIDE:
            return _THIRD_ORDER * self.flips[edge] if b == OUTER else self.losses[edge]
        return self.flips[edge]

    def loss(self, group: int, inside: Iterable[int]) -> float:
        """Hz lost when a group's couplings with those inside are left out."""
        pairs = ((min(group, g), max(group, g)) for g in inside)
        return sum(self.losses.get(pair, 0.0) for pair in pairs)


class Couplings:
    """The couplings of one connected part of a system, and how much they mix."""

    def __init__(self, system: SpinSystem, part: Sequence[int]) -> None:
        self._groups = system.groups
        self._j = system.matrix()
        self.part = tuple(part)
        self.edges: list[Edge] = [(a, b) for a in part for b in part if a < b and self._j[a][b]]
        self._near: dict[int, list[int]] = {g: [] for g in part}
        self._mixing: dict[Edge, float] = {}
        self._apart: dict[Edge, float] = {}
        for a, b in self.edges:
            self._near[a].append(b)
            self._near[b].append(a)
            self._mixing[a, b] = self._mixing[b, a] = self._mixed(a, b)
            self._apart[a, b] = self._apart[b, a] = hypot(
                self._j[a][b], self._groups[a].hz - self._groups[b].hz
            )

    def influence_on(self, centre: int) -> Influence:
        """What every coupling does to the lines of ``centre``."""
        reach, strength = self._along_paths(centre)
        flips, losses = {}, {}
        for a, b in self.edges:
            hz, mixing = abs(self._j[a][b]), self._mixing[a, b]
            direct = max(reach[a], reach[b]) * hz
            carried = 0.0 if centre in (a, b) else min(strength[a], strength[b])
            flips[a, b] = max(direct, carried) * mixing
            field = max(direct, self._shifted(strength, a, b), self._shifted(strength, b, a))
            losses[a, b] = hz if centre in (a, b) else flips[a, b] + field
        return Influence(flips, losses, strength)

    def _mixed(self, a: int, b: int) -> float:
        """J^2/(J^2 + D^2), with D as small as third spins may make it and J^2 times the spins that flip."""
        others = [(x, n.count) for x, n in enumerate(self._groups) if x not in (a, b)]
        spread = sum((self._j[a][x] ** 2 + self._j[b][x] ** 2) * n / 4 for x, n in others)
        apart = max(0.0, abs(self._groups[a].hz - self._groups[b].hz) - _SPREAD * sqrt(spread))
        flipped = self._j[a][b] ** 2 * (self._groups[a].count + self._groups[b].count - 1)
        return flipped / (flipped + apart * apart)

    def _along_paths(self, centre: int) -> tuple[dict[int, float], dict[int, float]]:
        """Per group: product of mixings on the best path, and the same with one coupling (Hz) in full."""
        reach, strength = dict.fromkeys(self.part, 0.0), dict.fromkeys(self.part, 0.0)
        reach[centre] = 1.0
        queue = [centre]
        for a in queue:
            for b in self._near[a]:
                mixing, hz = self._mixing[a, b], abs(self._j[a][b])
                far, strong = reach[a] * mixing, max(strength[a] * mixing, reach[a] * hz)
                if far > reach[b] * _GAIN + _FAINT or strong > strength[b] * _GAIN + _FAINT:
                    reach[b], strength[b] = max(far, reach[b]), max(strong, strength[b])
                    queue.append(b)
        return reach, strength

    def _shifted(self, strength: Mapping[int, float], c: int, x: int) -> float:
        """Hz by which the field of ``x`` at ``c`` changes what mixing carries through ``c``."""
        hz = abs(self._j[c][x])
        return max(
            (
                strength[b] * self._mixing[b, c] * min(1.0, hz / self._apart[b, c])
                for b in self._near[c]
                if b != x
            ),
            default=0.0,
        )
