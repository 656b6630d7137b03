"""Files in and out: CTfile, check object, case, picture of a printout."""

from __future__ import annotations

import json
from typing import Any

import pytest
from playwright.sync_api import FilePayload, Page, expect

from browser.bench_hand import Hand

#: Ethanol, written by hand after the CTfile specification (V2000).
ETHANOL_CTFILE = """
  by hand

  3  2  0  0  0  0  0  0  0  0999 V2000
    0.0000    0.0000    0.0000 C   0  0
    1.5000    0.0000    0.0000 C   0  0
    2.2500    1.3000    0.0000 O   0  0
  1  2  1  0
  2  3  1  0
M  END
"""

#: One black pixel.
PNG = bytes.fromhex(
    "89504e470d0a1a0a0000000d4948445200000001000000010802000000907753de"
    "0000000c49444154789c6360606000000004000109f3f4660000000049454e44ae426082"
)


def _file(name: str, content: bytes, kind: str = "application/octet-stream") -> FilePayload:
    return {"name": name, "mimeType": kind, "buffer": content}


@pytest.fixture
def hand(page: Page) -> Hand:
    """In a new case."""
    found = Hand(page)
    found.tap("New case")
    return found


def test_ctfile_is_known_by_its_content(hand: Hand) -> None:
    chooser = hand.page.locator("label", has_text="Open a file").locator("input")
    chooser.set_input_files(_file("sample.bin", ETHANOL_CTFILE.encode()))
    expect(hand.page.locator(".described-line")).to_contain_text("C2H6O", timeout=60_000)


def test_check_object_gives_readings_and_structures(hand: Hand) -> None:
    given: dict[str, Any] = {
        "solvent": "CDCl3",
        "mhz": 400,
        "h1": [{"ppm": 2.05, "mult": "s", "n": 3}, {"lo": 4.1, "hi": 4.2, "mult": "m", "n": 2}],
        "ir_clear": [[3340, 3580]],
        "candidates": ["CCOC(C)=O"],
    }
    chooser = hand.page.locator("label", has_text="Open a file").locator("input")
    chooser.set_input_files(_file("check.txt", json.dumps(given).encode()))
    expect(hand.page.locator(".slip")).to_have_count(2)
    expect(hand.page.locator(".slip").first).to_contain_text("4.20–4.10")
    hand.station("Structures")
    expect(hand.page.locator(".card")).to_contain_text("C4H8O2", timeout=60_000)


def test_file_that_is_nothing_known_is_named(hand: Hand) -> None:
    chooser = hand.page.locator("label", has_text="Open a file").locator("input")
    chooser.set_input_files(_file("other.json", b'{"colour": "blue"}'))
    expect(hand.page.get_by_role("status").filter(has_text="other.json")).to_contain_text("not taken in")


def test_picture_of_a_printout_stays_with_the_case(hand: Hand) -> None:
    chooser = hand.page.locator("label", has_text="Photograph a printout").locator("input")
    chooser.set_input_files(_file("printout.png", PNG, "image/png"))
    expect(hand.page.locator(".photo-list img")).to_be_visible()
    hand.page.reload()
    expect(hand.page.locator(".photo-list img")).to_be_visible()
    hand.tap("Add a signal")
    hand.tap("Show the printout")
    expect(hand.page.locator(".printout img")).to_be_visible()


def test_exported_case_opens_again(hand: Hand) -> None:
    hand.tap("Add a signal")
    hand.keys("7 . 1 0")
    hand.back()
    hand.page.get_by_label("Case menu").click()
    hand.tap("Record")
    with hand.page.expect_download() as started:
        hand.tap("Export")
    content = started.value.path().read_bytes()
    hand.back()
    hand.page.get_by_label("All cases").click()
    hand.page.get_by_label("Menu", exact=True).click()
    chooser = hand.page.locator("label", has_text="Open a case file").locator("input")
    chooser.set_input_files(_file("case.json", content))
    expect(hand.page.locator(".slip")).to_contain_text("7.10")
    hand.page.get_by_label("All cases").click()
    expect(hand.page.locator(".case-row", has_text="Sample 1")).to_have_count(2)
