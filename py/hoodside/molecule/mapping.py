"""Search for symmetry operations: ways to lay a molecule on itself, or on its mirror image.

This is the substitution test (Mislow and Raban, Top. Stereochem. 1967, 1, 1) turned round: labelling two
ligands in turn gives the same compound exactly when an operation carries the one onto the other.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from itertools import combinations

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
        self._units_at: list[list[Unit]] = [[] for _ in neighbours]
        for unit in units:
            for point in unit.points:
                self._units_at[point].append(unit)
        self._plans: dict[int, list[tuple[int, int, list[int], list[Unit]]]] = {}
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

    def plan(self, start: int) -> list[tuple[int, int, list[int], list[Unit]]]:
        """Points outward from ``start``, each with the point it hangs on, its other earlier neighbours and
        the units it makes whole."""
        if start not in self._plans:
            self._plans[start] = list(self._walk(start))
        return self._plans[start]

    def _walk(self, start: int) -> Iterator[tuple[int, int, list[int], list[Unit]]]:
        seen, queue = {start}, [(start, -1)]
        placed: set[int] = set()
        for point, parent in queue:
            placed.add(point)
            closing = [j for j in self.neighbours[point] if j in placed and j != parent]
            whole = [u for u in self._units_at[point] if placed.issuperset(u.points)]
            yield point, parent, closing, whole
            for there in self.neighbours[point]:
                if there not in seen:
                    seen.add(there)
                    queue.append((there, point))


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
        stack: list[tuple[Iterator[int], int]] = [(self._choices(0), self.relations.mark())]
        for _ in range(_MAX_STEPS):
            choices, mark = stack[-1]
            self._take_back(len(stack) - 1, mark)
            if not any(self._place(len(stack) - 1, choice, mark) for choice in choices):
                stack.pop()
            elif len(stack) == len(self.plan):
                return self.image
            else:
                stack.append((self._choices(len(stack)), self.relations.mark()))
            if not stack:
                return None
        return None

    def _choices(self, depth: int) -> Iterator[int]:
        point, parent, _, _ = self.plan[depth]
        if point in self.pins:
            around: tuple[int, ...] = (self.pins[point],)
        else:
            around = self.frame.neighbours[self.image[parent]]
            if point in around:  # staying put first keeps operations simple
                around = (point, *(p for p in around if p != point))
        colour = self.frame.colours[point]
        return iter([p for p in around if self.frame.colours[p] == colour])

    def _place(self, depth: int, choice: int, mark: int) -> bool:
        if choice in self.taken:
            return False
        point, parent, closing, whole = self.plan[depth]
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

    def _take_back(self, depth: int, mark: int) -> None:
        point = self.plan[depth][0]
        if point in self.image:
            self.taken.discard(self.image.pop(point))
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
