"""Spin systems and their lines as data."""

from __future__ import annotations

from array import array
from collections.abc import Iterator
from dataclasses import dataclass, field
from math import isfinite

from hoodside.errors import InvalidInputError
from hoodside.numerics import merge_lines

#: (group, group, J in Hz).
Pair = tuple[int, int, float]


@dataclass(frozen=True, slots=True)
class Nuclei:
    """Magnetically equivalent spin-1/2 nuclei."""

    hz: float  # resonance frequency from the reference, Hz (not used for heteronuclei)
    count: int = 1
    observed: bool = True  # False for 19F and 31P: they split the lines but give none
    label: str = ""

    def __post_init__(self) -> None:
        if not isfinite(self.hz):
            raise InvalidInputError(f"{self.hz!r} Hz is no frequency.", hint="Give a number.", field="hz")
        if self.count < 1:
            raise InvalidInputError(
                f"{self.count!r} nuclei are not possible.", hint="Give 1 or more.", field="count"
            )


@dataclass(frozen=True, slots=True)
class SpinSystem:
    """Groups of nuclei and the couplings between them, in the high-field limit.

    J within a group has no effect on the lines and is left out.
    """

    groups: tuple[Nuclei, ...]
    couplings: tuple[Pair, ...] = ()

    def matrix(self) -> list[list[float]]:
        """J in Hz between every two groups."""
        n = len(self.groups)
        j = [[0.0] * n for _ in range(n)]
        for a, b, hz in self.couplings:
            if a != b:
                j[a][b] = j[b][a] = hz
        return j


@dataclass(frozen=True, slots=True)
class Line:
    """One line. Intensities over a whole spectrum add up to the number of observed nuclei."""

    hz: float
    intensity: float


@dataclass(frozen=True, slots=True)
class LineList:
    """A simulated spectrum.

    Attributes:
        hz: frequencies in Hz, rising.
        intensity: one per line.
        method: "exact", or "clusters" where a system was too large.
        error_hz: how far a line may be off, estimated in Hz (0 for exact).
    """

    hz: array[float]
    intensity: array[float]
    method: str = "exact"
    error_hz: float = 0.0

    def __len__(self) -> int:
        return len(self.hz)

    def __iter__(self) -> Iterator[Line]:
        return map(Line, self.hz, self.intensity)

    def without_weak(self, share: float) -> LineList:
        """The lines stronger than a share of the strongest."""
        least = share * max((abs(i) for i in self.intensity), default=0.0)
        kept = [k for k, i in enumerate(self.intensity) if abs(i) > least]
        hz, intensity = (array("d", [a[k] for k in kept]) for a in (self.hz, self.intensity))
        return LineList(hz, intensity, self.method, self.error_hz)


@dataclass(slots=True)
class Heap:
    """Lines being gathered, in any order."""

    hz: array[float] = field(default_factory=lambda: array("d"))
    intensity: array[float] = field(default_factory=lambda: array("d"))

    def add(self, found: tuple[array[float], array[float]]) -> None:
        """Take over some lines."""
        self.hz += found[0]
        self.intensity += found[1]

    def sorted(self, within: float, least: float, method: str = "exact", error_hz: float = 0.0) -> LineList:
        """The lines by frequency, near ones joined, weak ones dropped (see ``numerics.merge_lines``)."""
        hz, intensity = merge_lines(self.hz, self.intensity, within, least)
        return LineList(hz, intensity, method, error_hz)
