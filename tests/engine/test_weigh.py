"""The check as a whole: contract, sums, and sensible answers at the edges."""

from __future__ import annotations

import json
import math

import pytest
from scipy import stats

from hoodside.check import check_case
from hoodside.errors import FormulaError, InvalidInputError, StructureError
from hoodside.weigh.decibans import decibans, joined, odds, t_below, t_density

CUMINALDEHYDE = "CC(C)c1ccc(C=O)cc1"
H1 = [
    {"ppm": 9.97, "mult": "s", "n": 1},
    {"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2},
    {"ppm": 7.38, "mult": "d", "j": [8.2], "n": 2},
    {"ppm": 2.98, "mult": "sept", "j": [6.9], "n": 1},
    {"ppm": 1.28, "mult": "d", "j": [6.9], "n": 6},
]
CASE = {"id": "x", "formula": "C10H12O", "solvent": "CDCl3", "mhz": 400, "h1": H1}


def best(**case):
    return check_case(case)["candidates"][0]


@pytest.mark.parametrize("x", [-6.0, -1.3, 0.0, 0.4, 2.5, 30.0])
def test_student_t_agrees_with_the_general_library(x):
    assert t_below(x) == pytest.approx(stats.t.cdf(x, 4), abs=1e-12)
    assert t_below(x, 3) == pytest.approx(stats.t.cdf(x, 3), abs=1e-12)
    assert t_density(x) == pytest.approx(stats.t.pdf(x, 4), rel=1e-12)


def test_decibans_are_ten_times_the_common_log():
    # Good 1950: 10 decibans are odds of ten to one.
    assert decibans(10) == pytest.approx(10)
    assert odds(decibans(3.7)) == pytest.approx(3.7)
    assert joined([0.0, 0.0]) == pytest.approx(10 * math.log10(2))


def test_the_answer_keeps_the_contract():
    answer = check_case({**CASE, "candidates": ["CCCc1ccc(C=O)cc1", CUMINALDEHYDE], "c13": [192.0, 23.6]})
    json.dumps(answer, allow_nan=False)
    assert answer["id"] == "x"
    assert (answer["formula"], answer["dbe"]) == ("C10H12O", 5)
    first, second = answer["candidates"]
    assert (first["smiles"], first["index"], first["origin"]) == (CUMINALDEHYDE, 1, "given")
    assert first["weight_db"] > second["weight_db"]
    assert first["share"] + second["share"] == pytest.approx(1, abs=1e-3)
    known = {f"h1:{k}" for k in range(5)} | {"c13:0", "c13:1", "formula"}
    for candidate in answer["candidates"]:
        assert candidate["verdict"] in ("fits", "clashes", "undecided")
        assert candidate["sentence"]
        assert sum(f["weight_db"] for f in candidate["findings"]) == pytest.approx(
            candidate["weight_db"], abs=2
        )
        for finding in candidate["findings"]:
            assert finding["text"]
            assert set(finding["readings"]) <= known
        for link in candidate["assignment"]:
            assert link["reading"] in known
            assert link["predicted"].split(":")[0] in ("h1", "c13")
            assert link["atoms"]


def test_right_structure_fits_and_look_alikes_are_told_off():
    rivals = ["CCCc1ccc(C=O)cc1", "CC(C)c1cccc(C=O)c1", "CC(C)C(=O)c1ccccc1"]
    answer = check_case({**CASE, "candidates": [*rivals, CUMINALDEHYDE]})
    assert answer["candidates"][0]["smiles"] == CUMINALDEHYDE
    assert answer["candidates"][0]["verdict"] == "fits"
    assert answer["candidates"][0]["missing"] == []
    assert answer["candidates"][0]["unexplained"] == []
    clashing = [c for c in answer["candidates"] if c["verdict"] == "clashes"]
    assert clashing
    assert all(c["reason"] for c in clashing)


def test_the_same_compound_twice_is_said_to_be_the_same():
    answer = check_case({**CASE, "candidates": [CUMINALDEHYDE, "O=Cc1ccc(cc1)C(C)C"]})
    assert any("same compound" in w for w in answer["warnings"])
    assert {c["verdict"] for c in answer["candidates"]} == {"fits"}
    assert answer["next"] == []


def test_nothing_measured_leaves_all_open_and_says_what_to_measure():
    answer = check_case({"candidates": ["OC1CCCCC1", "CC1(O)CCCC1"]})
    assert [c["verdict"] for c in answer["candidates"]] == ["undecided", "undecided"]
    assert answer["candidates"][0]["share"] == pytest.approx(0.5)
    assert answer["next"]


def test_no_candidate_is_answered():
    answer = check_case(CASE)
    assert answer["candidates"] == []
    assert answer["formula"] == "C10H12O"
    assert answer["warnings"]


def test_another_formula_clashes_by_the_formula():
    wrong = check_case({**CASE, "candidates": ["CCc1ccc(C=O)cc1"]})["candidates"][0]
    assert not wrong["ok_formula"]
    assert wrong["verdict"] == "clashes"


def test_a_list_still_being_typed_rules_nothing_out():
    answer = check_case({**CASE, "h1": H1[:1], "candidates": [CUMINALDEHYDE, "CC(C)c1cccc(C=O)c1"]})
    assert all(c["verdict"] == "undecided" for c in answer["candidates"])


def test_raw_integrals_of_any_scale_do_as_well():
    raw = [{**s, "n": s["n"] * 13.7 * (1.05 if k % 2 else 0.96)} for k, s in enumerate(H1)]
    found = check_case({**CASE, "h1": raw, "raw_integrals": True, "candidates": [CUMINALDEHYDE]})[
        "candidates"
    ][0]
    assert found["verdict"] == "fits"
    assert len(found["assignment"]) == 5


def test_water_solvent_and_work_up_solvents_are_named():
    extra = [
        {"ppm": 7.26, "mult": "s"},
        {"ppm": 1.56, "mult": "s", "n": 0.3},
        {"ppm": 4.12, "mult": "q", "j": [7.1], "n": 0.2},
    ]
    found = best(**{**CASE, "h1": [*H1, *extra], "candidates": [CUMINALDEHYDE]})
    named = {left["ref"]: left["name"] for left in found["unexplained"]}
    assert "solvent" in named["h1:5"]
    assert named["h1:6"] == "water"
    assert named["h1:7"] == "ethyl acetate"
    assert found["verdict"] == "fits"


def test_a_hidden_oh_and_a_faint_quaternary_carbon_sink_nothing():
    # Benzyl alcohol with neither OH nor ipso carbon listed.
    found = best(
        formula="C7H8O",
        solvent="CDCl3",
        h1=[{"lo": 7.25, "hi": 7.40, "mult": "m", "n": 5}, {"ppm": 4.65, "mult": "s", "n": 2}],
        c13=[128.5, 127.6, 127.0, 65.2],
        candidates=["OCc1ccccc1"],
    )
    assert found["verdict"] == "fits"
    assert {left["ref"].split(":")[0] for left in found["missing"]} == {"h1", "c13"}


def test_a_misprinted_shift_is_named_and_forgiven():
    misprint = [*H1[:3], {**H1[3], "ppm": 3.98}, H1[4]]
    answer = check_case({**CASE, "h1": misprint, "candidates": [CUMINALDEHYDE, "CCCc1ccc(C=O)cc1"]})
    first = answer["candidates"][0]
    assert first["smiles"] == CUMINALDEHYDE
    against = {ref for f in first["findings"] if f["weight_db"] < 0 for ref in f["readings"]}
    assert "h1:3" in against | {left["ref"] for left in first["unexplained"]}


def test_hundreds_of_signals_are_answered():
    many = [{"ppm": 0.5 + 0.04 * k, "mult": "m", "n": 1} for k in range(220)]
    assert best(h1=many, candidates=[CUMINALDEHYDE])["verdict"] in ("clashes", "undecided")


def test_mirror_images_weigh_the_same():
    answer = check_case({**CASE, "formula": "", "candidates": ["C[C@H](O)c1ccccc1", "C[C@@H](O)c1ccccc1"]})
    assert answer["candidates"][0]["weight_db"] == answer["candidates"][1]["weight_db"]


@pytest.mark.parametrize(
    ("case", "error", "field"),
    [
        ({"candidates": ["CC(("]}, StructureError, "candidates[0]"),
        ({"candidates": [3]}, InvalidInputError, "candidates[0]"),
        ({"candidates": "CCO"}, InvalidInputError, "candidates"),
        ({"candidates": ["C"] * 500}, InvalidInputError, "candidates"),
        ({"candidates": ["CCO"], "formula": "C2H6Q"}, FormulaError, "formula"),
    ],
)
def test_bad_input_names_its_field(case, error, field):
    with pytest.raises(error) as caught:
        check_case(case)
    assert caught.value.field == field
    assert caught.value.hint


def test_wet_tests_and_clear_regions_speak():
    case = {
        "candidates": ["OC1CCCCC1", "CC1(O)CCCC1", "C1CCCCO1"],
        "wet": [{"test": "chromic acid (Jones)", "result": "positive"}],
        "ir_clear": [[3200, 3600]],
    }
    answer = check_case(case)
    weights = {c["smiles"]: c for c in answer["candidates"]}
    wet = {s: next(f["weight_db"] for f in c["findings"] if f["kind"] == "wet") for s, c in weights.items()}
    assert wet["OC1CCCCC1"] > 3 > -3 > wet["CC1(O)CCCC1"]
    clear = {
        s: next(f["weight_db"] for f in c["findings"] if f["kind"] == "ir.clear") for s, c in weights.items()
    }
    assert clear["C1CCCCO1"] == 0 > clear["OC1CCCCC1"]


def test_formula_mass_and_combustion_charge_a_wrong_composition_once():
    case = {
        "formula": "C10H12O",
        "hrms": {"adduct": "[M+H]+", "found": 149.0963, "ppm": 5},
        "analysis": {"C": 81.0, "H": 8.2},
    }
    right, wrong = check_case({**case, "candidates": [CUMINALDEHYDE, "CCc1ccc(C=O)cc1"]})["candidates"]
    assert right["smiles"] == CUMINALDEHYDE
    negative = [f for f in wrong["findings"] if f["weight_db"] < 0]
    assert len(negative) == 1
    assert wrong["verdict"] == "clashes"


def test_a_carbamate_may_give_two_lines_for_one_carbon():
    # N-Boc-pyrrolidine shows NCH2 and NCCH2 twice, slow rotation at room temperature: from memory.
    lines = [154.6, 79.0, 46.0, 45.6, 28.5, 25.7, 24.9]
    found = check_case({"c13": lines, "candidates": ["CC(C)(C)OC(=O)N1CCCC1", "CC(C)(C)C(=O)OC1CCCN1"]})
    boc = next(c for c in found["candidates"] if c["smiles"].startswith("CC(C)(C)OC(=O)N"))
    assert sum("second rotamer" in f["text"] for f in boc["findings"]) == 2
    assert boc["verdict"] != "clashes"
