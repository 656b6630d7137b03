"""Growing a structure by touch: what can be done at a place, doing it, and the tiles to begin from."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.facts import load_table
from hoodside.methods.arguments import integer, short_text
from hoodside.methods.structures import structure_of
from hoodside.molecule import Structure, drawing
from hoodside.molecule.edit import apply
from hoodside.molecule.edit_options import options_at
from hoodside.predict.formula import exact_mass, formula_of, unsaturation

_LEAST_SIDE, _MOST_SIDE = 16, 4000


def tiles() -> dict[str, Any]:
    """Structures to begin from."""
    rows = load_table("starting_tiles")
    return {"tiles": [{key: row[key] for key in ("name", "smiles")} for row in rows]}


def options(structure: str, atom: int | None = None, bond: int | None = None) -> dict[str, Any]:
    """What can be done at one atom or one bond, most likely first."""
    found = structure_of(structure)
    chosen = {"atom": atom, "bond": bond}
    picked = {key: integer(value, key, 0, 10**6) for key, value in chosen.items() if value is not None}
    return {"options": [asdict(option) for option in options_at(found, **picked)]}


def edit(
    structure: str, step: str, arguments: dict[str, Any], width: int = 360, height: int = 300
) -> dict[str, Any]:
    """The structure after one editing step, drawn afresh."""
    if not isinstance(arguments, dict):
        raise InvalidInputError(
            "The step has no arguments.", hint='Give {"atom": 0, ...}.', field="arguments"
        )
    return _canvas(apply(structure_of(structure), short_text(step, "step"), arguments), width, height)


def canvas(structure: str, width: int = 360, height: int = 300) -> dict[str, Any]:
    """A structure laid out for touching: the drawing, where atoms and bonds stand, formula so far."""
    return _canvas(structure_of(structure), width, height)


def _canvas(structure: Structure, width: int, height: int) -> dict[str, Any]:
    wide = integer(width, "width", _LEAST_SIDE, _MOST_SIDE)
    high = integer(height, "height", _LEAST_SIDE, _MOST_SIDE)
    drawn = drawing.draw(structure, wide, high)
    formula = formula_of(structure)
    return {
        "source": structure.source,
        "smiles": structure.smiles,
        "svg": drawn.svg,
        "coords": [list(place) for place in drawn.coords],
        "atoms": [{"symbol": a.symbol, "hydrogens": a.hydrogens} for a in structure.atoms],
        "bonds": [[b.a, b.b, b.order] for b in structure.bonds],
        "formula": formula.text,
        "formula_parts": [list(part) for part in formula.parts],
        "exact_mass": exact_mass(formula),
        "dbe": unsaturation(formula),
    }
