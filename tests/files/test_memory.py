"""What is remembered of a site between two runs."""

import os
import sys
from pathlib import Path

import pytest

from lineplanner.files.memory import memory_folder, remember, remembered, site_key
from lineplanner.files.site import SiteFolder, user_folder


@pytest.fixture
def site(tmp_path: Path) -> SiteFolder:
    (tmp_path / "shop").mkdir()
    return SiteFolder(tmp_path / "shop")


def test_what_is_remembered_is_there_at_the_next_start(site: SiteFolder, tmp_path: Path) -> None:
    memory = tmp_path / "a" / "memory"
    assert remembered(memory, site) == {}
    remember(memory, site, {"load": "valve-blocks-24", "units": "us"})
    assert remembered(memory, site) == {
        "load": "valve-blocks-24",
        "units": "us",
        "site": str(site.path),
    }
    assert [path.suffix for path in memory.iterdir()] == [".toml"]


def test_each_site_has_a_memory_of_its_own(site: SiteFolder, tmp_path: Path) -> None:
    other = SiteFolder(tmp_path / "other")
    remember(tmp_path, site, {"load": "a"})
    assert remembered(tmp_path, other) == {}
    assert site_key(site) != site_key(other)


def test_the_packaged_shop_and_the_users_own_are_one_site(
    monkeypatch: pytest.MonkeyPatch, tmp_path: Path
) -> None:
    monkeypatch.setenv("XDG_DATA_HOME", str(tmp_path))
    monkeypatch.setenv("LOCALAPPDATA", str(tmp_path))
    monkeypatch.setenv("HOME", str(tmp_path))
    assert site_key(SiteFolder(tmp_path / "program", packaged=True)) == site_key(SiteFolder(user_folder()))
    assert memory_folder().parent == user_folder()


@pytest.mark.parametrize("content", [b"", b"load = ", b"\xff\xfe", b"load = 3\n", b"[" * 5000, b"a" * 20000])
def test_a_broken_memory_is_none(site: SiteFolder, tmp_path: Path, content: bytes) -> None:
    remember(tmp_path, site, {"load": "a"})
    (path,) = tmp_path.glob("*.toml")
    path.write_bytes(content)
    assert remembered(tmp_path, site) == {}
    remember(tmp_path, site, {"load": "b"})
    assert remembered(tmp_path, site)["load"] == "b"


def test_a_disk_that_takes_nothing_is_no_error(site: SiteFolder, tmp_path: Path) -> None:
    blocked = tmp_path / "blocked"
    blocked.write_bytes(b"")
    remember(blocked / "memory", site, {"load": "a"})
    assert remembered(blocked / "memory", site) == {}


@pytest.mark.skipif(sys.platform == "win32" or os.geteuid() == 0, reason="needs a folder that takes nothing")
def test_a_folder_without_the_right_to_write_is_no_error(site: SiteFolder, tmp_path: Path) -> None:
    tmp_path.chmod(0o500)
    remember(tmp_path, site, {"load": "a"})
    tmp_path.chmod(0o700)
    assert remembered(tmp_path, site) == {}
