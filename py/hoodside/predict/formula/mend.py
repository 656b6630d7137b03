"""Guesses what a mistyped formula was meant to be, for the hint of the error."""

from __future__ import annotations

import re
from functools import lru_cache

from hoodside.predict.formula.symbols import COMMON, NAMED_NUCLIDES, known_elements

#: Group abbreviations chemists slip into formulas, spelled out (ACS style guide's list of symbols).
GROUPS = {
    "Me": "CH3",
    "Et": "C2H5",
    "iPr": "C3H7",
    "tBu": "C4H9",
    "Bu": "C4H9",
    "Ph": "C6H5",
    "Bn": "C7H7",
    "Bz": "C7H5O",
    "Ts": "C7H7SO2",
    "Ms": "CH3SO2",
    "Tf": "CF3SO2",
    "Boc": "C5H9O2",
}
_LETTERS = re.compile(r"[A-Za-z]+")
_ZERO = re.compile(r"(?<![1-9])0(?=\d|$)|(?<=[A-Za-z])0(?=[A-Z]|$)")
_RARE_COST = 3


def suggestion(text: str) -> str:
    """The most likely formula behind ``text``, or "" when nothing plain suggests itself."""
    spelled = text
    for short, full in GROUPS.items():
        spelled = re.sub(rf"(?<![a-z]){short}(?![a-z])", full, spelled)
    if spelled != text:
        return spelled
    lettered = _ZERO.sub("O", text)
    mended = _LETTERS.sub(lambda m: _recase(m[0]) or "?", lettered)
    return "" if "?" in mended or mended == text else mended


def _recase(letters: str) -> str:
    """Letters cut into element symbols with the fewest changes of case, common elements preferred."""
    cost, cut = _cheapest(letters)
    return cut if cost < _RARE_COST * len(letters) else ""


@lru_cache(maxsize=512)
def _cheapest(letters: str) -> tuple[int, str]:
    if not letters:
        return 0, ""
    options = []
    for size in (1, 2):
        symbol = letters[:size].capitalize()
        if len(letters) >= size and (symbol in known_elements() or symbol in NAMED_NUCLIDES):
            changed = sum(a != b for a, b in zip(symbol, letters, strict=False))
            rest, tail = _cheapest(letters[size:])
            options.append((changed + (0 if symbol in COMMON else _RARE_COST) + rest, symbol + tail))
    return min(options, default=(10_000, ""))
