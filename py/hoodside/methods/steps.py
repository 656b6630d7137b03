"""Reaction steps: what a step may have given, and the reagents the tables know."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import asdict
from functools import cache
from typing import Any

from hoodside.advise.reagent_cautions import cautions_for, without_caution
from hoodside.facts import load_table
from hoodside.methods.arguments import short_text
from hoodside.methods.structures import structure_of
from hoodside.predict.formula import formula_of
from hoodside.reagent_names import headed_names
from hoodside.rivals.outcomes import Outcome, find_outcomes


def outcomes(
    structure: str, reagents: str = "", partner: str | None = None, kind: str = ""
) -> dict[str, Any]:
    """Products, by-products, over-reaction and the start, likeliest first, with cautions."""
    start = structure_of(structure)
    other = structure_of(partner, "partner") if partner else None
    text = _words(reagents, "with")
    found = find_outcomes(start, text, other, _words(kind, "kind"))
    understood = _as_written(found.understood, text)
    of_step = (name for outcome in found.outcomes if outcome.role == "product" for name in outcome.cautions)
    return {
        "outcomes": [_outcome(outcome) for outcome in found.outcomes],
        "understood": understood,
        "unknown": list(found.unknown),
        "no_step": found.no_step,
        "cautions": [asdict(caution) for caution in cautions_for(understood, of_step)],
        "no_caution": list(without_caution(understood)),
    }


def reagents(query: str = "") -> dict[str, Any]:
    """Reagents by the trade's names and abbreviations that hold the query, and conditions met most often."""
    wanted = _words(query, "query").lower()
    rows = [(row["names"].split("; "), row["roles"]) for row in load_table("reagents")]
    rows += [([made.name], " ".join(sorted(made.roles))) for made in headed_names()]
    found = [(names, roles) for names, roles in rows if any(wanted in name.lower() for name in names)]
    usual = [row for row in load_table("usual_conditions") if wanted in row["label"].lower()]
    return {
        "reagents": [{"name": names[0], "names": names, "shelf": _shelf(roles)} for names, roles in found],
        "usual": [{key: row[key] for key in ("label", "reagents", "partner")} for row in usual],
    }


def _as_written(names: Iterable[str], text: str) -> list[str]:
    """Names in the order in which the text holds them."""
    plain = text.lower()
    return sorted(dict.fromkeys(names), key=lambda name: plain.find(name.lower()))


@cache
def _shelf(roles: str) -> str:
    """Where on the shelf a reagent stands, by the first of its roles that a shelf holds."""
    shelves = {role: row["shelf"] for row in load_table("reagent_shelves") for role in row["roles"].split()}
    return next((shelves[role] for role in roles.split() if role in shelves), "")


def _words(value: str, field: str) -> str:
    return short_text(value, field) if value else ""


def _outcome(outcome: Outcome) -> dict[str, Any]:
    structure = structure_of(outcome.smiles)
    return {**asdict(outcome), "cautions": list(outcome.cautions), "formula": formula_of(structure).text}
