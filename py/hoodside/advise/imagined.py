"""Readings as they would be if a structure were right: the raw material of expected weights."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
from dataclasses import replace
from math import fsum

from hoodside.predict.infrared import band_reliability
from hoodside.readings import CarbonLine, IrBand, MassPeak, ProtonSignal, Readings
from hoodside.weigh.carbons import weigh_carbons
from hoodside.weigh.decibans import decibans
from hoodside.weigh.expectations import Expectations
from hoodside.weigh.finding import Weighed
from hoodside.weigh.infrared import weigh_infrared
from hoodside.weigh.masses import weigh_masses
from hoodside.weigh.protons.weigh import weigh_protons

#: An expected band or ion is imagined as seen when that is likelier than this.
_SEEN = 0.4
#: Groups of H this near would be printed as one signal, ppm.
_TOGETHER = 0.02

#: Where imagined shifts fall about predicted ones, in stated deviations: even quantiles of Student t with
#: three degrees of freedom, in turn. Without scatter every measurement would promise more than it gives.
_SCATTER = (0.35, -1.42, 1.42, -0.35)

Weigher = Callable[[Expectations, Readings], Weighed]


def imagined_protons(expected: Expectations) -> tuple[ProtonSignal, ...]:
    """The 1H signals of a structure, as far off the prediction as real ones, groups at one place joined."""
    signals: list[ProtonSignal] = []
    groups = sorted(expected.h1, key=lambda g: g.ppm)
    places = [g.ppm if g.exchangeable else g.ppm + _off(i, g.sd) for i, g in enumerate(groups)]
    for ppm, group in sorted(zip(places, groups, strict=True), key=lambda entry: entry[0]):
        last = signals[-1] if signals else None
        if last is not None and ppm - last.hi < _TOGETHER and not group.exchangeable:
            signals[-1] = ProtonSignal(last.lo, ppm, "m", (), (last.n or 0) + group.n)
        else:
            signals.append(ProtonSignal(ppm, ppm, group.mult, group.j, float(group.n)))
    return tuple(signals)


def _off(place: int, sd: float) -> float:
    return sd * _SCATTER[place % len(_SCATTER)]


def imagined_carbons(expected: Expectations, kinds: bool = False) -> tuple[CarbonLine, ...]:
    """The 13C lines of a structure, with their kinds if a DEPT is imagined."""
    return tuple(
        CarbonLine(g.ppm + _off(i, g.sd), g.kind if kinds else "") for i, g in enumerate(expected.c13)
    )


def imagined_bands(expected: Expectations) -> tuple[IrBand, ...]:
    """The IR bands a structure would most likely show."""
    likely = [e for e in expected.ir if band_reliability(e.mode, e.strength, 10) >= _SEEN]
    return tuple(IrBand(e.typical, e.strength) for e in likely)


def imagined_peaks(expected: Expectations) -> tuple[MassPeak, ...]:
    """The mass peaks a structure would most likely show."""
    return tuple(MassPeak(float(round(e.mz))) for e in expected.ms if e.weight >= _SEEN)


def by_protons(expected: Expectations, readings: Readings) -> Weighed:
    """Weigh 1H signals."""
    return weigh_protons(expected.h1, expected.patterns, readings)


def by_carbons(expected: Expectations, readings: Readings) -> Weighed:
    """Weigh 13C lines."""
    return weigh_carbons(expected.c13, readings, expected.doubled)


def by_bands(expected: Expectations, readings: Readings) -> Weighed:
    """Weigh IR bands."""
    return weigh_infrared(expected.ir, readings)


def by_peaks(expected: Expectations, readings: Readings) -> Weighed:
    """Weigh mass peaks."""
    return weigh_masses(expected.formula, expected.ms, readings)


def gap(
    first: Expectations,
    second: Expectations,
    imagine: Callable[[Expectations], Readings],
    weigh: Weigher,
) -> float:
    """Expected weight between two structures, mean over which of them is right, decibans."""
    one, other = imagine(first), imagine(second)
    there = total(weigh(first, one)) - total(weigh(second, one))
    back = total(weigh(second, other)) - total(weigh(first, other))
    return max((there + back) / 2, 0.0)


def total(weighed: Weighed) -> float:
    """Sum of the findings, decibans."""
    return fsum(f.weight_db for f in weighed.findings)


def only(readings: Readings, **kinds: object) -> Readings:
    """The conditions of some readings with nothing measured but ``kinds``."""
    bare: dict[str, object] = {"h1": (), "c13": (), "ir": (), "ir_clear": (), "ms": (), "wet": ()}
    return replace(readings, **{**bare, "hrms": None, "analysis": None, "raw_integrals": False, **kinds})  # type: ignore[arg-type]


def bernoulli(pairs: Iterable[tuple[float, float]]) -> float:
    """Expected weight of yes-or-no outcomes with the chances (first, second), decibans."""
    return fsum(divergence((p, 1 - p), (q, 1 - q)) for p, q in pairs)


def divergence(first: Sequence[float], second: Sequence[float]) -> float:
    """Expected weight of one observation, mean over which of two structures is right, decibans.

    Args: the chance of every outcome, none of them 0, under the first structure and under the second.
    """
    return fsum((p - q) * decibans(p / q) for p, q in zip(first, second, strict=True)) / 2
