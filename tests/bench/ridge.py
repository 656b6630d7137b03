"""Bayesian ridge regression: a prior variance per family of features, a noise variance per row (numpy)."""

from __future__ import annotations

from collections import Counter
from collections.abc import Mapping, Sequence
from dataclasses import dataclass

import numpy as np
from scipy.sparse import csr_matrix
from scipy.sparse.linalg import LinearOperator, cg

from hoodside.predict.features import family

#: Degrees of freedom of the Student t that stands for misassigned and misprinted values.
T_DOF = 4.0
RELATIVE_TOLERANCE, MOST_STEPS = 1e-5, 3000


@dataclass
class Design:
    """Rows of features as a sparse matrix, with the names of its columns."""

    names: list[str]
    matrix: csr_matrix

    @classmethod
    def of(cls, rows: Sequence[Mapping[str, float]], priors: Mapping[str, float]) -> Design:
        names = sorted({n for row in rows for n in row if family(n) in priors})
        index = {n: i for i, n in enumerate(names)}
        return cls(names, to_matrix(rows, index))

    def scales(self, priors: Mapping[str, float]) -> np.ndarray:
        return np.array([priors[family(n)] for n in self.names])


def to_matrix(rows: Sequence[Mapping[str, float]], index: Mapping[str, int]) -> csr_matrix:
    data: list[float] = []
    columns: list[int] = []
    starts = [0]
    for row in rows:
        for name, count in row.items():
            if name in index:
                data.append(count)
                columns.append(index[name])
        starts.append(len(data))
    return csr_matrix((data, columns, starts), shape=(len(rows), len(index)))


def fit(
    rows: Sequence[Mapping[str, float]],
    target: np.ndarray,
    noise: np.ndarray,
    priors: Mapping[str, float],
    trust: np.ndarray,
) -> tuple[dict[str, tuple[float, int]], np.ndarray]:
    """Posterior mean weight and number of rows per feature, and the fitted values.

    Solved in the dual (one unknown per row) by conjugate gradients. ``trust`` weighs rows as a Student t
    would.
    """
    design = Design.of(rows, priors)
    scale = design.scales(priors)
    forth, back = design.matrix, design.matrix.T.tocsr()
    spread = noise / trust

    def times(v: np.ndarray) -> np.ndarray:
        return forth @ (scale * (back @ v)) + spread * v

    own = design.matrix.multiply(design.matrix) @ scale + spread
    size = len(target)
    system = LinearOperator((size, size), matvec=times)
    guess = LinearOperator((size, size), matvec=lambda v: v / own)
    alpha, _ = cg(system, target, rtol=RELATIVE_TOLERANCE, maxiter=MOST_STEPS, M=guess)
    weights = scale * (back @ alpha)
    seen = Counter(n for row in rows for n in row)
    named = {n: (float(w), seen[n]) for n, w in zip(design.names, weights, strict=True)}
    return named, design.matrix @ weights


def trust_of(left: np.ndarray, noise: np.ndarray) -> np.ndarray:
    """Weight of each row given what the fit leaves of it."""
    return np.asarray((T_DOF + 1) / (T_DOF + left**2 / noise))
