"""Predictions as data: what is expected, how sure, and how each number came about."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Term:
    """One step of a derivation: a base value or an increment."""

    label: str  # "benzene", "ortho CHO", ...
    value: float  # in the unit of the number derived (ppm, Hz, cm-1)
    source: str


@dataclass(frozen=True, slots=True)
class ProtonGroup:
    """Chemically equivalent H of one structure (diastereotopic H of a CH2 are two groups)."""

    atoms: tuple[int, ...]  # heavy atoms bearing them, ascending
    n: int  # number of H
    ppm: float
    sd: float  # ppm, standard deviation of the error expected
    mult: str  # first-order pattern in ACS abbreviation, "m" where not first order at this field
    j: tuple[float, ...]  # Hz, largest first
    exchangeable: bool
    equivalence: str  # "single", "homotopic", "enantiotopic" or "diastereotopic"
    environment: str = ""  # error-model class, e.g. "aromatic CH", "CH2 alpha to O"
    terms: tuple[Term, ...] = ()  # base + increments; they sum to ppm
    lo: float | None = None  # ppm; for exchangeable H the published range
    hi: float | None = None


@dataclass(frozen=True, slots=True)
class CarbonGroup:
    """Chemically equivalent carbons of one structure."""

    atoms: tuple[int, ...]
    n: int
    ppm: float
    sd: float  # ppm
    kind: str  # "C", "CH", "CH2", "CH3"
    environment: str = ""
    terms: tuple[Term, ...] = ()


@dataclass(frozen=True, slots=True)
class IrExpectation:
    """A band a structure should show, with the shift rules already applied."""

    lo: float  # cm-1
    hi: float  # cm-1
    typical: float  # cm-1
    mode: str  # "C=O stretch"
    group: str  # "ketone, aryl"
    strength: str
    shape: str
    absence_counts: bool  # whether not seeing it speaks against the structure
    atoms: tuple[int, ...]
    source: str
    sd: float = 12.0  # cm-1, standard deviation of printed about typical
    pair: str = ""  # expectations with the same non-empty pair belong together ("nitro arene:3")
    terms: tuple[Term, ...] = ()  # base + shifts; they sum to typical


@dataclass(frozen=True, slots=True)
class MassExpectation:
    """An ion a structure may give in a mass spectrum."""

    mz: float
    label: str  # "M+.", "M-CH3", "C7H7+ (benzylic cleavage)"
    weight: float  # 0..1, how often such an ion is seen where the rule applies
    atoms: tuple[int, ...]  # atoms kept by the ion
    source: str


@dataclass(frozen=True, slots=True)
class Prediction:
    """All expectations for one structure in one solvent at one field."""

    h1: tuple[ProtonGroup, ...]
    c13: tuple[CarbonGroup, ...]
    ir: tuple[IrExpectation, ...]
    ms: tuple[MassExpectation, ...]
