"""Rows of the list are taken up again for exactly the same program and files, and for nothing else."""

import os
import shutil
from collections.abc import Callable
from pathlib import Path

import pytest

import lineplanner
from lineplanner.files import listing_memory
from lineplanner.files.listing_memory import program_stamp, remember_rows, remembered_rows, site_stamp
from lineplanner.files.site import SiteFolder

CHECKOUT = Path(__file__).parents[2]

ROWS = {"valve-blocks-24": {"metric": {"stem": "valve-blocks-24", "cells": ["50 µm", "[/b]"]}}}
LOAD = "rack_library/loads/lug-mix.toml"


@pytest.fixture
def site(tmp_path: Path) -> SiteFolder:
    for name in ("configs", "rack_library"):
        shutil.copytree(CHECKOUT / name, tmp_path / "shop" / name)
    return SiteFolder(tmp_path / "shop")


def rewritten(path: Path, old: str, new: str) -> None:
    """Another content of the same size, written at what the disk says is the same time."""
    before, text = path.stat(), path.read_text(encoding="utf-8")
    assert old in text
    assert len(old) == len(new)
    path.write_text(text.replace(old, new), encoding="utf-8")
    os.utime(path, ns=(before.st_atime_ns, before.st_mtime_ns))


def test_the_stamp_of_a_site_that_nobody_touched_is_the_same(site: SiteFolder) -> None:
    first = site_stamp(site)
    assert first is not None
    assert site_stamp(site) == first
    (site.path / "rack_library" / "loads" / "notes.txt").write_text("no part of the site", encoding="utf-8")
    (site.path / "rack_library" / "loads" / ".hidden.toml").write_text("an editor's", encoding="utf-8")
    (site.path / LOAD).touch()
    assert site_stamp(site) == first


CHANGES: dict[str, Callable[[Path], object]] = {
    "one letter": lambda shop: rewritten(shop / LOAD, "spline-24", "spline-25"),
    "longer": lambda shop: (shop / LOAD).open("a").write("\n# more\n"),
    "the site": lambda shop: (shop / "configs" / "site.toml").open("a").write("\n"),
    "a table": lambda shop: next((shop / "configs" / "standards").glob("*.toml")).open("a").write("\n"),
    "a new file": lambda shop: shutil.copy(shop / LOAD, shop / "rack_library" / "loads" / "another.toml"),
    "in a new folder": lambda shop: shutil.copytree(
        shop / "rack_library" / "loads", shop / "configs" / "new"
    ),
    "taken away": lambda shop: (shop / LOAD).unlink(),
    "another name": lambda shop: (shop / LOAD).rename(shop / LOAD.replace("lug", "plug")),
    "another folder": lambda shop: (shop / LOAD).rename(shop / "rack_library" / "lug-mix.toml"),
    "two swapped": lambda shop: (
        (shop / LOAD).rename(shop / "x"),
        (shop / "rack_library/loads/lugs-2024.toml").rename(shop / LOAD),
        (shop / "x").rename(shop / "rack_library/loads/lugs-2024.toml"),
    ),
}


@pytest.mark.parametrize("change", CHANGES)
@pytest.mark.filterwarnings("ignore:unclosed file:ResourceWarning")
def test_every_kind_of_change_gives_another_stamp(site: SiteFolder, change: str) -> None:
    first = site_stamp(site)
    CHANGES[change](site.path)
    now = site_stamp(site)
    assert now is not None
    assert now != first


@pytest.mark.skipif(os.name == "nt", reason="links and pipes as POSIX has them")
@pytest.mark.parametrize("kind", ["pipe", "broken link"])
def test_what_cannot_be_read_has_no_stamp(site: SiteFolder, kind: str) -> None:
    path = site.path / "rack_library" / "loads" / "odd.toml"
    os.mkfifo(path) if kind == "pipe" else path.symlink_to(site.path / "nowhere")
    assert site_stamp(site) is None
    shutil.rmtree(site.path / "configs")
    path.unlink()
    assert site_stamp(site) is None


def test_another_version_or_other_code_gives_another_stamp_of_the_program(
    monkeypatch: pytest.MonkeyPatch, tmp_path: Path
) -> None:
    first = program_stamp()
    assert first is not None
    assert program_stamp() == first
    with monkeypatch.context() as changed:
        changed.setattr(lineplanner, "__version__", f"{lineplanner.__version__}.1")
        assert program_stamp() not in (None, first)
    with monkeypatch.context() as changed:
        changed.setattr(listing_memory, "_origin", lambda _: str(CHECKOUT / "pyproject.toml"))
        assert program_stamp() not in (None, first)
    shutil.copytree(CHECKOUT / "lineplanner" / "bath", tmp_path / "code" / "bath")
    module = tmp_path / "code" / "__init__.py"
    module.write_text("", encoding="utf-8")
    monkeypatch.setattr(lineplanner, "__file__", str(module))
    copied = program_stamp()
    next((tmp_path / "code" / "bath").glob("*.py")).open("a").close()
    assert program_stamp() == copied
    module.write_text("x = 1\n", encoding="utf-8")
    assert program_stamp() not in (None, first, copied)


def test_rows_come_back_under_their_own_stamp_alone(site: SiteFolder, tmp_path: Path) -> None:
    memory = tmp_path / "memory"
    assert remembered_rows(memory, site, "a") == {}
    remember_rows(memory, site, "a", ROWS)
    assert remembered_rows(memory, site, "a") == ROWS
    assert remembered_rows(memory, site, "b") == {}
    assert remembered_rows(memory, SiteFolder(tmp_path), "a") == {}
    assert len(list(memory.iterdir())) == 1


def test_a_broken_file_of_rows_is_none(site: SiteFolder, tmp_path: Path) -> None:
    remember_rows(tmp_path / "m", site, "a", ROWS)
    (path,) = (tmp_path / "m").iterdir()
    whole = path.read_bytes()
    broken = [b"", b"\n", b"x\n{}", b"\xff\xfe", whole[:-1], whole[:40], whole + b" ", b"[" * 100_000]
    broken += [whole[:place] + bytes([whole[place] ^ 1]) + whole[place + 1 :] for place in range(len(whole))]
    for content in broken:
        path.write_bytes(content)
        assert remembered_rows(tmp_path / "m", site, "a") == {}
    remember_rows(tmp_path / "m", site, "a", ROWS)
    assert remembered_rows(tmp_path / "m", site, "a") == ROWS


@pytest.mark.parametrize("body", [b"[]", b"3", b"{}", b'{"stamp": "a", "rows": [1]}', b"[" * 100_000])
def test_a_whole_file_of_something_else_is_none(site: SiteFolder, tmp_path: Path, body: bytes) -> None:
    from lineplanner.files.content import digest_of

    remember_rows(tmp_path / "m", site, "a", ROWS)
    (path,) = (tmp_path / "m").iterdir()
    path.write_bytes(digest_of(body).encode() + b"\n" + body)
    assert remembered_rows(tmp_path / "m", site, "a") == {}
