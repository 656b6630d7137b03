"""Infrared figures over the published compounds: strong bands found, printed bands explained."""

from __future__ import annotations

from collections import Counter, defaultdict

from bench.infrared_lists import Matched, allows, matched_cases
from hoodside.molecule import read_structure
from hoodside.predict.infrared import predict_bands, weigh_bands
from hoodside.predict.model import IrExpectation

DIAGNOSTIC = 1500.0  # cm-1; below lies the fingerprint
CLEAR_DB = 3.0


def run(verbose: bool = False) -> dict[str, float]:
    """Measure, print, and answer the figures (shares from 0 to 1, errors in cm-1)."""
    cases = list(matched_cases())
    figures = {**_strong(cases), **_explained(cases), **_carbonyl(cases, verbose), **_rivals(cases)}
    print(f"infrared, {len(cases)} published lists")
    for name, value in figures.items():
        print(f"  {name:58s} {value:8.3f}")
    return figures


def _strong(cases: list[Matched]) -> dict[str, float]:
    """Chemists print a selection, so only lists of six or more say much on what is missing."""
    figures = {}
    for label, least in (("all lists", 1), ("lists of 6 or more", 6), ("lists of 10 or more", 10)):
        hits = total = 0
        for case in cases:
            if len(case.printed) < least:
                continue
            for band in case.expected:
                if band.absence_counts and "strong" in band.strength:
                    total += 1
                    hits += any(allows(band, cm1) for cm1 in case.printed)
        figures[f"strong absence-counting bands printed, {label}"] = hits / max(total, 1)
    return figures


def _explained(cases: list[Matched]) -> dict[str, float]:
    hits: Counter[str] = Counter()
    total: Counter[str] = Counter()
    for case in cases:
        for k, cm1 in enumerate(case.printed):
            part = "above 1500" if cm1 > DIAGNOSTIC else "below 1500"
            total[part] += 1
            hits[part] += case.covered(k)
    return {f"printed bands explained, {part}": hits[part] / total[part] for part in total}


def _rivals(cases: list[Matched]) -> dict[str, float]:
    """How far infrared alone tells a truth from its listed rivals, where they differ in expected bands."""
    margins = []
    for case in cases:
        own = _total(case.printed, case.expected)
        for smiles in case.rivals:
            expected = predict_bands(read_structure(smiles), case.medium)
            if _look(expected) != _look(case.expected):
                margins.append(own - _total(case.printed, expected))
    clear = [margin for margin in margins if abs(margin) > CLEAR_DB]
    return {
        "rivals told apart by more than 3 decibans": len(clear) / len(margins),
        "of these, truth preferred": sum(margin > 0 for margin in clear) / len(clear),
        "mean margin of the truth, decibans": sum(margins) / len(margins),
    }


def _total(printed: tuple[float, ...], expected: tuple[IrExpectation, ...]) -> float:
    return sum(evidence.weight_db for evidence in weigh_bands(printed, expected))


def _look(expected: tuple[IrExpectation, ...]) -> set[tuple[str, float]]:
    return {(band.group, band.typical) for band in expected}


def _carbonyl(cases: list[Matched], verbose: bool) -> dict[str, float]:
    errors: dict[str, list[float]] = defaultdict(list)
    for case in cases:
        for i, k in case.taken.items():
            band = case.expected[i]
            if band.mode == "C=O stretch":
                errors[band.group].append(case.printed[k] - band.typical)
        if verbose:
            _report(case)
    every = [abs(e) for values in errors.values() for e in values]
    if verbose:
        for group, values in sorted(errors.items()):
            print(f"    {group:50s} n {len(values):3d}  mean {sum(values) / len(values):+6.1f}")
    return {
        "C=O position, mean absolute error, cm-1": sum(every) / len(every),
        "C=O bands matched": len(every),
    }


def _report(case: Matched) -> None:
    missed = [cm1 for k, cm1 in enumerate(case.printed) if cm1 > DIAGNOSTIC and not case.covered(k)]
    if missed:
        print(f"    {case.name}: {case.structure.smiles} does not explain {missed}")


if __name__ == "__main__":
    run(verbose=True)
