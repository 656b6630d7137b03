"""Carbons that a class tells best: carbonyls, nitriles, alkynes, imines, cumulated bonds."""

from __future__ import annotations

from functools import cache

from hoodside.facts import load_table
from hoodside.molecule import Structure
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.carbon.substituents import Pattern, patterns_of
from hoodside.predict.model import Term


def class_estimates(structure: Structure) -> dict[int, Estimate]:
    """The most specific tabulated class of every carbon that has one, by atom."""
    found: dict[int, Estimate] = {}
    matches = structure.match_all([p.smarts for p in _patterns()], unique=False)
    for pattern, places in zip(_patterns(), matches, strict=True):
        for place in places:
            found.setdefault(place[0], _estimate(pattern))
    return found


def _estimate(pattern: Pattern) -> Estimate:
    row = pattern.row
    return Estimate(row["class"].split(",")[0], (Term(row["class"], float(row["typical"]), row["source"]),))


@cache
def _patterns() -> tuple[Pattern, ...]:
    rows = [row for row in load_table("carbon_carbonyl") if "(single value)" not in row["class"]]
    return patterns_of(rows)
