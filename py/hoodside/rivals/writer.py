"""Writes a graph as SMILES (OpenSMILES specification 1.0, 2016): read alike by both kernels."""

from __future__ import annotations

from hoodside.molecule.edit_common import normal_valences
from hoodside.rivals.graph import Graph

_BARE = frozenset({"B", "C", "N", "O", "P", "S", "F", "Cl", "Br", "I"})
_ORDER = {1: "", 2: "=", 3: "#"}
_TURNED = {"cw": ("@@", "@"), "ccw": ("@", "@@")}


def write_smiles(graph: Graph) -> str:
    """The graph as SMILES, kekulised, stereo marks kept."""
    return _Writer(graph).text()


class _Writer:
    """One depth-first walk to find the ring closures, a second to write."""

    def __init__(self, graph: Graph) -> None:
        self.graph = graph
        size = len(graph.symbols)
        self.children: list[list[int]] = [[] for _ in range(size)]
        self.closures: list[list[tuple[int, int]]] = [[] for _ in range(size)]
        self.parent = [-1] * size
        self.place = [-1] * size
        self.rings = 0
        self.slants = _slants(graph) if graph.planar else {}

    def text(self) -> str:
        parts, count = [], 0
        for atom in range(len(self.graph.symbols)):
            if self.place[atom] < 0:
                count = self._walk(atom, count)
                out: list[str] = []
                self._write(atom, out)
                parts.append("".join(out))
        return ".".join(parts)

    def _walk(self, start: int, count: int) -> int:
        self.place[start] = count
        stack = [(start, iter(self.graph.bonds[start]))]
        while stack:
            atom, left = stack[-1]
            near = next(left, None)
            if near is None:
                stack.pop()
            elif self.place[near] < 0:
                count += 1
                self.place[near] = count
                self.parent[near] = atom
                self.children[atom].append(near)
                stack.append((near, iter(self.graph.bonds[near])))
            elif near != self.parent[atom] and self.place[near] < self.place[atom]:
                self.rings += 1
                self.closures[near].append((self.rings, atom))
                self.closures[atom].append((self.rings, near))
        return count + 1

    def _write(self, atom: int, out: list[str]) -> None:
        out.append(self._atom(atom))
        for ring, partner in self.closures[atom]:
            if self.place[partner] > self.place[atom]:
                out.append(self._bond(atom, partner))
            out.append(str(ring) if ring < 10 else f"%{ring}")
        branches = self.children[atom]
        for child in branches:
            last = child == branches[-1]
            out.append(self._bond(atom, child) if last else "(" + self._bond(atom, child))
            self._write(child, out)
            if not last:
                out.append(")")

    def _bond(self, a: int, b: int) -> str:
        slant = self.slants.get((a, b)) if self.slants else None
        if slant:
            return "/" if slant > 0 else "\\"
        return _ORDER[self.graph.bonds[a][b]]

    def _atom(self, atom: int) -> str:
        graph = self.graph
        symbol, charge, isotope = graph.symbols[atom], graph.charges[atom], graph.isotopes[atom]
        mark = graph.marks[atom]
        if not (mark or charge or isotope) and symbol in _BARE and self._usual(atom):
            return symbol
        count = graph.hydrogens[atom]
        hydrogens = "" if not count else "H" if count == 1 else f"H{count}"
        sign = "" if not charge else f"{charge:+d}"
        turned = self._turned(atom) if mark else ""
        return f"[{isotope or ''}{symbol}{turned}{hydrogens}{sign}]"

    def _usual(self, atom: int) -> bool:
        bonds = sum(self.graph.bonds[atom].values())
        for valence in normal_valences()[self.graph.symbols[atom]]:
            if valence >= bonds:
                return valence - bonds == self.graph.hydrogens[atom]
        return False

    def _turned(self, atom: int) -> str:
        """The mark for the order in which the neighbours are written."""
        stored = list(self.graph.bonds[atom])
        written = [] if self.parent[atom] < 0 else [self.parent[atom]]
        if self.graph.hydrogens[atom]:
            stored.append(-1)
            written.append(-1)
        written += [partner for _, partner in self.closures[atom]] + self.children[atom]
        return _TURNED[self.graph.marks[atom]][_is_odd([stored.index(i) for i in written])]


def _is_odd(order: list[int]) -> bool:
    swaps = sum(a > b for i, a in enumerate(order) for b in order[i + 1 :])
    return bool(swaps % 2)


def _slants(graph: Graph) -> dict[tuple[int, int], int]:
    """Direction of each single bond beside a marked double bond: +1 when it rises from first to second atom.

    Neighbouring units share bonds, so each is settled from what an earlier one has fixed.
    """
    slants: dict[tuple[int, int], int] = {}
    waiting = list(graph.planar)
    while waiting:
        unit = next((u for u in waiting if _known(u, slants)), waiting[0])
        waiting.remove(unit)
        _settle(graph, unit, slants)
    return slants


def _known(unit: tuple[int, int, int, int, str], slants: dict[tuple[int, int], int]) -> bool:
    return any(unit[0] in ends or unit[2] in ends for ends in slants)


def _settle(graph: Graph, unit: tuple[int, int, int, int, str], slants: dict[tuple[int, int], int]) -> None:
    a, near, b, far, mark = unit
    rise, other = _rise(graph, slants, (a, near, b)), _rise(graph, slants, (b, far, a))
    wanted = -1 if mark == "trans" else 1
    if rise is None:
        rise = 1 if other is None else wanted * other
        _incline(graph, slants, (a, near, b), rise)
    if other is None:
        _incline(graph, slants, (b, far, a), wanted * rise)


def _rise(graph: Graph, slants: dict[tuple[int, int], int], end: tuple[int, int, int]) -> int | None:
    """Whether the reference neighbour lies above its end (+1) or below (-1), if that is fixed already."""
    atom, reference, beyond = end
    for near in graph.bonds[atom]:
        if near != beyond and (atom, near) in slants:
            return slants[atom, near] if near == reference else -slants[atom, near]
    return None


def _incline(graph: Graph, slants: dict[tuple[int, int], int], end: tuple[int, int, int], rise: int) -> None:
    """Fix both single bonds at one end of a double bond: (end, reference neighbour, far end)."""
    atom, reference, beyond = end
    for near in graph.bonds[atom]:
        if near != beyond:
            up = rise if near == reference else -rise
            slants[atom, near] = up
            slants[near, atom] = -up
