"""IR bands and flat stretches from a curve."""

from __future__ import annotations

import math
from bisect import bisect_left, bisect_right
from collections.abc import Sequence

from hoodside.facts import load_table
from hoodside.readings.jcamp.curve import Maximum, find_maxima, noise
from hoodside.readings.jcamp.spectrum import Spectrum
from hoodside.readings.model import IrBand, IrClear

#: Parts of the tallest band's absorbance (common practice in reading strengths off a printout).
_STRONG, _MEDIUM, _LEAST, _FLAT = 0.55, 0.2, 0.02, 0.03
_NOISES = 5.0
_BROAD_CM1, _SHARP_CM1 = 100.0, 40.0
_MOST_BANDS = 60
_LEAST_TRANSMITTANCE = 1e-3
_TRANSMITTED = ("trans", "%t", "% t", "reflect")
_PERCENT_ABOVE = 2.0  # transmittance above this must be in per cent
_LOWEST, _HIGHEST = 400.0, 4000.0


def absorbance(spectrum: Spectrum) -> tuple[list[float], list[float]]:
    """Wavenumbers in ascending order and absorbances, whatever the file holds."""
    pairs = sorted((x, y) for x, y in zip(spectrum.x, spectrum.y, strict=True) if _LOWEST <= x <= _HIGHEST)
    x, y = [p[0] for p in pairs], [p[1] for p in pairs]
    if not any(word in spectrum.y_unit for word in _TRANSMITTED):
        return x, y
    scale = 100.0 if y and max(y) > _PERCENT_ABOVE else 1.0
    return x, [-math.log10(max(t / scale, _LEAST_TRANSMITTANCE)) for t in y]


def pick_bands(spectrum: Spectrum) -> tuple[list[IrBand], list[IrClear]]:
    """Bands, highest wavenumber first, and the diagnostic regions with a flat baseline."""
    x, y = absorbance(spectrum)
    if len(x) < 3:
        return [], []
    span = max(y) - min(y)
    if span <= 0:
        return [], []
    least = max(_LEAST * span, _NOISES * noise(y))
    found = sorted(find_maxima(x, y, least), key=lambda m: -m.prominence)[:_MOST_BANDS]
    tallest = max((m.prominence for m in found), default=span)
    bands = [_band(m, tallest) for m in sorted(found, key=lambda m: -m.x)]
    return bands, _flat_regions(x, y, tallest, least)


def _band(maximum: Maximum, tallest: float) -> IrBand:
    part = maximum.prominence / tallest
    strength = "strong" if part >= _STRONG else "medium" if part >= _MEDIUM else "weak"
    shape = "broad" if maximum.width >= _BROAD_CM1 else "sharp" if maximum.width <= _SHARP_CM1 else ""
    return IrBand(round(maximum.x), strength, shape)


def _flat_regions(x: Sequence[float], y: Sequence[float], tallest: float, least: float) -> list[IrClear]:
    allowed = max(_FLAT * tallest, least)
    flat = []
    for row in load_table("ir_regions"):
        lo, hi = float(row["lo_cm1"]), float(row["hi_cm1"])
        inside = y[bisect_left(x, lo) : bisect_right(x, hi)]
        covered = bool(x) and x[0] <= lo and x[-1] >= hi
        # A slope of the baseline is no band: only what stands out of the line between the ends counts.
        if covered and len(inside) > 2 and _stands_out(inside) < allowed:
            flat.append(IrClear(lo, hi))
    return flat


def _stands_out(y: Sequence[float]) -> float:
    last = len(y) - 1
    return max(abs(value - (y[0] + (y[-1] - y[0]) * i / last)) for i, value in enumerate(y))
