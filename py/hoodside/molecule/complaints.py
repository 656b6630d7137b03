"""RDKit's complaints about a source, put into a chemist's words (the same from both kernels)."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import dataclass

from hoodside.molecule.elements import SYMBOLS

_GENERAL_MEND = "Check brackets, ring closures and valences."


@dataclass(frozen=True, slots=True)
class Complaint:
    """What is wrong with a source, and the mend."""

    reason: str
    mend: str


def in_plain_words(log: str, source: str) -> Complaint:
    """The first complaint in RDKit's log that is understood; a general one otherwise."""
    for pattern, explain in _KNOWN:
        found = pattern.search(log)
        if found:
            return explain(found, source)
    return Complaint("", _GENERAL_MEND)


def _valence(found: re.Match[str], source: str) -> Complaint:
    number, symbol, valence = int(found[1]) + 1, found[2], found[3]
    return Complaint(
        f"atom {number} ({symbol}) has {valence} bonds, more than {symbol} can have there",
        f"Check the bonds and the charge of atom {number}, counted from the left.",
    )


def _no_kekule(found: re.Match[str], source: str) -> Complaint:
    atoms = ", ".join(str(int(i) + 1) for i in found[1].split())
    return Complaint(
        f"no arrangement of double bonds suits the aromatic ring of atoms {atoms}",
        "An aromatic nitrogen with H is written [nH]; a ring that is not aromatic takes capital letters.",
    )


def _lone_aromatic(found: re.Match[str], source: str) -> Complaint:
    return Complaint(
        f"atom {int(found[1]) + 1} is written as aromatic but is in no ring",
        "Write it with a capital letter.",
    )


def _open_ring(found: re.Match[str], source: str) -> Complaint:
    labels = _unpaired_ring_labels(source)
    named = f"ring closure {', '.join(labels)} is" if labels else "a ring closure is"
    return Complaint(f"{named} opened but never closed", "Write the same digit at both ends of the bond.")


def _self_ring(found: re.Match[str], source: str) -> Complaint:
    return Complaint(f"ring closure {found[1]} joins an atom to itself", "Move one of the two digits.")


def _open_bracket(found: re.Match[str], source: str) -> Complaint:
    return Complaint("a bracket '(' is never closed", "Close the branch with ')'.")


def _stray_bracket(found: re.Match[str], source: str) -> Complaint:
    return Complaint("a bracket ')' closes nothing", "Take it out, or open the branch with '('.")


def _misspelt(found: re.Match[str], source: str) -> Complaint:
    position = int(found[1])
    unknown = _unknown_element(source, position)
    if unknown:
        return Complaint(f"{unknown!r} is no element", "Check the symbol in square brackets.")
    sign = source[position - 1 : position]
    return Complaint(
        f"character {position} ({sign!r}) cannot stand there", f"Check the text round character {position}."
    )


def _missing_element(found: re.Match[str], source: str) -> Complaint:
    return Complaint(f"{found[1]!r} is no element", "Check the atom block.")


def _unpaired_ring_labels(source: str) -> list[str]:
    """Ring labels that occur an odd number of times outside square brackets."""
    seen: dict[str, int] = {}
    for label in re.findall(r"%\d\d|%\(\d+\)|\d", re.sub(r"\[[^\]]*\]", "", source)):
        seen[label] = seen.get(label, 0) + 1
    return [label for label, count in seen.items() if count % 2]


def _unknown_element(source: str, position: int) -> str:
    """The element symbol of the bracket atom at a character position when there is no such element."""
    opening = source.rfind("[", 0, position)
    symbol = re.match(r"\[\d*([A-Za-z][a-z]?)", source[opening:]) if opening >= 0 else None
    closed = opening >= 0 and "]" in source[opening : position - 1]
    if symbol is None or closed or symbol[1].capitalize() in SYMBOLS or symbol[1][0].upper() in SYMBOLS:
        return ""
    return symbol[1]


# The order matters: a log may hold several lines, the most telling come first.
_KNOWN: tuple[tuple[re.Pattern[str], Callable[[re.Match[str], str], Complaint]], ...] = (
    (re.compile(r"valence for atom # (\d+) (\w+), (\d+), is greater"), _valence),
    (re.compile(r"Unkekulized atoms: ([\d ]+)"), _no_kekule),
    (re.compile(r"non-ring atom (\d+) marked aromatic"), _lone_aromatic),
    (re.compile(r"unclosed ring"), _open_ring),
    (re.compile(r"ring closure (\d+) bonds atom \d+ to itself"), _self_ring),
    (re.compile(r"extra open parentheses"), _open_bracket),
    (re.compile(r"extra close parentheses"), _stray_bracket),
    (re.compile(r"Element '([^']*)' not found"), _missing_element),
    (re.compile(r"mistakes around position (\d+)"), _misspelt),
)
