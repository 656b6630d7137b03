"""Signs of fragments in readings: a small language for the facts table fragment_signs.

A sign is a list of demands that must all be met, each by another signal:
    h1 6 d|m 0.8-1.7 J5.8-7.6   that many H (or a multiple, the same for all), pattern, ppm, a coupling in Hz
    c13 50-57                   a 13C line in that range, ppm
    ir 1500-1570 strong         a band in that range, cm-1, with strength or shape if named
"""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import dataclass

from hoodside.errors import DataFileError
from hoodside.readings.model import IrBand, ProtonSignal, Readings

#: Part of a whole number of H that an integral may be off (common practice: 5 to 10 per cent per step).
_INTEGRAL_ROOM = 0.15
#: How often a fragment may occur in one set of signals: two isopropyl groups give one doublet of 12 H.
_MOST_TIMES = 3
_RANGE = re.compile(r"^(-?[\d.]+)-(-?[\d.]+)$")


@dataclass(frozen=True, slots=True)
class Demand:
    """One demand of a sign. ``words``: pattern (1H), strength or shape (IR)."""

    kind: str
    lo: float
    hi: float
    n: float = 0
    words: tuple[str, ...] = ()
    j: tuple[float, float] | None = None


@dataclass(frozen=True, slots=True)
class Found:
    """A sign found: how many fragments it stands for, and the readings it rests on."""

    times: int
    readings: tuple[str, ...]


def parse_sign(text: str) -> tuple[Demand, ...]:
    """The demands of a sign. Raises: DataFileError."""
    return tuple(_demand(part.split()) for part in text.split(";"))


def _demand(parts: list[str]) -> Demand:
    kind, *rest = parts
    if kind == "h1":
        return _proton_demand(rest)
    if kind not in ("c13", "ir"):
        raise DataFileError(f"fragment_signs knows no {kind!r}.", hint="Use h1, c13 or ir.", value=kind)
    lo, hi = _range(rest[0])
    return Demand(kind, lo, hi, words=tuple(rest[1:]))


def _proton_demand(rest: list[str]) -> Demand:
    """N PATTERN PPM [J...]; patterns of two words ("br s") hold a blank."""
    n, *middle = rest
    j = _range(middle.pop()[1:]) if middle[-1].startswith("J") else None
    lo, hi = _range(middle.pop())
    return Demand("h1", lo, hi, float(n), tuple(" ".join(middle).split("|")), j)


def _range(text: str) -> tuple[float, float]:
    found = _RANGE.match(text)
    if not found:
        raise DataFileError(f"{text!r} is no range.", hint="Write lowest-highest.", value=text)
    return float(found[1]), float(found[2])


def find_sign(
    demands: tuple[Demand, ...], readings: Readings, taken: frozenset[str] = frozenset()
) -> Found | None:
    """The sign in the readings, without the signals and lines ``taken``; None when it is not there."""
    free = frozenset(i for i in range(len(readings.h1)) if f"h1:{i}" not in taken)
    protons = [d for d in demands if d.kind == "h1"]
    others = [_other(d, readings, taken) for d in demands if d.kind != "h1"]
    if any(not found for found in others):
        return None
    for times in range(_MOST_TIMES, 0, -1):
        chosen = _assign(protons, readings, free, times)
        if chosen is not None:
            return Found(times if protons else 1, (*(f"h1:{i}" for i in chosen), *others))
    return None


def _assign(
    demands: list[Demand], readings: Readings, free: frozenset[int], times: int
) -> tuple[int, ...] | None:
    """One signal for each demand."""
    if not demands:
        return ()
    for i in sorted(free):
        if _meets(readings.h1[i], demands[0], times):
            rest = _assign(demands[1:], readings, free - {i}, times)
            if rest is not None:
                return (i, *rest)
    return None


def _meets(signal: ProtonSignal, demand: Demand, times: int) -> bool:
    if signal.n is None or signal.mult not in demand.words:
        return False
    wanted = times * demand.n
    if abs(signal.n - wanted) > wanted * _INTEGRAL_ROOM or not demand.lo <= signal.ppm <= demand.hi:
        return False
    return demand.j is None or any(demand.j[0] <= j <= demand.j[1] for j in signal.j)


def _other(demand: Demand, readings: Readings, taken: frozenset[str]) -> str:
    """The reading that meets a 13C or IR demand, "" for none."""
    found = _c13(demand, readings) if demand.kind == "c13" else _ir(demand, readings)
    return next((name for name in found if name not in taken), "")


def _c13(demand: Demand, readings: Readings) -> Iterator[str]:
    return (f"c13:{i}" for i, line in enumerate(readings.c13) if demand.lo <= line.ppm <= demand.hi)


def _ir(demand: Demand, readings: Readings) -> Iterator[str]:
    return (f"ir:{i}" for i, band in enumerate(readings.ir) if _is_band(band, demand))


def _is_band(band: IrBand, demand: Demand) -> bool:
    described = {band.strength, band.shape}
    return demand.lo <= band.cm1 <= demand.hi and all(word in described for word in demand.words)
