"""Fits the learned correction to the 13C schemes and writes facts/carbon_learned.csv.

Reports print lines, not which atom gave them: matching of lines to carbons (optimal assignment) and refitting
alternate a few rounds. Rows with atom maps in the facts tables are assigned already. Run:
``python tests/bench/fit_carbon.py [--write]``; without --write it prints the cross-validation over compounds.
"""

from __future__ import annotations

import csv
import json
import random
import sys
from collections import defaultdict
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from scipy.optimize import linear_sum_assignment  # noqa: E402
from scipy.stats import t as student  # noqa: E402

from bench.ridge import fit, trust_of  # noqa: E402
from bench.training import read_rows, recalled  # noqa: E402
from hoodside.facts import load_table  # noqa: E402
from hoodside.molecule import read_structure  # noqa: E402
from hoodside.molecule.symmetry import atom_classes  # noqa: E402
from hoodside.predict.atom_maps import atom_maps  # noqa: E402
from hoodside.predict.carbon.estimate import scheme_estimates  # noqa: E402
from hoodside.predict.features import atom_features  # noqa: E402
from hoodside.predict.learned import LearnedTable  # noqa: E402

ROOT = HERE.parents[2]
#: Prior variances by family (ppm squared), chosen by cross-validation.
PRIORS = {
    "e0": 0.5, "e1": 60.0, "e2": 30.0, "e3": 8.0, "e4": 2.0, "e5": 0.6,
    "s1": 1.0, "s2": 0.6, "s3": 0.5, "s4": 0.1, "p": 0.8, "q": 0.8, "o": 0.8, "n": 10.0, "u": 4.0,
}  # fmt: skip
NOISE = 2.0
ROUNDS = 3
#: Times that outliers are weighed anew.
REWEIGHTED = 3
FOLDS = 5
#: Weights below this move no prediction that anyone could see.
SMALLEST = 0.1
#: A line may stand for several carbons, but at a price (ppm) so that distinct lines are used first.
SHARED_LINE = 2.0
#: Cases that the overall error scale counts for in a class.
SCALE_PRIOR = 12
ERROR_DOF = 4.0
MISMATCH_CAP = 40.0
#: Price (ppm) of taking a carbon as not printed at all (weak quaternary carbons, lines lost in copying).
UNPRINTED = 15.0


@dataclass
class Compound:
    """One compound: per carbon class the scheme value, features and number of atoms; its observed lines."""

    id: str
    key: str  # connectivity, so that stereoisomers and repeats stay together
    examined: bool  # whether errors count: not for recalled spectra
    atoms: list[int]
    scheme: np.ndarray
    features: list[dict[str, float]]
    counts: list[int]
    environments: list[str]
    lines: np.ndarray
    matched: np.ndarray = field(default_factory=lambda: np.zeros(0))


def load_compounds() -> list[Compound]:
    """Published compounds, reaction products and recalled spectra with 13C lines."""
    cases = [(c["id"], c["smiles"], c.get("c13"), True) for c in _json("published")]
    cases += [(c["id"], c["product_smiles"], c.get("product_c13"), True) for c in _json("reactions")]
    cases += [(r.name, r.smiles, list(r.c13), False) for r in recalled()]
    return [compound(i, s, lines, examined) for i, s, lines, examined in cases if lines]


def compound(name: str, smiles: str, lines: Sequence[object], examined: bool) -> Compound:
    structure = read_structure(smiles)
    estimates = scheme_estimates(structure)
    alike = atom_classes(structure)
    classes: dict[int, list[int]] = defaultdict(list)
    for atom in estimates:
        classes[alike[atom]].append(atom)
    firsts = [members[0] for members in classes.values()]
    return Compound(
        name,
        structure.inchikey.split("-")[0],
        examined,
        firsts,
        np.array([estimates[a].ppm for a in firsts]),
        [atom_features(structure, a) for a in firsts],
        [len(members) for members in classes.values()],
        [estimates[a].environment for a in firsts],
        np.array([float(line["ppm"] if isinstance(line, dict) else line) for line in lines]),  # type: ignore[arg-type]
    )


def assigned_rows() -> list[tuple[dict[str, float], float]]:
    """Atom-mapped table rows: features and residual of the scheme."""
    found = []
    apart = [*read_rows("carbon_rings"), *read_rows("carbon_substituent_self")]
    for row in [*load_table("carbon_heteroaromatic"), *apart]:
        smiles = row["smiles_with_atom_map"]
        structure = read_structure(smiles)
        atom = atom_maps(smiles).index(row["atom_map"])
        estimate = scheme_estimates(structure)[atom]
        found.append((atom_features(structure, atom), float(row["ppm"]) - estimate.ppm))
    return found


def match(item: Compound, predicted: np.ndarray) -> np.ndarray:
    """The line given to each carbon class (ppm), by optimal assignment."""
    cost = np.minimum(np.abs(predicted[:, None] - item.lines[None, :]), MISMATCH_CAP)
    copies = -(-len(predicted) // len(item.lines)) + 1
    unprinted = np.full((len(predicted), len(predicted)), UNPRINTED)
    wide = np.hstack([cost + SHARED_LINE * k for k in range(copies)] + [unprinted])
    rows, columns = linear_sum_assignment(wide)
    given = np.full(len(predicted), np.nan)
    printed = columns < copies * len(item.lines)
    given[rows[printed]] = item.lines[columns[printed] % len(item.lines)]
    return given


def train(compounds: Sequence[Compound], fixed: Sequence[tuple[dict[str, float], float]]) -> LearnedTable:
    """Alternate matching and fitting."""
    rows, residuals = [f for f, _ in fixed], [r for _, r in fixed]
    # The assigned rows alone first: matching by the bare schemes would lock in their worst errors.
    table = LearnedTable(_weights(rows, residuals), PRIORS, NOISE)
    for _ in range(ROUNDS):
        rows, residuals = [f for f, _ in fixed], [r for _, r in fixed]
        for item in compounds:
            given = match(item, predict(table, item))
            here = [(f, r) for f, r in zip(item.features, given - item.scheme, strict=True) if r == r]
            rows += [f for f, _ in here]
            residuals += [r for _, r in here]
        table = LearnedTable(_weights(rows, residuals), PRIORS, NOISE)
    return table


def _weights(rows: Sequence[dict[str, float]], residuals: Sequence[float]) -> dict[str, tuple[float, int]]:
    """Ridge weights, outliers weighed down as a Student t would (iteratively reweighted least squares)."""
    target, spread = np.asarray(residuals, dtype=float), np.full(len(rows), NOISE)
    trust = np.ones(len(rows))
    for _ in range(REWEIGHTED):
        weights, fitted = fit(rows, target, spread, PRIORS, trust)
        trust = trust_of(target - fitted, spread)
    return weights


def predict(table: LearnedTable, item: Compound) -> np.ndarray:
    """Scheme + correction of each carbon class, ppm."""
    return item.scheme + np.array([table.correct(f).delta for f in item.features])


def cross_validate(
    compounds: Sequence[Compound], fixed: Sequence[tuple[dict[str, float], float]], folds: int = FOLDS
):  # type: ignore[no-untyped-def]
    """Errors with each compound's own spectrum left out: [(compound id, environment, error, sd)]."""
    keys = sorted({c.key for c in compounds if c.examined})
    random.Random(20261201).shuffle(keys)
    found = []
    for fold in range(folds):
        held = set(keys[fold::folds])
        table = train([c for c in compounds if c.key not in held], fixed)
        for item in (c for c in compounds if c.key in held and c.examined):
            guess = predict(table, item)
            sds = [table.correct(f).variance ** 0.5 for f in item.features]
            given = match(item, guess)
            found += list(
                zip(
                    [item.id] * len(guess),
                    item.environments,
                    given - guess,
                    sds,
                    item.atoms,
                    given,
                    strict=True,
                )
            )
    return found


def write(table: LearnedTable, path: Path) -> None:
    """The table as CSV."""
    source = "fit to tests/cases and the 13C tables"
    with path.open("w", newline="", encoding="utf-8") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["feature", "weight", "cases", "source", "origin"])
        out.writerows([f"prior:{k}", v, 0, source, "fit"] for k, v in sorted(table.priors.items()))
        out.writerow(["noise", table.noise, 0, source, "fit"])
        for name, (weight, cases) in sorted(table.weights.items()):
            if abs(weight) >= SMALLEST:
                out.writerow([name, f"{weight:.3f}", cases, source, "fit"])


def write_scales(errors: Sequence[tuple], path: Path) -> None:  # type: ignore[type-arg]
    """Observed over stated error by environment class, shrunk to the overall figure where cases are few."""
    ratios: dict[str, list[float]] = defaultdict(list)
    for row in errors:
        if row[2] == row[2]:
            ratios[row[1]].append(abs(row[2]) / row[3])
    overall = _scale([r for members in ratios.values() for r in members])
    source = "cross-validation over compounds of tests/cases/published.json and reactions.json"
    with path.open("w", newline="", encoding="utf-8") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["environment", "scale", "cases", "source", "origin"])
        out.writerow(["any", f"{overall:.3f}", sum(map(len, ratios.values())), source, "fit"])
        for name, members in sorted(ratios.items()):
            n = len(members)
            scale = (n * _scale(members) + SCALE_PRIOR * overall) / (n + SCALE_PRIOR)
            out.writerow([name, f"{scale:.3f}", n, source, "fit"])


def _scale(ratios: Sequence[float]) -> float:
    """Scale of the Student t whose central 90 % holds 90 % of the ratios."""
    return float(np.quantile(ratios, 0.9) / student.ppf(0.95, ERROR_DOF))


def report(errors: Iterable[tuple]) -> None:  # type: ignore[type-arg]
    """Print the error figures, overall and by environment."""
    every = list(errors)
    rows = [r for r in every if r[2] == r[2]]
    print(f"13C: {len(every) - len(rows)} of {len(every)} carbons taken as not printed")
    size = np.abs([r[2] for r in rows])
    z = size / np.array([r[3] for r in rows])
    within = np.quantile(size, 0.95)
    print(f"13C: {len(rows)} carbons, MAE {size.mean():.2f} ppm, 95 % within {within:.1f} ppm")
    print("     error over stated sd at 68, 90, 95 %:", np.quantile(z, (0.68, 0.90, 0.95)).round(2))
    by: Mapping[str, list] = defaultdict(list)
    for r in rows:
        by[r[1]].append(r)
    for name, members in sorted(by.items(), key=lambda kv: -sum(abs(m[2]) for m in kv[1]))[:25]:
        worst = max(members, key=lambda m: abs(m[2]))
        mae = np.mean([abs(m[2]) for m in members])
        where = f"{worst[0]} atom {worst[4]} line {worst[5]:.1f}"
        print(f"  {name:34s} n {len(members):4d}  mae {mae:5.2f}  worst {worst[2]:6.1f} {where}")


def _json(name: str):  # type: ignore[no-untyped-def]
    return json.loads((ROOT / "tests" / "cases" / f"{name}.json").read_text("utf-8"))


if __name__ == "__main__":
    everything, mapped = load_compounds(), assigned_rows()
    if "--write" in sys.argv:
        facts = ROOT / "py" / "hoodside" / "facts"
        write_scales(cross_validate(everything, mapped), facts / "carbon_errors.csv")
        write(train(everything, mapped), facts / "carbon_learned.csv")
    else:
        report(cross_validate(everything, mapped))
