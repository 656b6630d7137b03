"""Drawings: one ink, everything in frame, what is lit where it should be."""

from __future__ import annotations

import math
import re
import xml.etree.ElementTree as ET

import pytest

from hoodside.molecule import read_structure
from hoodside.molecule.drawing import draw

SMILES = ["O", "CCO", "C[C@H](O)/C=C/c1cccc(N)c1", "[Na+].CC(=O)[O-]", "C1CC2CCC1CC2", "[13CH4]", "C" * 40]


@pytest.mark.parametrize("smiles", SMILES)
def test_one_ink_on_a_clear_ground(smiles: str) -> None:
    svg = draw(read_structure(smiles), 240, 160).svg
    root = ET.fromstring(svg)
    paints = {e.get(k) for e in root.iter() for k in ("fill", "stroke")} - {None}
    assert paints <= {"none", "currentColor"}
    assert "#" not in svg
    assert "rect" not in svg


@pytest.mark.parametrize("smiles", SMILES)
def test_every_atom_lies_in_the_frame(smiles: str) -> None:
    structure = read_structure(smiles)
    coords = draw(structure, 240, 160).coords
    assert len(coords) == len(structure.atoms)
    assert all(0 < x < 240 and 0 < y < 160 for x, y in coords)


def test_what_is_lit_wears_the_accent() -> None:
    structure = read_structure("C[C@H](O)/C=C/c1cccc(N)c1")
    drawing = draw(structure, 300, 200, atoms=[2], bonds=[3])
    lit = re.findall(r'<(\w+) class="lit ([^"]*)"[^>]*stroke="([^"]*)"', drawing.svg)
    assert lit == [
        ("path", "bond-3", "var(--accent, currentColor)"),
        ("circle", "atom-2", "var(--accent, currentColor)"),
    ]
    ring = re.search(r'cx="([\d.]+)" cy="([\d.]+)"', drawing.svg)
    assert ring is not None
    assert math.dist((float(ring[1]), float(ring[2])), drawing.coords[2]) < 0.2


def test_bonds_keep_their_names_for_tapping() -> None:
    structure = read_structure("c1ccccc1C#N")
    svg = draw(structure).svg
    for bond in structure.bonds:
        assert f"bond-{bond.index} " in svg


def test_a_wide_frame_is_filled() -> None:
    """A long chain lies along the frame, whatever the order of its atoms."""
    for smiles in ("CCCCCCCC", "O=C(O)CCCCCc1ccccc1", "C(CCC)CCCC"):
        xs, ys = zip(*draw(read_structure(smiles), 400, 200).coords, strict=True)
        assert max(xs) - min(xs) > 2 * (max(ys) - min(ys))


def test_a_layout_that_came_with_a_ctfile_is_kept() -> None:
    """Ethanol drawn upright stays upright."""
    line = "{:>10.4f}{:>10.4f}{:>10.4f} {:<3} 0  0\n"
    atoms = "".join(line.format(0.0, 1.5 * k, 0.0, symbol) for k, symbol in enumerate("CCO"))
    text = f"\n\n\n  3  2  0  0  0  0  0  0  0  0999 V2000\n{atoms}  1  2  1  0\n  2  3  1  0\nM  END\n"
    xs, ys = zip(*draw(read_structure(text), 200, 200).coords, strict=True)
    assert max(xs) - min(xs) < 1
    assert ys[0] > ys[1] > ys[2]
