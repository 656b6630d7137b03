"""What the learned correction of a 1H shift may hang on: named features of the surroundings of one hydrogen.

The first letter of a name is its family: ``e`` exact environment (the radius follows), ``s`` kind of atom
at a distance, ``t`` step of the scheme's own derivation, ``a`` set of groups on a saturated carbon, ``b``
pair of a group on the carbon and one beside it, ``p`` group at a position of an aromatic ring, ``q`` the
same by kind of group, ``o`` pair of positions, ``c`` group with neighbours that crowd it, ``u`` what crowds
a group on its own side, ``y`` position across a double bond next to the carbon, ``z`` position on an
aromatic ring next to the carbon, ``x`` the same one atom further on, ``w`` groups cis or trans on a ring,
``k`` ring, ``v`` solvent, ``r`` group on the next ring that faces the H (peri).
"""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.proton.aromatic import ring_substituents
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.features.planar import alkene, aromatic
from hoodside.predict.proton.features.saturated import faces, saturated
from hoodside.predict.proton.features.shells import own_kind, shells
from hoodside.predict.proton.view import View


def hydrogen_features(view: View, atom: int, slot: int, estimate: Estimate, solvent: str) -> dict[str, float]:
    """Features of H ``slot`` on ``atom``: name -> count."""
    found: dict[str, float] = {}
    for name in _names(view, atom, slot, estimate, solvent):
        found[name] = found.get(name, 0.0) + 1.0
    return found


def _names(view: View, atom: int, slot: int, estimate: Estimate, solvent: str) -> Iterator[str]:
    structure = view.structure
    yield from shells(view, atom)
    kind = own_kind(view, atom)
    yield from (f"t{kind} {term.label}" for term in estimate.terms)
    if structure.atoms[atom].aromatic:
        yield from aromatic(view, atom)
    elif view.is_saturated(atom):
        yield from saturated(view, atom)
        yield from faces(view, atom, slot)
    elif (far := view.alkene_partner(atom)) is not None:
        yield from alkene(view, atom, far, slot)
    if solvent != "CDCl3":
        yield from (f"v{solvent}", f"v{solvent} {kind}", f"v{solvent} {estimate.environment}")
        yield from (f"v{solvent} {name}" for name in _polar_groups(view, atom))


def _polar_groups(view: View, atom: int) -> Iterator[str]:
    """Groups close by whose hydrogen bonds to the solvent move the H."""
    structure = view.structure
    if structure.atoms[atom].aromatic:
        yield from (f"{where} {group.key}" for where, group, _ in ring_substituents(view, atom))
        return
    for near in structure.neighbours[atom]:
        group = view.substituent(atom, near)
        if group.kind != "alkyl":
            yield f"on {group.key}"
