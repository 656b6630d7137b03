"""Ions a structure may give under electron ionisation, by named cleavage rules, up to three steps deep."""

from __future__ import annotations

from collections import defaultdict
from dataclasses import dataclass

from hoodside.molecule import Structure
from hoodside.predict.formula.masses import exact_mass
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import formula_of
from hoodside.predict.mass.cutting import Counts, Cutter, bits
from hoodside.predict.mass.rules import Cleavage, molecular_ion_classes
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
_PARENTS_PER_STEP = 6
_PARENT_LEAST = 0.25
#: Scans often start above the small ions common to everything (common practice).
_SCAN_START = 35.0
_BELOW_SCAN = 0.4


@dataclass(frozen=True, slots=True)
class _Ion:
    """An ion on the way: heavy atoms kept (bit mask), composition, likelihood, how it came about."""

    mask: int
    counts: Counts
    weight: float
    rule: Cleavage | None
    parent: Counts | None


def predict_ions(structure: Structure, least: float = 0.1) -> tuple[MassExpectation, ...]:
    """Ions expected in a 70 eV electron-ionisation spectrum, heaviest first.

    Args:
        least: ions of smaller weight are left out.
    m/z is that of the ion of most abundant isotopes; each ion names its rule and the atoms it keeps.
    One entry per formula: the likeliest way to it, raised when several rules lead there.
    Source: facts/ms_cleavages.csv (McLafferty & Turecek; Silverstein).
    """
    molecule = formula_of(structure)
    cutter = Cutter(structure, molecule)
    found, parents = [], [_Ion((1 << len(structure.atoms)) - 1, cutter.whole, 1.0, None, None)]
    for step in range(_STEPS):
        made = [ion for parent in parents for ion in _children(cutter, parent, step)]
        found += made
        parents = _best(made)
    ions = [_molecular_ion(structure, molecule), *_merged(cutter, molecule, found)]
    return tuple(sorted((ion for ion in ions if ion.weight >= least), key=lambda ion: -ion.mz))


def _children(cutter: Cutter, parent: _Ion, step: int) -> list[_Ion]:
    """Ions one step from ``parent``, weighed among those that compete for the same atom."""
    made = cutter.children(parent.mask, parent.counts, parent.rule)
    largest: dict[tuple[str, int], int] = defaultdict(int)
    for cut in made:
        key = (cut.rule.name, cut.site)
        largest[key] = max(largest[key], (parent.mask & ~cut.mask).bit_count())
    share = parent.weight * _STEP if step else 1.0
    calm = step > 0 and cutter.is_even_electron(parent.counts)
    ions = []
    for cut in made:
        weight = cut.rule.weight * share
        if cut.rule.prefers_largest:
            lost = (parent.mask & ~cut.mask).bit_count() / (largest[cut.rule.name, cut.site] or 1)
            weight *= _SMALLEST_SHARE + (1 - _SMALLEST_SHARE) * lost
        if calm and not cutter.is_even_electron(cut.counts):
            weight *= _RADICAL_LOSS
        ions.append(_Ion(cut.mask, cut.counts, weight, cut.rule, parent.counts))
    return ions


def _best(ions: list[_Ion]) -> list[_Ion]:
    """The likeliest parents of the next step, one per composition."""
    by_counts: dict[Counts, _Ion] = {}
    for ion in ions:
        known = by_counts.get(ion.counts)
        if ion.weight >= _PARENT_LEAST and (known is None or ion.weight > known.weight):
            by_counts[ion.counts] = ion
    return sorted(by_counts.values(), key=lambda ion: -ion.weight)[:_PARENTS_PER_STEP]


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


def _merged(cutter: Cutter, molecule: Formula, ions: list[_Ion]) -> list[MassExpectation]:
    """One expectation per ion formula; independent rules reinforce one another."""
    ways: dict[Counts, list[_Ion]] = defaultdict(list)
    for ion in ions:
        if ion.counts != cutter.whole:
            ways[ion.counts].append(ion)
    return [_expectation(cutter, molecule, made) for made in ways.values()]


def _expectation(cutter: Cutter, molecule: Formula, made: list[_Ion]) -> MassExpectation:
    by_rule: dict[tuple[str, Counts | None], float] = {}
    for ion in made:
        key = (ion.rule.name if ion.rule else "", ion.parent)
        by_rule[key] = max(by_rule.get(key, 0.0), ion.weight)
    missing = 1.0
    for weight in by_rule.values():
        missing *= 1 - weight
    best = max(made, key=lambda ion: ion.weight)
    formula = cutter.formula(best.counts)
    mz = exact_mass(Formula(formula.parts, 1))
    return MassExpectation(
        mz=mz,
        label=_label(cutter, molecule, formula, best),
        weight=min(1 - missing, 0.97) * (1.0 if mz >= _SCAN_START else _BELOW_SCAN),
        atoms=bits(best.mask),
        source=best.rule.source if best.rule else "",
    )


def _label(cutter: Cutter, molecule: Formula, formula: Formula, ion: _Ion) -> str:
    """Such as "M-CH3: C7H7O+ (rule)", or "from C7H5O+: C6H5+ (rule)" for a later step."""
    start = ""
    if ion.parent is not None and ion.parent != cutter.whole:
        start = f"from {cutter.formula(ion.parent).text}+: "
    elif molecule.contains(formula):
        lost = molecule - formula
        heavy = sum(n for s, n in lost.parts if s != "H")
        kept = sum(n for s, n in formula.parts if s != "H")
        start = f"M-{lost.text}: " if lost.parts and heavy < kept else ""
    return f"{start}{formula.text}+ ({ion.rule.name if ion.rule else ''})"
