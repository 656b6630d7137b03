"""How well printed couplings agree with the expected ones."""

from __future__ import annotations

from collections.abc import Sequence

from hoodside.weigh.background import spread
from hoodside.weigh.decibans import decibans, t_between

#: Scale of the error of an expected coupling, Hz, and the part of it that grows with the coupling.
_ABSOLUTE, _RELATIVE = 0.5, 0.07
#: Share of couplings that are misread or belong to another pattern.
_MISREAD = 0.06
#: Window of a printed coupling, Hz (rounding and digital resolution).
_HALF = 0.25
#: Splittings smaller than this often stay unseen, Hz.
_UNRESOLVED = 3.0


def coupling_weight(expected: Sequence[float], printed: Sequence[float]) -> float:
    """Weight in decibans of the printed couplings (Hz, any order) for the expected ones; 0 without either.

    The printed ones are compared with the best run of as many expected ones, largest first: small splittings
    are left out by chemists, never large ones.
    """
    if not expected or not printed:
        return 0.0
    seen = sorted(printed, reverse=True)
    due = sorted(expected, reverse=True)
    if len(seen) > len(due):
        due += [due[-1]] * (len(seen) - len(due))
    due = _without_unresolved(due, len(seen))
    return sum(_one(j, hz) for j, hz in zip(seen, due, strict=True))


def _without_unresolved(due: list[float], wanted: int) -> list[float]:
    while len(due) > wanted and due[-1] < _UNRESOLVED:
        due = due[:-1]
    if len(due) == wanted:
        return due
    # An apparent pattern: neighbouring couplings merge to their mean.
    while len(due) > wanted:
        gaps = [due[i] - due[i + 1] for i in range(len(due) - 1)]
        i = min(range(len(gaps)), key=gaps.__getitem__)
        due = [*due[:i], (due[i] + due[i + 1]) / 2, *due[i + 2 :]]
    return due


def _one(printed: float, expected: float) -> float:
    lo, hi = printed - _HALF, printed + _HALF
    anyhow = spread("h1_coupling_background").between(lo, hi)
    scale = _ABSOLUTE + _RELATIVE * expected
    suits = t_between(lo, hi, expected, scale)
    return decibans(((1 - _MISREAD) * suits + _MISREAD * anyhow) / anyhow)
