"""From the lines of one multiplet back to its couplings.

Systematic first-order analysis of Hoye, Hanson and Vyvyan (J. Org. Chem. 1994, 59, 4096) and Hoye and Zhao
(J. Org. Chem. 2002, 67, 4014): the couplings are distances from the outermost line, every sum of couplings
must again be a line, and all couplings together span the multiplet. Here every set of couplings that passes
is refined by least squares, and the simplest that explains positions and heights is taken.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import groupby, pairwise
from math import comb, isfinite, log2

from hoodside.errors import InvalidInputError
from hoodside.predict.multiplet import Splitting, name_of
from hoodside.predict.spins.ab_quartet import CLEAR_ROOF, ab_lines, read_ab_quartet
from hoodside.predict.spins.least_squares import solve_least_squares

#: Most lines read, and most coupled spins assumed.
MOST_LINES, MOST_PARTNERS = 40, 8
#: Hz: standard deviation of a printed position; furthest a component may lie from its line, and the same
#: for sums of couplings not yet refined, whose errors add up.
_POSITION_SD, _REACH, _LOOSE = 0.2, 1.2, 1.8
#: Standard deviation of a position over that of the distance between lines printed as one.
_CLOSENESS = 0.4
#: Relative and absolute standard deviation of a height (share of all).
_HEIGHT_SD, _HEIGHT_FLOOR = 0.3, 0.01
#: Cost of one more coupling, in units of chi squared; and what equating two couplings may cost.
_PER_COUPLING, _EQUATED = 4.0, 5.0
#: Cost of an AB quartet, in couplings: one J, one difference, and that two nuclei were taken for one signal.
_QUARTET_COSTS = 3
#: Hz: couplings further apart are not tried as equal.
_NEAR_EQUAL = 1.3
#: How far the number of partners may be from what the outermost heights say (powers of two).
_SLACK = 1.3
#: Readings kept, and chi squared above which a worse one is no alternative.
_ALTERNATIVES, _WORSE = 4, 10.0
#: Hz a multiplet may be out of symmetry, and ratio of its halves, before a warning.
_ASYMMETRY, _LEANING = 0.8, 1.35


@dataclass(frozen=True, slots=True)
class MultipletReading:
    """One way to read a multiplet.

    Attributes:
        pattern: ACS name, largest J first.
        splittings: J in Hz and number of partners per letter.
        centre_hz: middle of the multiplet, Hz.
        rms_hz: root mean square distance of the lines from the reading, Hz.
        score: chi squared of positions and heights plus the cost of each coupling; the smaller the better.
        shifts_hz: both shifts of an AB quartet, which lie where no line is; empty for first-order patterns.
    """

    pattern: str
    splittings: tuple[Splitting, ...]
    centre_hz: float
    rms_hz: float
    score: float
    shifts_hz: tuple[float, ...] = ()

    @property
    def j(self) -> tuple[float, ...]:
        """J in Hz, one per letter."""
        return tuple(s.hz for s in self.splittings)


@dataclass(frozen=True, slots=True)
class MultipletAnalysis:
    """Readings of a multiplet, best first (empty when none fits), and what to beware of."""

    readings: tuple[MultipletReading, ...]
    warnings: tuple[str, ...]


def read_multiplet(hz: Sequence[float], heights: Sequence[float] | None = None) -> MultipletAnalysis:
    """Find pattern and J of one multiplet from its lines.

    Args:
        hz: line positions in Hz, in any order.
        heights: rough heights in any unit, one per line; without them fewer patterns can be told apart.
    Raises: InvalidInputError for no or too many lines, or heights that do not fit.
    """
    lines, sizes = _checked(hz, heights)
    found = sorted([*_readings(lines, sizes), *_quartets(lines, sizes)], key=lambda r: r.score)
    kept = [r for r in found if r.score <= found[0].score + _WORSE]
    unique = list({r.pattern: r for r in reversed(kept)}.values())
    unique.sort(key=lambda r: r.score)
    return MultipletAnalysis(tuple(unique[:_ALTERNATIVES]), _warnings(lines, sizes, found))


def _checked(hz: Sequence[float], heights: Sequence[float] | None) -> tuple[list[float], list[float] | None]:
    if not 1 <= len(hz) <= MOST_LINES or not all(isfinite(x) for x in hz):
        raise InvalidInputError(
            f"{len(hz)} lines cannot be read as one multiplet.",
            hint=f"Give 1 to {MOST_LINES} positions in Hz.",
            field="lines",
        )
    order = sorted(range(len(hz)), key=lambda k: hz[k])
    if heights is None:
        return [hz[k] for k in order], None
    if len(heights) != len(hz) or not all(h > 0 for h in heights):
        raise InvalidInputError(
            "The heights do not fit the lines.", hint="Give one height above zero per line.", field="heights"
        )
    total = sum(heights)
    return [hz[k] for k in order], [heights[k] / total for k in order]


def _readings(lines: list[float], heights: list[float] | None) -> Iterator[MultipletReading]:
    for couplings in _candidate_sets(lines, heights):
        fitted = _fitted(lines, heights, [Splitting(j, len(list(same))) for j, same in groupby(couplings)])
        if fitted is not None:
            yield _simplified(lines, heights, fitted)


def _quartets(lines: list[float], heights: list[float] | None) -> Iterator[MultipletReading]:
    """Four lines as an AB quartet: two strongly coupled nuclei in place of one with two partners."""
    found = read_ab_quartet(lines, heights) if len(lines) == 4 else None
    if found is None:
        return
    made = ab_lines(*found.shifts, found.j)
    away = [x - hz for x, (hz, _) in zip(lines, made, strict=True)]
    score = sum((d / _POSITION_SD) ** 2 for d in away) + _PER_COUPLING * _QUARTET_COSTS
    if heights is not None:
        seen = (heights[1] + heights[2]) / (heights[0] + heights[3])
        ratio = seen if CLEAR_ROOF <= seen < found.ratio else found.ratio
        outer = 0.5 / (1 + ratio)
        score += _height_chi(heights, [outer, 0.5 - outer, 0.5 - outer, outer])
    rms = (sum(d * d for d in away) / len(lines)) ** 0.5
    yield MultipletReading("ABq", (Splitting(found.j, 1),), found.centre, rms, score, found.shifts)


def _candidate_sets(lines: list[float], heights: list[float] | None) -> Iterator[tuple[float, ...]]:
    """Rising couplings whose every sum is a line and that together span the multiplet."""
    last = lines[-1]
    # Distances from both ends, averaged: a first-order multiplet is symmetric.
    offsets = [(a - lines[0] + last - b) / 2 for a, b in zip(lines, reversed(lines), strict=True)]
    span = offsets[-1]
    if len(lines) == 1:
        yield ()
        return
    for partners in _partner_numbers(len(lines), heights):
        yield from _grow((), (0.0,), offsets, span, partners)


def _partner_numbers(count: int, heights: list[float] | None) -> range:
    least = max(1, (count - 1).bit_length()) if heights is None else 1
    most = min(MOST_PARTNERS, count)
    if heights is None:
        return range(1, most + 1)
    expected = -log2((heights[0] + heights[-1]) / 2)
    return range(max(least, round(expected - _SLACK)), min(most, round(expected + _SLACK)) + 1)


def _grow(
    chosen: tuple[float, ...], sums: tuple[float, ...], offsets: list[float], span: float, left: int
) -> Iterator[tuple[float, ...]]:
    rest = span - sums[-1]
    smallest = chosen[-1] if chosen else 0.0
    if left == 1:
        if rest >= smallest - _LOOSE and _all_lines(sums, rest, offsets):
            yield (*chosen, rest)
        return
    for j in _next_couplings(smallest, offsets):
        if j * left > rest + _LOOSE * left:
            break
        if _all_lines(sums, j, offsets):
            grown = tuple(sorted([*sums, *(s + j for s in sums)]))
            yield from _grow((*chosen, j), grown, offsets, span, left - 1)


def _next_couplings(smallest: float, offsets: list[float]) -> list[float]:
    fresh = [d for d in offsets[1:] if d > smallest + 0.05]
    return ([smallest] if smallest else []) + fresh


def _all_lines(sums: Sequence[float], j: float, offsets: list[float]) -> bool:
    return all(min(abs(s + j - d) for d in offsets) <= _LOOSE for s in sums)


def _simplified(
    lines: list[float], heights: list[float] | None, reading: MultipletReading
) -> MultipletReading:
    """Equate near couplings, nearest first, as long as the fit does not suffer."""
    while True:
        gaps = sorted(
            (a.hz - b.hz, k)
            for k, (a, b) in enumerate(pairwise(reading.splittings))
            if a.hz - b.hz <= _NEAR_EQUAL
        )
        for _, k in gaps:
            simpler = _fitted(lines, heights, _equated(reading.splittings, k))
            if simpler is not None and simpler.score <= reading.score + _EQUATED - _PER_COUPLING:
                reading = simpler
                break
        else:
            return reading


def _equated(parts: Sequence[Splitting], k: int) -> list[Splitting]:
    a, b = parts[k], parts[k + 1]
    n = a.count + b.count
    return [*parts[:k], Splitting((a.hz * a.count + b.hz * b.count) / n, n), *parts[k + 2 :]]


def _fitted(
    lines: list[float], heights: list[float] | None, parts: Sequence[Splitting]
) -> MultipletReading | None:
    """Refine J and centre; None when a line or a component is left over."""
    parts = sorted(parts, key=lambda s: -s.hz)
    centre = (lines[0] + lines[-1]) / 2
    for _ in range(3):
        given = _assigned(lines, parts, centre, _LOOSE)
        if given is None:
            return None
        # Solved for the change, so that couplings the lines cannot tell apart stay together.
        rows = [[1.0, *line.means] for line in given]
        away = _away(lines, given, parts, centre)
        for line in given:
            for apart in line.gaps:
                rows.append([0.0, *(_CLOSENESS * step for step in apart)])
                away.append(-_CLOSENESS * _dot(apart, parts))
        solved = solve_least_squares(rows, away)
        if solved is None:
            return None
        centre += solved[0]
        values = [s.hz + change for s, change in zip(parts, solved[1:], strict=True)]
        if min(values, default=1.0) <= 0:
            return None
        parts = [Splitting(v, s.count) for v, s in zip(values, parts, strict=True)]
        parts.sort(key=lambda s: -s.hz)
    return _judged(lines, heights, parts, centre)


def _assigned(
    lines: list[float], parts: Sequence[Splitting], centre: float, reach: float
) -> list[_Line] | None:
    """What the components under every line say.

    Components go to the lines in order, every line taking at least one; None when that needs a step of more
    than ``reach`` Hz.
    """
    found = sorted((centre + _dot(steps, parts), steps, share) for steps, share in _components(parts))
    if len(found) < len(lines):
        return None
    gathered: list[list[tuple[tuple[float, ...], float]]] = [[] for _ in lines]
    for (at, steps, share), k in zip(found, _in_order(lines, [f[0] for f in found]), strict=True):
        if abs(lines[k] - at) > reach:
            return None
        gathered[k].append((steps, share))
    return [_line(entries, len(parts)) for entries in gathered]


def _in_order(lines: list[float], components: list[float]) -> list[int]:
    """Line of each component: the monotone assignment that leaves no line out, least squares of distance."""
    far = float("inf")
    cost, steps = [0.0, *[far] * (len(lines) - 1)], []
    cost[0] = (components[0] - lines[0]) ** 2
    for at in components[1:]:
        moved = [far, *cost[:-1]]
        steps.append([m < c for m, c in zip(moved, cost, strict=True)])
        cost = [min(m, c) + (at - x) ** 2 for m, c, x in zip(moved, cost, lines, strict=True)]
    k = len(lines) - 1
    path = [k]
    for step in reversed(steps):
        k -= step[k]
        path.append(k)
    return path[::-1]


@dataclass(frozen=True, slots=True)
class _Line:
    """A printed line: d(position)/dJ of its middle and of gaps between its components, and its intensity."""

    means: list[float]
    gaps: list[tuple[float, ...]]
    share: float


def _line(entries: list[tuple[tuple[float, ...], float]], size: int) -> _Line:
    total = sum(share for _, share in entries)
    means = [sum(steps[k] * share for steps, share in entries) / total for k in range(size)]
    gaps = [
        tuple(b - a for a, b in zip(first, second, strict=True))
        for (first, _), (second, _) in pairwise(entries)
    ]
    return _Line(means, gaps, total)


def _dot(steps: Sequence[float], parts: Sequence[Splitting]) -> float:
    return sum(m * s.hz for m, s in zip(steps, parts, strict=True))


def _components(parts: Sequence[Splitting]) -> list[tuple[tuple[float, ...], float]]:
    found: list[tuple[tuple[float, ...], float]] = [((), 1.0)]
    for s in parts:
        found = [
            ((*steps, k - s.count / 2), share * comb(s.count, k) / 2**s.count)
            for steps, share in found
            for k in range(s.count + 1)
        ]
    return found


def _away(
    lines: list[float], given: Sequence[_Line], parts: Sequence[Splitting], centre: float
) -> list[float]:
    """Distance in Hz of each line from the middle of its components."""
    return [x - centre - _dot(line.means, parts) for x, line in zip(lines, given, strict=True)]


def _judged(
    lines: list[float], heights: list[float] | None, parts: Sequence[Splitting], centre: float
) -> MultipletReading | None:
    given = _assigned(lines, parts, centre, _REACH)
    if given is None:
        return None
    away = _away(lines, given, parts, centre)
    score = sum((d / _POSITION_SD) ** 2 for d in away) + _PER_COUPLING * len(parts)
    score += sum(
        (_CLOSENESS * _dot(apart, parts) / _POSITION_SD) ** 2 for line in given for apart in line.gaps
    )
    if heights is not None:
        score += _height_chi(heights, [line.share for line in given])
    rms = (sum(d * d for d in away) / len(lines)) ** 0.5
    return MultipletReading(name_of(parts), tuple(parts), centre, rms, score)


def _height_chi(heights: Sequence[float], shares: Sequence[float]) -> float:
    return sum(
        ((h - share) / (_HEIGHT_SD * share + _HEIGHT_FLOOR)) ** 2
        for h, share in zip(heights, shares, strict=True)
    )


def _warnings(
    lines: list[float], heights: list[float] | None, found: Sequence[MultipletReading]
) -> tuple[str, ...]:
    said = []
    if all(reading.shifts_hz for reading in found):
        said.append("No set of couplings explains these lines to first order.")
    middle = lines[0] + lines[-1]
    skew = max(abs(a + b - middle) for a, b in zip(lines, reversed(lines), strict=True))
    if skew > _ASYMMETRY:
        said.append(
            f"The lines are {skew:.1f} Hz out of symmetry: overlap, or not first order at this field."
        )
    if heights is not None and len(lines) > 1:
        half = len(lines) // 2
        low, high = sum(heights[:half]), sum(heights[-half:])
        if max(low, high) > _LEANING * min(low, high):
            side = "higher" if high > low else "lower"
            said.append(f"The pattern leans to {side} shift: a strongly coupled partner lies there.")
    return tuple(said)
