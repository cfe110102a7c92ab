"""One row of a form as it is typed in: label, input, what is understood of it, why it is refused."""

from __future__ import annotations

from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal
from textual.content import Content
from textual.widget import Widget
from textual.widgets import Input, Static
from textual.widgets.input import Selection

from lineplanner.report.form_help import field_lines, next_choice
from lineplanner.report.form_rows import Row
from lineplanner.report.layout import wrapped
from lineplanner.report.style import Style
from lineplanner.tui.sheet import Line
from lineplanner.tui.widgets.form_lines import label_width
from lineplanner.tui.widgets.text import fitted, tidy

_NOTHING = "(?!)"  # a pattern that no text fits: nothing can be typed


class Entry(Input):
    """The input of a form's row. Up, down, tab and Enter belong to the form; left and right turn choices."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "screen.take", "give the value", show=False),
        Binding("up,shift+tab", "screen.step(-1)", "field above", show=False),
        Binding("down,tab", "screen.step(1)", "field below", show=False),
        Binding("pageup", "screen.step(-10)", "ten fields up", show=False),
        Binding("pagedown", "screen.step(10)", "ten fields down", show=False),
        Binding("left", "turn(-1)", "choice before", show=False),
        Binding("right", "turn(1)", "choice after", show=False),
    ]

    row: Row | None = None

    def action_turn(self, step: int) -> None:
        """Another choice; in other fields the cursor moves."""
        if self.row is not None and self.row.choices and not self.row.locked and self.row.takes.turns:
            self.value = next_choice(self.row, self.value, step)
            self.selection = Selection(0, len(self.value))
        elif step < 0:
            self.action_cursor_left()
        else:
            self.action_cursor_right()


class QuantityField(Widget):
    """The row with the cursor. What is typed is echoed in both unit systems at each key."""

    def __init__(self, style: Style) -> None:
        super().__init__()
        self.units = style
        self.lines = 1
        self._line: Line | None = None
        self._notes: tuple[str, ...] = ()
        self.label = Static(classes="label", markup=False)
        self.entry = Entry(select_on_focus=False, compact=True)
        self.said = Static(classes="said", markup=False)

    def compose(self) -> ComposeResult:
        with Horizontal():
            yield self.label
            yield self.entry
        yield self.said

    def show(self, line: Line | None, style: Style, *notes: str) -> None:
        """Show a line; its text stands in the input, refused or not. Typing replaces a text that is in force."""
        self._line, self._notes, self.units = line, notes, style
        row = line.row if line is not None and isinstance(line.row, Row) else None
        entry = self.entry
        entry.row = row
        entry.restrict = None if row is not None and not row.locked else _NOTHING
        with self.prevent(Input.Changed):
            entry.value = line.text if line is not None and row is not None else ""
        refused = line is not None and bool(line.refused)
        entry.selection = Selection(len(entry.value) if refused else 0, len(entry.value))
        self._label()
        self.say()

    def on_resize(self) -> None:
        self._label()

    def _label(self) -> None:
        width = label_width(self.size.width or self.screen.size.width)
        text = tidy(
            "nothing found" if self._line is None else self._line.row.label, ascii_only=self.units.ascii
        )
        self.label.styles.width = width
        self.label.update(Content(fitted(f"> {text}", width - 1)), layout=False)

    def on_input_changed(self, event: Input.Changed) -> None:
        event.stop()
        self.say()

    def say(self) -> None:
        """Write below the input what is understood of it, and what is to be known of the row."""
        line, found = self._line, list(self._notes)
        if line is not None:
            if len(line.row.label) > label_width(self.size.width or self.screen.size.width) - 3:
                found.append(line.row.label)  # cut in its row
            found += field_lines(
                line.row, line.text, self.entry.value, line.refused, self.units, new=line.draft is not None
            )
        width = max((self.size.width or self.screen.size.width) - 3, 10)
        text = [tidy(one, ascii_only=self.units.ascii) for words in found for one in wrapped(words, width)]
        grown, self.lines = self.lines != 1 + len(text), 1 + len(text)
        self.said.update(Content("\n".join(text)), layout=grown)
