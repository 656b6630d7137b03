"""Puts the schemes together: one predicted group per set of equivalent hydrogens."""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.symmetry import HydrogenSet, hydrogen_sets
from hoodside.predict.model import ProtonGroup, Term
from hoodside.predict.proton.alkene import estimate_alkene
from hoodside.predict.proton.aromatic import estimate_aromatic
from hoodside.predict.proton.classes import class_estimates
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.exchangeable import ExchangeRange, exchange_ranges
from hoodside.predict.proton.schemes import combine
from hoodside.predict.proton.sp3 import estimate_sp3
from hoodside.predict.proton.view import View

_UNKNOWN = Estimate("unknown", "other H", (Term("middle of the usual range", 4.0, "common practice"),), 2.5)


def predict_protons(structure: Structure, solvent: str = "CDCl3") -> tuple[ProtonGroup, ...]:
    """Predicted 1H shifts (ppm from TMS) of every set of equivalent H, patterns and couplings left open.

    Args:
        structure: any structure; every H gets a value, with a wide deviation where no scheme knows it.
        solvent: a name from facts/residual_solvents.csv; unknown solvents count as CDCl3.
    Source: schemes and tables named in the terms of each group.
    """
    view = View(structure)
    ranges = exchange_ranges(structure, solvent)
    classes = class_estimates(structure)
    groups = []
    for hydrogens in hydrogen_sets(structure):
        atom = hydrogens.atoms[0]
        if atom in ranges:
            groups.append(_exchangeable(hydrogens, ranges[atom]))
        else:
            groups.append(_fixed(hydrogens, scheme_estimate(view, classes, atom, hydrogens.slot)))
    return tuple(groups)


def scheme_estimate(view: View, classes: dict[int, Estimate], atom: int, slot: int) -> Estimate:
    """The joint estimate of all schemes that apply to one H."""
    found = [classes[atom]] if atom in classes else []
    if not found or found[0].sd > 0:
        found = _by_bonding(view, atom, slot) + found
    return combine(found) if found else _UNKNOWN


def _by_bonding(view: View, atom: int, slot: int) -> list[Estimate]:
    if view.structure.atoms[atom].symbol != "C":
        return []
    if view.structure.atoms[atom].aromatic:
        return estimate_aromatic(view, atom)
    if view.is_saturated(atom):
        return estimate_sp3(view, atom)
    far = view.alkene_partner(atom)
    return estimate_alkene(view, atom, far, slot) if far is not None else []


def _fixed(hydrogens: HydrogenSet, estimate: Estimate) -> ProtonGroup:
    return ProtonGroup(
        atoms=hydrogens.atoms,
        n=hydrogens.n,
        ppm=estimate.ppm,
        sd=estimate.sd,
        mult="",
        j=(),
        exchangeable=False,
        equivalence=hydrogens.relation,
        environment=estimate.environment,
        terms=estimate.terms,
    )


def _exchangeable(hydrogens: HydrogenSet, found: ExchangeRange) -> ProtonGroup:
    return ProtonGroup(
        atoms=hydrogens.atoms,
        n=hydrogens.n,
        ppm=found.term.value,
        sd=found.sd,
        mult="",
        j=(),
        exchangeable=True,
        equivalence=hydrogens.relation,
        environment=found.name,
        terms=(found.term,),
        lo=found.lo,
        hi=found.hi,
    )
