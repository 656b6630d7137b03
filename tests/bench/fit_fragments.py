"""Counts how often each sign of a fragment is seen with and without it, and writes the counts into the table.

usage: PYTHONPATH=py:tests python -m bench.fit_fragments
"""

from __future__ import annotations

import csv
import json
from pathlib import Path

from hoodside.advise.proposals.signs import find_sign, parse_sign
from hoodside.molecule import read_structure
from hoodside.readings.from_json import readings_from_json

ROOT = Path(__file__).parents[2]
TABLE = ROOT / "py" / "hoodside" / "facts" / "fragment_signs.csv"
CASES = ROOT / "tests" / "cases" / "published.json"


def main() -> None:
    """Count over the published cases; a sign counts only where its kinds of readings were taken."""
    cases = [
        (read_structure(c["smiles"]), readings_from_json(c)) for c in json.loads(CASES.read_text("utf-8"))
    ]
    with TABLE.open(encoding="utf-8", newline="") as file:
        rows = list(csv.DictReader(file))
    for row in rows:
        demands = parse_sign(row["sign"])
        kinds = {demand.kind for demand in demands}
        able = [(s, r) for s, r in cases if all(getattr(r, kind) for kind in kinds)]
        have = [bool(s.matches(row["smarts"])) for s, _ in able]
        seen = [find_sign(demands, r) is not None for _, r in able]
        row["of"], row["with_fragment"], row["with_sign"] = str(len(able)), str(sum(have)), str(sum(seen))
        row["with_both"] = str(sum(a and b for a, b in zip(have, seen, strict=True)))
    with TABLE.open("w", encoding="utf-8", newline="") as file:
        writer = csv.DictWriter(file, fieldnames=list(rows[0]), lineterminator="\n")
        writer.writeheader()
        writer.writerows(rows)


if __name__ == "__main__":
    main()
