"""Features of H on aromatic and olefinic carbon: groups by position, pairs of them, crowding."""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.proton.alkene import ligand_positions
from hoodside.predict.proton.aromatic import aromatic_rings, position_in
from hoodside.predict.proton.features.near import on_alkene, on_ring
from hoodside.predict.proton.features.shells import atom_kind
from hoodside.predict.proton.view import View


def alkene(view: View, atom: int, far: int, slot: int) -> Iterator[str]:
    positions = ligand_positions(view, atom, far, slot)
    ring = "r" if view.share_ring(atom, far) else ""
    names = sorted(f"{where}:{group.kind}" for where, group, _ in positions)
    yield f"o{ring} {' '.join(names)}"
    yield from (f"q{ring} {name}" for name in names)
    yield from (f"p{ring} {where} {group.key}" for where, group, _ in positions)
    for index, one in enumerate(names):
        yield from (f"o{ring} {one}/{two}" for two in names[index + 1 :])
    for where, group, anchor in positions:
        if group.kind == "aryl" and view.structure.atoms[anchor].aromatic:
            yield from (f"y{where} {name}" for name in on_ring(view, anchor, atom, 0))


def aromatic(view: View, atom: int) -> Iterator[str]:
    structure = view.structure
    place = view.places.get(atom)
    parent = place.name if place is not None else "benzene"
    for ring in aromatic_rings(view, atom):
        held: list[tuple[str, str]] = []
        for member in ring:
            position = "own" if member == atom else position_in(view, ring, atom, member)
            if structure.atoms[member].symbol != "C":
                yield f"k{len(ring)} {position} {atom_kind(view, member)}"
            for near in structure.neighbours[member]:
                bond = structure.bond_between(member, near)
                if near in ring or bond is None:
                    continue
                if bond.aromatic:
                    yield f"k{len(ring)} {position} fused"
                    continue
                group = view.substituent(member, near)
                held.append((position, group.kind))
                yield f"p{parent} {position} {group.key}"
                yield f"q{len(ring)} {position} {group.key}"
                yield from _crowding(view, ring, member, near, position)
                yield from _turned(view, member, near, position)
        names = sorted(f"{position} {kind}" for position, kind in held)
        for index, one in enumerate(names):
            yield from (f"o{len(ring)} {one}/{two}" for two in names[index + 1 :])
        if len(names) > 1:
            yield f"o{len(ring)} {'/'.join(sorted(p for p, _ in held))}"
    yield from _other_rings(view, atom)


def _crowding(view: View, ring: tuple[int, ...], member: int, near: int, position: str) -> Iterator[str]:
    """A group turned out of the ring plane by what stands beside it acts differently."""
    structure = view.structure
    group = view.substituent(member, near)
    beside = [
        view.substituent(m, n).kind
        for m in structure.neighbours[member]
        if m in ring
        for n in structure.neighbours[m]
        if n not in ring and not structure.atoms[m].hydrogens
    ]
    yield f"c{position} {group.key} {len(beside)}"
    yield from (f"c{position} {group.key} by {kind}" for kind in beside)


def _turned(view: View, member: int, near: int, position: str) -> Iterator[str]:
    """What crowds an aryl or vinyl group on its own side."""
    structure = view.structure
    if structure.atoms[near].aromatic:
        yield from (f"u{position} {name}" for name in on_ring(view, near, member, 0) if "ortho" in name)
    elif (far := view.alkene_partner(near)) is not None:
        yield from (f"u{position} {name}" for name in on_alkene(view, near, far, member, 0))
    else:
        yield from _beside_ring(view, member, near, position)


def _beside_ring(view: View, member: int, near: int, position: str) -> Iterator[str]:
    """What stands on the first atom of a group of an aromatic ring, and beside it."""
    structure = view.structure
    for end in structure.neighbours[near]:
        if end == member:
            continue
        if structure.atoms[end].aromatic:
            ortho = (name for name in on_ring(view, end, near, 0) if "ortho" in name)
            yield from (f"u{position} b{name}" for name in ortho)
        if view.is_saturated(near):
            yield f"u{position} on {view.substituent(near, end).kind}"
        if view.is_saturated(near) and view.is_saturated(end):
            where = "ring" if view.share_ring(near, end) else "chain"
            kinds = [view.substituent(end, n).kind for n in structure.neighbours[end] if n != near]
            yield from (f"u{position} {where} vicinal {kind}" for kind in kinds)


def _other_rings(view: View, atom: int) -> Iterator[str]:
    """Groups on rings fused to the one that holds the H, by number of bonds."""
    structure = view.structure
    own = {a for ring in aromatic_rings(view, atom) for a in ring}
    for ring in structure.rings:
        if atom in ring or not own & set(ring) or not all(structure.atoms[a].aromatic for a in ring):
            continue
        distances = structure.distances_from(atom)
        joints = [a for a in structure.neighbours[atom] if a in ring]
        for member in ring:
            faces = any(joint in structure.neighbours[member] for joint in joints)
            for near in structure.neighbours[member]:
                if near not in ring and near not in own and not structure.atoms[near].aromatic:
                    yield f"z{distances[near]} fused {view.substituent(member, near).kind}"
                    yield f"z{distances[near]} fused {view.substituent(member, near).key}"
                    if faces:  # across the bay: the group and the H stand on one side, as at C1 and C8
                        yield f"r{len(ring)} {view.substituent(member, near).kind}"
                        yield f"r{len(ring)} {view.substituent(member, near).key}"
