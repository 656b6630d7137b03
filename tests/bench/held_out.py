"""Published cases with predictions by tables fitted without them: what unseen compounds may expect.

The learned tables of the 1H and 13C predictors are fitted afresh for each fifth of the compounds (by
connectivity, fixed seed) from the other four and put in place of the shipped ones.
"""

from __future__ import annotations

import random
from collections.abc import Iterator
from typing import Any

from bench import fit_carbon, fit_proton
from bench.ranking_cases import SKELETON, Case, load_cases, published
from hoodside.molecule import read_structure
from hoodside.predict.carbon import predict as carbon
from hoodside.predict.learned import learned_table
from hoodside.predict.proton import correction as proton
from hoodside.weigh import expectations

SEED, FOLDS = 20261201, 5


def folds() -> Iterator[list[Case]]:
    """The cases of each fifth, their expectations made by tables that never saw them."""
    raw = published()
    key = {entry["id"]: read_structure(entry["smiles"]).inchikey[:SKELETON] for entry in raw}
    keys = sorted(set(key.values()))
    random.Random(SEED).shuffle(keys)
    for fold in range(FOLDS):
        held = set(keys[fold::FOLDS])
        tables = _fitted_without(held)
        _use(tables)
        cases = load_cases([entry for entry in raw if key[entry["id"]] in held])
        for case in cases:
            for expected in case.structures:
                _ = expected.h1, expected.patterns, expected.c13
        _use(None)
        yield cases


def _fitted_without(held: set[str]) -> dict[str, Any]:
    hydrogens = [c for c in fit_proton.load_compounds() if c.key[:SKELETON] not in held]
    model = fit_proton.train(hydrogens, fit_proton.assigned_rows())
    smiles = {entry["id"]: entry["smiles"] for entry in published()}
    smiles |= {e["id"]: e["product_smiles"] for e in fit_carbon._json("reactions")}
    carbons = [
        c for c in fit_carbon.load_compounds() if read_structure(smiles[c.id]).inchikey[:SKELETON] not in held
    ]
    lines = fit_carbon.train(carbons, fit_carbon.assigned_rows())
    return {"proton_learned": model.mean, "proton_splits": model.split, "carbon_learned": lines}


def _use(tables: dict[str, Any] | None) -> None:
    expectations._kept.cache_clear()
    expectations._structure.cache_clear()
    chosen = learned_table if tables is None else tables.__getitem__
    carbon.learned_table = chosen  # type: ignore[attr-defined]
    proton.learned_table = chosen  # type: ignore[attr-defined]
