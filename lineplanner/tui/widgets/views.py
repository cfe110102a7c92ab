"""The views of a load: each shows one side of the plan and knows the figure under its cursor."""

from __future__ import annotations

from collections.abc import Iterable
from typing import ClassVar

from textual import on
from textual.app import ComposeResult
from textual.containers import Vertical
from textual.content import Content
from textual.message import Message
from textual.widgets import Static

from lineplanner.report.plot import plot_of, reading_at
from lineplanner.report.program_text import area_notes
from lineplanner.report.rows import Table
from lineplanner.report.view_tables import (
    areas_table,
    card_rows,
    caution_rows,
    check_said,
    checks_table,
    program_said,
    program_table,
)
from lineplanner.tui.session import Session
from lineplanner.tui.widgets.plot import ProgramPlot
from lineplanner.tui.widgets.table import TableView, reading_table
from lineplanner.tui.widgets.text import tidy

WIDE, XWIDE = 100, 160  # columns from which there is room beside a view
VIEWS = ("rack", "program", "checks", "areas", "card", "cautions")


class LoadView(Vertical):
    """A view of a load. `tell` words it anew; `path` is the figure to ask about."""

    class Picked(Message):
        """Another entry of the load is selected."""

        def __init__(self, hang: int) -> None:
            super().__init__()
            self.hang = hang

    class WhyWanted(Message):
        """Enter on a row asks why."""

        def __init__(self, path: str) -> None:
            super().__init__()
            self.path = path

    def __init__(self, name: str, *, ascii_only: bool) -> None:
        super().__init__(id=f"view-{name}")
        self.ascii, self.stale = ascii_only, True

    def tell(self, session: Session, moved: frozenset[str] = frozenset()) -> None:
        """Show the plan of the session; what moved carries a mark."""
        self.stale = False
        self.show(session, moved)

    def show(self, session: Session, moved: frozenset[str]) -> None:
        """Put the plan of the session into the widgets of this view."""

    def select(self, hang: int) -> None:
        """Another entry of the load is selected elsewhere."""

    @property
    def path(self) -> str | None:
        """The figure under the cursor."""
        focused = self.screen.focused
        tables = list(self.query(TableView))
        table = focused if isinstance(focused, TableView) and focused in tables else next(iter(tables), None)
        return None if table is None else table.path

    def take_focus(self, *, scroll: bool = True) -> None:
        """Take the keys; on a low screen scroll into sight."""
        self.query(TableView).first().focus(scroll_visible=scroll)

    def unmark(self) -> None:
        for table in self.query(TableView):
            table.unmark()

    @on(TableView.Chosen)
    def _why(self, event: TableView.Chosen) -> None:
        event.stop()
        if event.table.path is not None:
            self.post_message(self.WhyWanted(event.table.path))

    def lines(self, texts: Iterable[str]) -> Content:
        """Lines of text that holds what people typed."""
        return Content("\n".join(tidy(text, ascii_only=self.ascii) for text in texts))


class TableLoadView(LoadView):
    """One table."""

    HEADED: ClassVar[bool] = True
    BY_CELL: ClassVar[bool] = True

    def compose(self) -> ComposeResult:
        yield TableView(
            headed=self.HEADED,
            by_cell=self.BY_CELL,
            giver=0 if self.BY_CELL else None,
            ascii_only=self.ascii,
            tone_column=self.tone,
        )

    @property
    def tone(self) -> int | None:
        return None

    def show(self, session: Session, moved: frozenset[str]) -> None:
        self.query_one(TableView).show(self.table(session), moved)

    def table(self, session: Session) -> Table:  # noqa: ARG002 - each view gives its own
        """The rows of this view."""
        return Table((), frozenset(), ())


class CardView(TableLoadView):
    """The card as it is printed."""

    HEADED, BY_CELL = False, False

    def table(self, session: Session) -> Table:
        return Table((), frozenset(), card_rows(session.plan, session.style))


class CautionsView(TableLoadView):
    """All cautions, moment by moment."""

    HEADED, BY_CELL = False, False

    def table(self, session: Session) -> Table:
        width = max(min(self.size.width or self.screen.size.width, 100) - 4, 20)
        return Table((), frozenset(), caution_rows(session.plan, session.style, width))


class AreasView(TableLoadView):
    """Item by item, with the share of the current."""

    def compose(self) -> ComposeResult:
        yield from super().compose()
        yield Static(id="said", markup=False)

    def show(self, session: Session, moved: frozenset[str]) -> None:
        super().show(session, moved)
        notes = area_notes(session.plan, session.style)
        self.query_one("#said", Static).update(self.lines(line.strip() for line in notes))

    def table(self, session: Session) -> Table:
        return areas_table(session.plan, session.style)


class ChecksView(LoadView):
    """Every check, and the one under the cursor in words."""

    def compose(self) -> ComposeResult:
        yield TableView(by_cell=True, ascii_only=self.ascii)
        yield Static(id="said", markup=False)

    def show(self, session: Session, moved: frozenset[str]) -> None:
        self.session = session
        self.query_one(TableView).show(checks_table(session.plan, session.style), moved)
        self._say()

    @on(TableView.Moved)
    def _moved(self) -> None:
        self._say()

    def _say(self) -> None:
        row = self.query_one(TableView).current
        path = None if row is None else row.path
        width = max((self.size.width or self.screen.size.width) - 2, 20)
        said = [] if path is None else check_said(self.session.plan, path, self.session.style, width)
        self.query_one("#said", Static).update(self.lines(said))


class ProgramView(LoadView):
    """The stages, and what they give."""

    def compose(self) -> ComposeResult:
        with Vertical(id="over"):
            yield TableView(id="stages", by_cell=True, ascii_only=self.ascii)
            yield ProgramPlot(ascii_only=self.ascii, id="plot")
        yield TableView(id="notes", headed=False, reading=True, ascii_only=self.ascii)

    def show(self, session: Session, moved: frozenset[str]) -> None:
        table = self.query_one("#stages", TableView)
        table.show(program_table(session.plan, session.style), moved)
        table.styles.height = len(table.table.rows) + 1
        show_plot(self.query_one(ProgramPlot), session)
        notes = self.query_one("#notes", TableView)
        notes.show(reading_table(program_said(session.plan, session.style)))
        notes.styles.height = "1fr" if self.screen.size.width >= XWIDE else len(notes.table.rows)


def show_plot(plot: ProgramPlot, session: Session) -> None:
    """The plan's curves, read in words at the cursor."""
    plan, style = session.plan, session.style

    def said(share: float) -> str:
        reading = reading_at(plan, share, style)
        return "" if reading is None else reading.line

    plot.show(plot_of(plan, style), said)


def view_named(name: str, *, ascii_only: bool) -> LoadView:
    """A view by its name."""
    from lineplanner.tui.widgets.rack_view import RackView

    made: dict[str, type[LoadView]] = {
        "rack": RackView,
        "program": ProgramView,
        "checks": ChecksView,
        "areas": AreasView,
        "card": CardView,
        "cautions": CautionsView,
    }
    return made[name](name, ascii_only=ascii_only)
