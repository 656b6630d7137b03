"""Which signals couple with which: partners show the same J."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from hoodside.readings import ProtonSignal
from hoodside.readings.patterns import bare, couplings_named, is_pattern, normalise_pattern

#: Hz that two readings of one J may differ, plus this share of J.
TOLERANCE, RELATIVE = 0.4, 0.02


@dataclass(frozen=True, slots=True)
class SharedCoupling:
    """A J that two signals show alike.

    Attributes:
        a, b: indices of the signals.
        hz_a, hz_b: J as read in each, Hz.
        counts_fit: whether the letters agree with the numbers of H (a triplet needs a partner of 2 H).
    """

    a: int
    b: int
    hz_a: float
    hz_b: float
    counts_fit: bool

    def times_apart(self, signals: Sequence[ProtonSignal], mhz: float) -> float:
        """Difference of the two shifts over J: ten is needed for first-order patterns (common practice)."""
        middles = [(signals[k].lo + signals[k].hi) / 2 for k in (self.a, self.b)]
        return abs(middles[0] - middles[1]) * mhz / max(self.hz_a, self.hz_b)


@dataclass(frozen=True, slots=True)
class LoneCoupling:
    """A J for which no other signal shows a like one."""

    signal: int
    hz: float


def find_partners(
    signals: Sequence[ProtonSignal],
) -> tuple[tuple[SharedCoupling, ...], tuple[LoneCoupling, ...]]:
    """J shared by two signals within the measuring error, and J without a partner.

    A lone J is no proof of an error: the partner may be an unread multiplet, 19F or 31P.
    Source: common practice; mutually coupled H show one and the same J.
    """
    read = [(k, hz, n) for k, s in enumerate(signals) for hz, n in _couplings(s)]
    shared = [
        SharedCoupling(a, b, hz_a, hz_b, _fits(n_a, signals[b].n) and _fits(n_b, signals[a].n))
        for i, (a, hz_a, n_a) in enumerate(read)
        for b, hz_b, n_b in read[i + 1 :]
        if a != b and abs(hz_a - hz_b) <= TOLERANCE + RELATIVE * max(hz_a, hz_b)
    ]
    matched = {(s.a, s.hz_a) for s in shared} | {(s.b, s.hz_b) for s in shared}
    lone = [LoneCoupling(k, hz) for k, hz, _ in read if (k, hz) not in matched]
    shared.sort(key=lambda s: (not s.counts_fit, abs(s.hz_a - s.hz_b)))
    return tuple(shared), tuple(lone)


def _couplings(signal: ProtonSignal) -> list[tuple[float, int]]:
    """(J, number of partners by the letter, 0 when not known) of a signal."""
    if not is_pattern(signal.mult) or bare(normalise_pattern(signal.mult)) == "m":
        return [(hz, 0) for hz in signal.j]
    counts = couplings_named(normalise_pattern(signal.mult))
    if len(counts) != len(signal.j):
        return [(hz, 0) for hz in signal.j]
    return list(zip(signal.j, counts, strict=True))


def _fits(partners: int, hydrogens: float | None) -> bool:
    """Whether a letter asks for no more partners than the other signal has H."""
    return not partners or hydrogens is None or partners <= round(hydrogens)
