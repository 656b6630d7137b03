"""Hydrogens on C=C: base + increments of the groups gem, cis and trans to the H.

Pascual, Meier and Simon, Helv. Chim. Acta 1966, 49, 164; Matter et al., Tetrahedron 1969, 25, 691; and a
second set from monosubstituted ethylenes in CDCl3 (facts/proton_alkene.csv).
"""

from __future__ import annotations

from functools import cache

from hoodside.facts import Row, load_table
from hoodside.predict.model import Term
from hoodside.predict.proton.environment import alkene_environment
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.geometry import across
from hoodside.predict.proton.schemes import scheme_sd
from hoodside.predict.proton.substituents import Substituent
from hoodside.predict.proton.view import View

#: Scheme -> (set in proton_alkene.csv, column of proton_substituents.csv).
_SETS = {
    "alkene Pascual": ("pascual_matter", "alkene_pascual"),
    "alkene observed": ("monosubst_ethylene_cdcl3", "alkene_observed"),
}
_CONJUGATING = frozenset({"pi", "aryl", "acceptor"})


def estimate_alkene(view: View, atom: int, far: int, slot: int) -> list[Estimate]:
    """Estimates for H ``slot`` of ``atom`` in the double bond to ``far``."""
    found = [_by_set(view, atom, far, slot, scheme) for scheme in _SETS]
    place = view.places.get(atom)
    if place is not None and place.in_ring:
        found.append(_in_ring(view, atom, far, slot))
    return [e for e in found if e is not None]


def _by_set(view: View, atom: int, far: int, slot: int, scheme: str) -> Estimate | None:
    name, column = _SETS[scheme]
    positions = ligand_positions(view, atom, far, slot)
    if scheme != "alkene Pascual" and any(not group.row[column] for _, group, _ in positions):
        return None
    base = _rows()[name, "H", ""]
    terms = [Term("ethylene", float(base["base_ppm"]), base["source"])]
    terms += [
        _increment(view, name, column, where, group, positions, anchor) for where, group, anchor in positions
    ]
    return Estimate(scheme, alkene_environment(view, atom), tuple(terms), scheme_sd(scheme))


def _in_ring(view: View, atom: int, far: int, slot: int) -> Estimate:
    place = view.places[atom]
    name, column = _SETS["alkene Pascual"]
    positions = ligand_positions(view, atom, far, slot)
    outside = [p for p in positions if p[2] not in place.atoms]
    terms = [place.term, *[_increment(view, name, column, w, g, positions, a) for w, g, a in outside]]
    return Estimate("alkene ring", alkene_environment(view, atom), tuple(terms), scheme_sd("alkene ring"))


def ligand_positions(view: View, atom: int, far: int, slot: int) -> list[tuple[str, Substituent, int]]:
    """(position towards the H, group, atom it begins at) for every group on the double bond."""
    found = [("gem", view.substituent(atom, n), n) for n in view.structure.neighbours[atom] if n != far]
    sides = across(view.structure, atom, far, slot)
    found += [(side or "either", view.substituent(far, n), n) for n, side in sides.items()]
    return found


def _increment(
    view: View,
    name: str,
    column: str,
    where: str,
    group: Substituent,
    positions: list[tuple[str, Substituent, int]],
    anchor: int,
) -> Term:
    when = _variant(view, group, positions, anchor)
    row = _rows().get((name, group.row[column], when)) or _rows().get((name, group.row[column], ""))
    if row is None:
        return Term(f"{where} {group.key}", 0.0, "no published increment")
    if where == "either":
        return Term(
            f"cis or trans {group.key}", (float(row["z_cis"]) + float(row["z_trans"])) / 2, row["source"]
        )
    return Term(f"{where} {group.key}", float(row[f"z_{where}"]), row["source"])


def _variant(
    view: View, group: Substituent, positions: list[tuple[str, Substituent, int]], anchor: int
) -> str:
    """Which variant of the increment the table has for this case: in a ring, or further conjugated."""
    if group.kind == "alkyl":
        others = [a for _, _, a in positions if a != anchor]
        return "ring" if any(view.share_ring(anchor, a) for a in others) else ""
    further = [g for _, g, a in positions if a != anchor and g.kind in _CONJUGATING]
    return "conjugated" if further else ""


@cache
def _rows() -> dict[tuple[str, str, str], Row]:
    return {
        (row["set"], row["variant_of"] or row["substituent"], row["when"]): row
        for row in load_table("proton_alkene")
    }
