"""13C shifts: published schemes, a learned correction on top, and a calibrated uncertainty."""

from hoodside.predict.carbon.predict import ERROR_DOF, predict_carbons

__all__ = ["ERROR_DOF", "predict_carbons"]
