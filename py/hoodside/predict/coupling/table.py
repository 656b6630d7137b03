"""Typical couplings by path (facts/couplings_hh.csv)."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.coupling.gates import features, needs
from hoodside.predict.coupling.model import Estimate

#: Smallest standard deviation read off a published range, Hz.
_LEAST_SD = 0.25
_SIGNS = {"-": -1.0}


@dataclass(frozen=True, slots=True)
class Rule:
    """One row: a path between two carriers, and what holds along it."""

    smarts: str
    geometry: str  # "", "cis" or "trans"
    rank: int  # the higher wins; among equals the later row
    bonds: int
    estimate: Estimate


@dataclass(frozen=True, slots=True)
class Found:
    """Rules that apply between two atoms (the first bears the H; the second may be F or P)."""

    bonds: int
    rules: tuple[Rule, ...]  # best first

    def best(self, geometry: str) -> Rule | None:
        """The best rule for an H-H relation ("cis", "trans" or "" when not known or without meaning)."""
        return next((r for r in self.rules if r.geometry in ("", geometry)), None)


@cache
def rules() -> tuple[Rule, ...]:
    """Every row in use (rank 0 rows are for reference)."""
    return tuple(_rule(row) for row in load_table("couplings_hh") if int(row["rank"]))


def _rule(row: Row) -> Rule:
    lo, hi = float(row["lo_hz"]), float(row["hi_hz"])
    hz = float(row["typical_hz"]) * _SIGNS.get(row["sign"], 1.0)
    estimate = Estimate(hz, max((hi - lo) / 4, _LEAST_SD), row["environment"], row["source"])
    return Rule(row["smarts_path"], row["geometry"], int(row["rank"]), int(row["bonds"]), estimate)


def find(structure: Structure) -> dict[tuple[int, int], Found]:
    """Rules per pair of atoms (ends of the path, ascending but for F and P, which stand last)."""
    matched: dict[tuple[int, int], list[tuple[int, Rule]]] = {}
    there = features(structure)
    table = [rule for rule in rules() if needs(rule.smarts) <= there]
    for number, (rule, matches) in enumerate(
        zip(table, structure.match_all([r.smarts for r in table]), strict=True)
    ):
        for match in matches:
            matched.setdefault(_ends(structure, match), []).append((number, rule))
    return {ends: _sorted(entries) for ends, entries in matched.items()}


def _ends(structure: Structure, match: tuple[int, ...]) -> tuple[int, int]:
    a, b = match[0], match[-1]
    if structure.atoms[b].symbol in ("F", "P") or a <= b:
        return a, b
    return b, a


def _sorted(entries: Iterable[tuple[int, Rule]]) -> Found:
    entries = list(entries)
    bonds = min(rule.bonds for _, rule in entries)
    near = [e for e in entries if e[1].bonds == bonds]
    near.sort(key=lambda e: (e[1].rank, e[0]), reverse=True)
    return Found(bonds, tuple(rule for _, rule in near))
