"""Gives each predicted group of hydrogens one printed signal: cheapest assignment, integrals respected."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from scipy.optimize import linear_sum_assignment

#: ppm at which a mismatch is as bad as it gets.
CAP = 3.0
#: Prices in ppm per hydrogen: an exchangeable H not printed, any other H not printed, a hydrogen too many.
UNPRINTED_EXCHANGEABLE, UNPRINTED, MISCOUNT = 0.4, 2.5, 0.7
#: Exchangeable H are nearly free to go anywhere in their range.
EXCHANGEABLE_SLOPE = 0.25


@dataclass(frozen=True)
class Signal:
    """A printed signal: low and high end in ppm, number of H."""

    lo: float
    hi: float
    n: int

    @property
    def ppm(self) -> float:
        return (self.lo + self.hi) / 2


@dataclass(frozen=True)
class Expected:
    """A predicted group as the matching sees it."""

    ppm: float
    n: int
    exchangeable: bool
    lo: float
    hi: float


def read_signals(printed: Sequence[dict]) -> list[Signal]:  # type: ignore[type-arg]
    """Signals of a case, hydrogens rounded to whole numbers."""
    found = []
    for entry in printed:
        lo = float(entry.get("lo", entry.get("ppm")))
        hi = float(entry.get("hi", entry.get("ppm")))
        found.append(Signal(min(lo, hi), max(lo, hi), max(1, round(float(entry.get("n") or 1)))))
    return found


def price(group: Expected, signal: Signal) -> float:
    """ppm between a group and a signal (0 inside a printed range); little for exchangeable H."""
    if group.exchangeable:
        away = max(signal.lo - group.hi, group.lo - signal.hi, 0.0)
        return 0.05 + EXCHANGEABLE_SLOPE * min(away, CAP) + 0.01 * abs(group.ppm - signal.ppm)
    return min(outside(group.ppm, signal) + 0.02 * abs(group.ppm - signal.ppm), CAP)


def outside(ppm: float, signal: Signal) -> float:
    """Distance of a shift from a printed range, ppm."""
    return max(signal.lo - ppm, ppm - signal.hi, 0.0)


def match(groups: Sequence[Expected], signals: Sequence[Signal]) -> list[int]:
    """Index of the signal of each group, -1 where none is left for it."""
    prices = np.array([[price(g, s) for s in signals] for g in groups])
    given = _by_hydrogen(groups, signals, prices)
    whole = [max(set(units), key=units.count) for units in given]
    if all(len(set(units)) == 1 for units in given) and _fills(groups, signals, whole):
        return whole
    return _improve(groups, signals, prices, whole)


def _by_hydrogen(
    groups: Sequence[Expected], signals: Sequence[Signal], prices: np.ndarray
) -> list[list[int]]:
    rows = [i for i, g in enumerate(groups) for _ in range(g.n)]
    columns = [k for k, s in enumerate(signals) for _ in range(s.n)]
    cost = prices[np.ix_(rows, columns)]
    spare = np.array([[_unprinted(groups[i])] * len(rows) for i in rows])
    chosen_rows, chosen = linear_sum_assignment(np.hstack([cost, spare]))
    given: list[list[int]] = [[] for _ in groups]
    for row, column in zip(chosen_rows, chosen, strict=True):
        given[rows[row]].append(columns[column] if column < len(columns) else -1)
    return given


def _unprinted(group: Expected) -> float:
    return UNPRINTED_EXCHANGEABLE if group.exchangeable else UNPRINTED


def _fills(groups: Sequence[Expected], signals: Sequence[Signal], given: Sequence[int]) -> bool:
    return all(
        sum(g.n for g, k in zip(groups, given, strict=True) if k == s) <= signals[s].n
        for s in range(len(signals))
    )


def _improve(
    groups: Sequence[Expected], signals: Sequence[Signal], prices: np.ndarray, start: list[int]
) -> list[int]:
    """Move or exchange whole groups while that lowers the total price."""
    sizes = np.array([g.n for g in groups])
    space = np.array([s.n for s in signals], dtype=float)
    table = np.hstack([prices, np.array([[_unprinted(g)] for g in groups])]) * sizes[:, None]
    given, count = list(start), len(signals)

    def total(state: list[int]) -> float:
        held = np.zeros(count + 1)
        np.add.at(held, state, sizes)
        return float(table[range(len(groups)), state].sum() + MISCOUNT * np.abs(held[:count] - space).sum())

    given = [k if k >= 0 else count for k in given]
    best = total(given)
    for _ in range(20):
        changed = False
        for i in range(len(groups)):
            for trial in _moves(given, i, count):
                value = total(trial)
                if value < best - 1e-9:
                    best, given, changed = value, trial, True
        if not changed:
            break
    return [k if k < count else -1 for k in given]


def _moves(given: list[int], i: int, count: int) -> list[list[int]]:
    found = [[*given[:i], k, *given[i + 1 :]] for k in range(count + 1) if k != given[i]]
    for j in range(i + 1, len(given)):
        if given[j] != given[i]:
            trial = list(given)
            trial[i], trial[j] = trial[j], trial[i]
            found.append(trial)
    return found
