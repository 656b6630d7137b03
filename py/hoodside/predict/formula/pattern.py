"""Isotope patterns by exact convolution of the isotope distributions of all atoms."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.predict.formula.masses import ELECTRON_MASS, isotopes_of, main_isotope
from hoodside.predict.formula.model import Formula

#: Species rarer than this fraction of all molecules are dropped while convolving.
_FLOOR = 1e-12
#: Masses nearer than this (u) are one isotopic composition reached by two ways.
_SAME = 1e-7

# One peak while convolving: (mass number, mass, probability).
_Line = tuple[int, float, float]


@dataclass(frozen=True, slots=True)
class IsotopePeak:
    """One peak of an isotope pattern."""

    mz: float  # centroid
    rel: float  # per cent of the tallest peak
    fraction: float  # of all molecules
    nominal: int  # mass number


def isotope_pattern(
    formula: Formula, min_rel: float = 0.1, resolving_power: float | None = None
) -> tuple[IsotopePeak, ...]:
    """Isotope pattern of a molecule or ion, by increasing m/z.

    Args:
        min_rel: peaks lower than this, in per cent of the tallest, are left out.
        resolving_power: m/dm of the instrument; peaks nearer than that merge to their centroid. None:
            unit resolution, one peak per mass number.
    An uncharged formula is answered in u (as if of charge 1, electron mass neglected).
    Source: exact polynomial convolution, e.g. Yergey, Int. J. Mass Spectrom. Ion Phys. 1983, 52, 337.
    """
    fine = resolving_power is not None
    lines: list[_Line] = [(0, 0.0, 1.0)]
    for symbol, count in formula.parts:
        lines = _convolve(lines, _power(symbol, count, fine), fine)
    merged = _merge_resolved(lines, resolving_power) if resolving_power is not None else lines
    return _as_peaks(merged, formula.charge, min_rel)


@cache
def _power(symbol: str, count: int, fine: bool) -> list[_Line]:
    """The distribution of ``count`` atoms of one kind, by repeated squaring."""
    if symbol[0].isdigit():
        number, mass = main_isotope(symbol)
        return [(number * count, mass * count, 1.0)]
    if count == 1:
        return list(isotopes_of(symbol))
    half = _power(symbol, count // 2, fine)
    even = _convolve(half, half, fine)
    return _convolve(even, _power(symbol, 1, fine), fine) if count % 2 else even


def _convolve(a: list[_Line], b: list[_Line], fine: bool) -> list[_Line]:
    products = [(na + nb, ma + mb, pa * pb) for na, ma, pa in a for nb, mb, pb in b if pa * pb > _FLOOR]
    if fine:
        return _merge(sorted(products, key=lambda line: line[1]), _SAME)
    bins: dict[int, list[float]] = {}
    for number, mass, probability in products:
        entry = bins.setdefault(number, [0.0, 0.0])
        entry[0] += probability * mass
        entry[1] += probability
    return [(number, weighted / p, p) for number, (weighted, p) in sorted(bins.items())]


def _merge(lines: list[_Line], gap: float) -> list[_Line]:
    """Join neighbours nearer than ``gap`` u to their centroid; ``lines`` by increasing mass."""
    merged: list[_Line] = []
    for number, mass, p in lines:
        if merged and mass - merged[-1][1] < gap:
            number0, mass0, p0 = merged[-1]
            centre = (mass0 * p0 + mass * p) / (p0 + p)
            merged[-1] = (number0 if p0 >= p else number, centre, p0 + p)
        else:
            merged.append((number, mass, p))
    return merged


def _merge_resolved(lines: list[_Line], resolving_power: float) -> list[_Line]:
    heaviest = max((mass for _, mass, _ in lines), default=0.0)
    return _merge(sorted(lines, key=lambda line: line[1]), heaviest / resolving_power)


def _as_peaks(lines: list[_Line], charge: int, min_rel: float) -> tuple[IsotopePeak, ...]:
    tallest = max(p for _, _, p in lines)
    z = abs(charge) or 1
    return tuple(
        IsotopePeak((mass - charge * ELECTRON_MASS) / z, 100 * p / tallest, p, number)
        for number, mass, p in lines
        if 100 * p / tallest >= min_rel
    )
