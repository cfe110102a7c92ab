"""The plot of a program in a running app."""

import asyncio
from collections.abc import Awaitable, Callable
from functools import cache
from pathlib import Path

import pytest
from textual.app import App, ComposeResult
from textual.pilot import Pilot
from textual.widgets import Input

from lineplanner.files.library import Library
from lineplanner.plan import Plan, plan
from lineplanner.report.plot import NOTHING, plot_of, reading_at
from lineplanner.report.style import Style
from lineplanner.tui.widgets.plot import ProgramPlot

LIBRARY = Library(Path(__file__).parents[2])
LOADS = sorted(LIBRARY.stems("load"))


@cache
def planned(load: str) -> Plan:
    return plan(LIBRARY.case(load))


class Shown(App[None]):
    """A plot before a field."""

    def __init__(self, load: str, share: float = 0.5, *, ascii_only: bool = False) -> None:
        super().__init__()
        self.made, self.first, self.style_ = planned(load), share, Style(ascii=ascii_only)
        self.read: list[float] = []

    def compose(self) -> ComposeResult:
        yield ProgramPlot(self.read.append, ascii_only=self.style_.ascii)
        yield Input(id="after")

    def said(self, share: float) -> str:
        reading = reading_at(self.made, share, self.style_)
        return "" if reading is None else reading.line

    def on_mount(self) -> None:
        self.plot.show(plot_of(self.made, self.style_), self.said, self.first)
        self.plot.focus()

    @property
    def plot(self) -> ProgramPlot:
        return self.query_one(ProgramPlot)

    @property
    def text(self) -> list[str]:
        return [self.plot.render_line(y).text for y in range(self.plot.size.height)]


def run(
    app: Shown, steps: Callable[[Shown, Pilot[None]], Awaitable[None]], size: tuple[int, int] = (80, 24)
) -> None:
    async def go() -> None:
        async with app.run_test(size=size) as pilot:
            await pilot.pause()
            await steps(app, pilot)

    asyncio.run(go())


@pytest.mark.parametrize("ascii_only", [False, True], ids=["braille", "ascii"])
@pytest.mark.parametrize("size", [(80, 24), (160, 50)], ids=str)
@pytest.mark.parametrize("load", ["valve-blocks-24", "rod-40x900", "brackets-chromic-24"])
def test_each_curve_has_its_own_axis_name_and_limit(
    load: str, size: tuple[int, int], *, ascii_only: bool
) -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        text = app.text
        assert {len(line) for line in text} == {app.plot.size.width}
        for series in plot_of(app.made, app.style_).series:
            assert any(line.lstrip().startswith(series.top) for line in text)
            assert any(f"{series.name}, {series.limit_text}" in line for line in text)
        assert any("*" in line for line in text) is ascii_only
        assert "".join(text).isascii() is ascii_only

    run(Shown(load, ascii_only=ascii_only), steps, size)


def test_the_last_line_reads_all_curves_at_the_cursor() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        assert app.text[-1].rstrip() == app.said(0.5)
        await pilot.press("end")
        assert app.text[-1].rstrip() == app.said(1.0)
        await pilot.press("home", "right")
        assert app.read[0:2] == [1.0, 0.0]
        assert 0.0 < app.read[2] < 0.05
        assert app.text[-1].rstrip() == app.said(app.plot.share)

    run(Shown("valve-blocks-24"), steps)


def test_the_moments_to_watch_stand_under_the_curves_and_n_goes_through_them() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        watch = next(line for line in app.text if line.startswith("watch"))
        assert [c for c in watch if c.isdigit()] == ["1", "2", "3", "4", "5"]
        marks = [mark.at for mark in plot_of(app.made, app.style_).marks]
        await pilot.press("n", "n", "N")
        assert app.read == [marks[0], marks[1], marks[0]]

    run(Shown("rod-40x900", 0.0), steps)


def test_a_click_sets_the_cursor() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.click(app.plot, offset=(app.plot.size.width - 1, 3))
        assert app.read == [1.0]
        await pilot.click(app.plot, offset=(0, 3))  # on the axis
        assert app.read == [1.0]

    run(Shown("valve-blocks-24"), steps)


def test_a_stop_is_said_in_place_of_curves() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        assert app.text[0].startswith(NOTHING)
        await pilot.press("right", "n", "end")

    run(Shown("vent-panels-24"), steps)


@pytest.mark.parametrize("load", LOADS)
@pytest.mark.parametrize("size", [(40, 12), (10, 5), (1, 1)], ids=str)
def test_no_size_crashes_it(load: str, size: tuple[int, int]) -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.resize_terminal(*size)
        await pilot.pause()
        await pilot.press("right", "end")
        assert {len(line) for line in app.text} <= {app.plot.size.width}

    run(Shown(load), steps)


def test_tab_leaves_the_plot() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.press("tab")
        assert app.focused is not None
        assert app.focused.id == "after"

    run(Shown("valve-blocks-24"), steps)
