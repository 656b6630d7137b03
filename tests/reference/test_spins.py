"""Spin systems against closed forms, and multiplets read after the published procedure.

Sources: PSB = Pople, Schneider and Bernstein, High-resolution Nuclear Magnetic Resonance, McGraw-Hill 1959,
chapter 6 (AB: section 6-4; AB2: section 6-5; ABX: section 6-7); GUN = Gunther, NMR Spectroscopy, analysis of
high-resolution spectra (AA'XX'); HHV = Hoye, Hanson and Vyvyan, J. Org. Chem. 1994, 59, 4096;
HZ = Hoye and Zhao, J. Org. Chem. 2002, 67, 4014. Formulas, rules and section numbers from memory.
"""

from __future__ import annotations

import cmath
from collections.abc import Sequence
from math import atan2, cos, hypot, sin, sqrt

import pytest

from hoodside.predict.multiplet import lines as first_order_lines
from hoodside.predict.spins import LineList, Nuclei, SpinSystem, exact_lines
from hoodside.predict.spins.ab_quartet import ab_lines, read_ab_quartet
from hoodside.predict.spins.multiplet_reading import read_multiplet


def simulated(*groups: tuple[float, int], j: float) -> list[tuple[float, float]]:
    system = SpinSystem(tuple(Nuclei(hz, n) for hz, n in groups), ((0, 1, j),))
    return [(line.hz, line.intensity) for line in exact_lines(system)]


@pytest.mark.parametrize("difference", [1.0, 5.0, 8.6, 20.0, 200.0])
@pytest.mark.parametrize("j", [2.0, 8.6, 16.0])
def test_ab_closed_form(difference: float, j: float) -> None:
    """PSB: lines at (nuA + nuB)/2 +- J/2 +- C/2, C^2 = difference^2 + J^2; heights 1 -+ J/C."""
    found = simulated((100.0, 1), (100.0 + difference, 1), j=j)
    c, middle = hypot(difference, j), 100.0 + difference / 2
    expected = sorted(
        [(middle + s * (c + j) / 2, (1 - j / c) / 2) for s in (-1, 1)]
        + [(middle + s * (c - j) / 2, (1 + j / c) / 2) for s in (-1, 1)]
    )
    assert [h for h, _ in found] == pytest.approx([h for h, _ in expected], abs=1e-9)
    assert [i for _, i in found] == pytest.approx([i for _, i in expected], abs=1e-9)
    assert [h for h, _ in ab_lines(100.0, 100.0 + difference, j)] == pytest.approx([h for h, _ in expected])


@pytest.mark.parametrize(("difference", "j"), [(4.0, 7.0), (10.0, 7.0), (30.0, 7.0), (15.0, 2.0)])
def test_ab2_closed_form(difference: float, j: float) -> None:
    """PSB: the eight lines of AB2 and its combination line."""
    a, b = 100.0 + difference, 100.0
    half, middle = (a - b) / 2, (a + b) / 2
    plus = half + j / 4, j / sqrt(2)
    minus = half - j / 4, j / sqrt(2)
    c_plus, c_minus = hypot(*plus), hypot(*minus)
    p, m = atan2(plus[1], plus[0]) / 2, atan2(minus[1], minus[0]) / 2
    r = sqrt(2)
    expected = [
        (middle + 3 * j / 4 + c_plus, (r * sin(p) - cos(p)) ** 2),
        (b + c_plus + c_minus, (r * sin(p - m) + cos(p) * cos(m)) ** 2),
        (a, 1.0),
        (middle - 3 * j / 4 + c_minus, (r * sin(m) + cos(m)) ** 2),
        (b + c_plus - c_minus, (r * cos(p - m) + cos(p) * sin(m)) ** 2),
        (middle + 3 * j / 4 - c_plus, (r * cos(p) + sin(p)) ** 2),
        (b - c_plus + c_minus, (r * cos(p - m) - sin(p) * cos(m)) ** 2),
        (middle - 3 * j / 4 - c_minus, (r * cos(m) - sin(m)) ** 2),
        (b - c_plus - c_minus, (r * sin(p - m) + sin(p) * sin(m)) ** 2),
    ]
    total = sum(i for _, i in expected)
    found = simulated((a, 1), (b, 2), j=j)
    for hz, intensity in expected:
        near = sum(i for h, i in found if abs(h - hz) < 1e-7)
        assert near == pytest.approx(3 * intensity / total, abs=1e-6)


def test_ab2_line_rules() -> None:
    """PSB: line 3 is nuA, lines 5 and 7 lie about nuB, and J = (f1 - f4 + f6 - f8)/3."""
    found = [(h, i) for h, i in simulated((130.0, 1), (110.0, 2), j=6.0) if i > 1e-3]
    f = [h for h, _ in sorted(found, reverse=True)][:8]
    assert len(found) == 8
    assert f[2] == pytest.approx(130.0)
    assert (f[4] + f[6]) / 2 == pytest.approx(110.0)
    assert (f[0] - f[3] + f[5] - f[7]) / 3 == pytest.approx(6.0)


@pytest.mark.parametrize(
    ("a", "b", "j_ab", "j_ax", "j_bx"),
    [
        (12.0, 0.0, -14.0, 8.0, 4.0),
        (6.0, 0.0, 16.5, 10.2, -1.5),
        (3.0, 0.0, 8.0, 7.0, 0.0),
        (40.0, 0.0, 7.5, 6.0, 1.0),
    ],
)
def test_abx_closed_form(a: float, b: float, j_ab: float, j_ax: float, j_bx: float) -> None:
    """PSB: two AB quartets, one for each state of X, and six lines of X, two of them combination lines."""
    x, middle, total = 1e7, (a + b) / 2, (j_ax + j_bx) / 2
    half = {s: complex((a - b + s * (j_ax - j_bx) / 2) / 2, j_ab / 2) for s in (1, -1)}
    d = {s: abs(half[s]) for s in (1, -1)}
    expected = [
        (middle + s * total / 2 + t * j_ab / 2 + u * d[s], (1 - t * u * j_ab / (2 * d[s])) / 4)
        for s in (1, -1)
        for t in (1, -1)
        for u in (1, -1)
    ]
    between = cmath.phase(half[1] / half[-1]) / 2
    for s in (1, -1):
        expected += [
            (x + s * total, 1 / 4),
            (x + s * (d[1] - d[-1]), cos(between) ** 2 / 4),
            (x + s * (d[1] + d[-1]), sin(between) ** 2 / 4),
        ]
    nuclei = (Nuclei(a), Nuclei(b), Nuclei(x))
    lines = exact_lines(SpinSystem(nuclei, ((0, 1, j_ab), (0, 2, j_ax), (1, 2, j_bx))))
    assert_lines(lines, expected, 1e-4)


@pytest.mark.parametrize(
    ("j_aa", "j_xx", "j", "j_cross"),
    [(2.4, 7.3, 9.0, 3.0), (2.5, 2.1, 8.5, 0.4), (-12.0, -13.0, 8.8, 5.4), (1.5, 7.6, 8.1, 1.3)],
)
def test_aaxx_closed_form(j_aa: float, j_xx: float, j: float, j_cross: float) -> None:
    """GUN: half of each side in two lines N = J + J' apart, and two quartets with K, M and L = J - J'."""
    n, k, m, difference = j + j_cross, j_aa + j_xx, j_aa - j_xx, j - j_cross
    side = [(n / 2, 1 / 2), (-n / 2, 1 / 2)]
    for own in (k, m):
        root = hypot(own, difference)
        side += [(sign * (root + t * own) / 2, (1 - t * own / root) / 8) for sign in (1, -1) for t in (1, -1)]
    x = 1e7
    nuclei = tuple(Nuclei(hz) for hz in (0.0, 0.0, x, x))
    couplings = ((0, 1, j_aa), (2, 3, j_xx), (0, 2, j), (1, 3, j), (0, 3, j_cross), (1, 2, j_cross))
    lines = exact_lines(SpinSystem(nuclei, couplings))
    assert_lines(lines, [*side, *((x + hz, i) for hz, i in side)], 1e-4)


def test_deceptively_simple_abx() -> None:
    """PSB: with A and B nearly alike, X is a triplet of spacing (J_AX + J_BX)/2, whatever the two J."""
    nuclei = (Nuclei(0.0), Nuclei(1.0), Nuclei(1e6))
    lines = exact_lines(SpinSystem(nuclei, ((0, 1, 16.0), (0, 2, 9.0), (1, 2, 3.0))))
    strong = [(hz - 1e6, i) for hz, i in zip(lines.hz, lines.intensity, strict=True) if hz > 5e5 and i > 0.05]
    assert [hz for hz, _ in strong] == pytest.approx([-6, 0, 0, 6], abs=0.2)
    assert [i for _, i in strong] == pytest.approx([0.25, 0.25, 0.25, 0.25], abs=0.01)


def assert_lines(lines: LineList, expected: list[tuple[float, float]], within: float) -> None:
    """Every expected line is there with its intensity, lines at one place taken together, and no other is."""
    for hz, _ in expected:
        there = sum(i for at, i in expected if abs(at - hz) < within)
        found = sum(i for at, i in zip(lines.hz, lines.intensity, strict=True) if abs(at - hz) < 2 * within)
        assert found == pytest.approx(there, abs=1e-5)
    assert sum(i for _, i in expected) == pytest.approx(sum(lines.intensity), rel=1e-5)


def test_ab_quartet_gives_back_shifts_and_coupling() -> None:
    """PSB: J = f1 - f2 = f3 - f4, difference = sqrt((f1 - f4)(f2 - f3))."""
    made = ab_lines(400.0, 412.0, 14.4)
    found = read_ab_quartet([h for h, _ in made], [i for _, i in made])
    assert found is not None
    assert (found.j, found.difference, found.centre) == pytest.approx((14.4, 12.0, 406.0))
    assert found.shifts == pytest.approx((400.0, 412.0))


def test_two_doublets_of_equal_height_are_no_ab_quartet() -> None:
    assert read_ab_quartet([0.0, 7.0, 10.0, 17.0], [1, 1, 1, 1]) is None
    assert read_ab_quartet([0.0, 7.0, 10.0, 15.0]) is None


#: After HHV and HZ: patterns with J (Hz) as printed for real signals, or made after a rule of the papers.
READ = [
    ("dd", (14.0, 6.3), "=CHO of vinyl acetate, Silverstein"),
    ("dd", (17.6, 10.9), "=CH of styrene, Silverstein"),
    ("td", (10.5, 4.3), "CHOH of menthol, tests/cases/published.json"),
    ("ddt", (17.0, 10.4, 5.5), "=CH of an allyl ether, tests/cases/published.json"),
    ("ddd", (8.2, 7.2, 1.9), "ring H of an ortho-disubstituted benzene, tests/cases/published.json"),
    ("dddd", (17.2, 10.0, 8.0, 6.5), "=CH of a homoallylic alcohol with unlike CH2, common practice"),
    ("dq", (15.4, 6.4), "=CH of an (E)-propenyl group, tests/cases/published.json"),
    ("tt", (11.6, 3.9), "axial CH between two CH2 of a cyclohexane, common practice"),
    ("qd", (7.2, 2.2), "CH of a 2-arylpropanal, common practice"),
    ("sept", (6.9,), "CH of an isopropyl group, common practice"),
    ("ddd", (13.4, 9.6, 4.2), "one line of three unlike couplings, rules of HHV"),
    ("dt", (12.0, 4.0), "triplet from two equal couplings, rules of HHV"),
    ("ddd", (12.0, 7.0, 5.0), "largest J the sum of the others: two lines coincide, rules of HHV"),
    ("dddd", (15.0, 10.0, 5.0, 2.5), "couplings in simple ratios: coinciding lines, rules of HZ"),
]


@pytest.mark.parametrize(("pattern", "j", "source"), READ, ids=lambda x: str(x))
def test_multiplets_are_read_back(pattern: str, j: tuple[float, ...], source: str) -> None:
    made = first_order_lines(pattern, j)
    found = read_multiplet([h for h, _ in made], [i for _, i in made]).readings[0]
    assert found.pattern == pattern, source
    assert found.j == pytest.approx(j, abs=0.05)


@pytest.mark.parametrize(("pattern", "j", "source"), READ, ids=lambda x: str(x))
def test_rules_of_systematic_analysis(pattern: str, j: tuple[float, ...], source: str) -> None:
    """HHV: the first gap is the smallest J, and all J (each times its partners) span the multiplet."""
    made = first_order_lines(pattern, j)
    found = read_multiplet([h for h, _ in made], [i for _, i in made]).readings[0]
    span = sum(s.hz * s.count for s in found.splittings)
    assert made[1][0] - made[0][0] == pytest.approx(min(found.j), abs=0.05)
    assert made[-1][0] - made[0][0] == pytest.approx(span, abs=0.1)


#: (pattern, J, [(Hz from the first line, relative height)]): what adding up couplings gives, lines that fall
#: together printed as one at their common centre of gravity. Heights are whole numbers that add up to 2^n.
PRINTED = [
    (
        "dddd",
        (15.0, 9.0, 6.0, 3.0),
        [
            (0, 1),
            (3, 1),
            (6, 1),
            (9, 2),
            (12, 1),
            (15, 2),
            (18, 2),
            (21, 1),
            (24, 2),
            (27, 1),
            (30, 1),
            (33, 1),
        ],
    ),
    (
        "dddd",
        (16.0, 10.5, 7.0, 3.5),
        [
            *((0, 1), (3.5, 1), (7, 1), (10.5, 2), (14, 1), (16, 1), (17.5, 1)),
            *((19.5, 1), (21, 1), (23, 1), (26.5, 2), (30, 1), (33.5, 1), (37, 1)),
        ],
    ),
    (
        "ddt",
        (16.8, 10.4, 6.0),
        [
            (0, 1),
            (6, 2),
            (10.4, 1),
            (12, 1),
            (16.533, 3),
            (22.667, 3),
            (27.2, 1),
            (28.8, 1),
            (33.2, 2),
            (39.2, 1),
        ],
    ),
    (
        "dtd",
        (12.0, 6.0, 2.0),
        [(0, 1), (2, 1), (6, 2), (8, 2), (12, 2), (14, 2), (18, 2), (20, 2), (24, 1), (26, 1)],
    ),
    ("qd", (6.0, 3.0), [(0, 1), (3, 1), (6, 3), (9, 3), (12, 3), (15, 3), (18, 1), (21, 1)]),
    ("dq", (12.0, 6.0), [(0, 1), (6, 3), (12, 4), (18, 4), (24, 3), (30, 1)]),
    (
        "tdd",
        (9.5, 7.0, 2.5),
        [(0, 1), (2.5, 1), (7, 1), (9.5, 3), (12, 2), (16.5, 2), (19, 3), (21.5, 1), (26, 1), (28.5, 1)],
    ),
    ("ddd", (10.0, 7.0, 3.0), [(0, 1), (3, 1), (7, 1), (10, 2), (13, 1), (17, 1), (20, 1)]),
    ("td", (7.5, 1.5), [(0, 1), (1.5, 1), (7.5, 2), (9, 2), (15, 1), (16.5, 1)]),
    ("tt", (11.0, 4.0), [(0, 1), (4, 2), (8, 1), (11, 2), (15, 4), (19, 2), (22, 1), (26, 2), (30, 1)]),
]


@pytest.mark.parametrize(("pattern", "j", "printed"), PRINTED, ids=lambda x: str(x)[:20])
def test_worked_multiplets_with_lines_that_coincide(
    pattern: str, j: tuple[float, ...], printed: list[tuple[float, int]]
) -> None:
    """From the printed lines back to the couplings, and by HZ's counting as well."""
    found = read_multiplet([1200 + hz for hz, _ in printed], [float(i) for _, i in printed]).readings[0]
    assert found.pattern == pattern
    assert found.j == pytest.approx(j, abs=0.15)
    counted = [s.hz for s in found.splittings for _ in range(s.count)]
    assert by_counting(printed) == pytest.approx(sorted(counted), abs=0.5)


@pytest.mark.parametrize(("pattern", "j", "source"), READ, ids=lambda x: str(x))
def test_counting_of_components_gives_the_same_couplings(
    pattern: str, j: tuple[float, ...], source: str
) -> None:
    made = first_order_lines(pattern, j)
    least = made[0][1]
    printed = [(hz - made[0][0], round(share / least)) for hz, share in made]
    found = read_multiplet([h for h, _ in made], [i for _, i in made]).readings[0]
    assert by_counting(printed) == pytest.approx(
        sorted(s.hz for s in found.splittings for _ in range(s.count)), abs=0.5
    )


def by_counting(printed: Sequence[tuple[float, int]]) -> list[float]:
    """HZ's procedure, from memory: rising couplings of a multiplet given as lines with whole-number heights.

    The lines are written out as 2^n components. J1 is the distance from the first to the second. Each
    further coupling is the distance from the first component to the next that is no sum of those before.
    """
    left = [hz for hz, height in printed for _ in range(height)]
    first = left.pop(0)
    found, sums = [], [0.0]
    while left:
        coupling = left[0] - first
        found.append(coupling)
        for total in [total + coupling for total in sums]:
            left.remove(min(left, key=lambda hz: abs(hz - first - total)))
            sums.append(total)
    return found
