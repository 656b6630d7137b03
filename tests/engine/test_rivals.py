"""Look-alikes by isomer moves."""

from __future__ import annotations

import json
from pathlib import Path

import pytest

from hoodside.engine import call
from hoodside.errors import InvalidInputError
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.molecule.kernel import kernel
from hoodside.predict.formula import formula_of
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals import find_rivals, iterate_rivals
from hoodside.rivals.early import early_test
from hoodside.rivals.enumeration import enumerate_isomers
from hoodside.rivals.graph import graph_of
from hoodside.rivals.growth import SENSIBLE
from hoodside.rivals.held_back import doubts, penalty
from hoodside.rivals.names import flat, name_of
from hoodside.rivals.rules import CUT, isomer_rules
from hoodside.rivals.writer import write_smiles

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
#: Conjugated and cross-conjugated double bonds, ring closures beside marks, isotopes, charges, two molecules.
KNOTTY = [
    "C/C=C/C=C/C=C\\C",
    "F/C=C/C(/C=C\\F)=C(/C)CC",
    "C/C(=C(/C=C/C)\\C(=C/C)\\C)CC",
    "C[C@@]1(F)CC[C@H](Cl)CC1",
    "C1CCCCC/C=C/CC/C=C\\1",
    "[13CH3]C[N+](C)(C)C.[Cl-]",
    "O=[N+]([O-])c1ccc2[nH]ccc2c1",
]


def names(smiles: str, limit: int = 200) -> list[str]:
    return [rival.smiles for rival in find_rivals(read_structure(smiles), limit=limit).rivals]


@pytest.mark.parametrize("smiles", KNOTTY + [case["smiles"] for case in CASES])
def test_a_graph_written_out_is_the_same_molecule(smiles: str) -> None:
    structure = read_structure(smiles)
    assert kernel().smiles(write_smiles(graph_of(structure))) == structure.smiles


@pytest.mark.parametrize("case", CASES[::24], ids=lambda case: str(case["id"]))
def test_every_rival_is_an_isomer_found_once_and_says_how(case: dict[str, str]) -> None:
    intended = read_structure(case["smiles"])
    found = find_rivals(intended, limit=80).rivals
    assert found
    constitutions = [rival for rival in found if not rival.how[-1].endswith("tautomer")]
    keys = [read_structure(rival.smiles).inchikey for rival in constitutions]
    assert len(set(keys)) == len(keys)
    assert intended.inchikey not in keys
    for rival in found:
        assert read_structure(rival.smiles).element_counts == intended.element_counts, rival
        assert rival.distance == len(rival.how) or rival.how == (
            f"found among all isomers of {case['formula']}",
        )
        assert all(rival.how)
    assert [r.plausibility for r in found] == sorted((r.plausibility for r in found), reverse=True)


@pytest.mark.parametrize(
    ("smiles", "expected"),
    [
        # Textbook pairs of isomers (common practice).
        ("Cc1ccc(O)cc1", "Cc1ccccc1O"),  # ring position
        ("CCCOC(C)=O", "CC(=O)OC(C)C"),  # chain branching
        ("CCCC(=O)OC", "CCCOC(C)=O"),  # CH2 from one side of the ester to the other
        ("CC(=O)Nc1ccccc1", "CNC(=O)c1ccccc1"),  # amide reversed
        ("CCOCC", "CCCCO"),  # ether and alcohol
        ("CCCC=O", "CCC(C)=O"),  # aldehyde and ketone
        ("CC1CO1", "CC(C)=O"),  # epoxide and ketone
        ("CC1CO1", "C=CCO"),  # epoxide and allylic alcohol
        ("CCCN", "CCNC"),  # primary and secondary amine
        ("CCCS", "CCSC"),  # thiol and sulfide
        ("CCC#N", "[C-]#[N+]CC"),  # nitrile and isonitrile
        ("CC[N+](=O)[O-]", "CCON=O"),  # nitro and nitrite
        ("C=CCCCC", "C1CCCCC1"),  # alkene and ring
        ("C/C=C/CO", "C/C=C\\CO"),  # E and Z
        ("C[C@H]1CCCC[C@@H]1O", "C[C@@H]1CCCC[C@@H]1O"),  # cis and trans
        ("CC(=O)CC(C)=O", "CC(=O)/C=C(/C)O"),  # keto and enol form of a 1,3-diketone
        ("Oc1ccccn1", "O=c1cccc[nH]1"),  # lactim and lactam
        ("Cn1cccc1C=O", "Cc1ccc(C=O)[nH]1"),  # N- and C-alkyl
        ("Nc1ccc(OC)cc1", "CNc1ccc(O)cc1"),  # O- and N-alkyl
        ("CC1CCCC1", "C1CCCCC1"),  # ring size
        ("C[C@H](O)[C@@H](C)Br", "C[C@H](O)[C@H](C)Br"),  # diastereomers
    ],
)
def test_an_isomer_a_chemist_would_think_of_is_among_the_first(smiles: str, expected: str) -> None:
    assert name_of(expected) in names(smiles)[:60]


def test_mirror_images_are_no_rivals() -> None:
    found = names("C[C@H](O)c1ccccc1") + names("O[C@H]1CCCC[C@H]1O")
    assert kernel().smiles("C[C@@H](O)c1ccccc1") not in found
    assert flat("CC(O)c1ccccc1") not in found


@pytest.mark.parametrize("smiles", ["C=CCO", "CCC=O", "C1CCCCC1C#C", "CCCC(O)CO"])
def test_what_falls_apart_is_held_back(smiles: str) -> None:
    """Gem-diols, small-ring alkynes and acyclic enols revert at once (common practice)."""
    for rival in find_rivals(read_structure(smiles), limit=60).rivals[:30]:
        found = read_structure(rival.smiles)
        assert not found.matches("[CX4]([OH])[OH]")
        assert not found.matches("[C;r3,r4,r5,r6]#[C;r3,r4,r5,r6]")
        assert not found.matches("[CX3;H2]=[CX3][OH]") or rival.plausibility < 0.12


def test_the_same_search_gives_the_same_list() -> None:
    assert names("CC(C)C(=O)OCC", 60) == names("CC(C)C(=O)OCC", 60)


def test_the_search_comes_in_slices_and_can_be_stopped() -> None:
    structure = read_structure("COC(=O)c1ccccc1OCC")
    slices = iterate_rivals(structure, limit=100)
    assert 0 < len(next(slices)) <= 60
    stopped = find_rivals(structure, limit=100, on_progress=lambda batch: True)
    assert 0 < len(stopped.rivals) < 100
    assert stopped.note


def test_every_move_of_the_table_keeps_the_formula_in_its_arithmetic() -> None:
    """Orders cut equal orders made, but for hydrogens that a change of valence brings or takes."""
    for rule in isomer_rules():
        balance = 2 * sum(-1 if by == CUT else by for _, _, by in rule.changes) - sum(
            h for _, _, h in rule.adjust
        )
        assert balance == 0, rule.id


@pytest.mark.parametrize("table", ["isomer_moves", "held_back"])
def test_every_pattern_of_the_tables_parses(table: str) -> None:
    columns = ("take", "give") if table == "isomer_moves" else ("smarts",)
    for row in load_table(table):
        patterns = [row[c] for c in columns if row[c] and not (c == "give" and row["op"] == "matrix")]
        kernel().matches("CCO", patterns)


def test_the_door_answers_with_formulas_and_refuses_in_words() -> None:
    answer = call("rivals", {"smiles": "COc1ccc(C=O)cc1", "limit": 5})
    assert [len(answer["rivals"]), answer["rivals"][0]["formula"]] == [5, "C8H8O2"]
    with pytest.raises(InvalidInputError, match="structure"):
        call("rivals", {"limit": 5})


@pytest.mark.parametrize("smiles", ["CCCC=O", "CCCCO", "CCCCCC", "C=CC(=O)OC", "CCCN", "CC[N+](=O)[O-]"])
def test_a_small_formula_is_enumerated_and_said_to_be_complete(smiles: str) -> None:
    found = find_rivals(read_structure(smiles))
    assert found.complete
    assert "Complete" in found.note
    formula = formula_of(read_structure(smiles))
    every = {flat(s) for s in enumerate_isomers(formula, sensible=True).smiles}
    put_up = {flat(r.smiles) for r in found.rivals} | {flat(smiles)}
    sound = {s for s in every if penalty(s, doubts(smiles)) < SENSIBLE}
    assert sound - put_up <= tautomers_of(put_up)


def tautomers_of(names_: set[str]) -> set[str]:
    """Forms with the same standard InChIKey, which are put up once."""
    keys = {read_structure(n).inchikey for n in names_}
    formulas = {str(formula_of(read_structure(n))) for n in names_}
    others = {s for formula in formulas for s in enumerate_isomers(formula).smiles}
    return {s for s in others if read_structure(s).inchikey in keys}


def test_a_large_formula_is_not_said_to_be_complete() -> None:
    assert not find_rivals(read_structure("COc1ccc(C=O)cc1"), limit=20).complete


@pytest.mark.parametrize(
    ("smiles", "analogue"),
    [
        ("COc1ccc(C=O)cc1", "CSc1ccc(C=O)cc1"),  # an isolated methyl on O, S, N or carbon
        ("COc1ccc(C=O)cc1", "CNc1ccc(C=O)cc1"),
        ("COc1ccc(C=O)cc1", "Cc1ccc(C=O)cc1"),
        ("Cc1ccc(C=O)cc1", "COc1ccc(C=O)cc1"),
        ("Brc1ccc(C=O)cc1", "O=Cc1ccc(Cl)cc1"),  # halogens, which 1H does not tell
        ("CCOC(=O)C", "CCNC(C)=O"),
        ("c1ccoc1C=O", "O=Cc1cccs1"),
        ("CS(=O)(=O)c1ccccc1", "CSc1ccccc1"),
        ("N#Cc1ccc(C=O)cc1", "O=Cc1ccc([N+](=O)[O-])cc1"),
        ("CC(=O)Cc1ccccc1", "CC(=O)Oc1ccccc1"),
    ],
)
def test_without_a_formula_isosteres_are_put_up_too(smiles: str, analogue: str) -> None:
    found = find_rivals(read_structure(smiles), formula_known=False, limit=100)
    by_name = {rival.smiles: rival for rival in found.rivals}
    assert name_of(analogue) in by_name
    assert by_name[name_of(analogue)].how
    assert not found.complete


def test_readings_that_leave_no_doubt_are_used_early() -> None:
    intended = read_structure("CC(=O)c1ccc(OC)cc1")
    readings = readings_from_json(
        {
            "formula": "C9H10O2",
            "h1": [
                {"ppm": 7.9, "mult": "d", "j": [8.8], "n": 2},
                {"ppm": 6.9, "mult": "d", "j": [8.8], "n": 2},
                {"ppm": 3.8, "mult": "s", "n": 3},
                {"ppm": 2.5, "mult": "s", "n": 3},
            ],
            "ir_clear": [[3200, 3600]],
        }
    )
    plain = {r.smiles for r in find_rivals(intended, limit=150).rivals}
    left = {r.smiles for r in find_rivals(intended, readings=readings, limit=150).rivals}
    aldehyde, alcohol = "CCOc1ccc(C=O)cc1", "O=CCc1ccc(CO)cc1"
    assert name_of(aldehyde) in plain - left
    assert not any(read_structure(s).matches("[CX4][OH]") for s in left), alcohol
    assert name_of("CCC(=O)c1ccc(O)cc1") in left


@pytest.mark.parametrize("case", CASES, ids=lambda case: str(case["id"]))
def test_early_use_of_readings_never_loses_the_truth(case: dict[str, object]) -> None:
    assert early_test(readings_from_json(case))(str(case["smiles"]))


@pytest.mark.parametrize("smiles", ["[CH3]", "[2H]C([2H])([2H])O", "[Na+].[Cl-]", "CCO.CC=O", "C[N+](C)(C)C"])
def test_no_list_is_called_complete_for_what_cannot_be_enumerated(smiles: str) -> None:
    assert not find_rivals(read_structure(smiles), limit=30).complete


def test_ions_are_no_place_for_isosteres_of_bound_halogen() -> None:
    found = find_rivals(read_structure("CC[NH3+].[Cl-]"), formula_known=False, limit=60).rivals
    assert all(read_structure(rival.smiles).charge == 0 for rival in found)
