"""Names of substituted benzenes by their locants, such as 3,5-bis(trifluoromethyl)aniline."""

from __future__ import annotations

import re
from functools import cache

from hoodside.facts import load_table

#: Where the rules are written down.
RULES = "IUPAC, Nomenclature of Organic Chemistry, Recommendations 2013"
_LOCANTS = {"o": "2", "m": "3", "p": "4", "ortho": "2", "meta": "3", "para": "4"}
_TIMES = {"": 1, "di": 2, "bis": 2, "tri": 3, "tris": 3, "tetra": 4, "penta": 5}
_POSITIONS = range(2, 7)
#: Endings of group names -> what stands between the ring and the atom they are attached to.
_GROUPS = {"phenyl": "", "benzyl": "C"}
_FULL = ",".join(map(str, _POSITIONS))


def ring_name(text: str) -> str | None:
    """SMILES of the benzene that a name of substituents and parent tells, None where it tells none.

    Source of the rules: ``RULES``.
    """
    plain = " ".join(text.lower().split())
    for before, after, group in _parents():
        inner = plain.removeprefix(before).removesuffix(after).rstrip("- ")
        if plain.startswith(before) and plain.endswith(after) and len(before) + len(after) < len(plain):
            placed = _placed(inner)
            if placed:
                return _ring(group, placed)
    return None


def ring_group(name: str) -> str | None:
    """SMILES of a substituted phenyl or benzyl group, its atom of attachment first, None for another name."""
    for ending, before in _GROUPS.items():
        inner = name.removesuffix(ending)
        if inner != name and (placed := _placed(inner.rstrip("-"))):
            return before + _ring("", placed)
    return None


def _placed(text: str) -> dict[int, str] | None:
    """Position -> SMILES of its substituent, from the part of a name before its parent."""
    found: dict[int, str] = {}
    for part in _parts().split(text):
        told = _parts_of(part)
        if told is None or found.keys() & told.keys():
            return None
        found |= told
    return found


def _parts_of(part: str) -> dict[int, str] | None:
    """ "3,5-bis(trifluoromethyl)" -> both positions."""
    match = _one().fullmatch(part)
    if match is None:
        return None
    times = _TIMES[match["times"] or ""]
    given = match["locants"] or (_FULL if times == len(_POSITIONS) else "")
    locants = [int(_LOCANTS.get(one, one)) for one in given.split(",") if one]
    smiles = _substituents()[match["name"]]
    return dict.fromkeys(locants, smiles) if len(set(locants)) == times else None


def _ring(group: str, placed: dict[int, str]) -> str:
    rest = "".join(f"c({placed[at]})" if at in placed else "c" for at in _POSITIONS[:-1])
    last = f"c9({placed[6]})" if 6 in placed else "c9"
    return f"c9({group}){rest}{last}" if group else f"c9{rest}{last}"


@cache
def _parts() -> re.Pattern[str]:
    """Between two substituents: a hyphen with a locant behind it and a substituent's name before it."""
    return re.compile(r"(?<=[a-z)])-(?=\d)")


@cache
def _one() -> re.Pattern[str]:
    names = "|".join(sorted(_substituents(), key=len, reverse=True))
    return re.compile(
        rf"(?:(?P<locants>[2-6](?:,[2-6])*|ortho|meta|para|o|m|p)-)?"
        rf"(?P<times>{'|'.join(t for t in _TIMES if t)})??\(?(?P<name>{names})\)?"
    )


@cache
def _substituents() -> dict[str, str]:
    return {row["name"]: row["smiles"] for row in load_table("ring_substituents")}


@cache
def _parents() -> tuple[tuple[str, str, str], ...]:
    """(what stands before the substituents, after them, SMILES of the group), longest first."""
    rows = sorted(load_table("ring_parents"), key=lambda row: -len(row["name"]))
    halves = [(row["name"].partition("*"), row["group"]) for row in rows]
    return tuple((before, after, group) for (before, _, after), group in halves)
