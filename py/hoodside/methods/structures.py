"""Structures: describing, drawing, finding by name."""

from __future__ import annotations

from typing import Any

from hoodside.errors import StructureError
from hoodside.methods.arguments import integer, integers, short_text
from hoodside.molecule import Structure, drawing, read_structure
from hoodside.molecule.kernel import kernel
from hoodside.predict.formula import (
    average_mass,
    exact_mass,
    formula_doubts,
    formula_of,
    unsaturation,
)

_WIDTH, _HEIGHT = 300, 200
_LEAST_SIDE, _MOST_SIDE = 16, 4000
#: Longest a bond is drawn, pixels: one or two atoms do not fill a card.
_LONGEST_BOND = 60


def structure_of(value: object, field: str = "structure") -> Structure:
    """The structure a SMILES or CTfile stands for. Raises: StructureError naming the field."""
    source = short_text(value, field, most=200_000)
    if source.strip().startswith(("InChI=", "1S/")):
        raise StructureError(
            "InChI cannot be read here.",
            hint="Paste the SMILES or a CTfile of the same compound.",
            field=field,
            value=source,
        )
    try:
        return read_structure(source)
    except StructureError as err:
        err.field = err.field or field
        raise


def describe(structure: str) -> dict[str, Any]:
    """All that is known of a structure without measuring anything; masses in u."""
    found = structure_of(structure)
    formula = formula_of(found)
    degree = unsaturation(formula)
    atoms, bonds = kernel().stereo_labels(found.source)
    return {
        "source": found.source,
        "smiles": found.smiles,
        "formula": formula.text,
        "formula_parts": [list(part) for part in formula.parts],
        "exact_mass": exact_mass(formula),
        "average_mass": average_mass(formula),
        "dbe": degree,
        "charge": found.charge,
        "inchi": kernel().inchi(found.source),
        "inchikey": found.inchikey,
        "svg": drawing.draw(found, _WIDTH, _HEIGHT).svg,
        "heavy_atoms": sum(1 for atom in found.atoms if atom.symbol != "H"),
        "stereocentres": [{"atom": atom, "label": label} for atom, label in sorted(atoms.items())],
        "double_bonds": [{"atoms": list(ends), "label": label} for ends, label in sorted(bonds.items())],
        "warnings": [*_pieces(found), *formula_doubts(formula)],
    }


def _pieces(structure: Structure) -> list[str]:
    if not structure.atoms or all(step >= 0 for step in structure.distances_from(0)):
        return []
    return ["The structure is in several pieces (a salt or a mixture); readings are weighed for all of them."]


def draw(
    structure: str,
    width: int = _WIDTH,
    height: int = _HEIGHT,
    atoms: list[int] | None = None,
    bonds: list[int] | None = None,
) -> dict[str, Any]:
    """A drawing in one ink; ``coords`` give x, y of each atom in its pixels."""
    found = drawing.draw(
        structure_of(structure),
        integer(width, "width", _LEAST_SIDE, _MOST_SIDE),
        integer(height, "height", _LEAST_SIDE, _MOST_SIDE),
        integers(atoms, "atoms"),
        integers(bonds, "bonds"),
        longest_bond=_LONGEST_BOND,
    )
    return {"svg": found.svg, "coords": [list(place) for place in found.coords]}


def names(query: str, limit: int = 20) -> dict[str, Any]:
    """Common names that hold the query, best first."""
    from hoodside.names import exact_name, find_names

    asked = short_text(query, "query")
    found = find_names(asked, integer(limit, "limit", 1, 500))
    exact = exact_name(asked)
    systematic = [exact] if exact and not exact.formula else []  # not of the table, so told first
    return {
        "names": [
            {
                "name": entry.name,
                "smiles": entry.smiles,
                "formula": entry.formula or formula_of(structure_of(entry.smiles)).text,
                "source": entry.source,
            }
            for entry in (*systematic, *found)
        ]
    }
