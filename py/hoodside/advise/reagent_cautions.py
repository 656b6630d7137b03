"""What to mind with the reagents of a step: hazards in words, what they must not meet, their quench."""

from __future__ import annotations

import re
from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.reagent_names import caution_of

_CODES = r"(?:EUH|H)\d{3}[A-Za-z]*"
_CODE = re.compile(rf"\b{_CODES}\b")
#: Codes with words in brackets behind them: "H300 H310 H330 (fatal swallowed, on skin, inhaled)".
_EXPLAINED = re.compile(rf"(?P<codes>\b{_CODES}\b(?:[\s+/]+{_CODES}\b)*)\s*\((?P<words>[^()]*)\)")
#: Ways into the body, by the statements that speak of them.
_ROUTES = {
    "fatal": {"H300": "swallowed", "H310": "on skin", "H330": "inhaled"},
    "toxic": {"H301": "swallowed", "H311": "on skin", "H331": "inhaled"},
    "harmful": {"H302": "swallowed", "H312": "on skin", "H332": "inhaled"},
}
#: Notes of where a code was read, of no use at the hood.
_PROVENANCE = re.compile(
    r"\s*(?:\((?:recalled|[^()]*\brecalled|corrosive to skin, read in dossier)\)"
    r"|- read as older phrases [^;]*)"
)
_RECALLED = re.compile(r"\b(?:others )?recalled\s+|,? recalled\b")
#: Words that go on after the words of a code without a comma.
_GOES_ON = r"(?:for|or|and|to|by|with|plus|in|as|when|some|reported)\b"
#: Dangers that no hazard statement speaks of.
_UNCODED = re.compile(r"explo|deflagrat|ignit|runs? away|run away|\bHCN\b|may kill|detonat", re.IGNORECASE)
_UNCLASSIFIED = re.compile(r"no main H-code|not classified")
_GRAVEST_SHOWN = 3
#: Statements up to this gravity (facts/hazard_statements.csv) are shown without asking.
_GRAVE = 3


@dataclass(frozen=True, slots=True)
class ReagentCaution:
    """One row of facts/reagent_cautions.csv.

    ``gravest``: its worst dangers in a line; ``grave``: whether one of them can maim, kill or burn the place
    down; ``words``: all of them, every code said in words.
    """

    reagent: str
    grave: bool
    gravest: str
    words: str
    hazards: str
    incompatibilities: str
    quench: str
    source: str


def cautions_for(understood: Iterable[str], of_step: Iterable[str] = ()) -> tuple[ReagentCaution, ...]:
    """Cautions for reagents by the names they were understood by, then those of the step itself.

    Args:
        understood: names as ``reagent_names`` tells them, in the order they are to be shown.
        of_step: names from facts/reagent_cautions.csv that the reactions carried out call for (ozonides,
            organic azides ...). One that belongs to a reagent not among ``understood`` is left out.
    """
    own = [caution for name in understood if (caution := caution_of(name))]
    extra = [name for name in of_step if name not in _of_some_reagent()]
    table = _cautions()
    return tuple(table[name] for name in dict.fromkeys((*own, *extra)) if name in table)


def without_caution(understood: Iterable[str]) -> tuple[str, ...]:
    """Reagents for which the table holds none: silence is not safety."""
    return tuple(name for name in dict.fromkeys(understood) if not caution_of(name))


def in_words(hazards: str) -> str:
    """Hazard text with its statement codes said in words; nothing that was coded is left out.

    Source: Regulation (EC) No 1272/2008 (CLP), Annex III, wording shortened.
    """
    return "; ".join(dict.fromkeys(_clauses(hazards)))


def gravest(hazards: str) -> str:
    """The worst dangers of a hazard text in a line: what kills or explodes before what burns or harms."""
    ranked = sorted(_statements_of(hazards), key=lambda entry: entry[0])
    said = [words for _, words in ranked[:_GRAVEST_SHOWN]]
    uncoded = [c for c in _clauses(_CODE.sub("", _EXPLAINED.sub("", hazards))) if _UNCODED.search(c)]
    return "; ".join(dict.fromkeys((*said, *uncoded[:1]))) or in_words(hazards)


def _statements_of(hazards: str) -> list[tuple[int, str]]:
    """Gravity and words of every statement coded; the ways into the body of one gravity taken together."""
    codes = dict.fromkeys(_CODE.findall(hazards))
    found = [(_gravity(code), _statement(code)) for code in codes if not _is_route(code)]
    for degree, routes in _ROUTES.items():
        if met := [code for code in routes if code in codes]:
            found.append((_gravity(met[0]), f"{degree} {_listed([routes[code] for code in met])}"))
    return found


def _listed(routes: list[str]) -> str:
    said = " or ".join(filter(None, (", ".join(routes[:-1]), routes[-1])))
    return said if said.startswith("on ") else f"if {said}"


def _is_route(code: str) -> bool:
    return any(code in routes for routes in _ROUTES.values())


def _clauses(hazards: str) -> Iterator[str]:
    plain = _RECALLED.sub("", _PROVENANCE.sub("", hazards))
    for clause in _EXPLAINED.sub(_explained, plain).split(";"):
        said = " ".join(_CODE.sub(lambda code: f"{_statement(code[0])}, ", clause).split())
        said = re.sub(r"\s*,(?:\s*,)+", ",", said).replace(", )", ")").replace(" ()", "")
        said = re.sub(rf",\s*(?={_GOES_ON})", " ", said).strip(" ,+")
        if said:
            yield said


def _explained(found: re.Match[str]) -> str:
    """The words in brackets for the codes they speak of: all routes, as many as listed, or the last."""
    codes, words = _CODE.findall(found["codes"]), found["words"]
    if _CODE.search(words):
        return found[0]
    listed = len(re.split(r",| or | and ", words))
    if re.search(r"\ball\b", words):
        listed = sum(_is_route(code) for code in codes)
    kept = codes[: -min(listed, len(codes))] if listed < len(codes) else []
    return f"{' '.join(kept)} {words}, " if kept else words


def _statement(code: str) -> str:
    known = _statements()
    return known[_family(code)][0] if _family(code) in known else code


def _gravity(code: str) -> int:
    known = _statements()
    return known[_family(code)][1] if _family(code) in known else 0


def _family(code: str) -> str:
    """The code without the letters that narrow it: H360FD is of H360."""
    return code.rstrip("DFdf")


@cache
def _statements() -> dict[str, tuple[str, int]]:
    return {row["code"]: (row["words"], int(row["gravity"])) for row in load_table("hazard_statements")}


@cache
def _of_some_reagent() -> frozenset[str]:
    rows = (*load_table("reagents"), *load_table("reagent_heads"))
    return frozenset(row["caution"] for row in rows if row["caution"])


@cache
def _cautions() -> dict[str, ReagentCaution]:
    return {row["reagent"]: _read(row) for row in load_table("reagent_cautions")}


def _read(row: dict[str, str]) -> ReagentCaution:
    hazards = row["hazards"]
    kept = (row["incompatibilities"], row["quench"], row["source"])
    return ReagentCaution(
        row["reagent"], _is_grave(hazards), gravest(hazards), in_words(hazards), hazards, *kept
    )


def _is_grave(hazards: str) -> bool:
    """By the gravest statement coded, or a danger no code speaks of; words without a code count as grave."""
    if _UNCLASSIFIED.match(hazards):
        return False
    codes = _CODE.findall(hazards)
    return not codes or min(map(_gravity, codes)) <= _GRAVE or bool(_UNCODED.search(hazards))
