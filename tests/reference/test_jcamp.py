"""JCAMP-DX: the published forms of one table, the checks of the standard, and peaks known beforehand.

The table 1 2 3 3 2 1 0 -1 -2 -3 in its AFFN, PAC, SQZ, DIF and DIF/DUP forms is the example of McDonald &
Wilks, Appl. Spectrosc. 1988, 42, 151 (from memory). Spectra are computed from bands and lines chosen
beforehand; DIF/DUP files are written by an encoder in this test that shares nothing with the decoder.
"""

from __future__ import annotations

import json
import math
from itertools import pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside.engine import handle
from hoodside.errors import InvalidInputError
from hoodside.readings.jcamp import read_jcamp
from hoodside.readings.jcamp.asdf import decode
from hoodside.readings.jcamp.curve import find_maxima, thinned

PUBLISHED = {
    "AFFN": "99 1 2 3 3 2 1 0 -1 -2 -3",
    "PAC": "99+1+2+3+3+2+1+0-1-2-3",
    "SQZ": "99ABCCBA@abc",
    "DIF": "99AJJ%jjjjjj",
    "DIFDUP": "99AJT%jX",
}


@pytest.mark.parametrize("form", PUBLISHED)
def test_the_published_table_in_every_form(form: str) -> None:
    assert decode(PUBLISHED[form]).y == [1, 2, 3, 3, 2, 1, 0, -1, -2, -3]


def test_repeats_of_values_and_missing_values() -> None:
    assert decode("1A2U").y == [12, 12, 12]  # DUP of a squeezed value
    assert decode("1 5 ? 7").y == [5, None, 7]
    assert decode("1.5E+2 2.5E-1 -3").y == [0.25, -3]


def test_the_y_check_takes_the_repeated_ordinate_back() -> None:
    good = decode("1AJJ\n3CJJ\n5E")
    assert (good.y, good.failed_checks) == ([1, 2, 3, 4, 5], 0)
    assert [index for _, index in good.starts] == [0, 2, 4]
    bad = decode("1AJJ\n3DJJ")
    assert bad.failed_checks == 1


SQZ = "@ABCDEFGHI"
DIF = "%JKLMNOPQR"
DUP = " STUVWXYZ"


def _letter(value: int, row: str) -> str:
    digits = str(abs(value))
    first = row[int(digits[0])]
    return (first.lower() if value < 0 else first) + digits[1:]


def encode(y: list[int], width: int = 7) -> str:
    """Lines of DIF/DUP form with a Y check, ``width`` ordinates each."""
    lines, at = [], 0
    while True:
        stretch = y[at : at + width]
        line, steps = (
            f"{at}{_letter(stretch[0], SQZ)}",
            [b - a for a, b in pairwise(stretch)],
        )
        while steps:
            run = 1
            while run < len(steps) and run < 8 and steps[run] == steps[0]:
                run += 1
            line += _letter(steps[0], DIF) + (DUP[run] if run > 1 else "")
            steps = steps[run:]
        lines.append(line)
        if at + width >= len(y):
            return "\n".join(lines)
        at += len(stretch) - 1


@settings(deadline=None)
@given(st.lists(st.integers(-99_999, 99_999), min_size=1, max_size=60), st.integers(2, 12))
def test_what_is_encoded_is_decoded(y: list[int], width: int) -> None:
    found = decode(encode(y, width))
    assert found.y == y
    assert found.failed_checks == 0


BANDS = [(3350, 60, 0.9), (2960, 15, 0.6), (1715, 8, 1.0), (1450, 8, 0.25), (1100, 12, 0.1)]


def infrared(
    form: str = "X++(Y..Y)", transmittance: bool = True, bands: list[tuple[float, float, float]] = BANDS
) -> str:
    step, factor = 2.0, 1e-5
    x = [4000 - step * i for i in range(1801)]
    a = [sum(h * math.exp(-((v - c) ** 2) / (2 * s * s)) for c, s, h in bands) + 0.02 for v in x]
    y = [round((10**-v if transmittance else v) / factor) for v in a]
    table = encode(y, 30)
    table = "\n".join(
        f"{4000 - step * int(line[: _digits(line)]):g}{line[_digits(line) :]}" for line in table.splitlines()
    )
    return (
        "##TITLE= invented\n##JCAMP-DX= 4.24 $$ a comment\n##DATA TYPE= INFRARED SPECTRUM\n##ORIGIN= test\n"
        f"##XUNITS= 1/CM\n##YUNITS= {'TRANSMITTANCE' if transmittance else 'ABSORBANCE'}\n##FIRSTX= 4000\n"
        f"##LASTX= 400\n##XFACTOR= 1\n##YFACTOR= {factor}\n##FIRSTY= {y[0] * factor}\n##NPOINTS= {len(y)}\n"
        f"##XYDATA= ({form})\n{table}\n##END=\n"
    )


def _digits(line: str) -> int:
    return next(k for k, c in enumerate(line) if not c.isdigit())


@pytest.mark.parametrize("transmittance", [True, False])
def test_infrared_bands_are_where_they_were_put(transmittance: bool) -> None:
    report = read_jcamp(infrared(transmittance=transmittance))
    assert report.warnings == ()
    found = {band.cm1: band for band in report.readings.ir}
    assert [round(cm1) for cm1 in found] == [3350, 2960, 1715, 1450, 1100]
    assert [b.strength for b in report.readings.ir] == ["strong", "strong", "strong", "medium", "weak"]
    assert found[3350].shape == "broad"
    assert found[1715].shape == "sharp"
    clear = [(c.lo, c.hi) for c in report.readings.ir_clear]
    assert any(lo <= 2200 <= hi for lo, hi in clear)
    assert not any(lo < cm1 < hi for lo, hi in clear for cm1 in found)


def test_the_checks_of_the_file_are_reported() -> None:
    text = infrared()
    short = text.replace("##NPOINTS= 1801", "##NPOINTS= 1800")
    assert any("announces 1800 points and holds 1801" in w for w in read_jcamp(short).warnings)
    lines = text.splitlines()
    at = next(k for k, line in enumerate(lines) if line.startswith("##XYDATA")) + 13
    broken = "\n".join(lines[:at] + lines[at + 1 :])
    told = " ".join(read_jcamp(broken).warnings)
    assert "Y check" in told
    assert "announces" in told
    assert "do not begin at the X" in told


def test_wavelengths_become_wavenumbers() -> None:
    text = (
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n##XUNITS= MICROMETERS\n"
        "##YUNITS= ABSORBANCE\n"
        "##PEAK TABLE= (XY..XY)\n5.831, 1.0; 6.250, 0.4\n##END="
    )
    assert [b.cm1 for b in read_jcamp(text).readings.ir] == [1715.0, 1600.0]


def test_an_nmr_peak_table_becomes_signals() -> None:
    lines = [
        (7.820, 10),
        (7.800, 10),
        (2.9800 + 0.0525, 1),
        (2.98 + 0.035, 6),
        (2.98 + 0.0175, 15),
        (2.98, 20),
    ]
    lines += [(2.98 - 0.0175, 15), (2.98 - 0.035, 6), (2.98 - 0.0525, 1), (1.28, 60), (1.26, 60), (9.97, 10)]
    lines += [(6.50, 5), (6.46, 5), (6.4875, 5), (6.4475, 5)]
    rows = "\n".join(f"{ppm * 400:.2f}, {y}" for ppm, y in lines)
    text = (
        "##TITLE= a\n##JCAMP-DX= 5.00\n##DATA TYPE= NMR SPECTRUM\n##.OBSERVE FREQUENCY= 400.0\n"
        f"##.OBSERVE NUCLEUS= ^1H\n##.SOLVENT NAME= CDCL3\n##XUNITS= HZ\n##YUNITS= ARBITRARY UNITS\n"
        f"##NPOINTS= {len(lines)}\n##PEAK TABLE= (XY..XY)\n{rows}\n##END=\n"
    )
    readings = read_jcamp(text).readings
    assert (readings.solvent, readings.mhz) == ("CDCl3", 400)
    found = [(round(s.ppm, 2), s.mult, tuple(round(j) for j in s.j)) for s in readings.h1]
    assert found == [
        (9.97, "s", ()),
        (7.81, "d", (8,)),
        (6.47, "dd", (16, 5)),
        (2.98, "sept", (7,)),
        (1.27, "d", (8,)),
    ]


def test_peak_assignments_keep_their_notes() -> None:
    text = (
        "##TITLE= a\n##JCAMP-DX= 5.00\n##DATA TYPE= NMR PEAK ASSIGNMENTS\n##.OBSERVE FREQUENCY= 100\n"
        "##.OBSERVE NUCLEUS= ^1H\n##XUNITS= PPM\n"
        "##PEAK ASSIGNMENTS= (XYMA)\n(7.26, 5, M, <Ar-H>)\n(2.35, 3, S, <CH3>)\n##END="
    )
    signals = read_jcamp(text).readings.h1
    assert [(s.ppm, s.mult, s.note) for s in signals] == [(7.26, "m", "Ar-H"), (2.35, "s", "CH3")]


def test_an_nmr_curve_in_ntuples() -> None:
    mhz, n = 400.0, 8001
    x = [10 - 10 * i / (n - 1) for i in range(n)]
    lines = [(7.81 + 0.01025, 2.0), (7.81 - 0.01025, 2.0), (2.35, 3.0)]
    y = [round(sum(4000 * h / (1 + ((v - c) * mhz / 0.5) ** 2) for c, h in lines)) for v in x]
    table = encode(y, 40)
    text = (
        "##TITLE= a\n##JCAMP-DX= 5.01\n##DATA TYPE= NMR SPECTRUM\n##DATA CLASS= NTUPLES\n"
        "##.OBSERVE FREQUENCY= 400\n"
        "##.OBSERVE NUCLEUS= ^1H\n##NTUPLES= NMR SPECTRUM\n"
        "##VAR_NAME= FREQUENCY, SPECTRUM/REAL, PAGE NUMBER\n"
        f"##SYMBOL= X, R, N\n##VAR_DIM= {n}, {n}, 1\n##UNITS= PPM, ARBITRARY UNITS,\n##FIRST= 10, {y[0]}, 1\n"
        f"##LAST= 0, {y[-1]}, 1\n##FACTOR= {-10 / (n - 1)}, 1, 1\n##PAGE= N=1\n"
        f"##DATA TABLE= (X++(R..R)), XYDATA\n{table}\n"
        "##END NTUPLES= NMR SPECTRUM\n##END=\n"
    )
    report = read_jcamp(text)
    found = report.readings.h1
    assert [(round(s.ppm, 2), s.mult) for s in found] == [(7.81, "d"), (2.35, "s")]
    assert found[0].j[0] == pytest.approx(8.2, abs=0.3)
    assert report.readings.raw_integrals
    assert found[0].n / found[1].n == pytest.approx(4 / 3, rel=0.05)  # type: ignore[operator]


def test_several_blocks_and_a_mass_spectrum() -> None:
    mass = (
        "##TITLE= b\n##JCAMP-DX= 5.00\n##DATA TYPE= MASS SPECTRUM\n##DATA CLASS= PEAK TABLE\n##XUNITS= M/Z\n"
        "##YUNITS= RELATIVE ABUNDANCE\n##NPOINTS= 4\n"
        "##PEAK TABLE= (XY..XY)\n43,2500 58,1250\n15,10 59,125\n##END=\n"
    )
    link = (
        "##TITLE= both\n##JCAMP-DX= 5.00\n##DATA TYPE= LINK\n##BLOCKS= 2\n" + infrared() + mass + "##END=\n"
    )
    report = read_jcamp(link)
    assert [s.kind for s in report.spectra] == ["infrared", "mass"]
    assert [(p.mz, p.rel) for p in report.readings.ms] == [(59, 5.0), (58, 50.0), (43, 100.0)]
    assert len(report.readings.ir) == 5


@pytest.mark.parametrize(
    "text",
    [
        "",
        "1H NMR (400 MHz) 7.26",
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= NMR FID\n##XYDATA= (X++(Y..Y))\n1 2\n##END=",
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n##END=",
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n##XYDATA= (X++(Y..Y))\nfoo\n##END=",
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n##XYDATA= (X++(Y..Y))\n1J\n##END=",
        "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n"
        "##XYDATA= (X++(Y..Y))\n1As99999999\n##END=",
    ],
)
def test_what_cannot_be_read_is_refused_in_words(text: str) -> None:
    with pytest.raises(InvalidInputError) as caught:
        read_jcamp(text)
    assert caught.value.hint


HEAD = "##TITLE= a\n##JCAMP-DX= 4.24\n##DATA TYPE= INFRARED SPECTRUM\n##FIRSTX= 1\n##XYDATA= (X++(Y..Y))\n"


@settings(deadline=None)
@given(st.text(alphabet="0123456789@ABEJKjkSTsZ%?+-. ,\n#=EN", max_size=80))
def test_no_table_breaks_the_reader(table: str) -> None:
    answer = json.loads(handle("jcamp", json.dumps({"text": HEAD + table})))
    assert answer.get("error", {}).get("code", "invalid_input") == "invalid_input"


def test_the_engine_answers_thinned_curves() -> None:
    answer = json.loads(handle("jcamp", json.dumps({"text": infrared()})))["result"]
    assert answer["kind"] == "infrared"
    assert len(answer["x"]) == len(answer["y"]) == 1801
    assert len(answer["readings"]["ir"]) == 5
    x = list(range(10_000))
    y = [0.0] * 10_000
    y[7_777] = 1.0
    thin = thinned(x, y, 2_000)
    assert len(thin[0]) <= 2_000
    assert max(thin[1]) == 1.0


def test_prominence_by_its_definition() -> None:
    y = [0, 3, 1, 5, 2, 4, 0]
    found = {m.index: m.prominence for m in find_maxima(range(7), y, 0.5)}
    assert found == {1: 2, 3: 5, 5: 2}
