"""What to call the stereochemistry of a product drawn as one enantiomer."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.draft import Draft
from hoodside.molecule.symmetry import constitutional_classes


def mirror_smiles(structure: Structure) -> str:
    """Canonical SMILES of the mirror image."""
    draft = Draft(structure)
    for atom in structure.atoms:
        draft.turn_over(atom.index)
    return draft.finish().smiles


def settled(structure: Structure) -> Structure:
    """A racemic start with one open centre drawn as one of its enantiomers, so that products relate to it."""
    open_centres = _open_centres(structure)
    if len(open_centres) != 1 or any(atom.stereo for atom in structure.atoms):
        return structure
    draft = Draft(structure)
    draft.set_mark(open_centres[0], "cw")
    return draft.keep_order()


def _open_centres(structure: Structure) -> list[int]:
    """Saturated carbons with four unlike ligands that the source leaves unmarked."""
    classes = constitutional_classes(structure)
    found = []
    for atom in structure.atoms:
        ligands = [classes[n] for n in structure.neighbours[atom.index]]
        full = len(ligands) + atom.hydrogens == 4 and atom.hydrogens <= 1
        if atom.symbol == "C" and not atom.stereo and full and len(set(ligands)) == len(ligands):
            found.append(atom.index)
    return found


def stereo_words(product: Structure, start: Structure, racemic: bool, inverted: bool = False) -> str:
    """ "racemic", "meso" or "" for a product of an achiral or racemic start; else what became of its centres.

    Args:
        racemic: nothing that went in is a single enantiomer.
        inverted: the step attacks a carbon from behind.
    """
    marked = sum(bool(atom.cip) for atom in product.atoms)
    if not marked:
        return _unmarked_words(product, start)
    if mirror_smiles(product) == product.smiles:
        return "meso"
    if racemic:
        return "racemic" if marked < 2 else "one diastereomer, racemic"
    if inverted:
        return "inverted at the carbon attacked, kept elsewhere"
    return "configuration kept; new centres by the mechanism"


def is_achiral(structure: Structure | None) -> bool:
    """Whether a structure as drawn is no single enantiomer."""
    if structure is None or not any(atom.stereo for atom in structure.atoms):
        return True
    return mirror_smiles(structure) == structure.smiles


def _unmarked_words(product: Structure, start: Structure) -> str:
    """For centres that a step made and nothing sets, from a start without any."""
    if _open_centres(start) or any(atom.cip for atom in start.atoms):
        return ""
    return ("", "racemic", "mixture of diastereomers")[min(len(_open_centres(product)), 2)]
