"""A molecular formula as a value: whole-number counts by nuclide symbol, and a charge."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property

from hoodside.errors import FormulaError
from hoodside.predict.formula.symbols import element_of, shown


@dataclass(frozen=True)
class Formula:
    """A molecular formula.

    ``parts`` holds (symbol, count) in Hill order. A symbol is that of an element ("C": natural
    isotope mixture) or of one nuclide by mass number and element ("13C"; deuterium is "2H").
    ``charge`` is in units of e. Build it with ``Formula.of`` or ``parse_formula``.
    """

    parts: tuple[tuple[str, int], ...]
    charge: int = 0

    @classmethod
    def of(cls, counts: Mapping[str, int], charge: int = 0) -> Formula:
        """A formula from counts by symbol; zero counts are dropped. Raises: FormulaError when negative."""
        for symbol, count in counts.items():
            if count < 0:
                raise FormulaError(
                    f"The formula would have {count} of {shown(symbol)}.",
                    hint="Check what is taken away.",
                    value=count,
                )
        kept = {symbol: count for symbol, count in counts.items() if count}
        return cls(tuple((s, kept[s]) for s in _hill_order(kept)), charge)

    @cached_property
    def counts(self) -> dict[str, int]:
        """Nuclide symbol -> number of atoms."""
        return dict(self.parts)

    @cached_property
    def elements(self) -> dict[str, int]:
        """Element symbol -> number of atoms, labelled ones among them (deuterium counts as H)."""
        totals: dict[str, int] = {}
        for symbol, count in self.parts:
            element = element_of(symbol)
            totals[element] = totals.get(element, 0) + count
        return totals

    def count(self, element: str) -> int:
        """Number of atoms of one element, labelled ones among them."""
        return self.elements.get(element, 0)

    @property
    def text(self) -> str:
        """Hill order: C, H, then the others by the alphabet; labels in brackets, D for deuterium."""
        body = "".join(shown(s) + (str(n) if n != 1 else "") for s, n in self.parts)
        if not self.charge:
            return body
        size = abs(self.charge)
        return f"[{body}]{size if size > 1 else ''}{'+' if self.charge > 0 else '-'}"

    def __str__(self) -> str:
        return self.text

    def __add__(self, other: Formula) -> Formula:
        counts = dict(self.parts)
        for symbol, count in other.parts:
            counts[symbol] = counts.get(symbol, 0) + count
        return Formula.of(counts, self.charge + other.charge)

    def __sub__(self, other: Formula) -> Formula:
        """What is left. Raises: FormulaError when ``other`` has more of an element than this one."""
        counts = dict(self.parts)
        for symbol, count in other.parts:
            counts[symbol] = counts.get(symbol, 0) - count
        return Formula.of(counts, self.charge - other.charge)

    def __mul__(self, times: int) -> Formula:
        return Formula.of({s: n * times for s, n in self.parts}, self.charge * times)

    def contains(self, other: Formula) -> bool:
        """Whether every atom of ``other`` is present here."""
        return all(self.counts.get(s, 0) >= n for s, n in other.parts)


def _hill_order(counts: Mapping[str, int]) -> list[str]:
    """Hill, J. Am. Chem. Soc. 1900, 22, 478: with carbon, C then H then the alphabet; else the alphabet."""
    carbon = any(element_of(s) == "C" for s in counts)
    first = {"C": "0", "H": "1"} if carbon else {}
    return sorted(counts, key=lambda s: (first.get(element_of(s), element_of(s)), s[0].isdigit(), s))
