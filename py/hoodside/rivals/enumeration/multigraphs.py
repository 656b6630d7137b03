"""All connected multigraphs of given vertices: constitutional isomers, before any chemistry but valence.

Every connected graph has a spanning tree, and every tree a leaf. So trees are grown leaf by leaf, and bonds
are added to them one by one; what has been met is told by colour refinement, then by a search for an
isomorphism (B. D. McKay, Congressus Numerantium 1981, 30, 45).
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass
from functools import cached_property

#: Rounds of refinement: enough for vertices to learn of all others in graphs this small.
_ROUNDS = 3


@dataclass(frozen=True)
class Multigraph:
    """Vertices with a kind and unused valences; ``rows[i]`` maps neighbours of i to bond orders."""

    kinds: tuple[int, ...]
    free: tuple[int, ...]
    rows: tuple[dict[int, int], ...]

    @cached_property
    def colours(self) -> tuple[int, ...]:
        """A number per vertex; vertices that correspond in an isomorphism have the same."""
        colours = [hash(pair) for pair in zip(self.kinds, self.free, strict=True)]
        for _ in range(_ROUNDS):
            colours = [
                hash((colours[i], tuple(sorted([(order, colours[j]) for j, order in row.items()]))))
                for i, row in enumerate(self.rows)
            ]
        return tuple(colours)

    @cached_property
    def print(self) -> tuple[int, ...]:
        """Equal for isomorphic graphs, seldom for others."""
        return tuple(sorted(self.colours))

    def with_leaf(self, at: int, kind: int, valence: int) -> Multigraph:
        """A vertex more, bonded to vertex ``at``."""
        new = len(self.kinds)
        rows = tuple({**row, new: 1} if i == at else row for i, row in enumerate(self.rows))
        free = tuple(f - (i == at) for i, f in enumerate(self.free))
        return Multigraph((*self.kinds, kind), (*free, valence - 1), (*rows, {at: 1}))

    def with_bond(self, a: int, b: int) -> Multigraph:
        """One bond more between two vertices."""
        order = self.rows[a].get(b, 0) + 1
        rows = list(self.rows)
        rows[a], rows[b] = {**rows[a], b: order}, {**rows[b], a: order}
        free = tuple(f - (i in (a, b)) for i, f in enumerate(self.free))
        return Multigraph(self.kinds, free, tuple(rows))

    def is_like(self, other: Multigraph) -> bool:
        """Whether an isomorphism exists, given equal prints."""
        places: dict[int, list[int]] = {}
        for j, colour in enumerate(other.colours):
            places.setdefault(colour, []).append(j)
        order = sorted(range(len(self.kinds)), key=lambda i: len(places[self.colours[i]]))
        return self._map(other, order, places, {})

    def _map(
        self, other: Multigraph, order: list[int], places: dict[int, list[int]], image: dict[int, int]
    ) -> bool:
        if len(image) == len(order):
            return True
        i = order[len(image)]
        for j in places[self.colours[i]]:
            if j in image.values() or any(
                self.rows[i].get(a, 0) != other.rows[j].get(b, 0) for a, b in image.items()
            ):
                continue
            image[i] = j
            if self._map(other, order, places, image):
                return True
            del image[i]
        return False


class Collection:
    """Multigraphs, each kept once."""

    def __init__(self) -> None:
        self._by_print: dict[tuple[int, ...], list[Multigraph]] = {}
        self.items: list[Multigraph] = []

    def add(self, graph: Multigraph) -> None:
        """Keep a graph unless one like it is here."""
        known = self._by_print.setdefault(graph.print, [])
        if not any(graph.is_like(other) for other in known):
            known.append(graph)
            self.items.append(graph)


#: The highest bond order allowed between two kinds of vertex; 0 when they may not be bonded at all.
MostOrder = Callable[[int, int], int]


class TooMany(Exception):  # noqa: N818 - a signal within this package, not an error
    """More graphs than were asked for."""


def multigraphs(
    valences: Sequence[int], counts: Sequence[int], extra_bonds: int, most_order: MostOrder, most: int
) -> Iterator[Multigraph]:
    """Connected multigraphs of ``counts[k]`` vertices of kind k with valence ``valences[k]``.

    Args:
        extra_bonds: bonds (by order) beyond those of a tree: the degree of unsaturation.
        most_order: which kinds may be neighbours, and how closely.
        most: TooMany is raised when a stage holds more graphs than this.
    """
    stage = _Trees(valences, most_order, most).of(tuple(counts))
    for _ in range(extra_bonds):
        wider = Collection()
        for graph in stage:
            for a, b in _openings(graph, most_order):
                wider.add(graph.with_bond(a, b))
            if len(wider.items) > most:
                raise TooMany
        stage = wider.items
    yield from stage


def _openings(graph: Multigraph, most_order: MostOrder) -> Iterator[tuple[int, int]]:
    for a, free in enumerate(graph.free):
        for b in range(a) if free else ():
            order = graph.rows[a].get(b, 0)
            if graph.free[b] and order < most_order(graph.kinds[a], graph.kinds[b]):
                yield b, a


class _Trees:
    """Trees by composition, each composition worked out once."""

    def __init__(self, valences: Sequence[int], most_order: MostOrder, most: int) -> None:
        self._valences, self._most_order, self._most = valences, most_order, most
        self._known: dict[tuple[int, ...], list[Multigraph]] = {}

    def of(self, counts: tuple[int, ...]) -> list[Multigraph]:
        if counts not in self._known:
            self._known[counts] = self._grow(counts)
        return self._known[counts]

    def _grow(self, counts: tuple[int, ...]) -> list[Multigraph]:
        if sum(counts) == 1:
            kind = counts.index(1)
            return [Multigraph((kind,), (self._valences[kind],), ({},))]
        found = Collection()
        for kind in self._last_kinds(counts):
            fewer = tuple(n - (k == kind) for k, n in enumerate(counts))
            for graph in self.of(fewer):
                for at, free in enumerate(graph.free):
                    if free and self._most_order(graph.kinds[at], kind):
                        found.add(graph.with_leaf(at, kind, self._valences[kind]))
            if len(found.items) > self._most:
                raise TooMany
        return found.items

    def _last_kinds(self, counts: tuple[int, ...]) -> list[int]:
        """Kinds that the last leaf may be of: a monovalent one if there is any, as it can only be a leaf."""
        present = [kind for kind, n in enumerate(counts) if n]
        single = [kind for kind in present if self._valences[kind] == 1]
        return single[:1] if single and sum(counts) > 2 else present
