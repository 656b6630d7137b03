"""Readings from and to JSON, as the command line and the app pass them."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from difflib import get_close_matches
from typing import Any

from hoodside.readings.fields import flag, given, number, record, rows, text
from hoodside.readings.model import Readings
from hoodside.readings.one_reading import (
    carbon_line,
    combustion,
    high_res_mass,
    ir_band,
    ir_clear,
    mass_peak,
    proton_signal,
    wet_result,
)
from hoodside.readings.solvents import known_solvent
from hoodside.readings.spans import FIELD
from hoodside.readings.to_json import readings_to_json

__all__ = ["readings_from_json", "readings_to_json"]

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
_OF_THE_CHECK = ("candidates", "intended", "rivals", "step", "put_up")
_OTHER_KEYS = (*_OF_THE_CHECK, "warnings", "name", "title", "note", "notes", "source")


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
        h1=rows(entry.get("h1"), "h1", lambda row, path: proton_signal(row, path, raw)),
        c13=rows(entry.get("c13"), "c13", carbon_line),
        ir=rows(entry.get("ir"), "ir", ir_band),
        ir_clear=rows(entry.get("ir_clear"), "ir_clear", ir_clear),
        ir_medium=text(entry.get("ir_medium"), "ir_medium"),
        ms=rows(entry.get("ms"), "ms", mass_peak),
        hrms=high_res_mass(entry.get("hrms")),
        analysis=combustion(entry.get("analysis")),
        wet=rows(entry.get("wet"), "wet", wet_result),
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
