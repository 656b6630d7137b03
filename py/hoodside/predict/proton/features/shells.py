"""The surroundings of an atom shell by shell: exact environments, and kinds of atom by distance."""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.predict.environment import circular_codes
from hoodside.predict.proton.aromatic import aromatic_rings
from hoodside.predict.proton.view import View

#: Depth of exact environments, shared with the 13C correction so that they are worked out once.
_CODES_RADIUS = 5
_MAX_RADIUS = 4
_SHELLS = 5


def shells(view: View, atom: int) -> Iterator[str]:
    structure = view.structure
    codes = circular_codes(structure, _CODES_RADIUS)[atom]
    yield from (f"e{radius}{codes[radius]}" for radius in range(_MAX_RADIUS + 1))
    own = own_kind(view, atom)
    for other, distance in enumerate(structure.distances_from(atom)):
        if 0 < distance <= _SHELLS:
            yield f"s{distance}{own}>{atom_kind(view, other)}"


def own_kind(view: View, atom: int) -> str:
    own = view.structure.atoms[atom]
    if own.aromatic:
        return f"ar{len(aromatic_rings(view, atom)[0]) if aromatic_rings(view, atom) else 0}"
    return f"{own.symbol}{'sat' if view.is_saturated(atom) else 'uns'}H{own.hydrogens}"


def atom_kind(view: View, atom: int) -> str:
    """Element with what tells its shielding: aromatic, unsaturated, hydrogens on heteroatoms."""
    own = view.structure.atoms[atom]
    if own.aromatic:
        return own.symbol.lower()
    order = max((b.order for b in view.structure.bonds_of[atom]), default=0)
    mark = {2: "=", 3: "#"}.get(order, "")
    return f"{own.symbol}{mark}{'h' if own.hydrogens and own.symbol != 'C' else ''}"
