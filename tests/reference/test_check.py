"""Well-known compounds with published spectra: the right structure comes first and fits.

Sources are named per row of check_cases.csv. None of these is in tests/cases/published.json.
"""

from __future__ import annotations

import csv
from pathlib import Path

import pytest

from hoodside.check import check_case
from hoodside.molecule import read_structure

with (Path(__file__).parent / "check_cases.csv").open(encoding="utf-8", newline="") as file:
    ROWS = list(csv.DictReader(file))


@pytest.mark.parametrize("row", ROWS, ids=[r["name"] for r in ROWS])
def test_the_right_structure_comes_first_and_is_not_ruled_out(row):
    candidates = [*row["rivals"].split(";"), row["structure"]]
    case = {
        "text": row["text"],
        "solvent": row["solvent"],
        "mhz": float(row["mhz"]),
        "candidates": candidates,
    }
    answer = check_case(case)
    first = answer["candidates"][0]
    assert read_structure(first["smiles"]).inchikey == read_structure(row["structure"]).inchikey, row[
        "source"
    ]
    assert first["verdict"] != "clashes", first["reason"]


@pytest.mark.parametrize("row", ROWS, ids=[r["name"] for r in ROWS])
def test_no_hydrogen_of_the_right_structure_is_missed_but_exchangeable_ones(row):
    case = {"text": row["text"], "solvent": row["solvent"], "mhz": float(row["mhz"])}
    found = check_case({**case, "candidates": [row["structure"]]})["candidates"][0]
    missing = [left for left in found["missing"] if left["ref"].startswith("h1")]
    exchangeable = {f"h1:{k}" for k, g in enumerate(found["expected"]) if g["exchangeable"]}
    assert {left["ref"] for left in missing} <= exchangeable
    assert not [left for left in found["unexplained"] if left["ref"].startswith("h1")]
