"""Growing a structure must come out the same on both kernels, and at once."""

from __future__ import annotations

import json
from statistics import median

import pytest
from compare import Runner

pytestmark = pytest.mark.node

#: Milliseconds from a step to its drawing; a machine busy with tests may be three times slower.
TARGET_MS, SLACK = 50, 3


@pytest.mark.parametrize("label", ["E", "Z"])
def test_double_bonds_are_set_alike(in_browser: Runner, label: str) -> None:
    """E and Z of alkenes left open (IUPAC recommendations 1996)."""
    bonds = {"CC=CC": 1, "COc1ccc(C=CC(=O)O)cc1": 6, "CCC(C)=CCC": 3, "O=CC=Cc1ccccc1": 2}
    steps = [
        ["calls.redrawn", smiles, "set_double_bond", {"bond": bond, "label": label}]
        for smiles, bond in bonds.items()
    ]
    mine = in_browser(steps)
    for answer, bond in zip(mine, bonds.values(), strict=True):
        assert json.loads(answer["ok"])["result"]["labels"]["bonds"] == {str(bond): label}


def test_a_step_is_redrawn_at_once(in_browser: Runner, capsys: pytest.CaptureFixture[str]) -> None:
    asked = ["CC(C)Cc1ccc(cc1)C(C)C(=O)O", "attach", {"atom": 0, "group": "OC"}]
    warm = [["calls.redrawn", *asked]]
    answers = in_browser([*warm, *([["calls.seconds", "calls.redrawn", 9, *asked]])])
    took = sorted(1000 * seconds for seconds in answers[-1]["ok"])
    said = f"best {took[0]:.0f} ms, median {median(took):.0f} ms (target {TARGET_MS})"
    with capsys.disabled():
        print(f"\nediting step to redrawn structure in Pyodide: {said}")
    assert took[0] < SLACK * TARGET_MS
