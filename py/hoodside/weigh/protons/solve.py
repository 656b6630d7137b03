"""From predicted groups and signals to the assignment, raw integrals put on the scale of the structure."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from math import fsum

from hoodside.predict.model import ProtonGroup
from hoodside.weigh.protons.assign import NOWHERE, Puzzle, assign
from hoodside.weigh.protons.pattern import Patterns
from hoodside.weigh.protons.score import Scorer
from hoodside.weigh.protons.signals import Signal, rescaled

#: Raw integrals are rescaled from the assignment this many times.
_ROUNDS = 3


@dataclass(frozen=True, slots=True)
class Solution:
    """An assignment with what is needed to explain it."""

    groups: Sequence[ProtonGroup]
    signals: Sequence[Signal]
    given: Sequence[int]  # signal of each group, or NOWHERE
    scorer: Scorer

    def members(self, signal: int) -> tuple[int, ...]:
        """Groups in one signal."""
        return tuple(g for g, s in enumerate(self.given) if s == signal)


def solve(
    groups: Sequence[ProtonGroup], patterns: Patterns, signals: Sequence[Signal], raw: bool = False
) -> Solution:
    """The best assignment of groups to signals."""
    if not raw:
        return _solve(groups, patterns, signals, False)
    scaled = rescaled(signals, _first_factor(groups, signals))
    solution = _solve(groups, patterns, scaled, True)
    for _ in range(_ROUNDS - 1):
        scaled = rescaled(scaled, _better_factor(solution))
        solution = _solve(groups, patterns, scaled, True)
    return solution


def _solve(
    groups: Sequence[ProtonGroup], patterns: Patterns, signals: Sequence[Signal], raw: bool
) -> Solution:
    scorer = Scorer.of(groups, patterns, signals, raw)
    puzzle = Puzzle(
        shifts=[g.ppm for g in groups],
        sizes=[g.n for g in groups],
        roaming=[g.exchangeable for g in groups],
        places=[s.ppm for s in signals],
        room=[s.n for s in signals],
        missing=[scorer.missing(g) for g in range(len(groups))],
        suits=scorer.places,
        score=scorer.total,
    )
    return Solution(groups, signals, assign(puzzle), scorer)


def _first_factor(groups: Sequence[ProtonGroup], signals: Sequence[Signal]) -> float:
    """H per unit of integral, all signals together (the solvent's own left out)."""
    due = sum(g.n for g in groups if not g.exchangeable)
    found = fsum(s.n or 0.0 for s in signals if not s.stray.name) or fsum(s.n or 0.0 for s in signals)
    return due / found if due and found else 1.0


def _better_factor(solution: Solution) -> float:
    """Total H over total integral of the signals that hold something: one bad step is forgiven."""
    due = found = 0.0
    for g, s in zip(solution.groups, solution.given, strict=True):
        due += g.n if s != NOWHERE and not g.exchangeable else 0
    for k, signal in enumerate(solution.signals):
        members = solution.members(k)
        if members and not any(solution.groups[m].exchangeable for m in members):
            found += signal.n or 0.0
    return due / found if due and found else 1.0
