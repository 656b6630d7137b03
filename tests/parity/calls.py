"""Calls that parity tests make on both sides: plain Python, JSON in and JSON out."""

from __future__ import annotations

import importlib
import json
import time
from collections.abc import Callable
from typing import Any

from hoodside.errors import HoodsideError
from hoodside.molecule import read_structure
from hoodside.molecule.drawing import draw
from hoodside.molecule.kernel import kernel
from hoodside.molecule.symmetry import atom_classes, constitutional_classes, hydrogen_sets


def answer_all(calls: str) -> str:
    """Answers to a JSON list of calls [function, argument, ...], as a JSON list."""
    return json.dumps([_answer(*call) for call in json.loads(calls)])


def _answer(function: str, *arguments: Any) -> dict[str, Any]:
    try:
        return {"ok": _found(function)(*arguments)}
    except HoodsideError as err:
        return {"error": err.code, "message": str(err), "hint": err.hint}


def _found(function: str) -> Callable[..., Any]:
    module, _, name = function.rpartition(".")
    return globals()[name] if module == "calls" else getattr(importlib.import_module(module), name)


def describe(source: str) -> dict[str, Any]:
    """Everything the kernels say of a structure that does not depend on layout."""
    structure = read_structure(source)
    return {
        "smiles": structure.smiles,
        "inchikey": structure.inchikey,
        "formula": structure.element_counts,
        "atoms": [[a.symbol, a.hydrogens, a.charge, a.aromatic, a.stereo, a.cip] for a in structure.atoms],
        "bonds": [[b.a, b.b, b.order, b.aromatic, b.stereo, b.stereo_atoms] for b in structure.bonds],
        "rings": [sorted(ring) for ring in structure.rings],
    }


def symmetry(source: str) -> list[Any]:
    """Classes of atoms and sets of hydrogens."""
    structure = read_structure(source)
    sets = [[s.atoms, s.n, s.relation, s.slot] for s in hydrogen_sets(structure)]
    return [constitutional_classes(structure), atom_classes(structure), sets]


def matches(source: str, patterns: list[str], unique: bool = True) -> list[Any]:
    """Matches of many patterns."""
    return read_structure(source).match_all(patterns, unique)


def stereo_labels(source: str) -> list[Any]:
    """CIP labels of atoms and double bonds."""
    atoms, bonds = kernel().stereo_labels(source)
    return [sorted(atoms.items()), sorted(bonds.items())]


def drawn(source: str, width: int, height: int) -> list[Any]:
    """A drawing and where its atoms are."""
    drawing = draw(read_structure(source), width, height, [0], [0])
    return [drawing.svg, drawing.coords]


def react(reaction: str, sources: list[str]) -> list[list[str]]:
    """Products of a reaction SMARTS."""
    return kernel().react(reaction, sources)


def again_from_ctfile(source: str) -> str:
    """SMILES after a round trip through a V2000 file."""
    return read_structure(kernel().molblock(source)).smiles


def again_from_graph(source: str) -> dict[str, Any]:
    """What is said of a structure after a round trip through its JSON graph."""
    return describe(kernel().graph_json(source))


def live_handles_after(sources: list[str]) -> int:
    """Handles held after reading many structures."""
    for source in sources:
        read_structure(source)
    return kernel().live_handles()


def seconds(function: str, repeat: int, *arguments: Any) -> list[float]:
    """Wall-clock seconds of each of ``repeat`` calls."""
    call = _found(function)
    times = []
    for _ in range(repeat):
        start = time.perf_counter()
        call(*arguments)
        times.append(time.perf_counter() - start)
    return times


def predicted(smiles: str, solvent: str, mhz: float) -> str:
    """The whole prediction afresh, as the door answers it."""
    from hoodside.engine import handle
    from hoodside.predict import whole

    whole._predict.cache_clear()
    whole._structure.cache_clear()
    return handle("predict", json.dumps({"smiles": smiles, "solvent": solvent, "mhz": mhz}))


def outcome_list(smiles: str, reagents: str) -> list[list[str]]:
    """Reaction outcomes as (SMILES, role)."""
    from hoodside.rivals.outcomes import find_outcomes

    return [[o.smiles, o.role] for o in find_outcomes(read_structure(smiles), reagents).outcomes]


def redrawn(source: str, step: str, arguments: dict[str, Any]) -> str:
    """One editing step as the door answers it, drawing and all."""
    from hoodside.engine import handle

    asked = {"structure": source, "step": step, "arguments": arguments}
    return handle("edit", json.dumps(asked))


def hunted(smiles: str, readings: dict[str, Any], limit: int) -> dict[str, Any]:
    """A whole hunt for look-alikes."""
    from hoodside.methods.hunting import hunt

    return hunt(smiles, readings, limit=limit, slice_ms=60_000)
