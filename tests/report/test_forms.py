"""Forms of every record of the demo shop: each field once, with a label and a text that reads back."""

from collections import Counter
from collections.abc import Iterator
from dataclasses import fields, is_dataclass, replace
from typing import Any

import pytest

from lineplanner.files.kinds import kinds
from lineplanner.files.library import Library
from lineplanner.inputs.approval import approved
from lineplanner.inputs.declared import Path, declared, forms_of, shape_of
from lineplanner.inputs.part import Hole, Part, Plate
from lineplanner.inputs.recipe import Change, Recipe
from lineplanner.inputs.values import Ranged
from lineplanner.plan import plan
from lineplanner.report.form_entries import completed, draft_for, draft_of_form, put, still_fits, without
from lineplanner.report.form_help import (
    completed_text,
    field_lines,
    figure_of,
    fitting_rows,
    help_lines,
    next_choice,
    understood,
)
from lineplanner.report.form_names import names_for
from lineplanner.report.form_rows import UNKNOWN, YES, Form, Heading, Known, Row, Takes
from lineplanner.report.forms import form_of
from lineplanner.report.style import Style
from lineplanner.report.views import why_lines
from lineplanner.units import System, parse
from tests.report.conftest import LIBRARY

KINDS = ("load", "recipe", "material", "bath", "line", "rack", "part", "site")
RECORDS = [(kind, stem) for kind in KINDS for stem in LIBRARY.stems(kind)]
STYLE = Style("metric", ascii=True)
HOSTILE = {
    "comma": "2,5 mm",
    "grouping": "1 000 mm",
    "nan": "nan mm",
    "inf": "inf A",
    "expression": "9**9**9 A",
    "markup": "[/b] mm",
    "long": "7" * 5000,
    "no unit at all": "mm",
}


def known(library: Library = LIBRARY, system: System = "metric", **more: Any) -> Known:
    return Known(style=Style(system, ascii=True), stems=lambda kind: tuple(library.stems(kind)), **more)


def form(kind: str, stem: str, **more: Any) -> Form:
    return form_of(LIBRARY.record(kind, stem), known=known(**more))


def leaves(value: Any, path: Path = ()) -> Iterator[Path]:
    """Every value of a record by its path, walked over the values themselves and not over the declarations."""
    if isinstance(value, Ranged):
        yield from ((*path, name) for name in ("value", "low", "high"))
    elif is_dataclass(value):
        for one in fields(value):
            yield from leaves(getattr(value, one.name), (*path, one.name))
    elif isinstance(value, tuple) and any(not isinstance(one, str) for one in value):
        for index, one in enumerate(value):
            yield from leaves(one, (*path, index))
    else:
        yield path


def headed(form: Form) -> set[Path]:
    return {one.path for one in form.rows if isinstance(one, Heading)}


@pytest.mark.parametrize(("kind", "stem"), RECORDS, ids=lambda value: value)
def test_every_field_of_every_record_appears_exactly_once_with_a_label(kind: str, stem: str) -> None:
    made, record = form(kind, stem), LIBRARY.record(kind, stem)
    shown = Counter(row.path for row in made.values)
    assert {path: count for path, count in shown.items() if count != 1} == {}
    for path in leaves(record):
        # an empty list or a group that is not there is a heading; an unset setting shows its value's row
        assert {path, (*path, "value")} & shown.keys() or path in headed(made), path
    assert [row.path for row in made.values if not row.label.strip()] == []


@pytest.mark.parametrize("system", ["metric", "us"])
@pytest.mark.parametrize(("kind", "stem"), RECORDS, ids=lambda value: value)
def test_every_text_reads_back_as_exactly_the_value(kind: str, stem: str, system: System) -> None:
    for row in form(kind, stem, system=system).values:
        if row.value is None:
            assert row.text in ("", UNKNOWN)
        elif row.kind is not None:
            assert parse(row.text, row.kind) == row.value, row
        elif row.takes is Takes.COUNT:
            assert int(row.text) == row.value
        elif row.takes is Takes.YES_NO:
            assert (row.text == YES) is row.value
        elif row.takes is Takes.NAMES:
            assert isinstance(row.value, tuple)
            assert tuple(row.text.split(", ") if row.text else ()) == row.value
        else:
            assert row.text == str(row.value)


@pytest.mark.parametrize(("kind", "stem"), RECORDS, ids=lambda value: value)
def test_every_choice_and_every_reference_stands_among_what_can_be_chosen(kind: str, stem: str) -> None:
    for row in form(kind, stem).values:
        if row.takes in (Takes.CHOICE, Takes.YES_NO, Takes.REFERENCE):
            assert row.choices
            assert row.text in row.choices or (row.optional and not row.text), row


def test_every_declared_field_of_every_kind_has_a_row_or_a_heading() -> None:
    """From the declarations, so that a field added later cannot be forgotten."""
    for kind in KINDS:
        record = kinds()[kind].record
        for one in forms_of(record).values() if kind == "part" else (record,):
            example = next(
                (
                    found
                    for found in map(lambda stem, k=kind: LIBRARY.record(k, stem), LIBRARY.stems(kind))
                    if type(found) is one
                ),
                None,
            )
            if example is None:
                continue
            tops = {line.path[0] for line in form_of(example).rows}
            assert tops == {field.name for field in declared(one).values()}


def test_an_echo_says_both_unit_systems() -> None:
    row = form("recipe", "hardcoat-50-6061").row(("current_density", "value"))
    assert row.text == "24 A/ft2"  # as the shop wrote it: the metric text would have seventeen digits
    assert row.echo == "2.58 A/dm2 = 24 A/ft2"
    assert row.elsewise == "2.58 A/dm2"


def test_the_text_as_typed_wins_over_the_one_worked_out() -> None:
    record = LIBRARY.record("recipe", "hardcoat-50-6061")
    typed = {("current_density", "value"): "24 ASF"}
    made = form_of(record, known=known(text_of=lambda path: typed.get(path, "")))
    assert made.row(("current_density", "value")).text == "24 ASF"
    assert made.row(("aim", "value")).text == "50 um"


def test_a_setting_without_a_value_shows_no_range() -> None:
    made = form("recipe", "chromic")
    assert LIBRARY.record("recipe", "chromic").current_density is None
    assert ("current_density", "low") not in {row.path for row in made.values}


def test_a_text_of_several_lines_is_left_to_the_file() -> None:
    record = replace(LIBRARY.record("load", "valve-blocks-24"), note="one\ntwo")
    assert form_of(record).row(("note",)).locked


# --- what a change at the load means ---------------------------------------------------------------------


def load_form(stem: str) -> Form:
    case = LIBRARY.case(stem)
    return form_of(case.load, known=known(recipe=case.recipe))


def test_a_change_inside_the_range_is_a_deviation() -> None:
    row = load_form("pistons-16-masked").row(("change", "current_density"))
    assert row.mark == "deviation"
    # 24 A/ft2 = 2.58 A/dm2, 22 = 2.37, 28 = 3.01, 27 = 2.91 (1 ft2 = 9.290304 dm2, exact)
    assert row.beside == "recipe 2.58 A/dm2, range 2.37 A/dm2 to 3.01 A/dm2; the load runs 2.91 A/dm2"


def test_a_change_outside_the_range_says_so_in_words() -> None:
    row = load_form("grip-rails-dye").row(("change", "current_density"))
    assert row.mark == "deviation, OUTSIDE THE RANGE"


def test_a_setting_as_filed_carries_no_mark_and_shows_the_recipe() -> None:
    row = load_form("valve-blocks-24").row(("change", "temperature"))
    assert row.mark == ""
    assert row.beside == "recipe -0.5 degC, range -2 degC to 1.5 degC; the load runs it as filed"


def test_a_setting_that_the_recipe_does_not_have_says_so() -> None:
    row = load_form("valve-blocks-24").row(("change", "hold_voltage"))
    assert (row.mark, row.beside) == ("", "not in the recipe")
    case = LIBRARY.case("valve-blocks-24")
    changed = replace(case.load, change=Change(soft_start=600.0))
    bare = replace(case.recipe, soft_start=None)
    assert form_of(changed, known=known(recipe=bare)).row(("change", "soft_start")).mark == (
        "deviation, NO RANGE IN THE RECIPE"
    )


def test_a_change_to_the_recipes_own_value_is_no_deviation() -> None:
    case = LIBRARY.case("valve-blocks-24")
    assert case.recipe.temperature is not None
    same = replace(case.load, change=Change(temperature=case.recipe.temperature.value))
    assert form_of(same, known=known(recipe=case.recipe)).row(("change", "temperature")).mark == ""


def test_the_approval_is_not_typed_and_a_changed_recipe_counts_as_a_draft() -> None:
    recipe: Recipe = LIBRARY.record("recipe", "hardcoat-50-6061")
    made = form_of(recipe)
    assert [row.path[0] for row in made.values if row.locked] == [
        "status",
        "approved_by",
        "approved_on",
        "approved_content",
    ]
    assert made.row(("status",)).mark == ""
    edited = replace(recipe, soak=60.0)
    assert form_of(edited).row(("status",)).mark == "DRAFT"
    again = approved(edited, by="process engineer", on="2026-05-04")
    assert form_of(again).row(("status",)).mark == ""


# --- adding and taking out -------------------------------------------------------------------------------


def entries() -> list[tuple[str, str, Path]]:
    """Every entry of every list of records or pairs in the demo shop's first files of each kind."""
    found = []
    for kind in KINDS:
        for stem in LIBRARY.stems(kind):
            lists = [
                one.path
                for one in form(kind, stem).rows
                if isinstance(one, Heading)
                and one.count
                and not any(isinstance(step, int) for step in one.path)
            ]
            found += [(kind, stem, path) for path in lists]
    return found


@pytest.mark.parametrize(("kind", "stem", "path"), entries(), ids=str)
def test_an_entry_typed_again_is_the_entry(kind: str, stem: str, path: Path) -> None:
    """What a list's first entry says, typed into a new one field by field, makes an equal one."""
    record = LIBRARY.record(kind, stem)
    old = record
    for step in path:
        old = getattr(old, str(step))
    draft = draft_for(record, path)
    assert draft is not None
    assert draft.place == (*path, len(old))
    first = {
        row.path[len(path) + 1 :]: row.text
        for row in form(kind, stem).values
        if row.path[: len(path) + 1] == (*path, 0)
    }
    texts = {
        row.path: first.get(row.path[len(draft.place) :], "") for row in draft.rows() if isinstance(row, Row)
    }
    done = completed(record, draft, texts)
    assert (done.missing, done.refused) == ((), None)
    new = done.record
    for step in path:
        new = getattr(new, str(step))
    assert new[:-1] == old
    for row in draft.rows():
        if isinstance(row, Row):
            assert _at(new[-1], row.path[len(draft.place) :]) == _at(old[0], row.path[len(draft.place) :])
    assert without(done.record, (*path, len(old))) == record


def _at(value: Any, path: Path) -> Any:
    for step in path:
        value = None if value is None else value[step] if isinstance(step, int) else getattr(value, step)
    return value


def test_nothing_of_an_entry_counts_before_what_it_needs_is_there() -> None:
    record = LIBRARY.record("rack", "spline-24")
    draft = draft_for(record, ("tips",))
    assert draft is not None
    assert draft.label == "tip row"
    missing = completed(record, draft, {}).missing
    assert missing == ("row", "tips", "first tip, x", "first tip, drop", "kind", "tip material")


def test_what_cannot_be_read_in_an_entry_is_refused_at_its_field() -> None:
    record = LIBRARY.record("load", "rod-40x900")
    draft = draft_for(record, ("thieves",))
    assert draft is not None
    place = draft.place
    texts = {(*place, "name"): "ring", (*place, "area"): "0,59 dm2"}
    done = completed(record, draft, texts)
    assert done.record is None
    assert done.refused == {
        (*place, "area"): "`0,59 dm2` has a decimal comma. Use a point: `0.59 dm2`",
    }


def test_a_group_that_is_missing_is_added_as_a_whole_and_taken_out_again() -> None:
    record = LIBRARY.record("line", "kestrel-yard")
    bare = without(record, ("tanks", 0, "exhaust"))
    assert bare.tanks[0].exhaust is None
    heading = next(one for one in form_of(bare).rows if one.path == ("tanks", 0, "exhaust"))
    assert isinstance(heading, Heading)
    assert (heading.adds, heading.removes, heading.how) == (True, False, "none")
    draft = draft_for(bare, heading.path)
    assert draft is not None
    done = completed(bare, draft, {(*heading.path, "flow"): "7200 m3/h"})
    assert done.record.tanks[0].exhaust.flow == 2.0  # 7200 m3/h / 3600 s/h
    assert completed(bare, draft, {(*heading.path, "flow"): UNKNOWN}).record.tanks[0].exhaust.flow is None


@pytest.mark.parametrize("stem", sorted(LIBRARY.stems("part")))
@pytest.mark.parametrize("form_name", sorted(forms_of(Part)))
def test_a_part_takes_another_form_and_keeps_what_both_have(stem: str, form_name: str) -> None:
    part = LIBRARY.record("part", stem)
    draft = draft_of_form(part, form_name)
    if part.form == form_name:
        assert draft is None
        return
    assert draft is not None
    texts = {}
    for row in draft.rows():
        if isinstance(row, Row) and not row.optional:
            size = {"inner_diameter": "10 mm", "area": "4 dm2"}.get(str(row.path[-1]), "20 mm")
            texts[row.path] = {"shape": "rectangle", "measured_by": "model"}.get(str(row.path[-1]), size)
    done = completed(part, draft, texts)
    assert done.refused is None
    assert done.record.form == form_name
    assert (done.record.name, done.record.material, done.record.masks) == (
        part.name,
        part.material,
        part.masks,
    )


def test_a_draft_notices_that_its_place_is_gone() -> None:
    record = LIBRARY.record("line", "kestrel-yard")
    draft = draft_for(record, ("tanks", 4, "joints"))
    assert draft is not None
    assert still_fits(record, draft)
    assert not still_fits(without(record, ("tanks", 4)), draft)


def test_put_changes_one_value_and_nothing_else() -> None:
    part: Plate = LIBRARY.record("part", "pump-cover")
    changed: Plate = put(part, ("holes", 1, "diameter"), 0.005)
    assert changed.holes[1].diameter == 0.005
    assert put(changed, ("holes", 1, "diameter"), part.holes[1].diameter) == part
    assert isinstance(changed.holes[1], Hole)


# --- while typing ----------------------------------------------------------------------------------------


@pytest.mark.parametrize("text", HOSTILE.values(), ids=HOSTILE)
@pytest.mark.parametrize(
    ("kind", "stem"), [("load", "valve-blocks-24"), ("recipe", "chrome-flash"), ("part", "piston")]
)
def test_hostile_text_is_answered_with_a_reason_in_every_quantity(kind: str, stem: str, text: str) -> None:
    for row in form(kind, stem).values:
        if row.takes is Takes.QUANTITY:
            said = understood(row, text, STYLE)
            assert said.reason, row
            assert not said.echo
            assert len(said.reason) < 300


def test_a_quantity_is_echoed_in_both_systems_as_it_is_typed() -> None:
    row = form("recipe", "hardcoat-50-6061").row(("current_density", "value"))
    assert understood(row, "24 A/ft2", STYLE).echo == "= 2.58 A/dm2 = 24 A/ft2"
    assert understood(row, "2.5", STYLE).reason == (
        "`2.5` has no unit. Give a number with a unit such as `2.5 A/dm2`"
    )


def test_what_is_not_known_may_be_said_where_the_field_takes_it() -> None:
    row = form("material", "6061-t6").row(("tensile_strength",))
    assert understood(row, UNKNOWN, STYLE).echo == "not known"


def test_a_beginning_that_fits_one_choice_is_that_choice() -> None:
    row = form("load", "valve-blocks-24").row(("hangs", 0, "facing"))
    assert completed_text(row, "ed") == "edge-on"
    assert completed_text(row, "z") == "z"
    assert understood(row, "z", STYLE).reason == "Choose one of flat, edge-on"
    assert (next_choice(row, "flat", 1), next_choice(row, "flat", -1)) == ("edge-on", "edge-on")


def test_words_are_never_completed() -> None:
    row = form("load", "valve-blocks-24").row(("tank",))
    assert completed_text(row, "H") == "H"


def test_under_a_refused_field_stand_the_reason_and_what_is_in_force() -> None:
    row = form("recipe", "hardcoat-50-6061").row(("current_density", "value"))
    lines = field_lines(row, "2,5", "2,5", "`2,5` has a decimal comma", STYLE, new=False)
    assert lines[:2] == ["NOT TAKEN: `2,5` has a decimal comma", "in force: 24 A/ft2 = 2.58 A/dm2"]


def test_help_tells_label_range_example_and_place_in_the_file() -> None:
    record = LIBRARY.record("bath", "sulfuric-hard")
    lines = help_lines(form_of(record).row(("sulfuric_acid",)), record, STYLE)
    assert lines == [
        "free sulfuric acid",
        "takes a concentration with its unit, such as 180 g/L or 24 oz/gal",
        "units: g/L, oz/gal, mg/L, kg/m3, lb/gal",
        "allowed: at least 0 g/L, at most 600 g/L",
        "may be left out",
        "in the file: sulfuric_acid",
    ]


@pytest.mark.parametrize("kind", KINDS)
def test_every_row_has_a_help(kind: str) -> None:
    record = LIBRARY.record(kind, next(iter(LIBRARY.stems(kind))))
    for row in form_of(record, known=known()).rows:
        lines = help_lines(row, record, STYLE)
        assert lines[0] == row.label
        assert lines[-1].startswith("in the file: ")


def test_a_search_finds_fields_by_label_help_value_and_heading() -> None:
    made = form("line", "kestrel-yard")
    found = fitting_rows(made, "exhaust flow")
    assert found
    assert all(isinstance(one, Heading) or "exhaust" in str(one.path) for one in found)
    assert {one.path for one in fitting_rows(made, "s1 volume") if isinstance(one, Row)} == {
        ("tanks", 0, "volume")
    }
    assert fitting_rows(made, "zzz") == ()
    assert fitting_rows(made, "") == made.rows


def test_names_of_line_and_tables_are_offered() -> None:
    case = LIBRARY.case("valve-blocks-24")
    made = form_of(case.load, known=known(names=names_for("load", case)))
    assert made.row(("tank",)).choices == tuple(tank.name for tank in case.line.tanks)
    assert set(names_for("recipe", case)["bases"]) == {row.name for row in case.tables.alloys}
    assert names_for("site", case)["limit"]


def test_a_field_asks_for_a_figure_that_rests_on_it() -> None:
    assert figure_of(("change", "current_density")) == "current.density_A_per_m2"
    assert figure_of(("hangs", 0, "tips")) == "area"
    assert figure_of(("name",)) == "current.set_A"
    made = plan(LIBRARY.case("valve-blocks-24"))
    for path in (("aim",), ("current_density",), ("outline",), ("name",)):
        assert why_lines(made, figure_of(path), STYLE)


def test_the_forms_of_every_kind_are_looked_at() -> None:
    assert {kind for kind, found in kinds().items() if found.table is None} - {"cautions"} == set(KINDS)
    assert shape_of(kinds()["part"].record)[0].name == "FORMS"
