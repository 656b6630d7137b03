"""Substituted benzenes by their names (IUPAC Recommendations 2013; structures as drawn in handbooks)."""

from __future__ import annotations

import pytest

from hoodside.engine import call
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.reagent_names import caution_of, read_names
from hoodside.ring_names import ring_group, ring_name

NAMES = [
    ("4-fluorobenzaldehyde", "O=Cc1ccc(F)cc1"),
    ("3,5-bis(trifluoromethyl)aniline", "Nc1cc(C(F)(F)F)cc(C(F)(F)F)c1"),
    ("4-Hydroxy-3-methoxybenzaldehyde", "COc1cc(C=O)ccc1O"),
    ("p-methoxybenzyl chloride", "COc1ccc(CCl)cc1"),
    ("2,4,6-trichlorobenzoyl chloride", "O=C(Cl)c1c(Cl)cc(Cl)cc1Cl"),
    ("methyl 4-bromobenzoate", "COC(=O)c1ccc(Br)cc1"),
    ("4-tert-butylphenol", "CC(C)(C)c1ccc(O)cc1"),
    ("pentafluorophenol", "Oc1c(F)c(F)c(F)c(F)c1F"),
    ("4-(dimethylamino)benzaldehyde", "CN(C)c1ccc(C=O)cc1"),
    ("4-methoxycinnamic acid", "COc1ccc(/C=C/C(=O)O)cc1"),
]


@pytest.mark.parametrize(("name", "smiles"), NAMES)
def test_names_by_locants(name: str, smiles: str) -> None:
    found = ring_name(name)
    assert found is not None
    assert read_structure(found).smiles == read_structure(smiles).smiles


@pytest.mark.parametrize(
    "name",
    [
        "benzaldehyde",
        "4-zorbylphenol",
        "7-chlorophenol",
        "4,4-dichlorophenol",
        "2,3-chloroaniline",
        "phenol",
        "",
    ],
)
def test_what_is_no_such_name_is_left_alone(name: str) -> None:
    assert ring_name(name) is None


def test_every_substituent_on_every_parent_is_a_molecule() -> None:
    groups = [row["name"] for row in load_table("ring_substituents")]
    for parent in load_table("ring_parents"):
        made = ring_name(parent["name"].replace("*", f"4-{groups[-1]}"))
        assert made is not None, parent["name"]
        read_structure(made)
    for group in groups:
        made = ring_name(f"3-{group}phenol")
        assert made is not None, group
        read_structure(made)


def test_such_groups_have_heads_too() -> None:
    """3,4-Dimethoxyphenylmagnesium bromide is a Grignard reagent like any other."""
    assert (
        read_structure(ring_group("3,4-dimethoxyphenyl") or "").smiles
        == read_structure("COc1ccccc1OC").smiles
    )
    (found,), unknown = read_names("3,4-dimethoxyphenylmagnesium bromide")
    assert unknown == []
    assert "organometal" in found.roles
    assert read_structure(found.brings).smiles == read_structure("COc1ccc([Mg]Br)cc1OC").smiles
    assert caution_of(found.name) == "Grignard reagent"


def test_the_door_finds_them_by_name() -> None:
    first = call("names", {"query": "4-isopropylbenzonitrile"})["names"][0]
    assert first["formula"] == "C10H11N"
