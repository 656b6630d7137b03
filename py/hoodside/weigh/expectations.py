"""Predictions for one structure under the conditions of the readings, each kind made when first asked for."""

from __future__ import annotations

from functools import cached_property, lru_cache

from hoodside.molecule import Structure, read_structure
from hoodside.predict.carbon import predict_carbons
from hoodside.predict.coupling import Coupling, predict_couplings
from hoodside.predict.formula import Formula, formula_of
from hoodside.predict.infrared import predict_bands
from hoodside.predict.mass import predict_ions
from hoodside.predict.model import CarbonGroup, IrExpectation, MassExpectation, ProtonGroup
from hoodside.predict.multiplet import apply_multiplets
from hoodside.predict.proton import predict_protons
from hoodside.readings import Readings
from hoodside.weigh.carbons import SECOND_ROTAMER, SPLIT_BY_FLUORINE
from hoodside.weigh.protons.pattern import Patterns

#: Amides, thioamides and carbamates of secondary amines: their C-N bond turns slowly at room temperature.
_SLOW_ROTOR = "[CX3](=[O,S])[NX3;H0;+0;!$(N(C=[O,S])C=[O,S])]([#6;!$(C=[O,S])])[CX4]"
USUAL_SOLVENT, USUAL_MHZ = "CDCl3", 400.0
#: Structures kept between checks: a case with its rivals is weighed again after every reading typed.
_KEPT = 256


class Expectations:
    """What one structure should show in one solvent, at one field, in one IR medium."""

    def __init__(self, structure: Structure, solvent: str, mhz: float, medium: str) -> None:
        self.structure = structure
        self._solvent, self._mhz, self._medium = solvent, mhz, medium

    @cached_property
    def formula(self) -> Formula:
        """Molecular formula."""
        return formula_of(self.structure)

    @cached_property
    def h1(self) -> tuple[ProtonGroup, ...]:
        """1H groups with patterns and couplings."""
        return apply_multiplets(self._bare_h1, self._couplings, self._mhz)

    @cached_property
    def patterns(self) -> Patterns:
        """What each set of 1H groups should look like as one signal."""
        return Patterns(self.h1, self._couplings, self._mhz)

    @cached_property
    def _bare_h1(self) -> tuple[ProtonGroup, ...]:
        return predict_protons(self.structure, self._solvent)

    @cached_property
    def _couplings(self) -> tuple[Coupling, ...]:
        return tuple(predict_couplings(self.structure, self._bare_h1))

    @cached_property
    def c13(self) -> tuple[CarbonGroup, ...]:
        """13C groups."""
        return predict_carbons(self.structure)

    @cached_property
    def doubled(self) -> str:
        """Why one carbon of the structure may give more than one 13C line; "" where nothing makes it so."""
        if self.formula.count("F"):
            return SPLIT_BY_FLUORINE
        return SECOND_ROTAMER if self.structure.matches(_SLOW_ROTOR) else ""

    @cached_property
    def ir(self) -> tuple[IrExpectation, ...]:
        """Infrared bands."""
        return predict_bands(self.structure, self._medium)

    @cached_property
    def ms(self) -> tuple[MassExpectation, ...]:
        """Ions under electron ionisation."""
        return predict_ions(self.structure)


def expectations(source: str, readings: Readings) -> Expectations:
    """Expectations of a SMILES or CTfile, remembered. Raises: StructureError."""
    return _kept(source, readings.solvent or USUAL_SOLVENT, readings.mhz or USUAL_MHZ, readings.ir_medium)


@lru_cache(maxsize=_KEPT)
def _kept(source: str, solvent: str, mhz: float, medium: str) -> Expectations:
    return Expectations(_structure(source), solvent, mhz, medium)


@lru_cache(maxsize=_KEPT)
def _structure(source: str) -> Structure:
    return read_structure(source)
