"""From a key on the screen of a load of 200 parts to the last byte of its repaint, setpoints included.

The whole program on a pseudo-terminal, on a site of its own. POSIX alone.
"""

import os
import re
import sys
import tempfile
import tomllib
from collections.abc import Callable, Iterator, Sequence
from pathlib import Path
from typing import Any

import tomli_w
from at_terminal import Repaint, Screen
from loads import ACROSS, DOWN, IN_ROW, LEFT, MATERIAL, PARTS_BY_NAME, ROWS, TOP

from lineplanner.files.starter import start

SIZES = {"80x24": (80, 24), "160x50": (160, 50)}
TIMES = 40
# Seconds from key to last byte, 95 of 100.
TARGETS = {
    "80x24": {"selection": 15e-3, "carry": 15e-3, "count": 25e-3, "undo and redo": 25e-3, "level": 25e-3},
    "160x50": {"selection": 25e-3, "carry": 25e-3, "count": 40e-3, "undo and redo": 40e-3, "level": 40e-3},
}
_LOAD, _MANY = "a-big-one", 100
_TO_AND_FRO = ("\x1b[C", "\x1b[D")  # the first part of a row to its spare tip at the other end, and back

Gestures = Callable[[Screen], Iterator[Repaint]]


def run() -> None:
    """Each gesture on both sizes."""
    if os.name != "posix":
        return
    print(f"\nkey to last byte on the screen of a load, 200 parts, {TIMES} keys each")
    print(f"  {'':28}{'median':>10}{'p95':>10}{'target':>10}  p95/target{'bytes':>8}")
    with tempfile.TemporaryDirectory() as folder:
        site = Path(folder) / "site"
        make_site(site)
        for name, size in SIZES.items():
            home = Path(folder) / name
            found = _measured(site, home, size)
            burst = found.pop("burst")
            for gesture, each in found.items():
                _show(f"{gesture}, {name}", each, TARGETS[name][gesture])
            print(f"  {f'{_MANY} keys at once, {name}':28}{burst[0].last * 1e3:7.0f} ms{'':10}    250 ms")


def make_site(folder: Path) -> None:
    """The demo shop with a rectifier that carries 200 parts, a rack for them, and the load."""
    start(folder)
    library = folder / "rack_library"
    line = _read(folder / "configs" / "lines" / "kestrel-yard.toml")
    for rectifier in line["rectifier"]:
        rectifier["max_current"] = "9000 A"
    _write(folder / "configs" / "lines" / "kestrel-yard.toml", line)
    rack = _read(library / "racks" / "spline-24.toml")
    tip = {key: value for key, value in rack["tip_row"][0].items() if key != "name"}
    rows = [
        {
            **tip,
            "name": _letter(row),
            "count": IN_ROW,
            "start": _spot(LEFT, TOP + row * DOWN),
            "step": _spot(ACROSS, 0),
        }
        for row in range(ROWS)
    ]
    rack |= {"name": "210 tips", "width": "2200 mm", "height": "2100 mm", "tip_row": rows}
    _write(library / "racks" / "tips-210.toml", rack)
    load = _read(library / "loads" / "valve-blocks-24.toml")
    load |= {
        "name": "big one",
        "recipe": "type-ii-clear",
        "tank": "S1",
        "rack": "tips-210",
        "hang": list(_hangs()),
    }
    _write(library / "loads" / f"{_LOAD}.toml", load)


def _hangs() -> Iterator[dict[str, Any]]:
    """Row by row, one tip of each left free."""
    rows = [_letter(row) for row in range(ROWS)]
    for part, count in PARTS_BY_NAME.items():
        taken, rows = rows[: count // (IN_ROW - 1)], rows[count // (IN_ROW - 1) :]
        yield {"part": part, "material": MATERIAL, "tips": [f"{row}1-{row}{IN_ROW - 1}" for row in taken]}


def _letter(row: int) -> str:
    return chr(ord("A") + row)


def _spot(x: float, drop: float) -> list[str]:
    return [f"{x * 1e3:g} mm", f"{drop * 1e3:g} mm"]


def _read(path: Path) -> dict[str, Any]:
    return tomllib.loads(path.read_text(encoding="utf-8"))


def _write(path: Path, values: dict[str, Any]) -> None:
    path.write_text(tomli_w.dumps(values), encoding="utf-8")


def _measured(site: Path, home: Path, size: tuple[int, int]) -> dict[str, list[Repaint]]:
    own = {"HOME": str(home), "XDG_DATA_HOME": str(home / "data")}
    screen = Screen([sys.executable, "-m", "lineplanner", "--site", str(site)], size, own)
    try:
        screen.seen(_LOAD)
        screen.settle(6.0)  # every load is worked out, the rows are kept
        screen.type(_LOAD)
        screen.type("\r")
        screen.settle(2.0)
        found = {
            "selection": list(_pressed(screen, "nN")),
            "count": list(_with_setpoints(_pressed(screen, "-+"))),
            "undo and redo": list(_with_setpoints(_pressed(screen, "zy"))),
        }
        found["burst"] = [screen.repaint("n" * _MANY)]
        screen.type("h")
        found["carry"] = list(_pressed(screen, _TO_AND_FRO))
        screen.type("h")
        found["level"] = list(_with_setpoints(_levels(screen)))
    finally:
        screen.close()
    return found


def _pressed(screen: Screen, keys: Sequence[str]) -> Iterator[Repaint]:
    """Keys in turns; the first two of them are not counted."""
    for turn in range(TIMES + 2):
        one = screen.repaint(keys[turn % len(keys)])
        if turn > 1:
            yield one


def _with_setpoints(found: Iterator[Repaint]) -> Iterator[Repaint]:
    """Repaints in each of which other amperes were set. Raises ValueError for one that shows none."""
    for one in found:
        if not re.search(rb"\d A\b", one.sent):
            raise ValueError("no setpoint was repainted")
        yield one


def _levels(screen: Screen) -> Iterator[Repaint]:
    """Levels that cut the upper row of parts, given in the form of the load; the key is the Enter that gives them."""
    screen.type("e")
    screen.type("\r")
    screen.type("\x06")  # find
    screen.type("solution drop")
    screen.type("\r")
    for turn in range(TIMES + 2):
        screen.type("\x15")  # the field is emptied
        screen.type(f"{350 + turn % 7}.{turn:02} mm")
        one = screen.repaint("\r")
        if turn > 1:
            yield one


def _show(name: str, found: list[Repaint], target: float) -> None:
    last = sorted(one.last for one in found)
    median, late = last[len(last) // 2], last[int(0.95 * len(last))]
    sent = sorted(len(one.sent) for one in found)[len(found) // 2]
    row = f"  {name:28}{median * 1e3:7.1f} ms{late * 1e3:7.1f} ms{target * 1e3:7.0f} ms"
    print(f"{row}  {late / target:10.2f}{sent:8}")


if __name__ == "__main__":
    run()
