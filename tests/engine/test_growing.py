"""Growing a structure and asking for outcomes through the engine's door."""

from __future__ import annotations

from typing import Any

import pytest

from hoodside.engine import call
from hoodside.errors import InvalidInputError, StructureError
from hoodside.molecule import read_structure


def test_every_tile_is_a_structure() -> None:
    for tile in call("tiles", {})["tiles"]:
        assert read_structure(tile["smiles"]).atoms, tile["name"]


def test_a_molecule_grows_from_a_tile_by_offered_steps_alone() -> None:
    """From benzene: an aldehyde, then an isopropyl group para to it."""
    now = call("canvas", {"structure": "c1ccccc1"})
    for atom, label in ((0, "CHO"), (3, "CH(CH3)2")):
        offered = call("options", {"structure": now["source"], "atom": atom})["options"]
        chosen: dict[str, Any] = next(o for o in offered if o["label"] == label)
        now = call(
            "edit", {"structure": now["source"], "step": chosen["step"], "arguments": chosen["arguments"]}
        )
    assert read_structure(now["smiles"]).inchikey == read_structure("CC(C)c1ccc(C=O)cc1").inchikey
    assert now["formula"] == "C10H12O"
    assert len(now["coords"]) == len(now["atoms"]) == 11


def test_an_impossible_step_is_refused_with_a_reason() -> None:
    with pytest.raises(StructureError):
        call("edit", {"structure": "CC(C)(C)C", "step": "attach", "arguments": {"atom": 1, "group": "C"}})


def test_canvas_says_what_is_missing_against_the_formula() -> None:
    """Benzene on the way to a methoxybenzaldehyde: C8H8O2 less C6H6."""
    against = call("canvas", {"structure": "c1ccccc1", "formula": "C8H8O2"})["against"]
    assert (against["needs"], against["over"], against["dbe"]) == ("C2H2O2", "", 5)
    against = call("canvas", {"structure": "CCCCBr", "formula": "C5H12O"})["against"]
    assert (against["needs"], against["over"]) == ("CH3O", "Br")


@pytest.mark.parametrize("text", ["", "C10H12Q"])
def test_without_a_readable_formula_nothing_is_missing(text: str) -> None:
    assert call("canvas", {"structure": "CCO", "formula": text})["against"] is None


def test_groups_that_complete_the_formula_come_first_and_those_too_large_last() -> None:
    asked = {"structure": "O=Cc1ccccc1", "atom": 4, "formula": "C10H12O"}
    offered = [o for o in call("options", asked)["options"] if o["step"] == "attach"]
    assert {o["label"] for o in offered if o["fit"] == "completes"} >= {"CH(CH3)2", "CH2CH2CH3"}
    assert offered[0]["fit"] == "completes"
    assert offered[-1]["fit"] == "exceeds"
    fits = {o["label"]: o["fit"] for o in offered}
    assert (fits["CH3"], fits["C6H5"], fits["OH"], fits["NO2"]) == ("fits", "exceeds", "exceeds", "exceeds")


def test_canvas_tells_the_configurations_drawn() -> None:
    """L-alanine is S; fumaric acid is E (IUPAC recommendations 1996)."""
    alanine = call("canvas", {"structure": "C[C@H](N)C(=O)O"})
    assert alanine["labels"] == {"atoms": {1: "S"}, "bonds": {}}
    fumaric = call("canvas", {"structure": "OC(=O)/C=C/C(=O)O"})
    assert fumaric["labels"]["bonds"] == {3: "E"}


def test_outcomes_come_with_cautions_and_what_was_not_understood() -> None:
    answer = call("outcomes", {"structure": "C=Cc1ccccc1", "reagents": "OsO4, NMO, moonlight"})
    assert answer["outcomes"][0]["smiles"] == read_structure("OCC(O)c1ccccc1").smiles
    assert answer["outcomes"][0]["formula"] == "C8H10O2"
    assert answer["unknown"] == ["moonlight"]
    assert any("osmium" in row["reagent"] and row["hazards"] for row in answer["cautions"])


def test_outcomes_need_a_reagent() -> None:
    with pytest.raises(InvalidInputError):
        call("outcomes", {"structure": "C=Cc1ccccc1"})


def test_reagents_are_found_by_abbreviation() -> None:
    found = call("reagents", {"query": "mcpba"})["reagents"]
    assert any("mCPBA" in entry["names"] for entry in found)
