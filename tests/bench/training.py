"""Spectra and assigned shifts that only the fits learn from (tests/cases/training).

``recalled_*.csv`` hold whole spectra: columns name, smiles, solvent, h1 ("7.96x2 7.40-7.30x3": shift or
range, number of H), c13 ("198.1 137.1", equivalent carbons once), source, origin. The other tables hold rows
with atom maps. They are not among the facts, since nothing that runs at the bench reads them.
"""

from __future__ import annotations

import csv
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from pathlib import Path

from hoodside.facts import load_table
from hoodside.molecule import read_structure

TESTS = Path(__file__).resolve().parents[1]
TRAINING = TESTS / "cases" / "training"
REFERENCE = TESTS / "reference"
#: Values that the reference tests check predictions against, next to facts/impurities.csv.
CHECKED = {"1H": "proton_shifts.csv", "13C": "carbon_shifts.csv"}


@dataclass(frozen=True, slots=True)
class Recalled:
    """One recalled spectrum: printed 1H signals ({ppm or lo and hi, n}) and 13C lines (ppm)."""

    name: str
    smiles: str
    solvent: str
    h1: tuple[dict[str, float], ...]
    c13: tuple[float, ...]


def read_rows(name: str) -> list[dict[str, str]]:
    """The rows of one table of tests/cases/training."""
    with (TRAINING / f"{name}.csv").open(encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


@cache
def recalled() -> tuple[Recalled, ...]:
    """Every recalled spectrum, without the lists of which the reference tests check a value."""
    checked = {nucleus: {_key(row) for row in _csv(REFERENCE / name)} for nucleus, name in CHECKED.items()}
    for row in load_table("impurities"):
        checked[row["nucleus"]].add(_key(row))
    return tuple(
        _recalled(row, _key(row) not in checked["1H"], _key(row) not in checked["13C"])
        for path in sorted(TRAINING.glob("recalled_*.csv"))
        for row in _csv(path)
    )


def _csv(path: Path) -> list[dict[str, str]]:
    with path.open(encoding="utf-8", newline="") as file:
        return list(csv.DictReader(file))


def _key(row: Mapping[str, str]) -> str:
    return read_structure(row["smiles"]).inchikey.split("-")[0]


def _recalled(row: Mapping[str, str], with_h1: bool, with_c13: bool) -> Recalled:
    return Recalled(
        row["name"],
        row["smiles"],
        row["solvent"],
        tuple(_signal(text) for text in row["h1"].split()) if with_h1 else (),
        tuple(map(float, row["c13"].split())) if with_c13 else (),
    )


def _signal(text: str) -> dict[str, float]:
    place, _, n = text.partition("x")
    first, dash, last = place.partition("-")
    if not dash:
        return {"ppm": float(first), "n": float(n)}
    lo, hi = sorted((float(first), float(last)))
    return {"lo": lo, "hi": hi, "n": float(n)}
