"""Peaks of a mass spectrum against one structure: molecular ion, isotope peaks, fragments."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from math import fsum

from hoodside.predict.formula import Formula, exact_mass, isotope_pattern
from hoodside.predict.model import MassExpectation
from hoodside.readings import MassPeak, Readings
from hoodside.weigh.decibans import decibans, t_density
from hoodside.weigh.finding import Finding, Link, Weighed
from hoodside.weigh.trust import trust

#: Ions made from a whole molecule by soft ionisation, as nominal mass differences (facts/ms_adducts.csv).
_ADDUCTS = {1: "[M+H]⁺", 23: "[M+Na]⁺", 18: "[M+NH₄]⁺", 39: "[M+K]⁺", -1: "[M−H]⁻"}
#: Peaks that no rule accounts for, per list, on average; and how many masses they spread over.
_STRAYS, _MASSES = 4.0, 60.0
#: Printed peaks above the heaviest isotope peak: another, heavier compound, or an impurity.
_TOO_HEAVY = -15.0
_SLACK = 5
#: A ratio of two isotope peaks scatters by this share; readings of the ratio that are plainly wrong.
_RATIO_SD, _RATIO_WRONG = 0.25, 0.05
#: Lists at least this long are taken as spectra, shorter ones as picked peaks.
_SPECTRUM = 4


def weigh_masses(formula: Formula, expected: Sequence[MassExpectation], readings: Readings) -> Weighed:
    """All peaks of the readings against the ions a structure may give."""
    if not readings.ms:
        return Weighed()
    nominal = round(exact_mass(Formula(formula.parts)))
    findings, links = [], []
    fragments = {round(e.mz): i for i, e in reversed(list(enumerate(expected))) if round(e.mz) != nominal}
    total = _STRAYS + fsum(e.weight for e in expected)
    whole = _whole_ions(nominal, readings.ms)
    for k, peak in enumerate(readings.ms):
        mz = round(peak.mz)
        found = _peak(k, mz, nominal, whole, fragments, expected, total)
        findings.append(found)
        if mz in fragments and fragments[mz] < len(expected):
            i = fragments[mz]
            links.append(Link(f"ms:{k}", f"ms:{i}", expected[i].atoms))
    return Weighed((*findings, *_isotopes(formula, nominal, readings.ms)), tuple(links))


def _whole_ions(nominal: int, peaks: Sequence[MassPeak]) -> dict[int, str]:
    """Nominal m/z -> name, for the whole-molecule ions that a list may show."""
    heaviest = max(round(p.mz) for p in peaks)
    names = {nominal: "M⁺•"}
    for shift, name in _ADDUCTS.items():
        # Beside the molecular ion itself, M+1 is an isotope peak.
        if nominal + shift == heaviest or abs(shift) > 2:
            names.setdefault(nominal + shift, name)
    return names


def _peak(
    k: int,
    mz: int,
    nominal: int,
    whole: dict[int, str],
    fragments: dict[int, int],
    expected: Sequence[MassExpectation],
    total: float,
) -> Finding:
    ref = (f"ms:{k}",)
    if mz in whole:
        weight = decibans(0.7 * _MASSES / 3)
        return Finding("ms.molecule", trust("ms.molecule") * weight, f"m/z {mz} is {whole[mz]}.", ref)
    if mz > nominal + _SLACK:
        text = f"m/z {mz} lies above the molecular mass of {nominal}."
        return Finding("ms.molecule", trust("ms.molecule") * _TOO_HEAVY, text, ref)
    if mz > nominal:
        return Finding("ms.ion", 0.0, f"m/z {mz} is an isotope peak of the molecular ion.", ref)
    likely = fsum(e.weight for e in expected if round(e.mz) == mz)
    ratio = (_STRAYS / _MASSES + likely) / total * _MASSES
    weight = trust("ms.ion") * decibans(max(ratio, 0.05))
    if mz in fragments:
        ion = expected[fragments[mz]]
        return Finding("ms.ion", weight, f"m/z {mz}: {ion.label}.", ref, ion.atoms, ion.source)
    return Finding("ms.ion", weight, f"m/z {mz}: no usual cleavage gives it.", ref)


def _isotopes(formula: Formula, nominal: int, peaks: Sequence[MassPeak]) -> Iterator[Finding]:
    """The M+2 peak against M: tells chlorine, bromine and sulfur."""
    at = {round(p.mz): k for k, p in enumerate(peaks)}
    if nominal not in at or nominal + 2 not in at:
        yield from _no_isotope_peak(formula, nominal, at, peaks)
        return
    first, second = peaks[at[nominal]], peaks[at[nominal + 2]]
    if not first.rel or not second.rel:
        return
    seen, due = second.rel / first.rel, _ratio(formula)
    spread = max(_RATIO_SD * due, 0.04)
    suits = t_density((seen - due) / spread) / spread
    weight = decibans((1 - _RATIO_WRONG) * suits + _RATIO_WRONG)
    text = f"M+2 is {100 * seen:.0f} % of M; {100 * due:.0f} % expected for {formula.text}."
    refs = (f"ms:{at[nominal]}", f"ms:{at[nominal + 2]}")
    yield Finding("ms.isotopes", trust("ms.isotopes") * weight, text, refs, (), "IUPAC isotopic abundances")


#: An M+2 peak as tall as this is always listed beside M in a full list.
_TALL = 0.25


def _no_isotope_peak(
    formula: Formula, nominal: int, at: dict[int, int], peaks: Sequence[MassPeak]
) -> Iterator[Finding]:
    due = _ratio(formula)
    if nominal in at and len(peaks) >= _SPECTRUM and due > _TALL and (peaks[at[nominal]].rel or 0) > 5:
        text = f"No M+2 peak beside M, though {100 * due:.0f} % of it is expected."
        yield Finding("ms.isotopes", trust("ms.isotopes") * -4.0, text, (f"ms:{at[nominal]}",))


def _ratio(formula: Formula) -> float:
    """M+2 over M."""
    peaks = {p.nominal: p.rel for p in isotope_pattern(Formula(formula.parts), min_rel=0.01)}
    first = min(peaks)
    return peaks.get(first + 2, 0.0) / peaks[first]
