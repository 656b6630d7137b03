"""Structures grown by touch alone: drug-sized molecules with their configurations, taps counted."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from playwright.sync_api import Browser, Page, expect
from rdkit import Chem

from browser.bench_hand import PHONE, Hand
from browser.growing import Grower
from browser.stand import Host

#: Most taps for a molecule of up to this many heavy atoms.
MOST_TAPS, UP_TO_HEAVY = 25, 15

# name, SMILES by its IUPAC name, plan (see Grower.follow)
MOLECULES = [
    ("4-isopropylbenzaldehyde", "CC(C)c1ccc(C=O)cc1", "tile:benzene | CHO | @3 | CH(CH3)2"),
    ("N-(4-hydroxyphenyl)acetamide", "CC(=O)Nc1ccc(O)cc1", "tile:benzene | OH | @3 | NHC(O)CH3"),
    ("2-acetoxybenzoic acid", "CC(=O)Oc1ccccc1C(=O)O", "tile:benzene | CO2H | @1 | OC(O)CH3"),
    ("ethyl 4-aminobenzoate", "CCOC(=O)c1ccc(N)cc1", "tile:benzene | NH2 | @3 | CO2CH2CH3"),
    (
        "(S)-2-(4-isobutylphenyl)propanoic acid",
        "CC(C)Cc1ccc([C@H](C)C(=O)O)cc1",
        "tile:benzene | CH2CH(CH3)2 | @3 | CH2CH3 | @10 | CO2H | S",
    ),
    (
        "(1R,2S,5R)-2-isopropyl-5-methylcyclohexan-1-ol",
        "C[C@@H]1CC[C@@H](C(C)C)[C@H](O)C1",
        "tile:cyclohexane | OH | @1 | CH(CH3)2 | @4 | CH3 | @0 | R | @1 | S | @4 | R",
    ),
    (
        "(1R,2S)-2-(methylamino)-1-phenylpropan-1-ol",
        "CN[C@@H](C)[C@H](O)c1ccccc1",
        "tile:benzene | CH2CH3 | @6 | OH | @7 | NHCH3 | @7 | CH3 | @7 | S | @6 | R",
    ),
    (
        "(S)-3-(1-methylpyrrolidin-2-yl)pyridine",
        "CN1CCC[C@H]1c1cccnc1",
        "tile:pyridine | @1 | c-C5H9 | @7 | N | CH3 | @6 | S",
    ),
    (
        "(E)-3-(4-methoxyphenyl)propenoic acid",
        "COc1ccc(/C=C/C(=O)O)cc1",
        "tile:benzene | OCH3 | @3 | CH=CH2 | @9 | CO2H | bond:8-9 | E",
    ),
    (
        "methyl (S)-2-amino-3-phenylpropanoate",
        "COC(=O)[C@@H](N)Cc1ccccc1",
        "tile:benzene | CH2CH3 | @7 | NH2 | @7 | CO2CH3 | @7 | S",
    ),
    (
        "(S)-5-isopropenyl-2-methylcyclohex-2-en-1-one",
        "C=C(C)[C@H]1CC=C(C)C(=O)C1",
        "tile:cyclohexene | @3 | CH3 | @2 | =O | @0 | CH(CH3)2 | bond:8-9 | double bond | @0 | S",
    ),
    (
        "3,4-dihydronaphthalen-1(2H)-one",
        "O=C1CCCc2ccccc21",
        "tile:benzene | C4H9 | @9 | join:1 | @9 | =O",
    ),
    (
        "2-(diethylamino)-N-(2,6-dimethylphenyl)acetamide",
        "CCN(CC)CC(=O)Nc1c(C)cccc1C",
        "tile:benzene | NHC(O)CH3 | @1 | CH3 | @5 | CH3 | @8 | N(CH2CH3)2",
    ),
    (
        "(S)-2-(6-methoxynaphthalen-2-yl)propanoic acid",
        "COc1ccc2cc([C@H](C)C(=O)O)ccc2c1",
        "tile:naphthalene | @0 | OCH3 | @5 | CH2CH3 | @12 | CO2H | S",
    ),
    (
        "(R)-4-[2-(tert-butylamino)-1-hydroxyethyl]-2-(hydroxymethyl)phenol",
        "CC(C)(C)NC[C@H](O)c1ccc(O)c(CO)c1",
        "tile:benzene | OH | @1 | CH2OH | @3 | CH2CH3 | @9 | OH | @10 | NH2 | @12 | C(CH3)3 | @9 | R",
    ),
    (
        "methyl (R)-phenyl[(R)-piperidin-2-yl]acetate",
        "COC(=O)[C@@H]([C@H]1CCCCN1)c1ccccc1",
        "tile:piperidine | @2 | CH2C6H5 | CO2CH3 | R | @2 | R",
    ),
    (
        "(1S,4S)-4-(3,4-dichlorophenyl)-N-methyl-1,2,3,4-tetrahydronaphthalen-1-amine",
        "CN[C@H]1CC[C@@H](c2ccc(Cl)c(Cl)c2)c2ccccc12",
        "tile:benzene | bond:0-1 | six-ring | @6 | NHCH3 | @9 | C6H4Cl | @14 | Cl | @6 | S | @9 | S",
    ),
]


def open_grow(browser: Browser, host: Host, formula: str = "") -> Iterator[Page]:
    """The sheet for growing, in a new case, on a phone."""
    context = browser.new_context(viewport=PHONE, has_touch=True, is_mobile=True)  # type: ignore[arg-type]
    context.set_default_timeout(60_000)
    hand = Hand(context.new_page())
    hand.open(host.address)
    hand.tap("New case")
    if formula:
        hand.page.locator(".tile", has_text="Formula").click()
        hand.page.locator("input[name=formula]").fill(formula)
        hand.back()
    hand.station("Structures")
    hand.tap("Grow one")
    hand.page.locator(".grow-tile").first.wait_for()
    yield hand.page
    assert hand.complaints == []
    context.close()


@pytest.fixture
def sheet(browser: Browser, host: Host) -> Iterator[Page]:
    """Growing without a formula."""
    yield from open_grow(browser, host)


@pytest.fixture
def sheet_c10h12o(browser: Browser, host: Host) -> Iterator[Page]:
    """Growing in a case of C10H12O."""
    yield from open_grow(browser, host, "C10H12O")


def test_seventeen_molecules_by_touch_alone(sheet: Page, capsys: pytest.CaptureFixture[str]) -> None:
    lines = []
    for name, wanted, plan in MOLECULES:
        grower = Grower(sheet)
        grower.follow(plan)
        got, heavy = grower.smiles(), Chem.MolFromSmiles(wanted).GetNumHeavyAtoms()
        assert inchikey(got) == inchikey(wanted), f"{name}: {got}"
        grower.tap(sheet.get_by_role("button", name="Use this structure"))
        sheet.locator(".card").first.wait_for()
        lines.append(f"{grower.taps:3d} taps, {heavy:2d} heavy atoms: {name}")
        assert grower.taps <= MOST_TAPS or heavy > UP_TO_HEAVY, lines[-1]
        sheet.get_by_role("link", name="Grow one").tap()
    with capsys.disabled():
        print("\n" + "\n".join(lines))


def test_formula_line_says_what_is_missing_and_when_it_is_met(sheet_c10h12o: Page) -> None:
    grower, line = Grower(sheet_c10h12o), sheet_c10h12o.locator(".grow-facts")
    grower.follow("tile:benzene")
    expect(line).to_contain_text("needs C4H6O more")
    expect(line).to_contain_text("4 of 5 unsaturations")
    grower.follow("CHO | @3")
    completing = sheet_c10h12o.get_by_role("button", name="completes the formula")
    expect(completing.first).to_be_visible()
    grower.follow("CH(CH3)2")
    expect(line).to_contain_text("all of the formula")
    grower.follow("@1 | Br")
    expect(line).to_contain_text("Br too many")


def test_undo_and_redo_go_all_the_way(sheet: Page) -> None:
    grower = Grower(sheet)
    seen = []
    for step in ("tile:benzene", "CH3", "CH3", "CH3", "OH"):
        grower.follow(step)
        seen.append(grower.smiles())
    undo, redo = (sheet.get_by_role("button", name=name) for name in ("Undo", "Redo"))
    for smiles in reversed(seen[:-1]):
        undo.tap()
        expect(sheet.locator(".grow-drawing")).to_have_attribute("aria-label", f"Drawing of {smiles}")
    undo.tap()
    expect(sheet.locator(".grow-tile").first).to_be_visible()
    for smiles in seen:
        redo.tap()
        expect(sheet.locator(".grow-drawing")).to_have_attribute("aria-label", f"Drawing of {smiles}")
    expect(redo).to_be_disabled()


def test_what_was_grown_outlives_a_reload(sheet: Page) -> None:
    grower = Grower(sheet)
    grower.follow("tile:benzene | CHO")
    before = grower.smiles()
    sheet.reload()
    drawing = sheet.locator(".grow-drawing")
    expect(drawing).to_have_attribute("aria-label", f"Drawing of {before}", timeout=60_000)
    expect(sheet.get_by_role("button", name="Undo")).to_be_enabled()


def test_atoms_and_bonds_are_reached_by_buttons_and_keys_too(sheet: Page) -> None:
    grower = Grower(sheet)
    grower.follow("tile:benzene")
    strip = sheet.locator(".grow-strip p")
    expect(strip).to_contain_text("carbon 1 of 6")
    sheet.get_by_label("The next atom or bond").tap()
    expect(strip).to_contain_text("carbon 2 of 6")
    for _ in range(2):
        sheet.get_by_label("The atom or bond before").tap()
    expect(strip).to_contain_text("bond 6 of 6")
    sheet.locator(".grow-stage").focus()
    sheet.keyboard.press("ArrowRight")
    expect(strip).to_contain_text("carbon 1 of 6")


def test_a_second_touch_at_the_same_spot_means_what_lies_behind(sheet: Page) -> None:
    grower = Grower(sheet)
    grower.follow("tile:benzene")
    place = grower.atoms()["3"]
    grower.touch(*place)
    expect(sheet.locator(".grow-strip p")).to_contain_text("carbon 4 of 6")
    grower.touch(*place)
    expect(sheet.locator(".grow-strip p")).to_contain_text("bond")


def test_groups_are_found_by_name(sheet: Page) -> None:
    grower = Grower(sheet)
    grower.follow("tile:benzene")
    sheet.locator(".grow-panel").get_by_text("more", exact=True).tap()
    sheet.get_by_label("Search the groups").fill("morph")
    grower.change(lambda: sheet.get_by_label("attach 4-morpholinyl").tap())
    assert inchikey(grower.smiles()) == inchikey("c1ccccc1N1CCOCC1")


def test_targets_are_large_and_the_sheet_is_no_wider_than_the_phone(browser: Browser, host: Host) -> None:
    for size in ((360, 740), (390, 844), (844, 390), (1024, 768)):
        pages = open_grow(browser, host)
        sheet = next(pages)
        Grower(sheet).follow("tile:benzene | CH2CH3 | OH")
        sheet.set_viewport_size({"width": size[0], "height": size[1]})
        sheet.wait_for_timeout(300)
        small = sheet.evaluate(SMALL_TARGETS)
        assert small == [], size
        assert sheet.evaluate("document.documentElement.scrollWidth <= innerWidth")
        assert sheet.locator(".grow-stage").bounding_box()["height"] > 90, size  # type: ignore[index]
        next(pages, None)


#: Buttons and links in view that are smaller than 56 px either way.
SMALL_TARGETS = """() => [...document.querySelectorAll('button, a[href]')]
  .filter((el) => el.checkVisibility())
  .map((el) => [(el.ariaLabel || el.innerText).slice(0, 40), el.getBoundingClientRect()])
  .filter(([, { width, height }]) => width < 55.5 || height < 55.5)
  .map(([name, { width, height }]) => `${name}: ${width} x ${height}`)"""


def inchikey(smiles: str) -> str:
    """By RDKit, outside of the app."""
    return str(Chem.MolToInchiKey(Chem.MolFromSmiles(smiles)))
