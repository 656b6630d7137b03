"""Prominent ions of published 70 eV spectra: each must be among the ions predicted from the structure.

Sources: NIST = NIST Chemistry WebBook, mass spectra; SWK = Silverstein, Webster & Kiemle, Spectrometric
Identification of Organic Compounds, 7th ed. 2005, chapter 1; McL = McLafferty & Turecek, Interpretation of
Mass Spectra, 4th ed. 1993. Nominal m/z from memory.
"""

from __future__ import annotations

import pytest

from hoodside.molecule import read_structure
from hoodside.predict.formula import exact_mass, parse_formula
from hoodside.predict.mass import ions_at, losses_of, predict_ions

# name, SMILES, prominent ions, what the rule of one of them must be called, source
SPECTRA = [
    ("toluene", "Cc1ccccc1", (92, 91, 65), "benzylic", "SWK"),
    ("ethylbenzene", "CCc1ccccc1", (106, 91), "benzylic", "NIST"),
    ("butylbenzene", "CCCCc1ccccc1", (134, 92, 91), "McLafferty", "SWK"),
    ("tert-butylbenzene", "CC(C)(C)c1ccccc1", (134, 119), "", "NIST"),
    ("acetophenone", "CC(=O)c1ccccc1", (120, 105, 77, 51), "acylium", "NIST"),
    ("butyrophenone", "CCCC(=O)c1ccccc1", (148, 120, 105, 77), "McLafferty", "McL"),
    ("2-hexanone", "CCCCC(C)=O", (100, 58, 43), "McLafferty", "NIST"),
    ("3-pentanone", "CCC(=O)CC", (86, 57), "acylium", "NIST"),
    ("pentanal", "CCCCC=O", (44, 57), "McLafferty", "NIST"),
    ("benzaldehyde", "O=Cc1ccccc1", (106, 105, 77, 51), "aldehyde", "NIST"),
    ("methyl butanoate", "CCCC(=O)OC", (74, 71, 43, 59), "McLafferty", "SWK"),
    ("ethyl benzoate", "CCOC(=O)c1ccccc1", (150, 122, 105, 77), "acylium", "NIST"),
    ("benzoic acid", "O=C(O)c1ccccc1", (122, 105, 77), "acylium", "NIST"),
    ("butanoic acid", "CCCC(=O)O", (60,), "McLafferty", "NIST"),
    ("phenyl acetate", "CC(=O)Oc1ccccc1", (136, 94, 43), "ketene", "NIST"),
    ("acetanilide", "CC(=O)Nc1ccccc1", (135, 93, 43), "ketene", "NIST"),
    ("anisole", "COc1ccccc1", (108, 93, 78, 65), "formaldehyde", "NIST"),
    ("phenetole", "CCOc1ccccc1", (122, 94), "alkene", "NIST"),
    ("phenol", "Oc1ccccc1", (94, 66, 65), "CO", "NIST"),
    ("benzyl alcohol", "OCc1ccccc1", (108, 107, 79, 77), "", "NIST"),
    ("1-butanamine", "CCCCN", (73, 30), "amine", "NIST"),
    ("diethylamine", "CCNCC", (73, 58), "amine", "NIST"),
    ("2-butanol", "CCC(C)O", (59, 45), "alcohol", "NIST"),
    ("tert-butyl alcohol", "CC(C)(C)O", (59,), "alcohol", "NIST"),
    ("1-butanol", "CCCCO", (56, 31), "water", "NIST"),
    ("diethyl ether", "CCOCC", (74, 59), "ether", "NIST"),
    ("cyclohexene", "C1=CCCCC1", (82, 54), "retro-Diels-Alder", "NIST"),
    ("limonene", "CC1=CCC(CC1)C(C)=C", (136, 68), "retro-Diels-Alder", "McL"),
    ("cyclohexanone", "O=C1CCCCC1", (98, 55), "ring cleavage", "NIST"),
    ("cyclohexanol", "OC1CCCCC1", (82, 57), "ring cleavage", "NIST"),
    ("nitrobenzene", "O=[N+]([O-])c1ccccc1", (123, 93, 77, 51), "NO2", "NIST"),
    ("2-nitrotoluene", "Cc1ccccc1[N+](=O)[O-]", (137, 120), "ortho effect", "McL"),
    ("chlorobenzene", "Clc1ccccc1", (112, 77), "halogen", "NIST"),
    ("2-bromopropane", "CC(C)Br", (122, 43), "halogen", "NIST"),
    ("methyl salicylate", "COC(=O)c1ccccc1O", (152, 120, 92), "ortho", "NIST"),
    ("trimethylsilyl ether of phenol", "C[Si](C)(C)Oc1ccccc1", (166, 151), "silicon", "NIST"),
    ("acetone dimethyl ketal", "COC(C)(C)OC", (89, 73), "acetal", "NIST"),
    (
        "methyl p-tolyl sulfone",
        "Cc1ccc(cc1)S(C)(=O)=O",
        (170, 155, 91),
        "sulfonyl",
        "NIST",
    ),
    ("azidobenzene", "[N-]=[N+]=Nc1ccccc1", (119, 91), "N2", "NIST"),
    ("benzyl acetate", "CC(=O)OCc1ccccc1", (150, 108, 91, 43), "", "NIST"),
]


@pytest.mark.parametrize(
    ("name", "smiles", "peaks", "rule", "source"), SPECTRA, ids=[row[0] for row in SPECTRA]
)
def test_prominent_ions_are_predicted(
    name: str, smiles: str, peaks: tuple[int, ...], rule: str, source: str
) -> None:
    ions = predict_ions(read_structure(smiles), least=0.03)
    predicted = {round(ion.mz) for ion in ions}
    assert set(peaks) <= predicted, f"{name}: {set(peaks) - predicted} ({source})"
    assert any(rule in ion.label for ion in ions), name


def test_molecular_ion_leads_and_keeps_all_atoms() -> None:
    structure = read_structure("CC(=O)c1ccc(OC)cc1")
    first = predict_ions(structure)[0]
    assert first.label.startswith("M+.")
    assert first.mz == pytest.approx(150.0675, abs=1e-4)
    assert first.atoms == tuple(range(len(structure.atoms)))


def test_ions_never_hold_more_than_the_molecule_plus_hydrogen() -> None:
    for smiles in ("CCOC(=O)C(CC)C(=O)OCC", "CC(C)CN(C)Cc1ccccc1Br", "C1CCC2(CC1)OCCO2", "O=C1CCCC=C1"):
        structure = read_structure(smiles)
        whole = predict_ions(structure)[0].mz
        for ion in predict_ions(structure):
            assert 10 < ion.mz <= whole + 1e-6
            assert 0 < ion.weight <= 1
            assert ion.source
            assert ion.atoms


def test_the_larger_radical_is_lost_more_readily() -> None:
    """Largest-alkyl-loss rule (McL): 2-hexanone gives more m/z 43 than m/z 85."""
    weight = {round(ion.mz): ion.weight for ion in predict_ions(read_structure("CCCCC(C)=O"))}
    assert weight[43] > weight.get(85, 0)


def test_meaning_tables_agree_with_exact_masses() -> None:
    for nominal in range(1, 300):
        for row in ions_at(nominal) + losses_of(nominal):
            formula = parse_formula(row.formula)
            mass = exact_mass(formula) - (5.4858e-4 if row.kind == "ion" else 0)
            assert row.exact == pytest.approx(mass, abs=2e-4), row
            assert round(row.exact) == row.nominal, row


def test_tropylium_and_water_read_off() -> None:
    assert any("benzyl" in row.indicates for row in ions_at(91))
    assert any("alcohol" in row.indicates for row in losses_of(18))
