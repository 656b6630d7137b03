"""Report lines say what the readings hold: whatever is written is read back to the same values."""

from __future__ import annotations

import json
from dataclasses import replace

from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside.engine import handle
from hoodside.readings import Analysis, CarbonLine, HighResMass, IrBand, MassPeak, ProtonSignal, Readings
from hoodside.readings.report import parse_report
from hoodside.record import report_lines

shifts = st.integers(-100, 1500).map(lambda k: k / 100)
couplings = st.lists(st.integers(5, 250).map(lambda k: k / 10), max_size=3).map(
    lambda found: tuple(sorted(found, reverse=True))
)
signals = st.builds(
    lambda a, b, mult, j, n: ProtonSignal(min(a, b), max(a, b), mult, j, n),
    shifts,
    shifts,
    st.sampled_from(["s", "d", "t", "q", "dd", "dt", "ddd", "quint", "sext", "sept", "m", "br s", "app t"]),
    couplings,
    st.integers(1, 12).map(float),
)
carbons = st.builds(
    CarbonLine,
    st.integers(0, 2200).map(lambda k: k / 10),
    st.sampled_from(["", "C", "CH", "CH2", "CH3"]),
    st.integers(1, 4),
    st.lists(st.integers(20, 2700).map(lambda k: k / 10), max_size=1).map(tuple),
)
bands = st.builds(
    IrBand,
    st.integers(500, 3999).map(float),
    st.sampled_from(["", "strong", "medium", "weak"]),
    st.sampled_from(["", "broad", "sharp"]),
)
peaks = st.builds(MassPeak, st.integers(15, 900).map(float), st.none() | st.integers(1, 100).map(float))


@settings(deadline=None, max_examples=300)
@given(
    st.lists(signals, max_size=6, unique_by=lambda s: s.hi),
    st.lists(carbons, max_size=6, unique_by=lambda c: c.ppm),
    st.lists(bands, max_size=6, unique_by=lambda b: b.cm1),
    st.lists(peaks, max_size=6, unique_by=lambda p: p.mz),
)
def test_what_is_written_is_read_back(
    h1: list[ProtonSignal], c13: list[CarbonLine], ir: list[IrBand], ms: list[MassPeak]
) -> None:
    meant = Readings(
        solvent="CDCl3",
        mhz=400.0,
        h1=tuple(sorted(h1, key=lambda s: -s.hi)),
        c13=tuple(sorted(c13, key=lambda c: -c.ppm)),
        ir=tuple(sorted(ir, key=lambda b: -b.cm1)),
        ir_medium="film",
        ms=tuple(sorted(ms, key=lambda p: -p.mz)),
        hrms=HighResMass(149.0963, "[M+H]+", 149.0961),
        analysis=Analysis({"C": 81.0, "H": 8.2}),
        formula="C10H12O",
    )
    parsed = parse_report("\n".join(report_lines(meant)))
    assert parsed.unread == ()
    found = replace(parsed.readings, warnings=())
    if not h1:
        meant = replace(meant, mhz=None)
    if not h1 and not c13:
        meant = replace(meant, solvent="")
    if not ir:
        meant = replace(meant, ir_medium="")
    assert found == meant


def test_the_engine_prints_lines() -> None:
    case = {
        "solvent": "CDCl3",
        "mhz": 400,
        "h1": [{"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2}],
        "ir": [1715],
    }
    answer = json.loads(handle("report", json.dumps(case)))["result"]
    assert answer["lines"] == ["IR ν 1715 cm–1.", "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H)."]
