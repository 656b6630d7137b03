"""NMR: signals and lines from a curve or a table of peaks."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise
from math import comb

from hoodside.readings.jcamp.curve import find_maxima, noise
from hoodside.readings.jcamp.spectrum import Spectrum
from hoodside.readings.jcamp.tables import Peak
from hoodside.readings.model import CarbonLine, ProtonSignal

#: Lines of one 1H signal lie no further apart than this, Hz.
_APART_HZ = 20.0
_USUAL_MHZ = 400.0
_NAMES = {1: "s", 2: "d", 3: "t", 4: "q", 5: "quint", 6: "sext", 7: "sept"}
_EVEN_HZ = 0.8  # spacings that differ by no more are one J
_NOISES = 8.0
_LEAST = 0.01  # of the tallest line
_BROAD_HZ = 10.0
_MOST_SIGNALS = 200
#: Letters of PEAK TABLE (XYM..XYM) for 13C: the multiplicity by directly bound H.
_KINDS = {"S": "C", "D": "CH", "T": "CH2", "Q": "CH3"}


def proton_signals(spectrum: Spectrum) -> tuple[list[ProtonSignal], bool]:
    """1H signals, highest shift first, and whether their ``n`` are raw integrals."""
    mhz = spectrum.mhz or _USUAL_MHZ
    if spectrum.peaks:
        return [_of_peaks(group, mhz) for group in _grouped(spectrum.peaks, mhz)][:_MOST_SIGNALS], False
    return _of_curve(spectrum, mhz)[:_MOST_SIGNALS], True


def carbon_lines(spectrum: Spectrum) -> list[CarbonLine]:
    """13C lines, highest shift first."""
    if spectrum.peaks:
        found = [CarbonLine(round(p.x, 2), _KINDS.get(p.extra.upper(), "")) for p in spectrum.peaks]
    else:
        x, y = _ascending(spectrum)
        least = max(_NOISES * noise(y), 0.05 * max(y, default=0.0))
        found = [CarbonLine(round(m.x, 2)) for m in find_maxima(x, y, least)]
    return sorted(found, key=lambda line: -line.ppm)[:_MOST_SIGNALS]


def _ascending(spectrum: Spectrum) -> tuple[list[float], list[float]]:
    pairs = sorted(zip(spectrum.x, spectrum.y, strict=True))
    return [p[0] for p in pairs], [p[1] for p in pairs]


def _grouped(peaks: Sequence[Peak], mhz: float) -> list[list[Peak]]:
    groups: list[list[Peak]] = []
    for peak in sorted(peaks, key=lambda p: -p.x):
        near = groups and (groups[-1][-1].x - peak.x) * mhz <= _APART_HZ
        told = peak.extra or (groups and groups[-1][-1].extra)
        if near and not told:
            groups[-1].append(peak)
        else:
            groups.append([peak])
    return groups


def _of_peaks(group: list[Peak], mhz: float) -> ProtonSignal:
    lines = [p.x * mhz for p in group]
    mult, j = pattern_of(lines, [p.y for p in group])
    if len(group) == 1 and group[0].extra.isalpha():
        mult = group[0].extra.lower()
        mult = mult if mult in _NAMES.values() or mult == "m" else "m"
    lo, hi = round(group[-1].x, 3), round(group[0].x, 3)
    if mult != "m":
        lo = hi = round((group[0].x + group[-1].x) / 2, 3)
    return ProtonSignal(lo, hi, mult, j, None, group[0].note)


def pattern_of(lines: Sequence[float], heights: Sequence[float]) -> tuple[str, tuple[float, ...]]:
    """First-order pattern of lines given in Hz, highest first: name and J in Hz; "m" when it is none.

    Equal spacings with heights as in Pascal's triangle are one coupling; four lines in two equal pairs a dd.
    """
    gaps = [a - b for a, b in pairwise(lines)]
    count = len(lines)
    if count == 1:
        return "s", ()
    even = max(gaps) - min(gaps) <= _EVEN_HZ
    mean = round(sum(gaps) / len(gaps), 1)
    if even and count in _NAMES and _like_pascal(heights):
        return _NAMES[count], (mean,)
    if count == 4 and abs(gaps[0] - gaps[2]) <= _EVEN_HZ:
        small = (gaps[0] + gaps[2]) / 2
        return "dd", (round(gaps[1] + small, 1), round(small, 1))
    return "m", ()


def _like_pascal(heights: Sequence[float]) -> bool:
    if not any(heights):
        return True
    due = [comb(len(heights) - 1, k) for k in range(len(heights))]
    scale = sum(heights) / sum(due)
    # Roofing tilts a pattern: each line may be off by half of the middle one.
    return all(abs(h / scale - d) <= 0.5 * max(due) for h, d in zip(heights, due, strict=True))


def _of_curve(spectrum: Spectrum, mhz: float) -> list[ProtonSignal]:
    x, y = _ascending(spectrum)
    base = sorted(y)[len(y) // 2] if y else 0.0
    least = max(_NOISES * noise(y), _LEAST * (max(y, default=0.0) - base))
    lines = [m for m in find_maxima(x, y, least) if m.height - base >= least]
    groups: list[list[int]] = []
    for k, line in enumerate(lines):
        if k and (line.x - lines[k - 1].x) * mhz <= _APART_HZ:
            groups[-1].append(k)
        else:
            groups.append([k])
    found = []
    for group in groups:
        members = [lines[k] for k in reversed(group)]
        area = _area(x, y, base, members[-1].index, members[0].index, least / 4)
        mult, j = pattern_of([m.x * mhz for m in members], [m.height - base for m in members])
        if mult == "s" and members[0].width * mhz >= _BROAD_HZ:
            mult = "br s"
        lo, hi = round(members[-1].x, 3), round(members[0].x, 3)
        if mult != "m":
            lo = hi = round((lo + hi) / 2, 3)
        found.append(ProtonSignal(lo, hi, mult, j, area))
    return _scaled(found[::-1])


def _area(x: Sequence[float], y: Sequence[float], base: float, first: int, last: int, level: float) -> float:
    """Area above the baseline from the foot on one side to the foot on the other."""
    while first > 0 and y[first] - base > level:
        first -= 1
    while last < len(y) - 1 and y[last] - base > level:
        last += 1
    return sum((y[i] - base) * (x[i + 1] - x[i]) for i in range(first, last))


def _scaled(signals: list[ProtonSignal]) -> list[ProtonSignal]:
    """Integrals on a scale where the smallest signal of weight counts as 1."""
    areas = [s.n for s in signals if s.n and s.n > 0]
    if not areas:
        return signals
    unit = max(areas) / 100
    return [
        ProtonSignal(s.lo, s.hi, s.mult, s.j, round(s.n / unit, 3) if s.n and s.n > 0 else None)
        for s in signals
    ]
