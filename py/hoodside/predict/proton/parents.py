"""Rings whose every position is tabulated: aromatic parents and saturated or unsaturated rings."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Atom, Structure, read_structure
from hoodside.predict.atom_maps import atom_maps
from hoodside.predict.model import Term
from hoodside.predict.proton.patterns import match_patterns

_TOKEN = re.compile(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops]")
_AMINE = "[NX3;!$(N[CX3]=[O,S]);!$(N-c);!$(NS=O)]"


@dataclass(frozen=True, slots=True)
class Parent:
    """A tabulated ring with its hydrogens open to substitution."""

    name: str
    smarts: str
    shifts: tuple[tuple[int, float], ...]  # (position in the pattern, ppm)
    hydrogens: tuple[int, ...]  # H of the parent by position in the pattern
    in_ring: tuple[bool, ...]
    rings: frozenset[tuple[str, ...]]  # the rings as ``_ring_kinds`` tells them
    source: str


@dataclass(frozen=True, slots=True)
class Place:
    """One atom of a structure as a position of a parent."""

    name: str
    ppm: float
    source: str
    hydrogens: int  # H the parent has there
    in_ring: bool
    atoms: frozenset[int]  # atoms of the structure that the parent covers

    @property
    def term(self) -> Term:
        """The parent's value as the first step of a derivation."""
        return Term(self.name, self.ppm, self.source)


def find_places(structure: Structure) -> dict[int, Place]:
    """Per atom that bears H, its place in the largest parent found."""
    found: dict[int, Place] = {}
    there = _ring_kinds(structure)
    parents = [p for p in all_parents() if p.rings <= there] if there else []
    for parent, matches in zip(parents, match_patterns(structure, [p.smarts for p in parents]), strict=True):
        fresh: dict[int, list[tuple[float, int, frozenset[int]]]] = {}
        for match in matches:
            atoms = frozenset(match)
            for position, ppm in parent.shifts:
                fresh.setdefault(match[position], []).append((ppm, position, atoms))
        for atom, places in fresh.items():
            if atom not in found:
                found[atom] = _mean_place(parent, places)
    return found


def _mean_place(parent: Parent, places: list[tuple[float, int, frozenset[int]]]) -> Place:
    """Where a parent fits in several ways (a plain ring turned round), the mean value counts."""
    ppm = sum(p[0] for p in places) / len(places)
    position, atoms = places[0][1:]
    return Place(parent.name, ppm, parent.source, parent.hydrogens[position], parent.in_ring[position], atoms)


@cache
def all_parents() -> tuple[Parent, ...]:
    """Every tabulated parent, largest first."""
    grouped: dict[tuple[str, str], list[Row]] = {}
    for row in load_table("proton_heteroaromatic"):
        if row["row_type"] == "parent":
            grouped.setdefault((row["ring"], row["smiles_with_atom_map"]), []).append(row)
    for row in load_table("proton_rings"):
        if not row["conformer"]:
            grouped.setdefault((row["name"], row["smiles_with_atom_map"]), []).append(row)
    parents = [_parent(name, smiles, rows) for (name, smiles), rows in grouped.items()]
    return tuple(sorted(parents, key=lambda p: -len(p.hydrogens)))


def _parent(name: str, smiles: str, rows: list[Row]) -> Parent:
    plain = read_structure(smiles)
    maps = atom_maps(smiles)
    values = {row["atom_map"]: float(row["ppm"]) for row in rows}
    shifts = tuple((i, values[m]) for i, m in enumerate(maps) if m in values)
    opened = iter([_open_atom(plain, atom) for atom in plain.atoms])
    return Parent(
        name,
        _TOKEN.sub(lambda _: next(opened), smiles),
        shifts,
        tuple(atom.hydrogens for atom in plain.atoms),
        tuple(bool(plain.rings_of[atom.index]) for atom in plain.atoms),
        _ring_kinds(plain),
        rows[0]["source"],
    )


def _ring_kinds(structure: Structure) -> frozenset[tuple[str, ...]]:
    """Every ring as the sorted symbols of its atoms, aromatic ones small."""
    atoms = structure.atoms
    return frozenset(
        tuple(sorted(atoms[a].symbol.lower() if atoms[a].aromatic else atoms[a].symbol for a in ring))
        for ring in structure.rings
    )


def _open_atom(plain: Structure, atom: Atom) -> str:
    """SMARTS for one atom of a parent: what it must be, with its hydrogens free to be replaced."""
    if atom.charge:
        return f"[{atom.symbol.lower() if atom.aromatic else atom.symbol}{atom.charge:+d}]"
    if atom.aromatic:
        return _open_aromatic(plain, atom)
    if atom.symbol == "C":
        return _open_carbon(plain, atom)
    if atom.symbol == "N" and plain.rings_of[atom.index]:
        return "[NX3]" if _is_acylated(plain, atom) or len(plain.neighbours[atom.index]) > 2 else _AMINE
    if (
        atom.symbol == "O"
        and atom.hydrogens
        and any(_is_carbonyl(plain, n) for n in plain.neighbours[atom.index])
    ):
        return "[#7,#8]"
    hydroxyl = atom.symbol == "O" and atom.hydrogens
    return "[OX2H1]" if hydroxyl else f"[{atom.symbol};D{len(plain.neighbours[atom.index])}]"


def _open_aromatic(plain: Structure, atom: Atom) -> str:
    if atom.symbol != "N":
        return f"[{atom.symbol.lower()}]"
    return f"[nX{len(plain.neighbours[atom.index]) + atom.hydrogens};+0]"


def _open_carbon(plain: Structure, atom: Atom) -> str:
    orders = sorted(bond.order for bond in plain.bonds_of[atom.index])
    if plain.rings_of[atom.index]:
        return "[CX4;R]" if orders[-1] == 1 else "[CX3;R]"
    acyl_end = any(_is_carbonyl(plain, n) for n in plain.neighbours[atom.index])
    return (
        "[#6,#7,#8]" if acyl_end else "[CX4]" if orders[-1] == 1 else "[CX3]" if orders[-1] == 2 else "[CX2]"
    )


def _is_acylated(plain: Structure, atom: Atom) -> bool:
    return any(_is_carbonyl(plain, n) or plain.atoms[n].aromatic for n in plain.neighbours[atom.index])


def _is_carbonyl(plain: Structure, atom: int) -> bool:
    return any(b.order == 2 and plain.atoms[b.other(atom)].symbol == "O" for b in plain.bonds_of[atom])
