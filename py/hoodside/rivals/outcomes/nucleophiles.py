"""What attacks: the partner by its best atom, or a small nucleophile that the reagents carry."""

from __future__ import annotations

from hoodside.molecule import Structure, read_structure
from hoodside.molecule.draft import Draft
from hoodside.rivals.outcomes.reagents import Reagents

_ATTACKING = ("[SX2H]", "[NX3;H2,H1;!$(N[CX3]=[OX1])]", "c[OX2H]", "[OX2H]", "[nH]")
_SMALL = {"O": "O", "azide": "N=[N+]=[N-]", "cyanide": "C#N", "Cl": "Cl", "Br": "Br", "I": "I", "F": "F"}
_HALIDES = (("Br", "hbr"), ("I", "hi"), ("Cl", "hcl"))
_CARBON_METAL = "[#6][Mg,Li,Zn,Cu]"
#: Kinds of nucleophile for which a partner is looked at first.
_OF_PARTNER = ("partner", "alcohol", "alkoxide")


def nucleophile_of(
    kind: str, partner: Structure | None, read: Reagents, roles: frozenset[str]
) -> tuple[Structure, int] | None:
    """The nucleophile and its attacking atom, or None when the reagents hold none of that kind."""
    if kind == "carbanion":
        return _carbanion(partner) if partner is not None else None
    if kind in _OF_PARTNER and partner is not None and (attacking := _attacking(partner)):
        return attacking
    if kind in ("alkoxide", "alcohol"):
        carried = read.brought_as(kind)
        return _attacking(read_structure(carried)) if carried else None
    if kind == "halide":
        kind = next((symbol for symbol, role in _HALIDES if role in roles), "")
    smiles = _SMALL.get(kind)
    return (read_structure(smiles), 0) if smiles else None


def _attacking(partner: Structure) -> tuple[Structure, int] | None:
    for pattern in _ATTACKING:
        if matches := partner.matches(pattern):
            return partner, matches[0][-1]
    return None


def _carbanion(partner: Structure) -> tuple[Structure, int] | None:
    """The carbon part of an organometal with a hydrogen in the place of the metal."""
    matches = partner.matches(_CARBON_METAL)
    if not matches:
        return None
    carbon, metal = matches[0]
    draft = Draft(partner)
    draft.cut_bond(carbon, metal)
    for gone in sorted({metal, *partner.neighbours[metal]} - {carbon}, reverse=True):
        draft.remove_atom(gone)
    bare = draft.keep_order()
    return bare, carbon - sum(gone < carbon for gone in {metal, *partner.neighbours[metal]} - {carbon})
