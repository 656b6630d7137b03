"""Look-alikes searched and weighed in slices."""

from __future__ import annotations

import json
from collections import OrderedDict
from typing import Any

from hoodside.hunt import Hunt
from hoodside.methods.arguments import integer, short_text
from hoodside.methods.structures import structure_of
from hoodside.readings.fields import flag, refusal, rows
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals.names import name_of
from hoodside.rivals.stated import step_from_json

USUAL_LIMIT = 40
MOST = 200
#: How long a slice of the work takes, ms: short enough for other calls to come in between.
USUAL_MS = 120
LEAST_MS, MOST_MS = 1, 60_000
_KEPT = 4

#: Hunts under way or done, by their question; the one asked about last at the end.
_hunts: OrderedDict[str, Hunt] = OrderedDict()


def hunt(
    structure: str,
    readings: dict[str, Any] | None = None,
    limit: int = USUAL_LIMIT,
    formula_known: bool = True,
    allowed: bool = True,
    step: dict[str, Any] | None = None,
    slice_ms: int = USUAL_MS,
    besides: list[str] | None = None,
) -> dict[str, Any]:
    """Go on with a hunt for about ``slice_ms`` and say how it stands.

    The question itself names the hunt: asked again, it goes on where the last slice ended, until ``done``; a
    higher ``limit`` takes it further. An engine that no longer holds the hunt begins it anew. None of the
    structures ``besides`` is told.
    """
    wanted = integer(limit, "limit", 1, MOST)
    key = json.dumps([structure, readings, formula_known, allowed, step], sort_keys=True)
    going = _hunts.pop(key, None) or _begin(structure, readings, wanted, formula_known, allowed, step)
    going.widen(wanted)
    going.go_on(integer(slice_ms, "slice_ms", LEAST_MS, MOST_MS) / 1000)
    _hunts[key] = going
    if len(_hunts) > _KEPT:
        _hunts.popitem(last=False)
    known = frozenset(rows(besides, "besides", _name))
    answer = going.answer()
    return {**answer, "rivals": [rival for rival in answer["rivals"] if rival["smiles"] not in known]}


def _name(value: object, field: str) -> str:
    """A structure's name among rivals."""
    return name_of(structure_of(value, field).smiles)


def _begin(
    structure: object, readings: object, limit: int, formula_known: object, allowed: object, step: object
) -> Hunt:
    given = readings if readings is not None else {}
    if not isinstance(given, dict):
        raise refusal("readings", given, "The readings are no JSON object.", "Give them as in a check.")
    return Hunt(
        structure_of(short_text(structure, "structure")),
        readings_from_json(given),
        allowed=flag(allowed, "allowed"),
        limit=limit,
        formula_known=flag(formula_known, "formula_known"),
        step=step_from_json(step),
    )
