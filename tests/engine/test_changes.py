"""What should have changed: the readings a textbook names for a step are the ones put first."""

from __future__ import annotations

import pytest

from hoodside.advise.changes import Change, changes
from hoodside.engine import call
from hoodside.errors import InvalidInputError, StructureError
from hoodside.molecule import read_structure

#: Silverstein, Webster, Kiemle and Bryce, Spectrometric Identification of Organic Compounds, 8th ed.: what a
#: step takes away or brings. (start, product, kind, way, word of the text, least and most of the place)
TEXTBOOK = [
    ("CC(O)c1ccccc1", "CC(=O)c1ccccc1", "IR", "goes", "O-H stretch", 3200, 3600),
    ("CC(O)c1ccccc1", "CC(=O)c1ccccc1", "IR", "comes", "C=O stretch", 1670, 1700),
    ("CC(O)c1ccccc1", "CC(=O)c1ccccc1", "13C", "comes", "C", 190, 205),
    ("C=CCc1ccccc1", "OCC(O)Cc1ccccc1", "1H", "goes", "alkene", 4.8, 6.2),
    ("C=CCc1ccccc1", "OCC(O)Cc1ccccc1", "IR", "comes", "O-H stretch", 3200, 3600),
    ("CC(C)c1ccc(C=O)cc1", "CC(C)c1ccc(CO)cc1", "1H", "goes", "aldehyde", 9.5, 10.5),
    ("CC(C)c1ccc(C=O)cc1", "CC(C)c1ccc(CO)cc1", "1H", "comes", "CH2 on O", 4.3, 5.0),
    ("O=[N+]([O-])c1ccc(C(C)C)cc1", "Nc1ccc(C(C)C)cc1", "IR", "goes", "NO2 stretch", 1490, 1560),
    ("O=[N+]([O-])c1ccc(C(C)C)cc1", "Nc1ccc(C(C)C)cc1", "IR", "comes", "N-H stretch", 3300, 3520),
    ("N#Cc1ccccc1", "NCc1ccccc1", "IR", "goes", "C#N stretch", 2200, 2260),
    ("CCOC(=O)c1ccccc1", "OC(=O)c1ccccc1", "IR", "comes", "O-H stretch", 2400, 3400),
    ("CCOC(=O)c1ccccc1", "OC(=O)c1ccccc1", "1H", "goes", "CH2 on O", 4.1, 4.6),
    ("CCOC(=O)CCc1ccccc1", "OCCCc1ccccc1", "IR", "goes", "C=O stretch", 1720, 1760),
]
#: So many lines are read at a glance.
GLANCE = 12


def places(change: Change) -> list[float]:
    return [float(word) for word in change.where.split() if word.replace(".", "").isdigit()]


@pytest.mark.parametrize(("start", "product", "kind", "way", "word", "lo", "hi"), TEXTBOOK)
def test_what_the_textbook_names_is_among_the_first(
    start: str, product: str, kind: str, way: str, word: str, lo: float, hi: float
) -> None:
    found = changes(read_structure(start), read_structure(product))[:GLANCE]
    fitting = [c for c in found if (c.kind, c.way) == (kind, way) and word in c.text]
    assert any(lo <= place <= hi for change in fitting for place in places(change)), found


def test_mass_difference_is_that_of_the_formulas() -> None:
    """Dihydroxylation adds H2O2, 34.00548 u (2 x 1.00782503 + 2 x 15.99491462, CIAAW)."""
    found = changes(read_structure("C=CCc1ccccc1"), read_structure("OCC(O)Cc1ccccc1"))
    mass = next(change for change in found if change.kind == "mass")
    assert (mass.where, mass.text) == ("+34.0055", "M gains H2O2")


def test_isomers_are_said_to_share_their_mass() -> None:
    found = changes(read_structure("C=CCc1ccccc1"), read_structure("CC=Cc1ccccc1"))
    assert found[-1].way == "stays"
    assert found[-1].telling == 0


def test_nothing_changes_where_nothing_happened() -> None:
    start = read_structure("CC(=O)c1ccccc1")
    assert [change.way for change in changes(start, start)] == ["stays"]


def test_there_and_back_are_the_same_changes_turned_about() -> None:
    pair = read_structure("CC(O)c1ccccc1"), read_structure("CC(=O)c1ccccc1")
    turned = {"comes": "goes", "goes": "comes"}
    there = {(c.kind, c.way, c.where) for c in changes(*pair) if c.way in turned}
    back = {(c.kind, turned[c.way], c.where) for c in changes(*pair[::-1]) if c.way in turned}
    assert there == back


def test_changes_come_through_the_door_in_order() -> None:
    answer = call("changes", {"start": "C=CCc1ccccc1", "product": "OCC(O)Cc1ccccc1", "mhz": 500})["changes"]
    worth = [change["telling"] for change in answer]
    assert worth == sorted(worth, reverse=True)
    assert all(change["source"] for change in answer if change["way"] != "stays")


def test_what_cannot_be_read_is_named() -> None:
    with pytest.raises(StructureError) as told:
        call("changes", {"start": "CCO", "product": "C1CC"})
    assert told.value.field == "product"
    with pytest.raises(InvalidInputError):
        call("changes", {"start": "CCO", "product": "CC=O", "solvent": "moonlight"})
