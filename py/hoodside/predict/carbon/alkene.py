"""C=C carbons: ethylene + increments of what stands on this end and on the other.

Increments: Pretsch, Buhlmann and Badertscher, Structure Determination of Organic Compounds
(facts/carbon_alkene.csv).
"""

from __future__ import annotations

from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.carbon.substituents import Pattern, patterns_of, substituents_in
from hoodside.predict.model import Term

_BASE = "base (ethylene)"
_PLAIN = "alpha C (z1) / alpha-prime C (z2)"
_CIS = "correction: alpha and alpha-prime cis (Z)"


def estimate_alkene(structure: Structure, atom: int, partner: int) -> Estimate:
    """The additive estimate for ``atom`` of the double bond ``atom``=``partner``, in ppm from TMS."""
    groups = substituents_in(structure, "carbon_alkene", _patterns())
    base = _rows()[_BASE]
    terms = [Term("ethylene", float(base["z1"]), base["source"])]
    for end, far, column, where in (
        (atom, partner, "z1", "on this C"),
        (partner, atom, "z2", "on the other C"),
    ):
        for near in structure.neighbours[end]:
            if near != far:
                found = groups.at(near, {end})
                row = found.pattern.row if found else _rows()[_PLAIN]
                name = row["substituent"] if found else structure.atoms[near].symbol
                terms.append(Term(f"{name} {where}", float(row[column]), row["source"]))
    bond = structure.bond_between(atom, partner)
    if bond is not None and bond.stereo == "cis":
        row = _rows()[_CIS]
        terms.append(Term("substituents cis", float(row["z1"]), row["source"]))
    return Estimate(_class_of(structure, atom, partner), tuple(terms))


def _class_of(structure: Structure, atom: int, partner: int) -> str:
    near = {structure.atoms[n].symbol for a in (atom, partner) for n in structure.neighbours[a]} - {"C"}
    return "alkene, hetero" if near else "alkene"


@cache
def _rows() -> dict[str, Row]:
    return {row["substituent"]: row for row in load_table("carbon_alkene")}


@cache
def _patterns() -> tuple[Pattern, ...]:
    skipped = ("base", "correction", "alpha", "beta", "gamma")
    return patterns_of([row for name, row in _rows().items() if not name.startswith(skipped)])
