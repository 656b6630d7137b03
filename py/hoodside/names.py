"""Structures by common name: solvents, reagents, building blocks, natural products."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.ring_names import RULES, ring_name

_IGNORED = re.compile(r"[\s\-‐–,.'’′()\[\]]+")
_WORD = re.compile(r"[^\s\-,.'’()\[\]]+")
_GREEK = {"α": "alpha", "β": "beta", "γ": "gamma", "δ": "delta", "ε": "epsilon", "ü": "u"}
# How well a name answers a query; lower is better.
_EXACT, _START, _WORD_START, _WITHIN, _NOT = 0, 1, 2, 3, 4
_FIND_WITHIN = 3  # letters from which a query may stand anywhere in a name


@dataclass(frozen=True, slots=True)
class NamedStructure:
    """One row of facts/common_names.csv; ``name`` shows the short form that was asked for, if any."""

    name: str
    smiles: str
    formula: str
    kind: str
    source: str


@dataclass(frozen=True, slots=True)
class _Entry:
    named: NamedStructure
    names: tuple[str, ...]
    keys: tuple[str, ...]
    words: tuple[tuple[str, ...], ...]


def find_names(query: str, limit: int = 20) -> list[NamedStructure]:
    """Structures whose name, short form or formula answers a query, best first.

    Capitals, hyphens, commas and spaces do not matter. A query matches whole names, their beginnings, the
    beginnings of their words, and, from three letters, any part of them.
    """
    wanted = _key(query)
    if not wanted:
        return []
    ranked = [(*_fit(entry, wanted), entry) for entry in _entries()]
    ranked = [found for found in ranked if found[0] < _NOT]
    ranked.sort(key=lambda found: (found[0], found[1] != 0, len(found[2].names[0]), found[2].names[0]))
    return [_shown(entry, at) for _, at, entry in ranked[:limit]]


def exact_name(text: str) -> NamedStructure | None:
    """The structure that bears exactly this name (capitals, hyphens and spaces aside), or None.

    Substituted benzenes are read by their locants where the table has no such name.
    """
    listed = _by_key().get(_key(text))
    smiles = None if listed else ring_name(text)
    return NamedStructure(text.strip(), smiles, "", "systematic name", RULES) if smiles else listed


@cache
def _by_key() -> dict[str, NamedStructure]:
    found: dict[str, NamedStructure] = {}
    for entry in _entries():
        for at, key in enumerate(entry.keys):
            found.setdefault(key, _shown(entry, at))
    return found


def _fit(entry: _Entry, wanted: str) -> tuple[int, int]:
    """How well the best of the names fits, and which one it is."""
    if _key(entry.named.formula) == wanted:
        return _EXACT, 0
    grades = [(_grade(k, w, wanted), i) for i, (k, w) in enumerate(zip(entry.keys, entry.words, strict=True))]
    return min(grades)


def _grade(key: str, words: tuple[str, ...], wanted: str) -> int:
    if key == wanted:
        return _EXACT
    if key.startswith(wanted):
        return _START
    if any(word.startswith(wanted) for word in words):
        return _WORD_START
    return _WITHIN if len(wanted) >= _FIND_WITHIN and wanted in key else _NOT


def _shown(entry: _Entry, at: int) -> NamedStructure:
    if at == 0:
        return entry.named
    named = entry.named
    both = f"{named.name} ({entry.names[at]})"
    return NamedStructure(both, named.smiles, named.formula, named.kind, named.source)


def _key(text: str) -> str:
    plain = text.lower()
    for letter, spelled in _GREEK.items():
        plain = plain.replace(letter, spelled)
    return _IGNORED.sub("", plain)


@cache
def _entries() -> tuple[_Entry, ...]:
    entries = []
    for row in load_table("common_names"):
        names = (row["name"], *(alias for alias in row["aliases"].split("; ") if alias))
        named = NamedStructure(row["name"], row["smiles"], row["formula"], row["kind"], row["source"])
        words = tuple(tuple(_key(word) for word in _WORD.findall(name)) for name in names)
        entries.append(_Entry(named, names, tuple(map(_key, names)), words))
    return tuple(entries)
