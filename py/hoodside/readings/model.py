"""Readings as data, checked once when built. Units stand beside each field."""

from __future__ import annotations

from dataclasses import dataclass, field


@dataclass(frozen=True, slots=True)
class ProtonSignal:
    """One 1H signal as printed. A single shift has ``lo == hi``."""

    lo: float  # ppm, low end (smaller number)
    hi: float  # ppm
    mult: str = ""  # ACS abbreviation: "s", "d", "dd", "br s", "m", ...; "" when not given
    j: tuple[float, ...] = ()  # Hz, largest first
    n: float | None = None  # number of H, or a raw integral when Readings.raw_integrals
    note: str = ""  # an assignment printed with the signal

    @property
    def ppm(self) -> float:
        """Centre of the signal in ppm."""
        return (self.lo + self.hi) / 2


@dataclass(frozen=True, slots=True)
class CarbonLine:
    """One 13C line."""

    ppm: float
    kind: str = ""  # "C", "CH", "CH2", "CH3", or "" when not told
    n: int = 1  # carbons printed for it ("2C")
    j_cf: tuple[float, ...] = ()  # Hz, when printed as a C-F multiplet


@dataclass(frozen=True, slots=True)
class IrBand:
    """One IR band."""

    cm1: float  # wavenumber, cm-1
    strength: str = ""  # "strong", "medium", "weak", or ""
    shape: str = ""  # "broad", "sharp", or ""


@dataclass(frozen=True, slots=True)
class IrClear:
    """A stretch of the IR printout with a flat baseline, cm-1."""

    lo: float
    hi: float


@dataclass(frozen=True, slots=True)
class MassPeak:
    """One peak of a mass spectrum."""

    mz: float
    rel: float | None = None  # per cent of the base peak


@dataclass(frozen=True, slots=True)
class HighResMass:
    """An accurate mass."""

    found: float  # m/z
    adduct: str = "[M+H]+"
    calc: float | None = None  # m/z printed as calculated
    ppm: float = 5.0  # tolerance


@dataclass(frozen=True, slots=True)
class Analysis:
    """Combustion analysis: found mass per cent by element symbol."""

    found: dict[str, float]


@dataclass(frozen=True, slots=True)
class WetResult:
    """A bench test."""

    test: str  # key in facts/wet_tests.csv
    result: str  # "positive" or "negative"


@dataclass(frozen=True, slots=True)
class Readings:
    """All that is known of one sample. Readings are referred to as "h1:0", "c13:3", "ir:2", "ir_clear:0",
    "ms:1", "hrms", "analysis", "formula", "wet:0"."""

    id: str = ""
    formula: str = ""
    solvent: str = ""  # a name from facts/residual_solvents.csv; "" when not told
    mhz: float | None = None  # 1H observe frequency, MHz
    h1: tuple[ProtonSignal, ...] = ()
    c13: tuple[CarbonLine, ...] = ()
    ir: tuple[IrBand, ...] = ()
    ir_clear: tuple[IrClear, ...] = ()
    ir_medium: str = ""  # "film", "KBr", "ATR", "CCl4", ...
    ms: tuple[MassPeak, ...] = ()
    hrms: HighResMass | None = None
    analysis: Analysis | None = None
    wet: tuple[WetResult, ...] = ()
    raw_integrals: bool = False
    warnings: tuple[str, ...] = field(default=())
