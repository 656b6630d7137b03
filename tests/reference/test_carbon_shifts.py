"""13C shifts against the published trace-impurity table.

Source: Gottlieb, Kotlyar and Nudelman, J. Org. Chem. 1997, 62, 7512; Fulmer et al., Organometallics 2010, 29,
2176 (CDCl3 columns as kept in facts/impurities.csv, which no 13C prediction reads).
"""

from __future__ import annotations

import csv
from collections import defaultdict
from pathlib import Path
from statistics import fmean

import pytest

from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.predict.carbon import predict_carbons

#: Largest error allowed for any one carbon, ppm (small molecules are the hardest for additive schemes).
WORST = 9.0
MEAN = 2.0


def published() -> dict[str, list[float]]:
    """SMILES -> 13C lines in CDCl3, for organic compounds of at least two carbons."""
    lines: dict[str, list[float]] = defaultdict(list)
    for row in load_table("impurities"):
        if row["nucleus"] == "13C" and row["CDCl3"]:
            lines[row["smiles"]].append(float(row["CDCl3"]))
    return {s: found for s, found in lines.items() if read_structure(s).element_counts.get("C", 0) > 1}


def errors(smiles: str, lines: list[float]) -> list[float]:
    """Predicted minus printed, both in order of shift; empty when not every line is printed."""
    predicted = sorted(group.ppm for group in predict_carbons(read_structure(smiles)))
    printed = sorted(set(lines))
    return [p - q for p, q in zip(predicted, printed, strict=True)] if len(predicted) == len(printed) else []


CASES = {smiles: lines for smiles, lines in published().items() if errors(smiles, lines)}


def test_enough_compounds_are_compared() -> None:
    assert len(CASES) >= 30


@pytest.mark.parametrize("smiles", sorted(CASES))
def test_each_carbon_lies_near_its_published_shift(smiles: str) -> None:
    assert max(map(abs, errors(smiles, CASES[smiles]))) < WORST


def test_mean_error_over_the_table() -> None:
    assert fmean(abs(e) for smiles in CASES for e in errors(smiles, CASES[smiles])) < MEAN


# Assigned carbons in CDCl3, each with its source; no fit learns from these compounds (bench/training.py).
ASSIGNED = list(csv.DictReader((Path(__file__).parent / "carbon_shifts.csv").read_text("utf-8").splitlines()))


@pytest.mark.parametrize("row", ASSIGNED, ids=lambda r: f"{r['smiles']} {r['atom']}")
def test_assigned_carbon(row: dict[str, str]) -> None:
    groups = predict_carbons(read_structure(row["smiles"]))
    group = next(g for g in groups if int(row["atom"]) in g.atoms)
    assert group.ppm == pytest.approx(float(row["ppm"]), abs=float(row["within"])), row["source"]
    assert group.sd > 0
    assert sum(term.value for term in group.terms) == pytest.approx(group.ppm, abs=0.02)


def test_kinds_and_numbers_of_cumene() -> None:
    """Six lines, one C, three CH, one CH2-free, CH3 pair: common practice."""
    kinds = [(g.kind, g.n) for g in predict_carbons(read_structure("CC(C)c1ccccc1"))]
    assert sorted(kinds) == [("C", 1), ("CH", 1), ("CH", 1), ("CH", 2), ("CH", 2), ("CH3", 2)]
