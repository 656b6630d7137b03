"""The command line: what it prints, how it ends, and that it never shows a traceback."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path

import pytest

from hoodside.cli.main import main

ROOT = Path(__file__).resolve().parents[2]
CASE = {
    "id": "vial 3",
    "h1": [{"ppm": 2.16, "mult": "s", "n": 6}],
    "ir": [1715],
    "candidates": ["CC(C)=O", "CCC=O"],
}


def run(*arguments: str, stdin: str = "") -> subprocess.CompletedProcess[str]:
    environment = {**os.environ, "PYTHONPATH": str(ROOT / "py"), "PYTHONIOENCODING": "utf-8"}
    return subprocess.run(
        [sys.executable, "-m", "hoodside", *arguments],
        input=stdin,
        capture_output=True,
        text=True,
        encoding="utf-8",
        env=environment,
        timeout=120,
        check=False,
    )


def refused(capsys: pytest.CaptureFixture[str], *arguments: str) -> str:
    """The one line on stderr of a command that must end with 2."""
    assert main(arguments) == 2
    told = capsys.readouterr()
    assert told.err.count("\n") == 1
    assert "Traceback" not in told.err
    return told.err


def write(tmp_path: Path, content: object) -> str:
    path = tmp_path / "case.json"
    path.write_text(content if isinstance(content, str) else json.dumps(content), "utf-8")
    return str(path)


def test_check_answers_json(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["check", write(tmp_path, CASE), "--json"]) == 0
    answer = json.loads(capsys.readouterr().out)
    assert set(answer) >= {"id", "formula", "dbe", "warnings", "candidates", "next"}
    assert answer["id"] == "vial 3"
    assert answer["candidates"][0]["smiles"] == "CC(C)=O"


def test_an_array_is_answered_line_by_line(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["check", write(tmp_path, [CASE, {**CASE, "id": "b"}]), "--json"]) == 0
    assert [json.loads(line)["id"] for line in capsys.readouterr().out.splitlines()] == ["vial 3", "b"]
    lines = "\n".join(json.dumps({**CASE, "id": name}) for name in "xyz")
    assert main(["check", write(tmp_path, lines), "--json"]) == 0
    assert [json.loads(line)["id"] for line in capsys.readouterr().out.splitlines()] == list("xyz")


def test_a_bad_case_among_good_ones_costs_itself_only(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    bad = {"id": "bad", "h1": [{"ppm": -30}], "candidates": ["C"]}
    assert main(["check", write(tmp_path, [CASE, bad, {**CASE, "id": "b"}]), "--json"]) == 2
    told = capsys.readouterr()
    answers = [json.loads(line) for line in told.out.splitlines()]
    assert [a["id"] for a in answers] == ["vial 3", "bad", "b"]
    assert answers[1]["error"]["field"] == "[1].h1[0].ppm"
    assert told.err.startswith("[1].h1[0].ppm: -30 ppm is no possible 1H shift. Give")
    assert told.err.count("\n") == 1


def test_tables_for_people(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["check", write(tmp_path, CASE)]) == 0
    out = capsys.readouterr().out
    assert "vial 3" in out
    assert "CC(C)=O" in out
    assert "verdict" in out
    assert main(["predict", "CC(C)c1ccc(C=O)cc1"]) == 0
    out = capsys.readouterr().out
    assert "C10H12O" in out
    assert "sept" in out
    report = tmp_path / "report.txt"
    report.write_bytes("1H NMR δ 2.16 (s, 6H), bosh".encode("utf-8-sig"))
    assert main(["parse", str(report)]) == 0
    out = capsys.readouterr().out
    assert "2.16" in out
    assert "bosh" in out


def test_parse_reads_other_encodings(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    report = tmp_path / "report.txt"
    for encoding in ("utf-16", "cp1252"):
        report.write_bytes("1H NMR (CDCl3) 7.20–7.35 (m, 5H)".encode(encoding))
        assert main(["parse", str(report), "--json"]) == 0
        assert json.loads(capsys.readouterr().out)["readings"]["h1"][0]["lo"] == 7.2


def test_outcomes_and_amounts(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["outcomes", "C1=CCCCC1", "--with", "OsO4, NMO", "--json"]) == 0
    first = json.loads(capsys.readouterr().out)["outcomes"][0]
    assert first["role"] == "product"
    assert main(["outcomes", "C1=CCCCC1", "--with", "OsO4, NMO"]) == 0
    assert "safety sheet" in capsys.readouterr().out
    question = {
        "kind": "ratio",
        "species": [
            {"name": "a", "signals": [{"integral": 3.0, "protons": 3}]},
            {"name": "b", "signals": [{"integral": 1.0, "protons": 1}]},
        ],
    }
    assert main(["amounts", write(tmp_path, question), "--json"]) == 0
    assert main(["amounts", write(tmp_path, question)]) == 0


def test_bad_input_ends_with_two_and_one_line(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    assert "No such file" in refused(capsys, "check", str(tmp_path / "none.json"))
    assert "cannot be read" in refused(capsys, "check", str(tmp_path))
    assert "line 1, column 7" in refused(capsys, "check", write(tmp_path, '{"h1":'))
    assert "empty" in refused(capsys, "check", write(tmp_path, " "))
    assert "no JSON object" in refused(capsys, "check", write(tmp_path, "3"))
    assert "h1[0].mult: 'dx'" in refused(
        capsys, "check", write(tmp_path, {"h1": [{"ppm": 1, "mult": "dx"}], "candidates": ["C"]})
    )
    assert "smiles" in refused(capsys, "predict", "CC(C")
    assert "mhz" in refused(capsys, "predict", "CC", "--mhz", "fast")
    assert "No reagent" in refused(capsys, "outcomes", "C=C")
    assert "nested" in refused(capsys, "check", write(tmp_path, "[" * 200_000))


@pytest.mark.parametrize("arguments", [[], ["bake"], ["check", "a", "b"], ["predict"], ["check", "--jsn"]])
def test_wrong_use_ends_with_two_and_one_line(
    arguments: list[str], capsys: pytest.CaptureFixture[str]
) -> None:
    with pytest.raises(SystemExit) as ended:
        main(arguments)
    assert ended.value.code == 2
    assert capsys.readouterr().err.count("\n") == 1


def test_the_module_reads_stdin() -> None:
    done = run("check", "--json", stdin=json.dumps(CASE))
    assert (done.returncode, done.stderr) == (0, "")
    assert json.loads(done.stdout)["candidates"][0]["smiles"] == "CC(C)=O"
    done = run("parse", "-", "--json", stdin="IR (film) 1715 (s) cm-1")
    assert json.loads(done.stdout)["readings"]["ir"] == [{"cm1": 1715, "strength": "strong"}]
    done = run("predict", "CC(C", "--json")
    assert (done.returncode, done.stdout) == (2, "")
    assert done.stderr.count("\n") == 1


def test_a_broken_pipe_is_no_error() -> None:
    environment = {**os.environ, "PYTHONPATH": str(ROOT / "py")}
    command = [sys.executable, "-m", "hoodside", "check", "--json"]
    many = json.dumps([{**CASE, "id": str(i)} for i in range(400)])
    with subprocess.Popen(command, stdin=-1, stdout=-1, stderr=-1, text=True, env=environment) as process:
        assert process.stdin is not None
        assert process.stdout is not None
        assert process.stderr is not None
        process.stdin.write(many)
        process.stdin.close()
        process.stdout.readline()
        process.stdout.close()
        assert process.stderr.read() == ""
        assert process.wait(120) == 0


def test_predict_explains_every_shift(capsys: pytest.CaptureFixture[str]) -> None:
    """Base and increments add up to the shift shown, each with its source."""
    assert main(["predict", "CC(C)c1ccc(C=O)cc1", "--explain"]) == 0
    told = capsys.readouterr().out.split("\n\n")
    shifts = [part.splitlines() for part in told if part.startswith(("h1", "c13"))]
    assert len(shifts) == 12
    for first, *terms in shifts:
        total = sum(float(term.split()[0]) for term in terms)
        assert total == pytest.approx(float(first.split()[1]), abs=0.06)
        assert all("[" in term for term in terms)


def test_proposals_say_fragments_structures_and_what_was_done(
    capsys: pytest.CaptureFixture[str], tmp_path: Path
) -> None:
    h1 = [{"ppm": 4.0, "mult": "sept", "n": 1}, {"ppm": 1.2, "mult": "d", "n": 6}]
    readings = tmp_path / "readings.json"
    readings.write_text(json.dumps({"formula": "C3H8O", "h1": h1, "candidates": ["CCCO"]}), "utf-8")
    assert main(["proposals", str(readings)]) == 0
    told = capsys.readouterr().out.splitlines()
    assert told[:2] == ["No fragment is forced by these readings.", "Structures"]
    assert any(line.strip().startswith("+") and line.endswith("CC(C)O") for line in told)
    assert "weighed" in told[-1]


def test_rivals_begin_with_what_the_step_may_have_left(capsys: pytest.CaptureFixture[str]) -> None:
    """Borohydride: the aldehyde is what is left when nothing happens (common practice)."""
    command = ["rivals", "OCc1ccccc1", "--start", "O=Cc1ccccc1", "--with", "NaBH4", "--limit", "2"]
    assert main(command) == 0
    told = capsys.readouterr().out.splitlines()
    assert told[0].split() == ["O=Cc1ccccc1", "C7H6O", "the", "start", "of", "the", "step,", "unchanged"]
    assert len(told) >= 3
