"""Couplings round a benzene ring: benzene itself plus what each substituent adds.

Substituent effects on ring couplings add up (Castellano and Kostelnik, J. Am. Chem. Soc. 1968, 90, 141);
the effects are those of the monosubstituted benzenes in facts/coupling_groups.csv.
"""

from __future__ import annotations

from math import fsum

from hoodside.molecule import Structure
from hoodside.predict.coupling.groups import GroupKind
from hoodside.predict.coupling.model import Estimate

#: Benzene, Hz.
_ORTHO, _META, _PARA = 7.54, 1.37, 0.69
_SD = 0.35
_SOURCE = "Castellano and Kostelnik, J. Am. Chem. Soc. 1968, 90, 141; increments in facts/coupling_groups.csv"


def benzene_couplings(
    structure: Structure, kinds: dict[int, GroupKind]
) -> dict[tuple[int, int], tuple[int, Estimate]]:
    """(bonds, estimate) per pair of ring CH, for every benzene ring not fused to another aromatic ring."""
    found: dict[tuple[int, int], tuple[int, Estimate]] = {}
    for ring in structure.rings:
        if len(ring) == 6 and all(_is_plain(structure, atom) for atom in ring):
            groups = [_group(structure, ring, atom, kinds) for atom in ring]
            for i in range(6):
                for apart in (1, 2, 3):
                    ends = (ring[i], ring[(i + apart) % 6])
                    if all(structure.atoms[a].hydrogens for a in ends):
                        found[min(ends), max(ends)] = (apart + 2, _estimate(groups, i, apart))
    return found


def _is_plain(structure: Structure, atom: int) -> bool:
    aromatic = sum(bond.aromatic for bond in structure.bonds_of[atom])
    return structure.atoms[atom].symbol == "C" and aromatic == 2


def _group(
    structure: Structure, ring: tuple[int, ...], atom: int, kinds: dict[int, GroupKind]
) -> GroupKind | None:
    outside = [n for n in structure.neighbours[atom] if n not in ring]
    return kinds.get(outside[0]) if outside else None


def _estimate(groups: list[GroupKind | None], i: int, apart: int) -> Estimate:
    turned = [groups[(i + k) % 6] for k in range(6)]
    if apart == 1:
        hz = _ORTHO + fsum(g.ortho_23 - _ORTHO for g in (turned[2], turned[5]) if g)
        hz += fsum(g.ortho_34 - _ORTHO for g in (turned[3], turned[4]) if g)
        return Estimate(hz, _SD, "benzene ortho", _SOURCE)
    if apart == 2:
        across = turned[1]
        hz = _META + (across.meta_26 - _META if across else 0.0)
        hz += fsum(g.meta_24 - _META for g in (turned[3], turned[5]) if g)
        return Estimate(hz, _SD, "benzene meta", _SOURCE)
    return Estimate(_PARA, _SD, "benzene para", _SOURCE)
