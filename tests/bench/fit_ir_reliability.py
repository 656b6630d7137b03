"""Counts, over the published compounds, how often each class of predicted band is printed and how near.

Run from the tests folder: ``python -m bench.fit_ir_reliability`` rewrites facts/ir_reliability.csv and
facts/ir_background.csv. Nothing here depends on chance.
"""

from __future__ import annotations

import csv
import math
from collections import defaultdict
from pathlib import Path
from typing import Any

from bench.infrared_lists import Matched, matched_cases
from hoodside.predict.infrared.reliability import SHORT_LIST, mode_class

FACTS = Path(__file__).parents[2] / "py" / "hoodside" / "facts"
SOURCE = "counted over the published compounds of tests/cases/published.json"
#: A class is shrunk toward the share of all bands as if it had this many more of them.
PRIOR = 6.0
#: Scatter is shrunk toward this (cm-1) with the same weight.
PRIOR_SD = 10.0
BIN = 50.0
LOWEST, HIGHEST = 400.0, 4000.0
#: Half width of the smoothing of the background, in bins.
SMOOTH = 1

Key = tuple[str, str, str]


def main() -> None:
    cases = list(matched_cases())
    _write("ir_reliability.csv", _reliability(cases))
    _write("ir_background.csv", _background(cases))


def _reliability(cases: list[Matched]) -> list[dict[str, Any]]:
    expected: dict[Key, int] = defaultdict(int)
    printed: dict[Key, int] = defaultdict(int)
    errors: dict[str, list[float]] = defaultdict(list)
    for case in cases:
        length = "short" if len(case.printed) <= SHORT_LIST else "long"
        for i, band in enumerate(case.expected):
            kind = mode_class(band.mode)
            for key in _keys(kind, band.strength, length):
                expected[key] += 1
                printed[key] += i in case.taken
            if i in case.taken:
                errors[kind].append(case.printed[case.taken[i]] - band.typical)
    overall = {length: _share(printed, expected, length) for length in ("any", "short", "long")}
    return [
        {
            "mode_class": key[0],
            "strength": key[1],
            "list_length": key[2],
            "expected": expected[key],
            "printed": printed[key],
            "p": round((printed[key] + PRIOR * overall[key[2]]) / (expected[key] + PRIOR), 3),
            "sd_cm1": round(_scatter(errors.get(key[0], [])), 1),
            "source": SOURCE,
            "origin": "computed",
        }
        for key in sorted(expected)
    ]


def _keys(kind: str, strength: str, length: str) -> list[Key]:
    return [
        (name, power, part)
        for name in (kind, "all")
        for power in (strength, "any")
        for part in (length, "any")
    ]


def _share(printed: dict[Key, int], expected: dict[Key, int], length: str) -> float:
    return printed["all", "any", length] / expected["all", "any", length]


def _scatter(errors: list[float]) -> float:
    """Root mean square about the prediction, the worst twentieth clipped."""
    kept = sorted(abs(e) for e in errors)[: max(1, math.ceil(len(errors) * 0.95))] if errors else []
    squares = sum(e * e for e in kept) + PRIOR * PRIOR_SD**2
    return math.sqrt(squares / (len(kept) + PRIOR))


def _background(cases: list[Matched]) -> list[dict[str, Any]]:
    size = int((HIGHEST - LOWEST) / BIN)
    counts = [0] * size
    for case in cases:
        for cm1 in case.printed:
            if LOWEST <= cm1 < HIGHEST:
                counts[int((cm1 - LOWEST) / BIN)] += 1
    smooth = [_near(counts, i) + 0.5 for i in range(size)]
    total = sum(smooth)
    return [
        {
            "lo_cm1": LOWEST + i * BIN,
            "hi_cm1": LOWEST + (i + 1) * BIN,
            "bands": counts[i],
            "share": round(smooth[i] / total, 5),
            "source": SOURCE,
            "origin": "computed",
        }
        for i in range(size)
    ]


def _near(counts: list[int], i: int) -> float:
    window = counts[max(0, i - SMOOTH) : i + SMOOTH + 1]
    return sum(window) / len(window)


def _write(name: str, rows: list[dict[str, Any]]) -> None:
    with (FACTS / name).open("w", newline="", encoding="utf-8") as file:
        writer = csv.DictWriter(file, list(rows[0]), lineterminator="\n")
        writer.writeheader()
        writer.writerows(rows)
    print(f"{name}: {len(rows)} rows")


if __name__ == "__main__":
    main()
