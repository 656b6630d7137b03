"""Spin simulation against a plain dense Hamiltonian, and the laws every spectrum obeys."""

from __future__ import annotations

import math
import random
from collections.abc import Sequence

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from bench.spin_families import FAMILIES, worst_line
from engine.dense_spins import dense_lines, expanded
from hoodside.errors import InvalidInputError
from hoodside.molecule import read_structure
from hoodside.numerics import eigh, merge_lines, product, transitions
from hoodside.predict.spins import (
    LineList,
    Nuclei,
    SpinSystem,
    cluster_lines,
    envelope,
    exact_lines,
    predict_spectrum,
    simulate,
    spins_from_json,
)
from hoodside.predict.spins.basis import blocks, combinations, total_spins
from hoodside.predict.spins.cluster_choice import choose_clusters
from hoodside.predict.spins.comparing import displacement
from hoodside.predict.spins.exact import add_cluster
from hoodside.predict.spins.model import Heap
from hoodside.predict.spins.surroundings import surrounded
from hoodside.predict.spins.symmetry import exchange_of, fold

Pairs = Sequence[tuple[int, int, float]]


def system(shifts: Sequence[float], couplings: Pairs, counts: Sequence[int] | None = None) -> SpinSystem:
    counts = counts or [1] * len(shifts)
    return SpinSystem(tuple(Nuclei(hz, n) for hz, n in zip(shifts, counts, strict=True)), tuple(couplings))


def assert_like_dense(counts: Sequence[int], shifts: Sequence[float], couplings: Pairs) -> None:
    """Positions to 1e-6 Hz, intensities to 1e-6 of the strongest line."""
    found = exact_lines(system(shifts, couplings, counts))
    hz, intensity = dense_lines(*expanded(counts, shifts, couplings))
    order = np.argsort(hz)
    gaps = np.flatnonzero(np.diff(hz[order], prepend=-np.inf) > 1e-6)
    sums = np.add.reduceat(intensity[order], gaps)
    middles = np.add.reduceat(hz[order] * intensity[order], gaps) / sums
    strongest = sums.max()
    ours_hz, ours = np.array(found.hz), np.array(found.intensity)
    for at, size in zip(middles, sums, strict=True):
        near = ours[np.abs(ours_hz - at) < 1e-6].sum() if len(ours) else 0.0
        assert near == pytest.approx(size, abs=1e-6 * strongest)
    assert ours.sum() == pytest.approx(intensity.sum(), rel=1e-6)


def random_system(seed: int) -> tuple[list[float], list[tuple[int, int, float]]]:
    rng = random.Random(seed)
    n = 2 + seed % 7
    shifts = [rng.uniform(0, 100) for _ in range(n)]
    pairs = [(a, b, rng.uniform(-16, 16)) for a in range(n) for b in range(a) if rng.random() < 0.7]
    return shifts, pairs


@pytest.mark.parametrize("seed", range(40))
def test_random_systems_of_two_to_eight_spins(seed: int) -> None:
    shifts, pairs = random_system(seed)
    assert_like_dense([1] * len(shifts), shifts, pairs)


#: Textbook systems: counts, shifts in Hz, couplings in Hz.
NAMED = {
    "AB": ([1, 1], [100.0, 112.0], [(0, 1, 9.0)]),
    "AB2": ([1, 2], [100.0, 108.0], [(0, 1, 7.5)]),
    "ABX": ([1, 1, 1], [100.0, 109.0, 260.0], [(0, 1, -14.0), (0, 2, 8.0), (1, 2, 4.0)]),
    "ABC": ([1, 1, 1], [100.0, 109.0, 121.0], [(0, 1, 17.0), (0, 2, 10.0), (1, 2, 1.5)]),
    "AA'XX'": (
        [1, 1, 1, 1],
        [100.0, 100.0, 400.0, 400.0],
        [(0, 1, 2.4), (2, 3, 2.1), (0, 2, 8.4), (1, 3, 8.4), (0, 3, 0.5), (1, 2, 0.5)],
    ),
    "AA'BB'": (
        [1, 1, 1, 1],
        [100.0, 100.0, 112.0, 112.0],
        [(0, 1, 1.5), (2, 3, 7.5), (0, 2, 8.0), (1, 3, 8.0), (0, 3, 1.2), (1, 2, 1.2)],
    ),
    "A3B2": ([3, 2], [100.0, 115.0], [(0, 1, 7.2)]),
    "ABX3": ([1, 1, 3], [100.0, 107.0, 330.0], [(0, 1, -10.5), (0, 2, 6.8), (1, 2, 6.2)]),
    "A6B": ([6, 1], [70.0, 105.0], [(0, 1, 6.8)]),
}


@pytest.mark.parametrize("name", NAMED)
def test_named_systems(name: str) -> None:
    assert_like_dense(*NAMED[name])


def test_chemical_equivalence_is_not_magnetic_equivalence() -> None:
    """AA'XX' has up to 20 lines where A2X2 has 6 (Pople, Schneider and Bernstein 1959, chapter 6)."""
    a2x2 = resolved(exact_lines(system([100.0, 1e6], [(0, 1, 7.0)], [2, 2])))
    aaxx = resolved(
        exact_lines(
            system(
                [100.0, 100.0, 1e6, 1e6],
                [(0, 1, 2.4), (2, 3, 7.3), (0, 2, 9.0), (1, 3, 9.0), (0, 3, 3.0), (1, 2, 3.0)],
            )
        )
    )
    assert len(a2x2) == 6
    assert len(aaxx) == 20


# -- exchange symmetry -------------------------------------------------------------------------------------

#: A chain of four CH2, chemically but not magnetically equivalent: AA'BB'CC'DD'.
PAIRS = (
    [100.0, 100.0, 112.0, 112.0, 60.0, 60.0, 48.0, 48.0],
    [(k, k + 1, -13.0) for k in (0, 2, 4, 6)]
    + [(k + a, k + 2 + b, 6.1 if a == b else 8.3) for k in (0, 2, 4) for a in (0, 1) for b in (0, 1)],
)


def test_states_of_an_exchange_symmetric_system_are_found_in_halves() -> None:
    """Even and odd states together give the lines of the dense Hamiltonian, which knows no symmetry."""
    shifts, couplings = PAIRS
    around = next(surrounded(system(shifts, couplings), system(shifts, couplings).matrix(), range(8)))
    assert exchange_of(around, (1,) * 8) == (1, 0, 3, 2, 5, 4, 7, 6)
    assert_like_dense([1] * 8, shifts, couplings)


@pytest.mark.parametrize("level", range(9))
def test_even_and_odd_states_make_up_the_block(level: int) -> None:
    exchange = (1, 0, 3, 2, 5, 4, 7, 6)
    sizes = [fold((1,) * 8, level, exchange, sign).size for sign in (1, -1)]
    assert sum(sizes) == math.comb(8, level)


def test_no_symmetry_is_seen_where_a_coupling_breaks_it() -> None:
    shifts, couplings = PAIRS
    broken = [(a, b, j + (0.2 if (a, b) == (0, 2) else 0.0)) for a, b, j in couplings]
    around = next(surrounded(system(shifts, broken), system(shifts, broken).matrix(), range(8)))
    assert exchange_of(around, (1,) * 8) is None
    assert_like_dense([1] * 8, shifts, broken)


def test_heteronuclei_split_but_are_not_seen() -> None:
    groups = (Nuclei(100.0, 2), Nuclei(0.0, 3, observed=False))
    lines = exact_lines(SpinSystem(groups, ((0, 1, 9.0),)))
    assert [round(i / lines.intensity[0], 6) for i in lines.intensity] == [1, 3, 3, 1]
    assert list(lines.hz) == pytest.approx([86.5, 95.5, 104.5, 113.5])


@settings(max_examples=40, deadline=None)
@given(
    st.lists(st.tuples(st.floats(0, 300), st.integers(1, 3)), min_size=1, max_size=4),
    st.data(),
)
def test_intensity_and_centre_of_gravity_are_kept(
    groups: list[tuple[float, int]], data: st.DataObject
) -> None:
    """Sum rules: the total intensity counts the nuclei, and J leaves the mean frequency alone."""
    pairs = [(a, b, data.draw(st.floats(-20, 20))) for a in range(len(groups)) for b in range(a)]
    lines = exact_lines(system([hz for hz, _ in groups], pairs, [n for _, n in groups]))
    total = sum(n for _, n in groups)
    assert sum(lines.intensity) == pytest.approx(total, rel=1e-4)
    mean = sum(h * i for h, i in zip(lines.hz, lines.intensity, strict=True)) / total
    assert mean == pytest.approx(sum(hz * n for hz, n in groups) / total, abs=0.05)


def test_all_signs_turned_over_leave_the_spectrum_alone() -> None:
    shifts, pairs = random_system(3)
    one = exact_lines(system(shifts, pairs))
    other = exact_lines(system(shifts, [(a, b, -j) for a, b, j in pairs]))
    assert displacement(one, other) < 1e-4


def test_far_apart_shifts_give_first_order_lines() -> None:
    lines = exact_lines(system([100.0, 1e6], [(0, 1, 7.0)], [1, 3]))
    low = [(h, i) for h, i in resolved(lines) if h < 1e5]
    assert [i for _, i in low] == pytest.approx([1 / 8, 3 / 8, 3 / 8, 1 / 8], rel=1e-3)
    assert [h for h, _ in low] == pytest.approx([89.5, 96.5, 103.5, 110.5], abs=1e-3)


def resolved(lines: LineList) -> list[tuple[float, float]]:
    """Lines 0.01 Hz apart or more, weak ones left out."""
    hz, intensity = merge_lines(lines.hz[:], lines.intensity[:], 0.01, 1e-3)
    return list(zip(hz, intensity, strict=True))


def test_composite_spins_count_every_state() -> None:
    for n in range(1, 9):
        assert sum((twice + 1) * times for twice, times in total_spins(n)) == 2**n
    states = sum(weight * math.prod(t + 1 for t in twice) for twice, weight in combinations([3, 2, 1]))
    assert states == 2**6
    assert sum(map(len, blocks((3, 2, 1)).codes)) == 4 * 3 * 2


# -- clusters ----------------------------------------------------------------------------------------------


@pytest.mark.parametrize("mhz", [40.0, 60.0, 80.0, 100.0])
@pytest.mark.parametrize("family", FAMILIES)
def test_clusters_agree_with_exact_lines_on_a_benchtop_instrument(family: str, mhz: float) -> None:
    """Lines within 0.05 widths of 1 Hz, and within the error stated."""
    for seed in range(100, 102):
        whole = FAMILIES[family](mhz, seed)
        exact, reduced = exact_lines(whole), cluster_lines(whole)
        away = worst_line(exact, reduced)
        assert reduced.method == "clusters"
        assert away < 0.05
        assert away <= reduced.error_hz + 0.01
        assert sum(reduced.intensity) == pytest.approx(sum(exact.intensity), rel=1e-3)


def test_clusters_of_a_weakly_coupled_system_are_small() -> None:
    """At 400 MHz a chain needs no cluster near the size of the whole (252 states)."""
    whole = FAMILIES["chain"](400.0, 1)
    chosen = choose_clusters(whole, list(range(10)))
    assert max(c.cluster.states for c in chosen) <= 35
    assert sorted(g for c in chosen for g in c.losses) == list(range(10))


def test_outer_spins_act_in_second_order() -> None:
    """Pople, Schneider and Bernstein 1959, section 6-4: the A lines of AB lie at nu - (C - D +- J)/2."""
    difference, j = 100.0, 8.0
    heap = Heap()
    add_cluster(heap, system([0.0, difference], [(0, 1, j)]), [0], [0], [1])
    c = math.hypot(difference, j)
    lines = heap.sorted(1e-9, 0.0)
    assert list(lines.hz) == pytest.approx([-(c - difference + j) / 2, -(c - difference - j) / 2], abs=1e-9)
    assert list(lines.intensity) == pytest.approx([(1 - j / c) / 2, (1 + j / c) / 2], abs=0.002)


@pytest.mark.parametrize("difference", [50.0, 100.0, 200.0])
def test_second_order_leaves_errors_of_third_order(difference: float) -> None:
    """ABX with X outside: what is left falls with the square of the distance of X, J^3/D^2."""
    whole = system([0.0, 6.0, difference], [(0, 1, 8.0), (0, 2, 7.0), (1, 2, 4.0)])
    heap = Heap()
    add_cluster(heap, whole, [0, 1], [0, 1], [2])
    found = heap.sorted(1e-9, 1e-3)
    exact = [hz for hz, i in resolved(exact_lines(whole)) if hz < difference / 2]
    assert list(found.hz) == pytest.approx(exact, abs=0.3 * 8.0**3 / difference**2)


@pytest.mark.parametrize("family", FAMILIES)
def test_error_estimate_covers_the_true_error_of_clusters_too_small(family: str) -> None:
    """Where clusters may not grow, the movement of the lines with their size stands for the error."""
    for seed in range(4):
        whole = FAMILIES[family](60.0, seed)
        reduced = cluster_lines(whole, states=20, most_states=20)
        assert displacement(exact_lines(whole), reduced) <= 1.5 * reduced.error_hz


def test_large_systems_are_answered_by_clusters() -> None:
    whole = system([400.0 + 160 * k for k in range(14)], [(k, k + 1, 5 + k % 4) for k in range(13)])
    lines = simulate(whole)
    assert lines.method == "clusters"
    assert sum(lines.intensity) == pytest.approx(14, rel=0.01)
    assert lines.error_hz < 0.05


# -- traces ------------------------------------------------------------------------------------------------


@pytest.mark.parametrize("shape", ["lorentzian", "gaussian"])
def test_trace_has_the_area_and_width_of_its_lines(shape: str) -> None:
    lines = exact_lines(system([50.0], [], [3]))
    trace = envelope(lines, 0, 100, 2.0, shape)
    assert sum(trace.heights) * trace.step_hz == pytest.approx(3, rel=0.03)
    top = max(trace.heights)
    wide = sum(h >= top / 2 for h in trace.heights) * trace.step_hz
    assert wide == pytest.approx(2.0, abs=0.3)
    assert trace.peaks(0.5)[0][0] == pytest.approx(50, abs=0.01)


@pytest.mark.parametrize(("width", "shape"), [(0.0, "lorentzian"), (-1.0, "gaussian"), (1.0, "square")])
def test_impossible_traces_are_refused(width: float, shape: str) -> None:
    with pytest.raises(InvalidInputError):
        envelope(exact_lines(system([1.0], [])), 0, 10, width, shape)


# -- whole structures --------------------------------------------------------------------------------------


def test_structure_is_cut_into_independent_systems() -> None:
    groups, systems = predict_spectrum(read_structure("COc1ccc(C(=O)OCC)cc1"), mhz=400)
    assert sum(sum(s.lines.intensity) for s in systems) == pytest.approx(sum(g.n for g in groups), rel=1e-4)
    assert sorted(len(s.groups) for s in systems) == [1, 2, 2]


def test_para_disubstituted_benzene_is_aa_bb() -> None:
    """Weak inner lines beside the doublets show that two H of one shift are not magnetically equivalent."""
    groups, systems = predict_spectrum(read_structure("Brc1ccc(C#N)cc1"), mhz=60)
    lines = systems[0].lines.without_weak(0.01)
    assert len(groups) == 2
    assert len(lines) > 8


def test_exchangeable_hydrogens_are_marked_broad() -> None:
    _, systems = predict_spectrum(read_structure("CCO"), mhz=60)
    assert [s.broad for s in systems].count(True) == 1


@pytest.mark.parametrize("mhz", [0, -60, math.nan, 5000])
def test_impossible_field(mhz: float) -> None:
    with pytest.raises(InvalidInputError, match="MHz"):
        predict_spectrum(read_structure("CCO"), mhz=mhz)


# -- contract ----------------------------------------------------------------------------------------------

AB = {"mhz": 60, "nuclei": [{"ppm": 7.1, "count": 1}, {"ppm": 6.9}], "j": [[0, 1, 8.6]]}


def test_contract_answers_lines_by_rising_shift() -> None:
    answer = spins_from_json(AB)
    assert answer["method"] == "exact"
    assert [set(line) for line in answer["lines"]] == [{"ppm", "hz", "intensity"}] * 4
    ppm = [line["ppm"] for line in answer["lines"]]
    assert ppm == sorted(ppm)
    assert all(line["hz"] == pytest.approx(line["ppm"] * 60) for line in answer["lines"])
    assert sum(line["intensity"] for line in answer["lines"]) == pytest.approx(2)


def test_contract_draws_a_trace_when_asked() -> None:
    trace = spins_from_json({**AB, "trace": "gaussian", "linewidth_hz": 0.8})["trace"]
    assert max(trace["heights"]) == 1.0
    assert trace["step_ppm"] == pytest.approx(0.1 / 60)
    ranged = spins_from_json({**AB, "trace": True, "from_ppm": 8, "to_ppm": 6})["trace"]
    assert ranged["from_ppm"] == pytest.approx(6)


@pytest.mark.parametrize(
    ("change", "field"),
    [
        ({"mhz": None}, "mhz"),
        ({"mhz": "400"}, "mhz"),
        ({"mhz": -1}, "mhz"),
        ({"mhz": math.inf}, "mhz"),
        ({"nuclei": []}, "nuclei"),
        ({"nuclei": "AB"}, "nuclei"),
        ({"nuclei": [{"ppm": 1}] * 61}, "nuclei"),
        ({"nuclei": [3]}, "nuclei[0]"),
        ({"nuclei": [{"ppm": 7, "count": 0}, {"ppm": 1}]}, "nuclei[0].count"),
        ({"nuclei": [{"ppm": 7, "count": 1.5}, {"ppm": 1}]}, "nuclei[0].count"),
        ({"nuclei": [{"ppm": 7}, {}]}, "nuclei[1].ppm"),
        ({"nuclei": [{"ppm": 7}, {"ppm": math.nan}]}, "nuclei[1].ppm"),
        ({"nuclei": [{"ppm": 7}, {"ppm": 1, "element": "C"}]}, "nuclei[1].element"),
        ({"j": [[0, 5, 8]]}, "j[0]"),
        ({"j": [[0, 0, 8]]}, "j[0]"),
        ({"j": [[0, 1]]}, "j[0]"),
        ({"j": [[0, 1, 8], [1, 0, 8]]}, "j[1]"),
        ({"j": [[0, 1, 1e9]]}, "j[0]"),
        ({"linewidth_hz": 0}, "linewidth_hz"),
    ],
)
def test_bad_input_names_the_field(change: dict[str, object], field: str) -> None:
    with pytest.raises(InvalidInputError) as caught:
        spins_from_json({**AB, **change})
    assert caught.value.field == field
    assert caught.value.hint


# -- numerics seam -----------------------------------------------------------------------------------------


def test_seam_agrees_with_numpy() -> None:
    from array import array

    rng = np.random.default_rng(1)
    a = rng.normal(size=(5, 5))
    a = a + a.T
    values, vectors = eigh(5, array("d", a.ravel()))
    v = np.array(vectors).reshape(5, 5)
    assert np.allclose(v @ np.diag(values) @ v.T, a)
    b, c = rng.normal(size=(4, 3)), rng.normal(size=(4, 2))
    assert np.allclose(
        np.array(product(3, 4, 2, array("d", b.ravel()), array("d", c.ravel()), turned=True)).reshape(3, 2),
        b.T @ c,
    )
    hz, size = transitions(
        (array("d", [0.0, 1.0]), array("d", [5.0])),
        (array("d", [2.0, 1e-9]), array("d", [2.0, 1e-9])),
        0.5,
        1e-6,
    )
    assert (list(hz), list(size)) == ([5.0], [2.0])
    hz, size = merge_lines(array("d", [3.0, 1.0, 1.0]), array("d", [1.0, 1.0, 3.0]), 1e-6, 0.0)
    assert (list(hz), list(size)) == ([1.0, 3.0], [4.0, 1.0])
