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
_SOURCE = "ridge fit to published spectra (facts/proton_learned.csv)"
_SPLIT_SOURCE = "ridge fit to published spectra (facts/proton_splits.csv)"


@dataclass(frozen=True, slots=True)
class Refinement:
    """What to add to a scheme's value (ppm), and the deviation of the result."""

    terms: tuple[Term, ...]
    sd: float  # ppm: scale of a Student t with DEGREES_OF_FREEDOM


def refine(features: Mapping[str, float], environment: str, twin: int | None) -> Refinement:
    """The learned correction for one H; ``twin`` is 0 or 1 for one of a pair, else None."""
    found = learned_table("proton_learned").correct(features)
    terms = [Term(_evidence(found.cases, found.radius), found.delta, _SOURCE)]
    if twin is not None:
        half = half_split(features)
        terms.append(Term("one of a pair", -half if twin else half, _SPLIT_SOURCE))
    scale = _scales().get(environment, _scales()["any"])
    return Refinement(tuple(terms), scale * float(found.variance**0.5))


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
