"""OH, NH and SH: ranges by class and solvent (facts/proton_exchangeable.csv)."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.model import Term
from hoodside.predict.proton.classes import rank_of
from hoodside.predict.proton.patterns import match_patterns

_CARRIERS = frozenset({"O", "N", "S"})
#: A tabulated range is taken to hold nine in ten; never surer than this (concentration, water, temperature).
_RANGE_SDS, _LEAST_SD = 3.3, 0.25
#: Solvents that form strong hydrogen bonds show OH and NH as DMSO does, in part.
_LIKE_DMSO = {
    "DMSO-d6": 1.0,
    "acetone-d6": 0.5,
    "CD3CN": 0.35,
    "THF-d8": 0.5,
    "pyridine-d5": 1.2,
    "DMF-d7": 0.9,
}


@dataclass(frozen=True, slots=True)
class ExchangeRange:
    """Where an exchangeable H is expected, in ppm."""

    name: str
    lo: float
    hi: float
    sd: float
    term: Term


def is_exchangeable(structure: Structure, atom: int) -> bool:
    """Whether the H of an atom trades places with those of water or alcohols."""
    return structure.atoms[atom].symbol in _CARRIERS


def exchange_ranges(structure: Structure, solvent: str) -> dict[int, ExchangeRange]:
    """Per atom with exchangeable H, the range in the solvent."""
    ranked = _ranked()
    found: dict[int, dict[str, Row]] = {}
    for row, places in zip(ranked, match_patterns(structure, [r["smarts"] for r in ranked]), strict=True):
        for place in places:
            found.setdefault(place[0], {}).setdefault(row["solvent"], row)
    carriers = [a.index for a in structure.atoms if a.hydrogens and is_exchangeable(structure, a.index)]
    return {atom: _range(found.get(atom, {}), solvent) for atom in carriers}


def _range(rows: dict[str, Row], solvent: str) -> ExchangeRange:
    share = _LIKE_DMSO.get(solvent, 0.0)
    plain, bonded = rows.get("CDCl3"), rows.get("DMSO-d6")
    if plain is None and bonded is None:
        plain = _default()
    if share and bonded is not None and (share == 1.0 or plain is None):
        return _of_row(bonded)
    if share and plain is not None and bonded is not None:
        return _between(plain, bonded, share)
    return _of_row(plain or bonded or _default())


def _of_row(row: Row) -> ExchangeRange:
    lo, hi = float(row["lo_ppm"]), float(row["hi_ppm"])
    return _make(row["class"], lo, hi, row["source"])


def _between(plain: Row, bonded: Row, share: float) -> ExchangeRange:
    lo, hi = (float(plain[c]) + share * (float(bonded[c]) - float(plain[c])) for c in ("lo_ppm", "hi_ppm"))
    return _make(plain["class"], lo, hi, plain["source"])


def _make(name: str, lo: float, hi: float, source: str) -> ExchangeRange:
    sd = max((hi - lo) / _RANGE_SDS, _LEAST_SD)
    return ExchangeRange(name, lo, hi, sd, Term(name, (lo + hi) / 2, source))


def _default() -> Row:
    return next(row for row in load_table("proton_exchangeable") if row["smarts"] == "*")


@cache
def _ranked() -> tuple[Row, ...]:
    rows = [row for row in load_table("proton_exchangeable") if row["smarts"] != "*"]
    return tuple(sorted(rows, key=lambda r: rank_of(r["smarts"]), reverse=True))
