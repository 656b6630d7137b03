"""What the tally shows of the engine's answer on the invented cases."""

from __future__ import annotations

import pytest
from playwright.sync_api import Page, expect

from browser.bench_hand import Hand

CASES = [
    ("Which ring position?", "Fits."),
    ("Did the oxidation go too far?", "Clashes."),
    ("Two that look alike", "Undecided."),
    ("Why does it look wrong?", "Undecided."),
]


@pytest.mark.parametrize(("case", "word"), CASES)
def test_each_invented_case_shows_what_it_was_made_for(page: Page, case: str, word: str) -> None:
    hand = Hand(page)
    hand.tap(case)
    hand.wait_for_verdict(word)
    page.get_by_label("All cases").click()
    expect(page.locator(".case-row").first).to_contain_text("invented")


def test_a_row_leads_to_its_reason_with_the_atoms_lit(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    page.locator(".tally-row", has_text="4.09 q").click()
    expect(page.locator(".reason")).to_contain_text("Speaks for")
    expect(page.locator(".drawing-big .lit")).to_have_count(1)
    terms = page.locator(".terms")
    expect(terms).to_contain_text("expected")
    parts = [_number(text) for text in terms.locator("dd").all_inner_texts()]
    assert sum(parts[:-1]) == pytest.approx(parts[-1], abs=0.03)  # they sum to what is expected


def _number(text: str) -> float:
    return float(text.split("±")[0].replace("−", "-").replace("+", ""))


def test_what_speaks_against_is_hatched_and_leans_left(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Did the oxidation go too far?")
    hand.wait_for_verdict("Clashes.")
    against = page.locator(".tally-row", has_text="12.6 br s")
    expect(against).to_contain_text("−")
    bar = against.locator(".bar-against")
    assert "hatch" in bar.evaluate("el => getComputedStyle(el).fill")
    assert float(bar.get_attribute("x") or 99) < 50


def test_the_table_holds_every_reading_against_every_structure(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Two that look alike")
    hand.wait_for_verdict("Undecided.")
    hand.tap("Readings against structures, as a table")
    table = page.locator(".tally-table")
    expect(table.locator("thead th")).to_have_count(4)
    rows = table.locator("tbody tr")
    assert rows.count() >= 8
    for row in rows.all():
        expect(row.locator("td")).to_have_count(3)


def test_a_second_structure_under_the_finger_changes_the_rows(page: Page) -> None:
    hand = Hand(page)
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    before = page.locator(".tally-head").inner_text()
    page.locator(".rung").last.click()
    assert page.locator(".tally-head").inner_text() != before
