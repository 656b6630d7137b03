"""The engine makes itself ready while nobody asks it anything, and gives way to whoever does."""

from __future__ import annotations

from playwright.sync_api import Browser, expect

from browser.bench_hand import Hand
from browser.stand import Host, wait_until

#: Notes every call that the page sends to its engine, and what comes back of the slices of warming.
LISTEN = """() => {
  window.sent = [];
  window.warm = [];
  const ids = new Set();
  const post = Worker.prototype.postMessage;
  Worker.prototype.postMessage = function (message, ...rest) {
    if (message?.method) window.sent.push(message.method);
    if (message?.method === 'warm') {
      ids.add(message.id);
      if (ids.size === 1) this.addEventListener('message', ({ data }) => {
        if (ids.has(data.id)) window.warm.push(data.result?.done);
      });
    }
    return post.call(this, message, ...rest);
  };
}"""


def test_it_warms_up_once_in_slices_and_then_rests(browser: Browser, host: Host) -> None:
    page = browser.new_page()
    page.add_init_script(f"({LISTEN})()")
    hand = Hand(page)
    hand.open(host.address)
    wait_until(page, "window.warm.at(-1) === true")
    assert len(page.evaluate("window.warm")) > 3
    sent = len(page.evaluate("window.sent"))
    page.wait_for_timeout(1_500)
    assert page.evaluate("window.sent")[sent:].count("warm") == 0
    assert hand.complaints == []
    page.close()


def test_calls_of_the_user_come_between_its_slices(browser: Browser, host: Host) -> None:
    page = browser.new_page()
    page.add_init_script(f"({LISTEN})()")
    hand = Hand(page)
    hand.open(host.address)
    wait_until(page, "window.warm.length > 0")
    hand.tap("Which ring position?")
    hand.wait_for_verdict("Fits.")
    sent = page.evaluate("window.sent")
    assert sent.index("warm") < sent.index("check")
    wait_until(page, "window.warm.at(-1) === true")
    expect(page.locator(".verdict").first).to_be_visible()
    assert hand.complaints == []
    page.close()
