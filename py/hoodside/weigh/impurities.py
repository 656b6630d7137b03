"""What a signal would be if it did not belong to the structure: solvent, water, a known impurity, a stranger.

Rates are common practice: how often such a signal is listed with a sample that is otherwise clean.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass, replace
from functools import cache
from math import fsum

from hoodside.facts import Row, load_table
from hoodside.readings import CarbonLine, ProtonSignal
from hoodside.weigh.background import proton_spread, spread
from hoodside.weigh.decibans import decibans, t_between

#: Chance that a listed signal is the solvent's own, water, one of the listed impurities, something else.
_SOLVENT, _WATER, _LISTED, _STRANGER = 0.15, 0.05, 0.06, 0.02
#: Wander of such signals with concentration and reference, ppm; water wanders more.
_WANDER, _WATER_WANDER = 0.02, 0.12
_CARBON_WANDER = 0.1
#: Each H of a signal makes it less likely that so much of a stranger is in the sample, decibans.
_PER_H = 1.5
#: A pattern other than the impurity's own, decibans.
_WRONG_PATTERN = -8.0
#: Below this weight a name is a mere coincidence.
_NAMED = 0.25


@dataclass(frozen=True, slots=True)
class Stray:
    """A signal seen as no part of the structure: its weight, and its probable name ("" when none fits).

    ``usual``: what bears the name is the solvent, water, or a solvent of work-up and chromatography.
    """

    weight_db: float
    name: str
    usual: bool = False

    @property
    def likely(self) -> str:
        """ "probably water", "perhaps pyrrolidine"."""
        return f"{'probably' if self.usual else 'perhaps'} {self.name}"


@dataclass(frozen=True, slots=True)
class _Known:
    name: str
    ppm: float
    rate: float
    wander: float
    pattern: str
    whole: int  # H of the molecule's signal
    usual: bool = True


def proton_stray(signal: ProtonSignal, lo: float, hi: float, solvent: str) -> Stray:
    """What a 1H signal with the window ``lo`` to ``hi`` (ppm) would be on its own.

    Source: facts/residual_solvents.csv, facts/impurities.csv (Gottlieb 1997, Fulmer 2010).
    """
    anyhow = proton_spread(signal.n).between(lo, hi)
    crowd = [
        (known.rate * t_between(lo, hi, known.ppm, known.wander) * _as_pattern(signal.mult, known), known)
        for known in _known_protons(solvent)
    ]
    stray = _stray(crowd, anyhow, lambda known: _same_pattern(signal.mult, known))
    # A solvent signal that was integrated all the same holds no particular number of H.
    return replace(stray, weight_db=stray.weight_db - _PER_H * (signal.n or 0))


def carbon_stray(line: CarbonLine, solvent: str) -> Stray:
    """What a 13C line would be on its own."""
    lo, hi = line.ppm - _CARBON_WANDER, line.ppm + _CARBON_WANDER
    anyhow = spread("c13_background").between(lo, hi)
    crowd = [
        (known.rate * t_between(lo, hi, known.ppm, known.wander), known) for known in _known_carbons(solvent)
    ]
    return _stray(crowd, anyhow, lambda known: True)


def _stray(crowd: list[tuple[float, _Known]], anyhow: float, may_be: Callable[[_Known], bool]) -> Stray:
    """The weight counts every impurity; a name is given only to one that ``may_be`` it by its pattern."""
    likely, best = max(crowd, key=lambda entry: entry[0], default=(0.0, None))
    total = fsum(chance for chance, _ in crowd) + _STRANGER * anyhow
    name = best.name if best is not None and likely > _NAMED * total and may_be(best) else ""
    return Stray(min(decibans(total / anyhow), 0.0), name, bool(name) and best is not None and best.usual)


def _as_pattern(seen: str, known: _Known) -> float:
    return 1.0 if _same_pattern(seen, known) else float(10 ** (_WRONG_PATTERN / 10))


def _same_pattern(seen: str, known: _Known) -> bool:
    bare = seen.removeprefix("br ").removeprefix("app ")
    return not bare or bare == known.pattern or "m" in (bare, known.pattern)


@cache
def _known_protons(solvent: str) -> tuple[_Known, ...]:
    return tuple(_solvent_lines(solvent, "1H", _WANDER)) + tuple(_impurity_lines(solvent, "1H", _WANDER))


@cache
def _known_carbons(solvent: str) -> tuple[_Known, ...]:
    lines = tuple(_solvent_lines(solvent, "13C", _CARBON_WANDER))
    return lines + tuple(_impurity_lines(solvent, "13C", _CARBON_WANDER))


def _solvent_lines(solvent: str, nucleus: str, wander: float) -> Iterator[_Known]:
    rows = [r for r in load_table("residual_solvents") if (r["solvent"], r["nucleus"]) == (solvent, nucleus)]
    for row in rows:
        pattern = row["multiplicity"].split()[0].rstrip(",")
        if row["what"] == "water":
            yield _Known("water", float(row["ppm"]), _WATER, _WATER_WANDER, pattern, 2)
        else:
            yield _Known(f"the solvent ({solvent})", float(row["ppm"]), _SOLVENT, wander, pattern, 1)


def _impurity_lines(solvent: str, nucleus: str, wander: float) -> Iterator[_Known]:
    column = solvent.replace("-", "_")
    rows = [row for row in load_table("impurities") if row["nucleus"] == nucleus and row.get(column)]
    for row in rows:
        rate = _LISTED / len(rows) * _usual(row)
        pattern = row["multiplicity"].removeprefix("br ")
        whole, common = int(row["n_H"] or 0), row["compound"] in _COMMON
        yield _Known(row["compound"], float(row[column]), rate, wander, pattern, whole, common)


def _usual(row: Row) -> float:
    """Work-up and chromatography solvents turn up more often than the rest (common practice)."""
    return 4.0 if row["compound"] in _COMMON else 0.6


_COMMON = frozenset(
    {
        "ethyl acetate",
        "dichloromethane",
        "diethyl ether",
        "acetone",
        "n-hexane",
        "grease (hydrocarbon)",
        "silicone grease",
        "toluene",
        "tetrahydrofuran",
        "methanol",
        "ethanol",
        "dimethylformamide",
        "water",
    }
)
