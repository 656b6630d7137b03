"""Masses, unsaturation and combustion values against published figures and a second library."""

from __future__ import annotations

import json
from pathlib import Path

import pytest
from rdkit import Chem
from rdkit.Chem import Descriptors, rdMolDescriptors

from hoodside.facts.table import load_table
from hoodside.molecule import read_structure
from hoodside.predict.formula import (
    adduct_mz,
    average_mass,
    candidate_formulas,
    combustion_check,
    exact_mass,
    formula_of,
    mass_percent,
    parse_adduct,
    parse_formula,
    unsaturation,
)

CASES = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))

# Monoisotopic masses as listed by PubChem (NCBI compound pages) and the NIST Chemistry WebBook; from memory.
EXACT = [
    ("caffeine", "C8H10N4O2", 194.0804),
    ("aspirin", "C9H8O4", 180.0423),
    ("glucose", "C6H12O6", 180.0634),
    ("cholesterol", "C27H46O", 386.3549),
    ("benzene", "C6H6", 78.0470),
    ("ethanol", "C2H6O", 46.0419),
    ("toluene", "C7H8", 92.0626),
    ("acetone", "C3H6O", 58.0419),
    ("nicotine", "C10H14N2", 162.1157),
    ("morphine", "C17H19NO3", 285.1365),
    ("quinine", "C20H24N2O2", 324.1838),
    ("vanillin", "C8H8O3", 152.0473),
    ("menthol", "C10H20O", 156.1514),
    ("thiophene", "C4H4S", 84.0034),
    ("chlorobenzene", "C6H5Cl", 112.0080),
    ("bromobenzene", "C6H5Br", 155.9575),
    ("iodobenzene", "C6H5I", 203.9436),
    ("triphenylphosphine", "C18H15P", 262.0911),
    ("reserpine", "C33H40N2O9", 608.2734),
    ("water", "H2O", 18.0106),
]

# Molar masses, g/mol, CRC Handbook of Chemistry and Physics (organic and inorganic tables); from memory.
AVERAGE = [
    ("water", "H2O", 18.015, 0.001),
    ("benzene", "C6H6", 78.112, 0.003),
    ("glucose", "C6H12O6", 180.155, 0.002),
    ("sulfuric acid", "H2SO4", 98.08, 0.01),
    ("copper sulfate pentahydrate", "CuSO4.5H2O", 249.685, 0.02),
    ("sodium chloride", "NaCl", 58.443, 0.005),
    ("bromobenzene", "C6H5Br", 157.008, 0.003),
    ("deuteriochloroform", "CDCl3", 120.384, 0.02),
    ("potassium permanganate", "KMnO4", 158.034, 0.003),
    ("osmium tetroxide", "OsO4", 254.23, 0.01),
]

# Counted on the drawn structure: rings plus pi bonds (Pellegrin, J. Chem. Educ. 1983, 60, 626).
UNSATURATION = [
    ("C6H6", 4),
    ("C10H8", 7),
    ("C6H5NO2", 5),  # nitro counts one, trivalent N convention
    ("C6H5Cl", 4),
    ("C5H5N", 4),
    ("C27H46O", 5),
    ("C8H10N4O2", 6),
    ("C4H10", 0),
    ("C2H2", 2),
    ("C18H15P", 12),
    ("C2H6OS", 0),  # dimethyl sulfoxide, S=O not counted
    ("C9H14OSi", 4),  # trimethylsilyloxybenzene
    ("C6H5NH3+", 4),
    ("[C4H12N]+", 0),
    ("C6H5CO2-", 5),
    ("C6D6", 4),
]

# m/z as printed in accurate-mass lines of the literature and vendor calibration notes; from memory.
IONS = [
    ("C8H10N4O2", "[M+H]+", 195.0877),
    ("C33H40N2O9", "[M+H]+", 609.2807),
    ("C6H12O6", "[M+Na]+", 203.0526),
    ("C6H12O6", "[M-H]-", 179.0561),
    ("C9H8O4", "[M-H]-", 179.0350),
    ("C8H10N4O2", "[M]+.", 194.0798),
    ("C6H12O6", "[M+Cl]-", 215.0328),
    ("C33H40N2O9", "[M+2H]2+", 305.1440),
    ("C8H10N4O2", "[2M+Na]+", 411.1500),
]


@pytest.mark.parametrize(("name", "text", "mass"), EXACT, ids=[row[0] for row in EXACT])
def test_exact_mass(name: str, text: str, mass: float) -> None:
    assert exact_mass(parse_formula(text)) == pytest.approx(mass, abs=6e-5), name


@pytest.mark.parametrize(("name", "text", "mass", "tolerance"), AVERAGE, ids=[row[0] for row in AVERAGE])
def test_average_mass(name: str, text: str, mass: float, tolerance: float) -> None:
    assert average_mass(parse_formula(text)) == pytest.approx(mass, abs=tolerance), name


@pytest.mark.parametrize(("text", "degree"), UNSATURATION)
def test_unsaturation(text: str, degree: int) -> None:
    assert unsaturation(parse_formula(text)) == degree


@pytest.mark.parametrize(("text", "adduct", "mz"), IONS, ids=[f"{t} {a}" for t, a, _ in IONS])
def test_ion_mz(text: str, adduct: str, mz: float) -> None:
    assert adduct_mz(parse_formula(text), adduct) == pytest.approx(mz, abs=1.1e-4)


def test_adduct_table_agrees_with_shifts_built_from_isotope_masses() -> None:
    for row in load_table("ms_adducts"):
        adduct = parse_adduct(row["adduct"])
        assert adduct.mass_shift() == pytest.approx(float(row["mass_shift_exact"]), abs=6e-6), row["adduct"]
        assert (adduct.charge, adduct.molecules) == (int(row["charge"]), int(row["multiplicity"]))


@pytest.mark.parametrize("case", CASES, ids=lambda case: case["id"])
def test_formula_and_mass_agree_with_rdkit(case: dict[str, str]) -> None:
    molecule = Chem.MolFromSmiles(case["smiles"])
    formula = formula_of(read_structure(case["smiles"]))
    assert formula == parse_formula(rdMolDescriptors.CalcMolFormula(molecule))
    # RDKit leaves the electron mass of ions out.
    mass = Descriptors.ExactMolWt(molecule) - formula.charge * 5.4858e-4
    assert exact_mass(formula) == pytest.approx(mass, abs=2e-4)
    assert average_mass(formula) == pytest.approx(Descriptors.MolWt(molecule), rel=4e-4)


def test_printed_formulas_are_those_of_the_structures() -> None:
    for case in CASES:
        if case.get("formula"):
            assert parse_formula(case["formula"]) == formula_of(read_structure(case["smiles"])), case["id"]


def test_isotope_masses_lie_near_their_mass_numbers_and_abundances_sum_to_one() -> None:
    totals: dict[str, float] = {}
    for row in load_table("isotopes"):
        assert float(row["exact_mass"]) == pytest.approx(int(row["A"]), abs=0.11), row
        totals[row["element"]] = totals.get(row["element"], 0) + float(row["abundance"])
    for element, total in totals.items():
        assert total == pytest.approx(1, abs=2e-4), element


def test_atomic_weights_agree_with_isotope_means() -> None:
    """Two independent tables: IUPAC standard atomic weights, and isotope masses times abundances."""
    means: dict[str, float] = {}
    for row in load_table("isotopes"):
        means[row["element"]] = means.get(row["element"], 0) + float(row["exact_mass"]) * float(
            row["abundance"]
        )
    for row in load_table("atomic_weights"):
        assert means[row["element"]] == pytest.approx(float(row["weight"]), rel=4e-4), row["element"]


def test_accurate_mass_finds_its_formula() -> None:
    """The truth must be among what the mass alone allows, for every published compound of usual elements."""
    tried = 0
    for case in CASES[::7]:
        formula = formula_of(read_structure(case["smiles"]))
        if formula.charge or not set(formula.elements) <= set("CHNOS") | {"Cl", "Br", "F"}:
            continue
        limits = {e: (0, 3 * n + 2) for e, n in formula.elements.items()}
        found = candidate_formulas(adduct_mz(formula), ppm=3, limits=limits)
        assert formula in [candidate.formula for candidate in found], case["id"]
        tried += 1
    assert tried > 20


def test_combustion_of_printed_examples() -> None:
    # Textbook worked example (Silverstein; common practice): benzoic acid C 68.85, H 4.95.
    percent = mass_percent("C7H6O2")
    assert percent["C"] == pytest.approx(68.85, abs=0.02)
    assert percent["H"] == pytest.approx(4.95, abs=0.02)
    # Acetanilide, the usual combustion standard: C 71.09, H 6.71, N 10.36 (supplier sheets; from memory).
    acetanilide = mass_percent("C8H9NO")
    assert acetanilide["C"] == pytest.approx(71.09, abs=0.02)
    assert acetanilide["H"] == pytest.approx(6.71, abs=0.02)
    assert acetanilide["N"] == pytest.approx(10.36, abs=0.02)
    lines = {line.element: line for line in combustion_check("C8H9NO", {"C": 71.49, "H": 6.20, "N": 10.4})}
    assert lines["C"].within  # +0.40 passes the usual rule
    assert not lines["H"].within  # -0.51 fails it
    assert lines["N"].within
