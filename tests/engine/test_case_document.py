"""Cases saved by the app, on the command line: the same readings, structures and verdict."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from hoodside.cli.case_document import check_object
from hoodside.cli.main import main
from hoodside.engine import call
from hoodside.readings.from_json import readings_from_json

DEMO = Path(__file__).parents[2] / "demo"


@pytest.mark.parametrize("path", sorted(DEMO.glob("*.json")), ids=lambda path: path.stem)
def test_demo_case_is_weighed_as_it_stands(path: Path) -> None:
    case = json.loads(path.read_text("utf-8"))
    asked = check_object(case)
    answer = call("check", asked)
    assert len(answer["candidates"]) == len(case["structures"])
    assert not [warning for warning in answer["warnings"] if "not a known field" in warning]
    assert len(readings_from_json(asked).h1) == len(case["h1"])
    assert case["structures"][asked["intended"]]["id"] == case["intended"]


def test_rows_are_read_as_typed_and_empty_ones_left_out() -> None:
    found = check_object(
        {
            "kind": "hoodside-case",
            "mhz": "400",
            "h1": [
                {"shift": "7,35 – 7,28", "mult": "m", "j": "", "h": "5"},
                {"shift": "4.12", "mult": "dd", "j": "10,8; 3.2", "h": "1"},
                {"shift": "", "mult": "", "j": "", "h": ""},
            ],
            "c13": [{"ppm": "66.3", "kind": "CH2", "n": "1"}],
            "hrms": {"found": "", "adduct": "[M+H]+", "ppm": "5"},
            "analysis": {"C": "", "H": "6.71"},
            "structures": [{"id": "x", "source": "CCO", "smiles": ""}],
            "intended": "x",
        }
    )
    assert found["h1"] == [
        {"lo": 7.28, "hi": 7.35, "mult": "m", "n": 5},
        {"ppm": 4.12, "mult": "dd", "n": 1, "j": [10.8, 3.2]},
    ]
    assert (found["c13"], found["analysis"]) == ([{"ppm": 66.3, "kind": "CH2", "n": 1}], {"H": 6.71})
    assert (found["candidates"], found["intended"], "hrms" in found) == (["CCO"], 0, False)


def test_the_step_that_was_run_goes_along() -> None:
    compound = {"smiles": "C=Cc1ccccc1", "name": "styrene"}
    run = {"start": compound, "partner": None, "steps": [["O3"], ["Me2S"]]}
    asked = check_object({"kind": "hoodside-case", "run": run, "structures": [{"source": "O=Cc1ccccc1"}]})
    assert asked["step"] == {"start": "C=Cc1ccccc1", "reagents": "1) O3 2) Me2S"}
    assert "the start" in {c["name"] for c in call("check", asked)["candidates"]}
    assert "step" not in check_object({"kind": "hoodside-case", "run": {"start": None, "steps": []}})


def test_what_is_no_number_is_named_by_the_check(capsys: pytest.CaptureFixture[str], tmp_path: Path) -> None:
    path = tmp_path / "case.json"
    path.write_text(
        json.dumps(
            {
                "kind": "hoodside-case",
                "h1": [{"shift": "7.2.6"}],
                "structures": [{"id": "x", "source": "CCO"}],
            }
        )
    )
    assert main(["check", str(path)]) == 2
    assert "7.2.6" in capsys.readouterr().err


def test_a_check_object_passes_unchanged() -> None:
    assert check_object({"h1": [7.2]}) == {"h1": [7.2]}
    assert check_object([1]) == [1]


def test_help_shows_what_a_file_holds(capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit):
        main(["check", "--help"])
    shown = capsys.readouterr().out
    example = shown[shown.index("{") : shown.index("}") + 1]
    assert call("check", json.loads(example) | {"rivals": 0})["candidates"][0]["smiles"] == "CC(=O)OCc1ccccc1"


def test_misnamed_key_of_a_spin_system_is_refused(capsys: pytest.CaptureFixture[str], tmp_path: Path) -> None:
    path = tmp_path / "system.json"
    path.write_text('{"mhz": 60, "nuclei": [{"ppm": 7}, {"ppm": 6.8}], "couplings": [[0, 1, 8]]}')
    assert main(["spins", str(path)]) == 2
    assert "'couplings'" in capsys.readouterr().err


def test_structures_are_called_in_the_table_as_in_the_sentences(
    capsys: pytest.CaptureFixture[str], tmp_path: Path
) -> None:
    path = tmp_path / "case.json"
    path.write_text(
        json.dumps(
            {
                "text": "1H NMR (CDCl3) δ 7.36 (m, 5H), 5.11 (s, 2H), 2.10 (s, 3H)",
                "candidates": ["COC(=O)Cc1ccccc1", "CC(=O)OCc1ccccc1"],
            }
        )
    )
    assert main(["check", str(path)]) == 0
    lines = capsys.readouterr().out.splitlines()
    assert any(line.startswith("B  ") and line.endswith("CC(=O)OCc1ccccc1") for line in lines)
    assert any(line.startswith("B  CC(=O)OCc1ccccc1: ") for line in lines)
