"""Reads what was added: reagent names and abbreviations in any order and spelling."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table

_STAGE = re.compile(r"(?:^|[;,]?\s)\d\)\s*")


@dataclass(frozen=True, slots=True)
class Reagents:
    """What a text of reagents means: roles, the names found, their cautions, pieces not known."""

    roles: frozenset[str]
    names: tuple[str, ...]
    cautions: tuple[str, ...]
    unknown: tuple[str, ...]


def stages(text: str) -> list[str]:
    """Split "1) TsCl, pyridine; 2) NaN3, DMF" into its steps."""
    parts = [part.strip(" ;,.") for part in _STAGE.split(text)]
    return [part for part in parts if part]


def read_reagents(text: str) -> Reagents:
    """Find every known reagent name in a text, longest names first."""
    plain = _plain(text)
    roles: set[str] = set()
    names: list[str] = []
    cautions: list[str] = []
    for name, pattern, row_roles, caution in _names():
        if pattern.search(plain):
            plain = pattern.sub(" \0 ", plain)
            names.append(name)
            roles.update(row_roles)
            cautions += [caution] if caution else []
    unknown = [piece.strip() for piece in re.split(r"[,;/\0]", plain)]
    return Reagents(
        frozenset(roles),
        tuple(names),
        tuple(dict.fromkeys(cautions)),
        tuple(piece for piece in unknown if re.search(r"[a-z]{2}", piece)),
    )


def _plain(text: str) -> str:
    """Lower case, one kind of hyphen, subscripts as digits, spaces folded."""
    folded = text.translate(str.maketrans("₀₁₂₃₄₅₆₇₈₉‐‑–−·•", "0123456789----.."))
    return " ".join(folded.lower().split())


@cache
def _names() -> tuple[tuple[str, re.Pattern[str], frozenset[str], str], ...]:
    found = []
    for row in load_table("reagents"):
        for name in row["names"].split("; "):
            pattern = re.compile(rf"(?<![a-z0-9]){re.escape(_plain(name))}(?![a-z0-9])")
            found.append((name, pattern, frozenset(row["roles"].split()), row["caution"]))
    return tuple(sorted(found, key=lambda entry: -len(entry[0])))
