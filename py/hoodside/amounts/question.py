"""Amounts as JSON: one question in, one answer with its assumptions out."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

from hoodside.amounts.solvents import impurity_signals
from hoodside.amounts.species import (
    Signal,
    Species,
    conversion,
    mass_fractions,
    mole_fractions,
    ratio,
    routine_error,
)
from hoodside.amounts.standards import standard_notes
from hoodside.amounts.uncertain import Quantity, Result
from hoodside.amounts.weighed import Weighed, percent_yield, purity_by_standard
from hoodside.errors import FormulaError, InvalidInputError
from hoodside.predict.formula import average_mass, parse_formula
from hoodside.readings.fields import Span, number, text
from hoodside.readings.solvents import solvent_asked
from hoodside.readings.spans import PROTON_SHIFT

_RELAXED = (
    "Integrals count only when the delay is at least five times the longest T1 and the baseline is flat."
)
_USUAL_SOLVENT = "CDCl3"
_INTEGRAL = Span("integral", 0, 1e12)
_PROTONS = Span("number of H", 0, 1000)
_UNCERTAINTY = Span("standard uncertainty", 0, 1e12)
_MASS = Span("mass", 0, 1e12)
_PURITY = Span("purity", 0, 1, "as a mass fraction")
_MOLAR_MASS = Span("molar mass", 1, 1e6, "g/mol")
_STOICHIOMETRY = Span("number of moles of product per mole of start", 0.001, 1000)
_NO_OVERLAP = "The signals chosen stand free of others, of solvent and of 13C satellites."


def answer(question: dict[str, Any]) -> dict[str, Any]:
    """Answer a question of kind "ratio", "conversion", "yield", "purity" or "solvent".

    Species are ``{"name", "signals": [{"integral", "protons", "u"?}], "formula" or "molar_mass"?}``; weighed
    portions ``{"mass", "u"?, "formula" or "molar_mass", "purity"?, "u_purity"?}``: masses in one unit, molar
    mass in g/mol, purity as a mass fraction. Answers in per cent.

    Raises: InvalidInputError naming the field.
    """
    kind = question.get("kind")
    if not isinstance(kind, str) or kind not in _KINDS:
        raise InvalidInputError(
            f"There is no amount of kind {kind!r}.",
            hint=f"Use one of: {', '.join(_KINDS)}.",
            field="kind",
            value=kind,
        )
    return {"kind": kind, **_KINDS[kind](question)}


def _ratio(question: dict[str, Any]) -> dict[str, Any]:
    found = _all_species(question)
    answer = {"mole_percent": _percent(mole_fractions(found)), "assumptions": _integral_assumptions()}
    if len(found) == 2:
        answer["ratio"] = _plain(ratio(*found))
    if all(species.molar_mass for species in found):
        answer["mass_percent"] = _percent(mass_fractions(found))
    return answer


def _conversion(question: dict[str, Any]) -> dict[str, Any]:
    start = _species(_part(question, "start"), "start")
    products = tuple(_species(p, f"products[{i}]") for i, p in enumerate(_rows(question, "products")))
    found = conversion(start, products)
    return {
        "conversion_percent": _plain(_hundred(found)),
        "assumptions": [
            *_integral_assumptions(),
            "Nothing that held the start's protons is missing from the sum.",
        ],
    }


def _yield(question: dict[str, Any]) -> dict[str, Any]:
    found = percent_yield(
        _weighed(_part(question, "product"), "product"),
        _weighed(_part(question, "limiting"), "limiting"),
        number(question.get("stoichiometry", 1.0), "stoichiometry", _STOICHIOMETRY),
    )
    return {"yield_percent": _plain(found), "assumptions": ["Purities not given are taken as 100 %."]}


def _purity(question: dict[str, Any]) -> dict[str, Any]:
    analyte, standard = _part(question, "analyte"), _part(question, "standard")
    found = purity_by_standard(
        _species(analyte, "analyte"),
        _weighed(analyte, "analyte"),
        _species(standard, "standard"),
        _weighed(standard, "standard"),
    )
    noted = standard_notes(text(standard.get("name"), "standard.name"))
    assumptions = [*_integral_assumptions(), *([noted] if noted else [])]
    return {"purity_percent": _plain(found), "assumptions": assumptions}


def _solvent(question: dict[str, Any]) -> dict[str, Any]:
    main = _species(_part(question, "main"), "main")
    nmr_solvent = solvent_asked(question.get("nmr_solvent"), "nmr_solvent", _USUAL_SOLVENT)
    others = tuple(
        _impurity(entry, f"solvents[{i}]", nmr_solvent) for i, entry in enumerate(_rows(question, "solvents"))
    )
    together = (main, *others)
    return {
        "mole_percent": _percent(mole_fractions(together)),
        "mass_percent": _percent(mass_fractions(together)),
        "assumptions": [
            *_integral_assumptions(),
            "Only what was entered is counted; other residues are not.",
        ],
    }


_KINDS: dict[str, Callable[[dict[str, Any]], dict[str, Any]]] = {
    "ratio": _ratio,
    "conversion": _conversion,
    "yield": _yield,
    "purity": _purity,
    "solvent": _solvent,
}


def _impurity(entry: dict[str, Any], field: str, nmr_solvent: str) -> Species:
    """A residual solvent by name and shift: proton count and molar mass come from the impurity table."""
    from hoodside.molecule import read_structure
    from hoodside.predict.formula import formula_of

    name = text(entry.get("name"), f"{field}.name")
    signals = [s for s in impurity_signals(nmr_solvent) if s.compound.lower() == name.lower()]
    if not signals:
        raise InvalidInputError(
            f"{name!r} is not in the table of common impurities for {nmr_solvent}.",
            hint="Give it as a species with protons and formula.",
            field=f"{field}.name",
            value=name,
        )
    near = signals[0]
    if entry.get("ppm") is not None:
        ppm = number(entry["ppm"], f"{field}.ppm", PROTON_SHIFT)
        near = min(signals, key=lambda s: abs(s.ppm - ppm))
    integral = number(entry.get("integral"), f"{field}.integral", _INTEGRAL)
    mass = average_mass(formula_of(read_structure(near.smiles)))
    return Species(name, (Signal(integral, near.protons, _u(entry, field)),), mass)


def _all_species(question: dict[str, Any]) -> tuple[Species, ...]:
    return tuple(_species(entry, f"species[{i}]") for i, entry in enumerate(_rows(question, "species")))


def _species(entry: dict[str, Any], field: str) -> Species:
    signals = tuple(
        Signal(
            number(s.get("integral"), f"{field}.signals[{i}].integral", _INTEGRAL),
            number(s.get("protons"), f"{field}.signals[{i}].protons", _PROTONS),
            _u(s, f"{field}.signals[{i}]"),
        )
        for i, s in enumerate(_rows(entry, "signals", field))
    )
    name = text(entry.get("name"), f"{field}.name") or field
    return Species(name, signals, _molar_mass(entry, field, needed=False))


def _weighed(entry: dict[str, Any], field: str) -> Weighed:
    molar_mass = _molar_mass(entry, field, needed=True)
    return Weighed(
        Quantity(number(entry.get("mass"), f"{field}.mass", _MASS), _u(entry, field) or 0.0),
        molar_mass or 0.0,
        Quantity(
            number(entry.get("purity", 1.0), f"{field}.purity", _PURITY),
            number(entry.get("u_purity", 0.0), f"{field}.u_purity", _PURITY),
        ),
    )


def _molar_mass(entry: dict[str, Any], field: str, needed: bool) -> float | None:
    if entry.get("molar_mass") is not None:
        return number(entry["molar_mass"], f"{field}.molar_mass", _MOLAR_MASS)
    if entry.get("formula"):
        return _mass_of(text(entry["formula"], f"{field}.formula"), f"{field}.formula")
    if needed:
        raise InvalidInputError(
            f"{field} has no molar mass.", hint="Give formula or molar_mass.", field=field
        )
    return None


def _mass_of(formula: str, field: str) -> float:
    try:
        return average_mass(parse_formula(formula))
    except FormulaError as err:
        raise FormulaError(str(err), hint=err.hint, field=field, value=formula) from err


def _part(question: dict[str, Any], key: str) -> dict[str, Any]:
    found = question.get(key)
    if not isinstance(found, dict):
        raise InvalidInputError(f"{key!r} is missing.", hint=f"Give {key!r} as an object.", field=key)
    return found


def _rows(question: dict[str, Any], key: str, parent: str = "") -> list[dict[str, Any]]:
    found = question.get(key)
    field = f"{parent}.{key}" if parent else key
    if not isinstance(found, list) or not found or not all(isinstance(entry, dict) for entry in found):
        raise InvalidInputError(
            f"{field} has no entries.", hint=f"Give {key!r} as a list of objects.", field=field
        )
    return found


def _u(entry: dict[str, Any], field: str) -> float | None:
    return None if entry.get("u") is None else number(entry["u"], f"{field}.u", _UNCERTAINTY)


def _integral_assumptions() -> list[str]:
    routine = (
        f"Integrals without a stated uncertainty carry {100 * routine_error():g} % (routine 1H spectrum)."
    )
    return [_RELAXED, _NO_OVERLAP, routine]


def _percent(found: dict[str, Result]) -> dict[str, Any]:
    return {name: _plain(_hundred(result)) for name, result in found.items()}


def _hundred(result: Result) -> Result:
    return Result(100 * result.value, 100 * result.u, result.shares)


def _plain(result: Result) -> dict[str, Any]:
    return {
        "value": result.value,
        "u": result.u,
        "expanded": result.expanded,
        "shares": {name: round(share, 3) for name, share in result.shares.items()},
    }
