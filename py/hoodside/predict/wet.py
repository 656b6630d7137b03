"""Bench tests: what each should show for a structure, how sure, and where it would be unsafe."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.errors import InvalidInputError
from hoodside.facts.table import load_table
from hoodside.molecule import Structure

#: Above this chance of a positive the test is called positive, below its mirror negative.
_SURE = 0.7


@dataclass(frozen=True, slots=True)
class WetTest:
    """One bench test, as in facts/wet_tests.csv."""

    test: str
    aliases: tuple[str, ...]
    tells: str
    observation: str
    false_results: str
    hazards: str
    false_positive: float  # chance of a positive where nothing in the structure gives one
    source: str


@dataclass(frozen=True, slots=True)
class WetExpectation:
    """What a test should show for one structure."""

    test: str
    result: str  # "positive", "negative" or "unsure"
    p: float  # chance that the test is read as positive
    why: str
    atoms: tuple[int, ...]  # the group that decides; empty when nothing reacts
    hazards: str
    unsafe: str  # why the test should not be done on this structure, or ""
    source: str


@dataclass(frozen=True, slots=True)
class _Rule:
    test: str
    rank: int
    smarts: str
    p: float
    why: str
    needs: frozenset[str]  # elements without which the pattern cannot match
    source: str


@cache
def wet_tests() -> tuple[WetTest, ...]:
    """Every bench test of the table, with its hazards."""
    return tuple(
        WetTest(
            test=row["test"],
            aliases=tuple(alias.strip() for alias in row["aliases"].split(";")),
            tells=row["tells"],
            observation=row["observation"],
            false_results=row["false_results"],
            hazards=row["hazards"],
            false_positive=float(row["false_positive"]),
            source=row["source"],
        )
        for row in load_table("wet_tests")
    )


def find_test(name: str) -> WetTest:
    """A test by its name or a common short form ("dnp", "Baeyer", "FeCl3").

    Raises: InvalidInputError naming the field ``wet.test``.
    """
    found = _by_name().get(_plain(name))
    if found is None:
        known = ", ".join(test.test for test in wet_tests())
        raise InvalidInputError(
            f"There is no bench test {name!r}.", hint=f"Use one of: {known}.", field="wet.test", value=name
        )
    return found


def expected_results(structure: Structure) -> tuple[WetExpectation, ...]:
    """What every bench test should show for a structure, in the order of the table.

    Of the rules whose pattern the structure holds the highest-ranked decides, among equals the likeliest
    positive. With none, the test is negative but for its rate of false positives.
    Source: facts/wet_rules.csv (Shriner; Vogel; probabilities by common practice).
    """
    rules = tuple(rule for rule in _rules() if rule.needs <= structure.element_counts.keys())
    bans = _bans()
    patterns = [rule.smarts for rule in rules] + [smarts for _, smarts, _, _ in bans]
    found = dict(zip(patterns, structure.match_all(patterns), strict=True))
    return tuple(_expect(test, rules, bans, found) for test in wet_tests())


def expected_result(structure: Structure, name: str) -> WetExpectation:
    """What one bench test should show. Raises: InvalidInputError for an unknown test."""
    test = find_test(name).test
    return next(result for result in expected_results(structure) if result.test == test)


Found = dict[str, tuple[tuple[int, ...], ...]]


def _expect(
    test: WetTest, rules: tuple[_Rule, ...], bans: tuple[tuple[str, str, str, str], ...], found: Found
) -> WetExpectation:
    held = [rule for rule in rules if rule.test == test.test and found[rule.smarts]]
    unsafe = "; ".join(reason for name, smarts, reason, _ in bans if name == test.test and found[smarts])
    best = max(held, key=lambda rule: (rule.rank, rule.p), default=None)
    if best is None:
        why = "nothing in the structure would make it positive"
        return WetExpectation(
            test.test, "negative", test.false_positive, why, (), test.hazards, unsafe, test.source
        )
    atoms = tuple(sorted({atom for match in found[best.smarts] for atom in match}))
    return WetExpectation(
        test.test, _called(best.p), best.p, best.why, atoms, test.hazards, unsafe, best.source
    )


def _called(p: float) -> str:
    if p >= _SURE:
        return "positive"
    return "negative" if p <= 1 - _SURE else "unsure"


@cache
def _rules() -> tuple[_Rule, ...]:
    return tuple(
        _Rule(
            test=row["test"],
            rank=int(row["rank"]),
            smarts=row["smarts"],
            p=float(row["p_positive"]),
            why=row["why"],
            needs=frozenset(row["needs"].split()),
            source=row["source"],
        )
        for row in load_table("wet_rules")
    )


@cache
def _bans() -> tuple[tuple[str, str, str, str], ...]:
    """(test, pattern, reason, source) of structures on which a test is unsafe."""
    return tuple(
        (row["test"], row["smarts"], row["reason"], row["source"]) for row in load_table("wet_unsafe")
    )


@cache
def _by_name() -> dict[str, WetTest]:
    return {_plain(name): test for test in wet_tests() for name in (test.test, *test.aliases)}


def _plain(name: str) -> str:
    return " ".join(name.lower().replace("’", "'").split())
