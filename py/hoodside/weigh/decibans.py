"""Decibans, and the error law of shifts and couplings: Student t with three or four degrees of freedom."""

from __future__ import annotations

from collections.abc import Iterable
from math import atan, fsum, log10, pi, sqrt

_ROOT_3 = sqrt(3)


def decibans(ratio: float) -> float:
    """10 log10 of a likelihood ratio above 0."""
    return 10 * log10(ratio)


def odds(db: float) -> float:
    """The likelihood ratio of a weight."""
    return float(10 ** (db / 10))


def joined(weights: Iterable[float]) -> float:
    """Weight of "any of these": 10 log10 of the sum of the ratios."""
    listed = list(weights)
    top = max(listed)
    return top + decibans(fsum(odds(w - top) for w in listed))


def t_density(x: float) -> float:
    """Density of Student t with four degrees of freedom."""
    return float(0.375 * (1 + x * x / 4) ** -2.5)


def t_below(x: float, freedom: int = 4) -> float:
    """Distribution function of Student t with three or four degrees of freedom (closed forms)."""
    if freedom == 3:
        y = x / _ROOT_3
        return 0.5 + (y / (1 + y * y) + atan(y)) / pi
    u = x * x / (4 + x * x)
    half = 0.75 * sqrt(u) * (1 - u / 3)
    return 0.5 + half if x > 0 else 0.5 - half


def t_between(lo: float, hi: float, centre: float, scale: float, freedom: int = 4) -> float:
    """Probability that a value scattered by ``scale`` about ``centre`` falls between ``lo`` and ``hi``."""
    return t_below((hi - centre) / scale, freedom) - t_below((lo - centre) / scale, freedom)
