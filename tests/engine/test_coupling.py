"""Couplings: shapes against embedded 3D structures, Karplus relation, and how nuclei gather into groups."""

from __future__ import annotations

import math

import pytest
from rdkit import Chem
from rdkit.Chem import AllChem, rdMolTransforms

from hoodside.molecule import read_structure
from hoodside.predict.coupling import karplus, predict_couplings, site_couplings
from hoodside.predict.coupling.conformers import ring_torsions
from hoodside.predict.coupling.gates import features, needs, without_conditions
from hoodside.predict.coupling.shape import Shapes
from hoodside.predict.coupling.table import rules
from hoodside.predict.model import ProtonGroup
from hoodside.predict.proton import predict_protons


def embedded(smiles: str) -> Chem.Mol:
    molecule = Chem.AddHs(Chem.MolFromSmiles(smiles))
    assert AllChem.EmbedMolecule(molecule, randomSeed=7) == 0
    AllChem.MMFFOptimizeMolecule(molecule)
    return molecule


def only_hydrogen(molecule: Chem.Mol, atom: int) -> int:
    return next(n.GetIdx() for n in molecule.GetAtomWithIdx(atom).GetNeighbors() if n.GetAtomicNum() == 1)


CHIRAL_PAIRS = [
    "C[C@H](O)[C@@H](F)Cl",
    "C[C@H](O)[C@H](F)Cl",
    "[C@H](O)(C)[C@@H](F)Cl",
    "N[C@@H](C)[C@](O)([H])CC",
    "O[C@@H]1CCCC[C@H]1N",
    "O[C@H]1CCCC[C@H]1N",
    "C[C@H]1CO[C@@H](Cl)[C@@H]1F",
    "[C@@H]1(O)[C@H](F)CCC1",
]


@pytest.mark.parametrize("smiles", CHIRAL_PAIRS)
def test_newman_angles_agree_with_an_embedded_structure(smiles: str) -> None:
    structure, molecule = read_structure(smiles), embedded(smiles)
    shapes, conformer = Shapes(structure), molecule.GetConformer()
    checked = 0
    for bond in structure.bonds:
        a, b = bond.a, bond.b
        if not all(structure.atoms[x].hydrogens == 1 and structure.atoms[x].z == 6 for x in (a, b)):
            continue
        front = shapes.angles(a, b)
        rear = {p: -t for p, t in shapes.angles(b, a).items()}
        p = next(x for x in front if x >= 0)
        q = next(x for x in rear if x >= 0)
        omega = rdMolTransforms.GetDihedralDeg(conformer, p, a, b, q)
        found = omega + (rear[~b] - rear[q]) - (front[~a] - front[p])
        h = only_hydrogen(molecule, a), only_hydrogen(molecule, b)
        true = rdMolTransforms.GetDihedralDeg(conformer, h[0], a, b, h[1])
        assert abs((found - true + 180) % 360 - 180) < 20
        checked += 1
    assert checked


@pytest.mark.parametrize(
    ("smiles", "same"),
    [
        ("C[C@H]1C[C@@H]1O", None),
        ("C[C@H]1C[C@H]1O", None),
        ("O[C@@H]1CCCC[C@H]1F", None),
        ("O[C@H]1C[C@@H](F)C1", None),
    ],
)
def test_ring_faces_agree_with_an_embedded_structure(smiles: str, same: None) -> None:
    structure, molecule = read_structure(smiles), embedded(smiles)
    ring = structure.rings[0]
    faces = Shapes(structure).faces(ring)
    positions = molecule.GetConformer().GetPositions()
    centre = positions[list(ring)].mean(axis=0)
    normal = sum(
        _cross(positions[ring[k]] - centre, positions[ring[(k + 1) % len(ring)]] - centre)
        for k in range(len(ring))
    )
    sides = []
    for atom in ring:
        if ~atom in faces:
            h = only_hydrogen(molecule, atom)
            sides.append(faces[~atom] * math.copysign(1, float((positions[h] - positions[atom]) @ normal)))
    assert len(sides) == 2
    assert sides[0] == sides[1]


def _cross(a, b):  # type: ignore[no-untyped-def]
    import numpy as np

    return np.cross(a, b)


def test_karplus_extremes() -> None:
    """Antiperiplanar couplings are largest and those near 90 degrees smallest (Karplus 1963)."""
    values = {phi: karplus.vicinal(phi, []) for phi in range(0, 181, 10)}
    assert max(values, key=values.__getitem__) == 180
    assert min(values, key=values.__getitem__) in (80, 90)
    assert values[0] < values[180]


def test_group_antiperiplanar_to_a_coupled_hydrogen_lowers_a_gauche_coupling_most() -> None:
    """Booth, Tetrahedron Lett. 1965, 411: the effect is largest in the planar zig-zag H-C-C-X."""
    anti, gauche = karplus.vicinal(60, [(1.4, -1)]), karplus.vicinal(60, [(1.4, 1)])
    assert anti < karplus.vicinal(60, []) - 1.5
    assert gauche > anti + 1.5


def test_relation_is_the_same_seen_from_either_end() -> None:
    for phi in (-170, -60, 20, 75):
        assert karplus.vicinal(phi, [(1.4, 1)]) == pytest.approx(karplus.vicinal(-phi, [(1.4, -1)]))


@pytest.mark.parametrize("size", [3, 4, 5, 6, 7, 8])
def test_ring_templates_come_in_mirror_pairs(size: int) -> None:
    for planar in ((), (0,), (2,)):
        shapes = ring_torsions(size, planar)
        assert all(len(s) == size for s in shapes)
        assert sum(sum(s) for s in shapes) == pytest.approx(0, abs=1e-6)
        for place in planar:
            assert all(abs(s[place]) < 1e-9 for s in shapes)


def test_every_row_in_use_has_a_path_that_parses_and_values_in_order() -> None:
    benzene = read_structure("c1ccccc1")
    benzene.match_all([rule.smarts for rule in rules()])
    for rule in rules():
        assert rule.geometry in ("", "cis", "trans")
        assert rule.estimate.sd > 0
        assert 1 <= rule.bonds <= 5


def couplings(
    smiles: str, solvent: str = "CDCl3"
) -> tuple[tuple[ProtonGroup, ...], list[tuple[int, int, float, int]]]:
    structure = read_structure(smiles)
    groups = predict_protons(structure, solvent)
    found = predict_couplings(structure, groups, solvent)
    return groups, [(c.a, c.b, c.hz, c.pairs) for c in found]


def test_pairs_are_counted_between_nuclei() -> None:
    _, found = couplings("CCBr")
    pairs = {(a, b): n for a, b, _, n in found}
    assert pairs[0, 1] == 6
    assert pairs[1, 1] == 1


def test_para_disubstituted_benzene_is_not_magnetically_equivalent() -> None:
    groups, found = couplings("Clc1ccc(C#N)cc1")
    between = sorted(hz for a, b, hz, _ in found if a != b)
    within = [hz for a, b, hz, _ in found if a == b]
    assert len(groups) == 2
    assert between[0] < 1.0 < 8.0 < between[1] < 9.0
    assert all(1.0 < hz < 3.0 for hz in within)
    assert len(within) == 2


def test_exchange_decides_whether_an_alcohol_couples() -> None:
    def with_oh(solvent: str) -> bool:
        groups, found = couplings("CCO", solvent)
        oh = next(k for k, g in enumerate(groups) if g.exchangeable)
        return any(oh in (a, b) for a, b, _, _ in found)

    assert not with_oh("CDCl3")
    assert with_oh("DMSO-d6")
    assert not with_oh("CD3OD")


def test_amide_hydrogens_couple_in_chloroform_but_not_in_methanol() -> None:
    def partners(solvent: str) -> int:
        groups, found = couplings("CC(=O)NC", solvent)
        nh = next(k for k, g in enumerate(groups) if g.exchangeable)
        return sum(nh in (a, b) and hz > 3 for a, b, hz, _ in found)

    assert partners("CDCl3") == 1
    assert partners("CD3OD") == 0


def test_fluorine_couplings_name_their_atoms() -> None:
    structure = read_structure("FCC")
    groups = predict_protons(structure)
    hetero = [c for c in predict_couplings(structure, groups) if c.b < 0]
    assert {c.hetero for c in hetero} == {(0,)}
    geminal = max(c.hz for c in hetero)
    assert 44 <= geminal <= 52
    assert all(c.pairs == groups[c.a].n for c in hetero)


def test_all_three_fluorines_of_a_trifluoromethyl_group_couple() -> None:
    structure = read_structure("FC(F)(F)CO")
    hetero = [c for c in predict_couplings(structure, predict_protons(structure)) if c.b < 0]
    assert [(len(c.hetero), c.pairs) for c in hetero] == [(3, 6)]
    assert hetero[0].hz == pytest.approx(9, abs=1)


@pytest.mark.parametrize(
    "smiles", ["C/C=C/C", "CC=CC", "C1CC2CCC1C2", "C1=CC=CC=CC=C1", "[2H]C", "N#N", "CC#CC"]
)
def test_unusual_structures_are_answered(smiles: str) -> None:
    for c in site_couplings(read_structure(smiles)):
        assert math.isfinite(c.estimate.hz)
        assert c.estimate.sd > 0


MIXED = [
    "FC(F)(F)CO",
    "COP(=O)(OC)OC",
    "C[Si](C)(C)C=C",
    "Cc1ccoc1",
    "Cc1cscc1",
    "C=C=CC",
    "C#CC#C",
    "O=CNC",
    "Cn1cncc1",
    "C1CO1",
    "CC1CCC1O",
    "C1=CCCC=C1",
    "c1ccc2ncccc2c1",
    "CC(=O)Nc1ccc2[nH]ccc2c1",
    "OC1CCCCC1F",
    "O=C1C=CCCC1",
    "CC(C)=CC=O",
]


@pytest.mark.parametrize("smiles", MIXED)
def test_no_row_that_matches_is_left_out_beforehand(smiles: str) -> None:
    structure = read_structure(smiles)
    there = features(structure)
    for rule, found in zip(rules(), structure.match_all([r.smarts for r in rules()]), strict=True):
        assert not found or needs(rule.smarts) <= there, rule.smarts


def test_conditions_are_cut_out_of_a_pattern() -> None:
    assert without_conditions("[CH3]-[CH2;$(C(-[CH3])-!@[CX4])]") == "[CH3]-[CH2;]"
