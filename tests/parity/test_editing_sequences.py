"""Any sequence of editing steps leaves a valid molecule and can be undone, on both kernels."""

from __future__ import annotations

import json
from collections import Counter
from concurrent.futures import ThreadPoolExecutor
from typing import Any

import pytest
import sequences
from compare import Runner
from rdkit import Chem

pytestmark = pytest.mark.node

SEQUENCES, AT_ONCE = 5000, 100
#: Every step a sheet offers must have been taken at least so often, or the sequences show nothing of it.
LEAST_OFTEN = 100
STEPS = {"attach", "change_element", "set_order", "join", "insert", "fuse_ring", "remove", "cut"}
STEPS |= {"set_stereo", "set_double_bond"}
#: A second atom is touched freely, so joining alone may be refused.
MAY_BE_REFUSED = {"join"}


@pytest.fixture(scope="module")
def both(in_browser: Runner) -> tuple[list[dict[str, Any]], list[dict[str, Any]]]:
    """What came of the sequences on CPython and on Pyodide, worked out at the same time."""
    calls = [["sequences.walked", first, AT_ONCE] for first in range(0, SEQUENCES, AT_ONCE)]
    with ThreadPoolExecutor(1) as beside:
        there = beside.submit(in_browser, calls)
        here = sequences.walked(0, SEQUENCES)
        answers = there.result()
    assert all("ok" in answer for answer in answers), [a for a in answers if "ok" not in a][:1]
    # By way of JSON, since that is how the other side's answers came.
    return json.loads(json.dumps(here)), [walk for answer in answers for walk in answer["ok"]]


Both = tuple[list[dict[str, Any]], list[dict[str, Any]]]


def test_the_kernels_agree_to_the_letter(both: Both) -> None:
    here, there = both
    apart = [(seed, h, t) for seed, (h, t) in enumerate(zip(here, there, strict=True)) if h != t]
    assert len(here) == SEQUENCES
    assert not apart, f"{len(apart)} sequences differ, first: {apart[0]}"


def test_every_state_is_a_molecule(both: Both) -> None:
    """RDKit by itself, outside the seam, reads every state, finds it canonical and counts the same atoms."""
    for walk in both[0]:
        states = [walk["start"], *(step[1] for step in walk["steps"] if len(step) == 2)]
        mols = [Chem.MolFromSmiles(smiles) for smiles in states]
        assert None not in mols, walk
        assert [Chem.MolToSmiles(mol) for mol in mols] == states, walk
        counted = Counter(atom.GetSymbol() for atom in Chem.AddHs(mols[-1]).GetAtoms())
        assert counted == walk["formula"], walk


def test_undo_and_redo_give_back_what_was_there(both: Both) -> None:
    lost = [loss for walks in both for walk in walks for loss in walk["undo"]]
    assert not lost, lost[:3]


def test_what_is_offered_can_be_done_and_drawn(both: Both) -> None:
    refused = [step for walk in both[0] for step in walk["steps"] if len(step) > 2]
    assert {step for step, *_ in refused} <= MAY_BE_REFUSED, refused[:3]
    assert not [walk["drawing"] for walks in both for walk in walks if walk["drawing"]]


def test_the_sequences_hold_every_kind_of_step(both: Both) -> None:
    taken = Counter(step[0] for walk in both[0] for step in walk["steps"] if len(step) == 2)
    assert {step for step, times in taken.items() if times >= LEAST_OFTEN} >= STEPS, taken
    assert all(sequences.LEAST_STEPS <= len(w["steps"]) <= sequences.MOST_STEPS for w in both[0])
