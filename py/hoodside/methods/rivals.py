"""Look-alikes of a structure."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from hoodside.methods.arguments import integer, short_text
from hoodside.methods.structures import structure_of
from hoodside.predict.formula import formula_of
from hoodside.readings.fields import flag, refusal
from hoodside.readings.from_json import readings_from_json
from hoodside.readings.model import Readings
from hoodside.rivals import Rival, find_rivals
from hoodside.rivals.stated import stated_rivals, step_from_json

USUAL_LIMIT = 50
MOST = 1_000


def rivals(
    structure: str = "",
    smiles: str = "",
    readings: dict[str, Any] | None = None,
    limit: int = USUAL_LIMIT,
    formula_known: bool = True,
    step: dict[str, Any] | None = None,
) -> dict[str, Any]:
    """Structures that might fit as well, most plausible first, each with how it was reached.

    Those that a stated step may have left come first and beside ``limit``.
    """
    given = structure_of(short_text(structure or smiles or None, "structure"))
    ran = step_from_json(step)
    stated = [rival for _, rival in stated_rivals(ran)] if ran else []
    found = find_rivals(
        given,
        formula_known=flag(formula_known, "formula_known"),
        readings=_readings(readings),
        limit=integer(limit, "limit", 1, MOST),
        stated=stated,
    )
    return {
        "rivals": [_rival(rival) for rival in found.rivals],
        "complete": found.complete,
        "note": found.note,
    }


def _readings(value: object) -> Readings | None:
    if value is None:
        return None
    if not isinstance(value, dict):
        raise refusal("readings", value, "The readings are no JSON object.", "Give them as in a check.")
    return readings_from_json(value)


def _rival(rival: Rival) -> dict[str, Any]:
    formula = formula_of(structure_of(rival.smiles)).text
    return {**asdict(rival), "how": list(rival.how), "formula": formula}
