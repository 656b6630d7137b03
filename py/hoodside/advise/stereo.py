"""What stereoisomers differ in: mirror images, and H that are close in one of two."""

from __future__ import annotations

from hoodside.molecule import Structure, read_structure
from hoodside.weigh.expectations import Expectations

_SKELETON = 14  # letters of an InChIKey that tell the constitution


def differ_in_space_only(first: Structure, second: Structure) -> bool:
    """Whether two structures have one constitution and are no mirror images of each other."""
    if first.inchikey[:_SKELETON] != second.inchikey[:_SKELETON] or first.inchikey == second.inchikey:
        return False
    return not mirror_images(first, second)


def mirror_images(first: Structure, second: Structure) -> bool:
    """Whether one structure is the mirror image of the other."""
    if first.inchikey[:_SKELETON] != second.inchikey[:_SKELETON] or first.inchikey == second.inchikey:
        return False
    swapped = first.smiles.replace("@@", "\0").replace("@", "@@").replace("\0", "@")
    return "@" in swapped and read_structure(swapped).inchikey == second.inchikey


def contact(expected: Expectations) -> tuple[float, float] | None:
    """Shifts (ppm) of two H that lie on one side of a double bond, or of a ring, of a structure.

    Cis 1,2 on a double bond, or the same face of two neighbouring or next-but-one ring atoms.
    """
    return _across_double_bond(expected) or _on_one_face(expected)


def _shift_at(expected: Expectations, atom: int) -> float | None:
    return next((g.ppm for g in expected.h1 if atom in g.atoms and not g.exchangeable), None)


def _across_double_bond(expected: Expectations) -> tuple[float, float] | None:
    structure = expected.structure
    for bond in structure.bonds:
        if not bond.stereo or len(bond.stereo_atoms) != 2:
            continue
        for mine, theirs in _cis_ends(structure, bond.a, bond.b, bond.stereo_atoms, bond.stereo):
            one, other = _shift_at(expected, mine), _shift_at(expected, theirs)
            if one is not None and other is not None:
                return one, other
    return None


def _cis_ends(
    structure: Structure, a: int, b: int, marked: tuple[int, ...], stereo: str
) -> list[tuple[int, int]]:
    """Carriers of H on the same side: a substituent, or the alkene carbon itself for its own H."""
    left, right = marked if marked[0] in structure.neighbours[a] else (marked[1], marked[0])
    others = [_other(structure, a, b, left), _other(structure, b, a, right)]
    ends = (
        [(left, right), (others[0], others[1])]
        if stereo == "cis"
        else [(left, others[1]), (others[0], right)]
    )
    # None stands for the alkene carbon's own H.
    return [(a if x is None else x, b if y is None else y) for x, y in ends]


def _other(structure: Structure, here: int, far: int, marked: int) -> int | None:
    return next((n for n in structure.neighbours[here] if n not in (far, marked)), None)


def _on_one_face(expected: Expectations) -> tuple[float, float] | None:
    from hoodside.predict.coupling.shape import Shapes

    shapes = Shapes(expected.structure)
    for ring in expected.structure.rings:
        faces = shapes.faces(ring)
        sides = {atom: faces[~atom] for atom in ring if ~atom in faces}
        for i, atom in enumerate(ring):
            for step in (2, 1):
                other = ring[(i + step) % len(ring)]
                if atom in sides and other in sides and other != atom and sides[atom] == sides[other]:
                    one, two = _shift_at(expected, atom), _shift_at(expected, other)
                    if one is not None and two is not None:
                        return one, two
    return None
