"""Moves in a chemist's words."""

from __future__ import annotations

from hoodside.rivals.graph import Graph
from hoodside.rivals.steps import Step

#: Groups of more atoms than this are called by their formula.
_SPELLED = 5
_ORDERS = {1: "", 2: "=", 3: "#"}


def describe(step: Step) -> str:
    """The move, with what was moved put in."""
    if "{group}" not in step.words:
        return step.words
    old, group = step.atoms[:2]
    return step.words.replace("{group}", group_name(step.site.graph, group, old))


def group_name(graph: Graph, group: int, old: int) -> str:
    """A group as its condensed formula: "OCH3", "C6H5"."""
    atoms = graph.piece(group, old)
    bonds = sum(len(graph.bonds[i]) for i in atoms) - 1  # each twice, and the one to ``old`` once
    if len(atoms) > _SPELLED or bonds // 2 >= len(atoms):
        return _formula(graph, atoms)
    return _condensed(graph, group, old)


def _condensed(graph: Graph, atom: int, origin: int) -> str:
    count = graph.hydrogens[atom]
    text = graph.symbols[atom] + ("" if not count else "H" if count == 1 else f"H{count}")
    beyond = [i for i in graph.bonds[atom] if i != origin]
    for i in beyond:
        branch = _ORDERS[graph.bonds[atom][i]] + _condensed(graph, i, atom)
        text += branch if i == beyond[-1] else f"({branch})"
    return text


def _formula(graph: Graph, atoms: set[int]) -> str:
    counts: dict[str, int] = {"C": 0, "H": sum(graph.hydrogens[i] for i in atoms)}
    for i in sorted(atoms, key=lambda i: graph.symbols[i]):
        counts[graph.symbols[i]] = counts.get(graph.symbols[i], 0) + 1
    return "".join(f"{symbol}{n if n > 1 else ''}" for symbol, n in counts.items() if n)
