"""How well printed couplings agree with the expected ones."""

from __future__ import annotations

from collections.abc import Sequence
from functools import lru_cache
from math import fsum

from hoodside.predict.multiplet import Splitting
from hoodside.weigh.background import spread
from hoodside.weigh.decibans import decibans, t_between

#: Least scale of the error of an expected coupling, Hz (digital resolution, reading of the printout).
_LEAST = 0.35
#: Share of couplings that are misread or belong to another pattern.
_MISREAD = 0.08
#: Window of a printed coupling, Hz (rounding).
_HALF = 0.25


def coupling_weight(expected: Sequence[Splitting], printed: Sequence[float]) -> float:
    """Weight in decibans of printed couplings (Hz) for as many expected splittings, both largest first."""
    seen = sorted(printed, reverse=True)
    return fsum(_one(j, s.hz, max(s.sd, _LEAST)) for j, s in zip(seen, expected, strict=False))


@lru_cache(maxsize=4096)
def _one(printed: float, expected: float, sd: float) -> float:
    lo, hi = printed - _HALF, printed + _HALF
    anyhow = spread("h1_coupling_background").between(lo, hi)
    suits = t_between(lo, hi, expected, sd)
    return decibans(((1 - _MISREAD) * suits + _MISREAD * anyhow) / anyhow)
