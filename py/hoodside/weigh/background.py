"""How readings spread over all published compounds: the "some other compound" of every likelihood ratio."""

from __future__ import annotations

from bisect import bisect_right
from dataclasses import dataclass
from functools import cache
from math import fsum

from hoodside.facts import load_table

#: Least share per bin width, so that nothing printed is impossible.
_LEAST = 1e-4


@dataclass(frozen=True, slots=True)
class Spread:
    """A histogram as a distribution function. ``edges`` ascending; ``below`` share under each edge."""

    edges: tuple[float, ...]
    below: tuple[float, ...]

    def share_below(self, x: float) -> float:
        """Share of all values under ``x``."""
        if x <= self.edges[0]:
            return 0.0
        if x >= self.edges[-1]:
            return 1.0
        i = bisect_right(self.edges, x) - 1
        part = (x - self.edges[i]) / (self.edges[i + 1] - self.edges[i])
        return self.below[i] + part * (self.below[i + 1] - self.below[i])

    def between(self, lo: float, hi: float) -> float:
        """Share of all values between ``lo`` and ``hi``, never 0."""
        return max(self.share_below(hi) - self.share_below(lo), _LEAST * (hi - lo))


def proton_spread(n: float | None) -> Spread:
    """Shifts of 1H signals (ppm) that hold ``n`` H."""
    return spread("h1_background", size_class(n))


def size_class(n: float | None) -> str:
    """Signals are counted apart by size: "1", "2", "3" or "more" H; "any" when not told."""
    if n is None:
        return "any"
    return str(max(1, round(n))) if n < 3.5 else "more"


@cache
def spread(table: str, group: str = "any") -> Spread:
    """One histogram of a background table."""
    rows = [row for row in load_table(table) if row["group"] == group]
    total = fsum(float(row["share"]) for row in rows)
    edges, below = [float(rows[0]["lo"])], [0.0]
    for row in rows:
        edges.append(float(row["hi"]))
        below.append(below[-1] + float(row["share"]) / total)
    return Spread(tuple(edges), tuple(below))
