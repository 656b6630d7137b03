"""What else would fit: look-alikes put up, weighed, kept, dismissed."""

from __future__ import annotations

from playwright.sync_api import Page, expect

from browser.bench_hand import Hand
from browser.stand import wait_until


def searched(page: Page) -> None:
    """Wait until the search has come to its end or was stopped."""
    page.locator(".rivals-found[aria-busy=false] .rival").first.wait_for(timeout=120_000)


def test_look_alikes_are_weighed_kept_and_dismissed(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    hand.station("Structures")
    before = page.locator(".card").count()
    hand.tap("What else would fit?")
    searched(page)
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
    page.get_by_role("button", name="Look further, for the best 100").click()
    expect(page.get_by_role("button", name="Look further, for the best 200")).to_be_visible(timeout=120_000)
    assert page.locator(".rival").count() > many
    hand.back()
    expect(page.locator(".card")).to_have_count(before + 1)
    assert hand.complaints == []


def test_a_search_can_be_stopped_and_gone_on_with(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    hand.station("Structures")
    hand.tap("What else would fit?")
    page.locator(".rival").first.wait_for()
    page.get_by_role("button", name="Stop").click()
    again = page.get_by_role("button", name="Go on")
    expect(again).to_be_visible()
    page.wait_for_timeout(600)  # the slice under way may still add what it found
    found = page.locator(".rival").count()
    assert found > 0
    page.wait_for_timeout(600)
    expect(page.locator(".rival")).to_have_count(found)
    again.click()
    searched(page)
    assert page.locator(".rival").count() >= found
    expect(again).to_have_count(0)
    assert hand.complaints == []


def test_leaving_the_sheet_stops_the_search_and_coming_back_goes_on(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    hand.station("Structures")
    page.evaluate(COUNT_HUNTS)
    hand.tap("What else would fit?")
    hand.tap("all look-alikes")
    wait_until(page, "window.hunts > 0")
    hand.back()
    page.wait_for_timeout(400)
    asked = page.evaluate("window.hunts")
    page.wait_for_timeout(600)
    assert page.evaluate("window.hunts") == asked
    hand.tap("What else would fit?")
    hand.tap("all look-alikes")
    searched(page)
    assert page.evaluate("window.hunts") > asked
    assert hand.complaints == []


#: Counts the slices of a search in all look-alikes that the page asks its engine for.
COUNT_HUNTS = """() => {
  window.hunts = 0;
  const post = Worker.prototype.postMessage;
  Worker.prototype.postMessage = function (message, ...rest) {
    if (message?.method === 'hunt' && !message.params.allowed) window.hunts += 1;
    return post.call(this, message, ...rest);
  };
}"""


def test_the_start_of_the_stated_step_stands_among_the_structures_and_look_alikes(page: Page) -> None:
    """Borohydride gives the alcohol (common practice); what was started from is put up unasked."""
    hand = Hand(page)
    hand.tap("New case")
    hand.paste_report("1H NMR (400 MHz, CDCl3) \u03b4 7.35 (m, 5H), 4.66 (s, 2H), 1.9 (br s, 1H).")
    hand.station("Structures")
    hand.tap("What did you run?")
    page.get_by_role("link", name="What did you start from?").click()
    page.get_by_label("Name or SMILES").fill("benzaldehyde")
    page.locator(".pick-drawn").first.click()
    page.get_by_role("link", name="Search").click()
    page.get_by_label("Reagents").fill("NaBH4")
    page.get_by_role("button", name="NaBH4").first.click()
    page.get_by_role("button", name="Done").click()
    page.locator(".run-found:not(.stale) .run-outcome").first.wait_for()
    hand.back()
    hand.put_up("OCc1ccccc1")
    start = page.get_by_role("button", name="Take the start over as a structure")
    expect(start).to_be_visible()
    hand.tap("What else would fit?")
    rival = page.locator(".rival", has_text="the start of the step, unchanged")
    expect(rival).to_contain_text("behind", timeout=60_000)
    assert hand.complaints == []
