"""Structures proposed from readings alone."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from hoodside.advise.proposals.assembly import Part, assemble, elements_of, part_of
from hoodside.advise.proposals.fragments import Fragment, find_fragments
from hoodside.advise.proposals.rings import Ring, ring_choices
from hoodside.errors import FormulaError, StructureError
from hoodside.molecule.structure import Structure, read_structure
from hoodside.molecule.symmetry import atom_classes
from hoodside.predict.formula import Formula, parse_formula, unsaturation
from hoodside.readings.model import Readings
from hoodside.rivals.configurations import double_bond_forms
from hoodside.rivals.early import early_test
from hoodside.rivals.enumeration.multigraphs import TooMany
from hoodside.rivals.graph import graph_of
from hoodside.rivals.growth import SENSIBLE
from hoodside.rivals.held_back import doubts, penalty
from hoodside.rivals.names import name_of
from hoodside.rivals.writer import write_smiles
from hoodside.weigh.expectations import expectations
from hoodside.weigh.structure import Tally, weigh_structure
from hoodside.weigh.verdict import judge

#: A fragment is built in when the sign is this weighty and this often right on published spectra.
_FORCING_DB = 10.0
_FORCING_RIGHT = 0.6
#: Graphs at one stage, structures put together, and structures weighed, at the most.
_GRAPHS = 1_200
_ASSEMBLED = 1_200
_WEIGHED = 60
#: Fragments that may turn out wrong: so many are given up, the least weighty first, before giving in.
_GIVEN_UP = 3


@dataclass(frozen=True, slots=True)
class Proposal:
    """A structure put together from readings, with the weight of them all and the verdict among its like."""

    smiles: str
    weight_db: float
    verdict: str
    reason: str


@dataclass(frozen=True, slots=True)
class Proposals:
    """What readings suggest by themselves.

    Attributes:
        fragments: what they speak for, weightiest first.
        structures: complete structures, weightiest first; empty when there are too many or no formula.
        complete: every sensible structure of the formula was looked at, whatever fragments it holds.
        note: what was done, or why there are no structures.
    """

    fragments: tuple[Fragment, ...]
    structures: tuple[Proposal, ...]
    complete: bool
    note: str


@dataclass(frozen=True, slots=True)
class _Plan:
    """What a structure is to be put together from."""

    fragments: tuple[Fragment, ...]
    rings: tuple[Ring, ...]

    @property
    def parts(self) -> list[tuple[Part, int]]:
        times: dict[tuple[str, tuple[int, ...]], int] = {}
        for fragment in self.fragments:
            key = fragment.sign.unit, fragment.sign.ports
            times[key] = times.get(key, 0) + fragment.times
        counted = [(part_of(unit, ports), count) for (unit, ports), count in times.items()]
        return counted + [(ring.part, self.rings.count(ring)) for ring in dict.fromkeys(self.rings)]

    @property
    def words(self) -> str:
        held = [fragment.sign.fragment for fragment in self.fragments]
        return ", ".join(dict.fromkeys(held))


def propose(readings: Readings, limit: int = 20) -> Proposals:
    """Fragments the readings force and, for a known small formula, the structures that hold them.

    Raises: FormulaError when the formula cannot be read.
    """
    fragments = tuple(find_fragments(readings))
    if not readings.formula:
        return Proposals(fragments, (), False, "Give the formula to have structures put together.")
    formula = parse_formula(readings.formula)
    for plans in _stages(fragments, formula, readings):
        try:
            found = _sound(plans, formula, readings)
        except (TooMany, FormulaError):
            return Proposals(fragments, (), False, _too_many(plans[0]))
        if found:
            return _answer(fragments, plans[0], _closest_first(found, readings), readings, limit)
    return Proposals(fragments, (), False, "No sensible structure holds these fragments.")


def _answer(
    fragments: tuple[Fragment, ...], plan: _Plan, found: list[str], readings: Readings, limit: int
) -> Proposals:
    best = _weighed(found, readings)
    complete = len(found) <= _WEIGHED and not plan.fragments and not plan.rings
    return Proposals(fragments, tuple(best[:limit]), complete, _note(len(found), plan))


def _stages(fragments: Sequence[Fragment], formula: Formula, readings: Readings) -> Iterator[list[_Plan]]:
    """Plans to try together; later ones give up the least weighty fragments, then the rings."""
    forcing = _forcing(fragments, formula)
    for given_up in range(min(_GIVEN_UP, len(forcing)) + 1):
        chosen = tuple(forcing[: len(forcing) - given_up])
        taken = frozenset(name for fragment in chosen for name in fragment.readings)
        room = _room(formula, chosen)
        with_rings = ring_choices(readings, taken, room, _left_unsaturation(formula, chosen))
        plans = [_Plan(chosen, rings) for rings in with_rings]
        if plans:
            yield plans
        yield [_Plan(chosen, ())]


def _forcing(fragments: Sequence[Fragment], formula: Formula) -> list[Fragment]:
    """Building units, weightiest first, as far as the formula has room for them."""
    chosen: list[Fragment] = []
    for fragment in fragments:
        sign = fragment.sign
        if not sign.unit or fragment.weight_db < _FORCING_DB or sign.right < _FORCING_RIGHT:
            continue
        if min(_room(formula, [*chosen, fragment]).values()) >= 0:
            chosen.append(fragment)
    return chosen


def _room(formula: Formula, fragments: Sequence[Fragment]) -> dict[str, int]:
    """Element -> atoms left when the fragments are taken out."""
    room = dict(formula.elements)
    for fragment in fragments:
        for symbol, count in elements_of(part_of(fragment.sign.unit, fragment.sign.ports)).items():
            room[symbol] = room.get(symbol, 0) - fragment.times * count
    return room


def _left_unsaturation(formula: Formula, fragments: Sequence[Fragment]) -> float:
    used = sum(f.times * (unsaturation(parse_formula(_hydride(f))) or 0) for f in fragments)
    return (unsaturation(formula) or 0) - used


def _hydride(fragment: Fragment) -> str:
    part = part_of(fragment.sign.unit, fragment.sign.ports)
    counts = elements_of(part)
    counts["H"] += len(part.ports)
    return Formula.of(counts).text


def _sound(plans: Sequence[_Plan], formula: Formula, readings: Readings) -> list[str]:
    """Sensible structures of the plans that no reading rules out. Raises: TooMany."""
    stands = early_test(readings)
    nothing = tuple(0 for _ in doubts("C"))
    found: list[str] = []
    for smiles, wanted in _assembled(plans, formula):
        structure = read_structure(smiles)
        if all(structure.match_all(wanted)) and penalty(smiles, nothing) < SENSIBLE and stands(smiles):
            found += _forms(structure)
    return found


def _assembled(plans: Sequence[_Plan], formula: Formula) -> Iterator[tuple[str, list[str]]]:
    """Structures, each once, with the patterns they must match. Raises: TooMany."""
    seen: set[str] = set()
    for plan in plans:
        wanted = [fragment.sign.smarts for fragment in plan.fragments]
        for smiles in assemble(formula, plan.parts, _GRAPHS):
            if smiles not in seen:
                seen.add(smiles)
                yield smiles, wanted
            if len(seen) > _ASSEMBLED:
                raise TooMany


def _forms(structure: Structure) -> list[str]:
    graph = graph_of(structure)
    return [name_of(write_smiles(form)) for _, form in double_bond_forms(graph)]


def _closest_first(found: list[str], readings: Readings) -> list[str]:
    return sorted(set(found), key=lambda smiles: (_misfit(read_structure(smiles), readings), smiles))


def _misfit(structure: Structure, readings: Readings) -> int:
    """How far the number of carbon classes is from the number of lines: a cheap first order."""
    classes = atom_classes(structure)
    carbons = len({classes[a.index] for a in structure.atoms if a.symbol == "C"})
    hydrogens = len({classes[a.index] for a in structure.atoms if a.hydrogens})
    lines = abs(carbons - len(readings.c13)) if readings.c13 else 0
    return 2 * lines + abs(hydrogens - len(readings.h1))


def _weighed(found: list[str], readings: Readings) -> list[Proposal]:
    """Raises nothing: what the predictors do not take is left out."""
    tallies = [tally for smiles in found[:_WEIGHED] if (tally := _tally(smiles, readings))]
    proposals = [
        Proposal(tally.expected.structure.source, round(tally.weight_db, 1), verdict.verdict, verdict.reason)
        for tally, verdict in zip(tallies, judge(tallies), strict=True)
    ]
    return sorted(proposals, key=lambda p: (-p.weight_db, p.smiles))


def _tally(smiles: str, readings: Readings) -> Tally | None:
    try:
        return weigh_structure(expectations(smiles, readings), readings)
    except StructureError:
        return None


def _note(count: int, plan: _Plan) -> str:
    verb = "structure holds" if count == 1 else "structures hold"
    if count > _WEIGHED:
        weighed = f"the {_WEIGHED} closest by number of signals were weighed."
    else:
        weighed = "it was weighed." if count == 1 else "all were weighed."
    held = " and ".join(part for part in (plan.words, "an aromatic ring" if plan.rings else "") if part)
    if not held:
        return f"{count} sensible structure{' has' if count == 1 else 's have'} this formula; {weighed}"
    return f"{count} {verb} {held}; {weighed}"


def _too_many(plan: _Plan) -> str:
    what = f"hold {plan.words}" if plan.words else "have this formula"
    return f"Too many structures {what}; put one up to start from, or take more readings."
