"""What the editing steps share: checks that name the fault, and finishing a draft."""

from __future__ import annotations

from functools import cache

from hoodside.errors import StructureError
from hoodside.facts.table import load_table
from hoodside.molecule.draft import Draft
from hoodside.molecule.structure import Atom, Bond, Structure, read_structure


@cache
def normal_valences() -> dict[str, tuple[int, ...]]:
    """Element -> the valences it has without charge, lowest first (facts table normal_valences)."""
    found: dict[str, tuple[int, ...]] = {}
    for row in load_table("normal_valences"):
        found[row["element"]] = (*found.get(row["element"], ()), int(row["valence"]))
    return found


def atom_at(structure: Structure, atom: int) -> Atom:
    """The atom of that number. Raises: StructureError."""
    if not 0 <= atom < len(structure.atoms):
        last = len(structure.atoms) - 1
        raise refused(f"There is no atom {atom}.", f"Choose 0 to {last}.", "atom", atom)
    return structure.atoms[atom]


def bond_at(structure: Structure, bond: int) -> Bond:
    """The bond of that number. Raises: StructureError."""
    if not 0 <= bond < len(structure.bonds):
        last = len(structure.bonds) - 1
        raise refused(f"There is no bond {bond}.", f"Choose 0 to {last}.", "bond", bond)
    return structure.bonds[bond]


def need_hydrogens(structure: Structure, atom: int, count: int) -> None:
    """Raises: StructureError when an atom carries fewer hydrogens than a step takes."""
    found = atom_at(structure, atom)
    if found.hydrogens < count:
        raise refused(
            f"Atom {atom} ({found.symbol}) carries {found.hydrogens} H where {count} must give way.",
            "Lower or take out one of its bonds first.",
            "atom",
            atom,
        )


def refused(what: str, mend: str, field: str, value: object) -> StructureError:
    """The error of a step that cannot be done."""
    return StructureError(what, hint=mend, field=field, value=value)


def finished(draft: Draft) -> Structure:
    """The drafted structure, atoms in the order of the draft. Raises: StructureError."""
    return read_structure(draft.source())


def largest_piece(draft: Draft) -> Structure:
    """The drafted structure without all but its largest connected piece."""
    whole = finished(draft)
    pieces: list[list[int]] = []
    for atom in range(len(whole.atoms)):
        if not any(atom in piece for piece in pieces):
            pieces.append([i for i, away in enumerate(whole.distances_from(atom)) if away >= 0])
    if len(pieces) <= 1:
        return whole
    kept = max(pieces, key=len)
    rest = Draft(whole)
    for atom in set(range(len(whole.atoms))).difference(kept):
        rest.remove_atom(atom)
    return finished(rest)
