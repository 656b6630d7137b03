"""Ions a structure may give under electron ionisation, by named cleavage rules, up to three steps deep."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable, Iterator
from dataclasses import dataclass

from hoodside.molecule import Structure
from hoodside.predict.formula.masses import exact_mass
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import formula_of
from hoodside.predict.formula.unsaturation import unsaturation
from hoodside.predict.mass.rules import Cleavage, cleavages, molecular_ion_classes
from hoodside.predict.model import MassExpectation

#: Weight of the molecular ion when no class of facts/ms_molecular_ion.csv applies.
_PLAIN_MOLECULAR_ION = 0.5
#: What is left of a rule's weight when a far smaller radical is lost than could be.
_SMALLEST_SHARE = 0.35
#: An even-electron ion seldom loses a radical (even-electron rule: Karni & Mandelbaum, Org. Mass Spectrom.
#: 1980, 15, 53).
_RADICAL_LOSS = 0.25
_STEP = 0.7  # each further step is so much less seen
_STEPS = 3
_PARENTS_PER_STEP = 8
_PARENT_LEAST = 0.25
#: Scans often start above the small ions common to everything (common practice).
_SCAN_START = 35.0
_BELOW_SCAN = 0.4


@dataclass(frozen=True, slots=True)
class _Site:
    """One place where a rule applies; atoms as bit masks."""

    rule: Cleavage
    match: tuple[int, ...]
    mask: int
    cuts: tuple[tuple[int, int], ...]


@dataclass(frozen=True, slots=True)
class _Ion:
    """An ion on the way: heavy atoms kept, composition, likelihood, how it came about."""

    mask: int
    formula: Formula
    weight: float
    rule: Cleavage | None
    parent: Formula | None


def predict_ions(structure: Structure, least: float = 0.1) -> tuple[MassExpectation, ...]:
    """Ions expected in a 70 eV electron-ionisation spectrum, heaviest first.

    Args:
        least: ions of smaller weight are left out.
    m/z is that of the ion of most abundant isotopes; each ion names its rule and the atoms it keeps.
    One entry per formula: the likeliest way to it, raised when several rules lead there.
    Source: facts/ms_cleavages.csv (McLafferty & Turecek; Silverstein).
    """
    molecule = formula_of(structure)
    cutter = _Cutter(structure)
    start = _Ion((1 << len(structure.atoms)) - 1, molecule, 1.0, None, None)
    found, parents = [], [start]
    for step in range(_STEPS):
        made = [ion for parent in parents for ion in cutter.children(parent, step)]
        found += made
        parents = _best(made)
    ions = [_molecular_ion(structure, molecule), *_merged(molecule, found)]
    return tuple(sorted((ion for ion in ions if ion.weight >= least), key=lambda ion: -ion.mz))


def _best(ions: list[_Ion]) -> list[_Ion]:
    """The likeliest parents of the next step, one per formula."""
    by_formula: dict[Formula, _Ion] = {}
    for ion in ions:
        known = by_formula.get(ion.formula)
        if ion.weight >= _PARENT_LEAST and (known is None or ion.weight > known.weight):
            by_formula[ion.formula] = ion
    return sorted(by_formula.values(), key=lambda ion: -ion.weight)[:_PARENTS_PER_STEP]


def _molecular_ion(structure: Structure, molecule: Formula) -> MassExpectation:
    classes = molecular_ion_classes()
    weight, source = _PLAIN_MOLECULAR_ION, classes[0][3]
    found = structure.match_all([row[1] for row in classes])
    for row, matches in zip(classes, found, strict=True):
        if matches:
            weight, source = row[2], row[3]
            break
    ion = Formula(molecule.parts, 1)
    atoms = tuple(range(len(structure.atoms)))
    return MassExpectation(exact_mass(ion), f"M+. {molecule.text}", weight, atoms, source)


class _Cutter:
    """Applies every rule to the molecule and to the ions made from it."""

    def __init__(self, structure: Structure) -> None:
        self.structure = structure
        self.neighbours = [sum(1 << n for n in row) for row in structure.neighbours]
        rules = cleavages()
        matches = structure.match_all([rule.smarts for rule in rules], unique=False)
        self.sites = [
            _Site(rule, match, sum(1 << i for i in match), tuple((match[a], match[b]) for a, b in rule.cuts))
            for rule, found in zip(rules, matches, strict=True)
            for match in found
        ]

    def children(self, parent: _Ion, step: int) -> list[_Ion]:
        """Ions one step from ``parent``, each composition and set of atoms once per rule."""
        made: dict[tuple[str, int, Formula], tuple[_Site, _Ion]] = {}
        for site in self.sites:
            if site.mask & ~parent.mask or site.rule is parent.rule:
                continue
            ion = self._apply(site, parent)
            if ion is not None:
                made.setdefault((site.rule.name, ion.mask, ion.formula), (site, ion))
        largest = self._largest_losses(made.values(), parent)
        return [self._weighed(site, ion, parent, largest, step) for site, ion in made.values()]

    def _apply(self, site: _Site, parent: _Ion) -> _Ion | None:
        """What one rule makes at one place; None where a cut does not part the ion or atoms are lacking."""
        rule = site.rule
        mask = self._side(site, parent.mask) if site.cuts else parent.mask
        if any((mask >> a & 1) == (mask >> b & 1) for a, b in site.cuts):
            return None
        if rule.ion is not None:
            known = parent.formula.contains(rule.ion) and rule.ion != parent.formula
            return _Ion(site.mask, rule.ion, 0.0, rule, parent.formula) if known else None
        counts = dict(parent.formula.parts)
        self._take_away(counts, parent.mask & ~mask)
        counts["H"] = counts.get("H", 0) + rule.hydrogens
        for symbol, n in rule.minus.parts if rule.minus else ():
            counts[symbol] = counts.get(symbol, 0) - n
        if min(counts.values()) < 0 or not any(n for s, n in counts.items() if s not in ("H", "2H")):
            return None
        return _Ion(mask, Formula.of(counts), 0.0, rule, parent.formula)

    def _side(self, site: _Site, allowed: int) -> int:
        """Atoms of the ion still joined to the kept atom once the bonds are cut."""
        barred = {a: 0 for cut in site.cuts for a in cut}
        for a, b in site.cuts:
            barred[a] |= 1 << b
            barred[b] |= 1 << a
        seen = frontier = 1 << site.match[site.rule.keep]
        while frontier:
            low = frontier & -frontier
            atom = low.bit_length() - 1
            new = self.neighbours[atom] & allowed & ~seen & ~barred.get(atom, 0)
            seen |= new
            frontier = (frontier ^ low) | new
        return seen

    def _take_away(self, counts: dict[str, int], lost: int) -> None:
        for index in _bits(lost):
            atom = self.structure.atoms[index]
            symbol = f"{atom.isotope}{atom.symbol}" if atom.isotope else atom.symbol
            counts[symbol] = counts.get(symbol, 0) - 1
            if atom.hydrogens:
                counts["H"] = counts.get("H", 0) - atom.hydrogens

    @staticmethod
    def _largest_losses(made: Iterable[tuple[_Site, _Ion]], parent: _Ion) -> dict[tuple[str, int], int]:
        """Per rule and site, the most heavy atoms that a competing cleavage loses."""
        largest: dict[tuple[str, int], int] = defaultdict(int)
        for site, ion in made:
            key = (site.rule.name, site.match[site.rule.keep])
            largest[key] = max(largest[key], (parent.mask & ~ion.mask).bit_count())
        return largest

    @staticmethod
    def _weighed(
        site: _Site, ion: _Ion, parent: _Ion, largest: dict[tuple[str, int], int], step: int
    ) -> _Ion:
        weight = site.rule.weight
        if site.rule.prefers_largest:
            most = largest[site.rule.name, site.match[site.rule.keep]] or 1
            share = (parent.mask & ~ion.mask).bit_count() / most
            weight *= _SMALLEST_SHARE + (1 - _SMALLEST_SHARE) * share
        if step:
            weight *= parent.weight * _STEP
            if _is_even_electron(parent.formula) and not _is_even_electron(ion.formula):
                weight *= _RADICAL_LOSS
        return _Ion(ion.mask, ion.formula, weight, ion.rule, ion.parent)


def _is_even_electron(formula: Formula) -> bool:
    """Whether the singly charged cation of this composition has all electrons paired."""
    degree = unsaturation(formula)
    return degree is not None and degree % 1 != 0


def _bits(mask: int) -> Iterator[int]:
    while mask:
        low = mask & -mask
        yield low.bit_length() - 1
        mask ^= low


def _merged(molecule: Formula, ions: list[_Ion]) -> list[MassExpectation]:
    """One expectation per ion formula; independent rules reinforce one another."""
    ways: dict[Formula, list[_Ion]] = defaultdict(list)
    for ion in ions:
        if ion.formula != molecule:
            ways[ion.formula].append(ion)
    return [_expectation(molecule, formula, made) for formula, made in ways.items()]


def _expectation(molecule: Formula, formula: Formula, made: list[_Ion]) -> MassExpectation:
    by_rule: dict[tuple[str, Formula | None], float] = {}
    for ion in made:
        key = (ion.rule.name if ion.rule else "", ion.parent)
        by_rule[key] = max(by_rule.get(key, 0.0), ion.weight)
    missing = 1.0
    for weight in by_rule.values():
        missing *= 1 - weight
    best = max(made, key=lambda ion: ion.weight)
    mz = exact_mass(Formula(formula.parts, 1))
    return MassExpectation(
        mz=mz,
        label=_label(molecule, best),
        weight=min(1 - missing, 0.97) * (1.0 if mz >= _SCAN_START else _BELOW_SCAN),
        atoms=tuple(_bits(best.mask)),
        source=best.rule.source if best.rule else "",
    )


def _label(molecule: Formula, ion: _Ion) -> str:
    """Such as "M-CH3: C7H7O+ (rule)", or "from C7H5O+: C6H5+ (rule)" for a later step."""
    name = ion.rule.name if ion.rule else ""
    start = ""
    if ion.parent is not None and ion.parent != molecule:
        start = f"from {ion.parent.text}+: "
    elif molecule.contains(ion.formula):
        lost = molecule - ion.formula
        heavy = sum(n for s, n in lost.parts if s != "H")
        kept = sum(n for s, n in ion.formula.parts if s != "H")
        start = f"M-{lost.text}: " if lost.parts and heavy < kept else ""
    return f"{start}{ion.formula.text}+ ({name})"
