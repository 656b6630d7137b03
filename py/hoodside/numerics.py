"""Dense linear algebra behind plain Python functions: numpy on CPython, a JavaScript solver in the browser.

Matrices are ``array('d')`` in row-major order. They cross into numpy and into JavaScript as views of the
same memory, never element by element.
"""

from __future__ import annotations

import sys
from array import array
from functools import cache
from typing import TYPE_CHECKING, Protocol

if TYPE_CHECKING:  # ``array`` takes no type argument at run time before Python 3.12
    Vector = array[float]
    Pair = tuple[Vector, Vector]


class Solver(Protocol):
    """What the seam asks of a numeric library. Outputs are written into arrays the caller made."""

    def eigh(self, n: int, matrix: Vector, values: Vector, vectors: Vector) -> None:
        """See ``numerics.eigh``."""
        ...

    def product(self, n: int, k: int, m: int, a: Vector, b: Vector, out: Vector, turned: bool) -> None:
        """See ``numerics.product``."""
        ...

    def transitions(
        self,
        n: int,
        m: int,
        energies: Pair,
        amplitudes: Pair,
        scale: float,
        least: float,
        hz: Vector,
        intensity: Vector,
    ) -> int:
        """See ``numerics.transitions``; returns how many were written."""
        ...

    def merge(self, count: int, hz: Vector, intensity: Vector, within: float, least: float) -> int:
        """See ``numerics.merge_lines``; works in place and returns how many are left."""
        ...


def eigh(n: int, matrix: Vector) -> Pair:
    """Eigenvalues (ascending) and eigenvectors (columns of a row-major matrix) of a symmetric matrix.

    Args:
        n: dimension.
        matrix: n x n, row-major.
    """
    values, vectors = zeros(n), zeros(n * n)
    if n == 1:
        values[0], vectors[0] = matrix[0], 1.0
    elif n:
        _solver().eigh(n, matrix, values, vectors)
    return values, vectors


def product(n: int, k: int, m: int, a: Vector, b: Vector, turned: bool = False) -> Vector:
    """The n x m matrix product a b of ``a`` (n x k) and ``b`` (k x m).

    ``turned``: ``a`` is given as k x n and enters transposed.
    """
    out = zeros(n * m)
    if n and k and m:
        _solver().product(n, k, m, a, b, out, turned)
    return out


def transitions(energies: Pair, amplitudes: Pair, scale: float, least: float) -> Pair:
    """Frequencies and intensities of the transitions between two sets of levels.

    Args:
        energies: of the n lower and the m upper levels, Hz.
        amplitudes: two n x m matrices; the intensity is their product, element by element, times ``scale``.
        least: transitions whose first amplitude is no larger are left out.
    """
    n, m = len(energies[0]), len(energies[1])
    hz, intensity = zeros(n * m), zeros(n * m)
    count = _solver().transitions(n, m, energies, amplitudes, scale, least, hz, intensity)
    return hz[:count], intensity[:count]


def merge_lines(hz: Vector, intensity: Vector, within: float, least: float) -> Pair:
    """Lines by rising frequency, each joined to the one before when that is no further than ``within``.

    Args:
        hz, intensity: lines in any order; both arrays are overwritten.
        within: Hz.
        least: lines weaker than this share of the strongest are dropped.
    """
    count = _solver().merge(len(hz), hz, intensity, within, least) if hz else 0
    return hz[:count], intensity[:count]


def zeros(n: int) -> Vector:
    """``n`` zeros."""
    return array("d", [0.0]) * n


@cache
def _solver() -> Solver:
    if sys.platform == "emscripten":
        from hoodside.numerics_browser import BrowserSolver

        return BrowserSolver()
    from hoodside.numerics_cpython import NumpySolver

    return NumpySolver()
