"""Random sequences of editing steps, one per seed, that come out the same wherever they are run."""

from __future__ import annotations

import math
import random
from typing import Any

from hoodside.errors import HoodsideError
from hoodside.facts import load_table
from hoodside.molecule import Structure, read_structure
from hoodside.molecule.drawing import draw
from hoodside.molecule.edit import apply
from hoodside.molecule.edit_options import Option, options_at
from hoodside.molecule.edit_stereo import labels

#: Besides the tiles: configurations set and open, charges, bridges and triple bonds to begin from.
FURTHER_STARTS = (
    "C/C=C/C(=O)O",
    "CC=CCC",
    "C[C@H](N)C(=O)OC",
    "C[C@@H]1CCCC[C@H]1O",
    "OC1CC2CCC1C2",
    "CC#CC",
    "O=[N+]([O-])c1cccnc1",
    "CS(=O)CCl",
    "COP(=O)(OC)C=C",
)
LEAST_STEPS, MOST_STEPS = 3, 8
#: How often a kind of step is taken where it is offered (1 where not told): structures grow rather than fall
#: apart, and configurations are set where they can be.
_WEIGHTS = {"attach": 4, "fuse_ring": 2, "join": 2, "set_order": 2, "set_stereo": 9, "set_double_bond": 9}
#: One sequence in so many is drawn as well.
DRAWN_EVERY = 25
_WIDTH, _HEIGHT = 360, 300


def walked(first: int, count: int) -> list[dict[str, Any]]:
    """What came of the sequences with the seeds from ``first`` on."""
    return [_walked(seed) for seed in range(first, first + count)]


def _walked(seed: int) -> dict[str, Any]:
    """Steps with the SMILES they led to (or why they were refused), labels at the end, what undo lost."""
    draw_lots = random.Random(seed)
    states = [read_structure(_pick(draw_lots, _starts()))]
    done: list[tuple[str, dict[str, Any]]] = []
    told: list[list[str]] = []
    for _ in range(draw_lots.randint(LEAST_STEPS, MOST_STEPS)):
        step, arguments = _next_step(draw_lots, states[-1])
        try:
            states.append(apply(states[-1], step, arguments))
        except HoodsideError as err:
            told.append([step, err.code, str(err)])
            continue
        done.append((step, arguments))
        told.append([step, states[-1].smiles])
    return {
        "start": states[0].smiles,
        "steps": told,
        "formula": states[-1].element_counts,
        "labels": [sorted(found.items()) for found in labels(states[-1])],
        "undo": _lost_by_undo(states, done),
        "drawing": _fault_of_drawing(states[-1]) if seed % DRAWN_EVERY == 0 else "",
    }


def _starts() -> list[str]:
    return [*(row["smiles"] for row in load_table("starting_tiles")), *FURTHER_STARTS]


def _next_step(draw_lots: random.Random, now: Structure) -> tuple[str, dict[str, Any]]:
    """One of the kinds of step offered at a random place, then one of that kind: groups are not all."""
    at = int(draw_lots.random() * (len(now.atoms) + len(now.bonds)))
    place = {"atom": at} if at < len(now.atoms) else {"bond": at - len(now.atoms)}
    offered = options_at(now, **place)
    kinds = sorted({option.step for option in offered})
    kind = _pick(draw_lots, [kind for kind in kinds for _ in range(_WEIGHTS.get(kind, 1))])
    option: Option = _pick(draw_lots, [o for o in offered if o.step == kind])
    if not option.needs_atom:
        return option.step, option.arguments
    others = [atom.index for atom in now.atoms if atom.index != option.arguments["a"]]
    return option.step, {**option.arguments, "b": _pick(draw_lots, others or [0])}


def _pick(draw_lots: random.Random, among: list[Any]) -> Any:
    return among[int(draw_lots.random() * len(among))]


def _lost_by_undo(states: list[Structure], done: list[tuple[str, dict[str, Any]]]) -> list[str]:
    """Going back step by step as the app does (by the sources it keeps), and each time forward again."""
    lost = []
    for at in range(len(states) - 1, 0, -1):
        before, after = states[at - 1], states[at]
        back = read_structure(before.source)
        if _identity(back) != _identity(before):
            lost.append(f"undo of step {at}: {before.smiles} came back as {back.smiles}")
        again = apply(back, *done[at - 1])
        if _identity(again) != _identity(after):
            lost.append(f"redo of step {at}: {after.smiles} came out as {again.smiles}")
    return lost


def _identity(structure: Structure) -> tuple[Any, ...]:
    return structure.source, structure.smiles, structure.atoms, structure.bonds


def _fault_of_drawing(structure: Structure) -> str:
    """Why a drawing cannot be touched; "" when every atom has a place of its own inside it."""
    places = draw(structure, _WIDTH, _HEIGHT).coords
    if len(places) != len(structure.atoms):
        return f"{len(places)} places for {len(structure.atoms)} atoms of {structure.smiles}"
    if not all(0 <= x <= _WIDTH and 0 <= y <= _HEIGHT for x, y in places):
        return f"atoms outside the drawing of {structure.smiles}"
    apart = (math.dist(a, b) for i, a in enumerate(places) for b in places[:i])
    return (
        "" if min(apart, default=1.0) > 0 else f"two atoms at one place in the drawing of {structure.smiles}"
    )
