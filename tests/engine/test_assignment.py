"""The assignment of groups to signals: exact where it can be told, integrals respected, fast."""

from __future__ import annotations

import time
from itertools import product

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside.weigh.protons.assign import NOWHERE, Puzzle, assign

MISSING, STRANGER, OVERFULL = -12.0, -12.0, -8.0


def puzzle(shifts, sizes, places, room, roaming=()):
    """A puzzle with a parabola for the place and a price per H too many or too few."""
    suits = [[12.0 - 40 * (a - b) ** 2 for b in places] for a in shifts]

    def score(s, members):
        if not members:
            return STRANGER
        held = sum(sizes[g] for g in members)
        return sum(suits[g][s] for g in members) - 10 * (len(members) - 1) + OVERFULL * abs(held - room[s])

    free = [g in roaming for g in range(len(shifts))]
    return Puzzle(shifts, sizes, free, places, room, [MISSING] * len(shifts), suits, score)


def weight(puzzle, given):
    """Total weight of an assignment."""
    total = sum(puzzle.missing[g] for g, s in enumerate(given) if s == NOWHERE)
    for s in range(len(puzzle.places)):
        total += puzzle.score(s, tuple(g for g, k in enumerate(given) if k == s))
    return total


def exhaustive(puzzle):
    """The best weight over all assignments."""
    options = [NOWHERE, *range(len(puzzle.places))]
    return max(weight(puzzle, choice) for choice in product(options, repeat=len(puzzle.sizes)))


ppm = st.floats(0.5, 9.5).map(lambda x: round(x, 2))


@settings(max_examples=120, deadline=None)
@given(st.lists(st.tuples(ppm, st.integers(1, 3)), min_size=1, max_size=4), st.data())
def test_true_signals_are_found_as_well_as_by_trying_everything(groups, data):
    wander = [data.draw(st.floats(-0.15, 0.15)) for _ in groups]
    places = [shift + w for (shift, _), w in zip(groups, wander, strict=True)]
    case = puzzle([g[0] for g in groups], [g[1] for g in groups], places, [g[1] for g in groups])
    assert weight(case, assign(case)) >= exhaustive(case) - 1e-6


def test_crossed_shifts_are_told_by_their_integrals():
    case = puzzle([2.30, 2.20], [3, 2], [2.28, 2.22], [2, 3])
    assert assign(case) == [1, 0]


def test_an_overlap_takes_all_its_groups():
    case = puzzle([7.30, 7.25, 7.20, 2.35], [2, 2, 1, 3], [7.25, 2.35], [5, 3])
    assert assign(case) == [0, 0, 0, 1]


def test_a_stranger_is_left_alone_and_a_gap_is_left_open():
    case = puzzle([7.3, 2.4], [2, 3], [7.3, 4.5], [2, 1])
    assert assign(case) == [0, NOWHERE]


def test_exchangeable_h_go_where_there_is_room():
    case = puzzle([7.3, 2.4, 2.0], [2, 3, 1], [7.3, 2.4, 2.1], [2, 3, 1], roaming=(2,))
    assert assign(case) == [0, 1, 2]


@pytest.mark.parametrize(("signals", "groups", "seconds"), [(15, 20, 0.15), (220, 60, 8.0)])
def test_time_stays_short(signals, groups, seconds):
    places = [0.5 + 9 * k / signals for k in range(signals)]
    shifts = [0.6 + 9 * k / groups for k in range(groups)]
    case = puzzle(shifts, [1 + k % 3 for k in range(groups)], places, [2.0] * signals)
    began = time.perf_counter()
    assert len(assign(case)) == groups
    assert time.perf_counter() - began < seconds


def test_nothing_to_assign():
    assert assign(puzzle([], [], [2.0], [1])) == []
    assert assign(puzzle([2.0], [1], [], [])) == [NOWHERE]
