"""Words for IR strength and shape: what chemists write, and "strong", "medium", "weak", "broad", "sharp"."""

from __future__ import annotations

import re

from hoodside.errors import InvalidInputError

#: Common practice; "sh" means shoulder in some houses, sharp in others, and is taken for neither.
_STRENGTHS = {
    "vs": "strong",
    "very strong": "strong",
    "strong": "strong",
    "str": "strong",
    "st": "strong",
    "s": "strong",
    "ms": "medium",
    "sm": "medium",
    "mw": "medium",
    "wm": "medium",
    "medium": "medium",
    "med": "medium",
    "m": "medium",
    "very weak": "weak",
    "vw": "weak",
    "weak": "weak",
    "w": "weak",
    "var": "",
    "v": "",
    "variable": "",
}
_SHAPES = {
    "very broad": "broad",
    "broad": "broad",
    "vbr": "broad",
    "brd": "broad",
    "br": "broad",
    "b": "broad",
    "sharp": "sharp",
    "shp": "sharp",
    "narrow": "sharp",
    "sh": "",
    "shoulder": "",
}
_PARTS = re.compile(r"[\s,;.()/\-–]+")
_VERY = re.compile(r"\bvery (strong|weak|broad)\b")


def band_words(text: str) -> tuple[str, str] | None:
    """(strength, shape) of a note such as "s", "br, m", "strong broad"; None when it is no such note."""
    words = [word for word in _PARTS.split(_VERY.sub(r"\1", text.lower().strip())) if word]
    strength = shape = ""
    for word in words:
        pair = _one_word(word)
        if pair is None:
            return None
        strength, shape = pair[0] or strength, pair[1] or shape
    return (strength, shape) if words else None


def _one_word(word: str) -> tuple[str, str] | None:
    if word in _STRENGTHS:
        return _STRENGTHS[word], ""
    if word in _SHAPES:
        return "", _SHAPES[word]
    for tail in ("br", "sh", "b"):
        head = word.removesuffix(tail)
        if head != word and head in _STRENGTHS:
            return _STRENGTHS[head], _SHAPES[tail]
    for head in ("br", "b"):
        tail = word.removeprefix(head)
        if tail != word and tail in _STRENGTHS:
            return _STRENGTHS[tail], _SHAPES[head]
    return None


def strength_and_shape(strength: str, shape: str, field: str) -> tuple[str, str]:
    """Strength and shape of a band as given in two fields; either may hold both ("strong broad").

    Raises: InvalidInputError naming the field.
    """
    found = ["", ""]
    for name, text in (("strength", strength), ("shape", shape)):
        words = band_words(text) if text else ("", "")
        if words is None:
            raise InvalidInputError(
                f"{text!r} says nothing of a band.",
                hint="Write strong, medium or weak; broad or sharp.",
                field=f"{field}.{name}",
                value=text,
            )
        found = [words[0] or found[0], words[1] or found[1]]
    return found[0], found[1]
