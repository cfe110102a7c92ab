"""The screens end to end: a real pseudo-terminal, the keyboard alone, figures compared with `plan --json`."""

import json
import os
import re
import subprocess
import sys
from collections.abc import Mapping
from pathlib import Path
from typing import Any

import pytest

if sys.platform == "win32":
    pytest.skip("a pseudo-terminal of this kind is not to be had here", allow_module_level=True)

from lineplanner.files.starter import start
from tests.end_to_end.terminal import CHECKOUT, Terminal

SIZES = [(80, 24), (160, 50)]
LOAD = "valve-blocks-24"


def planned(folder: Path, load: str, *arguments: str) -> dict[str, Any]:
    """What the headless command says of a load of the site."""
    done = subprocess.run(
        [sys.executable, "-m", "lineplanner", "plan", load, "--json", "--site", "shop", *arguments],
        cwd=folder,
        env={**os.environ, "PYTHONPATH": str(CHECKOUT)},
        capture_output=True,
        encoding="utf-8",
        check=False,
    )
    record: dict[str, Any] = json.loads(done.stdout)
    return record


def number(pattern: str, text: str) -> float:
    """The number that a pattern finds on the screen."""
    found = re.search(pattern, text)
    assert found is not None, f"{pattern}\n{text}"
    return float(found[1])


def assert_head(text: str, record: Mapping[str, Any]) -> None:
    """The setpoints on the screen are those of the JSON to the digits printed."""
    current, time, charge, volts = (record[key] for key in ("current", "time", "charge_Ah", "voltage"))
    assert number(r"SET [ *](\d+) A ", text) == current["panel_set_A"]
    assert number(r" (\d+\.?\d*) min  ?[ *]?stop", text) == pytest.approx(time["total_s"] / 60.0, abs=0.25)
    assert number(r"stop at ([\d.]+) Ah", text) == pytest.approx(charge["counter"], rel=0.005)
    assert number(r"expect ([\d.]+) to", text) == pytest.approx(volts["start_V"], abs=0.0501)
    assert number(r"expect [\d.]+ to ([\d.]+) V", text) == pytest.approx(volts["end_V"], abs=0.0501)
    area = record["area"]["carrying_m2"]
    if "dm²" in text:
        assert number(r"on[ *]([\d.]+) dm²", text) == pytest.approx(area * 100.0, rel=0.005)
    else:
        assert number(r"on[ *]([\d.]+) ft²", text) == pytest.approx(area / 0.3048**2, rel=0.005)


@pytest.mark.parametrize("size", SIZES, ids=lambda size: f"{size[0]}x{size[1]}")
def test_a_supervisor_opens_finds_changes_asks_saves_and_quits_by_keyboard(
    tmp_path: Path, size: tuple[int, int]
) -> None:
    start(tmp_path / "shop")
    before = planned(tmp_path, LOAD)
    with Terminal(tmp_path, "--site", "shop", size=size) as terminal:
        terminal.until(lambda text: bool(re.search(rf"> {LOAD} .*CHECKS MET", text)))
        # Setpoints are in the list before any key; found and opened they take four presses.
        terminal.type("val", "1 of 16")
        text = terminal.press("enter", "part 1 of 24")
        assert terminal.presses <= 4
        assert_head(text, before)

        terminal.presses = 0
        text = terminal.press("-", "of 23 ")
        assert terminal.presses <= 5
        assert "* not saved" in text
        changed = text

        text = terminal.press("u", " ft²")
        assert_head(text, planned_less(tmp_path))
        terminal.press("u", " dm²")

        terminal.press("3", "[3 checks]")
        text = terminal.press("?", "any other key closes")
        assert "Why: " in text
        terminal.press("x", "[3 checks]")

        terminal.press("z", "undone: one part less")
        text = terminal.until(lambda text: "not saved" not in text)
        assert_head(text, before)
        terminal.press("y", "done again")
        terminal.press("s", f"saved: {LOAD}.toml")
        after = planned(tmp_path, LOAD)
        assert after["area"]["items"][0]["count"] == 23
        assert_head(changed, after)
        terminal.press("q", "Loads  find:")
        terminal.press("ctrl+q", lambda _: True)
        assert terminal.ended() == 0
        assert b"\x1b[?1049l" in terminal.output  # the terminal is given back


def planned_less(folder: Path) -> dict[str, Any]:
    """The plan of the load with its last tip freed, made on a copy."""
    start(folder / "copy" / "shop")
    load = folder / "copy" / "shop" / "rack_library" / "loads" / f"{LOAD}.toml"
    load.write_text(load.read_text(encoding="utf-8").replace("F1-F4", "F1-F3"), encoding="utf-8")
    return planned(folder / "copy", LOAD)


def test_a_part_is_swapped_in_five_presses_with_the_setpoints_following(tmp_path: Path) -> None:
    start(tmp_path / "shop")
    with Terminal(tmp_path, "--site", "shop", size=SIZES[0]) as terminal:
        terminal.until(lambda text: bool(re.search(rf"> {LOAD} .*CHECKS MET", text)))
        terminal.press("enter", "part 1 of 24")
        terminal.presses = 0
        terminal.press("w", "Part in place of valve-block")
        terminal.type("pis", "> piston")
        text = terminal.press("enter", "* not saved")
        assert terminal.presses <= 5
        text = terminal.until("damper piston")
        assert "SET *" in text
        terminal.press("ctrl+q", "Not saved:")
        terminal.press("d", lambda _: True)
        assert terminal.ended() == 0
    assert "piston" not in (tmp_path / "shop" / "rack_library" / "loads" / f"{LOAD}.toml").read_text(
        encoding="utf-8"
    )


def test_a_dropped_line_loses_nothing(tmp_path: Path) -> None:
    start(tmp_path / "shop")
    with Terminal(tmp_path, "--site", "shop", size=SIZES[0]) as terminal:
        terminal.until(lambda text: bool(re.search(rf"> {LOAD} .*CHECKS MET", text)))
        terminal.press("enter", "part 1 of 24")
        terminal.press("-", "part 1 of 23")
        assert terminal.hang_up() == 129
        assert "Traceback" not in terminal.output.decode(errors="replace")
    with Terminal(tmp_path, "--site", "shop", size=SIZES[0]) as terminal:
        terminal.until("The last time ended before this was saved")
        text = terminal.press("r", "part 1 of 23")
        assert "* not saved" in text


def test_without_colours_none_are_sent_and_everything_is_still_told(tmp_path: Path) -> None:
    for env in ({"NO_COLOR": "1"}, {"TERM": "xterm", "COLORTERM": ""}):
        with Terminal(tmp_path, size=SIZES[0], env=env) as terminal:
            terminal.until(lambda text: bool(re.search(rf"> {LOAD} .*CHECKS MET", text)))
            text = terminal.until("STOP rectifier")
            assert " DANGER " in text
            terminal.press("enter", "[1 rack]")
            terminal.until("solution level")
            assert b"38;2;" not in terminal.output
            assert b"48;2;" not in terminal.output
            if "NO_COLOR" in env:
                assert not re.search(rb"\x1b\[(\d+;)*(3[1-7]|4[1-7]|38;5;\d+)m", terminal.output)


def test_a_terminal_of_plain_letters_gets_plain_letters(tmp_path: Path) -> None:
    env = {"LC_ALL": "C", "LANG": "C", "PYTHONUTF8": "0", "PYTHONCOERCECLOCALE": "0"}
    with Terminal(tmp_path, size=SIZES[0], env=env) as terminal:
        terminal.until(lambda text: bool(re.search(rf"> {LOAD} .*CHECKS MET", text)))
        text = terminal.press("enter", "[1 rack]")
        terminal.until("solution level")
        assert "A/dm2" in text
        assert terminal.output.isascii()
        assert b"\\u" not in terminal.output


def test_a_dumb_terminal_gets_the_card(tmp_path: Path) -> None:
    with Terminal(tmp_path, size=SIZES[0], env={"TERM": "dumb"}) as terminal:
        assert terminal.ended() == 0
        assert b"RUN CARD" in terminal.output
        assert b"no screen here" in terminal.output
        assert b"\x1b[?1049h" not in terminal.output
