"""All predictions for one structure, put together once and remembered."""

from __future__ import annotations

from functools import lru_cache

from hoodside.molecule import Structure, read_structure
from hoodside.predict.carbon import predict_carbons
from hoodside.predict.coupling import predict_couplings
from hoodside.predict.infrared import predict_bands
from hoodside.predict.mass import predict_ions
from hoodside.predict.model import Prediction, ProtonGroup
from hoodside.predict.multiplet import apply_multiplets
from hoodside.predict.proton import predict_protons

USUAL_SOLVENT = "CDCl3"
USUAL_MHZ = 400.0
#: Predictions kept: a case with its rivals is checked again after every reading typed.
_KEPT = 128


def predict_all(
    structure: Structure, solvent: str = USUAL_SOLVENT, mhz: float = USUAL_MHZ, medium: str = ""
) -> Prediction:
    """Everything a structure should show.

    Args:
        solvent: a name from facts/residual_solvents.csv; "" counts as CDCl3.
        mhz: 1H observe frequency, MHz.
        medium: how the IR sample was prepared ("film", "KBr", ...), "" when not told.
    Source: named in the terms of each number.
    """
    return _predict(structure.source, solvent or USUAL_SOLVENT, mhz or USUAL_MHZ, medium)


@lru_cache(maxsize=_KEPT)
def _predict(source: str, solvent: str, mhz: float, medium: str) -> Prediction:
    structure = _structure(source)
    return Prediction(
        h1=_protons(structure, solvent, mhz),
        c13=predict_carbons(structure),
        ir=predict_bands(structure, medium),
        ms=predict_ions(structure),
    )


@lru_cache(maxsize=_KEPT)
def _structure(source: str) -> Structure:
    """The structure behind a source, kept so that solvent, field or medium can change at little cost."""
    return read_structure(source)


def _protons(structure: Structure, solvent: str, mhz: float) -> tuple[ProtonGroup, ...]:
    groups = predict_protons(structure, solvent)
    return apply_multiplets(groups, predict_couplings(structure, groups, solvent), mhz)
