"""Molecular formulas: reading, masses, unsaturation, isotope patterns, candidates from a mass, combustion."""

from hoodside.predict.formula.adducts import Adduct, adduct_mz, adduct_names, parse_adduct
from hoodside.predict.formula.analysis import (
    CombustionLine,
    SolvateFit,
    combustion_check,
    mass_percent,
    solvate_fits,
)
from hoodside.predict.formula.candidates import FormulaCandidate, candidate_formulas
from hoodside.predict.formula.masses import average_mass, exact_mass, nominal_mass
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import formula_of, parse_composition, parse_formula
from hoodside.predict.formula.pattern import IsotopePeak, isotope_pattern
from hoodside.predict.formula.shortfall import Fit, Shortfall, fit_of, shortfall
from hoodside.predict.formula.unsaturation import formula_doubts, nitrogen_rule, unsaturation

__all__ = [
    "Adduct",
    "CombustionLine",
    "Fit",
    "Formula",
    "FormulaCandidate",
    "IsotopePeak",
    "Shortfall",
    "SolvateFit",
    "adduct_mz",
    "adduct_names",
    "average_mass",
    "candidate_formulas",
    "combustion_check",
    "exact_mass",
    "fit_of",
    "formula_doubts",
    "formula_of",
    "isotope_pattern",
    "mass_percent",
    "nitrogen_rule",
    "nominal_mass",
    "parse_adduct",
    "parse_composition",
    "parse_formula",
    "shortfall",
    "solvate_fits",
    "unsaturation",
]
