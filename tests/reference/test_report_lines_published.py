"""Every published case, printed in several house styles, must be read back to the same values."""

from __future__ import annotations

import json
from dataclasses import replace
from pathlib import Path

import pytest

from hoodside.readings import CarbonLine, IrBand, ProtonSignal, Readings
from hoodside.readings.from_json import readings_from_json
from hoodside.readings.report import parse_report
from reference.report_styles import STYLES, Style, printed

CASES = json.loads((Path(__file__).parent.parent / "cases" / "published.json").read_text("utf-8"))


def _as_printable(case: dict) -> Readings:
    """A case with its numbers as a printer would round them."""
    readings = readings_from_json(case)
    signals = (
        replace(
            s,
            lo=round(s.lo, 2),
            hi=round(s.hi, 2),
            j=tuple(round(j, 1) for j in s.j),
            mult=s.mult or "m",
            note="",
        )
        for s in readings.h1
    )
    return replace(
        readings,
        h1=tuple(signals),
        c13=tuple(CarbonLine(round(c.ppm, 1), c.kind, c.n) for c in readings.c13),
        ir=tuple(IrBand(float(round(b.cm1)), b.strength, b.shape) for b in readings.ir),
    )


def _plain(signal: ProtonSignal) -> tuple[object, ...]:
    return signal.lo, signal.hi, signal.mult, signal.j, signal.n


@pytest.mark.parametrize("style", STYLES, ids=lambda style: style.name)
def test_every_case_is_read_back(style: Style) -> None:
    wrong = []
    for case in CASES:
        meant = _as_printable(case)
        text = "\n".join(printed(style, meant))
        parsed = parse_report(text)
        found = parsed.readings
        same = (
            [_plain(s) for s in found.h1] == [_plain(s) for s in meant.h1]
            and found.c13 == meant.c13
            and found.ir == meant.ir
            and (
                not meant.h1 or (found.mhz, found.solvent or "CDCl3") == (meant.mhz, meant.solvent or "CDCl3")
            )
        )
        if not same or parsed.unread:
            wrong.append((case["id"], text, parsed.unread))
    assert not wrong, wrong[:3]


def test_all_lists_of_one_case_may_come_in_one_paste() -> None:
    for style in STYLES:
        case = _as_printable(next(c for c in CASES if c.get("ir") and c.get("c13") and c.get("h1")))
        parsed = parse_report("  ".join(printed(style, case)))
        assert len(parsed.readings.h1) == len(case.h1)
        assert parsed.readings.c13 == case.c13
        assert parsed.readings.ir == case.ir
