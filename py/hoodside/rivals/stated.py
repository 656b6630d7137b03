"""Rivals from the step that was run: its start and whatever else it may have given."""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache
from typing import Any

from hoodside.errors import StructureError
from hoodside.molecule.structure import Structure, read_structure
from hoodside.readings.fields import record, refusal, text
from hoodside.rivals.model import Rival
from hoodside.rivals.outcomes import Outcome, find_outcomes

#: Companions of fewer atoms than this (water, methanol, carbon dioxide) do not stay with the sample.
_SMALLEST = 4
#: So many outcomes beside the start, likeliest first.
_MOST = 8
_LONGEST = 200_000
_UNCHANGED = "no reaction"
#: What an outcome is called in a sentence, by its role.
_CALLED = {"product": "product", "by-product": "by-product", "over-reaction": "over-reacted product"}
_KEPT = 32


@dataclass(frozen=True, slots=True)
class StatedStep:
    """What was run: SMILES or CTfile of the start, reagents as written, the organic partner or ""."""

    start: str
    reagents: str
    partner: str


def step_from_json(value: Any, field: str = "step") -> StatedStep | None:
    """``{"start", "reagents", "partner"}``, the last two optional; None when no step was stated.

    Raises: InvalidInputError, StructureError naming the field.
    """
    if value is None:
        return None
    entry = record(value, field, 'Give {"start": SMILES, "reagents": "NaBH4"}.')
    strange = sorted(set(entry) - {"start", "reagents", "partner"})
    if strange:
        raise refusal(
            f"{field}.{strange[0]}", None, f"A step has no {strange[0]}.", "Use start, reagents, partner."
        )
    step = StatedStep(
        _compound(entry.get("start"), f"{field}.start"),
        text(entry.get("reagents"), f"{field}.reagents", 2_000),
        _compound(entry.get("partner"), f"{field}.partner"),
    )
    if not step.start:
        raise refusal(f"{field}.start", None, "The step has no start.", "Give its SMILES.")
    return step


def _compound(value: object, field: str) -> str:
    source = text(value, field, _LONGEST)
    if source:
        source = value if isinstance(value, str) and "\n" in source else source
        _read(source, field)
    return source


def _read(source: str, field: str) -> Structure:
    try:
        return read_structure(source)
    except StructureError as err:
        raise StructureError(str(err), hint=err.hint, field=field, value=source) from err


@lru_cache(maxsize=_KEPT)
def stated_rivals(step: StatedStep) -> tuple[tuple[str, Rival], ...]:
    """What the step may have left in the flask, each with what to call it: the start, then the outcomes.

    Source: the rows of facts/reactions.csv, named in ``how``.
    """
    start = _read(step.start, "step.start")
    partner = _read(step.partner, "step.partner") if step.partner else None
    found = find_outcomes(start, step.reagents, partner).outcomes if step.reagents else ()
    others = [o for o in found if o.role != _UNCHANGED and len(read_structure(o.smiles).atoms) >= _SMALLEST]
    unchanged = Rival(start.smiles, ("the start of the step, unchanged",), 0, 1.0)
    return (("the start", unchanged), *_named(others[:_MOST]))


def _named(outcomes: list[Outcome]) -> list[tuple[str, Rival]]:
    found = []
    for at, outcome in enumerate(outcomes):
        alike = [other for other in outcomes if other.role == outcome.role]
        number = sum(other.role == outcome.role for other in outcomes[: at + 1])
        called = _CALLED[outcome.role]
        name = f"{called} {number}" if len(alike) > 1 else f"the {called}"
        how = f"{called} of the step: {outcome.name}"
        found.append((name, Rival(outcome.smiles, (how,), 0, 1.0)))
    return found
