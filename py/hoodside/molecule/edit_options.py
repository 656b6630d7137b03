"""What can be done at a touched atom or bond, most likely first."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field
from functools import cache
from typing import Any

from hoodside.errors import InvalidInputError
from hoodside.facts.table import Row, load_table
from hoodside.molecule.edit_common import atom_at, bond_at, normal_valences
from hoodside.molecule.edit_stereo import bond_labels, centre_labels, is_stereobond, is_stereocentre
from hoodside.molecule.structure import Atom, Bond, Structure

#: Elements offered in exchange, in the order they are usually wanted (common practice).
_ELEMENTS = ("N", "O", "C", "S", "F", "Cl", "Br", "I", "Si", "P", "B")
_INSERTED = ("C", "O", "N", "S")
_RING_NAMES = {6: "six-ring", 5: "five-ring", 3: "three-ring", 4: "four-ring", 7: "seven-ring"}
_ORDER_NAMES = {1: "single bond", 2: "double bond", 3: "triple bond"}


@dataclass(frozen=True, slots=True)
class Option:
    """One thing that can be done.

    Attributes:
        label: for a chip ("OCH3", "double bond", "remove").
        name: in full words.
        step, arguments: what to give to ``edit.apply``.
        needs_atom: True when a second atom has to be touched first (its number goes in as "b").
    """

    label: str
    name: str
    step: str
    arguments: dict[str, Any] = field(default_factory=dict)
    needs_atom: bool = False


def options_at(
    structure: Structure, *, atom: int | None = None, bond: int | None = None
) -> tuple[Option, ...]:
    """Everything that can be done at one atom or one bond, most likely first.

    Raises: InvalidInputError unless exactly one of the two is given; StructureError when it is not there.
    """
    if (atom is None) == (bond is None):
        raise InvalidInputError("Touch one atom or one bond.", hint="Give either atom or bond.", field="atom")
    if atom is not None:
        return tuple(_at_atom(structure, atom_at(structure, atom)))
    return tuple(_at_bond(structure, bond_at(structure, bond if bond is not None else -1)))


def _at_atom(structure: Structure, atom: Atom) -> Iterator[Option]:
    yield from _configurations(structure, atom)
    yield from _groups(atom)
    yield from _elements(structure, atom)
    if atom.hydrogens:
        yield Option("join", "join to another atom", "join", {"a": atom.index}, needs_atom=True)
    if len(structure.atoms) > 1:
        yield Option("remove", "take the atom out", "remove", {"atom": atom.index})


def _configurations(structure: Structure, atom: Atom) -> Iterator[Option]:
    if (
        atom.aromatic
        or len(structure.neighbours[atom.index]) <= 2
        or not is_stereocentre(structure, atom.index)
    ):
        return
    now = centre_labels(structure).get(atom.index, "")
    for label in ("R", "S", ""):
        if label != now.upper():
            name = f"make it {label}" if label else "leave the configuration open"
            yield Option(label or "open", name, "set_stereo", {"atom": atom.index, "label": label})


def _groups(atom: Atom) -> Iterator[Option]:
    column = "rank_on_aromatic" if atom.aromatic else "rank_on_carbon" if atom.z == 6 else "rank_on_hetero"
    for row in _ranked_groups(column):
        order = int(row["order"])
        if atom.hydrogens >= order:
            arguments = {"atom": atom.index, "group": row["smiles"], "order": order}
            yield Option(row["label"], row["name"], "attach", arguments)


@cache
def _ranked_groups(column: str) -> tuple[Row, ...]:
    rows = [row for row in load_table("attachable_groups") if row[column]]
    return tuple(sorted(rows, key=lambda row: float(row[column])))


def _elements(structure: Structure, atom: Atom) -> Iterator[Option]:
    used = sum(bond.order for bond in structure.bonds_of[atom.index])
    for symbol in _ELEMENTS:
        if (
            symbol != atom.symbol
            and max(normal_valences()[symbol]) >= used
            and not (atom.aromatic and symbol in "OS")
        ):
            yield Option(
                symbol, f"make it {symbol}", "change_element", {"atom": atom.index, "symbol": symbol}
            )


def _at_bond(structure: Structure, bond: Bond) -> Iterator[Option]:
    yield from _orders(structure, bond)
    if is_stereobond(structure, bond.index):
        now = bond_labels(structure).get(bond.index, "")
        for label in ("E", "Z", ""):
            if label != now:
                name = f"make it {label}" if label else "leave E or Z open"
                yield Option(label or "open", name, "set_double_bond", {"bond": bond.index, "label": label})
    yield from _rings(structure, bond)
    if bond.order == 1 and not bond.aromatic:
        for symbol in _INSERTED:
            yield Option(
                f"+{symbol}", f"put {symbol} in between", "insert", {"bond": bond.index, "symbol": symbol}
            )
    yield Option("cut", "take the bond out", "cut", {"bond": bond.index})


def _orders(structure: Structure, bond: Bond) -> Iterator[Option]:
    spare = _spare(structure, bond)
    for order, name in _ORDER_NAMES.items():
        reachable = order < bond.order or (order - bond.order <= spare and not bond.aromatic)
        if order != bond.order and reachable:
            yield Option(name, f"make it a {name}", "set_order", {"bond": bond.index, "order": order})


def _rings(structure: Structure, bond: Bond) -> Iterator[Option]:
    spare = _spare(structure, bond)
    if spare < 1 or bond.order == 3:
        return
    if bond.aromatic or spare > 1 or bond.order == 2:
        arguments = {"bond": bond.index, "size": 6, "aromatic": True}
        yield Option("benzo", "fuse a benzene ring", "fuse_ring", arguments)
    for size, name in _RING_NAMES.items():
        yield Option(name, f"fuse a {name} of carbon", "fuse_ring", {"bond": bond.index, "size": size})


def _spare(structure: Structure, bond: Bond) -> int:
    """Hydrogens that both ends can give."""
    return min(structure.atoms[bond.a].hydrogens, structure.atoms[bond.b].hydrogens)
