"""The weight of one 1H signal for one set of predicted groups, term by term, in decibans.

For a signal given the groups B of a structure: log of (product over B of the chance that the group lies in
the signal's window) x (chance of the printed number of H) x (chance of the printed pattern) x (couplings),
over the same for the signals of published compounds at large. A group more in a signal costs its chance to
lie just there, so that accidental overlap is allowed but not free. The two H of one CH2 share their errors
and so count as one place when they share a signal.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache
from math import exp, fsum, hypot

from hoodside.facts import load_table
from hoodside.predict.model import ProtonGroup
from hoodside.weigh.background import size_class
from hoodside.weigh.decibans import decibans, odds, t_between
from hoodside.weigh.protons.pattern import Patterns
from hoodside.weigh.protons.signals import Signal

#: Degrees of freedom of the error law of 1H shifts (that of the predictor).
_FREEDOM = 3
#: Share of predictions or printed shifts that are wrong outright.
_WRONG = 0.04
#: What the stated deviation of a shift is multiplied with, and what is added in quadrature (ppm): assignments
#: are not known in published spectra, so stated errors come out too small. Fitted with ``TRUST``.
_WIDER, _ADDED = 1.4, 0.03
#: Spread of a printed number of H about the true one: absolute, and relative for raw integrals.
_COUNT_SD, _RAW_SD = 0.25, 0.08
#: Share of numbers of H that are off by whole H, falling off by e per H.
_MISCOUNTED = 0.05
_COUNT_FLOOR = -30.0
#: The two H of one CH2 in one signal, decibans beside the place of one of them.
_PAIR = -1.0
#: Groups of one environment expected this near each other (ppm) are off together: all but the best placed
#: cost at most this much each, decibans. A long chain off by a little would sink a right structure else.
_CLOSE, _OF_ONE_KIN = 0.06, -4.0
#: A group without signal: exchangeable H are often not listed; any other H is a gap, more so the larger.
_MISSING_EXCHANGEABLE, _MISSING, _MISSING_PER_H = -3.0, -11.0, -1.5
#: From this many H on a signal is no trace of a solvent.
_MUCH = 0.75
#: A list that holds this share of the H seems complete; the chance of a gap in it then.
SEEMS_COMPLETE, _SURELY_LISTED = 0.75, 0.002


@dataclass(frozen=True, slots=True)
class Terms:
    """Parts of the weight of one signal, decibans."""

    place: float
    count: float
    pattern: float
    coupling: float

    @property
    def total(self) -> float:
        return self.place + self.count + self.pattern + self.coupling


@dataclass(frozen=True, slots=True)
class Scorer:
    """Weighs signals against the groups of one structure. ``places[g][s]``: the place of g in s alone."""

    groups: Sequence[ProtonGroup]
    patterns: Patterns
    signals: Sequence[Signal]
    raw: bool
    listed: float  # how complete the list of signals seems, 0 to 1
    places: Sequence[Sequence[float]]
    kin: Sequence[int]  # groups of one kind expected at one place have one number

    @classmethod
    def of(
        cls, groups: Sequence[ProtonGroup], patterns: Patterns, signals: Sequence[Signal], raw: bool
    ) -> Scorer:
        """Prepare the places of every group in every signal."""
        places = [[_place(g, s) for s in signals] for g in groups]
        return cls(groups, patterns, signals, raw, share_listed(groups, signals, raw), places, _kin(groups))

    def missing(self, group: int) -> float:
        """Weight of a group that no signal shows."""
        return missing_weight(self.groups[group], self.listed)

    def total(self, signal: int, members: tuple[int, ...]) -> float:
        """Weight of a signal that holds ``members`` (indices of groups)."""
        return self.terms(signal, members).total if members else self.signals[signal].stray.weight_db

    def terms(self, signal: int, members: tuple[int, ...]) -> Terms:
        """The same in parts."""
        seen = self.signals[signal]
        shape, coupling = self.patterns.weigh(members, seen.pattern, seen.j)
        return Terms(
            place=self._place(signal, members) - seen.anyhow_db,
            count=count_weight(sum(self.groups[m].n for m in members), seen.n, self.raw),
            pattern=shape,
            coupling=coupling,
        )

    def _place(self, signal: int, members: tuple[int, ...]) -> float:
        if len(members) == 1:
            return self.places[members[0]][signal]
        best: dict[int, float] = {}  # by kin: those share their errors
        price, pairs = 0.0, set()
        for m in members:
            place, twin = self.places[m][signal], self._twin(m, members)
            if twin in pairs:
                continue
            if twin is not None:
                pairs.add(m)
                place = max(place, self.places[twin][signal])
                price += _PAIR
            kin = self.kin[m]
            if kin in best:
                price += max(min(place, best[kin]), _OF_ONE_KIN)
                place = max(place, best[kin])
            best[kin] = place
        return fsum(best.values()) + price

    def _twin(self, m: int, members: tuple[int, ...]) -> int | None:
        group = self.groups[m]
        if group.equivalence != "diastereotopic":
            return None
        return next((k for k in members if k != m and self.groups[k].atoms == group.atoms), None)


def _kin(groups: Sequence[ProtonGroup]) -> tuple[int, ...]:
    """A number per group, the same for groups of one environment whose places follow each other closely."""
    kin = list(range(len(groups)))
    last: dict[str, int] = {}
    for g in sorted(range(len(groups)), key=lambda g: groups[g].ppm):
        before = last.get(groups[g].environment)
        if before is not None and groups[g].ppm - groups[before].ppm <= _CLOSE:
            kin[g] = kin[before]
        last[groups[g].environment] = g
    return tuple(kin)


def missing_weight(group: ProtonGroup, listed: float) -> float:
    """Weight of a group that no signal shows, decibans.

    ``listed``: how complete the list of signals seems, 0 to 1. While a list is still being typed, a
    group without signal is most likely one not typed yet.
    """
    if group.exchangeable:
        return _MISSING_EXCHANGEABLE * group.n
    return max(_MISSING + _MISSING_PER_H * min(group.n, 9), decibans(max(1 - listed, _SURELY_LISTED)))


def share_listed(groups: Sequence[ProtonGroup], signals: Sequence[Signal], raw: bool) -> float:
    """How complete the list of signals seems for a structure, 0 to 1; 1 where integrals do not tell."""
    due = sum(g.n for g in groups if not g.exchangeable)
    if raw or not due:
        return 1.0
    usual = due / len(groups)
    found = fsum(usual if s.n is None else s.n for s in signals if not is_trace(s))
    return min(found / due / SEEMS_COMPLETE, 1.0)


def is_trace(signal: Signal) -> bool:
    """Whether a signal is as good as certainly a trace of something known: it has a name, and is small."""
    return bool(signal.stray.name) and (signal.n or 0.0) < _MUCH


def count_weight(expected: int, printed: float | None, raw: bool) -> float:
    """Weight of a printed number of H against the distribution over all signals; 0 when none was printed."""
    if printed is None:
        return 0.0
    off = abs(printed - expected)
    sd = max(_COUNT_SD, _RAW_SD * expected) if raw else _COUNT_SD
    suits = (1 - _MISCOUNTED) * exp(-((off / sd) ** 2) / 2) + _MISCOUNTED * exp(-off)
    return max(decibans(suits), _COUNT_FLOOR) - _anyhow_count(size_class(printed))


def _place(group: ProtonGroup, signal: Signal) -> float:
    inside = t_between(signal.lo, signal.hi, group.ppm, hypot(_WIDER * group.sd, _ADDED), _FREEDOM)
    return decibans((1 - _WRONG) * inside + _WRONG * odds(signal.anyhow_db))


@cache
def _anyhow_count(size: str) -> float:
    rows = load_table("h1_size_background")
    return decibans(next(float(row["share"]) for row in rows if row["group"] == size))
