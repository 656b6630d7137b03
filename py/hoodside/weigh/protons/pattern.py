"""What chemists print for a predicted pattern, from counts over published spectra.

The rows of facts/multiplicity_confusion.csv are kinds of predicted pattern, its columns kinds of printed
pattern; a row "anyhow" counts all signals. Scarce rows lean on what is usual.
"""

from __future__ import annotations

from collections.abc import Sequence
from functools import cache

from hoodside.facts import load_table
from hoodside.predict.model import ProtonGroup
from hoodside.readings.patterns import bare
from hoodside.weigh.decibans import decibans

#: Signals' worth of what is usual mixed into each row.
_SMOOTHING = 4.0
#: Beforehand a first-order pattern is taken to be printed under its own name, or as "m", this often
#: (common practice); counts soon outweigh it.
_BY_NAME, _AS_M = 0.5, 0.3
_OWN = ("s", "d", "t", "q", "quint", "sext", "sept", "dd", "dt", "td", "ddd", "m")
#: A CH2 whose two H share a signal shows its couplings to others, not the one within, which is larger (Hz).
_WITHIN_CH2 = 9.5


def printed_kind(pattern: str) -> str:
    """The column of a printed pattern: its canonical name where common, "br", or "other"."""
    if pattern.startswith("br"):
        return "br"
    core = bare(pattern)
    return core if core in _OWN else "other"


def expected_kind(groups: Sequence[ProtonGroup]) -> str:
    """The row for the groups that share one signal."""
    if len(groups) == 1:
        return _kind_of(groups[0])
    if all(g.exchangeable for g in groups):
        return "exchangeable"
    if is_pair(groups):
        outer = [j for j in groups[0].j if j < _WITHIN_CH2]
        return f"pair {min(len(outer), 3)}"
    return "several"


def is_pair(groups: Sequence[ProtonGroup]) -> bool:
    """Whether these are the two H of one CH2 (or of CH2 groups that symmetry makes alike)."""
    return len(groups) == 2 and groups[0].atoms == groups[1].atoms


def _kind_of(group: ProtonGroup) -> str:
    if group.exchangeable:
        return "exchangeable"
    kind = printed_kind(group.mult) if group.mult else "m"
    return f"{kind} of CH3" if group.n % 3 == 0 and kind in ("s", "d", "t") else kind


def pattern_weight(groups: Sequence[ProtonGroup], printed: str) -> float:
    """Weight in decibans of a printed pattern for the groups given its signal; 0 when none was printed."""
    if not printed:
        return 0.0
    return kind_weight(expected_kind(groups), printed_kind(printed))


@cache
def kind_weight(expected: str, printed: str) -> float:
    """Weight of one cell of the table."""
    anyhow = _share("anyhow", printed)
    return decibans(_smoothed(expected, printed, anyhow) / anyhow)


def _smoothed(expected: str, printed: str, anyhow: float) -> float:
    row = _counts().get(expected, {})
    total = sum(row.values())
    return (row.get(printed, 0.0) + _SMOOTHING * _usual(expected, printed, anyhow)) / (total + _SMOOTHING)


def _usual(expected: str, printed: str, anyhow: float) -> float:
    own = expected.removesuffix(" of CH3")
    if own not in _OWN or own == "m":
        return anyhow
    named = _BY_NAME * (printed == own) + _AS_M * (printed == "m")
    return named + (1 - _BY_NAME - _AS_M) * anyhow


def _share(expected: str, printed: str) -> float:
    row = _counts()[expected]
    return (row.get(printed, 0.0) + 0.5) / (sum(row.values()) + 0.5 * (len(_OWN) + 2))


@cache
def _counts() -> dict[str, dict[str, float]]:
    counts: dict[str, dict[str, float]] = {}
    for row in load_table("multiplicity_confusion"):
        counts.setdefault(row["expected"], {})[row["printed"]] = float(row["count"])
    return counts
