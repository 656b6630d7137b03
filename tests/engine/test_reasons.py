"""Reasons that a chemist would accept: true, not contradicting their weight, with no far-fetched impurity."""

from __future__ import annotations

import pytest

from hoodside.check import check_case
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.predict.model import CarbonGroup
from hoodside.predict.proton import predict_protons
from hoodside.readings import ProtonSignal
from hoodside.weigh.impurities import proton_stray
from hoodside.weigh.words import carbon_name


def oh_of(smiles):
    return next(g for g in predict_protons(read_structure(smiles), "CDCl3") if g.exchangeable)


@pytest.mark.parametrize("smiles", ["COC(=O)c1cccc(O)c1", "CC(=O)c1cccc(O)c1", "O=C1C=C(O)c2ccccc2O1"])
def test_oh_that_cannot_reach_the_carbonyl_is_not_taken_as_bonded_to_it(smiles):
    # Common practice: only an ortho or peri C=O holds the OH in a six-membered chelate, near 10 to 13 ppm.
    assert (oh_of(smiles).hi or 0) < 10 or oh_of(smiles).ppm < 9.5


@pytest.mark.parametrize(
    "smiles", ["O=c1cc(-c2ccccc2)oc2cccc(O)c12", "O=C1c2ccccc2C(=O)c2cccc(O)c12", "O=Cc1ccccc1O"]
)
def test_chelated_oh_is_expected_far_down_field(smiles):
    # 5-Hydroxyflavone about 12.6, 1-hydroxyanthraquinone about 12.6, salicylaldehyde 11.0 ppm (from memory).
    assert oh_of(smiles).ppm > 10.5


def test_signal_whose_pattern_is_not_the_impurities_own_gets_no_name():
    # Water in CDCl3 is one line at 1.56 (Fulmer 2010).
    assert proton_stray(ProtonSignal(1.55, 1.55, n=None, mult="s"), 1.54, 1.56, "CDCl3").name == "water"
    assert proton_stray(ProtonSignal(1.55, 1.55, n=3, mult="d", j=(7.2,)), 1.54, 1.56, "CDCl3").name == ""


def test_ethyl_acetate_is_named_as_a_trace_but_not_as_half_the_sample():
    trace = {"ppm": 4.12, "mult": "q", "j": [7.1], "n": 0.2}
    ring = {"ppm": 7.36, "mult": "m", "n": 5}
    said = _stray_text([ring, trace])
    assert said == "δ 4.12: probably ethyl acetate."
    assert "nothing in the structure explains it" in _stray_text([ring, {**trace, "n": 2}])


def _stray_text(h1):
    found = check_case({"h1": h1, "solvent": "CDCl3", "candidates": ["Clc1ccccc1"]})["candidates"][0]
    return next(f["text"] for f in found["findings"] if f["kind"] == "h1.stray")


def test_reason_of_a_clash_is_something_against_the_structure():
    # Cinnamyl alcohol: J(trans) 15.9, J(cis) about 11.5 Hz (common practice).
    case = {
        "formula": "C9H10O",
        "solvent": "CDCl3",
        "h1": [
            {"lo": 7.22, "hi": 7.39, "mult": "m", "n": 5},
            {"ppm": 6.62, "mult": "d", "j": [15.9], "n": 1},
            {"ppm": 6.37, "mult": "dt", "j": [15.9, 5.7], "n": 1},
            {"ppm": 4.32, "mult": "dd", "j": [5.7, 1.5], "n": 2},
            {"ppm": 1.6, "mult": "s", "n": 1},
        ],
        "candidates": ["OC/C=C/c1ccccc1", "OC/C=C\\c1ccccc1"],
    }
    trans, cis = check_case(case)["candidates"]
    assert (trans["index"], cis["verdict"]) == (0, "clashes")
    assert "agrees" not in cis["reason"]
    reason = next(f for f in cis["findings"] if f["text"] == cis["reason"])
    assert reason["weight_db"] < 0


@pytest.mark.parametrize(
    ("kind", "environment", "name"),
    [
        ("CH2", "sp3 chain O", "CH2 on O"),
        ("CH", "sp3 ring3 NO", "three-ring CH on N and O"),
        ("CH", "sp3 ring5 Br", "five-ring CH on Br"),
        ("C", "aromatic benzene", "aromatic C"),
        ("CH", "aromatic pyridine", "pyridine CH"),
        ("CH", "alkene, hetero", "alkene CH on a heteroatom"),
        ("C", "ester", "ester C"),
        ("C", "", "C"),
    ],
)
def test_carbons_are_named_in_words(kind, environment, name):
    group = CarbonGroup(ppm=60.0, sd=1.0, kind=kind, n=1, atoms=(0,), environment=environment)
    assert carbon_name(group) == name


def test_every_place_a_carbon_can_have_has_words():
    for row in load_table("carbon_errors"):
        if row["environment"].startswith("sp3"):
            group = CarbonGroup(ppm=1.0, sd=1.0, kind="CH2", n=1, atoms=(0,), environment=row["environment"])
            assert "sp3" not in carbon_name(group)
            assert "chain" not in carbon_name(group)


def test_structure_beaten_by_one_that_only_the_formula_rules_out_does_not_fit():
    # Benzyl alcohol's spectra (common practice) with the formula of its acetate typed in.
    case = {
        "text": "1H NMR (400 MHz, CDCl3) δ 7.40-7.28 (m, 5H), 4.68 (s, 2H), 1.80 (br s, 1H). "
        "IR (film) 3330 (br), 3030, 2872, 1496, 1454, 1018, 735, 697",
        "formula": "C9H10O2",
        "candidates": ["CC(=O)OCc1ccccc1", "OCc1ccccc1"],
    }
    found = {c["index"]: c for c in check_case(case)["candidates"]}
    assert found[0]["verdict"] != "fits"
    assert found[1]["verdict"] == "clashes"
    assert "-" not in found[0]["sentence"]
    assert "not C₉H₁₀O₂" in found[0]["sentence"]


def test_what_is_left_over_points_to_the_starting_material_it_would_belong_to():
    # Benzyl acetate with a third of the alcohol left: CH2O at 5.11 and 4.70 (common practice).
    case = {
        "text": "1H NMR (400 MHz, CDCl3) δ 7.4-7.2 (m, 5H), 5.11 (s, 1.3H), 4.7 (s, 0.7H), 2.1 (s, 1.9H)",
        "candidates": ["CC(=O)OCc1ccccc1", "OCc1ccccc1"],
    }
    found = {c["index"]: c for c in check_case(case)["candidates"]}
    assert found[0]["unexplained"][0]["text"].endswith("Structure B has a signal there: is it a mixture?")
    assert "mixture" not in str(found[1]["unexplained"]) or found[1]["verdict"] != "clashes"
