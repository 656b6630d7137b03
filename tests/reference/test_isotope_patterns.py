"""Isotope patterns against published ratio tables and brute-force arithmetic."""

from __future__ import annotations

import itertools
import math

import pytest
from rdkit import Chem

from hoodside.predict.formula import exact_mass, isotope_pattern, parse_formula

# M, M+2, M+4, M+6 for Cl and Br combinations: Silverstein, Webster & Kiemle, Spectrometric Identification of
# Organic Compounds, 7th ed. 2005, table of halogen isotope peaks (relative to M = 100); from memory. Made
# with rounded abundances (Cl 32.5 %, Br 98.0 %): an error of 1.5 % for every heavy atom in the peak.
HALOGENS = [
    ("Cl", (32.5,)),
    ("Cl2", (65.3, 10.6)),
    ("Cl3", (97.8, 31.9, 3.5)),
    ("Cl4", (131.0, 63.9, 14.0)),
    ("Br", (97.9,)),
    ("Br2", (195.0, 95.5)),
    ("Br3", (293.0, 286.0, 93.4)),
    ("BrCl", (130.0, 31.9)),
    ("BrCl2", (163.0, 74.4, 10.4)),
    ("Br2Cl", (228.0, 159.0, 31.2)),
]


@pytest.mark.parametrize(("text", "ratios"), HALOGENS, ids=[row[0] for row in HALOGENS])
def test_halogen_ratios(text: str, ratios: tuple[float, ...]) -> None:
    peaks = {peak.nominal: peak.fraction for peak in isotope_pattern(parse_formula(text), min_rel=0.0001)}
    first = min(peaks)
    for step, ratio in enumerate(ratios, start=1):
        assert 100 * peaks[first + 2 * step] / peaks[first] == pytest.approx(
            ratio, rel=0.03 * (step + 1) / 2 + 0.005
        )


# Contribution per atom to M+1 and M+2 in per cent of M: McLafferty & Turecek, Interpretation of Mass Spectra,
# 4th ed. 1993, table 2.1 (C 1.1, N 0.37, Si 5.1/3.4, S 0.8/4.4, O -/0.20).
PER_ATOM = [
    ("C", 1, 1.1),
    ("N", 1, 0.37),
    ("Si", 1, 5.1),
    ("Si", 2, 3.4),
    ("S", 1, 0.8),
    ("S", 2, 4.4),
    ("O", 2, 0.2),
]


@pytest.mark.parametrize(("element", "step", "ratio"), PER_ATOM)
def test_contribution_per_atom(element: str, step: int, ratio: float) -> None:
    peaks = {peak.nominal: peak.fraction for peak in isotope_pattern(parse_formula(element), min_rel=0)}
    first = min(peaks)
    assert 100 * peaks[first + step] / peaks[first] == pytest.approx(ratio, rel=0.06)


def _brute_force(counts: dict[str, int]) -> dict[int, float]:
    """Every assignment of isotopes to atoms, from RDKit's own isotope table (NIST)."""
    table = Chem.GetPeriodicTable()
    atoms = [element for element, n in counts.items() for _ in range(n)]
    choices = []
    for element in atoms:
        z = table.GetAtomicNumber(element)
        numbers = range(z, 3 * z + 3)
        isotopes = [(a, table.GetAbundanceForIsotope(z, a) / 100) for a in numbers]
        choices.append([isotope for isotope in isotopes if isotope[1] > 0])
    totals: dict[int, float] = {}
    for picked in itertools.product(*choices):
        number = sum(a for a, _ in picked)
        totals[number] = totals.get(number, 0) + math.prod(p for _, p in picked)
    return totals


@pytest.mark.parametrize(
    "counts", [{"C": 6, "H": 2, "Br": 1, "Cl": 1}, {"C": 4, "S": 2, "O": 2}, {"Si": 3, "C": 3}]
)
def test_pattern_equals_counting_every_isotopologue(counts: dict[str, int]) -> None:
    expected = _brute_force(counts)
    text = "".join(f"{element}{n}" for element, n in counts.items())
    for peak in isotope_pattern(parse_formula(text), min_rel=0.01):
        assert peak.fraction == pytest.approx(expected[peak.nominal], abs=2e-3)


@pytest.mark.parametrize("text", ["C20H24N2O4S", "C12H10Br2", "C9H21BrSn", "C60", "[C8H11N4O2]+", "C6D6"])
def test_fine_pattern_adds_up_to_the_nominal_one(text: str) -> None:
    formula = parse_formula(text)
    coarse = isotope_pattern(formula, min_rel=0)
    fine = isotope_pattern(formula, min_rel=0, resolving_power=1e7)
    assert sum(peak.fraction for peak in fine) == pytest.approx(1, abs=5e-5)
    for peak in coarse:
        parts = [p for p in fine if p.nominal == peak.nominal]
        assert sum(p.fraction for p in parts) == pytest.approx(peak.fraction, abs=1e-8)
        if peak.fraction > 1e-6:
            centre = sum(p.fraction * p.mz for p in parts) / sum(p.fraction for p in parts)
            assert centre == pytest.approx(peak.mz, abs=1e-5)


def test_first_peak_of_an_organic_ion_is_its_exact_mass() -> None:
    formula = parse_formula("[C33H41N2O9]+")
    assert isotope_pattern(formula)[0].mz == pytest.approx(exact_mass(formula), abs=1e-9)


def test_exact_spacings() -> None:
    """13C-12C 1.00335 u, 37Cl-35Cl 1.99705 u, 81Br-79Br 1.99795 u (AME2020)."""
    for text, number, spacing in (("C10", 1, 1.003355), ("Cl", 2, 1.997050), ("Br", 2, 1.997951)):
        first, *rest = isotope_pattern(parse_formula(text), min_rel=0, resolving_power=1e6)
        later = next(peak for peak in rest if peak.nominal == first.nominal + number)
        assert later.mz - first.mz == pytest.approx(spacing, abs=2e-6)


def test_labelled_atoms_have_one_isotope() -> None:
    (peak,) = isotope_pattern(parse_formula("[13C]"))
    assert peak.mz == pytest.approx(13.00335, abs=1e-5)
