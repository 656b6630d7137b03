"""The six ways an isomer is made from a structure; which patterns they act on stands in isomer_moves.

shift     ``take`` old-group: the group moves to an atom matching ``give``.
exchange  ``take`` old-group, ``give`` old-group: the two groups change places.
carry     ``take`` a chain whose first and last atom hold its neighbours (or H): it is cut out, the gap
          closed, and the chain put into a bond matching ``give`` (two atoms) or between an atom and
          its H (one).
transfer  ``take`` a bond lowered by one order, ``give`` two atoms whose bond is raised, or a ring closed (the
          first two atoms of the pattern).
matrix    ``take`` a pattern, ``give`` the changes of its bond orders.
relabel   ``take`` and ``give``: two atoms that change places in all but their bonds; a second atom of
          ``give`` is a group that goes along.

Proposing a step is cheap; its graph is made only when the search comes to it.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass
from functools import cache, partial

from hoodside.molecule.kernel import Matches
from hoodside.rivals.graph import Graph
from hoodside.rivals.rules import CUT, Op, Rule, isomer_rules
from hoodside.rivals.site import APART, Site

#: A cost and the atoms a step acts on.
Proposal = tuple[float, tuple[int, ...]]
#: Stands for a hydrogen among the atoms of a step.
_HYDROGEN = -1


@dataclass(slots=True)
class Step:
    """One move that may be made from ``site``.

    ``make`` gives the isomer, not yet checked for sense or novelty; None when the move cannot be made after
    all. ``{group}`` in ``words`` stands for what is at the second of ``atoms`` when cut from the first.
    """

    cost: float
    words: str
    site: Site
    atoms: tuple[int, ...]
    make: Callable[[], Graph | None]
    tautomer: bool = False


def steps_from(site: Site) -> list[Step]:
    """All single moves from a structure, cheapest first; those alike by symmetry once."""
    matches = site.match_all(_patterns())
    found: list[Step] = []
    for rule in isomer_rules():
        take, give = matches[rule.take], matches[rule.give] if rule.give else ()
        if take and (give or not rule.give):
            known: set[tuple[int, ...]] = set()
            for cost, atoms in _OPS[rule.op][0](site, rule, take, give):
                kind = site.kind_of(atoms)
                if kind not in known:
                    known.add(kind)
                    found.append(_step(site, rule, cost, atoms))
    found.sort(key=lambda step: step.cost)
    return found


def _step(site: Site, rule: Rule, cost: float, atoms: tuple[int, ...]) -> Step:
    make = partial(_OPS[rule.op][1], site, rule, atoms)
    return Step(cost, rule.words, site, atoms, make, rule.where == "tautomer")


@cache
def _patterns() -> tuple[str, ...]:
    return tuple(dict.fromkeys(p for rule in isomer_rules() for p in (rule.take, rule.give) if p))


def _shifts(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    for old, group in take:
        piece = site.piece(group, old)
        for (new,) in give if piece else ():
            cost = _cost_at(site, rule, old, new)
            if cost is not None and new not in piece:
                yield cost, (old, group, new)


def _shift(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    old, group, new = atoms
    graph = site.graph.copy()
    return graph if graph.hand_over(group, old, new) else None


def _exchanges(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    for old, group in take:
        piece = site.piece(group, old)
        for place, other in give if piece else ():
            cost = _cost_at(site, rule, old, place)
            if cost is None or place == old or place in piece:
                continue
            back = site.piece(other, place)
            if back and old not in back:
                yield cost, (old, group, place, other)


def _exchange(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    old, group, place, other = atoms
    graph = site.graph.copy()
    graph.hydrogens[place] += 1  # room for both while they cross
    if not (graph.hand_over(group, old, place) and graph.hand_over(other, place, old)):
        return None
    graph.hydrogens[place] -= 1
    return graph


def _carries(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    for chain in take:
        for near, far in _holders(site.graph, chain):
            held = (near,) if far == _HYDROGEN else (near, far)
            for place in give:
                cost = _cost(rule, site.distance(held, place))
                if cost is not None and not set(place) & set(chain) and set(place) != {near, far}:
                    yield cost, (near, far, *place, *chain)


def _holders(graph: Graph, chain: tuple[int, ...]) -> list[tuple[int, int]]:
    """Pairs of outer neighbours of the chain, or one and a hydrogen."""
    nears, fars = (_outside(graph, chain, end) for end in (chain[0], chain[-1]))
    if len(chain) == 1:
        ends = [*nears, _HYDROGEN][:2] if len(nears) in (1, 2) else []
        return [(ends[0], ends[1])] if ends else []
    return [(near, far) for near in nears for far in fars or [_HYDROGEN] if far != near]


def _outside(graph: Graph, chain: tuple[int, ...], end: int) -> list[int]:
    return [i for i, order in graph.bonds[end].items() if i not in chain and order == 1]


def _carry(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    near, far, *rest = atoms
    wide = 2 if rule.into_bond else 1
    place, chain = rest[:wide], rest[wide:]
    graph = site.graph.copy()
    if not _cut_out(graph, chain, near, far) or not set(place) <= graph.piece(near):
        return None
    if wide > 1 and not graph.change_bond(place[0], place[1], -1):
        return None
    joined = graph.change_bond(place[0], chain[0], 1) and (
        wide == 1 or graph.change_bond(place[1], chain[-1], 1)
    )
    return graph if joined else None


def _cut_out(graph: Graph, chain: list[int], near: int, far: int) -> bool:
    """Take the chain out and close the gap. A bond of the gap there already would close no ring."""
    if far in graph.bonds[near]:
        return False
    graph.change_bond(near, chain[0], -1)
    if far == _HYDROGEN:
        return True
    return graph.change_bond(far, chain[-1], -1) and graph.change_bond(near, far, 1)


def _transfers(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    pairs = sorted({(place[0], place[1]) for place in give})
    for a, b in sorted({(min(match), max(match)) for match in take}):
        for c, d in pairs:
            cost = _cost(rule, site.distance((a, b), (c, d)))
            if cost is not None and {a, b} != {c, d} and _may_join(site, rule, c, d):
                yield cost, (a, b, c, d)


def _may_join(site: Site, rule: Rule, c: int, d: int) -> bool:
    if d in site.graph.bonds[c]:
        return not rule.rings[1]
    return rule.rings[0] <= site.distances[c][d] + 1 <= rule.rings[1]


def _transfer(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    a, b, c, d = atoms
    graph = site.graph.copy()
    return graph if graph.change_bond(a, b, -1) and graph.change_bond(c, d, 1) else None


def _matrices(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    yield from ((rule.cost, match) for match in take)


def _matrix(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    """Lowered bonds first, since they free the hydrogens that raised ones take."""
    graph = site.graph.copy()
    if not all(_suits(site, graph, atoms[a], atoms[b], by) for a, b, by in rule.changes):
        return None
    pieces = len(graph.piece(atoms[0]))
    lowered = all(
        graph.change_bond(atoms[a], atoms[b], -1 if by == CUT else by) for a, b, by in rule.changes if by < 0
    )
    for atom, charge, hydrogens in rule.adjust:
        graph.charges[atoms[atom]] += charge
        graph.hydrogens[atoms[atom]] += hydrogens
    possible = (
        lowered
        and all(graph.hydrogens[atoms[atom]] >= 0 for atom, _, _ in rule.adjust)
        and all(graph.change_bond(atoms[a], atoms[b], by) for a, b, by in rule.changes if by > 0)
    )
    return graph if possible and len(graph.piece(atoms[0])) == pieces else None


def _suits(site: Site, graph: Graph, a: int, b: int, by: int) -> bool:
    """See to it that an aromatic bond to be lowered is drawn double, one to be cut or raised single."""
    wanted = {1: 1, CUT: 1, -1: 2}.get(by)
    if wanted is None or frozenset((a, b)) not in site.aromatic_bonds or graph.bonds[a][b] == wanted:
        return True
    return any(graph.turn_kekule(ring) for ring in site.structure.rings if a in ring and b in ring)


def _relabels(site: Site, rule: Rule, take: Matches, give: Matches) -> Iterator[Proposal]:
    for (a,) in take:
        for place in give:
            cost = _cost_at(site, rule, a, place[0])
            if cost is not None and (len(place) == 1 or site.piece(place[1], place[0])):
                yield cost, (a, *place)


def _relabel(site: Site, rule: Rule, atoms: tuple[int, ...]) -> Graph | None:
    a, b, *group = atoms
    graph = site.graph.copy()
    if not group:
        return graph if graph.exchange_elements(a, b) else None
    graph.hydrogens[a] += 1  # a valence lent to the group until the elements have changed places
    if not (graph.hand_over(group[0], b, a) and graph.exchange_elements(a, b)):
        return None
    graph.hydrogens[b] -= 1
    return graph if graph.hydrogens[b] >= 0 else None


def _cost_at(site: Site, rule: Rule, old: int, new: int) -> float | None:
    if rule.where:
        here, there = site.aromatic_systems[old], site.aromatic_systems[new]
        if (here == there) != (rule.where == "ring") or here < 0 or there < 0:
            return None
    return _cost(rule, site.distances[old][new])


def _cost(rule: Rule, distance: int) -> float | None:
    """Cost of a move over that many bonds, None beyond its reach."""
    least, most = rule.reach
    if not least <= distance <= most or distance == APART:
        return None
    return rule.cost + rule.per_bond * (distance - least)


_Propose = Callable[[Site, Rule, Matches, Matches], Iterator[Proposal]]
_Make = Callable[[Site, Rule, tuple[int, ...]], Graph | None]
_OPS: dict[Op, tuple[_Propose, _Make]] = {
    "shift": (_shifts, _shift),
    "exchange": (_exchanges, _exchange),
    "carry": (_carries, _carry),
    "transfer": (_transfers, _transfer),
    "matrix": (_matrices, _matrix),
    "relabel": (_relabels, _relabel),
}
