"""How long the rack picture of 200 parts takes: drawn, and from key to repaint on a pseudo-terminal (POSIX)."""

import os
import select
import statistics
import subprocess
import sys
import time
from collections.abc import Callable, Iterator
from pathlib import Path

from loads import tips_case
from timing import Turn, measured, show_times

from lineplanner.files.library import Library
from lineplanner.plan import plan
from lineplanner.report.picture import Scene, scene_of
from lineplanner.tui.widgets import raster
from lineplanner.tui.widgets.rack_canvas import RackCanvas
from lineplanner.tui.widgets.rack_cells import Cells
from lineplanner.tui.widgets.raster import View

SIZES = {"80x24": (80, 24), "160x50": (160, 50)}
BUILD_TARGETS = {"80x24": 5e-3, "160x50": 12e-3}  # seconds, of a full build
RUNS, KEYS = 25, 60
_WAIT = 10.0  # seconds until a screen that does not answer is given up
_QUIET = 0.05  # seconds without output after which a repaint is over


def run() -> None:
    """Drawing, then keys."""
    scene = the_scene()
    draw(scene)
    if os.name == "posix":
        keys()


def the_scene() -> Scene:
    """200 parts on the tips of a rack."""
    return scene_of(plan(tips_case(Library(Path(__file__).parents[2]))))


# --- drawing ---------------------------------------------------------------------------------------------


def draw(scene: Scene) -> None:
    """Scene, raster, cells."""
    made = plan(tips_case(Library(Path(__file__).parents[2])))
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
        screens = {kind: Screen(kind, size) for kind in ("empty", "rack")}
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


class Screen:
    """An app on a pseudo-terminal of its own."""

    def __init__(self, kind: str, size: tuple[int, int]) -> None:
        import fcntl
        import pty
        import struct
        import termios

        self.master, slave = pty.openpty()
        fcntl.ioctl(slave, termios.TIOCSWINSZ, struct.pack("HHHH", size[1], size[0], 0, 0))
        env = {**os.environ, "TERM": "xterm-256color", "COLORTERM": "truecolor", "TEXTUAL_ANIMATIONS": "none"}
        self.child = subprocess.Popen(
            [sys.executable, __file__, kind], stdin=slave, stdout=slave, stderr=slave, env=env
        )
        os.close(slave)
        self._until("rev0.")

    def press(self, key: str, answer: str) -> tuple[float, int]:
        """Seconds until the answer is on the terminal, and how many bytes the repaint took in all."""
        begin = time.perf_counter()
        os.write(self.master, key.encode())
        size = self._until(answer)
        took = time.perf_counter() - begin
        return took, size + sum(len(more) for more in self._read(_QUIET))

    def close(self) -> None:
        """End the app."""
        self.child.terminate()
        self.child.wait()
        os.close(self.master)

    def _until(self, answer: str) -> int:
        seen, end = b"", time.perf_counter() + _WAIT
        while answer.encode() not in seen:
            if time.perf_counter() > end:
                raise TimeoutError(answer)
            for more in self._read(0.01):
                seen += more
                if answer.encode() in seen:
                    break
        return len(seen)

    def _read(self, quiet: float) -> Iterator[bytes]:
        while select.select([self.master], [], [], quiet)[0]:
            yield os.read(self.master, 1 << 16)


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
