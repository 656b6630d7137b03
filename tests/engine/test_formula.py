"""Reading formulas and adduct names, good and bad; candidate search; combustion."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from hoodside.errors import FormulaError, InvalidInputError
from hoodside.molecule import read_structure
from hoodside.predict.formula import (
    Formula,
    candidate_formulas,
    combustion_check,
    formula_doubts,
    formula_of,
    nitrogen_rule,
    parse_adduct,
    parse_composition,
    parse_formula,
    solvate_fits,
    unsaturation,
)

READ = [
    ("C10H12O", "C10H12O"),
    ("(CH3)2CHOH", "C3H8O"),
    ("C6H5NH3+", "[C6H8N]+"),
    ("[C6H8N]+", "[C6H8N]+"),
    ("CuSO4.5H2O", "CuH10O9S"),
    ("CuSO4·5H2O", "CuH10O9S"),
    ("C10H12O·HCl", "C10H13ClO"),
    ("C₆H₁₂O₆", "C6H12O6"),
    ("C6D6", "C6D6"),
    ("C5[13C]H6", "C5[13C]H6"),
    ("^13C6H6", "[13C]6H6"),
    ("Ca2+", "[Ca]2+"),
    ("SO4^2-", "[O4S]2-"),
    ("SO₄²⁻", "[O4S]2-"),
    ("[Cu(NH3)4]2+", "[CuH12N4]2+"),
    ("C6H8N2+", "[C6H8N2]+"),
    (" C 10 H 12 O. ", "C10H12O"),
    ("K4[Fe(CN)6]", "C6FeK4N6"),
    ("ClCH2CH2Cl", "C2H4Cl2"),
    ("Co2(CO)8", "C8Co2O8"),
]

BAD = [
    ("c10h12o", "character 1", "C10H12O"),
    ("C10H12o", "character 7", "C10H12O"),
    ("C6H5CL", "character 6", "C6H5Cl"),
    ("C10H12 0", "character 8", "C10H12 O"),
    ("C10H012", "character 5", "letter O"),
    ("PhCHO", "character 2", "C6H5CHO"),
    ("13C6H6", "character 1", "[13C]"),
    ("C6H4(NO2", "character 5", "Close"),
    ("C6H4)2", "character 5", "Pair"),
    ("C6[99C]", "character 3", "mass number"),
    ("C99999H", "character 2", "number"),
    ("C10!H12", "character 4", "C10H12O"),
    ("", "empty", "C10H12O"),
    ("C10H12O·0.5H2O", "fraction", "without its solvate"),
]


@pytest.mark.parametrize(("typed", "hill"), READ, ids=[row[0] for row in READ])
def test_reads(typed: str, hill: str) -> None:
    assert parse_formula(typed).text == hill


@pytest.mark.parametrize(("typed", "where", "mend"), BAD, ids=[row[0] for row in BAD])
def test_says_what_is_wrong_and_the_mend(typed: str, where: str, mend: str) -> None:
    with pytest.raises(FormulaError) as caught:
        parse_formula(typed)
    assert where in str(caught.value)
    assert mend in caught.value.hint
    assert caught.value.field == "formula"


ELEMENT = st.sampled_from(["C", "H", "N", "O", "S", "Cl", "Br", "Si", "Na", "2H", "13C"])


@given(st.dictionaries(ELEMENT, st.integers(1, 60), min_size=1), st.integers(-3, 3))
def test_text_reads_back_as_itself(counts: dict[str, int], charge: int) -> None:
    formula = Formula.of(counts, charge)
    assert parse_formula(formula.text) == formula


@given(st.text(max_size=30))
def test_any_text_is_read_or_refused_with_a_reason(text: str) -> None:
    hint = "read"
    try:
        parse_composition(text)
    except FormulaError as err:
        hint = err.hint
    assert hint


def test_arithmetic_refuses_to_go_below_nothing() -> None:
    water = parse_formula("H2O")
    assert (parse_formula("C2H6O") - water).text == "C2H4"
    with pytest.raises(FormulaError, match="of O"):
        parse_formula("C2H6") - water


def test_formula_of_a_labelled_charged_structure() -> None:
    assert formula_of(read_structure("[2H]C(Cl)(Cl)Cl")).text == "CDCl3"
    assert formula_of(read_structure("C[NH3+]")).text == "[CH6N]+"


def test_doubts() -> None:
    assert formula_doubts(parse_formula("C10H12O")) == ()
    assert "0 typed for O" in formula_doubts(parse_formula("C10H120"))[0]
    assert "odd number" in formula_doubts(parse_formula("C10H13O"))[0]
    assert unsaturation(parse_formula("Fe2O3")) is None


def test_nitrogen_rule() -> None:
    assert nitrogen_rule(parse_formula("C5H5N")) is True
    assert nitrogen_rule(parse_formula("C5H6N")) is False
    assert nitrogen_rule(parse_formula("C6H5NH3+")) is None


@pytest.mark.parametrize(
    ("typed", "name", "charge"),
    [
        ("M+H", "[M+H]+", 1),
        ("MH+", "[M+H]+", 1),
        ("[M + Na]+", "[M+Na]+", 1),
        ("[M]+•", "[M]+.", 1),
        ("M+.", "[M]+.", 1),
        ("M+", "[M]+.", 1),
        ("M-H", "[M-H]-", -1),
        ("[M−H]−", "[M-H]-", -1),
        ("[M+2H]²⁺", "[M+2H]2+", 2),
        ("M+HCOO", "[M+HCOO]-", -1),
        ("[2M+NH4]+", "[2M+NH4]+", 1),
    ],
)
def test_adduct_names(typed: str, name: str, charge: int) -> None:
    adduct = parse_adduct(typed)
    assert (adduct.name, adduct.charge) == (name, charge)


@pytest.mark.parametrize("typed", ["", "H+", "[M+Qq]+", "M+H+foo", "[M+C6H12]"])
def test_bad_adduct_names(typed: str) -> None:
    with pytest.raises(InvalidInputError) as caught:
        parse_adduct(typed)
    assert caught.value.field == "hrms.adduct"


def test_candidates_are_sorted_whole_and_sensible() -> None:
    found = candidate_formulas(195.0877)
    assert found[0].formula.text == "C8H10N4O2"
    assert [abs(c.error_ppm) for c in found] == sorted(abs(c.error_ppm) for c in found)
    assert all(c.unsaturation >= 0 and c.unsaturation % 1 == 0 for c in found)
    assert all(abs(c.error_ppm) <= 5.0001 for c in found)
    # Without the heteroatom rules more compositions stand.
    assert len(candidate_formulas(195.0877, sensible=False)) > len(found)


def test_candidates_match_a_plain_search() -> None:
    """Every C, H, N, O composition by four loops and nothing clever."""
    target, window = 166.0863, 166.0863 * 10e-6
    proton = 1.00727646
    expected = set()
    for c in range(1, 15):
        for n in range(8):
            for o in range(11):
                for h in range(2 * c + n + 3):
                    mass = 12 * c + 14.0030740 * n + 15.9949146 * o + 1.00782503 * h
                    if abs(mass + proton - target) < window and (h + n) % 2 == 0:
                        expected.add((c, h, n, o))
    limits = {"C": (1, 15), "H": (0, 60), "N": (0, 7), "O": (0, 10)}
    found = candidate_formulas(target, ppm=10, limits=limits, sensible=False)
    assert {tuple(c.formula.count(e) for e in "CHNO") for c in found} == expected


@pytest.mark.parametrize(("mz", "ppm"), [(0.5, 5), (1e6, 5), (200, 0), (200, -1), (200, 1e4)])
def test_candidate_search_refuses_what_it_cannot_do(mz: float, ppm: float) -> None:
    with pytest.raises(InvalidInputError):
        candidate_formulas(mz, ppm=ppm)


def test_combustion_takes_fractional_solvates() -> None:
    dry = combustion_check("C10H12O", {"C": 76.4, "H": 8.3})
    wet = combustion_check("C10H12O·0.5H2O", {"C": 76.4, "H": 8.3})
    assert not dry[0].within
    assert all(line.within for line in wet)
    fits = solvate_fits("C10H12O", {"C": 76.4, "H": 8.3})
    assert ("H2O", 0.5) in [(fit.solvent, fit.amount) for fit in fits]


@pytest.mark.parametrize("found", [{"C": 120.0}, {"C": -1.0}, {"C": 80.0, "H": 40.0}])
def test_impossible_percentages_are_refused(found: dict[str, float]) -> None:
    with pytest.raises(InvalidInputError):
        combustion_check("C10H12O", found)
