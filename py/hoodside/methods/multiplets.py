"""Multiplets and traces: spin systems, a structure's 1H trace at any field, J from printed lines."""

from __future__ import annotations

from math import isfinite
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.methods.arguments import integer
from hoodside.methods.signature import check_arguments
from hoodside.methods.structures import structure_of
from hoodside.predict.spins import Trace, envelope
from hoodside.predict.spins.contract import fit_from_json, lines_to_json, observed_line, spins_from_json
from hoodside.predict.spins.model import LineList
from hoodside.predict.spins.molecule import FIELDS, simulate_groups
from hoodside.predict.spins.multiplet_reading import MultipletReading, read_multiplet
from hoodside.predict.spins.partners import find_partners
from hoodside.predict.spins.structure_fit import fit_structure
from hoodside.predict.whole import USUAL_MHZ, USUAL_SOLVENT, predict_all
from hoodside.readings.fields import Span, number, rows
from hoodside.readings.from_json import readings_from_json
from hoodside.readings.solvents import solvent_asked

_FIELD = Span("field", *FIELDS, "MHz")
_SHIFT = Span("shift", -60, 60, "ppm")
_LINE = Span("line", -60_000, 60_000, "Hz or ppm")
_HEIGHT = Span("height", 0, 1e12)
_WIDTH = Span("line width", 0.05, 200, "Hz")
#: Exchangeable H come out this broad, Hz.
_BROAD = 12.0
_POINTS = 1600
#: Share of the strongest line below which a stick is not sent to the screen.
_SEEN = 0.002


def spins(**system: Any) -> dict[str, Any]:
    """Lines of one spin system; see ``predict.spins.contract``."""
    return spins_from_json(system)


def fit(**observed: Any) -> dict[str, Any]:
    """Shifts and J fitted to observed lines: of a spin system, or of the structure given as ``smiles``.

    See ``predict.spins.contract`` for systems.
    """
    if "smiles" not in observed:
        return fit_from_json(observed)
    check_arguments("a fit of a structure", _structure_fit, observed)
    return _structure_fit(**observed)


def _structure_fit(
    smiles: str,
    lines: list[Any],
    solvent: str = USUAL_SOLVENT,
    mhz: float = USUAL_MHZ,
    n: int | None = None,
) -> dict[str, Any]:
    """The groups of a structure that lie where the lines are (of ``n`` H, when given), fitted to them."""
    structure = structure_of(smiles, "smiles")
    field = number(mhz or USUAL_MHZ, "mhz", _FIELD)
    chosen = solvent_asked(solvent, "solvent", USUAL_SOLVENT)
    seen = rows(lines, "lines", lambda entry, path: observed_line(entry, path, field))
    if len(seen) < 2:
        raise InvalidInputError(
            f"{len(seen)} lines cannot be fitted.", hint="Give two lines or more.", field="lines"
        )
    hydrogens = None if n is None else integer(n, "n", 1, 200)
    groups = predict_all(structure, chosen, field).h1
    found = fit_structure(structure, groups, chosen, field, seen, hydrogens)
    return {
        "mhz": field,
        "groups": list(found.groups),
        "shifts": [
            {
                "group": s.group,
                "atoms": list(groups[s.group].atoms),
                "predicted_ppm": round(s.predicted, 3),
                "ppm": round(s.ppm, 4),
                "uncertain_hz": _finite(s.uncertain_hz),
            }
            for s in found.shifts
        ],
        "couplings": [
            {
                "groups": list(c.groups),
                "predicted_hz": round(c.predicted, 1),
                "hz": round(c.hz, 2),
                "uncertain_hz": _finite(c.uncertain_hz),
            }
            for c in found.couplings
        ],
        "rms_hz": round(found.fit.rms_hz, 3),
        "lines": lines_to_json(found.fit.lines, field, _SEEN),
    }


def _finite(hz: float) -> float | None:
    return round(hz, 2) if isfinite(hz) else None


def trace(
    smiles: str,
    solvent: str = USUAL_SOLVENT,
    mhz: float = USUAL_MHZ,
    linewidth_hz: float = 1.0,
    from_ppm: float | None = None,
    to_ppm: float | None = None,
    points: int = _POINTS,
) -> dict[str, Any]:
    """The simulated 1H trace of a structure at a field, with its groups and the lines of each spin system."""
    structure = structure_of(smiles, "smiles")
    field = number(mhz or USUAL_MHZ, "mhz", _FIELD)
    width = number(linewidth_hz, "linewidth_hz", _WIDTH)
    chosen = solvent_asked(solvent, "solvent", USUAL_SOLVENT)
    groups = predict_all(structure, chosen, field).h1
    systems = simulate_groups(structure, groups, chosen, field)
    lo, hi = _ends([g.ppm for g in groups], from_ppm, to_ppm)
    heights = [0.0] * integer(points, "points", 2, 20_000)
    for system in systems:
        broad = max(width, _BROAD) if system.broad else width
        _add(heights, system.lines, lo * field, hi * field, broad)
    top = max(heights, default=0.0) or 1.0
    return {
        "mhz": field,
        "from_ppm": lo,
        "step_ppm": (hi - lo) / (len(heights) - 1),
        "heights": [round(h / top, 5) for h in heights],
        "systems": [
            {
                "groups": list(system.groups),
                "broad": system.broad,
                "method": system.lines.method,
                "error_hz": round(system.lines.error_hz, 4),
                "lines": lines_to_json(system.lines, field, _SEEN),
            }
            for system in systems
        ],
        "h1": [
            {
                "ppm": round(g.ppm, 3),
                "n": g.n,
                "mult": g.mult,
                "j": [round(j, 1) for j in g.j],
                "atoms": list(g.atoms),
            }
            for g in groups
        ],
    }


def multiplet(
    lines: list[Any], heights: list[Any] | None = None, mhz: float = USUAL_MHZ, unit: str = "ppm"
) -> dict[str, Any]:
    """Pattern and J of one multiplet from its printed lines (``unit`` "ppm" or "hz") and rough heights."""
    field = number(mhz or USUAL_MHZ, "mhz", _FIELD)
    scale = 1.0 if unit == "hz" else field
    found = rows(lines, "lines", lambda entry, path: number(entry, path, _LINE) * scale)
    sizes = rows(heights, "heights", lambda entry, path: number(entry, path, _HEIGHT)) if heights else None
    analysis = read_multiplet(found, sizes)
    return {
        "readings": [_reading(r, field) for r in analysis.readings],
        "warnings": list(analysis.warnings),
        "spacings_hz": [round(b - a, 2) for a, b in zip(sorted(found), sorted(found)[1:], strict=False)],
    }


def partners(h1: list[Any], mhz: float | None = None) -> dict[str, Any]:
    """Which 1H signals share a J within the measuring error, and which J stand alone.

    With the field, ``times`` says how many J the two signals lie apart.
    """
    field = None if mhz is None else number(mhz, "mhz", _FIELD)
    signals = readings_from_json({"h1": h1}).h1
    shared, lone = find_partners(signals)
    return {
        "shared": [
            {
                "a": s.a,
                "b": s.b,
                "hz": round((s.hz_a + s.hz_b) / 2, 1),
                "counts_fit": s.counts_fit,
                **({} if field is None else {"times": round(s.times_apart(signals, field), 1)}),
            }
            for s in shared
        ],
        "lone": [{"signal": entry.signal, "hz": entry.hz} for entry in lone],
    }


def _reading(found: MultipletReading, mhz: float) -> dict[str, Any]:
    return {
        "pattern": found.pattern,
        "j": [round(j, 2) for j in found.j],
        "partners": [s.count for s in found.splittings],
        "centre_ppm": found.centre_hz / mhz,
        "centre_hz": found.centre_hz,
        "rms_hz": round(found.rms_hz, 3),
        "shifts_ppm": [hz / mhz for hz in sorted(found.shifts_hz, reverse=True)],
    }


def _ends(shifts: list[float], from_ppm: float | None, to_ppm: float | None) -> tuple[float, float]:
    """Low and high end of the trace, ppm: as asked, else all signals with a margin."""
    if from_ppm is not None and to_ppm is not None:
        ends = number(from_ppm, "from_ppm", _SHIFT), number(to_ppm, "to_ppm", _SHIFT)
        if ends[0] != ends[1]:
            return min(ends), max(ends)
    return (min(shifts, default=0.0) - 0.5, max(shifts, default=10.0) + 0.5)


def _add(heights: list[float], lines: LineList, lo_hz: float, hi_hz: float, width: float) -> None:
    """Add a system's envelope: between its points where the trace has more, else the highest of each step."""
    drawn = envelope(lines, lo_hz, hi_hz, max(width, (hi_hz - lo_hz) / 20_000))
    step = (hi_hz - lo_hz) / (len(heights) - 1)
    between = _between if step < drawn.step_hz else _highest
    for place, height in enumerate(between(drawn, step, len(heights))):
        heights[place] += height


def _between(drawn: Trace, step: float, points: int) -> list[float]:
    """Heights at finer steps than those of the envelope, on straight lines between its points."""
    last = len(drawn.heights) - 1
    found = []
    for place in range(points):
        at = place * step / drawn.step_hz
        k = min(int(at), last - 1)
        found.append(drawn.heights[k] + (drawn.heights[k + 1] - drawn.heights[k]) * min(at - k, 1.0))
    return found


def _highest(drawn: Trace, step: float, points: int) -> list[float]:
    """The highest point of the envelope within each step, so that no narrow line is lost."""
    found = [0.0] * points
    for k, height in enumerate(drawn.heights):
        place = min(round(k * drawn.step_hz / step), points - 1)
        found[place] = max(found[place], height)
    return found
