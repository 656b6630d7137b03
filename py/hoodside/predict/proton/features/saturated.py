"""Features of H on saturated carbon: groups on it and beside it, its ring, faces of the ring."""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.proton.chairs import axial_share
from hoodside.predict.proton.faces import ring_face
from hoodside.predict.proton.features.near import beyond, on_alkene, on_ring
from hoodside.predict.proton.features.shells import atom_kind
from hoodside.predict.proton.view import View

#: Share of chairs from which an H counts as axial or equatorial.
_CLEAR = 0.75


def saturated(view: View, atom: int) -> Iterator[str]:
    structure = view.structure
    count = structure.atoms[atom].hydrogens
    alpha = [(n, view.substituent(atom, n)) for n in structure.neighbours[atom]]
    rings = structure.rings_of[atom]
    ring = f"r{rings[0]}" if rings else ""
    yield f"a{count}{ring} {'+'.join(sorted(g.kind for _, g in alpha))}"
    yield f"a{count} {'+'.join(sorted(g.key if g.kind != 'alkyl' else 'alkyl' for _, g in alpha))}"
    if ring:
        yield f"k{count}{ring}"
    strong = sorted({g.kind for _, g in alpha if g.kind != "alkyl"}) or ["alkyl"]
    for near, group in alpha:
        yield f"k{count}{ring} {group.key}"
        if view.is_saturated(near):
            for far in structure.neighbours[near]:
                if far != atom:
                    further = view.substituent(near, far)
                    yield f"b{count}{ring} {'+'.join(strong)} {further.key}"
                    yield f"b{count} {'+'.join(strong)} {further.kind}"
        elif structure.atoms[near].aromatic:
            yield from on_ring(view, near, atom, count)
        elif structure.atoms[near].symbol != "C" or view.alkene_partner(near) is None:
            yield from beyond(view, near, atom, count)
        elif (far_end := view.alkene_partner(near)) is not None:
            yield from on_alkene(view, near, far_end, atom, count)
    if rings:
        yield from _ring_mates(view, atom, count)


def _ring_mates(view: View, atom: int, count: int) -> Iterator[str]:
    """What else stands on the ring, by distance along it."""
    structure = view.structure
    ring = next(r for r in structure.rings if atom in r and len(r) == structure.rings_of[atom][0])
    here = ring.index(atom)
    for place, member in enumerate(ring):
        steps = min(abs(place - here), len(ring) - abs(place - here))
        yield f"k{count}r{len(ring)}{steps}:{atom_kind(view, member)}"
        for near in structure.neighbours[member]:
            if near not in ring and steps:
                yield f"k{count}r{len(ring)}{steps}-{view.substituent(member, near).kind}"


def faces(view: View, atom: int, slot: int) -> Iterator[str]:
    """Groups on the ring that stand cis or trans to the H, by distance along the ring."""
    structure = view.structure
    count = structure.atoms[atom].hydrogens
    for ring in structure.rings:
        if atom not in ring or count > 2:
            continue
        own = ring_face(structure, ring, atom, -1 - slot)
        if own is None:
            continue
        yield from _axial(view, ring, atom, slot)
        here = ring.index(atom)
        for place, member in enumerate(ring):
            steps = min(abs(place - here), len(ring) - abs(place - here))
            for near in structure.neighbours[member]:
                face = ring_face(structure, ring, member, near) if near not in ring and steps else None
                if face is not None:
                    side = "cis" if face == own else "trans"
                    group = view.substituent(member, near)
                    yield f"w{count}r{len(ring)}{steps}{side} {group.kind}"
                    yield f"w{count}r{len(ring)}{steps}{side}"


def _axial(view: View, ring: tuple[int, ...], atom: int, slot: int) -> Iterator[str]:
    """Whether the H is mostly axial, by itself and with what its carbon carries."""
    share = axial_share(view, ring, atom, slot)
    if share is None or 1 - _CLEAR < share < _CLEAR:
        return
    count = view.structure.atoms[atom].hydrogens
    side = "axial" if share > _CLEAR else "equatorial"
    kinds = sorted(view.substituent(atom, n).kind for n in view.structure.neighbours[atom] if n not in ring)
    yield f"g{count} {side}"
    yield f"g{count} {side} {'+'.join(kinds)}"
