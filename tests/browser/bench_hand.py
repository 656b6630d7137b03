"""A gloved hand on the app: opens, types with the app's own pads, reads what is shown."""

from __future__ import annotations

from dataclasses import dataclass, field

from playwright.sync_api import Locator, Page, expect

PHONE = {"width": 390, "height": 844}


@dataclass
class Hand:
    """One visit. ``complaints`` gathers what the browser wrote to its console as errors."""

    page: Page
    complaints: list[str] = field(default_factory=list)

    def __post_init__(self) -> None:
        self.page.set_viewport_size({"width": PHONE["width"], "height": PHONE["height"]})
        self.page.on("pageerror", lambda error: self.complaints.append(str(error)))
        self.page.on(
            "console", lambda said: self.complaints.append(said.text) if said.type == "error" else None
        )

    def open(self, address: str) -> None:
        """Open the app and wait for the case list."""
        self.page.goto(address)
        self.button("New case").wait_for()

    def button(self, name: str) -> Locator:
        """A button or link by its words."""
        exact = self.page.get_by_role("button", name=name).or_(self.page.get_by_role("link", name=name))
        return exact.first

    def tap(self, name: str) -> None:
        """Tap a button, link or file chip by its words."""
        self.button(name).click()

    def station(self, name: str) -> None:
        """Go to one of the four stations."""
        self.page.locator("nav.stations a", has_text=name).click()

    def back(self) -> None:
        """Leave a sheet."""
        self.page.get_by_label("Back", exact=True).click()

    def keys(self, text: str) -> None:
        """Type with the pad on the screen, one key after the other ("Cl" counts as one)."""
        pad = self.page.locator(".pad")
        for key in text.split():
            pad.get_by_text(key, exact=True).click()

    def verdict(self) -> Locator:
        """The sentence at the head of the tally."""
        return self.page.locator(".verdict")

    def wait_for_verdict(self, words: str) -> None:
        """Wait until the tally's sentence holds ``words`` and no newer check is running."""
        expect(self.page.locator(".tally:not(.stale) .verdict")).to_contain_text(words, timeout=60_000)

    def put_up(self, smiles: str) -> None:
        """Add a structure by its SMILES."""
        self.station("Structures")
        self.tap("Paste SMILES or CTfile")
        self.page.get_by_label("SMILES or CTfile").fill(smiles)
        self.button("Put it up").click()
        self.page.locator(".grid").wait_for()

    def paste_report(self, text: str) -> None:
        """Paste a report line and take over what was understood."""
        self.station("Readings")
        self.tap("Paste a report line")
        self.page.get_by_label("Report line").fill(text)
        self.page.get_by_role("button", name="Take over").and_(self.page.locator(":enabled")).click()
        self.page.locator(".slips").wait_for()
