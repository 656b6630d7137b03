"""Amounts: figures with their uncertainty from signals of the case, kept with it."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, expect

from browser.bench_hand import Hand
from browser.stand import ANSWER_MS, Host

REPORT = "1H NMR (400 MHz, CDCl3) δ 7.81 (d, J = 8.2 Hz, 3H), 3.00 (s, 2H), 2.05 (s, 0.2H)"


@pytest.fixture(scope="module")
def hand(browser: Browser, host: Host) -> Iterator[Hand]:
    """At the amounts of a case with three signals, its integrals 3, 2 and 0.2."""
    context = browser.new_context()
    context.set_default_timeout(ANSWER_MS)
    found = Hand(context.new_page())
    found.open(host.address)
    found.tap("New case")
    found.paste_report(REPORT)
    found.page.get_by_label("Case menu").click()
    found.tap("Amounts")
    yield found
    context.close()


def _stands(hand: Hand, shift: str, protons: str) -> None:
    """Let a signal stand for the portion whose sheet is open."""
    hand.page.locator(".chip", has_text=shift).click()
    hand.page.locator("input[name=protons-0]").click()
    hand.keys(" ".join(protons))


def _type(hand: Hand, field: str, text: str) -> None:
    hand.page.locator(f"input[name={field}]").click()
    hand.keys(" ".join(text))


def test_ratio_with_its_uncertainty(hand: Hand) -> None:
    """3 : 1; 2 % on each of two integrals is 2.8 % on their quotient (GUM, JCGM 100:2008, 5.1.6)."""
    hand.tap("Ratio")
    for name, shift, protons in [("major", "7.81", "1"), ("minor", "3.00", "2")]:
        hand.page.get_by_role("button", name="species").click()
        hand.page.get_by_label("Call it").fill(name)
        _stands(hand, shift, protons)
        hand.back()
    hand.tap("2 %")
    expect(hand.page.locator(".figure-main b")).to_contain_text("3.000 ± 0.085 : 1")
    expect(hand.page.locator(".facts-table").first).to_contain_text("75.00")
    expect(hand.page.locator(".assumptions")).to_contain_text("five times the longest T1")


def test_purity_by_internal_standard(hand: Hand) -> None:
    """P = (Ia/Is)(Ns/Na)(Ma/Ms)(ms/ma)Ps (Malz & Jancke, J. Pharm. Biomed. Anal. 2005, 38, 813), by hand:
    (3/2)(6/2)(150.17/94.13)(10.2/80.0) = 91.5 %."""
    hand.tap("Purity")
    hand.tap("Say which sample")
    _stands(hand, "7.81", "2")
    _type(hand, "molar", "150.17")
    _type(hand, "mass", "80.0")
    hand.back()
    expect(hand.page.locator(".lacking")).to_contain_text("internal standard")
    hand.tap("Say which internal standard")
    hand.tap("dimethyl sulfone")
    _stands(hand, "3.00", "6")
    _type(hand, "mass", "10.2")
    hand.back()
    figure = hand.page.locator(".figure-main b")
    expect(figure).to_contain_text("91.5")
    expect(figure).to_contain_text("± 2.6 %")  # 2 % on each integral


def test_solvent_left_by_mole_and_mass(hand: Hand) -> None:
    """Per H: product 3/2, ethyl acetate 0.2/3 (its CH3 at 2.05), so 95.74 : 4.26 by mole."""
    hand.tap("Solvent left")
    hand.tap("Say which product")
    _stands(hand, "7.81", "2")
    _type(hand, "molar", "150")
    hand.back()
    hand.tap("Say which solvent")
    hand.tap("ethyl acetate")
    hand.page.locator(".chip", has_text="2.05").click()
    hand.back()
    expect(hand.page.locator(".facts-table").first).to_contain_text("95.74")


def test_the_account_as_text_holds_the_amounts(hand: Hand) -> None:
    """What is copied says what the record shows: figures, their uncertainty, and what they rest on."""
    hand.page.context.grant_permissions(["clipboard-read", "clipboard-write"])
    hand.back()
    hand.page.get_by_label("Case menu").click()
    hand.tap("Record")
    expect(hand.page.locator(".facts-table").first).to_contain_text("95.74")
    hand.tap("Copy")
    expect(hand.page.get_by_text("Copied as text")).to_be_visible()
    copied = hand.page.evaluate("navigator.clipboard.readText()")
    assert "Amounts, solvent left (one standard uncertainty):" in copied
    assert "ethyl acetate: 4.26" in copied
    assert "five times the longest T1" in copied
    hand.back()
    hand.page.get_by_label("Case menu").click()
    hand.tap("Amounts")


def test_standards_and_residues_come_from_the_tables(hand: Hand) -> None:
    hand.tap("Another solvent")
    expect(
        hand.page.get_by_role("button", name="ethyl acetate, 2.05 and 4.12 and 1.26 ppm").first
    ).to_be_visible()
    hand.page.get_by_role("button", name="of the table").click()
    expect(hand.page.get_by_role("button", name="cyclopentyl methyl ether")).to_be_visible()
    hand.tap("Remove")


def test_amounts_are_kept_with_the_case(hand: Hand) -> None:
    hand.page.reload()
    expect(hand.page.locator(".facts-table").first).to_contain_text("95.74")
    hand.tap("Ratio")
    expect(hand.page.locator(".figure-main b")).to_contain_text("3.000")
    assert hand.complaints == []
