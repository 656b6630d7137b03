"""Additions to C=C and to epoxides with the stereochemistry that the mechanism gives.

Syn and anti are worked out on the graph: for a double bond whose substituents A (on one end) and D (on the
other) are cis, adding X and Y from one face gives centres whose orders (X; C2, A, B) and (Y; C1, D, E) turn
opposite ways; anti addition makes them turn the same way. See Clayden, Greeves and Warren, Organic Chemistry.
"""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.draft import Draft, Mark

_HYDROGEN = "H"
#: Rings up to this size hold a cis double bond although the source marks none.
_CIS_RING = 7


def add_across(structure: Structure, a: int, b: int, x: str, y: str, mode: str) -> Structure:
    """Add ``x`` to atom ``a`` and ``y`` to atom ``b`` of a double bond; mode "syn", "anti" or "none".

    ``x`` and ``y`` are element symbols ("H", "O", "Br" ...). One enantiomer is drawn of a racemic product.
    """
    cis = cis_pair(structure, a, b)
    draft = Draft(structure)
    before = {end: [n for n in structure.neighbours[end] if n != far] for end, far in ((a, b), (b, a))}
    draft.set_order(a, b, 1)
    added = {a: _attach(draft, a, x), b: _attach(draft, b, y)}
    if mode != "none" and cis is not None:
        mark_pair(draft, (a, b), before, added, cis, mode == "syn")
    return draft.keep_order()


def open_epoxide(
    structure: Structure, attacked: int, oxygen: int, nucleophile: Structure, at: int
) -> Structure:
    """Open an epoxide at ``attacked`` by atom ``at`` of the nucleophile, with inversion there."""
    draft = Draft(structure)
    entering = draft.add_copy(nucleophile)[at]
    draft.swap_ligand(attacked, oxygen, entering, invert=True)
    return draft.finish()


def with_fused_ring_cis(structure: Structure, a: int, b: int, oxygen: int) -> Structure:
    """An epoxide on a small ring can only be cis: mark it so where the source leaves it open."""
    if structure.atoms[a].stereo or structure.atoms[b].stereo:
        return structure
    for ring in structure.rings:
        if a in ring and b in ring and oxygen not in ring and len(ring) <= _CIS_RING:
            draft = Draft(structure)
            before = {e: [n for n in structure.neighbours[e] if n not in (a, b, oxygen)] for e in (a, b)}
            cis = (next(n for n in before[a] if n in ring), next(n for n in before[b] if n in ring))
            mark_pair(draft, (a, b), before, {a: oxygen, b: oxygen}, cis, syn=True)
            return draft.keep_order()
    return structure


#: What bridges a double bond: the new atom, its hydrogens, and what else it carries.
_BRIDGES = {
    "O": ("O", 2, ()),
    "CH2": ("C", 4, ()),
    "CCl2": ("C", 4, ("Cl", "Cl")),
    "CBr2": ("C", 4, ("Br", "Br")),
}


def bridge(structure: Structure, a: int, b: int, by: str = "O") -> Structure:
    """Bridge a double bond by one atom on one face: "O" (epoxide), "CH2", "CCl2" or "CBr2" (cyclopropane)."""
    cis = cis_pair(structure, a, b)
    draft = Draft(structure)
    before = {end: [n for n in structure.neighbours[end] if n != far] for end, far in ((a, b), (b, a))}
    draft.set_order(a, b, 1)
    symbol, hydrogens, carried = _BRIDGES[by]
    new = draft.add_atom(symbol, hydrogens=hydrogens)
    draft.add_bond(a, new)
    draft.add_bond(b, new)
    for ligand in carried:
        draft.add_bond(new, draft.add_atom(ligand, hydrogens=1))
    if cis is not None:
        mark_pair(draft, (a, b), before, {a: new, b: new}, cis, syn=True)
    return draft.keep_order()


def _attach(draft: Draft, atom: int, symbol: str) -> int | None:
    """Bond a new atom on; None for hydrogen, which is folded in already."""
    if symbol == _HYDROGEN:
        return None
    new = draft.add_atom(symbol, hydrogens=2 if symbol == "O" else 1)
    draft.add_bond(atom, new)
    return new


def cis_pair(structure: Structure, a: int, b: int) -> tuple[int, int] | None:
    """Substituents (one on each end) that are cis, or None where the bond's geometry is open or none."""
    bond = structure.bond_between(a, b)
    if bond is None:
        return None
    ends = {e: [n for n in structure.neighbours[e] if n not in (a, b)] for e in (a, b)}
    for ring in structure.rings:
        if a in ring and b in ring and len(ring) <= _CIS_RING:
            return next(n for n in ends[a] if n in ring), next(n for n in ends[b] if n in ring)
    if not bond.stereo:
        return None
    first, second = bond.stereo_atoms
    if first not in ends[a]:
        first, second = second, first
    if bond.stereo == "cis":
        return first, second
    other = [n for n in ends[b] if n != second]
    return (first, other[0]) if other else (first, -1)


def mark_pair(
    draft: Draft,
    ends: tuple[int, int],
    before: dict[int, list[int]],
    added: dict[int, int | None],
    cis: tuple[int, int],
    syn: bool,
) -> None:
    """Set both centres. ``cis`` may name -1 for the hydrogen of the second end."""
    (a, b), (near, far) = ends, cis
    orders = {}
    for end, other, first in ((a, b, near), (b, a, far)):
        rest: list[int | None] = [n for n in before[end] if n != first]
        orders[end] = [added[end], other, first if first >= 0 else None, *(rest or [None])]
    for end in ends:
        if len(set(orders[end])) < 4:
            return  # two hydrogens on one end: no centre there
    set_turn(draft, a, orders[a], clockwise=True)
    set_turn(draft, b, orders[b], clockwise=not syn)


def set_turn(draft: Draft, atom: int, order: list[int | None], clockwise: bool) -> None:
    """Mark an atom so that, seen from the first ligand, the others turn clockwise (None: hydrogen)."""
    listed: list[int | None] = [*draft.ligands(atom)]
    if None in order:
        listed.append(None)
    odd = _permutation_is_odd([order.index(n) for n in listed])
    mark: Mark = "cw" if clockwise != odd else "ccw"
    draft.set_mark(atom, mark)


def _permutation_is_odd(places: list[int]) -> bool:
    return sum(p > q for i, p in enumerate(places) for q in places[i + 1 :]) % 2 == 1
