"""A new site is written whole into a folder that has none, and nothing is overwritten."""

from pathlib import Path

import pytest

from lineplanner.files import starter
from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError
from lineplanner.files.site import packaged_site
from lineplanner.files.starter import start


@pytest.fixture(autouse=True)
def in_folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)


def test_a_new_site_holds_every_file_of_the_demo_shop() -> None:
    written = start("shop")
    wanted = {
        path.relative_to(packaged_site())
        for name in ("configs", "rack_library")
        for path in (packaged_site() / name).rglob("*")
        if path.is_file() and not path.name.startswith(".")
    }
    assert {path.relative_to("shop") for path in written} == wanted
    assert all((Path("shop") / path).read_bytes() == (packaged_site() / path).read_bytes() for path in wanted)
    assert sorted(path.name for path in Path("shop").iterdir()) == ["configs", "rack_library"]


def test_a_new_site_can_be_planned_from() -> None:
    start("shop")
    library = Library(Path("shop"))
    loads = library.stems("load")
    assert [library.case(name).name for name in loads] == list(loads)


def test_a_folder_with_other_things_in_it_is_taken() -> None:
    Path("shop").mkdir()
    Path("shop/notes.txt").write_text("mine", encoding="utf-8")
    start("shop")
    assert Path("shop/notes.txt").read_text(encoding="utf-8") == "mine"


@pytest.mark.parametrize("name", ["configs", "rack_library"])
def test_a_folder_that_holds_half_a_site_is_left_as_it_is(name: str) -> None:
    Path("shop", name).mkdir(parents=True)
    with pytest.raises(FilesError) as caught:
        start("shop")
    assert str(caught.value) == (
        f"shop: holds {name} already, and is left as it is. Name an empty or a new folder"
    )
    assert [path.name for path in Path("shop").rglob("*")] == [name]


def test_a_file_is_no_folder_for_a_site() -> None:
    Path("shop").write_text("mine", encoding="utf-8")
    with pytest.raises(FilesError) as caught:
        start("shop")
    assert str(caught.value) == "shop: is not a folder. Name an empty or a new folder"
    assert Path("shop").read_text(encoding="utf-8") == "mine"


def test_a_disk_that_fills_up_leaves_no_half_site(monkeypatch: pytest.MonkeyPatch) -> None:
    def fail(*_: object) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(starter.shutil, "copyfileobj", fail)
    with pytest.raises(FilesError) as caught:
        start("shop")
    assert str(caught.value) == "shop: cannot be written: No space left on device. Nothing was changed"
    assert list(Path("shop").iterdir()) == []
