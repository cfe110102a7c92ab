"""The rack picture of 200 parts, drawn and from key to repaint; the start of the screens against a bare app.

What needs a pseudo-terminal (keys, start) runs on POSIX alone.
"""

import os
import statistics
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

from at_terminal import Screen
from loads import tips_case
from timing import Times, Turn, measured, show_ratios, show_times

from lineplanner.files.library import Library
from lineplanner.plan import plan
from lineplanner.report.listing import listed
from lineplanner.report.picture import Scene, scene_of
from lineplanner.report.style import Style
from lineplanner.tui.widgets import raster
from lineplanner.tui.widgets.rack_canvas import RackCanvas
from lineplanner.tui.widgets.rack_cells import Cells
from lineplanner.tui.widgets.raster import View

SIZES = {"80x24": (80, 24), "160x50": (160, 50)}
BUILD_TARGETS = {"80x24": 5e-3, "160x50": 12e-3}  # seconds, of a full build
RUNS, KEYS = 25, 60
STARTS = 11
# As so many times the first frame of a bare app.
START_TARGETS = {"list in sight": 2.0, "setpoints of the first load": 2.5}
BARE = """
from textual.app import App
from textual.widgets import Static
class Bare(App):
    def compose(self):
        yield Static("rev0.")
Bare().run()
"""
_SHOP = Path(__file__).parents[2]


def run() -> None:
    """Drawing, then keys and starts."""
    scene = the_scene()
    draw(scene)
    if os.name == "posix":
        keys()
        starts()


def the_scene() -> Scene:
    """200 parts on the tips of a rack."""
    return scene_of(plan(tips_case(Library(_SHOP))))


# --- drawing ---------------------------------------------------------------------------------------------


def draw(scene: Scene) -> None:
    """Scene, raster, cells."""
    made = plan(tips_case(Library(_SHOP)))
    turns: dict[str, Turn] = {"scene of a plan": lambda: lambda: scene_of(made)}
    targets: dict[str, float] = {}
    for name, size in SIZES.items():
        view = View.fitted(scene.extent, *size)
        turns[f"outline in braille, {name}"] = _ready(_outline, scene, view)
        turns[f"areas in half cells, {name}"] = _ready(_fill, scene, view)
        turns[f"full build, {name}"] = _ready(Cells, scene, view)
        targets[f"full build, {name}"] = BUILD_TARGETS[name]
        turns[f"full build in ASCII, {name}"] = _ready(_ascii, scene, view)
        cells = Cells(scene, view)
        turns[f"another part selected, {name}"] = _ready(
            lambda _, __, c=cells: c.with_selected(7), scene, view
        )
    show_times(
        f"rack picture, {len(scene.parts)} parts, {len(scene.edges)} edges",
        measured(turns, runs=RUNS),
        targets,
    )


def _ready(work: Callable[[Scene, View], object], scene: Scene, view: View) -> Turn:
    return lambda: lambda: work(scene, view)


def _outline(scene: Scene, view: View) -> object:
    dots, _ = raster.outline(view.edges(scene.edges), scene.owners, view.columns, view.rows)
    return raster.packed(dots)


def _fill(scene: Scene, view: View) -> object:
    return raster.fill(view.edges(scene.edges, 1, 2), scene.owners, view.columns, 2 * view.rows)


def _ascii(scene: Scene, view: View) -> object:
    return Cells(scene, view, ascii_only=True)


# --- keys ------------------------------------------------------------------------------------------------


def keys() -> None:
    """From key to the status text on the terminal, against an app that has nothing but that text."""
    print(f"\nkey to repaint, 200 parts, {KEYS} keys each, in turns")
    print(f"  {'':32}{'median':>10}{'p95':>10}{'bytes':>8}  ratio to empty")
    for name, size in SIZES.items():
        screens = {kind: Screen([sys.executable, __file__, kind], size) for kind in ("empty", "rack")}
        for screen in screens.values():
            screen.seen("rev0.")
        taken: dict[str, list[tuple[float, int]]] = {kind: [] for kind in screens}
        for number in range(1, KEYS + 1):
            for kind, screen in screens.items():
                taken[kind].append(screen.press("n", f"rev{number}."))
        base = statistics.median(t for t, _ in taken["empty"])
        for kind, each in taken.items():
            times, sizes = sorted(t for t, _ in each), [b for _, b in each]
            median, late = statistics.median(times), times[int(0.95 * len(times))]
            row = f"  {kind + ' app, ' + name:32}{median * 1e3:7.1f} ms{late * 1e3:7.1f} ms"
            print(f"{row}{statistics.median(sizes):8.0f}  {median / base:.1f}")
        for screen in screens.values():
            screen.close()


# --- start -----------------------------------------------------------------------------------------------


def starts() -> None:
    """From process start to what is seen first, in turns: a bare app, the screens, the screens with no rows kept."""
    library = Library(_SHOP)
    load = library.site().first_load or next(iter(library.stems("load")))
    setting = listed(plan(library.case(load)), Style(library.site().units)).cells[3]
    marks = {"list in sight": load, "setpoints of the first load": setting}
    found: dict[str, list[float]] = {"bare app, first frame": []}
    with tempfile.TemporaryDirectory() as home:
        program = [sys.executable, "-m", "lineplanner", "--site", str(_SHOP)]
        _started(program, list(marks.values()), Path(home) / "known", stay=3.0)  # the rows are kept
        for turn in range(STARTS + 1):
            took = {"bare app, first frame": _started([sys.executable, "-c", BARE], ["rev0."], home)[0]}
            for name, memory in (("", "known"), (", nothing kept", f"new-{turn}")):
                times = _started(program, list(marks.values()), Path(home) / memory)
                took |= {f"{mark}{name}": time for mark, time in zip(marks, times, strict=True)}
            for name, time_ in took.items() if turn else ():  # the first turn warms the disk
                found.setdefault(name, []).append(time_)
    times_of = {name: Times(tuple(each)) for name, each in found.items()}
    show_ratios("start of the screens, 80x24", times_of, "bare app, first frame", START_TARGETS)


def _started(command: list[str], marks: list[str], home: Path | str, stay: float = 0.0) -> list[float]:
    """Seconds from process start until each text is on the terminal."""
    own = {"HOME": str(home), "XDG_DATA_HOME": str(Path(home) / "data")}
    begin = time.perf_counter()
    screen = Screen(command, (80, 24), own)
    found = [screen.seen(mark) - begin for mark in marks]
    screen.settle(stay)
    screen.close()
    return found


def child(kind: str) -> None:
    """The app on the other end."""
    from textual.app import App, ComposeResult
    from textual.binding import Binding
    from textual.widgets import Static

    class Bench(App[None]):
        BINDINGS = [Binding("n", "next", "next")]  # noqa: RUF012 - Textual's own form
        revision = 0

        def compose(self) -> ComposeResult:
            if kind == "rack":
                yield RackCanvas(self.told)
            yield Static("rev0.", id="status")

        def on_mount(self) -> None:
            if kind == "rack":
                canvas = self.query_one(RackCanvas)
                canvas.show(the_scene(), 0)
                canvas.focus()

        def action_next(self) -> None:
            self.told(None)

        def told(self, _: int | None) -> None:
            self.revision += 1
            self.query_one("#status", Static).update(f"rev{self.revision}.", layout=False)

    Bench().run()


if __name__ == "__main__":
    child(sys.argv[1]) if len(sys.argv) > 1 else run()
