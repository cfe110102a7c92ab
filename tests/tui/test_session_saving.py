"""Saving: what was typed is in the file, all else of it is as it was, and nobody's changes are overwritten."""

import os
import sys
from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.files.library import Library, open_library
from lineplanner.files.problems import FileChangedError, FilesError, word
from lineplanner.files.site import packaged_site, user_folder
from lineplanner.plan import plan
from lineplanner.report.style import Style
from lineplanner.tui.session import Session
from tests.tui.shops import CHECKOUT, LOAD, RECIPE, content, file_of, make_shop, session_on

DENSITY = ("change", "current_density")
ODD = """\
# kept by hand, with care
format = 'lineplanner load 1'
name = "odd"   # two blanks before
recipe   = 'hardcoat-50-6061'
rack = "spline-24"
line = "kestrel-yard"
tank = "H1" # the cold one

# the first two rows
[[hang]]
part = "valve-block"
tips = [
    "A1-A4", # left
    "B1-B4",
]

# one alone
[[hang]]
part = "valve-block"
tips = ["C1"]
"""


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    return make_shop(tmp_path)


def changed_files(before: dict[str, bytes], shop: Path) -> list[str]:
    after = content(shop)
    assert before.keys() <= after.keys()
    return [name for name, found in after.items() if before.get(name) != found]


def test_a_saved_edit_changes_its_own_lines_only(shop: Path) -> None:
    session = session_on(shop)
    before = file_of(session, RECIPE).read_text(encoding="utf-8")
    session.set_value(RECIPE, ("current_density",), "25.50 A/ft2")
    assert session.save() == [file_of(session, RECIPE)]
    assert session.dirty == ()
    after = file_of(session, RECIPE).read_text(encoding="utf-8")
    assert after == before.replace('value = "24 A/ft2"', 'value = "25.50 A/ft2"')
    assert Library(shop).record(*RECIPE) == session.record(RECIPE)


def test_all_that_is_not_saved_is_saved_together_and_nothing_else_is_touched(shop: Path) -> None:
    session = session_on(shop)
    before = content(shop)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(RECIPE, ("note",), "seen")
    session.set_value(("site", "site"), ("altitude",), "300 m")
    session.set_value(("part", "valve-block"), ("mass",), "1.1 kg")
    session.set_value(("line", "kestrel-yard"), ("tanks", 0, "shower"), "true")
    assert len(session.save()) == 5
    assert changed_files(before, shop) == [
        "configs/lines/kestrel-yard.toml",
        "configs/recipes/hardcoat-50-6061.toml",
        "configs/site.toml",
        "rack_library/loads/valve-blocks-24.toml",
        "rack_library/parts/valve-block.toml",
    ]
    saved = plan(Library(shop).case("valve-blocks-24"))
    assert {k: f.value for k, f in saved.figures.items()} == {
        k: f.value for k, f in session.plan.figures.items()
    }
    assert session.save() == []


def test_edit_undo_and_save_leave_the_file_as_it_was(shop: Path) -> None:
    session = session_on(shop)
    before = content(shop)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A4")
    while session.undo():
        pass
    assert session.save() == []
    assert content(shop) == before


@pytest.mark.parametrize(
    "text",
    [ODD, ODD.replace("\n", "\r\n"), "\ufeff" + ODD, ODD.removesuffix("\n")],
    ids=["as people write", "lines of Windows", "byte order mark", "no last line end"],
)
def test_saving_undoing_and_saving_again_gives_the_same_bytes(shop: Path, text: str) -> None:
    path = shop / "rack_library/loads/odd.toml"
    path.write_bytes(text.encode("utf-8"))
    session, ref = session_on(shop, load="odd"), ("load", "odd")
    load = session.record(ref)
    session.set_value(ref, DENSITY, "26 A/ft2")
    session.set_value(ref, ("recipe",), "hardcoat-50-2024")
    session.set_value(ref, ("recipe",), "hardcoat-50-6061")
    session.set_value(ref, ("hangs", 1, "side"), "back")
    session.set_value(ref, ("hangs", 1, "side"), "front")
    session.set_value(ref, ("note",), 'a "quoted" word')
    session.set_record(
        ref, replace(session.record(ref), hangs=(*load.hangs, replace(load.hangs[1], tips=("C2",)))), "+"
    )
    session.set_record(ref, replace(session.record(ref), hangs=session.record(ref).hangs[1:]), "-")
    assert session.save() == [path]
    saved = path.read_bytes()
    assert saved != text.encode("utf-8")
    assert Library(shop).record(*ref) == session.record(ref)
    while session.undo():
        session.save()
    assert path.read_bytes() == text.encode("utf-8")
    while session.redo():
        pass
    session.save()
    assert path.read_bytes() == saved


def test_comments_stay_with_what_they_are_about(shop: Path) -> None:
    path = shop / "rack_library/loads/odd.toml"
    path.write_text(ODD, encoding="utf-8")
    session, ref = session_on(shop, load="odd"), ("load", "odd")
    session.set_value(ref, ("solution_drop",), "10 cm")
    session.set_value(ref, ("hangs", 0, "facing"), "edge-on")
    session.set_value(ref, ("hangs", 1, "tips"), "C1, C2")
    session.save()
    expected = ODD.replace("cold one\n", 'cold one\nsolution_drop = "10 cm"\n')
    expected = expected.replace('"B1-B4",\n]\n', '"B1-B4",\n]\nfacing = "edge-on"\n')
    assert path.read_text(encoding="utf-8") == expected.replace('["C1"]', '["C1", "C2"]')


# --- files that somebody else changed --------------------------------------------------------------------


def test_a_file_changed_on_disk_meanwhile_is_not_overwritten_and_no_other_is_saved(shop: Path) -> None:
    session = session_on(shop)
    session.set_value(RECIPE, ("note",), "seen")
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    path = file_of(session, LOAD)
    path.write_text(path.read_text(encoding="utf-8") + "# by hand\n", encoding="utf-8")
    before = content(shop)
    assert session.changed_on_disk == (LOAD,)
    with pytest.raises(FileChangedError) as caught:
        session.save()
    assert [problem.path for problem in caught.value.problems] == [path]
    assert content(shop) == before
    assert session.dirty == (RECIPE, LOAD)


def test_giving_up_reads_what_is_on_disk_now(shop: Path) -> None:
    session = session_on(shop)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    path = file_of(session, LOAD)
    path.write_text(path.read_text(encoding="utf-8").replace("KY-24817", "KY-1"), encoding="utf-8")
    session.revert()
    assert session.dirty == ()
    assert session.record(LOAD).order == "KY-1"
    assert session.record(LOAD).change is None
    assert not session.can_undo
    session.set_value(LOAD, ("order",), "KY-2")
    assert session.save() == [path]


def test_a_file_taken_away_is_not_written_again(shop: Path) -> None:
    session = session_on(shop)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    file_of(session, LOAD).unlink()
    with pytest.raises(FileChangedError):
        session.save()
    assert session.dirty == (LOAD,)


def test_a_file_changed_by_hand_counts_when_its_load_is_opened_next(shop: Path) -> None:
    session = session_on(shop)
    path = file_of(session, RECIPE)
    path.write_text(path.read_text(encoding="utf-8").replace('"24 A/ft2"', '"23 A/ft2"'), encoding="utf-8")
    assert (
        session.text_of(RECIPE, ("current_density",)) == "24 A/ft2"
    )  # a session sees one state of the files
    session.open(LOAD[1])
    assert session.text_of(RECIPE, ("current_density",)) == "23 A/ft2"
    session.set_value(RECIPE, ("note",), "seen")
    session.save()
    path.write_text(path.read_text(encoding="utf-8").replace('"23 A/ft2"', '"22 A/ft2"'), encoding="utf-8")
    session.set_value(LOAD, ("order",), "KY-1")
    session.open(LOAD[1])
    assert session.text_of(RECIPE, ("current_density",)) == "22 A/ft2"
    assert session.dirty == (LOAD,)  # kept, though undo ended
    assert not session.can_undo
    session.revert()
    assert session.record(LOAD).order == "KY-24817"


def test_giving_up_what_is_not_saved_can_be_undone(shop: Path) -> None:
    session = session_on(shop)
    session.set_value(LOAD, DENSITY, "25 A/ft2")
    session.save()
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(RECIPE, ("note",), "seen")
    session.revert()
    assert session.dirty == ()
    assert session.text_of(LOAD, DENSITY) == "25 A/ft2"
    session.undo()
    assert session.text_of(LOAD, DENSITY) == "26 A/ft2"
    assert session.dirty == (LOAD, RECIPE)


@pytest.mark.skipif(sys.platform == "win32" or os.geteuid() == 0, reason="needs a folder that takes nothing")
def test_a_disk_that_takes_nothing_loses_nothing(shop: Path) -> None:
    session = session_on(shop)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    folder = file_of(session, LOAD).parent
    folder.chmod(0o500)
    with pytest.raises(FilesError, match="cannot be written"):
        session.save()
    folder.chmod(0o700)
    assert session.save() == [file_of(session, LOAD)]


# --- a new name ------------------------------------------------------------------------------------------


def test_a_load_saved_under_a_new_name_keeps_its_comments_and_is_open(shop: Path) -> None:
    (shop / "rack_library/loads/odd.toml").write_text(ODD, encoding="utf-8")
    session = session_on(shop, load="odd")
    session.set_value(("load", "odd"), ("order",), "KY-1")
    path = session.save_as("odd-two")
    assert path == shop / "rack_library/loads/odd-two.toml"
    assert path.read_text(encoding="utf-8") == ODD.replace("cold one\n", 'cold one\norder = "KY-1"\n')
    assert (session.name, session.case.name, session.dirty) == ("odd-two", "odd-two", ())
    assert (shop / "rack_library/loads/odd.toml").read_text(encoding="utf-8") == ODD
    assert session.record(("load", "odd")).order == ""
    assert "odd-two" in session.loads()
    session.set_value(("load", "odd-two"), ("order",), "KY-2")
    assert session.save() == [path]
    assert session.undo()
    assert session.undo() == "saved as odd-two (load odd)"
    assert (session.name, session.record(("load", "odd")).order) == ("odd", "KY-1")


@pytest.mark.parametrize(
    ("stem", "said"),
    [
        (
            "Valve Blocks",
            "`Valve Blocks` cannot be referred to. Name the file in lower case letters, digits and hyphens",
        ),
        ("", "`` cannot be referred to. Name the file in lower case letters, digits and hyphens"),
        (
            "../site",
            "`../site` cannot be referred to. Name the file in lower case letters, digits and hyphens",
        ),
        ("coupons-24", "is there already and is left as it is. Choose another name"),
        ("nul", "is there already and is left as it is. Choose another name"),
    ],
)
def test_a_name_that_is_none_or_is_taken_is_refused(shop: Path, stem: str, said: str) -> None:
    session = session_on(shop)
    before = content(shop)
    with pytest.raises(FilesError) as caught:
        session.save_as(stem)
    assert [word(one).endswith(said) for one in caught.value.problems] == [True]
    assert content(shop) == before
    assert session.name == LOAD[1]


def test_a_name_of_5000_letters_is_refused(shop: Path) -> None:
    session = session_on(shop)
    with pytest.raises(FilesError):
        session.save_as("x" * 5000)
    assert session.name == LOAD[1]


# --- the packaged shop -----------------------------------------------------------------------------------


@pytest.fixture
def home(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    """A user without a site of their own, in a folder that is none."""
    monkeypatch.setenv("XDG_DATA_HOME", str(tmp_path / "home"))
    monkeypatch.setenv("LOCALAPPDATA", str(tmp_path / "home"))
    monkeypatch.setenv("HOME", str(tmp_path / "home"))
    monkeypatch.chdir(tmp_path)
    return user_folder()


def test_the_first_save_of_the_packaged_shop_goes_to_the_users_own_copy(home: Path) -> None:
    packaged = packaged_site()
    before = {name: content(packaged / name) for name in ("configs", "rack_library")}
    session = Session(open_library(), style=Style(), memory=home / "memory")
    assert session.packaged
    session.open(LOAD[1])
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(RECIPE, ("note",), "seen")
    assert not home.joinpath("configs").exists()
    assert session.save() == [
        home / "rack_library/loads/valve-blocks-24.toml",
        home / "configs/recipes/hardcoat-50-6061.toml",
    ]
    assert not session.packaged
    assert session.dirty == ()
    assert {name: content(packaged / name) for name in before} == before
    assert Library(home).record(*LOAD).change is not None
    session.set_value(LOAD, DENSITY, "25 A/ft2")
    assert session.save() == [home / "rack_library/loads/valve-blocks-24.toml"]
    session.undo()
    session.undo()
    session.undo()
    session.save()
    for ref in (LOAD, RECIPE):
        own = file_of(session, ref)
        assert own.read_bytes() == (CHECKOUT / own.relative_to(home)).read_bytes()
    session.close()
    again = Session(open_library(), style=Style(), memory=home / "memory")
    assert not again.packaged
    assert again.last_load == LOAD[1]


def test_a_new_name_in_the_packaged_shop_goes_to_the_users_own_copy(home: Path) -> None:
    session = Session(open_library(), style=Style(), memory=None)
    session.open(LOAD[1])
    with pytest.raises(FilesError):
        session.save_as("coupons-24")
    assert not home.joinpath("configs").exists()
    assert session.save_as("mine") == home / "rack_library/loads/mine.toml"
    assert (session.name, session.packaged) == ("mine", False)
