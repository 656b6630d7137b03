"""Fits the learned correction to the 1H schemes and writes facts/proton_learned.csv and its error model.

Reports print signals, not which hydrogen gave them: matching of signals to groups (optimal assignment,
integrals respected) and refitting alternate a few rounds. Rows with atom maps in the facts tables are
assigned already. Run it after any change to a 1H table or scheme: ``python tests/bench/fit_proton.py``;
tests/bench/bench_proton.py prints how good the result is.
"""

from __future__ import annotations

import csv
import random
import sys
from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from scipy.stats import t as student  # noqa: E402

from bench.proton_cases import Compound, Row, assigned_rows, load_compounds  # noqa: E402
from bench.proton_matching import match  # noqa: E402
from bench.ridge import fit, trust_of  # noqa: E402
from hoodside.predict.learned import LearnedTable, in_place_of  # noqa: E402
from hoodside.predict.proton.correction import (  # noqa: E402
    DEGREES_OF_FREEDOM,
    USUAL_HALF_SPLIT,
    stated_deviation,
)
from hoodside.predict.proton.predict import pairs_of, refinements  # noqa: E402

FACTS = HERE.parents[2] / "py" / "hoodside" / "facts"
SOURCE = "fit to tests/cases and the atom-mapped tables"
#: ppm: weights below this move no prediction that anyone could see.
LEAST = 0.008
#: ... unless the feature was seen so often that its absence would look like ignorance.
OFTEN = 5
#: Cases that the overall error scale counts for in a class.
SCALE_PRIOR = 20
#: Share to hold: a point above 90 %, for what a finite sample has not shown yet.
HELD = 0.91
EXAMINED = ("published", "reactions")
SEED = 20261201
FOLDS, ROUNDS = 5, 3
NOISE = 0.0075
#: Prior variances by family (ppm squared), chosen by cross-validation.
PRIORS = {
    "e0": 0.0002, "e1": 0.0033, "e2": 0.0070, "e3": 0.0077, "e4": 0.0025, "s1": 0.0065, "s2": 0.0006,
    "s3": 0.00016, "s4": 0.0005, "s5": 0.0009, "t": 0.0006, "a": 0.0022, "b": 0.0045, "p": 0.0039,
    "q": 0.0004, "o": 0.0004, "c": 0.0033, "u": 0.0080, "w": 0.0030, "x": 0.0001, "g": 0.0120,
    "y": 0.0016, "z": 0.0036, "k": 0.0010, "v": 0.0027, "r": 0.0200,
}  # fmt: skip
SPLIT_PRIORS = {
    "e0": 0.001, "e1": 0.004, "e2": 0.004, "e3": 0.004, "a": 0.003, "b": 0.001, "k": 0.002, "s2": 0.0005,
    "s3": 0.0005, "s4": 0.0003,
}  # fmt: skip
SPLIT_NOISE = 0.01
#: Printed ranges narrower than this (ppm) count as their middle.
NARROW = 0.06


@dataclass
class Model:
    """The correction of the mean shift and of half the distance between the H of one CH2."""

    mean: LearnedTable
    split: LearnedTable


def empty() -> Model:
    return Model(LearnedTable({}, PRIORS, NOISE), LearnedTable({}, SPLIT_PRIORS, SPLIT_NOISE))


def predict(model: Model, item: Compound) -> np.ndarray:
    """Shift of each group, ppm."""
    with in_place_of({"proton_learned": model.mean, "proton_splits": model.split}):
        moved = [0.0 if r is None else r.delta for r in refinements(item.sites)]
    return item.scheme + np.array(moved)


def train(compounds: Sequence[Compound], fixed: Sequence[Row]) -> Model:
    """Alternate matching and fitting."""
    model = empty()
    trust: np.ndarray | None = None
    for _ in range(ROUNDS):
        rows = [r.features for r in fixed]
        target, noise = [r.residual for r in fixed], [NOISE] * len(fixed)
        split_rows: list[dict[str, float]] = []
        split_target: list[float] = []
        for item in compounds:
            guess = predict(model, item)
            given = match(item.expected(guess), item.signals)
            seen: dict[int, float] = {}
            for i, (site, k) in enumerate(zip(item.sites, given, strict=True)):
                if site.exchange is not None or k < 0:
                    continue
                signal = item.signals[k]
                width = signal.hi - signal.lo
                value = signal.ppm if width < NARROW else min(max(guess[i], signal.lo), signal.hi)
                seen[i] = value
                rows.append(site.features)
                target.append(value - site.estimate.ppm)
                noise.append(NOISE + width**2 / 12)
            for i, j in pairs_of(item.sites):
                if i in seen and j in seen:
                    split_rows.append(item.sites[i].features)
                    split_target.append(abs(seen[i] - seen[j]) / 2 - USUAL_HALF_SPLIT)
        wanted, spread = np.array(target), np.array(noise)
        weight = np.ones(len(wanted)) if trust is None or len(trust) != len(wanted) else trust
        weights, fitted = fit(rows, wanted, spread, PRIORS, weight)
        trust = trust_of(wanted - fitted, spread)
        halves = np.array(split_target)
        split, _ = fit(
            split_rows, halves, np.full(len(halves), SPLIT_NOISE), SPLIT_PRIORS, np.ones(len(halves))
        )
        model = Model(LearnedTable(weights, PRIORS, NOISE), LearnedTable(split, SPLIT_PRIORS, SPLIT_NOISE))
    return model


@dataclass
class Error:
    """One predicted group of a compound left out of the fit."""

    id: str
    origin: str
    environment: str
    atoms: tuple[int, ...]
    predicted: float
    lo: float
    hi: float
    variance: float
    radius: int

    @property
    def beyond(self) -> float:
        return max(self.lo - self.predicted, self.predicted - self.hi, 0.0)

    @property
    def error(self) -> float:
        return (self.lo + self.hi) / 2 - self.predicted


def cross_validate(compounds: Sequence[Compound], fixed: Sequence[Row], folds: int = FOLDS) -> list[Error]:
    """Errors of every compound by a model that never saw its connectivity."""
    keys = sorted({c.key for c in compounds if c.origin in EXAMINED})
    random.Random(SEED).shuffle(keys)
    found = []
    for fold in range(folds):
        held = set(keys[fold::folds])
        model = train([c for c in compounds if c.key not in held], fixed)
        for item in compounds:
            if item.key in held and item.origin in EXAMINED:
                found += errors_of(model, item)
    return found


def errors_of(model: Model, item: Compound) -> list[Error]:
    guess = predict(model, item)
    found = []
    for i, k in enumerate(match(item.expected(guess), item.signals)):
        site = item.sites[i]
        if k >= 0 and site.exchange is None:
            signal, correction = item.signals[k], model.mean.correct(site.features)
            found.append(
                Error(
                    item.id,
                    item.origin,
                    site.estimate.environment,
                    site.hydrogens.atoms,
                    float(guess[i]),
                    signal.lo,
                    signal.hi,
                    correction.variance,
                    correction.radius,
                )
            )
    return found


def write_weights(table: LearnedTable, path: Path) -> None:
    """Weights as CSV; a feature seen once that moves nothing is left out."""
    with path.open("w", newline="", encoding="utf-8") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["feature", "weight", "cases", "source", "origin"])
        out.writerows([f"prior:{k}", v, 0, SOURCE, "fit"] for k, v in sorted(table.priors.items()))
        out.writerow(["noise", table.noise, 0, SOURCE, "fit"])
        for name, (weight, cases) in sorted(table.weights.items()):
            if abs(weight) >= LEAST or cases > OFTEN:
                out.writerow([name, f"{weight:.4f}", cases, SOURCE, "fit"])


def scale_table(errors: Sequence[Error]) -> dict[str, tuple[float, int]]:
    """Observed over stated error by class of hydrogen and "any", drawn towards "any" where cases are few."""
    ratios: dict[str, list[float]] = {}
    for e in errors:
        ratios.setdefault(e.environment, []).append(abs(e.error) / stated_deviation(e.variance))
    every = scale_of([r for members in ratios.values() for r in members])
    found = {"any": (every, len(errors))}
    for name, members in sorted(ratios.items()):
        n = len(members)
        found[name] = ((n * scale_of(members) + SCALE_PRIOR * every) / (n + SCALE_PRIOR), n)
    return found


def stated_sd(error: Error, scales: dict[str, tuple[float, int]]) -> float:
    """The deviation that goes with a prediction, ppm."""
    return scales.get(error.environment, scales["any"])[0] * stated_deviation(error.variance)


def write_scales(errors: Sequence[Error], path: Path) -> None:
    """The table of scales as CSV."""
    source = "cross-validation over the compounds of tests/cases"
    with path.open("w", newline="", encoding="utf-8") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["environment", "scale", "cases", "source", "origin"])
        for name, (scale, cases) in scale_table(errors).items():
            out.writerow([name, f"{scale:.3f}", cases, source, "fit"])


def scale_of(ratios: Sequence[float]) -> float:
    """Scale of the Student t whose central 90 % holds 90 % of the ratios."""
    return float(np.quantile(ratios, HELD) / student.ppf(0.95, DEGREES_OF_FREEDOM))


def main() -> None:
    """Fit on everything and write the three tables."""
    compounds, mapped = load_compounds(), assigned_rows()
    model = train(compounds, mapped)
    write_weights(model.mean, FACTS / "proton_learned.csv")
    write_weights(model.split, FACTS / "proton_splits.csv")
    write_scales(cross_validate(compounds, mapped), FACTS / "proton_errors.csv")


if __name__ == "__main__":
    main()
