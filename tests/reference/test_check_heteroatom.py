"""An isolated methyl on O, N or S, no mass measured: the truth stands and a mass is asked for.

Spectra: tests/cases/published.json, each with its published source there. The analogues exchange the atom
that carries the methyl group (O, NH, S, CH2) and nothing else.
"""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from hoodside.check import check_case
from hoodside.molecule import read_structure

CASES = {
    c["id"]: c
    for c in json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
}
#: Level: nearer than this the truth counts as not outweighed, decibans.
LEVEL = 3.0
ANALOGUES = {
    "4-methoxybiphenyl": ["CSc1ccc(cc1)-c1ccccc1", "CNc1ccc(cc1)-c1ccccc1", "CCc1ccc(cc1)-c1ccccc1"],
    "4-methoxyphenol": ["CSc1ccc(O)cc1", "CNc1ccc(O)cc1", "CCc1ccc(O)cc1"],
    "e-2-methoxycinnamaldehyde": ["CSc1ccccc1/C=C/C=O", "CNc1ccccc1/C=C/C=O", "CCc1ccccc1/C=C/C=O"],
    "1-allyloxy-3-methoxybenzene": ["C=CCOc1cccc(SC)c1", "C=CCOc1cccc(NC)c1", "C=CCOc1cccc(CC)c1"],
    "1-methoxy-4-phenylethynyl-benzene": [
        "CSc1ccc(C#Cc2ccccc2)cc1",
        "CNc1ccc(C#Cc2ccccc2)cc1",
        "CCc1ccc(C#Cc2ccccc2)cc1",
    ],
    "butyl-4-methoxybenzoate": ["CCCCOC(=O)c1ccc(SC)cc1", "CCCCOC(=O)c1ccc(NC)cc1", "CCCCOC(=O)c1ccc(CC)cc1"],
    "2-fluoro-4-methylthioacetophenone": [
        "COc1ccc(cc1)C(=O)CF",
        "CNc1ccc(cc1)C(=O)CF",
        "CCc1ccc(cc1)C(=O)CF",
    ],
    "e-chloro-methoxybutenylbenzene": [
        "CSC(C)/C=C/c1ccc(Cl)cc1",
        "CNC(C)/C=C/c1ccc(Cl)cc1",
        "CCC(C)/C=C/c1ccc(Cl)cc1",
    ],
}


def check_without_composition(name, candidates, kinds=("h1", "c13", "ir")):
    case = {key: CASES[name][key] for key in (*kinds, "solvent", "mhz") if CASES[name].get(key)}
    return check_case({**case, "candidates": candidates})


@pytest.mark.parametrize("name", ANALOGUES)
@pytest.mark.parametrize("kinds", [("h1", "c13", "ir"), ("h1",)], ids=["all", "1H alone"])
def test_the_truth_stands_first_or_level(name, kinds):
    answer = check_without_composition(name, [*ANALOGUES[name], CASES[name]["smiles"]], kinds)
    truth = read_structure(CASES[name]["smiles"]).inchikey
    weights = {read_structure(c["smiles"]).inchikey: c["weight_db"] for c in answer["candidates"]}
    assert weights[truth] >= max(weights.values()) - LEVEL, CASES[name]["source"]


@pytest.mark.parametrize("name", ANALOGUES)
def test_analogues_say_what_speaks_against_them_and_a_mass_is_asked_for(name):
    answer = check_without_composition(name, [*ANALOGUES[name], CASES[name]["smiles"]])
    for candidate in answer["candidates"]:
        assert candidate["sentence"]
        assert candidate["verdict"] == "fits" or candidate["reason"]
    assert any("mass" in a["measure"] for a in answer["next"])


@pytest.mark.parametrize("name", ANALOGUES)
def test_a_mass_is_asked_for_even_when_the_truth_stands_alone(name):
    answer = check_without_composition(name, [CASES[name]["smiles"]])
    assert any("mass" in a["measure"] for a in answer["next"])
