"""All isomers of a small formula."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.errors import FormulaError, StructureError
from hoodside.facts import load_table
from hoodside.molecule.kernel import kernel
from hoodside.predict.formula import Formula, parse_formula
from hoodside.rivals.enumeration.multigraphs import Multigraph, TooMany, multigraphs
from hoodside.rivals.enumeration.units import Unit, divisions, units
from hoodside.rivals.graph import Graph
from hoodside.rivals.writer import write_smiles

#: The highest bond order there is.
TRIPLE = 3
#: Graphs at one stage beyond which a formula is not small any more.
MOST = 3_000


@dataclass(frozen=True, slots=True)
class Enumeration:
    """Isomers as canonical SMILES without stereo marks. ``complete``: none is missing."""

    smiles: tuple[str, ...]
    complete: bool


def enumerate_isomers(
    formula: Formula | str, *, sensible: bool = False, charged_groups: bool = True, most: int = MOST
) -> Enumeration:
    """Constitutional isomers of a neutral formula.

    Valences are the usual ones (facts table isomer_units). Not complete when a stage of the search would
    hold more than ``most`` graphs.

    Args:
        sensible: leave out bonds that are never put up, such as O-O (facts table held_back_bonds).
        charged_groups: with nitro, isonitrile, azide, sulfinyl, sulfonyl and phosphoryl groups too.
    Raises: FormulaError when no molecule of these valences has that formula.
    """
    counts = _counts(formula)
    found: dict[str, None] = {}
    most_order = sensible_order if sensible else _any_order
    for division in divisions({s: n for s, n in counts.items() if s != "H"}):
        if not charged_groups and any(len(unit.atoms) > 1 for unit, _ in division):
            continue
        try:
            for smiles in _of_division(division, counts.get("H", 0), most_order, most):
                found[smiles] = None
        except TooMany:
            return Enumeration(tuple(found), False)
    return Enumeration(tuple(found), True)


def _counts(formula: Formula | str) -> dict[str, int]:
    parsed = parse_formula(formula) if isinstance(formula, str) else formula
    known = {symbol for unit in units() for symbol in unit.composition}
    strange = [s for s in parsed.elements if s != "H" and s not in known]
    if strange or parsed.charge or not set(parsed.elements) - {"H"}:
        raise FormulaError(
            f"Isomers of {parsed.text} cannot be enumerated.",
            hint=f"Give a neutral formula with C, N, O or the like; known are H, {', '.join(sorted(known))}.",
            value=parsed.text,
        )
    return dict(parsed.elements)


def _of_division(
    division: tuple[tuple[Unit, int], ...],
    hydrogens: int,
    most_order: Callable[[Unit, Unit], int],
    most: int,
) -> Iterator[str]:
    kinds = [unit for unit, _ in division]
    size = sum(count for _, count in division)
    free = sum(unit.valence * count for unit, count in division)
    spare = free - 2 * (size - 1) - hydrogens
    if spare < 0 or spare % 2:
        return
    found = multigraphs(
        [unit.valence for unit in kinds],
        [count for _, count in division],
        spare // 2,
        lambda a, b: most_order(kinds[a], kinds[b]),
        most,
    )
    for graph in found:
        try:
            yield kernel().smiles(write_smiles(_graph(graph, kinds)))
        except StructureError:
            continue


def _graph(found: Multigraph, kinds: list[Unit]) -> Graph:
    graph = Graph()
    heads = [kinds[k].build(graph, free) for k, free in zip(found.kinds, found.free, strict=True)]
    for i, row in enumerate(found.rows):
        for j, order in row.items():
            graph.bonds[heads[i]][heads[j]] = order
    return graph


def _any_order(_a: Unit, _b: Unit) -> int:
    return TRIPLE


def sensible_order(a: Unit, b: Unit) -> int:
    """The highest order of a bond between two units; 0 for what is held back (held_back_bonds)."""
    return 0 if frozenset((a.name, b.name)) in _barred() else TRIPLE


@cache
def _barred() -> frozenset[frozenset[str]]:
    return frozenset(frozenset((row["one"], row["other"])) for row in load_table("held_back_bonds"))
