"""A gloved hand that grows structures: touches atoms and bonds, taps chips, counts its taps."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Any

from playwright.sync_api import Error, Locator, Page, expect

from browser.stand import ANSWER_MS

#: Where the atoms stand on the screen, read off the drawing as an eye does: by letters, else by line ends.
ATOMS = """() => {
  const drawing = document.querySelector('.grow-drawing svg');
  const marks = document.querySelector('.grow-marks').getScreenCTM();
  const place = {};
  const put = (atom, x, y, sure) => {
    (place[atom] ??= []).push({ x, y, sure });
  };
  for (const path of drawing.querySelectorAll('path')) {
    const classes = path.getAttribute('class') ?? '';
    const ends = classes.match(/^bond-\\d+ atom-(\\d+) atom-(\\d+)/);
    const letter = classes.match(/^atom-(\\d+)$/);
    const pairs = [...path.getAttribute('d').matchAll(/([-\\d.]+)[ ,]+([-\\d.]+)/g)];
    const points = pairs.map((m) => [+m[1], +m[2]]);
    if (letter) {
      if ((place[letter[1]] ?? []).some(({ sure }) => sure === 3)) continue;
      const box = path.getBBox();
      put(letter[1], box.x + box.width / 2, box.y + box.height / 2, 3);
    } else if (ends && points.length) {
      const alone = drawing.querySelectorAll(`[class="${classes}"]`).length === 1;
      put(ends[1], ...points[0], alone ? 2 : 1);
      put(ends[2], ...(path.getAttribute('fill') ? points[1] : points.at(-1)), alone ? 2 : 1);
    }
  }
  return Object.fromEntries(Object.entries(place).map(([atom, all]) => {
    const best = all.reduce((a, b) => (b.sure > a.sure ? b : a));
    const point = new DOMPoint(best.x, best.y).matrixTransform(marks);
    return [atom, [point.x, point.y]];
  }));
}"""


@dataclass
class Grower:
    """On the sheet for growing. ``taps`` counts every touch from the open sheet on."""

    page: Page
    taps: int = 0
    drawn: str = ""

    def follow(self, plan: str) -> None:
        """Do the steps of a plan, one word each.

        "tile:benzene" begins; "@3" touches atom 3 and "bond:1-2" the bond of atoms 1 and 2 (numbered as they
        were put in); "join:4" joins the touched atom to atom 4; any other word is the chip to tap.
        """
        for word in plan.split(" | "):
            try:
                self._step(word)
            except (Error, KeyError) as err:
                raise AssertionError(f"stuck at {word!r} of {plan!r} with {self.drawn} drawn") from err

    def _step(self, word: str) -> None:
        if word.startswith("tile:"):
            self.begin(word.removeprefix("tile:"))
        elif word.startswith("@"):
            self.touch(*self.atoms()[word[1:]])
        elif word.startswith("bond:"):
            a, b = (self.atoms()[end] for end in word.removeprefix("bond:").split("-"))
            self.touch((a[0] + b[0]) / 2, (a[1] + b[1]) / 2)
        elif word.startswith("join:"):
            self.tap(self._chip_button("Join"))
            self.change(lambda: self.touch(*self.atoms()[word.removeprefix("join:")]))
        else:
            self.chip(word)

    def begin(self, tile: str) -> None:
        """Begin from a tile."""
        self.tap(self.page.locator(".grow-tile").filter(has_text=re.compile(f"^{tile}$")).first)
        self.settled()

    def chip(self, words: str) -> None:
        """Tap a chip, by way of its tab or of the whole list where it is not in sight."""
        expect(self.page.locator(".grow-panel")).to_have_attribute("aria-busy", "false", timeout=ANSWER_MS)
        wanted = self.page.locator(".grow-chip").filter(has_text=re.compile(f"^{re.escape(words)}$"))
        self.page.locator(".grow-tab").first.wait_for()
        if not wanted.count():
            self._bring_up(words)
        self.change(lambda: self.tap(wanted.first))

    def _bring_up(self, words: str) -> None:
        for tab in ("Element", "Between", "Ring"):
            button = self._chip_button(tab)
            if button.count() and words in TAB_CHIPS[tab]:
                self.tap(button)
                return
        attach = self._chip_button("Attach")
        if attach.count() and attach.get_attribute("aria-pressed") == "false":
            self.tap(attach)
            return
        self.tap(self._chip_button("more"))

    def change(self, act: Any) -> None:
        """Do what changes the structure, and wait until it has."""
        before = self.drawn
        act()
        drawing = self.page.locator(".grow-drawing")
        expect(drawing).not_to_have_attribute("aria-label", f"Drawing of {before}", timeout=ANSWER_MS)
        self.settled()

    def settled(self) -> None:
        """Wait until the drawing and its offers stand."""
        expect(self.page.locator(".grow-stage")).to_have_attribute("aria-busy", "false", timeout=ANSWER_MS)
        expect(self.page.locator(".grow-panel")).to_have_attribute("aria-busy", "false", timeout=ANSWER_MS)
        self.page.locator(".grow-drawing svg").wait_for()
        self.page.locator(".grow-tab").first.wait_for()
        self.drawn = self.smiles()

    def atoms(self) -> dict[str, tuple[float, float]]:
        """Where each atom stands on the screen."""
        found: dict[str, tuple[float, float]] = self.page.evaluate(ATOMS)
        return found

    def touch(self, x: float, y: float) -> None:
        """Touch the screen."""
        self.taps += 1
        self.page.touchscreen.tap(x, y)
        self.page.wait_for_timeout(60)

    def tap(self, what: Locator) -> None:
        """Tap a button."""
        self.taps += 1
        what.tap()

    def smiles(self) -> str:
        """The structure as it stands."""
        label = self.page.locator(".grow-drawing").get_attribute("aria-label") or ""
        return label.removeprefix("Drawing of ")

    def _chip_button(self, words: str) -> Locator:
        return self.page.locator(".grow-panel button").filter(has_text=re.compile(f"^{words}$"))


#: Chips that stand under a tab of their own.
TAB_CHIPS = {
    "Element": {"N", "O", "C", "S", "F", "Cl", "Br", "I", "Si", "P", "B"},
    "Between": {"+C", "+O", "+N", "+S"},
    "Ring": {"benzo", "six-ring", "five-ring", "four-ring", "three-ring", "seven-ring"},
}
