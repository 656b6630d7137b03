"""13C expectations of a structure: one group per line, with shift, uncertainty, kind and derivation."""

from __future__ import annotations

from functools import cache

from hoodside.facts import load_table
from hoodside.molecule import Structure
from hoodside.molecule.symmetry import atom_classes
from hoodside.predict.carbon.estimate import scheme_estimates
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.features import atom_features
from hoodside.predict.learned import Correction, learned_table
from hoodside.predict.model import CarbonGroup, Term

#: The errors follow a Student t with this many degrees of freedom; ``sd`` is its scale.
ERROR_DOF = 4.0

_KINDS = ("C", "CH", "CH2", "CH3")
_LEARNED = "carbon_learned"
_ANY = "any"


def predict_carbons(structure: Structure) -> tuple[CarbonGroup, ...]:
    """Expected 13C lines in CDCl3, highest shift first.

    Shifts in ppm from TMS; ``sd`` is the scale of the error (Student t, ``ERROR_DOF``). Schemes: Clerc and
    Pretsch, Grant and Paul, Ewing (see the facts tables); correction: ``predict.learned``.
    """
    estimates = scheme_estimates(structure)
    classes = atom_classes(structure)
    members: dict[int, list[int]] = {}
    for atom in estimates:
        members.setdefault(classes[atom], []).append(atom)
    groups = [_group(structure, tuple(sorted(atoms)), estimates) for atoms in members.values()]
    return tuple(sorted(groups, key=lambda g: (-g.ppm, g.atoms)))


def _group(structure: Structure, atoms: tuple[int, ...], estimates: dict[int, Estimate]) -> CarbonGroup:
    first = atoms[0]
    estimate = estimates[first]
    correction = learned_table(_LEARNED).correct(atom_features(structure, first))
    return CarbonGroup(
        atoms=atoms,
        n=len(atoms),
        ppm=round(estimate.ppm + correction.delta, 2),
        sd=round(correction.variance**0.5 * _error_scale(estimate.environment), 2),
        kind=_KINDS[min(structure.atoms[first].hydrogens, 3)],
        environment=estimate.environment,
        terms=(*estimate.terms, _learned_term(correction)),
    )


def _learned_term(correction: Correction) -> Term:
    how = (
        f"alike to {correction.radius} bonds with {correction.cases} assigned carbons"
        if correction.radius
        else "nothing alike in the fit"
    )
    return Term(f"correction from published spectra ({how})", correction.delta, _source())


@cache
def _source() -> str:
    return load_table(_LEARNED).rows[0]["source"]


def _error_scale(environment: str) -> float:
    """Observed over stated error of the class, from cross-validation over compounds."""
    scales = _scales()
    return scales.get(environment, scales[_ANY])


@cache
def _scales() -> dict[str, float]:
    return {row["environment"]: float(row["scale"]) for row in load_table("carbon_errors")}
