"""How far each scheme is to be trusted (facts/proton_schemes.csv), and their joint verdict."""

from __future__ import annotations

from collections.abc import Sequence
from functools import cache

from hoodside.facts import load_table
from hoodside.predict.model import Term
from hoodside.predict.proton.estimate import Estimate


@cache
def _deviations() -> dict[str, float]:
    return {row["scheme"]: float(row["sd_ppm"]) for row in load_table("proton_schemes")}


def scheme_sd(scheme: str) -> float:
    """Standard deviation of a scheme's errors in ppm."""
    return _deviations()[scheme]


def combine(estimates: Sequence[Estimate]) -> Estimate:
    """The most trusted estimate, moved to the mean of all weighted by inverse variance.

    The first estimate names the class of hydrogen.
    """
    best = min(estimates, key=lambda e: e.sd)
    if len(estimates) == 1:
        return best
    weights = [1 / e.sd**2 for e in estimates]
    mean = sum(w * e.ppm for w, e in zip(weights, estimates, strict=True)) / sum(weights)
    others = ", ".join(e.scheme for e in estimates if e is not best)
    move = Term(f"weighted with {others}", mean - best.ppm, "mean by inverse variance")
    # The schemes rest on the same compounds, so the mean is no surer than the best of them.
    return Estimate(best.scheme, estimates[0].environment, (*best.terms, move), best.sd)
