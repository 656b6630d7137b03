"""Formula, accurate mass and combustion analysis against one structure.

These three say the same thing, the composition, so a mismatch is charged once: where the formula given
already rules a structure out, the others add nothing against it.
"""

from __future__ import annotations

from collections.abc import Iterator
from functools import cache

from hoodside.errors import FormulaError
from hoodside.predict.formula import (
    Formula,
    adduct_mz,
    combustion_check,
    parse_formula,
    solvate_fits,
)
from hoodside.readings import Readings
from hoodside.weigh.decibans import decibans, t_density
from hoodside.weigh.finding import Finding, Weighed
from hoodside.weigh.trust import trust
from hoodside.weigh.words import formula_text, listed

#: Chance that a formula taken as given is wrong.
_FORMULA_WRONG = 0.002
#: Share of accurate masses that are off outright, and the stretch other compositions spread over, u.
_MASS_WRONG, _MASS_STRETCH = 0.004, 0.10
#: A tolerance as stated spans about two standard deviations.
_SDS_PER_TOLERANCE = 2.0
#: Spread of found per cent about calculated: the usual +-0.4 spans two standard deviations.
_PER_CENT_SD, _PER_CENT_STRETCH, _PER_CENT_WRONG = 0.2, 8.0, 0.02
#: Found values that need a solvate to fit, decibans.
_SOLVATE = -5.0


def weigh_formula(formula: Formula, readings: Readings) -> Weighed:
    """What the composition says of a structure of this formula."""
    ruled_out = bool(readings.formula) and not same_formula(formula, readings.formula)
    findings = [*_given(formula, readings, ruled_out)]
    findings += [
        _once(f, ruled_out) for f in (*_accurate(formula, readings), *_combustion(formula, readings))
    ]
    return Weighed(tuple(findings))


def same_formula(formula: Formula, given: str) -> bool:
    """Whether a formula as typed is that of the structure; True when it cannot be read."""
    wanted = _parsed(given)
    return wanted is None or (wanted.parts == formula.parts and wanted.charge in (0, formula.charge))


@cache
def _parsed(text: str) -> Formula | None:
    try:
        return parse_formula(text)
    except FormulaError:
        return None


def _once(finding: Finding, ruled_out: bool) -> Finding:
    if not ruled_out or finding.weight_db >= 0:
        return finding
    return Finding(finding.kind, 0.0, finding.text + " Counted with the formula.", finding.readings)


def _given(formula: Formula, readings: Readings, ruled_out: bool) -> Iterator[Finding]:
    if not readings.formula:
        return
    mine = formula_text(formula.text)
    if ruled_out:
        text = f"The structure is {mine}, not {formula_text(readings.formula)}."
        yield Finding("formula", trust("formula") * decibans(_FORMULA_WRONG), text, ("formula",))
    else:
        yield Finding("formula", 0.0, f"Formula {mine} as given.", ("formula",))


def _accurate(formula: Formula, readings: Readings) -> Iterator[Finding]:
    mass = readings.hrms
    if mass is None:
        return
    try:
        due = adduct_mz(formula, mass.adduct)
    except FormulaError:
        text = f"The structure has nothing to lose for {mass.adduct}."
        yield Finding("hrms", decibans(_MASS_WRONG), text, ("hrms",))
        return
    off_ppm = (mass.found - due) / due * 1e6
    sd = mass.ppm / _SDS_PER_TOLERANCE * due * 1e-6
    suits = t_density((mass.found - due) / sd) / sd
    ratio = ((1 - _MASS_WRONG) * suits + _MASS_WRONG / _MASS_STRETCH) * _MASS_STRETCH
    within = "within" if abs(off_ppm) <= mass.ppm else "outside"
    text = (
        f"{mass.adduct} found {mass.found:.4f}, calculated {due:.4f}: off by {off_ppm:+.1f} ppm, "
        f"{within} ± {mass.ppm:g} ppm."
    )
    yield Finding(
        "hrms", trust("hrms") * decibans(ratio), text, ("hrms",), (), "AME2020 masses (facts/isotopes.csv)"
    )


def _combustion(formula: Formula, readings: Readings) -> Iterator[Finding]:
    if readings.analysis is None:
        return
    lines = combustion_check(formula, readings.analysis.found)
    weight = 0.0
    for line in lines:
        suits = t_density(line.difference / _PER_CENT_SD) / _PER_CENT_SD
        ratio = (1 - _PER_CENT_WRONG) * suits * _PER_CENT_STRETCH + _PER_CENT_WRONG
        # Percentages of one sample move together: each further element counts half.
        weight += decibans(ratio) if weight == 0 else decibans(ratio) / 2
    told = listed([f"{x.element} {x.found:.2f} % (calculated {x.calculated:.2f})" for x in lines])
    out = [x.element for x in lines if not x.within]
    text = f"Found {told}: " + (f"{listed(out)} outside ± 0.4." if out else "all within ± 0.4.")
    fits = solvate_fits(formula, readings.analysis.found) if out else ()
    if fits:
        text += f" It would fit with {fits[0].amount:g} {formula_text(fits[0].solvent)}."
        weight = max(weight, _SOLVATE)
    yield Finding(
        "analysis", trust("analysis") * weight, text, ("analysis",), (), lines[0].source if lines else ""
    )
