"""Single readings from JSON, kind by kind. All raise InvalidInputError naming the field at ``path``."""

from __future__ import annotations

from functools import cache
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.facts import load_table
from hoodside.readings.fields import Span, given, number, record, refusal, rows, show, text
from hoodside.readings.infrared_words import strength_and_shape
from hoodside.readings.model import (
    Analysis,
    CarbonLine,
    HighResMass,
    IrBand,
    IrClear,
    MassPeak,
    ProtonSignal,
    WetResult,
)
from hoodside.readings.patterns import normalise_pattern
from hoodside.readings.spans import (
    CARBON_SHIFT,
    CARBONS,
    CF_COUPLING,
    COUPLING,
    INTEGRAL,
    MZ,
    PERCENT,
    PROTON_SHIFT,
    RAW_INTEGRAL,
    REL,
    TOLERANCE,
    WAVENUMBER,
)
from hoodside.readings.spin_systems import names_spin_system

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


def proton_signal(row: Any, path: str, raw: bool) -> ProtonSignal:
    """One entry of ``h1``; ``raw``: its ``n`` is a raw integral."""
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


def carbon_line(row: Any, path: str) -> CarbonLine:
    """One entry of ``c13``."""
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


def ir_band(row: Any, path: str) -> IrBand:
    """One entry of ``ir``."""
    if _is_plain(row):
        return IrBand(number(row, path, WAVENUMBER))
    entry = record(row, path, 'Write a wavenumber, or {"cm1": 1700, "strength": "strong"}.')
    strength, shape = (text(entry.get(name), f"{path}.{name}") for name in ("strength", "shape"))
    cm1 = number(entry.get("cm1"), f"{path}.cm1", WAVENUMBER)
    return IrBand(cm1, *strength_and_shape(strength, shape, path))


def ir_clear(row: Any, path: str) -> IrClear:
    """One entry of ``ir_clear``."""
    hint = "Write both ends in cm-1: [3200, 3600]."
    ends = [row.get("lo"), row.get("hi")] if isinstance(row, dict) else row
    if not isinstance(ends, list | tuple) or len(ends) != 2:
        raise refusal(path, row, f"{show(row)} is no stretch of the printout.", hint)
    lo, hi = sorted(number(end, f"{path}[{i}]", WAVENUMBER) for i, end in enumerate(ends))
    return IrClear(lo, hi)


def mass_peak(row: Any, path: str) -> MassPeak:
    """One entry of ``ms``."""
    if _is_plain(row):
        return MassPeak(number(row, path, MZ))
    entry = record(row, path, 'Write a mass, or {"mz": 133, "rel": 100}.')
    rel = number(entry["rel"], f"{path}.rel", REL) if list(given(entry, "rel")) else None
    return MassPeak(number(entry.get("mz"), f"{path}.mz", MZ), rel)


def high_res_mass(value: object) -> HighResMass | None:
    """The object under ``hrms``."""
    if value in (None, {}):
        return None
    entry = record(value, "hrms", 'Write {"adduct": "[M+H]+", "found": 149.0963}.')
    return HighResMass(
        found=number(entry.get("found"), "hrms.found", MZ),
        adduct=text(entry.get("adduct"), "hrms.adduct") or "[M+H]+",
        calc=number(entry["calc"], "hrms.calc", MZ) if list(given(entry, "calc")) else None,
        ppm=number(entry["ppm"], "hrms.ppm", TOLERANCE) if list(given(entry, "ppm")) else 5.0,
    )


def combustion(value: object) -> Analysis | None:
    """The object under ``analysis``."""
    if value in (None, {}):
        return None
    entry = record(value, "analysis", 'Write the found per cent: {"C": 81.0, "H": 8.2}.')
    found = record(entry.get("found", entry), "analysis.found", 'Write {"C": 81.0, "H": 8.2}.')
    return Analysis({str(el): number(percent, f"analysis.{el}", PERCENT) for el, percent in found.items()})


def wet_result(row: Any, path: str) -> WetResult:
    """One entry of ``wet``."""
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
