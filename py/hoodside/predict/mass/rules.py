"""Cleavage rules of electron ionisation, as typed rows."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts.table import load_table
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import parse_formula


@dataclass(frozen=True, slots=True)
class Cleavage:
    """One row of facts/ms_cleavages.csv. Positions are those of the pattern."""

    name: str
    smarts: str
    cuts: tuple[tuple[int, int], ...]  # bonds broken
    keep: int  # atom on the side that keeps the charge
    hydrogens: int  # H gained by the ion (negative: lost)
    minus: Formula | None  # expelled from the kept part by rearrangement
    ion: Formula | None  # the whole ion, where it is one rearranged species
    weight: float  # 0..1, how often such an ion is seen where the rule applies
    prefers_largest: bool  # the largest radical is lost most readily
    needs: frozenset[str]  # elements without which the pattern cannot match
    source: str

    def possible_in(self, molecule: Formula) -> bool:
        """Whether the molecule has the elements for the pattern and for what is expelled."""
        if not self.needs <= molecule.elements.keys():
            return False
        return all(part is None or molecule.contains(part) for part in (self.minus, self.ion))


@cache
def cleavages() -> tuple[Cleavage, ...]:
    """Every cleavage rule."""
    return tuple(
        Cleavage(
            name=row["name"],
            smarts=row["smarts"],
            cuts=tuple(_bond(text) for text in row["cuts"].split()),
            keep=int(row["keep"]),
            hydrogens=int(row["hydrogens"]),
            minus=parse_formula(row["minus"]) if row["minus"] else None,
            ion=parse_formula(row["ion"]) if row["ion"] else None,
            weight=float(row["weight"]),
            prefers_largest=row["largest"] == "yes",
            needs=frozenset(row["needs"].split()),
            source=row["source"],
        )
        for row in load_table("ms_cleavages")
    )


@cache
def molecular_ion_classes() -> tuple[tuple[str, str, float, str], ...]:
    """(class, pattern, weight of the molecular ion, source); the first class that applies decides."""
    return tuple(
        (row["class"], row["smarts"], float(row["weight"]), row["source"])
        for row in load_table("ms_molecular_ion")
    )


def _bond(text: str) -> tuple[int, int]:
    a, b = text.split("-")
    return int(a), int(b)
