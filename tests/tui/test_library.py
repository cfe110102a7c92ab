"""The library of the site: found by any text, copied, renamed, taken out only if nothing uses it."""

from pathlib import Path

import pytest
from textual.pilot import Pilot

from lineplanner.errors import InputError
from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError
from lineplanner.report.style import Style
from lineplanner.tui.session import Session
from lineplanner.tui.stock import copied, renamed, stock, take_out
from tests.tui.driving import drive, site, text_on


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    return site(tmp_path / "shop")


@pytest.fixture
def session(shop: Path) -> Session:
    found = Session(Library(shop), style=Style("metric"), memory=None)
    found.open("valve-blocks-24")
    return found


def test_every_file_is_listed_with_what_uses_it(session: Session) -> None:
    found = {one.ref: one for one in stock(session)}
    assert found["part", "valve-block"].users == (("load", "valve-blocks-24"),)
    assert ("recipe", "hardcoat-50-6061") in found
    assert "load" in {kind for kind, _ in found["rack", "spline-24"].users}
    assert "titanium" in found["rack", "spline-24"].found_by


def test_a_file_that_cannot_be_read_is_listed_as_such(session: Session, shop: Path) -> None:
    (shop / "rack_library" / "parts" / "odd.toml").write_text("nothing = 1\n", encoding="utf-8")
    (odd,) = (one for one in stock(session) if one.ref == ("part", "odd"))
    assert odd.unread


def test_a_copy_holds_what_is_edited_and_keeps_its_comments(session: Session, shop: Path) -> None:
    assert session.set_value(("part", "lug"), ("name",), "another lug") is None
    path = copied(session, ("part", "lug"), "lug-b")
    text = path.read_text(encoding="utf-8")
    assert 'name = "another lug"' in text
    assert [line for line in text.splitlines() if line.startswith("#")] == [
        line
        for line in (shop / "rack_library" / "parts" / "lug.toml").read_text(encoding="utf-8").splitlines()
        if line.startswith("#")
    ]
    with pytest.raises(FilesError):
        copied(session, ("part", "lug"), "lug-b")  # taken
    with pytest.raises(FilesError):
        copied(session, ("part", "lug"), "No name")


def test_what_is_used_open_or_changed_stays(session: Session) -> None:
    for ref, key in ((("part", "lug"), "stock.used"), (("load", "valve-blocks-24"), "stock.open")):
        with pytest.raises(InputError) as told:
            take_out(session, ref)
        assert told.value.key == key
    copied(session, ("part", "lug"), "lug-b")
    session.set_value(("part", "lug-b"), ("name",), "changed")
    with pytest.raises(InputError) as told:
        take_out(session, ("part", "lug-b"))
    assert told.value.key == "stock.changed"


def test_what_is_taken_out_is_kept_under_a_hidden_name(session: Session) -> None:
    path = copied(session, ("part", "lug"), "lug-b")
    text = path.read_text(encoding="utf-8")
    kept = take_out(session, ("part", "lug-b"))
    assert kept.read_text(encoding="utf-8") == text
    assert not path.exists()
    assert "lug-b" not in session.names("part")
    copied(session, ("part", "lug"), "lug-b")
    assert take_out(session, ("part", "lug-b")) != kept  # nothing is written over


def test_a_file_that_nothing_uses_gets_another_name(session: Session) -> None:
    copied(session, ("part", "lug"), "lug-b")
    assert renamed(session, ("part", "lug-b"), "lug-c").name == "lug-c.toml"
    assert "lug-b" not in session.names("part")
    assert session.record(("part", "lug-c")) == session.record(("part", "lug"))
    with pytest.raises(InputError):
        renamed(session, ("part", "lug"), "lug-d")


def test_the_screen_finds_copies_edits_and_takes_out(shop: Path) -> None:
    parts = shop / "rack_library" / "parts"

    async def steps(pilot: Pilot[int]) -> None:
        await pilot.press(*"valve", "enter", "L", *"relay")
        await pilot.pause()
        assert "relay-lids-20" in text_on(pilot)
        assert "valve-block" not in text_on(pilot)
        await pilot.press("f3", "2", "enter")
        await pilot.pause()
        assert (parts / "relay-lid2.toml").is_file()
        assert "copied to relay-lid2" in text_on(pilot)
        await pilot.press("enter")
        await pilot.pause()
        assert "part relay-lid2" in text_on(pilot)
        await pilot.press("f10", "f9", "y")
        await pilot.pause()
        assert "is out; its file is kept as .relay-lid2.1.removed" in text_on(pilot)
        assert not (parts / "relay-lid2.toml").exists()
        await pilot.press("f9", "y")
        await pilot.pause()
        assert "relay-lid is used by load relay-lids-20" in text_on(pilot)
        assert (parts / "relay-lid.toml").is_file()

    drive(steps, shop)
