"""Mass spectra: adduct ions, electron-ionisation fragments, the meaning of losses and low-mass ions."""

from hoodside.predict.formula.adducts import Adduct, adduct_mz, adduct_names, parse_adduct
from hoodside.predict.mass.fragments import predict_ions
from hoodside.predict.mass.lookup import IonMeaning, ions_at, losses_of

__all__ = [
    "Adduct",
    "IonMeaning",
    "adduct_mz",
    "adduct_names",
    "ions_at",
    "losses_of",
    "parse_adduct",
    "predict_ions",
]
