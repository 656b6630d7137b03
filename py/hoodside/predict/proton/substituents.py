"""Which substituent stands at an atom, seen from the atom that carries it (facts/proton_substituents.csv)."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.proton.patterns import match_patterns

#: The plainest substituent by element, for what no pattern covers.
_PLAIN = {"C": "CH2R", "N": "other N", "O": "oxonium or other O", "S": "other S"}


@dataclass(frozen=True, slots=True)
class Substituent:
    """A row of the table of substituents."""

    key: str
    kind: str  # "alkyl", "aryl", "pi", "acceptor", "oxygen", "nitrogen", "sulfur", "halogen", ...
    smarts: str
    row: Row  # names of the substituent in the tables of each scheme

    @property
    def gamma(self) -> float:
        """Effect across three bonds in ppm."""
        return float(self.row["gamma_ppm"] or 0)


class SubstituentFinder:
    """All substituents of one structure; the first row of the table that fits counts."""

    def __init__(self, structure: Structure) -> None:
        self._structure = structure
        self._at: dict[int, list[tuple[Substituent, tuple[int, ...]]]] = {}
        self._known: dict[tuple[int, int], Substituent] = {}
        rows = substituents()
        for row, places in zip(rows, match_patterns(structure, [r.smarts for r in rows]), strict=True):
            for place in places:
                self._at.setdefault(place[0], []).append((row, place))

    def at(self, carrier: int, anchor: int) -> Substituent:
        """The substituent that begins at ``anchor`` and is carried by ``carrier``."""
        if (carrier, anchor) not in self._known:
            fits = (row for row, place in self._at.get(anchor, ()) if carrier not in place)
            self._known[carrier, anchor] = next(fits, None) or self._plain(anchor)
        return self._known[carrier, anchor]

    def _plain(self, anchor: int) -> Substituent:
        symbol = self._structure.atoms[anchor].symbol
        return _by_key()[_PLAIN.get(symbol, "silyl")]


@cache
def substituents() -> tuple[Substituent, ...]:
    """The table, most specific first."""
    return tuple(
        Substituent(row["key"], row["kind"], row["smarts"], row) for row in load_table("proton_substituents")
    )


@cache
def _by_key() -> dict[str, Substituent]:
    return {row.key: row for row in substituents()}
