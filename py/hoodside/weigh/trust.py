"""How far each kind of evidence is believed: readings of one kind share errors, so their weights are scaled.

A factor of 1 would hold if every reading of the kind were independent of the others given the structure, and
its error model exact. The factors of facts/evidence_trust.csv are those that make the truths of the published
cases likeliest among their rivals (tests/bench/fit_trust.py), so that shares come out honest.
"""

from __future__ import annotations

from functools import cache

from hoodside.facts import load_table


def trust(kind: str) -> float:
    """The factor for one kind of finding ("h1.shift")."""
    return _factors()[kind]


@cache
def _factors() -> dict[str, float]:
    return {row["kind"]: float(row["factor"]) for row in load_table("evidence_trust")}
