"""Predictions must not depend on where the engine runs."""

from __future__ import annotations

import csv
import json
from pathlib import Path
from statistics import median

import pytest
from compare import Runner, same

pytestmark = pytest.mark.node

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
STEPS = Path(__file__).parents[1] / "reference" / "reagent_steps.csv"
#: Structures of about 25 heavy atoms for the clock; on this many, loading the tables no longer counts.
TWENTY_FIVE = [
    "CC(C)(C)OC(=O)N[C@@H](Cc1ccccc1)C(=O)NCCOCC",
    "CCOc1ccc(cc1)C(=O)OCCN(CC)C(=O)c1ccc(Cl)cc1",
    "COc1cc(CC=C)ccc1OCC(O)CNC(C)Cc1ccccc1",
]


def test_predictions_alike(in_browser: Runner) -> None:
    """1H with couplings, 13C, IR and ions of every published compound: the same figures."""
    calls = [
        ["calls.predicted", case["smiles"], case.get("solvent") or "CDCl3", case.get("mhz") or 400]
        for case in CASES
    ]
    assert all("ok" in answer for answer in same(in_browser, calls))


def test_outcomes_alike(in_browser: Runner) -> None:
    """Reaction outcomes of the published alkenes and alcohols."""
    smiles = [c["smiles"] for c in CASES if "C=C" in c["smiles"] or "O" in c["smiles"]][:40]
    same(in_browser, [["calls.outcome_list", s, r] for s in smiles for r in ("OsO4, NMO", "Swern", "LiAlH4")])


def test_steps_alike(in_browser: Runner) -> None:
    """Steps by the names of their reagents: the same outcomes in the same order."""
    steps = list(csv.DictReader(STEPS.read_text("utf-8").splitlines()))
    same(in_browser, [["calls.outcome_list", row["start"], row["reagents"]] for row in steps])


def test_speed_of_prediction_in_pyodide(in_browser: Runner) -> None:
    """Printed, not judged by the clock of a loaded machine: everything on about 25 heavy atoms."""
    answers = in_browser([["calls.seconds", "calls.predicted", 12, s, "CDCl3", 400] for s in TWENTY_FIVE])
    for smiles, answer in zip(TWENTY_FIVE, answers, strict=True):
        print(f"{smiles}: first {answer['ok'][0]:.3f} s, warm {1000 * median(answer['ok'][1:]):.0f} ms")
        assert len(answer["ok"]) == 12
