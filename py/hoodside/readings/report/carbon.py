"""Reads a list of 13C lines."""

from __future__ import annotations

import re
from dataclasses import replace

from hoodside.readings.model import CarbonLine
from hoodside.readings.report.conditions import read_conditions
from hoodside.readings.report.details import J_HEAD, NUMBER
from hoodside.readings.report.model import Gathered
from hoodside.readings.report.plain import follows_word, group_end, split_terms, with_decimal_points
from hoodside.readings.solvents import known_solvent

LOWEST, HIGHEST = -60.0, 320.0
_LINE = re.compile(
    r"(?P<a>-?\d{1,3}(?:\.\d{1,4})?)(?:\s?(?:-|to)\s?(?P<b>-?\d{1,3}(?:\.\d{1,4})?))?(?![\d.]*\d)(?!\s?(?:Hz|mL|mg|mmol|%|°|min|h\b|g\b))"
)
_GAP = re.compile(r"[\s,;:.]+|and\b|&|δ\s?_?C?(?![a-z])|\(?p\.?p\.?m\.?\)?")
_COUNT = re.compile(
    r"(?P<a>\d{1,2})\s?(?:x\s?)?(?:C(?![a-zA-Z0-9])|carbons?|lines)|x\s?(?P<b>\d{1,2})(?![\d.])"
    r"|(?<![\w-])(?P<c>\d{1,2})\s?(?:x(?=\s|$|[CA])|(?=CH|Ar))"
)
_HELD = re.compile(r"C\s?(?:H\s?(?P<h>[1-3])?|q\b)?(?![a-z0-9])")
_QUATERNARY = re.compile(r"C\s?q|C[IV]{1,2}|quat(?:ernary)?\.?|C=O|CO2?H?|COO[HR]?|C#?N|C|Cipso|ipso-?C?")
#: Off-resonance or DEPT letters: the multiplicity of a carbon by its hydrogens.
_LETTERS = {"s": "C", "d": "CH", "t": "CH2", "q": "CH3"}
_BARE_KIND = re.compile(r"\s?(?P<kind>CH3|CH2|CH|Cq|C)(?![A-Za-z0-9=(\-])")
_WORD = re.compile(r"[^\s,;()\[\]]+")
_MOST_PROSE = 3


def read_carbons(plain: str, start: int, end: int, into: Gathered) -> None:
    """Read a list of 13C lines that stands from ``start`` to ``end``, its conditions first."""
    said = read_conditions(plain, start, end)
    into.solvent = into.solvent or said.solvent
    if said.mhz or said.solvent:
        words = " in ".join(part for part in (f"{said.mhz:g} MHz" if said.mhz else "", said.solvent) if part)
        into.took(start, said.end, f"13C measured: {words}")
    body = plain[: said.end] + with_decimal_points(plain[said.end : end])
    at, prose = said.end, 0
    while at < end:
        gap = _GAP.match(body, at, end)
        if gap:
            at = gap.end()
            continue
        if prose > _MOST_PROSE:  # running text has begun
            into.missed(at, end, "It is no 13C line.")
            return
        stop = _read_line(body, at, end, into)
        if stop > at:
            at, prose = stop, 0
            continue
        at, prose = _pass_over(body, at, end, into), prose + 1


def _pass_over(plain: str, at: int, end: int, into: Gathered) -> int:
    close = group_end(plain, at, end) if plain[at] in "([" else -1
    word = _WORD.match(plain, at, end)
    stop = close if close > 0 else word.end() if word else at + 1
    into.missed(at, stop, "It is no 13C line.")
    return stop


def _read_line(plain: str, at: int, end: int, into: Gathered) -> int:
    found = _LINE.match(plain, at, end)
    if not found or follows_word(plain, at):
        return at
    stop = found.end()
    values = [float(v) for v in found.group("a", "b") if v]
    said = _Said()
    close = _group_after(plain, stop, end)
    if close:
        opening = plain.index("(", stop) if "(" in plain[stop:close] else plain.index("[", stop)
        said.read(plain, opening + 1, close - 1)
        stop = close
    else:
        bare = _BARE_KIND.match(plain, stop, end)
        if bare:
            said.kind = "C" if bare["kind"] == "Cq" else bare["kind"]
            stop = bare.end()
    ppm = sum(values) / len(values)
    if not all(LOWEST <= value <= HIGHEST for value in values):
        into.missed(at, stop, f"A 13C shift lies from {LOWEST:g} to {HIGHEST:g} ppm.")
    elif said.solvent:
        into.took(at, stop, f"{ppm:g} ppm: line of the solvent, not taken over")
    else:
        line = CarbonLine(round(ppm, 4), said.kind, said.n, tuple(sorted(said.j, reverse=True)))
        if said.each and into.c13 and into.c13[-1] == CarbonLine(into.c13[-1].ppm):
            into.c13[-1] = replace(into.c13[-1], n=said.n, kind=said.kind)
        into.add(into.c13, line, at, stop, _words(line))
    return stop


_OPENING = re.compile(r"\s{0,2}[(\[]")


def _group_after(plain: str, at: int, end: int) -> int:
    """Offset behind a bracket that follows at once; 0 when there is none."""
    opening = _OPENING.match(plain, at, end)
    return max(0, group_end(plain, opening.end() - 1, end)) if opening else 0


class _Said:
    """What is printed with a 13C line."""

    def __init__(self) -> None:
        self.kind = ""
        self.n = 1
        self.j: list[float] = []
        self.solvent = False
        self.each = False  # said of this line and of the bare one before it

    def read(self, plain: str, start: int, end: int) -> None:
        letters = []
        for begin, stop in split_terms(plain, start, end):
            term = plain[begin:stop].strip(" .\n")
            if term in _LETTERS:
                letters.append(term)
            else:
                self._term(term)
        # With a C-F coupling the letter names the splitting by F, not the number of H.
        if letters and not self.j and not self.kind:
            self.kind = _LETTERS[letters[0]]

    def _term(self, term: str) -> None:
        head = J_HEAD.search(term)
        values = re.findall(NUMBER, term[head.end() :]) if head else re.findall(rf"({NUMBER})\s?Hz", term)
        if values:
            self.j += [float(v) for v in values]
            return
        self.solvent = self.solvent or (bool(known_solvent(term)) and any(c.isdigit() for c in term))
        self.each = self.each or term.startswith("each")
        term = term.removeprefix("each").strip()
        count = _COUNT.search(term)
        if count:
            self.n = int(count["a"] or count["b"] or count["c"])
        rest = term[: count.start()] + term[count.end() :] if count else term
        self.kind = self.kind or _kind_of(rest.strip(" x"))


def _kind_of(term: str) -> str:
    """Kind of carbon told by a note: "CH3", "OCH3", "Cq", "C=O"; "" when it tells none or several."""
    word = re.sub(r"^\d\s?x?\s?(?=C)", "", term)
    if _QUATERNARY.fullmatch(word):
        return "C"
    if word in ("CHO", "HC=O", "ArCH", "=CH", "CHAr", "CH-Ar", "CHarom", "aromatic CH"):
        return "CH"
    carbons = list(_HELD.finditer(word))
    if len(carbons) != 1 or word.count("C") != 1 or not carbons[0][0].startswith("CH"):
        return ""
    return "CH" + (carbons[0]["h"] or "").replace("1", "")


def _words(line: CarbonLine) -> str:
    parts = [f"13C {line.ppm:g} ppm", line.kind, f"{line.n} C" if line.n > 1 else ""]
    if line.j_cf:
        parts.append("J(CF) " + ", ".join(f"{j:g}" for j in line.j_cf) + " Hz")
    return ", ".join(part for part in parts if part)
