"""The engine's door: every method answers JSON, every error says what, where and how to mend it."""

from __future__ import annotations

import json
from itertools import pairwise
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside import engine
from hoodside.engine import METHODS, handle
from hoodside.errors import KernelCrashError

ALDEHYDE = "CC(C)c1ccc(C=O)cc1"


def ask(method: str, **params: Any) -> Any:
    answer = json.loads(handle(method, json.dumps(params)))
    assert set(answer) <= {"result", "error"}
    if "error" in answer:
        assert set(answer["error"]) == {"code", "message", "hint", "field", "value"}
        return answer["error"]
    return answer["result"]


def test_every_method_can_be_loaded() -> None:
    for name in METHODS:
        assert callable(engine._method(name))


def test_describe() -> None:
    found = ask("describe", structure=ALDEHYDE)
    assert found["formula"] == "C10H12O"
    assert found["formula_parts"] == [["C", 10], ["H", 12], ["O", 1]]
    assert found["dbe"] == 5
    assert found["exact_mass"] == pytest.approx(148.08882, abs=1e-5)
    assert found["inchikey"] == "WTWBUQJHJGUZCY-UHFFFAOYSA-N"  # cuminaldehyde, from memory
    assert found["svg"].startswith("<svg")
    assert ask("describe", structure="C[C@H](O)C(=O)O")["stereocentres"] == [{"atom": 1, "label": "S"}]
    assert "several pieces" in ask("describe", structure="CC(=O)[O-].[Na+]")["warnings"][0]


def test_describe_says_what_is_wrong_with_a_structure() -> None:
    for source in ("CC(C", "C(C)(C)(C)(C)C", "xyz", "", "C" * 1_000, "InChI=1S/CH4/h1H4"):
        error = ask("describe", structure=source)
        assert error["code"] == "invalid_structure", source
        assert error["field"] == "structure"
        assert error["hint"]


def test_two_hundred_atoms_are_answered() -> None:
    assert ask("describe", structure="C" * 200)["heavy_atoms"] == 200


def test_draw() -> None:
    found = ask("draw", structure=ALDEHYDE, width=300, height=200, atoms=[8])
    assert "currentColor" in found["svg"]
    assert len(found["coords"]) == 11
    assert all(0 <= x <= 300 and 0 <= y <= 200 for x, y in found["coords"])


def test_formula_and_formulas() -> None:
    assert ask("formula", text="C10H12O")["dbe"] == 5
    assert ask("formula", text="c10h12")["code"] == "invalid_formula"
    found = ask("formulas", mz=149.0963, adduct="[M+H]+", ppm=5)["candidates"]
    assert found[0]["formula"] == "C10H12O"
    only = ask(
        "formulas", mz=149.0963, adduct="[M+H]+", ppm=50, limits={"C": [0, 20], "H": [0, 40], "O": [0, 5]}
    )
    assert {c["formula"] for c in only["candidates"]} >= {"C10H12O"}
    assert ask("formulas", mz=149.0963, limits={"C": 3})["field"] == "limits.C"


def test_parse() -> None:
    text = "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H), 2.98 (sept, J = 6.9 Hz, 1H), bosh"
    found = ask("parse", text=text)
    assert found["readings"]["h1"][0] == {"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2}
    assert [text[u["start"] : u["end"]] for u in found["unread"]] == ["bosh"]
    assert all(piece["means"] for piece in found["pieces"])


def test_check_and_predict() -> None:
    h1 = [
        {"ppm": 9.97, "mult": "s", "n": 1},
        {"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2},
        {"ppm": 7.39, "mult": "d", "j": [8.2], "n": 2},
        {"ppm": 2.98, "mult": "sept", "j": [6.9], "n": 1},
        {"ppm": 1.27, "mult": "d", "j": [6.9], "n": 6},
    ]
    found = ask("check", id="x", h1=h1, candidates=["CCCc1ccc(C=O)cc1", ALDEHYDE], intended=1)
    assert found["id"] == "x"
    assert found["formula"] == "C10H12O"
    assert found["candidates"][0]["smiles"] == ALDEHYDE
    assert {"verdict", "weight_db", "share", "findings", "assignment", "origin"} <= set(
        found["candidates"][0]
    )
    predicted = ask("predict", smiles=ALDEHYDE, solvent="chloroform-d", mhz=300)
    assert predicted["solvent"] == "CDCl3"
    assert sum(group["n"] for group in predicted["h1"]) == 12
    assert sum(group["n"] for group in predicted["c13"]) == 10
    for group in (*predicted["h1"], *predicted["c13"]):
        if group["terms"]:
            assert sum(t["value"] for t in group["terms"]) == pytest.approx(group["ppm"], abs=0.02)
    assert ask("predict", smiles=ALDEHYDE, solvent="beer")["field"] == "solvent"


def test_infrared() -> None:
    regions = ask("ir_regions")["regions"]
    assert regions[0]["hi"] == 4000
    assert regions[-1]["lo"] == 500
    assert all(a["lo"] == b["hi"] for a, b in pairwise(regions))
    groups = ask("ir_lookup", cm1=1715, strength="strong")["groups"]
    assert any("ketone" in g["group"] for g in groups[:12])
    assert groups == sorted(groups, key=lambda g: -g["closeness"])


def test_solvents_names_and_bench_tests() -> None:
    solvents = {entry["name"]: entry for entry in ask("solvents")["solvents"]}
    assert {"ppm": 7.26, "what": "residual", "mult": "s"} in solvents["CDCl3"]["h1"]
    assert ask("names", query="vanil", limit=3)["names"][0]["formula"] == "C8H8O3"
    assert all(entry["hazards"] for entry in ask("wet_tests")["tests"])


@pytest.mark.parametrize(
    ("method", "params", "field"),
    [
        ("nonsense", "{}", "method"),
        ("describe", "{", "params"),
        ("describe", "[1]", "params"),
        ("describe", "[" * 100_000, "params"),
        ("spins", '{"mhz": ' + "1" * 5_000 + "}", "params"),
        ("describe", "{}", "structure"),
        ("describe", '{"structure": "C", "colour": "red"}', "colour"),
        ("describe", '{"structure": 7}', "structure"),
        ("draw", '{"structure": "C", "width": 1}', "width"),
        ("draw", '{"structure": "C", "atoms": ["x"]}', "atoms[0]"),
        ("check", '{"candidates": ["C"], "h1": [{"ppm": -30}]}', "h1[0].ppm"),
        ("check", '{"candidates": "C"}', "candidates"),
        ("check", '{"candidates": ["CC("]}', "candidates[0]"),
        ("formulas", '{"mz": "heavy"}', "mz"),
        ("ir_lookup", '{"cm1": 17}', "cm1"),
    ],
)
def test_bad_calls_name_the_field(method: str, params: str, field: str) -> None:
    error = json.loads(handle(method, params))["error"]
    assert error["field"] == field
    assert error["code"].startswith("invalid")
    assert error["hint"]


@pytest.mark.parametrize(
    ("raised", "code"),
    [
        (RuntimeError("memory access out of bounds"), "kernel_crash"),
        (KernelCrashError("The molecule kernel stopped.", hint="Start afresh."), "kernel_crash"),
        (RecursionError("too deep"), "internal"),
        (ZeroDivisionError("division by zero"), "internal"),
        (KeyError("x"), "internal"),
    ],
)
def test_what_was_not_foreseen_is_still_an_answer(
    monkeypatch: pytest.MonkeyPatch, raised: Exception, code: str
) -> None:
    def fail() -> None:
        raise raised

    monkeypatch.setattr(engine, "_method", lambda name: fail)
    error = json.loads(handle("about", "{}"))["error"]
    assert error["code"] == code
    assert error["hint"]
    assert "Traceback" not in error["message"]


@settings(max_examples=60, deadline=None)
@given(
    st.sampled_from(sorted(METHODS)),
    st.dictionaries(
        st.sampled_from(["structure", "text", "smiles", "mz"]),
        st.none() | st.integers() | st.text(max_size=12) | st.lists(st.integers(), max_size=2),
        max_size=3,
    ),
)
def test_no_call_escapes(method: str, params: dict[str, Any]) -> None:
    answer = json.loads(handle(method, json.dumps(params)))
    assert answer.get("error", {}).get("code", "") in {
        "",
        "invalid_input",
        "invalid_structure",
        "invalid_formula",
    }
