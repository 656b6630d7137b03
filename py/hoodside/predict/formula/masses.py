"""Masses of a formula: exact (monoisotopic), average and nominal."""

from __future__ import annotations

from functools import cache
from math import fsum

from hoodside.facts.table import load_table
from hoodside.predict.formula.model import Formula

#: Mass of the electron in u (CODATA 2018: 5.48579909065e-4).
ELECTRON_MASS = 5.48579909065e-4

Isotope = tuple[int, float, float]


@cache
def isotopes_of(element: str) -> tuple[Isotope, ...]:
    """Natural isotopes of an element: (mass number, mass in u, mole fraction), lightest first."""
    return tuple(isotope for isotope in _table().get(element, ()) if isotope[2] > 0)


@cache
def main_isotope(symbol: str) -> tuple[int, float]:
    """Mass number and mass in u of a nuclide, or of the most abundant isotope of an element."""
    element = symbol.lstrip("0123456789")
    if element != symbol:
        number = int(symbol[: -len(element)])
        return next((a, mass) for a, mass, _ in _table()[element] if a == number)
    number, mass, _ = max(_table()[element], key=lambda isotope: isotope[2])
    return number, mass


def exact_mass(formula: Formula) -> float:
    """Mass in u of the species built from the most abundant isotope of each element.

    For an ion the electrons lost or gained are taken into account; m/z is this over the charge number.
    Source: AME2020 masses, Chin. Phys. C 2021, 45, 030003 (facts/isotopes.csv); CODATA electron mass.
    """
    atoms = fsum(main_isotope(symbol)[1] * count for symbol, count in formula.parts)
    return atoms - formula.charge * ELECTRON_MASS


def average_mass(formula: Formula) -> float:
    """Relative molecular mass (g/mol) from the IUPAC standard atomic weights; labels by their own mass."""
    atoms = fsum(atomic_weight(symbol) * count for symbol, count in formula.parts)
    return atoms - formula.charge * ELECTRON_MASS


def nominal_mass(formula: Formula) -> int:
    """Integer mass from the mass numbers of the most abundant isotopes."""
    return sum(main_isotope(symbol)[0] * count for symbol, count in formula.parts)


@cache
def atomic_weight(symbol: str) -> float:
    """IUPAC standard atomic weight of an element (conventional value), or the mass of one nuclide, in u."""
    weights = _weights()
    return weights[symbol] if symbol in weights else main_isotope(symbol)[1]


@cache
def _weights() -> dict[str, float]:
    return {row["element"]: float(row["weight"]) for row in load_table("atomic_weights")}


@cache
def _table() -> dict[str, tuple[Isotope, ...]]:
    lists: dict[str, list[Isotope]] = {}
    for row in load_table("isotopes"):
        isotope = (int(row["A"]), float(row["exact_mass"]), float(row["abundance"]))
        lists.setdefault(row["element"], []).append(isotope)
    return {element: tuple(sorted(rows)) for element, rows in lists.items()}
