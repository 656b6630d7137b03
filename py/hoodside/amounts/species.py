"""Species in a mixture by NMR: moles in arbitrary units from integrals and proton counts."""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.amounts.uncertain import Quantity, Result, propagate, weighted_mean
from hoodside.errors import InvalidInputError
from hoodside.facts import load_table

_ROUTINE = "1H integration error, routine"


@dataclass(frozen=True, slots=True)
class Signal:
    """One integral chosen to stand for a species."""

    integral: float  # any scale, the same for all signals of the question
    protons: float  # H that the signal counts in one molecule
    u: float | None = None  # standard uncertainty of the integral; None: the routine figure


@dataclass(frozen=True, slots=True)
class Species:
    """A compound in the mixture and the signals that stand for it."""

    name: str
    signals: tuple[Signal, ...]
    molar_mass: float | None = None  # g/mol


def routine_error() -> float:
    """Relative standard uncertainty of a routine 1H integral (facts/purity_rules.csv, in per cent there)."""
    row = next(r for r in load_table("purity_rules") if r["rule"] == _ROUTINE)
    return float(row["value"]) / 100


def moles(species: Species) -> Quantity:
    """Amount in arbitrary units, the mean over the signals. Raises: InvalidInputError."""
    return weighted_mean([_per_proton(signal, species.name) for signal in species.signals])


def mole_fractions(all_species: tuple[Species, ...]) -> dict[str, Result]:
    """Mole fraction of each species among those given, with uncertainty. Raises: InvalidInputError."""
    _need_two(all_species)
    amounts = {s.name: moles(s) for s in all_species}
    return {
        name: propagate(lambda v, name=name: v[name] / sum(v.values()), amounts)  # type: ignore[misc]
        for name in amounts
    }


def ratio(first: Species, second: Species) -> Result:
    """Moles of the first per mole of the second (d.r., E/Z, regioisomers). Raises: InvalidInputError."""
    return propagate(lambda v: v["first"] / v["second"], {"first": moles(first), "second": moles(second)})


def conversion(start: Species, products: tuple[Species, ...]) -> Result:
    """Mole fraction of what was the start that has reacted: products / (products + start)."""
    names = [p.name for p in products]
    inputs = {"start": moles(start)}
    for number, product in enumerate(products, start=1):
        alike = names.count(product.name) > 1  # two that bear one name are still two
        inputs[f"product {product.name}" + (f" ({number})" if alike else "")] = moles(product)
    return propagate(lambda v: 1 - v["start"] / sum(v.values()), inputs)


def mass_fractions(all_species: tuple[Species, ...]) -> dict[str, Result]:
    """Mass fraction of each species among those given. Raises: InvalidInputError without molar masses."""
    _need_two(all_species)
    masses = {s.name: _molar_mass(s) for s in all_species}
    amounts = {s.name: moles(s) for s in all_species}
    return {
        name: propagate(
            lambda v, name=name: v[name] * masses[name] / sum(v[n] * masses[n] for n in v),  # type: ignore[misc]
            amounts,
        )
        for name in amounts
    }


def _per_proton(signal: Signal, name: str) -> Quantity:
    if not signal.integral > 0 or not signal.protons > 0:
        raise InvalidInputError(
            f"{name}: integral {signal.integral:g} for {signal.protons:g} H cannot be.",
            hint="Give an integral and a number of H above zero.",
            field="signals",
            value=signal.integral,
        )
    u = signal.u if signal.u is not None else routine_error() * signal.integral
    return Quantity(signal.integral / signal.protons, u / signal.protons)


def _need_two(all_species: tuple[Species, ...]) -> None:
    names = {species.name for species in all_species}
    if len(all_species) < 2 or len(names) < len(all_species):
        raise InvalidInputError(
            f"{len(names)} different species given.",
            hint="Give two or more, each with its own name.",
            field="species",
        )


def _molar_mass(species: Species) -> float:
    if species.molar_mass is None or not species.molar_mass > 0:
        raise InvalidInputError(
            f"{species.name} has no molar mass.", hint="Give its formula or structure.", field="species"
        )
    return species.molar_mass
