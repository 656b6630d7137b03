"""Readings to JSON, as ``from_json`` reads them back."""

from __future__ import annotations

from typing import Any

from hoodside.readings.model import CarbonLine, ProtonSignal, Readings


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
