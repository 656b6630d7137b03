"""Spin systems against closed forms, and multiplets read after the published procedure.

Sources: PSB = Pople, Schneider and Bernstein, High-resolution Nuclear Magnetic Resonance, McGraw-Hill 1959,
chapter 6 (AB: section 6-4; AB2: section 6-5); HHV = Hoye, Hanson and Vyvyan, J. Org. Chem. 1994, 59, 4096;
HZ = Hoye and Zhao, J. Org. Chem. 2002, 67, 4014. Formulas and rules from memory.
"""

from __future__ import annotations

from math import atan2, cos, hypot, sin, sqrt

import pytest

from hoodside.predict.multiplet import lines as first_order_lines
from hoodside.predict.spins import Nuclei, SpinSystem, exact_lines
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
