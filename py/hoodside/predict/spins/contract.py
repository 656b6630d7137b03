"""Spin simulation as JSON in, JSON out (the ``spins`` command).

In: {"mhz": 60, "nuclei": [{"ppm": 7.1, "count": 1}, ...], "j": [[0, 1, 8.6], ...], "linewidth_hz": 1.0}; a
nucleus may carry "element" ("H", "F" or "P"; F and P split lines but are not observed and need no "ppm").
With "trace": true (or "lorentzian" or "gaussian") the drawn trace comes along, from "from_ppm" to "to_ppm".
Out: {"lines": [{"ppm", "hz", "intensity"}, ...], "method": "exact" or "clusters"}, by rising ppm; hz is from
the reference, intensities add up to the number of H.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from math import isfinite
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.predict.spins.clusters import simulate
from hoodside.predict.spins.envelope import SHAPES, Trace, envelope
from hoodside.predict.spins.fit import fit_system
from hoodside.predict.spins.model import LineList, Nuclei, SpinSystem
from hoodside.predict.spins.molecule import check_field

#: Largest input answered.
MOST_GROUPS, MOST_COUNT = 60, 36
#: Lines weaker than this share of the strongest are not listed.
_LISTED = 1e-6
#: The same for lines that are only drawn.
_DRAWN = 1e-3
#: Range of a shift, ppm, and of a coupling, Hz.
_SHIFTS, _COUPLINGS = (-60.0, 60.0), (-1000.0, 1000.0)
_WIDTHS = (0.01, 200.0)
_USUAL_WIDTH = 1.0
#: Nothing measured reaches this; compared before turning an integer, however long, into a float.
_BEYOND = 1e15
#: Widths beyond the outermost lines that a trace takes in when its ends are not given.
_MARGIN = 25.0
_OBSERVED = {"H": True, "1H": True, "F": False, "19F": False, "P": False, "31P": False}


def spins_from_json(given: Mapping[str, Any]) -> dict[str, Any]:
    """Simulate the spin system of a JSON object (see the module text).

    Raises: InvalidInputError naming the field, its value and the mend.
    """
    mhz, system = system_from_json(given)
    width = _number(given, "linewidth_hz", "", _WIDTHS) if "linewidth_hz" in given else _USUAL_WIDTH
    lines = simulate(system)
    answer: dict[str, Any] = {"lines": lines_to_json(lines, mhz), "method": lines.method}
    if lines.method != "exact":
        answer["error_hz"] = round(lines.error_hz, 4)
    if given.get("trace"):
        answer["trace"] = _trace(given, lines, mhz, width)
    return answer


#: Every key of a system, of a simulation and of a fit.
_KEYS = frozenset(
    {
        *("mhz", "nuclei", "j", "linewidth_hz", "trace", "from_ppm", "to_ppm"),
        *("lines", "free_shifts", "free_j", "id", "name", "note"),
    }
)


def _known(given: Mapping[str, Any]) -> None:
    """A key taken for another one would be a coupling left out without a word."""
    for key in given:
        if key not in _KEYS:
            raise InvalidInputError(
                f"A spin system has no {key!r}.",
                hint='Couplings stand under "j" as [[0, 1, 8.6]], shifts under "nuclei" as [{"ppm": 7.2}].',
                field=str(key),
            )


def system_from_json(given: Mapping[str, Any]) -> tuple[float, SpinSystem]:
    """Field (MHz) and spin system of the "mhz", "nuclei" and "j" of a JSON object.

    Raises: InvalidInputError naming the field, its value and the mend.
    """
    _known(given)
    mhz = _number(given, "mhz", "")
    check_field(mhz)
    nuclei = _list(given.get("nuclei"), "nuclei")
    groups = tuple(_nuclei(entry, k, mhz) for k, entry in enumerate(nuclei))
    return mhz, SpinSystem(groups, _couplings(given.get("j"), len(groups)))


def system_to_json(system: SpinSystem, mhz: float) -> dict[str, Any]:
    """A spin system as ``system_from_json`` reads it."""
    return {
        "mhz": mhz,
        "nuclei": [
            {"ppm": n.hz / mhz, "count": n.count, "label": n.label}
            if n.observed
            else {"element": "F", "count": n.count, "label": n.label}
            for n in system.groups
        ],
        "j": [list(pair) for pair in system.couplings],
    }


def fit_from_json(given: Mapping[str, Any]) -> dict[str, Any]:
    """Fit a spin system to observed lines.

    In: as ``spins_from_json``, with "lines": [{"ppm" or "hz", "height"}, ...] and, where not all is to move,
    "free_shifts" (indices of nuclei) and "free_j" (indices of couplings). Out: "system" with the fitted
    values, "uncertain_hz" (shifts, then couplings), "rms_hz", and its "lines".
    Raises: InvalidInputError naming the field, its value and the mend.
    """
    mhz, system = system_from_json(given)
    lines = _list(given.get("lines"), "lines")
    seen = [observed_line(entry, f"lines[{k}]", mhz) for k, entry in enumerate(lines)]
    fit = fit_system(
        system,
        [hz for hz, _ in seen],
        [height for _, height in seen],
        _indices(given, "free_shifts", len(system.groups)),
        _indices(given, "free_j", len(system.couplings)),
    )
    return {
        "system": system_to_json(fit.system, mhz),
        "uncertain_hz": [round(e, 3) if isfinite(e) else None for e in fit.uncertain_hz],
        "rms_hz": round(fit.rms_hz, 3),
        "lines": lines_to_json(fit.lines, mhz, _DRAWN),
    }


def lines_to_json(lines: LineList, mhz: float, share: float = _LISTED) -> list[dict[str, float]]:
    """Lines as JSON-ready objects, those weaker than a share of the strongest left out."""
    return [
        {"ppm": line.hz / mhz, "hz": line.hz, "intensity": line.intensity}
        for line in lines.without_weak(share)
    ]


def trace_to_json(trace: Trace, mhz: float) -> dict[str, Any]:
    """A trace as JSON-ready fields: first shift and step in ppm, heights relative to the highest."""
    top = max(trace.heights, default=0.0) or 1.0
    return {
        "from_ppm": trace.start_hz / mhz,
        "step_ppm": trace.step_hz / mhz,
        "heights": [round(h / top, 5) for h in trace.heights],
    }


def _trace(given: Mapping[str, Any], lines: LineList, mhz: float, width: float) -> dict[str, Any]:
    shape = given["trace"] if given["trace"] in SHAPES else "lorentzian"
    lo = min(lines.hz, default=0.0) - _MARGIN * width
    hi = max(lines.hz, default=0.0) + _MARGIN * width
    if "from_ppm" in given or "to_ppm" in given:
        ends = [_number(given, name, "", _SHIFTS) * mhz for name in ("from_ppm", "to_ppm")]
        lo, hi = min(ends), max(ends)
    return trace_to_json(envelope(lines, lo, hi, width, shape), mhz)


def _nuclei(entry: Any, index: int, mhz: float) -> Nuclei:
    place = f"nuclei[{index}]"
    if not isinstance(entry, Mapping):
        raise _wrong(place, entry, "is no object", 'Write {"ppm": 7.1, "count": 1}.')
    element = entry.get("element", "H")
    if element not in _OBSERVED:
        raise _wrong(f"{place}.element", element, "is not simulated", "Write H, F or P.")
    count = entry.get("count", 1)
    if isinstance(count, bool) or not isinstance(count, int) or not 1 <= count <= MOST_COUNT:
        raise _wrong(f"{place}.count", count, "is no number of nuclei", f"Give 1 to {MOST_COUNT}.")
    observed = _OBSERVED[element]
    ppm = _number(entry, "ppm", place, _SHIFTS) if observed or "ppm" in entry else 0.0
    return Nuclei(ppm * mhz, count, observed, str(entry.get("label", "")))


def observed_line(entry: Any, place: str, mhz: float) -> tuple[float, float]:
    """(Hz, height) of an object with "ppm" or "hz" and perhaps "height"; ``place`` names it in errors.

    Raises: InvalidInputError naming the field, its value and the mend.
    """
    if not isinstance(entry, Mapping):
        raise _wrong(place, entry, "is no object", 'Write {"ppm": 7.1, "height": 1}.')
    height = _checked(entry.get("height", 1.0), f"{place}.height", (1e-9, 1e12))
    if "hz" in entry:
        return _checked(entry["hz"], f"{place}.hz", None), height
    return _number(entry, "ppm", place, _SHIFTS) * mhz, height


def _indices(given: Mapping[str, Any], name: str, size: int) -> list[int] | None:
    if name not in given:
        return None
    entries = _list(given[name], name, allow_empty=True)
    for k, value in enumerate(entries):
        if isinstance(value, bool) or not isinstance(value, int) or not 0 <= value < size:
            raise _wrong(f"{name}[{k}]", value, "is out of range", f"Count from 0 to {size - 1}.")
    return list(entries)


def _couplings(given: Any, groups: int) -> tuple[tuple[int, int, float], ...]:
    entries = [] if given is None else _list(given, "j", allow_empty=True)
    found: dict[tuple[int, int], float] = {}
    for k, entry in enumerate(entries):
        a, b, hz = _coupling(entry, f"j[{k}]", groups)
        pair = (min(a, b), max(a, b))
        if pair in found:
            raise _wrong(f"j[{k}]", entry, "couples a pair that was given before", "Give each pair once.")
        found[pair] = hz
    return tuple((a, b, hz) for (a, b), hz in found.items())


def _coupling(entry: Any, place: str, groups: int) -> tuple[int, int, float]:
    if not isinstance(entry, Sequence) or isinstance(entry, str) or len(entry) != 3:
        raise _wrong(place, entry, "is no coupling", "Write [0, 1, 8.6]: two nuclei and J in Hz.")
    a, b, hz = entry
    for nucleus in (a, b):
        if isinstance(nucleus, bool) or not isinstance(nucleus, int) or not 0 <= nucleus < groups:
            raise _wrong(place, nucleus, "is no entry of nuclei", f"Count from 0 to {groups - 1}.")
    if a == b:
        raise _wrong(place, entry, "couples a nucleus with itself", "Give two different entries of nuclei.")
    return a, b, _checked(hz, place, _COUPLINGS)


def _list(value: Any, field: str, allow_empty: bool = False) -> Sequence[Any]:
    if not isinstance(value, Sequence) or isinstance(value, str):
        raise _wrong(field, value, "is no list", f'Write "{field}": [...].')
    if not value and not allow_empty:
        raise _wrong(field, value, "is empty", 'Give at least one, such as {"ppm": 7.1}.')
    if field == "nuclei" and len(value) > MOST_GROUPS:
        raise _wrong(field, len(value), "groups are too many", f"Give at most {MOST_GROUPS}.")
    return value


def _number(
    given: Mapping[str, Any], name: str, place: str, limits: tuple[float, float] | None = None
) -> float:
    field = f"{place}.{name}" if place else name
    if name not in given:
        raise _wrong(field, None, "is missing", "Give a number.")
    return _checked(given[name], field, limits)


def _checked(value: Any, field: str, limits: tuple[float, float] | None) -> float:
    if isinstance(value, bool) or not isinstance(value, int | float) or not abs(value) < _BEYOND:
        raise _wrong(field, value, "is no number", "Give a number.")
    if limits and not limits[0] <= value <= limits[1]:
        raise _wrong(field, value, "is out of range", f"Give {limits[0]:g} to {limits[1]:g}.")
    return float(value)


def _wrong(field: str, value: Any, what: str, hint: str) -> InvalidInputError:
    shown = "It" if value is None else f"{value!r}"
    return InvalidInputError(f"{shown[:80]} {what}.", hint=hint, field=field, value=value)
