"""A text over the screen: where a figure comes from, what a file lacks. Any key closes it, the arrows scroll."""

from __future__ import annotations

from collections.abc import Iterable
from typing import TYPE_CHECKING, ClassVar

from textual import events
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Vertical
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Static

from lineplanner.errors import PlannerError
from lineplanner.report.layout import wrapped
from lineplanner.report.style import Style
from lineplanner.report.words import error_text
from lineplanner.tui.widgets.table import TableView, reading_table
from lineplanner.tui.widgets.text import tidy

if TYPE_CHECKING:
    from lineplanner.plan import Plan

_SCROLL = frozenset({"up", "down", "left", "right", "pageup", "pagedown", "home", "end", "space"})
_AROUND = 3  # rows that border and foot take
BOX = 80  # columns of the box at most
FOOT = "arrows scroll, any other key closes"


class TextScreen(ModalScreen[None]):
    """Lines of text with a title."""

    CSS_PATH = "why.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape,q,enter", "close", "close", show=False)]

    def __init__(self, title: str, lines: Iterable[str], *, ascii_only: bool) -> None:
        super().__init__()
        self.ascii = ascii_only
        self.titled, self.lines = tidy(title, ascii_only=ascii_only), list(lines)

    def compose(self) -> ComposeResult:
        with Vertical(id="box", classes="-ascii" if self.ascii else ""):
            if self.titled:
                yield Static(Content(self.titled), id="title")
            yield TableView(id="text", headed=False, reading=True, ascii_only=self.ascii)
            yield Static(Content(FOOT), id="foot")

    def on_resize(self) -> None:
        """Lines too long for the box go on below, as far in as they begin."""
        room = max(min(self.size.width, BOX) - 3, 10)
        lines = [part for line in self.lines for part in _within(line, room)]
        text = self.query_one(TableView)
        text.show(reading_table(lines))
        text.styles.height = max(1, min(len(lines), self.size.height - _AROUND - bool(self.titled)))

    def on_key(self, event: events.Key) -> None:
        if event.key not in _SCROLL:
            event.stop()
            event.prevent_default()
            self.dismiss(None)

    def on_table_view_chosen(self, event: TableView.Chosen) -> None:
        event.stop()
        self.dismiss(None)

    def action_close(self) -> None:
        self.dismiss(None)


def why_screen(plan: Plan, path: str, style: Style) -> TextScreen:
    """The story of a figure."""
    from lineplanner.report.views import why_lines, why_title

    try:
        lines = why_lines(plan, path, style)
    except PlannerError as error:
        lines = error_text(error, style).splitlines()
    return TextScreen(f"Why: {why_title(plan, path)}", lines, ascii_only=style.ascii)


def _within(line: str, room: int) -> list[str]:
    if len(line) <= room:
        return [line]
    indent = " " * min(len(line) - len(line.lstrip()), room // 2)
    return wrapped(line.strip(), room, first=indent, rest=f"{indent}  ")
