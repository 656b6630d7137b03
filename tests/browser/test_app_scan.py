"""A SMILES from a QR code: by photograph and by the camera, drawn before it is taken over."""

from __future__ import annotations

import struct
import zlib
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

import pytest
from playwright.sync_api import Browser, Page, Playwright, expect

from browser.bench_hand import PHONE, Hand
from browser.stand import ANSWER_MS, BROWSER_FLAGS, Host

#: Modules of "CC(C)Cc1ccc(cc1)[C@@H](C)C(=O)NCCO" (ISO/IEC 18004, level M), made with segno 1.6.6.
MODULES = """
#######.##.#.###..#.#.#######
#.....#.###.####..##..#.....#
#.###.#.##.#.##...###.#.###.#
#.###.#...##..###..#..#.###.#
#.###.#.#....#.#.##...#.###.#
#.....#....####.#.#...#.....#
#######.#.#.#.#.#.#.#.#######
...........#..#....##........
#..#######.########..#..#.###
.#...#.#..###.#.###....##.#.#
##.#.###...#..#####.##.###...
.###.......#..##.#...#.#....#
####..#.#..#.##.##.##.##.#.#.
#..###..#.......#.##..#.##..#
..#...#.#####.##.###.###...##
.....#..###.#####...##..####.
..##..##..#....#..#.##.#..##.
##.##..#..###.....#.##..#...#
##...##.##..####.###.##.....#
##.#.#.##.#.##.#..#.##..#.###
##.#..#..##..#.##############
........##...#...#..#...#.#.#
#######.#.#.##.#.#..#.#.##...
#.....#.######.#.#.##...#....
#.###.#.##.#.#..##.######..##
#.###.#.#.#.#.#.###......##.#
#.###.#.....##.#.#.###.##..##
#.....#..##.#...#..##..#.##.#
#######.##....#...###..##....
""".strip().splitlines()
FORMULA = "C15H23NO2"
SCALE, QUIET = 9, 4
FRAME_SIZE = (640, 480)
FRAMES = 30
DARK, LIGHT = 30, 225


def picture(width: int, height: int) -> list[bytes]:
    """Rows of grey bytes with the code in the middle of a light sheet."""
    size = len(MODULES) * SCALE
    left, top = (width - size) // 2, (height - size) // 2
    rows = [bytearray([LIGHT] * width) for _ in range(height)]
    for y in range(size):
        for x in range(size):
            if MODULES[y // SCALE][x // SCALE] == "#":
                rows[top + y][left + x] = DARK
    return [bytes(row) for row in rows]


def png(path: Path) -> Path:
    """The code as a grey PNG with its quiet zone (W3C PNG specification)."""
    side = (len(MODULES) + 2 * QUIET) * SCALE
    data = zlib.compress(b"".join(b"\0" + row for row in picture(side, side)))

    def chunk(kind: bytes, body: bytes) -> bytes:
        return struct.pack(">I", len(body)) + kind + body + struct.pack(">I", zlib.crc32(kind + body))

    header = struct.pack(">IIBBBBB", side, side, 8, 0, 0, 0, 0)
    path.write_bytes(
        b"\x89PNG\r\n\x1a\n" + chunk(b"IHDR", header) + chunk(b"IDAT", data) + chunk(b"IEND", b"")
    )
    return path


def film(path: Path) -> Path:
    """The code held still before a camera, as a YUV4MPEG2 file."""
    width, height = FRAME_SIZE
    frame = b"".join(picture(width, height)) + bytes([128]) * (width * height // 2)
    path.write_bytes(
        f"YUV4MPEG2 W{width} H{height} F30:1 Ip A1:1 C420jpeg\n".encode() + (b"FRAME\n" + frame) * FRAMES
    )
    return path


@contextmanager
def at_the_scan(browser: Browser, host: Host, **given: object) -> Iterator[Page]:
    context = browser.new_context(viewport=PHONE, **given)  # type: ignore[arg-type]
    context.set_default_timeout(ANSWER_MS)
    hand = Hand(context.new_page())
    hand.open(host.address)
    hand.tap("New case")
    hand.station("Structures")
    hand.tap("Scan a QR code")
    yield hand.page
    context.close()


def takes_it_over(page: Page) -> None:
    """What was scanned stands in the box for pasted text, is drawn, and goes into the case."""
    expect(page.get_by_label("SMILES or CTfile")).to_have_value("CC(C)Cc1ccc(cc1)[C@@H](C)C(=O)NCCO")
    page.get_by_role("button", name="Put it up").click()
    expect(page.locator(".card")).to_contain_text(FORMULA)


def test_a_photograph_of_a_code_is_read(browser: Browser, host: Host, tmp_path: Path) -> None:
    with at_the_scan(browser, host) as page:
        page.locator("input[type=file]").set_input_files(png(tmp_path / "code.png"))
        takes_it_over(page)


def test_a_picture_without_a_code_is_told_of(browser: Browser, host: Host, tmp_path: Path) -> None:
    with at_the_scan(browser, host) as page:
        other = tmp_path / "other.png"
        other.write_bytes((Path(__file__).parents[2] / "web" / "icons" / "mark-180.png").read_bytes())
        page.locator("input[type=file]").set_input_files(other)
        expect(page.get_by_role("alert")).to_contain_text("No QR code was found")


def test_a_refused_camera_is_told_of_with_the_other_way(browser: Browser, host: Host) -> None:
    with at_the_scan(browser, host) as page:
        expect(page.get_by_role("alert")).to_contain_text("Read the code from a photograph", ignore_case=True)
        expect(page.get_by_role("button", name="Start the camera")).to_be_visible()


@pytest.fixture
def filmed(playwright: Playwright, chromium_path: str, tmp_path: Path) -> Iterator[Browser]:
    """A Chromium whose camera sees the code."""
    flags = ["--use-fake-device-for-media-stream", "--use-fake-ui-for-media-stream"]
    flags.append(f"--use-file-for-fake-video-capture={film(tmp_path / 'film.y4m')}")
    running = playwright.chromium.launch(executable_path=chromium_path, args=[*BROWSER_FLAGS, *flags])
    yield running
    running.close()


def test_the_camera_reads_the_code_and_is_off_afterwards(filmed: Browser, host: Host) -> None:
    with at_the_scan(filmed, host, permissions=["camera"]) as page:
        takes_it_over(page)


def test_the_camera_is_off_once_the_sheet_is_left(
    playwright: Playwright, chromium_path: str, host: Host
) -> None:
    """Chromium's own moving test picture holds no code, so the sheet goes on looking until it is left."""
    flags = ["--use-fake-device-for-media-stream", "--use-fake-ui-for-media-stream"]
    running = playwright.chromium.launch(executable_path=chromium_path, args=[*BROWSER_FLAGS, *flags])
    with at_the_scan(running, host, permissions=["camera"]) as page:
        seen = page.locator(".scan-video")
        expect(seen).to_be_visible()
        track = page.evaluate_handle("document.querySelector('.scan-video').srcObject.getTracks()[0]")
        assert track.evaluate("track => track.readyState") == "live"
        page.get_by_label("Back").click()
        expect(seen).to_have_count(0)
        assert track.evaluate("track => track.readyState") == "ended"
    running.close()
