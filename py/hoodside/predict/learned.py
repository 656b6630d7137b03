"""A correction learned from published spectra on top of a published scheme, and how far to trust it.

Bayesian linear (ridge) regression on the residual of the scheme (Hoerl and Kennard, Technometrics 1970,
12, 55; MacKay, Neural Comput. 1992, 4, 415): each feature has a prior variance by family, so that thin data
leave the scheme's own value. The tables are fitted offline (tests/bench/fit_carbon.py) and hold, per
feature, the weight and the number of assigned atoms behind it.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.predict.features import family

_PRIOR = "prior:"
_NOISE = "noise"


@dataclass(frozen=True, slots=True)
class Correction:
    """What to add to the scheme, in ppm, and what remains uncertain after it."""

    delta: float  # ppm
    variance: float  # ppm squared, before calibration by class
    cases: int  # atoms with the most alike surroundings in the training set
    radius: int  # bonds to which those surroundings are alike (0: nothing alike was seen)


@dataclass(frozen=True, slots=True)
class LearnedTable:
    """Weights by feature, with prior variances by family (ppm squared) and the noise variance."""

    weights: Mapping[str, tuple[float, int]]
    priors: Mapping[str, float]
    noise: float

    def correct(self, features: Mapping[str, float]) -> Correction:
        """Correction for one atom. The variance takes the features as independent."""
        delta, variance, cases, radius = 0.0, self.noise, 0, 0
        for name, count in features.items():
            prior = self.priors.get(family(name))
            if prior is None:
                continue
            weight, seen = self.weights.get(name, (0.0, 0))
            delta += weight * count
            variance += count * count * prior / (1 + seen * prior / self.noise)
            if name[0] == "e" and seen and int(name[1]) >= radius:
                radius, cases = int(name[1]), seen
        return Correction(delta, variance, cases, radius)


_in_place_of: dict[str, LearnedTable] = {}


@contextmanager
def in_place_of(tables: Mapping[str, LearnedTable]) -> Iterator[None]:
    """Predict with other tables for a while: cross-validation fits them without the compounds examined."""
    before = dict(_in_place_of)
    _in_place_of.update(tables)
    try:
        yield
    finally:
        _in_place_of.clear()
        _in_place_of.update(before)


def learned_table(name: str) -> LearnedTable:
    """The fitted table of that name in facts/ (columns: feature, weight, cases, source, origin)."""
    return _in_place_of.get(name) or _shipped_table(name)


@cache
def _shipped_table(name: str) -> LearnedTable:
    weights: dict[str, tuple[float, int]] = {}
    priors: dict[str, float] = {}
    noise = 1.0
    for row in load_table(name):
        feature, value = row["feature"], float(row["weight"])
        if feature.startswith(_PRIOR):
            priors[feature.removeprefix(_PRIOR)] = value
        elif feature == _NOISE:
            noise = value
        else:
            weights[feature] = (value, int(row["cases"]))
    return LearnedTable(weights, priors, noise)
