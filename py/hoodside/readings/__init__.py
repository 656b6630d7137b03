"""What the instrument gave."""

from hoodside.readings.model import (
    Analysis,
    CarbonLine,
    HighResMass,
    IrBand,
    IrClear,
    MassPeak,
    ProtonSignal,
    Readings,
    WetResult,
)

__all__ = [
    "Analysis",
    "CarbonLine",
    "HighResMass",
    "IrBand",
    "IrClear",
    "MassPeak",
    "ProtonSignal",
    "Readings",
    "WetResult",
]
