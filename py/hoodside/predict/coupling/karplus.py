"""Vicinal couplings from dihedral angles and electronegativities.

Generalised Karplus relation of Haasnoot, de Leeuw and Altona (Tetrahedron 1980, 36, 2783) in the form with
empirical group electronegativities (Altona et al., Magn. Reson. Chem. 1994, 32, 670).
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from functools import cache
from math import cos, radians

from hoodside.facts import load_table

_VICINAL = "HLA with empirical group lambda"
_METHYL = "rotation-averaged CH3-CHXY"
SOURCE = "Haasnoot, de Leeuw and Altona 1980; group electronegativities of Altona 1994"


@dataclass(frozen=True, slots=True)
class Relation:
    """Parameters of one relation, Hz."""

    values: dict[str, float]
    source: str


@cache
def relation(name: str) -> Relation:
    """The parameters of facts/karplus.csv whose name begins with ``name``."""
    rows = [row for row in load_table("karplus") if row["name"].startswith(name)]
    return Relation({row["parameter"]: float(row["value"]) for row in rows}, rows[0]["source"])


@cache
def _vicinal_parameters() -> tuple[float, ...]:
    values = relation(_VICINAL).values
    return tuple(values[f"P{k}"] for k in range(1, 7))


def vicinal(phi: float, substituents: Iterable[tuple[float, int]]) -> float:
    """3J(HH) in Hz.

    Args:
        phi: dihedral angle H-C-C-H in degrees, clockwise positive.
        substituents: (group electronegativity, +1 or -1) of the four other ligands; the sign is that of the
            angle from the coupled H to the substituent, seen with the substituent's carbon in front.
    """
    p1, p2, p3, p4, p5, p6 = _vicinal_parameters()
    c = cos(radians(phi))
    total = p1 * c * c + p2 * c + p3
    for strength, sign in substituents:
        turned = cos(radians(sign * phi + p6 * abs(strength)))
        total += strength * (p4 + p5 * turned * turned)
    return total


def methyl(first: float, second: float) -> float:
    """3J of CH3-CHXY in Hz, averaged by rotation, from the group electronegativities of X and Y (H: 0)."""
    values = relation(_METHYL).values
    return values["base"] + values["sum"] * (first + second) + values["product"] * first * second
