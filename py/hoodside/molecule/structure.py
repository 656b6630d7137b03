"""A structure as the engine sees it: atoms with their hydrogens, bonds, rings, stereo marks."""

from __future__ import annotations

import json
from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property, lru_cache
from typing import Any

from hoodside.molecule.elements import SYMBOLS
from hoodside.molecule.kernel import Matches, kernel
from hoodside.molecule.nuclides import check_nuclide
from hoodside.molecule.source import check_atoms, check_size


@dataclass(frozen=True, slots=True)
class Atom:
    """One atom. ``hydrogens`` counts the H folded in; ``stereo`` is "", "cw" or "ccw" (order of bonds)."""

    index: int
    symbol: str
    z: int
    hydrogens: int
    charge: int
    radicals: int
    isotope: int
    aromatic: bool
    stereo: str
    cip: str


@dataclass(frozen=True, slots=True)
class Bond:
    """One bond, kekulised (``order`` 1, 2, 3). ``stereo`` "", "cis" or "trans" refers to ``stereo_atoms``."""

    index: int
    a: int
    b: int
    order: int
    aromatic: bool
    stereo: str
    stereo_atoms: tuple[int, ...]

    def other(self, atom: int) -> int:
        """The atom at the far end."""
        return self.b if atom == self.a else self.a


class Structure:
    """An immutable molecule. Build it with ``read_structure``; atom indices are those of ``source``."""

    def __init__(self, source: str, graph: dict[str, Any]) -> None:
        self.source = source
        atoms, bonds, rings = _read_graph(graph)
        self.atoms: tuple[Atom, ...] = atoms
        self.bonds: tuple[Bond, ...] = bonds
        self.rings: tuple[tuple[int, ...], ...] = rings
        #: What other modules worked out about this structure, by a name of theirs.
        self.memo: dict[str, Any] = {}
        self._matches: dict[tuple[str, bool], Matches] = {}

    @cached_property
    def smiles(self) -> str:
        """Canonical isomeric SMILES."""
        return kernel().smiles(self.source)

    @cached_property
    def inchikey(self) -> str:
        """Standard InChIKey."""
        return kernel().inchikey(self.source)

    @cached_property
    def neighbours(self) -> tuple[tuple[int, ...], ...]:
        """Per atom, the indices of the atoms bonded to it."""
        return tuple(tuple(bond.other(i) for bond in self.bonds_of[i]) for i in range(len(self.atoms)))

    @cached_property
    def bonds_of(self) -> tuple[tuple[Bond, ...], ...]:
        """Per atom, its bonds."""
        lists: list[list[Bond]] = [[] for _ in self.atoms]
        for bond in self.bonds:
            lists[bond.a].append(bond)
            lists[bond.b].append(bond)
        return tuple(tuple(entry) for entry in lists)

    @cached_property
    def rings_of(self) -> tuple[tuple[int, ...], ...]:
        """Per atom, the sizes of the rings (smallest set) it belongs to, ascending."""
        sizes: list[list[int]] = [[] for _ in self.atoms]
        for ring in self.rings:
            for atom in ring:
                sizes[atom].append(len(ring))
        return tuple(tuple(sorted(entry)) for entry in sizes)

    @cached_property
    def element_counts(self) -> dict[str, int]:
        """Element symbol -> number of atoms, hydrogens included (isotope labels ignored)."""
        counts: dict[str, int] = {}
        for atom in self.atoms:
            counts[atom.symbol] = counts.get(atom.symbol, 0) + 1
            if atom.hydrogens:
                counts["H"] = counts.get("H", 0) + atom.hydrogens
        return counts

    @property
    def charge(self) -> int:
        """Net charge in units of e."""
        return sum(atom.charge for atom in self.atoms)

    def bond_between(self, a: int, b: int) -> Bond | None:
        """The bond from ``a`` to ``b``, or None."""
        return next((bond for bond in self.bonds_of[a] if bond.other(a) == b), None)

    def matches(self, smarts: str, unique: bool = True) -> Matches:
        """All matches of one SMARTS pattern (atom indices in pattern order), remembered."""
        return self.match_all([smarts], unique)[0]

    def match_all(self, smarts: Sequence[str], unique: bool = True) -> list[Matches]:
        """Matches of many patterns in one call to the kernel: ask for a whole table at once."""
        missing = [s for s in dict.fromkeys(smarts) if (s, unique) not in self._matches]
        if missing:
            for pattern, found in zip(missing, kernel().matches(self.source, missing, unique), strict=True):
                self._matches[pattern, unique] = found
        return [self._matches[s, unique] for s in smarts]

    def release(self) -> None:
        """Let go of the remembered matches, most of what it holds; asked for again, they are found anew."""
        self._matches.clear()

    def distances_from(self, atom: int) -> tuple[int, ...]:
        """Number of bonds from ``atom`` to every atom (-1: not connected)."""
        found = [-1] * len(self.atoms)
        found[atom] = 0
        queue = [atom]
        for here in queue:
            for there in self.neighbours[here]:
                if found[there] < 0:
                    found[there] = found[here] + 1
                    queue.append(there)
        return tuple(found)


#: Structures just read: a search, the tests it makes and the prediction ask for the same one in turn.
_KEPT = 64


@lru_cache(maxsize=_KEPT)
def read_structure(source: str) -> Structure:
    """Read a SMILES, a CTfile or an RDKit JSON graph; what was read just now is at hand still.

    Raises: StructureError when the text is empty, larger than the kernels survive, no molecule, or holds an
    atom without a mass.
    """
    structure = read_marked(source)
    for atom in structure.atoms:
        check_nuclide(atom.symbol, atom.isotope, source)
    return structure


def read_marked(source: str) -> Structure:
    """As ``read_structure``, for sources of the program's own whose mass numbers are marks.

    Raises: StructureError when the text is empty, larger than the kernels survive, or no molecule.
    """
    check_size(source)
    source = source.strip() if "\n" not in source.strip() else source
    structure = Structure(source, json.loads(kernel().graph_json(source)))
    check_atoms(len(structure.atoms), source)
    return structure


def _read_graph(
    graph: dict[str, Any],
) -> tuple[tuple[Atom, ...], tuple[Bond, ...], tuple[tuple[int, ...], ...]]:
    molecule = graph["molecules"][0]
    extension: dict[str, Any] = next(
        (e for e in molecule.get("extensions", []) if e["name"] == "rdkitRepresentation"), {}
    )
    aromatic_atoms = set(extension.get("aromaticAtoms", ()))
    aromatic_bonds = set(extension.get("aromaticBonds", ()))
    cip = dict(extension.get("cipCodes", ()))
    atom_defaults, bond_defaults = graph["defaults"]["atom"], graph["defaults"]["bond"]
    atoms = tuple(
        _atom(i, {**atom_defaults, **raw}, i in aromatic_atoms, cip.get(i, ""))
        for i, raw in enumerate(molecule.get("atoms", ()))
    )
    bonds = tuple(
        _bond(i, {**bond_defaults, **raw}, i in aromatic_bonds)
        for i, raw in enumerate(molecule.get("bonds", ()))
    )
    return atoms, bonds, tuple(tuple(ring) for ring in extension.get("atomRings", ()))


def _atom(index: int, raw: dict[str, Any], aromatic: bool, cip: str) -> Atom:
    return Atom(
        index=index,
        symbol=SYMBOLS[raw["z"]],
        z=raw["z"],
        hydrogens=raw["impHs"],
        charge=raw["chg"],
        radicals=raw["nRad"],
        isotope=raw["isotope"],
        aromatic=aromatic,
        stereo="" if raw["stereo"] == "unspecified" else raw["stereo"],
        cip=cip,
    )


def _bond(index: int, raw: dict[str, Any], aromatic: bool) -> Bond:
    a, b = raw["atoms"]
    return Bond(
        index=index,
        a=a,
        b=b,
        order=raw["bo"],
        aromatic=aromatic,
        stereo=raw["stereo"] if raw["stereo"] in ("cis", "trans") else "",
        stereo_atoms=tuple(raw.get("stereoAtoms", ())),
    )
