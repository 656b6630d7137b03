"""Finds the best assignment of predicted groups of H to signals: whole groups, integrals respected.

A signal may hold several groups (overlap) or none (a stranger in the sample); a group goes to one signal or
is missing. First an exact search over assignments that keep the order of shifts (dynamic programming), then
moves and exchanges of single groups while they help. Generic: all chemistry comes in by ``Puzzle``.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass
from itertools import combinations

#: Tolerance below which a change is no gain, decibans.
_GAIN = 1e-6
_SWEEPS = 12
NOWHERE = -1


@dataclass(frozen=True, slots=True)
class Puzzle:
    """What is to be assigned. Lists run over groups, then signals.

    Attributes:
        shifts: predicted shift of each group, ppm.
        sizes: H per group.
        roaming: whether a group keeps no place in the order (exchangeable H).
        places: shifts of the signals, ppm.
        room: H per signal, None when not told.
        missing: weight of a group that no signal shows, decibans.
        suits: rough weight of group g in signal s (decibans), to leave hopeless moves untried.
        score: weight of a signal that holds a set of groups (ascending indices), decibans.
    """

    shifts: Sequence[float]
    sizes: Sequence[int]
    roaming: Sequence[bool]
    places: Sequence[float]
    room: Sequence[float | None]
    missing: Sequence[float]
    suits: Sequence[Sequence[float]]
    score: Callable[[int, tuple[int, ...]], float]


#: A move whose rough weight lies this far below the group's best place is not tried, decibans.
_HOPELESS = 22.0
#: A signal is never offered more H than this beyond its own.
_OVERFULL = 3.0


def assign(puzzle: Puzzle) -> list[int]:
    """The signal of each group, ``NOWHERE`` for missing ones."""
    return _Search(puzzle).run()


class _Search:
    def __init__(self, puzzle: Puzzle) -> None:
        self.puzzle = puzzle
        self.scores: list[dict[tuple[int, ...], float]] = [{} for _ in puzzle.places]
        count = range(len(puzzle.places))
        self.open = [
            [s for s in count if row[s] >= max(row) - _HOPELESS] if row else [] for row in puzzle.suits
        ]

    def run(self) -> list[int]:
        given = self._ordered()
        self._place_roaming(given)
        return self._improved(given)

    def score(self, signal: int, members: Iterable[int]) -> float:
        key = tuple(sorted(members))
        kept = self.scores[signal]
        if key not in kept:
            kept[key] = self.puzzle.score(signal, key)
        return kept[key]

    # Exact search in the order of shifts.

    def _ordered(self) -> list[int]:
        puzzle = self.puzzle
        fixed = sorted((g for g, r in enumerate(puzzle.roaming) if not r), key=lambda g: -puzzle.shifts[g])
        signals = sorted(range(len(puzzle.places)), key=lambda s: -puzzle.places[s])
        back = self._table(fixed, signals)
        given = [NOWHERE] * len(puzzle.sizes)
        at = len(fixed)
        for row in range(len(signals), 0, -1):
            start, stop = back[row][at]
            for g in fixed[start:stop]:
                given[g] = signals[row - 1]
            at = start
        return given

    def _table(self, fixed: list[int], signals: list[int]) -> list[list[tuple[int, int]]]:
        """After so many signals and so many groups: which groups the last signal takes at best."""
        best = [0.0]
        for g in fixed:
            best.append(best[-1] + self.puzzle.missing[g])
        back: list[list[tuple[int, int]]] = [[]]
        for s in signals:
            best, taken = self._next_row(best, fixed, s)
            back.append(taken)
        return back

    def _next_row(
        self, before: list[float], fixed: list[int], s: int
    ) -> tuple[list[float], list[tuple[int, int]]]:
        empty = self._empty(s)
        after = [value + empty for value in before]
        taken = [(j, j) for j in range(len(before))]
        for start, value in enumerate(before[:-1]):
            for stop in self._stops(fixed, start, s):
                total = value + self.score(s, fixed[start:stop])
                if total > after[stop]:
                    after[stop], taken[stop] = total, (start, stop)
        for j, g in enumerate(fixed):
            total = after[j] + self.puzzle.missing[g]
            if total > after[j + 1]:
                after[j + 1], taken[j + 1] = total, taken[j]
        return after, taken

    def _stops(self, fixed: list[int], start: int, s: int) -> Iterable[int]:
        """Ends of the runs of groups that may sit in one signal."""
        room, held = self.puzzle.room[s], 0
        for stop in range(start, len(fixed)):
            g = fixed[stop]
            held += self.puzzle.sizes[g]
            if stop > start and room is not None and held > room + _OVERFULL:
                return
            if s not in self.open[g]:
                return
            yield stop + 1

    def _empty(self, s: int) -> float:
        """A signal without fixed groups: a stranger, or some exchangeable H."""
        roaming = [g for g, free in enumerate(self.puzzle.roaming) if free]
        return max(self.score(s, ()), *(self.score(s, (g,)) - self.puzzle.missing[g] for g in roaming), -1e9)

    # Single moves.

    def _place_roaming(self, given: list[int]) -> None:
        """Put exchangeable H where they gain most, one at a time."""
        waiting = [g for g, free in enumerate(self.puzzle.roaming) if free]
        while waiting:
            gains = [(self._gain_of_move(given, g, s), g, s) for g in waiting for s in self.open[g]]
            gain, g, s = max(gains, default=(0.0, 0, 0))
            if gain <= _GAIN:
                return
            given[g] = s
            waiting.remove(g)

    def _improved(self, given: list[int]) -> list[int]:
        for _ in range(_SWEEPS):
            if not (self._moved(given) | self._exchanged(given)):
                break
        return given

    def _moved(self, given: list[int]) -> bool:
        changed = False
        for g in range(len(given)):
            options = [
                (self._gain_of_move(given, g, s), s) for s in (*self.open[g], NOWHERE) if s != given[g]
            ]
            gain, s = max(options, default=(0.0, NOWHERE))
            if gain > _GAIN:
                given[g], changed = s, True
        return changed

    def _exchanged(self, given: list[int]) -> bool:
        changed = False
        for g, h in combinations(range(len(given)), 2):
            if self._worth_exchanging(given, g, h) and self._gain_of_exchange(given, g, h) > _GAIN:
                given[g], given[h], changed = given[h], given[g], True
        return changed

    def _worth_exchanging(self, given: list[int], g: int, h: int) -> bool:
        here, there = given[g], given[h]
        if here == there or NOWHERE in (here, there):
            return False
        return there in self.open[g] and here in self.open[h]

    def _gain_of_move(self, given: list[int], g: int, s: int) -> float:
        here = given[g]
        gain = 0.0
        if here == NOWHERE:
            gain -= self.puzzle.missing[g]
        else:
            members = self._members(given, here)
            gain += self.score(here, [m for m in members if m != g]) - self.score(here, members)
        if s == NOWHERE:
            return gain + self.puzzle.missing[g]
        members = self._members(given, s)
        return gain + self.score(s, [*members, g]) - self.score(s, members)

    def _gain_of_exchange(self, given: list[int], g: int, h: int) -> float:
        here, there = given[g], given[h]
        first, second = self._members(given, here), self._members(given, there)
        before = self.score(here, first) + self.score(there, second)
        after = self.score(here, [h if m == g else m for m in first])
        return after + self.score(there, [g if m == h else m for m in second]) - before

    def _members(self, given: list[int], s: int) -> list[int]:
        return [g for g, place in enumerate(given) if place == s]
