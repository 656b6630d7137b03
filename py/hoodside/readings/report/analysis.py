"""Reads combustion analyses: "Anal. Calcd for C10H12O: C, 81.04; H, 8.16. Found: C, 81.0; H, 8.2"."""

from __future__ import annotations

import re

from hoodside.readings.model import Analysis
from hoodside.readings.report.composition import FORMULA, counts_of, hill
from hoodside.readings.report.model import Gathered

_FOUND = re.compile(r"found|obsd?\b|exp(?:erimenta)?l?\b", re.IGNORECASE)
_CALCULATED = re.compile(r"calc(?:ulate)?d?\b|theor|requires?|\breq\b", re.IGNORECASE)
_PERCENT = re.compile(
    r"(?<![A-Za-z])(?P<element>C|H|N|S|O|Cl|Br|I|F|P|Si|B)(?:\s?[,:=]\s{0,3}|\s{1,3})(?P<percent>\d{1,2}(?:[.,]\d{1,3})?)(?![\d.]*\d)\s?%?"
)
#: No line is longer; what follows is something else.
_LONGEST = 600


def read_analysis(plain: str, start: int, end: int, into: Gathered) -> None:
    """Read found percentages, and the formula that the calculated ones are for."""
    stop = min(end, start + _LONGEST)
    values = list(_PERCENT.finditer(plain, start, stop))
    found: dict[str, float] = {}
    for value in values:
        if _last(_FOUND, plain, start, value.start()) > _last(_CALCULATED, plain, start, value.start()):
            found.setdefault(value["element"], float(value["percent"].replace(",", ".")))
    formula = _formula(plain, start, stop)
    into.formula = formula or into.formula
    if not found:
        into.missed(start, stop, "It gives no found percentages.")
        return
    into.analysis = Analysis(found)
    percents = ", ".join(f"{element} {percent:g} %" for element, percent in found.items())
    into.took(
        start, values[-1].end(), f"combustion: found {percents}" + (f" for {formula}" if formula else "")
    )


def _last(word: re.Pattern[str], plain: str, start: int, end: int) -> int:
    return max((m.start() for m in word.finditer(plain, start, end)), default=-1)


def _formula(plain: str, start: int, end: int) -> str:
    for match in FORMULA.finditer(plain, start, end):
        counts = counts_of(match["formula"])
        if "H" in counts and re.search(r"\d", match["formula"]) and not match["charge"]:
            return hill(counts)
    return ""
