"""Reads a list of 1H signals."""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from hoodside.readings.model import ProtonSignal
from hoodside.readings.report.conditions import read_conditions
from hoodside.readings.report.details import (
    COUNT,
    J_WITH_UNIT,
    Details,
    hydrogens_noted,
    names_pattern,
    read_group,
    read_token,
)
from hoodside.readings.report.model import Gathered
from hoodside.readings.report.plain import follows_word, group_end, with_decimal_points
from hoodside.readings.solvents import known_solvent

LOWEST, HIGHEST = -5.0, 25.0
_VALUE = r"-?\d{1,3}(?:\.\d{1,5})?"
_SHIFT = re.compile(rf"(?P<a>{_VALUE})(?:\s?(?:-|to|/|\.\.\.?|…)\s?(?P<b>{_VALUE}))?(?![\d.]*\d)")
_GAP = re.compile(r"[\s,;:.]+|and\b|&|δ\s?_?H?(?![a-z])|\(?p\.?p\.?m\.?\)?")
_WORD = re.compile(r"[^\W\d_][^\s,;()\[\]]*|[^\s\w]")
#: A number with one of these is no shift.
_UNIT = re.compile(
    r"\s?(?:m[LlgMm]\b|g\b|kg|mmol|mol|[µu][LlgM]|h\b|hr?s?\b|min|°|K\b|%|equiv|eq\b|M\b|N\b|nm|cm|MHz|Hz|bar|atm|wt|vol|days?)"
)
_NEXT_SIGNAL = re.compile(rf"[)\s]*[,;]\s*{_VALUE}(?:\s?-\s?{_VALUE})?\s*\(")
_FIRST_WORD = re.compile(r"\s*[,;]?\s*([A-Za-z]{1,12})\b")
_NUMBER_LIKE = re.compile(r"[\w.]+")
_NUMBER_STARTS = re.compile(r"(?<![\w.-])-?\d")
_OPENING = re.compile(r"\s{0,3}\(")
_MOST_PROSE = 3


@dataclass(slots=True)
class _Signal:
    lo: float
    hi: float
    start: int
    end: int
    details: Details = field(default_factory=Details)
    bracketed: bool = False


def read_protons(plain: str, start: int, end: int, into: Gathered) -> None:
    """Read a list of 1H signals that stands from ``start`` to ``end``, its conditions first."""
    said = read_conditions(plain, start, end)
    into.mhz = said.mhz or into.mhz
    into.solvent = said.solvent or into.solvent
    if said.mhz or said.solvent:
        field_text = f"{said.mhz:g} MHz" if said.mhz else ""
        into.took(
            start,
            said.end,
            f"1H measured at {field_text} in {said.solvent}".replace("at  in", "in").removesuffix(" in "),
        )
    body = plain[: said.end] + with_decimal_points(plain[said.end : end])
    _Reader(body, end, into).read(said.end)


class _Reader:
    """One pass over the list, left to right; never goes back."""

    def __init__(self, plain: str, end: int, into: Gathered) -> None:
        self.plain = plain
        self.end = end
        self.into = into
        self.signals: list[_Signal] = []
        self.lost: list[tuple[int, int, str]] = []
        self.prose = 0  # words in a row that mean nothing here
        self.patterned = -1  # offset just behind the last pattern printed outside brackets
        self.ended = False  # running text has begun: only what is unmistakable counts as a signal

    def read(self, at: int) -> None:
        while at < self.end:
            at = self._step(at)
        for signal in _shared_out(self.signals):
            _hand_over(signal, self.into)
        for lost in self.lost:
            self.into.missed(*lost)

    def _step(self, at: int) -> int:
        gap = _GAP.match(self.plain, at, self.end)
        if gap:
            return gap.end()
        if self.plain[at] in "([":
            return self._group(at)
        for read in (self._detail, self._shift):
            stop = read(at)
            if stop > at:
                self.prose = 0
                return stop
        return self._word(at)

    def _group(self, at: int) -> int:
        close = group_end(self.plain, at, self.end)
        inner = close - 1
        if close < 0:
            # Not closed: it ends where the next signal begins.
            following = _NEXT_SIGNAL.search(self.plain, at + 1, min(self.end, at + 300))
            close = inner = following.start() if following else min(self.end, self._line_end(at))
        if not self.signals or (self.ended and self.signals[-1].bracketed):
            self._lose(at, close, "It belongs to no signal.")
            return max(close, at + 1)
        signal = self.signals[-1]
        read_group(self.plain, at + 1, inner, signal.details)
        signal.end, signal.bracketed, self.prose = close, True, 0
        return max(close, at + 1)

    def _line_end(self, at: int) -> int:
        newline = self.plain.find("\n", at, self.end)
        return newline if newline >= 0 else self.end

    def _detail(self, at: int) -> int:
        """A pattern, a J or a number of H that stands outside brackets."""
        if not self.signals or self.ended or (self.signals[-1].bracketed and not self._counts(at)):
            return at
        details = self.signals[-1].details
        if self.plain[at] in "-.0123456789" and not self._belongs(at, details):
            details.j_open = False
            return at
        details.bare, pattern = True, details.mult
        stop = read_token(self.plain, at, self.end, details)
        details.bare = False
        if stop > at:
            self.signals[-1].end = stop
        if details.mult != pattern:
            self.patterned = stop
        return stop

    def _counts(self, at: int) -> bool:
        return COUNT.match(self.plain, at, self.end) is not None

    def _belongs(self, at: int, details: Details) -> bool:
        """Whether a number outside brackets is a J or a number of H of the open signal."""
        if self._counts(at) or J_WITH_UNIT.match(self.plain, at, self.end):
            return True
        if self.patterned >= 0 and not details.j and details.mult not in ("s", "m", "br s", "br m"):
            between = self.plain[self.patterned : at].strip(" ")
            return not between or (between == "," and self._count_follows(at))
        return details.j_open and not self._shift_here(at)

    def _count_follows(self, at: int) -> bool:
        """Whether a number of H follows a number ("8.2, 2H"), so that a table has J in this column."""
        found = _SHIFT.match(self.plain, at, self.end)
        rest = self.plain[found.end() : found.end() + 8].lstrip(" ,") if found else ""
        return self.signals[-1].details.n is None and COUNT.match(rest) is not None

    def _shift_here(self, at: int) -> bool:
        """Whether a number that follows a J or a pattern starts the next signal."""
        found = _SHIFT.match(self.plain, at, self.end)
        return bool(found and self._introduces(found.end()))

    def _introduces(self, stop: int) -> bool:
        """Whether a bracket, a pattern or a number of H follows a number."""
        word = _FIRST_WORD.match(self.plain, stop, self.end)
        if word and names_pattern(word[1]):
            return True
        rest = self.plain[stop : stop + 8].lstrip(" ,\n")
        return rest.startswith("(") or COUNT.match(rest) is not None

    def _shift(self, at: int) -> int:
        found = _SHIFT.match(self.plain, at, self.end)
        if not found or follows_word(self.plain, at):
            return at
        stop = found.end()
        ends = [float(value) for value in found.group("a", "b") if value]
        plainly = self._introduces(stop)
        if _UNIT.match(self.plain, stop, self.end) or (not plainly and not self._stands_alone(found)):
            return at
        if not all(LOWEST <= ppm <= HIGHEST for ppm in ends):
            self._lose(at, self._past_group(stop), f"A 1H shift lies from {LOWEST:g} to {HIGHEST:g} ppm.")
            return self._past_group(stop)
        self.signals.append(_Signal(min(ends), max(ends), at, stop))
        self.ended = False
        return stop

    def _stands_alone(self, found: re.Match[str]) -> bool:
        """Whether a number without details may be a shift: a decimal in a list that has not ended."""
        return not self.ended and "." in found["a"]

    def _past_group(self, at: int) -> int:
        opening = _OPENING.match(self.plain, at, self.end)
        close = group_end(self.plain, opening.end() - 1, self.end) if opening else -1
        return close if close > 0 else at

    def _word(self, at: int) -> int:
        word = _WORD.match(self.plain, at, self.end)
        stop = max(word.end() if word else at, self._past_number(at), at + 1)
        if self.ended:
            number = _NUMBER_STARTS.search(self.plain, stop, self.end)
            stop = number.start() if number else self.end
        self.prose += 1
        if self.prose > _MOST_PROSE:
            self.ended = True
        self._lose(at, stop, "It is no 1H signal.")
        return stop

    def _past_number(self, at: int) -> int:
        number = _NUMBER_LIKE.match(self.plain, at, self.end)
        return number.end() if number else at

    def _lose(self, start: int, end: int, why: str) -> None:
        if (
            self.lost
            and self.lost[-1][2] == why
            and not self.plain[self.lost[-1][1] : start].strip(" \n,;.:")
        ):
            start = self.lost.pop()[0]
        self.lost.append((start, end, why))


def _shared_out(signals: list[_Signal]) -> list[_Signal]:
    """Give bare shifts their share of what is said of both: "7.81, 7.20 (2d, J = 8.2 Hz, 4H)"."""
    for i, signal in enumerate(signals):
        count = signal.details.repeat
        if signal.details.is_ab and i and signals[i - 1].details.empty:
            count = 2
        bare = signals[max(0, i - count + 1) : i]
        if count < 2 or len(bare) != count - 1 or any(not s.details.empty or s.bracketed for s in bare):
            continue
        details = signal.details
        if details.n is not None and not details.each:
            details.n /= count
        if details.is_ab:
            details.mult = "d"
        for other in bare:
            other.details = details
    return signals


def _hand_over(signal: _Signal, into: Gathered) -> None:
    details = signal.details
    if any(_names_solvent(note) for note in details.notes):
        into.took(signal.start, signal.end, f"{signal.lo:g} ppm: line of the solvent, not taken over")
        return
    n = details.n if details.n is not None else hydrogens_noted(details.notes)
    couplings = tuple(sorted((j for j in details.j if j > 0), reverse=True))
    reading = ProtonSignal(signal.lo, signal.hi, details.pattern, couplings, n, ", ".join(details.notes))
    into.add(into.h1, reading, signal.start, signal.end, _words(reading))
    for start, end in details.unclear:
        into.missed(start, end, "It is no pattern, no J, no number of H.")


def _names_solvent(note: str) -> bool:
    plain = note.strip(" .")
    labelled = _DEUTERATED.search(plain) is not None
    return plain in _SOLVENT_NOTES or labelled or ("D" in plain and bool(known_solvent(plain)))


_DEUTERATED = re.compile(r"\w-d\d{1,2}$|^\[?[dD]\d{1,2}\]?-[A-Za-z]|^CD|^CHD|^C6HD5$|^C6D5H$")
#: Notes that name what is not the sample.
_SOLVENT_NOTES = frozenset(
    {"CHCl3", "CDCl3", "H2O", "HDO", "HOD", "water", "solvent", "residual solvent", "TMS", "DMSO"}
)


def _words(reading: ProtonSignal) -> str:
    shift = f"{reading.lo:g}" if reading.lo == reading.hi else f"{reading.hi:g} to {reading.lo:g}"
    parts = [f"1H {shift} ppm", reading.mult]
    if reading.j:
        parts.append("J " + ", ".join(f"{j:g}" for j in reading.j) + " Hz")
    if reading.n is not None:
        parts.append(f"{reading.n:g} H")
    parts.append(reading.note)
    return ", ".join(part for part in parts if part)
