"""The table of common names: formulas, configurations and uniqueness, row by row.

Formulas were recalled beside the SMILES, not worked out from them; a general-purpose toolkit (RDKit) and the
project's kernel must both agree. CIP labels are those of the IUPAC names of the compounds (from memory).
"""

from __future__ import annotations

from collections import Counter

import pytest
from rdkit import Chem
from rdkit.Chem import rdMolDescriptors

from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.molecule.kernel import kernel
from hoodside.names import find_names
from hoodside.predict.formula import formula_of, parse_formula

ROWS = load_table("common_names").rows
BY_NAME = {row["name"]: row for row in ROWS}

#: name -> CIP labels in the order of the IUPAC name's locants, without regard to place (from memory).
CONFIGURATIONS = {
    "cholesterol": "RRRRSSSS",  # (3S,8S,9S,10R,13R,14S,17R,20R)
    "testosterone": "RRSSSS",  # (8R,9S,10R,13S,14S,17S)
    "progesterone": "RSSSSS",  # (8S,9S,10R,13S,14S,17S)
    "D-glucose": "RRSSS",  # alpha: (2S,3R,4S,5S,6R)
    "D-mannitol": "RRRR",
    "menthol": "RRS",  # (1R,2S,5R)
    "limonene": "R",
    "carvone": "R",
    "pulegone": "R",
    "menthone": "RS",  # (2S,5R)
    "nicotine": "S",
    "naproxen": "S",
    "ephedrine": "RS",  # (1R,2S)
    "quinine": "RRSS",  # (R)-carbinol, (2S,4S,5R)
    "ascorbic acid": "RS",
    "L-tartaric acid": "RR",
    "betulin": "RRRRRRRRSS",
    "L-cysteine": "R",
    "L-threonine": "RS",
    "L-isoleucine": "SS",
}
ONE_S = [r["name"] for r in ROWS if r["name"].startswith("L-") and r["name"] not in CONFIGURATIONS]
DOUBLE_BONDS = {
    "geraniol": "E",
    "nerol": "Z",
    "oleic acid": "Z",
    "jasmone": "Z",
    "anethole": "E",
    "maleic acid": "Z",
}


def test_the_table_is_large_and_names_stand_for_one_structure_each() -> None:
    assert len(ROWS) >= 400
    names = Counter(
        name.lower() for row in ROWS for name in (row["name"], *filter(None, row["aliases"].split("; ")))
    )
    assert [name for name, n in names.items() if n > 1] == []
    structures = Counter(Chem.CanonSmiles(row["smiles"]) for row in ROWS)
    assert [smiles for smiles, n in structures.items() if n > 1] == []


@pytest.mark.parametrize("row", ROWS, ids=lambda row: row["name"])
def test_formula_agrees(row: dict[str, str]) -> None:
    meant = parse_formula(row["formula"])
    assert formula_of(read_structure(row["smiles"])).counts == meant.counts
    toolkit = rdMolDescriptors.CalcMolFormula(Chem.MolFromSmiles(row["smiles"]))
    assert parse_formula(toolkit).counts == meant.counts


@pytest.mark.parametrize("name", [*CONFIGURATIONS, *ONE_S])
def test_configuration(name: str) -> None:
    labels = kernel().stereo_labels(BY_NAME[name]["smiles"])[0]
    assert "".join(sorted(labels.values())) == CONFIGURATIONS.get(name, "S")


@pytest.mark.parametrize("name", DOUBLE_BONDS)
def test_double_bond(name: str) -> None:
    labels = kernel().stereo_labels(BY_NAME[name]["smiles"])[1]
    assert set(labels.values()) == {DOUBLE_BONDS[name]}


@pytest.mark.parametrize(
    ("query", "first"),
    [
        ("dcm", "dichloromethane (DCM)"),
        ("DichloroMethane", "dichloromethane"),
        ("thf", "tetrahydrofuran (THF)"),
        ("m cpba", "3-chloroperbenzoic acid (mCPBA)"),
        ("N,N-dimethylformamide", "N,N-dimethylformamide"),
        ("n n dimethylformamide", "N,N-dimethylformamide"),
        ("vanil", "vanillin"),
        ("α-pinene", "alpha-pinene"),
        ("C8H8O3", "vanillin"),
        ("hunigs base", "N,N-diisopropylethylamine (Hünig's base)"),
    ],
)
def test_search(query: str, first: str) -> None:
    found = [entry.name for entry in find_names(query)]
    assert first in found[:4], found[:6]


def test_search_by_a_word_and_by_a_part() -> None:
    assert "methyl benzoate" in [e.name for e in find_names("benzoate", 50)]
    assert "acetophenone" in [e.name for e in find_names("phenone", 50)]
    assert find_names("zzzz") == []
    assert find_names("  -  ") == []
    assert len(find_names("a", 7)) == 7
