"""The rack canvas in a running app: keys, mouse, repaint, sizes."""

import asyncio
from collections.abc import Awaitable, Callable
from dataclasses import replace
from functools import cache
from pathlib import Path

import pytest
from textual.app import App, ComposeResult
from textual.geometry import Region
from textual.pilot import Pilot
from textual.widgets import Input

from lineplanner.files.library import Library
from lineplanner.inputs.load import Hang
from lineplanner.plan import plan
from lineplanner.report.picture import Scene, scene_of
from lineplanner.tui.widgets.rack_canvas import RackCanvas

LIBRARY = Library(Path(__file__).parents[2])


@cache
def scene(load: str) -> Scene:
    return scene_of(plan(LIBRARY.case(load)))


@cache
def many() -> Scene:
    """200 blocks at free positions."""
    case = LIBRARY.case("valve-blocks-24")
    spots = tuple((0.1 * column, 0.3 + 0.15 * row) for row in range(10) for column in range(20))
    load = replace(case.load, hangs=(Hang(part="valve-block", at=spots),))
    return scene_of(plan(replace(case, load=load, rack=replace(case.rack, hanging="free", tips=()))))


class Shown(App[None]):
    """A canvas between two fields."""

    def __init__(self, shown: Scene | None, selected: int | None = 0, *, ascii_only: bool = False) -> None:
        super().__init__()
        self.shown, self.first, self.ascii_only = shown, selected, ascii_only
        self.picked: list[int | None] = []

    def compose(self) -> ComposeResult:
        yield Input(id="before")
        yield RackCanvas(self.picked.append, ascii_only=self.ascii_only)
        yield Input(id="after")

    def on_mount(self) -> None:
        self.canvas.show(self.shown, self.first)
        self.canvas.focus()

    @property
    def canvas(self) -> RackCanvas:
        return self.query_one(RackCanvas)

    @property
    def text(self) -> list[str]:
        return [self.canvas.render_line(y).text for y in range(self.canvas.size.height)]


Steps = Callable[[Shown, Pilot[None]], Awaitable[None]]


def run(app: Shown, steps: Steps, size: tuple[int, int] = (80, 24)) -> None:
    async def go() -> None:
        async with app.run_test(size=size) as pilot:
            await pilot.pause()
            await steps(app, pilot)

    asyncio.run(go())


@pytest.mark.parametrize("size", [(80, 24), (160, 50)], ids=str)
@pytest.mark.parametrize("load", ["valve-blocks-24", "rod-40x900", "vent-panels-24", "relay-lids-20"])
def test_a_demo_load_is_drawn_at_both_sizes(load: str, size: tuple[int, int]) -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        text = app.text
        assert {len(line) for line in text} == {app.canvas.size.width}
        assert any("solution level" in line and "~~~" in line for line in text)
        assert any("[" in line for line in text) is bool(scene(load).parts)

    run(Shown(scene(load)), steps, size)


def test_arrows_pick_the_neighbour_and_tell_in_the_same_handler() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        app.canvas.action_toward("right")
        app.canvas.action_toward("down")
        assert app.picked == [1, 5]  # before any frame
        assert app.canvas.selected == 5
        app.canvas.action_toward("left")
        app.canvas.action_toward("left")
        assert app.picked == [1, 5, 4]  # at the edge nothing is picked

    run(Shown(scene("valve-blocks-24")), steps)


def test_keys_reach_the_canvas() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.press("right", "n", "N", "up", "down")
        assert app.picked == [1, 2, 1, 5]

    run(Shown(scene("valve-blocks-24")), steps)


def test_next_and_previous_go_around() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        app.canvas.previous()
        app.canvas.next()
        assert app.picked == [23, 0]

    run(Shown(scene("valve-blocks-24")), steps)


def test_selecting_from_outside_does_not_call_back() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        app.canvas.select(3)
        assert app.picked == []
        assert app.canvas.selected == 3
        app.canvas.select(99)
        assert app.canvas.selected is None

    run(Shown(scene("valve-blocks-24")), steps)


def test_tab_leaves_the_canvas_both_ways() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.press("tab")
        assert app.focused is not None
        assert app.focused.id == "after"
        await pilot.press("shift+tab", "shift+tab")
        assert app.focused.id == "before"

    run(Shown(scene("valve-blocks-24")), steps)


def test_a_click_picks_what_is_under_it_and_an_empty_place_changes_nothing() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        canvas = app.canvas
        cells = canvas._built()
        assert cells is not None
        for owner in (7, 20):
            left, top, right, bottom = cells.box_of(owner)
            await pilot.click(canvas, offset=((left + right) // 2, (top + bottom) // 2))
            assert app.picked[-1] == owner
        await pilot.click(canvas, offset=(0, 5))
        assert app.picked == [7, 20]

    run(Shown(scene("valve-blocks-24")), steps, (160, 50))


def test_a_second_click_reaches_the_part_behind() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        cells = app.canvas._built()
        assert cells is not None
        left, top, right, bottom = cells.box_of(4)
        for _ in range(3):
            await pilot.click(app.canvas, offset=((left + right) // 2, (top + bottom) // 2))
        assert app.picked == [4, 5, 4]
        assert "[" in "".join(app.text)

    run(Shown(scene("vent-panels-24")), steps, (160, 50))


def test_a_selection_repaints_only_the_old_and_the_new_part() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        canvas, asked = app.canvas, []
        before = app.text
        refresh = canvas.refresh

        def noted(*regions: Region, **options: bool) -> RackCanvas:
            asked.extend(regions)
            return refresh(*regions, **options)

        canvas.refresh = noted  # type: ignore[method-assign]
        canvas.select(22)
        assert len(asked) == 2
        assert sum(region.area for region in asked) < canvas.size.area / 20
        changed = [y for y, (old, new) in enumerate(zip(before, app.text, strict=True)) if old != new]
        assert changed
        assert all(any(region.y <= y < region.bottom for region in asked) for y in changed)

    run(Shown(scene("valve-blocks-24")), steps, (160, 50))


def test_two_parts_in_one_row_are_repainted_as_one_region() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        asked: list[Region] = []
        app.canvas.refresh = lambda *regions, **_: asked.extend(regions)  # type: ignore[method-assign]
        app.canvas.select(1)
        assert len(asked) == 1

    run(Shown(scene("valve-blocks-24")), steps)


def test_lines_are_kept_until_they_change() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        canvas = app.canvas
        kept = [canvas.render_line(y) for y in range(canvas.size.height)]
        canvas.select(1)
        same = [canvas.render_line(y) is line for y, line in enumerate(kept)]
        assert same.count(False) <= 4
        assert same.count(True) > canvas.size.height / 2

    run(Shown(scene("valve-blocks-24")), steps)


@pytest.mark.parametrize("size", [(40, 12), (10, 5), (1, 1), (200, 60)], ids=str)
def test_no_size_crashes_it(size: tuple[int, int]) -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        for width, height in (size, (80, 24), size):
            await pilot.resize_terminal(width, height)
            await pilot.pause()
            await pilot.press("n")
            assert {len(line) for line in app.text} <= {app.canvas.size.width}

    run(Shown(scene("valve-blocks-24")), steps)


@pytest.mark.parametrize("shown", [None, "relay-lids-20"], ids=["nothing", "no part"])
def test_without_parts_keys_and_clicks_do_nothing(shown: str | None) -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        await pilot.press("n", "N", "left", "down")
        await pilot.click(app.canvas, offset=(30, 8))
        app.canvas.zoom(2.0)
        app.canvas.fit()
        assert app.picked == []

    run(Shown(scene(shown) if shown else None), steps)


def test_two_hundred_parts_are_drawn_and_cycled() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        assert len(many().parts) == 200
        assert any("solution level" in line for line in app.text)
        await pilot.press("N", "up")
        assert app.picked == [199, 179]

    run(Shown(many()), steps)


def test_another_scene_of_the_same_rack_keeps_the_view_and_forgets_a_part_that_is_gone() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        canvas = app.canvas
        canvas.select(20)
        canvas.zoom(3.0)
        near = canvas._view
        canvas.show(replace(scene("valve-blocks-24"), level=-0.3), 20)
        assert canvas._view is near
        canvas.show(scene("rod-40x900"), 20)
        assert canvas.selected is None
        assert canvas._view is None

    run(Shown(scene("valve-blocks-24")), steps)


def test_zoomed_to_a_part_it_is_larger_and_fit_shows_all_again() -> None:
    async def steps(app: Shown, _: Pilot[None]) -> None:
        canvas = app.canvas
        fitted = app.text
        small = canvas._built().box_of(0)  # type: ignore[union-attr]
        canvas.zoom(4.0)
        large = canvas._built().box_of(0)  # type: ignore[union-attr]
        assert large[2] - large[0] > 2 * (small[2] - small[0])
        assert any("[" in line for line in app.text)
        canvas.fit()
        assert app.text == fitted

    run(Shown(scene("valve-blocks-24")), steps)


def test_a_theme_change_recolours_what_is_drawn() -> None:
    async def steps(app: Shown, pilot: Pilot[None]) -> None:
        def colours() -> set[str]:
            strips = (app.canvas.render_line(y) for y in range(app.canvas.size.height))
            return {str(segment.style) for strip in strips for segment in strip}

        before = colours()
        app.theme = "textual-light"
        await pilot.pause()
        assert colours() != before

    run(Shown(scene("valve-blocks-24")), steps)


def test_text_on_the_canvas_cannot_be_selected_with_the_mouse() -> None:
    assert RackCanvas.ALLOW_SELECT is False


@pytest.mark.parametrize("ascii_only", [False, True], ids=["braille", "ascii"])
def test_without_colours_the_capture_tells_selected_dry_and_stopped_off(
    monkeypatch: pytest.MonkeyPatch, *, ascii_only: bool
) -> None:
    monkeypatch.setenv("NO_COLOR", "1")
    case = LIBRARY.case("pistons-16-masked")
    dry = scene_of(plan(replace(case, load=replace(case.load, solution_drop=0.42))))

    async def steps(app: Shown, _: Pilot[None]) -> None:
        text = app.text
        assert any("[" in line and "]" in line for line in text)
        assert any("x stopped off" in line for line in text)
        assert {hung.wetness for hung in dry.parts[:4]} == {"dry"}
        if ascii_only:
            cells = app.canvas._built()
            assert cells is not None
            left, top, right, bottom = cells.box_of(0)
            of_dry = "".join(line[left : right + 1] for line in text[top : bottom + 1])
            left, top, right, bottom = cells.box_of(12)
            of_wet = "".join(line[left : right + 1] for line in text[top : bottom + 1])
            assert "." in of_dry
            assert "#" not in of_dry
            assert "#" in of_wet

    run(Shown(dry, ascii_only=ascii_only), steps, (120, 40))
