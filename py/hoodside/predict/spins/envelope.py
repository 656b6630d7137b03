"""From a line list to the trace an instrument draws."""

from __future__ import annotations

from array import array
from dataclasses import dataclass
from functools import cache
from math import ceil, exp, floor, log, pi, sqrt

from hoodside.errors import InvalidInputError
from hoodside.predict.spins.model import LineList

#: Shape -> half the range over which a line is drawn, in line widths.
SHAPES = {"lorentzian": 40.0, "gaussian": 3.0}
#: Points per line width.
_FINENESS = 8
#: Share of the highest point below which the skirt of a line is not drawn.
_NEGLIGIBLE = 1e-4
#: Most points of one trace.
_MOST_POINTS = 200_000


@dataclass(frozen=True, slots=True)
class Trace:
    """Heights at equal steps. The area (height times Hz) equals the intensity."""

    start_hz: float
    step_hz: float
    heights: array[float]

    def peaks(self, least: float) -> list[tuple[float, float]]:
        """(Hz, height) of every maximum above a share of the highest, placed by a parabola."""
        h = self.heights
        limit = least * max(h, default=0.0)
        found = []
        for k in range(1, len(h) - 1):
            if h[k] > limit and h[k - 1] < h[k] >= h[k + 1]:
                bend = h[k - 1] - 2 * h[k] + h[k + 1]
                shift = 0.5 * (h[k - 1] - h[k + 1]) / bend if bend else 0.0
                found.append((self.start_hz + (k + shift) * self.step_hz, h[k]))
        return found


def envelope(
    lines: LineList, lo_hz: float, hi_hz: float, width_hz: float = 1.0, shape: str = "lorentzian"
) -> Trace:
    """The trace between two frequencies.

    Args:
        lines: any line list.
        lo_hz, hi_hz: ends of the trace, Hz.
        width_hz: full width of a line at half height, Hz.
        shape: "lorentzian" or "gaussian".
    Raises: InvalidInputError for an unknown shape, a width not above zero, or a trace that is too long.
    """
    if shape not in SHAPES:
        raise InvalidInputError(
            f"{shape!r} is no line shape.",
            hint=f"Write one of {', '.join(SHAPES)}.",
            field="shape",
            value=shape,
        )
    if not width_hz > 0:
        raise InvalidInputError(
            f"A line width of {width_hz!r} Hz is not possible.", hint="Give Hz.", field="linewidth_hz"
        )
    step = width_hz / _FINENESS
    points = ceil((hi_hz - lo_hz) / step) + 1
    if not 1 <= points <= _MOST_POINTS:
        raise InvalidInputError(
            f"A trace from {lo_hz:g} to {hi_hz:g} Hz takes {points} points.",
            hint="Give the ends in order, and a wider line for a wider range.",
        )
    profile = _profile(shape, _FINENESS)
    heights = _spread(_counted(lines, lo_hz, step, points, len(profile) // 2), profile, points)
    return Trace(lo_hz, step, array("d", [h / step for h in heights]))


def _counted(lines: LineList, lo_hz: float, step: float, points: int, margin: int) -> dict[int, float]:
    """Intensity per step, each line shared between the two nearest."""
    bins: dict[int, float] = {}
    for hz, intensity in zip(lines.hz, lines.intensity, strict=True):
        at = (hz - lo_hz) / step
        k = floor(at)
        if -margin < k < points + margin:
            part = at - k
            bins[k] = bins.get(k, 0.0) + intensity * (1 - part)
            bins[k + 1] = bins.get(k + 1, 0.0) + intensity * part
    return bins


def _spread(bins: dict[int, float], profile: list[float], points: int) -> list[float]:
    """Draw every line; weak ones only as far out as they matter beside the strongest."""
    heights = [0.0] * points
    strongest = max(map(abs, bins.values()), default=0.0)
    middle = len(profile) // 2
    for k, intensity in bins.items():
        reach = min(middle, _reach(abs(intensity) / strongest * profile[middle], profile))
        lo, hi = max(k - reach, 0), min(k + reach + 1, points)
        if reach and lo < hi:
            window = profile[middle + lo - k : middle + hi - k]
            heights[lo:hi] = [h + intensity * p for h, p in zip(heights[lo:hi], window, strict=True)]
    return heights


def _reach(height: float, profile: list[float]) -> int:
    """Steps from the middle of a line within which it stands above what is negligible."""
    middle = len(profile) // 2
    least = _NEGLIGIBLE * profile[middle] ** 2 / height if height else float("inf")
    low, high = 0, middle
    while low < high:  # the profile falls outward
        step = (low + high + 1) // 2
        low, high = (step, high) if profile[middle + step] >= least else (low, step - 1)
    return low


@cache
def _profile(shape: str, fineness: int) -> list[float]:
    """A line of unit area per step, its middle in the middle."""
    reach = int(SHAPES[shape] * fineness)
    if shape == "gaussian":
        scale = 4 * log(2) / fineness**2
        values = [exp(-scale * k * k) * sqrt(scale / pi) for k in range(reach + 1)]
    else:
        half = fineness / 2
        values = [half / (pi * (k * k + half * half)) for k in range(reach + 1)]
    return values[:0:-1] + values
