"""Hanging on the picture: each key is one edit that follows at once, and as many undos give the file back."""

from pathlib import Path

import pytest
from textual.pilot import Pilot

from lineplanner.inputs.hanging import tip_names
from lineplanner.tui.screens.load import LoadScreen
from tests.tui.driving import drive, site, text_on

LOAD = "coupons-24"  # on both sides of twelve tips


def load_screen(pilot: Pilot[int]) -> LoadScreen:
    screen = pilot.app.screen
    assert isinstance(screen, LoadScreen)
    return screen


def tips(screen: LoadScreen) -> list[tuple[str, ...]]:
    return [hang.tips for hang in screen.session.case.load.hangs]


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    return site(tmp_path / "shop")


def test_arrows_choose_until_parts_are_hung_and_carry_then(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter")
        screen = load_screen(pilot)
        before = tips(screen)
        await pilot.press("down")
        assert tips(screen) == before
        assert "part 5 of 24" in text_on(pilot)
        await pilot.press("minus", "h", "right")
        assert "no free tip right of here" in text_on(pilot)
        await pilot.press("down")  # F4 alone is free
        assert "tip F4" in text_on(pilot)
        await pilot.press("delete")
        assert "part 4 of 22" in text_on(pilot)
        assert not {"B1", "F4"} & {name for h in screen.session.case.load.hangs for name in tip_names(h)}

    drive(steps, shop)


def test_a_count_before_the_dot_hangs_so_many_more(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "h", "N")
        screen = load_screen(pilot)
        for _ in range(23):
            await pilot.press("delete")
        assert tips(screen) == [("A1",)]
        await pilot.press("delete")
        assert "one part stays" in text_on(pilot)
        await pilot.press("1", "2")
        assert "12 times" in text_on(pilot)
        await pilot.press("full_stop")
        assert "part 13 of 13" in text_on(pilot)
        await pilot.press("9", "9", "full_stop")
        assert "88 more found no place on the rack" in text_on(pilot)
        assert "part 24 of 24" in text_on(pilot)
        for _ in range(25):
            await pilot.press("z")
        assert not screen.session.dirty

    drive(steps, shop)


def test_marked_parts_move_turn_and_swap_together(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"coupons", "enter", "h", "x", "n", "n", "x")
        screen = load_screen(pilot)
        assert "2 marked" in text_on(pilot)
        assert "(" in text_on(pilot).split("solution level")[1]  # what is marked is told without colour
        await pilot.press("t")
        assert [hang.turn > 1.5 for hang in screen.session.case.load.hangs].count(True) == 1
        assert len(screen.hand.marked) == 2
        await pilot.press("w", *"relay", "enter")
        assert {hang.part for hang in screen.session.case.load.hangs} == {"test-coupon", "relay-lid"}
        await pilot.press("z", "z")
        assert not screen.session.dirty
        await pilot.press("x", "escape")
        assert "HANGING" in text_on(pilot)  # the mark is let go first
        await pilot.press("escape")
        assert "HANGING" not in text_on(pilot)

    drive(steps, shop)


def test_a_field_is_filled_in_a_pattern_and_all_go_to_another_rack(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "h", "X")
        screen = load_screen(pilot)
        screen.hand.marked = screen.hand.marked[1:]
        await pilot.press("delete", "o", *"check", "enter", *"A-C", "enter")
        assert tips(screen) == [("A1", "A3", "B2", "B4", "C1", "C3")]
        await pilot.press("o", "enter", *"nowhere", "enter")
        assert "is no field of tips" in text_on(pilot)
        await pilot.press("K", *"al-spline", "enter")
        assert screen.session.case.load.rack == "al-spline-12"

    drive(steps, shop)


def test_keys_of_the_hand_do_nothing_while_nobody_hangs(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "full_stop", "t", "x", "delete", "b", "3")
        screen = load_screen(pilot)
        assert not screen.session.dirty
        assert screen.view == "checks"
        await pilot.press("h")  # brings the picture
        assert "[1 rack]  HANGING" in text_on(pilot)
        await pilot.press("c")
        assert screen.view == "cautions"
        assert not screen.hanging

    drive(steps, shop)


def test_the_palette_lists_what_the_hand_can_do(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "h")
        titles = [title for title, _ in load_screen(pilot).commands()]
        for word in (
            "once more",
            "add part",
            "fill field",
            "take off",
            "turn",
            "mark all of a kind",
            "align",
        ):
            assert any(title.startswith(word) for title in titles), word

    drive(steps, shop)


def test_a_new_load_is_asked_for_in_a_few_questions_and_hung(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press("f4", *"Bad name", "enter")
        assert "lower case letters" in text_on(pilot)
        for _ in range(8):
            await pilot.press("backspace")
        await pilot.press(*"valve-blocks-24", "enter")
        assert "is there already" in text_on(pilot)
        for _ in range(15):
            await pilot.press("backspace")
        await pilot.press(*"new", "enter", *"hardcoat-50", "enter")
        assert "> H1 of kestrel-yard" in text_on(pilot)  # where it runs already
        await pilot.press("enter", *"spline-24", "enter", *"valve", "enter")
        await pilot.pause()
        assert "part 1 of 1" in text_on(pilot)
        assert "HANGING" in text_on(pilot)
        assert (shop / "rack_library" / "loads" / "new.toml").is_file()
        await pilot.press("h", "q")
        await pilot.pause(0.3)
        assert "> new " in text_on(pilot)

    drive(steps, shop)


def test_leaving_a_question_makes_no_load(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        before = sorted((shop / "rack_library" / "loads").iterdir())
        await pilot.press("f4", *"new", "enter", "enter", "escape")
        assert sorted((shop / "rack_library" / "loads").iterdir()) == before

    drive(steps, shop)


def test_how_many_more_is_told_and_hung_in_one_step(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "h", "N", "delete", "delete", "m")
        await pilot.pause()
        shown = text_on(pilot)
        assert "2 more fit without overlapping" in shown
        assert "the line carries all of them" in shown
        await pilot.press("h")
        await pilot.pause()
        screen = load_screen(pilot)
        assert tips(screen) == [("A1-A4", "B1-B4", "C1-C4", "D1-D4", "E1-E4", "F1-F4")]
        assert not screen.session.dirty
        await pilot.press("m")
        await pilot.pause()
        assert "0 more fit" in text_on(pilot)
        await pilot.press("escape")

    drive(steps, shop)


def test_the_picture_is_looked_at_nearer_and_moved_by_keys(shop: Path) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter")
        whole = text_on(pilot)
        assert "500 mm" in whole  # the bar of the scale
        await pilot.press("greater_than_sign", "greater_than_sign", "ctrl+down")
        assert text_on(pilot) != whole
        assert not load_screen(pilot).session.dirty
        await pilot.press("g")
        assert text_on(pilot) == whole
        await pilot.press("u")
        assert "20 in" in text_on(pilot)

    drive(steps, shop)
