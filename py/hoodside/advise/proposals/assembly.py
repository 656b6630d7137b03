"""Complete structures put together from fragments and the atoms that are left over."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import permutations, product

from hoodside.errors import StructureError
from hoodside.molecule.kernel import kernel
from hoodside.molecule.structure import read_structure
from hoodside.predict.formula import Formula
from hoodside.rivals.enumeration.isomers import sensible_order
from hoodside.rivals.enumeration.multigraphs import Multigraph, multigraphs
from hoodside.rivals.enumeration.units import Unit, divisions
from hoodside.rivals.graph import Graph, graph_of
from hoodside.rivals.writer import write_smiles


@dataclass(frozen=True, slots=True)
class Part:
    """A fragment as a vertex: its hydride as a graph, and the atoms that bear an open end."""

    graph: Graph
    ports: tuple[int, ...]


def part_of(unit: str, ports: tuple[int, ...]) -> Part:
    """A part from its hydride as SMILES and the atoms with an open end."""
    return Part(graph_of(read_structure(unit)), ports)


def elements_of(part: Part) -> dict[str, int]:
    """Element -> number of atoms, without the hydrogens at open ends."""
    counts: dict[str, int] = {"H": sum(part.graph.hydrogens) - len(part.ports)}
    for symbol in part.graph.symbols:
        counts[symbol] = counts.get(symbol, 0) + 1
    return counts


def assemble(formula: Formula, parts: Sequence[tuple[Part, int]], most: int) -> Iterator[str]:
    """Canonical SMILES (with repeats) of all structures of the formula made of the parts and single atoms.

    Raises: TooMany when a stage of the search holds more than ``most`` graphs.
    """
    left = dict(formula.elements)
    for part, times in parts:
        for symbol, count in elements_of(part).items():
            left[symbol] = left.get(symbol, 0) - times * count
    if any(count < 0 for count in left.values()):
        return
    for division in divisions({s: n for s, n in left.items() if s != "H"}):
        yield from _of_division(parts, division, left.get("H", 0), most)


def _of_division(
    parts: Sequence[tuple[Part, int]], division: tuple[tuple[Unit, int], ...], hydrogens: int, most: int
) -> Iterator[str]:
    kinds: list[Part | Unit] = [part for part, _ in parts] + [unit for unit, _ in division]
    counts = [times for _, times in parts] + [count for _, count in division]
    valences = [len(kind.ports) if isinstance(kind, Part) else kind.valence for kind in kinds]
    free = sum(v * n for v, n in zip(valences, counts, strict=True))
    spare = free - 2 * (sum(counts) - 1) - hydrogens
    if spare < 0 or spare % 2:
        return
    for graph in multigraphs(valences, counts, spare // 2, lambda a, b: _order(kinds[a], kinds[b]), most):
        if all(
            not open_ or isinstance(kinds[k], Unit) for k, open_ in zip(graph.kinds, graph.free, strict=True)
        ):
            yield from _written(graph, kinds)


def _order(a: Part | Unit, b: Part | Unit) -> int:
    """Fragments have single open ends."""
    return sensible_order(a, b) if isinstance(a, Unit) and isinstance(b, Unit) else 1


def _written(found: Multigraph, kinds: list[Part | Unit]) -> Iterator[str]:
    """Every way to share out the open ends of the fragments among their neighbours."""
    choices = []
    for i, kind in enumerate(found.kinds):
        unit = kinds[kind]
        shares = set(permutations(unit.ports)) if isinstance(unit, Part) else {()}
        choices.append([dict(zip(found.rows[i], share, strict=False)) for share in sorted(shares)])
    for chosen in product(*choices):
        try:
            yield kernel().smiles(write_smiles(_graph(found, kinds, chosen)))
        except StructureError:
            continue


def _graph(found: Multigraph, kinds: list[Part | Unit], ends: tuple[dict[int, int], ...]) -> Graph:
    graph = Graph()
    starts = []
    for kind, free in zip(found.kinds, found.free, strict=True):
        unit = kinds[kind]
        starts.append(unit.build(graph, free) if isinstance(unit, Unit) else _put(graph, unit))
    for i, row in enumerate(found.rows):
        for j, order in row.items():
            a, b = starts[i] + ends[i].get(j, 0), starts[j] + ends[j].get(i, 0)
            graph.bonds[a][b] = order
    return graph


def _put(graph: Graph, part: Part) -> int:
    """Add a fragment, its open ends without their hydrogens; the number of its first atom."""
    start = len(graph.symbols)
    for i, symbol in enumerate(part.graph.symbols):
        atom = graph.add_atom(symbol, part.graph.hydrogens[i] - part.ports.count(i))
        graph.charges[atom] = part.graph.charges[i]
        graph.bonds[atom] = {start + j: order for j, order in part.graph.bonds[i].items()}
    return start
