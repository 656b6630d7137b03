"""What the learned correction of a 1H shift may hang on: named features of the surroundings of one hydrogen.

The first letter of a name is its family: ``e`` exact environment (the radius follows), ``s`` kind of atom
at a distance, ``t`` step of the scheme's own derivation, ``a`` set of groups on a saturated carbon, ``b``
pair of a group on the carbon and one beside it, ``p`` group at a position of an aromatic ring, ``q`` the
same by kind of group, ``o`` pair of positions, ``c`` group with neighbours that crowd it, ``u`` what crowds
a group on its own side, ``y`` position across a double bond next to the carbon, ``z`` position on an
aromatic ring next to the carbon, ``x`` the same one atom further on, ``w`` groups cis or trans on a ring,
``k`` ring, ``v`` solvent.
"""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.environment import circular_codes
from hoodside.predict.proton.alkene import ligand_positions
from hoodside.predict.proton.aromatic import aromatic_rings, position_in, ring_substituents
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.faces import ring_face
from hoodside.predict.proton.geometry import across
from hoodside.predict.proton.view import View

#: Depth of exact environments, shared with the 13C correction so that they are worked out once.
_CODES_RADIUS = 5
_MAX_RADIUS = 4
_SHELLS = 5


def hydrogen_features(view: View, atom: int, slot: int, estimate: Estimate, solvent: str) -> dict[str, float]:
    """Features of H ``slot`` on ``atom``: name -> count."""
    found: dict[str, float] = {}
    for name in _names(view, atom, slot, estimate, solvent):
        found[name] = found.get(name, 0.0) + 1.0
    return found


def _names(view: View, atom: int, slot: int, estimate: Estimate, solvent: str) -> Iterator[str]:
    structure = view.structure
    yield from _environment(view, atom)
    kind = _own_kind(view, atom)
    yield from (f"t{kind} {term.label}" for term in estimate.terms)
    if structure.atoms[atom].aromatic:
        yield from _aromatic(view, atom)
    elif view.is_saturated(atom):
        yield from _saturated(view, atom)
        yield from _faces(view, atom, slot)
    elif (far := view.alkene_partner(atom)) is not None:
        yield from _alkene(view, atom, far, slot)
    if solvent != "CDCl3":
        yield from (f"v{solvent}", f"v{solvent} {kind}", f"v{solvent} {estimate.environment}")
        yield from (f"v{solvent} {name}" for name in _polar_groups(view, atom))


def _polar_groups(view: View, atom: int) -> Iterator[str]:
    """Groups close by whose hydrogen bonds to the solvent move the H."""
    structure = view.structure
    if structure.atoms[atom].aromatic:
        yield from (f"{where} {group.key}" for where, group, _ in ring_substituents(view, atom))
        return
    for near in structure.neighbours[atom]:
        group = view.substituent(atom, near)
        if group.kind != "alkyl":
            yield f"on {group.key}"


def _own_kind(view: View, atom: int) -> str:
    own = view.structure.atoms[atom]
    if own.aromatic:
        return f"ar{len(aromatic_rings(view, atom)[0]) if aromatic_rings(view, atom) else 0}"
    return f"{own.symbol}{'sat' if view.is_saturated(atom) else 'uns'}H{own.hydrogens}"


def _environment(view: View, atom: int) -> Iterator[str]:
    structure = view.structure
    codes = circular_codes(structure, _CODES_RADIUS)[atom]
    yield from (f"e{radius}{codes[radius]}" for radius in range(_MAX_RADIUS + 1))
    own = _own_kind(view, atom)
    for other, distance in enumerate(structure.distances_from(atom)):
        if 0 < distance <= _SHELLS:
            yield f"s{distance}{own}>{_atom_kind(view, other)}"


def _atom_kind(view: View, atom: int) -> str:
    """Element with what tells its shielding: aromatic, unsaturated, hydrogens on heteroatoms."""
    own = view.structure.atoms[atom]
    if own.aromatic:
        return own.symbol.lower()
    order = max((b.order for b in view.structure.bonds_of[atom]), default=0)
    mark = {2: "=", 3: "#"}.get(order, "")
    return f"{own.symbol}{mark}{'h' if own.hydrogens and own.symbol != 'C' else ''}"


def _saturated(view: View, atom: int) -> Iterator[str]:
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
                    beyond = view.substituent(near, far)
                    yield f"b{count}{ring} {'+'.join(strong)} {beyond.key}"
                    yield f"b{count} {'+'.join(strong)} {beyond.kind}"
        elif structure.atoms[near].aromatic:
            yield from _on_ring(view, near, atom, count)
        elif structure.atoms[near].symbol != "C" or view.alkene_partner(near) is None:
            yield from _beyond(view, near, atom, count)
        elif (far_end := view.alkene_partner(near)) is not None:
            yield from _on_alkene(view, near, far_end, atom, count)
    if rings:
        yield from _ring_mates(view, atom, count)


def _ring_mates(view: View, atom: int, count: int) -> Iterator[str]:
    """What else stands on the ring, by distance along it."""
    structure = view.structure
    ring = next(r for r in structure.rings if atom in r and len(r) == structure.rings_of[atom][0])
    here = ring.index(atom)
    for place, member in enumerate(ring):
        steps = min(abs(place - here), len(ring) - abs(place - here))
        yield f"k{count}r{len(ring)}{steps}:{_atom_kind(view, member)}"
        for near in structure.neighbours[member]:
            if near not in ring and steps:
                yield f"k{count}r{len(ring)}{steps}-{view.substituent(member, near).kind}"


def _faces(view: View, atom: int, slot: int) -> Iterator[str]:
    """Groups on the ring that stand cis or trans to the H, by distance along the ring."""
    structure = view.structure
    count = structure.atoms[atom].hydrogens
    for ring in structure.rings:
        if atom not in ring or count > 2:
            continue
        own = ring_face(structure, ring, atom, -1 - slot)
        if own is None:
            continue
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


def _on_ring(view: View, ipso: int, atom: int, count: int) -> Iterator[str]:
    """Groups and heteroatoms of an aromatic ring, by position to the carbon it carries."""
    structure = view.structure
    for ring in aromatic_rings(view, ipso):
        for member in ring:
            if member == ipso:
                continue
            position = position_in(view, ring, ipso, member)
            if structure.atoms[member].symbol != "C":
                yield f"z{count} {len(ring)}{position} {_atom_kind(view, member)}"
            for near in structure.neighbours[member]:
                if near not in ring and near != atom:
                    yield f"z{count} {position} {view.substituent(member, near).kind}"


def _beyond(view: View, near: int, atom: int, count: int) -> Iterator[str]:
    """What crowds a group whose far side is an aromatic ring or a double bond (OCH3, C(O)CH3, NCH3 ...)."""
    structure = view.structure
    for far in structure.neighbours[near]:
        if far == atom:
            continue
        if structure.atoms[far].aromatic:
            yield from (f"x{name}" for name in _on_ring(view, far, near, count) if "ortho" in name)
        elif (end := view.alkene_partner(far)) is not None:
            yield from (f"x{name}" for name in _on_alkene(view, far, end, near, count))


def _on_alkene(view: View, near: int, far: int, atom: int, count: int) -> Iterator[str]:
    """Groups on a double bond, by position to the carbon it carries."""
    structure = view.structure
    yield from (
        f"y{count} gem {view.substituent(near, n).kind}"
        for n in structure.neighbours[near]
        if n not in (atom, far)
    )
    for ligand, side in across(structure, near, far, 0).items():
        # ``across`` speaks of the H of ``near``; without one, of the place opposite to its other ligand.
        turned = {"cis": "trans", "trans": "cis"}.get(side, "either")
        if not structure.atoms[near].hydrogens:
            turned = _side(view, near, far, atom, ligand)
        group = view.substituent(far, ligand)
        yield f"y{count} {turned} {group.kind}"
        yield f"y{count} {turned} {group.key}"


def _side(view: View, near: int, far: int, atom: int, ligand: int) -> str:
    bond = view.structure.bond_between(near, far)
    if bond is None or not bond.stereo:
        return "either"
    same = (atom in bond.stereo_atoms) == (ligand in bond.stereo_atoms)
    return bond.stereo if same else {"cis": "trans", "trans": "cis"}[bond.stereo]


def _alkene(view: View, atom: int, far: int, slot: int) -> Iterator[str]:
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
            yield from (f"y{where} {name}" for name in _on_ring(view, anchor, atom, 0))


def _aromatic(view: View, atom: int) -> Iterator[str]:
    structure = view.structure
    place = view.places.get(atom)
    parent = place.name if place is not None else "benzene"
    for ring in aromatic_rings(view, atom):
        held: list[tuple[str, str]] = []
        for member in ring:
            position = "own" if member == atom else position_in(view, ring, atom, member)
            if structure.atoms[member].symbol != "C":
                yield f"k{len(ring)} {position} {_atom_kind(view, member)}"
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
        yield from (f"u{position} {name}" for name in _on_ring(view, near, member, 0) if "ortho" in name)
    elif (far := view.alkene_partner(near)) is not None:
        yield from (f"u{position} {name}" for name in _on_alkene(view, near, far, member, 0))
    else:
        for end in structure.neighbours[near]:
            if end != member and structure.atoms[end].aromatic:
                yield from (
                    f"u{position} b{name}" for name in _on_ring(view, end, near, 0) if "ortho" in name
                )


def _other_rings(view: View, atom: int) -> Iterator[str]:
    """Groups on rings fused to the one that holds the H, by number of bonds."""
    structure = view.structure
    own = {a for ring in aromatic_rings(view, atom) for a in ring}
    for ring in structure.rings:
        if atom in ring or not own & set(ring) or not all(structure.atoms[a].aromatic for a in ring):
            continue
        distances = structure.distances_from(atom)
        for member in ring:
            for near in structure.neighbours[member]:
                if near not in ring and near not in own and not structure.atoms[near].aromatic:
                    yield f"z{distances[near]} fused {view.substituent(member, near).kind}"
                    yield f"z{distances[near]} fused {view.substituent(member, near).key}"
