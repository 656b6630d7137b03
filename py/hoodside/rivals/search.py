"""The search for rivals of a structure."""

from __future__ import annotations

import time
from collections.abc import Callable, Iterator, Sequence

from hoodside.errors import FormulaError, StructureError
from hoodside.molecule.structure import Structure, read_structure
from hoodside.predict.formula import formula_of, unsaturation
from hoodside.readings.model import Readings
from hoodside.rivals.configurations import double_bond_forms
from hoodside.rivals.early import early_test
from hoodside.rivals.enumeration import enumerate_isomers
from hoodside.rivals.graph import graph_of
from hoodside.rivals.growth import SENSIBLE, Growth
from hoodside.rivals.model import Rival, RivalsFound
from hoodside.rivals.steps import steps_from
from hoodside.rivals.swaps import moves_and_swaps
from hoodside.rivals.writer import write_smiles

#: Structures looked at before the search gives up filling its list: in all, and for each rival asked for.
STEPS = 300
_STEPS_PER_RIVAL = 14
#: The same where all isomers are enumerated anyway: moves then serve to rank them.
_STEPS_WHEN_SMALL = 500
#: Formulas that are enumerated: heavy atoms, degrees of unsaturation, and isomers at the most.
_SMALL_HEAVY = 8
_SMALL_UNSATURATION = 4
_SMALL_COUNT = 1_000
#: Cost of an isomer that no short series of moves reaches.
_ENUMERATED = 4.0
_SLICE = 25


def find_rivals(
    structure: Structure,
    *,
    formula_known: bool = True,
    readings: Readings | None = None,
    limit: int = 200,
    budget_s: float | None = None,
    steps: int | None = None,
    stated: Sequence[Rival] = (),
    on_progress: Callable[[list[Rival]], bool | None] | None = None,
) -> RivalsFound:
    """Look-alikes of a structure, most plausible first.

    Args:
        formula_known: when False, isoelectronic analogues of other formula are put up too.
        readings: rivals that these rule out beyond doubt are left out.
        limit: how many to keep.
        budget_s: seconds after which the search stops with what it has (None: no limit in time).
        steps: how many structures to look at in all (None: by ``limit``).
        stated: rivals that stand first whatever the search and the readings say, beside ``limit``.
        on_progress: called with every slice found; a true answer stops the search.
    """
    search = Search(structure, formula_known, readings, limit, steps, stated)
    began = time.monotonic()
    for batch in search.slices():
        asked = bool(on_progress and on_progress(batch))
        if asked or (budget_s is not None and time.monotonic() - began > budget_s):
            return RivalsFound(tuple(search.best()), False, "Stopped early; there may be more.")
    return RivalsFound(tuple(search.best()), search.complete, search.note)


def iterate_rivals(
    structure: Structure,
    *,
    formula_known: bool = True,
    readings: Readings | None = None,
    limit: int = 200,
    steps: int | None = None,
) -> Iterator[list[Rival]]:
    """Slices of rivals as they are found, for a caller that shows progress and may stop at any slice."""
    yield from Search(structure, formula_known, readings, limit, steps).slices()


class Search:
    """Growth by moves, then, where the formula is small, whatever isomers are left.

    Attributes:
        small: all isomers of the formula are enumerated; moves then serve to rank them.
        complete: every sensible isomer was found; known when ``run`` has ended, as is ``note``.
    """

    def __init__(
        self,
        structure: Structure,
        formula_known: bool,
        readings: Readings | None,
        limit: int,
        steps: int | None = None,
        stated: Sequence[Rival] = (),
    ) -> None:
        self._structure, self._limit = structure, limit
        self.small = formula_known and _is_small(structure)
        self._steps = _steps(limit) if steps is None else steps
        budget = min(self._steps, _STEPS_WHEN_SMALL) if self.small else self._steps
        keep = early_test(readings) if readings else lambda smiles: True
        moves = steps_from if formula_known else moves_and_swaps
        self._growth = Growth(structure, limit, budget, keep, moves)
        for rival in stated:
            self._growth.put_up(rival)
        mine = formula_of(structure)
        self._others = sum(formula_of(read_structure(rival.smiles)) != mine for _, rival in self.found)
        self.complete = False
        self.note = ""

    def widen(self, limit: int) -> None:
        """Keep as many as ``limit``; ``run`` then goes on from where it ended. Not for a small formula."""
        if limit > self._limit:
            self._growth.widen(limit - self._limit)
            self._limit, self._steps = limit, _steps(limit)
            self._growth.budget = max(self._growth.budget, self._steps)

    @property
    def found(self) -> list[tuple[float, Rival]]:
        """What was found so far, each with its cost: the less, the more plausible."""
        return self._growth.found

    @property
    def looked_at(self) -> int:
        """How many structures were looked at so far."""
        return self._growth.looked_at

    def best(self) -> list[Rival]:
        """The best so far, most plausible first."""
        return self._growth.best()

    def sure(self) -> list[Rival]:
        """Those of the best so far that nothing found later can displace."""
        frontier = self._growth.frontier
        costs = {rival.smiles: cost for cost, rival in self.found}
        return [rival for rival in self.best() if costs[rival.smiles] <= frontier]

    def slices(self) -> Iterator[list[Rival]]:
        """Rivals as they are found, a slice at a time."""
        told = 0
        for _ in self.run():
            if len(self.found) >= told + _SLICE:
                yield [rival for _, rival in self.found[told:]]
                told = len(self.found)
        if told < len(self.found):
            yield [rival for _, rival in self.found[told:]]

    def run(self) -> Iterator[None]:
        """Works in small pieces, so that a caller may do other things between them or stop."""
        yield from self._growth.run()
        if self.small:
            isomers = self._isomers()
            if isomers is not None:
                yield from self._add_all(isomers)
            else:
                self._growth.budget = self._steps
                yield from self._growth.run()

    def _isomers(self) -> tuple[str, ...] | None:
        """All isomers, None when there are too many."""
        try:
            found = enumerate_isomers(formula_of(self._structure), sensible=True, most=_SMALL_COUNT)
        except FormulaError:
            return None
        return found.smiles if found.complete and len(found.smiles) <= _SMALL_COUNT else None

    def _add_all(self, isomers: tuple[str, ...]) -> Iterator[None]:
        formula = formula_of(self._structure).text
        for smiles in isomers:
            self._add(smiles, f"found among all isomers of {formula}")
            yield
        self._conclude(formula)

    def _add(self, smiles: str, how: str) -> None:
        flat = graph_of(read_structure(smiles))
        for cis, form in double_bond_forms(flat):
            try:
                doubt = self._growth.add(write_smiles(form), _ENUMERATED + cis / 2, how)
            except StructureError:
                continue
            if doubt is not None and doubt >= SENSIBLE:
                return

    def _conclude(self, formula: str) -> None:
        sensible = len(self.found) - self._others
        self.complete = len(self.found) == len(self.best())
        if self.complete:
            self.note = (
                f"Complete: every sensible isomer of {formula} of the usual valences is here, E and Z apart; "
                "other relative configurations are left open unless marked."
            )
        else:
            self.note = (
                f"{formula} has {sensible} sensible isomers; the {self._limit} most plausible are kept."
            )


def _steps(limit: int) -> int:
    return STEPS + _STEPS_PER_RIVAL * limit


def _is_small(structure: Structure) -> bool:
    heavy = len(structure.atoms)
    return (
        heavy <= _SMALL_HEAVY
        and not structure.charge
        and not any(atom.radicals or atom.isotope for atom in structure.atoms)
        and (unsaturation(formula_of(structure)) or 0) <= _SMALL_UNSATURATION
        and all(step >= 0 for step in structure.distances_from(0))
    )
