"""Puts the schemes together: one predicted group per set of equivalent hydrogens."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import pairwise
from math import fsum

from hoodside.molecule import Structure
from hoodside.molecule.symmetry import HydrogenSet, hydrogen_sets
from hoodside.predict.model import ProtonGroup, Term
from hoodside.predict.proton.alkene import estimate_alkene
from hoodside.predict.proton.aromatic import estimate_aromatic
from hoodside.predict.proton.classes import class_estimates
from hoodside.predict.proton.correction import Refinement, refine, set_apart
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.exchangeable import ExchangeRange, exchange_ranges
from hoodside.predict.proton.features import hydrogen_features
from hoodside.predict.proton.rotamers import split_rotamers
from hoodside.predict.proton.schemes import combine
from hoodside.predict.proton.sp3 import estimate_sp3
from hoodside.predict.proton.view import View

_UNKNOWN = Estimate("unknown", "other H", (Term("middle of the usual range", 4.0, "common practice"),), 2.5)


@dataclass(frozen=True, slots=True)
class Site:
    """One set of equivalent H: what the schemes say of it, and what the learned correction may hang on."""

    hydrogens: HydrogenSet
    estimate: Estimate
    features: dict[str, float]
    exchange: ExchangeRange | None
    twin: int | None = None  # 0 or 1: which of two that differ only by where they stand


def predict_protons(structure: Structure, solvent: str = "CDCl3") -> tuple[ProtonGroup, ...]:
    """Predicted 1H shifts (ppm from TMS) of every set of equivalent H, patterns and couplings left open.

    Args:
        structure: any structure; every H gets a value, with a wide deviation where no scheme knows it.
        solvent: a name from facts/residual_solvents.csv; unknown solvents count as CDCl3.
    Source: schemes and tables named in the terms of each group.
    """
    found = sites(structure, solvent)
    return tuple(_group(site, refined) for site, refined in zip(found, refinements(found), strict=True))


def refinements(found: Sequence[Site]) -> list[Refinement | None]:
    """Correction and deviation of every site that does not exchange."""
    refined = [
        refine(site.features, site.estimate.environment) if site.exchange is None else None for site in found
    ]
    for i, j in pairs_of(found):
        one, two = refined[i], refined[j]
        if one is not None and two is not None:
            shifts = (found[i].estimate.ppm + one.delta, found[j].estimate.ppm + two.delta)
            moves = set_apart(*shifts, found[i].features)
            refined[i] = replace(one, terms=(*one.terms, moves[0]))
            refined[j] = replace(two, terms=(*two.terms, moves[1]))
    return refined


def pairs_of(found: Sequence[Site]) -> list[tuple[int, int]]:
    """Indices of sites that differ only by where they stand: the H of a CH2, the methyls of a slow rotor."""
    twins = [i for i, site in enumerate(found) if site.twin is not None]
    return [(i, j) for i, j in pairwise(twins) if (found[i].twin, found[j].twin) == (0, 1)]


def sites(structure: Structure, solvent: str) -> list[Site]:
    """Every set of equivalent H with its scheme estimate, in the order of ``hydrogen_sets``.

    The methyls of a dimethyl amide, which rotate slowly, are two sets.
    """
    view = View(structure)
    ranges = exchange_ranges(structure, solvent)
    classes = class_estimates(structure)
    found = []
    for hydrogens, rotamer in split_rotamers(structure, hydrogen_sets(structure)):
        atom = hydrogens.atoms[0]
        if atom in ranges:
            found.append(Site(hydrogens, _UNKNOWN, {}, ranges[atom]))
            continue
        estimate = combine(scheme_estimates(view, classes, atom, hydrogens.slot))
        features = hydrogen_features(view, atom, hydrogens.slot, estimate, solvent)
        is_pair = hydrogens.relation == "diastereotopic" and view.is_saturated(atom)
        found.append(Site(hydrogens, estimate, features, None, hydrogens.slot if is_pair else rotamer))
    return found


def scheme_estimates(view: View, classes: dict[int, Estimate], atom: int, slot: int) -> list[Estimate]:
    """What each scheme that applies says of one H; the first names the class of hydrogen."""
    found = _by_bonding(view, atom, slot)
    if atom in classes:
        found.append(classes[atom])
    return found or [_UNKNOWN]


def _by_bonding(view: View, atom: int, slot: int) -> list[Estimate]:
    if view.structure.atoms[atom].symbol != "C":
        return []
    if view.structure.atoms[atom].aromatic:
        return estimate_aromatic(view, atom)
    if view.is_saturated(atom):
        return estimate_sp3(view, atom, slot)
    far = view.alkene_partner(atom)
    return estimate_alkene(view, atom, far, slot) if far is not None else []


def _group(site: Site, refined: Refinement | None) -> ProtonGroup:
    if site.exchange is not None:
        return _exchangeable(site.hydrogens, site.exchange)
    return _fixed(site, refined or refine(site.features, site.estimate.environment))


def _fixed(site: Site, refined: Refinement) -> ProtonGroup:
    terms = (*site.estimate.terms, *refined.terms)
    return ProtonGroup(
        atoms=site.hydrogens.atoms,
        n=site.hydrogens.n,
        ppm=fsum(term.value for term in terms),
        sd=refined.sd,
        mult="",
        j=(),
        exchangeable=False,
        equivalence=site.hydrogens.relation,
        environment=site.estimate.environment,
        terms=terms,
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
