"""What a structure being grown still lacks against the formula of the sample."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.unsaturation import unsaturation

Fit = Literal["completes", "fits", "exceeds"]


@dataclass(frozen=True, slots=True)
class Shortfall:
    """``needs``: atoms to come. ``over``: atoms that are too many. Both empty where the formula is met."""

    needs: Formula
    over: Formula


def shortfall(have: Formula, wanted: Formula) -> Shortfall:
    """Compare a structure's formula with the one wanted, by element; charges are left out."""
    elements = {*have.elements, *wanted.elements}
    by = {element: wanted.count(element) - have.count(element) for element in elements}
    return Shortfall(
        Formula.of({element: n for element, n in by.items() if n > 0}),
        Formula.of({element: -n for element, n in by.items() if n < 0}),
    )


def fit_of(after: Formula, wanted: Formula) -> Fit:
    """Whether a structure that has come to ``after`` is, can still become, or has outgrown the one wanted.

    Heavy atoms and unsaturations only ever grow by attaching, so more of either than wanted is too much;
    hydrogen is left out of account because closing a ring or raising a bond order gives it off.
    """
    gap = shortfall(after, wanted)
    if not gap.needs.parts and not gap.over.parts:
        return "completes"
    heavy = [symbol for symbol, _ in gap.over.parts if symbol != "H"]
    degrees = unsaturation(after), unsaturation(wanted)
    too_unsaturated = None not in degrees and (degrees[0] or 0) > (degrees[1] or 0)
    return "exceeds" if heavy or too_unsaturated else "fits"
