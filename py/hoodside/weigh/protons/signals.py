"""1H signals made ready for weighing: the window of places each stands for, and how common it is anyway."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import lru_cache

from hoodside.readings import ProtonSignal, Readings
from hoodside.weigh.background import proton_spread
from hoodside.weigh.decibans import decibans
from hoodside.weigh.impurities import Stray, proton_stray

#: A printed shift stands for places this far to either side, ppm (rounding, half a splitting).
_HALF = 0.03
#: A multiplet given by its middle stands for more, by each H it holds, up to a limit.
_PER_H, _MOST = 0.02, 0.15


@dataclass(frozen=True, slots=True)
class Signal:
    """One signal as the weighing sees it."""

    index: int
    ppm: float
    lo: float  # ppm, window of places
    hi: float
    n: float | None  # H, on the scale of the structure
    pattern: str  # canonical name, "" when not told
    j: tuple[float, ...]
    anyhow_db: float  # log share of all published signals of this size that fall in the window
    stray: Stray  # what it would be, did it not belong to the structure


def prepare(readings: Readings) -> tuple[Signal, ...]:
    """All 1H signals of the readings, remembered: every structure of a case asks for them."""
    return _prepared(readings.h1, readings.solvent)


@lru_cache(maxsize=8)
def _prepared(signals: tuple[ProtonSignal, ...], solvent: str) -> tuple[Signal, ...]:
    return tuple(_signal(i, signal, solvent) for i, signal in enumerate(signals))


def rescaled(signals: Sequence[Signal], factor: float) -> tuple[Signal, ...]:
    """The signals with raw integrals turned into numbers of H."""
    return tuple(
        Signal(
            s.index,
            s.ppm,
            s.lo,
            s.hi,
            None if s.n is None else s.n * factor,
            s.pattern,
            s.j,
            s.anyhow_db,
            s.stray,
        )
        for s in signals
    )


def _signal(index: int, given: ProtonSignal, solvent: str) -> Signal:
    lo, hi = _window(given)
    share = proton_spread(given.n).between(lo, hi)
    stray = proton_stray(given, lo, hi, solvent)
    return Signal(index, given.ppm, lo, hi, given.n, given.mult, given.j, decibans(share), stray)


def _window(given: ProtonSignal) -> tuple[float, float]:
    half = _HALF
    if given.lo == given.hi and (given.mult.endswith("m") or (given.n or 1) > 3):
        half = min(_HALF + _PER_H * (given.n or 1), _MOST)
    return given.lo - half, given.hi + half
