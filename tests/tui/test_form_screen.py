"""The form on the screen: typing, moving, refusing, deviations, approving, closing, small terminals."""

import pytest
from textual.events import Paste
from textual.pilot import Pilot
from textual.widget import Widget

from lineplanner.inputs.approval import effective_status
from lineplanner.tui.screens.form import RecordForm
from lineplanner.tui.screens.records import RecordList
from tests.tui.form_helpers import drive, session_on, text_on

LOAD = ("load", "pistons-16-masked")
RECIPE = ("recipe", "hardcoat-50-6061")
Screens = Pilot[int]


async def typed(pilot: Screens, text: str) -> None:
    """Put a text in at once, as a terminal pastes it; single keys cost the pilot a fixed pause each."""
    assert pilot.app.screen.focused is not None
    pilot.app.screen.focused.post_message(Paste(text))
    await pilot.pause()


async def found(pilot: Screens, text: str) -> None:
    await pilot.press("ctrl+f")
    await typed(pilot, text)
    await pilot.press("enter")


def set_line(pilot: Screens) -> str:
    return next(line for line in text_on(pilot).splitlines() if line.startswith(" SET"))


def test_a_value_is_echoed_while_it_is_typed_and_the_setpoints_follow_at_once() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        shown = text_on(pilot)
        assert "> current density                 27 A/ft2" in shown
        assert "deviation: recipe 2.58 A/dm2, range 2.37 A/dm2 to 3.01 A/dm2" in shown
        before = set_line(pilot)
        await pilot.press("4", "0", "space", "A", "/", "f", "t", "2")  # replaces what stood there
        shown = text_on(pilot)
        assert "= 4.31 A/dm2 = 40 A/ft2" in shown
        assert "in force: 27 A/ft2" in shown
        assert set_line(pilot) == before
        await pilot.press("enter")
        shown = text_on(pilot)
        assert "deviation, OUTSIDE THE RANGE" in shown
        assert "setpoints were:" in shown
        assert "* not saved" in shown
        assert set_line(pilot) != before
        await pilot.press("f7")
        assert "27 A/ft2" in text_on(pilot)
        assert set_line(pilot).replace("*", " ") == before

    drive(session, RecordForm(session, LOAD), steps)
    assert session.dirty == ()


def test_a_refused_text_stays_marked_in_words_when_the_field_is_left_and_the_form_closed() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        await typed(pilot, "2,7 A/dm2")
        await pilot.press("enter")
        shown = text_on(pilot)
        assert "NOT TAKEN: `2,7 A/dm2` has a decimal comma. Use a point: `2.7 A/dm2`" in shown
        assert "in force: 27 A/ft2 = 2.91 A/dm2" in shown
        await pilot.press("down")
        assert "2,7 A/dm2   NOT TAKEN, in force: 27 A/ft2" in text_on(pilot)

    async def again(pilot: Screens) -> None:
        await found(pilot, "current dens")
        assert "NOT TAKEN: `2,7 A/dm2`" in text_on(pilot)

    drive(session, RecordForm(session, LOAD), steps)
    assert session.dirty == ()
    drive(session, RecordForm(session, LOAD), again)


def test_leaving_a_field_gives_it_and_shift_tab_at_the_first_goes_to_the_search() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await typed(pilot, "pistons, second lot")
        await pilot.press("tab")
        assert session.case.load.name == "pistons, second lot"
        await pilot.press("up", "shift+tab")
        await typed(pilot, "lot")
        assert "find: lot" in text_on(pilot)
        assert "rectifier  " not in text_on(pilot).split("find: lot")[1]

    drive(session, RecordForm(session, LOAD), steps)


def test_markup_in_a_name_is_shown_as_it_is() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await typed(pilot, "[/red] [b]lot")
        await pilot.press("enter")
        assert "[/red] [b]lot" in text_on(pilot).splitlines()[0]
        await pilot.press("down")
        assert "[/red] [b]lot" in text_on(pilot).split("find:")[1]

    drive(session, RecordForm(session, LOAD), steps)
    assert session.case.load.name == "[/red] [b]lot"


def test_left_and_right_turn_choices_and_typing_a_beginning_is_enough() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "facing")
        await pilot.press("right", "enter")
        assert session.case.load.hangs[0].facing == "edge-on"
        await typed(pilot, "fl")
        assert "Enter takes flat" in text_on(pilot)
        await pilot.press("enter")
        assert session.case.load.hangs[0].facing == "flat"

    drive(session, RecordForm(session, LOAD), steps)


def test_five_thousand_characters_are_refused_and_the_form_goes_on() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        screen = pilot.app.screen
        assert isinstance(screen, RecordForm)
        screen.field.entry.value = "7" * 5000
        await pilot.press("enter")
        assert "NOT TAKEN" in text_on(pilot)
        await pilot.press("down")
        assert "> reverse etch current density" in text_on(pilot)

    drive(session, RecordForm(session, LOAD), steps)
    assert session.dirty == ()


def test_an_edit_makes_the_recipe_a_draft_and_approving_asks_who() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        assert "rev C APPROVED" in text_on(pilot).splitlines()[0]
        await found(pilot, "soft start left")
        await typed(pilot, "6 min")
        await pilot.press("enter")
        assert "rev C DRAFT" in text_on(pilot).splitlines()[0]
        await pilot.press("f4")
        assert "Who approves" in text_on(pilot)
        await typed(pilot, "A. Meyer")
        await pilot.press("enter")
        assert "rev C APPROVED" in text_on(pilot).splitlines()[0]
        assert "approved by A. Meyer" in text_on(pilot)

    drive(session, RecordForm(session, RECIPE), steps)
    recipe = session.case.recipe
    assert (effective_status(recipe), recipe.approved_by) == ("approved", "A. Meyer")


def test_a_recipe_is_not_approved_over_a_text_that_is_not_in_force() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "soft start left")
        await typed(pilot, "6")
        await pilot.press("f4")
        assert "not approved: soft start is typed but not in force" in text_on(pilot)

    drive(session, RecordForm(session, RECIPE), steps)


def test_the_approval_cannot_be_typed() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "approved by")
        await typed(pilot, "me")
        await pilot.press("backspace", "enter")
        assert "is set by approving the recipe" in text_on(pilot)

    drive(session, RecordForm(session, RECIPE), steps)
    assert session.dirty == ()


def test_taking_out_asks_first() -> None:
    session = session_on("guide-pins-flash")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "24, x")
        await pilot.press("f9")
        assert "Take out" in text_on(pilot)
        await pilot.press("n")
        assert len(session.case.load.hangs[0].at) == 24
        await pilot.press("f9", "y")
        assert len(session.case.load.hangs[0].at) == 23

    drive(session, RecordForm(session, ("load", "guide-pins-flash")), steps)


def test_help_tells_what_a_field_takes_and_a_question_mark_is_text() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await pilot.press("question_mark", "tab")
        assert session.case.load.name == "?"
        await found(pilot, "current dens")
        await pilot.press("f2")
        shown = text_on(pilot)
        assert "takes a current density with its unit, such as 2.5 A/dm2 or 24 A/ft2" in shown
        assert "allowed: more than 0 A/dm2" in shown
        await pilot.press("x")
        await pilot.press("f3")
        assert "Why:" in text_on(pilot)

    drive(session, RecordForm(session, LOAD), steps)


def test_a_line_of_hundreds_of_fields_mounts_a_handful_of_widgets() -> None:
    session = session_on("pistons-16-masked")
    screen = RecordForm(session, ("line", "kestrel-yard"))
    assert len(screen.sheet.form.values) > 300

    async def steps(pilot: Screens) -> None:
        assert len(list(screen.walk_children(Widget))) < 25
        for _ in range(4):
            await pilot.press("pagedown")
        line = screen.sheet.line
        assert line is not None
        assert f"> {line.row.label}"[:20] in text_on(pilot)

    drive(session, screen, steps)


def test_every_field_comes_into_sight_on_the_way_down_and_up() -> None:
    session = session_on("pistons-16-masked")
    screen = RecordForm(session, ("bath", "sulfuric-hard"))

    async def steps(pilot: Screens) -> None:
        for step in ("down", "up"):
            for _ in range(len(screen.sheet.lines)):
                screen.action_step(1 if step == "down" else -1)
                await pilot.pause()
                line = screen.sheet.line
                assert line is not None
                assert f"> {line.row.label}"[:20] in text_on(pilot)

    drive(session, screen, steps)


@pytest.mark.parametrize("size", [(40, 12), (20, 5), (60, 10), (160, 50)], ids=str)
def test_terminals_of_every_size_show_the_field(size: tuple[int, int]) -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "soft start")
        await typed(pilot, "x")
        await pilot.press("enter", "down", "up")
        assert "> soft" in text_on(pilot) or size[1] < 10

    drive(session, RecordForm(session, RECIPE), steps, size)


def test_a_click_goes_to_a_line_and_gives_what_was_typed() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await typed(pilot, "clicked")
        rows = text_on(pilot).splitlines()
        await pilot.click(offset=(4, next(y for y, row in enumerate(rows) if row.startswith("  rack "))))
        assert "> rack" in text_on(pilot)
        assert session.case.load.name == "clicked"

    drive(session, RecordForm(session, LOAD), steps)


def test_enter_gives_a_refused_text_again_once_another_field_makes_room_for_it() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        await typed(pilot, "29 A/ft2")
        await pilot.press("enter")
        assert "NOT TAKEN" in text_on(pilot)
        assert "more than its own high" in text_on(pilot)
        await pilot.press("down", "down")
        await typed(pilot, "30 A/ft2")
        await pilot.press("up", "up")
        assert "NOT TAKEN" in text_on(pilot)
        await pilot.press("enter")
        assert "NOT TAKEN" not in text_on(pilot)

    drive(session, RecordForm(session, RECIPE), steps)


def test_a_text_that_is_being_typed_outlives_help_and_a_change_of_units() -> None:
    session = session_on("pistons-16-masked")
    screen = RecordForm(session, LOAD)

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        await typed(pilot, "26 A/f")
        await pilot.press("f2", "x", "ctrl+t")
        await pilot.pause()
        await typed(pilot, "t2")
        assert "in force: 27 A/ft2" in text_on(pilot)
        assert screen.finish() == ()
        assert session.text_of(LOAD, ("change", "current_density")) == "26 A/ft2"

    drive(session, screen, steps)


def test_undo_drops_a_refused_text_before_it_takes_anything_back() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await typed(pilot, "first")
        await found(pilot, "current dens")
        await typed(pilot, "1,5")
        await pilot.press("f7")
        assert "dropped: 1,5" in text_on(pilot)
        assert session.case.load.name == "first"
        await pilot.press("f7")
        assert session.case.load.name != "first"

    drive(session, RecordForm(session, LOAD), steps)


def test_the_list_of_records_opens_a_form_and_marks_what_is_not_saved() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        shown = text_on(pilot)
        for kind, stem in session.refs():
            assert f"{kind} " in shown
            assert stem in shown
        await pilot.press("enter")
        assert isinstance(pilot.app.screen, RecordForm)
        await typed(pilot, "other")
        await pilot.press("ctrl+w")
        assert isinstance(pilot.app.screen, RecordList)
        row = next(
            line for line in text_on(pilot).splitlines() if "pistons-16-masked" in line and "load" in line[:8]
        )
        assert "* not saved" in row
        await pilot.press("f7")
        assert "* not saved" not in text_on(pilot)

    drive(session, RecordList(session), steps)


def test_the_units_of_ranges_follow_the_session() -> None:
    session = session_on("pistons-16-masked")

    async def steps(pilot: Screens) -> None:
        await found(pilot, "current dens")
        await pilot.press("ctrl+t")
        assert "range 22 A/ft2 to 28 A/ft2" in text_on(pilot)

    drive(session, RecordForm(session, LOAD), steps)
