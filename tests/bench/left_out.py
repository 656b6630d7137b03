"""Learned tables fitted without the compounds under examination, fold by fold over published.json."""

from __future__ import annotations

import random
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from typing import Any

from bench import fit_carbon, fit_proton, proton_cases
from hoodside.molecule import read_structure
from hoodside.predict import whole
from hoodside.predict.learned import LearnedTable, in_place_of

FOLDS = 5
_SEED = 20261201


@dataclass(frozen=True)
class Fold:
    """Cases held out, and the tables fitted on all others."""

    cases: list[dict[str, Any]]
    tables: dict[str, LearnedTable]


def folds(cases: list[dict[str, Any]]) -> Iterator[Fold]:
    """Fit without each fifth of the cases in turn; a structure is never in the fit that predicts it."""
    order = list(range(len(cases)))
    random.Random(_SEED).shuffle(order)
    carbons, carbon_rows = fit_carbon.load_compounds(), fit_carbon.assigned_rows()
    protons, proton_rows = proton_cases.load_compounds(), proton_cases.assigned_rows()
    for fold in range(FOLDS):
        held = [cases[i] for i in order[fold::FOLDS]]
        keys = {_connectivity(case["smiles"]) for case in held}
        carbon = fit_carbon.train([c for c in carbons if c.key not in keys], carbon_rows)
        proton = fit_proton.train([c for c in protons if c.key not in keys], proton_rows)
        tables = {"carbon_learned": carbon, "proton_learned": proton.mean, "proton_splits": proton.split}
        yield Fold(held, tables)


@contextmanager
def predicting(fold: Fold) -> Iterator[None]:
    """Predictions by the fold's tables, none remembered from before or kept for after."""
    whole._predict.cache_clear()
    with in_place_of(fold.tables):
        yield
    whole._predict.cache_clear()


def _connectivity(smiles: str) -> str:
    """First block of the InChIKey: stereoisomers and repeats count as one compound."""
    return read_structure(smiles).inchikey.split("-")[0]
