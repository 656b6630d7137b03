"""Standard uncertainties by the law of propagation (JCGM 100:2008, GUM, 5.1.2; inputs uncorrelated)."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass

from hoodside.errors import InvalidInputError

#: Step for the sensitivity coefficients, relative to the standard uncertainty of the input.
_STEP = 1e-3
#: Coverage factor for about 95 % (GUM 6.3.3).
COVERAGE = 2.0


@dataclass(frozen=True, slots=True)
class Quantity:
    """A value with its standard uncertainty, both in the same unit."""

    value: float
    u: float = 0.0


@dataclass(frozen=True, slots=True)
class Result:
    """A value, its combined standard uncertainty, and the share of the variance each input brings (sum 1)."""

    value: float
    u: float
    shares: dict[str, float]

    @property
    def expanded(self) -> float:
        """Expanded uncertainty, coverage factor 2."""
        return COVERAGE * self.u


def propagate(model: Callable[[dict[str, float]], float], inputs: Mapping[str, Quantity]) -> Result:
    """Value and combined standard uncertainty of ``model(inputs)``.

    Sensitivity coefficients are taken numerically at the input values (GUM 5.1.3, note 2).

    Raises: InvalidInputError when the model cannot be worked out at the inputs (a zero divisor).
    """
    values = {name: quantity.value for name, quantity in inputs.items()}
    try:
        centre = model(values)
        parts = {name: _part(model, values, name, q.u) for name, q in inputs.items() if q.u > 0}
    except ZeroDivisionError as err:
        raise InvalidInputError(
            "A quantity that is divided by is zero.", hint="Check integrals, masses and proton counts."
        ) from err
    variance = sum(part**2 for part in parts.values())
    shares = {name: part**2 / variance for name, part in parts.items()} if variance else {}
    return Result(centre, math.sqrt(variance), shares)


def _part(model: Callable[[dict[str, float]], float], at: dict[str, float], name: str, u: float) -> float:
    """Contribution of one input to the combined uncertainty: sensitivity times standard uncertainty."""
    step = u * _STEP
    up, down = {**at, name: at[name] + step}, {**at, name: at[name] - step}
    return (model(up) - model(down)) / (2 * step) * u


def weighted_mean(values: list[Quantity]) -> Quantity:
    """Mean of several determinations weighted by 1/u**2; the larger of inner and outer uncertainty.

    Inner: from the stated uncertainties; outer: from the scatter (Birge, Phys. Rev. 1932, 40, 207).
    Raises: InvalidInputError when there is none.
    """
    if not values:
        raise InvalidInputError("No signal was given.", hint="Give at least one integral.", field="signals")
    if not all(q.u > 0 and q.u**2 > 0 for q in values):
        mean = sum(q.value for q in values) / len(values)
        scatter = sum((q.value - mean) ** 2 for q in values)
        n = len(values)
        return Quantity(mean, math.sqrt(scatter / (n * (n - 1))) if n > 1 else 0.0)
    weights = [1 / q.u**2 for q in values]
    mean = sum(w * q.value for w, q in zip(weights, values, strict=True)) / sum(weights)
    inner = 1 / math.sqrt(sum(weights))
    if len(values) == 1:
        return Quantity(mean, inner)
    spread = sum(w * (q.value - mean) ** 2 for w, q in zip(weights, values, strict=True))
    return Quantity(mean, inner * max(1.0, math.sqrt(spread / (len(values) - 1))))
