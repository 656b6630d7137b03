"""Stereoisomers: of the intended structure, and of double bonds that a move has made."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import combinations

from hoodside.molecule.kernel import kernel
from hoodside.rivals.graph import Graph, Mark
from hoodside.rivals.writer import write_smiles

_TURNED: dict[Mark, Mark] = {"cw": "ccw", "ccw": "cw", "": ""}
_OTHER = {"cis": "trans", "trans": "cis"}
#: Stereounits turned over together; beyond that a compound has more diastereomers than are worth showing.
_MOST_TURNED = 3
_CIS_RING = 7
_DOUBLE = 2
_LIGANDS = 4
_SIDES: tuple[Mark, Mark] = ("cw", "ccw")
#: Bonds out from a double bond over which its ligands are compared.
_SKETCHED = 3


def diastereomers(graph: Graph) -> Iterator[tuple[int, Graph]]:
    """Graphs with some of the marked units turned over, fewest first, with their number."""
    centres = [i for i, mark in enumerate(graph.marks) if mark]
    units = [("centre", i) for i in centres] + [("bond", i) for i in range(len(graph.planar))]
    for count in range(1, _MOST_TURNED + 1):
        for chosen in combinations(units, count):
            other = graph.copy()
            for kind, i in chosen:
                if kind == "centre":
                    other.marks[i] = _TURNED[other.marks[i]]
                else:
                    a, near, b, far, mark = other.planar[i]
                    other.planar[i] = (a, near, b, far, _OTHER[mark])
            yield count, other


def stereoisomers(graph: Graph) -> tuple[str, ...]:
    """Every stereoisomer of a constitution as canonical SMILES, mirror images apart.

    What is marked already stays. Every carbon that might be a centre is tried both ways; the kernel drops the
    marks of those that are none.
    """
    forms = [graph]
    for a, b in _open_bonds(graph):
        forms = [_marked(form, a, b, mark) for form in forms for mark in _OTHER]
    for centre in _possible_centres(graph):
        forms = [_with_mark(form, centre, mark) for form in forms for mark in _SIDES]
    return tuple(sorted({kernel().smiles(write_smiles(form)) for form in forms}))


def _possible_centres(graph: Graph) -> list[int]:
    return [
        i
        for i, near in enumerate(graph.bonds)
        if graph.symbols[i] == "C"
        and not graph.marks[i]
        and len(near) + graph.hydrogens[i] == _LIGANDS
        and graph.hydrogens[i] <= 1
    ]


def _with_mark(graph: Graph, centre: int, mark: Mark) -> Graph:
    other = graph.copy()
    other.marks[centre] = mark
    return other


def double_bond_forms(graph: Graph, parent: Graph | None = None) -> list[tuple[int, Graph]]:
    """The graph with each C=C bond that is new, or has lost its mark, as E and as Z.

    Each form comes with its number of Z bonds. Bonds left open in the parent stay open.
    """
    forms = [(0, graph)]
    for a, b in _open_bonds(graph, parent):
        forms = [(z + (mark == "cis"), _marked(form, a, b, mark)) for z, form in forms for mark in _OTHER]
    return forms


def _open_bonds(graph: Graph, parent: Graph | None = None) -> list[tuple[int, int]]:
    """C=C bonds that may be E or Z and bear no mark; with a parent, only those it has not left open."""
    marked = {(u[0], u[2]) for u in graph.planar} | {(u[2], u[0]) for u in graph.planar}
    once = {(u[0], u[2]) for u in parent.planar} if parent else set()
    return [
        (a, b)
        for a, near in enumerate(graph.bonds)
        for b, order in near.items()
        if a < b
        and order == _DOUBLE
        and (parent is None or parent.bonds[a].get(b) != _DOUBLE or (a, b) in once or (b, a) in once)
        and (a, b) not in marked
        and (graph.symbols[a] == graph.symbols[b] == "C" or (a, b) in once or (b, a) in once)
        and _two_sided(graph, a, b)
        and _two_sided(graph, b, a)
        and not _in_small_ring(graph, a, b)
    ]


def _two_sided(graph: Graph, end: int, other: int) -> bool:
    """Whether the end carries two different ligands, as far as its nearest atoms tell."""
    ligands = [i for i in graph.bonds[end] if i != other]
    if not ligands or any(graph.bonds[end][i] != 1 for i in ligands):
        return False
    return len(ligands) == 1 or _sketch(graph, ligands[0], end) != _sketch(graph, ligands[1], end)


def _sketch(graph: Graph, atom: int, origin: int, depth: int = _SKETCHED) -> str:
    near = (
        sorted(_sketch(graph, i, atom, depth - 1) for i in graph.bonds[atom] if i != origin) if depth else []
    )
    return f"{graph.symbols[atom]}{graph.hydrogens[atom]}({','.join(near)})"


def _in_small_ring(graph: Graph, a: int, b: int) -> bool:
    shell, seen = {a}, {a}
    for _ in range(_CIS_RING - 1):
        shell = {j for i in shell for j in graph.bonds[i] if {i, j} != {a, b}} - seen
        if b in shell:
            return True
        seen |= shell
    return False


def _marked(graph: Graph, a: int, b: int, mark: str) -> Graph:
    """The double bond marked by its heavier ligands, so that "trans" is E for the plainest cases."""
    other = graph.copy()
    near, far = _heavier(graph, a, b), _heavier(graph, b, a)
    other.planar.append((a, near, b, far, mark))
    return other


def _heavier(graph: Graph, end: int, other: int) -> int:
    return max((i for i in graph.bonds[end] if i != other), key=lambda i: (len(graph.piece(i, end)), -i))
