"""Electron-ionisation figures over the published compounds: share of tall peaks that a structure explains."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

from hoodside.molecule import read_structure
from hoodside.predict.mass import predict_ions

CASES = Path(__file__).parents[1] / "cases" / "published.json"
LEAST_PEAKS = 4
TALL = 15.0  # per cent of the base peak


def run() -> dict[str, float]:
    """Measure, print, and answer the figures (shares from 0 to 1)."""
    cases = [case for case in json.loads(CASES.read_text("utf-8")) if len(case.get("ms", ())) >= LEAST_PEAKS]
    own = [_share(case["smiles"], case) for case in cases]
    others = [[_share(smiles, case) for smiles in case["rivals"]] for case in cases]
    flat = [share for shares in others for share in shares]
    figures = {
        "tall peaks explained by the truth": sum(own) / len(own),
        "tall peaks explained by a rival": sum(flat) / len(flat),
        "truth explains at least as much as every rival": sum(
            share >= max(shares) for share, shares in zip(own, others, strict=True)
        )
        / len(own),
    }
    print(f"mass spectra, {len(cases)} published lists")
    for name, value in figures.items():
        print(f"  {name:58s} {value:8.3f}")
    return figures


def _share(smiles: str, case: dict[str, Any]) -> float:
    peaks = {peak["mz"] for peak in case["ms"] if peak.get("rel", 100.0) >= TALL}
    ions = {round(ion.mz) for ion in predict_ions(read_structure(smiles))}
    return len(peaks & ions) / len(peaks)


if __name__ == "__main__":
    run()
