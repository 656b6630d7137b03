"""What one published scheme says about one kind of hydrogen."""

from __future__ import annotations

from dataclasses import dataclass
from math import fsum

from hoodside.predict.model import Term


@dataclass(frozen=True, slots=True)
class Estimate:
    """A shift by one scheme: base + increments, and how far the scheme is to be trusted."""

    scheme: str  # row of facts/proton_schemes.csv, or "class" for a typical value
    environment: str  # class of hydrogen for the error model
    terms: tuple[Term, ...]
    sd: float  # ppm, scatter of the scheme's own errors

    @property
    def ppm(self) -> float:
        """The shift, ppm from TMS."""
        return fsum(term.value for term in self.terms)
