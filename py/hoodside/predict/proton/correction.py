"""What published spectra taught beyond the schemes, and how sure a prediction is after it.

Three fitted tables (tests/bench/fit_proton.py): weights by feature on the residual of the schemes
(facts/proton_learned.csv), on half the distance between the H of one CH2 (facts/proton_splits.csv), and, by
class of hydrogen, observed over stated error under cross-validation (facts/proton_errors.csv).
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.predict.learned import learned_table
from hoodside.predict.model import Term

#: Errors over their stated deviation follow Student's t with this many degrees of freedom.
DEGREES_OF_FREEDOM = 3.0
#: ppm: half the distance between diastereotopic H where nothing more is known.
USUAL_HALF_SPLIT = 0.05
#: The variance of the fit takes features as independent, which blurs the difference between the familiar and
#: the unfamiliar: observed errors go with this power of it (cross-validation), equal at so many ppm.
_CONTRAST, _USUAL_SD = 1.7, 0.12
_SOURCE = "ridge fit to published and recalled spectra (facts/proton_learned.csv)"
_SPLIT_SOURCE = "ridge fit to published and recalled spectra (facts/proton_splits.csv)"


@dataclass(frozen=True, slots=True)
class Refinement:
    """What to add to a scheme's value (ppm), and the deviation of the result."""

    terms: tuple[Term, ...]
    sd: float  # ppm: scale of a Student t with DEGREES_OF_FREEDOM

    @property
    def delta(self) -> float:
        """Sum of the terms, ppm."""
        return sum(term.value for term in self.terms)


def refine(features: Mapping[str, float], environment: str) -> Refinement:
    """The learned correction for one H."""
    found = learned_table("proton_learned").correct(features)
    scale = _scales().get(environment, _scales()["any"])
    term = Term(_evidence(found.cases, found.radius), found.delta, _SOURCE)
    return Refinement((term,), scale * stated_deviation(found.variance))


def stated_deviation(variance: float) -> float:
    """Deviation that goes with a variance of the fit (ppm squared), before calibration by class, ppm."""
    return float(_USUAL_SD * (variance / _USUAL_SD**2) ** (_CONTRAST / 2))


def set_apart(first: float, second: float, features: Mapping[str, float]) -> tuple[Term, Term]:
    """Moves of two H that differ only by where they stand, so that they are as far apart as is usual.

    Args: their shifts so far (ppm), and the features of the first.
    """
    half, now = half_split(features), (first - second) / 2
    move = max(half - abs(now), 0.0) * (-1 if now < 0 else 1)
    return Term("one of a pair", move, _SPLIT_SOURCE), Term("other of a pair", -move, _SPLIT_SOURCE)


def half_split(features: Mapping[str, float]) -> float:
    """Half the expected distance between the two H of one CH2 in ppm."""
    return max(USUAL_HALF_SPLIT + learned_table("proton_splits").correct(features).delta, 0.0)


def _evidence(cases: int, radius: int) -> str:
    if not cases:
        return "learned correction, nothing alike seen"
    return f"learned correction, {cases} alike to {radius} bonds"


@cache
def _scales() -> dict[str, float]:
    return {row["environment"]: float(row["scale"]) for row in load_table("proton_errors")}
