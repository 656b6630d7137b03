"""Line lists of large systems from overlapping clusters of spins.

Each group is detected inside a cluster of the groups that shape its lines; what is left outside acts on the
cluster only through J Iz Iz, or not at all. The signal of a set of spins D within a cluster is
<f|D-|i><f|F-|i>, so that clusters add up to the whole spectrum. After Castillo, Patiny and Wist, J. Magn.
Reson. 2011, 209, 123. How far lines move when smaller clusters grow to this size is taken as the error.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise
from math import hypot

from hoodside.predict.spins.basis import largest_block
from hoodside.predict.spins.exact import add_part, exact_lines, independent_parts
from hoodside.predict.spins.model import Heap, LineList, Nuclei, SpinSystem

#: States in the largest block that are still solved exactly (ten different spins of 1/2).
EXACT_STATES = 260
#: The same for one cluster (eight different spins): six times faster than nine.
CLUSTER_STATES = 72
#: By how much clusters are made smaller (in states, about two spins) to see how far lines move.
_SHRINK = 3
#: Lines of clusters: Hz within which they are one, share of the strongest below which they are left out.
_COARSE, _FAINT = 2e-3, 1e-5
#: Hz: an outer group whose influence is smaller is left out altogether.
_NO_INFLUENCE = 0.02
#: Mixing above which two groups are detected together.
_TOGETHER = 0.1
#: Number of states of the outer groups summed over for one cluster.
_OUTER_STATES = 8


@dataclass(frozen=True, slots=True)
class _Cluster:
    inside: tuple[int, ...]
    detected: tuple[int, ...]
    outer: tuple[int, ...]


def simulate(system: SpinSystem, exact_states: int = EXACT_STATES) -> LineList:
    """The line list of any system: exact where the largest block allows, else by clusters.

    Args:
        system: at most a few dozen groups.
        exact_states: largest block, in states, solved exactly.
    """
    parts = independent_parts(system)
    if all(_states(system, part) <= exact_states for part in parts):
        return exact_lines(system)
    return cluster_lines(system, CLUSTER_STATES, exact_states)


def cluster_lines(
    system: SpinSystem, states: int = CLUSTER_STATES, exact_states: int = 0, estimate: bool = True
) -> LineList:
    """The line list by clusters whose largest block has at most ``states`` states.

    ``estimate``: whether to find ``error_hz`` by a second run with smaller clusters.
    """
    heap = Heap()
    for part in independent_parts(system):
        if _states(system, part) <= max(exact_states, states):
            add_part(heap, system, part)
        else:
            _add_clusters(heap, system, part, states)
    found = heap.sorted(_COARSE, _FAINT, "clusters")
    if not estimate:
        return found
    smaller = cluster_lines(system, states // _SHRINK, exact_states, estimate=False)
    return LineList(found.hz, found.intensity, "clusters", displacement(found, smaller))


def _states(system: SpinSystem, part: Sequence[int]) -> int:
    return largest_block([system.groups[g].count for g in part])


def _add_clusters(heap: Heap, system: SpinSystem, part: list[int], states: int) -> None:
    j = system.matrix()
    for cluster in _clusters(system, part, j, states):
        reduced = _with_outer(system, cluster)
        inside = list(range(len(cluster.inside)))
        lines = Heap()
        add_part(lines, reduced, inside, [cluster.inside.index(g) for g in cluster.detected])
        thinned = lines.sorted(_COARSE, _FAINT)
        heap.add((thinned.hz, thinned.intensity))


def _with_outer(system: SpinSystem, cluster: _Cluster) -> SpinSystem:
    """The cluster as a system of its own; outer groups become like heteronuclei (J Iz Sz only)."""
    hetero = [h for h, n in enumerate(system.groups) if not n.observed]
    kept = [*cluster.inside, *cluster.outer, *hetero]
    place = {g: k for k, g in enumerate(kept)}
    groups = tuple(Nuclei(system.groups[g].hz, system.groups[g].count, g in cluster.inside) for g in kept)
    pairs = tuple((place[a], place[b], hz) for a, b, hz in system.couplings if a in place and b in place)
    return SpinSystem(groups, pairs)


def _clusters(system: SpinSystem, part: list[int], j: list[list[float]], states: int) -> list[_Cluster]:
    mixing = {(a, b): _mixing(system, j, a, b) for a in part for b in part if j[a][b]}
    found: dict[tuple[tuple[int, ...], tuple[int, ...]], list[int]] = {}
    for detected in _detected_together(system, part, mixing, states):
        influence = _influence(part, detected, j, mixing)
        inside: list[int] = list(detected)
        outer: list[int] = []
        for g in sorted(influence, key=lambda g: -influence[g]):
            if influence[g] < _NO_INFLUENCE:
                break
            if _states(system, [*inside, g]) <= states:
                inside.append(g)
            elif _outer_states(system, [*outer, g]) <= _OUTER_STATES:
                outer.append(g)
        key = tuple(sorted(inside)), tuple(sorted(outer))
        found[key] = sorted([*found.get(key, []), *detected])
    return [_Cluster(inside, tuple(detected), outer) for (inside, outer), detected in found.items()]


def _outer_states(system: SpinSystem, outer: Sequence[int]) -> int:
    total = 1
    for g in outer:
        total *= system.groups[g].count + 1
    return total


def _mixing(system: SpinSystem, j: list[list[float]], a: int, b: int) -> float:
    """How much J mixes the states of two groups: J over the root of J squared + difference squared."""
    return abs(j[a][b]) / hypot(j[a][b], system.groups[a].hz - system.groups[b].hz)


def _detected_together(
    system: SpinSystem, part: list[int], mixing: dict[tuple[int, int], float], states: int
) -> list[list[int]]:
    """Sets of strongly mixed groups, as long as they leave room in the cluster for their neighbours."""
    sets = [[g] for g in part]
    for (a, b), value in sorted(mixing.items(), key=lambda item: -item[1]):
        if value < _TOGETHER:
            break
        first = next(s for s in sets if a in s)
        second = next(s for s in sets if b in s)
        if first is not second and _states(system, [*first, *second]) * 8 <= states:
            first += second
            sets.remove(second)
    return sets


def _influence(
    part: list[int],
    detected: Sequence[int],
    j: list[list[float]],
    mixing: dict[tuple[int, int], float],
) -> dict[int, float]:
    """Effect in Hz of every other group on the lines of the detected ones.

    Along a path it is the last coupling times the mixing of every pair before it.
    """
    reach = dict.fromkeys(detected, 1.0)
    effect: dict[int, float] = {}
    queue = list(detected)
    for g in queue:
        for h in part:
            if not j[g][h] or h in detected:
                continue
            effect[h] = max(effect.get(h, 0.0), reach[g] * abs(j[g][h]))
            further = reach[g] * mixing[g, h]
            if further > reach.get(h, 0.0):
                reach[h] = further
                queue.append(h)
    return effect


def displacement(a: LineList, b: LineList) -> float:
    """How far apart two spectra of equal total intensity are: mean distance in Hz that intensity must move.

    The sum of absolute differences of the integrals, per unit of intensity (the Wasserstein distance).
    """
    steps = sorted(
        [(hz, i) for hz, i in zip(a.hz, a.intensity, strict=True)]
        + [(hz, -i) for hz, i in zip(b.hz, b.intensity, strict=True)]
    )
    total, moved, balance = sum(a.intensity), 0.0, 0.0
    for (hz, i), (following, _) in pairwise(steps):
        balance += i
        moved += abs(balance) * (following - hz)
    return moved / total if total else 0.0
