"""What should have changed between a starting material and its product, in order of how telling it is."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Sequence
from dataclasses import dataclass
from typing import Literal, TypeVar

from hoodside.molecule import Structure
from hoodside.predict.formula import exact_mass, formula_of, shortfall
from hoodside.predict.model import CarbonGroup, IrExpectation, Prediction, ProtonGroup
from hoodside.predict.whole import USUAL_MHZ, USUAL_SOLVENT, predict_all

Kind = Literal["IR", "1H", "13C", "mass"]
Way = Literal["comes", "goes", "moves", "stays"]
G = TypeVar("G", ProtonGroup, CarbonGroup)

#: A signal with a neighbour on the other side nearer than this many standard deviations tells nothing.
_TOLD_APART_SD = 3.0
#: An empty stretch this wide about a signal makes its coming or going plain at a glance, ppm.
_CLEAR_H1, _CLEAR_C13 = 0.5, 15.0
#: Signals of one kind nearer than this are looked for together, ppm.
_TOGETHER_H1, _TOGETHER_C13 = 0.9, 6.0
#: Bands above it stand clear of the fingerprint, cm-1 (common practice).
_FINGERPRINT = 1500
#: A band with nothing else so near on the other side stands in a quiet stretch, cm-1.
_QUIET = 60
#: How much a change tells at a glance, on a scale of decibans (judged from practice, not fitted).
_STRENGTHS = {"strong": 10.0, "medium": 5.0}
_BROAD_BONUS, _CLEAR_BONUS, _MASS_TELLS, _EXCHANGE_TELLS = 3.0, 4.0, 13.0, 8.0


@dataclass(frozen=True, slots=True)
class Change:
    """One thing to look for.

    Attributes:
        way: what it does on going from the start to the product.
        where: shift or wavenumbers with the unit, as read off a printout.
        telling: worth of the look, decibans or so.
    """

    kind: Kind
    way: Way
    where: str
    text: str
    telling: float
    source: str


def changes(
    start: Structure, product: Structure, solvent: str = USUAL_SOLVENT, mhz: float = USUAL_MHZ
) -> tuple[Change, ...]:
    """Readings to look for, the most telling first.

    Args:
        solvent: NMR solvent by its name in facts/residual_solvents.csv; mhz: 1H frequency, MHz.
    Source: the predictions compared, each with its own; worth of a change is judged from practice.
    """
    before, after = predict_all(start, solvent, mhz), predict_all(product, solvent, mhz)
    found = [
        *_bands(before, after),
        *_protons(before, after),
        *_exchangeable(before, after),
        *_carbons(before, after),
        _mass(start, product),
    ]
    return tuple(sorted(found, key=lambda change: -change.telling))


# ------------------------------------------------------------------------------------------------- IR


def _bands(before: Prediction, after: Prediction) -> Iterator[Change]:
    gone, come = _unmatched(before.ir, after.ir), _unmatched(after.ir, before.ir)
    for band in gone:
        worth = _band_tells(band, after.ir)
        twin = next((other for other in come if other.mode == band.mode), None)
        if twin and band.mode.startswith("C=O"):
            come.remove(twin)
            where = f"{band.typical:.0f} to {twin.typical:.0f} cm-1"
            yield Change("IR", "moves", where, f"C=O of {twin.group}", worth, twin.source)
        else:
            yield _band(band, "goes", worth)
    yield from (_band(band, "comes", _band_tells(band, before.ir)) for band in come)


def _unmatched(bands: Iterable[IrExpectation], others: Sequence[IrExpectation]) -> list[IrExpectation]:
    """Bands one would look for, where the other side shows nothing of note at the same place."""
    return [b for b in bands if b.strength in _STRENGTHS and _looked_for(b) and not _covered(b, others)]


def _looked_for(band: IrExpectation) -> bool:
    return band.absence_counts or band.typical > _FINGERPRINT


def _covered(band: IrExpectation, others: Sequence[IrExpectation]) -> bool:
    return any(
        o.strength in _STRENGTHS and o.lo - o.sd <= band.typical <= o.hi + o.sd and _as_plain(o, band)
        for o in others
    )


def _as_plain(other: IrExpectation, band: IrExpectation) -> bool:
    """A broad band is not hidden by a sharp one."""
    return "broad" in other.shape or "broad" not in band.shape


def _band(band: IrExpectation, way: Way, telling: float) -> Change:
    where = f"{band.hi:.0f} to {band.lo:.0f} cm-1"
    text = f"{band.mode}, {band.group}, {band.strength}"
    return Change("IR", way, where, text, telling, band.source)


def _band_tells(band: IrExpectation, others: Sequence[IrExpectation]) -> float:
    worth = _STRENGTHS.get(band.strength, 0.0)
    worth += _BROAD_BONUS if "broad" in band.shape else 0.0
    worth += _CLEAR_BONUS if band.typical > _FINGERPRINT else 0.0
    shown = [o for o in others if o.strength in _STRENGTHS]
    if all(o.hi + _QUIET < band.typical or band.typical < o.lo - _QUIET for o in shown):
        worth += _CLEAR_BONUS
    return worth if band.absence_counts else worth * 0.6


# ------------------------------------------------------------------------------------------------ NMR


def _protons(before: Prediction, after: Prediction) -> Iterator[Change]:
    old, new = ([g for g in side.h1 if not g.exchangeable] for side in (before, after))
    for mine, others, way in ((old, new, "goes"), (new, old, "comes")):
        lone = [group for group in mine if _gap(group, others) > _TOLD_APART_SD]
        for together in _neighbours(lone, _TOGETHER_H1):
            yield _signals("1H", way, together, _shift_tells(together, others, _CLEAR_H1), _h1_words)


def _carbons(before: Prediction, after: Prediction) -> Iterator[Change]:
    for mine, others, way in ((before.c13, after.c13, "goes"), (after.c13, before.c13, "comes")):
        lone = [group for group in mine if _gap(group, others) > _TOLD_APART_SD]
        for together in _neighbours(lone, _TOGETHER_C13):
            # A carbon spectrum takes longer than a proton spectrum and tells no more of the same change.
            yield _signals(
                "13C", way, together, 0.75 * _shift_tells(together, others, _CLEAR_C13), _c13_words
            )


def _exchangeable(before: Prediction, after: Prediction) -> Iterator[Change]:
    """Exchangeable H by what they sit on; shaken with D2O they go, which tells them from all others."""
    old, new = ({g.environment: g for g in side.h1 if g.exchangeable} for side in (before, after))
    gone = [(group, "goes") for name, group in old.items() if name not in new]
    come = [(group, "comes") for name, group in new.items() if name not in old]
    for group, way in (*gone, *come):
        where = _range_text([group.lo or group.ppm, group.hi or group.ppm], 1)
        text = f"{group.environment}; goes on shaking with D2O"
        yield Change("1H", _way(way), where, text, _EXCHANGE_TELLS, _source(group))


def _gap(group: ProtonGroup | CarbonGroup, others: Sequence[ProtonGroup] | Sequence[CarbonGroup]) -> float:
    """Distance to the nearest signal of the other side, in standard deviations of the two together."""
    return min((abs(group.ppm - o.ppm) / math.hypot(group.sd, o.sd) for o in others), default=math.inf)


def _shift_tells(together: Sequence[G], others: Sequence[G], clear: float) -> float:
    gap = max(min(_gap(group, others), 10.0) for group in together)
    stands_clear = any(all(abs(g.ppm - o.ppm) > clear for o in others) for g in together)
    return 3.0 + gap + min(sum(g.n for g in together), 4) / 2 + (_CLEAR_BONUS if stands_clear else 0.0)


def _neighbours(groups: Iterable[G], within: float) -> list[list[G]]:
    """Groups by descending shift, parted where the step to the next is wider than ``within`` ppm."""
    parts: list[list[G]] = []
    for group in sorted(groups, key=lambda g: -g.ppm):
        if parts and parts[-1][-1].ppm - group.ppm <= within:
            parts[-1].append(group)
        else:
            parts.append([group])
    return parts


def _signals(
    kind: Kind, way: str, together: Sequence[G], telling: float, words: Callable[[Sequence[G]], str]
) -> Change:
    where = _range_text([g.ppm for g in together], 1 if kind == "1H" else 0)
    return Change(kind, _way(way), where, words(together), telling, _source(together[0]))


def _way(word: str) -> Way:
    return "goes" if word == "goes" else "comes"


def _h1_words(together: Sequence[ProtonGroup]) -> str:
    kinds = dict.fromkeys(group.environment for group in together if group.environment)
    return f"{sum(group.n for group in together)} H, {', '.join(kinds)}"


def _c13_words(together: Sequence[CarbonGroup]) -> str:
    return ", ".join(dict.fromkeys("C without H" if g.kind == "C" else g.kind for g in together))


def _range_text(values: Sequence[float], digits: int) -> str:
    low, high = (f"{value:.{digits}f}" for value in (min(values), max(values)))
    return f"{high} ppm" if low == high else f"{high} to {low} ppm"


def _source(group: ProtonGroup | CarbonGroup) -> str:
    return next((term.source for term in group.terms if term.source), "")


# ----------------------------------------------------------------------------------------------- mass


def _mass(start: Structure, product: Structure) -> Change:
    old, new = formula_of(start), formula_of(product)
    gap = shortfall(old, new)
    if not gap.needs.parts and not gap.over.parts:
        return Change("mass", "stays", "", "the same formula: no mass tells them apart", 0.0, "")
    by = exact_mass(new) - exact_mass(old)
    said = [f"{verb} {part.text}" for verb, part in (("gains", gap.needs), ("loses", gap.over)) if part.parts]
    where = f"{'+' if by > 0 else '-'}{abs(by):.4f}"
    source = "exact masses of the nuclides, facts/isotopes.csv"
    return Change("mass", "moves", where, f"M {' and '.join(said)}", _MASS_TELLS, source)
