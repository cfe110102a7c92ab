"""The rack: the picture with its selected part; where there is room, the ledger, the plot and the checks beside it."""

from __future__ import annotations

from textual.app import ComposeResult
from textual.containers import Container, Horizontal, Vertical
from textual.widgets import Static

from lineplanner.report.picture import Hung, Scene, scene_of
from lineplanner.report.rows import Table
from lineplanner.report.selected import item_of, selected_lines, selected_rows
from lineplanner.report.view_tables import areas_table, checks_table
from lineplanner.tui.session import Session
from lineplanner.tui.widgets.plot import ProgramPlot
from lineplanner.tui.widgets.rack_canvas import RackCanvas
from lineplanner.tui.widgets.table import TableView
from lineplanner.tui.widgets.text import fitted
from lineplanner.tui.widgets.views import WIDE, XWIDE, LoadView, show_plot


class RackView(LoadView):
    """The picture of the load."""

    def __init__(self, name: str, *, ascii_only: bool) -> None:
        super().__init__(name, ascii_only=ascii_only)
        self.session: Session | None = None
        self.hang = 0
        self.owner: int | None = None
        self.scene: Scene | None = None

    def compose(self) -> ComposeResult:
        with Horizontal(id="all"):
            with Container(id="left"):
                yield RackCanvas(self.pick, ascii_only=self.ascii, id="canvas")
                with Container(id="side"):
                    yield TableView(id="part", headed=False, ascii_only=self.ascii)
                    yield TableView(id="ledger", by_cell=True, giver=0, ascii_only=self.ascii)
                yield Static(id="line", markup=False)
            with Vertical(id="third"):
                yield ProgramPlot(ascii_only=self.ascii, id="beside")
                yield TableView(id="ranked", by_cell=True, giver=0, ascii_only=self.ascii)

    def take_focus(self, *, scroll: bool = True) -> None:
        self.query_one(RackCanvas).focus(scroll_visible=scroll)

    @property
    def path(self) -> str | None:
        focused = self.screen.focused
        if isinstance(focused, TableView):
            return focused.path
        return (
            None
            if self.session is None
            else f"area.items[{item_of(self.session.plan, self.hang)}].carrying_m2"
        )

    # --- showing -----------------------------------------------------------------------------------------

    def show(self, session: Session, moved: frozenset[str]) -> None:
        self.session = session
        self.scene = scene_of(session.plan)
        self.hang = min(self.hang, len(session.case.load.hangs) - 1)
        if self.hung is None or self.hung.hang != self.hang:
            self.owner = self._first()
        self.query_one(RackCanvas).show(self.scene, self.owner)
        self._say(moved)

    def select(self, hang: int) -> None:
        self.hang = hang
        if self.session is not None:
            self.owner = self._first()
            self.query_one(RackCanvas).select(self.owner)
            self._say(frozenset(), only_part=True)

    def _first(self) -> int | None:
        """The first part of the selected entry; None where it is only counted."""
        parts = () if self.scene is None else self.scene.parts
        return next((hung.owner for hung in parts if hung.hang == self.hang), None)

    @property
    def hung(self) -> Hung | None:
        """The part that is selected; None in an entry that is only counted."""
        if self.scene is None or self.owner is None or self.owner >= len(self.scene.parts):
            return None
        return self.scene.parts[self.owner]

    def pick(self, owner: int | None) -> None:
        """Another part was picked on the picture."""
        self.owner = owner
        if self.hung is not None and self.hung.hang != self.hang:
            self.hang = self.hung.hang
            self.post_message(self.Picked(self.hang))
        self._say(frozenset(), only_part=True)

    def _say(self, moved: frozenset[str], *, only_part: bool = False) -> None:
        """The selected part in words; with room for it also ledger and checks."""
        assert self.session is not None
        plan, style = self.session.plan, self.session.style
        room = max((self.size.width or self.screen.size.width) - 2, 10)
        lines = [fitted(line, room) for line in selected_lines(plan, style, self.hang, self.hung)]
        self.query_one("#line", Static).update(self.lines(lines), layout=False)
        if self.screen.size.width < WIDE:
            return
        rows = selected_rows(plan, style, self.hang, self.hung)
        self.query_one("#part", TableView).show(Table((), frozenset(), rows), moved)
        if not only_part:
            self.query_one("#ledger", TableView).show(areas_table(plan, style), moved)
            if self.screen.size.width >= XWIDE:
                show_plot(self.query_one(ProgramPlot), self.session)
                self.query_one("#ranked", TableView).show(checks_table(plan, style), moved)
