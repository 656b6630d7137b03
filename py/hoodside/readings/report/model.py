"""What came of a pasted report: readings, what each stretch was taken for, what could not be read."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field
from typing import TypeVar

from hoodside.readings.model import (
    Analysis,
    CarbonLine,
    HighResMass,
    IrBand,
    MassPeak,
    ProtonSignal,
    Readings,
)

T = TypeVar("T")

#: More of one kind than any sample gives; what comes after is left unread.
MOST_READINGS = 2_000
MOST_UNREAD = 500


@dataclass(frozen=True, slots=True)
class Piece:
    """A stretch of the text, by character offsets, and what it was taken for."""

    text: str
    start: int
    end: int
    means: str


@dataclass(frozen=True, slots=True)
class Unread:
    """A stretch of the text that could not be read, and why."""

    text: str
    start: int
    end: int
    why: str


@dataclass(frozen=True, slots=True)
class ParsedReport:
    """The outcome of reading a report. Every reading comes from one of the pieces."""

    readings: Readings
    unread: tuple[Unread, ...]
    pieces: tuple[Piece, ...]


@dataclass(slots=True)
class Gathered:
    """Collects what the readers of the several kinds find. ``text`` is the report as it was pasted."""

    text: str
    h1: list[ProtonSignal] = field(default_factory=list)
    c13: list[CarbonLine] = field(default_factory=list)
    ir: list[IrBand] = field(default_factory=list)
    ms: list[MassPeak] = field(default_factory=list)
    hrms: HighResMass | None = None
    analysis: Analysis | None = None
    formula: str = ""
    solvent: str = ""
    mhz: float | None = None
    ir_medium: str = ""
    warnings: list[str] = field(default_factory=list)
    pieces: list[Piece] = field(default_factory=list)
    lost: list[tuple[int, int, str]] = field(default_factory=list)

    def took(self, start: int, end: int, means: str) -> None:
        """Note what a stretch was taken for."""
        shown = self._trimmed(start, end)
        if shown:
            self.pieces.append(Piece(self.text[shown[0] : shown[1]], *shown, means))

    def missed(self, start: int, end: int, why: str) -> None:
        """Note a stretch that could not be read; neighbours with the same reason become one."""
        last = self.lost[-1] if self.lost else None
        if last and last[2] == why and start >= last[1] and not self.text[last[1] : start].strip(" \n,;."):
            start = self.lost.pop()[0]
        self.lost.append((start, end, why))

    def _trimmed(self, start: int, end: int) -> tuple[int, int] | None:
        while start < end and self.text[start] in _EDGE:
            start += 1
        while end > start and self.text[end - 1] in _EDGE:
            end -= 1
        return (start, end) if start < end else None

    def add(self, kind: list[T], reading: T, start: int, end: int, means: str) -> None:
        """Take a reading over, unless there are too many of its kind."""
        if len(kind) >= MOST_READINGS:
            self.missed(start, end, f"There are more than {MOST_READINGS} readings of this kind.")
            return
        kind.append(reading)
        self.took(start, end, means)

    def finished(self) -> ParsedReport:
        """The report as read."""
        readings = Readings(
            formula=self.formula,
            solvent=self.solvent,
            mhz=self.mhz,
            h1=tuple(self.h1),
            c13=tuple(self.c13),
            ir=tuple(self.ir),
            ir_medium=self.ir_medium,
            ms=tuple(self.ms),
            hrms=self.hrms,
            analysis=self.analysis,
            warnings=tuple(self.warnings),
        )
        pieces = sorted(self.pieces, key=lambda piece: piece.start)
        return ParsedReport(readings, tuple(self._unread()), tuple(pieces))

    def _unread(self) -> Iterator[Unread]:
        lost = sorted(self.lost)
        if len(lost) > MOST_UNREAD:
            why = f"There are more than {MOST_UNREAD} stretches that could not be read."
            lost = [*lost[:MOST_UNREAD], (lost[MOST_UNREAD][0], max(end for _, end, _ in lost), why)]
        for start, end, why in lost:
            shown = self._trimmed(start, end)
            if shown:
                yield Unread(self.text[shown[0] : shown[1]], *shown, why)


#: What may stand at the edge of a stretch without belonging to it.
_EDGE = " \t\r\n,;.:\u00a0"
