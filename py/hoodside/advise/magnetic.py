"""NMR experiments as further measurements."""

from __future__ import annotations

from collections import Counter
from math import comb

from hoodside.advise.imagined import (
    bernoulli,
    by_carbons,
    by_protons,
    divergence,
    gap,
    imagined_carbons,
    imagined_protons,
    only,
)
from hoodside.advise.model import NOTHING, Gain, Measurement, Pair, efforts
from hoodside.advise.stereo import contact, differ_in_space_only
from hoodside.readings import Readings
from hoodside.weigh.expectations import Expectations, expectations
from hoodside.weigh.words import listed

#: Shares of OH and NH that are seen at all before a D2O shake, and of integrals misread (common practice).
_VISIBLE, _MISCOUNTED = 0.8, 0.1
#: Chance of an NOE between H that are close, and of a false one by exchange or overlap (common practice).
_NOE_SEEN, _NOE_FALSE = 0.85, 0.1
#: Signals nearer than this, ppm, can hardly be irradiated one by one; the chance of a useful result then.
_SELECTIVE, _NOE_CROWDED = 0.15, 0.5
_DMSO, _HIGH_FIELD = "DMSO-d6", 600.0
_LOW_FIELD = 450.0


def nmr_measurements(readings: Readings) -> list[Measurement]:
    """NMR experiments not done yet."""
    offers = []
    if not readings.h1:
        offers.append(Measurement("h1", "1H NMR", lambda pair: _protons(pair, readings)))
    else:
        offers.append(Measurement("d2o", efforts()["d2o"].measure, _shake))
        offers.append(Measurement("noe", efforts()["noe"].measure, _noe))
        if readings.solvent != _DMSO:
            offers.append(
                Measurement("solvent", efforts()["solvent"].measure, lambda p: _solvent(p, readings))
            )
        if (readings.mhz or 400.0) < _LOW_FIELD:
            offers.append(Measurement("field", efforts()["field"].measure, lambda p: _field(p, readings)))
    if not readings.c13:
        offers.append(Measurement("c13", "13C NMR", lambda pair: _carbons(pair, readings)))
    if not any(line.kind for line in readings.c13):
        offers.append(Measurement("dept", efforts()["dept"].measure, lambda pair: _kinds(pair, readings)))
    return offers


def _protons(pair: Pair, readings: Readings) -> Gain:
    weight = gap(pair.first, pair.second, lambda e: only(readings, h1=imagined_protons(e)), by_protons)
    one, other = (len(imagined_protons(e)) for e in (pair.first, pair.second))
    a, b = pair.names
    return Gain(weight, f"{a} should give about {one} signals, {b} about {other}; places and patterns too.")


def _carbons(pair: Pair, readings: Readings) -> Gain:
    weight = gap(pair.first, pair.second, lambda e: only(readings, c13=imagined_carbons(e)), by_carbons)
    a, b = pair.names
    lines = [len(pair.first.c13), len(pair.second.c13)]
    if lines[0] != lines[1]:
        why = f"{a} has {lines[0]} kinds of carbon, {b} {lines[1]}."
        return Gain(weight, why, (f"{lines[0]} lines: {a}.", f"{lines[1]} lines: {b}."))
    ours, theirs = _furthest(pair)
    why = f"Both give {lines[0]} lines; they differ most near δ {ours:.0f} ({a}) and δ {theirs:.0f} ({b})."
    return Gain(weight, why)


def _furthest(pair: Pair) -> tuple[float, float]:
    """The two lines, in order of shift, that differ most."""
    one, other = (sorted(g.ppm for g in e.c13) for e in (pair.first, pair.second))
    return max(zip(one, other, strict=False), key=lambda two: abs(two[0] - two[1]), default=(0.0, 0.0))


def _kinds(pair: Pair, readings: Readings) -> Gain:
    """What the kinds of the lines add to their places."""
    counts = [Counter(g.kind for g in e.c13) for e in (pair.first, pair.second)]
    if counts[0] == counts[1] and not readings.c13:
        return NOTHING
    places = gap(pair.first, pair.second, lambda e: only(readings, c13=imagined_carbons(e)), by_carbons)
    both = gap(pair.first, pair.second, lambda e: only(readings, c13=imagined_carbons(e, True)), by_carbons)
    a, b = pair.names
    told = [listed([f"{n} {kind}" for kind, n in sorted(c.items())]) for c in counts]
    weight = both if not readings.c13 else max(both - places, 0.0)
    if counts[0] == counts[1]:
        return Gain(weight, "It shows which lines carry how many H.")
    return Gain(weight, f"Kinds of carbon: {a} {told[0]}; {b} {told[1]}.")


def _shake(pair: Pair) -> Gain:
    one, other = (sum(g.n for g in e.h1 if g.exchangeable) for e in (pair.first, pair.second))
    if one == other:
        return NOTHING
    a, b = pair.names
    most = max(one, other)
    return Gain(
        divergence(_lost_in_shake(one, most), _lost_in_shake(other, most)),
        f"{a} has {one} exchangeable H, {b} {other}.",
        (f"{one} H gone after the shake: {a}.", f"{other} H gone: {b}."),
    )


def _lost_in_shake(exchangeable: int, most: int) -> list[float]:
    """Chance that 0, 1, ... H go in a shake with D2O, for a structure with so many exchangeable H."""
    chances = [
        comb(exchangeable, k) * _VISIBLE**k * (1 - _VISIBLE) ** (exchangeable - k) for k in range(most + 1)
    ]
    even = _MISCOUNTED / (most + 1)
    return [(1 - _MISCOUNTED) * chance + even for chance in chances]


def _solvent(pair: Pair, readings: Readings) -> Gain:
    """In DMSO the OH and NH couple visibly: CH2OH gives t, CHOH d, C-OH s."""
    carriers = [_coupled_oh(e) for e in (pair.first, pair.second)]
    if carriers[0] == carriers[1]:
        return NOTHING
    weight = _elsewhere(pair, Readings(solvent=_DMSO, mhz=readings.mhz), readings)
    a, b = pair.names
    return Gain(
        weight, f"In DMSO-d6 the OH couples to its CH: {a} {_told(carriers[0])}; {b} {_told(carriers[1])}."
    )


def _coupled_oh(expected: Expectations) -> Counter[str]:
    atoms, around = expected.structure.atoms, expected.structure.neighbours
    names = {0: "s", 1: "d", 2: "t", 3: "q"}
    found: Counter[str] = Counter()
    for atom in atoms:
        if atom.symbol == "O" and atom.hydrogens == 1 and around[atom.index]:
            carrier = atoms[around[atom.index][0]]
            if carrier.symbol == "C" and not carrier.aromatic:
                found[names[min(carrier.hydrogens, 3)]] += 1
    return found


def _told(patterns: Counter[str]) -> str:
    return listed([f"{n} OH as {name}" for name, n in sorted(patterns.items())]) or "no alcohol OH"


def _field(pair: Pair, readings: Readings) -> Gain:
    weight = _elsewhere(pair, Readings(solvent=readings.solvent, mhz=_HIGH_FIELD), readings)
    return Gain(weight, "At higher field overlapping and strongly coupled signals come apart.")


def _elsewhere(pair: Pair, conditions: Readings, readings: Readings) -> float:
    """What 1H under other conditions tells beyond what it tells under those already used, decibans."""
    first, second = (expectations(e.structure.source, conditions) for e in (pair.first, pair.second))
    new = gap(first, second, lambda e: only(conditions, h1=imagined_protons(e)), by_protons)
    old = gap(pair.first, pair.second, lambda e: only(readings, h1=imagined_protons(e)), by_protons)
    return max(new - old, 0.0)


def _noe(pair: Pair) -> Gain:
    if not differ_in_space_only(pair.first.structure, pair.second.structure):
        return NOTHING
    for mine, name, other in (
        (pair.first, pair.names[0], pair.names[1]),
        (pair.second, pair.names[1], pair.names[0]),
    ):
        found = contact(mine)
        if found is not None:
            near = f"the H near δ {found[0]:.2f} and δ {found[1]:.2f} are close in {name}"
            seen = _NOE_SEEN if abs(found[0] - found[1]) > _SELECTIVE else _NOE_CROWDED
            return Gain(
                bernoulli([(seen, _NOE_FALSE)]),
                f"They differ in space only: {near}.",
                (f"NOE between them: {name}. None: {other}.",),
            )
    return NOTHING
