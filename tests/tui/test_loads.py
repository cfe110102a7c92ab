"""The opening screen: what to set is in the list, found by typing, opened by Enter."""

from pathlib import Path

import pytest
from textual.pilot import Pilot
from textual.widgets import Input

from lineplanner.files.library import Library
from lineplanner.plan import plan
from lineplanner.report.listing import listed as listed_of
from lineplanner.report.style import Style
from lineplanner.tui.screens.load import LoadScreen
from lineplanner.tui.screens.loads import LoadsScreen
from lineplanner.tui.screens.why import TextScreen
from tests.tui.driving import CHECKOUT, drive, listed, site, text_on

METRIC = Style("metric")


def test_each_row_says_what_the_plan_says() -> None:
    library = Library(CHECKOUT)

    async def steps(pilot: Pilot[int]) -> None:
        shown = text_on(pilot)
        for stem in library.stems("load"):
            line = next(line for line in shown.splitlines() if f" {stem} " in line)
            cells = listed_of(plan(library.case(stem)), METRIC).cells
            for cell in (cells[2], cells[3], cells[4], cells[5].split(",")[0]):
                assert cell in line, stem

    drive(steps, size=(160, 50))


def test_the_selected_load_shows_verdict_and_gravest_caution_below() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        shown = text_on(pilot)
        assert "> valve-blocks-24" in shown
        assert " CHECKS MET  tightest: " in shown
        assert " DANGER " in shown
        await pilot.press("down")
        await pilot.pause()
        assert "> vent-panels-24" in text_on(pilot)
        assert " STOP  rectifier rating " in text_on(pilot)

    drive(steps)


def test_typing_finds_by_name_order_recipe_and_tank() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        screen = pilot.app.screen
        assert isinstance(screen, LoadsScreen)
        await pilot.press(*"chrome")
        assert screen.shown == ["guide-pins-flash", "rod-40x900", "seal-plates-4", "strut-pins-4340"]
        await pilot.press("escape", *"24817")
        assert screen.shown == ["valve-blocks-24"]
        await pilot.press("enter")
        await pilot.pause()
        assert isinstance(pilot.app.screen, LoadScreen)
        await pilot.press("q", *"lug-")
        await pilot.pause()
        assert screen.shown == ["lug-mix"]  # typed over what was found by before
        await pilot.press("question_mark")
        await pilot.pause()
        assert isinstance(pilot.app.screen, TextScreen)

    drive(steps)


def test_a_find_that_holds_nothing_says_so_and_escape_shows_all() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        for text in ("[/b]", "[bold]x", "\x1b[2J", "x" * 5000, "9**9**9"):
            pilot.app.screen.query_one("#find", Input).value = text
            await pilot.pause()
            assert "no load holds what is typed" in text_on(pilot)
            await pilot.press("enter", "escape")
            await pilot.pause()
            assert "16 of 16" in text_on(pilot)

    drive(steps)


def test_a_load_that_cannot_be_read_says_so_in_its_row_and_opens_as_its_problems(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop")
    load = folder / "rack_library" / "loads" / "lug-mix.toml"
    load.write_text(load.read_text(encoding="utf-8").replace("spline-24", "spline-25"), encoding="utf-8")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"lug-mix")
        await pilot.pause()
        assert "cannot be read" in text_on(pilot)
        assert "`spline-25` is not a rack of this site" in " ".join(text_on(pilot).split())
        await pilot.press("enter")
        await pilot.pause()
        assert isinstance(pilot.app.screen, TextScreen)
        assert "lug-mix cannot be read" in text_on(pilot)

    drive(steps, folder, size=(160, 30))


def test_names_are_shown_as_typed_never_as_markup_or_commands_of_the_terminal(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop")
    load = folder / "rack_library" / "loads" / "lugs-2024.toml"
    text = load.read_text(encoding="utf-8")
    load.write_text(text.replace('name = "lugs', 'name = "[/b] [red]lugs'), encoding="utf-8")
    recipe = folder / "configs" / "recipes" / "hardcoat-50-2024.toml"
    text = recipe.read_text(encoding="utf-8")
    recipe.write_text(text.replace('name = "hard coat', 'name = "[/foo] hard coat'), encoding="utf-8")

    async def steps(pilot: Pilot[int]) -> None:
        assert "[/foo] hard coat 50 um, 2024" in text_on(pilot)
        await pilot.press(*"lugs-2024", "enter", "5")
        await pilot.pause()
        assert "[/b] [red]lugs" in text_on(pilot)

    drive(steps, folder, size=(120, 40))


def test_a_site_without_loads_says_what_to_do(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop", without_loads=True)

    async def steps(pilot: Pilot[int]) -> None:
        assert "this site holds no load. Write one" in text_on(pilot)
        await pilot.press("enter", "down")

    drive(steps, folder)


def test_the_load_worked_on_last_is_selected_at_the_next_start(tmp_path: Path) -> None:
    async def work(pilot: Pilot[int]) -> None:
        await pilot.press(*"rod-40", "enter", "u")
        await pilot.pause()

    async def again(pilot: Pilot[int]) -> None:
        assert "> rod-40x900" in text_on(pilot)

    folder = site(tmp_path / "shop")
    drive(work, folder, memory=tmp_path / "memory")
    drive(again, folder, memory=tmp_path / "memory")


def test_work_that_was_not_saved_is_offered_with_what_differs_and_comes_back(tmp_path: Path) -> None:
    folder, memory = site(tmp_path / "shop"), tmp_path / "memory"

    async def work(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "minus")
        await pilot.pause()
        pilot.app._hung_up()  # type: ignore[attr-defined]

    async def again(pilot: Pilot[int]) -> None:
        assert "The last time ended before this was saved" in text_on(pilot)
        assert "F1-F4" in text_on(pilot)
        await pilot.press("r")
        await pilot.pause()
        assert isinstance(pilot.app.screen, LoadScreen)
        assert "* not saved" in text_on(pilot)
        assert "part 1 of 23" in text_on(pilot)

    drive(work, folder, memory=memory)
    drive(again, folder, memory=memory)


def test_a_fault_in_one_load_is_said_and_the_others_are_planned_all_the_same(
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    from lineplanner.report import listing

    real = listing.list_load

    def faulty(*arguments: object) -> object:
        if arguments[1] == "coupons-24":
            raise ZeroDivisionError
        return real(*arguments)  # type: ignore[arg-type]

    monkeypatch.setattr(listing, "list_load", faulty)

    async def steps(pilot: Pilot[int]) -> None:
        await listed(pilot)
        assert "fault of the program" in text_on(pilot)
        screen = pilot.app.screen_stack[1]
        assert isinstance(screen, LoadsScreen)
        assert screen.faulty == {"coupons-24"}
        assert len(screen.known) == 15

    drive(steps)


def test_what_is_named_as_typed_comes_first_and_is_selected() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        screen = pilot.app.screen
        assert isinstance(screen, LoadsScreen)
        await pilot.press("down", *"pump")
        await pilot.pause()
        assert screen.shown[0] == "pump-covers-12"
        assert "castings-a356-12" in screen.shown[1:]  # its part is a pump's
        assert "> pump-covers-12" in text_on(pilot)
        await pilot.press("escape", *"pins")
        await pilot.pause()
        assert screen.shown[:2] == ["guide-pins-flash", "strut-pins-4340"]
        await pilot.press("down", "escape")
        await pilot.pause()
        assert screen.selected == "strut-pins-4340"  # stays selected among all
        assert screen.shown == screen.stems

    drive(steps)


def test_flow_control_keys_are_in_no_list_of_keys_and_the_way_out_is_f10() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        assert "F10 quit" in text_on(pilot)
        assert "ctrl+q" not in text_on(pilot)
        titles = [title for title, _ in pilot.app.screen.commands()]  # type: ignore[attr-defined]
        assert [title for title in titles if "quit" in title] == ["quit   F10"]
        await pilot.press("enter")
        await pilot.pause()
        titles = [title for title, _ in pilot.app.screen.commands()]  # type: ignore[attr-defined]
        assert [title for title in titles if "quit" in title] == ["quit the program   Q"]
        await pilot.press("ctrl+q")

    assert drive(steps).return_code == 0
