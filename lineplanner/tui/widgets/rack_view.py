"""The rack: the picture with its selected part; where there is room, the ledger, the plot and the checks beside it."""

from __future__ import annotations

from functools import partial

from textual.app import ComposeResult
from textual.containers import Container, Horizontal, Vertical
from textual.widgets import Static

from lineplanner.report.picture import Hung, Scene, scene_of
from lineplanner.report.rows import Table
from lineplanner.report.selected import item_of, scale_bar, selected_lines, selected_rows
from lineplanner.report.view_tables import areas_table, checks_table
from lineplanner.tui.session import Session
from lineplanner.tui.widgets.hand import Hand, key_of, owners_of
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
        self.hand = Hand()
        self.canvas = RackCanvas(self.pick, ascii_only=ascii_only, id="canvas")
        self.part = TableView(id="part", headed=False, ascii_only=ascii_only)
        self.ledger = TableView(id="ledger", by_cell=True, giver=0, ascii_only=ascii_only)
        self.line = Static(id="line", markup=False)
        self.plot = ProgramPlot(ascii_only=ascii_only, id="beside")
        self.ranked = TableView(id="ranked", by_cell=True, giver=0, ascii_only=ascii_only)

    def compose(self) -> ComposeResult:
        with Horizontal(id="all"):
            with Container(id="left"):
                yield self.canvas
                with Container(id="side"):
                    yield self.part
                    yield self.ledger
                yield self.line
            with Vertical(id="third"):
                yield self.plot
                yield self.ranked

    def take_focus(self, *, scroll: bool = True) -> None:
        self.canvas.focus(scroll_visible=scroll)

    def unmark(self) -> None:
        for table in (self.part, self.ledger, self.ranked):
            table.unmark()

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
        held = owners_of(self.scene, self.hand.keys)
        if self.hand.key is not None and held:
            front = self.hung is None or self.hung.side == "front"
            own = owners_of(self.scene, [self.hand.key]) or held
            self.owner = own[0] if front else own[-1]
            self.hang = self.scene.parts[self.owner].hang
            self.post_message(self.Picked(self.hang))
        else:
            self.hang = min(self.hang, len(session.case.load.hangs) - 1)
            if self.hung is None or self.hung.hang != self.hang:
                self.owner = self._first()
        self._take()
        self.canvas.scaled = partial(scale_bar, style=session.style)
        self.canvas.show(self.scene, self.owner, owners_of(self.scene, self.hand.marked))
        self._say(moved)

    def _take(self) -> None:
        """The part selected on the picture is the one in hand; marks of places that are no more go."""
        self.hand.key = key_of(self.scene, self.owner)
        known = set() if self.scene is None else {(one.hang, one.position) for one in self.scene.parts}
        self.hand.marked = [key for key in self.hand.marked if key in known]

    def remark(self) -> None:
        """Show other marks."""
        self.canvas.select(self.owner, owners_of(self.scene, self.hand.marked))

    def select(self, hang: int) -> None:
        self.hang = hang
        if self.session is not None:
            self.owner = self._first()
            self._take()
            self.canvas.select(self.owner)
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
        self._take()
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
        self.line.update(self.lines(lines), layout=False)
        if self.screen.size.width < WIDE:
            return
        rows = selected_rows(plan, style, self.hang, self.hung)
        self.part.show(Table((), frozenset(), rows), moved)
        if not only_part:
            self.ledger.show(areas_table(plan, style), moved)
            if self.screen.size.width >= XWIDE:
                show_plot(self.plot, self.session)
                self.ranked.show(checks_table(plan, style), moved)
