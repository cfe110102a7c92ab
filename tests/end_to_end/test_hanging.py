"""Hanging end to end on a pseudo-terminal: a rack from nothing, its figures those of `plan --json`."""

import sys
from pathlib import Path

import pytest

if sys.platform == "win32":
    pytest.skip("a pseudo-terminal of this kind is not to be had here", allow_module_level=True)

from lineplanner.files.starter import start
from tests.end_to_end.terminal import Terminal
from tests.end_to_end.test_screens import SIZES, assert_head, planned

MOST_PRESSES = 40


@pytest.mark.parametrize("size", SIZES, ids=lambda size: f"{size[0]}x{size[1]}")
def test_24_parts_are_hung_from_nothing_by_keyboard_in_at_most_40_presses(
    tmp_path: Path, size: tuple[int, int]
) -> None:
    start(tmp_path / "shop")
    with Terminal(tmp_path, "--site", "shop", size=size) as terminal:
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
        terminal.press("enter", "part 1 of 1 ")
        terminal.type("23.", "part 24 of 24")
        text = terminal.press("s", "saved: hc1.toml")
        assert terminal.presses <= MOST_PRESSES
        record = planned(tmp_path, "hc1")
        assert record["area"]["items"][0]["count"] == 24
        assert_head(text, record)
        terminal.press("Q", lambda _: True)
        assert terminal.ended() == 0
