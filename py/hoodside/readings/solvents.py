"""Names of NMR solvents: from what chemists write to the names of facts/residual_solvents.csv."""

from __future__ import annotations

import re
from functools import cache

from hoodside.facts import load_table
from hoodside.readings.fields import refusal, show, text

_SUBSCRIPTS = str.maketrans("₀₁₂₃₄₅₆₇₈₉⁰¹²³⁴⁵⁶⁷⁸⁹–‐‑−", "01234567890123456789----")
_JOINS = re.compile(r"[\s\-_\[\]{}]+")


def known_solvent(written: str) -> str:
    """The usual name of a solvent ("d6-dmso" -> "DMSO-d6"), or "" when it is not known.

    Of a mixture ("CDCl3/CD3OD 9:1", "CDCl3 + 1 % TFA") the first solvent named counts.
    Source: facts/solvent_names.csv (common practice).
    """
    names = _by_alias()
    for part in (written, *re.split(r"[/:+,;&]|\band\b|\bwith\b|\b\d+\s*%", written)):
        found = names.get(_plain(part))
        if found:
            return found
    return ""


def solvent_asked(value: object, field: str, usual: str) -> str:
    """The usual name of a solvent that must be known; ``usual`` when none is given.

    Raises: InvalidInputError.
    """
    name = text(value, field) or usual
    found = known_solvent(name)
    if not found:
        known = ", ".join(solvent_names())
        raise refusal(field, value, f"{show(name)} is no NMR solvent known here.", f"Use one of: {known}.")
    return found


def solvent_names() -> tuple[str, ...]:
    """Every solvent known, in the order of the table."""
    return tuple(row["solvent"] for row in load_table("solvent_names"))


@cache
def _by_alias() -> dict[str, str]:
    found: dict[str, str] = {}
    for row in load_table("solvent_names"):
        for alias in (row["solvent"], *row["aliases"].split(";")):
            found[_plain(alias)] = row["solvent"]
    return found


def _plain(name: str) -> str:
    return _JOINS.sub("", name.translate(_SUBSCRIPTS).lower())
