"""Matches predicted infrared bands with printed lists: shared by the bench and the fit of reliabilities."""

from __future__ import annotations

import json
import math
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from hoodside.molecule import Structure, read_structure
from hoodside.predict.infrared import predict_bands
from hoodside.predict.model import IrExpectation

CASES = Path(__file__).parents[1] / "cases" / "published.json"
#: A printed band this far outside a predicted range still counts as that band, cm-1.
SLACK = 10.0


@dataclass(frozen=True)
class Matched:
    """One compound: its printed bands, its predicted bands, and which printed band each of these took."""

    name: str
    structure: Structure
    printed: tuple[float, ...]
    expected: tuple[IrExpectation, ...]
    taken: dict[int, int]  # index of expectation -> index of printed band
    rivals: tuple[str, ...]  # SMILES
    medium: str

    def covered(self, band: int) -> bool:
        """Whether any expectation allows this printed band."""
        return any(allows(e, self.printed[band]) for e in self.expected)


def allows(expected: IrExpectation, cm1: float) -> bool:
    """Whether a printed band lies within the expected range, give or take the slack."""
    return expected.lo - SLACK <= cm1 <= expected.hi + SLACK


def printed_cases() -> list[dict[str, Any]]:
    """Published compounds that print infrared bands."""
    return [case for case in json.loads(CASES.read_text("utf-8")) if case.get("ir")]


def matched_cases() -> Iterator[Matched]:
    """Every such compound with its bands matched one to one, nearest first."""
    for case in printed_cases():
        structure = read_structure(case["smiles"])
        printed = tuple(float(band["cm1"]) for band in case["ir"])
        medium = case.get("ir_medium") or ""
        expected = predict_bands(structure, medium)
        taken = _match(expected, printed)
        yield Matched(case["id"], structure, printed, expected, taken, tuple(case["rivals"]), medium)


def _match(expected: tuple[IrExpectation, ...], printed: tuple[float, ...]) -> dict[int, int]:
    """One to one, likeliest pair first: near for its width, and strong bands before weak ones."""
    pairs = sorted(
        (_cost(e, cm1), i, k)
        for i, e in enumerate(expected)
        for k, cm1 in enumerate(printed)
        if allows(e, cm1)
    )
    taken: dict[int, int] = {}
    for _, i, k in pairs:
        if i not in taken and k not in taken.values():
            taken[i] = k
    return taken


def _cost(expected: IrExpectation, cm1: float) -> float:
    width = max((expected.hi - expected.lo) / 4, 3.0)
    rarity = {"strong": 0.0, "medium": 0.7}.get(expected.strength, 1.4)
    return ((cm1 - expected.typical) / width) ** 2 / 2 + math.log(width) + rarity
