"""Aromatic rings that the number of hydrogens in their region allows (facts table ring_units)."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache
from itertools import combinations_with_replacement

from hoodside.advise.proposals.assembly import Part, elements_of
from hoodside.facts import load_table
from hoodside.molecule.structure import read_structure
from hoodside.readings.model import Readings
from hoodside.rivals.graph import graph_of

#: ppm: where hydrogens on aromatic rings lie (common practice).
_FROM, _TO = 6.2, 9.0
#: Part of the hydrogens there that the integral may be off.
_ROOM = 0.12
_MOST_RINGS = 2


@dataclass(frozen=True, slots=True)
class Ring:
    """An aromatic ring with its open ends; ``unsaturation`` it takes up."""

    words: str
    hydrogens: int
    unsaturation: int
    part: Part


@cache
def ring_units() -> tuple[Ring, ...]:
    """All rings of the table."""
    return tuple(
        Ring(
            row["words"],
            int(row["hydrogens"]),
            int(row["unsaturation"]),
            Part(graph_of(read_structure(row["unit"])), tuple(int(port) for port in row["ports"].split())),
        )
        for row in load_table("ring_units")
    )


def ring_choices(
    readings: Readings, taken: frozenset[str], room: dict[str, int], unsaturation: float
) -> Iterator[tuple[Ring, ...]]:
    """Sets of rings for the hydrogens that no fragment has taken.

    Args:
        taken: 1H readings that belong to fragments ("h1:3").
        room: element -> atoms that are left.
        unsaturation: what is left of it.
    """
    left = sum(
        signal.n or 0.0
        for i, signal in enumerate(readings.h1)
        if f"h1:{i}" not in taken and _FROM <= signal.ppm <= _TO
    )
    for count in range(1, _MOST_RINGS + 1):
        for rings in combinations_with_replacement(ring_units(), count):
            hydrogens = sum(ring.hydrogens for ring in rings)
            fits = abs(hydrogens - left) <= _ROOM * hydrogens
            if fits and sum(ring.unsaturation for ring in rings) <= unsaturation and _has_room(rings, room):
                yield rings


def _has_room(rings: tuple[Ring, ...], room: dict[str, int]) -> bool:
    needs: dict[str, int] = {}
    for ring in rings:
        for symbol, count in elements_of(ring.part).items():
            needs[symbol] = needs.get(symbol, 0) + count
    return all(room.get(symbol, 0) >= count for symbol, count in needs.items())
