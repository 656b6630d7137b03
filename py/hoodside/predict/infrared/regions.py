"""The sweep from 4000 to 500 cm-1 in diagnostic regions."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts.table import load_table


@dataclass(frozen=True, slots=True)
class IrRegion:
    """One stretch of the sweep. Regions follow one another without gap, highest first."""

    key: str
    hi: float  # cm-1
    lo: float
    name: str
    lives_there: str
    clear_means: str  # what a flat baseline here would rule out; "" when nothing
    source: str


@cache
def ir_regions() -> tuple[IrRegion, ...]:
    """All regions from 4000 down to 500 cm-1."""
    return tuple(
        IrRegion(
            key=row["key"],
            hi=float(row["hi_cm1"]),
            lo=float(row["lo_cm1"]),
            name=row["name"],
            lives_there=row["lives_there"],
            clear_means=row["clear_means"],
            source=row["source"],
        )
        for row in load_table("ir_regions")
    )


def region_of(cm1: float) -> IrRegion | None:
    """The region a wavenumber falls in (its upper end included), or None outside the sweep."""
    return next((region for region in ir_regions() if region.lo < cm1 <= region.hi), None)
