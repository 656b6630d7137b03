"""Hydrogens on aromatic carbon: the parent ring's value + benzene increments by position.

Beeby, Sternhell, Hoffmann-Ostenhof, Pretsch and Simon, Anal. Chem. 1973, 45, 1571, and a second set from
monosubstituted benzenes in CDCl3 (facts/proton_benzene.csv); parents from facts/proton_parents.csv.
In a five-membered ring a group beyond the heteroatom acts as from para, one across carbon as from meta.
"""

from __future__ import annotations

from functools import cache

from hoodside.facts import Row, load_table
from hoodside.predict.model import Term
from hoodside.predict.proton.environment import aromatic_environment
from hoodside.predict.proton.estimate import Estimate
from hoodside.predict.proton.schemes import scheme_sd
from hoodside.predict.proton.substituents import Substituent
from hoodside.predict.proton.view import View

#: Scheme -> (set in proton_benzene.csv, column of proton_substituents.csv).
_SETS = {
    "benzene observed": ("monosubst_benzene_cdcl3", "benzene_observed"),
    "benzene Beeby": ("beeby_1973", "benzene_beeby"),
}
_NO_INCREMENT = "no published increment"


def estimate_aromatic(view: View, atom: int) -> list[Estimate]:
    """Estimates for the H of an aromatic carbon."""
    return [_by_set(view, atom, scheme) for scheme in _SETS]


def _by_set(view: View, atom: int, scheme: str) -> Estimate:
    name, column = _SETS[scheme]
    place = view.places.get(atom)
    terms = [place.term] if place is not None else _fallback_base(view, atom, name)
    covered = place.atoms if place is not None else frozenset()
    for position, group, anchor in ring_substituents(view, atom):
        if anchor not in covered:
            terms.append(_increment(name, group.row[column], position, group.key))
    label = scheme if place is None and len(terms) == 1 else f"{scheme}, ring" if place else scheme
    return Estimate(label, aromatic_environment(view, atom), tuple(terms), scheme_sd(label))


def _increment(name: str, substituent: str, position: str, label: str) -> Term:
    row = _rows().get((name, substituent)) or _rows().get((_SETS["benzene observed"][0], substituent))
    if row is None:
        return Term(f"{position} {label}", 0.0, _NO_INCREMENT)
    return Term(f"{position} {label}", float(row[position]), row["source"])


def ring_substituents(view: View, atom: int) -> list[tuple[str, Substituent, int]]:
    """(position, group, atom it begins at) for what stands on the aromatic rings that hold the atom."""
    found = []
    for ring in aromatic_rings(view, atom):
        for member in ring:
            if member == atom:
                continue
            for near in view.structure.neighbours[member]:
                if near not in ring and not _fused(view, member, near):
                    group = view.substituent(member, near)
                    found.append((position_in(view, ring, atom, member), group, near))
    return found


def aromatic_rings(view: View, atom: int) -> list[tuple[int, ...]]:
    """The aromatic rings that hold an atom."""
    atoms = view.structure.atoms
    return [r for r in view.structure.rings if atom in r and all(atoms[a].aromatic for a in r)]


def position_in(view: View, ring: tuple[int, ...], atom: int, member: int) -> str:
    """ "ortho", "meta" or "para" of ``member`` to ``atom``; in five-membered rings by analogy."""
    steps = abs(ring.index(atom) - ring.index(member))
    steps = min(steps, len(ring) - steps)
    if len(ring) == 5 and steps == 2:
        middle = set(view.structure.neighbours[atom]) & set(view.structure.neighbours[member]) & set(ring)
        return "para" if any(view.structure.atoms[m].symbol != "C" for m in middle) else "meta"
    return ("ortho", "ortho", "meta", "para")[min(steps, 3)]


def _fused(view: View, member: int, near: int) -> bool:
    bond = view.structure.bond_between(member, near)
    return bond is not None and bond.aromatic


def _fallback_base(view: View, atom: int, name: str) -> list[Term]:
    """Benzene, with each ring heteroatom or fused ring counted as a group of its own."""
    base = _rows()[name, "H"]
    terms = [Term("benzene", float(base["base_ppm"]), base["source"])]
    for ring in aromatic_rings(view, atom):
        for member in ring:
            if member == atom:
                continue
            position = position_in(view, ring, atom, member)
            symbol = view.structure.atoms[member].symbol
            if symbol != "C":
                kind = symbol if len(view.structure.neighbours[member]) == 2 or symbol != "N" else "NR"
                terms.append(_increment("ring members", f"{kind}{len(ring)}", position, f"ring {symbol}"))
            elif _carries_fused(view, ring, member):
                terms.append(_increment(name, "CH=CH2", position, "fused ring"))
    return terms


def _carries_fused(view: View, ring: tuple[int, ...], member: int) -> bool:
    return any(n not in ring and _fused(view, member, n) for n in view.structure.neighbours[member])


@cache
def _rows() -> dict[tuple[str, str], Row]:
    return {(row["set"], row["substituent"]): row for row in load_table("proton_benzene")}
