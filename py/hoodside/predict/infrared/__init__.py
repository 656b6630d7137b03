"""Infrared: bands a structure should show, groups a band may mean, diagnostic regions, reliability."""

from hoodside.predict.infrared.bands import absence_bands, predict_bands
from hoodside.predict.infrared.evidence import BandEvidence, weigh_bands, weigh_clear
from hoodside.predict.infrared.lookup import BandMeaning, groups_for_band
from hoodside.predict.infrared.regions import IrRegion, ir_regions, region_of
from hoodside.predict.infrared.reliability import (
    background_density,
    band_reliability,
    band_spread,
    seen_when_looked,
)

__all__ = [
    "BandEvidence",
    "BandMeaning",
    "IrRegion",
    "absence_bands",
    "background_density",
    "band_reliability",
    "band_spread",
    "groups_for_band",
    "ir_regions",
    "predict_bands",
    "region_of",
    "seen_when_looked",
    "weigh_bands",
    "weigh_clear",
]
