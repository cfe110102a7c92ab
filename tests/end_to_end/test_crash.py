"""Killed at any moment of hanging parts, the program loses the last gesture at most, and no file is half written."""

import os
import random
import sys
import time
from pathlib import Path

import pytest
from textual.pilot import Pilot

if sys.platform == "win32":
    pytest.skip("a pseudo-terminal of this kind is not to be had here", allow_module_level=True)

from lineplanner.files.library import Library
from lineplanner.files.starter import start
from lineplanner.inputs.load import Load
from lineplanner.report.style import Style
from lineplanner.tui.screens.load import LoadScreen
from lineplanner.tui.session import Session
from tests.end_to_end.terminal import KEYS, Terminal
from tests.tui.driving import drive

LOAD = "valve-blocks-24"

SCRIPT = tuple("DDt.fRsnDLzyb.sxnxDz2.tsD")
LONG = {"D": "delete", "R": "right", "L": "left"}
NAMES = LONG | {".": "full_stop"}
KILLS = 50
BEGIN = ("v", "a", "l", "enter", "h", "N")


def states(folder: Path) -> list[Load]:
    """The load after each key of the script, the first before any."""
    start(folder)
    found: list[Load] = []

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*BEGIN)
        screen = pilot.app.screen
        assert isinstance(screen, LoadScreen)
        found.append(screen.session.case.load)
        for key in SCRIPT:
            await pilot.press(NAMES.get(key, key))
            found.append(screen.session.case.load)

    drive(steps, folder, memory=folder / "memory")
    return found


def killed(folder: Path, after: int, delay: float) -> Load:
    """What counts at the next start, where the program was killed so long after a key of the script."""
    start(folder / "shop")
    with Terminal(folder, "--site", "shop", size=(80, 24)) as terminal:
        terminal.until("Loads  find:")
        terminal.type("val", "1 of 16")
        terminal.press("enter", "part 1 of 24")
        terminal.press("h", "HANGING")
        terminal.press("N", "part 24 of 24")
        for key in SCRIPT[:after]:
            os.write(terminal.handle, KEYS.get(LONG.get(key, key), key).encode())
            while terminal.read(0.08):
                pass
        os.write(terminal.handle, KEYS.get(LONG.get(SCRIPT[after], ""), SCRIPT[after]).encode())
        time.sleep(delay)
        terminal.program.kill()
        terminal.program.wait()
    library = Library(folder / "shop")
    for kind in ("load", "recipe", "rack", "part", "material", "bath", "line"):
        for stem in library.stems(kind):
            library.entry(kind, stem)  # raises where a file cannot be read
    session = Session(library, style=Style("metric"), memory=folder / "data" / "lineplanner" / "memory")
    session.open(LOAD)
    session.recover()
    load: Load = session.record(("load", LOAD))
    session.close()
    return load


@pytest.mark.slow
@pytest.mark.timeout(900)
def test_a_kill_at_any_moment_loses_the_last_gesture_at_most(tmp_path: Path) -> None:
    known = states(tmp_path / "reference")
    chance = random.Random(20261201)
    for turn in range(KILLS):
        after, delay = chance.randrange(len(SCRIPT)), chance.uniform(0.0, 0.03)
        found = killed(tmp_path / f"{turn}", after, delay)
        assert found in (known[after], known[after + 1]), (turn, after, delay)
