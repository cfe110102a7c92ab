"""A change repaints only the lines that it made others; a change of looks repaints all of them."""

import asyncio

from rich.segment import Segment
from textual.app import App, ComposeResult
from textual.geometry import Region
from textual.strip import Strip

from lineplanner.tui.widgets.kept_lines import KeptLines


class Words(KeptLines):
    """Lines of words; notes what was asked to be repainted."""

    def __init__(self) -> None:
        super().__init__()
        self.words = ["one", "two", "three", "four"]
        self.drawn = 0
        self.repainted: list[tuple[Region, ...]] = []

    def draw_line(self, y: int) -> Strip:
        self.drawn += 1
        return Strip([Segment(self.words[y] if y < len(self.words) else "", self.look())])

    def refresh(self, *regions: Region, **how: bool) -> "Words":
        self.repainted.append(regions)
        return super().refresh(*regions, **how)


class Page(App[None]):
    def compose(self) -> ComposeResult:
        yield Words()


def seen(change: str) -> tuple[list[tuple[Region, ...]], int]:
    """What a change repaints, and how many lines were drawn for it."""
    found: list[tuple[Region, ...]] = []
    drawn = 0

    async def run() -> None:
        nonlocal drawn
        page = Page()
        async with page.run_test(size=(20, 6)) as pilot:
            widget = page.query_one(Words)
            await pilot.pause()
            widget.repainted.clear()
            widget.drawn = 0
            if change == "a word":
                widget.words[2] = "3"
                widget.redraw()
            elif change == "two apart":
                widget.words[0], widget.words[3] = "1", "4"
                widget.redraw()
            elif change == "later":
                widget.words[1] = "2"
                widget.redraw_later()
                widget.redraw_later()
                assert not widget.repainted
            elif change == "none":
                widget.redraw()
            elif change == "looks":
                widget.refresh()
            await pilot.pause()
            found.extend(widget.repainted)
            drawn = widget.drawn
            text = ["".join(s.text for s in widget.render_line(y)).strip() for y in range(4)]
            assert text == widget.words

    asyncio.run(run())
    return found, drawn


def test_one_line_that_changed_is_repainted_alone() -> None:
    regions = [region for one in seen("a word")[0] for region in one]
    assert regions == [Region(0, 2, 20, 1)]


def test_lines_apart_are_repainted_apart() -> None:
    regions = [region for one in seen("two apart")[0] for region in one]
    assert regions == [Region(0, 0, 20, 1), Region(0, 3, 20, 1)]


def test_what_is_put_off_is_done_once() -> None:
    assert seen("later")[0] == [(Region(0, 1, 20, 1),)]


def test_nothing_is_repainted_where_nothing_changed() -> None:
    assert seen("none")[0] == []


def test_a_change_of_looks_draws_every_line_anew() -> None:
    repainted, drawn = seen("looks")
    assert repainted == [()]
    assert drawn == 6
