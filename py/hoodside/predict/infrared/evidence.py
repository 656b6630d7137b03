"""How strongly a printed band list, or a stretch marked clear, speaks for a structure's expected bands.

A list is taken as drawn from a mixture: each expected band is printed with its counted reliability, at a
place scattered about the predicted one with heavy tails; the rest are bands that any compound may show.
Weights are in decibans (10 log10 of a likelihood ratio; Good, 1950) against a compound of which nothing is
known.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass

from hoodside.predict.infrared.reliability import background_density, band_reliability, seen_when_looked
from hoodside.predict.model import IrExpectation

#: Bands per list that no expectation accounts for, on average (counted over the published lists).
STRAY_BANDS = 3.0
#: Share of bands that lie outside what the spread tells, and how much wider those scatter.
TAIL, TAIL_WIDTH = 0.3, 4.0
#: Beyond an expected range by this much a printed band is not called that band, cm-1.
SLACK = 10.0
#: A region marked clear must hold this share of a band's range before it says anything.
_LEAST_COVERED = 0.5
_ORDER = ("weak", "medium", "strong")
#: Likelihood factors for a strength as expected, one step off, two steps off (common practice).
_STRENGTH_FACTOR = (1.5, 0.7, 0.15)


@dataclass(frozen=True, slots=True)
class BandEvidence:
    """What one printed band, one missing band or one clear region says."""

    reading: int  # index of the printed band or of the clear region; -1 for a missing band
    weight_db: float
    expected: IrExpectation | None  # the band it is about; None for a stray one


def weigh_bands(
    printed: Sequence[float], expected: Sequence[IrExpectation], strengths: Sequence[str] = ()
) -> tuple[BandEvidence, ...]:
    """Evidence from every printed band, then from every counted expectation that is missing.

    Args:
        printed: wavenumbers, cm-1.
        strengths: "strong", "medium", "weak" or "" for each of them; empty when none were noted.
    Of a pair of bands that is missing whole, one counts.
    """
    chances = [band_reliability(e.mode, e.strength, len(printed)) for e in expected]
    total = STRAY_BANDS + sum(chances)
    noted = [*strengths, *[""] * (len(printed) - len(strengths))]
    found = [
        _weigh_band(
            i, cm1, [c * _as_strong(e, seen) for e, c in zip(expected, chances, strict=True)], expected, total
        )
        for i, (cm1, seen) in enumerate(zip(printed, noted, strict=True))
    ]
    return (*found, *_missing(printed, expected, chances))


def _missing(
    printed: Sequence[float], expected: Sequence[IrExpectation], chances: Sequence[float]
) -> Iterator[BandEvidence]:
    pairs: set[str] = set()
    for e, chance in zip(expected, chances, strict=True):
        if not e.absence_counts or e.pair in pairs or any(covers(e, cm1) for cm1 in printed):
            continue
        if e.pair:
            pairs.add(e.pair)
        yield BandEvidence(-1, 10 * math.log10(1 - chance), e)


def weigh_clear(
    regions: Iterable[tuple[float, float]], expected: Sequence[IrExpectation]
) -> tuple[BandEvidence, ...]:
    """Evidence from regions (lo, hi in cm-1) with a flat baseline: an entry per band that belongs there."""
    return tuple(
        BandEvidence(i, 10 * math.log10(1 - share * seen_when_looked(e.strength, e.absence_counts)), e)
        for i, (lo, hi) in enumerate(regions)
        for e in expected
        if (share := _share_inside(e, lo, hi)) >= _LEAST_COVERED
    )


def covers(expected: IrExpectation, cm1: float) -> bool:
    """Whether a band at ``cm1`` may be called the expected one."""
    return expected.lo - SLACK <= cm1 <= expected.hi + SLACK


def _weigh_band(
    index: int, cm1: float, chances: Sequence[float], expected: Sequence[IrExpectation], total: float
) -> BandEvidence:
    anyhow = background_density(cm1)
    shares = [chance * _density(cm1, e) for e, chance in zip(expected, chances, strict=True)]
    ratio = (STRAY_BANDS * anyhow + sum(shares)) / (total * anyhow)
    best = max(range(len(shares)), key=shares.__getitem__, default=-1)
    named = best >= 0 and covers(expected[best], cm1)
    return BandEvidence(index, 10 * math.log10(ratio), expected[best] if named else None)


def _as_strong(expected: IrExpectation, seen: str) -> float:
    """How well the strength noted suits the band: a factor on its likelihood, 1 when not told."""
    if seen not in _ORDER or expected.strength not in _ORDER:
        return 1.0
    return _STRENGTH_FACTOR[abs(_ORDER.index(expected.strength) - _ORDER.index(seen))]


def _density(cm1: float, expected: IrExpectation) -> float:
    """Probability density per cm-1 of the band at ``cm1``: a normal core with exponential wings."""
    off, sd = abs(cm1 - expected.typical), expected.sd
    core = math.exp(-((off / sd) ** 2) / 2) / (sd * math.sqrt(2 * math.pi))
    wide = TAIL_WIDTH * sd
    return (1 - TAIL) * core + TAIL * math.exp(-off / wide) / (2 * wide)


def _share_inside(expected: IrExpectation, lo: float, hi: float) -> float:
    """Share of the expected range that the region holds."""
    inside = min(hi, expected.hi) - max(lo, expected.lo)
    return max(inside, 0.0) / max(expected.hi - expected.lo, 1.0)
