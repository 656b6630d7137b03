"""Chooses the scheme for each carbon of a structure."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.predict.carbon.alkene import estimate_alkene
from hoodside.predict.carbon.aromatic import estimate_aromatic
from hoodside.predict.carbon.classes import class_estimates
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.carbon.sp3 import estimate_sp3


def scheme_estimates(structure: Structure) -> dict[int, Estimate]:
    """The published-scheme estimate of every carbon, by atom index."""
    classes = class_estimates(structure)
    return {
        atom.index: classes.get(atom.index) or _by_bonding(structure, atom.index)
        for atom in structure.atoms
        if atom.symbol == "C"
    }


def _by_bonding(structure: Structure, atom: int) -> Estimate:
    if structure.atoms[atom].aromatic:
        return estimate_aromatic(structure, atom)
    for bond in structure.bonds_of[atom]:
        if bond.order == 2 and structure.atoms[bond.other(atom)].symbol == "C":
            return estimate_alkene(structure, atom, bond.other(atom))
    return estimate_sp3(structure, atom)
