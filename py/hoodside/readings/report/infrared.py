"""Reads a list of IR bands."""

from __future__ import annotations

import re

from hoodside.readings.infrared_words import band_words
from hoodside.readings.model import IrBand
from hoodside.readings.report.conditions import ir_medium, read_conditions
from hoodside.readings.report.model import Gathered
from hoodside.readings.report.plain import follows_word, group_end, split_terms

LOWEST, HIGHEST = 200.0, 4500.0
_UNIT = r"(?:/?\s?[(\[]?\s?cm\s{0,5}\^?\{?\s?-\s?1\s?\}?\s?[)\]]?)"
_BAND = re.compile(
    r"(?P<a>[1-4],\d{3}(?!\d)|\d{3,4}(?:\.\d{1,2})?)(?:\s?(?:-|to)\s?(?P<b>\d{3,4}(?:\.\d{1,2})?))?(?![\d.]*\d)(?!\s?(?:MHz|K\b|°|mg|mL))"
)
_GAP = re.compile(rf"[\s,;:.]+|and\b|&|{_UNIT}|[νv]\s?~?(?:_?\s{{0,4}}max)?(?=[\s:=\d])|=")
_BARE_WORDS = re.compile(
    r"\s?(?P<words>(?:(?:vs|vw|ms|mw|sm|wm|very|strong|medium|med|weak|broad|sharp|br|sh|s|m|w|b|v)\.?(?![a-z])(?:\s?(?:,\s?(?=(?:br|sh)\b)|/)?\s?)?){1,3})"
)
_GLUED = re.compile(r"\s?(?P<words>(?:vs|vw|s|m|w)(?:br|b|sh)|(?:br|b)(?:s|m|w))(?![a-z])")
_WORD = re.compile(r"[^\s,;()\[\]]+")
#: A printed stretch this wide, or wider, is a broad band.
_BROAD = 100.0
_MOST_PROSE = 3


def read_infrared(plain: str, start: int, end: int, into: Gathered) -> None:
    """Read a list of IR bands that stands from ``start`` to ``end``, its conditions first."""
    said = read_conditions(plain, start, end)
    medium = ir_medium(said.text)
    if medium:
        into.ir_medium = medium
        into.took(start, said.end, f"IR sample: {medium}")
    at, prose = said.end, 0
    while at < end:
        gap = _GAP.match(plain, at, end)
        if gap:
            at = gap.end()
            continue
        if prose > _MOST_PROSE:  # running text has begun
            into.missed(at, end, "It is no IR band.")
            return
        stop = _read_band(plain, at, end, into)
        if stop > at:
            at, prose = stop, 0
            continue
        at, prose = _pass_over(plain, at, end, into), prose + 1


def _pass_over(plain: str, at: int, end: int, into: Gathered) -> int:
    close = group_end(plain, at, end) if plain[at] in "([" else -1
    word = _WORD.match(plain, at, end)
    stop = close if close > 0 else word.end() if word else at + 1
    medium = ir_medium(plain[at:stop])
    if medium and not into.ir_medium:
        into.ir_medium = medium
        into.took(at, stop, f"IR sample: {medium}")
    else:
        into.missed(at, stop, "It is no IR band.")
    return stop


def _read_band(plain: str, at: int, end: int, into: Gathered) -> int:
    found = _BAND.match(plain, at, end)
    if not found or follows_word(plain, at):
        return at
    ends = [float(value.replace(",", "")) for value in found.group("a", "b") if value]
    strength, shape, stop = _said_after(plain, found.end(), end)
    if not all(LOWEST <= value <= HIGHEST for value in ends):
        into.missed(at, stop, f"An IR band lies from {LOWEST:g} to {HIGHEST:g} cm-1.")
        return stop
    if max(ends) - min(ends) >= _BROAD:
        shape = shape or "broad"
    band = IrBand(sum(ends) / len(ends), strength, shape)
    words = ", ".join(part for part in (f"IR {band.cm1:g} cm-1", strength, shape) if part)
    into.add(into.ir, band, at, stop, words)
    return stop


_OPENING = re.compile(rf"\s{{0,2}}{_UNIT}?\s{{0,2}}[(\[](?!\s?cm)")


def _said_after(plain: str, at: int, end: int) -> tuple[str, str, int]:
    """Strength, shape and the offset behind what is printed with a band."""
    opening = _OPENING.match(plain, at, end)
    close = group_end(plain, opening.end() - 1, end) if opening else -1
    if opening and close > 0:
        return *_in_group(plain, opening.end(), close - 1), close
    bare = _GLUED.match(plain, at, end) or _BARE_WORDS.match(plain, at, end)
    words = band_words(bare["words"]) if bare else None
    if bare and words:
        return *words, bare.start("words") + len(bare["words"].rstrip(" ,"))
    return "", "", at


def _in_group(plain: str, start: int, end: int) -> tuple[str, str]:
    strength = shape = ""
    for begin, stop in split_terms(plain, start, end):
        words = band_words(plain[begin:stop])
        if words:
            strength, shape = words[0] or strength, words[1] or shape
    return strength, shape
