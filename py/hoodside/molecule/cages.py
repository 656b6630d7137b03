"""Relative orientation of bridgeheads: small cages leave no choice, so sources rarely state it.

Two bridgeheads joined by three separate bridges see those bridges run round in opposite senses, each with
its fourth ligand pointing out of the cage. In-out isomers need rings larger than those looked at here
(Alder and East, Chem. Rev. 1996, 96, 2097).
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from itertools import combinations

from hoodside.molecule.stereo_units import Unit

#: Largest ring that two of the three bridges may close, in atoms.
_MAX_RING = 8

Neighbours = Sequence[tuple[int, ...]]


def opposed_bridgeheads(
    units: list[Unit], neighbours: Neighbours, ring_atoms: set[int]
) -> Iterator[tuple[Unit, Unit, int]]:
    """Pairs of bridgeheads whose relative orientation the cage forces.

    Yields: first unit, second unit, 1 when the second's ligand order is turned over against the first's.
    """
    heads = [u for u in units if _may_be_bridgehead(u, ring_atoms)]
    group = {u.centres: i for i, u in enumerate(heads)}
    for a, b in combinations(heads, 2):
        if group[a.centres] == group[b.centres] or (a.parity is not None and b.parity is not None):
            continue
        bridges = _three_bridges(a.centres[0], b.centres[0], neighbours, ring_atoms)
        if bridges:
            old, new = group[b.centres], group[a.centres]
            group = {key: new if value == old else value for key, value in group.items()}
            yield a, b, _seen_from(a, [p[1] for p in bridges]) ^ _seen_from(b, [p[-2] for p in bridges]) ^ 1


def _may_be_bridgehead(unit: Unit, ring_atoms: set[int]) -> bool:
    if len(unit.centres) != 1 or unit.centres[0] not in ring_atoms:
        return False
    return sum(p in ring_atoms for p in unit.ligands) >= 3


def _three_bridges(a: int, b: int, neighbours: Neighbours, allowed: set[int]) -> list[list[int]]:
    """Three paths from a to b without common atoms, shortest first; empty when not all are short enough."""
    if b in neighbours[a]:
        return []
    paths: list[list[int]] = []
    free = set(allowed)
    for _ in range(3):
        path = _shortest(a, b, neighbours, free)
        if not path:
            return []
        paths.append(path)
        free.difference_update(path[1:-1])
    rings = [len(p) + len(q) - 2 for p, q in combinations(paths, 2)]
    return paths if max(rings) <= _MAX_RING else []


def _shortest(a: int, b: int, neighbours: Neighbours, allowed: set[int]) -> list[int]:
    came: dict[int, int] = {a: a}
    queue = [a]
    for here in queue:
        for there in neighbours[here]:
            if there in came or there not in allowed:
                continue
            came[there] = here
            if there == b:
                return _trace(came, a, b)
            queue.append(there)
    return []


def _trace(came: dict[int, int], a: int, b: int) -> list[int]:
    path = [b]
    while path[-1] != a:
        path.append(came[path[-1]])
    return path[::-1]


def _seen_from(unit: Unit, bridges: list[int]) -> int:
    """Parity of (bridges in order, then the ligand left over) against the unit's own order."""
    out = [p for p in unit.ligands if p not in bridges]
    order = [unit.ligands.index(p) for p in (*bridges, *out)]
    return sum(x > y for x, y in combinations(order, 2)) % 2
