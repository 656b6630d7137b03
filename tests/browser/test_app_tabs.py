"""One case open in two tabs: each takes up what the other changes, and nothing typed is lost."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, Page, expect

from browser.bench_hand import Hand
from browser.stand import Host

#: Nothing is heard of other tabs, as in a tab that was frozen.
DEAF = "window.BroadcastChannel = undefined;"
#: Rows of the case as kept on the device.
KEPT = """() => new Promise((resolve, reject) => {
  const opening = indexedDB.open('hoodside');
  opening.onerror = reject;
  opening.onsuccess = () => {
    const asked = opening.result.transaction('cases').objectStore('cases').getAll();
    asked.onsuccess = () => { opening.result.close(); resolve(asked.result); };
  };
})"""


@pytest.fixture
def tabs(browser: Browser, host: Host, request: pytest.FixtureRequest) -> Iterator[tuple[Hand, Hand]]:
    """One new case in two tabs of one device."""
    context = browser.new_context()
    context.set_default_timeout(60_000)
    for script in getattr(request, "param", ()):
        context.add_init_script(script)
    first = Hand(context.new_page())
    first.open(host.address)
    first.tap("New case")
    first.page.locator(".readings").wait_for()
    second = Hand(context.new_page())
    second.page.goto(first.page.url)
    second.page.locator(".readings").wait_for()
    yield first, second
    assert first.complaints == second.complaints == []
    context.close()


def _name(page: Page, title: str) -> None:
    page.get_by_label("Case menu").first.click()
    page.get_by_role("button", name="Rename").click()
    page.get_by_label("Name of the case").fill(title)
    page.get_by_label("Name of the case").press("Enter")


def test_a_change_in_one_tab_shows_in_the_other(tabs: tuple[Hand, Hand]) -> None:
    first, second = tabs
    _name(first.page, "Fraction 7")
    expect(second.page.locator("h1", has_text="Fraction 7")).to_be_visible()
    first.paste_report("1H NMR (400 MHz, CDCl3) δ 2.05 (s, 3H)")
    expect(second.page.locator(".slips").first).to_contain_text("2.05")


@pytest.mark.parametrize("tabs", [(DEAF,)], indirect=True)
def test_changes_in_two_tabs_that_do_not_hear_each_other_are_both_kept(tabs: tuple[Hand, Hand]) -> None:
    first, second = tabs
    first.paste_report("1H NMR (400 MHz, CDCl3) δ 2.05 (s, 3H)")
    second.paste_report("IR (film) 1742 cm-1")
    expect(second.page.get_by_text("changed in another tab too")).to_be_visible()
    _name(first.page, "Fraction 7")
    expect(first.page.get_by_text("changed in another tab too")).to_be_visible()
    (kept,) = first.page.evaluate(KEPT)
    assert [row["shift"] for row in kept["h1"]] == ["2.05"]
    assert [row["cm1"] for row in kept["ir"]] == ["1742"]
    assert kept["title"] == "Fraction 7"


@pytest.mark.parametrize("tabs", [(DEAF,)], indirect=True)
def test_a_case_deleted_in_one_tab_is_not_lost_while_typed_in_at_the_other(tabs: tuple[Hand, Hand]) -> None:
    first, second = tabs
    first.page.get_by_label("Case menu").first.click()
    first.page.get_by_role("button", name="Delete this case").click()
    first.button("New case").wait_for()
    second.paste_report("1H NMR (400 MHz, CDCl3) δ 2.05 (s, 3H)")
    second.page.wait_for_timeout(300)
    (kept,) = second.page.evaluate(KEPT)
    assert [row["shift"] for row in kept["h1"]] == ["2.05"]
