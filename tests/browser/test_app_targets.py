"""Screens a gloved thumb can use: sizes of what is tapped, nothing wider than the phone, no complaints."""

from __future__ import annotations

from typing import Any

import pytest
from playwright.sync_api import Browser, Page, expect

from browser.bench_hand import Hand
from browser.stand import Host

#: CSS pixels. 15 mm at 96 to the inch, after the glove sizes that common practice asks for.
LEAST_TARGET = 56

#: Boxes of all that can be tapped in the view, with a name for the report. Words inside running text, and
#: whatever is reached through a larger label, are no targets of their own.
TARGETS = """() => [...document.querySelectorAll(
    'button, a[href], input:not([type=file]):not([data-pad]), label.file-button')]
  .filter((el) => !el.closest('p') && el.checkVisibility())
  .map((el) => {
    const { width, height } = el.getBoundingClientRect();
    return { name: (el.ariaLabel || el.innerText || el.className).slice(0, 40), width, height };
  })"""

TOO_WIDE = "document.documentElement.scrollWidth > innerWidth"


def _small(page: Page) -> list[dict[str, Any]]:
    found: list[dict[str, Any]] = page.evaluate(TARGETS)
    return [box for box in found if box["width"] < LEAST_TARGET - 0.5 or box["height"] < LEAST_TARGET - 0.5]


def _visit_screens(hand: Hand) -> dict[str, list[dict[str, Any]]]:
    """Walk through the bench screens; per screen the targets that are too small."""
    small = {}

    def look(name: str) -> None:
        hand.page.wait_for_timeout(150)
        small[name] = _small(hand.page)
        assert not hand.page.evaluate(TOO_WIDE), f"{name} is wider than the screen"

    hand.tap("Which ring position?")
    hand.wait_for_verdict(".")
    look("tally")
    hand.station("Next")
    look("next")
    hand.station("Structures")
    look("structures")
    hand.station("Readings")
    look("readings")
    hand.page.locator(".slip").first.click()
    look("signal")
    hand.tap("Pattern and J from its lines")
    look("lines")
    hand.back()
    hand.back()
    hand.page.get_by_label("Case menu").click()
    look("case menu")
    hand.tap("Amounts")
    look("amounts")
    hand.back()
    hand.tap("Simulated trace")
    hand.page.locator(".traced:not(.stale)").wait_for()
    look("trace")
    hand.back()
    hand.station("Readings")
    hand.tap("Add a line")
    look("carbon")
    hand.back()
    hand.tap("Add a wet test")
    look("wet tests")
    hand.back()
    hand.page.locator(".tile", has_text="Formula").click()
    look("formula")
    hand.back()
    return small


@pytest.mark.parametrize("size", [(360, 740), (390, 844), (1024, 768)])
@pytest.mark.parametrize("scheme", ["light", "dark"])
def test_targets_are_large_and_the_console_is_silent(
    browser: Browser, host: Host, size: tuple[int, int], scheme: Any
) -> None:
    context = browser.new_context(color_scheme=scheme)
    context.set_default_timeout(60_000)
    hand = Hand(context.new_page())
    hand.page.set_viewport_size({"width": size[0], "height": size[1]})
    hand.open(host.address)
    small = _visit_screens(hand)
    assert {name: boxes for name, boxes in small.items() if boxes} == {}
    assert hand.complaints == []
    context.close()


def test_every_sign_and_drawing_has_words(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict(".")
    unnamed = page.evaluate(
        "[...document.querySelectorAll('[role=img]')].filter((el) => !el.getAttribute('aria-label')).length"
    )
    assert unnamed == 0
    expect(page.get_by_role("group", name="Structures by weight of evidence, best first")).to_be_visible()


def test_deleting_is_taken_back_by_one_tap(page: Page) -> None:
    hand = Hand(page)
    hand.tap("New case")
    page.get_by_label("Case menu").click()
    hand.tap("Delete this case")
    expect(page.get_by_text("Sample 1 deleted")).to_be_visible()
    hand.tap("Undo")
    expect(page.locator(".case-row", has_text="Sample 1")).to_be_visible()
