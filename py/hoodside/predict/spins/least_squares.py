"""Small linear least-squares problems, in plain Python."""

from __future__ import annotations

from collections.abc import Sequence

#: Ridge relative to the largest diagonal element that keeps near-singular problems solvable.
_RIDGE = 1e-6


def solve_least_squares(rows: Sequence[Sequence[float]], values: Sequence[float]) -> list[float] | None:
    """Solution x of rows x = values with the least sum of squares; None when there is none to find."""
    n = len(rows[0]) if rows else 0
    normal = [[sum(r[i] * r[k] for r in rows) for k in range(n)] for i in range(n)]
    right = [sum(r[i] * v for r, v in zip(rows, values, strict=True)) for i in range(n)]
    top = max((normal[i][i] for i in range(n)), default=0.0)
    for i in range(n):
        normal[i][i] += _RIDGE * top
    return solve_symmetric(normal, right)


def solve_symmetric(matrix: list[list[float]], right: Sequence[float]) -> list[float] | None:
    """Solution of a symmetric positive definite system by Cholesky factors; None when it is not one."""
    n = len(matrix)
    lower = [[0.0] * n for _ in range(n)]
    for i in range(n):
        for k in range(i + 1):
            left = matrix[i][k] - sum(lower[i][m] * lower[k][m] for m in range(k))
            if i == k:
                if left <= 0:
                    return None
                lower[i][i] = left**0.5
            else:
                lower[i][k] = left / lower[k][k]
    forward: list[float] = []
    for i in range(n):
        forward.append((right[i] - sum(lower[i][m] * forward[m] for m in range(i))) / lower[i][i])
    solution = [0.0] * n
    for i in reversed(range(n)):
        after = sum(lower[m][i] * solution[m] for m in range(i + 1, n))
        solution[i] = (forward[i] - after) / lower[i][i]
    return solution
