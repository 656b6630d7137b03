"""Plain text of the same length: every offset in it is an offset in what was pasted."""

from __future__ import annotations

import re

_SAME = {
    "-": "–—‒―−‐‑﹣－⁻₋",
    "+": "⁺₊＋",
    "'": "’‘′ʹ‵`´",
    "x": "×✕╳",
    "=": "¼＝",
    "δ": "∂𝛿𝜹ẟ",
    "ν": "𝜈𝝂ṽ",
    "(": "（⁽",
    ")": "）⁾",
    ",": "，、",
    ";": "；",
    ":": "：",
    " ": "\t\r\f\v\u00a0\xad\u0303\u2002\u2003\u2005\u2006\u2007\u2008\u2009\u200a\u200b\u202f\u2060\ufeff$^",
    "0": "⁰₀",
    "1": "¹₁",
    "2": "²₂",
    "3": "³₃",
    "4": "⁴₄",
    "5": "⁵₅",
    "6": "⁶₆",
    "7": "⁷₇",
    "8": "⁸₈",
    "9": "⁹₉",
}
_PLAIN = str.maketrans({odd: usual for usual, odds in _SAME.items() for odd in odds})
_MARKUP = re.compile(r"</?(?:sub|sup|i|b|em|strong|span|br|p)\s?/?>", re.IGNORECASE)
_GREEK = re.compile(r"\\?\bdelta\b|&delta;|\\delta", re.IGNORECASE)

# A comma between digits, but not in a locant ("H-2,6", "2,6-H") or beside a coupling ("J2,3").
_COMMA = re.compile(
    r"J[\s_({\[]{0,2}\d{1,2}[a-z]?'?\s?,\s?\d{1,2}|H-?\d{1,2}(?:,\d{1,2})+|\d{1,2}(?:,\d{1,2})+'?-?[HC](?![a-z])"
    r"|(?<=\d),(?=\d)"
)
_POINT = re.compile(r"\d\.\d")
_CHAIN = re.compile(r"\d,\d+,\d")
_DECIMAL = re.compile(r"(?<![\d,])\d{1,3},\d{1,4}(?![\d,])")


def plain_text(text: str) -> str:
    """The text with dashes, primes, spaces, raised and lowered digits in their plain form, length kept."""
    plain = text.translate(_PLAIN)
    plain = _MARKUP.sub(lambda m: " " * len(m[0]), plain)
    return _GREEK.sub(lambda m: "δ".ljust(len(m[0])), plain)


def with_decimal_points(plain: str) -> str:
    """A list with decimal commas ("7,81 (d, J = 8,2 Hz)") as one with points; unchanged when in doubt.

    Commas count as decimal signs only where the list holds no decimal point and no run such as "192,156,134".
    """
    if _POINT.search(plain) or _CHAIN.search(plain) or not _DECIMAL.search(plain):
        return plain
    return _COMMA.sub(lambda m: "." if m[0] == "," else m[0], plain)


_OPEN, _CLOSE = "([{", ")]}"
_BRACKETS = re.compile(r"[()\[\]{}]")
#: A bracket longer, or nested deeper, than this was not closed.
_LONGEST_GROUP, _DEEPEST = 600, 12


def group_end(plain: str, start: int, end: int) -> int:
    """Offset just behind the bracket that closes the one at ``start``; -1 when it is not closed."""
    depth = 0
    for found in _BRACKETS.finditer(plain, start, min(end, start + _LONGEST_GROUP)):
        depth += 1 if found[0] in _OPEN else -1
        if depth == 0:
            return found.end()
        if depth > _DEEPEST:
            return -1
    return -1


def follows_word(plain: str, at: int) -> bool:
    """Whether a number at an offset is the tail of a name ("C12", "H-2") and so no reading."""
    return at > 0 and plain[at - 1] != "δ" and (plain[at - 1].isalnum() or plain[at - 1] in "-_")


def split_terms(plain: str, start: int, end: int) -> list[tuple[int, int]]:
    """The stretches between commas and semicolons that stand outside inner brackets."""
    terms, depth, begin = [], 0, start
    locants = [m.span() for m in _LOCANTS.finditer(plain, start, end)]
    for at in range(start, end):
        letter = plain[at]
        depth += (letter in _OPEN) - (letter in _CLOSE)
        if letter in ",;" and depth <= 0 and not any(a <= at < b for a, b in locants):
            terms.append((begin, at))
            begin = at + 1
    return [*terms, (begin, end)]


_LOCANTS = re.compile(
    r"J[_\s]?\d{1,2}[a-z]?'*,\s?\d{1,2}[a-z]?'*(?=\s*=)|J\d{1,2}[a-z]?'*,\d{1,2}[a-z]?'*(?=\s+\d)"
    r"|J\s?\d{0,2}[HCFP],\s?\d{0,2}[HCFP]\d{0,2}(?![a-z])"
    r"|(?<![\w.])\d{1,2}[a-z]?'*(?:,\s?\d{1,2}[a-z]?'*)+-[A-Z]"
    r"|\b[HC]-?\d{1,2}[a-z]?'*(?:,\s?-?\d{1,2}[a-z]?'*(?![\d.a-z])(?!\s*H))+"
)
