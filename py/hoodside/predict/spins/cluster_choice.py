"""Which spins form the clusters that a large system is cut into.

A cluster is grown about every group by the one whose absence costs its lines most (see ``influence``), until
what is lost is small. Groups next to a cluster act on it in second order (see ``surroundings``). A cluster
then serves every group in it that loses little.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass

from hoodside.predict.spins.basis import largest_block, total_spins
from hoodside.predict.spins.influence import INSIDE, OUTER, REST, Couplings, Influence
from hoodside.predict.spins.model import SpinSystem

#: States in the largest block of a cluster (eight different spins), and for one that has to grow further.
CLUSTER_STATES, MOST_STATES = 72, 260
#: States up to which a cluster grows for the last bit of precision.
_FINE_STATES = 130
#: Estimated loss in Hz that a cluster should have at most, that below which it grows no further, and that
#: which is put up with where larger clusters lose more.
_WANTED, _ENOUGH, TOLERANCE = 5e-4, 5e-5, 5e-3
#: Groups detected together where much is lost, and by how much more than in its own cluster it may be.
_NEAREST, _ABOUT_OWN = 3, 1.5
#: Number of states of the outer groups summed over for one cluster; the same for a large one, and where much
#: is lost anyway.
_OUTER_STATES, _FEW_OUTER_STATES = 12, 4
#: Hz lost below which a group is left out altogether.
_NO_INFLUENCE = 1e-3


@dataclass(frozen=True, slots=True)
class Cluster:
    """Groups inside and outside a cluster.

    Attributes:
        inside: groups in its Hamiltonian, in the order in which they were added.
        outer: groups that act on those in second order.
        states: in its largest block.
        place: of every group of the part.
        loss: estimated for the group it was grown for, Hz.
    """

    inside: tuple[int, ...]
    outer: tuple[int, ...]
    states: int
    place: Mapping[int, int]
    loss: float


@dataclass(frozen=True, slots=True)
class Assigned:
    """A cluster, and the estimated loss in Hz of every group detected in it."""

    cluster: Cluster
    losses: dict[int, float]

    @property
    def loss(self) -> float:
        """The largest loss."""
        return max(self.losses.values())


def choose_clusters(
    system: SpinSystem, part: list[int], states: int = CLUSTER_STATES, most_states: int = MOST_STATES
) -> list[Assigned]:
    """As few clusters as detect every group of a connected part well."""
    couplings = Couplings(system, part)
    on = {g: couplings.influence_on(g) for g in part}
    own = {
        g: _cheaper(
            system, couplings, on[g], _best(list(_growth(system, couplings, g, on[g], most_states)), states)
        )
        for g in part
    }
    left, found = set(part), []
    while left:
        served = {g: _served(own[g], left, on, own) for g in part}
        k = max(part, key=lambda g: (len(served[g]), -own[g].states))
        found.append(Assigned(own[k], served[k]))
        left -= set(served[k])
    return found


def _served(
    cluster: Cluster, left: Iterable[int], on: Mapping[int, Influence], own: Mapping[int, Cluster]
) -> dict[int, float]:
    """What is lost for those groups that a cluster detects as well as need be.

    Where too much is lost, that is the group it was grown for, and those of the ones nearest to it that are
    about as well off in it as in their own.
    """
    lost = {g: on[g].error(cluster.place) for g in cluster.inside if g in left}
    near = cluster.inside[:_NEAREST]
    return {
        g: hz
        for g, hz in lost.items()
        if hz <= max(_WANTED, own[g].loss)
        or own[g] is cluster
        or (g in near and hz <= _ABOUT_OWN * own[g].loss)
    }


def _cheaper(system: SpinSystem, couplings: Couplings, influence: Influence, cluster: Cluster) -> Cluster:
    """A cluster that loses much anyway, with fewer states outside."""
    if cluster.loss <= TOLERANCE:
        return cluster
    return _surrounded(system, couplings, influence, list(cluster.inside), _FEW_OUTER_STATES)


def block_size(system: SpinSystem, part: Iterable[int]) -> int:
    """Number of states in the largest block of some groups."""
    return largest_block([system.groups[g].count for g in part])


def _growth(
    system: SpinSystem, couplings: Couplings, centre: int, influence: Influence, most: int
) -> Iterator[Cluster]:
    """Clusters about a centre, each with one group more than the one before, as far as worth while."""
    inside = [centre]
    while True:
        outer = _OUTER_STATES if block_size(system, inside) <= CLUSTER_STATES else _FEW_OUTER_STATES
        cluster = _surrounded(system, couplings, influence, inside, outer)
        yield cluster
        following = _costliest(couplings, influence, cluster)
        if cluster.loss < _ENOUGH or following is None:
            return
        inside.append(following)
        if block_size(system, inside) > most:
            return


def _costliest(couplings: Couplings, influence: Influence, cluster: Cluster) -> int | None:
    """The group outside whose couplings cost most; of two outside the one nearer to the centre counts."""
    costs: dict[int, float] = {}
    for edge in couplings.edges:
        lost = influence.edge_error(edge, cluster.place)
        for g, other in (edge, edge[::-1]):
            nearer = influence.strength[g] >= influence.strength[other]
            if lost and cluster.place[g] != INSIDE and (cluster.place[other] == INSIDE or nearer):
                costs[g] = costs.get(g, 0.0) + lost
    return max(costs, key=lambda g: costs[g], default=None)


def _surrounded(
    system: SpinSystem,
    couplings: Couplings,
    influence: Influence,
    inside: list[int],
    most_outer: int,
) -> Cluster:
    """A cluster with those outer groups that matter most and whose states are few enough."""
    place = {g: INSIDE if g in inside else REST for g in couplings.part}
    losses = {g: influence.loss(g, inside) for g in couplings.part if place[g] == REST}
    total, outer = 1, []
    for g in sorted(losses, key=lambda g: -losses[g]):
        states = sum(twice + 1 for twice, _ in total_spins(system.groups[g].count))
        if losses[g] > _NO_INFLUENCE and total * states <= most_outer:
            outer.append(g)
            place[g] = OUTER
            total *= states
    return Cluster(tuple(inside), tuple(outer), block_size(system, inside), place, influence.error(place))


def _best(growth: list[Cluster], states: int) -> Cluster:
    """The largest cluster of ``states`` when that will do, else the first that does, else that."""
    usual = [c for c in growth if c.states <= states] or growth[:1]
    for most, largest in ((_WANTED, _FINE_STATES), (TOLERANCE, MOST_STATES)):
        if usual[-1].loss <= most:
            return usual[-1]
        for cluster in growth:
            if cluster.loss <= most and cluster.states <= largest:
                return cluster
    return usual[-1]
