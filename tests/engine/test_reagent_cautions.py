"""Cautions for reagents: nothing coded is lost in words, and every dangerous reagent has one."""

from __future__ import annotations

import re

import pytest

from hoodside.advise.reagent_cautions import cautions_for, gravest, in_words
from hoodside.engine import call
from hoodside.facts import load_table

CODE = re.compile(r"\b(?:EUH|H)\d{3}")

#: Reagents that hurt people (common practice: what a safety officer asks about first).
DANGEROUS = [
    "OsO4", "KMnO4", "O3", "mCPBA", "H2O2", "NaH", "n-BuLi", "LiAlH4", "NaN3", "NaCN", "HF", "Br2", "HNO3",
    "H2SO4", "CH2N2", "TMSCHN2", "Na/NH3", "Hg(OAc)2", "SOCl2", "Jones", "BH3", "TFA", "HATU", "DEAD", "H2",
    "Raney Ni", "NaNO2", "DIBAL", "KOtBu", "oxalyl chloride",
]  # fmt: skip


@pytest.mark.parametrize("name", DANGEROUS)
def test_dangerous_reagents_have_a_caution_and_a_quench(name: str) -> None:
    (caution,) = cautions_for([name])
    assert caution.gravest
    assert caution.quench
    assert caution.source


def test_every_code_of_the_table_has_words() -> None:
    """Hazard statements of Regulation (EC) No 1272/2008, Annex III."""
    for row in load_table("reagent_cautions"):
        assert not CODE.search(in_words(row["hazards"])), row["reagent"]
        assert not CODE.search(gravest(row["hazards"])), row["reagent"]


def test_every_caution_a_reagent_names_exists() -> None:
    known = {row["reagent"] for row in load_table("reagent_cautions")}
    assert {c for row in load_table("reactions") for c in row["cautions"].split(";") if c} <= known
    assert {row["caution"] for row in load_table("reagents") if row["caution"]} <= known


def test_words_in_brackets_stand_for_the_codes_they_speak_of_and_no_more() -> None:
    assert in_words("H300 H310 H330 (fatal swallowed, on skin, inhaled); H314 (burns)") == (
        "fatal swallowed, on skin, inhaled; burns"
    )
    said = in_words("H225 H301 H311 H331 H370 (blinds)")
    for words in ("highly flammable", "toxic if swallowed", "blinds"):
        assert words in said


def test_grave_is_what_kills_burns_or_explodes() -> None:
    told = cautions_for(["OsO4", "n-BuLi", "TMSN3", "NMO", "Na2S2O3", "DMSO"])
    assert [caution.grave for caution in told] == [True, True, True, False, False, False]


def test_the_worst_comes_first() -> None:
    assert gravest("H300 H310 H330") == "fatal if swallowed, on skin or inhaled"
    assert gravest("H310") == "fatal on skin"
    assert gravest("H290 H314 H330 H400").startswith("fatal if inhaled")
    assert gravest("H315 H319 H271").startswith("may cause fire or explosion")
    assert "explode" in gravest("H315 H319 H335; dry salt may explode")


def test_cautions_are_those_of_what_was_added_and_of_the_step() -> None:
    """An ozonide is nobody's reagent, yet the danger of an ozonolysis (Prudent Practices, 2011)."""
    answer = call("outcomes", {"structure": "C1CCC=CC1", "reagents": "1) O3 2) Me2S"})
    told = [caution["reagent"] for caution in answer["cautions"]]
    assert told[0] == "ozone"
    assert any("ozonide" in name for name in told)
    assert "potassium permanganate" not in [
        caution["reagent"]
        for caution in call("outcomes", {"structure": "C=CCc1ccccc1", "reagents": "OsO4, NMO"})["cautions"]
    ]


def test_cautions_stand_even_where_nothing_reacts() -> None:
    answer = call("outcomes", {"structure": "CCCC", "reagents": "NaH, K2CO3"})
    assert [caution["reagent"] for caution in answer["cautions"]] == ["sodium hydride (60 % in oil)"]
    assert answer["no_caution"] == ["K2CO3"]


@pytest.mark.parametrize("row", list(load_table("usual_conditions")), ids=lambda row: row["label"])
def test_usual_conditions_are_understood_and_give_a_product(row: dict[str, str]) -> None:
    asked = {
        "structure": row["typical_start"],
        "reagents": row["reagents"],
        "partner": row["typical_partner"],
    }
    answer = call("outcomes", asked)
    assert answer["unknown"] == []
    assert answer["outcomes"][0]["role"] == "product"


def test_every_reagent_stands_on_a_shelf() -> None:
    shelved = call("reagents", {})["reagents"]
    assert [entry["name"] for entry in shelved if not entry["shelf"]] == []
