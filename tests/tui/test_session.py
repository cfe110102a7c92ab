"""The open load as edited: texts taken and refused, plans that follow, undo."""

from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError
from lineplanner.inputs.approval import effective_status
from lineplanner.inputs.declared import Path as FieldPath
from lineplanner.inputs.site import Adopted
from lineplanner.plan import plan
from lineplanner.quantities import ANGLE, CURRENT_DENSITY
from lineplanner.report.style import Style
from lineplanner.sources import Status
from lineplanner.tui.session import Session
from lineplanner.units import parse
from tests.tui.shops import LOAD, RACK, RECIPE, TIPS, content, make_shop, session_on

SITE = ("site", "site")
ADOPTED = Adopted(limit="hydrogen_limit", adopted_by="owner", adopted_on="2026-03-14")
DENSITY: FieldPath = ("change", "current_density")


@pytest.fixture(scope="module")
def shop(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A shop that no test of this module saves to."""
    return make_shop(tmp_path_factory.mktemp("site"))


@pytest.fixture
def session(shop: Path) -> Session:
    return session_on(shop)


# --- opening ---------------------------------------------------------------------------------------------


def test_a_session_opens_a_load_with_its_plan_and_its_records(session: Session, shop: Path) -> None:
    assert session.site_name == "Kestrel Yard finishing (demo)"
    assert not session.packaged
    assert session.loads() == list(Library(shop).stems("load"))
    assert session.name == "valve-blocks-24"
    assert {path: one.value for path, one in session.plan.figures.items()} == {
        path: one.value for path, one in plan(Library(shop).case("valve-blocks-24")).figures.items()
    }
    assert session.refs() == (
        LOAD,
        RECIPE,
        RACK,
        ("line", "kestrel-yard"),
        ("bath", "sulfuric-hard"),
        ("part", "valve-block"),
        ("material", "6061-t6"),
        ("site", "site"),
    )
    assert session.dirty == ()
    assert not session.can_undo
    assert not session.can_redo


def test_a_load_that_is_not_there_is_refused_and_the_open_one_stays(session: Session) -> None:
    with pytest.raises(FilesError, match="`valve-blocks-42` is not a load of this site"):
        session.open("valve-blocks-42")
    assert session.name == "valve-blocks-24"


def test_before_a_load_is_open_there_is_no_plan(shop: Path) -> None:
    session = session_on(shop, load=None)
    assert session.name == ""
    with pytest.raises(LookupError):
        _ = session.plan
    assert session.last_load == "valve-blocks-24"  # the one that the site shows first


def test_a_text_is_as_the_file_has_it_and_a_field_left_out_as_the_file_would_write_it(
    session: Session,
) -> None:
    assert session.text_of(RECIPE, ("current_density",)) == "24 A/ft2"
    assert session.text_of(RECIPE, ("aim", "low")) == "45 um"
    assert session.text_of(RECIPE, ("bases",)) == "6061, 6063"
    assert session.text_of(LOAD, ("hangs", 0, "tips")) == TIPS
    assert session.text_of(LOAD, ("hangs", 0, "side")) == "front"
    assert session.text_of(LOAD, ("hangs", 0, "tips_each")) == "1"
    assert session.text_of(LOAD, ("hangs", 0, "count")) == ""
    assert session.text_of(LOAD, DENSITY) == ""
    assert session.text_of(RECIPE, ("live_entry",)) == "false"
    assert session.text_of(RACK, ("tips", 0, "start")) == "80 mm, 320 mm"
    assert session.text_of(RACK, ("tips", 0, "start", 1)) == "320 mm"


# --- edits that are taken --------------------------------------------------------------------------------


def test_a_taken_text_is_planned_at_once_and_what_moved_is_told(session: Session) -> None:
    before = session.plan.figures
    assert session.set_value(LOAD, DENSITY, "26 A/ft2") is None
    assert session.text_of(LOAD, DENSITY) == "26 A/ft2"
    assert session.plan.deviations[0].label == "current density"
    after = session.plan.figures
    assert session.moved == {path for path in after if after[path].value != before[path].value}
    assert "current.set_A" in session.moved
    assert "area.carrying_m2" not in session.moved
    assert session.dirty == (LOAD,)


def test_a_word_that_no_figure_depends_on_moves_nothing(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    assert session.set_value(LOAD, ("order",), "[/b] 4711") is None
    assert session.record(LOAD).order == "[/b] 4711"
    assert session.moved == frozenset()


def test_the_same_text_again_is_no_edit(session: Session) -> None:
    assert session.set_value(LOAD, ("hangs", 0, "tips"), f" {TIPS} ") is None
    assert session.set_value(LOAD, ("hangs", 0, "side"), "front") is None
    assert session.set_value(LOAD, DENSITY, "") is None
    assert not session.can_undo


def test_a_part_count_a_reference_and_a_setting_of_a_record_can_be_changed(session: Session) -> None:
    assert session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A4, B1-B3") is None
    assert session.plan.figures["area.items[0].count"].value == 7
    assert session.set_value(LOAD, ("recipe",), "hardcoat-50-2024") is None
    assert ("recipe", "hardcoat-50-2024") in session.refs()
    assert session.set_value(LOAD, ("recipe",), "hardcoat-50-6061") is None
    assert session.set_value(RECIPE, ("current_density", "value"), "25 A/ft2") is None
    assert session.text_of(RECIPE, ("current_density",)) == "25 A/ft2"
    assert session.set_value(RACK, ("tips", 0, "contacts"), "3") is None
    assert session.record(RACK).tips[0].contacts == 3
    assert session.dirty == (LOAD, RECIPE, RACK)


def test_an_empty_text_takes_an_optional_value_out_and_the_table_that_held_it(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(LOAD, ("change", "why"), "trial")
    assert session.set_value(LOAD, DENSITY, "") is None
    assert session.record(LOAD).change.why == "trial"
    assert session.set_value(LOAD, ("change", "why"), "") is None
    assert session.record(LOAD).change is None
    assert session.dirty == ()  # all as on disk again


def test_a_setting_takes_a_range_and_loses_it_again(session: Session) -> None:
    path = ("soft_start",)
    assert session.set_value(RECIPE, path, "5 min") is None
    assert session.set_value(RECIPE, (*path, "low"), "3 min") is None
    assert session.record(RECIPE).soft_start.low == 180.0
    assert session.text_of(RECIPE, path) == "5 min"
    assert session.set_value(RECIPE, (*path, "low"), "") is None
    assert session.record(RECIPE).soft_start.low is None


def test_a_file_outside_the_open_load_can_be_edited_too(session: Session) -> None:
    other = ("recipe", "type-ii-clear")
    assert session.set_value(other, ("note",), "seen") is None
    assert session.set_value(("part", "lug"), ("material",), "6061-t7") == (
        "`6061-t7` is not a material of this site. The nearest is `6061-t6`"
    )
    assert session.dirty == (other,)


def test_an_edit_of_a_shared_record_counts_for_every_load(session: Session) -> None:
    session.set_value(RECIPE, ("current_density",), "25 A/ft2")
    assert session.library.case("valve-blocks-24").recipe is session.record(RECIPE)
    session.open("coupons-24")
    session.open("valve-blocks-24")
    assert session.text_of(RECIPE, ("current_density",)) == "25 A/ft2"
    assert session.dirty == (RECIPE,)


def test_records_that_an_edit_does_not_touch_are_the_same_ones(session: Session) -> None:
    rack, tables, hang = session.case.rack, session.case.tables, session.case.load.hangs[0]
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    assert session.case.rack is rack
    assert session.case.tables is tables
    assert session.case.load.hangs[0] is hang


def test_a_limit_that_the_site_adopts_counts_at_once(session: Session) -> None:
    site, limits = session.record(SITE), session.case.tables.limits
    assert session.set_record(SITE, replace(site, adopted=(ADOPTED,)), "adopt") == []
    assert session.case.tables.limits.hydrogen_limit.status is Status.ENTERED
    assert session.undo() == "adopt"
    assert session.case.tables.limits == limits


# --- whole records ---------------------------------------------------------------------------------------


def test_a_whole_record_keeps_what_was_typed_where_nothing_changed(session: Session) -> None:
    recipe = session.record(RECIPE)
    density = replace(recipe.current_density, value=parse("3 A/dm2", CURRENT_DENSITY))
    faster = replace(recipe, current_density=density, note="faster")
    assert session.set_record(RECIPE, faster, "faster") == []
    assert session.record(RECIPE) == faster
    assert session.text_of(RECIPE, ("current_density",)) == "3 A/dm2"
    assert session.text_of(RECIPE, ("current_density", "high")) == "28 A/ft2"
    assert session.undo() == "faster"


def test_a_whole_record_is_refused_with_every_problem(session: Session) -> None:
    load = session.record(LOAD)
    broken = replace(load, name="", hangs=(replace(load.hangs[0], tips_each=0),))
    front = "load valve-blocks-24"
    assert session.set_record(LOAD, broken, "broken") == [
        f"{front}, name: is empty: name. Put a name or a few words between the quotes",
        f"{front}, hang 1, tips that hold one part: `0` is less than the least allowed, 1. Check number and unit",
    ]
    assert not session.can_undo


def test_hangs_are_added_split_and_taken_away(session: Session) -> None:
    load = session.record(LOAD)
    first = replace(load.hangs[0], tips=("A1-A4",))
    second = replace(load.hangs[0], tips=("B1-B4",), turn=parse("90 deg", ANGLE))
    assert session.set_record(LOAD, replace(load, hangs=(first, second)), "split") == []
    assert session.record(LOAD).hangs == (first, second)
    assert session.set_record(LOAD, replace(load, hangs=(second,)), "away") == []
    assert session.record(LOAD).hangs == (second,)
    assert session.set_record(LOAD, replace(load, hangs=(first, second)), "back") == []
    assert session.record(LOAD).hangs == (first, second)


# --- undo ------------------------------------------------------------------------------------------------


def test_undo_and_redo_say_what_they_take_back(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(LOAD, ("order",), "KY-1")
    refused = session.set_value(LOAD, ("hangs", 0, "tips"), "Z1")
    assert refused
    session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A4")
    figures = session.plan.figures["current.set_A"].value
    tips = f"hang 1, tips: {TIPS} -> A1-A4 (load valve-blocks-24)"
    assert session.undo() == tips
    assert session.redo() == tips
    assert session.plan.figures["current.set_A"].value == figures
    assert session.redo() is None
    assert [session.undo(), session.undo(), session.undo(), session.undo()] == [
        tips,
        "order: KY-24817 -> KY-1 (load valve-blocks-24)",
        "current density: 24 A/ft2 -> 26 A/ft2 (load valve-blocks-24)",
        None,
    ]
    assert session.dirty == ()


def test_an_edit_after_undo_takes_the_place_of_what_was_undone(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.undo()
    session.set_value(LOAD, DENSITY, "25 A/ft2")
    assert not session.can_redo
    session.undo()
    assert not session.can_undo


def test_undo_goes_back_to_the_load_where_the_edit_was_made(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.open("coupons-24")
    assert session.dirty == (LOAD,)
    assert session.undo() == "current density: 24 A/ft2 -> 26 A/ft2 (load valve-blocks-24)"
    assert session.name == "valve-blocks-24"
    assert session.dirty == ()


def test_undo_tells_what_moved_back(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    moved = session.moved
    session.undo()
    assert session.moved == moved
    session.open("valve-blocks-24")
    assert session.moved == frozenset()


# --- approval, units -------------------------------------------------------------------------------------


def test_an_approval_names_who_and_when_and_holds_for_the_values_as_they_stand(session: Session) -> None:
    draft = ("recipe", "chrome-plate-grind")
    session.open("rod-40x900")
    assert session.plan.status == "draft"
    assert session.approve(draft[1], "R. Ames ", on="2026-03-14") == []
    record = session.record(draft)
    assert (record.approved_by, record.approved_on) == ("R. Ames", "2026-03-14")
    assert session.plan.status == "approved"
    assert session.set_value(draft, ("stock",), "80 um") is None
    assert effective_status(session.record(draft)) == "draft"
    session.undo()
    assert session.undo() == "approved by R. Ames (recipe chrome-plate-grind)"
    assert session.plan.status == "draft"


def test_an_approval_needs_a_name(session: Session) -> None:
    assert session.approve(RECIPE[1], "  ") == ["no name is given. Say who approves the recipe"]
    assert session.approve(RECIPE[1], "a\x1bb")
    assert not session.can_undo


def test_units_are_toggled_without_touching_what_is_typed(session: Session) -> None:
    assert session.style == Style("metric")
    session.toggle_units()
    assert session.style == Style("us")
    assert session.text_of(RECIPE, ("aim",)) == "50 um"
    session.toggle_units()
    assert session.style.system == "metric"


def test_no_file_is_touched_by_edits_undo_and_opening(tmp_path: Path) -> None:
    shop = make_shop(tmp_path)
    before = content(shop)
    times = {path: path.stat().st_mtime_ns for path in shop.rglob("*")}
    session = session_on(shop, tmp_path / "memory")
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(RECIPE, ("note",), "seen")
    session.approve(RECIPE[1], "R. Ames")
    session.undo()
    session.open("coupons-24")
    session.toggle_units()
    session.close()
    assert content(shop) == before
    assert {path: path.stat().st_mtime_ns for path in shop.rglob("*")} == times
