"""Search for symmetry operations: ways to lay a molecule on itself, or on its mirror image.

This is the substitution test (Mislow and Raban, Top. Stereochem. 1967, 1, 1) turned round: labelling two
ligands in turn gives the same compound exactly when an operation carries the one onto the other.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from itertools import combinations
from typing import NamedTuple

from hoodside.molecule.stereo_units import Unit

#: Steps after which a search is given up and the two points are taken as different.
_MAX_STEPS = 4_000

Operation = dict[int, int]


class Framework:
    """What an operation has to keep: colours and bonds of points, and the orientation of units.

    Args:
        neighbours: per point, the points bonded to it.
        labels: (point, point) -> what joins them.
        colours: per point; only like colours are carried onto each other.
        units: stereo units, empty to look at connectivity alone.
    """

    def __init__(
        self,
        neighbours: list[tuple[int, ...]],
        labels: Mapping[tuple[int, int], int],
        colours: list[int],
        units: list[Unit],
    ) -> None:
        self.neighbours = neighbours
        self.labels = labels
        self.colours = colours
        self.units = {unit.centres: unit for unit in units}
        self._units_at: list[list[tuple[Unit, tuple[int, ...]]]] = [[] for _ in neighbours]
        for unit in units:
            points = unit.points
            for point in points:
                self._units_at[point].append((unit, points))
        self._plans: dict[int, Plan] = {}
        self.settled = Relations()
        for unit in units:
            if unit.parity is not None:
                self.settled.agree(unit.centres, (), unit.parity)

    def operation(
        self, start: int, end: int, mirror: bool, pins: Mapping[int, int] | None = None
    ) -> Operation | None:
        """A map of one connected part that carries ``start`` onto ``end``, or None.

        Args:
            mirror: look for a map onto the mirror image instead of onto the molecule itself.
            pins: further point -> point pairs the map must contain.
        """
        search = _Search(self, start, end, mirror, pins or {})
        found = search.run()
        if found is not None:
            self.settled = search.relations
        return found

    def plan(self, start: int) -> Plan:
        """The order in which a search from ``start`` places points."""
        if start not in self._plans:
            self._plans[start] = Plan(self._walk(start))
        return self._plans[start]

    def _walk(self, start: int) -> Iterator[Placing]:
        seen, queue = {start}, [(start, -1)]
        placed: set[int] = set()
        for point, parent in queue:
            placed.add(point)
            closing = [j for j in self.neighbours[point] if j in placed and j != parent]
            whole = [unit for unit, points in self._units_at[point] if placed.issuperset(points)]
            yield Placing(point, parent, closing, whole)
            for there in self.neighbours[point]:
                if there not in seen:
                    seen.add(there)
                    queue.append((there, point))


class Placing(NamedTuple):
    """A point of a plan, the one it hangs on (-1: none), its other earlier neighbours, units now whole."""

    point: int
    parent: int
    closing: list[int]
    whole: list[Unit]


class Plan:
    """Points outward from a start, worked out as far as searches have come: most fail within a few bonds."""

    def __init__(self, walk: Iterator[Placing]) -> None:
        self._walk = walk
        self._known: list[Placing] = []

    def at(self, depth: int) -> Placing | None:
        """The placing at a depth, or None past the end."""
        while len(self._known) <= depth:
            placing = next(self._walk, None)
            if placing is None:
                return None
            self._known.append(placing)
        return self._known[depth]


class Relations:
    """Orientations of units that the source leaves open, known relative to one another once chosen."""

    def __init__(self) -> None:
        self._root: dict[tuple[int, ...], tuple[tuple[int, ...], int]] = {}
        self._undo: list[tuple[int, ...]] = []

    def copy(self) -> Relations:
        """An independent copy, nothing to undo in it."""
        twin = Relations()
        twin._root = dict(self._root)
        return twin

    def agree(self, a: tuple[int, ...], b: tuple[int, ...], turned: int) -> bool:
        """Take over "b is a turned ``turned`` times"; False when it contradicts what is known."""
        (root_a, flip_a), (root_b, flip_b) = self._find(a), self._find(b)
        if root_a == root_b:
            return flip_a ^ flip_b == turned
        self._root[root_a] = (root_b, flip_a ^ flip_b ^ turned)
        self._undo.append(root_a)
        return True

    def mark(self) -> int:
        """A point to go back to."""
        return len(self._undo)

    def back_to(self, mark: int) -> None:
        """Forget what was taken over since ``mark``."""
        while len(self._undo) > mark:
            del self._root[self._undo.pop()]

    def _find(self, key: tuple[int, ...]) -> tuple[tuple[int, ...], int]:
        flip = 0
        while key in self._root:
            key, turned = self._root[key]
            flip ^= turned
        return key, flip


class _Search:
    """One depth-first search for an operation."""

    def __init__(self, frame: Framework, start: int, end: int, mirror: bool, pins: Mapping[int, int]) -> None:
        self.frame = frame
        self.mirror = mirror
        self.pins = {**pins, start: end}
        self.plan = frame.plan(start)
        self.image: Operation = {}
        self.taken: set[int] = set()
        self.relations = frame.settled.copy()

    def run(self) -> Operation | None:
        first = self.plan.at(0)
        stack = [(first, self._choices(first), self.relations.mark())] if first else []
        for _ in range(_MAX_STEPS):
            if not stack:
                return None
            placing, choices, mark = stack[-1]
            self._take_back(placing, mark)
            if not any(self._place(placing, choice, mark) for choice in choices):
                stack.pop()
                continue
            following = self.plan.at(len(stack))
            if following is None:
                return self.image
            stack.append((following, self._choices(following), self.relations.mark()))
        return None

    def _choices(self, placing: Placing) -> Iterator[int]:
        point = placing.point
        if point in self.pins:
            around: tuple[int, ...] = (self.pins[point],)
        else:
            around = self.frame.neighbours[self.image[placing.parent]]
            if point in around:  # staying put first keeps operations simple
                around = (point, *(p for p in around if p != point))
        colour = self.frame.colours[point]
        return iter([p for p in around if self.frame.colours[p] == colour])

    def _place(self, placing: Placing, choice: int, mark: int) -> bool:
        if choice in self.taken:
            return False
        point, parent, closing, whole = placing
        labels, image = self.frame.labels, self.image
        if parent >= 0 and labels.get((image[parent], choice)) != labels[parent, point]:
            return False
        if any(labels.get((image[j], choice)) != labels[j, point] for j in closing):
            return False
        image[point] = choice
        if all(self._keeps(unit) for unit in whole):
            self.taken.add(choice)
            return True
        del image[point]
        self.relations.back_to(mark)
        return False

    def _take_back(self, placing: Placing, mark: int) -> None:
        if placing.point in self.image:
            self.taken.discard(self.image.pop(placing.point))
            self.relations.back_to(mark)

    def _keeps(self, unit: Unit) -> bool:
        """Whether the unit lands with the orientation that the operation asks for."""
        centres = tuple(sorted([self.image[c] for c in unit.centres]))
        target = self.frame.units.get(centres)
        if target is None:
            return False
        landed = [self.image[p] if p >= 0 else ~self.image[~p] for p in unit.ligands]
        turned = _is_odd([target.ligands.index(p) for p in landed]) ^ (self.mirror and unit.mirrored)
        if unit.parity is not None and target.parity is not None:
            return turned == unit.parity ^ target.parity
        # One side open: what is chosen for it now must hold for every later operation.
        return self.relations.agree(unit.centres, centres, int(turned))


def _is_odd(order: list[int]) -> bool:
    return sum(a > b for a, b in combinations(order, 2)) % 2 == 1
