"""Reads what was added: reagent names and abbreviations in any order and spelling."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import lru_cache

from hoodside.reagent_names import ReagentName, read_names

_STAGE = re.compile(r"(?:^|[;,]?\s)\d\)\s*|[;,]?\s+then\s+")
_PARTNER, _WEAK = "partner", "weak"


@dataclass(frozen=True, slots=True)
class Reagents:
    """What a text of reagents means.

    Attributes:
        roles: what the reagents can act as.
        names: the names found.
        cautions: rows of facts/reagent_cautions.csv they call for.
        unknown: pieces of the text that name nothing known.
        found: every name with what it means.
    """

    roles: frozenset[str]
    names: tuple[str, ...]
    cautions: tuple[str, ...]
    unknown: tuple[str, ...]
    found: tuple[ReagentName, ...]

    def partners(self) -> tuple[ReagentName, ...]:
        """Reagents that carry an organic partner, those that may be there as base or solvent last."""
        carried = [f for f in self.found if _PARTNER in f.roles and f.brings]
        return tuple(sorted(carried, key=is_weak))

    def brought_as(self, role: str) -> str:
        """SMILES of what the first reagent with that role carries, "" where none does."""
        return next((f.brings for f in self.found if role in f.roles and f.brings), "")


def is_weak(found: ReagentName) -> bool:
    """Whether a reagent that carries a partner is rather there as base or solvent."""
    return _WEAK in found.roles


def stages(text: str) -> list[str]:
    """Split "1) TsCl, pyridine; 2) NaN3, DMF" or "O3, then Me2S" into its steps."""
    parts = [part.strip(" ;,.") for part in _STAGE.split(text)]
    return [part for part in parts if part]


@lru_cache(maxsize=64)
def read_reagents(text: str) -> Reagents:
    """Find every known reagent name in a text, longest names first."""
    found, unknown = read_names(text)
    return Reagents(
        frozenset(role for one in found for role in one.roles),
        tuple(dict.fromkeys(one.name for one in found)),
        tuple(dict.fromkeys(one.caution for one in found if one.caution)),
        tuple(unknown),
        tuple(found),
    )
