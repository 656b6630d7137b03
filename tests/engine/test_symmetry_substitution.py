"""Symmetry against the substitution test done literally with RDKit: label, canonicalise, compare mirrors.

Only labels that leave no stereocentre open can be compared by SMILES; textbook cases cover the rest.
"""

from __future__ import annotations

import json
from itertools import combinations
from pathlib import Path

import pytest
from rdkit import Chem

from hoodside.molecule import read_structure
from hoodside.molecule.symmetry import atom_classes, hydrogen_sets

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
SMILES = sorted({s for case in CASES for s in (case["smiles"], *case["rivals"])})[::5]
CW, CCW = Chem.ChiralType.CHI_TETRAHEDRAL_CW, Chem.ChiralType.CHI_TETRAHEDRAL_CCW
ASTATINE = 85


def is_open(mol: Chem.Mol) -> bool:
    unspecified = Chem.StereoSpecified.Unspecified
    return any(unit.specified == unspecified for unit in Chem.FindPotentialStereo(mol))


def both_hands(mol: Chem.Mol) -> frozenset[str]:
    mirror = Chem.Mol(mol)
    for atom in mirror.GetAtoms():
        if atom.GetChiralTag() in (CW, CCW):
            atom.InvertChirality()
    return frozenset(Chem.CanonSmiles(Chem.MolToSmiles(m)) for m in (mol, mirror))


def labelled(mol: Chem.Mol, index: int) -> Chem.Mol:
    copy = Chem.Mol(mol)
    copy.GetAtomWithIdx(index).SetIsotope(200)
    Chem.AssignStereochemistry(copy, True, True)
    return copy


def substituted(mol: Chem.Mol, index: int, tag: Chem.ChiralType) -> Chem.Mol:
    """The molecule with one H of CH2 number ``index`` replaced, in the orientation ``tag``."""
    copy = Chem.RWMol(mol)
    copy.AddBond(index, copy.AddAtom(Chem.Atom(ASTATINE)), Chem.BondType.SINGLE)
    copy.GetAtomWithIdx(index).SetChiralTag(tag)
    made = copy.GetMol()
    Chem.SanitizeMol(made)
    Chem.AssignStereochemistry(made, True, True)
    return made


@pytest.mark.parametrize("smiles", SMILES)
def test_carbons_agree_with_labelling(smiles: str) -> None:
    mol = Chem.MolFromSmiles(smiles)
    classes = atom_classes(read_structure(smiles))
    carbons = [a.GetIdx() for a in mol.GetAtoms() if a.GetAtomicNum() == 6]
    named = {i: both_hands(m) for i in carbons if not is_open(m := labelled(mol, i))}
    for i, j in combinations(named, 2):
        assert (named[i] == named[j]) == (classes[i] == classes[j]), (i, j)


@pytest.mark.parametrize("smiles", SMILES)
def test_methylene_hydrogens_agree_with_substitution(smiles: str) -> None:
    mol = Chem.MolFromSmiles(smiles)
    sets = hydrogen_sets(read_structure(smiles))
    for atom in mol.GetAtoms():
        if atom.GetAtomicNum() != 6 or atom.GetTotalNumHs() != 2 or atom.GetDegree() != 2 or is_open(mol):
            continue
        index = atom.GetIdx()
        one, other = substituted(mol, index, CW), substituted(mol, index, CCW)
        if not is_open(one) and not is_open(other):
            apart = both_hands(one) != both_hands(other)
            assert sum(index in s.atoms for s in sets) == (2 if apart else 1), index
