"""Couplings between single nuclei: every H, F and P of a structure."""

from __future__ import annotations

from math import fsum

from hoodside.molecule import Bond, Structure
from hoodside.predict.coupling.benzene import benzene_couplings
from hoodside.predict.coupling.model import BARE, Estimate, Site, SiteCoupling
from hoodside.predict.coupling.saturated import SaturatedBonds
from hoodside.predict.coupling.shape import Shapes
from hoodside.predict.coupling.table import Found, Rule, find
from hoodside.predict.proton.geometry import across

#: A table row of this rank or higher is preferred to what is worked out from shape.
_SPECIFIC = 3
#: Extra standard deviation in Hz when cis and trans cannot be told apart.
_SD_UNKNOWN_SIDE = 2.5


def site_couplings(structure: Structure) -> tuple[SiteCoupling, ...]:
    """Every coupling between two nuclei that a rule knows, whether or not it is resolved.

    Source: facts/couplings_hh.csv, facts/karplus.csv and facts/coupling_groups.csv, named per estimate.
    """
    if "site_couplings" not in structure.memo:
        structure.memo["site_couplings"] = tuple(_Finder(structure).all())
    found: tuple[SiteCoupling, ...] = structure.memo["site_couplings"]
    return found


def places_of(structure: Structure, atom: int) -> list[int]:
    """Places of the H on an atom."""
    return list(range(structure.atoms[atom].hydrogens))


class _Finder:
    def __init__(self, structure: Structure) -> None:
        self.structure = structure
        self.shapes = Shapes(structure)
        self.saturated = SaturatedBonds(structure, self.shapes)
        self.table = find(structure)
        self.benzene = benzene_couplings(structure, self.saturated.conformers.kinds)
        self.faces = [self.shapes.faces(ring) for ring in structure.rings]

    def all(self) -> list[SiteCoupling]:
        found = []
        for ends in sorted(set(self.table) | set(self.benzene) | self._saturated_pairs()):
            found += self._between(*ends)
        return found

    def _saturated_pairs(self) -> set[tuple[int, int]]:
        return {
            (min(b.a, b.b), max(b.a, b.b))
            for b in self.structure.bonds
            if self._is_saturated_ch(b.a) and self._is_saturated_ch(b.b)
        }

    def _is_saturated_ch(self, atom: int) -> bool:
        here = self.structure.atoms[atom]
        return (
            here.symbol == "C"
            and here.hydrogens > 0
            and len(self.structure.neighbours[atom]) + here.hydrogens == 4
        )

    def _between(self, a: int, b: int) -> list[SiteCoupling]:
        rules = self.table.get((a, b))
        bonds = self._bonds(a, b, rules)
        return [
            SiteCoupling(x, y, bonds, estimate)
            for x, y in self._pairs(a, b, bonds)
            if (estimate := self._estimate(x, y, rules)) is not None
        ]

    def _bonds(self, a: int, b: int, rules: Found | None) -> int:
        if rules is not None:
            return rules.bonds
        return self.benzene[a, b][0] if (a, b) in self.benzene else 3

    def _pairs(self, a: int, b: int, bonds: int) -> list[tuple[Site, Site]]:
        here = [(a, p) for p in places_of(self.structure, a)]
        if self.structure.atoms[b].symbol in ("F", "P") and (a != b or bonds == 1):
            return [(x, (b, BARE)) for x in here]
        if a == b:
            return [(x, y) for x in here for y in here if x < y] if bonds == 2 else []
        return [(x, (b, p)) for x in here for p in places_of(self.structure, b)]

    def _estimate(self, x: Site, y: Site, rules: Found | None) -> Estimate | None:
        rule = self._rule(x, y, rules)
        if rule is not None and rule[0].rank >= _SPECIFIC:
            return rule[1]
        ends = (x[0], y[0])
        if ends in self.benzene and x[1] != BARE and y[1] != BARE:
            return self.benzene[ends][1]
        if y[1] != BARE and x[0] != y[0] and self._is_saturated_pair(*ends):
            worked_out = self.saturated.estimate(x, y)
            if worked_out is not None:
                return worked_out
        return rule[1] if rule else None

    def _is_saturated_pair(self, a: int, b: int) -> bool:
        return (
            self._is_saturated_ch(a)
            and self._is_saturated_ch(b)
            and self.structure.bond_between(a, b) is not None
        )

    def _rule(self, x: Site, y: Site, rules: Found | None) -> tuple[Rule, Estimate] | None:
        if rules is None:
            return None
        if not any(r.geometry for r in rules.rules):
            best = rules.rules[0]
            return best, best.estimate
        side = self._side(x, y)
        if side:
            rule = rules.best(side)
            return (rule, rule.estimate) if rule else None
        return self._either(rules)

    def _either(self, rules: Found) -> tuple[Rule, Estimate] | None:
        """The mean of cis and trans, when the configuration is not known."""
        pair = [r for r in (rules.best("cis"), rules.best("trans")) if r is not None]
        if not pair:
            return None
        hz = fsum(r.estimate.hz for r in pair) / len(pair)
        if len(pair) == 2 and pair[0] is pair[1]:
            return pair[0], pair[0].estimate
        e = pair[0].estimate
        return pair[0], Estimate(hz, e.sd + _SD_UNKNOWN_SIDE, e.label, e.source)

    def _side(self, x: Site, y: Site) -> str:
        """ "cis", "trans" or "" when neither has a meaning or the source leaves it open."""
        bond = self._double_bond(x[0], y)
        if bond is not None:
            return self._across(x, y, bond)
        if y[1] == BARE:
            return ""
        p, q = self.shapes.point(x), self.shapes.point(y)
        for faces in self.faces:
            if p in faces and q in faces:
                return "cis" if faces[p] == faces[q] else "trans"
        return ""

    def _double_bond(self, a: int, y: Site) -> Bond | None:
        """The double bond from carbon ``a`` to the carbon that carries ``y``."""
        far = (y[0],) if y[1] != BARE else self.structure.neighbours[y[0]]
        for bond in self.structure.bonds_of[a]:
            if bond.order == 2 and bond.other(a) in far:
                return bond
        return None

    def _across(self, x: Site, y: Site, bond: Bond) -> str:
        far = bond.other(x[0])
        sides = across(self.structure, x[0], far, x[1])
        if y[1] == BARE:
            return sides.get(y[0], "")
        if self.structure.atoms[far].hydrogens == 2:
            back = across(self.structure, far, x[0], y[1])
            return _opposite(next(iter(back.values()), ""))
        return _opposite(next(iter(sides.values()), ""))


def _opposite(side: str) -> str:
    return {"cis": "trans", "trans": "cis"}.get(side, "")
