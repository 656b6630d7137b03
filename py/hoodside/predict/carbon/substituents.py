"""Which tabulated substituent stands at an atom, seen from where it is attached."""

from __future__ import annotations

import re
from collections.abc import Collection, Sequence
from dataclasses import dataclass

from hoodside.facts import Row
from hoodside.molecule import Structure

_SMARTS_ATOM = re.compile(r"\[[^\]]*\]|Br|Cl|[A-Za-z*]")


@dataclass(frozen=True, slots=True)
class Pattern:
    """A table row whose ``smarts`` begins at the atom of attachment."""

    row: Row
    smarts: str
    rank: tuple[int, int]  # larger is more specific: atoms in the pattern, then its length


@dataclass(frozen=True, slots=True)
class Found:
    """A substituent found in a structure: the pattern and the atoms it covers."""

    pattern: Pattern
    atoms: frozenset[int]


def patterns_of(rows: Sequence[Row]) -> tuple[Pattern, ...]:
    """The rows as patterns, most specific first."""
    found = [Pattern(row, row["smarts"], _rank(row["smarts"])) for row in rows]
    return tuple(sorted(found, key=lambda p: p.rank, reverse=True))


class Substituents:
    """All places in one structure where the patterns of one table match."""

    def __init__(self, structure: Structure, patterns: Sequence[Pattern]) -> None:
        self._at: dict[int, list[Found]] = {}
        matches = structure.match_all([p.smarts for p in patterns], unique=False)
        for pattern, places in zip(patterns, matches, strict=True):
            for place in places:
                self._at.setdefault(place[0], []).append(Found(pattern, frozenset(place)))

    def at(self, anchor: int, outside: Collection[int]) -> Found | None:
        """The most specific substituent that begins at ``anchor`` and covers no atom of ``outside``."""
        taken = set(outside)
        return next((f for f in self._at.get(anchor, ()) if not f.atoms & taken), None)


def substituents_in(structure: Structure, table: str, patterns: Sequence[Pattern]) -> Substituents:
    """The substituents of a structure by one table, found once per structure."""
    key = f"substituents {table}"
    if key not in structure.memo:
        structure.memo[key] = Substituents(structure, patterns)
    found: Substituents = structure.memo[key]
    return found


def _rank(smarts: str) -> tuple[int, int]:
    return len(_SMARTS_ATOM.findall(re.sub(r"\$\([^)]*\)", "", smarts))), len(smarts)
