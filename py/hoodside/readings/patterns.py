"""Names of 1H patterns: from what chemists write to one canonical form.

A canonical name is an optional "br " (broad), an optional "app " (apparent), then "m", "ABq" or one letter
group per coupling, largest J first ("dd", "dquint"). Letter groups are those of facts/multiplets.csv, after
the ACS and IUPAC reporting style; everything else in ``_ALIASES`` is common practice.
"""

from __future__ import annotations

import re
from functools import cache

from hoodside.errors import InvalidInputError
from hoodside.facts import load_table

#: Canonical letter group -> number of equivalent spin-1/2 partners.
_SIMPLE = ("s", "d", "t", "q", "quint", "sext", "sept", "oct", "non", "dec")

#: What chemists write for one letter group.
_ALIASES = {
    "singlet": "s",
    "sing": "s",
    "doublet": "d",
    "doublets": "d",
    "doub": "d",
    "triplet": "t",
    "triplets": "t",
    "trip": "t",
    "quartet": "q",
    "quartets": "q",
    "quadruplet": "q",
    "quart": "q",
    "quadr": "q",
    "quintet": "quint",
    "quintets": "quint",
    "quintuplet": "quint",
    "quin": "quint",
    "qui": "quint",
    "qnt": "quint",
    "qn": "quint",
    "pentet": "quint",
    "pent": "quint",
    "p": "quint",
    "sextet": "sext",
    "sextets": "sext",
    "sextuplet": "sext",
    "hextet": "sext",
    "sxt": "sext",
    "hex": "sext",
    "septet": "sept",
    "septets": "sept",
    "septuplet": "sept",
    "heptet": "sept",
    "heptets": "sept",
    "heptuplet": "sept",
    "hept": "sept",
    "spt": "sept",
    "sep": "sept",
    "h": "sept",
    "octet": "oct",
    "octuplet": "oct",
    "nonet": "non",
    "nonuplet": "non",
    "decet": "dec",
}
_MULTIPLET = frozenset({"m", "mult", "multiplet", "multiplets", "mc", "complex", "comp", "c", "mm", "ms"})
_AB_QUARTET = frozenset({"abq", "abquartet", "qab", "qoftheabtype", "abtypeq", "absystem"})
_BROAD = re.compile(r"\b(?:broadened|broad|brd(?=\s)|br|b)\b\.?")
_APPARENT = re.compile(r"\b(?:apparent|appt|appar|app|ap|pseudo|pseud|ps|virtual|virt|v)\b\.?")
_GLUED = re.compile(r"^(broad|br|b|app|ps|pseudo|v)(?=[sdtqm])(?!road)")
_GLUED_END = re.compile(r"^((?:[sdtqm]|quint|sext|sept)+)(br|broad)$")
_COUNT = re.compile(r"^\d\s*[x×*]?\s*(?=[sdtqm])")


def normalise_pattern(text: str) -> str:
    """The canonical name of a pattern ("bs" -> "br s", "pentet" -> "quint", "d of d" -> "dd").

    Raises: InvalidInputError when the text names no pattern.
    Source: ACS and IUPAC reporting style (facts/multiplets.csv); aliases are common practice.
    """
    found = _canonical(text)
    if found is None:
        raise InvalidInputError(
            f"{text!r} is no pattern of lines.",
            hint="Write s, d, t, q, quint, sext, sept, m, or a combination such as dd, dt, br s, app t.",
            field="mult",
            value=text,
        )
    return found


def is_pattern(text: str) -> bool:
    """Whether ``normalise_pattern`` can read a text."""
    return _canonical(text) is not None


def couplings_named(pattern: str) -> tuple[int, ...]:
    """Numbers of equivalent partners per letter group of a canonical name ("dt" -> (1, 2)).

    "s" gives (), "m" gives (), "ABq" gives (1,).
    """
    core = bare(pattern)
    if core == "ABq":
        return (1,)
    groups = _letter_groups(core) if core != "m" else []
    sizes = partner_counts()
    return tuple(sizes[group] for group in groups or () if sizes[group])


def bare(pattern: str) -> str:
    """A canonical name without "br" and "app"."""
    return pattern.removeprefix("br ").removeprefix("app ")


@cache
def partner_counts() -> dict[str, int]:
    """Letter group -> number of equivalent spin-1/2 partners (n + 1 lines, facts/multiplets.csv)."""
    lines = {row["name"]: row["lines"] for row in load_table("multiplets")}
    return {name: int(lines[name]) - 1 for name in _SIMPLE}


@cache
def _canonical(text: str) -> str | None:
    words = _tidy(text)
    words, broad = _taken_out(_BROAD, words)
    words, apparent = _taken_out(_APPARENT, words)
    core = _core(words) or ("s" if broad and not words.strip() else None)
    if core is None:
        return None
    return ("br " if broad else "") + ("app " if apparent else "") + core


def _tidy(text: str) -> str:
    words = re.sub(r"[().\[\],;:_\-–]", " ", text.lower())
    words = _COUNT.sub("", " ".join(words.split()))
    words = _GLUED.sub(r"\1 ", words)
    return _GLUED_END.sub(r"\1 br", words)


def _taken_out(mark: re.Pattern[str], words: str) -> tuple[str, bool]:
    rest = mark.sub(" ", words)
    return " ".join(rest.split()), rest != words


def _core(words: str) -> str | None:
    plain = re.sub(r"\b(?:of|the|signal|peak)\b", " ", words).replace(" ", "")
    if plain in _MULTIPLET:
        return "m"
    if plain in _AB_QUARTET:
        return "ABq"
    groups = _letter_groups(plain)
    if not groups or ("s" in groups and len(groups) > 1):
        return None
    return "".join(groups)


@cache
def _letter_groups(core: str) -> list[str] | None:
    """Split "dquint" into ["d", "quint"]; None when some letters belong to no group."""
    if not core:
        return []
    for length in range(min(len(core), 10), 0, -1):
        head = core[:length]
        group = head if head in _SIMPLE else _ALIASES.get(head)
        rest = _letter_groups(core[length:]) if group else None
        if group and rest is not None:
            return [group, *rest]
    return None
