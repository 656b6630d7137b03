"""Amounts against published worked examples of uncertainty and of quantitative NMR (sources beside each)."""

from __future__ import annotations

from typing import Any

import pytest

from hoodside.amounts.question import answer
from hoodside.amounts.uncertain import Quantity, propagate, weighted_mean
from hoodside.errors import InvalidInputError

# EURACHEM/CITAC Guide CG 4, Quantifying Uncertainty in Analytical Measurement, 3rd ed. 2012, appendix A
# (recalled). Each row: what, model, inputs (value, standard uncertainty), published value and uncertainty.
EURACHEM = [
    (
        "A1: cadmium standard, mg/L",
        lambda v: 1000 * v["m"] * v["P"] / v["V"],
        {"m": (100.28, 0.05), "P": (0.9999, 0.000058), "V": (100.0, 0.07)},
        1002.7,
        0.9,
    ),
    (
        "A2: sodium hydroxide titre, mol/L",
        lambda v: 1000 * v["m"] * v["P"] * v["rep"] / (v["M"] * v["V"]),
        {
            "m": (0.3888, 0.00013),
            "P": (1.0, 0.00029),
            "rep": (1.0, 0.0005),
            "M": (204.2212, 0.0038),
            "V": (18.64, 0.013),
        },
        0.10214,
        0.00010,
    ),
    (
        "A3: hydrochloric acid titre, mol/L",
        lambda v: 1000 * v["m"] * v["P"] * v["VT2"] * v["rep"] / (v["VT1"] * v["M"] * v["VHCl"]),
        {
            "m": (0.3888, 0.00013),
            "P": (1.0, 0.00029),
            "rep": (1.0, 0.001),
            "M": (204.2212, 0.0038),
            "VT2": (14.89, 0.015),
            "VT1": (18.64, 0.016),
            "VHCl": (15.0, 0.011),
        },
        0.10139,
        0.00018,
    ),
]


@pytest.mark.parametrize(("what", "model", "inputs", "value", "u"), EURACHEM, ids=lambda v: str(v)[:12])
def test_propagation_gives_the_published_uncertainty(
    what: str, model: Any, inputs: dict[str, tuple[float, float]], value: float, u: float
) -> None:
    found = propagate(model, {name: Quantity(*pair) for name, pair in inputs.items()})
    assert found.value == pytest.approx(value, rel=5e-4), what
    assert found.u == pytest.approx(u, rel=0.09), what
    assert sum(found.shares.values()) == pytest.approx(1)


def test_sum_and_difference_add_variances() -> None:
    """GUM 5.1.3: for a sum the variances add."""
    found = propagate(lambda v: v["a"] - v["b"], {"a": Quantity(10, 3), "b": Quantity(4, 4)})
    assert (found.value, found.u) == pytest.approx((6, 5))


def test_scatter_beyond_the_stated_errors_widens_the_mean() -> None:
    """Birge ratio, Phys. Rev. 1932, 40, 207: two values five standard errors apart."""
    found = weighted_mean([Quantity(1.0, 0.1), Quantity(1.5, 0.1)])
    assert found.value == pytest.approx(1.25)
    assert found.u == pytest.approx(0.25)


PURITY: dict[str, Any] = {
    "kind": "purity",
    "analyte": {
        "name": "analyte",
        "signals": [{"integral": 100.0, "protons": 2, "u": 0.15}],
        "mass": 20.0,
        "u": 0.01,
        "molar_mass": 200.0,
    },
    "standard": {
        "name": "maleic acid",
        "signals": [{"integral": 100.0, "protons": 2, "u": 0.15}],
        "mass": 11.6072,
        "u": 0.01,
        "formula": "C4H4O4",
        "purity": 0.999,
        "u_purity": 0.0005,
    },
}


def test_purity_equation_of_internal_standard() -> None:
    """Equal moles of 200 g/mol analyte and maleic acid (116.072, BIPM 2018/01): purity that of the standard.

    Equation: Malz and Jancke, J. Pharm. Biomed. Anal. 2005, 38, 813.
    """
    found = answer(PURITY)["purity_percent"]
    assert found["value"] == pytest.approx(99.9, abs=0.01)
    relative = (2 * 0.0015**2 + 0.0005**2 + (0.01 / 11.6072) ** 2 + (0.0005 / 0.999) ** 2) ** 0.5
    assert found["u"] == pytest.approx(99.9 * relative, rel=1e-3)
    assert found["expanded"] == pytest.approx(2 * found["u"])


def test_what_a_standard_does_not_go_with_is_said() -> None:
    """Maleic acid makes esters in CD3OD: BIPM Rapport 2018/01 (qNMR internal standard reference data)."""
    assert any("CD3OD" in said and "BIPM" in said for said in answer(PURITY)["assumptions"])
    unknown = {**PURITY, "standard": {**PURITY["standard"], "name": "what stood there"}}
    assert not any("BIPM" in said for said in answer(unknown)["assumptions"])


def test_two_products_of_one_name_are_both_counted() -> None:
    """One part start beside twice one part product: two thirds converted (common practice)."""
    one = {"name": "diol", "signals": [{"integral": 1.0, "protons": 1}]}
    found = answer({"kind": "conversion", "start": {**one, "name": "alkene"}, "products": [one, one]})
    assert found["conversion_percent"]["value"] == pytest.approx(100 * 2 / 3)


def test_purity_falls_in_proportion_to_the_integral() -> None:
    """Proportionality of area and moles: the basis of quantitative NMR (same source)."""
    question = {**PURITY, "analyte": {**PURITY["analyte"], "signals": [{"integral": 90.0, "protons": 2}]}}
    assert answer(question)["purity_percent"]["value"] == pytest.approx(0.9 * 99.9, abs=0.01)


def test_purity_counts_protons() -> None:
    """A 3 H singlet of the analyte against the 2 H line of the standard (same source)."""
    question = {**PURITY, "analyte": {**PURITY["analyte"], "signals": [{"integral": 150.0, "protons": 3}]}}
    assert answer(question)["purity_percent"]["value"] == pytest.approx(99.9, abs=0.01)


def test_yield_of_a_textbook_esterification() -> None:
    """10.0 g benzoic acid gives 9.50 g methyl benzoate: 85.2 % (CRC molar masses)."""
    found = answer(
        {
            "kind": "yield",
            "product": {"mass": 9.50, "formula": "C8H8O2"},
            "limiting": {"mass": 10.0, "formula": "C7H6O2"},
        }
    )["yield_percent"]
    assert found["value"] == pytest.approx(85.2, abs=0.1)


def test_yield_allows_for_purity() -> None:
    """The same crop at 92 % purity: 78.4 % (common practice)."""
    found = answer(
        {
            "kind": "yield",
            "product": {"mass": 9.50, "formula": "C8H8O2", "purity": 0.92, "u_purity": 0.01},
            "limiting": {"mass": 10.0, "formula": "C7H6O2"},
        }
    )["yield_percent"]
    assert found["value"] == pytest.approx(78.4, abs=0.1)
    assert found["u"] == pytest.approx(78.4 / 92, rel=0.01)


def two(first: float, second: float) -> list[dict[str, Any]]:
    return [
        {"name": "a", "signals": [{"integral": first, "protons": 3, "u": 0.05}], "formula": "C2H6O"},
        {"name": "b", "signals": [{"integral": second, "protons": 1, "u": 0.05}], "formula": "H2O"},
    ]


def test_ratio_of_diastereomers() -> None:
    """A 3 H doublet of 2.85 against a 1 H line of 0.05 gives 95:5 (common practice)."""
    found = answer({"kind": "ratio", "species": two(2.85, 0.05)})
    assert found["mole_percent"]["a"]["value"] == pytest.approx(95.0)
    assert found["ratio"]["value"] == pytest.approx(19.0)
    assert found["mole_percent"]["a"]["u"] == pytest.approx(found["mole_percent"]["b"]["u"])
    assert found["mole_percent"]["a"]["u"] > 0


def test_mass_percent_of_ethanol_in_water() -> None:
    """Equimolar ethanol and water: 71.9 % ethanol by mass (CRC molar masses 46.07 and 18.02)."""
    found = answer({"kind": "ratio", "species": two(3.0, 1.0)})
    assert found["mass_percent"]["a"]["value"] == pytest.approx(71.9, abs=0.05)


def test_conversion_from_start_and_product() -> None:
    """Start 0.25 per H, product 0.75 per H: 75 % (common practice)."""
    found = answer(
        {
            "kind": "conversion",
            "start": {"name": "start", "signals": [{"integral": 0.5, "protons": 2}]},
            "products": [{"name": "product", "signals": [{"integral": 2.25, "protons": 3}]}],
        }
    )
    assert found["conversion_percent"]["value"] == pytest.approx(75.0)
    assert 0 < found["conversion_percent"]["u"] < 3


def test_ethyl_acetate_left_in_a_product() -> None:
    """Quartet 4.12 (2 H) of ethyl acetate, 88.11 g/mol: Gottlieb et al., J. Org. Chem. 1997, 62, 7512."""
    found = answer(
        {
            "kind": "solvent",
            "nmr_solvent": "CDCl3",
            "main": {"name": "product", "signals": [{"integral": 1.0, "protons": 1}], "molar_mass": 176.22},
            "solvents": [{"name": "ethyl acetate", "ppm": 4.12, "integral": 0.2}],
        }
    )
    assert found["mole_percent"]["ethyl acetate"]["value"] == pytest.approx(100 / 11, abs=0.01)
    assert found["mass_percent"]["ethyl acetate"]["value"] == pytest.approx(4.76, abs=0.02)


@pytest.mark.parametrize(
    ("question", "field"),
    [
        ({"kind": "guess"}, "kind"),
        ({"kind": "yield"}, "product"),
        ({"kind": "ratio", "species": []}, "species"),
        ({"kind": "ratio", "species": two(0.0, 1.0)}, "signals"),
        (
            {"kind": "conversion", "start": {"name": "s", "signals": [{"integral": "x", "protons": 1}]}},
            "start",
        ),
    ],
)
def test_bad_questions_name_the_field(question: dict[str, Any], field: str) -> None:
    with pytest.raises(InvalidInputError) as caught:
        answer(question)
    assert field in caught.value.field
