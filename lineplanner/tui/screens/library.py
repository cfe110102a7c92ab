"""The library: every file of the site, found by any text in it; edited, copied, renamed, taken out."""

from __future__ import annotations

from functools import partial
from typing import ClassVar

from textual import on
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal
from textual.widgets import Input, Static

from lineplanner.errors import PlannerError
from lineplanner.report.rows import Row, Table
from lineplanner.report.words import error_text
from lineplanner.tui.edited import Ref
from lineplanner.tui.screens.ask import AskScreen, PromptScreen
from lineplanner.tui.screens.base import PlannerScreen
from lineplanner.tui.screens.form import RecordForm
from lineplanner.tui.session import Session
from lineplanner.tui.stock import Filed, copied, renamed, stock, take_out
from lineplanner.tui.widgets.table import TableView
from lineplanner.tui.widgets.text import tidy

COLUMNS = ("kind", "file", "used by", "name")


class LibraryScreen(PlannerScreen):
    """All files; typing finds, Enter opens the form of one."""

    CSS_PATH = "library.tcss"
    AUTO_FOCUS = "#find"
    FIRST_HINTS = (("type", "to find"), ("Enter", "edit"))
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "open", "edit"),
        Binding("up", "move(-1)", "file above", show=False),
        Binding("down", "move(1)", "file below", show=False),
        Binding("pageup", "move(-10)", "ten files up", show=False),
        Binding("pagedown", "move(10)", "ten files down", show=False),
        Binding("f3", "copy", "copy"),
        Binding("f6", "rename", "rename"),
        Binding("f9", "take_out", "take out"),
        Binding("f10", "close", "close"),
        Binding("ctrl+w,escape", "close", "close", show=False, priority=True),
    ]

    def __init__(self, session: Session) -> None:
        super().__init__(session)
        self.files: list[Filed] = []
        self.shown: list[Filed] = []
        self.find_line = Input(compact=True, id="find")
        self.table = TableView(id="files", ascii_only=session.style.ascii)

    def compose(self) -> ComposeResult:
        with Horizontal(id="line"):
            yield Static("Library  find: ", id="label", markup=False)
            yield self.find_line
        yield self.table
        yield self.hints

    def on_mount(self) -> None:
        self.find_line.cursor_blink = False
        self.retell()

    def on_screen_resume(self) -> None:
        self.retell()

    def retell(self) -> None:
        """Read the files again, as edited."""
        here = self.selected
        self.files = stock(self.session)
        self._find(None if here is None else here.ref)

    @property
    def selected(self) -> Filed | None:
        """The file under the cursor."""
        return self.shown[self.table.row] if self.table.row < len(self.shown) else None

    def _find(self, ref: Ref | None = None) -> None:
        words = self.find_line.value.casefold().split()
        self.shown = [one for one in self.files if all(word in one.found_by for word in words)]
        row = next((n for n, one in enumerate(self.shown) if one.ref == ref), 0)
        self.table.show(Table(COLUMNS, frozenset(), tuple(map(self._row, self.shown))), row=row)

    def _row(self, one: Filed) -> Row:
        count = len(one.users)
        used = "" if not count else f"{count} file{'s' if count > 1 else ''}"
        name = tidy(one.name, ascii_only=self.session.style.ascii)
        unsaved = "   * not saved" if one.ref in self.session.dirty else ""
        return Row((*one.ref, used, f"{name}{unsaved}"), mark="unread" if one.unread else "")

    @on(Input.Changed, "#find")
    def _typed(self) -> None:
        self._find()

    @on(Input.Submitted, "#find")
    def _entered(self) -> None:
        self.action_open()

    @on(TableView.Chosen)
    def _chosen(self, event: TableView.Chosen) -> None:
        event.stop()
        self.action_open()

    def action_move(self, step: int) -> None:
        self.table.go(self.table.row + step)

    def action_open(self) -> None:
        one = self.selected
        if one is None:
            return
        try:
            self.session.record(one.ref)
        except PlannerError as error:
            self.tell(f"{one.ref[1]} cannot be read", error_text(error, self.session.style).splitlines())
            return
        self.app.push_screen(RecordForm(self.session, one.ref))

    def action_copy(self) -> None:
        self._ask_name("Name of the copy of", copied, "copied to")

    def action_rename(self) -> None:
        self._ask_name("New name of", renamed, "renamed to")

    def _ask_name(self, question: str, work: object, word: str) -> None:
        one = self.selected
        if one is None:
            return

        def taken(stem: str) -> str | None:
            try:
                work(self.session, one.ref, stem)  # type: ignore[operator]
            except PlannerError as error:
                return error_text(error, self.session.style)
            return None

        prompt = PromptScreen(
            f"{question} {one.ref[0]} {one.ref[1]}",
            taken,
            ascii_only=self.session.style.ascii,
            typed=one.ref[1],
        )
        self.app.push_screen(prompt, partial(self._named, one.ref, word))

    def _named(self, ref: Ref, word: str, stem: str | None) -> None:
        if stem is not None:
            self.files = stock(self.session)
            self._find((ref[0], stem))
            self.say(f"{ref[1]} {word} {stem}")

    def action_take_out(self) -> None:
        one = self.selected
        if one is None:
            return
        answers = (("y", "take it out", "yes"), ("q", "leave it", "no"))
        said = [f"{kind} {stem} uses it" for kind, stem in one.users]
        question = f"Take {one.ref[0]} {one.ref[1]} out of the site?"
        ask = AskScreen(question, said, answers, ascii_only=self.session.style.ascii)
        self.app.push_screen(ask, partial(self._taken_out, one.ref))

    def _taken_out(self, ref: Ref, answer: str | None) -> None:
        if answer != "yes":
            return
        try:
            kept = take_out(self.session, ref)
        except PlannerError as error:
            self.cannot(error)
            return
        self.retell()
        self.say(f"{ref[1]} is out; its file is kept as {kept.name}")

    def action_close(self) -> None:
        self.dismiss(None)
