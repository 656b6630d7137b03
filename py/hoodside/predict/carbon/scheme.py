"""What one published scheme says of one carbon."""

from __future__ import annotations

from dataclasses import dataclass
from math import fsum

from hoodside.predict.model import Term


@dataclass(frozen=True, slots=True)
class Estimate:
    """Base and increments of one carbon; ``environment`` names the class for the error model."""

    environment: str
    terms: tuple[Term, ...]

    @property
    def ppm(self) -> float:
        """The sum of the terms in ppm."""
        return fsum(term.value for term in self.terms)
