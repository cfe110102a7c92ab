"""Questions: what to do with work that is not saved, a name, one out of many."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
from typing import Any, ClassVar

from textual import events
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal, Vertical
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Input, Static

from lineplanner.report.layout import wrapped
from lineplanner.report.rows import Row, Table
from lineplanner.tui.widgets.table import TableView
from lineplanner.tui.widgets.text import tidy

_AROUND = 5  # rows that border, question and blank lines take
Answer = tuple[str, str, str]
"""A key, what it does in words, and the answer that it gives."""


class AskScreen(ModalScreen[str]):
    """A question with a few answers: a key each, or arrows and Enter. Escape gives the last, which changes nothing."""

    CSS_PATH = "ask.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [Binding("escape", "last", "leave as it is", show=False)]

    def __init__(
        self, question: str, lines: Iterable[str], answers: Sequence[Answer], *, ascii_only: bool
    ) -> None:
        super().__init__()
        self.question, self.answers, self.ascii = question, answers, ascii_only
        self.lines = [line for text in lines for line in wrapped(text, rest="  ")]

    def compose(self) -> ComposeResult:
        with Vertical(id="box", classes="-ascii" if self.ascii else ""):
            yield Static(Content(tidy(self.question, ascii_only=self.ascii)), id="question")
            if self.lines:
                yield TableView(id="lines", headed=False, reading=True, ascii_only=self.ascii)
            yield TableView(id="answers", headed=False, ascii_only=self.ascii)

    def on_mount(self) -> None:
        if self.lines:
            lines = self.query_one("#lines", TableView)
            lines.show(Table((), frozenset(), tuple(Row((line,)) for line in self.lines)))
            room = self.size.height - len(self.answers) - _AROUND
            lines.styles.height = max(1, min(len(self.lines), room))
        answers = self.query_one("#answers", TableView)
        answers.show(Table((), frozenset(), tuple(Row((key, text)) for key, text, _ in self.answers)))
        answers.styles.height = len(self.answers)
        answers.focus()

    def on_key(self, event: events.Key) -> None:
        for key, _, answer in self.answers:
            if event.character == key:
                event.stop()
                self.dismiss(answer)
                return

    def on_table_view_chosen(self, event: TableView.Chosen) -> None:
        if event.table.id == "answers":
            self.dismiss(self.answers[event.table.row][2])

    def action_last(self) -> None:
        self.dismiss(self.answers[-1][2])


class PromptScreen(ModalScreen[str | None]):
    """A line to type. check says what is wrong with it, or gives None once it is taken."""

    CSS_PATH = "ask.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape,ctrl+w", "leave", "leave as it is", show=False, priority=True)
    ]

    def __init__(
        self, question: str, check: Callable[[str], str | None], *, ascii_only: bool, typed: str = ""
    ) -> None:
        super().__init__()
        self.question, self.check, self.ascii, self.typed = question, check, ascii_only, typed

    def compose(self) -> ComposeResult:
        with Vertical(id="box", classes="-ascii" if self.ascii else ""):
            yield Static(Content(tidy(self.question, ascii_only=self.ascii)), id="question")
            yield Input(self.typed, compact=True, select_on_focus=False)
            yield Static(Content("Enter takes it, Escape or ctrl+w leaves everything as it is"), id="reason")

    def on_mount(self) -> None:
        self.query_one(Input).cursor_blink = False

    def on_input_submitted(self, event: Input.Submitted) -> None:
        text = event.value.strip()
        reason = self.check(text)
        if reason is None:
            self.dismiss(text)
        else:
            self.query_one("#reason", Static).update(
                Content(tidy(reason.replace("\n", " "), ascii_only=self.ascii))
            )

    def action_leave(self) -> None:
        self.dismiss(None)


class PickScreen(ModalScreen[Any]):
    """One out of many: typing finds, arrows choose, Enter takes."""

    CSS_PATH = "ask.tcss"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("up", "move(-1)", "up", show=False),
        Binding("down", "move(1)", "down", show=False),
        Binding("pageup", "move(-10)", "page up", show=False),
        Binding("pagedown", "move(10)", "page down", show=False),
        Binding("escape,ctrl+w,ctrl+p", "leave", "leave as it is", show=False, priority=True),
    ]

    def __init__(self, question: str, choices: Sequence[tuple[str, Any]], *, ascii_only: bool) -> None:
        super().__init__()
        self.question, self.choices, self.ascii = question, choices, ascii_only
        self.found = list(choices)

    def compose(self) -> ComposeResult:
        with Vertical(id="box", classes="-ascii -tall" if self.ascii else "-tall"):
            with Horizontal(id="line"):
                yield Static(Content(f"{tidy(self.question, ascii_only=self.ascii)}  find: "), id="asked")
                yield Input(compact=True)
            yield TableView(id="choices", headed=False, ascii_only=self.ascii)
            yield Static(Content("type to find, Enter takes, Escape or ctrl+w leaves"), id="reason")

    def on_mount(self) -> None:
        self.query_one(Input).cursor_blink = False
        self.query_one(Input).focus()
        self._show()

    def _show(self) -> None:
        rows = tuple(Row((title,)) for title, _ in self.found)
        self.query_one(TableView).show(Table((), frozenset(), rows))

    def on_input_changed(self, event: Input.Changed) -> None:
        words = event.value.casefold().split()
        self.found = [one for one in self.choices if all(word in one[0].casefold() for word in words)]
        self.query_one(TableView).row = 0
        self._show()

    def on_input_submitted(self) -> None:
        if self.found:
            self.dismiss(self.found[self.query_one(TableView).row][1])

    def on_table_view_chosen(self, event: TableView.Chosen) -> None:
        self.dismiss(self.found[event.table.row][1])

    def action_move(self, step: int) -> None:
        self.query_one(TableView).action_move(step)

    def action_leave(self) -> None:
        self.dismiss(None)
