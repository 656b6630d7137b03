"""The IR spectrum, or stretches of it not looked at yet, as further measurements."""

from __future__ import annotations

from functools import partial

from hoodside.advise.imagined import bernoulli, by_bands, gap, imagined_bands, only
from hoodside.advise.model import NOTHING, Gain, Measurement, Pair
from hoodside.predict.infrared import IrRegion, ir_regions, seen_when_looked
from hoodside.predict.model import IrExpectation
from hoodside.readings import Readings
from hoodside.weigh.expectations import Expectations

#: A list of bands longer than this is a spectrum: every region has been looked at.
_WHOLE = 5
#: Chance that a region shows some band whatever the structure: above and below the fingerprint.
_STRAY, _STRAY_FINGERPRINT, _FINGERPRINT = 0.04, 0.5, 1500.0
_SUREST = 0.97


def infrared_measurements(readings: Readings) -> list[Measurement]:
    """The whole spectrum when there is none, else the regions not looked at."""
    offers = []
    if not readings.ir:
        offers.append(Measurement("ir", "IR spectrum", lambda pair: _whole(pair, readings)))
    if 0 < len(readings.ir) <= _WHOLE or (readings.ir_clear and not readings.ir):
        offers += [_look(region) for region in ir_regions() if not _looked_at(region, readings)]
    return offers


def _look(region: IrRegion) -> Measurement:
    name = f"IR: look at {region.hi:g} to {region.lo:g} cm⁻¹ ({region.name})"
    return Measurement("ir region", name, partial(_region, region))


def _looked_at(region: IrRegion, readings: Readings) -> bool:
    middle = (region.lo + region.hi) / 2
    seen = any(region.lo < band.cm1 <= region.hi for band in readings.ir)
    return seen or any(clear.lo <= middle <= clear.hi for clear in readings.ir_clear)


def _whole(pair: Pair, readings: Readings) -> Gain:
    weight = gap(pair.first, pair.second, lambda e: only(readings, ir=imagined_bands(e)), by_bands)
    best = max((_region(r, pair) for r in ir_regions()), key=lambda gain: gain.expected_db)
    return Gain(max(weight, best.expected_db), best.why, best.if_then)


def _region(region: IrRegion, pair: Pair) -> Gain:
    chances = [_chance(e, region) for e in (pair.first, pair.second)]
    weight = bernoulli([(chances[0], chances[1])])
    if abs(chances[0] - chances[1]) < 0.2:
        return NOTHING
    more = 0 if chances[0] > chances[1] else 1
    band = _strongest((pair.first, pair.second)[more], region)
    if band is None:
        return NOTHING
    with_it, without = pair.names[more], pair.names[1 - more]
    where = f"{band.typical:.0f} cm⁻¹"
    why = f"{with_it} should show its {band.mode} ({band.group}) near {where}, {without} nothing there."
    return Gain(weight, why, (f"Band near {where}: {with_it}.", f"Clear: {without}."))


def _chance(expected: Expectations, region: IrRegion) -> float:
    """Chance that something is seen in a region."""
    clear = 1 - (_STRAY if region.lo >= _FINGERPRINT else _STRAY_FINGERPRINT)
    for band in _inside(expected, region):
        clear *= 1 - seen_when_looked(band.strength, band.absence_counts) * _share(band, region)
    return min(1 - clear, _SUREST)


def _inside(expected: Expectations, region: IrRegion) -> list[IrExpectation]:
    return [band for band in expected.ir if _share(band, region) > 0]


def _share(band: IrExpectation, region: IrRegion) -> float:
    inside = min(band.hi, region.hi) - max(band.lo, region.lo)
    return max(inside, 0.0) / max(band.hi - band.lo, 1.0)


def _strongest(expected: Expectations, region: IrRegion) -> IrExpectation | None:
    bands = _inside(expected, region)
    return max(
        bands, key=lambda b: seen_when_looked(b.strength, b.absence_counts) * _share(b, region), default=None
    )
