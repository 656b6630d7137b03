"""Fitting shifts and couplings of a spin system to the lines of a printout.

The drawn trace of the system is compared with the one the observed lines give, first with broad lines, which
lead from far away, then with narrower ones: total-line-shape fitting (Stephenson and Binsch, J. Magn. Reson.
1980, 37, 395), by the damped least squares of Levenberg and Marquardt.
"""

from __future__ import annotations

from array import array
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass, replace
from math import sqrt

from hoodside.errors import InvalidInputError
from hoodside.predict.spins.clusters import simulate
from hoodside.predict.spins.envelope import Trace, envelope
from hoodside.predict.spins.least_squares import solve_symmetric
from hoodside.predict.spins.model import LineList, SpinSystem

#: Rounds: line width in Hz, and how hard the parameters are held to the prediction (share of the first cost).
_ROUNDS = ((12.0, 0.3), (7.0, 0.1), (4.0, 0.03), (2.0, 0.003), (1.0, 0.0))
#: How far from the prediction shifts and couplings may well be, Hz.
_SHIFT_SPREAD, _COUPLING_SPREAD = 15.0, 1.5
#: Hz beyond the outermost observed line that is compared.
_MARGIN = 15.0
#: Points per line width are thinned by this factor.
_THIN = 2
_STEPS_PER_ROUND = 12
#: Step of the numerical derivative, and change of the parameters that counts as none, Hz.
_NUDGE, _SETTLED = 0.02, 0.002
_FIRST_DAMPING, _MOST_DAMPING = 1e-2, 1e6
#: Sums of squares up to this much larger are as good a fit.
_AS_GOOD = 1.05
#: Most free parameters.
MOST_FREE = 14
#: Share of the strongest line that counts when lines are compared.
_COUNTED = 0.02

#: Groups, or couplings, that share one value: those a symmetry of the molecule makes alike.
Tied = tuple[int, ...]


@dataclass(frozen=True, slots=True)
class Fit:
    """A fitted spin system.

    Attributes:
        system: with the fitted shifts and couplings.
        lines: its lines.
        rms_hz: root mean square distance of the observed lines from the nearest simulated ones, Hz.
        uncertain_hz: standard error per free parameter, Hz: shifts of ``free_shifts``, then couplings.
    """

    system: SpinSystem
    lines: LineList
    rms_hz: float
    uncertain_hz: tuple[float, ...]


def fit_system(
    start: SpinSystem,
    hz: Sequence[float],
    heights: Sequence[float],
    free_shifts: Sequence[int | Tied] | None = None,
    free_couplings: Sequence[int | Tied] | None = None,
) -> Fit:
    """Fit shifts and couplings to observed lines.

    Args:
        start: the system as predicted.
        hz, heights: observed lines; heights in any unit. The lines must be all those of the observed groups
            inside the range they span.
        free_shifts: groups whose shift may move (all observed ones when None); those of one entry together.
        free_couplings: indices in ``start.couplings`` that may change (all when None), likewise.
    Raises: InvalidInputError when nothing is given to fit, or too much.
    """
    shifts = _tied(_observed(start) if free_shifts is None else free_shifts)
    couplings = _tied(range(len(start.couplings)) if free_couplings is None else free_couplings)
    _check(hz, heights, len(shifts) + len(couplings))

    def system_of(values: Sequence[float]) -> SpinSystem:
        return _with_values(start, shifts, couplings, values)

    pairs = sorted(zip(hz, heights, strict=True))
    seen = LineList(array("d", [x for x, _ in pairs]), array("d", [h for _, h in pairs]))
    values = [start.groups[g[0]].hz for g in shifts] + [start.couplings[c[0]][2] for c in couplings]
    spreads = [_SHIFT_SPREAD] * len(shifts) + [_COUPLING_SPREAD] * len(couplings)
    predicted, errors = values, [0.0]
    for width, hold in _ROUNDS:
        difference = _difference(system_of, seen, width)
        held = _held(difference, predicted, spreads, hold)
        values, errors = _round(values, held)
    values, errors = _signed_as_predicted(values, errors, predicted, len(shifts), held)
    found = system_of(values)
    lines = simulate(found)
    return Fit(found, lines, _distance(seen, lines), tuple(errors))


def _tied(entries: Iterable[int | Tied]) -> list[Tied]:
    return [(entry,) if isinstance(entry, int) else entry for entry in entries]


def _observed(system: SpinSystem) -> list[int]:
    return [g for g, nuclei in enumerate(system.groups) if nuclei.observed]


def _check(hz: Sequence[float], heights: Sequence[float], free: int) -> None:
    if not hz or len(hz) != len(heights) or not all(h > 0 for h in heights):
        raise InvalidInputError(
            "There are no lines to fit, or not one height for each.",
            hint="Give positions in Hz and a height above zero for each.",
            field="lines",
        )
    if not 1 <= free <= MOST_FREE:
        raise InvalidInputError(
            f"{free} shifts and couplings cannot be fitted at once.",
            hint=f"Leave 1 to {MOST_FREE} free.",
            field="free",
        )


def _with_values(
    start: SpinSystem, shifts: Sequence[Tied], couplings: Sequence[Tied], values: Sequence[float]
) -> SpinSystem:
    groups, pairs = list(start.groups), list(start.couplings)
    for tied, hz in zip(shifts, values, strict=False):
        for g in tied:
            groups[g] = replace(groups[g], hz=hz)
    for tied, hz in zip(couplings, values[len(shifts) :], strict=True):
        for c in tied:
            pairs[c] = (*pairs[c][:2], hz)
    return SpinSystem(tuple(groups), tuple(pairs))


def _difference(
    system_of: Callable[[Sequence[float]], SpinSystem], seen: LineList, width: float
) -> Callable[[Sequence[float]], list[float]]:
    """Trace of the system minus observed trace, both of unit area over the range compared."""
    lo, hi = seen.hz[0] - _MARGIN - width, seen.hz[-1] + _MARGIN + width

    def drawn(lines: LineList) -> list[float]:
        return _unit(envelope(lines, lo, hi, width, "gaussian"))

    target = drawn(seen)

    def difference(values: Sequence[float]) -> list[float]:
        return [a - b for a, b in zip(drawn(simulate(system_of(values))), target, strict=True)]

    return difference


def _held(
    difference: Callable[[Sequence[float]], list[float]],
    predicted: Sequence[float],
    spreads: Sequence[float],
    hold: float,
) -> Callable[[Sequence[float]], list[float]]:
    """The difference, and after it how far each parameter has gone from its prediction."""
    scale = (hold * _squares(difference(predicted)) / len(predicted)) ** 0.5

    def held(values: Sequence[float]) -> list[float]:
        away = (scale * (v - p) / s for v, p, s in zip(values, predicted, spreads, strict=True))
        return [*difference(values), *away]

    return held


def _unit(trace: Trace) -> list[float]:
    heights = trace.heights[::_THIN]
    area = sum(heights) or 1.0
    return [h / area for h in heights]


def _round(
    values: list[float], difference: Callable[[Sequence[float]], list[float]]
) -> tuple[list[float], list[float]]:
    """Damped least squares at one line width: parameters, and their standard errors."""
    now = difference(values)
    damping, normal = _FIRST_DAMPING, [[0.0]]
    for _ in range(_STEPS_PER_ROUND):
        slopes = [_slope(values, k, now, difference) for k in range(len(values))]
        normal = [[sum(x * y for x, y in zip(a, b, strict=True)) for b in slopes] for a in slopes]
        right = [-sum(x * d for x, d in zip(a, now, strict=True)) for a in slopes]
        values, now, damping, moved = _step(values, now, normal, right, damping, difference)
        if moved < _SETTLED:
            break
    return values, _standard_errors(normal, now)


def _signed_as_predicted(
    values: list[float],
    errors: list[float],
    predicted: Sequence[float],
    first: int,
    difference: Callable[[Sequence[float]], list[float]],
) -> tuple[list[float], list[float]]:
    """Couplings (from index ``first`` on) turned to the predicted sign where the lines do not tell the sign.

    In AA'XX' the lines stay where they are when one of J(AA'), J(XX') changes its sign.
    """
    for k in range(first, len(values)):
        if values[k] * predicted[k] < 0:
            turned = [*values[:k], -values[k], *values[k + 1 :]]
            trial, trial_errors = _round(turned, difference)
            no_worse = _squares(difference(trial)) <= _AS_GOOD * _squares(difference(values))
            if no_worse and trial[k] * predicted[k] > 0:
                values, errors = trial, trial_errors
    return values, errors


def _step(
    values: list[float],
    now: list[float],
    normal: list[list[float]],
    right: list[float],
    damping: float,
    difference: Callable[[Sequence[float]], list[float]],
) -> tuple[list[float], list[float], float, float]:
    """One accepted step: (parameters, difference, damping, largest change)."""
    cost = _squares(now)
    while damping < _MOST_DAMPING:
        changes = solve_symmetric(_damped(normal, damping), right)
        if changes is not None:
            trial = [v + c for v, c in zip(values, changes, strict=True)]
            result = difference(trial)
            if _squares(result) < cost:
                return trial, result, damping / 5, max(abs(c) for c in changes)
        damping *= 4
    return values, now, damping, 0.0


def _damped(normal: list[list[float]], damping: float) -> list[list[float]]:
    top = max(normal[k][k] for k in range(len(normal))) or 1.0
    return [
        [x + (damping * (row[k] + 1e-6 * top) if i == k else 0.0) for i, x in enumerate(row)]
        for k, row in enumerate(normal)
    ]


def _slope(
    values: list[float], k: int, now: list[float], difference: Callable[[Sequence[float]], list[float]]
) -> list[float]:
    nudged = difference([*values[:k], values[k] + _NUDGE, *values[k + 1 :]])
    return [(a - b) / _NUDGE for a, b in zip(nudged, now, strict=True)]


def _squares(values: Sequence[float]) -> float:
    return float(sum(v * v for v in values))


def _standard_errors(normal: list[list[float]], now: list[float]) -> list[float]:
    n = len(normal)
    noise = _squares(now) / max(1, len(now) - n)
    found = []
    for k in range(n):
        unit = [float(i == k) for i in range(n)]
        column = solve_symmetric(_damped(normal, 1e-9), unit)
        found.append((noise * column[k]) ** 0.5 if column and column[k] > 0 else float("inf"))
    return found


def _distance(seen: LineList, lines: LineList) -> float:
    strong = lines.without_weak(_COUNTED).hz
    if not strong:
        return float("inf")
    squares = [min(abs(x - y) for y in strong) ** 2 for x in seen.hz]
    return sqrt(sum(squares) / len(squares))
