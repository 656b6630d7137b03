"""What chemists print for an expected pattern, from counts over published spectra.

An expected pattern can be read more or less finely ("ddd", "td", "dd", "t"). A printed one is named as
expected, names another of those readings, is "m", or is something else. How often each happens depends on how
intricate and how strongly coupled the signal is: rows of facts/multiplicity_confusion.csv. The row "anyhow"
counts all printed names and is the background.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache
from math import fsum

from hoodside.facts import load_table
from hoodside.predict.coupling import Coupling
from hoodside.predict.model import ProtonGroup
from hoodside.predict.multiplet import MERGED, RESOLVED, Splitting, merged, name_of, readings_of
from hoodside.readings.patterns import bare, couplings_named
from hoodside.weigh.decibans import decibans
from hoodside.weigh.protons.coupling import coupling_weight

#: How a printed pattern stands to the expected one.
NAMED, READABLE, AS_M, OTHER = "named", "readable", "m", "other"
_RELATIONS = (NAMED, READABLE, AS_M, OTHER)
#: Counts taken for granted beforehand in every row (common practice); real ones soon outweigh them.
_BEFOREHAND = {NAMED: 2.0, READABLE: 0.8, AS_M: 1.0, OTHER: 0.3}
_BROAD, _ALL = "broad", "all"
#: Signals nearer than this many J to a partner look distorted.
_STRONG = 4.0
#: Couplings below this do not make a signal look strongly coupled, Hz.
_WIDE = 3.0
_MULTIPLET = (-1,)

#: A pattern without regard to the order of its letters: numbers of partners, ascending; (-1,) for "m".
Key = tuple[int, ...]


@dataclass(frozen=True, slots=True)
class Awaited:
    """What a set of groups should look like as one signal."""

    kind: str  # row of the table
    usual: Key
    text: str  # "dd, J = 8.2, 1.4 Hz"
    readings: dict[Key, tuple[Splitting, ...]]

    def as_read(self, printed: str) -> str:
        """The expected pattern in words, as finely read as the printed one where that is possible."""
        seen = self.readings.get(key_of(printed)) if printed else None
        return _text(seen) if seen else self.text


#: Several sets of H in one signal, whatever they are.
_CROWD = Awaited("several", (), "", {(): ()})


class Patterns:
    """The patterns of one structure, by the groups that share a signal."""

    def __init__(self, groups: Sequence[ProtonGroup], couplings: Sequence[Coupling], mhz: float) -> None:
        self._groups, self._couplings, self._mhz = groups, couplings, mhz
        self._known: dict[tuple[int, ...], Awaited] = {}
        self._weights: dict[tuple[tuple[int, ...], str, tuple[float, ...]], tuple[float, float]] = {}

    def awaited(self, members: tuple[int, ...]) -> Awaited:
        """What some groups should look like in one signal."""
        if members not in self._known:
            self._known[members] = self._await(members)
        return self._known[members]

    def weigh(self, members: tuple[int, ...], printed: str, j: tuple[float, ...]) -> tuple[float, float]:
        """Weights in decibans of a printed pattern ("" for none) and of its couplings (Hz)."""
        key = (members, printed, j)
        if key not in self._weights:
            self._weights[key] = self._weigh(members, printed, j)
        return self._weights[key]

    def _weigh(self, members: tuple[int, ...], printed: str, j: tuple[float, ...]) -> tuple[float, float]:
        if (not printed or key_of(printed) == _MULTIPLET) and self._is_crowd(members):
            # Most sets that the search tries: what their pattern would be in full makes no odds.
            return (pattern_weight(_CROWD, printed) if printed else 0.0), 0.0
        awaited = self.awaited(members)
        shape = pattern_weight(awaited, printed) if printed else 0.0
        seen = awaited.readings.get(key_of(printed)) if printed else None
        if not j:
            return shape, 0.0
        if seen is not None and len(seen) == len(j):
            return shape, coupling_weight(seen, j)
        # Another pattern than expected is charged already: compare what both agree on, the widest splitting.
        finest = max(awaited.readings.values(), key=len, default=())
        return shape, coupling_weight(finest[:1], (max(j),)) if len(members) == 1 else 0.0

    def _await(self, members: tuple[int, ...]) -> Awaited:
        held = [self._groups[m] for m in members]
        if all(g.exchangeable for g in held) and not all(g.mult not in ("", "br s") for g in held):
            return Awaited("exchangeable", (), "one line, often broad", {(): ()})
        ways = readings_of(members, self._groups, self._couplings)
        finest = max(ways, key=len)
        usual = merged([s for s in finest if s.hz >= RESOLVED], MERGED)
        readings: dict[Key, tuple[Splitting, ...]] = {}
        for way in sorted(ways, key=len):
            readings[key_of(name_of(way))] = way
        key = key_of(name_of(usual))
        readings[key] = usual
        return Awaited(self._kind(members, held, key), key, _text(usual), readings)

    def _is_crowd(self, members: tuple[int, ...]) -> bool:
        return len(members) > 1 and not is_pair([self._groups[m] for m in members])

    def _kind(self, members: tuple[int, ...], held: list[ProtonGroup], usual: Key) -> str:
        if len(held) > 1 and not is_pair(held):
            return "several"
        intricate = "many" if usual == _MULTIPLET or len(usual) > 2 else str(len(usual))
        if len(held) > 1:
            return f"pair {intricate}"
        methyl = " of CH3" if held[0].n % 3 == 0 and len(usual) < 2 else ""
        return f"{intricate}{methyl}{' strong' if self._is_strong(members) else ''}"

    def _is_strong(self, members: tuple[int, ...]) -> bool:
        for c in self._couplings:
            if c.b >= 0 and c.hz >= _WIDE and (c.a in members) != (c.b in members):
                apart = abs(self._groups[c.a].ppm - self._groups[c.b].ppm) * self._mhz
                if apart < _STRONG * c.hz:
                    return True
        return False


def is_pair(groups: Sequence[ProtonGroup]) -> bool:
    """Whether these are the two H of one CH2 (or of CH2 groups that symmetry makes alike)."""
    return len(groups) == 2 and groups[0].atoms == groups[1].atoms


@cache
def key_of(printed: str) -> Key:
    """The pattern of a canonical name without its "br" and "app", the order of its letters left out."""
    core = bare(printed)
    if core in ("m", "ABq"):
        return _MULTIPLET
    return tuple(sorted(couplings_named(printed)))


def relation(awaited: Awaited, printed: str) -> str:
    """How a printed pattern stands to the expected one."""
    key = key_of(printed)
    if key == awaited.usual:
        return NAMED
    if key in awaited.readings and key != _MULTIPLET:
        return READABLE
    return AS_M if key == _MULTIPLET else OTHER


def pattern_weight(awaited: Awaited, printed: str) -> float:
    """Weight in decibans of a printed pattern."""
    key = key_of(printed)
    shares = _shares(awaited.kind)
    anyhow = anyhow_share(key)
    others = len(awaited.readings) - 1
    chance = shares[OTHER] * anyhow
    if key == awaited.usual:
        chance += shares[NAMED] + (0.0 if others else shares[READABLE])
    elif key in awaited.readings:
        chance += shares[READABLE] / others
    if key == _MULTIPLET:
        chance += shares[AS_M]
    return decibans(chance / anyhow) + _broad_weight(awaited.kind, printed.startswith("br"))


@cache
def anyhow_share(key: Key) -> float:
    """Share of a pattern among all published signals."""
    names = _anyhow()
    return (names[key] + 0.5) / (sum(names.values()) + 0.5 * (len(names) + 1))


@cache
def _shares(kind: str) -> dict[str, float]:
    row = _counts().get(kind, {})
    filled = {r: row.get(r, 0.0) + _BEFOREHAND[r] for r in _RELATIONS}
    total = fsum(filled.values())
    return {r: n / total for r, n in filled.items()}


@cache
def _broad_weight(kind: str, broad: bool) -> float:
    row, every = _counts().get(kind, {}), _counts()["anyhow"]
    usual = every[_BROAD] / every[_ALL]
    here = (row.get(_BROAD, 0.0) + 3 * usual) / (row.get(_ALL, 0.0) + 3)
    return decibans(here / usual) if broad else decibans((1 - here) / (1 - usual))


@cache
def _anyhow() -> Counter[Key]:
    names: Counter[Key] = Counter()
    for name, n in _counts()["anyhow"].items():
        if name not in (_BROAD, _ALL):
            names[key_of(name)] += round(n)
    return names


@cache
def _counts() -> dict[str, dict[str, float]]:
    counts: dict[str, dict[str, float]] = {}
    for row in load_table("multiplicity_confusion"):
        counts.setdefault(row["expected"], {})[row["printed"]] = float(row["count"])
    return counts


def _text(parts: tuple[Splitting, ...]) -> str:
    j = ", ".join(f"{s.hz:.1f}" for s in parts)
    return f"{name_of(parts)}{f', J = {j} Hz' if j else ''}"
