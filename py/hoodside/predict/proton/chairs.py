"""How far a hydrogen of a six-membered ring is axial, from the A values of what else stands on the ring.

Of the two chairs the one with the smaller sum of A values (Eliel and Wilen, Stereochemistry of Organic
Compounds, 1994, table 11.7) is populated after Boltzmann; a known configuration ties the faces together.
"""

from __future__ import annotations

from functools import cache
from math import exp

from hoodside.facts import load_table
from hoodside.predict.model import Term
from hoodside.predict.proton.faces import ring_face
from hoodside.predict.proton.view import View

_RT = 0.593  # kcal/mol at 298 K
_CHAIR = 6
_CLEAR = 0.75


def axial_terms(view: View, atom: int, slot: int) -> list[Term]:
    """The shift of an axial or equatorial H from the mean of both, for each chair the H is part of."""
    found = []
    for ring in view.structure.rings:
        share = axial_share(view, ring, atom, slot) if atom in ring else None
        if share is not None:
            axial, equatorial, source = _frozen_cyclohexane()
            found.append(Term(_label(share), (axial - equatorial) * (share - 0.5), source))
    return found


def axial_share(view: View, ring: tuple[int, ...], atom: int, slot: int) -> float | None:
    """Share (0 to 1) of chairs in which H ``slot`` of a ring atom is axial; None where nothing tells."""
    face = ring_face(view.structure, ring, atom, -1 - slot)
    if len(ring) != _CHAIR or face is None or not all(_is_puckered(view, a) for a in ring):
        return None
    strain = [_strain(view, ring, turn) for turn in (1, -1)]
    if strain[0] == strain[1]:
        return None
    first = 1 / (1 + exp((strain[0] - strain[1]) / _RT))
    return first if face == _up(ring, atom) else 1 - first


def _label(share: float) -> str:
    return "mostly axial" if share > _CLEAR else "mostly equatorial" if share < 1 - _CLEAR else "half axial"


def _is_puckered(view: View, atom: int) -> bool:
    bonds = view.structure.bonds_of[atom]
    return not any(bond.aromatic for bond in bonds) and view.alkene_partner(atom) is None


def _strain(view: View, ring: tuple[int, ...], turn: int) -> float:
    """Sum of the A values (kcal/mol) of what is axial in one chair."""
    structure = view.structure
    total = 0.0
    for member in ring:
        for near in structure.neighbours[member]:
            face = ring_face(structure, ring, member, near) if near not in ring else None
            if face == turn * _up(ring, member):
                total += float(view.substituent(member, near).row["axial_kcal"])
    return total


def _up(ring: tuple[int, ...], atom: int) -> int:
    """The face of the axial bond of a ring atom in the first chair: alternating round the ring."""
    return -1 if ring.index(atom) % 2 else 1


@cache
def _frozen_cyclohexane() -> tuple[float, float, str]:
    rows = {r["conformer"]: r for r in load_table("proton_rings") if r["name"].startswith("cyclohexane ")}
    return float(rows["axial"]["ppm"]), float(rows["equatorial"]["ppm"]), rows["axial"]["source"]
