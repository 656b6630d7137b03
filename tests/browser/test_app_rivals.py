"""What else would fit: look-alikes put up, weighed, kept, dismissed."""

from __future__ import annotations

from playwright.sync_api import Page, expect

from browser.bench_hand import Hand


def test_look_alikes_are_weighed_kept_and_dismissed(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    hand.station("Structures")
    before = page.locator(".card").count()
    hand.tap("What else would fit?")
    page.locator(".rival").first.wait_for()
    expect(page.locator(".working .button")).to_have_count(0, timeout=120_000)
    expect(page.locator(".rival-words", has_text="not weighed")).to_have_count(0)
    weights = [
        int(text.split(",")[0].replace("−", "-")) for text in page.locator(".rival-words b").all_inner_texts()
    ]
    assert weights == sorted(weights, reverse=True)
    many = page.locator(".rival").count()
    hand.page.get_by_role("button", name="Dismiss").first.click()
    expect(page.locator(".rival")).to_have_count(many - 1)
    hand.page.get_by_role("button", name="Keep").first.click()
    expect(page.locator(".rival")).to_have_count(many - 2)
    hand.tap("Bring back 1 dismissed one")
    expect(page.locator(".rival")).to_have_count(many - 1)
    hand.back()
    expect(page.locator(".card")).to_have_count(before + 1)
    assert hand.complaints == []
