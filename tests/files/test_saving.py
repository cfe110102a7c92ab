"""A file is saved whole or not at all, and never over one that is not the one that was read."""

import os
import stat
import sys
from pathlib import Path

import pytest

from lineplanner.files.document import open_document
from lineplanner.files.editing import edit
from lineplanner.files.problems import FileChangedError, FilesError, word
from lineplanner.files.reading import read
from lineplanner.files.saving import save, save_checked
from tests.files.samples import LOAD, RACK


@pytest.fixture(autouse=True)
def in_folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)


@pytest.fixture
def file() -> Path:
    Path("load.toml").write_text(LOAD, encoding="utf-8")
    return Path("load.toml")


def names() -> list[str]:
    return sorted(path.name for path in Path().iterdir())


# --- saving ----------------------------------------------------------------------------------------------


def test_a_new_file_is_written(tmp_path: Path) -> None:
    stamp = save(Path("deep/er/new.toml"), LOAD, None)
    document = open_document(Path("deep/er/new.toml"))
    assert (document.text, document.stamp) == (LOAD, stamp)
    assert [path.name for path in (tmp_path / "deep" / "er").iterdir()] == ["new.toml"]


def test_a_file_that_was_read_is_replaced_and_the_new_stamp_serves_for_the_next_time(file: Path) -> None:
    stamp = save(file, "a = 1\n", open_document(file).stamp)
    save(file, "a = 2\n", stamp)
    assert file.read_text(encoding="utf-8") == "a = 2\n"
    assert names() == ["load.toml"]


def test_a_file_changed_meanwhile_is_left_as_it_is(file: Path) -> None:
    stamp = open_document(file).stamp
    file.write_text("somebody else\n", encoding="utf-8")
    os.utime(file, ns=(stamp.modified, stamp.modified))  # even if its time does not tell
    with pytest.raises(FileChangedError) as caught:
        save(file, "mine\n", stamp)
    assert str(caught.value) == (
        "load.toml: was changed on disk after it was read, and is left as it is. Read it again, then change it"
    )
    assert file.read_text(encoding="utf-8") == "somebody else\n"
    assert names() == ["load.toml"]


def test_a_file_taken_away_meanwhile_is_not_brought_back(file: Path) -> None:
    stamp = open_document(file).stamp
    file.unlink()
    with pytest.raises(FileChangedError):
        save(file, "mine\n", stamp)
    assert names() == []


def test_a_file_touched_but_not_changed_may_be_saved(file: Path) -> None:
    stamp = open_document(file).stamp
    os.utime(file, ns=(1, 1))
    save(file, "mine\n", stamp)
    assert file.read_text(encoding="utf-8") == "mine\n"


@pytest.mark.parametrize("content", [b"", b"\xff\xfe", b"[broken"], ids=["empty", "no text", "no TOML"])
def test_a_file_that_could_not_be_read_is_not_overwritten(content: bytes) -> None:
    Path("broken.toml").write_bytes(content)
    with pytest.raises(FilesError):
        read("broken.toml")
    with pytest.raises(FileChangedError) as caught:
        save(Path("broken.toml"), LOAD, None)
    assert str(caught.value) == "broken.toml: is there already and is left as it is. Choose another name"
    assert Path("broken.toml").read_bytes() == content


def test_a_new_file_does_not_replace_one_that_appears_at_the_last_moment(
    monkeypatch: pytest.MonkeyPatch,
) -> None:
    link = os.link

    def late(source: Path, target: Path) -> None:
        Path(target).write_text("somebody else\n", encoding="utf-8")
        link(source, target)

    monkeypatch.setattr(os, "link", late)
    with pytest.raises(FileChangedError):
        save(Path("new.toml"), LOAD, None)
    assert Path("new.toml").read_text(encoding="utf-8") == "somebody else\n"
    assert names() == ["new.toml"]


@pytest.mark.parametrize("step", ["fsync", "replace"])
@pytest.mark.parametrize(
    "error", [OSError(28, "No space left on device"), KeyboardInterrupt()], ids=["full", "stopped"]
)
def test_a_crash_in_the_middle_leaves_the_old_file_and_no_other(
    file: Path, monkeypatch: pytest.MonkeyPatch, step: str, error: BaseException
) -> None:
    def crash(*_: object) -> None:
        raise error

    stamp = open_document(file).stamp
    monkeypatch.setattr(*((os, "fsync") if step == "fsync" else (Path, "replace")), crash)
    with pytest.raises(FilesError if isinstance(error, OSError) else KeyboardInterrupt) as caught:
        save(file, "mine\n", stamp)
    if isinstance(caught.value, FilesError):
        assert (
            str(caught.value) == "load.toml: cannot be written: No space left on device. Nothing was changed"
        )
    assert file.read_text(encoding="utf-8") == LOAD
    assert names() == ["load.toml"]


def test_a_disk_without_hard_links_still_takes_a_new_file(monkeypatch: pytest.MonkeyPatch) -> None:
    def refuse(*_: object) -> None:
        raise OSError(95, "Operation not supported")

    monkeypatch.setattr(os, "link", refuse)
    save(Path("new.toml"), LOAD, None)
    assert names() == ["new.toml"]


@pytest.mark.skipif(sys.platform == "win32", reason="knows no such rights")
def test_the_rights_of_a_file_stay_and_a_new_one_gets_the_usual_ones(file: Path) -> None:
    file.chmod(0o640)
    save(file, "a = 1\n", open_document(file).stamp)
    assert stat.S_IMODE(file.stat().st_mode) == 0o640
    Path("plain.txt").touch()
    save(Path("new.toml"), LOAD, None)
    assert Path("new.toml").stat().st_mode == Path("plain.txt").stat().st_mode


@pytest.mark.skipif(sys.platform == "win32", reason="links need a right of their own there")
def test_a_link_stays_a_link_and_its_target_is_saved(file: Path) -> None:
    Path("link.toml").symlink_to(file.absolute())
    save(Path("link.toml"), "a = 1\n", open_document(Path("link.toml")).stamp)
    assert Path("link.toml").is_symlink()
    assert file.read_text(encoding="utf-8") == "a = 1\n"


def test_a_folder_in_the_way_is_told() -> None:
    Path("folder.toml").mkdir()
    with pytest.raises(FilesError):
        save(Path("folder.toml"), LOAD, None)
    Path("file").touch()
    with pytest.raises(FilesError):
        save(Path("file/new.toml"), LOAD, None)


def test_a_text_that_would_not_read_is_not_saved(file: Path) -> None:
    stamp = open_document(file).stamp
    with pytest.raises(FilesError) as caught:
        save_checked(file, LOAD.replace('tank = "T1"', "tank = 1"), stamp, "load")
    assert [word(one) for one in caught.value.problems] == [
        'load.toml:6: tank: `1` is not text. Put it in quotes: `"1"`'
    ]
    assert file.read_text(encoding="utf-8") == LOAD
    save_checked(file, LOAD.replace('tank = "T1"', 'tank = "T2"'), stamp, "load")
    assert read(file).tank == "T2"


# --- editing ---------------------------------------------------------------------------------------------

COMMENTED = """\
# Rack of the night shift.
format = "lineplanner rack 1"

name = "Spline"   # painted red
height = "900 mm"
width = "600 mm"  # before the height, as on the drawing? no

conductor = "titanium"

[[tip_row]]   # first
name = "A"
count = 6     # of 8
start = ["0 mm", "200 mm"]
step = ["0 mm", "100 mm"]
kind = "spring"
conductor = "titanium"
"""


def edited(text: str) -> "tuple[Path, str]":
    path = Path("rack.toml")
    path.write_bytes(text.encode())
    return path, text


def test_a_text_not_changed_is_the_same_text() -> None:
    for text in (COMMENTED, RACK, COMMENTED.replace("\n", "\r\n"), "\ufeff" + COMMENTED):
        path, _ = edited(text)
        assert edit(open_document(path)).text == text


def test_a_changed_value_keeps_comments_and_order() -> None:
    path, text = edited(COMMENTED)
    change = edit(open_document(path))
    change.set_value(("name",), "Spline 2")
    change.set_value(("tip_row", 0, "count"), 5)
    change.set_value(("tip_row", 0, "start", 1), "210 mm")
    assert change.text == (
        text.replace('"Spline" ', '"Spline 2" ')
        .replace("count = 6 ", "count = 5 ")
        .replace('"200 mm"', '"210 mm"')
    )


def test_values_and_tables_can_be_added_and_taken_out() -> None:
    path, _ = edited(COMMENTED)
    change = edit(open_document(path))
    change.set_value(("mass",), "3 kg")
    change.set_value(("thief",), [{"name": "robber", "area": "1 dm2"}])
    change.set_value(("tip_row", 0, "count"), 1)
    change.remove_value(("tip_row", 0, "step"))
    change.remove_value(("none", "of", "these"))
    change.remove_value(("none",))
    save(path, change.text, open_document(path).stamp)
    rack = read(path)
    assert rack.mass == 3.0
    assert rack.thieves[0].name == "robber"
    assert rack.tips[0].step == (0.0, 0.0)
    assert "# painted red" in change.text


def test_windows_line_ends_and_byte_order_mark_stay() -> None:
    path, _ = edited("\ufeff" + COMMENTED.replace("\n", "\r\n"))
    change = edit(open_document(path))
    change.set_value(("mass",), "3 kg")
    assert change.text.startswith("\ufeff# Rack")
    assert change.text.count("\n") == change.text.count("\r\n") == COMMENTED.count("\n") + 1
    save(path, change.text, open_document(path).stamp)
    assert read(path).mass == 3.0
