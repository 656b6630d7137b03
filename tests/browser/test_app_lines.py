"""Pattern and J from printed lines, partners of a J, and spectrum files."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, FilePayload, Page, expect

from browser.bench_hand import Hand
from browser.stand import ANSWER_MS, Host


@pytest.fixture(scope="module")
def visit(browser: Browser, host: Host) -> Iterator[Page]:
    """One visit for all tests here."""
    context = browser.new_context()
    context.set_default_timeout(ANSWER_MS)
    page = context.new_page()
    page.goto(host.address)
    yield page
    context.close()


@pytest.fixture
def hand(visit: Page) -> Hand:
    """In a new case at 400 MHz."""
    found = Hand(visit)
    visit.evaluate("location.hash = '#/'")
    found.tap("New case")
    found.tap("field and solvent")
    found.tap("400")
    found.tap("Done")
    return found


def _enter(hand: Hand, lines: list[str]) -> None:
    for line in lines:
        hand.keys(" ".join(line))
        hand.keys("next")


def test_lines_in_ppm_give_pattern_and_j_and_are_taken_over(hand: Hand) -> None:
    """Lines of a dd, J = 16 and 8 Hz at 400 MHz, by the first-order rule: sums and differences of J/2."""
    hand.tap("Add a signal")
    hand.tap("Pattern and J from its lines")
    _enter(hand, ["6.53", "6.51", "6.49", "6.47"])
    # Equally spaced: only the heights tell a dd from a quartet.
    first = hand.page.locator(".line-reading").first
    expect(first).to_contain_text("8.0")
    for at in range(4):
        hand.page.get_by_label(f"Height of line {at + 1}").click()  # all alike: low
    expect(first.locator("b")).to_have_text("dd")
    expect(first).to_contain_text("16.0, 8.0 Hz")
    expect(hand.page.locator(".tree figcaption")).to_contain_text("d by 16.0 Hz, then d by 8.0 Hz")
    first.click()
    expect(hand.page.locator("input[name=shift]")).to_have_value("6.50")
    expect(hand.page.locator("input[name=j]")).to_have_value("16.0, 8.0")
    expect(hand.page.get_by_label("doublet of doublets", exact=True)).to_have_attribute(
        "aria-pressed", "true"
    )


def test_lines_in_hz_with_heights_tell_a_quartet(hand: Hand) -> None:
    """1 : 3 : 3 : 1 is three equivalent partners (Pascal's triangle)."""
    hand.tap("Add a signal")
    hand.tap("Pattern and J from its lines")
    hand.tap("Hz")
    _enter(hand, ["1600", "1607", "1614", "1621"])
    for at, taps in enumerate([1, 3, 3, 1]):
        for _ in range(taps):
            hand.page.get_by_label(f"Height of line {at + 1}").click()
    first = hand.page.locator(".line-reading").first
    expect(first.locator("b")).to_have_text("q")
    expect(first).to_contain_text("7.0 Hz")
    expect(hand.page.locator(".lines-found .line-reading").first).to_contain_text("4.026 ppm")
    hand.back()
    hand.back()
    expect(hand.page.locator(".slip")).to_have_count(
        1
    )  # lines typed are kept although the signal has no shift yet


def test_roofed_lines_are_offered_as_an_ab_quartet(hand: Hand) -> None:
    """J = 14 Hz and a difference of sqrt(31 x 3) Hz by the closed form of AB; heights by eye."""
    hand.tap("Add a signal")
    hand.tap("Pattern and J from its lines")
    hand.tap("Hz")
    _enter(hand, ["1231", "1217", "1214", "1200"])
    for at, taps in enumerate([1, 3, 3, 1]):
        for _ in range(taps):
            hand.page.get_by_label(f"Height of line {at + 1}").click()
    best = hand.page.locator(".lines-at-hand .line-reading").first
    expect(best.locator("b")).to_have_text("ABq")
    expect(best).to_contain_text("14.0 Hz")
    expect(hand.page.locator(".lines-found")).to_contain_text("3.051 and 3.027 ppm")
    best.click()
    expect(hand.page.locator("input[name=shift]")).to_have_value("3.08-3.00")
    expect(hand.page.locator("input[name=j]")).to_have_value("14.0")


def test_the_line_being_typed_stays_in_sight(hand: Hand) -> None:
    hand.tap("Add a signal")
    hand.tap("Pattern and J from its lines")
    _enter(hand, ["6.53", "6.51", "6.49", "6.47", "6.45", "6.43", "6.41"])
    hand.page.locator(".lines-at-hand .line-reading").first.wait_for()
    typed = hand.page.locator("input[name=line-7]").bounding_box()
    strip = hand.page.locator(".lines-at-hand").bounding_box()
    assert typed is not None
    assert strip is not None
    assert typed["y"] + typed["height"] <= strip["y"]


def test_a_line_that_is_none_is_kept_and_named(hand: Hand) -> None:
    hand.tap("Add a signal")
    hand.tap("Pattern and J from its lines")
    field = hand.page.locator("input[name=line-0]")
    field.fill("7.8.1")
    expect(hand.page.get_by_role("alert")).to_contain_text("7.8.1 is no line")
    assert field.input_value() == "7.8.1"


def test_partner_of_a_j_is_named_under_it(hand: Hand) -> None:
    hand.paste_report(
        "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 2H), 2.98 (sept, J = 6.9 Hz, 1H), "
        "1.28 (d, J = 6.9 Hz, 6H)"
    )
    hand.page.locator(".slip", has_text="2.98").click()
    expect(hand.page.locator(".partner-note")).to_contain_text("Shares 6.9 Hz with 1.28 (d, 6 H)")
    hand.back()
    hand.page.locator(".slip", has_text="7.81").click()
    expect(hand.page.locator(".partner-note")).to_contain_text("No other signal shares 8.2 Hz")


def test_partners_too_near_for_first_order_are_warned_of(hand: Hand) -> None:
    """Difference of the shifts below ten times J: common practice."""
    hand.paste_report("1H NMR (60 MHz, CDCl3) δ 7.09 (d, J = 8.4 Hz, 2H), 6.82 (d, J = 8.4 Hz, 2H)")
    hand.page.locator(".slip", has_text="7.09").click()
    expect(hand.page.locator(".partner-note")).to_contain_text("not first order")


def _spectrum() -> FilePayload:
    """A made-up film with bands at 2960 and 1715 cm-1, as JCAMP-DX 4.24 tells to write it."""
    bands = [(2960, 0.6, 30), (1715, 0.9, 12)]
    xs = range(4000, 498, -2)
    ys = [round(1e4 * 10 ** -sum(h / (1 + ((x - c) / w) ** 2) for c, h, w in bands)) for x in xs]
    head = [
        *("##TITLE=made-up film", "##JCAMP-DX=4.24", "##DATA TYPE=INFRARED SPECTRUM", "##ORIGIN=made up"),
        *("##OWNER=made up", "##XUNITS=1/CM", "##YUNITS=TRANSMITTANCE", "##XFACTOR=1", "##YFACTOR=0.0001"),
        *(f"##FIRSTX={xs[0]}", f"##LASTX={xs[-1]}", f"##NPOINTS={len(xs)}", f"##FIRSTY={ys[0] / 1e4}"),
        "##XYDATA=(X++(Y..Y))",
    ]
    rows = [f"{xs[i]} " + " ".join(map(str, ys[i : i + 8])) for i in range(0, len(xs), 8)]
    text = "\n".join([*head, *rows, "##END=", ""])
    return {"name": "film.dat", "mimeType": "application/octet-stream", "buffer": text.encode()}


def test_spectrum_file_is_shown_before_it_is_taken_over(hand: Hand) -> None:
    hand.page.locator("label", has_text="Open a file").locator("input").set_input_files(_spectrum())
    expect(hand.page.locator(".file-curve")).to_be_visible()
    band = hand.page.locator(".chip", has_text="1715")
    expect(band).to_have_attribute("aria-pressed", "true")
    hand.page.locator(".chip", has_text="2960").click()  # left out
    hand.page.get_by_role("button", name="Take over").click()
    words = hand.page.get_by_label("IR regions").inner_text()
    assert "seen 1715" in words
    assert "seen 2960" not in words
