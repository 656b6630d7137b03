"""Every pattern and structure in the facts tables must be readable, or its row can never speak."""

from __future__ import annotations

import csv
import re
from pathlib import Path

import pytest
from rdkit import Chem

FACTS = Path(__file__).parents[2] / "py" / "hoodside" / "facts"
#: Tables whose cells hold several patterns, parted by "; ".
LISTS = {"wet_tests": ("positive_for", "negative_for")}


def cells(word: str) -> list[tuple[str, int, str]]:
    """(table, line, cell) of every filled column whose name holds a word."""
    found = []
    for path in sorted(FACTS.glob("*.csv")):
        for line, row in enumerate(csv.DictReader(path.read_text("utf-8").splitlines()), start=2):
            found += [(path.stem, line, v) for k, v in row.items() if k and v and word in k]
            for column in LISTS.get(path.stem, ()) if word == "smarts" else ():
                found += [(path.stem, line, part) for part in re.split(r";\s+", row[column]) if part]
    return found


@pytest.mark.parametrize("table", sorted({t for t, _, _ in cells("smarts")}))
def test_every_smarts_parses(table: str) -> None:
    bad = [
        (line, cell) for t, line, cell in cells("smarts") if t == table and Chem.MolFromSmarts(cell) is None
    ]
    assert not bad


@pytest.mark.parametrize("table", sorted({t for t, _, _ in cells("smiles")}))
def test_every_smiles_parses(table: str) -> None:
    bad = [
        (line, cell) for t, line, cell in cells("smiles") if t == table and Chem.MolFromSmiles(cell) is None
    ]
    assert not bad
