"""What advice is made of."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace
from functools import cache

from hoodside.facts import load_table
from hoodside.readings import Readings
from hoodside.weigh.expectations import Expectations


@dataclass(frozen=True, slots=True)
class Effort:
    """What one kind of measurement costs (facts/measurements.csv)."""

    measure: str
    minutes: int
    needs: str
    cautions: tuple[str, ...]
    #: Share of the weight worked out from predictions that published spectra really gave, on average: reports
    #: print coarser patterns than predicted, and fewer bands (measured by ``bench advice``).
    realised: float


@dataclass(frozen=True, slots=True)
class Gain:
    """What a measurement would tell about two structures: weight in decibans, and in words."""

    expected_db: float  # mean over "the first is right" and "the second is right"
    why: str = ""
    if_then: tuple[str, ...] = ()


NOTHING = Gain(0.0)


@dataclass(frozen=True, slots=True)
class Pair:
    """Two standing structures with the names they go by."""

    first: Expectations
    second: Expectations
    names: tuple[str, str]


@dataclass(frozen=True, slots=True)
class Measurement:
    """One possible measurement: how it is called, and what it would tell about any two structures."""

    key: str  # row of facts/measurements.csv
    measure: str
    gain: Callable[[Pair], Gain]
    cautions: tuple[str, ...] = ()
    test: str = ""

    def between(self, pair: Pair) -> Gain:
        """What it would tell about two structures, as far as such measurements keep what they promise."""
        gain = self.gain(pair)
        return replace(gain, expected_db=gain.expected_db * efforts()[self.key].realised)


@dataclass(frozen=True, slots=True)
class Advice:
    """One further measurement, ready to show."""

    key: str
    measure: str
    why: str
    separates: tuple[tuple[int, int], ...]  # places in the ranking
    expected_db: float
    effort: Effort
    cautions: tuple[str, ...] = ()
    if_then: tuple[str, ...] = ()
    test: str = ""

    def to_dict(self) -> dict[str, object]:
        """JSON-ready form."""
        return {
            "measure": self.measure,
            "kind": self.key,
            "why": self.why,
            "separates": [list(pair) for pair in self.separates],
            "expected_db": round(self.expected_db, 1),
            "cautions": list(self.cautions),
            "effort": f"{duration(self.effort.minutes)}; {self.effort.needs}",
            "minutes": self.effort.minutes,
            "if_then": list(self.if_then),
            **({"test": self.test} if self.test else {}),
        }


def duration(minutes: int) -> str:
    """ "20 min", "1 h", "1 day"."""
    if minutes >= 24 * 60:
        return f"{minutes // (24 * 60)} day"
    return f"{minutes} min" if minutes < 60 or minutes % 60 else f"{minutes // 60} h"


@cache
def efforts() -> dict[str, Effort]:
    """All kinds of measurement by key."""
    return {
        row["key"]: Effort(
            row["measure"],
            int(row["minutes"]),
            row["needs"],
            (row["cautions"],) if row["cautions"] else (),
            float(row["realised"]),
        )
        for row in load_table("measurements")
    }


Offer = Callable[[Readings], list[Measurement]]
