"""The hunt: slices, what they keep, what a stated step puts up."""

from __future__ import annotations

import time
from itertools import pairwise
from typing import Any

import pytest

from hoodside.engine import call
from hoodside.errors import InvalidInputError, StructureError
from hoodside.hunt import Hunt
from hoodside.methods.hunting import hunt
from hoodside.molecule import read_structure
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals.names import name_of

#: Made up from the predicted spectrum: 15 readings.
READINGS: dict[str, Any] = {
    "formula": "C10H12O2",
    "h1": [
        {"ppm": 7.98, "mult": "d", "j": [8.8], "n": 2},
        {"ppm": 6.92, "mult": "d", "j": [8.8], "n": 2},
        {"ppm": 4.10, "mult": "q", "j": [7.0], "n": 2},
        {"ppm": 2.55, "mult": "s", "n": 3},
        {"ppm": 1.43, "mult": "t", "j": [7.0], "n": 3},
    ],
    "c13": [196.7, 162.8, 130.6, 130.2, 114.1, 63.7, 26.3, 14.6],
    "ir": [{"cm1": 1675, "strength": "strong"}],
    "ir_clear": [[3200, 3600]],
}
STRUCTURE = "CCOc1ccc(C(C)=O)cc1"
#: Williamson ether synthesis: the phenol is what is left when nothing happens.
STEP = {"start": "CC(=O)c1ccc(O)cc1", "reagents": "EtI, K2CO3"}


def _to_the_end(**question: Any) -> list[dict[str, Any]]:
    answers = [hunt(STRUCTURE, **question)]
    while not answers[-1]["done"]:
        answers.append(hunt(STRUCTURE, **question))
    return answers


def test_the_same_question_goes_on_until_done_and_loses_nothing() -> None:
    answers = _to_the_end(readings=READINGS, limit=12, slice_ms=1)
    weighed = [answer["weighed"] for answer in answers]
    assert len(answers) > 3
    assert weighed == sorted(weighed)
    assert weighed[-1] == 12
    for before, after in pairwise(answers):
        then = {r["smiles"]: r["weight_db"] for r in before["rivals"] if r["weight_db"] is not None}
        now = {r["smiles"]: r["weight_db"] for r in after["rivals"]}
        assert all(now[smiles] == weight for smiles, weight in then.items())


def test_slices_end_where_the_whole_search_ends() -> None:
    sliced = _to_the_end(readings=READINGS, limit=15, slice_ms=3)[-1]
    whole = call("rivals", {"structure": STRUCTURE, "readings": READINGS, "limit": 15})
    assert {r["smiles"] for r in sliced["rivals"]} == {r["smiles"] for r in whole["rivals"]}
    weights = [r["weight_db"] for r in sliced["rivals"]]
    assert weights == sorted(weights, reverse=True)


def test_a_hunt_weighs_as_the_check_does() -> None:
    done = _to_the_end(readings=READINGS, limit=6, slice_ms=1_000)[-1]
    smiles = [r["smiles"] for r in done["rivals"]]
    checked = call("check", {**READINGS, "candidates": [STRUCTURE, *smiles]})
    weights = {c["smiles"]: (c["weight_db"], c["verdict"]) for c in checked["candidates"]}
    assert weights[STRUCTURE] == (done["structure"]["weight_db"], done["structure"]["verdict"])
    assert {s: weights[s] for s in smiles} == {
        r["smiles"]: (r["weight_db"], r["verdict"]) for r in done["rivals"]
    }


@pytest.mark.parametrize("smiles", ["CCOc1ccc(C)cc1", "CCC(=O)OC"])
def test_a_higher_limit_takes_a_hunt_further_to_the_same_end(smiles: str) -> None:
    """The second is small enough for all its isomers to be enumerated."""
    formula = {"CCOc1ccc(C)cc1": "C9H12O", "CCC(=O)OC": "C4H8O2"}[smiles]
    narrow = Hunt(read_structure(smiles), readings_from_json({"formula": formula}), limit=8)
    narrow.go_on(60)
    before = {r["smiles"] for r in narrow.answer()["rivals"]}
    narrow.widen(25)
    assert not narrow.done
    narrow.go_on(60)
    wide = Hunt(read_structure(smiles), readings_from_json({"formula": formula}), limit=25)
    wide.go_on(60)
    after, whole = (narrow.answer(), wide.answer())
    assert before < {r["smiles"] for r in after["rivals"]}
    assert {r["smiles"] for r in after["rivals"]} == {r["smiles"] for r in whole["rivals"]}
    assert (after["complete"], after["note"]) == (whole["complete"], whole["note"])


def test_near_are_those_that_take_the_verdict_away() -> None:
    """Ketone and ethoxy carbons do not tell para from meta; the pattern of the ring does."""
    poor = {"formula": "C10H12O2", "c13": [READINGS["c13"][0], *READINGS["c13"][-3:]]}
    near = {r["smiles"] for r in _to_the_end(readings=poor, slice_ms=1_000)[-1]["rivals"] if r["near"]}
    assert name_of("CCOc1cccc(C(C)=O)c1") in near
    full = _to_the_end(readings=READINGS, slice_ms=1_000)[-1]
    assert not any(r["near"] for r in full["rivals"])


def test_a_slice_keeps_its_time() -> None:
    question: dict[str, Any] = {"readings": READINGS, "limit": 60, "slice_ms": 40}
    hunt(STRUCTURE, **question)  # patterns compile here
    began = time.process_time()
    hunt(STRUCTURE, **question)
    assert time.process_time() - began < 0.4


def test_without_readings_rivals_are_put_up_and_not_weighed() -> None:
    done = _to_the_end(limit=10, slice_ms=5_000)[-1]
    assert done["structure"] is None
    assert len(done["rivals"]) == 10
    assert all(r["weight_db"] is None and r["how"] for r in done["rivals"])


def test_start_and_by_products_of_the_step_stand_among_the_rivals() -> None:
    first = hunt(STRUCTURE, readings=READINGS, limit=5, step=STEP, slice_ms=1)
    start = name_of(STEP["start"])
    assert start in {r["smiles"] for r in first["rivals"]}
    done = _to_the_end(readings=READINGS, limit=5, step=STEP, slice_ms=1_000)[-1]
    found = {r["smiles"]: r for r in done["rivals"]}
    assert found[start]["how"] == ["the start of the step, unchanged"]
    assert found[start]["verdict"] == "clashes"  # two carbons short of the formula
    assert len(found) > 5


def test_the_step_stands_in_whole_answers_too() -> None:
    asked = {"structure": "OCc1ccccc1", "limit": 3, "step": {"start": "O=Cc1ccccc1", "reagents": "NaBH4"}}
    found = call("rivals", asked)["rivals"]
    assert [r["smiles"] for r in found[:1]] == ["O=Cc1ccccc1"]
    assert len(found) == 4


def test_the_check_puts_up_what_the_step_may_have_left() -> None:
    # Epoxidation with a peracid: the diol comes from opening with water (common practice).
    step = {"start": "C=Cc1ccccc1", "reagents": "mCPBA"}
    answer = call("check", {"formula": "C8H8O", "h1": [], "candidates": ["c1ccc(C2CO2)cc1"], "step": step})
    named = {c["name"]: c for c in answer["candidates"]}
    assert set(named) == {"structure A", "the start", "the by-product"}
    assert named["the start"]["smiles"] == "C=Cc1ccccc1"
    assert named["the by-product"]["smiles"] == "OCC(O)c1ccccc1"
    assert all(named[name]["origin"] == "rival" and named[name]["how"] for name in named if "A" not in name)
    assert not any("step" in warning for warning in answer["warnings"])


def test_a_start_that_is_a_candidate_already_stands_once() -> None:
    step = {"start": "O=Cc1ccccc1", "reagents": "NaBH4"}
    answer = call(
        "check", {"formula": "C7H8O", "candidates": ["OCc1ccccc1", "O=Cc1ccccc1"], "step": step, "rivals": 2}
    )
    assert [c["smiles"] for c in answer["candidates"]].count("O=Cc1ccccc1") == 1
    assert sum(c["index"] is None for c in answer["candidates"]) == 2


@pytest.mark.parametrize(
    ("step", "field", "error"),
    [
        ({}, "step.start", InvalidInputError),
        (3, "step", InvalidInputError),
        ({"start": "C1CC"}, "step.start", StructureError),
        ({"start": "CCO", "reagents": 5}, "step.reagents", InvalidInputError),
        ({"start": "CCO", "with": "PCC"}, "step.with", InvalidInputError),
    ],
)
def test_a_bad_step_is_named(step: Any, field: str, error: type[Exception]) -> None:
    with pytest.raises(error) as caught:
        call("check", {"candidates": ["CCO"], "step": step})
    assert caught.value.field == field  # type: ignore[attr-defined]


def test_a_bad_slice_is_named() -> None:
    with pytest.raises(InvalidInputError, match="slice_ms"):
        hunt(STRUCTURE, slice_ms=0)


def test_rivals_found_before_stand_in_a_check_and_take_part_in_its_verdict() -> None:
    """Ring position left open by readings without the aromatic signals: ortho, meta and para fit alike."""
    readings = {"formula": "C10H12O2", "h1": [{"ppm": 4.10, "mult": "q", "j": [7.0], "n": 2}]}
    alone = call("check", {**readings, "candidates": [STRUCTURE]})["candidates"]
    put_up = [{"smiles": "CCOc1cccc(C(C)=O)c1", "how": ["at another position of the ring"]}]
    together = call("check", {**readings, "candidates": [STRUCTURE], "put_up": put_up})["candidates"]
    (rival,) = (c for c in together if c["index"] is None)
    assert (rival["name"], rival["how"]) == ("rival 1", put_up[0]["how"])
    assert len(alone) == 1
    assert {c["verdict"] for c in together} == {"undecided"}


def test_a_rival_put_up_that_is_a_candidate_already_stands_once() -> None:
    answer = call("check", {"candidates": ["CCO"], "put_up": [{"smiles": "OCC"}]})
    assert len(answer["candidates"]) == 1
    step = {"start": "CC=O"}
    stated = call("check", {"candidates": ["CCO"], "step": step, "put_up": [{"smiles": "CC=O"}]})
    assert [c["name"] for c in stated["candidates"] if c["index"] is None] == ["the start"]


@pytest.mark.parametrize(
    ("put_up", "field"),
    [
        (3, "put_up"),
        (["CCO"], "put_up[0]"),
        ([{"how": []}], "put_up[0].smiles"),
        ([{}] * 30, "put_up"),
        ([{"smiles": "C1CC"}], "put_up[0].smiles"),
    ],
)
def test_bad_rivals_put_up_are_named(put_up: Any, field: str) -> None:
    with pytest.raises((InvalidInputError, StructureError)) as caught:
        call("check", {"candidates": ["CCO"], "put_up": put_up})
    assert (caught.value.field or "").startswith(field)


def test_a_step_of_organometallics_does_not_stop_the_check() -> None:
    step = {"start": "C[Mg]Br", "reagents": "H2O", "partner": "O=Cc1ccccc1"}
    answer = call(
        "check", {"h1": [{"ppm": 4.9, "mult": "q", "n": 1}], "candidates": ["CC(O)c1ccccc1"], "step": step}
    )
    assert answer["candidates"][0]["index"] == 0


def test_a_candidate_with_its_configuration_is_no_rival_to_itself() -> None:
    """One centre: NMR cannot tell its mirror images, so that rivals leave it unmarked."""
    lone = "C[C@H](O)c1ccccc1"
    put_up = [{"smiles": "CC(O)c1ccccc1"}, {"smiles": "OCCc1ccccc1"}]
    answer = call("check", {"formula": "C8H10O", "candidates": ["CCOc1ccccc1", lone], "put_up": put_up})
    assert [c["smiles"] for c in answer["candidates"] if c["index"] is None] == ["OCCc1ccccc1"]
    question: dict[str, Any] = {"readings": {"formula": "C8H10O"}, "slice_ms": 5_000, "limit": 60}
    with_it = {r["smiles"] for r in hunt("OCCc1ccccc1", **question)["rivals"]}
    without = {r["smiles"] for r in hunt("OCCc1ccccc1", besides=[lone], **question)["rivals"]}
    assert with_it - without == {"CC(O)c1ccccc1"}
