"""The records that the open load is planned from; Enter opens the form of one."""

from __future__ import annotations

from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.content import Content
from textual.widgets import Static

from lineplanner.report.views import Row, Table
from lineplanner.tui.edited import Ref
from lineplanner.tui.screens.base import PlannerScreen
from lineplanner.tui.screens.form import RecordForm
from lineplanner.tui.session import Session
from lineplanner.tui.widgets.table import TableView
from lineplanner.tui.widgets.text import tidy

COLUMNS = ("kind", "file", "", "name")
NOT_SAVED = "* not saved"


class RecordList(PlannerScreen):
    """Kind, file and name of every record, and which of them hold changes that are not saved."""

    CSS_PATH = "records.tcss"
    AUTO_FOCUS = "TableView"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "open", "open"),
        Binding("f7", "undo", "undo"),
        Binding("f8", "redo", "redo"),
        Binding("q,f10", "close", "close"),
        Binding("ctrl+w,escape", "close", "close", show=False, priority=True),
    ]

    def __init__(self, session: Session) -> None:
        super().__init__(session)
        self.refs: tuple[Ref, ...] = ()

    def compose(self) -> ComposeResult:
        ascii_only = self.session.style.ascii
        yield Static(id="title", markup=False)
        yield TableView(id="records", ascii_only=ascii_only)
        yield self.hints

    def on_mount(self) -> None:
        self.retell()

    def on_screen_resume(self) -> None:
        self.retell()

    def retell(self) -> None:
        self.refs = self.session.refs()
        self.query_one(TableView).show(
            Table(COLUMNS, frozenset(), tuple(self._row(ref) for ref in self.refs))
        )
        title = tidy(f"Records of load {self.session.name}", ascii_only=self.session.style.ascii)
        self.query_one("#title", Static).update(Content(f" {title}"))

    def _row(self, ref: Ref) -> Row:
        kind, stem = ref
        unsaved = NOT_SAVED if ref in self.session.dirty else ""
        return Row((kind, stem, unsaved, self.session.record(ref).name))

    def on_table_view_chosen(self, event: TableView.Chosen) -> None:
        event.stop()
        self.action_open()

    def action_open(self) -> None:
        self.app.push_screen(RecordForm(self.session, self.refs[self.query_one(TableView).row]))

    def action_undo(self) -> None:
        elsewhere = self.session.undone_elsewhere
        if elsewhere:
            self.say(f"the last change was made at {elsewhere}: open that load to take it back")
            return
        label = self.session.undo()
        self.retell()
        self.say(f"undone: {label}" if label else "nothing to undo")

    def action_redo(self) -> None:
        elsewhere = self.session.redone_elsewhere
        if elsewhere:
            self.say(f"the change was made at {elsewhere}: open that load to make it again")
            return
        label = self.session.redo()
        self.retell()
        self.say(f"done again: {label}" if label else "nothing to do again")

    def action_close(self) -> None:
        self.dismiss(None)
