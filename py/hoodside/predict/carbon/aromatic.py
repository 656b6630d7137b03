"""Aromatic carbons: the parent ring's value + increments by position on the ring.

Benzene increments: Ewing, Org. Magn. Reson. 1979, 12, 499, and the tables of Pretsch, Buhlmann and
Badertscher (facts/carbon_benzene.csv). Heteroaromatic and fused parents: facts/carbon_heteroaromatic.csv.
"""

from __future__ import annotations

from functools import cache
from typing import NamedTuple

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure, read_structure
from hoodside.predict.atom_maps import atom_maps, open_pattern
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.carbon.substituents import Pattern, Substituents, patterns_of, substituents_in
from hoodside.predict.model import Term

_POSITIONS = ("ipso", "ortho", "meta", "para")


class Parent(NamedTuple):
    """An unsubstituted aromatic ring system with the tabulated shift of each of its carbons."""

    name: str
    smarts: str
    ppm: tuple[tuple[int, float], ...]  # (position in the pattern, ppm)
    size: int
    source: str


def estimate_aromatic(structure: Structure, atom: int) -> Estimate:
    """Parent value + increments for an aromatic carbon, in ppm from TMS."""
    name, base = parent_value(structure, atom)
    groups = substituents_in(structure, "carbon_benzene", _patterns())
    ring_atoms = {a.index for a in structure.atoms if a.aromatic}
    terms = [base]
    for ring in structure.rings:
        if atom in ring and all(a in ring_atoms for a in ring):
            terms += _ring_terms(structure, groups, ring, atom, ring_atoms)
    return Estimate(f"aromatic {name}", tuple(terms))


def _ring_terms(
    structure: Structure, groups: Substituents, ring: tuple[int, ...], atom: int, aromatic: set[int]
) -> list[Term]:
    terms = []
    here = ring.index(atom)
    for place, member in enumerate(ring):
        steps = abs(place - here)
        position = _POSITIONS[min(steps, len(ring) - steps)]
        for near in structure.neighbours[member]:
            if near in ring or _fused(structure, member, near, aromatic):
                continue
            found = groups.at(near, set(ring))
            row = found.pattern.row if found else _fallback(structure, near)
            terms.append(Term(f"{position} {row['substituent']}", float(row[position]), row["source"]))
    return terms


def _fused(structure: Structure, member: int, near: int, aromatic: set[int]) -> bool:
    bond = structure.bond_between(member, near)
    return near in aromatic and bond is not None and bond.aromatic


def _fallback(structure: Structure, atom: int) -> Row:
    """The plainest tabulated substituent of the same element."""
    symbol = structure.atoms[atom].symbol
    plain = {"C": "CH2CH3", "N": "N(CH3)2", "O": "OCH3", "S": "SCH3", "Si": "Si(CH3)3", "P": "PO(OEt)2"}
    return _benzene().get(plain.get(symbol, ""), _benzene()["H"])


def parent_value(structure: Structure, atom: int) -> tuple[str, Term]:
    """Name of the largest tabulated ring system holding the atom, and the value it has there."""
    found = _parents_in(structure).get(atom)
    if found is not None:
        return found
    row = _benzene()["base (benzene)"]
    return "other", Term("benzene", float(row["ipso"]), row["source"])


def _parents_in(structure: Structure) -> dict[int, tuple[str, Term]]:
    if "carbon parents" not in structure.memo:
        fresh: dict[int, tuple[str, Term]] = {}
        for parent, places in zip(
            _parents(), structure.match_all([p.smarts for p in _parents()], unique=False), strict=True
        ):
            _note(fresh, parent, places)
        structure.memo["carbon parents"] = fresh
    known: dict[int, tuple[str, Term]] = structure.memo["carbon parents"]
    return known


def _note(known: dict[int, tuple[str, Term]], parent: Parent, places: tuple[tuple[int, ...], ...]) -> None:
    """Keep the value of the largest parent per atom; parents come largest first."""
    fresh: dict[int, tuple[str, Term]] = {}
    for place in places:
        for index, ppm in parent.ppm:
            fresh.setdefault(place[index], (parent.name, Term(parent.name, ppm, parent.source)))
    for atom, value in fresh.items():
        known.setdefault(atom, value)


@cache
def _parents() -> tuple[Parent, ...]:
    rows: dict[str, list[Row]] = {}
    for row in load_table("carbon_heteroaromatic"):
        rows.setdefault(row["smiles_with_atom_map"], []).append(row)
    found = [p for smiles, members in rows.items() if (p := _parent(smiles, members)) is not None]
    benzene = _benzene()["base (benzene)"]
    found.append(
        Parent(
            "benzene", "c1ccccc1", tuple((i, float(benzene["ipso"])) for i in range(6)), 6, benzene["source"]
        )
    )
    return tuple(sorted(found, key=lambda p: p.size, reverse=True))


def _parent(smiles: str, rows: list[Row]) -> Parent | None:
    plain = read_structure(smiles)
    if not all(atom.aromatic or _terminal_oxygen(plain, atom.index) for atom in plain.atoms):
        return None
    maps = atom_maps(smiles)
    values = {row["atom_map"]: float(row["ppm"]) for row in rows}
    ppm = tuple((i, values[m]) for i, m in enumerate(maps) if m in values)
    return Parent(rows[0]["ring"], open_pattern(smiles), ppm, len(plain.atoms), rows[0]["source"])


def _terminal_oxygen(structure: Structure, atom: int) -> bool:
    """The O of a pyridone or an N-oxide, part of the parent."""
    oxygen = structure.atoms[atom]
    return oxygen.symbol == "O" and not oxygen.hydrogens and len(structure.neighbours[atom]) == 1


@cache
def _benzene() -> dict[str, Row]:
    return {row["substituent"]: row for row in load_table("carbon_benzene")}


@cache
def _patterns() -> tuple[Pattern, ...]:
    return patterns_of([row for name, row in _benzene().items() if name != "base (benzene)" and name != "H"])
