"""The bar of views: the one in sight stands in brackets."""

from __future__ import annotations

from typing import ClassVar

from rich.segment import Segment
from textual import events
from textual.binding import Binding, BindingType
from textual.message import Message
from textual.strip import Strip

from lineplanner.tui.widgets.kept_lines import KeptLines


class ViewBar(KeptLines, can_focus=True):
    """Names of the views; left and right change them while the bar has the focus."""

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = {"bar--chosen", "bar--focus"}
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("left", "across(-1)", "view before", show=False),
        Binding("right", "across(1)", "next view", show=False),
    ]

    class Chosen(Message):
        """Another view is wanted."""

        def __init__(self, name: str) -> None:
            super().__init__()
            self.name = name

    def __init__(self, names: tuple[str, ...], *, id: str | None = None) -> None:  # noqa: A002
        super().__init__(id=id)
        self.names, self.chosen, self.note = names, names[0], ""

    def show(self, name: str, note: str = "") -> None:
        """Bracket a view; with a note only this one is named, and the note after it."""
        self.chosen, self.note = name, note
        self.redraw()

    def action_across(self, step: int) -> None:
        place = (self.names.index(self.chosen) + step) % len(self.names)
        self.post_message(self.Chosen(self.names[place]))

    def on_click(self, event: events.Click) -> None:
        end = 1
        for name in self.names:
            end += len(self._shown(name)) + 1
            if event.x < end:
                self.post_message(self.Chosen(name))
                return

    def _shown(self, name: str) -> str:
        number = self.names.index(name) + 1
        return f"[{number} {name}]" if name == self.chosen else f" {number} {name} "

    def draw_line(self, y: int) -> Strip:
        base = self.look()
        segments = [Segment(">" if self.has_focus else " ", base)]
        if self.note:
            text = f" {self._shown(self.chosen)}  {self.note}"
            return Strip([Segment(text, self.look("bar--focus"))]).adjust_cell_length(self.size.width, base)
        for name in self.names if y == 0 else ():
            style = base
            if name == self.chosen:
                style = self.look("bar--focus" if self.has_focus else "bar--chosen")
            segments += [Segment(self._shown(name), style), Segment(" ", base)]
        end = 1 + sum(len(self._shown(name)) + 1 for name in self.names[: self.names.index(self.chosen) + 1])
        shift = max(0, end - self.size.width)  # what is bracketed stays in sight
        return Strip(segments).crop(shift, shift + self.size.width).adjust_cell_length(self.size.width, base)
