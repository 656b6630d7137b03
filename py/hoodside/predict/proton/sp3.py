"""Hydrogens on saturated carbon: base + increments of groups one, two and three bonds away.

Two published sets are used side by side: increments derived from monosubstituted model compounds in CDCl3,
and those of Pretsch, Buhlmann and Badertscher (Structure Determination of Organic Compounds); effects across
three bonds after Beauchamp and Marquez, J. Chem. Educ. 1997, 74, 1483. In a tabulated ring the base is the
value of the ring position, and only groups outside the ring add to it.
"""

from __future__ import annotations

from collections.abc import Iterator
from functools import cache
from itertools import combinations

from hoodside.facts import Row, load_table
from hoodside.predict.model import Term
from hoodside.predict.proton.chairs import axial_terms
from hoodside.predict.proton.environment import sp3_environment
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.schemes import scheme_sd
from hoodside.predict.proton.substituents import Substituent
from hoodside.predict.proton.view import View

#: Scheme -> (set in proton_sp3.csv, column of proton_substituents.csv).
_SETS = {"sp3 observed": ("monosubst_obs", "sp3_observed"), "sp3 Pretsch": ("pretsch_alkane", "sp3_pretsch")}
_KINDS = {1: "CH", 2: "CH2", 3: "CH3", 4: "CH3"}
_GAMMA_SOURCE = "Beauchamp & Marquez, J. Chem. Educ. 1997, 74, 1483"


def estimate_sp3(view: View, atom: int, slot: int) -> list[Estimate]:
    """Estimates of every set that knows all groups at the carbon; the first set always answers."""
    found = [_by_set(view, atom, slot, scheme) for scheme in _SETS]
    return [e for e in found if e is not None]


def _by_set(view: View, atom: int, slot: int, scheme: str) -> Estimate | None:
    name, column = _SETS[scheme]
    kind = _KINDS[view.structure.atoms[atom].hydrogens]
    place = view.places.get(atom)
    if place is not None and not place.in_ring and place.hydrogens != view.structure.atoms[atom].hydrogens:
        place = None
    covered = place.atoms if place is not None else frozenset({atom})
    alpha, beta, gamma = groups_by_reach(view, atom, covered)
    if scheme != "sp3 observed" and any(not group.row[column] for group in (*alpha, *beta)):
        return None
    terms = _base_terms(name, kind, place.term if place else None, place.hydrogens if place else 0)
    terms += [_increment(name, column, group, "alpha", kind) for group in alpha]
    terms += [_increment(name, column, group, "beta", kind) for group in beta]
    terms += _beta_damping(view, atom, kind, terms)
    terms += [Term(f"gamma {g.key}", g.gamma, _GAMMA_SOURCE) for g in gamma if g.gamma]
    terms += _damping(name, kind, view, atom, alpha)
    terms += axial_terms(view, atom, slot)
    label = scheme if place is None else f"{scheme}, ring"
    return Estimate(label, sp3_environment(view, atom), tuple(terms), scheme_sd(label))


def _base_terms(name: str, kind: str, parent: Term | None, hydrogens: int) -> list[Term]:
    own = _rows()[name, "base", f"base {kind}", kind]
    if parent is None:
        return [Term(kind, float(own["delta_ppm"]), own["source"])]
    was = _rows()[name, "base", f"base {_KINDS.get(hydrogens, kind)}", _KINDS.get(hydrogens, kind)]
    change = float(own["delta_ppm"]) - float(was["delta_ppm"])
    return [parent, Term(f"{was['applies_to']} to {kind}", change, own["source"])] if change else [parent]


def groups_by_reach(
    view: View, atom: int, covered: frozenset[int]
) -> tuple[list[Substituent], list[Substituent], list[Substituent]]:
    """Groups one, two and three bonds away along saturated carbons, without the atoms ``covered``."""
    alpha = [view.substituent(atom, n) for n in view.structure.neighbours[atom] if n not in covered]
    beta, gamma = [], []
    for near, far in _steps(view, atom, atom):
        if far not in covered:
            beta.append(view.substituent(near, far))
        for middle, end in _steps(view, near, atom, only=far):
            if end not in covered:
                gamma.append(view.substituent(middle, end))
    return alpha, beta, gamma


def _steps(view: View, atom: int, origin: int, only: int | None = None) -> Iterator[tuple[int, int]]:
    """(saturated neighbour, atom beyond it); a CF3 or epoxide counts as one group and is not entered."""
    for near in view.structure.neighbours[atom]:
        if near == origin or (only is not None and near != only) or not view.is_saturated(near):
            continue
        if view.substituent(atom, near).key in _CLOSED and not view.share_ring(atom, near):
            continue
        for far in view.structure.neighbours[near]:
            if far not in (atom, origin):
                yield near, far


_CLOSED = frozenset({"CF3", "CCl3", "epoxide", "cyclopropyl"})


def _increment(name: str, column: str, group: Substituent, reach: str, kind: str) -> Term:
    row = _rows().get((name, reach, group.row[column], kind))
    if row is None:
        return Term(f"{reach} {group.key}", 0.0, "no published increment")
    return Term(f"{reach} {group.key}", float(row["delta_ppm"]), row["source"])


def _damping(name: str, kind: str, view: View, atom: int, outside: list[Substituent]) -> list[Term]:
    """Several strong groups on one carbon add less than their sum."""
    if sum(1 for n in view.structure.neighbours[atom] if not view.is_saturated(n)) < 2:
        return []
    column = next(c for s, c in _SETS.values() if s == name)
    terms = []
    groups = [view.substituent(atom, n) for n in view.structure.neighbours[atom]]
    sizes = {id(g): _increment(name, column, g, "alpha", kind).value for g in groups}
    for one, two in combinations(groups, 2):
        row = _damping_rows().get(frozenset({one.kind, two.kind}))
        # What a tabulated ring already holds needs no damping among its own atoms.
        if row is None or (one not in outside and two not in outside):
            continue
        value = -float(row["factor"]) * sizes[id(one)] * sizes[id(two)]
        terms.append(Term(f"{one.key} beside {two.key}", value, row["source"]))
    return terms


def _beta_damping(view: View, atom: int, kind: str, terms: list[Term]) -> list[Term]:
    """A carbon that carries a heteroatom feels groups one bond further on less."""
    gained = sum(t.value for t in terms if t.label.startswith("beta "))
    kinds = [view.substituent(atom, n).kind for n in view.structure.neighbours[atom]]
    rows = [r for k in kinds if (r := _damping_rows().get(frozenset({k, f"beta {kind}"}))) is not None]
    if not rows or not gained:
        return []
    row = max(rows, key=lambda r: float(r["factor"]))
    return [Term("beta groups beside a heteroatom", -float(row["factor"]) * gained, row["source"])]


@cache
def _rows() -> dict[tuple[str, str, str, str], Row]:
    return {
        (row["set"], row["kind"], row["substituent"], row["applies_to"]): row
        for row in load_table("proton_sp3")
    }


@cache
def _damping_rows() -> dict[frozenset[str], Row]:
    return {frozenset({row["one"], row["two"]}): row for row in load_table("proton_damping")}
