"""Formulas: from text, and from an accurate mass."""

from __future__ import annotations

from typing import Any

from hoodside.methods.arguments import integer, short_text
from hoodside.predict.formula import (
    average_mass,
    candidate_formulas,
    exact_mass,
    formula_doubts,
    isotope_pattern,
    parse_formula,
    unsaturation,
)
from hoodside.readings.fields import number, record, refusal, show
from hoodside.readings.spans import MZ, TOLERANCE

_LEAST_PEAK = 0.5  # per cent of the tallest


def formula(text: str) -> dict[str, Any]:
    """Masses (u), unsaturation and isotope pattern of a formula as typed."""
    found = parse_formula(short_text(text, "text"))
    degree = unsaturation(found)
    return {
        "formula": found.text,
        "parts": [list(part) for part in found.parts],
        "charge": found.charge,
        "exact_mass": exact_mass(found),
        "average_mass": average_mass(found),
        "dbe": degree,
        "isotope_pattern": [{"mz": p.mz, "rel": p.rel} for p in isotope_pattern(found, _LEAST_PEAK)],
        "warnings": list(formula_doubts(found)),
    }


def formulas(
    mz: float, adduct: str = "[M+H]+", ppm: float = 5.0, limits: dict[str, list[int]] | None = None
) -> dict[str, Any]:
    """Molecular formulas that an accurate mass allows, smallest error first."""
    found = candidate_formulas(
        number(mz, "mz", MZ),
        short_text(adduct, "adduct") or "[M+H]+",
        number(ppm, "ppm", TOLERANCE),
        _limits(limits),
    )
    return {
        "candidates": [
            {
                "formula": entry.formula.text,
                "exact_mass": exact_mass(entry.formula),
                "mz": entry.mz,
                "error_ppm": entry.error_ppm,
                "dbe": entry.unsaturation,
            }
            for entry in found
        ]
    }


def _limits(value: object) -> dict[str, tuple[int, int]] | None:
    if value is None:
        return None
    found = record(value, "limits", 'Write {"C": [0, 20], "N": [0, 2]}.')
    return {str(element): _bounds(pair, f"limits.{element}") for element, pair in found.items()}


def _bounds(pair: object, field: str) -> tuple[int, int]:
    if not isinstance(pair, list | tuple) or len(pair) != 2:
        raise refusal(field, pair, f"{show(pair)} is no pair.", "Write [fewest, most].")
    lo, hi = (integer(end, field, 0, 1000) for end in pair)
    return lo, hi
