"""Combustion analysis: calculated composition, the check of found values, solvates that would fit."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache

from hoodside.errors import InvalidInputError
from hoodside.facts.table import load_table
from hoodside.predict.formula.masses import atomic_weight
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import parse_composition
from hoodside.predict.formula.symbols import element_of

#: What samples most often hold on to (common practice).
_SOLVATES = ("H2O", "CH2Cl2", "CHCl3", "C4H8O2", "CH4O", "C2H6O", "C7H8", "C6H14")
_AMOUNTS = (0.1, 0.2, 0.25, 0.33, 0.5, 0.75, 1.0, 1.5, 2.0)


@dataclass(frozen=True, slots=True)
class CombustionLine:
    """One element of a combustion analysis, in per cent by mass."""

    element: str
    calculated: float
    found: float
    difference: float  # found minus calculated
    within: bool
    tolerance: float  # per cent absolute
    source: str


@dataclass(frozen=True, slots=True)
class SolvateFit:
    """A solvate with which found values agree; ``doubtful`` when so much solvent usually means impurity."""

    solvent: str
    amount: float  # mol per mol of compound
    worst: float  # largest absolute difference left, per cent
    doubtful: bool


def mass_percent(formula: Formula | str) -> dict[str, float]:
    """Per cent by mass of each element (standard atomic weights). Text may name fractions: "...·0.5H2O".

    Raises: FormulaError when the text cannot be read.
    """
    return _percent(_composition(formula))


def combustion_check(
    formula: Formula | str, found: Mapping[str, float], tolerance: float | None = None
) -> tuple[CombustionLine, ...]:
    """Compare found with calculated percentages; the usual allowance is +-0.4 absolute.

    Raises: InvalidInputError for a percentage outside 0 to 100 or a sum above 100.
    Source: facts/purity_rules.csv (journal guidelines).
    """
    _check_found(found)
    allowed, source = _allowance()
    allowed = tolerance if tolerance is not None else allowed
    calculated = mass_percent(formula)
    lines = []
    for element, value in found.items():
        expected = calculated.get(element, 0.0)
        difference = value - expected
        # Half a unit of the second decimal: 0.40 as printed still passes.
        within = abs(difference) < allowed + 0.005
        lines.append(CombustionLine(element, expected, value, difference, within, allowed, source))
    return tuple(lines)


def solvate_fits(formula: Formula | str, found: Mapping[str, float]) -> tuple[SolvateFit, ...]:
    """Solvates of the compound that bring every found value within the allowance, least solvent first."""
    _check_found(found)
    allowed, _ = _allowance()
    fits = [fit for fit in _try_solvates(_composition(formula), found) if fit.worst < allowed + 0.005]
    return tuple(sorted(fits, key=lambda fit: (fit.amount, fit.worst)))


def _try_solvates(base: dict[str, float], found: Mapping[str, float]) -> Iterator[SolvateFit]:
    flagged_above = _rule_value("elemental analysis: solvent or water fractions")
    for solvent in _SOLVATES:
        extra, _ = parse_composition(solvent)
        for amount in _AMOUNTS:
            mixed = dict(base)
            for symbol, n in extra.items():
                mixed[symbol] = mixed.get(symbol, 0) + amount * n
            percent = _percent(mixed)
            worst = max((abs(v - percent.get(e, 0.0)) for e, v in found.items()), default=0.0)
            yield SolvateFit(solvent, amount, worst, amount > flagged_above)


def _composition(formula: Formula | str) -> dict[str, float]:
    if isinstance(formula, Formula):
        return {symbol: float(n) for symbol, n in formula.parts}
    return parse_composition(formula)[0]


def _percent(counts: Mapping[str, float]) -> dict[str, float]:
    total = sum(atomic_weight(s) * n for s, n in counts.items())
    percent: dict[str, float] = {}
    for symbol, n in counts.items():
        element = element_of(symbol)
        percent[element] = percent.get(element, 0.0) + 100 * atomic_weight(symbol) * n / total
    return percent


def _check_found(found: Mapping[str, float]) -> None:
    for element, value in found.items():
        if not 0 <= value <= 100:
            raise InvalidInputError(
                f"Found {value:g} % {element}.",
                hint="Percentages lie between 0 and 100.",
                field=f"analysis.{element}",
                value=value,
            )
    if sum(found.values()) > 100.5:
        raise InvalidInputError(
            f"The found percentages sum to {sum(found.values()):.2f}.",
            hint="Check for a misplaced digit.",
            field="analysis",
        )


@cache
def _allowance() -> tuple[float, str]:
    row = _rule("elemental analysis: found minus calculated")
    return float(row["value"]), row["source"]


def _rule_value(start: str) -> float:
    return float(_rule(start)["value"])


@cache
def _rule(start: str) -> dict[str, str]:
    return next(row for row in load_table("purity_rules") if row["rule"].startswith(start))
