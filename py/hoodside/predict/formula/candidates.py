"""Which formulas an accurate mass allows."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache
from math import fsum

from hoodside.errors import InvalidInputError
from hoodside.facts.table import load_table
from hoodside.predict.formula.adducts import Adduct, parse_adduct
from hoodside.predict.formula.masses import main_isotope
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.unsaturation import unsaturation, valence_of

Limits = Mapping[str, tuple[int, int]]

#: Element limits when none are given: what a synthetic laboratory meets most. C and H by the mass alone.
USUAL_LIMITS: dict[str, tuple[int, int]] = {
    "C": (1, 200),
    "H": (0, 400),
    "N": (0, 10),
    "O": (0, 20),
    "S": (0, 2),
    "P": (0, 1),
    "F": (0, 3),
    "Cl": (0, 2),
    "Br": (0, 2),
}
MAX_MASS = 1_500.0
MAX_TRIES = 400_000
#: Molecules of no more heavy atoms than this keep to no usual ratio (urea, chloroform, SOCl2).
_SMALL = 6


@dataclass(frozen=True, slots=True)
class FormulaCandidate:
    """A formula that an accurate mass allows."""

    formula: Formula  # of the neutral molecule
    mz: float  # calculated
    error_ppm: float  # found minus calculated
    unsaturation: float


def candidate_formulas(
    mz: float,
    adduct: str = "[M+H]+",
    ppm: float = 5.0,
    limits: Limits | None = None,
    most: int = 200,
    sensible: bool = True,
) -> tuple[FormulaCandidate, ...]:
    """Molecular formulas whose ion lies within ``ppm`` of ``mz``, smallest error first.

    Args:
        limits: element -> (fewest, most); elements not named are absent. None: ``USUAL_LIMITS``.
        most: how many to answer.
        sensible: apply the heteroatom rules as well as valence.
    Every answer is a closed-shell molecule with unsaturation of zero or more.
    Raises: InvalidInputError for a mass or window that cannot be searched.
    Source: Kind & Fiehn, BMC Bioinformatics 2007, 8, 105 (facts/formula_rules.csv).
    """
    kind = parse_adduct(adduct)
    mass = kind.neutral_mass(mz)
    chosen = dict(USUAL_LIMITS if limits is None else limits)
    _check(mz, mass, ppm, chosen)
    window = mz * ppm * 1e-6 * abs(kind.charge) / kind.molecules
    found = (_judge(counts, kind, mz, sensible) for counts in _compositions(mass, window, chosen))
    kept = [candidate for candidate in found if candidate is not None]
    return tuple(sorted(kept, key=lambda c: (abs(c.error_ppm), c.formula.text))[:most])


def _check(mz: float, mass: float, ppm: float, limits: Limits) -> None:
    if not 1 <= mass <= MAX_MASS:
        raise InvalidInputError(
            f"m/z {mz:g} means a molecule of {mass:.4f} u; formulas are sought from 1 to {MAX_MASS:g} u.",
            hint="Check the m/z and the adduct.",
            field="hrms.found",
            value=mz,
        )
    if not 0 < ppm <= 100:
        raise InvalidInputError(
            f"A window of {ppm:g} ppm is out of range.",
            hint="Give between 0 and 100 ppm.",
            field="hrms.ppm",
            value=ppm,
        )
    for element in limits:
        if not valence_of(element):
            raise InvalidInputError(
                f"No formulas can be sought with {element!r}.",
                hint="Use main-group elements.",
                field=f"limits.{element}",
                value=element,
            )


def _judge(counts: dict[str, int], adduct: Adduct, mz: float, sensible: bool) -> FormulaCandidate | None:
    formula = Formula.of(counts)
    degree = unsaturation(formula)
    if degree is None or degree < 0 or degree % 1 or not formula.contains(adduct.lost):
        return None
    if sensible and not obeys_rules(formula):
        return None
    calculated = adduct.mz(fsum(main_isotope(s)[1] * n for s, n in formula.parts))
    return FormulaCandidate(formula, calculated, (mz - calculated) / calculated * 1e6, degree)


def obeys_rules(formula: Formula) -> bool:
    """Whether the element ratios and combinations are those of ordinary molecules (Kind & Fiehn 2007)."""
    counts, carbons = formula.elements, formula.count("C")
    if sum(counts.values()) - counts.get("H", 0) <= _SMALL:
        return True
    for element, lo, hi, together, above in _rules():
        n = counts.get(element, 0)
        if not together:
            if not lo * carbons <= n <= hi * carbons and n:
                return False
        elif n > hi and all(counts.get(e, 0) > above for e in together):
            return False
    return True


@cache
def _rules() -> tuple[tuple[str, float, float, tuple[str, ...], int], ...]:
    return tuple(
        (
            row["element"],
            float(row["lo"]),
            float(row["hi"]),
            tuple(row["when_elements"].split()),
            int(row["when_above"] or 0),
        )
        for row in load_table("formula_rules")
    )


def _compositions(mass: float, window: float, limits: Limits) -> Iterator[dict[str, int]]:
    """Every composition within ``window`` u of ``mass`` that does not hold too much hydrogen."""
    heavy = sorted((e for e in limits if e not in "CH"), key=lambda e: -main_isotope(e)[1])
    order = [*heavy, "C"] if "C" in limits else heavy
    return _Search(order, window, limits).fill(0, mass, 2, {})


class _Search:
    """Fills in heavy elements by recursion, carbon last; hydrogen is what is left of the mass."""

    def __init__(self, order: list[str], window: float, limits: Limits) -> None:
        self.order = order
        self.window = window
        self.limits = limits
        self.units = [main_isotope(element)[1] for element in order]
        self.hydrogens = [valence_of(element) - 2 for element in order]
        self.hydrogen = main_isotope("H")[1]
        self.tries = 0

    def fill(self, depth: int, left: float, room: int, counts: dict[str, int]) -> Iterator[dict[str, int]]:
        """``left``: mass to place, u; ``room``: most H the elements placed so far can bind."""
        if depth == len(self.order):
            yield from self._hydrogens(left, room, counts)
            return
        element, unit, gain = self.order[depth], self.units[depth], self.hydrogens[depth]
        fewest, most = self.limits[element]
        if element == "C":
            # Too few carbons could not hold the hydrogen that would have to make up the mass.
            needed = (left - self.window - room * self.hydrogen) / (unit + gain * self.hydrogen)
            fewest = max(fewest, math.ceil(needed))
        for n in range(fewest, min(most, int((left + self.window) / unit)) + 1):
            counts[element] = n
            yield from self.fill(depth + 1, left - n * unit, room + n * gain, counts)
        counts[element] = 0

    def _hydrogens(self, left: float, room: int, counts: dict[str, int]) -> Iterator[dict[str, int]]:
        self.tries += 1
        if self.tries > MAX_TRIES:
            raise InvalidInputError(
                f"More than {MAX_TRIES:,} compositions would have to be tried.",
                hint="Narrow the element limits.",
                field="limits",
            )
        fewest, most = self.limits.get("H", (0, 0))
        first = max(fewest, math.ceil((left - self.window) / self.hydrogen))
        last = min(most, room, math.floor((left + self.window) / self.hydrogen))
        for n in range(first, last + 1):
            yield {**counts, "H": n}
