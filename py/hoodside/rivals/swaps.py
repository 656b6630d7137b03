"""Analogues of another formula: isoelectronic and isosteric exchanges, for when the formula is not known."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from functools import cache, partial

from hoodside.facts import load_table
from hoodside.molecule.edit_common import normal_valences
from hoodside.rivals.graph import Graph
from hoodside.rivals.site import Site
from hoodside.rivals.steps import Step, steps_from

#: A change: its verb and arguments, whole numbers being places in the pattern.
Change = tuple[str, tuple[str, ...]]
_TWO = 2


@dataclass(frozen=True, slots=True)
class Swap:
    """One kind of exchange: where it may be made, and the changes in order."""

    take: str
    changes: tuple[Change, ...]
    cost: float
    words: str


@cache
def swaps() -> tuple[Swap, ...]:
    """All exchanges (facts table isoelectronic_swaps)."""
    return tuple(
        Swap(row["take"], _changes(row["change"]), float(row["cost"]), row["words"])
        for row in load_table("isoelectronic_swaps")
    )


def _changes(text: str) -> tuple[Change, ...]:
    """ "drop 0; set 1 O" -> (("drop", ("0",)), ("set", ("1", "O")))."""
    parts = [part.split() for part in text.split(";")]
    return tuple((verb, tuple(rest)) for verb, *rest in parts)


@cache
def _patterns() -> tuple[str, ...]:
    return tuple(dict.fromkeys(swap.take for swap in swaps()))


def swaps_from(site: Site) -> list[Step]:
    """All single exchanges in a structure; those alike by symmetry once."""
    matches = site.match_all(_patterns())
    found = []
    for swap in swaps():
        known: set[tuple[int, ...]] = set()
        for atoms in matches[swap.take]:
            kind = site.kind_of(atoms)
            if kind not in known:
                known.add(kind)
                found.append(Step(swap.cost, swap.words, site, atoms, partial(_make, site, swap, atoms)))
    return found


def moves_and_swaps(site: Site) -> list[Step]:
    """Isomer moves and exchanges together, cheapest first."""
    return sorted(steps_from(site) + swaps_from(site), key=lambda step: step.cost)


def _make(site: Site, swap: Swap, atoms: tuple[int, ...]) -> Graph | None:
    graph = site.graph.copy()
    for verb, arguments in swap.changes:
        places = [atoms[int(text)] for text in arguments if text.isdigit()]
        element = next((text for text in arguments if not text.isdigit()), "")
        if not _VERBS[verb](graph, places, element):
            return None
    for atom in reversed(range(len(site.graph.bonds))):
        if site.graph.bonds[atom] and not graph.bonds[atom]:
            graph = graph.without(atom)
    return graph


def _set(graph: Graph, places: list[int], element: str) -> bool:
    """set ATOM ELEMENT: another element, hydrogens to fill its lowest valence."""
    bonds = sum(graph.bonds[places[0]].values())
    valence = next((v for v in normal_valences()[element] if v >= bonds), None)
    if valence is None:
        return False
    graph.set_element(places[0], element, valence - bonds)
    return True


def _drop(graph: Graph, places: list[int], _element: str) -> bool:
    """drop ATOM: out of its chain, the gap closed. A gap bridged already would close a smaller ring."""
    atom = places[0]
    near = list(graph.bonds[atom])
    if len(near) > _TWO or any(graph.bonds[atom][i] != 1 for i in near):
        return False
    if len(near) == _TWO and near[1] in graph.bonds[near[0]]:
        return False
    for i in near:
        graph.change_bond(atom, i, -1)
    return len(near) < _TWO or graph.change_bond(near[0], near[1], 1)


def _insert(graph: Graph, places: list[int], element: str) -> bool:
    """insert A B WHAT: into the single bond between two atoms."""
    if not graph.change_bond(places[0], places[1], -1):
        return False
    new = _INSERTED[element](graph)
    return graph.change_bond(places[0], new, 1) and graph.change_bond(places[1], new, 1)


def _oxo(graph: Graph, places: list[int], _element: str) -> bool:
    """oxo ATOM: an oxygen doubly bonded in place of two hydrogens."""
    return graph.change_bond(places[0], graph.add_atom("O", 2), 2)


def _cut(graph: Graph, places: list[int], _element: str) -> bool:
    """cut A B: hydrogens in place of the terminal atom B."""
    return graph.change_bond(places[0], places[1], -graph.bonds[places[0]][places[1]])


def _drop_carbonyl(graph: Graph, places: list[int], element: str) -> bool:
    """drop_carbonyl C O: a carbonyl group out of its chain."""
    return _cut(graph, places, element) and _drop(graph, places, element)


def _reduce(graph: Graph, places: list[int], _element: str) -> bool:
    """reduce A B: lone pairs in place of the terminal atom B (sulfur comes down in valence)."""
    graph.change_bond(places[0], places[1], -2)
    graph.hydrogens[places[0]] -= 2
    return True


def _sulfonyl(graph: Graph, places: list[int], element: str) -> bool:
    """sulfonyl ATOM: a carbonyl carbon made SO2."""
    graph.set_element(places[0], "S", 2)
    return _oxo(graph, places, element)


def _cyano(graph: Graph, places: list[int], _element: str) -> bool:
    """cyano N O O: a nitro group made CN."""
    nitrogen, oxygen, other = places
    graph.set_element(nitrogen, "C", 0)
    graph.set_element(oxygen, "N", 0)
    graph.bonds[nitrogen][oxygen] = graph.bonds[oxygen][nitrogen] = 3
    del graph.bonds[nitrogen][other]
    graph.bonds[other].clear()
    return True


def _nitro(graph: Graph, places: list[int], _element: str) -> bool:
    """nitro C N: a cyano group made NO2."""
    carbon, nitrogen = places
    graph.set_element(carbon, "N", 0)
    graph.set_element(nitrogen, "O", 0)
    graph.bonds[carbon][nitrogen] = graph.bonds[nitrogen][carbon] = 2
    oxygen = graph.add_atom("O", 0)
    graph.charges[carbon], graph.charges[oxygen] = 1, -1
    graph.bonds[carbon][oxygen] = graph.bonds[oxygen][carbon] = 1
    return True


def _carbonyl(graph: Graph) -> int:
    carbon, oxygen = graph.add_atom("C", 4), graph.add_atom("O", 2)
    graph.change_bond(carbon, oxygen, 2)
    return carbon


def _sulfone(graph: Graph) -> int:
    sulfur = graph.add_atom("S", 6)
    for oxygen in (graph.add_atom("O", 2), graph.add_atom("O", 2)):
        graph.change_bond(sulfur, oxygen, 2)
    return sulfur


_INSERTED: dict[str, Callable[[Graph], int]] = {
    "O": lambda graph: graph.add_atom("O", 2),
    "S": lambda graph: graph.add_atom("S", 2),
    "N": lambda graph: graph.add_atom("N", 3),
    "C": lambda graph: graph.add_atom("C", 4),
    "CO": _carbonyl,
    "SO2": _sulfone,
}
_VERBS: dict[str, Callable[[Graph, list[int], str], bool]] = {
    "set": _set,
    "drop": _drop,
    "drop_carbonyl": _drop_carbonyl,
    "insert": _insert,
    "oxo": _oxo,
    "cut": _cut,
    "reduce": _reduce,
    "sulfonyl": _sulfonyl,
    "cyano": _cyano,
    "nitro": _nitro,
}
