"""Building units of enumerated isomers: usual atoms, and groups that valence alone cannot write."""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.rivals.graph import Graph

_PART = re.compile(r"([A-Z][a-z]?)(\d*)")
_BOND = re.compile(r"(\d)([-=#])(\d)")
_ORDERS = {"-": 1, "=": 2, "#": 3}


@dataclass(frozen=True, slots=True)
class Unit:
    """A vertex of the multigraph. ``atoms``: (symbol, charge), the first one bearing the free valences."""

    name: str
    valence: int
    composition: dict[str, int]
    atoms: tuple[tuple[str, int], ...]
    bonds: tuple[tuple[int, int, int], ...]

    def build(self, graph: Graph, free: int) -> int:
        """Put the unit into a graph with ``free`` hydrogens on its first atom; the number of that atom."""
        numbers = [graph.add_atom(symbol, 0) for symbol, _ in self.atoms]
        for number, (_, charge) in zip(numbers, self.atoms, strict=True):
            graph.charges[number] = charge
        for a, b, order in self.bonds:
            graph.bonds[numbers[a]][numbers[b]] = graph.bonds[numbers[b]][numbers[a]] = order
        graph.hydrogens[numbers[0]] = free
        return numbers[0]


@cache
def units() -> tuple[Unit, ...]:
    """All building units (facts table isomer_units)."""
    return tuple(
        Unit(
            name=row["unit"],
            valence=int(row["valence"]),
            composition={s: int(n or 1) for s, n in _PART.findall(row["composition"])},
            atoms=tuple(_atom(text) for text in row["atoms"].split()),
            bonds=tuple((int(a), int(b), _ORDERS[o]) for a, o, b in _BOND.findall(row["bonds"])),
        )
        for row in load_table("isomer_units")
    )


def _atom(text: str) -> tuple[str, int]:
    charge = {"+": 1, "-": -1}.get(text[-1], 0)
    return text.rstrip("+-"), charge


def divisions(heavy: dict[str, int]) -> Iterator[tuple[tuple[Unit, int], ...]]:
    """Every way to make up the heavy atoms of a formula from units, as (unit, how many)."""
    yield from _divide(heavy, units())


def _divide(left: dict[str, int], choice: tuple[Unit, ...]) -> Iterator[tuple[tuple[Unit, int], ...]]:
    if not any(left.values()):
        yield ()
        return
    for place, unit in enumerate(choice):
        most = min(left.get(s, 0) // n for s, n in unit.composition.items())
        for count in range(1, most + 1):
            rest = {s: n - count * unit.composition.get(s, 0) for s, n in left.items()}
            for tail in _divide(rest, choice[place + 1 :]):
                yield ((unit, count), *tail)
