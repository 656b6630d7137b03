"""All readings against one structure."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from math import fsum

from hoodside.readings import Readings
from hoodside.weigh.bench_tests import weigh_tests
from hoodside.weigh.carbons import weigh_carbons
from hoodside.weigh.expectations import Expectations
from hoodside.weigh.finding import Finding, Leftover, Link, Weighed
from hoodside.weigh.formulas import same_formula, weigh_formula
from hoodside.weigh.infrared import weigh_infrared
from hoodside.weigh.masses import weigh_masses
from hoodside.weigh.protons.weigh import weigh_protons


@dataclass(frozen=True)
class Tally:
    """One structure with all its findings."""

    expected: Expectations
    ok_formula: bool
    parts: tuple[Weighed, ...]

    @cached_property
    def findings(self) -> tuple[Finding, ...]:
        """All findings, in the order of kinds."""
        return tuple(finding for part in self.parts for finding in part.findings)

    @cached_property
    def weight_db(self) -> float:
        """Sum of all findings, decibans."""
        return fsum(finding.weight_db for finding in self.findings)

    @property
    def links(self) -> tuple[Link, ...]:
        """Readings with the predictions they were given to."""
        return tuple(link for part in self.parts for link in part.links)

    @property
    def missing(self) -> tuple[Leftover, ...]:
        """Expected, not seen."""
        return tuple(left for part in self.parts for left in part.missing)

    @property
    def unexplained(self) -> tuple[Leftover, ...]:
        """Seen, not explained."""
        return tuple(left for part in self.parts for left in part.unexplained)


def weigh_structure(expected: Expectations, readings: Readings) -> Tally:
    """Weigh every reading for and against one structure."""
    formula = expected.formula
    parts = [
        weigh_formula(formula, readings),
        weigh_protons(expected.h1, expected.patterns, readings) if readings.h1 else Weighed(),
        weigh_carbons(expected.c13, readings, expected.doubled) if readings.c13 else Weighed(),
        weigh_infrared(expected.ir, readings) if readings.ir or readings.ir_clear else Weighed(),
        weigh_masses(formula, expected.ms, readings) if readings.ms else Weighed(),
        weigh_tests(expected.structure, readings),
    ]
    ok = not readings.formula or same_formula(formula, readings.formula)
    return Tally(expected, ok, tuple(parts))
