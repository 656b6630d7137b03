"""What did you run: from a start and what was added to structures of the case, with cautions and a check."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, Page, expect

from browser.bench_hand import PHONE, Hand
from browser.growing import Grower
from browser.stand import Host
from browser.test_grow import SMALL_TARGETS, inchikey

ANSWER_MS = 60_000


@pytest.fixture
def hand(browser: Browser, host: Host) -> Iterator[Hand]:
    """On the step of a new case, on a phone."""
    context = browser.new_context(viewport=PHONE, has_touch=True, is_mobile=True)  # type: ignore[arg-type]
    context.set_default_timeout(ANSWER_MS)
    found = Hand(context.new_page())
    found.open(host.address)
    found.tap("New case")
    found.station("Structures")
    found.tap("What did you run?")
    yield found
    assert found.complaints == []
    context.close()


def start_from(page: Page, text: str) -> None:
    """Choose the start by name or SMILES."""
    page.get_by_role("link", name="What did you start from?").tap()
    put_in(page, text)


def put_in(page: Page, text: str) -> None:
    page.get_by_label("Name or SMILES").fill(text)
    page.locator(".pick-drawn").first.tap()


def outcomes(page: Page) -> list[str]:
    """The outcomes in words, once they stand."""
    page.locator(".run-found:not(.stale) .run-outcome").first.wait_for()
    return page.locator(".run-outcome").all_inner_texts()


def test_from_start_and_reagents_to_candidates_in_one_tap(hand: Hand) -> None:
    """OsO4 with NMO gives the diol (Schroeder, Chem. Rev. 1980, 80, 187); the start may be left."""
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("button", name="OsO4, NMO").tap()
    found = outcomes(page)
    assert "product, racemic" in found[0]
    assert "C9H12O2" in found[0]
    assert any("over-reaction" in text for text in found)
    assert "no reaction" in found[-1]
    page.get_by_role("button", name="Take 3 as structures").tap()
    expect(page.locator(".card")).to_have_count(3)
    expect(page.locator(".card", has_text="intended")).to_contain_text("C9H12O2")
    expect(page.locator(".card", has_text="allylbenzene")).to_be_visible()
    page.get_by_role("button", name="Undo").tap()
    expect(page.locator(".card")).to_have_count(0)


def test_cautions_stand_with_their_deference_and_go_with_the_case(hand: Hand) -> None:
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("button", name="OsO4, NMO").tap()
    outcomes(page)
    note = page.locator(".run-cautions")
    expect(note).to_contain_text("fatal if swallowed")
    expect(note).to_contain_text("Quench: sodium sulfite")
    expect(note).to_contain_text("supplier's safety sheet and licensed practice come first")
    page.get_by_label("All cautions").tap()
    expect(note).to_contain_text("N-methylmorpholine N-oxide")
    expect(note).to_contain_text("Keep from")
    page.get_by_role("button", name="Take 3 as structures").tap()
    hand.station("Readings")
    expect(page.locator(".caution", has_text="osmium tetroxide")).to_be_visible()


def test_what_was_not_understood_is_said(hand: Hand) -> None:
    page = hand.page
    start_from(page, "CC(C)c1ccc(C=O)cc1")
    page.get_by_role("link", name="Search").tap()
    page.get_by_label("Reagents").fill("NaBH4, moonlight")
    page.get_by_role("button", name="as typed").tap()
    page.get_by_role("button", name="Done").tap()
    expect(page.get_by_role("alert")).to_contain_text("Not understood: moonlight")
    assert "C10H14O" in outcomes(page)[0]


def test_a_reagent_is_found_by_any_of_its_names(hand: Hand) -> None:
    page = hand.page
    page.get_by_role("link", name="Search").tap()
    page.get_by_label("Reagents").fill("lithium alum")
    page.get_by_role("button", name="lithium aluminium hydride").tap()
    expect(page.get_by_role("group", name="Added so far")).to_contain_text("lithium aluminium hydride")


def test_a_partner_makes_the_step(hand: Hand) -> None:
    """Williamson: a phenol, an alkyl halide and carbonate give the ether."""
    page = hand.page
    start_from(page, "CC(C)c1ccc(O)cc1")
    page.get_by_role("link", name="Search").tap()
    page.get_by_role("button", name="K2CO3, DMF").tap()
    page.get_by_role("button", name="Done").tap()
    assert len(outcomes(page)) == 1
    expect(page.locator(".run-none")).to_contain_text("The table holds no step for K2CO3")
    page.get_by_label("Add an organic partner").tap()
    put_in(page, "BrCc1ccccc1")
    expect(page.locator(".run-outcome").first).to_contain_text("C16H18O", timeout=ANSWER_MS)


def test_a_reagent_brings_its_own_structure(hand: Hand) -> None:
    """A Grignard reagent by its name needs no partner put in beside it."""
    page = hand.page
    start_from(page, "CC(C)c1ccc(C=O)cc1")
    page.get_by_role("link", name="Search").tap()
    page.get_by_label("Reagents").fill("PhMg")
    page.get_by_role("button", name="PhMgBr", exact=True).tap()
    page.get_by_role("button", name="Done").tap()
    assert "C16H18O" in outcomes(page)[0]
    expect(page.locator(".run-cautions")).to_contain_text("Grignard reagent")


def test_the_start_is_grown_and_brought_back(hand: Hand) -> None:
    page = hand.page
    page.get_by_role("link", name="What did you start from?").tap()
    page.get_by_role("link", name="Grow it").tap()
    grower = Grower(page)
    grower.follow("tile:benzene | CH2CH3 | OH")
    assert inchikey(grower.smiles()) == inchikey("CC(O)c1ccccc1")
    page.get_by_role("button", name="Use this").tap()
    page.get_by_role("link", name="Search").tap()
    page.get_by_role("button", name="Jones").first.tap()
    page.get_by_role("button", name="Done").tap()
    assert "C8H8O" in outcomes(page)[0]


def test_steps_in_turn_and_a_second_step_by_touch(hand: Hand) -> None:
    """Hydroboration and oxidation give the primary alcohol (Brown, Hydroboration, 1962)."""
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("link", name="Search").tap()
    page.get_by_role("button", name="BH3", exact=True).tap()
    page.get_by_label("Then, in a step of its own").tap()
    page.get_by_label("Reagents").fill("H2O2")
    page.get_by_role("button", name="H2O2", exact=True).tap()
    page.get_by_role("button", name="Done").tap()
    assert "C9H12O" in outcomes(page)[0]


def test_ten_second_check_names_what_comes_and_goes(hand: Hand) -> None:
    page = hand.page
    start_from(page, "CC(O)c1ccccc1")
    page.get_by_role("link", name="Search").tap()
    page.get_by_role("button", name="Jones").first.tap()
    page.get_by_role("button", name="Done").tap()
    outcomes(page)
    check = page.locator(".run-changes")
    expect(check).to_contain_text("O-H stretch", timeout=ANSWER_MS)
    expect(check.locator("li", has_text="O-H stretch")).to_contain_text("goes")
    page.get_by_role("button", name="All, with sources").tap()
    expect(check.locator("li", has_text="C=O stretch")).to_contain_text("comes")
    expect(check.locator(".source").first).to_be_visible()


def test_source_and_note_are_one_tap_away(hand: Hand) -> None:
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("button", name="OsO4, NMO").tap()
    outcomes(page)
    page.locator(".run-open").first.tap()
    expect(page.locator(".run-more-of")).to_contain_text("Schroeder, Chem. Rev. 1980")
    expect(page.locator(".run-more-of")).to_contain_text("same face")


def test_conditions_used_before_come_first(hand: Hand) -> None:
    page = hand.page
    start_from(page, "CC(O)c1ccccc1")
    page.get_by_role("link", name="Search").tap()
    page.get_by_role("button", name="Jones").first.tap()
    page.get_by_role("button", name="Done").tap()
    outcomes(page)
    page.get_by_role("button", name="as structures").tap()
    page.locator(".card").first.wait_for()
    page.goto(page.url.split("#")[0])
    hand.tap("New case")
    hand.station("Structures")
    hand.tap("What did you run?")
    expect(page.locator(".run-added .chip").first).to_have_text("Jones")


def test_what_was_run_outlives_a_reload(hand: Hand) -> None:
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("button", name="OsO4, NMO").tap()
    outcomes(page)
    page.reload()
    assert "C9H12O2" in outcomes(page)[0]


@pytest.mark.parametrize("size", [(360, 740), (390, 844), (844, 390), (1024, 768)])
def test_targets_are_large_and_nothing_is_wider_than_the_screen(hand: Hand, size: tuple[int, int]) -> None:
    page = hand.page
    start_from(page, "allylbenzene")
    page.get_by_role("button", name="OsO4, NMO").tap()
    outcomes(page)
    page.set_viewport_size({"width": size[0], "height": size[1]})
    for sheet in ("", "/reagents", "/start"):
        page.goto(page.url.split("/run")[0] + f"/run{sheet}")
        page.wait_for_timeout(400)
        assert page.evaluate(SMALL_TARGETS) == [], sheet
        assert page.evaluate("document.documentElement.scrollWidth <= innerWidth"), sheet
