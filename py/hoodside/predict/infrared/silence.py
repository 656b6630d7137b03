"""Bands that symmetry forbids or makes faint: a stretch without change of dipole moment is not seen."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.symmetry import constitutional_classes
from hoodside.predict.infrared.table import BandRow

# Stretches of a bond between two like atoms, by family or mode; the pattern atoms that make the bond.
_BY_FAMILY = ("C#C", "C=C")
_BY_MODE = ("N=N stretch",)


def silenced(structure: Structure, atoms: tuple[int, ...], row: BandRow) -> bool:
    """Whether the stretch lies on a centre of symmetry, or is that of a like-ended alkyne.

    Source: mutual exclusion rule; Bellamy, The Infrared Spectra of Complex Molecules.
    """
    ends = _bond_ends(structure, atoms, row)
    if ends is None or not _like_ended(structure, *ends):
        return False
    # A cis alkene or a ring alkene keeps a change of dipole along its axis.
    return (
        row.geometry != "cis" and structure.bond_between(*ends) is not None and not _in_ring(structure, *ends)
    )


def weakened(structure: Structure, atoms: tuple[int, ...], row: BandRow) -> bool:
    """Whether both ends carry nothing but alkyl, so that the stretch is faint though not forbidden."""
    ends = _bond_ends(structure, atoms, row)
    if ends is None:
        return False
    return all(_internal_alkyl_end(structure, end, ends) for end in ends)


def _bond_ends(structure: Structure, atoms: tuple[int, ...], row: BandRow) -> tuple[int, int] | None:
    """The two atoms of the stretched bond; None for rows of more than one bond (dienes)."""
    if row.family in _BY_FAMILY and len(row.sites) == 2:
        return atoms[row.sites[0]], atoms[row.sites[1]]
    if row.mode in _BY_MODE:
        return atoms[1], atoms[2]
    return None


def _like_ended(structure: Structure, a: int, b: int) -> bool:
    classes = constitutional_classes(structure)
    return classes[a] == classes[b]


def _in_ring(structure: Structure, a: int, b: int) -> bool:
    return any(a in ring and b in ring for ring in structure.rings)


def _internal_alkyl_end(structure: Structure, end: int, bond: tuple[int, int]) -> bool:
    others = [n for n in structure.neighbours[end] if n not in bond]
    return bool(others) and all(_is_alkyl(structure, n) for n in others)


def _is_alkyl(structure: Structure, atom: int) -> bool:
    if structure.atoms[atom].symbol != "C" or structure.atoms[atom].aromatic:
        return False
    return all(bond.order == 1 for bond in structure.bonds_of[atom])
