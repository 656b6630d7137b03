"""Reads tables of points and peaks: XYPOINTS, PEAK TABLE, PEAK ASSIGNMENTS."""

from __future__ import annotations

import re
from dataclasses import dataclass

_NUMBER = r"[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?"
_PAIR = re.compile(rf"({_NUMBER})\s*[,\s]\s*({_NUMBER})(?:\s*,\s*({_NUMBER}|[A-Za-z]+))?")
_ENTRY = re.compile(r"\(([^()<]*)(?:<([^<>]*)>)?[^()]*\)")


@dataclass(frozen=True, slots=True)
class Peak:
    """One row of a table. ``extra`` is a width or a multiplicity letter, ``note`` an assignment."""

    x: float
    y: float
    extra: str = ""
    note: str = ""


def read_pairs(table: str, columns: int = 2) -> list[Peak]:
    """Rows of a table in the form (XY..XY) or, with three columns, (XYW..XYW) or (XYM..XYM)."""
    peaks = []
    for line in table.splitlines():
        # Groups are parted by semicolons or by spaces, the values within a group by commas.
        for group in _groups(line, columns):
            found = _PAIR.fullmatch(group.strip())
            if found:
                peaks.append(Peak(float(found[1]), float(found[2]), found[3] or ""))
    return peaks


def _groups(line: str, columns: int) -> list[str]:
    if ";" in line:
        return line.split(";")
    joined = re.sub(r"\s*,\s*", ",", line.strip())
    words = joined.split()
    if all("," in word for word in words):
        return words
    values = joined.replace(",", " ").split()
    return [",".join(values[k : k + columns]) for k in range(0, len(values) - columns + 1, columns)]


def read_assignments(table: str) -> list[Peak]:
    """Rows of a table in the form (XYA), (XYMA), (XA): "(7.26, 100, M, <2,6-H>)"."""
    peaks = []
    for entry in _ENTRY.finditer(table):
        cells = [cell.strip() for cell in entry[1].split(",")]
        numbers = [float(cell) for cell in cells if re.fullmatch(_NUMBER, cell)]
        letters = [cell for cell in cells if re.fullmatch(r"[A-Za-z]+", cell)]
        if numbers:
            height = numbers[1] if len(numbers) > 1 else 0.0
            peaks.append(Peak(numbers[0], height, letters[0] if letters else "", (entry[2] or "").strip()))
    return peaks
