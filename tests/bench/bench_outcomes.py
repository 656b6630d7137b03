"""Reaction outcomes: coverage, published product first, its 1H signals against what else may be there."""

from __future__ import annotations

import json
import re
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from hoodside.check import check_case
from hoodside.molecule import read_structure
from hoodside.rivals.outcomes import Outcome, find_outcomes
from hoodside.rivals.outcomes.stereo import mirror_smiles

CASES = Path(__file__).parents[1] / "cases" / "reactions.json"


@dataclass(frozen=True, slots=True)
class Row:
    """One published reaction: what the table says of it, and how the product's signals weigh."""

    id: str
    kind: str
    covered: bool
    first: bool
    rank: int  # place of the published product among the outcomes, 0 where it is missing
    behind: tuple[tuple[float, str, str], ...] | None  # (decibans, role, SMILES) of what is not beaten

    @property
    def beats(self) -> bool:
        """Whether the product weighs more than the start and every other outcome."""
        return self.behind is not None and not self.behind


def run() -> None:
    """Print coverage, first places and wins by the product's own signals, then every case that misses."""
    rows = [_row(case) for case in json.loads(CASES.read_text("utf-8"))]
    covered = [row for row in rows if row.covered]
    weighed = [row for row in rows if row.behind is not None]
    _say("class of reaction covered", len(covered), len(rows))
    _say("published product first, of those covered", sum(row.first for row in covered), len(covered))
    _say("product's 1H beats start and by-products", sum(row.beats for row in weighed), len(weighed))
    by_names = [outcomes_of(case, kind="")[0] for case in json.loads(CASES.read_text("utf-8"))]
    plain = [outcome.role == "product" for outcome in by_names]
    _say("product by the reagents alone, no kind told", sum(plain), len(rows))
    print("  not covered:", "; ".join(f"{row.id} ({row.kind})" for row in rows if not row.covered) or "none")
    print("  not first:", "; ".join(f"{r.id} ({r.rank or 'missing'})" for r in covered if not r.first))
    for row in weighed:
        for ahead, role, smiles in row.behind or ():
            print(f"  {ahead:+6.1f} dB  {row.id} ({row.kind}): {role} {smiles}")


def same(got: str, wanted: str) -> bool:
    """Equal up to the mirror image; a wanted structure without stereo marks leaves them open."""
    want = read_structure(wanted)
    if got in (want.smiles, mirror_smiles(want)):
        return True
    if re.search(r"[@/\\]", want.smiles):
        return False
    return read_structure(re.sub(r"[@/\\]", "", got)).smiles == want.smiles


def outcomes_of(case: dict[str, Any], kind: str | None = None) -> list[Outcome]:
    """All outcomes, the start last, asked as the case tells it, or with another kind of reaction."""
    partner = read_structure(case["with_smiles"]) if case.get("with_smiles") else None
    reagents = f"{case['reagents']}, {case.get('conditions', '')}"
    told = case["type"] if kind is None else kind
    return list(find_outcomes(read_structure(case["start_smiles"]), reagents, partner, told).outcomes)


def _row(case: dict[str, Any]) -> Row:
    found = outcomes_of(case)
    wanted = case["product_smiles"]
    made = [o for o in found if o.role != "no reaction"]
    rank = next((i for i, o in enumerate(made, 1) if same(o.smiles, wanted)), 0)
    behind = _not_beaten(case, found) if case.get("product_h1") else None
    return Row(case["id"], case["type"], bool(made), rank == 1, rank, behind)


def _not_beaten(case: dict[str, Any], found: list[Outcome]) -> tuple[tuple[float, str, str], ...]:
    """What weighs as much as the product or more, given the product's published 1H signals alone."""
    wanted = case["product_smiles"]
    others = {o.smiles: o.role for o in found if not same(o.smiles, wanted)}
    asked = {"h1": case["product_h1"], "solvent": case.get("solvent"), "mhz": case.get("mhz")}
    answer = check_case({**{k: v for k, v in asked.items() if v}, "candidates": [wanted, *others]})
    weights = {read_structure(c["smiles"]).smiles: c["weight_db"] for c in answer["candidates"]}
    mine = weights[read_structure(wanted).smiles]
    return tuple((weights[s] - mine, role, s) for s, role in others.items() if weights.get(s, -1e9) >= mine)


def _say(what: str, part: int, whole: int) -> None:
    print(f"  {what:42s} {part:3d} of {whole:3d}  {part / whole:.1%}")
