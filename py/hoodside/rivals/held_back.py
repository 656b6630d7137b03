"""Skeletons that are held back: strained, unstable, or seldom met (facts table held_back)."""

from __future__ import annotations

from functools import cache

from hoodside.facts import load_table
from hoodside.molecule.kernel import kernel

#: From this penalty on, a skeleton is not put up at all.
NEVER = 9.0


@cache
def _penalties() -> tuple[tuple[str, float], ...]:
    return tuple((row["smarts"], float(row["penalty"])) for row in load_table("held_back"))


@cache
def _patterns() -> tuple[str, ...]:
    return tuple(smarts for smarts, _ in _penalties())


def doubts(smiles: str) -> tuple[int, ...]:
    """How often each pattern of the table occurs."""
    return tuple(len(found) for found in kernel().matches(smiles, _patterns()))


def penalty(smiles: str, allowed: tuple[int, ...]) -> float:
    """What a structure loses for features that the intended one (``allowed``) does not show as often."""
    counts = zip(doubts(smiles), allowed, _penalties(), strict=True)
    return sum(each * (found - known) for found, known, (_, each) in counts if found > known)
