"""Hydrogens known by their kind alone: aldehydes, alkynes, imines, acetals ... (facts/proton_other.csv)."""

from __future__ import annotations

import re
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.model import Term
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.patterns import match_patterns

_NESTED = re.compile(r"\$\([^)]*\)")
_ATOM = re.compile(r"\[[^\]]*\]|Br|Cl|[A-Za-z*]")
#: A tabulated range is taken to hold nine in ten.
_RANGE_SDS = 3.3
_LEAST_SD, _MOST_SD = 0.08, 0.6


def class_estimates(structure: Structure) -> dict[int, Estimate]:
    """Per atom, the estimate of the most specific class it belongs to."""
    rows = _ranked()
    found: dict[int, Estimate] = {}
    for row, places in zip(rows, match_patterns(structure, [_smarts(r) for r in rows]), strict=True):
        for place in places:
            found.setdefault(place[0], _estimate(row))
    return found


@cache
def _ranked() -> tuple[Row, ...]:
    return tuple(sorted(load_table("proton_other"), key=lambda r: rank_of(_smarts(r)), reverse=True))


def _smarts(row: Row) -> str:
    return row["smarts_of_H_bearing_atom"]


def _estimate(row: Row) -> Estimate:
    width = float(row["hi_ppm"]) - float(row["lo_ppm"])
    sd = min(max(width / _RANGE_SDS, _LEAST_SD), _MOST_SD)
    return Estimate(
        "class", row["class"], (Term(row["class"], float(row["typical_ppm"]), row["source"]),), sd
    )


def rank_of(smarts: str) -> tuple[int, int]:
    """How specific a pattern is: atoms it names, then its length."""
    return len(_ATOM.findall(_NESTED.sub("", smarts))), len(smarts)
