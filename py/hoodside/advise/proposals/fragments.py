"""Fragments that readings force, with weights counted on published spectra."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cache

from hoodside.advise.proposals.signs import Demand, find_sign, parse_sign
from hoodside.facts import load_table
from hoodside.readings.model import Readings

#: Added to every count: a sign never seen to fail has failed half a time.
_HALF = 0.5


@dataclass(frozen=True, slots=True)
class Sign:
    """One row of the facts table fragment_signs.

    Attributes:
        smarts: what a structure with the fragment matches.
        unit: SMILES of the fragment with hydrogen at its open ends, "" when it is no building unit.
        ports: atoms of ``unit`` with an open end, once for each.
        weight_db: weight of evidence of the sign for the fragment, decibans, from published spectra.
        seen: published compounds with the sign; both: those of them that have the fragment.
    """

    fragment: str
    text: str
    demands: tuple[Demand, ...]
    smarts: str
    unit: str
    ports: tuple[int, ...]
    weight_db: float
    seen: int
    both: int
    source: str

    @property
    def right(self) -> float:
        """Part of the published compounds with the sign that have the fragment."""
        return (self.both + _HALF) / (self.seen + 2 * _HALF)


@dataclass(frozen=True, slots=True)
class Fragment:
    """A fragment the readings speak for."""

    sign: Sign
    times: int
    weight_db: float
    readings: tuple[str, ...]
    reason: str


@cache
def signs() -> tuple[Sign, ...]:
    """All signs, weightiest first."""
    rows = load_table("fragment_signs")
    return tuple(sorted((_sign(row) for row in rows), key=lambda sign: -sign.weight_db))


def _sign(row: dict[str, str]) -> Sign:
    both, seen = int(row["with_both"]), int(row["with_sign"])
    have, of = int(row["with_fragment"]), int(row["of"])
    hit = (both + _HALF) / (have + 2 * _HALF)
    false = (seen - both + _HALF) / (of - have + 2 * _HALF)
    return Sign(
        fragment=row["fragment"],
        text=row["sign"],
        demands=parse_sign(row["sign"]),
        smarts=row["smarts"],
        unit=row["unit"],
        ports=tuple(int(port) for port in row["ports"].split()),
        weight_db=round(10 * math.log10(hit / false), 1),
        seen=seen,
        both=both,
        source=row["source"],
    )


def find_fragments(readings: Readings) -> list[Fragment]:
    """Fragments in order of weight; a signal or 13C line speaks for one fragment only, the weightiest."""
    taken: frozenset[str] = frozenset()
    found: list[Fragment] = []
    for sign in signs():
        while sign.weight_db > 0:
            seen = find_sign(sign.demands, readings, taken)
            if seen is None or _is_told(sign, seen.readings, found):
                break
            taken |= {name for name in seen.readings if not name.startswith("ir:")}
            found.append(Fragment(sign, seen.times, sign.weight_db, seen.readings, _reason(sign)))
    return found


def _is_told(sign: Sign, readings: tuple[str, ...], found: list[Fragment]) -> bool:
    """Whether the fragment is there already, on no fewer 1H signals of its own."""
    protons = [name for name in readings if name.startswith("h1:")]
    return not protons and any(f.sign.fragment == sign.fragment for f in found)


def _reason(sign: Sign) -> str:
    demands = "; ".join(_in_words(demand) for demand in sign.demands)
    return f"{demands} (right in {sign.both} of {sign.seen} published spectra with this sign)"


def _in_words(demand: Demand) -> str:
    span = f"{demand.lo:g} to {demand.hi:g}"
    if demand.kind == "c13":
        return f"13C line at {span} ppm"
    if demand.kind == "ir":
        return " ".join([*demand.words, f"IR band at {span} cm-1"])
    j = f", J {demand.j[0]:g} to {demand.j[1]:g} Hz" if demand.j else ""
    return f"{demand.n:g}H {' or '.join(demand.words[:2])} at {span} ppm{j}"
