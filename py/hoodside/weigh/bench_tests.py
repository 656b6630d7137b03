"""Bench tests against one structure."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.predict.wet import expected_results
from hoodside.readings import Readings
from hoodside.weigh.decibans import decibans
from hoodside.weigh.finding import Finding, Weighed
from hoodside.weigh.trust import trust

#: Share of compounds at large on which a test is positive (common practice).
_ANYHOW = 0.35
#: No bench test is surer than this.
_SUREST = 0.97


def weigh_tests(structure: Structure, readings: Readings) -> Weighed:
    """Every bench test done, with its known false results."""
    if not readings.wet:
        return Weighed()
    due = {e.test: e for e in expected_results(structure)}
    findings = []
    for k, done in enumerate(readings.wet):
        e = due[done.test]
        p = min(max(e.p, 1 - _SUREST), _SUREST)
        positive = done.result == "positive"
        ratio = p / _ANYHOW if positive else (1 - p) / (1 - _ANYHOW)
        expected = {"positive": "should be positive", "negative": "should be negative"}.get(
            e.result, "may go either way"
        )
        text = f"{done.test} {done.result}; for this structure it {expected}: {e.why}."
        findings.append(
            Finding("wet", trust("wet") * decibans(ratio), text, (f"wet:{k}",), e.atoms, e.source)
        )
    return Weighed(tuple(findings))
