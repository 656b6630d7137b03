"""Cuts bonds in a structure by the cleavage rules; atoms as bit masks, compositions as tuples of counts."""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.molecule import Structure
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.symbols import element_of
from hoodside.predict.formula.unsaturation import valence_of
from hoodside.predict.mass.rules import Cleavage, cleavages

#: Number of atoms by kind, in the order of ``Cutter.kinds``.
Counts = tuple[int, ...]


@dataclass(frozen=True, slots=True)
class Cut:
    """What one rule makes at one place of an ion."""

    rule: Cleavage
    site: int  # the atom the rule is about; competing cleavages share it
    mask: int  # heavy atoms kept
    counts: Counts


@dataclass(frozen=True, slots=True)
class _Place:
    rule: Cleavage
    site: int
    mask: int
    cuts: tuple[tuple[int, int], ...]
    barred: dict[int, int]  # atom -> atoms it is cut from


class Cutter:
    """Applies every rule to one molecule and to the ions made from it."""

    def __init__(self, structure: Structure, molecule: Formula) -> None:
        self.kinds = [*dict.fromkeys([*molecule.counts, "H"])]
        self.hydrogen = self.kinds.index("H")
        self.whole: Counts = tuple(molecule.counts.get(kind, 0) for kind in self.kinds)
        self._odd = [(valence_of(element_of(kind)) or 0) % 2 for kind in self.kinds]
        self._atoms = [self._one_atom(structure, i) for i in range(len(structure.atoms))]
        self._neighbours = [sum(1 << n for n in row) for row in structure.neighbours]
        self._places = _places(structure, molecule)

    def formula(self, counts: Counts) -> Formula:
        """The composition as a neutral formula."""
        return Formula.of(dict(zip(self.kinds, counts, strict=True)))

    def is_even_electron(self, counts: Counts) -> bool:
        """Whether the singly charged cation of this composition has all electrons paired."""
        return sum(n for n, odd in zip(counts, self._odd, strict=True) if odd) % 2 == 1

    def children(self, mask: int, counts: Counts, made_by: Cleavage | None) -> list[Cut]:
        """Ions one step from the given one, each once per rule; a rule is not applied twice running."""
        made: dict[tuple[str, int, Counts], Cut] = {}
        for place in self._places:
            if place.mask & ~mask or place.rule is made_by:
                continue
            cut = self._apply(place, mask, counts)
            if cut is not None:
                made.setdefault((cut.rule.name, cut.mask, cut.counts), cut)
        return list(made.values())

    def _apply(self, place: _Place, mask: int, counts: Counts) -> Cut | None:
        """None where a cut does not part the ion, or atoms are lacking."""
        rule = place.rule
        if rule.ion is not None:
            whole = self._as_counts(rule.ion)
            known = all(have >= want for have, want in zip(counts, whole, strict=True)) and whole != counts
            return Cut(rule, place.site, place.mask, whole) if known else None
        kept = self._side(place, mask) if place.cuts else mask
        if any((kept >> a & 1) == (kept >> b & 1) for a, b in place.cuts):
            return None
        left = list(counts)
        for index in bits(mask & ~kept):
            for kind, n in self._atoms[index]:
                left[kind] -= n
        left[self.hydrogen] += rule.hydrogens
        if rule.minus is not None:
            left = [n - m for n, m in zip(left, self._as_counts(rule.minus), strict=True)]
        if min(left) < 0 or sum(left) == left[self.hydrogen]:
            return None
        return Cut(rule, place.site, kept, tuple(left))

    def _side(self, place: _Place, allowed: int) -> int:
        """Atoms of the ion still joined to the kept atom once the bonds are cut."""
        seen = frontier = 1 << place.site
        while frontier:
            low = frontier & -frontier
            atom = low.bit_length() - 1
            new = self._neighbours[atom] & allowed & ~seen & ~place.barred.get(atom, 0)
            seen |= new
            frontier = (frontier ^ low) | new
        return seen

    def _as_counts(self, formula: Formula) -> Counts:
        """Counts of a formula that holds no kind the molecule lacks (see ``_places``)."""
        return tuple(formula.counts.get(kind, 0) for kind in self.kinds)

    def _one_atom(self, structure: Structure, index: int) -> tuple[tuple[int, int], ...]:
        atom = structure.atoms[index]
        kind = self.kinds.index(f"{atom.isotope}{atom.symbol}" if atom.isotope else atom.symbol)
        return ((kind, 1), (self.hydrogen, atom.hydrogens)) if atom.hydrogens else ((kind, 1),)


def _places(structure: Structure, molecule: Formula) -> list[_Place]:
    """Everywhere a rule applies; rules that expel what the molecule lacks are left out."""
    rules = [rule for rule in cleavages() if rule.possible_in(molecule)]
    found = structure.match_all([rule.smarts for rule in rules], unique=False)
    return [_place(rule, match) for rule, matches in zip(rules, found, strict=True) for match in matches]


def _place(rule: Cleavage, match: tuple[int, ...]) -> _Place:
    cuts = tuple((match[a], match[b]) for a, b in rule.cuts)
    barred: dict[int, int] = {}
    for a, b in cuts:
        barred[a] = barred.get(a, 0) | 1 << b
        barred[b] = barred.get(b, 0) | 1 << a
    return _Place(rule, match[rule.keep], sum(1 << i for i in match), cuts, barred)


def bits(mask: int) -> tuple[int, ...]:
    """Positions of the bits set, ascending."""
    found = []
    while mask:
        low = mask & -mask
        found.append(low.bit_length() - 1)
        mask ^= low
    return tuple(found)
