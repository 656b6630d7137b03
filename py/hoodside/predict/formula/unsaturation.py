"""Degree of unsaturation, the nitrogen rule, and what looks odd about a formula."""

from __future__ import annotations

from functools import cache

from hoodside.facts.table import load_table
from hoodside.predict.formula.masses import nominal_mass
from hoodside.predict.formula.model import Formula


@cache
def _valences() -> dict[str, int]:
    return {row["element"]: int(row["valence"]) for row in load_table("valences")}


def valence_of(element: str) -> int:
    """The usual valence of an element in organic molecules; 0 when there is none to rely on."""
    return _valences().get(element, 0)


def unsaturation(formula: Formula) -> float | None:
    """Rings plus multiple bonds, by the general valence formula.

    ``1 + sum n (v - 2) / 2 + charge / 2`` with C, Si 4; N, P, B 3; O, S, Se 2; H, halogens and alkali
    metals 1. Each positive charge is taken as one H+ gained (each negative as one lost), so an ammonium
    ion has the number of its amine and a carboxylate that of its acid. Half a unit left over tells an
    odd number of electrons. None when an element has no valence that can be relied on (most metals).

    Source: Pellegrin, J. Chem. Educ. 1983, 60, 626.
    """
    valences = _valences()
    if not formula.elements.keys() <= valences.keys():
        return None
    twice = sum(n * (valences[element] - 2) for element, n in formula.elements.items())
    return 1 + (twice + formula.charge) / 2


def nitrogen_rule(formula: Formula) -> bool | None:
    """Whether nominal mass and number of N are both odd or both even, as in a closed-shell neutral.

    None when the formula holds an element the rule does not speak of.
    Source: McLafferty & Turecek, Interpretation of Mass Spectra, 4th ed. 1993.
    """
    covered = {"C", "H", "N", "O", "S", "P", "Si", "F", "Cl", "Br", "I"}
    if formula.charge or not formula.elements.keys() <= covered or formula.counts.get("2H", 0):
        return None
    return nominal_mass(formula) % 2 == formula.count("N") % 2


def formula_doubts(formula: Formula) -> tuple[str, ...]:
    """Sentences on what makes a well-formed formula unlikely to be meant."""
    degree = unsaturation(formula)
    if degree is None or not formula.count("C"):
        return ()
    if degree < 0:
        return (
            f"{formula} holds more hydrogen or halogen than its valences can bind"
            + ("; was 0 typed for O?" if formula.count("H") >= 10 and not formula.count("O") else "."),
        )
    if degree % 1:
        return (f"{formula} has an odd number of electrons: a radical, or one H too many or too few.",)
    return ()
