"""Numbers of isomers against published counts.

Alkanes and alkanols: H. R. Henze and C. M. Blair, J. Am. Chem. Soc. 1931, 53, 3077 and 1931, 53, 3042.
Alkenes: C. M. Blair and H. R. Henze, J. Am. Chem. Soc. 1932, 54, 1538 (olefins).
Stereoisomers of alkanes: R. W. Robinson, F. Harary and A. T. Balaban, Tetrahedron 1976, 32, 355; of
monosubstituted alkanes: C. M. Blair and H. R. Henze, J. Am. Chem. Soc. 1932, 54, 1098.
Benzene's formula: A. Kerber, R. Laue, M. Meringer, C. Ruecker, E. Schymanski, Mathematical Chemistry and
Chemoinformatics, De Gruyter 2014. Amines, ethers with alcohols, halides and small hydrocarbons with rings:
textbook counts. All values from memory.
"""

from __future__ import annotations

from collections.abc import Callable

import pytest

from hoodside.errors import FormulaError
from hoodside.molecule import Structure, read_structure
from hoodside.rivals.configurations import stereoisomers
from hoodside.rivals.enumeration import enumerate_isomers
from hoodside.rivals.graph import graph_of


def isomers(formula: str, pattern: str = "") -> list[Structure]:
    found = enumerate_isomers(formula, charged_groups=False)
    assert found.complete
    structures = [read_structure(smiles) for smiles in found.smiles]
    return [s for s in structures if not pattern or s.matches(pattern)]


@pytest.mark.parametrize(
    ("formula", "count"),
    [
        # alkanes
        ("C4H10", 2),
        ("C5H12", 3),
        ("C6H14", 5),
        ("C7H16", 9),
        ("C8H18", 18),
        ("C9H20", 35),
        ("C10H22", 75),
        # amines
        ("C2H7N", 2),
        ("C3H9N", 4),
        ("C4H11N", 8),
        ("C5H13N", 17),
        # alcohols and ethers together
        ("C3H8O", 3),
        ("C4H10O", 7),
        ("C5H12O", 14),
        ("C6H14O", 32),
        # monohalides
        ("C4H9Br", 4),
        ("C5H11Cl", 8),
        ("C6H13Br", 17),
        # hydrocarbons with rings and multiple bonds
        ("C4H8", 5),
        ("C5H10", 10),
        ("C6H12", 25),
        ("C4H6", 9),
        ("C5H8", 26),
        ("C6H10", 77),
        ("C6H6", 217),
    ],
)
def test_constitutional_isomers_of_a_formula(formula: str, count: int) -> None:
    assert len(isomers(formula)) == count


@pytest.mark.parametrize(("carbons", "count"), [(3, 2), (4, 4), (5, 8), (6, 17), (7, 39)])
def test_alkanols(carbons: int, count: int) -> None:
    assert len(isomers(f"C{carbons}H{2 * carbons + 2}O", "[OH]")) == count


@pytest.mark.parametrize(("carbons", "count"), [(4, 3), (5, 5), (6, 13), (7, 27)])
def test_alkenes(carbons: int, count: int) -> None:
    assert len(isomers(f"C{carbons}H{2 * carbons}", "C=C")) == count


def with_stereo(structures: list[Structure], keep: Callable[[str], bool] = bool) -> int:
    return len({s for one in structures for s in stereoisomers(graph_of(one)) if keep(s)})


@pytest.mark.parametrize(("formula", "count"), [("C6H14", 5), ("C7H16", 11), ("C8H18", 24), ("C9H20", 55)])
def test_stereoisomers_of_alkanes(formula: str, count: int) -> None:
    assert with_stereo(isomers(formula)) == count


@pytest.mark.parametrize(("carbons", "count"), [(3, 2), (4, 5), (5, 11), (6, 28)])
def test_stereoisomers_of_alkanols(carbons: int, count: int) -> None:
    assert with_stereo(isomers(f"C{carbons}H{2 * carbons + 2}O", "[OH]")) == count


@pytest.mark.parametrize(("carbons", "count"), [(4, 4), (5, 6)])
def test_alkenes_with_their_e_and_z_forms(carbons: int, count: int) -> None:
    assert with_stereo(isomers(f"C{carbons}H{2 * carbons}", "C=C")) == count


def test_groups_that_valence_cannot_write_are_among_the_isomers() -> None:
    found = enumerate_isomers("C2H5NO2").smiles
    assert {"CC[N+](=O)[O-]", "CCON=O", "NCC(=O)O", "COC(N)=O"} <= set(found)
    assert "CS(C)=O" in enumerate_isomers("C2H6OS").smiles


def test_a_formula_too_large_is_said_to_be_incomplete() -> None:
    assert not enumerate_isomers("C12H20O3").complete


def test_a_formula_of_no_molecule_has_no_isomers() -> None:
    assert enumerate_isomers("C4H11").smiles == ()


@pytest.mark.parametrize("formula", ["C2H5Pt", "[C2H6N]+", "H2"])
def test_a_formula_beyond_the_usual_valences_is_refused(formula: str) -> None:
    with pytest.raises(FormulaError, match="cannot be enumerated"):
        enumerate_isomers(formula)
