"""One block as a spectrum: a curve or a table of peaks, in its own units, with what does not agree in it."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import dataclass

from hoodside.errors import InvalidInputError
from hoodside.readings.jcamp.asdf import decode
from hoodside.readings.jcamp.records import Block
from hoodside.readings.jcamp.tables import Peak, read_assignments, read_pairs

INFRARED, NMR, MASS, OTHER = "infrared", "nmr", "mass", "other"
_UM_PER_CM = 1e4
_NM_PER_CM = 1e7


@dataclass(frozen=True, slots=True)
class Spectrum:
    """A curve (``x`` and ``y`` of one length) or, when they are empty, a table of ``peaks``.

    Wavelengths are turned into cm-1 and, where the observe frequency is known, Hz into ppm.
    """

    kind: str  # "infrared", "nmr", "mass" or "other"
    title: str
    x: tuple[float, ...]
    y: tuple[float, ...]
    x_unit: str  # "cm-1", "ppm", "Hz", "m/z" or as given
    y_unit: str  # "transmittance", "absorbance" or as given
    peaks: tuple[Peak, ...]
    nucleus: str  # "1H", "13C", ... or ""
    mhz: float | None  # observe frequency, MHz
    solvent: str
    warnings: tuple[str, ...]


def spectrum_of(block: Block) -> Spectrum:
    """Read one block. Raises: InvalidInputError when it holds no table that can be read."""
    kind = _kind(block)
    warnings: list[str] = []
    x, y, peaks = _content(block, warnings)
    mhz = block.number(".OBSERVEFREQUENCY")
    unit = block.get("XUNITS").upper() or _ntuple_cell(block, "UNITS", 0).upper()
    turn, x_unit = _axis(unit, kind, mhz)
    if kind == NMR and x_unit == "Hz":
        warnings.append("The shift axis is in Hz and the file names no observe frequency.")
    return Spectrum(
        kind=kind,
        title=block.get("TITLE"),
        x=tuple(turn(value) for value in x),
        y=tuple(y),
        x_unit=x_unit,
        y_unit=block.get("YUNITS").lower() or _ntuple_cell(block, "UNITS", 1).lower(),
        peaks=tuple(Peak(turn(p.x), p.y, p.extra, p.note) for p in peaks),
        nucleus=block.get(".OBSERVENUCLEUS").replace("^", "").strip(),
        mhz=mhz,
        solvent=block.get(".SOLVENTNAME"),
        warnings=tuple(warnings),
    )


def _kind(block: Block) -> str:
    data_type = block.get("DATATYPE").upper()
    if "FID" in data_type:
        raise InvalidInputError(
            f"{block.get('TITLE')!r} is a raw FID.",
            hint="Export the transformed spectrum or its peak table.",
            field="text",
        )
    for mark, kind in (("INFRARED", INFRARED), ("NMR", NMR), ("MASS", MASS)):
        if mark in data_type:
            return kind
    return OTHER


Content = tuple[list[float], list[float], list[Peak]]


def _content(block: Block, warnings: list[str]) -> Content:
    if block.get("XYDATA"):
        return (*_curve(block, block.values["XYDATA"], warnings), [])
    if block.pages and block.pages[0].get("DATATABLE"):
        return (*_ntuple_curve(block, warnings), [])
    if block.get("XYPOINTS"):
        points = [_scaled(block, p) for p in read_pairs(_rows(block.values["XYPOINTS"]))]
        _compare(len(points), block.number("NPOINTS"), "points", warnings)
        return [p.x for p in points], [p.y for p in points], []
    for label in ("PEAKTABLE", "PEAKASSIGNMENTS"):
        if block.get(label):
            peaks = _peaks(label, block.values[label])
            _compare(len(peaks), block.number("NPOINTS"), "peaks", warnings)
            return [], [], peaks
    raise InvalidInputError(
        f"{block.get('TITLE')!r} holds no data table that can be read.",
        hint="XYDATA, XYPOINTS, PEAK TABLE, PEAK ASSIGNMENTS and NTUPLES of NMR spectra are read.",
        field="text",
    )


def _peaks(label: str, value: str) -> list[Peak]:
    form = value.split("\n", 1)[0]
    if label == "PEAKASSIGNMENTS" or "A)" in form.upper():
        return read_assignments(_rows(value))
    return read_pairs(_rows(value), 3 if re.search(r"XY[WM]", form.upper()) else 2)


def _rows(value: str) -> str:
    """The table below the line that names its form."""
    return value.split("\n", 1)[1] if "\n" in value else ""


def _scaled(block: Block, point: Peak) -> Peak:
    x_factor, y_factor = (block.number(label) or 1.0 for label in ("XFACTOR", "YFACTOR"))
    return Peak(point.x * x_factor, point.y * y_factor)


def _curve(block: Block, value: str, warnings: list[str]) -> tuple[list[float], list[float]]:
    form = value.split("\n", 1)[0].replace(" ", "").upper()
    if not form.startswith("(X++(Y"):
        points = [_scaled(block, p) for p in read_pairs(_rows(value))]
        return [p.x for p in points], [p.y for p in points]
    first, last, count = (block.number(label) for label in ("FIRSTX", "LASTX", "NPOINTS"))
    x_factor, y_factor = (block.number(label) or 1.0 for label in ("XFACTOR", "YFACTOR"))
    delta = block.number("DELTAX")
    first_y = block.number("FIRSTY")
    return _laid_out(_rows(value), (first, last, count, delta), (x_factor, y_factor), first_y, warnings)


def _ntuple_curve(block: Block, warnings: list[str]) -> tuple[list[float], list[float]]:
    """The first page of an NTUPLES block: the real part of an NMR spectrum."""
    number = {
        label: _as_number(_ntuple_cell(block, label, 0)) for label in ("FIRST", "LAST", "VARDIM", "FACTOR")
    }
    y_factor = _as_number(_ntuple_cell(block, "FACTOR", 1)) or 1.0
    axis = (number["FIRST"], number["LAST"], number["VARDIM"], None)
    rows = _rows(block.pages[0]["DATATABLE"])
    return _laid_out(rows, axis, (number["FACTOR"] or 1.0, y_factor), None, warnings)


def _ntuple_cell(block: Block, label: str, column: int) -> str:
    cells = [cell.strip() for cell in block.get(label).split(",")]
    return cells[column] if block.pages and column < len(cells) else ""


def _as_number(text: str) -> float | None:
    try:
        return float(text)
    except ValueError:
        return None


Axis = tuple[float | None, float | None, float | None, float | None]


def _laid_out(
    rows: str, axis: Axis, factors: tuple[float, float], first_y: float | None, warnings: list[str]
) -> tuple[list[float], list[float]]:
    """Abscissas and ordinates of a table (X++(Y..Y)), every check of the file carried out."""
    table = decode(rows)
    first, last, count, delta = axis
    x_factor, y_factor = factors
    first = table.starts[0][0] * x_factor if first is None and table.starts else first or 0.0
    if last is not None and count and count > 1:
        delta = (last - first) / (count - 1)
    if table.failed_checks:
        warnings.append(f"{table.failed_checks} lines disagree with the line before them (Y check).")
    _compare(len(table.y), count, "points", warnings)
    step = delta if delta else 1.0
    _check_lines(table.starts, first, step, x_factor, warnings)
    pairs = [(first + i * step, y * y_factor) for i, y in enumerate(table.y) if y is not None]
    if first_y is not None and pairs and abs(pairs[0][1] - first_y) > abs(y_factor) + 1e-3 * abs(first_y):
        warnings.append(f"The first ordinate is {pairs[0][1]:g}, FIRSTY says {first_y:g}.")
    return [x for x, _ in pairs], [y for _, y in pairs]


def _check_lines(
    starts: list[tuple[float, int]], first: float, step: float, x_factor: float, warnings: list[str]
) -> None:
    off = [
        k
        for k, (x, i) in enumerate(starts)
        if abs(x * x_factor - (first + i * step)) > abs(step) + abs(x_factor)
    ]
    if off:
        warnings.append(
            f"{len(off)} lines do not begin at the X they should (the first is line {off[0] + 1})."
        )


def _compare(found: int, told: float | None, what: str, warnings: list[str]) -> None:
    if told is not None and found != round(told):
        warnings.append(f"The file announces {told:g} {what} and holds {found}.")


def _axis(unit: str, kind: str, mhz: float | None) -> tuple[Callable[[float], float], str]:
    """How to turn X of a file into the usual unit of its kind, and that unit."""
    if kind == NMR:
        if unit == "PPM":
            return _same, "ppm"
        return (lambda hz: hz / mhz, "ppm") if mhz else (_same, "Hz")
    if kind == INFRARED:
        if unit.startswith("MICRO"):
            return (lambda um: _UM_PER_CM / um if um else 0.0), "cm-1"
        if unit.startswith("NANO"):
            return (lambda nm: _NM_PER_CM / nm if nm else 0.0), "cm-1"
        return _same, "cm-1"
    return _same, "m/z" if kind == MASS else unit.lower()


def _same(value: float) -> float:
    return value
