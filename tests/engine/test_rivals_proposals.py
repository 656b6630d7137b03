"""Fragments and structures from readings alone."""

from __future__ import annotations

from typing import Any

import pytest

from hoodside.advise.proposals import find_fragments, propose
from hoodside.advise.proposals.signs import parse_sign
from hoodside.engine import call
from hoodside.errors import DataFileError, InvalidInputError
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.molecule.kernel import kernel
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals.names import name_of


def signal(ppm: float, mult: str, n: float, *j: float) -> dict[str, Any]:
    return {"ppm": ppm, "mult": mult, "n": n, "j": list(j)}


#: Textbook patterns (common practice) that any chemist reads at sight, and the group they belong to.
PATTERNS = [
    ([signal(1.25, "d", 6, 6.9), signal(2.9, "sept", 1, 6.9)], "isopropyl"),
    ([signal(1.31, "s", 9)], "tert-butyl"),
    ([signal(1.27, "t", 3, 7.1), signal(4.13, "q", 2, 7.1)], "ethoxy"),
    ([signal(3.81, "s", 3)], "methoxy"),
    ([signal(9.95, "s", 1)], "aldehyde"),
    ([signal(7.8, "d", 2, 8.5), signal(7.3, "d", 2, 8.5)], "1,4-disubstituted benzene"),
    ([signal(6.4, "dd", 1, 16.0, 6.0), signal(6.6, "d", 1, 16.0)], "trans CH=CH"),
    ([signal(0.08, "s", 9)], "trimethylsilyl"),
]


@pytest.mark.parametrize(
    ("h1", "fragment"), PATTERNS, ids=lambda value: value if isinstance(value, str) else ""
)
def test_a_pattern_read_at_sight_is_named_with_its_weight_and_reason(
    h1: list[dict[str, Any]], fragment: str
) -> None:
    found = {f.sign.fragment: f for f in find_fragments(readings_from_json({"h1": h1}))}
    assert fragment in found
    assert found[fragment].weight_db > 10
    assert "published" in found[fragment].reason
    assert found[fragment].readings == tuple(f"h1:{i}" for i in range(len(h1)))


def test_a_signal_speaks_for_one_fragment_only() -> None:
    h1 = [signal(1.25, "d", 6, 6.9), signal(2.9, "sept", 1, 6.9), signal(3.8, "s", 6)]
    found = find_fragments(readings_from_json({"h1": h1}))
    used = [name for fragment in found for name in fragment.readings]
    assert len(used) == len(set(used))
    assert {f.sign.fragment: f.times for f in found}["methoxy"] == 2


#: Invented readings drawn from shift tables (Pretsch), no measured compound.
CASES = [
    (
        "CC(C)c1ccc(C#N)cc1",
        "C10H11N",
        [
            signal(7.58, "d", 2, 8.3),
            signal(7.32, "d", 2, 8.3),
            signal(2.95, "sept", 1, 6.9),
            signal(1.26, "d", 6, 6.9),
        ],
        [{"cm1": 2228, "strength": "medium"}],
    ),
    (
        "CCOC(=O)CCC(C)=O",
        "C7H12O3",
        [
            signal(4.12, "q", 2, 7.1),
            signal(2.75, "t", 2, 6.5),
            signal(2.56, "t", 2, 6.5),
            signal(2.19, "s", 3),
            signal(1.25, "t", 3, 7.1),
        ],
        [{"cm1": 1735, "strength": "strong"}, {"cm1": 1718, "strength": "strong"}],
    ),
    ("CCC(C)=O", "C4H8O", [signal(2.45, "q", 2, 7.3), signal(2.13, "s", 3), signal(1.06, "t", 3, 7.3)], []),
    (
        "Oc1ccc(CCO)cc1",
        "C8H10O2",
        [
            signal(7.08, "d", 2, 8.5),
            signal(6.77, "d", 2, 8.5),
            signal(3.82, "t", 2, 6.6),
            signal(2.79, "t", 2, 6.6),
        ],
        [{"cm1": 3300, "strength": "strong", "shape": "broad"}],
    ),
]


@pytest.mark.parametrize(("smiles", "formula", "h1", "ir"), CASES, ids=lambda value: str(value)[:16])
def test_complete_structures_are_put_together(
    smiles: str, formula: str, h1: list[dict[str, Any]], ir: list[dict[str, Any]]
) -> None:
    found = propose(
        readings_from_json({"formula": formula, "h1": h1, "ir": ir, "solvent": "CDCl3"}), limit=20
    )
    names = [proposal.smiles for proposal in found.structures]
    assert name_of(smiles) in names[:3], found.note
    weights = [proposal.weight_db for proposal in found.structures]
    assert weights == sorted(weights, reverse=True)
    for name in names:
        assert read_structure(name).element_counts == read_structure(smiles).element_counts


def test_without_a_formula_only_fragments_are_named() -> None:
    found = propose(readings_from_json({"h1": [signal(1.31, "s", 9)]}))
    assert found.fragments
    assert not found.structures
    assert "formula" in found.note


def test_a_large_formula_is_refused_with_a_reason() -> None:
    found = propose(readings_from_json({"formula": "C20H30O4", "h1": [signal(3.8, "s", 3)]}))
    assert not found.structures
    assert "Too many" in found.note


@pytest.mark.parametrize("table", ["fragment_signs", "ring_units"])
def test_every_unit_of_the_tables_is_a_molecule_with_hydrogen_at_its_open_ends(table: str) -> None:
    for row in load_table(table):
        ports = [int(port) for port in row["ports"].split()]
        atoms = read_structure(row["unit"]).atoms if row["unit"] else ()
        assert all(atoms[port].hydrogens >= ports.count(port) for port in ports), row
        kernel().matches("C", [row["smarts"]] if "smarts" in row else [])


def test_counts_of_signs_hold_together() -> None:
    for row in load_table("fragment_signs"):
        both, seen, have, of = (int(row[c]) for c in ("with_both", "with_sign", "with_fragment", "of"))
        assert both <= min(seen, have)
        assert seen + have - both <= of
        assert of > 0


@pytest.mark.parametrize("text", ["uv 200-300", "h1 3 s here"])
def test_a_sign_that_cannot_be_read_is_refused(text: str) -> None:
    with pytest.raises(DataFileError):
        parse_sign(text)


def test_the_door_gives_fragments_and_structures() -> None:
    h1 = [signal(2.45, "q", 2, 7.3), signal(2.13, "s", 3), signal(1.06, "t", 3, 7.3)]
    answer = call("proposals", {"readings": {"formula": "C4H8O", "h1": h1}, "limit": 3})
    assert answer["structures"][0]["smiles"] == "CCC(C)=O"
    assert {"fragment", "weight_db", "reason", "readings", "source", "times"} <= set(answer["fragments"][0])
    with pytest.raises(InvalidInputError, match="readings"):
        call("proposals", {})
