"""Turns numbers and groups into the words of the trade."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from typing import Protocol

from hoodside.predict.model import CarbonGroup, ProtonGroup

_SYMBOL = re.compile(r"[A-Z][a-z]?")
_SUBSCRIPTS = str.maketrans("0123456789", "₀₁₂₃₄₅₆₇₈₉")


class HasAtoms(Protocol):
    """Any predicted group."""

    @property
    def atoms(self) -> tuple[int, ...]: ...


class HasPlace(Protocol):
    """Any signal with a window of places."""

    @property
    def ppm(self) -> float: ...


def atoms_of(groups: Iterable[HasAtoms]) -> tuple[int, ...]:
    """All atoms of some groups, ascending, each once."""
    return tuple(sorted({atom for group in groups for atom in group.atoms}))


def printed(signal: HasPlace) -> str:
    """A shift with two decimals."""
    return f"{signal.ppm:.2f}"


def plural_h(n: int) -> str:
    """ "3 H"."""
    return f"{n} H"


def amount(n: float | None) -> str:
    """A number of H without needless decimals."""
    return "?" if n is None else f"{n:.1f}".removesuffix(".0")


def group_name(group: ProtonGroup) -> str:
    """What the H are, such as "CH on aryl"."""
    return group.environment or "H"


_RING_SIZES = {
    "chain": "",
    "ring": "ring ",
    "ring3": "three-ring ",
    "ring4": "four-ring ",
    "ring5": "five-ring ",
}
_AROMATIC = {"benzene": "aromatic", "other": "heteroaromatic"}


def carbon_name(group: CarbonGroup) -> str:
    """What a carbon is, such as "CH2 on O", "aromatic CH", "ester C"."""
    return carbon_words(group.kind, group.environment)


def carbon_words(kind: str, environment: str) -> str:
    """A kind of carbon ("CH2") and the class its error is counted by ("sp3 chain O") in words."""
    words = environment.split()
    if not words:
        return kind
    if words[0] == "sp3" and len(words) == 3:
        beside = listed(_SYMBOL.findall(words[2]))
        return f"{_RING_SIZES.get(words[1], '')}{kind} on {beside}"
    if words[0] == "aromatic":
        ring = " ".join(words[1:])
        return f"{_AROMATIC.get(ring, ring)} {kind}"
    if words == ["alkene,", "hetero"]:
        return f"alkene {kind} on a heteroatom"
    return f"{environment} {kind}"


def formula_text(formula: str) -> str:
    """A formula with subscripts."""
    return formula.translate(_SUBSCRIPTS)


def listed(items: Sequence[str]) -> str:
    """ "a", "a and b", "a, b and c"."""
    if len(items) < 2:
        return "".join(items)
    return f"{', '.join(items[:-1])} and {items[-1]}"


def capital(text: str) -> str:
    """A text that begins a sentence."""
    return text[:1].upper() + text[1:]
