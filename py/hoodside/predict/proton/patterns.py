"""Substructure patterns of the proton tables, matched in one batch and only where they can occur."""

from __future__ import annotations

import re
from collections.abc import Sequence
from functools import cache

from hoodside.molecule import Structure
from hoodside.molecule.elements import SYMBOLS
from hoodside.molecule.kernel import Matches

_NESTED = re.compile(r"\$\([^()]*(?:\([^()]*(?:\([^()]*\)[^()]*)*\)[^()]*)*\)")
_ATOM = re.compile(r"\[([^\]]*)\]|(Br|Cl|[BCNOPSFI])|([bcnops])")
_FIRST = re.compile(r"#(\d+)|([A-Z][a-z]?)|(se|[bcnops])(?![a-z])")
_WITH_H = re.compile(r"^[^!]*H[1-4]")
_MOBILE = frozenset({"N", "O", "S"})
_BRACKET = re.compile(r"\[[^\]]*\]")
#: Marks beside element symbols in what a pattern asks for.
_AROMATIC, _TRIPLE = "aromatic", "triple"


def match_patterns(structure: Structure, smarts: Sequence[str]) -> list[Matches]:
    """All matches (every order of atoms) of each pattern; what cannot match is not asked for."""
    there = _contents(structure)
    asked = [s for s in smarts if asks_for(s) <= there]
    found = dict(zip(asked, structure.match_all(asked, unique=False), strict=True))
    return [found.get(s, ()) for s in smarts]


@cache
def asks_for(smarts: str) -> frozenset[str]:
    """Elements (and aromatic atoms, triple bonds) without which a pattern cannot match."""
    plain = smarts
    while (shorter := _NESTED.sub("*", plain)) != plain:
        plain = shorter
    needs = {_TRIPLE} if "#" in _BRACKET.sub("", plain) else set()
    for bracket, symbol, aromatic in _ATOM.findall(plain):
        needs |= _needs_of(bracket) if bracket else {symbol} if symbol else {aromatic.upper(), _AROMATIC}
    return frozenset(needs)


def _needs_of(bracket: str) -> set[str]:
    first = re.split("[;&]", bracket)[0]
    found = _FIRST.match(first)
    if found is None or "," in first or first.startswith("!"):
        return set()
    number, symbol, aromatic = found.groups()
    if number:
        return {SYMBOLS[int(number)]} - {"H"}
    needs = {symbol} - {"H", "X", "R"} if symbol else {aromatic.capitalize(), _AROMATIC}
    if (symbol or aromatic.upper()) in _MOBILE and _WITH_H.search(bracket):
        needs.add(f"{symbol or aromatic.upper()}H")
    return needs


def _contents(structure: Structure) -> set[str]:
    there = set(structure.element_counts)
    there |= {f"{a.symbol}H" for a in structure.atoms if a.hydrogens and a.symbol in _MOBILE}
    if any(atom.aromatic for atom in structure.atoms):
        there.add(_AROMATIC)
    if any(bond.order == 3 for bond in structure.bonds):
        there.add(_TRIPLE)
    return there
