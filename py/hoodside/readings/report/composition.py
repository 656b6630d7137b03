"""Formulas as printed in accurate-mass and combustion lines, and what molecule an ion came from."""

from __future__ import annotations

import re
from functools import cache

from hoodside.facts import load_table

#: A formula as printed: at least a carbon and one more symbol, with an optional charge behind.
#: (Taken-out markup leaves five or six spaces.)
FORMULA = re.compile(
    r"(?<![A-Za-z0-9])(?:\[\s?)?(?P<formula>C(?:\s{5,6})?\d{0,3}(?:(?:\s{5,6})?[A-Z][a-z]?(?![a-z])"
    r"(?:\s{5,6})?(?:\d{1,3}(?![\d.]*\d))?){1,12})(?:\s?\])?(?P<charge>[+-])?"
)
_PART = re.compile(r"([A-Z][a-z]?)\s*(\d{0,3})")
_ELECTRON = 0.000548580  # u, CODATA 2018
_NEAR = 0.004  # u: masses printed for the same ion, with or without the mass of the electron, agree so well
_GAINS: dict[str, dict[str, int]] = {
    "[M+H]+": {"H": 1},
    "[M+Na]+": {"Na": 1},
    "[M+K]+": {"K": 1},
    "[M+NH4]+": {"N": 1, "H": 4},
    "[M]+.": {},
    "[M-H]-": {"H": -1},
    "[M+Cl]-": {"Cl": 1},
    "[M+Li]+": {"Li": 1},
}


def counts_of(formula: str) -> dict[str, int]:
    """Atoms of a flat formula ("C10H12O"); {} when it names what is no element."""
    counts: dict[str, int] = {}
    for symbol, count in _PART.findall(formula):
        counts[symbol] = counts.get(symbol, 0) + int(count or 1)
    return counts if counts.keys() <= _masses().keys() else {}


def mass_of(counts: dict[str, int]) -> float:
    """Mass in u of the most abundant isotopes."""
    return sum(_masses()[symbol] * n for symbol, n in counts.items())


def hill(counts: dict[str, int]) -> str:
    """The formula in Hill order."""
    rest = sorted(s for s in counts if s not in ("C", "H"))
    order = [s for s in ("C", "H") if s in counts] + rest
    return "".join(s + (str(counts[s]) if counts[s] > 1 else "") for s in order if counts[s] > 0)


def molecule_behind(formula: str, mz: float, adduct: str) -> tuple[str, str]:
    """(formula of the neutral molecule, adduct) for a printed formula and calculated m/z.

    The formula may be that of the ion or of the molecule, and the adduct may be left out: the mass decides.
    ("", adduct) when nothing agrees with the mass.
    """
    counts = counts_of(formula)
    if not counts:
        return "", adduct
    for name in [adduct] if adduct in _GAINS else _GAINS:
        charge = -1 if name.endswith("-") else 1
        if abs(mass_of(counts) + mass_of(_GAINS[name]) - charge * _ELECTRON - mz) < _NEAR:
            return hill(counts), name
    if abs(mass_of(counts) - mz) < _NEAR and (adduct in _GAINS or not adduct):
        gain = _GAINS[adduct or "[M+H]+"]
        molecule = {s: counts.get(s, 0) - gain.get(s, 0) for s in {**counts, **gain}}
        if all(n >= 0 for n in molecule.values()):
            return hill(molecule), adduct or "[M+H]+"
    return "", adduct


@cache
def _masses() -> dict[str, float]:
    best: dict[str, tuple[float, float]] = {}
    for row in load_table("isotopes"):
        mass, share = float(row["exact_mass"]), float(row["abundance"])
        if share > best.get(row["element"], (0.0, -1.0))[1]:
            best[row["element"]] = (mass, share)
    return {element: mass for element, (mass, _) in best.items()}
