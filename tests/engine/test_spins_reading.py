"""Couplings read back from lines, fitted spin systems, and partners."""

from __future__ import annotations

import random

import pytest

from bench.synthetic_multiplets import mixture
from hoodside.engine import call
from hoodside.errors import InvalidInputError
from hoodside.predict.spins import Nuclei, SpinSystem, exact_lines, fit_from_json, spins_from_json
from hoodside.predict.spins.ab_quartet import ab_lines
from hoodside.predict.spins.fit import fit_system
from hoodside.predict.spins.least_squares import solve_least_squares, solve_symmetric
from hoodside.predict.spins.multiplet_reading import read_multiplet
from hoodside.predict.spins.partners import find_partners
from hoodside.readings import ProtonSignal


def test_noisy_overlapped_multiplets_are_read_right() -> None:
    """Pattern and every J within 0.4 Hz for at least 95 % of 300 made-up multiplets.

    A third each with 2, 3 and 4 couplings, and with no, one and two lines hidden by overlap.
    """
    rng, right = random.Random(11), 0
    for made in mixture(rng, 300):
        readings = read_multiplet(made.hz, made.heights).readings
        right += (
            bool(readings)
            and readings[0].pattern == made.pattern
            and all(abs(a - b) <= 0.4 for a, b in zip(readings[0].j, made.j, strict=True))
        )
    assert right >= 285


def test_noise_with_tails_leaves_most_multiplets_right() -> None:
    """The same with errors of 0.2 Hz standard deviation, three times as large now and then: nine in ten."""
    rng, right = random.Random(5), 0
    for made in mixture(rng, 150):
        hz = [at + rng.gauss(0, 0.16) for at in made.hz]
        readings = read_multiplet(hz, made.heights).readings
        right += bool(readings) and readings[0].pattern == made.pattern
    assert right >= 135


def test_noisy_septet_is_one() -> None:
    """Lines 7 Hz apart, read to 0.3 Hz, 1 : 6 : 15 : 20 : 15 : 6 : 1 (Pascal's triangle)."""
    hz = [0.3, 6.8, 14.2, 20.9, 28.3, 34.8, 42.1]
    assert read_multiplet(hz, [1, 6, 15, 20, 15, 6, 1]).readings[0].pattern == "sept"


def test_order_of_lines_does_not_matter() -> None:
    hz, heights = [16.0, 0.0, 10.0, 6.0], [1.0, 1.0, 1.1, 0.9]
    assert read_multiplet(hz, heights).readings == read_multiplet(sorted(hz), [1.0, 0.9, 1.1, 1.0]).readings


def test_one_line_is_a_singlet() -> None:
    found = read_multiplet([500.0]).readings[0]
    assert (found.pattern, found.j, found.centre_hz) == ("s", (), 500.0)


def test_heights_decide_between_a_triplet_and_its_rivals() -> None:
    assert read_multiplet([0, 7, 14], [1, 2, 1]).readings[0].pattern == "t"
    assert read_multiplet([0, 7, 14]).readings[0].pattern == "t"


def test_leaning_and_crooked_patterns_are_warned_of() -> None:
    leaning = read_multiplet([0, 8], [1.0, 2.0]).warnings
    assert any("higher shift" in w for w in leaning)
    crooked = read_multiplet([0.0, 5.0, 13.5, 16.0], [1, 1, 1, 1]).warnings
    assert any("symmetry" in w for w in crooked)


def test_lines_without_a_first_order_reading_say_so() -> None:
    found = read_multiplet([0, 3, 11, 12.5, 30], [1, 9, 2, 7, 1])
    assert not found.readings
    assert any("first order" in w for w in found.warnings)


@pytest.mark.parametrize(
    ("hz", "heights"),
    [([], None), ([1.0] * 41, None), ([float("nan")], None), ([1, 2], [1]), ([1, 2], [1, 0])],
)
def test_impossible_lines_are_refused(hz: list[float], heights: list[float] | None) -> None:
    with pytest.raises(InvalidInputError):
        read_multiplet(hz, heights)


@pytest.mark.parametrize("seed", range(4))
def test_fit_finds_an_abc_system_from_a_rough_start(seed: int) -> None:
    rng = random.Random(seed)
    true = SpinSystem((Nuclei(120.0), Nuclei(134.0), Nuclei(160.0)), ((0, 1, 11.2), (0, 2, 5.1), (1, 2, 1.9)))
    start = SpinSystem(
        tuple(Nuclei(g.hz + rng.uniform(-6, 6)) for g in true.groups),
        tuple((a, b, j + rng.uniform(-1.5, 1.5)) for a, b, j in true.couplings),
    )
    lines = exact_lines(true).without_weak(0.03)
    hz = [h + rng.uniform(-0.1, 0.1) for h in lines.hz]
    found = fit_system(start, hz, [i * rng.uniform(0.85, 1.15) for i in lines.intensity])
    assert [g.hz for g in found.system.groups] == pytest.approx([g.hz for g in true.groups], abs=0.2)
    for (_, _, fitted), (_, _, j) in zip(found.system.couplings, true.couplings, strict=True):
        assert fitted == pytest.approx(j, abs=0.4)
    assert found.rms_hz < 0.2
    assert all(e < 0.5 for e in found.uncertain_hz)


def test_fit_leaves_alone_what_is_not_free() -> None:
    start = SpinSystem((Nuclei(100.0), Nuclei(120.0)), ((0, 1, 6.0),))
    lines = exact_lines(SpinSystem((Nuclei(102.0), Nuclei(121.0)), ((0, 1, 6.0),)))
    found = fit_system(start, list(lines.hz), list(lines.intensity), free_couplings=[])
    assert found.system.couplings == start.couplings
    assert [g.hz for g in found.system.groups] == pytest.approx([102.0, 121.0], abs=0.05)


def test_fit_refuses_nothing_and_too_much() -> None:
    system = SpinSystem((Nuclei(100.0),))
    with pytest.raises(InvalidInputError):
        fit_system(system, [], [])
    with pytest.raises(InvalidInputError):
        fit_system(system, [1.0], [1.0], free_shifts=[], free_couplings=[])


def test_partners_share_their_coupling() -> None:
    signals = [
        ProtonSignal(4.1, 4.1, "q", (7.1,), 2),
        ProtonSignal(1.25, 1.25, "t", (7.2,), 3),
        ProtonSignal(6.5, 6.5, "d", (15.9,), 1),
        ProtonSignal(6.1, 6.1, "dd", (15.8, 6.0), 1),
    ]
    shared, lone = find_partners(signals)
    assert {(s.a, s.b) for s in shared if s.counts_fit} == {(0, 1), (2, 3)}
    assert [(c.signal, c.hz) for c in lone] == [(3, 6.0)]


def test_letters_must_agree_with_the_number_of_hydrogens() -> None:
    signals = [ProtonSignal(4.1, 4.1, "q", (7.1,), 2), ProtonSignal(1.2, 1.2, "d", (7.1,), 1)]
    shared, _ = find_partners(signals)
    assert not shared[0].counts_fit


def test_multiplets_and_odd_patterns_take_part_without_letters() -> None:
    signals = [ProtonSignal(2.0, 2.1, "m", (), 2), ProtonSignal(3.0, 3.0, "what", (6.0,), 1)]
    shared, lone = find_partners(signals)
    assert not shared
    assert len(lone) == 1


def test_least_squares_of_a_line() -> None:
    rows = [[1.0, x] for x in range(5)]
    assert solve_least_squares(rows, [2 + 3 * x for x in range(5)]) == pytest.approx([2, 3], rel=1e-4)
    assert solve_symmetric([[1.0, 2.0], [2.0, 1.0]], [1.0, 1.0]) is None


def test_fit_by_json_gives_back_a_system_that_can_be_simulated() -> None:
    given = {
        "mhz": 60,
        "nuclei": [{"ppm": 2.0}, {"ppm": 2.3}],
        "j": [[0, 1, 9.0]],
        "lines": [{"hz": line.hz, "height": line.intensity} for line in exact_lines(_AB)],
    }
    answer = fit_from_json(given)
    assert answer["rms_hz"] < 0.05
    assert answer["system"]["j"][0][2] == pytest.approx(11.0, abs=0.05)
    assert [n["ppm"] * 60 for n in answer["system"]["nuclei"]] == pytest.approx([121.0, 137.0], abs=0.05)
    assert spins_from_json(answer["system"])["method"] == "exact"


_AB = SpinSystem((Nuclei(121.0), Nuclei(137.0)), ((0, 1, 11.0),))


@pytest.mark.parametrize(
    ("change", "field"),
    [
        ({"lines": None}, "lines"),
        ({"lines": [{"height": 1}]}, "lines[0].ppm"),
        ({"lines": [{"hz": 1, "height": -1}]}, "lines[0].height"),
        ({"free_j": [4]}, "free_j[0]"),
    ],
)
def test_bad_fit_names_the_field(change: dict[str, object], field: str) -> None:
    given = {
        "mhz": 60,
        "nuclei": [{"ppm": 2}, {"ppm": 3}],
        "j": [[0, 1, 7]],
        "lines": [{"hz": 120}],
        **change,
    }
    with pytest.raises(InvalidInputError) as caught:
        fit_from_json(given)
    assert caught.value.field == field


# -- fits from a structure -----------------------------------------------------------------------------------


def observed(smiles: str, mhz: float, lo: float, hi: float, by_hz: float) -> list[dict[str, float]]:
    """The stronger lines of a structure's own simulation, moved along, as a printout might have them."""
    found = call("trace", {"smiles": smiles, "mhz": mhz})
    lines = [line for system in found["systems"] for line in system["lines"] if lo < line["ppm"] < hi]
    top = max(line["intensity"] for line in lines)
    strong = [line for line in lines if line["intensity"] > 0.05 * top]
    return [{"hz": line["hz"] + by_hz, "height": line["intensity"]} for line in strong]


@pytest.mark.parametrize(
    ("smiles", "lo", "hi", "n"),
    [("CC(=O)OC=C", 4, 8, 3), ("CC(C)c1ccc(C=O)cc1", 7.1, 8.1, 4), ("CCOC(C)=O", 3.5, 4.6, 2)],
)
def test_structure_is_fitted_to_lines_that_lie_elsewhere(smiles: str, lo: float, hi: float, n: int) -> None:
    """Lines made from the prediction and moved by 5 Hz give the same shifts moved by 5 Hz, and the same J."""
    lines = observed(smiles, 60, lo, hi, 5.0)
    found = call("fit", {"smiles": smiles, "mhz": 60, "lines": lines, "n": n})
    for shift in found["shifts"]:
        assert shift["ppm"] - shift["predicted_ppm"] == pytest.approx(5 / 60, abs=0.01)
    large = [coupling for coupling in found["couplings"] if abs(coupling["predicted_hz"]) > 4]
    assert large
    for coupling in large:
        assert coupling["hz"] == pytest.approx(coupling["predicted_hz"], abs=0.6)
    assert found["rms_hz"] < 0.5


def test_symmetry_of_the_structure_outlives_the_fit() -> None:
    """A para pair is AA'BB': two shifts and the ortho J, from the four lines that a printout shows."""
    lines = [{"ppm": ppm, "height": h} for ppm, h in [(7.172, 1), (7.023, 3), (6.871, 3), (6.720, 1)]]
    found = call("fit", {"smiles": "CCOc1ccc(CCC(=O)OC)cc1", "mhz": 60, "lines": lines, "n": 4})
    assert len(found["shifts"]) == 2
    assert [c["hz"] for c in found["couplings"]] == [pytest.approx(8.6, abs=0.5)]
    assert found["rms_hz"] < 0.5


@pytest.mark.parametrize(
    ("lines", "field"),
    [
        ([{"ppm": 7.0}], "lines"),
        ([{"ppm": 40.0}, {"ppm": 40.1}], "lines"),
        ([{"ppm": 1}, {"ppm": "x"}], "lines[1].ppm"),
    ],
)
def test_structure_fit_says_what_is_wrong(lines: list[dict[str, object]], field: str) -> None:
    with pytest.raises(InvalidInputError) as caught:
        call("fit", {"smiles": "CCO", "mhz": 60, "lines": lines})
    assert caught.value.field == field
    assert caught.value.hint


# -- AB quartets ---------------------------------------------------------------------------------------------


def test_roofed_lines_are_read_as_an_ab_quartet() -> None:
    """J from the outer gaps, the difference of the shifts from the closed form of AB."""
    made = ab_lines(400.0, 409.6, 14.2)
    reading = read_multiplet([h for h, _ in made], [i for _, i in made]).readings[0]
    assert reading.pattern == "ABq"
    assert reading.j == pytest.approx((14.2,))
    assert reading.shifts_hz == pytest.approx((400.0, 409.6))


def test_heights_by_eye_are_enough_for_an_ab_quartet() -> None:
    """Low and high (1 and 3) where the true ratio of the heights is 10."""
    assert read_multiplet([0, 14, 17, 31], [1, 3, 3, 1]).readings[0].pattern == "ABq"


def test_even_gaps_stay_a_quartet_and_equal_heights_a_dd() -> None:
    assert read_multiplet([0, 7, 14, 21], [1, 3, 3, 1]).readings[0].pattern == "q"
    assert read_multiplet([0, 8, 16, 24], [1, 1, 1, 1]).readings[0].pattern == "dd"
    assert read_multiplet([0, 8.6, 10, 18.6], [1, 1, 1, 1]).readings[0].pattern == "dd"


def test_partners_too_near_for_first_order_are_told() -> None:
    h1 = [{"ppm": 7.09, "mult": "d", "j": [8.4], "n": 2}, {"ppm": 6.82, "mult": "d", "j": [8.4], "n": 2}]
    near = call("partners", {"h1": h1, "mhz": 60})["shared"][0]
    assert near["times"] == pytest.approx(0.27 * 60 / 8.4, abs=0.1)
    assert "times" not in call("partners", {"h1": h1})["shared"][0]
