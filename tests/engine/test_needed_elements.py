"""Rows skipped for want of an element must be rows that could not have matched."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from hoodside.facts.table import load_table
from hoodside.molecule import read_structure

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))[::6]


@pytest.mark.parametrize("table", ["ir_bands", "ir_shifts", "ms_cleavages", "wet_rules"])
def test_a_skipped_row_never_matches(table: str) -> None:
    for case in CASES:
        structure = read_structure(case["smiles"])
        present = structure.element_counts.keys()
        skipped = [row["smarts"] for row in load_table(table) if not set(row["needs"].split()) <= present]
        assert not any(structure.match_all(skipped)), case["id"]
