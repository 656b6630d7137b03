"""How often a predicted band is printed, how far from its predicted place, and where bands lie anyway."""

from __future__ import annotations

import math
from functools import cache

from hoodside.facts.table import load_table

_DEFAULT_PRINTED = 0.3
#: Reports with no more bands than this print a selection.
SHORT_LIST = 5
#: How often a band of that strength is found by somebody who looks for it in a good spectrum
#: (common practice: an expected strong band is all but always there, a weak one often is not).
_LOOKED = {"strong": 0.97, "medium": 0.85, "variable": 0.7, "weak": 0.5}


def mode_class(mode: str) -> str:
    """The coarse class that reliabilities are kept for."""
    for key, name in _classes():
        if key in mode:
            return name
    return "other"


def band_reliability(mode: str, strength: str, printed: int | None = None) -> float:
    """Probability that a predicted band appears in a published band list.

    Args:
        mode: as in ``IrExpectation.mode``.
        printed: number of bands in the list, when known: short lists are selections.
    Source: counted over the published compounds (facts/ir_reliability.csv).
    """
    length = "any" if printed is None else "short" if printed <= SHORT_LIST else "long"
    table = _reliabilities()
    for key in (
        (mode_class(mode), strength, length),
        (mode_class(mode), "any", length),
        ("other", "any", length),
    ):
        if key in table:
            return table[key][0]
    return _DEFAULT_PRINTED


def seen_when_looked(strength: str, absence_counts: bool = True) -> float:
    """Probability that a band is found when its region is inspected; for regions marked clear."""
    base = _LOOKED.get(strength.removeprefix("very ").strip(), 0.7)
    return base if absence_counts else min(base, 0.8)


def band_spread(mode: str, lo: float, hi: float) -> float:
    """Standard deviation in cm-1 of printed about predicted position for a band with published range.

    A quarter of the published range, combined with the scatter counted for its class.
    """
    quarter = max((hi - lo) / 4, 3.0)
    row = _reliabilities().get((mode_class(mode), "any", "any"))
    counted = row[1] if row else quarter
    return math.sqrt(quarter * counted)


def background_density(cm1: float) -> float:
    """Probability density per cm-1 of a printed band at ``cm1`` whatever the structure.

    Integrates to 1 over 400 to 4000 cm-1. Source: counted over published lists (facts/ir_background.csv).
    """
    bins = _background()
    width = bins[0][1] - bins[0][0]
    for lo, hi, share in bins:
        if lo <= cm1 < hi:
            return share / width
    return min(share for *_, share in bins) / width


@cache
def _classes() -> tuple[tuple[str, str], ...]:
    """Mode keywords in the order they are tried."""
    return (
        ("out-of-plane", "out-of-plane"),
        ("C=O", "C=O stretch"),
        ("O-H stretch", "O-H stretch"),
        ("N-H stretch", "N-H stretch"),
        ("C-H stretch", "C-H stretch"),
        ("#", "triple bond"),
        ("N3", "triple bond"),
        ("N=C", "triple bond"),
        ("C=C=", "triple bond"),
        ("ring C=C", "ring stretch"),
        ("C=C", "C=C stretch"),
        ("C=N", "C=C stretch"),
        ("NO2", "NO2 or SO2 stretch"),
        ("SO2", "NO2 or SO2 stretch"),
        ("S=O", "NO2 or SO2 stretch"),
        ("P=O", "NO2 or SO2 stretch"),
        ("C-O", "C-O stretch"),
        ("O-C", "C-O stretch"),
        ("N-H bend", "N-H bend"),
        ("C-N", "C-N stretch"),
        ("C-F", "C-F stretch"),
        ("Si", "Si or B stretch"),
        ("B-O", "Si or B stretch"),
        ("bend", "bend"),
        ("scissor", "bend"),
        ("wag", "out-of-plane"),
    )


@cache
def _reliabilities() -> dict[tuple[str, str, str], tuple[float, float]]:
    """(class, strength, length of list) -> (share printed, sd in cm-1)."""
    return {
        (row["mode_class"], row["strength"], row["list_length"]): (float(row["p"]), float(row["sd_cm1"]))
        for row in load_table("ir_reliability")
    }


@cache
def _background() -> tuple[tuple[float, float, float], ...]:
    return tuple(
        (float(row["lo_cm1"]), float(row["hi_cm1"]), float(row["share"]))
        for row in load_table("ir_background")
    )
