"""Counts how published 1H and 13C reports are spread and printed, and writes the tables that weighing needs.

Run ``python tests/bench/fit_weighing.py`` to print, with ``--write`` to rewrite facts/h1_background.csv,
h1_size_background.csv, h1_coupling_background.csv, c13_background.csv and multiplicity_confusion.csv.
The confusion table and the assignment it rests on are iterated a few rounds. Nothing here is random.
"""

from __future__ import annotations

import csv
import json
import sys
from collections import Counter
from collections.abc import Iterable
from pathlib import Path
from typing import Any

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

FACTS = HERE.parents[2] / "py" / "hoodside" / "facts"
SOURCE = "counted over the published compounds of tests/cases/published.json"
ROUNDS = 3


def published() -> list[dict[str, Any]]:
    """All published cases."""
    cases: list[dict[str, Any]] = json.loads(
        (HERE.parents[1] / "cases" / "published.json").read_text("utf-8")
    )
    return cases


def histogram(
    values: Iterable[float], lo: float, hi: float, width: float, blur: int, floor: float
) -> list[list[str]]:
    """Rows (lo, hi, share): counts smoothed over ``blur`` bins each side, plus ``floor`` per bin."""
    bins = round((hi - lo) / width)
    counts = [0.0] * bins
    for value in values:
        at = int((value - lo) / width)
        for step in range(-blur, blur + 1):
            weight = (blur + 1 - abs(step)) / (blur + 1) ** 2
            counts[min(max(at + step, 0), bins - 1)] += weight
    total = sum(counts) + floor * bins
    rows = []
    for i, count in enumerate(counts):
        rows.append([f"{lo + i * width:g}", f"{lo + (i + 1) * width:g}", f"{(count + floor) / total:.6f}"])
    return rows


def write(name: str, columns: list[str], rows: Iterable[list[str]]) -> None:
    """One facts table, each row with its source."""
    with (FACTS / f"{name}.csv").open("w", encoding="utf-8", newline="") as out:
        writer = csv.writer(out, lineterminator="\n")
        writer.writerow([*columns, "source", "origin"])
        writer.writerows([*row, SOURCE, "computed"] for row in rows)


def write_backgrounds(cases: list[dict[str, Any]]) -> None:
    """Spreads of shifts, sizes and couplings."""
    from hoodside.readings.from_json import readings_from_json
    from hoodside.weigh.background import size_class

    read = [readings_from_json(case) for case in cases]
    signals = [s for r in read for s in r.h1]
    columns = ["group", "lo", "hi", "share"]
    rows = []
    sizes = Counter(size_class(s.n) for s in signals)
    for size in ("any", "1", "2", "3", "more"):
        values = [s.ppm for s in signals if size in ("any", size_class(s.n))]
        rows += [[size, *row] for row in histogram(values, -1, 15, 0.2, 2, 0.15)]
    write("h1_background", columns, rows)
    total = sum(n for size, n in sizes.items() if size != "any")
    shares = [[size, f"{n / total:.4f}"] for size, n in sorted(sizes.items()) if size != "any"]
    write("h1_size_background", ["group", "share"], shares)
    couplings = [j for s in signals for j in s.j]
    write(
        "h1_coupling_background", columns, [["any", *row] for row in histogram(couplings, 0, 60, 0.5, 1, 0.3)]
    )
    lines = [line.ppm for r in read for line in r.c13]
    write("c13_background", columns, [["any", *row] for row in histogram(lines, -20, 240, 4, 1, 0.5)])


def count_patterns(cases: list[dict[str, Any]]) -> dict[str, Counter[str]]:
    """Printed patterns by kind of expected one, from the assignment of every truth."""
    from hoodside.readings.from_json import readings_from_json
    from hoodside.readings.patterns import bare
    from hoodside.weigh.expectations import expectations
    from hoodside.weigh.protons.pattern import relation
    from hoodside.weigh.protons.signals import prepare
    from hoodside.weigh.protons.solve import solve

    counts: dict[str, Counter[str]] = {"anyhow": Counter()}
    for case in cases:
        readings = readings_from_json(case)
        expected = expectations(case["smiles"], readings)
        solution = solve(expected.h1, expected.patterns, prepare(readings))
        for k, signal in enumerate(solution.signals):
            members = solution.members(k)
            if not signal.pattern:
                continue
            broad = ["broad"] if signal.pattern.startswith("br") else []
            counts["anyhow"].update([bare(signal.pattern), "all", *broad])
            if members:
                awaited = expected.patterns.awaited(members)
                row = counts.setdefault(awaited.kind, Counter())
                row.update([relation(awaited, signal.pattern), "all", *broad])
    return counts


def write_patterns(counts: dict[str, Counter[str]]) -> None:
    """The confusion table."""
    rows = [
        [kind, printed, str(n)] for kind, row in sorted(counts.items()) for printed, n in sorted(row.items())
    ]
    write("multiplicity_confusion", ["expected", "printed", "count"], rows)


def forget() -> None:
    """Drop what was read from the tables before."""
    from hoodside.facts import load_table
    from hoodside.weigh import background, expectations
    from hoodside.weigh.protons import coupling, pattern, score

    for cached in (
        load_table,
        background.spread,
        pattern._counts,
        pattern._shares,
        pattern._anyhow,
        pattern.anyhow_share,
        pattern._broad_weight,
        coupling._one,
        score._anyhow_count,
        expectations._kept,
    ):
        cached.cache_clear()


def main() -> None:
    cases = published()
    if "--write" in sys.argv:
        write_backgrounds(cases)
        if not (FACTS / "multiplicity_confusion.csv").is_file():
            write_patterns(
                {"anyhow": Counter({"m": 700, "d": 460, "s": 440, "t": 200, "broad": 90, "all": 2300})}
            )
    for _ in range(ROUNDS if "--write" in sys.argv else 1):
        counts = count_patterns(cases)
        if "--write" in sys.argv:
            write_patterns(counts)
            forget()
    for kind, row in sorted(counts.items()):
        print(f"{kind:14s} {sum(row.values()):5d}  " + "  ".join(f"{p} {n}" for p, n in row.most_common(8)))


if __name__ == "__main__":
    main()
