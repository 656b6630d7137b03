"""Readings used early: what they rule out whatever the finer weighing may say.

Every rule leaves room for a wrong integral, an impurity, solvent, overlap and missed lines, so that a right
structure is not lost here; telling close ones apart is the weighing's business.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from functools import cache

from hoodside.errors import FormulaError, InvalidInputError
from hoodside.facts import load_table
from hoodside.molecule.structure import Structure, read_structure
from hoodside.molecule.symmetry import atom_classes
from hoodside.predict.formula import adduct_mz, formula_of, parse_formula
from hoodside.readings.model import IrBand, Readings

#: 13C lines beyond the classes of carbon that impurities and solvent may bring, and the part of them overlap
#: and slow relaxation may hide (common practice: quaternary carbons are often missed).
_EXTRA_LINES = 3
_HIDDEN_PART = 0.5
#: ppm below which no H on an sp3 carbon of ordinary substitution lies further downfield, and above which none
#: on an sp2 carbon lies upfield (common practice, with room to spare).
_SP2_FROM = 6.4
_SP3_TO = 3.6
#: H that integration error, water and impurities may add, on top of a fifth of what is there.
_STRAY_H = 2.0
_STRAY_PART = 0.2
#: An aldehyde CH: where it is seen, and where nothing but it and exchanging H is.
_ALDEHYDE_FROM = 8.8
_ALDEHYDE_ONLY = (9.45, 10.7)
#: Accurate mass: how many times the stated error is believed, at the least this many ppm.
_MASS_TIMES = 3.0
_MASS_LEAST = 15.0

_SP2_H = "[#6X3,#6X2;!H0]"
_CARBONYL_H = "[CX3;H1](=O)[#6]"
_MOBILE_H = "[N,O,S,n;!H0]"
_SP3_H = "[CX4;!H0]"
_BORON_LIKE = "[Si,B,Sn,Ge,P,Se]"


@dataclass(frozen=True, slots=True)
class _Protons:
    """1H integrals by region, in H."""

    low: float  # beyond _SP2_FROM
    high: float  # upfield of _SP3_TO
    total: float


def early_test(readings: Readings) -> Callable[[str], bool]:
    """A test of SMILES: whether the readings leave the structure standing. Cheap tests come first."""
    checks = [
        *_formula_checks(readings),
        *_carbon_checks(readings),
        *_proton_checks(readings),
        *_infrared_checks(readings),
    ]
    if not checks:
        return lambda smiles: True

    def stands(smiles: str) -> bool:
        structure = read_structure(smiles)
        return all(check(structure) for check in checks)

    return stands


_Check = Callable[[Structure], bool]


def _formula_checks(readings: Readings) -> list[_Check]:
    checks: list[_Check] = []
    if readings.formula:
        try:
            wanted = parse_formula(readings.formula).elements
        except FormulaError:
            wanted = {}
        if wanted:
            checks.append(lambda structure: structure.element_counts == wanted)
    mass = readings.hrms
    if mass is not None:
        found, adduct, room = mass.found, mass.adduct, max(_MASS_LEAST, _MASS_TIMES * mass.ppm)
        checks.append(lambda structure: _mass_near(structure, found, adduct, room))
    return checks


def _mass_near(structure: Structure, found: float, adduct: str, room: float) -> bool:
    try:
        return abs(adduct_mz(formula_of(structure), adduct) / found - 1) < room * 1e-6
    except InvalidInputError:  # an adduct not known here rules nothing out
        return True


def _carbon_checks(readings: Readings) -> list[_Check]:
    lines = len(readings.c13)
    if not lines or any(line.j_cf for line in readings.c13):
        return []

    def enough(structure: Structure) -> bool:
        classes = atom_classes(structure)
        carbons = len({classes[a.index] for a in structure.atoms if a.symbol == "C"})
        return _HIDDEN_PART * carbons - 1 <= lines <= carbons + max(_EXTRA_LINES, carbons * _STRAY_PART)

    return [lambda structure: "F" in structure.element_counts or enough(structure)]


def _proton_checks(readings: Readings) -> list[_Check]:
    if not readings.h1 or any(signal.n is None for signal in readings.h1):
        return []
    checks: list[_Check] = []
    seen = _protons(readings)
    raw = readings.raw_integrals
    checks.append(lambda structure: _regions_fit(structure, seen, raw))
    shifts = [(signal.lo, signal.hi) for signal in readings.h1]
    if not any(hi >= _ALDEHYDE_FROM for _, hi in shifts):
        checks.append(lambda structure: not structure.matches(_CARBONYL_H))
    lo, hi = _ALDEHYDE_ONLY
    if any(lo <= a and b <= hi and a == b for a, b in shifts):
        checks.append(lambda structure: any(structure.match_all([_CARBONYL_H, _MOBILE_H, "[c,C]=,:[n,N]"])))
    return checks


def _protons(readings: Readings) -> _Protons:
    signals = [(signal.lo, signal.hi, signal.n or 0.0) for signal in readings.h1]
    return _Protons(
        low=sum(n for lo, _, n in signals if lo >= _SP2_FROM),
        high=sum(n for _, hi, n in signals if hi <= _SP3_TO),
        total=sum(n for _, _, n in signals),
    )


def _regions_fit(structure: Structure, seen: _Protons, raw: bool) -> bool:
    sp2, sp3, mobile = (_hydrogens(structure, smarts) for smarts in (_SP2_H, _SP3_H, _MOBILE_H))
    scale = (sp2 + sp3) / seen.total if raw and seen.total else 1.0
    low, high, total = scale * seen.low, scale * seen.high, scale * seen.total
    if total < (sp2 + sp3) * (1 - 2 * _STRAY_PART) - _STRAY_H:
        return False
    if not raw and total > (sp2 + sp3 + mobile) * (1 + _STRAY_PART) + _STRAY_H:
        return False
    far_up = structure.matches(_BORON_LIKE)
    return low <= (sp2 + mobile) * (1 + _STRAY_PART) + _STRAY_H and (
        bool(far_up) or high <= (sp3 + mobile) * (1 + _STRAY_PART) + _STRAY_H
    )


def _hydrogens(structure: Structure, smarts: str) -> int:
    return sum(structure.atoms[atom].hydrogens for (atom,) in structure.matches(smarts))


@cache
def _infrared_rules() -> tuple[tuple[str, float, float, str], ...]:
    rows = load_table("early_infrared")
    return tuple((row["sign"], float(row["lo"]), float(row["hi"]), row["smarts"]) for row in rows)


def _infrared_checks(readings: Readings) -> list[_Check]:
    checks: list[_Check] = []
    for sign, lo, hi, smarts in _infrared_rules():
        if sign == "clear" and any(c.lo <= lo and hi <= c.hi for c in readings.ir_clear):
            checks.append(_without(smarts))
        elif sign == "strong" and any(_is_strong(band, lo, hi) for band in readings.ir):
            checks.append(_with(smarts))
    return checks


def _is_strong(band: IrBand, lo: float, hi: float) -> bool:
    return band.strength == "strong" and lo <= band.cm1 <= hi


def _without(smarts: str) -> _Check:
    return lambda structure: not structure.matches(smarts)


def _with(smarts: str) -> _Check:
    return lambda structure: bool(structure.matches(smarts))
