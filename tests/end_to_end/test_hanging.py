"""Hanging end to end on a pseudo-terminal: a rack from nothing, its figures those of `plan --json`."""

import re
import sys
from pathlib import Path

import pytest

if sys.platform == "win32":
    pytest.skip("a pseudo-terminal of this kind is not to be had here", allow_module_level=True)

from lineplanner.files.starter import start
from tests.end_to_end.terminal import Terminal
from tests.end_to_end.test_screens import SIZES, assert_head, planned

MOST_PRESSES = 40


def begin(terminal: Terminal) -> None:
    """A new hardcoat load with its first part in hand."""
    terminal.until(lambda text: "planning" not in text and "16 of 16" in text)
    terminal.press("f4", "Name of the new load")
    terminal.type("hc1", "hc1")
    terminal.press("enter", "Recipe  find:")
    terminal.type("50-6", lambda text: "> hardcoat-50-6061" in text)
    terminal.press("enter", "Tank  find:")
    terminal.press("enter", "Rack  find:")
    terminal.type("spline-2", lambda text: "> spline-24" in text)
    terminal.press("enter", "First part  find:")
    terminal.type("va", lambda text: "> valve-block" in text)
    terminal.press("enter", lambda text: "part 1 of 1 " in text and "HANGING" in text)


@pytest.mark.parametrize("size", SIZES, ids=lambda size: f"{size[0]}x{size[1]}")
def test_24_parts_are_hung_from_nothing_by_keyboard_in_at_most_40_presses(
    tmp_path: Path, size: tuple[int, int]
) -> None:
    start(tmp_path / "shop")
    with Terminal(tmp_path, "--site", "shop", size=size) as terminal:
        begin(terminal)
        terminal.type("23.", "part 24 of 24")
        text = terminal.press("s", "saved: hc1.toml")
        assert terminal.presses <= MOST_PRESSES
        record = planned(tmp_path, "hc1")
        assert record["area"]["items"][0]["count"] == 24
        assert_head(text, record)
        terminal.press("Q", lambda _: True)
        assert terminal.ended() == 0


@pytest.mark.parametrize("size", SIZES, ids=lambda size: f"{size[0]}x{size[1]}")
def test_24_parts_are_hung_and_moved_with_raw_mouse_sequences(tmp_path: Path, size: tuple[int, int]) -> None:
    start(tmp_path / "shop")
    with Terminal(tmp_path, "--site", "shop", size=size) as terminal:
        begin(terminal)
        _, level = terminal.cell_of("solution level")
        bar = terminal.screen.display[terminal.cell_of("flight bar ")[1]]
        left, right, low = bar.index("="), bar.rindex("="), terminal.cell_of("edge of the rack")[1]
        # A field drawn from the left above the first tip to the right below the last one.
        terminal.mouse((left - 3, level + 1), (right, low - 2), (right + 2, low), seen="part 24 of 24")
        # The part on the last tip is taken off, that on the first one dragged there.
        terminal.press("delete", "of 23 ")
        lines = list(enumerate(terminal.screen.display))[level + 1 :]
        row, first = next((n, m) for n, line in lines if (m := re.search(r"(?<!\d)1(?!\d)", line[:right])))
        column = first.start()
        text = terminal.mouse((column, row), (column + 3, row + 2), (right, low), seen="tip F4")
        terminal.press("s", "saved: hc1.toml")
        record = planned(tmp_path, "hc1")
        assert record["area"]["items"][0]["count"] == 23
        assert_head(text, record)
        saved = (tmp_path / "shop" / "rack_library" / "loads" / "hc1.toml").read_text(encoding="utf-8")
        assert '"A2-A4"' in saved
        assert '"F1-F3"' in saved or '"F1-F4"' in saved
