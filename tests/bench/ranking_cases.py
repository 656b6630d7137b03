"""Published cases with their rivals, weighed: shared by the ranking bench and the fit of trust."""

from __future__ import annotations

import json
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from hoodside.readings import Readings
from hoodside.readings.from_json import readings_from_json
from hoodside.weigh.expectations import Expectations, expectations
from hoodside.weigh.structure import Tally, weigh_structure
from hoodside.weigh.verdict import Verdict, judge, shares

CASES = Path(__file__).resolve().parents[1] / "cases" / "published.json"
SKELETON = 14  # letters of an InChIKey that tell the constitution


@dataclass(frozen=True)
class Case:
    """Readings with the truth first, then its rivals (repeats of the truth left out)."""

    id: str
    readings: Readings
    structures: tuple[Expectations, ...]

    @property
    def stereo(self) -> tuple[int, ...]:
        """Rivals that differ from the truth in space only."""
        return tuple(i for i in range(1, len(self.structures)) if self._skeleton(i) == self._skeleton(0))

    def _skeleton(self, i: int) -> str:
        return self.structures[i].structure.inchikey[:SKELETON]


@dataclass(frozen=True)
class Outcome:
    """One case weighed, in the order of its structures."""

    case: Case
    tallies: tuple[Tally, ...]
    verdicts: tuple[Verdict, ...]
    shares: tuple[float, ...]

    @property
    def weights(self) -> tuple[float, ...]:
        return tuple(t.weight_db for t in self.tallies)

    def first(self, among: Callable[[int], bool] = lambda i: True) -> bool:
        """Whether the truth outweighs every rival of a kind."""
        return all(self.weights[0] > self.weights[i] for i in range(1, len(self.weights)) if among(i))


def published() -> list[dict[str, Any]]:
    """The raw cases."""
    found: list[dict[str, Any]] = json.loads(CASES.read_text("utf-8"))
    return found


def load_cases(raw: list[dict[str, Any]] | None = None) -> list[Case]:
    """All cases with their structures read."""
    return [_case(entry) for entry in raw or published()]


def _case(entry: dict[str, Any]) -> Case:
    readings = readings_from_json(entry)
    structures: dict[str, Expectations] = {}
    for smiles in (entry["smiles"], *entry["rivals"]):
        expected = expectations(smiles, readings)
        structures.setdefault(expected.structure.inchikey, expected)
    return Case(entry["id"], readings, tuple(structures.values()))


def weigh_case(case: Case, readings: Readings | None = None) -> Outcome:
    """One case weighed, with other readings if given."""
    tallies = tuple(weigh_structure(s, readings or case.readings) for s in case.structures)
    return Outcome(case, tallies, tuple(judge(tallies)), tuple(shares(tallies)))


def outcomes(cases: list[Case]) -> Iterator[Outcome]:
    """All cases weighed."""
    for case in cases:
        yield weigh_case(case)
