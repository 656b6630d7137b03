"""The simulated trace: fields, view, groups, J trees, and the shape of its lines."""

from __future__ import annotations

import re
from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, Page, expect

from browser.bench_hand import Hand
from browser.stand import ANSWER_MS, Host, wait_until

#: Heights of a drawn line of 1 Hz at places given in Hz from its middle.
LINE_SHAPE = """async (places) => {
  const { curve } = await import('./app/views/trace/envelope.js');
  const line = { hz: 400, intensity: 2, width: 1 };
  const drawn = curve([line], 100, { hi: 4.02, lo: 3.98 }, 400);
  return places.map((place) => drawn.reduce((a, b) =>
    Math.abs(b[0] * 100 - 400 - place) < Math.abs(a[0] * 100 - 400 - place) ? b : a)[1]);
}"""

#: Two fingers on the plot that move apart to twice their distance.
PINCH = """(plot) => {
  const { left, top, width, height } = plot.getBoundingClientRect();
  const at = (type, id, part) => plot.dispatchEvent(new PointerEvent(type, { pointerId: id, bubbles: true,
    clientX: left + width * part, clientY: top + height / 2 }));
  plot.setPointerCapture = () => {};
  at('pointerdown', 11, 0.4); at('pointerdown', 12, 0.6);
  at('pointermove', 11, 0.3); at('pointermove', 12, 0.7);
  at('pointerup', 11, 0.3); at('pointerup', 12, 0.7);
}"""


@pytest.fixture(scope="module")
def hand(browser: Browser, host: Host) -> Iterator[Hand]:
    """At the trace of the case seen at 60 MHz, opened by the button of its story."""
    context = browser.new_context()
    context.set_default_timeout(ANSWER_MS)
    found = Hand(context.new_page())
    found.open(host.address)
    found.tap("Why does it look wrong?")
    found.wait_for_verdict("Undecided.")
    found.station("Readings")
    found.tap("See what the structure gives at 60 MHz")
    found.page.locator(".traced:not(.stale)").wait_for()
    yield found
    context.close()


def _ticks(page: Page) -> list[float]:
    texts = page.locator(".trace-plot text[text-anchor=middle]").all_text_contents()
    return [float(text.replace("−", "-")) for text in texts]


def _field(hand: Hand, mhz: str) -> None:
    hand.page.get_by_role("button", name=re.compile(f"^{mhz} MHz")).click()
    expect(hand.page.locator(".trace figcaption")).to_contain_text(f"at {mhz} MHz")


def test_the_trace_says_in_words_what_it_shows(hand: Hand) -> None:
    _field(hand, "60")
    words = hand.page.locator(".trace figcaption").inner_text()
    assert words.count("2 H") == 5  # OCH2, two pairs of ring H, two CH2
    assert words.count("3 H") == 2


def test_the_axis_runs_from_high_to_low_and_the_view_moves_by_buttons(hand: Hand) -> None:
    ticks = _ticks(hand.page)
    assert ticks == sorted(ticks, reverse=True)
    hand.page.get_by_label("Nearer").click()
    near = _ticks(hand.page)
    assert near[0] - near[-1] < ticks[0] - ticks[-1]
    hand.page.get_by_label("To lower shift").click()
    assert _ticks(hand.page)[0] < near[0]
    hand.page.get_by_label("Whole trace").click()
    assert _ticks(hand.page) == ticks


def test_two_fingers_come_nearer_and_one_moves_along(hand: Hand) -> None:
    whole = _ticks(hand.page)
    plot = hand.page.locator(".trace-plot")
    plot.evaluate(PINCH)
    wait_until(hand.page, "!document.querySelector('[aria-label=\"Whole trace\"]').disabled")
    near = _ticks(hand.page)
    assert near[0] - near[-1] < whole[0] - whole[-1]
    box = plot.bounding_box()
    assert box is not None
    hand.page.mouse.move(box["x"] + 200, box["y"] + 90)
    hand.page.mouse.down()
    hand.page.mouse.move(box["x"] + 60, box["y"] + 90, steps=5)
    hand.page.mouse.up()
    assert _ticks(hand.page)[-1] < near[-1]  # pulled to the left: lower shifts come into view
    hand.page.get_by_label("Whole trace").click()


def test_tapping_the_lines_of_a_group_lights_its_atoms(hand: Hand) -> None:
    hand.page.locator(".trace-plot").scroll_into_view_if_needed()
    box = hand.page.locator(".trace-plot").bounding_box()
    assert box is not None
    hand.page.mouse.click(box["x"] + 2, box["y"] + box["height"] / 2)  # the high end: ring H
    expect(hand.page.locator(".drawing-traced .lit")).to_have_count(2)  # ortho or meta, a pair
    expect(hand.page.locator(".group-words")).to_contain_text("2 H")


def test_first_order_rules_hold_at_400_and_not_at_60(hand: Hand) -> None:
    """Shift difference below ten times J is not first order: common practice."""
    hand.page.mouse.move(0, 0)
    _field(hand, "60")
    expect(hand.page.locator(".group-words")).to_contain_text("Not first order")
    expect(hand.page.locator(".tree")).to_have_count(0)
    _field(hand, "400")
    expect(hand.page.locator(".group-words")).to_contain_text("First order")
    expect(hand.page.locator(".tree figcaption")).to_contain_text("2 branches")


def test_small_lines_come_up_when_drawn_taller(hand: Hand) -> None:
    hand.tap("Draw it taller")
    expect(hand.page.locator(".trace-plot")).to_contain_text("4 times as tall")
    hand.tap("Draw it taller")
    hand.tap("As tall as before")
    expect(hand.page.locator(".trace-plot")).not_to_contain_text("times as tall")


def test_typed_lines_stand_over_the_trace_at_their_own_field_alone(hand: Hand) -> None:
    _field(hand, "60")
    expect(hand.page.locator(".trace-typed")).to_have_count(4)
    _field(hand, "400")
    expect(hand.page.locator(".trace-typed")).to_have_count(0)


def test_spin_system_is_fitted_to_the_typed_lines(hand: Hand) -> None:
    """Four lines of a para pair at 60 MHz: two shifts of 2 H and the J between ortho H, 8 to 9 Hz."""
    _field(hand, "60")
    hand.tap("Fit it to the 4 lines at 7.24–6.68")
    result = hand.page.locator(".fit-result")
    expect(result).to_contain_text("gives the 4 lines within 0.")
    expect(result.get_by_role("button", name="2 H")).to_have_count(2)
    assert re.search(r"8\.\d ± 0\.\d Hz", result.inner_text())
    expect(hand.page.locator(".trace-fitted")).to_have_count(1)
    result.get_by_role("button", name="2 H").first.click()
    expect(hand.page.locator(".drawing-traced .lit")).to_have_count(2)
    hand.tap("Leave the fit of the 4 lines at 7.24–6.68")
    expect(hand.page.locator(".trace-fitted")).to_have_count(0)


def test_a_line_is_drawn_as_a_lorentzian(bare_page: Page) -> None:
    """Half its height half a width from its middle, a fifth one width away."""
    heights = bare_page.evaluate(LINE_SHAPE, [0, 0.5, 1, -0.5])
    assert heights == pytest.approx([1, 0.5, 0.2, 0.5], abs=0.01)


def test_nothing_was_complained_of(hand: Hand) -> None:
    assert hand.complaints == []
