"""1H shift prediction: every H answered, derivations add up, symmetry and solvents respected."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from bench.make_proton_parents import parent_rows
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.predict.learned import learned_table
from hoodside.predict.model import ProtonGroup
from hoodside.predict.proton import predict_protons
from hoodside.predict.proton.predict import sites

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


def test_parents_table_is_what_the_ring_tables_give() -> None:
    assert list(load_table("proton_parents")) == parent_rows()


def test_learned_weights_speak_of_the_codes_in_use() -> None:
    """Toluene is in the training set: unknown codes would mean a table fitted to other codes."""
    weights = learned_table("proton_learned").weights
    for site in sites(read_structure("Cc1ccccc1"), "CDCl3"):
        assert sum(name in weights for name in site.features if name[:2] in ("e1", "e2", "e3")) >= 2


def test_hydrogens_cis_and_trans_on_a_terminal_alkene_are_told_apart() -> None:
    """Styrene: the H cis to phenyl at 5.75, trans at 5.24 ppm (common handbook values, from memory)."""
    cis, trans = (g for g in predict_protons(read_structure("C=Cc1ccccc1")) if g.atoms == (0,))
    assert cis.ppm == pytest.approx(5.75, abs=0.1)
    assert trans.ppm == pytest.approx(5.24, abs=0.1)


@pytest.mark.parametrize(
    ("one", "other", "atom"),
    [
        ("COC(=O)/C=C/C(=O)OC", "COC(=O)/C=C\\C(=O)OC", 4),  # fumarate, maleate
        ("CC(C)(C)[C@H]1CC[C@@H](O)CC1", "CC(C)(C)[C@H]1CC[C@H](O)CC1", 7),  # H equatorial, axial
    ],
)
def test_stereoisomers_differ_in_the_known_direction(one: str, other: str, atom: int) -> None:
    assert shifts(one)[atom].ppm > shifts(other)[atom].ppm + 0.2


def test_methyls_of_a_dimethyl_amide_are_two_signals_and_of_a_carbamate_one() -> None:
    amide = [g for g in predict_protons(read_structure("CC(=O)N(C)C")) if g.environment == "CH3 on N"]
    carbamate = [g for g in predict_protons(read_structure("COC(=O)N(C)C")) if g.environment == "CH3 on N"]
    assert [g.n for g in amide] == [3, 3]
    assert amide[0].ppm != amide[1].ppm
    assert [g.n for g in carbamate] == [6]


def test_exchangeable_hydrogens_carry_a_range_that_follows_the_solvent() -> None:
    plain = shifts("CCO")[2]
    bonded = shifts("CCO", "DMSO-d6")[2]
    assert plain.exchangeable
    assert bonded.exchangeable
    assert plain.lo is not None
    assert plain.hi is not None
    assert plain.lo < plain.ppm < plain.hi
    assert bonded.ppm > plain.ppm + 1
    assert not shifts("CCO")[1].exchangeable


def test_diastereotopic_hydrogens_are_two_groups_about_their_mean() -> None:
    pair = [g for g in predict_protons(read_structure("CC(O)Cc1ccccc1")) if g.atoms == (3,)]
    assert [g.equivalence for g in pair] == ["diastereotopic"] * 2
    assert 0 < pair[0].ppm - pair[1].ppm < 0.4


def test_unfamiliar_surroundings_get_a_wider_bar() -> None:
    assert shifts("C1SN2C1OP2")[0].sd > 1.5 * shifts("CCc1ccccc1")[0].sd


def test_a_large_structure_is_answered() -> None:
    structure = read_structure("C(CCO)" * 45 + "C")
    assert sum(g.n for g in predict_protons(structure)) == sum(a.hydrogens for a in structure.atoms)


@pytest.mark.parametrize("name", ["proton_substituents", "proton_other", "proton_exchangeable"])
def test_every_pattern_can_be_read(name: str) -> None:
    structure = read_structure("CCO")
    for row in load_table(name):
        structure.matches(row.get("smarts") or row["smarts_of_H_bearing_atom"])
