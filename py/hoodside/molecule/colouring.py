"""Colours of atoms by connectivity: the first, cheap half of finding what is equivalent to what.

Colour refinement after Morgan (J. Chem. Doc. 1965, 5, 107). Kekule forms make no difference: aromatic
bonds carry one label, and charges that resonance spreads (aromatic ions, carboxylate, nitro, amidinium)
are spread here too.
"""

from __future__ import annotations

from collections.abc import Hashable, Iterable

from hoodside.molecule.structure import Atom, Bond, Structure

_AROMATIC = 4
_SPREAD = 5
_CHALCOGENS = frozenset({8, 16, 34})


class Connectivity:
    """Atoms and bonds of a structure as labels, mesomeric forms merged.

    Attributes:
        atom_labels: per atom, what it is on its own.
        bond_labels: (atom, atom) both ways round -> what joins them.
    """

    def __init__(self, structure: Structure) -> None:
        spread_atoms, spread_bonds = _resonance(structure)
        self.neighbours = structure.neighbours
        self.atom_labels = [
            _atom_label(atom, structure, atom.index in spread_atoms) for atom in structure.atoms
        ]
        self.bond_labels: dict[tuple[int, int], int] = {}
        for bond in structure.bonds:
            label = _SPREAD if bond.index in spread_bonds else _AROMATIC if bond.aromatic else bond.order
            self.bond_labels[bond.a, bond.b] = self.bond_labels[bond.b, bond.a] = label

    def refined(self) -> list[int]:
        """Colour per atom once every atom has seen as far as it can."""
        colours = _ranks(self.atom_labels)
        kinds = max(colours, default=-1) + 1
        around = [
            [(self.bond_labels[i, j], j) for j in neighbours] for i, neighbours in enumerate(self.neighbours)
        ]
        while kinds < len(colours):
            seen = [
                (colours[i], *sorted([label << 16 | colours[j] for label, j in entry]))
                for i, entry in enumerate(around)
            ]
            colours = _ranks(seen)
            if (grown := max(colours) + 1) == kinds:
                break
            kinds = grown
        return colours


def _atom_label(atom: Atom, structure: Structure, spread: bool) -> tuple[int, ...]:
    charge = 99 if spread else 0 if atom.aromatic else atom.charge
    degree = len(structure.neighbours[atom.index])
    return (atom.z, atom.isotope, charge, atom.radicals, atom.hydrogens, degree, atom.aromatic)


def _ranks(keys: Iterable[Hashable]) -> list[int]:
    keys = list(keys)
    order = {key: rank for rank, key in enumerate(sorted(set(keys)))}  # type: ignore[type-var]
    return [order[key] for key in keys]


def _resonance(structure: Structure) -> tuple[set[int], set[int]]:
    """Atoms and bonds over which a charge or a double bond is spread outside aromatic rings."""
    atoms: set[int] = set()
    bonds: set[int] = set()
    for atom in structure.atoms:
        for group in (_terminal_chalcogens(structure, atom), _amidinium(structure, atom)):
            if len({bond.order for bond in group}) > 1:
                bonds.update(bond.index for bond in group)
                atoms.update(bond.other(atom.index) for bond in group)
    return atoms, bonds


def _terminal_chalcogens(structure: Structure, centre: Atom) -> list[Bond]:
    """Bonds of carboxylate, nitro, sulfonate and their like: bare =O and -O(-) on one atom."""
    return [
        bond
        for bond in structure.bonds_of[centre.index]
        if (far := structure.atoms[bond.other(centre.index)]).z in _CHALCOGENS
        and not far.hydrogens
        and len(structure.neighbours[far.index]) == 1
        and bond.order - far.charge == 2
    ]


def _amidinium(structure: Structure, centre: Atom) -> list[Bond]:
    """Bonds C=N(+) and C-N of one carbon (amidinium, guanidinium, iminium next to an amine)."""
    if centre.z != 6:
        return []
    group = [b for b in structure.bonds_of[centre.index] if structure.atoms[b.other(centre.index)].z == 7]
    cationic = any(b.order == 2 and structure.atoms[b.other(centre.index)].charge == 1 for b in group)
    return group if cationic else []
