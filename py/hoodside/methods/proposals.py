"""What readings suggest by themselves."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from hoodside.advise.proposals import Fragment, propose
from hoodside.methods.arguments import integer
from hoodside.readings.fields import refusal
from hoodside.readings.from_json import readings_from_json

USUAL_LIMIT = 12
MOST = 100


def proposals(readings: dict[str, Any] | None = None, limit: int = USUAL_LIMIT) -> dict[str, Any]:
    """Fragments that the readings force, and structures put together from them, weightiest first."""
    if not isinstance(readings, dict):
        raise refusal("readings", readings, "The readings are no JSON object.", "Give them as in a check.")
    found = propose(readings_from_json(readings), integer(limit, "limit", 1, MOST))
    return {
        "fragments": [_fragment(fragment) for fragment in found.fragments],
        "structures": [asdict(structure) for structure in found.structures],
        "complete": found.complete,
        "note": found.note,
    }


def _fragment(fragment: Fragment) -> dict[str, Any]:
    return {
        "fragment": fragment.sign.fragment,
        "times": fragment.times,
        "weight_db": fragment.weight_db,
        "reason": fragment.reason,
        "readings": list(fragment.readings),
        "source": fragment.sign.source,
    }
