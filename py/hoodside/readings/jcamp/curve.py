"""Peaks of a curve: local maxima by prominence, and thinning for display."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise


@dataclass(frozen=True, slots=True)
class Maximum:
    """A local maximum. ``x`` is refined by a parabola; ``width`` is the full width at half prominence."""

    index: int
    x: float
    height: float
    prominence: float
    width: float


def find_maxima(x: Sequence[float], y: Sequence[float], least: float) -> list[Maximum]:
    """Local maxima whose prominence is at least ``least``, in the order of the curve.

    Prominence is the height above the higher of the two lowest points that part a maximum from anything
    higher on either side. Time is proportional to the length of the curve.
    """
    left, right = _lowest_before(y), _lowest_before(y[::-1])[::-1]
    found = []
    for i in range(1, len(y) - 1):
        if y[i - 1] < y[i] >= y[i + 1]:
            prominence = y[i] - max(left[i], right[i])
            if prominence >= least:
                found.append(Maximum(i, _vertex(x, y, i), y[i], prominence, _width(x, y, i, prominence)))
    return found


def _lowest_before(y: Sequence[float]) -> list[float]:
    """Per point, the lowest value between it and the nearest higher point on its left."""
    lowest: list[float] = []
    stack: list[tuple[float, float]] = []  # (value, lowest since the higher one before it)
    for value in y:
        low = value
        while stack and stack[-1][0] <= value:
            low = min(low, stack.pop()[1])
        if stack:
            low = min(low, value)
        stack.append((value, low))
        lowest.append(low)
    return lowest


def _vertex(x: Sequence[float], y: Sequence[float], i: int) -> float:
    bend = y[i - 1] - 2 * y[i] + y[i + 1]
    shift = 0.5 * (y[i - 1] - y[i + 1]) / bend if bend else 0.0
    return x[i] + shift * (x[i + 1] - x[i - 1]) / 2


def _width(x: Sequence[float], y: Sequence[float], i: int, prominence: float) -> float:
    level = y[i] - prominence / 2
    low, high = i, i
    while low > 0 and y[low] > level:
        low -= 1
    while high < len(y) - 1 and y[high] > level:
        high += 1
    return abs(x[high] - x[low])


def noise(y: Sequence[float]) -> float:
    """Standard deviation of the noise, from the median step between neighbours (robust against peaks)."""
    steps = sorted(abs(b - a) for a, b in pairwise(y))
    # The median of |difference| of two normal values is 0.6745 * sqrt(2) standard deviations.
    return steps[len(steps) // 2] / 0.954 if steps else 0.0


def thinned(x: Sequence[float], y: Sequence[float], most: int) -> tuple[list[float], list[float]]:
    """At most ``most`` points for display: lowest and highest of each stretch, so that no line is lost."""
    if len(x) <= most:
        return list(x), list(y)
    bins = most // 2
    edges = [round(k * len(x) / bins) for k in range(bins + 1)]
    keep: list[int] = []
    for start, end in pairwise(edges):
        stretch = range(start, end)
        if stretch:
            keep += sorted({min(stretch, key=y.__getitem__), max(stretch, key=y.__getitem__)})
    return [x[i] for i in keep], [y[i] for i in keep]
