"""Look-alikes grown move by move, cheapest first.

A uniform-cost search (E. W. Dijkstra, Numer. Math. 1959, 1, 269) over isomer moves: what is popped next is
never dearer than what has been found, so that the best N are known once N have been found below the bound.
"""

from __future__ import annotations

import heapq
import math
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.errors import StructureError
from hoodside.facts import load_table
from hoodside.molecule.structure import Structure
from hoodside.predict.formula import formula_of
from hoodside.rivals.configurations import diastereomers, double_bond_forms
from hoodside.rivals.held_back import NEVER, doubts, penalty
from hoodside.rivals.model import Rival
from hoodside.rivals.names import flat, name_of, tautomer_key
from hoodside.rivals.site import Site, site_of
from hoodside.rivals.steps import Step, steps_from
from hoodside.rivals.words import describe
from hoodside.rivals.writer import write_smiles

#: Cost of turning over one stereounit, and of a Z double bond where an E one would do.
TURNED = 0.4
CIS = 0.5
#: Cost of a structure for which no move speaks but that it is met often.
COMMON = 1.5
#: What a second and later move adds beyond its own cost.
AGAIN = 0.6
#: No move costs less: the bound for what a structure not yet opened may give.
_LEAST = 0.6
_MOST_MOVES = 3
#: Structures less likely than this are no stepping stones.
_STONE = 2.5
#: What sets one rival that stands anyhow behind the one before it.
_STATED = 1e-6
#: Penalty from which an enumerated structure is no longer called sensible.
SENSIBLE = 4.0


@dataclass(slots=True)
class _Stone:
    """A structure reached, from which to go on."""

    smiles: str
    how: tuple[str, ...]


@dataclass(slots=True)
class _Leap:
    """A step not yet made."""

    step: Step
    how: tuple[str, ...]


@dataclass(slots=True)
class _Form:
    """An isomer made, not yet looked at. ``final``: its like is opened elsewhere, so it is not."""

    smiles: str
    how: tuple[str, ...]
    final: bool
    tautomer: bool = False


#: Proposes the single moves from a structure.
Moves = Callable[[Site], list[Step]]


class Growth:
    """One search. ``keep`` says whether a structure may be a rival, by its SMILES."""

    def __init__(
        self,
        intended: Structure,
        limit: int,
        budget: int,
        keep: Callable[[str], bool],
        moves: Moves = steps_from,
    ) -> None:
        self._limit, self._keep, self._moves = limit, keep, moves
        #: How many structures may be looked at; ``run`` goes on from where it stopped when this is raised.
        self.budget = budget
        self._site = Site(intended)
        self._allowed = doubts(intended.source)
        self._seen = {name_of(intended.smiles), flat(intended.smiles), tautomer_key(intended.smiles)}
        self._heap: list[tuple[float, int, _Stone | _Leap | _Form]] = []
        self._count = 0
        self._dearest: list[float] = []  # costs of the best, negated: the dearest of them comes first
        self.looked_at = 0
        #: (total cost, rival), in the order found
        self.found: list[tuple[float, Rival]] = []

    def run(self) -> Iterator[None]:
        """Works in small pieces; what they give stands in ``found``, roughly best first."""
        if not self._count:
            self._start()
            yield
        while self._heap and self.looked_at < self.budget and not self._settled():
            self._take(*heapq.heappop(self._heap))
            yield

    def widen(self, by: int) -> None:
        """Keep so many more; ``run`` then goes on."""
        self._limit += by
        best = heapq.nsmallest(self._limit, (cost for cost, _ in self.found))
        self._dearest = [-cost for cost in best]
        heapq.heapify(self._dearest)

    @property
    def frontier(self) -> float:
        """What is found from here on costs no less."""
        return self._heap[0][0] if self._heap else math.inf

    def best(self) -> list[Rival]:
        """The best so far, most plausible first."""
        return [rival for _, rival in sorted(self.found, key=lambda f: (f[0], f[1].smiles))[: self._limit]]

    def _settled(self) -> bool:
        """Whether nothing still waiting can be among the best."""
        return len(self._dearest) == self._limit and self._heap[0][0] >= -self._dearest[0]

    def _start(self) -> None:
        for count, other in diastereomers(self._site.graph):
            form = _Form(write_smiles(other), ("another relative configuration",), True)
            self._push(TURNED * count, form)
        for name, smiles in common_compounds(formula_of(self._site.structure).text):
            how = (f"{name}, a common compound of the same formula",)
            self._push(COMMON, _Form(smiles, how, False))
        self._open(self._site, 0.0, ())

    def _push(self, cost: float, what: _Stone | _Leap | _Form) -> None:
        self._count += 1
        heapq.heappush(self._heap, (cost, self._count, what))

    def _open(self, site: Site, cost: float, how: tuple[str, ...]) -> None:
        for step in self._moves(site):
            self._push(cost + step.cost, _Leap(step, how))

    def _take(self, cost: float, _number: int, what: _Stone | _Leap | _Form) -> None:
        if isinstance(what, _Stone):
            self._open(site_of(what.smiles), cost - _LEAST, what.how)
        elif isinstance(what, _Leap):
            self._make(cost, what)
        else:
            self._look_at(cost, what)

    def _make(self, cost: float, leap: _Leap) -> None:
        graph = leap.step.make()
        if graph is None:
            return
        how = (*leap.how, describe(leap.step))
        parent = leap.step.site.graph
        # An exchange of elements may number the atoms anew: there the parent's bonds tell nothing.
        alike = len(parent.symbols) == len(graph.symbols)
        for cis, form in double_bond_forms(graph, parent if alike else None):
            made = _Form(write_smiles(form), how, bool(cis), leap.step.tautomer)
            if cis:
                self._push(cost + CIS * cis, made)
            else:
                self._look_at(cost, made)

    def _look_at(self, cost: float, form: _Form) -> None:
        self.looked_at += 1
        try:
            name = name_of(form.smiles)
        except StructureError:
            return
        if name in self._seen:
            return
        key = tautomer_key(name)
        if key and key in self._seen and not form.tautomer:
            return
        self._seen |= {name, key}
        doubt = penalty(form.smiles, self._allowed)  # the kernel still holds it open by this text
        if doubt >= NEVER:
            return
        if self._keep(name):
            self._record(cost + doubt, Rival(name, form.how, len(form.how), plausibility(cost + doubt)))
        if not form.final and len(form.how) < _MOST_MOVES and doubt < _STONE:
            self._push(cost + AGAIN + _LEAST, _Stone(name, form.how))

    def _record(self, total: float, rival: Rival) -> None:
        self.found.append((total, rival))
        heapq.heappush(self._dearest, -total)
        if len(self._dearest) > self._limit:
            heapq.heappop(self._dearest)

    def put_up(self, rival: Rival) -> None:
        """Put up a rival that stands whatever moves and readings say; never the structure itself."""
        name = name_of(rival.smiles)
        if name not in self._seen:
            self._seen |= {name, tautomer_key(name)}
            cost = _STATED * len(self.found)  # they stay in the order in which they were put up
            self._limit += 1  # it takes no place from those that are searched
            self._record(cost, Rival(name, rival.how, rival.distance, rival.plausibility))

    def add(self, smiles: str, cost: float, how: str) -> float | None:
        """Put up a structure from elsewhere unless it is known; what speaks against it, None when known."""
        name = name_of(smiles)
        key = tautomer_key(name)
        if name in self._seen or (key and key in self._seen):
            return None
        doubt = penalty(name, self._allowed)
        self._seen |= {name, key}
        if doubt < SENSIBLE and self._keep(name):
            self._record(cost + doubt, Rival(name, (how,), 0, plausibility(cost + doubt)))
        return doubt


@cache
def _by_formula() -> dict[str, list[tuple[str, str]]]:
    found: dict[str, list[tuple[str, str]]] = {}
    for row in load_table("common_names"):
        found.setdefault(row["formula"], []).append((row["name"], row["smiles"]))
    return found


def common_compounds(formula: str) -> list[tuple[str, str]]:
    """Name and SMILES of the common compounds of a formula (facts table common_names)."""
    return _by_formula().get(formula, [])


def plausibility(cost: float) -> float:
    """Cost of the moves and of what speaks against the skeleton, as a figure from 0 to 1."""
    return round(math.exp(-cost / 2), 4)
