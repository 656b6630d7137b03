"""What a loss or a low-mass ion usually means, by nominal mass."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts.table import load_table


@dataclass(frozen=True, slots=True)
class IonMeaning:
    """One usual reading of a loss or ion."""

    kind: str  # "loss" or "ion"
    nominal: int  # u
    exact: float  # u; for ions the electron is taken off
    formula: str
    indicates: str
    smarts: str
    source: str


def ions_at(nominal: int) -> tuple[IonMeaning, ...]:
    """Usual ions at a nominal m/z."""
    return tuple(row for row in _rows() if row.kind == "ion" and row.nominal == nominal)


def losses_of(nominal: int) -> tuple[IonMeaning, ...]:
    """Usual neutral losses of a nominal mass."""
    return tuple(row for row in _rows() if row.kind == "loss" and row.nominal == nominal)


@cache
def _rows() -> tuple[IonMeaning, ...]:
    return tuple(
        IonMeaning(
            kind=row["kind"],
            nominal=int(row["nominal"]),
            exact=float(row["exact"]),
            formula=row["formula"],
            indicates=row["indicates"],
            smarts=row["smarts_hint"],
            source=row["source"],
        )
        for row in load_table("ms_losses")
    )
