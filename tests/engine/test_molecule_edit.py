"""Editing steps: worked examples, and laws that must hold for any structure."""

from __future__ import annotations

from collections import Counter
from functools import cache

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from rdkit import Chem
from rdkit.Chem.rdMolDescriptors import CalcMolFormula

from hoodside.errors import HoodsideError, InvalidInputError, StructureError
from hoodside.facts.table import load_table
from hoodside.molecule import Structure, edit, read_structure
from hoodside.molecule.edit_options import options_at
from hoodside.molecule.edit_stereo import bond_labels, centre_labels

START = [
    "C",
    "CCO",
    "CC=CC",
    "C/C=C/C(=O)O",
    "C[C@H](N)C(=O)OC",
    "c1ccccc1",
    "Cc1ccc(C=O)cc1",
    "C1CCCCC1",
    "C[C@@H]1CCCC[C@H]1O",
    "OC1CC2CCC1C2",
    "c1ccc2[nH]ccc2c1",
    "CC#C",
    "O=[N+]([O-])c1cccnc1",
    "CS(=O)CCl",
    "COP(=O)(OC)C=C",
]
GROUPS = [row["smiles"] for row in load_table("attachable_groups") if row["order"] == "1"]


@cache
def canonical(smiles: str) -> str:
    """By RDKit itself, outside of the kernel seam."""
    return Chem.CanonSmiles(smiles)


def formula(smiles: str) -> Counter[str]:
    mol = Chem.AddHs(Chem.MolFromSmiles(smiles))
    return Counter(atom.GetSymbol() for atom in mol.GetAtoms())


def flat(smiles: str) -> str:
    return Chem.MolToSmiles(Chem.MolFromSmiles(smiles), isomericSmiles=False)


def stereo_marks(structure: Structure) -> int:
    return sum(bool(a.stereo) for a in structure.atoms) + sum(bool(b.stereo) for b in structure.bonds)


def bond(structure: Structure, a: int, b: int) -> int:
    found = structure.bond_between(a, b)
    assert found is not None
    return found.index


# start, step, arguments, product: named reactions of the drawing board, products by IUPAC name.
EXAMPLES = [
    ("c1ccccc1", "attach", {"atom": 0, "group": "OC"}, "COc1ccccc1"),
    ("CC", "attach", {"atom": 0, "group": "O", "order": 2}, "CC=O"),
    ("c1ccccc1", "attach", {"atom": 2, "group": "[NH+](=O)[O-]"}, "O=[N+]([O-])c1ccccc1"),
    ("C[C@H](F)O", "attach", {"atom": 1, "group": "Cl"}, "C[C@](Cl)(F)O"),
    ("c1ccccc1", "change_element", {"atom": 3, "symbol": "N"}, "c1ccncc1"),
    ("CCC", "change_element", {"atom": 1, "symbol": "S"}, "CSC"),
    ("CCC", "set_order", {"bond": 0, "order": 2}, "C=CC"),
    ("CC#C", "set_order", {"bond": 1, "order": 2}, "CC=C"),
    ("CCCCCC", "join", {"a": 0, "b": 5}, "C1CCCCC1"),
    ("CCC", "insert", {"bond": 0, "symbol": "O"}, "COCC"),
    ("C/C=C/C", "insert", {"bond": 0, "symbol": "O"}, "CO/C=C/C"),
    ("C1CCCCC1", "fuse_ring", {"bond": 0, "size": 6, "aromatic": True}, "C1CCc2ccccc2C1"),
    ("c1ccccc1", "fuse_ring", {"bond": 0, "size": 6, "aromatic": True}, "c1ccc2ccccc2c1"),
    ("c1ccccc1", "fuse_ring", {"bond": 1, "size": 6, "aromatic": True}, "c1ccc2ccccc2c1"),
    ("CC=C", "fuse_ring", {"bond": 1, "size": 3}, "CC1=CC1"),
    ("CC", "fuse_ring", {"bond": 0, "size": 5}, "C1CCCC1"),
    ("CCO", "remove", {"atom": 2}, "CC"),
    ("CCCCO", "remove", {"atom": 1}, "CCO"),
    ("C1CCCCC1", "remove", {"atom": 0}, "CCCCC"),
    ("C1CCCCC1", "cut", {"bond": 0}, "CCCCCC"),
    ("C[C@H](N)C(=O)O", "flip_stereo", {"atom": 1}, "C[C@@H](N)C(=O)O"),
    ("CC(N)C(=O)O", "set_stereo", {"atom": 1, "label": "S"}, "C[C@H](N)C(=O)O"),  # L-alanine is S
    ("C[C@H](N)C(=O)O", "set_stereo", {"atom": 1, "label": ""}, "CC(N)C(=O)O"),
    ("CC=CC", "set_double_bond", {"bond": 1, "label": "Z"}, "C/C=C\\C"),
    ("C/C=C/C", "flip_double_bond", {"bond": 1}, "C/C=C\\C"),
    ("OC(=O)C=CC(O)=O", "set_double_bond", {"bond": 3, "label": "Z"}, "OC(=O)/C=C\\C(=O)O"),  # maleic is Z
]


@pytest.mark.parametrize(("start", "step", "arguments", "product"), EXAMPLES)
def test_worked_examples(start: str, step: str, arguments: dict[str, object], product: str) -> None:
    assert edit.apply(read_structure(start), step, arguments).smiles == canonical(product)


# Steps that would break a valence or have no meaning, and the field the error names.
REFUSED = [
    ("CC(C)(C)C", "attach", {"atom": 1, "group": "C"}, "atom"),
    ("CC", "attach", {"atom": 9, "group": "C"}, "atom"),
    ("CC(C)(C)C", "change_element", {"atom": 1, "symbol": "N"}, "symbol"),
    ("CC", "change_element", {"atom": 0, "symbol": "Zz"}, "symbol"),
    ("COC", "set_order", {"bond": 0, "order": 2}, "atom"),
    ("c1ccccc1", "set_order", {"bond": 1, "order": 3}, "bond"),
    ("CC", "set_order", {"bond": 0, "order": 4}, "order"),
    ("CC", "join", {"a": 0, "b": 1}, "b"),
    ("C=C", "insert", {"bond": 0, "symbol": "O"}, "bond"),
    ("CC(C)(C)C(C)(C)C", "fuse_ring", {"bond": 3, "size": 5}, "atom"),
    ("CCC", "set_stereo", {"atom": 1, "label": "R"}, "atom"),
    ("CCN1CC1C", "set_stereo", {"atom": 2, "label": "R"}, "atom"),  # inverts (Brois 1967; from memory)
    ("CC=C", "set_double_bond", {"bond": 1, "label": "E"}, "bond"),
    ("C", "remove", {"atom": 0}, "atom"),
    ("CC", "melt", {}, "step"),
    ("CC", "remove", {"colour": 1}, "arguments"),
]


@pytest.mark.parametrize(("start", "step", "arguments", "field"), REFUSED)
def test_impossible_steps_are_refused_with_a_mend(
    start: str, step: str, arguments: dict[str, object], field: str
) -> None:
    with pytest.raises(InvalidInputError) as caught:
        edit.apply(read_structure(start), step, arguments)
    assert caught.value.field == field
    assert caught.value.hint


def test_every_group_can_be_attached() -> None:
    """Each row of the table gives a molecule with its atoms, less the hydrogens of the new bond."""
    for row in load_table("attachable_groups"):
        order = int(row["order"])
        made = edit.attach(read_structure("CC"), 0, row["smiles"], order)
        expected = formula("CC") + formula(row["smiles"])
        expected["H"] -= 2 * order
        assert formula(made.smiles) == +expected, row["name"]


@settings(max_examples=60, deadline=None)
@given(st.sampled_from(START), st.data())
def test_offered_options_are_possible_and_legal(smiles: str, data: st.DataObject) -> None:
    """Whatever is offered can be done, and three steps in a row end in a molecule RDKit accepts."""
    structure = read_structure(smiles)
    for _ in range(3):
        place: dict[str, int] = {"atom": data.draw(st.integers(0, len(structure.atoms) - 1))}
        if structure.bonds and data.draw(st.booleans()):
            place = {"bond": data.draw(st.integers(0, len(structure.bonds) - 1))}
        offered = [o for o in options_at(structure, **place) if not o.needs_atom]
        if not offered:
            continue
        chosen = data.draw(st.sampled_from(offered))
        structure = edit.apply(structure, chosen.step, chosen.arguments)
        again = Chem.MolFromSmiles(structure.smiles)
        assert again is not None
        assert Chem.MolToSmiles(again) == structure.smiles
        counts = Chem.AddHs(again).GetNumAtoms()
        assert sum(structure.element_counts.values()) == counts, CalcMolFormula(again)


@settings(max_examples=60, deadline=None)
@given(st.sampled_from(START), st.sampled_from(GROUPS), st.data())
def test_attaching_and_cutting_again_is_no_change(smiles: str, group: str, data: st.DataObject) -> None:
    """Cutting the bond that attaching made gives both parts back, configuration too; the larger is kept."""
    structure = read_structure(smiles)
    atom = data.draw(st.integers(0, len(structure.atoms) - 1))
    if not structure.atoms[atom].hydrogens:
        return
    made = edit.attach(structure, atom, group)
    assert [a.symbol for a in made.atoms[: len(structure.atoms)]] == [a.symbol for a in structure.atoms]
    parted = edit.cut(made, bond(made, atom, len(structure.atoms)))
    whole = [structure.smiles, read_structure(group).smiles]
    if stereo_marks(made) < stereo_marks(structure):  # the group made two ligands alike
        assert flat(parted.smiles) in [flat(s) for s in whole]
    else:
        assert parted.smiles in whole


@settings(max_examples=40, deadline=None)
@given(st.sampled_from(START), st.data())
def test_flipping_twice_is_no_change(smiles: str, data: st.DataObject) -> None:
    structure = read_structure(smiles)
    marked = [a.index for a in structure.atoms if a.stereo]
    if marked:
        atom = data.draw(st.sampled_from(marked))
        once = edit.flip_stereo(structure, atom)
        assert centre_labels(once).get(atom) != centre_labels(structure).get(atom)
        assert edit.flip_stereo(once, atom).smiles == structure.smiles
    for index in bond_labels(structure):
        once = edit.flip_double_bond(structure, index)
        assert edit.flip_double_bond(once, index).smiles == structure.smiles


@settings(max_examples=40, deadline=None)
@given(st.sampled_from(START), st.data())
def test_joining_closes_one_ring(smiles: str, data: st.DataObject) -> None:
    """A bond between two atoms costs two hydrogens and adds one unsaturation."""
    structure = read_structure(smiles)
    free = [a.index for a in structure.atoms if a.hydrogens]
    a, b = data.draw(st.sampled_from(free)), data.draw(st.sampled_from(free))
    if a == b or structure.bond_between(a, b):
        with pytest.raises(StructureError):
            edit.join(structure, a, b)
        return
    try:
        made = edit.join(structure, a, b)
    except HoodsideError as err:
        pytest.fail(err.one_line())
    expected = formula(structure.smiles)
    expected["H"] -= 2
    assert formula(made.smiles) == +expected
    assert len(made.bonds) == len(structure.bonds) + 1


def test_options_come_most_likely_first() -> None:
    """Common practice: methyl first on carbon; ring substituents before rarities; nothing that cannot be."""
    on_ring = [o.label for o in options_at(read_structure("c1ccccc1"), atom=0)]
    assert on_ring[:3] == ["CH3", "OCH3", "OH"]
    assert "=O" not in on_ring
    full = options_at(read_structure("CC(C)(C)C"), atom=1)
    assert {o.step for o in full} <= {"change_element", "remove"}
    with pytest.raises(InvalidInputError):
        options_at(read_structure("CC"))
