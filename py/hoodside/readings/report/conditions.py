"""What stands between a heading and its list: field, solvent, medium, method, δ signs."""

from __future__ import annotations

import re
from dataclasses import dataclass

from hoodside.readings.report.plain import group_end
from hoodside.readings.solvents import known_solvent

_MHZ = re.compile(r"(\d{2,4}(?:[.,]\d+)?)\s?-?\s?M\s?Hz", re.IGNORECASE)
_LEAST_MHZ, _MOST_MHZ = 20.0, 2000.0
_SKIP = re.compile(
    r"[\s:=,;/]+|-(?!\.?\d)|(?<![\s:=δ])-"  # a dash before a number may be the sign of the first shift
    r"|δ\s?_?(?:[HC](?![a-z]))?|d(?=[\s:=]+-?\d)|\(?\[?\s?p\.?p\.?m\.?\s?\]?\)?"
    r"|NMR|spectr(?:um|a|al data)?|data"
    r"|(?:\d{2,4}(?:[.,]\d+)?)\s?M\s?Hz|TMS|Me4Si|\d{3}\s?K\b|-?\d{1,3}\s?°\s?C|r\.?t\.?(?=[\s,;:])"
    r"|[νv]\s?~?(?:_?\s{0,9}max\.?)?(?=[\s:=(/\d.])|max\.?|/?\s?\(?\[?\s?cm\s{0,5}\^?\{?\s?-\s?1\s?\}?\]?\)?|wavenumbers?"
    r"|m\s?/\s?[ze](?![a-z])|in\b|of\b|at\b|was|recorded|the|rel\.? ?int\.?|%"
)
_WORD = re.compile(r"[A-Za-z(\[][A-Za-z0-9()\[\],'\-]{0,40}[A-Za-z0-9)\]]")
#: How IR samples are prepared: as written -> as the engine names it (common practice).
_MEDIA = (
    (re.compile(r"k\s?br", re.IGNORECASE), "KBr"),
    (re.compile(r"\bi?-?atr\b|diamond", re.IGNORECASE), "ATR"),
    (re.compile(r"nujol|mull|paraffin", re.IGNORECASE), "Nujol"),
    (re.compile(r"film|evap", re.IGNORECASE), "film"),
    (re.compile(r"\bneat\b|liq", re.IGNORECASE), "neat"),
    (re.compile(r"na\s?cl\b", re.IGNORECASE), "NaCl"),
    (re.compile(r"\bchcl3\b|chloroform", re.IGNORECASE), "CHCl3"),
    (re.compile(r"\bcdcl3\b", re.IGNORECASE), "CDCl3"),
    (re.compile(r"\bccl4\b", re.IGNORECASE), "CCl4"),
    (re.compile(r"ch2cl2|\bdcm\b", re.IGNORECASE), "CH2Cl2"),
    (re.compile(r"\bcs2\b", re.IGNORECASE), "CS2"),
    (re.compile(r"solid|powder|golden gate", re.IGNORECASE), "solid"),
)
# A bracket that holds one of these is the content of a list, not a condition.
_CONTENT = re.compile(r"\bJ\b|\d\s?H\b|^\(\s?(?:br\.?\s|app\.?\s)?[sdtqm]{1,4}\s?[,;)]", re.MULTILINE)


@dataclass(frozen=True, slots=True)
class Conditions:
    """How a list was measured; ``end`` is the offset where its content begins."""

    mhz: float | None
    solvent: str
    text: str
    end: int


def read_conditions(plain: str, start: int, end: int) -> Conditions:
    """Read what comes before the first reading of a list."""
    at = start
    while at < end:
        step = _skipped(plain, at, end)
        if step == at:
            break
        at = step
    said = plain[start:at]
    return Conditions(_field(said), _solvent_in(said), said, at)


def ir_medium(said: str) -> str:
    """How the IR sample was prepared, by the engine's name; "" when nothing is said."""
    return next((name for pattern, name in _MEDIA if pattern.search(said)), "")


def _skipped(plain: str, at: int, end: int) -> int:
    """Offset behind one thing that is no reading, or ``at`` itself."""
    simple = _SKIP.match(plain, at, end)
    if simple and simple.end() > at:
        return simple.end()
    if plain[at] in "([{":
        close = group_end(plain, at, end)
        if close > 0 and not _CONTENT.search(plain, at, close):
            return close
    word = _WORD.match(plain, at, end)
    if word and known_solvent(word[0].rstrip(",")):
        return word.end()
    return at


def _field(said: str) -> float | None:
    found = _MHZ.search(said)
    if not found:
        return None
    mhz = float(found[1].replace(",", "."))
    return mhz if _LEAST_MHZ <= mhz <= _MOST_MHZ else None


def _solvent_in(said: str) -> str:
    for part in re.split(r"[,;:\s]+(?![^()]*\)\d)|(?<=\))\s|^\(|\)$", said):
        word = (part or "").strip("[]{} .")
        for shape in (word, word.strip("()"), word.removeprefix("("), word.removesuffix(")")):
            found = known_solvent(shape) if shape else ""
            if found:
                return found
    return known_solvent(said.strip(" ()[]:δ="))
