"""Input that cannot be right: a plain message beside the field, what was typed kept, no freeze."""

from __future__ import annotations

import pytest
from playwright.sync_api import Page, expect

from browser.bench_hand import Hand

#: Longest a screen may leave a tap unanswered, ms.
FROZEN_MS = 1_000

CHAIN_200 = "C" * 200
CHAIN_1000 = "C" * 1000


@pytest.fixture
def hand(page: Page) -> Hand:
    """In a new case."""
    found = Hand(page)
    found.tap("New case")
    return found


def _paste_structure(hand: Hand, smiles: str) -> None:
    hand.station("Structures")
    hand.tap("Paste SMILES or CTfile")
    hand.page.get_by_label("SMILES or CTfile").fill(smiles)


@pytest.mark.parametrize("smiles", ["not a structure", "C(C)(C)(C)(C)C", "c1ccc", "C1CC", CHAIN_1000])
def test_structure_that_is_none_is_refused_with_its_mend(hand: Hand, smiles: str) -> None:
    _paste_structure(hand, smiles)
    expect(hand.page.locator(".trouble")).to_be_visible(timeout=60_000)
    assert len(hand.page.locator(".trouble").inner_text()) > 20
    assert hand.page.get_by_label("SMILES or CTfile").input_value() == smiles
    expect(hand.button("Put it up")).to_be_disabled()


def test_structure_of_200_atoms_is_answered(hand: Hand) -> None:
    _paste_structure(hand, CHAIN_200)
    expect(hand.page.locator(".described-line")).to_contain_text("C200H402", timeout=60_000)


def test_after_a_refused_structure_the_next_is_taken(hand: Hand) -> None:
    _paste_structure(hand, CHAIN_1000)
    expect(hand.page.locator(".trouble")).to_be_visible(timeout=60_000)
    hand.page.get_by_label("SMILES or CTfile").fill("CCO")
    expect(hand.page.locator(".described-line")).to_contain_text("C2H6O", timeout=60_000)


@pytest.mark.parametrize("formula", ["C10H12Q", "c6h", "C6H6)"])
def test_formula_with_a_slip_is_kept_and_explained(hand: Hand, formula: str) -> None:
    hand.page.locator(".tile", has_text="Formula").click()
    field = hand.page.locator("input[name=formula]")
    field.fill(formula)
    expect(hand.page.locator(".trouble")).to_be_visible(timeout=60_000)
    assert field.input_value() == formula
    hand.back()
    hand.page.locator(".tile", has_text="Formula").click()
    assert field.input_value() == formula


def test_shift_that_is_no_number_is_kept_and_not_counted(hand: Hand) -> None:
    hand.tap("Add a signal")
    hand.page.locator("input[name=shift]").fill("7.2.6")
    expect(hand.page.get_by_role("alert")).to_contain_text("7.2.6")
    hand.back()
    expect(hand.page.locator(".slip")).to_contain_text("not counted")


def test_shift_out_of_all_range_is_said_at_its_row(hand: Hand) -> None:
    hand.put_up("CCO")
    hand.station("Readings")
    hand.tap("Add a signal")
    hand.keys("4 0 0")
    hand.back()
    expect(hand.page.locator(".slip")).to_contain_text("400 ppm is no possible 1H shift", timeout=60_000)


def test_negative_shift_is_taken(hand: Hand) -> None:
    """Protons above the face of an aromatic ring and hydrides lie below zero (common practice)."""
    hand.tap("Add a signal")
    hand.keys("0 . 4 ±")
    hand.back()
    expect(hand.page.locator(".slip .slip-shift")).to_have_text("-0.4")
    expect(hand.page.locator(".slip")).not_to_contain_text("not counted")


def test_paste_of_ten_thousand_lines_does_not_freeze(hand: Hand) -> None:
    hand.page.context.grant_permissions(["clipboard-read", "clipboard-write"])
    hand.tap("Paste a report line")
    lines = "\n".join(f"{i % 200}.5 (s, 1H)" for i in range(10_000))
    hand.page.evaluate("text => navigator.clipboard.writeText(text)", lines)
    hand.tap("From the clipboard")
    expect(hand.page.get_by_label("Report line")).to_have_value(lines)
    waited = hand.page.evaluate("""async () => {
      let longest = 0;
      let last = performance.now();
      const end = last + 3000;
      while (last < end) {
        await new Promise((resolve) => { setTimeout(resolve, 16); });
        longest = Math.max(longest, performance.now() - last);
        last = performance.now();
      }
      return longest;
    }""")
    assert waited < FROZEN_MS
    hand.back()
    expect(hand.button("Add a signal")).to_be_visible()
