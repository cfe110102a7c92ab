"""Rows with a cursor: the list of loads and every view in words. Draws only what is in sight."""

from __future__ import annotations

from collections.abc import Iterable
from typing import ClassVar

from rich.cells import cell_len
from rich.segment import Segment
from rich.style import Style
from textual import events
from textual.binding import Binding, BindingType
from textual.geometry import Size
from textual.message import Message
from textual.strip import Strip

from lineplanner.report.layout import squeezed
from lineplanner.report.rows import Row, Table
from lineplanner.tui.widgets.kept_lines import KeptLines
from lineplanner.tui.widgets.text import fitted, tidy

FRONT = 2  # cells before the first column: cursor and mark of a change
LEAST = 22  # cells that a stretching column gets at the cost of the shrinking one
NAME = 12  # cells that a name keeps when it gives way to figures
NARROW = 8  # cells that the shrinking column keeps
_TONES = {
    "STOP": "danger",
    "stop": "danger",
    "DANGER": "danger",
    "unread": "danger",
    "WARNING": "warning",
    "CAUTION": "caution",
    "caution": "caution",
    "NOTICE": "note",
    "note": "note",
    "heading": "faint",
}


class TableView(KeptLines, can_focus=True):
    """A table. Up and down move the cursor, left and right choose a cell or shift what is too wide."""

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = {
        *(
            f"table--{name}"
            for name in ("head", "cursor", "changed", "faint", "note", "caution", "warning", "danger")
        ),
    }
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("up", "move(-1)", "row up", show=False),
        Binding("down", "move(1)", "row down", show=False),
        Binding("pageup", "page(-1)", "page up", show=False),
        Binding("pagedown,space", "page(1)", "page down", show=False),
        Binding("home", "end(-1)", "first row", show=False),
        Binding("end", "end(1)", "last row", show=False),
        Binding("left", "across(-1)", "figure to the left", show=False),
        Binding("right", "across(1)", "figure to the right", show=False),
        Binding("enter", "choose", "choose", show=False),
    ]

    class Moved(Message):
        """The cursor stands on another row."""

        def __init__(self, table: TableView) -> None:
            super().__init__()
            self.table = table

        @property
        def control(self) -> TableView:
            return self.table

    class Chosen(Moved):
        """Enter, or a click on the row of the cursor."""

    def __init__(
        self,
        *,
        id: str | None = None,  # noqa: A002 - textual's word
        headed: bool = True,
        by_cell: bool = False,
        stretch: int | None = None,
        giver: int | None = None,
        ascii_only: bool = False,
        tone_column: int | None = None,
        gap: int = 2,
        reading: bool = False,
    ) -> None:
        super().__init__(id=id)
        self.headed, self.by_cell, self.stretch, self.ascii = headed, by_cell, stretch, ascii_only
        self.reading, self.front = reading, 0 if reading else FRONT
        self.giver, self.tone_column, self.gap, self.gap_wanted = giver, tone_column, gap, gap
        self.table = Table((), frozenset(), ())
        self.moved: frozenset[str] = frozenset()
        self.row = self.column = self.top = self.shift = 0
        self._widths: tuple[int, ...] = ()
        self._fitted = Size(0, 0)

    # --- what it shows -----------------------------------------------------------------------------------

    def show(self, table: Table, moved: frozenset[str] = frozenset(), row: int | None = None) -> None:
        """Show rows; the cursor stays where it is unless a row is named."""
        self.table, self.moved = table, moved
        self.row = max(0, min(self.row if row is None else row, len(table.rows) - 1))
        self._fit()
        self.redraw()

    def unmark(self) -> None:
        """Take the marks of a change away."""
        if self.moved:
            self.moved = frozenset()
            self.redraw_later()

    @property
    def current(self) -> Row | None:
        """The row of the cursor."""
        return self.table.rows[self.row] if self.table.rows else None

    @property
    def path(self) -> str | None:
        """The figure under the cursor."""
        if self.current is None:
            return None
        return self.current.path_at(self.column) if self.by_cell else self.current.path

    @property
    def room(self) -> int:
        """How many rows are in sight."""
        return max(1, self.size.height - self.headed)

    def _fit(self) -> None:
        """Columns and rows in sight for the size that the table has now."""
        self._fitted = self.size
        self._measure()
        if self.size:
            self._keep_in_sight()

    def _measure(self) -> None:
        """Widths of the columns; the stretching one takes what is left."""
        rows: list[tuple[str, ...]] = [self.table.columns] if self.headed else []
        rows += [row.cells for row in self.table.rows]
        count = max((len(row) for row in rows), default=0)
        widths = [max((cell_len(row[n]) for row in rows if n < len(row)), default=0) for n in range(count)]
        self.gap = self.gap_wanted
        over = (
            self.front + sum(widths) + self.gap * (count - 1) + 1 - self.size.width
        )  # 1: the bar at the right
        if self.by_cell and count and over > 0 and self.size.width:
            over = self._narrowed(widths, over)
        if self.stretch is None and self.giver is not None and self.giver < count and over > 0:
            widths[self.giver] = max(min(widths[self.giver], NAME), widths[self.giver] - over)
        elif self.stretch is not None and self.stretch < count:
            left = (
                self.size.width - self.front - sum(widths) + widths[self.stretch] - self.gap * (count - 1) - 1
            )
            if self.giver is not None and left < LEAST:
                given = max(0, min(LEAST - left, widths[self.giver] - NARROW))
                widths[self.giver] -= given
                left += given
            widths[self.stretch] = max(NARROW, left)
        self._widths = tuple(widths)

    def _narrowed(self, widths: list[int], over: int) -> int:
        """Put the columns closer and shorten the names, if the whole table is in sight then; what is still over."""
        closer = (self.gap - 1) * (len(widths) - 1)
        giver = self.giver or 0
        if over > closer + max(0, widths[giver] - NAME):
            return over
        self.gap = 1
        widths[giver] -= max(0, over - closer)
        return 0

    def _keep_in_sight(self) -> None:
        most = max(0, len(self.table.rows) - self.room)
        self.top = min(max(self.top, self.row - self.room + 1, 0), self.row, most)
        if self.by_cell and self._widths and self.size.width:
            begin = self.front + sum(self._widths[: self.column]) + self.gap * self.column
            end = begin + self._widths[self.column] + 1
            first = begin - 1 if self.column else 0
            self.shift = max(min(self.shift, first), end - self.size.width + 1, 0)

    def on_resize(self) -> None:
        self._fit()

    # --- moving ------------------------------------------------------------------------------------------

    def action_move(self, step: int) -> None:
        self.go(self.row + step)

    def action_page(self, pages: int) -> None:
        self.go(self.row + pages * self.room)

    def action_end(self, way: int) -> None:
        self.go(0 if way < 0 else len(self.table.rows))

    def go(self, row: int) -> None:
        """Put the cursor on a row; only the lines that change are drawn again."""
        if not self.table.rows:
            return
        if self.reading:
            self._scroll(row)
            return
        before = self.row
        self.row = max(0, min(row, len(self.table.rows) - 1))
        self._keep_in_sight()
        self.redraw()
        if before != self.row:
            self.post_message(self.Moved(self))

    def _scroll(self, row: int) -> None:
        """Where nothing is chosen the window moves, not a cursor."""
        top = max(0, min(row, len(self.table.rows) - self.room))
        if top != self.top:
            self.row = self.top = top
            self.redraw()

    def action_across(self, step: int) -> None:
        if self.by_cell:
            self.column = max(0, min(self.column + step, len(self._widths) - 1))
            self._keep_in_sight()
        else:
            whole = self.front + sum(self._widths) + self.gap * len(self._widths)
            self.shift = max(0, min(self.shift + step * 8, whole - self.size.width))
        self.redraw()

    def action_choose(self) -> None:
        self.post_message(self.Chosen(self))

    def on_click(self, event: events.Click) -> None:
        row = self.top + event.y - self.headed
        if not 0 <= row < len(self.table.rows) or event.y < self.headed:
            return
        same = row == self.row
        self.go(row)
        if same:
            self.post_message(self.Chosen(self))

    def on_mouse_scroll_down(self, event: events.MouseScrollDown) -> None:
        event.stop()
        self.go(self.row + 3)

    def on_mouse_scroll_up(self, event: events.MouseScrollUp) -> None:
        event.stop()
        self.go(self.row - 3)

    # --- drawing -----------------------------------------------------------------------------------------

    def draw_line(self, y: int) -> Strip:
        if self._fitted != self.size:  # drawn before the event that tells of the new size
            self._fit()
        width, base = self.size.width, self.look()
        if self.headed and y == 0:
            text = " " * self.front + (" " * self.gap).join(
                self._cell(n, c) for n, c in enumerate(self.table.columns)
            )
            return self._strip([Segment(text, self.look("table--head"))], y)
        place = self.top + y - self.headed
        if place >= len(self.table.rows):
            return Strip([Segment(" " * width, base)], width)
        return self._strip(self._segments(place), y)

    def _strip(self, segments: list[Segment], y: int) -> Strip:
        """Cut to the window, with the bar at the right that says which part of the rows is in sight."""
        width = self.size.width
        style = segments[-1].style or self.look()
        end = self._whole_end(self.shift + width - 1)
        strip = Strip(segments).crop(self.shift, end).adjust_cell_length(width - 1, style)
        beyond = self.by_cell and self.shift + width - 1 < self._whole_width
        more = ">" if beyond and y == 0 else self._thumb(y - self.headed)
        return Strip([*strip, Segment(more, self.look())], width)

    @property
    def _whole_width(self) -> int:
        return self.front + sum(self._widths) + self.gap * (len(self._widths) - 1)

    def _whole_end(self, edge: int) -> int:
        """Where the last column ends that is in sight as a whole: no number is cut. One alone may be."""
        if not self.by_cell:
            return edge
        end, best = self.front, edge
        for width in self._widths:
            end += width + 1  # the bracket after a chosen cell
            if end <= edge:
                best = end
            end += self.gap - 1
        return edge if self._whole_width <= edge or best <= self.shift else best

    def _thumb(self, line: int) -> str:
        count, room = len(self.table.rows), self.room
        if count <= room or line < 0:
            return " "
        first, last = self.top * room // count, (self.top + room) * room // count
        return ("#" if self.ascii else "█") if first <= line <= last else " "

    def _segments(self, place: int) -> list[Segment]:
        row = self.table.rows[place]
        here = place == self.row and not self.reading
        style = self._style(row.mark if self.tone_column is None else "", cursor=here)
        segments = (
            [] if self.reading else [Segment(">" if here else " ", style), self._mark(row, here, style)]
        )
        for n, text in enumerate(row.cells):
            toned = style if n != self.tone_column else self._style(row.mark, cursor=here)
            if row.paths and row.path_at(n) in self.moved:
                toned += Style(underline=True) if here else self.look("table--changed")
            chosen = here and self.by_cell and n == self.column and self.has_focus
            segments.append(Segment(self._cell(n, text), toned))
            after = here and self.by_cell and n + 1 == self.column and self.has_focus
            if self.gap > 1:
                segments.append(Segment("]" if chosen else " ", style))
                segments.append(Segment("[" if after else " ", style))
            else:
                segments.append(Segment("]" if chosen else "[" if after else " ", style))
        return segments

    def _mark(self, row: Row, here: bool, style: Style) -> Segment:  # noqa: FBT001
        """Before the first cell: a figure of the row was changed, or the cell is the one under the cursor."""
        changed = row.path in self.moved or any(path in self.moved for path in row.paths if path)
        chosen = here and self.by_cell and self.column == 0 and self.has_focus
        return Segment("*" if changed else "[" if chosen else " ", style)

    def _cell(self, column: int, text: str) -> str:
        width = self._widths[column] if column < len(self._widths) else cell_len(text)
        text = tidy(text, ascii_only=self.ascii)
        if column == (self.giver or 0) and self.by_cell:  # names of one beginning are told apart by their end
            text = squeezed(text, width)
        return fitted(text, width, right=column in self.table.right)

    def _style(self, mark: str, *, cursor: bool) -> Style:
        tone = _TONES.get(mark)
        style = self.look(f"table--{tone}") if tone else self.look()
        return style + self.look("table--cursor", partial=True) if cursor else style


def reading_table(lines: Iterable[str]) -> Table:
    """Lines of text as rows."""
    return Table((), frozenset(), tuple(Row((line,)) for line in lines))
