"""What the readings say by themselves, when no structure has been put up."""

from __future__ import annotations

from playwright.sync_api import Page, expect

from browser.bench_hand import Hand
from browser.test_grow import SMALL_TARGETS

#: Made up: a phenacyl group without anything else.
REPORT = "1H NMR (400 MHz, CDCl3) δ 7.98 (m, 2H), 7.60 (m, 1H), 7.48 (m, 2H), 4.46 (s, 2H)."


def _asked(page: Page, formula: str) -> Hand:
    hand = Hand(page)
    hand.tap("New case")
    hand.paste_report(f"{formula} {REPORT}".strip())
    hand.station("Structures")
    hand.tap("What do the readings themselves say?")
    page.locator(".rivals-found .lead").wait_for()
    return hand


def test_fragments_and_whole_structures_are_proposed_and_taken_over_in_one_tap(page: Page) -> None:
    hand = _asked(page, "Anal. Calcd for C8H7BrO.")
    forced = page.locator(".section", has_text="Forced by the readings")
    expect(forced).to_contain_text("phenyl")
    expect(forced).to_contain_text("published spectra with this sign")
    assert page.evaluate(SMALL_TARGETS) == []
    first = page.locator(".rival").first
    expect(first.locator(".sign")).to_be_visible()
    many = page.locator(".rival").count()
    first.get_by_role("button", name="Take over").click()
    expect(page.locator(".rival")).to_have_count(many - 1)
    hand.back()
    expect(page.locator(".card")).to_have_count(1)
    hand.station("Tally")
    expect(page.locator(".verdict")).to_contain_text("Fits.", timeout=60_000)
    assert hand.complaints == []


def test_without_a_formula_it_says_what_it_cannot(page: Page) -> None:
    hand = _asked(page, "")
    expect(page.locator(".lead")).to_contain_text("No whole structure can be proposed.")
    expect(page.get_by_text("Give the formula to have structures put together.")).to_be_visible()
    expect(page.get_by_role("link", name="Give the formula")).to_be_visible()
    assert hand.complaints == []
