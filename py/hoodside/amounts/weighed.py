"""Amounts that rest on a balance: yield, and purity against an internal standard."""

from __future__ import annotations

from dataclasses import dataclass, field

from hoodside.amounts.species import Species, moles
from hoodside.amounts.uncertain import Quantity, Result, propagate
from hoodside.errors import InvalidInputError


@dataclass(frozen=True, slots=True)
class Weighed:
    """A portion on the balance."""

    mass: Quantity  # mg (any unit, the same for both portions)
    molar_mass: float  # g/mol
    purity: Quantity = field(default_factory=lambda: Quantity(1.0))  # mass fraction


def percent_yield(product: Weighed, limiting: Weighed, stoichiometry: float = 1.0) -> Result:
    """Moles of product over moles expected from the limiting reagent, in per cent.

    Args:
        stoichiometry: moles of product that one mole of the limiting reagent can give.
    Raises: InvalidInputError.
    """
    _need_positive(product, "product")
    _need_positive(limiting, "limiting")
    if not stoichiometry > 0:
        raise InvalidInputError(
            f"Stoichiometry {stoichiometry:g} cannot be.", hint="Give moles of product per mole of start."
        )

    def model(v: dict[str, float]) -> float:
        made = v["mass of product"] * v["purity of product"] / product.molar_mass
        expected = v["mass of start"] * v["purity of start"] / limiting.molar_mass * stoichiometry
        return 100 * made / expected

    return propagate(
        model,
        {
            "mass of product": product.mass,
            "purity of product": product.purity,
            "mass of start": limiting.mass,
            "purity of start": limiting.purity,
        },
    )


def purity_by_standard(analyte: Species, sample: Weighed, standard: Species, reference: Weighed) -> Result:
    """Mass fraction of the analyte in the sample, in per cent, from one spectrum with an internal standard.

    P = (I_a/N_a) / (I_s/N_s) * (M_a/M_s) * (m_s/m_a) * P_s; Pauli et al., J. Med. Chem. 2014, 57, 9220;
    Malz and Jancke, J. Pharm. Biomed. Anal. 2005, 38, 813. It assumes full relaxation and no overlap.

    Raises: InvalidInputError.
    """
    _need_positive(sample, "sample")
    _need_positive(reference, "standard")

    def model(v: dict[str, float]) -> float:
        per_mole = v["integral of analyte"] / v["integral of standard"]
        masses = sample.molar_mass / reference.molar_mass * v["mass of standard"] / v["mass of sample"]
        return 100 * per_mole * masses * v["purity of standard"]

    return propagate(
        model,
        {
            "integral of analyte": moles(analyte),
            "integral of standard": moles(standard),
            "mass of sample": sample.mass,
            "mass of standard": reference.mass,
            "purity of standard": reference.purity,
        },
    )


def _need_positive(portion: Weighed, field: str) -> None:
    if not portion.mass.value > 0 or not portion.molar_mass > 0 or not portion.purity.value > 0:
        raise InvalidInputError(
            f"{field}: mass {portion.mass.value:g}, molar mass {portion.molar_mass:g} and purity "
            f"{portion.purity.value:g} must all be above zero.",
            hint="Check what was typed.",
            field=field,
        )
