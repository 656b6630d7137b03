"""Made-up spin systems of 9 to 11 H, and how far the lines of one trace lie from those of another."""

from __future__ import annotations

import random
from collections.abc import Callable, Sequence

import numpy as np

from hoodside.predict.spins import LineList, Nuclei, SpinSystem

Couplings = Sequence[tuple[int, int, float]]
#: A peak counts as a line when it reaches this share of the highest point, and stands out on both sides by
#: this share of its own height: flat tops and shoulders have no place of their own.
HIGH, STANDING = 0.05, 0.05
#: Hz between points of a trace, and beyond the outermost lines.
_STEP, _MARGIN = 0.05, 20.0


def _system(mhz: float, ppm: Sequence[float], counts: Sequence[int], couplings: Couplings) -> SpinSystem:
    nuclei = tuple(Nuclei(mhz * p, n) for p, n in zip(ppm, counts, strict=True))
    return SpinSystem(nuclei, tuple(couplings))


def chain(mhz: float, seed: int) -> SpinSystem:
    """Neighbours along a chain of 9 or 10 H, 0.15 to 0.8 ppm apart."""
    rng, n = random.Random(seed), 9 + seed % 2
    ppm = [1.0]
    while len(ppm) < n:
        ppm.append(ppm[-1] + rng.uniform(0.15, 0.8))
    return _system(mhz, ppm, [1] * n, [(k, k + 1, rng.uniform(4, 9)) for k in range(n - 1)])


def crossed(mhz: float, seed: int) -> SpinSystem:
    """A chain of 9 or 10 H in any order of shifts, with small J across one carbon."""
    rng, n = random.Random(seed), 9 + seed % 2
    near = [(k, k + 1, rng.uniform(4, 9)) for k in range(n - 1)]
    far = [(k, k + 2, rng.uniform(-1, 1.5)) for k in range(n - 2)]
    return _system(mhz, [rng.uniform(1, 5) for _ in range(n)], [1] * n, near + far)


def network(mhz: float, seed: int) -> SpinSystem:
    """9 or 10 H of which every third pair couples, by up to 12 Hz of either sign."""
    rng, n = random.Random(seed), 9 + seed % 2
    pairs = [(a, b, rng.uniform(-12, 12)) for a in range(n) for b in range(a) if rng.random() < 0.3]
    return _system(mhz, [rng.uniform(0.8, 5) for _ in range(n)], [1] * n, pairs)


def butyl(mhz: float, seed: int) -> SpinSystem:
    """X-CH2-CH2-CH2-CH3, 9 H, the two H of each CH2 not magnetically equivalent."""
    r = random.Random(seed).uniform
    return _alkyl(mhz, r, [r(2.3, 4.2), r(1.5, 1.8), r(1.3, 1.48)])


def pentyl(mhz: float, seed: int) -> SpinSystem:
    """The same with one CH2 more, 11 H."""
    r = random.Random(seed).uniform
    return _alkyl(mhz, r, [r(2.3, 4.2), r(1.5, 1.8), r(1.28, 1.42), r(1.28, 1.42)])


def _alkyl(mhz: float, r: Callable[[float, float], float], shifts: Sequence[float]) -> SpinSystem:
    last = 2 * len(shifts)
    pairs = [(k, k + 1, -13.5) for k in range(0, last, 2)] + [(last - 2, last, 7.3), (last - 1, last, 7.3)]
    for k in range(0, last - 2, 2):
        gauche, anti = r(5.5, 7), r(7.5, 9.5)
        pairs += [(k, k + 2, gauche), (k + 1, k + 3, gauche), (k, k + 3, anti), (k + 1, k + 2, anti)]
    ppm = [*(s for s in shifts for _ in range(2)), r(0.88, 0.96)]
    return _system(mhz, ppm, [1] * last + [3], pairs)


def branched(mhz: float, seed: int) -> SpinSystem:
    """CH3-CHX-CH2-CH2-CHO with diastereotopic CH2."""
    r = random.Random(seed).uniform
    ppm = [r(0.9, 1.4), r(3.5, 4.5), r(1.5, 1.8), r(1.55, 2.0), r(2.1, 2.6), r(2.15, 2.8), 9.7]
    pairs = [(0, 1, r(6, 7)), (1, 2, r(3, 9)), (1, 3, r(3, 9)), (2, 3, r(-14.5, -13)), (4, 5, r(-18, -15))]
    pairs += [(a, b, r(5, 9)) for a in (2, 3) for b in (4, 5)] + [(4, 6, r(1, 2)), (5, 6, r(1, 2))]
    return _system(mhz, ppm, [3] + [1] * 6, pairs)


def arene(mhz: float, seed: int) -> SpinSystem:
    """Four neighbouring ring H and a side chain CH-CH2-CH3 with diastereotopic CH2."""
    r = random.Random(seed).uniform
    ppm = [*(r(6.9, 7.6) for _ in range(4)), r(2.8, 5), r(1.5, 3), r(1.5, 3), r(0.9, 1.3)]
    pairs = [
        (0, 1, r(7.5, 8.5)),
        (1, 2, r(7, 7.8)),
        (2, 3, r(7.5, 8.5)),
        (0, 2, r(1, 1.6)),
        (1, 3, r(1, 1.6)),
    ]
    pairs += [(0, 3, r(0.3, 0.6)), (0, 4, r(0.4, 0.8)), (4, 5, r(4, 9)), (4, 6, r(4, 9))]
    pairs += [(5, 6, r(-14.5, -13)), (5, 7, r(6.8, 7.5)), (6, 7, r(6.8, 7.5))]
    return _system(mhz, ppm, [1] * 7 + [3], pairs)


def ring(mhz: float, seed: int) -> SpinSystem:
    """Nine H as along a sugar: one at low field, six close together, a CH2."""
    r = random.Random(seed).uniform
    ppm = [r(4.3, 5.3), *(r(3.2, 4.1) for _ in range(6)), r(1.2, 4.0), r(3.2, 4.1)]
    pairs = [(k, k + 1, r(2, 10)) for k in range(5)]
    pairs += [(4, 6, r(2, 6)), (5, 6, -12.0), (6, 7, r(1, 7)), (7, 8, r(4, 9))]
    return _system(mhz, ppm, [1] * 9, pairs)


FAMILIES: dict[str, Callable[[float, int], SpinSystem]] = {
    "chain": chain,
    "crossed chain": crossed,
    "network": network,
    "butyl": butyl,
    "pentyl": pentyl,
    "branched chain": branched,
    "arene with side chain": arene,
    "ring": ring,
}


def worst_line(exact: LineList, reduced: LineList) -> float:
    """Largest distance in Hz of a line in the exact trace (width 1 Hz) from the nearest in the other."""
    lo, hi = exact.hz[0] - _MARGIN, exact.hz[-1] + _MARGIN
    trace = _trace(exact, lo, hi)
    ours = [k for k in _maxima(trace, HIGH) if _stands(trace, k)]
    theirs = _trace(reduced, lo, hi)
    away = _places(trace, ours)[:, None] - _places(theirs, _maxima(theirs, HIGH / 5))[None, :]
    return float(_STEP * np.abs(away).min(axis=1).max())


def _trace(lines: LineList, lo: float, hi: float) -> np.ndarray:
    """Lorentzian lines of 1 Hz, by a product of Fourier transforms."""
    n = int((hi - lo) / _STEP) + 1
    at, sticks = (np.frombuffer(lines.hz) - lo) / _STEP, np.zeros(n + 1)
    k = np.floor(at).astype(int)
    inside = (k >= 0) & (k < n)
    share, size = (at - k)[inside], np.frombuffer(lines.intensity)[inside]
    np.add.at(sticks, k[inside], size * (1 - share))
    np.add.at(sticks, k[inside] + 1, size * share)
    wide = 2 * (n + 1)
    away = np.minimum(np.arange(wide), wide - np.arange(wide)) * _STEP
    return np.fft.irfft(np.fft.rfft(sticks, wide) * np.fft.rfft(1 / (away**2 + 0.25)), wide)[:n]


def _maxima(trace: np.ndarray, share: float) -> list[int]:
    middle = trace[1:-1]
    found = (middle > share * trace.max()) & (trace[:-2] < middle) & (middle >= trace[2:])
    return [int(k) + 1 for k in np.flatnonzero(found)]


def _places(trace: np.ndarray, maxima: Sequence[int]) -> np.ndarray:
    k = np.array(maxima)
    left, top, right = trace[k - 1], trace[k], trace[k + 1]
    return k + 0.5 * (left - right) / (left - 2 * top + right)


def _stands(trace: np.ndarray, k: int) -> bool:
    limit = (1 - STANDING) * trace[k]
    for side in (trace[k + 1 :], trace[k - 1 :: -1]):
        low, higher = np.flatnonzero(side < limit), np.flatnonzero(side > trace[k])
        if len(higher) and (not len(low) or higher[0] < low[0]):
            return False
    return True
