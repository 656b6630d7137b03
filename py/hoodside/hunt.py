"""The hunt: look-alikes of one structure searched and weighed side by side, a slice of time at a call."""

from __future__ import annotations

import time
from collections.abc import Callable, Iterator, Sequence
from dataclasses import asdict
from typing import Any

from hoodside.errors import StructureError
from hoodside.molecule.structure import Structure
from hoodside.readings.model import Readings
from hoodside.rivals.model import Rival
from hoodside.rivals.search import Search
from hoodside.rivals.stated import StatedStep, stated_rivals
from hoodside.weigh.expectations import expectations
from hoodside.weigh.structure import Tally, weigh_structure
from hoodside.weigh.verdict import CLASHES, ENOUGH, TELLS_APART, Verdict, judge

_UNWEIGHED = {"weight_db": None, "verdict": None, "reason": "", "near": False}


class Hunt:
    """One search. ``go_on`` works for a while, ``answer`` tells what there is so far.

    Args:
        readings: what rivals are weighed against; those they rule out beyond doubt are left out when
            ``allowed`` is set.
        limit: how many of the most plausible rivals to weigh and keep.
        formula_known: False when analogues of other formula are wanted too.
        step: what was run; its start and outcomes stand among the rivals whatever the readings say.
    """

    def __init__(
        self,
        structure: Structure,
        readings: Readings,
        *,
        allowed: bool = True,
        limit: int = 40,
        formula_known: bool = True,
        step: StatedStep | None = None,
    ) -> None:
        self._structure, self._readings, self.limit = structure, readings, limit
        stated = [rival for _, rival in stated_rivals(step)] if step else []
        asked = readings if allowed else None
        self._begin: Callable[[int], Search] = lambda most: Search(
            structure, formula_known, asked, most, stated=stated
        )
        self._search = self._begin(limit)
        self._formulas: dict[str, str] = {}
        self._tried: set[str] = set()
        self._weighed: list[tuple[Rival, Tally]] = []
        self._own: Tally | None = None
        self._seen = 0  # rivals found when those sure to be kept were last sought
        self._left = self._run()
        self.done = False

    def go_on(self, seconds: float) -> None:
        """Work for about that long, or until all is done."""
        until = time.monotonic() + seconds
        for _ in self._left:
            if time.monotonic() >= until:
                return
        self.done = True

    def widen(self, limit: int) -> None:
        """Keep as many as ``limit``, when that is more than before."""
        if limit > self.limit:
            self.limit = limit
            if self._search.small:  # what the enumeration has put up is not ranked anew by moves
                self._search = self._begin(limit)
            self._search.widen(limit)
            self._left = self._run()
            self._seen, self.done = 0, False

    def answer(self) -> dict[str, Any]:
        """All weighed so far, heaviest first, then what waits for its weighing; JSON-ready."""
        weighed = sorted(self._weighed, key=lambda entry: -entry[1].weight_db)
        own, *standings = _standings([self._own, *(tally for _, tally in weighed)])
        told = [
            {**self._told(rival), **standing} for (rival, _), standing in zip(weighed, standings, strict=True)
        ]
        known = {rival.smiles for rival, _ in weighed}
        waiting = [rival for rival in self._search.best() if rival.smiles not in known]
        return {
            "done": self.done,
            "looked_at": self._search.looked_at,
            "weighed": len(weighed),
            "structure": own if self._own else None,
            "rivals": told + [{**self._told(rival), **_UNWEIGHED} for rival in waiting],
            "complete": self.done and self._search.complete,
            "note": self._search.note if self.done else "",
        }

    def _run(self) -> Iterator[None]:
        """Search and weighing by turns: the first rivals stand weighed long before the last is found."""
        if not _measured(self._readings):
            yield from self._search.run()
            return
        self._own = self._tally(self._structure.source)
        yield
        for _ in self._search.run():
            yield
            if len(self._search.found) > self._seen:
                self._seen = len(self._search.found)
                yield from self._weigh(self._search.sure())
        yield from self._weigh(self._search.best())

    def _weigh(self, rivals: Sequence[Rival]) -> Iterator[None]:
        """Weigh those that have not been."""
        for rival in rivals:
            if rival.smiles not in self._tried:
                self._tried.add(rival.smiles)
                tally = self._tally(rival.smiles)
                if tally:
                    self._weighed.append((rival, tally))
                yield

    def _tally(self, source: str) -> Tally | None:
        try:
            expected = expectations(source, self._readings)
            tally = weigh_structure(expected, self._readings)
        except StructureError:  # beyond what the predictors take: it stands unweighed
            return None
        expected.structure.release()  # hundreds may be kept, and their predictions are made
        return tally

    def _told(self, rival: Rival) -> dict[str, Any]:
        if rival.smiles not in self._formulas:
            self._formulas[rival.smiles] = expectations(rival.smiles, self._readings).formula.text
        return {**asdict(rival), "how": list(rival.how), "formula": self._formulas[rival.smiles]}


def _measured(readings: Readings) -> bool:
    kinds = (readings.h1, readings.c13, readings.ir, readings.ir_clear, readings.ms, readings.wet)
    return any(kinds) or bool(readings.formula or readings.hrms or readings.analysis)


def _standings(tallies: list[Tally | None]) -> list[dict[str, Any]]:
    """Weight and verdict of each, judged all together; nothing where there is no tally."""
    known = [tally for tally in tallies if tally]
    verdicts = iter(judge(known))
    least = max(ENOUGH, tallies[0].weight_db - TELLS_APART) if tallies[0] else ENOUGH
    return [_standing(tally, next(verdicts), least) if tally else _UNWEIGHED for tally in tallies]


def _standing(tally: Tally, verdict: Verdict, least: float) -> dict[str, Any]:
    """``near``: it stands, and near enough to the structure itself (the first) to take its verdict away."""
    return {
        "weight_db": round(tally.weight_db, 1) + 0.0,
        "verdict": verdict.verdict,
        "reason": verdict.reason,
        "near": verdict.verdict != CLASHES and tally.weight_db >= least,
    }
