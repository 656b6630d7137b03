"""What attacks: the partner by its best atom, or a small nucleophile named among the reagents."""

from __future__ import annotations

from hoodside.molecule import Structure, read_structure

_ATTACKING = ("[SX2H]", "[NX3;H2,H1;!$(N[CX3]=[OX1])]", "c[OX2H]", "[OX2H]", "[nH]")
_SMALL = {"O": "O", "azide": "N=[N+]=[N-]", "Cl": "Cl", "Br": "Br", "I": "I"}
_ALKOXIDES = {
    "naome": "OC", "kome": "OC", "meoh": "OC", "methanol": "OC",
    "naoet": "OCC", "etoh": "OCC", "ethanol": "OCC",
    "naobu": "OCCCC", "buoh": "OCCCC", "butanol": "OCCCC", "1-butanol": "OCCCC",
    "naoipr": "OC(C)C",
}  # fmt: skip


def nucleophile_of(
    kind: str, partner: Structure | None, names: tuple[str, ...], roles: frozenset[str]
) -> tuple[Structure, int] | None:
    """The nucleophile and its attacking atom, or None when the reagents hold none of that kind."""
    if kind in ("partner", "alcohol", "alkoxide") and partner is not None:
        return _attacking(partner)
    if kind in ("alkoxide", "alcohol"):
        known = next((_ALKOXIDES[n.lower()] for n in names if n.lower() in _ALKOXIDES), None)
        return (read_structure(known), 0) if known else None
    if kind == "halide":
        kind = next((s for s, role in (("Br", "hbr"), ("I", "hi"), ("Cl", "hcl")) if role in roles), "")
    smiles = _SMALL.get(kind)
    return (read_structure(smiles), 0) if smiles else None


def _attacking(partner: Structure) -> tuple[Structure, int] | None:
    for pattern in _ATTACKING:
        if matches := partner.matches(pattern):
            return partner, matches[0][-1]
    return None
