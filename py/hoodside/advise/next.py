"""Ranks further measurements by how well each would tell the standing structures apart."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from hoodside.readings import Readings
from hoodside.weigh.structure import Tally
from hoodside.weigh.verdict import Verdict


@dataclass(frozen=True, slots=True)
class Advice:
    """One further measurement."""

    measure: str
    why: str
    separates: tuple[tuple[int, int], ...]  # places in the ranking
    expected_db: float
    cautions: tuple[str, ...] = ()
    minutes: int = 0
    needs: str = ""
    if_then: tuple[str, ...] = ()
    test: str = ""

    def to_dict(self) -> dict[str, object]:
        """JSON-ready form."""
        return {
            "measure": self.measure,
            "why": self.why,
            "separates": [list(pair) for pair in self.separates],
            "expected_db": round(self.expected_db, 1),
            "cautions": list(self.cautions),
            "effort": f"{self.minutes} min{', ' + self.needs if self.needs else ''}",
            "minutes": self.minutes,
            "if_then": list(self.if_then),
            **({"test": self.test} if self.test else {}),
        }


def advise(readings: Readings, ranked: Sequence[tuple[Tally, float, Verdict]]) -> list[Advice]:
    """Further measurements, best first."""
    return []
