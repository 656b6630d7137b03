"""The whole job with the host stopped and the network off."""

from __future__ import annotations

from playwright.sync_api import expect

from browser.bench_hand import Hand
from browser.stand import Host, OpenDevice

#: Ethyl acetate in CDCl3: Gottlieb, Kotlyar, Nudelman, J. Org. Chem. 1997, 62, 7512.
ETHYL_ACETATE = "1H NMR (400 MHz, CDCl3) δ 4.12 (q, J = 7.1 Hz, 2H), 2.05 (s, 3H), 1.26 (t, J = 7.1 Hz, 3H)"


def test_a_case_from_reload_to_verdict_without_network(own_host: Host, open_device: OpenDevice) -> None:
    device = open_device()
    hand = Hand(device.new_page())
    hand.open(own_host.address)
    expect(hand.page.locator(".whisper", has_text="Ready offline.")).to_be_visible(timeout=120_000)
    own_host.stop()
    device.set_offline(True)
    hand.page.reload()

    hand.tap("Did the oxidation go too far?")
    hand.wait_for_verdict("Clashes.")
    hand.page.get_by_label("All cases").click()

    hand.tap("New case")
    _type_formula_and_a_signal(hand)
    hand.put_up("CCOC(C)=O")
    hand.put_up("CCC(=O)OC")
    hand.station("Tally")
    before = hand.verdict().inner_text()

    hand.paste_report(ETHYL_ACETATE)
    hand.station("Tally")
    hand.wait_for_verdict("Fits.")
    assert hand.verdict().inner_text() != before
    assert not [line for line in hand.complaints if "ERR_INTERNET_DISCONNECTED" not in line]


def _type_formula_and_a_signal(hand: Hand) -> None:
    """C4H8O2 and one triplet, by the pads alone."""
    hand.page.locator(".tile", has_text="Formula").click()
    hand.keys("C 4 H 8 O 2")
    expect(hand.page.locator(".facts-table")).to_contain_text("88.0524")  # 4 C + 8 H + 2 O, AME2020
    hand.keys("done")
    hand.tap("Add a signal")
    hand.keys("1 . 2 6")
    hand.page.get_by_role("button", name="triplet", exact=True).click()
    hand.keys("7 . 1 next 3")
    hand.back()
    expect(hand.page.locator(".slip")).to_contain_text("1.26")
    expect(hand.page.locator(".slip")).to_contain_text("3 H")


def test_closing_the_tab_at_any_moment_loses_nothing(own_host: Host, open_device: OpenDevice) -> None:
    device = open_device()
    hand = Hand(device.new_page())
    hand.open(own_host.address)
    hand.tap("New case")
    hand.tap("Add a signal")
    hand.keys("3 . 6 7")
    hand.page.get_by_role("button", name="singlet", exact=True).click()
    hand.page.close()  # in the middle of the entry
    device.close()

    hand = Hand(open_device().new_page())
    hand.open(own_host.address)
    hand.tap("Sample 1")
    expect(hand.page.locator(".slip")).to_contain_text("3.67")
    expect(hand.page.locator(".slip")).to_contain_text("s")
