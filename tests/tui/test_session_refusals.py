"""Texts that a session refuses: with the file reader's reason, and everything stays as it was."""

from pathlib import Path
from typing import Any

import pytest

from lineplanner.files.differences import Change, applied
from lineplanner.files.models import build
from lineplanner.files.problems import text_of
from lineplanner.inputs.declared import Path as FieldPath
from lineplanner.inputs.declared import Shape
from lineplanner.quantities import COUNT, RATIO
from lineplanner.tui.session import Session
from tests.tui.shops import LOAD, RACK, RECIPE, fields_of, make_shop, session_on

DENSITY: FieldPath = ("change", "current_density")


@pytest.fixture(scope="module")
def shop(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A shop that no test of this module saves to."""
    return make_shop(tmp_path_factory.mktemp("site"))


@pytest.fixture
def session(shop: Path) -> Session:
    return session_on(shop)


def state(session: Session) -> tuple[Any, ...]:
    """All that a refused edit must leave as it is."""
    records = [session.record(ref) for ref in session.refs()]
    return session.dirty, session.can_undo, session.moved, session.case, session.plan, records


HOSTILE = {
    "decimal comma": "2,5 {unit}",
    "grouping": "1 000 {unit}",
    "thousands": "1.000,5 {unit}",
    "nan": "nan {unit}",
    "inf": "inf {unit}",
    "expression": "9**9**9 {unit}",
    "markup": "[/b]",
    "markup before": "[bold]24 {unit}[/bold]",
    "no unit": "24",
    "other unit": "3 lightyears",
    "long": "x" * 5000,
    "long number": "1" * 5000,
    "control": "2\x1b[2J {unit}",
    "two numbers": "2 {unit} 3 {unit}",
}


def reader_says(session: Session, ref: tuple[str, str], keys: FieldPath, value: Any) -> list[str]:
    """What the reader of a file says of a value at a place, without the place."""
    entry = session.library.entry(*ref)
    raw = applied(entry.document.raw, [Change(keys, None, value)])
    _, problems = build(entry.kind.record, {key: one for key, one in raw.items() if key != "format"})
    return [text_of(one.key, one.facts) for one in problems]


@pytest.mark.parametrize("text", HOSTILE.values(), ids=HOSTILE)
def test_a_text_that_is_no_value_is_refused_with_the_readers_reason_at_every_field(
    session: Session, text: str
) -> None:
    before, tried = state(session), 0
    for ref in session.refs():
        for path, place in fields_of(session.record(ref)):
            plain = (place.field.kind or RATIO) in (RATIO, COUNT)
            if place.shape is not Shape.NUMBER or plain:
                continue
            typed = text.format(unit="" if text == "24" else place.field.kind.unit)
            said = session.set_value(ref, path, typed)
            assert said, (ref, path)
            assert said in reader_says(session, ref, place.keys, typed), (ref, path)
            tried += 1
    assert tried > 100
    assert state(session) == before


@pytest.mark.parametrize(
    "text", ["2,5", "1 000", "nan", "inf", "9**9**9", "[/b]", "x" * 5000, "1.5", "1e3", "-1"]
)
def test_a_count_takes_whole_numbers_only(session: Session, text: str) -> None:
    before = state(session)
    for ref, path in ((RACK, ("tips", 0, "count")), (LOAD, ("hangs", 0, "tips_each"))):
        assert session.set_value(ref, path, text)
    assert state(session) == before


@pytest.mark.parametrize(
    "text", ["2,5", "1 000", "nan", "inf", "9**9**9", "[/b]", "x" * 5000, "-1", "0.5 mm"]
)
def test_a_ratio_takes_plain_numbers_and_percents_only(session: Session, text: str) -> None:
    before = state(session)
    assert session.set_value(LOAD, ("change", "strike_ratio"), text)
    assert state(session) == before
    assert session.set_value(LOAD, ("change", "strike_ratio"), "150 %") is None


def test_a_choice_and_a_yes_or_no_say_what_they_take(session: Session) -> None:
    before = state(session)
    assert session.set_value(LOAD, ("hangs", 0, "side"), "frond") == (
        "`frond` is not a choice here; the nearest is `front`. Choose one of `front`, `back`, `both`"
    )
    assert session.set_value(RECIPE, ("live_entry",), "maybe") == (
        "`maybe` is neither true nor false. Write `true` or `false` without quotes"
    )
    assert session.set_value(RECIPE, ("process",), "") is not None
    assert state(session) == before
    assert session.set_value(RECIPE, ("live_entry",), "yes") is None
    assert session.record(RECIPE).live_entry is True


def test_what_must_be_there_cannot_be_emptied(session: Session) -> None:
    before = state(session)
    assert session.set_value(LOAD, ("name",), " ") == (
        "is empty: name. Put a name or a few words between the quotes"
    )
    assert session.set_value(RACK, ("width",), "") == (
        "Nothing is entered. Give a number with a unit such as `120 mm`"
    )
    assert session.set_value(RECIPE, ("aim",), "") == (
        'the recipe has no aim. Add `aim = "25 um"` or `aim_weight = "..."`'
    )
    assert session.set_value(LOAD, ("hangs", 0, "tips"), "") == (
        "does not say where the parts hang. Give one of `tips`, `at` and `count`"
    )
    assert state(session) == before


def test_words_longer_than_anything_printed_are_refused(session: Session) -> None:
    assert (
        session.set_value(LOAD, ("note",), "x" * 5000) == "longer than any text that is printed. Shorten it"
    )
    assert session.set_value(LOAD, ("note",), "bell \x07") == (
        "`bell \\x07` holds characters that cannot be shown. Take them out"
    )
    assert not session.can_undo


def test_rules_between_fields_and_between_files_hold(session: Session) -> None:
    before = state(session)
    assert session.set_value(RECIPE, ("minimum",), "60 um") == (
        "the minimum 60 um is more than the aim 50 um. Raise the aim or lower the minimum"
    )
    said = session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A9")
    assert said is not None
    assert said.startswith("`A5` is not a tip of rack `spline-24`")
    assert session.set_value(LOAD, ("tank",), "C1") is not None
    assert session.set_value(LOAD, ("recipe",), "hardcoat-50-6062") == (
        "`hardcoat-50-6062` is not a recipe of this site. The nearest is `hardcoat-50-6061`"
    )
    assert state(session) == before


def test_a_refusal_that_lies_elsewhere_says_where(session: Session) -> None:
    said = session.set_value(RACK, ("tips", 0, "count"), "3")
    assert said == (
        "load valve-blocks-24, hang 1, tips: `A4` is not a tip of rack `spline-24`. Its tips: "
        "`A1-A3`, `B1-B4`, `C1-C4`, `D1-D4`, `E1-E4`, `F1-F4`"
    )
    assert session.dirty == ()


def test_a_refused_edit_leaves_what_can_be_redone(session: Session) -> None:
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.undo()
    session.set_value(LOAD, DENSITY, "26")
    assert session.can_redo
