"""Symbols of elements and nuclides: which are known, how they are keyed and shown."""

from __future__ import annotations

from functools import cache

from hoodside.facts.table import load_table

#: Hydrogen isotopes have symbols of their own (IUPAC Red Book 2005, IR-3.3.2).
NAMED_NUCLIDES = {"D": "2H", "T": "3H"}
_NAMES = {key: name for name, key in NAMED_NUCLIDES.items()}

#: What organic formulas are mostly made of; preferred when a mistyped formula is mended.
COMMON = frozenset(["C", "H", "N", "O", "S", "P", "F", "Cl", "Br", "I", "Si", "B", "Na", "K", "Li", "D"])


@cache
def known_elements() -> frozenset[str]:
    """Elements with an isotope table."""
    return frozenset(row["element"] for row in load_table("isotopes"))


@cache
def known_nuclides() -> frozenset[str]:
    """Keys of single nuclides, such as "13C" and "2H"."""
    return frozenset(row["A"] + row["element"] for row in load_table("isotopes"))


def element_of(symbol: str) -> str:
    """The element of a symbol: "13C" -> "C"."""
    return symbol.lstrip("0123456789")


def shown(symbol: str) -> str:
    """A symbol as written in a formula: "13C" -> "[13C]", "2H" -> "D"."""
    if symbol in _NAMES:
        return _NAMES[symbol]
    return f"[{symbol}]" if symbol[0].isdigit() else symbol
