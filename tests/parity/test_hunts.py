"""Look-alikes found, and what they weigh, must not depend on where the engine runs."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import pytest
from compare import Runner, same

pytestmark = pytest.mark.node

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
KEYS = ("formula", "solvent", "mhz", "h1", "c13", "ir", "ir_medium", "ms", "hrms")


def _readings(case: dict[str, Any]) -> dict[str, Any]:
    return {key: case[key] for key in KEYS if case.get(key)}


def test_hunts_alike(in_browser: Runner) -> None:
    """Every thirtieth published compound, and one whose isomers are all enumerated."""
    calls = [["calls.hunted", case["smiles"], _readings(case), 12] for case in CASES[::30]]
    calls.append(["calls.hunted", "CCOC(C)=O", {"formula": "C4H8O2"}, 60])
    answers = same(in_browser, calls)
    assert all(answer["ok"]["done"] for answer in answers)
    assert sum(answer["ok"]["weighed"] for answer in answers) > 80
