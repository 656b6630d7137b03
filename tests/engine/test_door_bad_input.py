"""Bad input at the door: whatever is put in place of a good value is answered by a mend or by a result.

Each method is given a good call with one value, at any depth, exchanged for one that does not belong there.
"""

from __future__ import annotations

import json
import random
from typing import Any

import pytest

from hoodside.engine import METHODS, handle

LINES = [{"ppm": 7.1, "height": 1}, {"ppm": 7.2, "height": 1}, {"hz": 430, "height": 1}]
SYSTEM = {
    "mhz": 60,
    "nuclei": [{"ppm": 7.1, "count": 1}, {"ppm": 7.3}],
    "j": [[0, 1, 8.6]],
    "linewidth_hz": 1.0,
}
H1 = [{"ppm": 3.6, "mult": "t", "j": [6.7], "n": 2}, {"lo": 1.5, "hi": 1.7, "mult": "m", "n": 2}]
READINGS: dict[str, Any] = {
    "formula": "C3H8O",
    "solvent": "CDCl3",
    "mhz": 400,
    "h1": H1,
    "c13": [64.5, {"ppm": 10.1, "kind": "CH3"}],
    "ir": [{"cm1": 3350, "strength": "strong", "shape": "broad"}],
    "ir_clear": [[1650, 1800]],
    "ms": [{"mz": 31, "rel": 100}],
    "hrms": {"adduct": "[M+H]+", "found": 61.0648, "ppm": 5},
    "analysis": {"C": 60.0, "H": 13.4},
    "wet": [{"test": "lucas", "result": "negative"}],
    "raw_integrals": False,
}
SPECIES = {"name": "a", "signals": [{"integral": 1.2, "protons": 3, "u": 0.05}], "formula": "C2H6O"}
WEIGHED = {**SPECIES, "mass": 12.0, "u": 0.1, "purity": 0.99, "u_purity": 0.001}
JCAMP = (
    "##TITLE=x\n##JCAMP-DX=4.24\n##DATA TYPE=INFRARED SPECTRUM\n##XUNITS=1/CM\n##YUNITS=TRANSMITTANCE\n"
    "##FIRSTX=400\n##LASTX=404\n##NPOINTS=5\n##XFACTOR=1\n##YFACTOR=1\n##XYDATA=(X++(Y..Y))\n400 1 2 3 4 5\n"
    "##END=\n"
)
AMOUNTS: list[dict[str, Any]] = [
    {"kind": "ratio", "species": [SPECIES, {**SPECIES, "name": "b"}]},
    {"kind": "conversion", "start": SPECIES, "products": [SPECIES, SPECIES]},
    {"kind": "yield", "product": WEIGHED, "limiting": WEIGHED, "stoichiometry": 1},
    {"kind": "purity", "analyte": WEIGHED, "standard": WEIGHED},
    {
        "kind": "solvent",
        "nmr_solvent": "CDCl3",
        "main": SPECIES,
        "solvents": [{"name": "ethyl acetate", "ppm": 4.1, "integral": 0.2}],
    },
]
GOOD: list[tuple[str, dict[str, Any]]] = [
    ("about", {}),
    ("warm", {"slice_ms": 5}),
    ("describe", {"structure": "CCCO"}),
    ("draw", {"structure": "CCCO", "width": 300, "height": 200, "atoms": [0], "bonds": [0]}),
    ("formula", {"text": "C3H8O"}),
    ("formulas", {"mz": 61.0648, "adduct": "[M+H]+", "ppm": 5, "limits": {"C": [0, 5]}}),
    ("parse", {"text": "1H NMR (400 MHz, CDCl3) δ 3.60 (t, J = 6.7 Hz, 2H), 0.9 (m, 3H)"}),
    ("jcamp", {"text": JCAMP}),
    ("report", READINGS),
    ("solvents", {}),
    ("wet_tests", {}),
    (
        "check",
        {
            **READINGS,
            "candidates": ["CCCO", "CC(C)O"],
            "intended": 0,
            "rivals": 0,
            "text": "",
            "step": {"start": "CCC=O", "reagents": "NaBH4"},
            "put_up": [{"smiles": "CCOC", "how": ["O moved"]}],
        },
    ),
    ("predict", {"smiles": "CCCO", "solvent": "CDCl3", "mhz": 400, "medium": "film"}),
    ("spins", {**SYSTEM, "trace": True, "from_ppm": 6.0, "to_ppm": 8.0}),
    ("fit", {**SYSTEM, "lines": LINES, "free_shifts": [0], "free_j": [0]}),
    ("trace", {"smiles": "CCCO", "solvent": "CDCl3", "mhz": 60, "from_ppm": 0, "to_ppm": 10, "points": 100}),
    ("multiplet", {"lines": [7.0, 7.02, 7.04], "heights": [1, 2, 1], "mhz": 400, "unit": "ppm"}),
    ("partners", {"h1": H1}),
    ("ir_regions", {}),
    ("ir_lookup", {"cm1": 1700, "strength": "strong", "shape": "sharp"}),
    ("names", {"query": "benz", "limit": 5}),
    ("tiles", {}),
    ("canvas", {"structure": "CCCO", "width": 300, "height": 200, "formula": "C3H8O"}),
    ("options", {"structure": "CCCO", "atom": 0, "formula": "C3H8O"}),
    ("edit", {"structure": "CCCO", "step": "attach", "arguments": {"atom": 0, "group": "CO", "order": 1}}),
    ("outcomes", {"structure": "CCC=C", "reagents": "OsO4, NMO", "partner": "CCBr", "kind": ""}),
    ("reagents", {"query": "os"}),
    (
        "hunt",
        {
            "structure": "CCO",
            "readings": {"formula": "C2H6O"},
            "limit": 2,
            "formula_known": True,
            "allowed": True,
            "step": {"start": "CC=O", "reagents": "NaBH4", "partner": "C"},
            "slice_ms": 50,
            "besides": ["CCO", "COC"],
        },
    ),
    ("rivals", {"structure": "CCO", "readings": {"formula": "C2H6O"}, "limit": 2, "formula_known": True}),
    ("proposals", {"readings": READINGS, "limit": 2}),
    ("changes", {"start": "CCCO", "product": "CCC=O", "solvent": "CDCl3", "mhz": 400}),
    *(("amounts", question) for question in AMOUNTS),
    ("amount_tables", {"nmr_solvent": "DMSO-d6"}),
]
OUT_OF_PLACE: tuple[Any, ...] = (
    None,
    True,
    0,
    -1,
    2.5,
    1e308,
    10**400,
    float("inf"),
    float("nan"),
    "",
    "x",
    "CC(",
    "*",
    "[Tc]",
    "[11CH4]",
    "\x00",
    "1e999",
    [],
    [[]],
    [None],
    {},
    {"a": 1},
    [1, 2],
)
REFUSALS = {"invalid_input", "invalid_structure", "invalid_formula"}


def test_every_method_has_a_good_call() -> None:
    assert {method for method, _ in GOOD} == set(METHODS)


@pytest.mark.parametrize(("method", "params"), GOOD, ids=[f"{m}{i}" for i, (m, _) in enumerate(GOOD)])
def test_good_calls_are_answered(method: str, params: dict[str, Any]) -> None:
    answer = json.loads(handle(method, json.dumps(params)))
    assert "result" in answer, answer


@pytest.mark.parametrize(("method", "params"), GOOD, ids=[f"{m}{i}" for i, (m, _) in enumerate(GOOD)])
def test_a_value_out_of_place_is_refused_with_a_mend(method: str, params: dict[str, Any]) -> None:
    chance = random.Random(method)
    for _ in range(25):
        spoilt = _spoil(params, chance)
        answer = json.loads(handle(method, json.dumps(spoilt)))
        if "error" in answer:
            error = answer["error"]
            assert error["code"] in REFUSALS, (spoilt, error)
            assert error["message"], spoilt
            assert error["hint"], spoilt


def _spoil(value: Any, chance: random.Random) -> Any:
    """The value with one thing at a random depth exchanged for one out of place."""
    if value and isinstance(value, dict) and chance.random() < 0.85:
        key = chance.choice(sorted(value))
        return {**value, key: _spoil(value[key], chance)}
    if value and isinstance(value, list) and chance.random() < 0.7:
        at = chance.randrange(len(value))
        return [*value[:at], _spoil(value[at], chance), *value[at + 1 :]]
    return chance.choice(OUT_OF_PLACE)


@pytest.mark.parametrize(
    ("method", "params", "field"),
    [
        ("describe", {"structure": "*CC"}, "structure"),
        ("describe", {"structure": "[11CH4]"}, "structure"),
        ("check", {"candidates": ["CCO", "[Tc]"]}, "candidates[1]"),
        ("trace", {"smiles": "CCO", "solvent": 7}, "solvent"),
        ("options", {"structure": "CCO", "atom": 0, "formula": 7}, "formula"),
        ("edit", {"structure": "CCO", "step": "attach", "arguments": {"atom": 0, "group": 7}}, "group"),
        (
            "edit",
            {"structure": "CCO", "step": "attach", "arguments": {"atom": 0, "group": "methyl"}},
            "group",
        ),
        ("spins", {"mhz": 10**400, "nuclei": [{"ppm": 7}]}, "mhz"),
        ("amounts", {"kind": []}, "kind"),
        ("amounts", {"kind": "yield", "product": {**WEIGHED, "purity": 98}}, "product.purity"),
        ("amounts", {"kind": "yield", "product": {**WEIGHED, "formula": "c2"}}, "product.formula"),
        ("amounts", {**AMOUNTS[4], "nmr_solvent": "beer"}, "nmr_solvent"),
    ],
)
def test_the_field_at_fault_is_named(method: str, params: dict[str, Any], field: str) -> None:
    error = json.loads(handle(method, json.dumps(params)))["error"]
    assert error["field"] == field, error
    assert error["code"] in REFUSALS
