"""Groups on an aromatic ring or double bond, as seen by an atom that it carries."""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.proton.aromatic import aromatic_rings, position_in
from hoodside.predict.proton.features.shells import atom_kind
from hoodside.predict.proton.geometry import across
from hoodside.predict.proton.view import View


def on_ring(view: View, ipso: int, atom: int, count: int) -> Iterator[str]:
    """Groups and heteroatoms of an aromatic ring, by position to the carbon it carries."""
    structure = view.structure
    for ring in aromatic_rings(view, ipso):
        for member in ring:
            if member == ipso:
                continue
            position = position_in(view, ring, ipso, member)
            if structure.atoms[member].symbol != "C":
                yield f"z{count} {len(ring)}{position} {atom_kind(view, member)}"
            for near in structure.neighbours[member]:
                if near not in ring and near != atom:
                    bond = structure.bond_between(member, near)
                    joined = bond is not None and bond.aromatic
                    yield f"z{count} {position} {'fused' if joined else view.substituent(member, near).kind}"


def on_alkene(view: View, near: int, far: int, atom: int, count: int) -> Iterator[str]:
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


def beyond(view: View, near: int, atom: int, count: int) -> Iterator[str]:
    """What crowds a group whose far side is an aromatic ring or a double bond (OCH3, C(O)CH3, NCH3 ...)."""
    structure = view.structure
    for far in structure.neighbours[near]:
        if far == atom:
            continue
        if structure.atoms[far].aromatic:
            yield from (f"x{name}" for name in on_ring(view, far, near, count) if "ortho" in name)
        elif (end := view.alkene_partner(far)) is not None:
            yield from (f"x{name}" for name in on_alkene(view, far, end, near, count))
