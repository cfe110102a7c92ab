"""The whole program on a site of its own, driven key by key, its screen read as text."""

import asyncio
import shutil
from collections.abc import Awaitable, Callable
from pathlib import Path

from textual.pilot import Pilot

from lineplanner.files.site import SiteFolder
from lineplanner.files.starter import start
from lineplanner.report.style import Style
from lineplanner.tui.app import PlannerApp
from lineplanner.tui.opening import Opening
from lineplanner.tui.screens.loads import LoadsScreen

CHECKOUT = Path(__file__).parents[2]
Steps = Callable[[Pilot[int]], Awaitable[None]]


def site(folder: Path, *, without_loads: bool = False) -> Path:
    """A copy of the demo shop to write to."""
    start(folder)
    if without_loads:
        shutil.rmtree(folder / "rack_library" / "loads")
    return folder


def drive(
    steps: Steps,
    folder: Path = CHECKOUT,
    *,
    size: tuple[int, int] = (80, 24),
    memory: Path | None = None,
    style: Style | None = None,
    told: Callable[[str], None] = lambda _: None,
) -> PlannerApp:
    """Run steps once every load of the list is worked out."""
    style = style or Style("metric")
    place = SiteFolder(folder)
    opening = Opening(place, units=style.system, ascii_only=style.ascii, memory=memory)

    def kept(error: BaseException) -> str:
        told(repr(error))
        return f"kept: {error!r}"

    app = PlannerApp(opening, kept)

    async def run() -> None:
        async with app.run_test(size=size) as pilot:
            await listed(pilot)
            await steps(pilot)

    asyncio.run(run())
    app.close_session()
    return app


async def listed(pilot: Pilot[int]) -> None:
    """Wait until the session is there and every load is worked out."""
    for _ in range(400):
        screen = pilot.app.screen_stack[-1]
        loads = next((one for one in pilot.app.screen_stack if isinstance(one, LoadsScreen)), None)
        if loads is not None and loads.ready and len(loads.known) + len(loads.faulty) == len(loads.stems):
            break
        await pilot.pause(0.02)
    await pilot.pause()
    assert screen is not None


def text_on(pilot: Pilot[int]) -> str:
    """What the terminal shows, without any colour."""
    strips = pilot.app.screen._compositor.render_strips()
    return "\n".join("".join(segment.text for segment in strip).rstrip() for strip in strips)
