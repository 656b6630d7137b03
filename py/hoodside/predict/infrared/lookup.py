"""Band to groups: what a band may mean."""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.errors import InvalidInputError
from hoodside.predict.infrared.table import BandRow, band_rows

#: Bands wander this far beyond the published range before a group is left out, cm-1.
SLACK = 10.0
LOWEST, HIGHEST = 200.0, 5000.0
_ORDER = ("weak", "medium", "strong")


@dataclass(frozen=True, slots=True)
class BandMeaning:
    """One group that a band may come from; ``score`` runs from 0 to 1, best first."""

    group: str
    mode: str
    lo: float  # cm-1
    hi: float
    typical: float
    strength: str
    shape: str
    smarts: str
    note: str
    artefact: bool
    score: float
    source: str


def groups_for_band(cm1: float, strength: str = "", shape: str = "") -> list[BandMeaning]:
    """Groups that may show a band at ``cm1``, likeliest first.

    Args:
        strength: "strong", "medium", "weak" or "".
        shape: "broad", "sharp" or "".
    Raises: InvalidInputError when ``cm1`` lies outside the infrared.
    """
    if not LOWEST <= cm1 <= HIGHEST:
        raise InvalidInputError(
            f"{cm1:g} cm-1 is no infrared band.",
            hint=f"Give a wavenumber from {LOWEST:g} to {HIGHEST:g} cm-1.",
            field="ir.cm1",
            value=cm1,
        )
    found = [_meaning(row, cm1, strength, shape) for row in band_rows() if _within(row, cm1)]
    return sorted(found, key=lambda meaning: (-meaning.score, meaning.group))


def _within(row: BandRow, cm1: float) -> bool:
    return row.lo - SLACK <= cm1 <= row.hi + SLACK


def _meaning(row: BandRow, cm1: float, strength: str, shape: str) -> BandMeaning:
    return BandMeaning(
        group=row.group,
        mode=row.mode,
        lo=row.lo,
        hi=row.hi,
        typical=row.typical,
        strength=row.strength,
        shape=row.shape,
        smarts=row.smarts,
        note=row.note,
        artefact=row.use == "artefact",
        score=_place(row, cm1) * _strength_fit(row.strength, strength) * _shape_fit(row.shape, shape),
        source=row.source,
    )


def _place(row: BandRow, cm1: float) -> float:
    """1 at the typical place, 1/2 at the ends of the range, less beyond."""
    half = (row.hi - row.typical if cm1 >= row.typical else row.typical - row.lo) or SLACK / 2
    return 1 / (1 + ((cm1 - row.typical) / max(half, SLACK / 2)) ** 2)


def _strength_fit(expected: str, seen: str) -> float:
    if expected not in _ORDER or seen not in _ORDER:
        return 0.8
    return (1.0, 0.5, 0.15)[abs(_ORDER.index(expected) - _ORDER.index(seen))]


def _shape_fit(expected: str, seen: str) -> float:
    if not seen:
        return 0.8
    broad = "broad" in expected or expected == "multiplet"
    return 1.0 if broad == ("broad" in seen) else 0.3
