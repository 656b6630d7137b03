"""The two faces of an addition where a stereocentre nearby makes them differ."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.draft import Draft


def both_faces(before: Structure, made: Structure, a: int, b: int) -> list[Structure]:
    """The product and, where other stereocentres make it another compound, that of the other face.

    The face away from substituents on the neighbouring ring atoms comes first (steric approach control,
    Clayden, Greeves and Warren, Organic Chemistry).
    """
    draft = Draft(made)
    draft.turn_over(a)
    draft.turn_over(b)
    other = draft.keep_order()
    if not any(atom.stereo for atom in before.atoms):
        return [made]
    crowded = [_crowding(face, before, a, b) for face in (made, other)]
    return [other, made] if crowded[1] < crowded[0] else [made, other]


def _crowding(made: Structure, before: Structure, a: int, b: int) -> int:
    """How many ring neighbours carry a substituent on the side that the new ligands came to."""
    count = 0
    for ring in before.rings:
        if a not in ring or b not in ring:
            continue
        for end in (a, b):
            new = [n for n in made.neighbours[end] if n >= len(before.atoms)]
            if not new:
                continue
            side = _side(made, ring, end, new[0])
            for near in made.neighbours[end]:
                if near in ring and near not in (a, b):
                    count += sum(
                        side != 0 and _side(made, ring, near, ligand) == side
                        for ligand in made.neighbours[near]
                        if ligand not in ring
                    )
    return count


def _side(structure: Structure, ring: tuple[int, ...], atom: int, ligand: int) -> int:
    """+1 or -1: the face of the ring that a ligand stands on; 0 where the centre is not marked."""
    stereo = structure.atoms[atom].stereo
    if not stereo:
        return 0
    place = ring.index(atom)
    before, after = ring[place - 1], ring[(place + 1) % len(ring)]
    listed: list[int | None] = list(structure.neighbours[atom])
    if structure.atoms[atom].hydrogens:
        listed.append(None)
    rest = [n for n in listed if n not in (before, after, ligand)]
    order = [ligand, before, after, *rest]
    places = [order.index(n) for n in listed]
    odd = sum(p > q for i, p in enumerate(places) for q in places[i + 1 :]) % 2 == 1
    return 1 if (stereo == "cw") != odd else -1
