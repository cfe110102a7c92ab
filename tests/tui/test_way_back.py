"""Ways back that once led nowhere: undo after recovery or at another load, giving up where a file is gone."""

from pathlib import Path

import pytest
from textual.pilot import Pilot

from lineplanner.tui.screens.load import LoadScreen
from lineplanner.tui.screens.loads import LoadsScreen
from tests.tui.driving import drive, site, text_on

LOAD = "valve-blocks-24"


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    return site(tmp_path / "shop")


async def unsaved(pilot: Pilot[int]) -> None:
    await pilot.press(*"valve", "enter", "minus")
    await pilot.pause()


def test_recovered_work_can_be_taken_back_where_it_was_recovered(shop: Path, tmp_path: Path) -> None:
    drive(unsaved, shop, memory=tmp_path / "memory")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("r")
        await pilot.pause()
        assert "part 1 of 23" in text_on(pilot)
        await pilot.press("z")
        await pilot.pause()
        assert "part 1 of 24" in text_on(pilot)
        await pilot.press("y")
        await pilot.pause()
        assert " of 23 " in text_on(pilot)

    drive(steps, shop, memory=tmp_path / "memory")


def test_undo_changes_no_load_that_is_not_looked_at(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await unsaved(pilot)
        await pilot.press("s", "q", *"pist", "enter")
        await pilot.pause()
        before = text_on(pilot)
        await pilot.press("z")
        await pilot.pause()
        assert f"the last change was made at {LOAD}" in text_on(pilot)
        assert text_on(pilot).splitlines()[:5] == before.splitlines()[:5]

    drive(steps, shop)


@pytest.mark.parametrize("how", ["gone", "broken"])
@pytest.mark.parametrize("keys", [("R", "r"), ("q", "d")])
def test_where_a_file_is_gone_or_broken_giving_up_says_so_and_leads_to_the_list(
    shop: Path, how: str, keys: tuple[str, ...]
) -> None:
    path = shop / "rack_library" / "loads" / f"{LOAD}.toml"

    async def steps(pilot: Pilot[int]) -> None:
        await unsaved(pilot)
        if how == "gone":
            path.unlink()
        else:
            path.write_text(path.read_text(encoding="utf-8") + "\nnonsense = 3 mm\n", encoding="utf-8")
        await pilot.press(*keys)
        await pilot.pause()
        assert "On disk by now:" in text_on(pilot)
        await pilot.press("x")
        await pilot.pause(0.3)
        assert isinstance(pilot.app.screen, LoadsScreen)

    app = drive(steps, shop)
    assert not app.fault


def test_giving_up_sees_a_line_that_was_changed_on_disk(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await unsaved(pilot)
        path = shop / "configs" / "lines" / "kestrel-yard.toml"
        text = path.read_text(encoding="utf-8")
        path.write_text(text.replace('max_current = "1000 A"', 'max_current = "1000.5 A"'), encoding="utf-8")
        await pilot.press("R", "r")
        await pilot.pause()
        screen = pilot.app.screen
        assert isinstance(screen, LoadScreen)
        assert any(r.max_current == 1000.5 for r in screen.session.case.line.rectifiers)

    drive(steps, shop)


@pytest.mark.parametrize("size", [(80, 24), (80, 12), (160, 30), (40, 12)])
def test_why_can_be_read_to_its_end_on_every_terminal(shop: Path, size: tuple[int, int]) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "3", "down", "down", "question_mark")
        await pilot.pause()
        assert "any other key closes" in text_on(pilot)
        await pilot.press("end")
        await pilot.pause()
        assert "rests on:" in text_on(pilot)
        assert "any other key closes" in text_on(pilot)

    drive(steps, shop, size=size)


def test_a_recipe_changed_on_disk_while_its_load_is_open_is_noticed_at_saving(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await unsaved(pilot)
        path = shop / "configs" / "recipes" / "hardcoat-50-6061.toml"
        path.write_text(path.read_text(encoding="utf-8") + "\n# seen by somebody else\n", encoding="utf-8")
        await pilot.press("s")
        await pilot.pause()
        assert f"saved: {LOAD}.toml; recipe hardcoat-50-6061 changed on disk" in text_on(pilot)

    drive(steps, shop)


def test_the_last_row_of_the_program_tells_why_these_minutes(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "2", "end", "question_mark")
        await pilot.pause()
        assert "Why: total time" in text_on(pilot)
        assert "time at set current" in text_on(pilot)

    drive(steps, shop)


def test_a_dry_part_is_said_to_be_dry_and_the_sum_names_those_above_the_solution(shop: Path) -> None:
    load = shop / "rack_library" / "loads" / f"{LOAD}.toml"
    text = load.read_text(encoding="utf-8")
    load.write_text(text.replace('tank = "H1"', 'tank = "H1"\nsolution_drop = "520 mm"'), encoding="utf-8")

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter")
        await pilot.pause()
        assert "flat, dry" in text_on(pilot)
        assert "this one: none in the solution" in text_on(pilot)
        await pilot.press("question_mark")
        await pilot.pause()
        assert "of them above the solution: 8" in text_on(pilot)

    drive(steps, shop)


def test_unsaved_work_tells_first_how_to_save_it(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter")
        await pilot.pause()
        assert "s save" not in text_on(pilot)
        await pilot.press("minus")
        await pilot.pause()
        assert "z undo  s save" in text_on(pilot)
        await pilot.press("z", "n")
        await pilot.pause()
        assert "s save" not in text_on(pilot)

    drive(steps, shop)
