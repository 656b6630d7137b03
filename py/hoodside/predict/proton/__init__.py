"""1H shifts: published additivity schemes, their joint verdict, and how sure it is."""

from hoodside.predict.proton.predict import predict_protons

__all__ = ["predict_protons"]
