"""The screens as one program: opening, asking before work is lost, colours, units, the way out."""

from __future__ import annotations

import asyncio
import contextlib
import gc
import os
import signal
import sys
from collections.abc import Callable
from functools import partial
from time import monotonic
from typing import TYPE_CHECKING, ClassVar

from textual import events
from textual.app import App
from textual.binding import Binding, BindingType
from textual.widgets import Input

from lineplanner.errors import PlannerError
from lineplanner.files.memory import memory_folder
from lineplanner.tui import theme
from lineplanner.tui.opening import Opening
from lineplanner.tui.screens.ask import AskScreen
from lineplanner.tui.screens.base import PlannerScreen
from lineplanner.tui.screens.loads import LoadsScreen
from lineplanner.tui.screens.why import why_screen

if TYPE_CHECKING:
    from lineplanner.files.site import SiteFolder
    from lineplanner.tui.session import Session
    from lineplanner.units import System

Kept = Callable[[BaseException], str]
"""Keeps a fault in a log and says so in a sentence."""
FAULT, HUNG_UP = 3, 129
TIDY = 2.0  # s between two looks whether there is time to collect
UNPROTECTED = "no journal can be written: save often, unsaved work would be lost with the program"


class PlannerApp(App[int], inherit_bindings=False):
    """The program on a terminal."""

    TITLE = "lineplanner"
    # All that the first screen needs, so that styles are worked out once before the first frame.
    CSS_PATH = ["app.tcss", "widgets/table.tcss", "widgets/hints.tcss", "screens/loads.tcss"]  # noqa: RUF012
    ENABLE_COMMAND_PALETTE = False
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+t", "units", "units", priority=True),
        # Without a word, so in no list of keys: flow control may take the one, copying the other.
        Binding("ctrl+q", "quit", show=False, priority=True),
        Binding("ctrl+c", "quit", show=False),
        Binding("ctrl+l", "light", "light or dark colours", show=False),
    ]

    def __init__(self, session: Session | Opening, kept: Kept, *, plain_colours: bool = False) -> None:
        super().__init__(ansi_color=True if plain_colours else None)
        self.session, self.kept = session, kept
        self.keeps_journal = isinstance(session, Opening) and session.memory is not None
        self.fault = ""
        self.pressed = False
        self.last_key = 0.0
        for one in theme.THEMES:
            self.register_theme(one)
        # Set before anybody watches it: the styles are then worked out once for it, not twice.
        self.set_reactive(PlannerApp.theme, theme.PLAIN if plain_colours else theme.DARK)
        self.stylesheet.set_variables(self.get_css_variables())
        if session.style.ascii:
            plain_bars()

    def get_theme_variable_defaults(self) -> dict[str, str]:
        return theme.colours(theme.PLAIN if self.native_ansi_color else theme.DARK)

    def on_mount(self) -> None:
        self._listen_for_hang_up()
        self.set_interval(TIDY, self._tidy)
        self.push_screen(LoadsScreen(self.session))
        if not isinstance(self.session, Opening):
            self.call_after_refresh(self._begin, self.session)

    def on_loads_screen_ready(self) -> None:
        if isinstance(self.session, Opening):
            self.session = self.session.session()
            self._begin(self.session)

    def _begin(self, session: Session) -> None:
        """The session takes over; work of an earlier run is offered first."""
        recovery = session.recovery
        for screen in self.screen_stack:
            if isinstance(screen, LoadsScreen):
                screen.take_over(session, asked=recovery is not None)
        if recovery is not None:
            self._offer_recovery(session, recovery.lines)
        elif self.keeps_journal and not session.protected:
            self.say(UNPROTECTED, grave=True)

    def say(self, text: str, *, grave: bool = False) -> None:
        """A sentence on the last line of the screen, if it is one of ours."""
        if isinstance(self.screen, PlannerScreen):
            self.screen.say(text, grave=grave)

    def _tidy(self) -> None:
        """Collect what the last keys left behind, while nobody waits for an answer."""
        if self.pressed and monotonic() - self.last_key > TIDY / 2:
            self.pressed = False
            gc.collect(1)

    async def on_event(self, event: events.Event) -> None:
        if isinstance(event, events.InputEvent):
            self.pressed, self.last_key = True, monotonic()
        # A key comes by twice, the second time when it is acted on: one repaint then. A field may keep it.
        if (
            isinstance(event, events.Key)
            and isinstance(self.screen, PlannerScreen)
            and (event.is_forwarded or isinstance(self.focused, Input))
        ):
            self.screen.key_comes()
        await super().on_event(event)

    # --- work that was not saved -------------------------------------------------------------------------

    def _offer_recovery(self, session: Session, lines: tuple[str, ...]) -> None:
        answers = (
            ("r", "recover it: it is in force again, not saved", "recover"),
            ("d", "discard it for good", "discard"),
            ("q", "leave it for the next start", "later"),
        )
        ask = AskScreen(
            "The last time ended before this was saved:", lines, answers, ascii_only=session.style.ascii
        )
        self.push_screen(ask, partial(self._recover, session))

    def _recover(self, session: Session, answer: str | None) -> None:
        if answer == "discard":
            session.discard_recovery()
        if answer != "recover":
            return
        try:
            session.recover()
        except PlannerError as error:
            if isinstance(self.screen, PlannerScreen):
                self.screen.cannot(error)
            return
        if session.name and isinstance(self.screen, LoadsScreen):
            self.screen.enter()

    async def action_quit(self) -> None:
        """Leave; work that is not saved is asked about."""
        if isinstance(self.screen, AskScreen):
            return
        if isinstance(self.session, Opening) or not self.session.dirty:
            self.exit(0)
            return
        answers = (
            ("s", "save it, then leave", "save"),
            ("d", "discard it", "discard"),
            ("q", "stay", "stay"),
        )
        lines = [f"{kind} {stem}" for kind, stem in self.session.dirty]
        ask = AskScreen("Not saved:", lines, answers, ascii_only=self.session.style.ascii)
        self.push_screen(ask, partial(self._leave, self.session))

    def _leave(self, session: Session, answer: str | None) -> None:
        try:
            if answer == "save":
                session.save()
            elif answer == "discard":
                session.revert()
        except PlannerError as error:
            if isinstance(self.screen, PlannerScreen):
                self.screen.cannot(error)
            return
        if answer in ("save", "discard"):
            self.exit(0)

    # --- everywhere --------------------------------------------------------------------------------------

    def action_units(self) -> None:
        """Metric or US, on every screen at once."""
        if isinstance(self.screen, PlannerScreen):
            self.screen.key_comes()
        self.session.toggle_units()
        for screen in self.screen_stack:
            retell = getattr(screen, "retell", None)
            if retell is not None:
                retell()

    def action_light(self) -> None:
        if self.native_ansi_color:
            self.say("the colours here are the terminal's own")
        else:
            self.theme = theme.LIGHT if self.theme == theme.DARK else theme.DARK

    def on_planner_screen_fault(self, event: PlannerScreen.Fault) -> None:
        self.say(f"{event.what}: {self.kept(event.error)}", grave=True)

    def on_record_form_why_wanted(self, event: object) -> None:
        if not isinstance(self.session, Opening):
            figure = getattr(event, "figure", "")
            self.push_screen(why_screen(self.session.plan, figure, self.session.style))

    # --- the way out -------------------------------------------------------------------------------------

    def _listen_for_hang_up(self) -> None:
        """A dropped line or a polite request to end: the journal is kept, nothing is asked."""
        loop = asyncio.get_running_loop()
        for name in ("SIGHUP", "SIGTERM"):
            number = getattr(signal, name, None)
            if number is not None:
                with contextlib.suppress(RuntimeError, ValueError):  # Windows loops take no signal handlers
                    loop.add_signal_handler(number, self._hung_up)

    def _hung_up(self) -> None:
        self.close_session()
        self.exit(HUNG_UP)

    def close_session(self) -> None:
        """What is not saved stays in the journal."""
        if not isinstance(self.session, Opening):
            self.session.close()

    def _fatal_error(self) -> None:
        """A fault of the program: kept in a log and told in a sentence, never as a traceback."""
        if self._exception is not None and not self.fault:
            self.fault = self.kept(self._exception)
        self._close_messages_no_wait()


def plain_bars() -> None:
    """Scroll bars in plain letters."""
    from textual.scrollbar import ScrollBarRender

    ScrollBarRender.VERTICAL_BARS = [" "] * 8
    ScrollBarRender.HORIZONTAL_BARS = [" "] * 8


def colours_wanted() -> bool:
    """Whether the terminal has our colours and nobody declined them."""
    from rich.console import Console

    if os.environ.get("NO_COLOR"):
        return False
    return Console(file=sys.__stderr__, force_terminal=True).color_system in ("256", "truecolor", "windows")


def run(place: SiteFolder, units: System | None, kept: Kept, *, ascii_only: bool = False) -> int:
    """Open the screens; the exit code. Raises FilesError where the site cannot be used at all."""
    opening = Opening(place, units=units, ascii_only=ascii_only, memory=memory_folder())
    if os.environ.get("SSH_CONNECTION"):
        os.environ.setdefault("TEXTUAL_ANIMATIONS", "none")
    app = PlannerApp(opening, kept, plain_colours=not colours_wanted())
    gc.freeze()  # what is loaded by now stays: nothing of it is looked through before the first frame
    try:
        code = app.run()
    finally:
        app.close_session()
    if app.fault:
        sys.stderr.write(f"lineplanner: {app.fault}\n")
        return FAULT
    return app.return_code or code or 0
