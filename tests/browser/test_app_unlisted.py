"""The right structure may be missing from the list: look-alikes are sought unasked, and that is said."""

from __future__ import annotations

from playwright.sync_api import Page, expect

from browser.bench_hand import Hand

#: Made up from the predicted spectrum of the para compound.
REPORT = (
    "Anal. Calcd for C10H12O2. 1H NMR (400 MHz, CDCl3) δ 7.98 (d, J = 8.8 Hz, 2H), 6.92 (d, J = 8.8 Hz, 2H), "
    "4.10 (q, J = 7.0 Hz, 2H), 2.55 (s, 3H), 1.43 (t, J = 7.0 Hz, 3H)."
)
PARA, META = "CCOc1ccc(C(C)=O)cc1", "CCOc1cccc(C(C)=O)c1"


def _case(page: Page, report: str, smiles: str) -> Hand:
    hand = Hand(page)
    hand.tap("New case")
    hand.paste_report(report)
    hand.put_up(smiles)
    hand.station("Tally")
    page.locator(".tally:not(.stale) .verdict").wait_for()
    return hand


def test_the_right_one_is_put_up_where_only_a_wrong_one_was(page: Page) -> None:
    hand = _case(page, REPORT, META)
    note = page.locator(".unlisted")
    expect(note).to_contain_text("The right structure may not be on the list.", timeout=60_000)
    expect(page.locator(".rung")).not_to_have_count(1, timeout=60_000)
    expect(page.locator(".verdict")).not_to_contain_text("Fits.")
    note.get_by_role("link", name="What else would fit?").click()
    page.locator(".rivals-found[aria-busy=false] .rival").first.wait_for(timeout=60_000)
    page.get_by_role("button", name="Dismiss").first.click()
    hand.back()
    hand.station("Tally")
    expect(page.locator(".rung")).to_have_count(1, timeout=60_000)
    expect(note).to_contain_text("The one put up clashes with the readings.")
    assert hand.complaints == []


def test_a_right_one_keeps_its_verdict_once_its_look_alikes_are_ruled_out(page: Page) -> None:
    hand = _case(page, REPORT, PARA)
    verdict = page.locator(".tally:not(.stale) .verdict")
    expect(verdict).to_contain_text("look-alikes weighed beside it comes near", timeout=60_000)
    expect(verdict).to_contain_text("Fits.")
    expect(page.locator(".rung")).to_have_count(1)
    expect(page.locator(".unlisted")).to_have_count(0)
    assert hand.complaints == []


def test_a_list_of_which_all_clash_is_said_to_lack_the_right_one(page: Page) -> None:
    """Nothing within a few moves of an alkane has the readings of an aryl ketone."""
    hand = _case(page, REPORT.removeprefix("Anal. Calcd for C10H12O2. "), "CCCCCCCCCC")
    expect(page.locator(".unlisted")).to_contain_text(
        "The one put up clashes with the readings.", timeout=60_000
    )
    expect(page.get_by_role("link", name="What do the readings say?")).to_be_visible()
    assert hand.complaints == []
