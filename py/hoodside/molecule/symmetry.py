"""Which atoms and hydrogens are equivalent, and how: homotopic, enantiotopic or diastereotopic.

Rotation about single bonds, ring flips and inversion of amines are taken as fast, so what counts is
constitution and configuration (Eliel and Wilen, Stereochemistry of Organic Compounds, 1994, chapter 8).
Stereocentres the source leaves open are taken as one diastereomer, the most symmetrical with mirrored
(meso) halves where there is a choice. Each connected part of a salt is looked at on its own.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from typing import Literal, TypeVar

from hoodside.molecule.cages import opposed_bridgeheads
from hoodside.molecule.colouring import Connectivity
from hoodside.molecule.mapping import Framework, Operation
from hoodside.molecule.stereo_units import Unit, stereo_units, twin_hydrogens
from hoodside.molecule.structure import Structure

Relation = Literal["single", "homotopic", "enantiotopic", "diastereotopic"]
_T = TypeVar("_T")


@dataclass(frozen=True, slots=True)
class HydrogenSet:
    """Hydrogens that share one shift in an achiral solvent.

    Attributes:
        atoms: the atoms that carry them, ascending.
        n: number of hydrogens.
        relation: "diastereotopic" for one of the two sets of a CH2 whose H differ; else how the H of the
            set are related among themselves ("single" when there is one).
        slot: 0, or 1 for the second of two sets on the same atoms.
    """

    atoms: tuple[int, ...]
    n: int
    relation: Relation
    slot: int


def constitutional_classes(structure: Structure) -> tuple[int, ...]:
    """Class number per atom, equal for atoms that connectivity alone cannot tell apart."""
    return _kept(structure, "constitutional_classes", _find_constitutional)


def atom_classes(structure: Structure) -> tuple[int, ...]:
    """Class number per atom, equal for atoms that share a shift in an achiral solvent."""
    return _kept(structure, "symmetry", _Symmetry).atom_classes()


def hydrogen_sets(structure: Structure) -> tuple[HydrogenSet, ...]:
    """Every hydrogen of the structure in sets of equal shift, ordered by first carrier, then slot."""
    return _kept(structure, "hydrogen_sets", lambda s: _kept(s, "symmetry", _Symmetry).hydrogen_sets())


def hydrogen_members(structure: Structure) -> tuple[tuple[tuple[int, int], ...], ...]:
    """Per set of ``hydrogen_sets``, its hydrogens as (carrier, place).

    Places count from 0 on each carrier. Of the two H of a CH2, place 0 is the first and place 1 the second
    of ``stereo_units.twin_hydrogens``.
    """
    return _kept(structure, "hydrogen_members", lambda s: _kept(s, "symmetry", _Symmetry).hydrogen_members())


def _kept(structure: Structure, key: str, find: Callable[[Structure], _T]) -> _T:
    if key not in structure.memo:
        structure.memo[key] = find(structure)
    return structure.memo[key]  # type: ignore[no-any-return]


class _Orbits:
    """Union-find over points."""

    def __init__(self, size: int) -> None:
        self._parent = list(range(size))

    def find(self, point: int) -> int:
        while self._parent[point] != point:
            self._parent[point] = self._parent[self._parent[point]]
            point = self._parent[point]
        return point

    def join(self, operation: Operation) -> None:
        for a, b in operation.items():
            root_a, root_b = self.find(a), self.find(b)
            self._parent[max(root_a, root_b)] = min(root_a, root_b)


def _find_constitutional(structure: Structure) -> tuple[int, ...]:
    connectivity = Connectivity(structure)
    colours = connectivity.refined()
    if structure.rings:  # in a tree, refinement is exact
        frame = Framework(list(structure.neighbours), connectivity.bond_labels, colours, [])
        orbits = _Orbits(len(colours))
        for members in _members(colours):
            _split(members, orbits, lambda a, b: frame.operation(a, b, mirror=False))
        colours = [orbits.find(i) for i in range(len(colours))]
    return _numbered(colours)


def _split(members: list[int], orbits: _Orbits, search: Callable[[int, int], Operation | None]) -> None:
    """Join what ``search`` can carry onto each other among points of one colour."""
    heads: list[int] = []
    for point in members:
        if any(orbits.find(head) == orbits.find(point) for head in heads):
            continue
        for head in heads:
            operation = search(head, point)
            if operation is not None:
                orbits.join(operation)
                break
        else:
            heads.append(point)


class _Symmetry:
    """Orbits of atoms and hydrogens under all operations, and under those that need no mirror."""

    def __init__(self, structure: Structure) -> None:
        self.structure = structure
        self.twins = twin_hydrogens(structure)
        self.part = _parts(structure)
        units = stereo_units(structure, self.twins)
        self.frame = _framework(structure, self.twins, units)
        size = len(self.frame.colours)
        self.equal, self.homotopic = _Orbits(size), _Orbits(size)
        self.lone = _singletons(self.frame.colours)
        self.fixed = {self.part[u.centres[0]] for u in units if u.mirrored and self.lone.issuperset(u.points)}
        for centre in _open_centres(units, self.lone):
            self._sweep(lambda a, b, pin=centre: self._either(a, b, {pin: pin}))  # type: ignore[misc]
        self._sweep(self._either)

    def atom_classes(self) -> tuple[int, ...]:
        return _numbered([self.equal.find(i) for i in range(len(self.structure.atoms))])

    def hydrogen_sets(self) -> tuple[HydrogenSet, ...]:
        return tuple(
            HydrogenSet(tuple(carriers), self._count(points), self._relation(points), slot)
            for carriers, slot, points in self._sets()
        )

    def hydrogen_members(self) -> tuple[tuple[tuple[int, int], ...], ...]:
        return tuple(
            tuple(member for point in points for member in self._places(point))
            for _, _, points in self._sets()
        )

    def _sets(self) -> list[tuple[list[int], int, list[int]]]:
        """Carriers, slot and points of every set, in order."""
        grouped: dict[int, list[tuple[int, int]]] = defaultdict(list)
        for atom in self.structure.atoms:
            points = self.twins.get(atom.index, (atom.index,))
            for point in points if atom.hydrogens else ():
                grouped[self.equal.find(point)].append((point, atom.index))
        taken: dict[int, int] = {}
        sets = []
        for entries in grouped.values():
            carriers = sorted({carrier for _, carrier in entries})
            slot = taken.get(carriers[0], 0)
            taken[carriers[0]] = slot + 1
            sets.append((carriers, slot, [point for point, _ in entries]))
        return sorted(sets)

    def _places(self, point: int) -> list[tuple[int, int]]:
        carrier = self._carrier(point)
        if point >= len(self.structure.atoms):
            return [(carrier, self.twins[carrier].index(point))]
        return [(carrier, place) for place in range(self.structure.atoms[carrier].hydrogens)]

    def _count(self, points: list[int]) -> int:
        atoms = self.structure.atoms
        return sum(atoms[p].hydrogens if p < len(atoms) else 1 for p in points)

    def _relation(self, points: list[int]) -> Relation:
        carrier = self._carrier(points[0])
        if carrier in self.twins and len({self.equal.find(p) for p in self.twins[carrier]}) == 2:
            return "diastereotopic"
        if self._count(points) == 1:
            return "single"
        _split(points, self.homotopic, self._proper)
        same = len({self.homotopic.find(p) for p in points}) == 1
        return "homotopic" if same else "enantiotopic"

    def _sweep(self, search: Callable[[int, int], Operation | None]) -> None:
        for members in _members(self.frame.colours):
            _split(members, self.equal, search)

    def _either(self, a: int, b: int, pins: dict[int, int] | None = None) -> Operation | None:
        """An operation of either kind. Mirrors first: open stereocentres then come out as meso."""
        mirrored = None if self._needs_no_mirror(a, b) else self.frame.operation(a, b, True, pins)
        return mirrored if mirrored is not None else self._proper(a, b, pins)

    def _proper(self, a: int, b: int, pins: dict[int, int] | None = None) -> Operation | None:
        carrier = self._carrier(a)
        twins = carrier == self._carrier(b)
        if (
            twins
            and self.lone.issuperset((carrier, *self.structure.neighbours[carrier]))
            and self._is_unit(carrier)
        ):
            return None
        operation = self.frame.operation(a, b, False, pins)
        if operation is not None:
            self.homotopic.join(operation)
        return operation

    def _needs_no_mirror(self, a: int, b: int) -> bool:
        """Whether a stereo unit that nothing moves rules out every mirror operation of this part."""
        part = self.part[self._carrier(a)]
        return part == self.part[self._carrier(b)] and part in self.fixed

    def _is_unit(self, carrier: int) -> bool:
        return (carrier,) in self.frame.units

    def _carrier(self, point: int) -> int:
        count = len(self.structure.atoms)
        return point if point < count else list(self.twins)[(point - count) // 2]


def _framework(structure: Structure, twins: dict[int, tuple[int, int]], units: list[Unit]) -> Framework:
    """The structure with the H of its CH2 groups as points of their own."""
    connectivity = Connectivity(structure)
    neighbours = [(*around, *twins.get(i, ())) for i, around in enumerate(structure.neighbours)]
    colours = list(constitutional_classes(structure))
    labels = connectivity.bond_labels
    for carrier, pair in twins.items():
        for point in pair:
            neighbours.append((carrier,))
            colours.append(~colours[carrier])
            labels[carrier, point] = labels[point, carrier] = 0
    frame = Framework(neighbours, labels, colours, units)
    ring_atoms = {atom for ring in structure.rings for atom in ring}
    for a, b, turned in opposed_bridgeheads(units, structure.neighbours, ring_atoms):
        frame.settled.agree(a.centres, b.centres, turned)
    return frame


def _open_centres(units: list[Unit], lone: set[int]) -> list[int]:
    """Centres of open orientation that an operation may exchange: try first what keeps one of them.

    Only an operation with a fixed unit has its handedness forced, so these settle cages the right way.
    """
    return [
        u.centres[0] for u in units if u.parity is None and len(u.centres) == 1 and u.centres[0] not in lone
    ]


def _parts(structure: Structure) -> list[int]:
    """Number of the connected part, per atom."""
    part = [-1] * len(structure.atoms)
    for start in range(len(part)):
        queue = [start] if part[start] < 0 else []
        for atom in queue:
            part[atom] = start
            queue += [j for j in structure.neighbours[atom] if part[j] < 0 and j not in queue]
    return part


def _members(colours: list[int]) -> list[list[int]]:
    """Points of each colour that occurs more than once."""
    groups: dict[int, list[int]] = defaultdict(list)
    for point, colour in enumerate(colours):
        groups[colour].append(point)
    return [members for members in groups.values() if len(members) > 1]


def _singletons(colours: list[int]) -> set[int]:
    counts: dict[int, int] = defaultdict(int)
    for colour in colours:
        counts[colour] += 1
    return {point for point, colour in enumerate(colours) if counts[colour] == 1}


def _numbered(keys: Iterable[int]) -> tuple[int, ...]:
    numbers: dict[int, int] = {}
    return tuple(numbers.setdefault(key, len(numbers)) for key in keys)
