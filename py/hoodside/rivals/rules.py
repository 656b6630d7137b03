"""The table of isomer moves, read once."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from typing import Literal, get_args

from hoodside.errors import DataFileError
from hoodside.facts import load_table

Op = Literal["shift", "exchange", "carry", "transfer", "matrix", "relabel"]
#: (first atom, second atom, change of bond order), atoms counted in the order of the pattern
Change = tuple[int, int, int]
_FAR = 99
#: Change of a single bond that is cut, told apart from a double bond lowered by one.
CUT = -9


@dataclass(frozen=True, slots=True)
class Rule:
    """One kind of isomer move.

    Attributes:
        op: how ``take`` and ``give`` are used (see ``hoodside.rivals.steps``).
        take: SMARTS of what is taken from its place.
        give: SMARTS of where it goes; empty for ``matrix``.
        changes: bond changes of a ``matrix`` move.
        adjust: (atom, charge, hydrogens) that a ``matrix`` move adds beside its bond changes.
        where: "ring" when both places must lie in one aromatic ring system, "other ring" when in two;
            "tautomer" when a move of hydrogens leads to a tautomer.
        reach: least and most bonds between the two places.
        rings: least and most size of a ring that may be closed.
        into_bond: for ``carry``, whether ``give`` is a bond rather than an atom with hydrogen.
        cost: plausibility cost, and what each bond beyond the least reach adds.
        words: how a chemist would say it; ``{group}`` stands for what was moved.
    """

    id: str
    op: Op
    take: str
    give: str
    changes: tuple[Change, ...]
    adjust: tuple[Change, ...]
    where: str
    reach: tuple[int, int]
    rings: tuple[int, int]
    cost: float
    per_bond: float
    words: str
    into_bond: bool


@cache
def isomer_rules() -> tuple[Rule, ...]:
    """All isomer moves (facts table isomer_moves)."""
    return tuple(_rule(row) for row in load_table("isomer_moves"))


def _rule(row: dict[str, str]) -> Rule:
    op = next((known for known in get_args(Op) if known == row["op"]), None)
    if op is None:
        raise DataFileError(f"isomer_moves has no op {row['op']!r}.", hint="Mend the row.", value=row["id"])
    matrix = op == "matrix"
    return Rule(
        id=row["id"],
        op=op,
        take=row["take"],
        give="" if matrix else row["give"],
        changes=_changes(row["give"]) if matrix else (),
        adjust=_adjust(row["adjust"]),
        where=row["where"],
        reach=_span(row["reach"], (0, _FAR)),
        rings=_span(row["rings"], (0, 0)),
        cost=float(row["cost"]),
        per_bond=float(row["per_bond"] or 0),
        words=row["words"],
        into_bond=op == "carry" and row["give"].count("[") > 1,
    )


def _changes(text: str) -> tuple[Change, ...]:
    """ "0-1:-1 2-3:1" -> ((0, 1, -1), (2, 3, 1)); "0-1:x" cuts a single bond."""
    found = []
    for part in text.split():
        ends, by = part.split(":")
        a, b = ends.split("-")
        found.append((int(a), int(b), CUT if by == "x" else int(by)))
    return tuple(found)


def _adjust(text: str) -> tuple[Change, ...]:
    """ "1:q-1 2:h+2" -> ((1, -1, -1), (2, 0, 2)): a charge brings a hydrogen (N, O, P, S; C-)."""
    found = []
    for part in text.split():
        atom, what = part.split(":")
        by = int(what[1:])
        found.append((int(atom), by if what[0] == "q" else 0, by))
    return tuple(found)


def _span(text: str, otherwise: tuple[int, int]) -> tuple[int, int]:
    if not text:
        return otherwise
    lo, dash, hi = text.partition("-")
    return int(lo), int(hi) if hi else _FAR if dash else int(lo)
