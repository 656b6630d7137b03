"""What a structure should show."""

from __future__ import annotations

from typing import Any

from hoodside.methods.arguments import short_text
from hoodside.methods.structures import structure_of
from hoodside.predict.formula import exact_mass, formula_of, unsaturation
from hoodside.predict.model import CarbonGroup, IrExpectation, MassExpectation, ProtonGroup, Term
from hoodside.predict.whole import USUAL_MHZ, USUAL_SOLVENT, predict_all
from hoodside.readings.fields import number
from hoodside.readings.solvents import solvent_asked
from hoodside.readings.spans import FIELD


def predict(
    smiles: str, solvent: str = USUAL_SOLVENT, mhz: float = USUAL_MHZ, medium: str = ""
) -> dict[str, Any]:
    """Every reading to expect of a structure, each number with the terms it is made of."""
    structure = structure_of(smiles, "smiles")
    chosen = solvent_asked(solvent, "solvent", USUAL_SOLVENT)
    field = number(mhz or USUAL_MHZ, "mhz", FIELD)
    found = predict_all(structure, chosen, field, short_text(medium, "medium"))
    formula = formula_of(structure)
    return {
        "smiles": structure.smiles,
        "formula": formula.text,
        "exact_mass": exact_mass(formula),
        "dbe": unsaturation(formula),
        "solvent": chosen,
        "mhz": field,
        "h1": [_proton(group) for group in found.h1],
        "c13": [_carbon(group) for group in found.c13],
        "ir": [_band(band) for band in found.ir],
        "ms": {"ions": [_ion(ion) for ion in found.ms]},
    }


def _proton(group: ProtonGroup) -> dict[str, Any]:
    return {
        "ppm": round(group.ppm, 3),
        "sd": round(group.sd, 3),
        "mult": group.mult,
        "j": [round(j, 2) for j in group.j],
        "n": group.n,
        "atoms": list(group.atoms),
        "exchangeable": group.exchangeable,
        "equivalence": group.equivalence,
        "environment": group.environment,
        "lo": group.lo,
        "hi": group.hi,
        "terms": _terms(group.terms),
    }


def _carbon(group: CarbonGroup) -> dict[str, Any]:
    return {
        "ppm": round(group.ppm, 2),
        "sd": round(group.sd, 2),
        "kind": group.kind,
        "n": group.n,
        "atoms": list(group.atoms),
        "environment": group.environment,
        "terms": _terms(group.terms),
    }


def _band(band: IrExpectation) -> dict[str, Any]:
    return {
        "lo": round(band.lo),
        "hi": round(band.hi),
        "typical": round(band.typical),
        "mode": band.mode,
        "group": band.group,
        "strength": band.strength,
        "shape": band.shape,
        "absence_counts": band.absence_counts,
        "atoms": list(band.atoms),
        "source": band.source,
        "terms": _terms(band.terms),
    }


def _ion(ion: MassExpectation) -> dict[str, Any]:
    return {
        "mz": ion.mz,
        "label": ion.label,
        "weight": round(ion.weight, 3),
        "atoms": list(ion.atoms),
        "source": ion.source,
    }


def _terms(terms: tuple[Term, ...]) -> list[dict[str, Any]]:
    return [{"label": t.label, "value": round(t.value, 3), "source": t.source} for t in terms]
