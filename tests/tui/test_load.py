"""The screen of a load: its figures are the report's, its keys do what the hints say."""

from pathlib import Path

import pytest
from textual.pilot import Pilot

from lineplanner.files.library import Library
from lineplanner.plan import Plan, plan
from lineplanner.report.card import card_lines
from lineplanner.report.cautions_text import cautions_in_full
from lineplanner.report.checks_text import checks_lines
from lineplanner.report.explain import explanation
from lineplanner.report.setpoints import caution_line, setpoint_lines, verdict_line
from lineplanner.report.style import Style
from lineplanner.report.view_tables import program_table
from lineplanner.report.words.names import short_status
from lineplanner.sources import Status
from lineplanner.tui.screens.ask import AskScreen
from lineplanner.tui.screens.load import LoadScreen
from lineplanner.tui.screens.loads import LoadsScreen
from lineplanner.tui.session import Session
from lineplanner.units import System
from tests.tui.driving import CHECKOUT, drive, site, text_on

METRIC, US = Style("metric"), Style("us")


def planned(stem: str) -> Plan:
    return plan(Library(CHECKOUT).case(stem))


def assert_head(shown: str, made: Plan, style: Style, width: int) -> None:
    """Setpoints, verdict and caution of a plan stand at the top, to the letter."""
    top = [line.removeprefix(" ") for line in shown.splitlines()[1:9]]
    said = setpoint_lines(made, style, width)
    said += [verdict_line(made, style, width), caution_line(made, style, width=width)]
    assert top[: len(said)] == said


@pytest.mark.parametrize("stem", ["rod-40x900", "vent-panels-24"])
def test_the_head_is_the_reports_own_text_in_both_unit_systems(stem: str) -> None:
    made = planned(stem)

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*stem[:4], "enter")
        await pilot.pause()
        assert_head(text_on(pilot), made, METRIC, 78)
        await pilot.press("u")
        assert_head(text_on(pilot), made, US, 78)

    drive(steps)


def test_every_view_shows_the_reports_own_figures() -> None:
    made = planned("valve-blocks-24")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "2")
        await pilot.pause()
        shown = text_on(pilot)
        for row in program_table(made, METRIC).rows:
            assert any(all(cell in line for cell in row.cells) for line in shown.splitlines())
        await pilot.press("3")
        await pilot.pause()
        shown = text_on(pilot)
        for line in checks_lines(made, METRIC)[1:12]:
            for cell in (part for part in line.split("  ") if part.strip()):
                assert cell.strip() in shown
        await pilot.press("5")
        await pilot.pause()
        shown = text_on(pilot)
        assert all(line.rstrip() in shown for line in card_lines(made, METRIC)[:30])
        await pilot.press("c")
        await pilot.pause()
        shown = text_on(pilot)
        assert all(line in shown for line in cautions_in_full(made.cautions, METRIC, 96)[:20])

    drive(steps, size=(160, 50))


def test_a_figure_under_the_cursor_is_asked_why_and_any_key_closes() -> None:
    made = planned("valve-blocks-24")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "3", "down", "right", "question_mark")
        await pilot.pause()
        shown = text_on(pilot)
        lines = explanation(made, ["findings[7].value"], METRIC)
        path = next(line for line in shown.splitlines() if "findings[" in line).strip("│ █")
        lines = explanation(made, [path], METRIC)
        assert all(line.strip() in shown for line in lines[:10])
        await pilot.press("x")
        assert isinstance(pilot.app.screen, LoadScreen)
        await pilot.press("shift+tab", "shift+tab", "right", "right", "question_mark")
        await pilot.pause()
        assert "time.total_s" in text_on(pilot)

    drive(steps)


def test_one_key_changes_the_count_and_one_takes_it_back(tmp_path: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "minus")
        await pilot.pause()
        session = pilot.app.session  # type: ignore[attr-defined]
        assert isinstance(session, Session)
        assert session.plan.areas.items[0].count == 23
        shown = text_on(pilot)
        assert "SET *153 A" in shown
        assert "* not saved" in shown
        await pilot.press("3")
        await pilot.pause()
        assert_head(text_on(pilot), session.plan, METRIC, 78)
        await pilot.press("plus", "plus")
        await pilot.pause()
        assert "no free tip is left on rack spline-24" in text_on(pilot)
        await pilot.press("z", "z", "z")
        await pilot.pause()
        assert "nothing can be undone" in text_on(pilot)
        assert session.plan.areas.items[0].count == 24
        assert session.dirty == ()
        await pilot.press("y")
        assert session.plan.areas.items[0].count == 23

    drive(steps, site(tmp_path / "shop"))


def test_another_part_takes_the_place_of_the_selected_one_in_five_presses(tmp_path: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "w", *"lug", "enter")
        await pilot.pause()
        session = pilot.app.session  # type: ignore[attr-defined]
        assert session.case.load.hangs[0].part == "lug"
        assert session.case.load.hangs[0].tips[0] == "A1-A4"
        assert_head(text_on(pilot).replace("*", " "), session.plan, METRIC, 78)

    drive(steps, site(tmp_path / "shop"))


def test_leaving_with_unsaved_work_asks_and_saving_keeps_it(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "minus", "q")
        await pilot.pause()
        assert isinstance(pilot.app.screen, AskScreen)
        await pilot.press("q")
        assert isinstance(pilot.app.screen, LoadScreen)
        await pilot.press("ctrl+q")
        await pilot.pause()
        assert isinstance(pilot.app.screen, AskScreen)
        await pilot.press("escape", "q", "s")
        await pilot.pause()
        assert isinstance(pilot.app.screen, LoadsScreen)
        await pilot.press("ctrl+q")

    app = drive(steps, folder)
    assert app.return_value == 0
    assert "F1-F3" in (folder / "rack_library" / "loads" / "valve-blocks-24.toml").read_text(encoding="utf-8")


def test_a_file_changed_on_disk_is_not_overwritten(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop")
    load = folder / "rack_library" / "loads" / "valve-blocks-24.toml"

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "minus")
        load.write_text(load.read_text(encoding="utf-8") + "# another hand\n", encoding="utf-8")
        await pilot.press("s")
        await pilot.pause()
        assert "was changed" in " ".join(text_on(pilot).split())
        assert "S saves this load under another name" in text_on(pilot)

    drive(steps, folder)
    assert load.read_text(encoding="utf-8").endswith("# another hand\n")
    assert "F1-F4" in load.read_text(encoding="utf-8")


def test_save_as_takes_a_name_refuses_a_bad_one_and_revert_asks(tmp_path: Path) -> None:
    folder = site(tmp_path / "shop")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "minus", "S", *"Bad_Name", "enter")
        await pilot.pause()
        assert "Bad_Name" in text_on(pilot)
        await pilot.press("ctrl+w", "R", "r")
        await pilot.pause()
        assert "* not saved" not in text_on(pilot)
        await pilot.press("minus", "S", *"valve-blocks-23", "enter")
        await pilot.pause()
        assert text_on(pilot).startswith(" valve-blocks-23 ")

    drive(steps, folder)
    assert (folder / "rack_library" / "loads" / "valve-blocks-23.toml").exists()


def test_every_command_stands_in_the_palette_and_runs_from_it() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter")
        await pilot.pause()
        screen = pilot.app.screen
        assert isinstance(screen, LoadScreen)
        titles = "\n".join(title for title, _ in screen.commands())
        for text in ("why", "units", "one more", "swap part", "edit", "undo", "redo", "save", "view: checks"):
            assert text in titles
        await pilot.press("ctrl+p", *"view: areas", "enter")
        await pilot.pause()
        assert "[4 areas]" in text_on(pilot)

    drive(steps)


def test_the_bar_is_left_by_tab_and_changes_views_by_arrows() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter", "shift+tab", "right", "right")
        await pilot.pause()
        assert "> 1 rack   2 program  [3 checks]" in text_on(pilot)
        await pilot.press("left", "tab")
        assert "[2 program]" in text_on(pilot)

    drive(steps)


def test_at_100_columns_the_part_stands_beside_the_rack_and_at_160_plot_and_checks_too() -> None:
    async def wide(pilot: Pilot[int]) -> None:
        await pilot.press("enter")
        await pilot.pause()
        assert "part 1 of 24" in text_on(pilot)
        assert "together" in text_on(pilot)
        assert "volts expected" not in text_on(pilot)
        await pilot.resize_terminal(160, 50)
        await pilot.pause()
        await pilot.pause()
        assert "volts expected" in text_on(pilot)
        assert "rectifier continuous" in text_on(pilot)

    drive(wide, size=(100, 40))


@pytest.mark.parametrize("size", [(40, 12), (20, 5)], ids=str)
def test_a_small_terminal_says_so_and_nothing_breaks(size: tuple[int, int]) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        assert "small" in text_on(pilot)
        await pilot.press("enter")
        await pilot.pause()
        assert "SET  159 A" in text_on(pilot) or size[1] < 8
        for key in ("2", "3", "4", "5", "6", "question_mark", "x", "1", "tab", "tab"):
            await pilot.press(key)

    drive(steps, size=size)


def test_plain_letters_reach_every_cell() -> None:
    async def steps(pilot: Pilot[int]) -> None:
        assert text_on(pilot).isascii()
        await pilot.press("enter")
        await pilot.pause()
        for key in ("2", "3", "4", "5", "6", "question_mark", "x", "w", "escape", "1"):
            await pilot.press(key)
            await pilot.pause()
            assert text_on(pilot).isascii(), key

    drive(steps, style=Style("metric", ascii=True), size=(160, 50))


def test_a_fault_of_the_program_is_kept_and_told_without_a_traceback(
    monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    def broken(*_: object) -> None:
        raise ZeroDivisionError

    monkeypatch.setattr(LoadScreen, "_title", broken)
    told: list[str] = []

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("enter")
        await pilot.pause()

    with pytest.raises(ZeroDivisionError):
        drive(steps, told=told.append)
    assert told == ["ZeroDivisionError()"]
    assert "Traceback" not in "".join(capsys.readouterr())


@pytest.mark.parametrize("units", ["metric", "us"])
@pytest.mark.parametrize("load", ["valve-blocks-24", "castings-a356-12", "lug-mix", "vent-panels-24"])
def test_the_checks_fit_the_narrowest_terminal_with_their_last_column_whole(load: str, units: System) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*load, "enter", "3")
        await pilot.pause()
        lines = text_on(pilot).splitlines()
        head = next(n for n, line in enumerate(lines) if line.startswith("  check "))
        assert lines[head].endswith(" limit is")
        column = lines[head].index("limit is")
        whole = {short_status(one.value) for one in Status}
        for line in lines[head + 1 : head + 10]:
            assert line[column:79].strip("[] ") in whole

    drive(steps, size=(80, 24), style=Style(units))
