"""Bench tests: expected results by class of compound, doubts, and warnings.

Expected results follow Shriner et al., Systematic Identification of Organic Compounds, 8th ed. 2004, and
Nichols, Organic Chemistry Laboratory Techniques, section 6.4D; from memory.
"""

from __future__ import annotations

import pytest
from rdkit import Chem

from hoodside.errors import InvalidInputError
from hoodside.facts.table import load_table
from hoodside.molecule import read_structure
from hoodside.predict.wet import expected_result, expected_results, find_test, wet_tests

TEXTBOOK = [
    ("cyclohexene", "C1=CCCCC1", "bromine", "positive"),
    ("cyclohexane", "C1CCCCC1", "bromine", "negative"),
    ("phenol", "Oc1ccccc1", "bromine", "positive"),
    ("dimethyl fumarate", "COC(=O)/C=C/C(=O)OC", "bromine", "unsure"),
    ("cyclohexene", "C1=CCCCC1", "Baeyer", "positive"),
    ("benzene", "c1ccccc1", "KMnO4", "negative"),
    ("1-butanol", "CCCCO", "Jones", "positive"),
    ("tert-butyl alcohol", "CC(C)(C)O", "Jones", "negative"),
    ("benzaldehyde", "O=Cc1ccccc1", "Tollens", "positive"),
    ("acetophenone", "CC(=O)c1ccccc1", "Tollens", "negative"),
    ("butanal", "CCCC=O", "Fehling", "positive"),
    ("benzaldehyde", "O=Cc1ccccc1", "Fehling", "negative"),
    ("acetone", "CC(C)=O", "2,4-dnp", "positive"),
    ("ethyl acetate", "CCOC(C)=O", "DNP", "negative"),
    ("2-butanone", "CCC(C)=O", "iodoform", "positive"),
    ("2-propanol", "CC(C)O", "iodoform", "positive"),
    ("3-pentanone", "CCC(=O)CC", "iodoform", "negative"),
    ("ethyl acetate", "CCOC(C)=O", "iodoform", "negative"),
    ("tert-butyl alcohol", "CC(C)(C)O", "Lucas", "positive"),
    ("1-butanol", "CCCCO", "Lucas", "negative"),
    ("phenol", "Oc1ccccc1", "FeCl3", "positive"),
    ("cyclohexanol", "OC1CCCCC1", "ferric chloride", "negative"),
    ("2,6-di-tert-butylphenol", "CC(C)(C)c1cccc(C(C)(C)C)c1O", "FeCl3", "negative"),
    ("benzoic acid", "OC(=O)c1ccccc1", "NaHCO3", "positive"),
    ("phenol", "Oc1ccccc1", "NaHCO3", "negative"),
    ("tert-butyl chloride", "CC(C)(C)Cl", "AgNO3", "positive"),
    ("chlorobenzene", "Clc1ccccc1", "AgNO3", "negative"),
    ("1-bromobutane", "CCCCBr", "NaI", "positive"),
    ("chlorobenzene", "Clc1ccccc1", "Beilstein", "positive"),
    ("fluorobenzene", "Fc1ccccc1", "Beilstein", "negative"),
    ("methyl benzoate", "COC(=O)c1ccccc1", "hydroxamate", "positive"),
    ("acetone", "CC(C)=O", "hydroxamate", "negative"),
    ("1,2-propanediol", "CC(O)CO", "periodic acid", "positive"),
    ("1,3-propanediol", "OCCCO", "periodic acid", "negative"),
    ("ethanol", "CCO", "D2O", "positive"),
    ("diethyl ether", "CCOCC", "D2O shake", "negative"),
    ("tert-butyl hydroperoxide", "CC(C)(C)OO", "starch-iodide", "positive"),
    ("triethylamine", "CCN(CC)CC", "dilute HCl", "positive"),
    ("acetanilide", "CC(=O)Nc1ccccc1", "dilute HCl", "negative"),
    ("diphenylamine", "c1ccc(cc1)Nc1ccccc1", "dilute HCl", "negative"),
]


@pytest.mark.parametrize(
    ("name", "smiles", "test", "result"), TEXTBOOK, ids=[f"{r[2]} {r[0]}" for r in TEXTBOOK]
)
def test_textbook_result(name: str, smiles: str, test: str, result: str) -> None:
    expected = expected_result(read_structure(smiles), test)
    assert expected.result == result, (name, expected)


def test_positive_only_with_a_reacting_group() -> None:
    """An alkane holds nothing that any test but combustion-type ones could find."""
    for expected in expected_results(read_structure("CCCCCC")):
        assert expected.result == "negative"
        assert expected.atoms == ()
        assert 0 < expected.p < 0.2


@pytest.mark.parametrize(
    ("smiles", "test", "word"),
    [
        ("C#CCCCC", "AgNO3", "acetylide"),
        ("O=[N+]([O-])c1ccccc1", "fusion N", "explode"),
        ("[N-]=[N+]=Nc1ccccc1", "ignition", "never"),
        ("CC(C)(C)OO", "ignition", "peroxide"),
    ],
)
def test_unsafe_tests_are_flagged(smiles: str, test: str, word: str) -> None:
    assert word in expected_result(read_structure(smiles), test).unsafe


def test_safe_ones_are_not() -> None:
    assert not any(expected.unsafe for expected in expected_results(read_structure("CCOC(C)=O")))


def test_every_test_has_hazards_observation_rules_and_source() -> None:
    ruled = {row["test"] for row in load_table("wet_rules")}
    for test in wet_tests():
        assert test.hazards
        assert test.observation
        assert test.source
        assert test.test in ruled
        assert 0 < test.false_positive < 0.3
    names = {test.test for test in wet_tests()}
    assert ruled == names
    assert {row["test"] for row in load_table("wet_unsafe")} <= names


def test_every_pattern_is_valid() -> None:
    for row in (*load_table("wet_rules"), *load_table("wet_unsafe")):
        assert Chem.MolFromSmarts(row["smarts"]) is not None, row


def test_aliases_are_unique_and_unknown_names_are_refused() -> None:
    names = [alias.lower() for test in wet_tests() for alias in (test.test, *test.aliases)]
    assert len(names) == len(set(names))
    assert find_test(" Baeyer ").test.startswith("cold dilute KMnO4")
    with pytest.raises(InvalidInputError) as caught:
        find_test("litmus")
    assert "2,4-DNP" in caught.value.hint
