"""Readings from and to JSON, as the command line and the app pass them."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from difflib import get_close_matches
from functools import cache
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.facts import load_table
from hoodside.readings.fields import Span, flag, given, number, record, refusal, rows, show, text
from hoodside.readings.infrared_words import strength_and_shape
from hoodside.readings.model import (
    Analysis,
    CarbonLine,
    HighResMass,
    IrBand,
    IrClear,
    MassPeak,
    ProtonSignal,
    Readings,
    WetResult,
)
from hoodside.readings.patterns import normalise_pattern
from hoodside.readings.solvents import known_solvent
from hoodside.readings.spin_systems import names_spin_system

#: What each number may be. Wide: strained, metal-bound and hydrogen-bonded H lie far out (common practice).
PROTON_SHIFT = Span("1H shift", -5, 25, "ppm")
CARBON_SHIFT = Span("13C shift", -60, 320, "ppm")
WAVENUMBER = Span("wavenumber", 200, 4500, "cm-1")
MZ = Span("m/z", 1, 5000)
FIELD = Span("1H frequency", 20, 2000, "MHz")
COUPLING = Span("coupling", 0, 300, "Hz")
CF_COUPLING = Span("C-F coupling", 0, 500, "Hz")
INTEGRAL = Span("number of H", 0.01, 1000)
RAW_INTEGRAL = Span("integral", 1e-9, 1e12)
PERCENT = Span("percentage", 0, 100, "%")
REL = Span("height", 0, 1000, "%")
TOLERANCE = Span("tolerance", 0.01, 1000, "ppm")
CARBONS = Span("number of carbons", 1, 100)

_KEYS = (
    "id",
    "formula",
    "solvent",
    "mhz",
    "h1",
    "c13",
    "ir",
    "ir_clear",
    "ir_medium",
    "ms",
    "hrms",
    "analysis",
    "wet",
    "raw_integrals",
    "text",
)
#: Keys of a check that are no readings.
_OTHER_KEYS = ("candidates", "intended", "rivals", "warnings", "name", "title", "note", "notes", "source")
_KINDS = {"c": "C", "ch": "CH", "ch2": "CH2", "ch3": "CH3", "cq": "C", "quat": "C", "": ""}
_RESULTS = {
    "positive": "positive",
    "negative": "negative",
    "+": "positive",
    "-": "negative",
    "−": "negative",
    "pos": "positive",
    "neg": "negative",
    "yes": "positive",
    "no": "negative",
    "true": "positive",
    "false": "negative",
}


def readings_from_json(obj: dict[str, Any]) -> Readings:
    """Readings from a check object. Keys that are no readings are ignored, unknown ones warned of.

    A report line under ``text`` fills the kinds that are not given by themselves.
    Raises: InvalidInputError naming the field ("h1[2].ppm"), the value and the mend.
    """
    entry = record(obj, "", "Give one JSON object with the readings of one sample.")
    raw = flag(entry.get("raw_integrals"), "raw_integrals")
    solvent, doubts = _solvent(text(entry.get("solvent"), "solvent"))
    typed = Readings(
        id=_id(entry.get("id")),
        formula=text(entry.get("formula"), "formula"),
        solvent=solvent,
        mhz=number(entry["mhz"], "mhz", FIELD) if list(given(entry, "mhz")) else None,
        h1=rows(entry.get("h1"), "h1", lambda row, path: _proton(row, path, raw)),
        c13=rows(entry.get("c13"), "c13", _carbon),
        ir=rows(entry.get("ir"), "ir", _band),
        ir_clear=rows(entry.get("ir_clear"), "ir_clear", _clear),
        ir_medium=text(entry.get("ir_medium"), "ir_medium"),
        ms=rows(entry.get("ms"), "ms", _peak),
        hrms=_high_res(entry.get("hrms")),
        analysis=_analysis(entry.get("analysis")),
        wet=rows(entry.get("wet"), "wet", _wet),
        raw_integrals=raw,
        warnings=(*_unknown_keys(entry), *doubts),
    )
    return _with_text(typed, entry.get("text"))


def _with_text(typed: Readings, value: object) -> Readings:
    line = text(value, "text", most=2_000_000)
    if not line:
        return typed
    from hoodside.readings.report import parse_report  # only cases with a text pay for loading it

    parsed = parse_report(line)
    pasted = parsed.readings
    fill = {
        name: getattr(pasted, name)
        for name in (*_KINDS_OF_READING, "formula", "solvent", "mhz", "ir_medium")
        if not getattr(typed, name) and getattr(pasted, name)
    }
    unread = tuple(f"Not read: {piece.text[:80]!r} ({piece.why})" for piece in parsed.unread[:20])
    return replace(typed, **fill, warnings=(*typed.warnings, *pasted.warnings, *unread))


_KINDS_OF_READING = ("h1", "c13", "ir", "ir_clear", "ms", "hrms", "analysis", "wet")


def _id(value: object) -> str:
    return str(value) if isinstance(value, int) and not isinstance(value, bool) else text(value, "id")


def _solvent(name: str) -> tuple[str, tuple[str, ...]]:
    found = known_solvent(name) if name else ""
    if name and not found:
        return "", (
            f"solvent: {name!r} is not in the table of NMR solvents, so its lines are not recognised.",
        )
    return found, ()


def _unknown_keys(entry: dict[str, Any]) -> Iterator[str]:
    for key in entry:
        if key not in _KEYS and key not in _OTHER_KEYS:
            near = get_close_matches(str(key), _KEYS, n=1)
            hint = f"; did you mean {near[0]}?" if near else "."
            yield f"{key}: not a known field, ignored{hint}"


def _proton(row: Any, path: str, raw: bool) -> ProtonSignal:
    hint = 'Write {"ppm": 7.26, "mult": "d", "j": [8.2], "n": 2}.'
    entry = {"ppm": row} if _is_plain(row) else record(row, path, hint)
    lo, hi = _shift_range(entry, path)
    n = (
        number(entry["n"], f"{path}.n", RAW_INTEGRAL if raw else INTEGRAL)
        if list(given(entry, "n"))
        else None
    )
    return ProtonSignal(
        lo,
        hi,
        _pattern(entry.get("mult"), path),
        _couplings(entry, path),
        n,
        text(entry.get("note"), f"{path}.note"),
    )


def _is_plain(row: object) -> bool:
    return isinstance(row, int | float | str) and not isinstance(row, bool)


def _shift_range(entry: dict[str, Any], path: str) -> tuple[float, float]:
    ends = [number(entry[name], f"{path}.{name}", PROTON_SHIFT) for name in given(entry, "lo", "hi")]
    if len(ends) == 2:
        return min(ends), max(ends)
    if list(given(entry, "ppm")):
        ppm = number(entry["ppm"], f"{path}.ppm", PROTON_SHIFT)
        return ppm, ppm
    raise refusal(f"{path}.ppm", None, "The signal has no shift.", 'Give "ppm", or both "lo" and "hi".')


def _pattern(value: object, path: str) -> str:
    name = text(value, f"{path}.mult")
    if not name:
        return ""
    if names_spin_system(name):
        return "m"
    try:
        return normalise_pattern(name)
    except InvalidInputError as err:
        raise InvalidInputError(str(err), hint=err.hint, field=f"{path}.mult", value=value) from err


def _couplings(entry: dict[str, Any], path: str) -> tuple[float, ...]:
    value = entry.get("j")
    listed = [] if value in (None, "") else value if isinstance(value, list | tuple) else [value]
    found = rows(listed, f"{path}.j", lambda j, where: abs(number(j, where, _SIGNED_COUPLING)))
    return tuple(sorted((j for j in found if j > 0), reverse=True))


_SIGNED_COUPLING = Span("coupling", -COUPLING.hi, COUPLING.hi, "Hz")


def _carbon(row: Any, path: str) -> CarbonLine:
    if _is_plain(row):
        return CarbonLine(number(row, path, CARBON_SHIFT))
    entry = record(row, path, 'Write a shift, or {"ppm": 23.6, "kind": "CH3"}.')
    kind = text(entry.get("kind"), f"{path}.kind")
    if kind.lower() not in _KINDS:
        raise refusal(f"{path}.kind", kind, f"{kind!r} is no kind of carbon.", "Write C, CH, CH2 or CH3.")
    j_cf = rows(entry.get("j_cf"), f"{path}.j_cf", lambda j, where: number(j, where, CF_COUPLING))
    return CarbonLine(
        number(entry.get("ppm"), f"{path}.ppm", CARBON_SHIFT),
        _KINDS[kind.lower()],
        round(number(entry["n"], f"{path}.n", CARBONS)) if list(given(entry, "n")) else 1,
        j_cf,
    )


def _band(row: Any, path: str) -> IrBand:
    if _is_plain(row):
        return IrBand(number(row, path, WAVENUMBER))
    entry = record(row, path, 'Write a wavenumber, or {"cm1": 1700, "strength": "strong"}.')
    strength, shape = (text(entry.get(name), f"{path}.{name}") for name in ("strength", "shape"))
    cm1 = number(entry.get("cm1"), f"{path}.cm1", WAVENUMBER)
    return IrBand(cm1, *strength_and_shape(strength, shape, path))


def _clear(row: Any, path: str) -> IrClear:
    hint = "Write both ends in cm-1: [3200, 3600]."
    ends = [row.get("lo"), row.get("hi")] if isinstance(row, dict) else row
    if not isinstance(ends, list | tuple) or len(ends) != 2:
        raise refusal(path, row, f"{show(row)} is no stretch of the printout.", hint)
    lo, hi = sorted(number(end, f"{path}[{i}]", WAVENUMBER) for i, end in enumerate(ends))
    return IrClear(lo, hi)


def _peak(row: Any, path: str) -> MassPeak:
    if _is_plain(row):
        return MassPeak(number(row, path, MZ))
    entry = record(row, path, 'Write a mass, or {"mz": 133, "rel": 100}.')
    rel = number(entry["rel"], f"{path}.rel", REL) if list(given(entry, "rel")) else None
    return MassPeak(number(entry.get("mz"), f"{path}.mz", MZ), rel)


def _high_res(value: object) -> HighResMass | None:
    if value in (None, {}):
        return None
    entry = record(value, "hrms", 'Write {"adduct": "[M+H]+", "found": 149.0963}.')
    return HighResMass(
        found=number(entry.get("found"), "hrms.found", MZ),
        adduct=text(entry.get("adduct"), "hrms.adduct") or "[M+H]+",
        calc=number(entry["calc"], "hrms.calc", MZ) if list(given(entry, "calc")) else None,
        ppm=number(entry["ppm"], "hrms.ppm", TOLERANCE) if list(given(entry, "ppm")) else 5.0,
    )


def _analysis(value: object) -> Analysis | None:
    if value in (None, {}):
        return None
    entry = record(value, "analysis", 'Write the found per cent: {"C": 81.0, "H": 8.2}.')
    found = record(entry.get("found", entry), "analysis.found", 'Write {"C": 81.0, "H": 8.2}.')
    return Analysis({str(el): number(percent, f"analysis.{el}", PERCENT) for el, percent in found.items()})


def _wet(row: Any, path: str) -> WetResult:
    entry = record(row, path, 'Write {"test": "2,4-dnp", "result": "positive"}.')
    name = text(entry.get("test"), f"{path}.test")
    test = _wet_names().get(" ".join(name.lower().split()))
    if test is None:
        known = ", ".join(row["test"] for row in load_table("wet_tests"))
        raise refusal(f"{path}.test", name, f"There is no bench test {name!r}.", f"Use one of: {known}.")
    answer = entry.get("result")
    result = _RESULTS.get(str(answer).strip().lower())
    if result is None:
        raise refusal(
            f"{path}.result", answer, f"{show(answer)} is no result.", "Write positive or negative."
        )
    return WetResult(test, result)


@cache
def _wet_names() -> dict[str, str]:
    return {
        " ".join(name.lower().split()): row["test"]
        for row in load_table("wet_tests")
        for name in (row["test"], *row["aliases"].split(";"))
    }


def readings_to_json(readings: Readings) -> dict[str, Any]:
    """Readings as the JSON object that ``readings_from_json`` reads back; empty kinds are left out."""
    plain: dict[str, Any] = {
        "id": readings.id,
        "formula": readings.formula,
        "solvent": readings.solvent,
        "mhz": readings.mhz,
        "h1": [_proton_json(signal) for signal in readings.h1],
        "c13": [_carbon_json(line) for line in readings.c13],
        "ir": [_filled(cm1=band.cm1, strength=band.strength, shape=band.shape) for band in readings.ir],
        "ir_clear": [[stretch.lo, stretch.hi] for stretch in readings.ir_clear],
        "ir_medium": readings.ir_medium,
        "ms": [_filled(mz=peak.mz, rel=peak.rel) for peak in readings.ms],
        "analysis": dict(readings.analysis.found) if readings.analysis else None,
        "wet": [{"test": wet.test, "result": wet.result} for wet in readings.wet],
        "raw_integrals": readings.raw_integrals,
        "warnings": list(readings.warnings),
    }
    if readings.hrms:
        mass = readings.hrms
        plain["hrms"] = _filled(adduct=mass.adduct, found=mass.found, calc=mass.calc, ppm=mass.ppm)
    return {key: value for key, value in plain.items() if value}


def _proton_json(signal: ProtonSignal) -> dict[str, Any]:
    shift = {"ppm": signal.lo} if signal.lo == signal.hi else {"lo": signal.lo, "hi": signal.hi}
    return {**shift, **_filled(mult=signal.mult, j=list(signal.j), n=signal.n, note=signal.note)}


def _carbon_json(line: CarbonLine) -> float | dict[str, Any]:
    extra = _filled(kind=line.kind, n=line.n if line.n > 1 else None, j_cf=list(line.j_cf))
    return {"ppm": line.ppm, **extra} if extra else line.ppm


def _filled(**fields: Any) -> dict[str, Any]:
    return {name: value for name, value in fields.items() if value not in (None, "", [])}
