"""A bare, cheap molecular graph for making isomers by the thousand.

Hydrogens are folded into their atoms and make up for every change of a bond, so a change whose bond orders
sum to nothing keeps the formula. That is the bond-and-electron matrix of J. Dugundji and I. Ugi, Top. Curr.
Chem. 1973, 39, 19, with hydrogen as the filler.
"""

from __future__ import annotations

from typing import Literal

from hoodside.molecule.structure import Structure

Mark = Literal["", "cw", "ccw"]
#: (one end, its reference neighbour, other end, its reference neighbour, "cis" or "trans")
Planar = tuple[int, int, int, int, str]
_MOST_ORDER = 3
_SEXTET = [1, 2, 1, 2, 1, 2]


class Graph:
    """Atoms, bonds (kekulised) and stereo marks. Atom numbers are those of the structure it was made of.

    ``bonds[i]`` maps the neighbours of atom i, in the order its mark refers to, to bond orders; a hydrogen
    folded into the atom comes last in that order.
    """

    __slots__ = ("bonds", "charges", "hydrogens", "isotopes", "marks", "planar", "symbols")

    def __init__(self) -> None:
        self.symbols: list[str] = []
        self.hydrogens: list[int] = []
        self.charges: list[int] = []
        self.isotopes: list[int] = []
        self.marks: list[Mark] = []
        self.bonds: list[dict[int, int]] = []
        self.planar: list[Planar] = []

    def copy(self) -> Graph:
        """A graph that can be changed without touching this one."""
        other = Graph()
        other.symbols = self.symbols[:]
        other.hydrogens = self.hydrogens[:]
        other.charges = self.charges[:]
        other.isotopes = self.isotopes[:]
        other.marks = self.marks[:]
        other.bonds = [near.copy() for near in self.bonds]
        other.planar = self.planar[:]
        return other

    def add_atom(self, symbol: str, hydrogens: int) -> int:
        """A new atom, not yet bonded; its number."""
        self.symbols.append(symbol)
        self.hydrogens.append(hydrogens)
        self.charges.append(0)
        self.isotopes.append(0)
        self.marks.append("")
        self.bonds.append({})
        return len(self.symbols) - 1

    def change_bond(self, a: int, b: int, by: int) -> bool:
        """Raise or lower the order of a bond (from or to nothing, too); False when that cannot be.

        Both atoms lose or gain hydrogens to match, and their stereo marks.
        """
        order = self.bonds[a].get(b, 0) + by
        if a == b or not 0 <= order <= _MOST_ORDER or self.hydrogens[a] < by or self.hydrogens[b] < by:
            return False
        for here, there in ((a, b), (b, a)):
            self.hydrogens[here] -= by
            if order:
                self.bonds[here][there] = order
            else:
                del self.bonds[here][there]
            self._forget(here)
        return True

    def hand_over(self, group: int, old: int, new: int) -> bool:
        """Move ``group`` by its single bond from ``old`` to ``new``; it keeps its own stereo marks."""
        if (
            new in (group, old)
            or new in self.bonds[group]
            or self.bonds[group].get(old) != 1
            or not self.hydrogens[new]
        ):
            return False
        self.bonds[group] = {new if near == old else near: o for near, o in self.bonds[group].items()}
        del self.bonds[old][group]
        self.bonds[new][group] = 1
        self.hydrogens[old] += 1
        self.hydrogens[new] -= 1
        self._forget(old)
        self._forget(new)
        self._rename_reference(group, old, new)
        return True

    def exchange_elements(self, a: int, b: int) -> bool:
        """Let two atoms change places in all but their bonds; hydrogens make up for the valences."""
        spare_a = self.hydrogens[a] + self._valence_gap(a, b)
        spare_b = self.hydrogens[b] - self._valence_gap(a, b)
        if spare_a < 0 or spare_b < 0:
            return False
        symbols, charges, isotopes = self.symbols, self.charges, self.isotopes
        symbols[a], symbols[b] = symbols[b], symbols[a]
        charges[a], charges[b] = charges[b], charges[a]
        isotopes[a], isotopes[b] = isotopes[b], isotopes[a]
        self.hydrogens[a], self.hydrogens[b] = spare_a, spare_b
        self._forget(a)
        self._forget(b)
        return True

    def _valence_gap(self, a: int, b: int) -> int:
        """How many more bonds the element of ``b`` makes than that of ``a``."""
        return self.valence(b) - self.valence(a)

    def turn_kekule(self, ring: tuple[int, ...]) -> bool:
        """Draw the double bonds of a six-membered ring the other way; False when they do not alternate."""
        pairs = list(zip(ring, (*ring[1:], ring[0]), strict=True))
        orders = [self.bonds[a][b] for a, b in pairs]
        if len(ring) != len(_SEXTET) or orders not in (_SEXTET, _SEXTET[::-1]):
            return False
        for (a, b), order in zip(pairs, orders, strict=True):
            self.bonds[a][b] = self.bonds[b][a] = 3 - order
        return True

    def valence(self, atom: int) -> int:
        """Sum of bond orders, hydrogens included."""
        return sum(self.bonds[atom].values()) + self.hydrogens[atom]

    def set_element(self, atom: int, symbol: str, hydrogens: int) -> None:
        """Make an atom another element, uncharged."""
        self.symbols[atom], self.hydrogens[atom] = symbol, hydrogens
        self.charges[atom] = self.isotopes[atom] = 0
        self._forget(atom)

    def without(self, gone: int) -> Graph:
        """A graph without one atom, whose bonds must have been cut; atoms after it move up by one."""

        def moved(atom: int) -> int:
            return atom - (atom > gone)

        other = self.copy()
        for column in (
            other.symbols,
            other.hydrogens,
            other.charges,
            other.isotopes,
            other.marks,
            other.bonds,
        ):
            del column[gone]
        other.bonds = [{moved(i): order for i, order in near.items()} for near in other.bonds]
        other.planar = [(moved(a), moved(x), moved(b), moved(y), m) for a, x, b, y, m in other.planar]
        return other

    def piece(self, start: int, without: int = -1) -> set[int]:
        """Atoms connected to ``start``, not passing through ``without``."""
        found, queue = {start}, [start]
        for atom in queue:
            for near in self.bonds[atom]:
                if near != without and near not in found:
                    found.add(near)
                    queue.append(near)
        return found

    def _forget(self, atom: int) -> None:
        self.marks[atom] = ""
        if self.planar:
            self.planar = [unit for unit in self.planar if atom not in (unit[0], unit[2])]

    def _rename_reference(self, group: int, old: int, new: int) -> None:
        def renamed(unit: Planar) -> Planar:
            a, near_a, b, near_b, mark = unit
            return (
                a,
                new if (a, near_a) == (group, old) else near_a,
                b,
                new if (b, near_b) == (group, old) else near_b,
                mark,
            )

        if self.planar:
            self.planar = [renamed(unit) for unit in self.planar]


def graph_of(structure: Structure) -> Graph:
    """The graph of a structure."""
    graph = Graph()
    graph.symbols = [atom.symbol for atom in structure.atoms]
    graph.hydrogens = [atom.hydrogens for atom in structure.atoms]
    graph.charges = [atom.charge for atom in structure.atoms]
    graph.isotopes = [atom.isotope for atom in structure.atoms]
    graph.marks = [atom.stereo if atom.stereo in ("cw", "ccw") else "" for atom in structure.atoms]  # type: ignore[misc]
    graph.bonds = [{b.other(i): b.order for b in near} for i, near in enumerate(structure.bonds_of)]
    for bond in structure.bonds:
        if bond.stereo:
            near, far = bond.stereo_atoms
            near, far = (near, far) if near in graph.bonds[bond.a] and near != bond.b else (far, near)
            graph.planar.append((bond.a, near, bond.b, far, bond.stereo))
    return graph
