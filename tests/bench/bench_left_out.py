"""Ranking of published compounds against their rivals, each left out of the fits that predict it."""

from __future__ import annotations

from itertools import pairwise
from typing import Any

from bench.fit_carbon import _json
from bench.left_out import folds, predicting
from hoodside.check import check_case
from hoodside.molecule import read_structure

KEYS = ("formula", "solvent", "mhz", "h1", "c13", "ir", "ir_medium", "ms", "hrms")
FAR = 10.0
BINS = (0.0, 0.2, 0.4, 0.6, 0.8, 0.9, 0.95, 0.99, 1.0001)


def run() -> None:
    """Print truth first, clashes for a truth, wrong ones set apart, and share against frequency."""
    rows = examined()
    first = sum(r["first"] for r in rows) / len(rows)
    clash = sum(r["verdict"] == "clashes" for r in rows) / len(rows)
    apart = [a for r in rows for a in r["apart"]]
    print(f"left out of all fits, {len(rows)} compounds")
    print(f"  truth first                      {first:.1%}")
    print(f"  truth given 'clashes'            {clash:.1%}")
    print(f"  wrong: 'clashes' or 10 dB behind {sum(apart) / len(apart):.1%} of {len(apart)}")
    wrong_winners = [r for r in rows if not r["first"]]
    open_verdicts = sum(r["winner"] == "undecided" for r in wrong_winners)
    print(f"  winner 'undecided' where wrong   {open_verdicts} of {len(wrong_winners)}")
    _reliability([pair for r in rows for pair in r["shares"]])
    print("  lost:", ", ".join(f"{r['id']} ({r['behind']:.0f})" for r in wrong_winners))
    print("  clash:", ", ".join(r["id"] for r in rows if r["verdict"] == "clashes"))


def examined() -> list[dict[str, Any]]:
    """One row per published compound with rivals."""
    found = []
    for fold in folds(_json("published")):
        with predicting(fold):
            found += [_row(case) for case in fold.cases if case.get("rivals")]
    return found


def _row(case: dict[str, Any]) -> dict[str, Any]:
    asked = {key: case[key] for key in KEYS if case.get(key)}
    answer = check_case({**asked, "candidates": [case["smiles"], *case["rivals"]]})["candidates"]
    want = read_structure(case["smiles"]).inchikey
    is_truth = [read_structure(c["smiles"]).inchikey == want for c in answer]
    truth = answer[is_truth.index(True)]
    wrong = [c for c, t in zip(answer, is_truth, strict=True) if not t]
    return {
        "id": case["id"],
        "first": is_truth[0],
        "verdict": truth["verdict"],
        "winner": answer[0]["verdict"],
        "behind": answer[0]["weight_db"] - truth["weight_db"],
        "apart": [c["verdict"] == "clashes" or c["weight_db"] < truth["weight_db"] - FAR for c in wrong],
        "shares": [(c["share"], t) for c, t in zip(answer, is_truth, strict=True)],
    }


def _reliability(pairs: list[tuple[float, bool]]) -> None:
    """How often a structure given a share was the truth."""
    print("  share stated      mean   true   cases")
    for lo, hi in pairwise(BINS):
        inside = [(share, truth) for share, truth in pairs if lo <= share < hi]
        if inside:
            mean = sum(s for s, _ in inside) / len(inside)
            true = sum(t for _, t in inside) / len(inside)
            print(f"  {lo:4.2f} to {min(hi, 1):4.2f}    {mean:6.3f} {true:6.3f}  {len(inside):5d}")
