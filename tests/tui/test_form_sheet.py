"""Typing in forms without a screen: hostile input in every field, refusals kept, entries added and taken out."""

from collections.abc import Callable
from typing import Any

import pytest

from lineplanner.inputs.approval import effective_status
from lineplanner.inputs.load import Load
from lineplanner.report.form_help import in_force
from lineplanner.report.form_rows import Heading, Row, Takes
from lineplanner.tui.session import Session
from lineplanner.tui.sheet import Sheet
from tests.tui.form_helpers import session_on

HOSTILE = {
    "decimal comma": "2,5 mm",
    "grouping": "1 000 mm",
    "nan": "nan mm",
    "inf": "inf A",
    "negative": "-7",
    "expression": "9**9**9",
    "markup": "[/b][red]x",
    "long": "7" * 5000,
    "control": "3\x1b[2J mm",
    "empty": "",
}
FORMS = (("load", "valve-blocks-24"), ("recipe", "hardcoat-50-6061"), ("part", "valve-block"))


def row_at(sheet: Sheet, path: tuple[str | int, ...]) -> Row:
    sheet.move_to(next(i for i, one in enumerate(sheet.lines) if one.row.path == path and one.draft is None))
    assert sheet.line is not None
    assert isinstance(sheet.line.row, Row)
    return sheet.line.row


@pytest.mark.parametrize("text", HOSTILE.values(), ids=HOSTILE)
@pytest.mark.parametrize("ref", FORMS, ids=lambda ref: ref[0])
def test_hostile_text_is_refused_with_a_reason_and_the_old_value_stays(
    ref: tuple[str, str], text: str
) -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ref)
    for path in [row.path for row in sheet.form.values if not row.locked]:
        row = row_at(sheet, path)
        record, plan = session.record(ref), session.plan
        if row.text == text.strip():
            continue
        reason = sheet.give(text)
        if not reason:
            assert taken_as_typed(session, ref, row, text)
            assert (
                session.record(ref) == record
            ) or session.undo()  # a default left out is the default again
            sheet.refresh()
            assert session.record(ref) == record
            continue
        assert len(reason) < 700
        assert session.record(ref) is record
        assert session.plan is plan
        line = sheet.lines[sheet.at]
        assert (line.text, line.refused) == (text.strip(), reason)
        assert isinstance(line.row, Row)
        assert in_force(line.row) == in_force(row)


def taken_as_typed(session: Session, ref: tuple[str, str], row: Row, text: str) -> bool:
    """What is taken is either words, as they were typed, or an optional field left out."""
    after = session.text_of(ref, row.path)
    if text == "":
        return row.optional
    if row.takes in (Takes.WORDS, Takes.NAMES):
        return after == text.strip() or row.takes is Takes.NAMES
    # a plain number may be negative, a temperature never is one without its unit
    return row.takes is Takes.QUANTITY and text == "-7" and row.kind is not None and row.kind.unit == "1"


def test_an_entry_that_was_refused_stays_in_its_field_and_after_the_form_was_left() -> None:
    session = session_on("valve-blocks-24")
    ref = ("recipe", "hardcoat-50-6061")
    sheet = Sheet(session, ref)
    path = ("current_density", "value")
    row_at(sheet, path)
    assert sheet.give("2,4 A/dm2") == "`2,4 A/dm2` has a decimal comma. Use a point: `2.4 A/dm2`"
    sheet.move(1)
    sheet.move(-1)
    assert sheet.lines[sheet.at].text == "2,4 A/dm2"
    assert sheet.unfinished == ("current density",)
    again = Sheet(session, ref)
    row_at(again, path)
    line = again.lines[again.at]
    assert (line.text, bool(line.refused)) == ("2,4 A/dm2", True)
    assert session.dirty == ()
    assert again.give("2.4 A/dm2") == ""
    assert again.unfinished == ()
    assert session.dirty == (ref,)


def test_a_range_that_does_not_hold_its_value_is_refused_in_words() -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ("recipe", "hardcoat-50-6061"))
    row_at(sheet, ("current_density", "low"))
    reason = sheet.give("25 A/ft2")
    assert "less than its own low" in reason


def test_a_change_at_the_load_is_a_deviation_at_once_and_the_plan_follows() -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ("load", "valve-blocks-24"))
    path = ("change", "current_density")
    before = session.plan.run
    assert row_at(sheet, path).mark == ""
    assert sheet.give("26 A/ft2") == ""
    assert row_at(sheet, path).mark == "deviation"
    assert sheet.give("30 A/ft2") == ""
    assert row_at(sheet, path).mark == "deviation, OUTSIDE THE RANGE"
    assert session.plan.run != before
    assert session.case.recipe.current_density is not None
    assert sheet.give("") == ""
    assert row_at(sheet, path).mark == ""
    assert session.dirty == ()


def test_an_edit_makes_an_approved_recipe_a_draft_and_approving_makes_it_approved() -> None:
    session = session_on("valve-blocks-24")
    ref = ("recipe", "hardcoat-50-6061")
    sheet = Sheet(session, ref)
    assert effective_status(session.record(ref)) == "approved"
    row_at(sheet, ("soft_start", "value"))
    assert sheet.give("6 min") == ""
    assert effective_status(session.record(ref)) == "draft"
    assert sheet.form.row(("status",)).mark == "DRAFT"
    assert session.approve(ref[1], "") != []
    assert session.approve(ref[1], "process engineer") == []
    sheet.refresh()
    assert sheet.form.row(("status",)).mark == ""
    assert session.record(ref).approved_by == "process engineer"


def test_a_hang_is_added_once_it_says_part_and_place() -> None:
    session = session_on("pistons-16-masked")
    ref = ("load", "pistons-16-masked")
    sheet = Sheet(session, ref)
    row_at(sheet, ("hangs", 0, "tips"))
    assert sheet.add() == ""
    assert sheet.note == "new: hang - not in force yet, still missing: part"
    sheet.give("piston")
    assert "Give one of" in sheet.note
    assert len(session.record(ref).hangs) == 1
    sheet.move(1)
    assert sheet.give("E1-E4") == ""
    load: Load = session.record(ref)
    assert (load.hangs[1].part, load.hangs[1].tips) == ("piston", ("E1-E4",))
    assert sheet.unfinished == ()
    assert sheet.removable() == "hang 2 of 2: piston"
    assert sheet.remove() == ""
    assert session.record(ref).hangs == load.hangs[:1]
    assert session.undo() == "take out hang 2 of 2: piston"


def test_the_last_hang_cannot_be_taken_out_and_the_reason_is_said() -> None:
    session = session_on("pistons-16-masked")
    sheet = Sheet(session, ("load", "pistons-16-masked"))
    row_at(sheet, ("hangs", 0, "part"))
    assert "nothing hangs on this rack" in sheet.remove()
    assert len(session.case.load.hangs) == 1


def test_a_part_takes_another_form_only_when_its_fields_are_filled() -> None:
    session = session_on("pistons-16-masked")
    ref = ("part", "piston")
    sheet = Sheet(session, ref)
    row_at(sheet, ("form",))
    assert sheet.give("cube") == "Choose one of plate, section, turned, tube, stated"
    assert sheet.give("tube") == ""
    for text in ("60 mm", "20 mm", "80 mm"):
        assert session.record(ref).form == "turned"
        assert sheet.give(text) == ""
        sheet.move(1)
    part = session.record(ref)
    assert (part.form, part.name, len(part.masks)) == ("tube", "damper piston", 1)
    assert sheet.unfinished == ()
    assert session.undo() == "the part as tube"
    assert session.record(ref).form == "turned"


def test_a_form_whose_faces_are_others_is_refused_with_what_is_in_its_way() -> None:
    session = session_on("pistons-16-masked")
    ref = ("part", "piston")
    sheet = Sheet(session, ref)
    row_at(sheet, ("form",))
    assert sheet.give("stated") == ""
    for text in ("1.6 dm2", "", "60 mm", "80 mm", "60 mm"):
        assert sheet.give(text) == ""
        sheet.move(1)
    assert "`side` is not a face of this part" in sheet.give("supervisor, from the model")
    assert "not in force yet: " in sheet.note
    assert session.record(ref).form == "turned"


def test_what_an_undo_takes_away_leaves_no_entry_under_way_behind() -> None:
    session = session_on("guide-pins-flash")
    sheet = Sheet(session, ("load", "guide-pins-flash"))
    row_at(sheet, ("hangs", 0, "at", 23, 0))
    assert sheet.add() == ""
    sheet.give("870 mm")
    sheet.move(1)
    assert sheet.give("350 mm") == ""
    assert session.record(("load", "guide-pins-flash")).hangs[0].at[24] == pytest.approx((0.87, 0.35))
    assert session.undo() == "add free positions"
    sheet.refresh()
    assert len(session.record(("load", "guide-pins-flash")).hangs[0].at) == 24


def test_an_entry_under_way_goes_when_an_undo_takes_away_what_it_would_stand_in() -> None:
    session = session_on("guide-pins-flash")
    ref = ("load", "guide-pins-flash")
    sheet = Sheet(session, ref)
    sheet.move_to(next(i for i, one in enumerate(sheet.lines) if one.row.path == ("thieves",)))
    sheet.add()
    sheet.give("ring")
    sheet.move(1)
    assert sheet.give("0.5 dm2") == ""
    assert session.record(ref).thieves[0].name == "ring"
    row_at(sheet, ("hangs", 0, "at", 0, 0))
    sheet.add()
    session.undo()
    sheet.refresh()
    assert sheet.unfinished == ("new: free positions",)


def test_what_was_refused_in_a_later_entry_follows_it_when_an_earlier_one_goes() -> None:
    session = session_on("guide-pins-flash")
    sheet = Sheet(session, ("load", "guide-pins-flash"))
    for index in (3, 5):
        row_at(sheet, ("hangs", 0, "at", index, 0))
        assert sheet.give(f"{index},5 mm")
    row_at(sheet, ("hangs", 0, "at", 3, 0))
    assert sheet.removable() == "free positions 4"
    assert sheet.remove() == ""
    kept = [(line.row.path, line.text) for line in sheet.lines if line.refused]
    assert kept == [(("hangs", 0, "at", 4, 0), "5,5 mm")]


def every_list(sheet: Sheet) -> list[Heading]:
    return [one for one in sheet.form.rows if isinstance(one, Heading) and one.adds]


@pytest.mark.parametrize("kind", ["load", "recipe", "bath", "line", "rack", "part", "site"])
def test_every_list_and_group_can_be_begun_and_dropped(kind: str) -> None:
    session = session_on("valve-blocks-24")
    ref = next(ref for ref in session.refs() if ref[0] == kind)
    sheet = Sheet(session, ref)
    for heading in every_list(sheet):
        sheet.move_to(next(i for i, one in enumerate(sheet.lines) if one.row.path == heading.path))
        assert sheet.add() == "", heading
        assert sheet.unfinished
        assert sheet.removable().endswith("(not in force yet)")
        assert sheet.remove() == ""
    assert session.dirty == ()


def test_only_one_entry_is_under_way_at_a_time() -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ("load", "valve-blocks-24"))
    row_at(sheet, ("hangs", 0, "part"))
    sheet.add()
    sheet.move_to(next(i for i, one in enumerate(sheet.lines) if one.row.path == ("thieves",)))
    assert sheet.add() == "finish hang first, or take it out with F9"


def test_a_search_shows_fewer_fields_and_never_hides_what_is_not_in_force() -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ("line", "kestrel-yard"))
    every = len(sheet.lines)
    sheet.find("panel step")
    assert 0 < len(sheet.lines) < every
    assert isinstance(sheet.lines[sheet.at].row, Row)
    sheet.give("1 mm")
    sheet.find("volume")
    assert sheet.unfinished == ("panel step, current",)
    sheet.find("zzz")
    assert sheet.line is None
    assert sheet.give("5") == ""
    sheet.find("")
    assert len(sheet.lines) == every


@pytest.mark.parametrize(
    "make", [lambda s: s.give("x"), lambda s: s.add(), lambda s: s.remove()], ids=["give", "add", "remove"]
)
def test_nothing_happens_where_nothing_is_found(make: Callable[[Sheet], Any]) -> None:
    session = session_on("valve-blocks-24")
    sheet = Sheet(session, ("site", "site"))
    sheet.find("zzz")
    make(sheet)
    assert session.dirty == ()
