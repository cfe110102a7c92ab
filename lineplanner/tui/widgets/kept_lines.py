"""A widget drawn line by line that repaints only those lines that a change made others."""

from __future__ import annotations

from itertools import groupby
from typing import Any, Self

from rich.style import Style
from textual.geometry import Region, Size
from textual.strip import Strip
from textual.widget import Widget


class KeptLines(Widget):
    """`draw_line` makes a line; `redraw` after a change of what is shown, `refresh` after a change of its looks."""

    def __init__(
        self,
        *,
        name: str | None = None,
        id: str | None = None,  # noqa: A002 - Textual's own word
        classes: str | None = None,
    ) -> None:
        self._kept: dict[int, Strip] = {}
        self._looks: dict[tuple[str, bool], Style] = {}
        self._due = False
        self._kept_size = Size(0, 0)
        super().__init__(name=name, id=id, classes=classes)

    def draw_line(self, y: int) -> Strip:  # noqa: ARG002 - each widget has its own
        """One line as it has to look now; blank unless a widget says otherwise."""
        return Strip.blank(self.size.width, self.look())

    def redraw(self) -> None:
        """Draw all lines in sight anew and repaint those that differ from what was drawn last."""
        self._due, before = False, self._kept
        if not before or self._kept_size != self.size:
            self.refresh()
            return
        self._kept = {y: self.draw_line(y) for y in range(self.size.height)}
        other = [y for y, strip in self._kept.items() if before.get(y) != strip]
        width = self.size.width
        for _, run in groupby(enumerate(other), key=lambda pair: pair[1] - pair[0]):
            lines = [y for _, y in run]
            self.refresh(Region(0, lines[0], width, len(lines)))

    def redraw_later(self) -> None:
        """Redraw after what is being handled, unless that redraws."""
        if not self._due:
            self._due = True
            self.call_later(self._redraw_due)

    def _redraw_due(self) -> None:
        if self._due:
            self.redraw()

    def look(self, part: str = "", *, partial: bool = False) -> Style:
        """The style of the widget, or of a part of it by its component class; partial: what only the part says."""
        style = self._looks.get((part, partial))
        if style is None:
            style = self.get_component_rich_style(part, partial=partial) if part else self.rich_style
            self._looks[part, partial] = style
        return style

    def refresh(self, *regions: Region, **how: Any) -> Self:
        """Textual's own, for changes of style, focus or size: nothing that was drawn is kept."""
        if not regions:
            self._kept, self._looks = {}, {}
        return super().refresh(*regions, **how)

    def render_line(self, y: int) -> Strip:
        """A line as it was drawn last."""
        if self._kept_size != self.size:
            self._kept, self._kept_size = {}, self.size
        strip = self._kept.get(y)
        if strip is None:
            strip = self._kept[y] = self.draw_line(y)
        return strip
