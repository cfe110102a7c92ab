"""The lines of a form above or below the field with the cursor: drawn, not mounted, so that a form may be long."""

from __future__ import annotations

from collections.abc import Sequence
from typing import ClassVar

from rich.segment import Segment
from textual.events import Click
from textual.message import Message
from textual.strip import Strip

from lineplanner.report.form_rows import Heading, Row
from lineplanner.tui.sheet import Line
from lineplanner.tui.widgets.kept_lines import KeptLines
from lineplanner.tui.widgets.text import fitted, tidy

_DEEPEST = 4  # levels that are set in; deeper ones stand under these
_LABELS = ((110, 50), (76, 34), (50, 26), (0, 14))  # from which width on labels take how many cells


def label_width(width: int) -> int:
    """Cells that labels take in a form of a width, two of them for the cursor."""
    return next(cells for least, cells in _LABELS if width >= least)


def drawn(line: Line, width: int, *, ascii_only: bool = False) -> str:
    """One line as text: label, value, and in words what is to be said of it."""
    row, indent = line.row, "  " * min(line.row.level, _DEEPEST)
    if isinstance(row, Heading):
        text = f"  {indent}{row.label}  {'NOT TAKEN' if line.refused else row.how}".rstrip()
    else:
        label = fitted(tidy(f"{indent}{row.label}"), label_width(width) - 3)
        text = f"  {label} {line.text or '-'}{_said(line, row)}"
    return fitted(tidy(text, ascii_only=ascii_only), width)


def _said(line: Line, row: Row) -> str:
    if line.refused:
        return f"   NOT TAKEN, in force: {row.text or 'left out'}" if line.draft is None else "   NOT TAKEN"
    return "".join(f"   {word}" for word in (row.elsewise, row.mark) if word)


class FormLines(KeptLines):
    """Some lines of a form, one row of cells each."""

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = {"form--heading", "form--refused", "form--deviation"}

    class Picked(Message):
        """A line was clicked: its place in the form."""

        def __init__(self, at: int) -> None:
            super().__init__()
            self.at = at

    def __init__(self, id: str, *, ascii_only: bool = False) -> None:  # noqa: A002 - textual's word
        super().__init__(id=id)
        self.ascii = ascii_only
        self._lines: Sequence[Line] = ()
        self._first = self._height = 0

    def show(self, lines: Sequence[Line], first: int, height: int) -> None:
        """Show lines of the form, the first of which has a place in it."""
        self._lines, self._first = lines, first
        if self._height != height:
            self._height = self.styles.height = height
        self.display = height > 0
        self.redraw()

    def draw_line(self, y: int) -> Strip:
        width, base = self.size.width, self.look()
        if y >= len(self._lines):
            return Strip([Segment(" " * width, base)], width)
        line = self._lines[y]
        part = self._part(line)
        style = self.look(f"form--{part}") if part else base
        return Strip([Segment(drawn(line, width, ascii_only=self.ascii), style)], width)

    def _part(self, line: Line) -> str:
        if line.refused:
            return "refused"
        if isinstance(line.row, Heading):
            return "heading"
        return "deviation" if line.row.mark else ""

    def on_click(self, event: Click) -> None:
        event.stop()
        if event.y < len(self._lines):
            self.post_message(self.Picked(self._first + event.y))
