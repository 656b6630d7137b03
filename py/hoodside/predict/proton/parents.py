"""Rings whose every position is tabulated: aromatic parents and saturated or unsaturated rings."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.model import Term
from hoodside.predict.proton.patterns import match_patterns


@dataclass(frozen=True, slots=True)
class Parent:
    """A tabulated ring with its hydrogens open to substitution."""

    name: str
    smarts: str
    shifts: tuple[tuple[int, float], ...]  # (position in the pattern, ppm)
    hydrogens: tuple[int, ...]  # H of the parent by position in the pattern
    in_ring: tuple[bool, ...]
    rings: frozenset[tuple[str, ...]]  # the rings as ``ring_kinds`` tells them
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
    there = ring_kinds(structure)
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
    """Every tabulated parent, largest first (facts/proton_parents.csv, made from the two ring tables)."""
    return tuple(_read(row) for row in load_table("proton_parents"))


def _read(row: Row) -> Parent:
    shifts = (pair.split(":") for pair in row["shifts"].split())
    return Parent(
        row["name"],
        row["smarts"],
        tuple((int(position), float(ppm)) for position, ppm in shifts),
        tuple(map(int, row["hydrogens"].split())),
        tuple(flag == "1" for flag in row["in_ring"].split()),
        frozenset(tuple(ring.split(".")) for ring in row["rings"].split()),
        row["source"],
    )


def ring_kinds(structure: Structure) -> frozenset[tuple[str, ...]]:
    """Every ring as the sorted symbols of its atoms, aromatic ones small."""
    atoms = structure.atoms
    return frozenset(
        tuple(sorted(atoms[a].symbol.lower() if atoms[a].aromatic else atoms[a].symbol for a in ring))
        for ring in structure.rings
    )
