"""The verdict in one sentence."""

from __future__ import annotations

from collections.abc import Sequence

from hoodside.weigh.structure import Tally
from hoodside.weigh.verdict import CLASHES, FITS, TELLS_APART, Verdict
from hoodside.weigh.words import capital, listed

_LETTERS = "ABCDEFGHIJKLMNOPQRSTUVWXYZ"
#: Others named one by one in a sentence; more are counted.
_NAMED = 3

#: What a structure is called, its tally and its verdict.
Entry = tuple[str, Tally, Verdict]


def name_of(index: int) -> str:
    """ "structure A" for the first candidate given."""
    return f"structure {_LETTERS[index] if index < len(_LETTERS) else index + 1}"


def sentence(at: int, ranked: Sequence[Entry]) -> str:
    """The verdict on the structure at one place of the ranking, with how the others stand to it."""
    _, tally, verdict = ranked[at]
    identity = tally.expected.structure.inchikey
    others = [e for i, e in enumerate(ranked) if i != at and e[1].expected.structure.inchikey != identity]
    same = [e for i, e in enumerate(ranked) if i != at and e[1].expected.structure.inchikey == identity]
    twin = f" The same compound as {same[0][0]}." if same else ""
    if verdict.verdict == CLASHES:
        return f"Clashes. {verdict.reason}{_instead(others)}{twin}"
    if verdict.verdict == FITS:
        return f"Fits. {_behind(tally, others)}{twin}"
    return f"Undecided. {_open(tally, verdict, others)}{twin}"


def _instead(others: Sequence[Entry]) -> str:
    better = next((e for e in others if e[2].verdict == FITS), None)
    return f" {capital(better[0])} fits instead." if better else ""


def _behind(tally: Tally, others: Sequence[Entry]) -> str:
    if not others:
        return "It stands alone: what else it could be has not been put up."
    gaps = [(name, tally.weight_db - t.weight_db) for name, t, _ in others[:_NAMED]]
    more = len(others) - len(gaps)
    figures = listed([f"{gap:.0f}" for _, gap in gaps])
    verb = "is" if len(gaps) == 1 else "are"
    tail = f", {more} more further" if more else ""
    return f"{capital(listed([name for name, _ in gaps]))} {verb} {figures} behind{tail}."


def _open(tally: Tally, verdict: Verdict, others: Sequence[Entry]) -> str:
    near = [
        e for e in others if abs(e[1].weight_db - tally.weight_db) < TELLS_APART and e[2].verdict != CLASHES
    ]
    ahead = [e for e in others if e[1].weight_db > tally.weight_db]
    if near:
        names = [name for name, _, _ in near[:_NAMED]]
        more = [f"{len(near) - _NAMED} more"] if len(near) > _NAMED else []
        return f"Not told apart from {listed([*names, *more])} by these readings."
    if ahead:
        return _although(ahead[0], ahead[0][1].weight_db - tally.weight_db)
    return verdict.reason


def _although(better: Entry, gap: float) -> str:
    name, _, verdict = better
    if verdict.verdict == CLASHES:
        return (
            f"{capital(name)} suits the readings better by {gap:.0f}, but for one thing: {verdict.reason} "
            "Make sure of that reading."
        )
    return f"{capital(name)} is {gap:.0f} ahead, yet nothing rules this one out."
