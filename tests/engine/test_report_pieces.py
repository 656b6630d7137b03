"""What was read and what was not, to the letter; and that no text can stop the parser."""

from __future__ import annotations

import time

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from hoodside.readings.report import MOST_CHARS, parse_report

LINE = "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H), 2.98 (sept, J = 6.9 Hz, 1H)"


def test_every_signal_has_its_piece_of_the_text() -> None:
    parsed = parse_report(LINE)
    pieces = {piece.text: piece.means for piece in parsed.pieces}
    assert pieces["7.81 (d, J = 8.2 Hz, 2H)"] == "1H 7.81 ppm, d, J 8.2 Hz, 2 H"
    assert pieces["2.98 (sept, J = 6.9 Hz, 1H)"] == "1H 2.98 ppm, sept, J 6.9 Hz, 1 H"
    assert any("400 MHz" in means for means in pieces.values())


@pytest.mark.parametrize(
    ("line", "unread"),
    [
        (LINE + ", 77.2 (s, 1H), 1.27 (d, 6H)", ["77.2 (s, 1H)"]),
        (LINE + ", see page 3 of the notebook", ["see page 3 of the notebook"]),
        ("13C NMR (CDCl3) δ 192.0, 1562, 134.5", ["1562"]),
        ("IR (film) 17150, 3350 cm-1", ["17150"]),
        ("nothing that any instrument gave", ["nothing that any instrument gave"]),
        ("HRMS (ESI) calcd for C10H13O 149.0961", ["HRMS (ESI) calcd for C10H13O 149.0961"]),
    ],
)
def test_what_cannot_be_read_is_quoted_exactly(line: str, unread: list[str]) -> None:
    parsed = parse_report(line)
    assert [u.text for u in parsed.unread] == unread
    assert all(line[u.start : u.end] == u.text and u.why for u in parsed.unread)


def test_the_rest_is_kept_when_a_piece_is_bad() -> None:
    parsed = parse_report(LINE.replace("(d, J", "(dq?!, J"))
    assert [s.ppm for s in parsed.readings.h1] == [7.81, 2.98]


def test_a_second_list_of_one_kind_is_not_mixed_in() -> None:
    parsed = parse_report(LINE + "\n" + LINE.replace("7.81", "7.11"))
    assert [s.ppm for s in parsed.readings.h1] == [7.81, 2.98]
    assert "second 1H list" in parsed.unread[0].why


def test_a_bracket_left_open_costs_one_signal_at_most() -> None:
    parsed = parse_report("1H NMR (CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H, 7.39 (d, 2H), 2.98 (sept, 1H)")
    assert [s.ppm for s in parsed.readings.h1][-2:] == [7.39, 2.98]


def _seconds(text: str) -> float:
    start = time.perf_counter()
    parse_report(text)
    return time.perf_counter() - start


@pytest.mark.parametrize(
    "line",
    [
        "7.81 (d, J = 8.2 Hz, 2H), ",
        "the quick brown fox, 7.81 (d); 13 fried eggs (m/z) ",
        "(((((((((((((((((((((((((((((( ",
        "J = 1, 2, 3, 4, 5, 6, 7, 8, ",
        "192.0 (CH), ",
        "1H NMR 13C NMR IR MS HRMS Anal. ",
        "br br br br br s s s s d d d ",
        "1,2,3,4,5,6,7,8,9,",
        "C10H12O C10H12O C10H12O ",
    ],
)
@pytest.mark.parametrize("head", ["", "1H NMR δ ", "13C NMR ", "IR ", "MS ", "HRMS ", "Anal. "])
def test_ten_thousand_lines_take_a_moment(head: str, line: str) -> None:
    assert _seconds(head + (line + "\n") * 10_000) < 6


def test_time_grows_with_length_not_with_its_square() -> None:
    short, long = LINE * 200, LINE * 2_000
    assert _seconds(long) < 40 * max(_seconds(short), 0.002)


def test_too_long_a_text_is_read_to_the_limit() -> None:
    parsed = parse_report(LINE + " " * MOST_CHARS + LINE)
    assert len(parsed.readings.h1) == 2
    assert f"first {MOST_CHARS}" in parsed.unread[-1].why


_TOKENS = (
    "1H NMR|13C NMR|δ|δH|IR|νmax|MS|m/z|HRMS|calcd for|found|Anal.|(|)|[|]|7.81|d|J =|J1,2|8.2 Hz|2H|,|;|.|–"
    "|br s|7.20–7.35|192.0|C10H12O|[M+H]+|149.0963|cm-1|1715|s|and|\n|ppm|CDCl3|400 MHz|CH3|%|mp|😀|7,81"
)
WORDS = st.sampled_from(_TOKENS.split("|"))


@settings(max_examples=400, deadline=None)
@given(st.lists(WORDS | st.text(max_size=6), max_size=60).map(" ".join) | st.text(max_size=300))
def test_any_text_is_read_or_named(text: str) -> None:
    parsed = parse_report(text)
    for part in (*parsed.pieces, *parsed.unread):
        assert text[part.start : part.end] == part.text
        assert part.text


@pytest.mark.parametrize("start", ["δ -0.21", "δ −0.21", ": –0.21", "δ = -0.21"])
def test_first_shift_of_a_list_keeps_its_sign(start: str) -> None:
    parsed = parse_report(f"1H NMR (400 MHz, CDCl3) {start} (s, 9H), 7.30 (m, 5H)")
    assert sorted(s.lo for s in parsed.readings.h1) == [-0.21, 7.3]
    assert parsed.unread == ()


def test_accurate_mass_is_repeated_with_all_its_decimals() -> None:
    parsed = parse_report("HRMS calcd for C9H11O2 [M+H]+ 151.0754, found 151.0757")
    assert "found 151.0757 as [M+H]+, calculated 151.0754" in parsed.pieces[-1].means
