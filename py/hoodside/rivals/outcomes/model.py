"""Outcomes as data."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

Role = Literal["product", "by-product", "over-reaction", "no reaction"]


@dataclass(frozen=True, slots=True)
class Outcome:
    """One compound a step may have given."""

    smiles: str
    role: Role
    rule: str  # id of the row in facts/reactions.csv; "" for the starting material
    name: str  # what happened, in the trade's words
    note: str  # selectivity, conditions
    stereo: str  # "racemic", "meso", "one diastereomer, racemic", "single enantiomer" or ""
    cautions: tuple[str, ...]  # names of reagents in facts/reagent_cautions.csv
    source: str


@dataclass(frozen=True, slots=True)
class Outcomes:
    """All outcomes of one step, likeliest first, and what was understood of the reagents."""

    outcomes: tuple[Outcome, ...]
    understood: tuple[str, ...]  # reagent names recognised in the text
    unknown: tuple[str, ...]  # pieces of the text that no table row knows
    no_step: str = ""  # why no product is among the outcomes, and what the table knows of the reagents
