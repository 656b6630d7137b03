"""Fits how far each kind of evidence is believed and writes facts/evidence_trust.csv.

Weights are made with predictions by tables that never saw the compound (``held_out``), every factor set to 1;
then the factors are sought that make the truths of published.json likeliest among their rivals of the same
formula (conditional logit), drawn towards ``PRIOR``. Kinds that lean on the same reading share a factor. Run
``python tests/bench/fit_trust.py`` to print, with ``--write`` to rewrite the table. Nothing here is random.
"""

from __future__ import annotations

import csv
import sys
from collections.abc import Sequence
from pathlib import Path

import numpy as np
from scipy.optimize import minimize

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.held_out import folds  # noqa: E402
from bench.ranking_cases import Outcome, weigh_case  # noqa: E402
from hoodside.weigh import trust  # noqa: E402

FACTS = HERE.parents[2] / "py" / "hoodside" / "facts"
SOURCE = "fitted over the published compounds of tests/cases/published.json (tests/bench/fit_trust.py)"
GROUPS = (
    ("h1.shift",),
    ("h1.count", "h1.stray", "h1.missing"),
    ("h1.pattern",),
    ("h1.coupling",),
    ("c13.shift",),
    ("c13.stray", "c13.missing"),
    ("ir.band",),
    ("ir.missing",),
    ("ms.ion",),
)
PRIOR, STRENGTH, FOLDS = 0.5, 2.0, 5
NATS = np.log(10) / 10


def evidence(outcome: Outcome) -> np.ndarray:
    """Weights in nats: structures of the truth's formula (truth first) by group of kinds."""
    place = {kind: g for g, kinds in enumerate(GROUPS) for kind in kinds}
    formula = outcome.tallies[0].expected.formula
    rows = [t for t in outcome.tallies if t.expected.formula == formula]
    found = np.zeros((len(rows), len(GROUPS)))
    for i, tally in enumerate(rows):
        for finding in tally.findings:
            if finding.kind in place:
                found[i, place[finding.kind]] += finding.weight_db * NATS
    return found


def surprise(table: np.ndarray, factors: np.ndarray) -> tuple[float, np.ndarray]:
    """-log of the share of the truth, and its slope by the logs of the factors."""
    scores = table @ factors
    shares = np.exp(scores - scores.max())
    shares /= shares.sum()
    return -np.log(shares[0] + 1e-300), -(table[0] - shares @ table) * factors


def fit(tables: Sequence[np.ndarray]) -> np.ndarray:
    """The likeliest factors."""

    def cost(logs: np.ndarray) -> tuple[float, np.ndarray]:
        off = logs - np.log(PRIOR)
        parts = [surprise(t, np.exp(logs)) for t in tables]
        return sum(p[0] for p in parts) + STRENGTH * off @ off, sum(p[1] for p in parts) + 2 * STRENGTH * off

    return np.exp(minimize(cost, np.full(len(GROUPS), np.log(PRIOR)), jac=True).x)


def cross_validated(tables: Sequence[np.ndarray]) -> float:
    """Mean surprise in nats with each fifth left out of the fit."""
    total = 0.0
    for fold in range(FOLDS):
        factors = fit([t for i, t in enumerate(tables) if i % FOLDS != fold])
        total += sum(surprise(t, factors)[0] for i, t in enumerate(tables) if i % FOLDS == fold)
    return total / len(tables)


def write(factors: np.ndarray) -> None:
    """Replace the fitted rows of the table; rows from common practice stay."""
    path = FACTS / "evidence_trust.csv"
    with path.open(encoding="utf-8", newline="") as file:
        rows = list(csv.DictReader(file))
    new = {kind: f for kinds, f in zip(GROUPS, factors, strict=True) for kind in kinds}
    for row in rows:
        if row["kind"] in new:
            row.update(factor=f"{new[row['kind']]:.2f}", source=SOURCE, origin="computed")
    with path.open("w", encoding="utf-8", newline="") as file:
        out = csv.DictWriter(file, ["kind", "factor", "source", "origin"], lineterminator="\n")
        out.writeheader()
        out.writerows(rows)


def main() -> None:
    """Fit, print and, when asked, write."""
    factors = trust._factors()
    for kind in factors:
        factors[kind] = 1.0
    tables = [evidence(weigh_case(case)) for cases in folds() for case in cases]
    tables = [t for t in tables if len(t) > 1]
    print(f"mean surprise of the truth, left out: {cross_validated(tables):.3f} nats, {len(tables)} cases")
    found = fit(tables)
    for kinds, factor in zip(GROUPS, found, strict=True):
        print(f"  {', '.join(kinds):36} {factor:.2f}")
    if "--write" in sys.argv:
        write(found)


if __name__ == "__main__":
    main()
