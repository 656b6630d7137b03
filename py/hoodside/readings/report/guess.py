"""Tells what a list without a heading is, from its numbers and what stands beside them."""

from __future__ import annotations

import re

from hoodside.readings.report.sections import ANALYSIS, CARBON, HIGH_RES, INFRARED, MASS, PROTON

_SHOWN = 4_000
_NUMBER = re.compile(r"(?<![\w.])-?\d{1,4}(?:\.\d+)?(?![\w.]*[\w])")
_HYDROGENS = re.compile(
    r"\d\s?H(?![a-z0-9])|[(,]\s?(?:br\.?\s|app\.?\s)?(?:[sdtqm]{1,4}|quint|sext|sept)\s?[,)]|\bJ\s?[=\d]"
)
_WAVES = re.compile(r"cm\s{0,5}\^?-\s?1")
_ION = re.compile(r"\(?\[?M(?:\+H|\+Na)?\]?\+|base peak", re.IGNORECASE)
_HIGHEST_PROTON = 16.0
_HIGHEST_CARBON = 260.0


def guess_kind(plain: str, start: int, end: int) -> str:
    """The likeliest kind of a list, "" when it looks like none."""
    shown = plain[start : min(end, start + _SHOWN)]
    if re.search(r"found", shown, re.IGNORECASE) and re.search(r"\d{2,4}\.\d{4}", shown):
        return HIGH_RES
    if re.search(r"\bC,?\s\d{2}\.\d", shown) and re.search(r"\bH,?\s\d{1,2}\.\d", shown):
        return ANALYSIS
    if _WAVES.search(shown):
        return INFRARED
    if _ION.search(shown):
        return MASS
    numbers = [float(found[0]) for found in _NUMBER.finditer(shown.replace(",", ", "))]
    letters = sum(c.isalpha() for c in shown)
    if not numbers:
        return ""
    if _HYDROGENS.search(shown):
        return PROTON if sorted(numbers)[len(numbers) // 2] <= _HIGHEST_PROTON else CARBON
    if len(numbers) < 2 or letters > 3 * len(numbers):
        return ""
    return _by_size(numbers, "." in shown or bool(re.search(r"\d,\d", shown)))


def _by_size(numbers: list[float], decimals: bool) -> str:
    if max(numbers) <= _HIGHEST_PROTON:
        return PROTON if decimals else ""
    if max(numbers) <= _HIGHEST_CARBON and decimals:
        return CARBON
    return INFRARED if min(numbers) >= 400 and max(numbers) <= 4000 else ""
