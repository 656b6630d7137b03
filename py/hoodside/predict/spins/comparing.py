"""How far apart two spectra are."""

from __future__ import annotations

from itertools import pairwise

from hoodside.predict.spins.model import LineList


def displacement(a: LineList, b: LineList) -> float:
    """Mean distance in Hz that intensity must move to turn one spectrum into the other.

    The integral of the absolute difference of both normalised running integrals (the Wasserstein distance).
    """
    steps = sorted([*_shares(a, 1.0), *_shares(b, -1.0)])
    moved = balance = 0.0
    for (hz, share), (following, _) in pairwise(steps):
        balance += share
        moved += abs(balance) * (following - hz)
    return moved


def _shares(lines: LineList, sign: float) -> list[tuple[float, float]]:
    total = sum(lines.intensity) or 1.0
    return [(hz, sign * i / total) for hz, i in zip(lines.hz, lines.intensity, strict=True)]
