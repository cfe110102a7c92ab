"""The loads of the site with what to set for each: found by typing, opened by Enter."""

from __future__ import annotations

import contextlib
from collections.abc import Mapping
from functools import partial
from typing import TYPE_CHECKING, ClassVar, cast

from textual import events, on, work
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal
from textual.content import Content
from textual.message import Message
from textual.widgets import Input, Static
from textual.worker import Worker, WorkerState, get_current_worker

from lineplanner.errors import InputError, PlannerError
from lineplanner.report.listing_lines import said_below
from lineplanner.report.rows import COLUMNS, RIGHT, Listed, Row, Table, waiting
from lineplanner.report.words import error_text
from lineplanner.tui.opening import SYSTEMS, KeptRows, Known, Opening, facts_of
from lineplanner.tui.screens.base import LEAST, PlannerScreen
from lineplanner.tui.widgets.table import TableView
from lineplanner.tui.widgets.text import tidy

if TYPE_CHECKING:
    from lineplanner.tui.session import Session
    from lineplanner.units import System

RECIPE, VERDICT = 1, 5
PAUSE = 0.1  # s between two drawings of rows that fill in
DEMO = "The demo shop that comes with the program. The first save makes it your own."


class Find(Input):
    """The line to find by; a question mark is no letter of a name and asks for help."""

    def on_key(self, event: events.Key) -> None:
        if event.character == "?":
            event.stop()
            event.prevent_default()
            self.post_message(self.HelpWanted())

    class HelpWanted(Message):
        """Somebody asks what can be done here."""


class LoadsScreen(PlannerScreen):
    """The opening screen."""

    CSS_PATH = "loads.tcss"
    AUTO_FOCUS = "#find"
    FIRST_HINTS = (("type", "to find"), ("Enter", "open"))
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter", "open", "open"),
        Binding("up", "move(-1)", "load above", show=False),
        Binding("down", "move(1)", "load below", show=False),
        Binding("pageup", "move(-10)", "ten loads up", show=False),
        Binding("pagedown", "move(10)", "ten loads down", show=False),
        Binding("escape", "clear", "show all loads", show=False),
        Binding("f4", "new", "new load"),
        Binding("f10", "app.quit", "quit"),
        Binding("f9", "again", "read again"),
        Binding("question_mark", "help", "help", show=False),
    ]

    class Ready(Message):
        """All that a session needs is loaded."""

    def __init__(self, session: Session | Opening) -> None:
        super().__init__(cast("Session", session))  # until the session is there, the list alone is shown
        self.ready = not isinstance(session, Opening)
        self.opening_wanted = self.prepared = self.waits = False
        self.stems: list[str] = []
        self.shown: list[str] = []
        ascii_only = session.style.ascii
        self.opening = session if isinstance(session, Opening) else None
        self.kept = self.opening.kept if self.opening else KeptRows(None, ascii_only=ascii_only)
        self.known: Known = {}
        self.faulty: set[str] = set()
        self.generation = 0
        self.wanted: str | None = None
        self.at_work: str | None = None

    def compose(self) -> ComposeResult:
        ascii_only = self.session.style.ascii
        yield Static(id="title", markup=False)
        with Horizontal(id="line"):
            yield Static("Loads  find: ", id="label", markup=False)
            yield Find(compact=True, id="find")
            yield Static(id="count", markup=False)
        yield TableView(
            id="loads", stretch=VERDICT, giver=RECIPE, tone_column=VERDICT, gap=1, ascii_only=ascii_only
        )
        yield Static(id="below", markup=False)
        yield self.hints

    def on_mount(self) -> None:
        self.query_one("#find", Input).cursor_blink = False
        self.read(self.session.last_load)

    # --- which loads -------------------------------------------------------------------------------------

    def read(self, select: str | None = None) -> None:
        """The loads as they are on disk now; what was planned before is planned again.

        The first time the rows of an earlier run are taken up, if nothing that they depend on has changed since.
        """
        self.generation += 1
        self.stems = self.session.loads()
        opening, self.opening = self.opening, None
        stamp = opening.stamp if opening else self.kept.stamp(self.session.place)
        rows = opening.known if opening else {}
        self.known, self.faulty = {stem: rows[stem] for stem in self.stems if stem in rows}, set()
        self.find(select or self.selected)
        start = partial(self.plan_all, self.generation, stamp)
        if self.wanted in self.known:  # nobody waits: the first frame gets the processor for itself
            self.set_timer(PAUSE, start)
        else:
            self.call_after_refresh(start)

    def find(self, select: str | None = None) -> None:
        """The loads that hold every word typed, those named so first; without a choice the first is selected."""
        words = self.query_one("#find", Input).value.casefold().split()
        found = (stem for stem in self.stems if all(word in self._found_by(stem) for word in words))
        self.shown = sorted(found, key=lambda stem: _nearness(stem, words))
        self.wanted = select if select in self.shown else next(iter(self.shown), None)
        self.show(self.shown.index(self.wanted) if self.wanted else 0)

    def _found_by(self, stem: str) -> str:
        return f"{stem} {self._listed(stem).found_by}"

    def _listed(self, stem: str) -> Listed:
        known = self.known.get(stem)
        return waiting(stem) if known is None else known[self.session.style.system]

    @property
    def selected(self) -> str | None:
        """The load under the cursor."""
        row = self.query_one(TableView).row
        return self.shown[row] if row < len(self.shown) else None

    # --- showing -----------------------------------------------------------------------------------------

    def show(self, row: int | None = None) -> None:
        rows = tuple(self._row(stem) for stem in self.shown)
        self.query_one(TableView).show(Table(COLUMNS, RIGHT, rows), row=row)
        done, count = len(self.known) + len(self.faulty), len(self.stems)
        planning = f"planning {done} of {count}   " if done < count else ""
        self.query_one("#count", Static).update(Content(f"{planning}{len(self.shown)} of {count}"))
        self._title()
        self._below()

    def _row(self, stem: str) -> Row:
        if stem in self.faulty:
            return Row((stem, "", "", "-", "-", "fault of the program"), mark="unread")
        known = self._listed(stem)
        return Row(known.cells, mark=known.level)

    def _title(self) -> None:
        name = tidy(self.session.site_name, ascii_only=self.session.style.ascii)
        name += " (demo)" if self.session.packaged and "(demo)" not in name else ""
        right = f"{self.session.style.system}   ? help"
        width = max(self.size.width - len(right) - 3, 10)
        self.query_one("#title", Static).update(Content(f" {name:<{width}} {right}"))

    def _below(self) -> None:
        """Verdict and gravest caution of the load under the cursor; without loads, what to do."""
        width = max(self.size.width - 2, 10)
        lines = [DEMO] if self.session.packaged and self.size.height >= LEAST[1] else []
        stem = self.selected
        if not self.stems:
            lines = [error_text(InputError("site.no_loads"), self.session.style)]
        elif stem is None:
            lines.append("no load holds what is typed: Escape shows all")
        elif stem in self.known:
            lines += said_below(self._listed(stem), width)
        text = "\n".join(tidy(line, ascii_only=self.session.style.ascii) for line in lines)
        self.query_one("#below", Static).update(Content(text))

    def retell(self) -> None:
        self.show()

    def on_resize(self) -> None:
        super().on_resize()
        self._title()
        self.call_after_refresh(self.show)

    def take_over(self, session: Session, *, asked: bool = False) -> None:
        """The session is there; a load that was wanted meanwhile opens, unless a question stands before it."""
        self.session, self.ready = session, True
        wanted, self.opening_wanted = self.opening_wanted and not asked, False
        if wanted:
            self.say("")
            self.action_open()

    # --- planning in the background ----------------------------------------------------------------------

    @work(thread=True, exclusive=True, group="listing", exit_on_error=False)
    def plan_all(self, generation: int, stamp: str | None) -> None:
        """Plan every load that no row is known of, the one under the cursor first; keep the rows for the next start."""
        from lineplanner.files.library import Library
        from lineplanner.report.listing import list_load

        worker, library = get_current_worker(), Library(self.session.place)
        while not worker.is_cancelled and (stem := self._next()) is not None:
            self.at_work = stem
            found = list_load(library, stem, SYSTEMS, self.session.style)
            if not worker.is_cancelled:
                self.app.call_from_thread(self.planned, generation, stem, found)
            self._load_the_rest()
        self._load_the_rest()
        if not worker.is_cancelled and generation == self.generation:
            with contextlib.suppress(
                PlannerError
            ):  # of a site's file that was broken meanwhile nothing is kept
                self.kept.keep(library.place, stamp, dict(self.known), facts_of(library))

    def _load_the_rest(self) -> None:
        """What opening a load needs, loaded while the first one is being read."""
        if not (self.ready or self.prepared):
            from lineplanner.tui import session  # noqa: F401
            from lineplanner.tui.screens import load  # noqa: F401

            self.prepared = True
            self.post_message(self.Ready())

    def _next(self) -> str | None:
        missing = [stem for stem in self.stems if stem not in self.known and stem not in self.faulty]
        wanted = self.wanted
        return wanted if wanted in missing else next(iter(missing), None)

    def planned(self, generation: int, stem: str, found: Mapping[System, Listed]) -> None:
        """A load was planned; what belongs to an earlier reading is dropped."""
        if generation != self.generation:
            return
        self.known[stem] = found
        if stem == self.selected or len(self.known) + len(self.faulty) == len(self.stems):
            self.show()
        elif not self.waits:
            self.waits = True
            self.set_timer(PAUSE, self._show_more)

    def _show_more(self) -> None:
        """The rows that came since the last look; a long list is not drawn anew for each."""
        self.waits = False
        self.show()

    def on_worker_state_changed(self, event: Worker.StateChanged) -> None:
        """A fault of one load is said and kept; the others are planned all the same."""
        if event.worker.group != "listing" or event.state is not WorkerState.ERROR:
            return
        stem, error = self.at_work, event.worker.error
        if stem is not None and error is not None:
            self.faulty.add(stem)
            self.post_message(self.Fault(stem, error))
            self.show()
            self.plan_all(self.generation, None)

    # --- commands ----------------------------------------------------------------------------------------

    @on(Input.Changed, "#find")
    def _typed(self, event: Input.Changed) -> None:
        self.find(None if event.value.strip() else self.selected)

    @on(Input.Submitted, "#find")
    def _entered(self) -> None:
        self.action_open()

    @on(Find.HelpWanted)
    def _asked(self) -> None:
        self.action_help()

    @on(TableView.Moved, "#loads")
    def _moved(self) -> None:
        self.wanted = self.selected
        self._below()

    @on(TableView.Chosen, "#loads")
    def _chosen(self) -> None:
        self.action_open()

    def action_move(self, step: int) -> None:
        table = self.query_one(TableView)
        table.go(table.row + step)
        self.wanted = self.selected
        self._below()

    def action_clear(self) -> None:
        self.query_one("#find", Input).value = ""

    def action_again(self) -> None:
        self.read(self.selected)
        self.say("read again from disk")

    def action_open(self) -> None:
        stem = self.selected
        if stem is None:
            return
        if not self.ready:
            self.opening_wanted = True
            self.say("opening ...")
            return
        try:
            self.session.open(stem)
        except PlannerError as error:
            self.tell(f"{stem} cannot be read", error_text(error, self.session.style).splitlines())
            return
        self.enter()

    def enter(self, *, hanging: bool = False) -> None:
        """The screen of the load that the session has open; hanging: with its part in hand."""
        from lineplanner.tui.screens.load import LoadScreen

        self.app.push_screen(LoadScreen(self.session, hanging=hanging), self._back)

    def action_new(self) -> None:
        """A new load, asked for in a few questions."""
        if not self.ready:
            self.say("the site is being read ...")
            return
        from lineplanner.tui.screens.new_load import NewLoad

        NewLoad(self, partial(self.enter, hanging=True)).begin()

    def _back(self, _: object) -> None:
        """Back from a load: read again what was changed; what is typed next replaces what was found by."""
        self.read(self.session.name)
        self.query_one("#find", Find).action_select_all()

    def action_help(self) -> None:
        keys = [title for title, _ in self.commands()]
        self.tell("Loads", [*HELP, "", *keys])


def _nearness(stem: str, words: list[str]) -> int:
    """How near a name is to the words: begins with them, holds them, or is found by something else."""
    if not all(word in stem.casefold() for word in words):
        return 2
    return 0 if stem.casefold().startswith("".join(words[:1])) else 1


HELP = (
    "Each row says what to set for a load and whether it may run; they fill in as they are planned.",
    "Type to find: name, order, lot, recipe or tank. Up and down choose, Enter opens.",
    "",
    "The load's own screen shows the rack, the program, every check, the areas, the card and all",
    "cautions. There, ? asks any figure where it comes from.",
)
