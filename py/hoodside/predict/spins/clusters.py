"""Line lists of large systems from overlapping clusters of spins.

Each group is detected inside a cluster of those that shape its lines (see ``cluster_choice``). The signal of
a set of spins D within a cluster is <f|D-|i><f|F-|i>, so that clusters add up to the whole spectrum. After
Castillo, Patiny and Wist, J. Magn. Reson. 2011, 209, 123. The error is what perturbation theory says is lost;
where that is much, how far the lines move as the clusters grow.
"""

from __future__ import annotations

from array import array
from collections.abc import Iterable
from dataclasses import replace

from hoodside.numerics import merge_lines
from hoodside.predict.spins.cluster_choice import (
    CLUSTER_STATES,
    MOST_STATES,
    TOLERANCE,
    Assigned,
    Cluster,
    block_size,
    choose_clusters,
)
from hoodside.predict.spins.comparing import displacement
from hoodside.predict.spins.exact import add_cluster, add_part, exact_lines, independent_parts
from hoodside.predict.spins.model import Heap, LineList, SpinSystem

#: States in the largest block that are still solved exactly (ten different spins of 1/2).
EXACT_STATES = 260
#: Error in Hz for an estimated loss: factor and least value, from tests/bench/bench_spins.py.
_PER_LOSS, _LEAST_ERROR = 4.0, 0.02
#: Error in Hz for the mean movement of the lines when the groups added last are taken away: factor.
_PER_MOVE = 8.0
#: Groups taken away from a cluster to see how far its lines move.
_TAKEN_AWAY = 2
#: Lines of clusters: Hz within which they are one, share of the strongest below which they are left out.
_COARSE, _FAINT = 2e-3, 1e-5


def simulate(system: SpinSystem, exact_states: int = EXACT_STATES) -> LineList:
    """The line list of any system: exact where the largest block allows, else by clusters.

    Args:
        system: at most a few dozen groups.
        exact_states: largest block, in states, solved exactly.
    """
    parts = independent_parts(system)
    if all(block_size(system, part) <= exact_states for part in parts):
        return exact_lines(system)
    return cluster_lines(system, CLUSTER_STATES, exact_states)


def cluster_lines(
    system: SpinSystem,
    states: int = CLUSTER_STATES,
    exact_states: int = 0,
    most_states: int = MOST_STATES,
) -> LineList:
    """The line list by clusters.

    Args:
        system: at most a few dozen groups.
        states: largest block of a cluster.
        exact_states: parts whose largest block is no larger are solved exactly.
        most_states: largest block where a cluster has to grow further for its lines to be right.
    Returns: lines whose ``error_hz`` says how far a line may be off.
    """
    heap, smaller, loss = Heap(), Heap(), 0.0
    for part in independent_parts(system):
        if block_size(system, part) <= max(exact_states, states):
            for kept in (heap, smaller):
                add_part(kept, system, part)
            continue
        for assigned in choose_clusters(system, part, states, most_states):
            found = _signal(system, assigned.cluster, tuple(assigned.losses))
            heap.add(found)
            smaller.add(found if assigned.loss <= TOLERANCE else _with_less(system, assigned))
            loss = max(loss, assigned.loss)
    lines = heap.sorted(_COARSE, _FAINT, "clusters", _LEAST_ERROR + _PER_LOSS * loss)
    if loss <= TOLERANCE:
        return lines
    moved = displacement(lines, smaller.sorted(_COARSE, _FAINT))
    return replace(lines, error_hz=min(lines.error_hz, _PER_LOSS * TOLERANCE + _PER_MOVE * moved))


def _signal(
    system: SpinSystem, cluster: Cluster, detected: Iterable[int]
) -> tuple[array[float], array[float]]:
    """The lines of the detected groups."""
    heap = Heap()
    add_cluster(heap, system, cluster.inside, tuple(detected), cluster.outer)
    return merge_lines(heap.hz, heap.intensity, _COARSE, _FAINT)


def _with_less(system: SpinSystem, assigned: Assigned) -> tuple[array[float], array[float]]:
    """The same lines, those of groups that lose much from the cluster without the groups added last."""
    cluster = assigned.cluster
    certain = [g for g, hz in assigned.losses.items() if hz <= TOLERANCE]
    doubtful = [g for g in assigned.losses if g not in certain]
    spare = [g for g in cluster.inside if g not in doubtful][-_TAKEN_AWAY:]
    kept = tuple(g for g in cluster.inside if g not in spare)
    heap = Heap()
    if certain:
        heap.add(_signal(system, cluster, certain))
    heap.add(_signal(system, replace(cluster, inside=kept), doubtful))
    return heap.hz, heap.intensity
