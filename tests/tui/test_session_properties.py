"""Whatever is edited in whatever order: as many undos lead back, and what is saved is what is seen."""

from collections.abc import Iterator
from dataclasses import replace
from functools import cache
from pathlib import Path
from tempfile import TemporaryDirectory
from typing import Any

from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.files.library import Library
from lineplanner.inputs.declared import Path as FieldPath
from lineplanner.inputs.declared import Shape, described, shape_of
from lineplanner.inputs.load import Hang, Load
from lineplanner.tui.places import Place
from lineplanner.tui.session import Session
from tests.tui.shops import LOAD, content, fields_of, make_shop, session_on

Ref = tuple[str, str]
TEXTS = (
    "",
    "0",
    "3",
    "12",
    "yes",
    "false",
    "2,5 mm",
    "[/b]",
    "A1-A3",
    "A1, B2",
    "unknown",
    "lug",
    "6061",
    "both",
)
UNITS = {"length": "mm", "thickness": "um", "time": "min", "current density": "A/ft2", "temperature": "degC"}


@cache
def shop() -> tuple[Any, Path]:
    """One shop for all examples; the handle keeps it."""
    folder = TemporaryDirectory()
    return folder, make_shop(Path(folder.name))


def all_fields(session: Session) -> list[tuple[Ref, FieldPath, Place]]:
    return [(ref, *one) for ref in session.refs() for one in fields_of(session.record(ref))]


@cache
def fields_at_first() -> list[tuple[Ref, FieldPath, Place]]:
    return all_fields(session_on(shop()[1]))


def texts_for(place: Place) -> Iterator[str]:
    """Texts that the field may well take, and some that it refuses."""
    yield from TEXTS
    kind = place.field.kind
    if kind is not None:
        unit = UNITS.get(kind.name, kind.unit)
        yield from (f"{number} {unit}".removesuffix(" 1") for number in ("1", "20", "0.05", "24.50"))
    if place.shape is Shape.CHOICE:
        yield from map(str, shape_of(place.type)[1])
    if place.shape is Shape.MANY and shape_of(described(shape_of(place.type)[1][0])[0])[0] is Shape.PAIR:
        yield "10 mm, 20 mm; 30 mm, 40 mm"


@st.composite
def texts(draw: st.DrawFn) -> tuple[Ref, FieldPath, str]:
    ref, path, place = draw(st.sampled_from(fields_at_first()))
    return ref, path, draw(st.sampled_from(list(texts_for(place))))


HANGS = st.lists(
    st.builds(
        Hang,
        part=st.sampled_from(["valve-block", "lug", "test-coupon"]),
        tips=st.sampled_from([("A1",), ("A2-A4",), ("B1", "B3"), ("C1-C4",), ("D1",)]),
        side=st.sampled_from(["front", "back"]),
    ),
    min_size=1,
    max_size=4,
)
EDITS = st.lists(
    st.one_of(
        texts(),
        HANGS,
        st.just("undo"),
        st.just("redo"),
        st.just("open"),
    ),
    max_size=12,
)


def make(session: Session, edit: Any) -> None:
    """One edit, taken or refused, or a step back or forth."""
    if edit == "undo":
        session.undo()
    elif edit == "redo":
        session.redo()
    elif edit == "open":
        session.open("coupons-24" if session.name == LOAD[1] else LOAD[1])
    elif isinstance(edit, list):
        load: Load = session.record(LOAD)
        session.set_record(LOAD, replace(load, hangs=tuple(edit)), "hung anew")
    else:
        try:
            session.set_value(*edit)
        except LookupError:  # an entry of a list that an edit before took out
            assert not place_exists(session, edit)


def place_exists(session: Session, edit: tuple[Ref, FieldPath, str]) -> bool:
    return any(ref == edit[0] and path == edit[1] for ref, path, _ in all_fields(session))


def seen(session: Session) -> tuple[Any, ...]:
    """All records with the texts of their fields."""
    refs = {ref for ref, _, _ in fields_at_first()}
    return tuple(
        (ref, session.record(ref), [session.text_of(ref, path) for path, _ in fields_of(session.record(ref))])
        for ref in sorted(refs)
    )


@settings(max_examples=20, deadline=None)
@given(EDITS)
def test_any_edits_followed_by_as_many_undos_lead_back_and_redo_forth_again(edits: list[Any]) -> None:
    session = session_on(shop()[1])
    first, files = seen(session), content(shop()[1])
    for edit in edits:
        make(session, edit)
    while session.can_redo:
        session.redo()
    last, dirty = seen(session), session.dirty
    while session.can_undo:
        session.undo()
    assert (seen(session), session.dirty) == (first, ())
    while session.can_redo:
        session.redo()
    assert (seen(session), session.dirty) == (last, dirty)
    assert content(shop()[1]) == files


@settings(max_examples=15, deadline=None)
@given(EDITS)
def test_what_is_saved_reads_back_as_what_is_seen_and_undone_and_saved_as_what_was(edits: list[Any]) -> None:
    folder = shop()[1]
    session, before = session_on(folder), content(folder)
    for edit in edits:
        make(session, edit)
    dirty = session.dirty
    try:
        session.save()
        for ref in dirty:
            assert Library(folder).record(*ref) == session.record(ref)
            assert Library(folder).entry(*ref).document.raw == session.library.entry(*ref).document.raw
    finally:
        while session.undo():
            pass
        session.save()
    assert content(folder) == before
