"""Patterns and J of common compounds against handbook and textbook values.

Sources, read from memory unless said otherwise: FUL = Fulmer et al., Organometallics 2010, 29, 2176 (patterns
and J of trace impurities in CDCl3); SIL = Silverstein, Webster and Kiemle, Spectrometric Identification of
Organic Compounds, 7th ed., chapter 3 and its appendices; PRE = Pretsch, Buhlmann and Badertscher, Structure
Determination of Organic Compounds, 4th ed., 1H tables; GUN = Gunther, NMR Spectroscopy, coupling tables;
REI = Reich, course notes on 1H couplings (University of Wisconsin).
"""

from __future__ import annotations

import re

import pytest

from hoodside.molecule import read_structure
from hoodside.predict.coupling import predict_couplings
from hoodside.predict.multiplet import apply_multiplets
from hoodside.predict.proton import predict_protons

#: (name, SMILES with the carrier of the H mapped 1, pattern, J in Hz, tolerance in Hz, source).
CASES = [
    ("ethanol CH3", "[CH3:1]CO", "t", (7.0,), 0.4, "FUL"),
    ("ethanol CH2", "C[CH2:1]O", "q", (7.0,), 0.4, "FUL"),
    ("diethyl ether CH3", "[CH3:1]COCC", "t", (7.0,), 0.4, "FUL"),
    ("diethyl ether CH2", "C[CH2:1]OCC", "q", (7.0,), 0.4, "FUL"),
    ("ethyl acetate OCH2", "CC(=O)O[CH2:1]C", "q", (7.0,), 0.4, "FUL"),
    ("ethyl acetate CH3CO", "[CH3:1]C(=O)OCC", "s", (), 0.4, "FUL"),
    ("propan-2-ol CH3", "[CH3:1]C(C)O", "d", (6.0,), 0.5, "FUL"),
    ("propan-2-ol CH", "C[CH:1](C)O", "sept", (6.0,), 0.5, "FUL"),
    ("diisopropyl ether CH3", "[CH3:1]C(C)OC(C)C", "d", (6.1,), 0.4, "PRE"),
    ("butan-2-one CH2", "CC(=O)[CH2:1]C", "q", (7.3,), 0.4, "FUL"),
    ("triethylamine CH3", "[CH3:1]CN(CC)CC", "t", (7.1,), 0.4, "FUL"),
    ("bromoethane CH3", "[CH3:1]CBr", "t", (7.3,), 0.5, "PRE"),
    ("1-nitropropane CH2 in the middle", "C[CH2:1]C[N+](=O)[O-]", "sext", (7.2,), 0.6, "SIL"),
    ("2-bromopropane CH3", "[CH3:1]C(C)Br", "d", (6.6,), 0.5, "SIL"),
    ("cumene CH", "C[CH:1](C)c1ccccc1", "sept", (6.9,), 0.4, "SIL"),
    ("2-methylpropan-1-ol CH", "C[CH:1](C)CO", "non", (6.7,), 0.5, "SIL"),
    ("acetaldehyde CHO", "C[CH:1]=O", "q", (2.9,), 0.3, "SIL"),
    ("acetaldehyde CH3", "[CH3:1]C=O", "d", (2.9,), 0.3, "SIL"),
    ("2-methylpropanal CH3", "[CH3:1]C(C)C=O", "d", (7.0,), 0.5, "PRE"),
    ("1,1,2-trichloroethane CH2", "Cl[CH2:1]C(Cl)Cl", "d", (6.0,), 0.9, "SIL"),
    ("1,1,2-trichloroethane CH", "ClC[CH:1](Cl)Cl", "t", (6.0,), 0.9, "SIL"),
    ("4-nitrotoluene ring H", "Cc1[cH:1]cc(cc1)[N+](=O)[O-]", "d", (8.4,), 0.5, "SIL"),
    ("4-chlorobenzaldehyde ring H", "O=Cc1c[cH:1]c(Cl)cc1", "d", (8.4,), 0.4, "REI"),
    ("4-methoxyacetophenone ring H", "CC(=O)c1[cH:1]cc(OC)cc1", "d", (8.9,), 0.4, "common practice"),
    ("1,3,5-trimethylbenzene ring H", "Cc1[cH:1]c(C)cc(C)c1", "s", (), 0.0, "PRE"),
    (
        "2,4-dinitrochlorobenzene H5",
        "Clc1c[cH:1]c(cc1[N+](=O)[O-])[N+](=O)[O-]",
        "dd",
        (8.8, 2.6),
        0.6,
        "SIL",
    ),
    ("pyridine-4-carbonitrile H2", "N#Cc1c[cH:1]ncc1", "d", (5.0,), 1.2, "PRE"),
    ("2-methylpyridine H6", "Cc1n[cH:1]ccc1", "dd", (4.9, 1.8), 0.5, "GUN"),
    ("thiophene-2-carbaldehyde H4", "O=Cc1c[cH:1]cs1", "dd", (4.9, 3.8), 0.5, "GUN"),
    ("furfural H4", "O=Cc1c[cH:1]co1", "dd", (3.6, 1.7), 0.4, "GUN"),
    ("vinyl acetate =CHO", "CC(=O)O[CH:1]=C", "dd", (14.0, 6.3), 0.5, "SIL"),
    ("styrene =CH", "C=[CH:1]c1ccccc1", "dd", (17.6, 10.9), 0.5, "SIL"),
    ("methyl (E)-cinnamate beta H", "COC(=O)/C=[CH:1]/c1ccccc1", "d", (16.0,), 0.5, "SIL"),
    ("methyl (Z)-cinnamate beta H", "COC(=O)/C=[CH:1]\\c1ccccc1", "d", (12.6,), 0.8, "PRE"),
    ("(E)-stilbene has one olefinic signal", "c1ccccc1/[CH:1]=C/c1ccccc1", "s", (), 0.0, "common practice"),
    ("propargyl bromide HC", "[CH:1]#CCBr", "t", (2.7,), 0.3, "SIL"),
    ("propargyl bromide CH2", "C#C[CH2:1]Br", "d", (2.7,), 0.3, "SIL"),
    ("crotonaldehyde CHO", "C/C=C/[CH:1]=O", "d", (7.9,), 0.4, "SIL"),
    ("cyclohexenone H3 alone of the ring", "O=C1[CH:1]=CC(C)(C)CC1", "d", (10.0,), 0.5, "SIL"),
    ("trans-cinnamic epoxide H", "COC(=O)[C@@H]1O[C@H:1]1c1ccccc1", "d", (1.8,), 0.6, "common practice"),
    ("alpha-glucoside H1", "CO[C@H:1]1O[C@H](CO)[C@@H](O)[C@H](O)[C@H]1O", "d", (3.7,), 0.8, "REI"),
    ("beta-glucoside H1", "CO[C@@H:1]1O[C@H](CO)[C@@H](O)[C@H](O)[C@H]1O", "d", (7.8,), 0.8, "REI"),
    ("N-methylacetamide NCH3", "CC(=O)N[CH3:1]", "d", (4.8,), 0.4, "common practice"),
    ("fluoroethane CH2", "C[CH2:1]F", "dq", (47.5, 7.0), 2.0, "SIL"),
    ("4-fluorotoluene H ortho to F", "Cc1c[cH:1]c(F)cc1", "t", (8.7,), 0.6, "common practice"),
    ("2,2,2-trifluoroethanol CH2", "FC(F)(F)[CH2:1]O", "q", (8.9,), 0.6, "common practice"),
    ("trimethyl phosphate CH3", "[CH3:1]OP(=O)(OC)OC", "d", (11.0,), 0.6, "SIL"),
]


@pytest.mark.parametrize("case", CASES, ids=lambda case: case[0])
def test_pattern_and_couplings(case: tuple[str, str, str, tuple[float, ...], float, str]) -> None:
    _, smiles, pattern, couplings, tolerance, source = case
    structure = read_structure(smiles)
    groups = predict_protons(structure)
    found = apply_multiplets(groups, predict_couplings(structure, groups), 400)
    at = next(k for k, text in enumerate(_atoms(smiles)) if text.endswith(":1]"))
    here = next(g for g in found if at in g.atoms)
    assert here.mult == pattern, source
    assert len(here.j) == len(couplings), source
    for predicted, published in zip(here.j, couplings, strict=True):
        assert predicted == pytest.approx(published, abs=tolerance), source


def _atoms(smiles: str) -> list[str]:
    return re.findall(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops]", smiles)


def test_enough_reference_multiplets() -> None:
    assert len(CASES) >= 30
