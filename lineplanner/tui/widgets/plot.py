"""The program over time: one strip for each curve over a common clock, and a cursor that reads all of them."""

from collections.abc import Callable
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray
from rich.segment import Segment
from rich.style import Style as RichStyle
from textual import events
from textual.binding import Binding, BindingType
from textual.geometry import Size
from textual.strip import Strip

from lineplanner.report.plot import Plot, Series
from lineplanner.report.style import plain
from lineplanner.tui.widgets import raster
from lineplanner.tui.widgets.kept_lines import KeptLines

Read = Callable[[float], str]

_GROUND, _AXIS, _CURRENT, _VOLTS, _THICKNESS, _LIMIT, _MARK, _CURSOR, _TEXT = range(9)
_CLASSES = [
    f"program-plot--{name}"
    for name in ("ground", "axis", "current", "volts", "thickness", "limit", "mark", "cursor", "text")
]
_LEAST_ROWS = 2  # of a strip; with fewer there are no curves, only the reading
_FOOT = 3  # rows below the strips: moments, clock, reading
_LEAST_COLUMNS = 10
_TEN = 10


class ProgramPlot(KeptLines, can_focus=True):
    """Draws a plot; left and right move the cursor, and a click does.

    reader gives the text of the cursor's line for a share of the time; on_read is called with that share.
    """

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = set(_CLASSES)
    DEFAULT_CSS = """
    ProgramPlot {
        width: 1fr;
        height: 1fr;
        min-height: 3;
        & > .program-plot--axis { color: $foreground-muted; }
        & > .program-plot--current { color: $primary; }
        & > .program-plot--volts { color: $secondary; }
        & > .program-plot--thickness { color: $success; }
        & > .program-plot--limit { color: $warning; }
        & > .program-plot--mark { color: $foreground; text-style: bold; }
        & > .program-plot--cursor { color: $accent; text-style: bold; }
        & > .program-plot--text { color: $foreground; }
    }
    """
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("left", "step(-1)", "earlier", id="plot.earlier"),
        Binding("right", "step(1)", "later", id="plot.later"),
        Binding("shift+left", f"step(-{_TEN})", "much earlier", show=False, id="plot.much-earlier"),
        Binding("shift+right", f"step({_TEN})", "much later", show=False, id="plot.much-later"),
        Binding("home", "go(0.0)", "start of the run", show=False, id="plot.start"),
        Binding("end", "go(1.0)", "end of the run", show=False, id="plot.end"),
        Binding("n", "moment(1)", "next moment to watch", id="plot.next"),
        Binding("N", "moment(-1)", "moment before", show=False, id="plot.previous"),
    ]

    def __init__(
        self,
        on_read: Callable[[float], object] | None = None,
        *,
        ascii_only: bool = False,
        name: str | None = None,
        id: str | None = None,  # noqa: A002 - Textual's own word
        classes: str | None = None,
    ) -> None:
        super().__init__(name=name, id=id, classes=classes)
        self.on_read = on_read
        self.ascii_only = ascii_only
        self.plot: Plot | None = None
        self.share = 0.0
        self._reader: Read = lambda _: ""
        self._lines: list[Strip] = []
        self._made_for = Size(0, 0)

    def show(self, plot: Plot | None, reader: Read, share: float | None = None) -> None:
        """Another plot and who reads it; the cursor stays where it is unless told."""
        self.plot, self._reader = plot, reader
        self.share = self.share if share is None else min(max(share, 0.0), 1.0)
        self._redraw()

    def go(self, share: float) -> None:
        """The cursor to a share of the time."""
        share = min(max(share, 0.0), 1.0)
        if share != self.share:
            self.share = share
            self._redraw()
        if self.on_read is not None:
            self.on_read(share)

    def action_go(self, share: float) -> None:
        self.go(share)

    def action_step(self, columns: int) -> None:
        self.go(self.share + columns / max(self._width - 1, 1))

    def action_moment(self, by: int) -> None:
        """The cursor to the next or last moment to watch."""
        marks = [] if self.plot is None else [mark.at for mark in self.plot.marks]
        ahead = [at for at in marks if (at - self.share) * by > 1e-9]
        if ahead:
            self.go(min(ahead) if by > 0 else max(ahead))

    def on_mouse_down(self, event: events.MouseDown) -> None:
        """The cursor to the pointer."""
        column = event.pointer_x - self.gutter.left - self._margin
        if self.plot is not None and self.plot.series and column >= 0:
            event.stop()
            self.go(int(column) / max(self._width - 1, 1))

    def on_resize(self) -> None:
        self._lines = []

    def notify_style_update(self) -> None:
        """A theme change: the same cells in other colours."""
        super().notify_style_update()
        self._lines = []

    def draw_line(self, y: int) -> Strip:
        """One line of the plot; all are made at once."""
        if self._made_for != self.size:  # drawn before the event that tells of the new size
            self._lines, self._made_for = [], self.size
        if not self._lines and self.size.area:
            self._lines = self._made()
        return self._lines[y] if y < len(self._lines) else Strip.blank(self.size.width, self.look())

    # --- inside ------------------------------------------------------------------------------------------

    def _redraw(self) -> None:
        self._lines = []
        self.redraw()

    @property
    def _margin(self) -> int:
        """Columns for the labels of the axes."""
        series = () if self.plot is None else self.plot.series
        return max((len(text) for s in series for text in (s.top, s.bottom)), default=0) + 1

    @property
    def _width(self) -> int:
        return max(self.size.width - self._margin, 1)

    def _made(self) -> list[Strip]:
        width, height = self.size
        page = _Page(width, height, ascii_only=self.ascii_only)
        if self.plot is None or not self.plot.series:
            page.write(0, 0, "" if self.plot is None else self.plot.why, _TEXT)
        else:
            self._draw(page, self.plot)
        styles = [self.look(name) for name in _CLASSES]
        return [page.strip(row, styles) for row in range(height)]

    def _draw(self, page: "_Page", plot: Plot) -> None:
        each = (page.height - _FOOT) // len(plot.series)
        page.write(0, page.height - 1, self._reader(self.share), _TEXT)
        if each < _LEAST_ROWS or self._width < _LEAST_COLUMNS:
            return
        cursor = self._margin + self._column(self.share)
        for number, series in enumerate(plot.series):
            self._strip_of(page, series, number * each, each, _CURRENT + number)
        foot = each * len(plot.series)
        for row in range(foot):
            page.put(cursor, row, "|", _CURSOR)
        self._feet(page, plot, foot)
        if page.free(cursor, foot, 1):
            page.write(cursor, foot, "^", _CURSOR)

    def _feet(self, page: "_Page", plot: Plot, foot: int) -> None:
        """Moments to watch and the clock; what would lie on another is moved on, or left out of the clock."""
        page.write(0, foot, "watch", _AXIS)
        for mark in plot.marks:
            column = self._margin + self._column(mark.at)
            while column < page.width - 1 and not page.free(column, foot, len(mark.number)):
                column += 1
            page.write(column, foot, mark.number, _MARK)
        page.write(0, foot + 1, plot.clock, _AXIS)
        for share, text in sorted(plot.times, key=lambda tick: tick[0] not in (0.0, 1.0)):
            column = self._margin + self._column(share) - (len(text) - 1 if share == 1.0 else 0)
            column = max(column, len(plot.clock) + 1)
            if page.free(column - 1, foot + 1, len(text) + 2):
                page.write(column, foot + 1, text, _AXIS)

    def _column(self, share: float) -> int:
        return round(share * (self._width - 1))

    def _strip_of(self, page: "_Page", series: Series, top: int, rows: int, ink: int) -> None:
        """One curve with its axis: highest and lowest value at the side, its name in the first row."""
        if series.limit is not None:
            row = top + min(int((1.0 - series.limit) * rows), rows - 1)
            page.rule(self._margin, row, "-", _LIMIT)
        page.curve(self._margin, top, self._width, rows, np.array(series.points), ink)
        page.write(0, top, series.top.rjust(self._margin - 1), _AXIS)
        page.write(0, top + rows - 1, series.bottom.rjust(self._margin - 1), _AXIS)
        said = f" {series.name}" + (f", {series.limit_text}" if series.limit_text else "") + " "
        page.write_free(self._margin, top, rows, said, ink)


class _Page:
    """Characters and inks of the widget while it is drawn."""

    def __init__(self, width: int, height: int, *, ascii_only: bool) -> None:
        self.width, self.height, self.ascii_only = width, height, ascii_only
        self.codes: raster.Codes = np.full((height, width), ord(" "), dtype=np.uint32)
        self.inks: NDArray[np.uint8] = np.zeros((height, width), dtype=np.uint8)

    def write(self, column: int, row: int, text: str, ink: int) -> None:
        """Text, cut at the edge."""
        text = (plain(text) if self.ascii_only else text)[: max(self.width - column, 0)]
        if text and 0 <= row < self.height:
            self.codes[row, column : column + len(text)] = [ord(letter) for letter in text]
            self.inks[row, column : column + len(text)] = ink

    def free(self, column: int, row: int, length: int) -> bool:
        """Whether nothing is written in these cells, as far as they lie on the page."""
        return bool((self.codes[row, max(column, 0) : column + length] == ord(" ")).all())

    def put(self, column: int, row: int, letter: str, ink: int) -> None:
        """One character where nothing is; what is there takes the ink of the cursor."""
        if not (0 <= column < self.width and 0 <= row < self.height):
            return
        if self.codes[row, column] == ord(" ") or self.inks[row, column] == _LIMIT:
            self.codes[row, column] = ord(letter)
        self.inks[row, column] = ink

    def rule(self, column: int, row: int, letter: str, ink: int) -> None:
        """A line of one character from a column to the edge, under all that is there."""
        if 0 <= row < self.height:
            free = self.codes[row, column:] == ord(" ")
            self.codes[row, column:][free] = ord(letter)
            self.inks[row, column:] = ink

    def write_free(self, column: int, top: int, rows: int, text: str, ink: int) -> None:
        """Text in the first row of a strip that has room for it beside the curve, else nowhere."""
        for row in range(top, top + rows):
            taken = (self.codes[row, column:] != ord(" ")) & (self.inks[row, column:] != _LIMIT)
            busy = np.concatenate(([0], np.cumsum(taken)))
            free = np.flatnonzero(busy[len(text) :] == busy[: max(len(busy) - len(text), 0)])
            if len(free):
                self.write(column + int(free[0]), row, text, ink)
                return

    def curve(
        self, left: int, top: int, columns: int, rows: int, points: NDArray[np.float64], ink: int
    ) -> None:
        """A line through points (share across, share up)."""
        across, down = (1, 1) if self.ascii_only else (raster.ACROSS, raster.DOWN)
        size = np.array([columns * across - 1, rows * down - 1])
        dots = np.column_stack((points[:, 0], 1.0 - points[:, 1])) * size + 0.5
        edges = np.hstack((dots[:-1], dots[1:]))
        whose = np.zeros(len(edges), dtype=np.int32)
        lit, owned = raster.outline(edges, whose, columns, rows, across, down)
        codes = np.where(lit, ord("*"), ord(" ")) if self.ascii_only else raster.packed(lit)
        on = owned != raster.NOBODY
        self.codes[top : top + rows, left : left + columns][on] = codes[on]
        self.inks[top : top + rows, left : left + columns][on] = ink

    def strip(self, row: int, styles: list[RichStyle]) -> Strip:
        """A row as runs of one ink."""
        inks = self.inks[row]
        ends = [*(np.flatnonzero(np.diff(inks.astype(np.int16))) + 1).tolist(), len(inks)]
        starts = [0, *ends[:-1]]
        text = raster.text_of(self.codes[row])
        runs = [Segment(text[a:b], styles[inks[a]]) for a, b in zip(starts, ends, strict=True)]
        return Strip(runs, self.width)
