"""Ranks further measurements by how well each would tell the standing structures apart.

The weight expected of a measurement between two structures is worked out from their predictions: readings are
imagined as if the one, then the other, were right, and weighed. Pairs count by how likely it is that they are
what is in question.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import combinations
from math import fsum

from hoodside.advise.bench_tests import test_measurements
from hoodside.advise.composition import mass_measurements
from hoodside.advise.infrared import infrared_measurements
from hoodside.advise.magnetic import nmr_measurements
from hoodside.advise.model import Advice, Gain, Measurement, Pair, efforts
from hoodside.advise.stereo import mirror_images
from hoodside.readings import Readings
from hoodside.weigh.expectations import Expectations

#: Structures asked about; pairs beyond these hardly matter to the answer.
_MOST_STANDING = 4
#: A measurement expected to give less than this between every pair is not worth its time, decibans.
_LEAST_DB = 3.0
_MOST_ADVICE = 8
#: More weight than this makes no difference to a decision, decibans.
_ENOUGH_DB = 30.0
#: What an accurate mass tells from analogues of another formula, decibans.
_COMPOSITION_DB = 20.0
_UNKNOWN = (
    "Nothing measured so far fixes the formula: analogues with O, NH, S or CH₂ exchanged, or another "
    "halogen, stay open."
)
#: Minutes at which effort halves the worth of a measurement.
_HALF_WORTH = 90.0


@dataclass(frozen=True, slots=True)
class Standing:
    """A structure that no reading rules out."""

    place: int  # in the ranking
    name: str
    share: float
    expected: Expectations


def advise(readings: Readings, standing: Sequence[Standing]) -> list[Advice]:
    """Further measurements, best first; empty when nothing is left to tell apart.

    Args:
        standing: structures not ruled out, best first.
    """
    kept = _distinct(standing)[:_MOST_STANDING]
    pairs = list(combinations(kept, 2))
    if not pairs:
        return _composition(readings, []) if kept else []
    mirrored = [p for p in pairs if mirror_images(p[0].expected.structure, p[1].expected.structure)]
    pairs = [p for p in pairs if p not in mirrored]
    structures = [s.expected.structure for s in kept]
    offers = [
        *nmr_measurements(readings),
        *infrared_measurements(readings),
        *mass_measurements(readings),
        *test_measurements(readings, structures),
    ]
    found = [advice for offer in offers if pairs and (advice := _advice(offer, pairs)) is not None]
    found.sort(key=lambda a: -_worth(a))
    return [*_chiral(mirrored), *_composition(readings, found), *found][:_MOST_ADVICE]


def _distinct(standing: Sequence[Standing]) -> list[Standing]:
    seen: dict[str, Standing] = {}
    for entry in standing:
        seen.setdefault(entry.expected.structure.inchikey, entry)
    return list(seen.values())


def _advice(offer: Measurement, pairs: Sequence[tuple[Standing, Standing]]) -> Advice | None:
    gains = [(offer.between(Pair(a.expected, b.expected, (a.name, b.name))), a, b) for a, b in pairs]
    told = [(gain, a, b) for gain, a, b in gains if gain.expected_db >= _LEAST_DB]
    if not told:
        return None
    told.sort(key=lambda entry: -_stake(entry[1], entry[2]) * min(entry[0].expected_db, _ENOUGH_DB))
    lead = told[0][0]
    return Advice(
        key=offer.key,
        measure=offer.measure,
        why=_capital(lead.why),
        separates=tuple((a.place, b.place) for _, a, b in told),
        expected_db=_mean(gains),
        effort=efforts()[offer.key],
        cautions=(*efforts()[offer.key].cautions, *offer.cautions),
        if_then=tuple(map(_capital, lead.if_then)),
        test=offer.test,
    )


def _capital(text: str) -> str:
    return text[:1].upper() + text[1:] if text.startswith("structure") else text


def _mean(gains: Sequence[tuple[Gain, Standing, Standing]]) -> float:
    """Expected weight over the pairs, each by what is at stake."""
    stakes = [_stake(a, b) for _, a, b in gains]
    return fsum(s * gain.expected_db for s, (gain, _, _) in zip(stakes, gains, strict=True)) / fsum(stakes)


def _stake(a: Standing, b: Standing) -> float:
    """How much hangs on telling two structures apart; never nothing."""
    return a.share * b.share + 1e-3


def _worth(advice: Advice) -> float:
    return min(advice.expected_db, _ENOUGH_DB) / (1 + advice.effort.minutes / _HALF_WORTH)


def _composition(readings: Readings, found: Sequence[Advice]) -> list[Advice]:
    """An accurate mass, when nothing measured fixes the composition and nobody has asked for a mass yet."""
    measured = readings.formula or readings.hrms or readings.analysis or readings.ms
    if measured or not (readings.h1 or readings.c13) or any(a.key in ("hrms", "ms") for a in found):
        return []
    return [Advice("hrms", efforts()["hrms"].measure, _UNKNOWN, (), _COMPOSITION_DB, efforts()["hrms"])]


def _chiral(pairs: Sequence[tuple[Standing, Standing]]) -> list[Advice]:
    if not pairs:
        return []
    effort = efforts()["chiral"]
    why = f"{pairs[0][0].name} and {pairs[0][1].name} are mirror images: no other reading tells them apart."
    places = tuple((a.place, b.place) for a, b in pairs)
    return [Advice("chiral", effort.measure, _capital(why), places, 20.0, effort)]
