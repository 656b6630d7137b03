"""The AB quartet: two coupled nuclei whose shifts differ by little more than J."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from math import hypot, sqrt

from hoodside.errors import InvalidInputError

#: Hz by which the outer gaps may differ.
_GAP_ERROR = 0.6
#: Factor by which the height ratio may differ from the one the positions ask for.
_RATIO_ERROR = 1.6
#: Height ratio above which it may be smaller than that: heights by eye hardly go further.
CLEAR_ROOF = 2.0


@dataclass(frozen=True, slots=True)
class AbQuartet:
    """What four lines say when read as an AB quartet. All in Hz."""

    j: float
    difference: float  # between the two shifts
    centre: float
    ratio: float  # height of inner over outer lines, from the positions

    @property
    def shifts(self) -> tuple[float, float]:
        """Both shifts, lower first."""
        return self.centre - self.difference / 2, self.centre + self.difference / 2


def ab_lines(low: float, high: float, j: float) -> list[tuple[float, float]]:
    """(Hz, intensity) of the four lines of an AB system, rising; intensities add up to 2.

    Source: closed form of Pople, Schneider and Bernstein, High-resolution Nuclear Magnetic Resonance, 1959,
    section 6-4: with C = sqrt(difference^2 + J^2), intensities 1 - J/C (outer) and 1 + J/C (inner).
    """
    c = hypot(high - low, j)
    centre, sine = (low + high) / 2, (abs(j) / c if c else 1.0)
    outer, inner = (c + abs(j)) / 2, (c - abs(j)) / 2
    weak, strong = (1 - sine) / 2, (1 + sine) / 2
    return [
        (centre - outer, weak),
        (centre - inner, strong),
        (centre + inner, strong),
        (centre + outer, weak),
    ]


def read_ab_quartet(hz: Sequence[float], heights: Sequence[float] | None = None) -> AbQuartet | None:
    """Read four lines as an AB quartet: J = f1 - f2 = f3 - f4, difference = sqrt((f1 - f4)(f2 - f3)).

    Args:
        hz: four positions in Hz, any order.
        heights: rough heights; when given they must show the roof that the positions ask for.
    Returns: None when the lines are no AB quartet.
    Raises: InvalidInputError unless there are four lines.
    """
    if len(hz) != 4:
        raise InvalidInputError(
            f"{len(hz)} lines are no AB quartet.", hint="Give four positions in Hz.", field="lines"
        )
    order = sorted(range(4), key=lambda k: hz[k])
    a, b, c, d = (hz[k] for k in order)
    if abs((b - a) - (d - c)) > _GAP_ERROR or c <= b:
        return None
    found = AbQuartet(
        ((b - a) + (d - c)) / 2, sqrt((d - a) * (c - b)), (a + b + c + d) / 4, (d - a) / (c - b)
    )
    if heights is not None:
        outer, inner = heights[order[0]] + heights[order[3]], heights[order[1]] + heights[order[2]]
        seen = inner / outer
        if seen > _RATIO_ERROR * found.ratio or (seen < CLEAR_ROOF and seen < found.ratio / _RATIO_ERROR):
            return None
    return found
