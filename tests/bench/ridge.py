"""Bayesian ridge regression with a prior variance per feature, for the offline fits (numpy)."""

from __future__ import annotations

from collections import Counter
from collections.abc import Mapping, Sequence

import numpy as np

from hoodside.predict.features import family

#: Degrees of freedom of the Student t that stands for misassigned and misprinted values.
T_DOF = 4.0


def fit_weights(
    rows: Sequence[Mapping[str, float]],
    residuals: Sequence[float],
    priors: Mapping[str, float],
    noise: float,
    rounds: int = 3,
) -> dict[str, tuple[float, int]]:
    """Posterior mean weight and number of rows per feature.

    Solved in the dual (one unknown per row); outliers are weighed down as a Student t would (iteratively
    reweighted least squares).
    """
    names = sorted({n for row in rows for n in row if family(n) in priors})
    index = {n: i for i, n in enumerate(names)}
    design = _design(rows, index)
    scale = np.array([priors[family(n)] for n in names])
    target = np.asarray(residuals, dtype=float)
    kernel = (design.multiply(scale) @ design.T).toarray()
    trust = np.ones(len(rows))
    for _ in range(rounds):
        alpha = np.linalg.solve(kernel + np.diag(noise / trust), target)
        left = target - kernel @ alpha
        trust = (T_DOF + 1) / (T_DOF + left**2 / noise)
    weights = scale * (design.T @ alpha)
    seen = Counter(n for row in rows for n in row)
    return {n: (float(weights[i]), seen[n]) for n, i in index.items()}


def _design(rows, index):  # type: ignore[no-untyped-def]
    from scipy.sparse import csr_matrix

    data, columns, starts = [], [], [0]
    for row in rows:
        for name, count in row.items():
            if name in index:
                data.append(count)
                columns.append(index[name])
        starts.append(len(data))
    return csr_matrix((data, columns, starts), shape=(len(rows), len(index)))
