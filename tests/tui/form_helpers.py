"""Sessions on the demo shop and a small program around one screen, for the tests of forms."""

import asyncio
from collections.abc import Awaitable, Callable
from pathlib import Path
from typing import ClassVar

from textual import events
from textual.pilot import Pilot
from textual.screen import Screen

from lineplanner.files.library import Library
from lineplanner.report.style import Style
from lineplanner.tui import app
from lineplanner.tui.app import PlannerApp
from lineplanner.tui.session import Session

CHECKOUT = Path(__file__).parents[2]


def session_on(load: str) -> Session:
    """A session with a load open, that keeps nothing on disk."""
    session = Session(Library(CHECKOUT), style=Style("metric", ascii=True), memory=None)
    session.open(load)
    return session


class OneScreen(PlannerApp):
    """The program with one screen in place of the opening one."""

    CSS_PATH: ClassVar[list[str | Path]] = [Path(app.__file__).parent / path for path in PlannerApp.CSS_PATH]

    def __init__(self, session: Session, screen: Screen[None]) -> None:
        super().__init__(session, str)
        self.shown = screen

    def on_mount(self, event: events.Mount) -> None:
        event.prevent_default()  # the opening screen stays away
        self.push_screen(self.shown)


def text_on(pilot: Pilot[int]) -> str:
    """What the terminal shows, without any colour."""
    strips = pilot.app.screen._compositor.render_strips()
    return "\n".join("".join(segment.text for segment in strip).rstrip() for strip in strips)


def drive(
    session: Session,
    screen: Screen[None],
    steps: Callable[[Pilot[int]], Awaitable[None]],
    size: tuple[int, int] = (80, 24),
) -> None:
    """Run steps on a screen in a terminal of a size."""

    async def run() -> None:
        async with OneScreen(session, screen).run_test(size=size) as pilot:
            await pilot.pause()
            await steps(pilot)

    asyncio.run(run())
