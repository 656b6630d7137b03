"""Cases as the app saves them, turned into check objects.

The app keeps what was typed, as text, one row per reading. Rows still empty are left out, as the app does.
"""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable
from typing import Any

KIND = "hoodside-case"

_NUMBER = r"[-−]?\d*[.,]?\d+"
_RANGE = re.compile(rf"\s*({_NUMBER})\s*(?:[-–−]|to)\s*({_NUMBER})\s*")
#: "8.2, 1.4" or "8.2 1.4"; a comma inside a number is its decimal point.
_LIST = re.compile(r",\s+|\s+|,(?=\d+\.)")

Row = dict[str, Any]


def check_object(case: Any) -> Any:
    """A check object: of a case saved by the app, or what was given when it is none.

    What cannot be read as a number stays as it was typed, so that the check names it.
    """
    if not isinstance(case, dict) or case.get("kind") != KIND:
        return case
    structures = [s for s in _rows(case, "structures") if _typed(s, "smiles") or _typed(s, "source")]
    found: Row = {
        "id": _typed(case, "title"),
        "formula": _typed(case, "formula"),
        "solvent": _typed(case, "solvent"),
        "mhz": _number(_typed(case, "mhz")),
        "raw_integrals": bool(case.get("raw")),
        "ir_medium": _typed(case, "irMedium"),
        "h1": _each(_rows(case, "h1"), "shift", _proton),
        "c13": _each(
            _rows(case, "c13"), "ppm", lambda r: _picked(r, {"ppm": _number, "kind": str, "n": _whole})
        ),
        "ir": _each(
            _rows(case, "ir"), "cm1", lambda r: _picked(r, {"cm1": _number, "strength": str, "shape": str})
        ),
        "ms": _each(_rows(case, "ms"), "mz", lambda r: _picked(r, {"mz": _number, "rel": _number})),
        "ir_clear": [[row.get("lo"), row.get("hi")] for row in _rows(case, "irClear")],
        "wet": [_picked(row, {"test": str, "result": str}) for row in _rows(case, "wet")],
        "hrms": _accurate(case.get("hrms")),
        "analysis": _picked(case.get("analysis") or {}, dict.fromkeys(case.get("analysis") or {}, _number)),
        "candidates": [_typed(s, "smiles") or _typed(s, "source") for s in structures],
        "step": _step(case.get("run")),
        "intended": next((i for i, s in enumerate(structures) if s.get("id") == case.get("intended")), None),
    }
    return {
        key: value for key, value in found.items() if value is not False and value not in ("", None, [], {})
    }


def _rows(case: Row, key: str) -> list[Row]:
    rows = case.get(key)
    return [row for row in rows if isinstance(row, dict)] if isinstance(rows, list) else []


def _each(rows: Iterable[Row], needed: str, turn: Callable[[Row], Row]) -> list[Row]:
    return [turn(row) for row in rows if _typed(row, needed)]


def _picked(row: Row, keys: dict[str, Callable[[str], Any]]) -> Row:
    return {key: turn(text) for key, turn in keys.items() if (text := _typed(row, key))}


def _typed(row: Row, key: str) -> str:
    value = row.get(key)
    return "" if value is None else str(value).strip()


def _proton(row: Row) -> Row:
    shift = _typed(row, "shift")
    ends = _RANGE.fullmatch(shift)
    place = sorted((_number(ends[1]), _number(ends[2]))) if ends else []
    found: Row = {"lo": place[0], "hi": place[1]} if place else {"ppm": _number(shift)}
    typed = _typed(row, "j")
    j = [
        _number(part.strip())
        for part in (typed.split(";") if ";" in typed else _LIST.split(typed))
        if part.strip()
    ]
    counted = _picked(row, {"mult": str, "h": _number})
    if "h" in counted:
        counted["n"] = counted.pop("h")
    return {**found, **counted, **({"j": j} if j else {})}


def _accurate(hrms: Any) -> Row:
    if not isinstance(hrms, dict) or not _typed(hrms, "found"):
        return {}
    return _picked(hrms, {"found": _number, "adduct": str, "ppm": _number})


def _step(run: Any) -> Row:
    """What was run: the start, reagents in turn ("1) O3 2) Me2S"), the partner."""
    if not isinstance(run, dict) or not isinstance(run.get("start"), dict):
        return {}
    turns = [", ".join(map(str, turn)) for turn in run.get("steps") or [] if isinstance(turn, list) and turn]
    reagents = turns[0] if len(turns) == 1 else " ".join(f"{i + 1}) {turn}" for i, turn in enumerate(turns))
    partner = run["partner"] if isinstance(run.get("partner"), dict) else {}
    found = {
        "start": _typed(run["start"], "smiles"),
        "reagents": reagents,
        "partner": _typed(partner, "smiles"),
    }
    return {key: value for key, value in found.items() if value} if found["start"] else {}


def _number(text: str) -> Any:
    plain = text.replace("−", "-").replace(",", ".")
    try:
        return float(plain) if text else None
    except ValueError:
        return text


def _whole(text: str) -> Any:
    number = _number(text)
    return int(number) if isinstance(number, float) and number.is_integer() else number
