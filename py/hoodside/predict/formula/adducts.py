"""Ions made from a molecule: reading adduct names, their m/z, their formula."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from hoodside.errors import FormulaError, InvalidInputError
from hoodside.facts.table import load_table
from hoodside.predict.formula.masses import exact_mass
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.parse import parse_formula

#: Bench abbreviations found in adduct names.
_SPELLED = {
    "ACN": "C2H3N",
    "MeCN": "C2H3N",
    "MeOH": "CH4O",
    "iPrOH": "C3H8O",
    "DMSO": "C2H6OS",
    "HCOONa": "CHO2Na",
    "HCOO": "CHO2",
    "FA": "CH2O2",
    "OAc": "C2H3O2",
    "AcOH": "C2H4O2",
    "TFA": "C2HF3O2",
    "Et3NH": "C6H16N",
    "Ac": "C2H3O",
}
_PLAIN = str.maketrans("⁺⁻−–•·∙․²³", "+---....23")
_NOTE = re.compile(r"\s*\([^)]*\)\s*$")
_BRACKETED = re.compile(r"\[(?P<inner>[^\]]*M[^\]]*)\]\s*(?P<tail>[0-9+\-.]*)")
_BARE = re.compile(r"(?P<inner>\d?M(?:[+-]\d*[A-Z][A-Za-z0-9]*)*)(?P<tail>\d?[+-]\.?|\.[+-]|[+-]?\.)?")
_SHORT = {"MH+": "[M+H]+", "MNa+": "[M+Na]+", "MK+": "[M+K]+", "MNH4+": "[M+NH4]+", "MH-": "[M-H]-"}
_TERM = re.compile(r"([+-])(\d*)([A-Z(a-z][A-Za-z0-9()]*)")


@dataclass(frozen=True, slots=True)
class Adduct:
    """How an ion is made: ``molecules`` of M, plus ``gained``, less ``lost``, at ``charge`` e."""

    name: str
    molecules: int
    gained: Formula
    lost: Formula
    charge: int

    @property
    def radical(self) -> bool:
        """Whether it is the odd-electron molecular ion."""
        return self.name.endswith(".")

    def mass_shift(self) -> float:
        """What is added to the mass of all M to give the mass of the ion, in u, electrons included."""
        return exact_mass(Formula(self.gained.parts, self.charge)) - exact_mass(self.lost)

    def mz(self, mass: float) -> float:
        """m/z of the ion from a molecule of ``mass`` u."""
        return (self.molecules * mass + self.mass_shift()) / abs(self.charge)

    def neutral_mass(self, mz: float) -> float:
        """Mass in u of the molecule behind an ion seen at ``mz``."""
        return (mz * abs(self.charge) - self.mass_shift()) / self.molecules

    def ion(self, molecule: Formula) -> Formula:
        """Formula of the ion. Raises: FormulaError when the molecule lacks what is to be lost."""
        whole = molecule * self.molecules + self.gained - self.lost
        return Formula(whole.parts, self.charge)


def adduct_names() -> tuple[str, ...]:
    """The adducts of facts/ms_adducts.csv, in its order."""
    return tuple(row["adduct"] for row in load_table("ms_adducts"))


def adduct_mz(formula: Formula, adduct: str = "[M+H]+") -> float:
    """m/z of an ion of a molecule. Raises: InvalidInputError (adduct) or FormulaError (lacks the loss)."""
    kind = parse_adduct(adduct)
    return exact_mass(kind.ion(formula)) / abs(kind.charge)


@cache
def parse_adduct(name: str) -> Adduct:
    """Read an adduct name: "[M+H]+", "M+H", "MH+", "[M]+.", "M+•", "[M-H]-", "[2M+Na]+", "[M+2H]2+".

    A bare name without charge takes it from the ions it gains or loses.
    Raises: InvalidInputError naming the field ``hrms.adduct``.
    """
    plain = _NOTE.sub("", name.translate(_PLAIN)).replace(" ", "")
    plain = _SHORT.get(plain, plain)
    found = _BRACKETED.fullmatch(plain) or _BARE.fullmatch(plain)
    molecules = re.match(r"(\d?)M", found["inner"]) if found else None
    if found is None or molecules is None:
        raise _unreadable(name)
    gained, lost = _terms(name, found["inner"][molecules.end() :])
    tail = found["tail"] or ""
    charge = _charge_of(tail) or _usual_charge(gained, lost)
    if not charge:
        raise _unreadable(name)
    return Adduct(_canonical(found["inner"], charge, tail), int(molecules[1] or 1), gained, lost, charge)


def _terms(name: str, text: str) -> tuple[Formula, Formula]:
    """What is gained and what is lost, by the signed terms after M."""
    sides = {"+": Formula(()), "-": Formula(())}
    used = 0
    for term in _TERM.finditer(text):
        try:
            group = parse_formula(_SPELLED.get(term[3], term[3]))
        except FormulaError as err:
            raise _unreadable(name) from err
        sides[term[1]] = sides[term[1]] + group * int(term[2] or 1)
        used += len(term[0])
    if used != len(text):
        raise _unreadable(name)
    return sides["+"], sides["-"]


def _charge_of(tail: str) -> int:
    digits = "".join(c for c in tail if c.isdigit())
    signs = tail.count("+") - tail.count("-")
    return signs * int(digits) if digits else signs


def _usual_charge(gained: Formula, lost: Formula) -> int:
    """Charge by common ions: +1 per H, alkali metal or NH4 gained; -1 for an anion gained or an H lost."""
    cations = sum(gained.count(e) for e in ("Li", "Na", "K", "Cs", "Ag"))
    if cations and not lost.parts:
        return cations
    if gained.parts in {(("H", 1),), (("H", 4), ("N", 1))}:
        return 1
    if not gained.parts:
        return -lost.count("H") if lost.parts else 1
    anions = ("Cl", "Br", "I", "F")
    return -1 if any(gained.count(e) for e in anions) or gained.count("O") >= 2 else 0


def _canonical(inner: str, charge: int, tail: str) -> str:
    size = str(abs(charge)) if abs(charge) > 1 else ""
    dot = "." if "." in tail or inner == "M" else ""
    return f"[{inner}]{size}{'+' if charge > 0 else '-'}{dot}"


def _unreadable(name: str) -> InvalidInputError:
    return InvalidInputError(
        f"{name!r} cannot be read as an adduct.",
        hint='Write it like "[M+H]+", "[M+Na]+", "[M-H]-" or "[M]+.".',
        field="hrms.adduct",
        value=name,
    )
