"""Report lines in the styles that author guidelines ask for, read to the value.

ACS: "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H)", "IR (film) ν 3350 cm-1", "HRMS ... calcd for ...,
found ...", "Anal. Calcd for ...". RSC: "δH(400 MHz; CDCl3; Me4Si) 7.81 (2 H, d, J 8.2)", "νmax(film)/cm-1",
"m/z (EI) 148 (M+, 35%)", "Found: C, ...; C10H12O requires C, ...". Wiley: "δ = 7.81 (d, 3J(H,H) = 8.2 Hz,
2 H; CH)", "elemental analysis calcd (%) for ...". All from the publishers' guidelines for experimental
sections, from memory; other variants are common practice. The lines are made up for the purpose.
"""

from __future__ import annotations

import pytest

from hoodside.readings import HighResMass
from hoodside.readings.report import parse_report

J = tuple[float, ...]
Signal = tuple[float, str, J, float | None]

PROTON: list[tuple[str, list[Signal]]] = [
    (
        "1H NMR (500 MHz, Chloroform-d) δ 5.12 (s, 2H), 4.21 (dddd, J = 10.2, 8.1, 5.5, 2.3 Hz, 1H), "
        "2.04 (tdd, J = 12.5, 5.3, 3.1 Hz, 1H), 0.88 (t, J = 7.0 Hz, 3H).",
        [
            (5.12, "s", (), 2),
            (4.21, "dddd", (10.2, 8.1, 5.5, 2.3), 1),
            (2.04, "tdd", (12.5, 5.3, 3.1), 1),
            (0.88, "t", (7.0,), 3),
        ],
    ),
    (
        "¹H NMR (CDCl₃, 400 MHz, 25 °C): δ = 7.55 (tt, ³J = 7.4, ⁴J = 1.3 Hz, 1 H, p-H), 4.38 "
        "(q, J(H,H) = 7.1 Hz, "
        "2 H; CH₂), 1.39 ppm (t, ³J(H,H) = 7.1 Hz, 3 H; CH₃)",
        [(7.55, "tt", (7.4, 1.3), 1), (4.38, "q", (7.1,), 2), (1.39, "t", (7.1,), 3)],
    ),
    (
        "δH (300 MHz; CDCl3; Me4Si) 1.24 (3 H, t, J 7.1, OCH2CH3), 6.78 (1 H, dt, J 15.6 and 6.9, 3-H), "
        "5.92 (1 H, d, J 15.6, 2-H) and 7.30 (2 H, d, J 8.8, 2,6-H)",
        [
            (1.24, "t", (7.1,), 3),
            (6.78, "dt", (15.6, 6.9), 1),
            (5.92, "d", (15.6,), 1),
            (7.30, "d", (8.8,), 2),
        ],
    ),
    (
        "1H-NMR (CDCl3, 270 MHz) δ: 7.81 (2H, d, J=8.3 Hz), 4.15 (1H, br s, D2O exchangeable), 2.44 (3H, s)",
        [(7.81, "d", (8.3,), 2), (4.15, "br s", (), 1), (2.44, "s", (), 3)],
    ),
    (
        "1H NMR (300 MHz, DMSO-d6): δ 10.21 (s, 1H, NH), 7.98 (dd, J = 8.7 and 2.4 Hz, 1H, H-6), 3.33 (H2O), "
        "2.50 (DMSO-d5), 2.08 (s, 3H, COCH3)",
        [(10.21, "s", (), 1), (7.98, "dd", (8.7, 2.4), 1), (2.08, "s", (), 3)],
    ),
    (
        "1H NMR (CDCl3) δ 3.45 (dd, 1H, J1 = 9.8 Hz, J2 = 6.1 Hz, CHH'), 5.25 (apparent dq, J "
        "= 10.4, 1.4 Hz, 1H), "
        "4.05 (br d, J = 5 Hz, 2H), 1.7 (br, 1H), 7.81 (AA'BB', 2H)",
        [
            (3.45, "dd", (9.8, 6.1), 1),
            (5.25, "app dq", (10.4, 1.4), 1),
            (4.05, "br d", (5.0,), 2),
            (1.7, "br s", (), 1),
            (7.81, "m", (), 2),
        ],
    ),
    (
        "1H NMR (400 MHz, CDCl3) δ 7.39 (dd, J1,2 = 8.1 Hz, J2,3 = 1.2 Hz, 2H), 6.05 (ddd, 3JH,H = 17.1 Hz, "
        "3JH,H = 10.3 Hz, 3JH,F = 5.0 Hz, 1H), 4.48 (dd, 2J(H,F) = 47.2 Hz, J = 5.0 Hz, 2H)",
        [(7.39, "dd", (8.1, 1.2), 2), (6.05, "ddd", (17.1, 10.3, 5.0), 1), (4.48, "dd", (47.2, 5.0), 2)],
    ),
    (
        "1H NMR (CDCl3, 400 MHz): δ = 7,81 (d, J = 8,2 Hz, 2H), 2,98 (sept, J = 6,9 Hz, 1H), "
        "1,27 (d, J = 6,9 Hz, 6H)",
        [(7.81, "d", (8.2,), 2), (2.98, "sept", (6.9,), 1), (1.27, "d", (6.9,), 6)],
    ),
    (
        "1H NMR (400 MHz, CDCl3) delta 7.81 d 2H J=8.2, 2.98 sept 1H, 1.25 d 6H",
        [(7.81, "d", (8.2,), 2), (2.98, "sept", (), 1), (1.25, "d", (), 6)],
    ),
    (
        "9.97 s 1H\n7.81 d 8.2 2H\n2.98 sept 6.9 1H",
        [(9.97, "s", (), 1), (7.81, "d", (8.2,), 2), (2.98, "sept", (6.9,), 1)],
    ),
    ("9.97, 7.81, 2.98", [(9.97, "", (), None), (7.81, "", (), None), (2.98, "", (), None)]),
    (
        "1H NMR δ 4.55 and 4.42 (ABq, J = 12.0 Hz, 2H), 1.20 (2 × s, 2×CH3), 7.20 (d, 2H, J 8)",
        [(4.55, "d", (12.0,), 1), (4.42, "d", (12.0,), 1), (1.20, "s", (), 6), (7.20, "d", (8.0,), 2)],
    ),
    (
        "1H NMR (400MHz,CDCl3)δ7.81(d,J=8.2Hz,2H),7.39(d,J≈8Hz,2H),\n2.98(sept,J=6.9Hz,1H)",
        [(7.81, "d", (8.2,), 2), (7.39, "d", (8.0,), 2), (2.98, "sept", (6.9,), 1)],
    ),
    (
        "1H NMR (400 MHz, CDCl3) δ ppm 1.39 (s, 9 H) 4.50 (br. s., 1 H) 2.98 (spt, J=6.9 Hz, 1 H) "
        "1.63 (quin, J=7.0 Hz, 2 H) 1.45 (sxt, J=7.3 Hz, 2 H)",
        [
            (1.39, "s", (), 9),
            (4.50, "br s", (), 1),
            (2.98, "sept", (6.9,), 1),
            (1.63, "quint", (7.0,), 2),
            (1.45, "sext", (7.3,), 2),
        ],
    ),
    (
        "1H NMR (CDCl3) δ 5.27 (d, 1 H, J1,2 4.0 Hz, H-1), 2.1, 2.0, 1.9 (3 s, 9 H, 3 Ac), "
        "6.8, 7.2 (AB system, 4H, J = 8.6 Hz)",
        [
            (5.27, "d", (4.0,), 1),
            (2.1, "s", (), 3),
            (2.0, "s", (), 3),
            (1.9, "s", (), 3),
            (6.8, "d", (8.6,), 2),
            (7.2, "d", (8.6,), 2),
        ],
    ),
    ("7.81, d, 8.2, 2H\n2.98, sept, 6.9, 1H", [(7.81, "d", (8.2,), 2), (2.98, "sept", (6.9,), 1)]),
    (
        "NMR (60 MHz, CCl4): δ 7.2 (m, 5H), 2.6 (q, 2H, J = 7), 1.2 (t, 3H, J = 7)",
        [(7.2, "m", (), 5), (2.6, "q", (7.0,), 2), (1.2, "t", (7.0,), 3)],
    ),
]


@pytest.mark.parametrize(("line", "signals"), PROTON, ids=[line[:40] for line, _ in PROTON])
def test_proton_lines(line: str, signals: list[Signal]) -> None:
    parsed = parse_report(line)
    assert [(s.ppm, s.mult, s.j, s.n) for s in parsed.readings.h1] == signals
    assert not parsed.unread


def test_a_range_keeps_both_ends() -> None:
    for text in ("7.20–7.35 (m, 5H)", "7.35-7.20 (m, 5H)", "7.20 to 7.35 (m, 5H)", "7.35—7.20 (5H, m)"):
        (signal,) = parse_report(f"1H NMR δ {text}").readings.h1
        assert (signal.lo, signal.hi, signal.mult, signal.n) == (7.20, 7.35, "m", 5)


CARBON = [
    (
        "13C{1H} NMR (126 MHz, CDCl3) δ 164.2 (d, 1JCF = 252.3 Hz), 132.4 (d, 3JCF = 9.2 Hz, "
        "2C), 77.2 (CDCl3), 29.7 (3C).",
        [(164.2, "", 1, (252.3,)), (132.4, "", 2, (9.2,)), (29.7, "", 3, ())],
    ),
    (
        "13C NMR (75 MHz, CDCl3): δ 170.1 (C=O), 159.4 (C-4), 130.3 (2 x CH), 113.8 (2CH), "
        "66.2 (CH2O), 55.2 (OCH3)",
        [
            (170.1, "C", 1, ()),
            (159.4, "", 1, ()),
            (130.3, "CH", 2, ()),
            (113.8, "CH", 2, ()),
            (66.2, "CH2", 1, ()),
            (55.2, "CH3", 1, ()),
        ],
    ),
    (
        "δC(75 MHz; CDCl3) 14.3 (q), 60.2 (t), 122.0 (d) and 166.6 (s)",
        [(14.3, "CH3", 1, ()), (60.2, "CH2", 1, ()), (122.0, "CH", 1, ()), (166.6, "C", 1, ())],
    ),
    (
        "13C NMR (CDCl3, 100 MHz) δ 173.9 (Cq), 128.5, 128.4 (each 2C), 29.3 (2 × CH2)",
        [(173.9, "C", 1, ()), (128.5, "", 2, ()), (128.4, "", 2, ()), (29.3, "CH2", 2, ())],
    ),
    (
        "192,0; 156,2; 134,5; 23,6",
        [(192.0, "", 1, ()), (156.2, "", 1, ()), (134.5, "", 1, ()), (23.6, "", 1, ())],
    ),
]


@pytest.mark.parametrize(("line", "carbons"), CARBON, ids=[line[:40] for line, _ in CARBON])
def test_carbon_lines(line: str, carbons: list[tuple[float, str, int, J]]) -> None:
    parsed = parse_report(line)
    assert [(c.ppm, c.kind, c.n, c.j_cf) for c in parsed.readings.c13] == carbons
    assert not parsed.unread


INFRARED = [
    ("IR (film) ν 3350 (br), 1715 (s) cm-1", "film", [(3350, "", "broad"), (1715, "strong", "")]),
    (
        "νmax(film)/cm−1 3350br, 1715s and 1600",
        "film",
        [(3350, "", "broad"), (1715, "strong", ""), (1600, "", "")],
    ),
    (
        "IR (KBr): ν̃ = 2960 (m), 1715 (s, C=O), 835 vs cm⁻¹.",
        "KBr",
        [(2960, "medium", ""), (1715, "strong", ""), (835, "strong", "")],
    ),
    (
        "FT-IR (ATR) 3600–3200 (br), 1,735 (s), 1605 w",
        "ATR",
        [(3400, "", "broad"), (1735, "strong", ""), (1605, "weak", "")],
    ),
    ("IR νmax (CHCl3) 3500, 1710 cm-1", "CHCl3", [(3500, "", ""), (1710, "", "")]),
]


@pytest.mark.parametrize(("line", "medium", "bands"), INFRARED, ids=[line[:30] for line, _, _ in INFRARED])
def test_infrared_lines(line: str, medium: str, bands: list[tuple[float, str, str]]) -> None:
    parsed = parse_report(line)
    assert parsed.readings.ir_medium == medium
    assert [(b.cm1, b.strength, b.shape) for b in parsed.readings.ir] == bands
    assert not parsed.unread


MASS = [
    ("MS (EI) m/z (%) 148 (M+, 35), 133 (100), 105 (40)", [(148, 35), (133, 100), (105, 40)]),
    ("m/z (EI) 148 (M+, 35%), 133 (100), 105", [(148, 35), (133, 100), (105, None)]),
    ("MS (EI, 70 eV): m/z (%) = 148 (35) [M+], 133 (100).", [(148, 35), (133, 100)]),
    ("GC-MS (EI) m/z 164 (M+•, 57), 149 (100), 150 (M+ - CO, 12%)", [(164, 57), (149, 100), (150, 12)]),
]


@pytest.mark.parametrize(("line", "peaks"), MASS, ids=[line[:30] for line, _ in MASS])
def test_mass_lines(line: str, peaks: list[tuple[float, float | None]]) -> None:
    parsed = parse_report(line)
    assert [(p.mz, p.rel) for p in parsed.readings.ms] == peaks
    assert not parsed.unread


ACCURATE = [
    (
        "HRMS (ESI) m/z: [M+H]+ calcd for C10H13O 149.0961, found 149.0963",
        149.0963,
        "[M+H]+",
        149.0961,
        "C10H12O",
    ),
    (
        "HRMS (ESI-TOF) m/z: [M + Na]+ Calcd for C10H12ONa 171.0780; Found 171.0783",
        171.0783,
        "[M+Na]+",
        171.0780,
        "C10H12O",
    ),
    (
        "HRMS (EI): m/z calcd for C10H12O [M]+: 148.0888, found: 148.0885",
        148.0885,
        "[M]+.",
        148.0888,
        "C10H12O",
    ),
    ("HRMS calcd for C10H12O (M + H)+ 149.0961, found 149.0958", 149.0958, "[M+H]+", 149.0961, "C10H12O"),
    (
        "HRMS (ESI): m/z calcd for C10H12O + Na+: 171.0780 [M + Na]+; found: 171.0779",
        171.0779,
        "[M+Na]+",
        171.0780,
        "C10H12O",
    ),
    ("Found: M+, 148.0888. C10H12O requires M, 148.0888", 148.0888, "[M]+.", 148.0888, "C10H12O"),
    ("(Found: [M+H]+, 149.0965. C10H13O requires 149.0961)", 149.0965, "[M+H]+", 149.0961, "C10H12O"),
    ("HRESIMS m/z 147.0819 [M - H]- (calcd for C10H11O, 147.0815)", 147.0819, "[M-H]-", 147.0815, "C10H12O"),
    (
        "Exact mass 148.0886, calculated for C<sub>10</sub>H<sub>12</sub>O 148.0888",
        148.0886,
        "[M]+.",
        148.0888,
        "C10H12O",
    ),
]


@pytest.mark.parametrize(
    ("line", "found", "adduct", "calc", "formula"), ACCURATE, ids=[a[0][:40] for a in ACCURATE]
)
def test_accurate_mass_lines(line: str, found: float, adduct: str, calc: float, formula: str) -> None:
    readings = parse_report(line).readings
    assert readings.hrms == HighResMass(found, adduct, calc, 5.0)
    assert readings.formula == formula


ANALYSES = [
    "Anal. Calcd for C10H12O: C, 81.04; H, 8.16. Found: C, 81.00; H, 8.20.",
    "Found: C, 81.0; H, 8.2. C10H12O requires C, 81.04; H, 8.16%",
    "elemental analysis calcd (%) for C10H12O: C 81.04, H 8.16; found: C 81.00, H 8.20.",
    "Anal. Found: C, 81.0; H, 8.2. Calc. for C10H12O: C, 81.0; H, 8.2%",
    "Calcd for C10H12O: C, 81.04; H, 8.16. Found: C, 81,00; H, 8,20",
]


@pytest.mark.parametrize("line", ANALYSES, ids=[line[:30] for line in ANALYSES])
def test_combustion_lines(line: str) -> None:
    readings = parse_report(line).readings
    assert readings.analysis is not None
    assert readings.analysis.found == {"C": 81.0, "H": 8.2}
    assert readings.formula == "C10H12O"


def test_a_whole_experimental_paragraph() -> None:
    parsed = parse_report(
        "Compound 2a. Colourless oil (85%). Rf = 0.4 (hexane/EtOAc 9:1). mp 55–56 °C. IR "
        "(neat) 1702, 1606 cm–1. "
        "1H NMR (400 MHz, CDCl3): δ 9.97 (s, 1H), 7.81 (d, J = 8.2 Hz, 2H). 13C{1H} NMR (101 "
        "MHz, CDCl3): δ 192.0, "
        "156.2. 19F NMR (376 MHz, CDCl3) δ –113.2. MS (EI) m/z 148 (M+, 35). HRMS (EI): calcd "
        "for C10H12O [M]+: "
        "148.0888, found 148.0885. Anal. Calcd for C10H12O: C, 81.04; H, 8.16. Found: C, 81.0; H, 8.2."
    )
    readings = parsed.readings
    assert (len(readings.h1), len(readings.c13), len(readings.ir), len(readings.ms)) == (2, 2, 2, 1)
    assert readings.hrms is not None
    assert readings.analysis is not None
    assert (readings.solvent, readings.mhz, readings.ir_medium) == ("CDCl3", 400, "neat")
    assert not parsed.unread
    assert any("19F" in p.text and "not used" in p.means for p in parsed.pieces)


def test_fragments_named_as_losses_stay_fragments() -> None:
    readings = parse_report("MS (EI): m/z (%) = 178 (25) [M]+, 149 (100) [M–C2H5]+, 121 (35).").readings
    assert [(p.mz, p.rel) for p in readings.ms] == [(178, 25), (149, 100), (121, 35)]
    assert readings.hrms is None


def test_soft_ionisation_gives_an_adduct_not_fragments() -> None:
    readings = parse_report("ESI-MS: m/z 171.1 [M+Na]+, 149.1 [M+H]+").readings
    assert readings.ms == ()
    assert readings.hrms == HighResMass(171.1, "[M+Na]+", None, 1000.0)
