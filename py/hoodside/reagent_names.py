"""Reagents by the trade's names: listed ones, a group with a head (PhMgBr), structures by common name."""

from __future__ import annotations

import re
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.names import exact_name
from hoodside.ring_names import ring_group

#: Kinds of named compounds that stand by rather than react.
_NO_PARTNERS = ("solvent",)
_PIECES = re.compile(r"(?:[^,;/]|(?<=[\dn]),(?=[\dn]))+")  # no piece ends within 2,2- or N,N-
_BETWEEN = re.compile(r",(?!\d)|(?<!\d),|[;/+\0]|\band\b|\bin\b|\bwith\b|\bthen\b")
_LINKS = re.compile(r"\s(?:and|in|with|then)\s")
#: What may go before or behind a name in a piece: amounts, strengths, times.
_AMOUNT = re.compile(
    r"\(?\b(?:\d[\d.]*\s*(?:equivalents?|equiv|eq|mol\s?%|wt\s?%|%|m|n|ml|mmol|mg|g|h|min|atm|bar|psi|°c)"
    r"|cat|catalytic|rt|overnight|dry|anhyd|anhydrous|conc|concd|concentrated|dil|aq|solution|days?)(?![a-z])\.?\)?"
)
_LETTERS = re.compile(r"[a-z]{2}")
_RINGS = re.compile(r"phenyl|benzyl")
_LOCANT_STARTS = frozenset("23456omp")
_LONGEST_GROUP = 60
_GLUE = ("", " ", "-")


@dataclass(frozen=True, slots=True)
class ReagentName:
    """What a name in a text of reagents means.

    ``brings``: SMILES of the structure the reagent carries into a step ("" where it carries none);
    ``named``: whether it was found by its common name alone, as an organic partner.
    """

    name: str
    roles: frozenset[str]
    caution: str
    brings: str = ""
    named: bool = False


def read_names(text: str) -> tuple[list[ReagentName], list[str]]:
    """The reagents a text names, in its order, and the pieces that name none.

    Longer names win over shorter ones inside them ("phenylboronic acid" over "acid").
    """
    plain = in_plain(text)
    taken: list[tuple[int, int, ReagentName]] = []
    for start, end, found in sorted(_spans(plain), key=lambda span: span[0] - span[1]):
        if all(end <= s or start >= e for s, e, _ in taken):
            taken.append((start, end, found))
    taken.sort(key=lambda span: span[0])
    return [found for _, _, found in taken], _left_over(plain, taken)


def caution_of(name: str) -> str:
    """The row of facts/reagent_cautions.csv for one reagent, "" where there is none."""
    whole = in_plain(name)
    if listed := _listed().get(whole):
        return listed.caution
    headed = (found for _, end, found in _headed(whole, 0) if end == len(whole))
    return next((found.caution for found in headed), "")


def in_plain(text: str) -> str:
    """Lower case, one kind of hyphen, subscripts as digits, spaces folded."""
    folded = text.translate(str.maketrans("₀₁₂₃₄₅₆₇₈₉‐‑–−·•", "0123456789----.."))
    return " ".join(folded.lower().split())


def headed_names() -> Iterator[ReagentName]:
    """The reagents of a group and a head that a shelf shows, by the first name of either."""
    for head in load_table("reagent_heads"):
        for group in head["shown_for"].split("; "):
            if group:
                yield _made(head, head["names"].split("; ")[0], group)


def _spans(plain: str) -> Iterator[tuple[int, int, ReagentName]]:
    """Everything that could be a name, listed ones before others of the same length."""
    for name, found in _listed().items():
        if name in plain:
            yield from ((start, start + len(name), found) for start in _places(plain, name))
    for start in (m.start() for m in re.finditer(r"(?<![a-z0-9])[a-z0-9(*]", plain)):
        yield from _headed(plain, start)
    for start, end in _pieces(plain):
        named = exact_name(plain[start:end]) if plain[start:end] not in _listed() else None
        if named is not None and named.kind not in _NO_PARTNERS:
            partner = ReagentName(named.name, frozenset(("partner",)), "", named.smiles, named=True)
            yield start, end, partner


def _places(plain: str, name: str) -> Iterator[int]:
    """Where a name stands by itself, no letter or figure beside it."""
    start = plain.find(name)
    while start >= 0:
        before, after = plain[start - 1 : start], plain[start + len(name) : start + len(name) + 1]
        if not (_is_plain(before) or _is_plain(after)):
            yield start
        start = plain.find(name, start + 1)


def _is_plain(letter: str) -> bool:
    return letter.isascii() and letter.isalnum()


def _headed(plain: str, start: int) -> Iterator[tuple[int, int, ReagentName]]:
    """Names of a group with a head ("PhMgBr", "4-methoxyphenylboronic acid") that begin at a place."""
    for before, after, head, template in _templates():
        if not plain.startswith(before, start) or after not in plain:
            continue
        at = start + len(before)
        for group in _groups_at(plain, at):
            for glue in _GLUE:
                end = at + len(group) + len(glue) + len(after)
                if plain.startswith(glue + after, at + len(group)) and _ends(plain, end):
                    yield start, end, _made(head, template, group)


def _groups_at(plain: str, at: int) -> Iterator[str]:
    longest = max(map(len, _groups()))
    for length in range(min(longest, len(plain) - at), 0, -1):
        if plain[at : at + length] in _groups():
            yield plain[at : at + length]
    if at < len(plain) and plain[at] in _LOCANT_STARTS:  # 3,4-dimethoxyphenyl, p-chlorobenzyl
        for ring in _RINGS.finditer(plain, at, at + _LONGEST_GROUP):
            if ring_group(plain[at : ring.end()]):
                yield plain[at : ring.end()]


def _ends(plain: str, at: int) -> bool:
    return at == len(plain) or not re.match(r"[a-z0-9(\[=]", plain[at])


def _made(head: dict[str, str], template: str, group: str) -> ReagentName:
    shown, smiles = _groups().get(in_plain(group)) or (group, ring_group(group) or "")
    return ReagentName(
        template.replace("*", shown),
        frozenset(head["roles"].split()),
        head["caution"],
        head["smiles"].replace("*", smiles),
    )


def _pieces(plain: str) -> Iterator[tuple[int, int]]:
    """Pieces between commas and the like, without the amounts around their names."""
    for piece in _PIECES.finditer(plain):
        begin = piece.start()
        for part in _LINKS.split(piece.group()):
            begin = plain.index(part, begin)
            trimmed = _AMOUNT.sub("", part).strip(" .")
            if trimmed and trimmed in part:
                start = plain.index(trimmed, begin)
                yield start, start + len(trimmed)
            begin += len(part)


def _left_over(plain: str, taken: list[tuple[int, int, ReagentName]]) -> list[str]:
    rest = plain
    for start, end, _ in reversed(taken):
        rest = f"{rest[:start]}\0{rest[end:]}"
    pieces = [_AMOUNT.sub("", piece).strip(" .()-:") for piece in _BETWEEN.split(rest)]
    return [piece for piece in pieces if _LETTERS.search(piece)]


@cache
def _listed() -> dict[str, ReagentName]:
    """Names of facts/reagents.csv in plain spelling."""
    found: dict[str, ReagentName] = {}
    for row in load_table("reagents"):
        for name in row["names"].split("; "):
            read = ReagentName(name, frozenset(row["roles"].split()), row["caution"], row["brings"])
            found.setdefault(in_plain(name), read)
    return found


@cache
def _groups() -> dict[str, tuple[str, str]]:
    """Plain name of a group -> (its name as written, SMILES with the atom of attachment first)."""
    return {
        in_plain(name): (name, row["smiles"])
        for row in load_table("organic_groups")
        for name in row["names"].split("; ")
    }


@cache
def _templates() -> tuple[tuple[str, str, dict[str, str], str], ...]:
    """(what stands before the group, behind it, the row, the name as written) of every head."""
    found = []
    for row in load_table("reagent_heads"):
        for name in row["names"].split("; "):
            before, _, after = in_plain(name).partition("*")
            found.append((before, after.strip(), row, name))
    return tuple(found)
