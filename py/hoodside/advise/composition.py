"""Masses and composition as further measurements."""

from __future__ import annotations

from hoodside.advise.imagined import by_peaks, gap, imagined_peaks, only
from hoodside.advise.model import NOTHING, Gain, Measurement, Pair, efforts
from hoodside.predict.formula import Formula, adduct_mz, exact_mass, isotope_pattern, mass_percent
from hoodside.readings import Analysis, HighResMass, MassPeak, Readings
from hoodside.weigh.expectations import Expectations
from hoodside.weigh.finding import Weighed
from hoodside.weigh.formulas import weigh_formula

#: Isotope ratios that can be told apart on any instrument.
_RATIO = 0.15
#: Masses further apart than this are told apart without accurate mass, u.
_NOMINAL = 0.5
_DIFFER = "They should break up differently."


def mass_measurements(readings: Readings) -> list[Measurement]:
    """Mass spectra and combustion, where not done yet."""
    offers = []
    if readings.hrms is None:
        offers.append(Measurement("hrms", efforts()["hrms"].measure, lambda pair: _accurate(pair, readings)))
    if not readings.ms:
        offers.append(Measurement("ms", efforts()["ms"].measure, lambda pair: _peaks(pair, readings)))
        offers.append(Measurement("isotopes", efforts()["isotopes"].measure, _isotopes))
    if readings.analysis is None:
        offers.append(
            Measurement("combustion", efforts()["combustion"].measure, lambda p: _combustion(p, readings))
        )
    return offers


def _by_formula(expected: Expectations, readings: Readings) -> Weighed:
    return weigh_formula(expected.formula, readings)


def _same(pair: Pair) -> bool:
    return pair.first.formula == pair.second.formula


def _accurate(pair: Pair, readings: Readings) -> Gain:
    if _same(pair):
        return NOTHING

    def imagine(expected: Expectations) -> Readings:
        found = HighResMass(found=adduct_mz(expected.formula, "[M+H]+"))
        return only(readings, hrms=found, formula="")

    weight = gap(pair.first, pair.second, imagine, _by_formula)
    masses = [adduct_mz(e.formula, "[M+H]+") for e in (pair.first, pair.second)]
    a, b = pair.names
    apart = _apart(masses[0], masses[1])
    why = f"[M+H]⁺ of {a} is {masses[0]:.4f}, of {b} {masses[1]:.4f}: {apart}."
    return Gain(weight, why, (f"{masses[0]:.4f}: {a}.", f"{masses[1]:.4f}: {b}."))


def _apart(one: float, other: float) -> str:
    if abs(one - other) > _NOMINAL:
        return f"{abs(one - other):.0f} u apart, so any mass spectrum will do"
    return f"{abs(one - other) / one * 1e6:.0f} ppm apart"


def _peaks(pair: Pair, readings: Readings) -> Gain:
    weight = gap(pair.first, pair.second, lambda e: only(readings, ms=imagined_peaks(e)), by_peaks)
    a, b = pair.names
    whole = [round(exact_mass(Formula(e.formula.parts))) for e in (pair.first, pair.second)]
    if whole[0] != whole[1]:
        return Gain(weight, f"M is {whole[0]} for {a}, {whole[1]} for {b}.")
    told = []
    for mine, other, name in ((pair.first, pair.second, a), (pair.second, pair.first, b)):
        others = {round(e.mz) for e in other.ms if e.weight > 0.15}
        own = [e for e in mine.ms if round(e.mz) not in others]
        best = max(own, key=lambda e: e.weight, default=None)
        if best is not None and best.weight > 0.4:
            told.append(f"m/z {best.mz:.0f}: {name} ({best.label}).")
    return Gain(weight, _DIFFER if told else "Fragments differ little.", tuple(told))


def _isotopes(pair: Pair) -> Gain:
    ratios = [_ratio(e.formula) for e in (pair.first, pair.second)]
    if _same(pair) or abs(ratios[0] - ratios[1]) < _RATIO:
        return NOTHING
    a, b = pair.names
    told = [f"M+2 about {100 * r:.0f} % of M: {name}." for r, name in zip(ratios, (a, b), strict=True)]
    return Gain(
        gap(pair.first, pair.second, _imagined_pattern, by_peaks),
        "Chlorine, bromine and sulfur show in the isotope pattern.",
        tuple(told),
    )


def _imagined_pattern(expected: Expectations) -> Readings:
    """M and M+2 as they stand in a spectrum."""
    mass = float(round(exact_mass(Formula(expected.formula.parts))))
    return Readings(ms=(MassPeak(mass, 100.0), MassPeak(mass + 2, 100 * _ratio(expected.formula))))


def _ratio(formula: Formula) -> float:
    peaks = {p.nominal: p.rel for p in isotope_pattern(Formula(formula.parts), min_rel=0.01)}
    first = min(peaks)
    return peaks.get(first + 2, 0.0) / peaks[first]


def _combustion(pair: Pair, readings: Readings) -> Gain:
    if _same(pair):
        return NOTHING
    percents = [mass_percent(e.formula) for e in (pair.first, pair.second)]
    elements = [e for e in ("C", "H", "N", "S") if any(e in p for p in percents)]

    def imagine(expected: Expectations) -> Readings:
        percent = mass_percent(expected.formula)
        return only(readings, analysis=Analysis({e: percent.get(e, 0.0) for e in elements}), formula="")

    a, b = pair.names
    carbon = [p.get("C", 0.0) for p in percents]
    why = f"C {carbon[0]:.1f} % for {a}, {carbon[1]:.1f} % for {b}."
    return Gain(gap(pair.first, pair.second, imagine, _by_formula), why)
