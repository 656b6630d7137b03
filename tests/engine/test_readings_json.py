"""Readings from JSON: every field checked, every complaint with its path, value and mend."""

from __future__ import annotations

import contextlib
import json
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside.errors import InvalidInputError
from hoodside.readings import CarbonLine, IrBand, IrClear, ProtonSignal
from hoodside.readings.from_json import readings_from_json, readings_to_json
from hoodside.readings.solvents import known_solvent

FULL = {
    "id": "vial 3",
    "formula": "C10H12O",
    "solvent": "chloroform-d",
    "mhz": "400",
    "h1": [
        {"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2},
        {"lo": 7.35, "hi": "7,20", "mult": "multiplet", "n": 5},
        {"ppm": "2.98", "mult": "pentet", "j": 6.9},
        1.27,
    ],
    "c13": [192.0, {"ppm": 23.6, "kind": "CH3", "n": 2}, {"ppm": 162.5, "j_cf": [245]}],
    "ir": [{"cm1": 1700, "strength": "strong broad"}, 2950, {"cm1": 3300, "strength": "s", "shape": "br"}],
    "ir_clear": [[3600, 3200], {"lo": 2100, "hi": 2300}],
    "ir_medium": "film",
    "ms": [{"mz": 133, "rel": 100}, 148],
    "hrms": {"adduct": "[M+H]+", "found": 149.0963, "ppm": 3},
    "analysis": {"C": 81.0, "H": "8,2"},
    "wet": [{"test": "2,4-dnp", "result": "+"}],
}


def test_a_full_object_is_read() -> None:
    found = readings_from_json(FULL)
    assert found.solvent == "CDCl3"
    assert found.mhz == 400
    assert found.h1[0] == ProtonSignal(7.81, 7.81, "d", (8.2,), 2)
    assert found.h1[1] == ProtonSignal(7.20, 7.35, "m", (), 5)
    assert found.h1[2] == ProtonSignal(2.98, 2.98, "quint", (6.9,))
    assert found.h1[3] == ProtonSignal(1.27, 1.27)
    assert found.c13 == (CarbonLine(192.0), CarbonLine(23.6, "CH3", 2), CarbonLine(162.5, j_cf=(245.0,)))
    assert found.ir == (
        IrBand(1700, "strong", "broad"),
        IrBand(2950),
        IrBand(3300, "strong", "broad"),
    )
    assert found.ir_clear == (IrClear(3200, 3600), IrClear(2100, 2300))
    assert found.analysis is not None
    assert found.analysis.found == {"C": 81.0, "H": 8.2}
    assert found.wet[0].test == "2,4-DNP"
    assert found.warnings == ()


def test_json_goes_round() -> None:
    found = readings_from_json(FULL)
    assert readings_from_json(json.loads(json.dumps(readings_to_json(found)))) == found


@pytest.mark.parametrize(
    ("case", "field", "value"),
    [
        ({"h1": [{"ppm": 1}, {"ppm": 2}, {"ppm": -30}]}, "h1[2].ppm", -30),
        ({"h1": [{"ppm": "x"}]}, "h1[0].ppm", "x"),
        ({"h1": [{"lo": 1}]}, "h1[0].ppm", None),
        ({"h1": [{"ppm": 1, "mult": "dx"}]}, "h1[0].mult", "dx"),
        ({"h1": [{"ppm": 1, "j": [3, "y"]}]}, "h1[0].j[1]", "y"),
        ({"h1": [{"ppm": 1, "n": 0}]}, "h1[0].n", 0),
        ({"h1": [{"ppm": True}]}, "h1[0].ppm", True),
        ({"h1": {"ppm": 1}}, "h1", {"ppm": 1}),
        ({"h1": [None]}, "h1[0]", None),
        ({"c13": [400]}, "c13[0]", 400),
        ({"c13": [{"ppm": 20, "kind": "CH4"}]}, "c13[0].kind", "CH4"),
        ({"ir": [{"cm1": 17}]}, "ir[0].cm1", 17),
        ({"ir": [{"cm1": 1700, "strength": "loud"}]}, "ir[0].strength", "loud"),
        ({"ir_clear": [[3200]]}, "ir_clear[0]", [3200]),
        ({"ir_clear": [["a", 3200]]}, "ir_clear[0][0]", "a"),
        ({"ms": [{"mz": 0}]}, "ms[0].mz", 0),
        ({"hrms": {"found": "high"}}, "hrms.found", "high"),
        ({"hrms": 149}, "hrms", 149),
        ({"analysis": {"C": 181}}, "analysis.C", 181),
        ({"wet": [{"test": "smell", "result": "+"}]}, "wet[0].test", "smell"),
        ({"wet": [{"test": "2,4-DNP", "result": "maybe"}]}, "wet[0].result", "maybe"),
        ({"mhz": 3}, "mhz", 3),
        ({"mhz": float("nan")}, "mhz", None),
        ({"formula": 12}, "formula", 12),
        ({"raw_integrals": "yes"}, "raw_integrals", "yes"),
    ],
)
def test_a_bad_field_is_named_with_its_value_and_mend(
    case: dict[str, Any], field: str, value: object
) -> None:
    with pytest.raises(InvalidInputError) as caught:
        readings_from_json(case)
    assert caught.value.field == field
    assert caught.value.hint
    assert value is None or caught.value.value == value
    assert "\n" not in caught.value.one_line()


def test_raw_integrals_may_have_any_scale() -> None:
    assert readings_from_json({"h1": [{"ppm": 1, "n": 12345.6}], "raw_integrals": True}).h1[0].n == 12345.6


def test_unknown_keys_and_solvents_are_warned_of() -> None:
    found = readings_from_json({"h": [], "solvant": "x", "solvent": "sea water", "candidates": []})
    assert len(found.warnings) == 3
    assert "did you mean solvent" in found.warnings[1]
    assert found.solvent == ""


@pytest.mark.parametrize("name", ["AA'BB'", "AB", "ABX", "A2B2", "AA'XX'", "AB system"])
def test_spin_systems_count_as_multiplets(name: str) -> None:
    assert readings_from_json({"h1": [{"ppm": 7.2, "mult": name}]}).h1[0].mult == "m"


def test_a_report_line_fills_what_is_not_given() -> None:
    text = "1H NMR (300 MHz, DMSO-d6) δ 2.10 (s, 3H), rubbish. 13C NMR δ 30.1, 206.0"
    found = readings_from_json({"text": text, "c13": [30.9]})
    assert [s.ppm for s in found.h1] == [2.10]
    assert [c.ppm for c in found.c13] == [30.9]
    assert (found.solvent, found.mhz) == ("DMSO-d6", 300)
    assert any("rubbish" in warning for warning in found.warnings)


@pytest.mark.parametrize(
    ("written", "name"),
    [
        ("CDCL3", "CDCl3"),
        ("chloroform-d", "CDCl3"),
        ("CDCl₃", "CDCl3"),
        ("d6-DMSO", "DMSO-d6"),
        ("(CD3)2SO", "DMSO-d6"),
        ("[D6]DMSO", "DMSO-d6"),
        ("DMSO", "DMSO-d6"),
        ("MeOD", "CD3OD"),
        ("MeOH-d4", "CD3OD"),
        ("acetone-d6", "acetone-d6"),
        ("(CD3)2CO", "acetone-d6"),
        ("C6D6", "C6D6"),
        ("benzene-d6", "C6D6"),
        ("d8-THF", "THF-d8"),
        ("CDCl3/CD3OD 9:1", "CDCl3"),
        ("CDCl3 + 1% TFA", "CDCl3"),
        ("CCl4", "CCl4"),
        ("D2O", "D2O"),
        ("1,1,2,2-tetrachloroethane-d2", "C2D2Cl4"),
        ("beer", ""),
    ],
)
def test_solvent_names(written: str, name: str) -> None:
    assert known_solvent(written) == name


JSON = st.recursive(
    st.none() | st.booleans() | st.integers() | st.floats() | st.text(max_size=8),
    lambda inner: st.lists(inner, max_size=4) | st.dictionaries(st.text(max_size=5), inner, max_size=4),
    max_leaves=12,
)
KEYS = ["h1", "c13", "ir", "ir_clear", "ms", "hrms", "analysis", "wet", "mhz", "solvent", "text", "formula"]


@settings(deadline=None)
@given(st.dictionaries(st.sampled_from(KEYS), JSON, max_size=4))
def test_whatever_comes_is_read_or_refused_in_words(case: dict[str, Any]) -> None:
    with contextlib.suppress(InvalidInputError):
        readings_from_json(case)
