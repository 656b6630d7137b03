"""Readings as they would be if a structure were right: the raw material of expected weights."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import replace
from math import fsum

from hoodside.predict.infrared import band_reliability
from hoodside.readings import CarbonLine, IrBand, MassPeak, ProtonSignal, Readings
from hoodside.weigh.carbons import weigh_carbons
from hoodside.weigh.expectations import Expectations
from hoodside.weigh.finding import Weighed
from hoodside.weigh.infrared import weigh_infrared
from hoodside.weigh.masses import weigh_masses
from hoodside.weigh.protons.weigh import weigh_protons

#: An expected band or ion is imagined as seen when that is likelier than this.
_SEEN = 0.4
#: Groups of H this near would be printed as one signal, ppm.
_TOGETHER = 0.02

Weigher = Callable[[Expectations, Readings], Weighed]


def imagined_protons(expected: Expectations) -> tuple[ProtonSignal, ...]:
    """The 1H signals of a structure, groups at one place joined."""
    signals: list[ProtonSignal] = []
    for group in sorted(expected.h1, key=lambda g: g.ppm):
        last = signals[-1] if signals else None
        if last is not None and group.ppm - last.hi < _TOGETHER and not group.exchangeable:
            signals[-1] = ProtonSignal(last.lo, group.ppm, "m", (), (last.n or 0) + group.n)
        else:
            signals.append(ProtonSignal(group.ppm, group.ppm, group.mult, group.j, float(group.n)))
    return tuple(signals)


def imagined_carbons(expected: Expectations, kinds: bool = False) -> tuple[CarbonLine, ...]:
    """The 13C lines of a structure, with their kinds if a DEPT is imagined."""
    return tuple(CarbonLine(g.ppm, g.kind if kinds else "") for g in expected.c13)


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
    return weigh_carbons(expected.c13, readings, expected.formula.count("F"))


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
    from hoodside.weigh.decibans import decibans

    summed = 0.0
    for p, q in pairs:
        forth = p * decibans(p / q) + (1 - p) * decibans((1 - p) / (1 - q))
        back = q * decibans(q / p) + (1 - q) * decibans((1 - q) / (1 - p))
        summed += (forth + back) / 2
    return summed
