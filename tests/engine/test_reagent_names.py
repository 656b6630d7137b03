"""Reagents as they are written on a flask: listed names, groups with heads, common names, amounts."""

from __future__ import annotations

import pytest

from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.reagent_names import caution_of, headed_names, read_names

# A text, and the structures its names bring (common practice of naming; structures by IUPAC name).
BROUGHT = [
    ("PhMgBr, THF", ["Br[Mg]c1ccccc1"]),
    ("i-PrMgCl.LiCl", ["Br[Mg]C(C)C"]),
    ("vinylmagnesium bromide (1.2 equiv), Et2O", ["Br[Mg]C=C"]),
    ("4-methoxyphenylboronic acid, Pd(PPh3)4, Na2CO3", ["OB(O)c1ccc(OC)cc1"]),
    ("(EtO)2P(O)CH2CO2Et, NaH", ["CCOP(=O)(OCC)CC(=O)OCC"]),
    ("Ph3P=CHCO2Me", ["COC(=O)C[P+](c1ccccc1)(c1ccccc1)c1ccccc1"]),
    ("lithium dimethylcuprate", ["[Cu]C"]),
    ("piperidine, NaBH(OAc)3", ["C1CCNCC1"]),
    ("benzylamine, HATU, DIPEA, DMF, rt, 12 h", ["NCc1ccccc1"]),
    ("p-TolSO2Cl, pyridine", ["Cc1ccc(S(=O)(=O)Cl)cc1"]),
    ("PhCHO, 10 mol% proline", ["O=Cc1ccccc1"]),
    ("TFA, CH2Cl2", []),
    ("CF3CO2H", []),
    ("PhI(OAc)2, TEMPO", []),
]


@pytest.mark.parametrize(("text", "brought"), BROUGHT)
def test_names_bring_their_structures(text: str, brought: list[str]) -> None:
    found, unknown = read_names(text)
    assert unknown == []
    carried = [read_structure(f.brings).smiles for f in found if f.brings]
    assert carried == [read_structure(smiles).smiles for smiles in brought]


def test_a_longer_name_wins_over_one_inside_it() -> None:
    assert [f.name for f in read_names("phenylboronic acid")[0]] == ["phenylboronic acid"]
    assert [f.name for f in read_names("acetic acid, acid")[0]] == ["acetic acid", "acid"]


def test_what_names_nothing_is_told() -> None:
    assert read_names("K2CO3, zorbium dichloride (2 equiv)")[1] == ["zorbium dichloride"]


def test_every_structure_of_the_tables_reads() -> None:
    """Each group with each head, and each listed reagent that brings a structure, is a molecule."""
    listed = [row["brings"] for row in load_table("reagents") if row["brings"]]
    groups = [row["smiles"] for row in load_table("organic_groups")]
    heads = [row["smiles"] for row in load_table("reagent_heads")]
    headed = [head.replace("*", group) for head in heads for group in (groups[0], groups[-1])]
    headed += [heads[0].replace("*", group) for group in groups]
    for smiles in listed + headed:
        assert read_structure(smiles).atoms, smiles


def test_names_of_a_group_and_a_head_have_cautions() -> None:
    assert caution_of("PhMgBr") == caution_of("EtMgBr") == "Grignard reagent"
    assert caution_of("MeI")
    assert all(made.brings for made in headed_names())
