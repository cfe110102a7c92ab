"""The list shows the rows of an earlier run in its first frame if program and files are the same, else none."""

import subprocess
import sys
from dataclasses import asdict, replace
from pathlib import Path
from types import MappingProxyType

import pytest
from textual.pilot import Pilot

import lineplanner
from lineplanner.files.library import Library
from lineplanner.files.site import SiteFolder
from lineplanner.report.listing import list_load
from lineplanner.report.rows import Listed
from lineplanner.report.style import Style
from lineplanner.tui.opening import SYSTEMS, KeptRows, Known, SiteFacts
from lineplanner.tui.screens.loads import LoadsScreen
from tests.tui.driving import drive, site

FIRST_FRAME = """
import asyncio, json, sys
from pathlib import Path
from lineplanner.files.site import SiteFolder
from lineplanner.tui.app import PlannerApp
from lineplanner.tui.opening import Opening
from lineplanner.tui.screens.loads import LoadsScreen

folder, memory = map(Path, sys.argv[1:])
app = PlannerApp(Opening(SiteFolder(folder), memory=memory), repr)
seen = []

def frame():
    screen = app.screen
    if not seen and isinstance(screen, LoadsScreen) and screen.shown:
        strips = screen._compositor.render_strips()
        seen.append("\\n".join("".join(one.text for one in strip) for strip in strips))
        heavy = {"numpy", "shapely", "pint", "pydantic_core", "lineplanner.plan", "lineplanner.files.library"}
        seen.append(sorted(heavy & set(sys.modules)))

app.post_display_hook = frame

async def run():
    async with app.run_test(size=(160, 50)) as pilot:
        while not seen:
            await pilot.pause(0.01)

asyncio.run(run())
app.close_session()
print(json.dumps(seen))
"""


def first_frame(folder: Path, memory: Path) -> tuple[str, list[str]]:
    """What a start in a fresh interpreter shows first, and what heavy it has loaded by then."""
    import json

    done = subprocess.run(
        [sys.executable, "-c", FIRST_FRAME, str(folder), str(memory)],
        capture_output=True,
        encoding="utf-8",
        check=True,
    )
    text, loaded = json.loads(done.stdout)
    return text, loaded


async def nothing(pilot: Pilot[int]) -> None:
    await pilot.pause(0.3)  # the rows are kept after the last one is there


@pytest.fixture
def shop(tmp_path: Path) -> tuple[Path, Path]:
    """A shop of three loads that was opened before, and the memory."""
    folder = site(tmp_path / "shop")
    for path in (folder / "rack_library" / "loads").glob("*.toml"):
        if path.stem not in ("lug-mix", "rod-40x900", "valve-blocks-24"):
            path.unlink()
    drive(nothing, folder, memory=tmp_path / "memory")
    assert list((tmp_path / "memory").glob("*.rows"))
    return folder, tmp_path / "memory"


def test_a_start_shows_all_rows_in_its_first_frame_and_loads_nothing_to_compute_with(
    shop: tuple[Path, Path],
) -> None:
    text, loaded = first_frame(*shop)
    library = Library(shop[0])
    for stem in library.stems("load"):
        row = list_load(library, stem, SYSTEMS, Style("metric"))["metric"]
        line = next(line for line in text.splitlines() if f" {stem} " in line)
        assert row.cells[3] in line
        assert row.cells[5].split(",")[0] in line
    assert "planning" not in text
    assert loaded == []


def test_after_any_change_no_row_of_the_earlier_run_is_shown(shop: tuple[Path, Path]) -> None:
    (shop[0] / "configs" / "site.toml").open("a").close()
    assert "159 A" in first_frame(*shop)[0]  # nothing was changed
    with (shop[0] / "configs" / "site.toml").open("a", encoding="utf-8") as file:
        file.write("\n# changed\n")
    text, _ = first_frame(*shop)
    assert "159 A" not in text
    assert "planning 0 of 3" in text


def test_a_broken_file_of_rows_is_as_none(shop: tuple[Path, Path]) -> None:
    (path,) = shop[1].glob("*.rows")
    path.write_bytes(path.read_bytes().replace(b"159 A", b"951 A"))
    text, _ = first_frame(*shop)
    assert "951 A" not in text
    assert "planning 0 of 3" in text


def test_rows_go_on_into_the_session_and_follow_what_is_saved(shop: tuple[Path, Path]) -> None:
    async def steps(pilot: Pilot[int]) -> None:
        screen = pilot.app.screen
        assert isinstance(screen, LoadsScreen)
        before = screen.known["valve-blocks-24"]["metric"]
        await pilot.press(*"valve", "enter", "minus", "s", "q")
        await pilot.pause(0.6)
        assert screen.known["valve-blocks-24"]["metric"] != before

    drive(steps, shop[0], memory=shop[1])
    text, _ = first_frame(*shop)
    row = list_load(Library(shop[0]), "valve-blocks-24", SYSTEMS, Style("metric"))["metric"]
    assert row.cells[3] in text
    assert row.cells[3] != "159 A"


FACTS = SiteFacts("a shop", "us", "a")


def rows_of(level: str = "ok") -> Known:
    row = Listed("a", ("a", "b", "c", "1 A", "2 min", "CHECKS MET"), level, "a b", "CHECKS MET", "DANGER")
    return {"a": MappingProxyType(dict.fromkeys(SYSTEMS, row))}


@pytest.fixture
def place(tmp_path: Path) -> SiteFolder:
    return SiteFolder(site(tmp_path / "shop"))


def test_rows_are_kept_for_the_same_letters_only(place: SiteFolder, tmp_path: Path) -> None:
    signs, plain = (KeptRows(tmp_path / "m", ascii_only=one) for one in (False, True))
    signs.keep(place, signs.stamp(place), rows_of(), FACTS)
    assert signs.take(place, signs.stamp(place)) == (rows_of(), FACTS)
    assert plain.take(place, plain.stamp(place)) == ({}, None)
    assert signs.take(place, None) == ({}, None)
    assert KeptRows(None, ascii_only=False).stamp(place) is None


def test_rows_worked_out_while_files_or_program_changed_are_not_kept(
    place: SiteFolder, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    kept = KeptRows(tmp_path / "m", ascii_only=False)
    stamp = kept.stamp(place)
    with (place.path / "configs" / "site.toml").open("a", encoding="utf-8") as file:
        file.write("\n")
    kept.keep(place, stamp, rows_of(), FACTS)
    monkeypatch.setattr(lineplanner, "__version__", "next")  # replaced while it runs
    kept.keep(place, kept.stamp(place), rows_of(), FACTS)
    assert not (tmp_path / "m").exists()


def test_a_load_that_cannot_be_read_is_read_again_at_every_start(place: SiteFolder, tmp_path: Path) -> None:
    kept = KeptRows(tmp_path / "m", ascii_only=False)
    kept.keep(place, kept.stamp(place), rows_of("unread"), FACTS)
    assert kept.take(place, kept.stamp(place)) == ({}, FACTS)


def test_rows_of_another_shape_are_none(place: SiteFolder, tmp_path: Path) -> None:
    from lineplanner.files.listing_memory import remember_rows

    kept = KeptRows(tmp_path / "m", ascii_only=False)
    stamp, row = kept.stamp(place), rows_of()["a"]["metric"]
    assert stamp is not None
    for odd in (
        {"cells": row.cells[:5]},
        {"cells": (1, *row.cells[1:])},
        {"stem": "b"},
        {"level": None},
        {"more": ""},
    ):
        texts = {name: getattr(replace(row), name) for name in Listed.__slots__} | odd
        loads = {"a": {"metric": texts, "us": texts}}
        remember_rows(tmp_path / "m", place, stamp, {"site": asdict(FACTS), "loads": loads})
        assert kept.take(place, stamp) == ({}, None)
    for facts in ({}, {"name": 1}, {"units": "furlongs"}, {"first_load": 2}):
        site_texts = {**asdict(FACTS), **facts} if facts else {}
        remember_rows(tmp_path / "m", place, stamp, {"site": site_texts, "loads": {}})
        assert kept.take(place, stamp) == ({}, None)
    remember_rows(tmp_path / "m", place, stamp, {"site": asdict(FACTS), "loads": []})
    assert kept.take(place, stamp) == ({}, None)
