"""Diels-Alder cycloaddition: suprafacial on both, endo, regiochemistry by the ends that bear charge best.

Sources: Sauer, Angew. Chem. Int. Ed. Engl. 1967, 6, 16; Fleming, Frontier Orbitals and Organic Chemical
Reactions, 1976 ("ortho" and "para" rule).
"""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.molecule import Structure
from hoodside.molecule.draft import Draft
from hoodside.rivals.outcomes.addition import cis_pair, set_turn

_DIENE = "[C;!a]=[C;!a][C;!a]=[C;!a]"
_DIENOPHILE = "[C;!a]=[C;!a][$([CX3]=[OX1]),$(C#N),$([N+](=O)[O-])]"
_YNE = "C#C[CX3]=[OX1]"
_DOUBLE, _TRIPLE = 2, 3


@dataclass(frozen=True, slots=True)
class _Ends:
    """The two ligands of an end beside the bonds that take part, endo or inner first; None is hydrogen."""

    inner: int | None
    outer: int | None


def cycloadducts(diene: Structure, dienophile: Structure) -> list[Structure]:
    """Endo adducts of the first diene with the first dienophile, the favoured regioisomer first."""
    four = next((m for m in diene.matches(_DIENE) if _can_be_cisoid(diene, m)), None)
    found = dienophile.matches(_DIENOPHILE) or dienophile.matches(_YNE)
    if four is None or not found:
        return []
    far, near = found[0][:2]  # the end without the acceptor, and the one with it
    turned = four if _push(diene, four) >= _push(diene, four[::-1]) else four[::-1]
    pairs = [(turned, (far, near)), (turned, (near, far))]
    made = [_adduct(diene, dienophile, ends, pair) for ends, pair in pairs]
    return made if made[0].smiles != made[1].smiles else made[:1]


def _can_be_cisoid(diene: Structure, four: tuple[int, ...]) -> bool:
    """Both double bonds in one ring or none: a diene held s-trans in a ring cannot reach."""
    middle = diene.bond_between(four[1], four[2])
    in_ring = any(four[1] in ring and four[2] in ring for ring in diene.rings)
    all_in = any(set(four) <= set(ring) for ring in diene.rings)
    return middle is not None and middle.order == 1 and (all_in or not in_ring)


def _push(diene: Structure, four: tuple[int, ...]) -> int:
    """How much the groups on the diene raise its first end: those on the second and the fourth atom."""
    return sum(1 for at in (four[1], four[3]) for near in diene.neighbours[at] if near not in four)


def _adduct(
    diene: Structure, dienophile: Structure, four: tuple[int, ...], pair: tuple[int, int]
) -> Structure:
    """Join the first of four with the first of the pair, the last with the second."""
    draft = Draft(diene)
    moved = draft.add_copy(dienophile)
    d1, d2, d3, d4 = four
    e1, e2 = moved[pair[0]], moved[pair[1]]
    order = next(b.order for b in dienophile.bonds if {b.a, b.b} == set(pair))
    outer = {at: _diene_end(diene, at, mid, four) for at, mid in ((d1, d2), (d4, d3))}
    endo = _dienophile_ends(dienophile, pair, moved) if order == _DOUBLE else None
    draft.set_order(d1, d2, 1)
    draft.set_order(d3, d4, 1)
    draft.set_order(d2, d3, _DOUBLE)
    draft.set_order(e1, e2, order - 1)
    draft.add_bond(d1, e1)
    draft.add_bond(d4, e2)
    for at, new, mid, clockwise in ((d1, e1, d2, False), (d4, e2, d3, True)):
        _mark(draft, at, new, mid, outer[at], clockwise)
    if endo is not None:
        for at, new, other, clockwise in ((e1, d1, e2, False), (e2, d4, e1, True)):
            _mark(draft, at, new, other, endo[at], clockwise)
    return draft.keep_order()


def _mark(draft: Draft, at: int, new: int, other: int, ends: _Ends, clockwise: bool) -> None:
    """Seen from the new bond, the others turn as the geometry of the approach has it."""
    order = [new, other, ends.inner, ends.outer]
    if len(set(order)) == len(order):
        set_turn(draft, at, order, clockwise)


def _diene_end(diene: Structure, end: int, mid: int, four: tuple[int, ...]) -> _Ends:
    """Ligands of an end of the diene: inner is cis to the rest of the diene (ring atoms always are)."""
    rest = [n for n in diene.neighbours[end] if n != mid]
    inside = next((n for n in diene.neighbours[mid] if n in four and n != end), None)
    ring = [n for n in rest if any({n, end, mid, inside} <= set(r) for r in diene.rings)]
    if ring:
        return _Ends(ring[0], next((n for n in rest if n != ring[0]), None))
    if len(rest) != 1:
        return _Ends(rest[0], rest[1]) if rest else _Ends(None, None)
    bond = diene.bond_between(end, mid)
    cis = bond is not None and bond.stereo and (bond.stereo == "cis") == (inside in bond.stereo_atoms)
    return _Ends(rest[0], None) if cis else _Ends(None, rest[0])


def _dienophile_ends(dienophile: Structure, pair: tuple[int, int], moved: dict[int, int]) -> dict[int, _Ends]:
    """Ligands of either end, the acceptor's side (endo) first."""
    first, second = pair
    acceptor = {m[2] for m in dienophile.matches(_DIENOPHILE, unique=False)}
    rest = {e: [n for n in dienophile.neighbours[e] if n not in pair] for e in pair}
    cis = cis_pair(dienophile, first, second)
    endo: dict[int, int | None] = {e: next((n for n in rest[e] if n in acceptor), None) for e in pair}
    lead = second if endo[second] is not None else first
    follow = first if lead == second else second
    endo[follow] = _beside(rest[follow], cis, endo[lead], lead == second)
    return {moved[e]: _as_ends(rest[e], endo[e], moved) for e in pair}


def _beside(
    rest: list[int], cis: tuple[int, int] | None, lead: int | None, lead_is_second: bool
) -> int | None:
    """The ligand of the other end that stands on the side of ``lead``; an open double bond counts as E."""
    if cis is None:
        return None if len(rest) == 1 else next(iter(rest), None)
    own, other = (cis[1], cis[0]) if lead_is_second else cis
    matched = other if other >= 0 else None
    if own == lead:
        return matched
    return next((n for n in rest if n != matched), None)


def _as_ends(rest: list[int], endo: int | None, moved: dict[int, int]) -> _Ends:
    exo = next((n for n in rest if n != endo), None)
    return _Ends(moved[endo] if endo is not None else None, moved[exo] if exo is not None else None)
