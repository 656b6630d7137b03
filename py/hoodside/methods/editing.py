"""Growing a structure by touch: what can be done at a place, doing it, and the tiles to begin from."""

from __future__ import annotations

from dataclasses import asdict
from functools import cache
from typing import Any

from hoodside.errors import FormulaError, InvalidInputError
from hoodside.facts import load_table
from hoodside.methods.arguments import integer, short_text
from hoodside.methods.structures import structure_of
from hoodside.molecule import Structure, drawing, read_structure
from hoodside.molecule.edit import apply
from hoodside.molecule.edit_options import Option, options_at
from hoodside.molecule.edit_stereo import labels
from hoodside.predict.formula import (
    Formula,
    exact_mass,
    fit_of,
    formula_of,
    parse_formula,
    shortfall,
    unsaturation,
)
from hoodside.readings.fields import text

_LEAST_SIDE, _MOST_SIDE = 16, 4000
#: Longest a bond is drawn for touching, pixels: a small structure keeps the look of a large one.
_LONGEST_BOND = 64
_ORDER = {"completes": 0, "exceeds": 2}
#: What groups are sought by, by the first element found of those a group holds.
_FAMILIES = (
    ("with S, P, Si or B", ("S", "P", "Si", "B")),
    ("with N", ("N",)),
    ("halogens", ("F", "Cl", "Br", "I")),
    ("with O", ("O",)),
)


def tiles() -> dict[str, Any]:
    """Structures to begin from."""
    rows = load_table("starting_tiles")
    return {"tiles": [{key: row[key] for key in ("name", "smiles")} for row in rows]}


def options(
    structure: str, atom: int | None = None, bond: int | None = None, formula: str = ""
) -> dict[str, Any]:
    """What can be done at one atom or one bond, most likely first.

    Groups that complete ``formula`` come before all, those that outgrow it after all.
    """
    found = structure_of(structure)
    chosen = {"atom": atom, "bond": bond}
    picked = {key: integer(value, key, 0, 10**6) for key, value in chosen.items() if value is not None}
    wanted, have = _wanted(formula), formula_of(found)
    told = [_told(option, have, wanted) for option in options_at(found, **picked)]
    return {"options": sorted(told, key=lambda option: _ORDER.get(option["fit"], 1))}


def edit(
    structure: str,
    step: str,
    arguments: dict[str, Any],
    width: int = 360,
    height: int = 300,
    formula: str = "",
) -> dict[str, Any]:
    """The structure after one editing step, drawn afresh."""
    if not isinstance(arguments, dict):
        raise InvalidInputError(
            "The step has no arguments.", hint='Give {"atom": 0, ...}.', field="arguments"
        )
    return _canvas(
        apply(structure_of(structure), short_text(step, "step"), arguments), width, height, formula
    )


def canvas(structure: str, width: int = 360, height: int = 300, formula: str = "") -> dict[str, Any]:
    """A structure laid out for touching: the drawing, where atoms and bonds stand, formula so far."""
    return _canvas(structure_of(structure), width, height, formula)


def _canvas(structure: Structure, width: int, height: int, wanted: str) -> dict[str, Any]:
    wide = integer(width, "width", _LEAST_SIDE, _MOST_SIDE)
    high = integer(height, "height", _LEAST_SIDE, _MOST_SIDE)
    drawn = drawing.draw(structure, wide, high, longest_bond=_LONGEST_BOND)
    formula = formula_of(structure)
    return {
        "source": structure.source,
        "smiles": structure.smiles,
        "svg": drawn.svg,
        "coords": [list(place) for place in drawn.coords],
        "atoms": [{"symbol": a.symbol, "hydrogens": a.hydrogens} for a in structure.atoms],
        "bonds": [[b.a, b.b, b.order] for b in structure.bonds],
        "labels": _labels(structure),
        "formula": formula.text,
        "formula_parts": [list(part) for part in formula.parts],
        "exact_mass": exact_mass(formula),
        "dbe": unsaturation(formula),
        "against": _against(formula, _wanted(wanted)),
    }


def _labels(structure: Structure) -> dict[str, dict[int, str]]:
    """R or S by atom, E or Z by bond."""
    atoms, bonds = labels(structure)
    return {"atoms": atoms, "bonds": bonds}


def _wanted(given: object) -> Formula | None:
    """The formula of the sample, None while there is none that can be read: its own field says why."""
    written = text(given, "formula")
    try:
        return parse_formula(written) if written else None
    except FormulaError:
        return None


def _against(have: Formula, wanted: Formula | None) -> dict[str, Any] | None:
    if wanted is None:
        return None
    gap = shortfall(have, wanted)
    return {
        "formula": wanted.text,
        "needs": gap.needs.text,
        "over": gap.over.text,
        "dbe": unsaturation(wanted),
    }


def _told(option: Option, have: Formula, wanted: Formula | None) -> dict[str, Any]:
    told = {**asdict(option), "family": "", "fit": ""}
    if option.step == "attach":
        group, order = option.arguments["group"], option.arguments["order"]
        told["family"] = _family(group)
        if wanted:
            told["fit"] = fit_of(_joined(have, _group_formula(group), order), wanted)
    return told


def _joined(have: Formula, group: Formula, order: int) -> Formula:
    """Two formulas joined by a bond, for which each side gives ``order`` hydrogens."""
    counts = dict((have + group).parts)
    counts["H"] = counts.get("H", 0) - 2 * order
    return Formula.of(counts, have.charge + group.charge)


@cache
def _group_formula(smiles: str) -> Formula:
    return formula_of(read_structure(smiles))


@cache
def _family(smiles: str) -> str:
    held = _group_formula(smiles).elements
    return next((name for name, elements in _FAMILIES if held.keys() & set(elements)), "carbon alone")
