"""Editing steps on configuration: stereocentres and double bonds."""

from __future__ import annotations

from hoodside.molecule.draft import Draft, Mark
from hoodside.molecule.edit_common import atom_at, bond_at, finished, refused
from hoodside.molecule.kernel import kernel
from hoodside.molecule.structure import Bond, Structure

_THREE_RING = 3
_BOTH_MARKS: tuple[Mark, Mark] = ("cw", "ccw")


def is_stereocentre(structure: Structure, atom: int) -> bool:
    """Whether an atom can hold a configuration (set already or still open)."""
    return not _inverts(structure, atom) and atom in centre_labels(_marked(structure, atom, "cw"))


def is_stereobond(structure: Structure, bond: int) -> bool:
    """Whether a double bond can be E or Z (set already or still open)."""
    chosen = bond_at(structure, bond)
    if chosen.order != 2 or chosen.aromatic or not all(_sides(structure, chosen)):
        return False
    return bond in bond_labels(_with_mark(structure, chosen, "trans"))


def set_stereo(structure: Structure, atom: int, label: str) -> Structure:
    """Give a stereocentre the CIP label "R" or "S" ("r" or "s" where those apply), or "" to leave it open."""
    if not label:
        return _marked(structure, atom, "")
    for mark in () if _inverts(structure, atom) else _BOTH_MARKS:
        made = _marked(structure, atom, mark)
        if made.atoms[atom].stereo and centre_labels(made).get(atom, "").lower() == label.lower():
            return made
    raise _no_centre(atom, f"Atom {atom} cannot be {label}.")


def _inverts(structure: Structure, atom: int) -> bool:
    """Whether nitrogen of an aziridine, which turns inside out too fast to hold a configuration."""
    found = atom_at(structure, atom)
    ligands = len(structure.neighbours[atom]) + found.hydrogens
    return found.symbol == "N" and ligands == _THREE_RING and _THREE_RING in structure.rings_of[atom]


def flip_stereo(structure: Structure, atom: int) -> Structure:
    """Invert a stereocentre; one left open becomes R."""
    now = atom_at(structure, atom).stereo
    if not now:
        return set_stereo(structure, atom, "R")
    return _marked(structure, atom, "ccw" if now == "cw" else "cw")


def set_double_bond(structure: Structure, bond: int, label: str) -> Structure:
    """Give a double bond the CIP label "E" or "Z", or "" to leave it open."""
    chosen = bond_at(structure, bond)
    if not all(_sides(structure, chosen)) or chosen.order != 2:
        raise _no_double_bond(bond, label)
    if not label:
        return _with_mark(structure, chosen, "")
    for mark in ("trans", "cis"):
        made = _with_mark(structure, chosen, mark)
        if bond_labels(made).get(bond) == label.upper():
            return made
    raise _no_double_bond(bond, label)


def flip_double_bond(structure: Structure, bond: int) -> Structure:
    """Turn E into Z and back; a bond left open becomes E."""
    bond_at(structure, bond)
    return set_double_bond(structure, bond, "Z" if bond_labels(structure).get(bond) == "E" else "E")


def labels(structure: Structure) -> tuple[dict[int, str], dict[int, str]]:
    """CIP labels of stereocentres by atom, and of double bonds by bond number."""
    atoms, bonds = kernel().stereo_labels(structure.source)
    ends = {(min(b.a, b.b), max(b.a, b.b)): b.index for b in structure.bonds}
    return atoms, {ends[pair]: label for pair, label in bonds.items()}


def centre_labels(structure: Structure) -> dict[int, str]:
    """CIP labels of stereocentres by atom."""
    return labels(structure)[0]


def bond_labels(structure: Structure) -> dict[int, str]:
    """CIP labels of double bonds by bond number."""
    return labels(structure)[1]


def _marked(structure: Structure, atom: int, mark: Mark) -> Structure:
    atom_at(structure, atom)
    draft = Draft(structure)
    draft.set_mark(atom, mark)
    return finished(draft)


def _with_mark(structure: Structure, bond: Bond, mark: str) -> Structure:
    near, far = _sides(structure, bond)
    draft = Draft(structure)
    draft.set_double_bond_mark(bond.a, bond.b, mark, (near[0], far[0]))
    return finished(draft)


def _sides(structure: Structure, bond: Bond) -> tuple[list[int], list[int]]:
    """Further neighbours of either end."""
    near = [i for i in structure.neighbours[bond.a] if i != bond.b]
    return near, [i for i in structure.neighbours[bond.b] if i != bond.a]


def _no_centre(atom: int, what: str) -> Exception:
    return refused(what, "Choose an atom with four different ligands.", "atom", atom)


def _no_double_bond(bond: int, label: str) -> Exception:
    what = f"Bond {bond} cannot be {label or 'left open'}."
    return refused(what, "Choose a double bond with two different ligands at each end.", "bond", bond)
