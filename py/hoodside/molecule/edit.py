"""Editing steps: pure functions from one structure to the next, never to an impossible one.

Atom numbers stay as they were; new atoms are numbered on from the last. Where atoms are taken out, those
behind them move up. Every step raises StructureError, saying why, when it cannot be done.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from itertools import pairwise
from typing import Any

from hoodside.errors import InvalidInputError, StructureError
from hoodside.molecule.draft import Draft
from hoodside.molecule.edit_common import (
    atom_at,
    bond_at,
    finished,
    largest_piece,
    need_hydrogens,
    normal_valences,
    refused,
)
from hoodside.molecule.edit_stereo import flip_double_bond, flip_stereo, set_double_bond, set_stereo
from hoodside.molecule.structure import Structure, read_structure

_HIGHEST_ORDER = 3
_SMALLEST_RING, _LARGEST_RING = 3, 8
_BENZO_RING = 6


def attach(structure: Structure, atom: int, group: str, order: int = 1) -> Structure:
    """Put a group in the place of ``order`` hydrogens of an atom.

    Args:
        group: SMILES whose first atom forms the bond and has the hydrogens to give for it.
        order: 1 for a substituent, 2 for one such as oxo.
    """
    need_hydrogens(structure, atom, order)
    added = _group(group)
    need_hydrogens(added, 0, order)
    draft = Draft(structure)
    draft.add_bond(atom, draft.add_copy(added)[0], order)
    return finished(draft)


def _group(source: object) -> Structure:
    if not isinstance(source, str):
        raise refused("The group is no text.", "Give the SMILES of the group.", "group", source)
    try:
        return read_structure(source)
    except StructureError as err:
        err.field = "group"
        raise


def change_element(structure: Structure, atom: int, symbol: str) -> Structure:
    """Make an atom another element, uncharged; hydrogens make up its valence."""
    if symbol not in normal_valences():
        raise refused(
            f"{symbol!r} cannot be put in.",
            f"Choose one of {', '.join(normal_valences())}.",
            "symbol",
            symbol,
        )
    atom_at(structure, atom)
    used = sum(bond.order for bond in structure.bonds_of[atom])
    valence = next((v for v in normal_valences()[symbol] if v >= used), None)
    if valence is None:
        what = f"Atom {atom} has {used} bonds, more than {symbol} can have."
        raise refused(what, "Lower or take out a bond first.", "symbol", symbol)
    draft = Draft(structure)
    draft.set_element(atom, symbol, valence - used)
    return finished(draft)


def set_order(structure: Structure, bond: int, order: int) -> Structure:
    """Give a bond the order 1, 2 or 3; hydrogens make up the difference."""
    changed = bond_at(structure, bond)
    if not 1 <= order <= _HIGHEST_ORDER:
        raise refused(f"A bond cannot have the order {order}.", "Choose 1, 2 or 3.", "order", order)
    if changed.aromatic and order > changed.order:
        raise refused(f"Bond {bond} is aromatic.", "Lower a bond of the ring first.", "bond", bond)
    draft = Draft(structure)
    for end in (changed.a, changed.b):
        need_hydrogens(structure, end, order - changed.order)
        draft.set_mark(end, "")
    draft.set_order(changed.a, changed.b, order)
    return finished(draft)


def join(structure: Structure, a: int, b: int) -> Structure:
    """Join two atoms by a single bond, each giving up a hydrogen."""
    for atom in (a, b):
        need_hydrogens(structure, atom, 1)
    if a == b or structure.bond_between(a, b):
        raise refused(f"Atoms {a} and {b} are joined already.", "Choose two atoms without a bond.", "b", b)
    draft = Draft(structure)
    draft.add_bond(a, b)
    return finished(draft)


def insert(structure: Structure, bond: int, symbol: str) -> Structure:
    """Put one atom (C, N, O, S ...) into a single bond."""
    opened = bond_at(structure, bond)
    valence = normal_valences().get(symbol, (0,))[0]
    if opened.order != 1 or opened.aromatic or valence <= 1:
        what = f"{symbol} cannot be put into bond {bond}."
        raise refused(what, "Choose a single bond that is not aromatic, and C, N, O or S.", "bond", bond)
    draft = Draft(structure)
    new = draft.add_atom(symbol, valence)
    draft.cut_bond(opened.a, opened.b)
    draft.add_bond(opened.a, new)
    draft.add_bond(new, opened.b)
    _renew_marks(draft, structure, {(opened.a, opened.b): new, (opened.b, opened.a): new})
    return finished(draft)


def fuse_ring(structure: Structure, bond: int, size: int, aromatic: bool = False) -> Structure:
    """Build a ring of carbon on a bond; its two atoms give up the hydrogens the new bonds need.

    Args:
        size: atoms in the new ring, the two of the bond counted.
        aromatic: a benzo ring (size 6); a single bond is made double for it.
    """
    base = bond_at(structure, bond)
    if not _SMALLEST_RING <= size <= _LARGEST_RING or (aromatic and size != _BENZO_RING):
        raise refused(f"A ring of {size} cannot be fused.", "Choose 3 to 8 (benzo: 6).", "size", size)
    if aromatic and base.order == 1 and not base.aromatic:
        structure = set_order(structure, bond, 2)
    for end in (base.a, base.b):
        need_hydrogens(structure, end, 1)
    draft = Draft(structure)
    path = [base.a, *(draft.add_atom("C", 4) for _ in range(size - 2)), base.b]
    for step, (near, far) in enumerate(pairwise(path)):
        draft.add_bond(near, far, 2 if aromatic and step % 2 else 1)
    return finished(draft)


def remove(structure: Structure, atom: int) -> Structure:
    """Take an atom out; when the rest falls apart, its largest piece stays."""
    atom_at(structure, atom)
    if len(structure.atoms) == 1:
        raise refused("The last atom cannot be taken out.", "Change its element instead.", "atom", atom)
    draft = Draft(structure)
    draft.remove_atom(atom)
    return largest_piece(draft)


def cut(structure: Structure, bond: int) -> Structure:
    """Take a bond out; when the structure falls apart, its largest piece stays."""
    taken = bond_at(structure, bond)
    draft = Draft(structure)
    draft.cut_bond(taken.a, taken.b)
    return largest_piece(draft)


def _renew_marks(draft: Draft, structure: Structure, replaced: Mapping[tuple[int, int], int]) -> None:
    """Put E/Z marks back that spoke of a neighbour now replaced: (end, old neighbour) -> new one."""
    for bond in structure.bonds:
        if bond.stereo:
            near, far = bond.stereo_atoms
            beside = replaced.get((bond.a, near), near), replaced.get((bond.b, far), far)
            draft.set_double_bond_mark(bond.a, bond.b, bond.stereo, beside)


#: Steps by the name they have on the engine's door.
STEPS: Mapping[str, Callable[..., Structure]] = {
    step.__name__: step
    for step in (
        attach,
        change_element,
        set_order,
        join,
        insert,
        fuse_ring,
        remove,
        cut,
        set_stereo,
        flip_stereo,
        set_double_bond,
        flip_double_bond,
    )
}


def apply(structure: Structure, step: str, arguments: Mapping[str, Any]) -> Structure:
    """Do one step by name.

    Raises: InvalidInputError for an unknown step or arguments it does not take; StructureError as the step.
    """
    if step not in STEPS:
        known = ", ".join(STEPS)
        raise InvalidInputError(
            f"There is no editing step {step!r}.", hint=f"Use one of {known}.", field="step", value=step
        )
    try:
        return STEPS[step](structure, **arguments)
    except TypeError as err:
        raise InvalidInputError(
            f"The step {step!r} cannot be done with these arguments.",
            hint=f"It needs {_signature(step)}.",
            field="arguments",
            value=dict(arguments),
        ) from err


def _signature(step: str) -> str:
    code = STEPS[step].__code__
    return ", ".join(code.co_varnames[1 : code.co_argcount])
