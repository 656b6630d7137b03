"""The correlation table and the published shift rules, as typed rows."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts.table import Row, load_table

#: Sampling media in which hydrogen bonds are broken up; all others count as condensed.
SOLUTION_MEDIA = frozenset({"ccl4", "chcl3", "cdcl3", "cs2", "ch2cl2", "dcm", "solution"})


@dataclass(frozen=True, slots=True)
class BandRow:
    """One row of facts/ir_bands.csv.

    Rows of one ``family`` compete for the atoms named by ``sites`` (positions in the pattern): the one
    of highest ``rank`` wins. Rows that share ``pair`` are two bands of one group.
    """

    group: str
    smarts: str
    mode: str
    lo: float  # cm-1
    hi: float
    typical: float
    strength: str
    shape: str
    absence_counts: bool
    solution: bool  # seen in dilute solution only
    condensed: bool  # seen in solids and neat liquids only
    note: str
    family: str
    sites: tuple[int, ...]
    rank: int
    pair: str
    shifts: str  # "all": base value; "fine": only the fine rules; "": none
    geometry: str  # "cis" or "trans" of the double bond, or ""
    use: str  # "both", "lookup" (band to group only) or "artefact"
    needs: frozenset[str]  # elements without which the pattern cannot match
    source: str


@dataclass(frozen=True, slots=True)
class ShiftRule:
    """A published shift: ``deltas`` in cm-1 for the first, second, ... occurrence at one site."""

    family: str
    kind: str  # "base": only for rows that give a base value; "fine": for every row of the family
    label: str
    smarts: str  # its first atom is the site
    deltas: tuple[float, ...]
    needs: frozenset[str]  # elements without which the pattern cannot match
    one_sided: bool  # some rotamers are not shifted: the far end of the range moves, the near end stays
    source: str


@cache
def band_rows() -> tuple[BandRow, ...]:
    """Every row of the correlation table."""
    return tuple(_band(row) for row in load_table("ir_bands"))


@cache
def predicting_rows() -> tuple[BandRow, ...]:
    """The rows used to predict a structure's bands."""
    return tuple(row for row in band_rows() if row.use == "both")


@cache
def shift_rules() -> tuple[ShiftRule, ...]:
    """Every published shift rule."""
    return tuple(
        ShiftRule(
            family=row["family"],
            kind=row["kind"],
            label=row["label"],
            smarts=row["smarts"],
            deltas=tuple(float(delta) for delta in row["deltas_cm1"].split()),
            needs=frozenset(row["needs"].split()),
            one_sided=row["one_sided"] == "yes",
            source=row["source"],
        )
        for row in load_table("ir_shifts")
    )


def _band(row: Row) -> BandRow:
    return BandRow(
        group=row["group"],
        smarts=row["smarts"],
        mode=row["mode"],
        lo=float(row["lo_cm1"]),
        hi=float(row["hi_cm1"]),
        typical=float(row["typical_cm1"]),
        strength=row["strength"],
        shape=row["shape"],
        absence_counts=row["absence_counts"] == "yes",
        solution=row["medium"] == "CCl4",
        condensed=row["medium"] in ("KBr", "neat", "film"),
        note=row["shift_rule"],
        family=row["family"],
        sites=tuple(int(i) for i in row["sites"].split()),
        rank=int(row["rank"] or 1),
        pair=row["pair"],
        shifts=row["shifts"],
        geometry=row["geometry"],
        use=row["use"],
        needs=frozenset(row["needs"].split()),
        source=row["source"],
    )
