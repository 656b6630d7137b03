"""Which face of a ring a hydrogen or a group is on, so that cis and trans neighbours can be told apart.

Faces are relative: only whether two of them are equal has a meaning.
"""

from __future__ import annotations

from hoodside.molecule import Structure

#: Stand-ins for the one or two hydrogens of a ring atom in the order of its ligands.
_H = (-1, -2)


def ring_face(structure: Structure, ring: tuple[int, ...], atom: int, ligand: int) -> int | None:
    """+1 or -1 for the face that ``ligand`` (-1, -2: first, second H) of a ring atom is on.

    None where the configuration is open, or the ligand is no substituent of a tetrahedral ring atom.
    """
    own = structure.atoms[atom]
    ligands = [*structure.neighbours[atom], *_H[: own.hydrogens]]
    place = ring.index(atom)
    before, after = ring[place - 1], ring[(place + 1) % len(ring)]
    outside = [n for n in ligands if n not in (before, after)]
    if len(ligands) != 4 or len(outside) != 2 or ligand not in outside:
        return None
    turn = {"cw": 1, "ccw": -1}.get(own.stereo, 1 if own.hydrogens == 2 else 0)
    if not turn:
        return None
    other = outside[0] if ligand == outside[1] else outside[1]
    return turn * _parity(ligands, (before, after, ligand, other))


def _parity(order: list[int], wanted: tuple[int, ...]) -> int:
    """+1 when ``wanted`` is an even permutation of ``order``."""
    places = [order.index(n) for n in wanted]
    swaps = sum(places[i] > places[j] for i in range(4) for j in range(i + 1, 4))
    return -1 if swaps % 2 else 1
