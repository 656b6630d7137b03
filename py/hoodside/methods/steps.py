"""Reaction steps: what a step may have given, and the reagents the tables know."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from hoodside.facts import load_table
from hoodside.methods.arguments import short_text
from hoodside.methods.structures import structure_of
from hoodside.predict.formula import formula_of
from hoodside.rivals.outcomes import Outcome, find_outcomes


def outcomes(
    structure: str, reagents: str = "", partner: str | None = None, kind: str = ""
) -> dict[str, Any]:
    """Products, by-products, over-reaction and the start, likeliest first, with cautions."""
    start = structure_of(structure)
    other = structure_of(partner, "partner") if partner else None
    found = find_outcomes(start, _words(reagents, "with"), other, _words(kind, "kind"))
    return {
        "outcomes": [_outcome(outcome) for outcome in found.outcomes],
        "understood": list(found.understood),
        "unknown": list(found.unknown),
        "cautions": _cautions(found.outcomes),
    }


def reagents(query: str = "") -> dict[str, Any]:
    """Reagents by the trade's names and abbreviations that hold the query, with the first name to show."""
    wanted = _words(query, "query").lower()
    found = [row for row in load_table("reagents") if wanted in row["names"].lower()]
    return {"reagents": [{"name": r["names"].split("; ")[0], "names": r["names"].split("; ")} for r in found]}


def _words(value: str, field: str) -> str:
    return short_text(value, field) if value else ""


def _outcome(outcome: Outcome) -> dict[str, Any]:
    structure = structure_of(outcome.smiles)
    return {**asdict(outcome), "cautions": list(outcome.cautions), "formula": formula_of(structure).text}


def _cautions(found: tuple[Outcome, ...]) -> list[dict[str, str]]:
    names = dict.fromkeys(name for outcome in found for name in outcome.cautions)
    rows = {row["reagent"]: row for row in load_table("reagent_cautions")}
    keys = ("reagent", "hazards", "incompatibilities", "quench", "source")
    return [{key: rows[name][key] for key in keys} for name in names if name in rows]
