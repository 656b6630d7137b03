"""Names, lines and the first-order rules."""

from __future__ import annotations

import math
from collections.abc import Sequence

import pytest
from hypothesis import given
from hypothesis import strategies as st

from hoodside.errors import InvalidInputError
from hoodside.facts import load_table
from hoodside.predict.coupling import Coupling
from hoodside.predict.model import ProtonGroup
from hoodside.predict.multiplet import (
    Splitting,
    apply_multiplets,
    combined_pattern,
    lines,
    readable_patterns,
    splitting_tree,
)
from hoodside.readings.patterns import couplings_named, is_pattern, normalise_pattern


def group(ppm: float, n: int = 1, atom: int = 0, exchangeable: bool = False) -> ProtonGroup:
    return ProtonGroup((atom,), n, ppm, 0.1, "", (), exchangeable, "single")


def coupling(a: int, b: int, hz: float, pairs: int = 1) -> Coupling:
    return Coupling(a, b, hz, 0.3, 3, 1, f"{a}-{b} {hz}", "test", pairs)


def patterns(groups: Sequence[ProtonGroup], found: Sequence[Coupling], mhz: float = 400) -> list[str]:
    return [g.mult for g in apply_multiplets(groups, found, mhz)]


@pytest.mark.parametrize(
    ("written", "canonical"),
    [
        ("s", "s"),
        ("br s", "br s"),
        ("bs", "br s"),
        ("brs", "br s"),
        ("s (br)", "br s"),
        ("broad singlet", "br s"),
        ("app t", "app t"),
        ("apparent triplet", "app t"),
        ("pseudo-t", "app t"),
        ("d of d", "dd"),
        ("doublet of doublets", "dd"),
        ("quin", "quint"),
        ("pentet", "quint"),
        ("p", "quint"),
        ("hept", "sept"),
        ("heptet", "sept"),
        ("sxt", "sext"),
        ("AB q", "ABq"),
        ("AB quartet", "ABq"),
        ("multiplet", "m"),
        ("br m", "br m"),
        ("ddt", "ddt"),
        ("dquin", "dquint"),
        ("t of q", "tq"),
        ("DD", "dd"),
    ],
)
def test_names_are_brought_to_one_form(written: str, canonical: str) -> None:
    assert normalise_pattern(written) == canonical


@pytest.mark.parametrize("text", ["", "x", "J", "ss", "ds", "2H", "8.2", "dmso"])
def test_what_is_no_pattern_is_refused_with_the_mend(text: str) -> None:
    assert not is_pattern(text)
    with pytest.raises(InvalidInputError) as caught:
        normalise_pattern(text)
    assert "dd" in caught.value.hint
    assert caught.value.field == "mult"


def test_normalising_twice_changes_nothing() -> None:
    for row in load_table("multiplets"):
        if is_pattern(row["name"]):
            once = normalise_pattern(row["name"])
            assert normalise_pattern(once) == once


def first_order_rows() -> list[dict[str, str]]:
    """Rows of the table that are plain products of binomial patterns."""
    found = []
    for row in load_table("multiplets"):
        plain = row["name"].isalpha() and is_pattern(row["name"]) and row["relative_intensities"]
        if plain and normalise_pattern(row["name"]) == row["name"] and ":" in row["relative_intensities"]:
            found.append(row)
    return found


@pytest.mark.parametrize("row", first_order_rows(), ids=lambda row: row["name"])
def test_lines_have_the_tabulated_intensities(row: dict[str, str]) -> None:
    """facts/multiplets.csv (n + 1 rule and its products), all lines resolved, J falling letter by letter."""
    if row["name"] == "ABq":
        pytest.skip("second order")
    expected = [float(x) for x in row["relative_intensities"].split(":")]
    counts = couplings_named(row["name"])
    j = [1000.0 / 15.0**k for k in range(len(counts))]
    found = [share for _, share in lines(row["name"], j)]
    assert len(found) == int(row["lines"])
    assert [x * sum(expected) for x in found] == pytest.approx(expected)


@given(st.lists(st.tuples(st.sampled_from("dtq"), st.floats(0.5, 20)), min_size=0, max_size=4))
def test_lines_are_symmetric_sum_to_one_and_span_the_sum_of_couplings(
    letters: list[tuple[str, float]],
) -> None:
    name = "".join(letter for letter, _ in letters) or "s"
    found = lines(name, [hz for _, hz in letters])
    assert sum(share for _, share in found) == pytest.approx(1)
    assert sum(at * share for at, share in found) == pytest.approx(0, abs=1e-9)
    span = sum(n * hz for n, (_, hz) in zip(couplings_named(name), letters, strict=True))
    assert found[-1][0] - found[0][0] == pytest.approx(span)


def test_lines_need_one_coupling_per_letter() -> None:
    with pytest.raises(InvalidInputError, match="2 couplings"):
        lines("dd", [7.0])
    with pytest.raises(InvalidInputError):
        lines("m", [7.0])


def test_largest_coupling_comes_first() -> None:
    groups = [group(6.0), group(5.0, atom=1), group(2.0, 3, atom=2)]
    found = [coupling(0, 1, 10.0), coupling(0, 2, 6.5, 3)]
    assert apply_multiplets(groups, found, 400)[0].mult == "dq"
    found = [coupling(0, 1, 3.0), coupling(0, 2, 6.5, 3)]
    result = apply_multiplets(groups, found, 400)[0]
    assert (result.mult, result.j) == ("qd", (6.5, 3.0))


def test_near_equal_couplings_read_as_one() -> None:
    groups = [group(4.0), group(2.0, 3, atom=1), group(1.0, 2, atom=2)]
    found = [coupling(0, 1, 7.0, 3), coupling(0, 2, 6.6, 2)]
    result = apply_multiplets(groups, found, 400)[0]
    assert result.mult == "sext"
    assert result.j == (pytest.approx(6.8, abs=0.06),)


def test_small_couplings_stay_unresolved() -> None:
    groups = [group(7.0), group(6.0, atom=1), group(5.0, atom=2)]
    assert patterns(groups, [coupling(0, 1, 8.0), coupling(0, 2, 0.4)])[0] == "d"
    assert readable_patterns([0], groups, [coupling(0, 1, 8.0), coupling(0, 2, 1.9)]) >= {"d", "dd"}


def test_strong_coupling_is_no_first_order_pattern_until_the_field_is_high_enough() -> None:
    groups = [group(7.00), group(7.05, atom=1)]
    found = [coupling(0, 1, 8.0)]
    assert patterns(groups, found, 60) == ["m", "m"]
    assert patterns(groups, found, 600) == ["d", "d"]


def test_many_lines_are_a_multiplet() -> None:
    groups = [group(5.0)] + [group(4.0 - k, atom=k + 1) for k in range(5)]
    found = [coupling(0, k + 1, 14.0 - 2.5 * k) for k in range(5)]
    assert patterns(groups, found)[0] == "m"


def test_exchangeable_hydrogens_without_couplings_are_broad() -> None:
    assert patterns([group(2.0, exchangeable=True)], []) == ["br s"]


def test_hydrogens_that_coincide_show_only_what_couples_to_others() -> None:
    groups = [group(2.5), group(2.5), group(4.0, atom=1)]
    found = [coupling(0, 1, 14.0), coupling(0, 2, 8.0), coupling(1, 2, 5.0)]
    assert combined_pattern([0, 1], groups, found) == ("d", (6.5,))


def test_impossible_field_is_refused() -> None:
    for mhz in (0.0, -400.0, math.nan):
        with pytest.raises(InvalidInputError, match="MHz"):
            apply_multiplets([group(1.0)], [], mhz)


def test_tree_splits_by_the_largest_coupling_first() -> None:
    levels = splitting_tree([Splitting(4.0, 2), Splitting(12.0, 1)])
    assert [len(level) for level in levels] == [1, 2, 6]
    assert [at for at, _ in levels[1]] == pytest.approx([-6, 6])
    assert all(sum(share for _, share in level) == pytest.approx(1) for level in levels)
