"""Bench tests as further measurements. Never one that any standing structure makes unsafe."""

from __future__ import annotations

from collections.abc import Sequence
from functools import partial

from hoodside.advise.imagined import bernoulli
from hoodside.advise.model import NOTHING, Gain, Measurement, Pair
from hoodside.molecule import Structure
from hoodside.predict.wet import WetExpectation, WetTest, expected_results, wet_tests
from hoodside.readings import Readings

_SUREST = 0.95
#: Chances nearer than this make a test pointless.
_APART = 0.3
_RULES = "Local rules, the supplier's safety sheet and licensed practice come first."
_KEPT = "wet expectations"


def test_measurements(readings: Readings, standing: Sequence[Structure]) -> list[Measurement]:
    """Bench tests not done yet that are safe on every structure still standing."""
    done = {result.test for result in readings.wet}
    unsafe = {e.test for structure in standing for e in _due(structure).values() if e.unsafe}
    return [
        Measurement("wet", test.test, partial(_gain, test), (test.hazards, _RULES), test.test)
        for test in wet_tests()
        if test.test not in done | unsafe
    ]


def _gain(test: WetTest, pair: Pair) -> Gain:
    due = [_due(e.structure)[test.test] for e in (pair.first, pair.second)]
    chances = [min(max(e.p, 1 - _SUREST), _SUREST) for e in due]
    if abs(chances[0] - chances[1]) < _APART:
        return NOTHING
    more = 0 if chances[0] > chances[1] else 1
    yes, no = pair.names[more], pair.names[1 - more]
    why = f"Positive for {yes} ({due[more].why}), hardly for {no}. Looks like: {test.observation}."
    return Gain(bernoulli([(chances[0], chances[1])]), why, (f"Positive: {yes}.", f"Negative: {no}."))


def _due(structure: Structure) -> dict[str, WetExpectation]:
    if _KEPT not in structure.memo:
        structure.memo[_KEPT] = {e.test: e for e in expected_results(structure)}
    return structure.memo[_KEPT]  # type: ignore[no-any-return]
