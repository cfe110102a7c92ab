"""What the rack picture says in characters: the demo shop's loads, read as text."""

import re
from collections.abc import Iterator
from dataclasses import replace
from functools import cache
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.files.library import Library
from lineplanner.inputs.part import Mask
from lineplanner.plan import plan
from lineplanner.report.picture import Scene, scene_of
from lineplanner.tui.widgets.rack_cells import Cells, Ink
from lineplanner.tui.widgets.raster import NOBODY, View, text_of

LIBRARY = Library(Path(__file__).parents[2])
LOADS = sorted(LIBRARY.stems("load"))
SIZES = [(78, 16), (158, 42)]


@cache
def scene(load: str, drop: float | None = None) -> Scene:
    case = LIBRARY.case(load)
    if drop is not None:
        case = replace(case, load=replace(case.load, solution_drop=drop))
    return scene_of(plan(case))


def cells(shown: Scene, columns: int = 158, rows: int = 42, *, ascii_only: bool = False) -> Cells:
    return Cells(shown, View.fitted(shown.extent, columns, rows), ascii_only=ascii_only)


def lines(drawn: Cells, selected: int | None = None) -> list[str]:
    return [text_of(row) for row in drawn.with_selected(selected)[0]]


def numbers(text: str) -> set[int]:
    return {int(found) for found in re.findall(r"\d+", text)}


@pytest.mark.parametrize("ascii_only", [False, True], ids=["braille", "ascii"])
@pytest.mark.parametrize("size", SIZES, ids=str)
@pytest.mark.parametrize("load", LOADS)
def test_every_demo_load_shows_level_bar_and_what_is_not_drawn(
    load: str, size: tuple[int, int], *, ascii_only: bool
) -> None:
    shown = scene(load)
    text = lines(cells(shown, *size, ascii_only=ascii_only))
    assert [len(line) for line in text] == [size[0]] * size[1]
    level = next(line for line in text if "solution level" in line)
    assert level.count("~") > size[0] / 4
    assert any("flight bar" in line and "==" in line for line in text)
    for said in shown.aside:
        assert any(said in line for line in text)
    if ascii_only:
        assert "".join(text).isascii()


@pytest.mark.parametrize("load", [load for load in LOADS if load != "relay-lids-20"])
def test_every_part_wide_enough_carries_its_number(load: str) -> None:
    shown = scene(load)
    drawn = cells(shown)
    said = numbers("\n".join(lines(drawn)))
    for hung in shown.parts:
        left, _, right, _ = drawn.box_of(hung.owner)
        if right - left + 1 >= 3 and len(str(hung.number)) < right - left + 1 and hung.side == "front":
            assert hung.number in said


def test_a_number_stands_inside_its_part() -> None:
    drawn = cells(scene("valve-blocks-24"))
    for owner in range(24):
        left, top, right, bottom = drawn.box_of(owner)
        inside = "\n".join(line[left : right + 1] for line in lines(drawn)[top : bottom + 1])
        assert str(owner + 1) in inside


@pytest.mark.parametrize("load", LOADS)
@pytest.mark.parametrize("size", SIZES, ids=str)
def test_the_centre_of_every_part_picks_it(load: str, size: tuple[int, int]) -> None:
    shown = scene(load)
    drawn = cells(shown, *size)
    centres = drawn.view.points(np.array([hung.centre for hung in shown.parts]).reshape(-1, 2))
    for hung, (column, row) in zip(shown.parts, centres, strict=True):
        found = drawn.owner_at(column, row)
        on_top = hung.twin if hung.side == "back" and hung.twin is not None else hung.owner
        assert found == on_top


def test_a_place_beside_all_parts_picks_none() -> None:
    drawn = cells(scene("valve-blocks-24"))
    for column, row in [(0.0, 0.0), (157.9, 41.9), (-1.0, 5.0), (500.0, 5.0), (5.0, 99.0)]:
        assert drawn.owner_at(column, row) is None


def test_within_a_cell_the_upper_and_the_lower_half_can_be_two_parts() -> None:
    # Two rows of blocks 140 mm apart at 78 x 16: some cell holds the end of one and the start of the next.
    shown = scene("valve-blocks-24").moved(4, 0.0, 0.053)
    drawn = cells(shown, 78, 16)
    halves = drawn.filled.reshape(16, 2, 78)
    rows, columns = np.nonzero(
        (halves[:, 0] != halves[:, 1]) & (halves[:, 0] != NOBODY) & (halves[:, 1] != NOBODY)
    )
    row, column = int(rows[0]), int(columns[0])
    assert drawn.owner_at(column, row + 0.2) == halves[row, 0, column]
    assert drawn.owner_at(column, row + 0.7) == halves[row, 1, column]


def test_one_sees_through_a_hole() -> None:
    shown = scene("vent-panels-24")  # long slots
    drawn = cells(shown, 158, 60)
    left, top, right, bottom = drawn.box_of(0)
    area = drawn.filled[2 * top : 2 * bottom + 2, left : right + 1]
    assert (area == 0).any()
    assert (area[4:-4, 3:-3] == NOBODY).any()


def nowhere_outside(drawn: Cells) -> Iterator[tuple[int, int]]:
    for owner in range(len(drawn.scene.parts)):
        left, top, right, bottom = drawn.box_of(owner)
        rows, columns = np.nonzero(drawn.outlined == owner)
        yield from ((r, c) for r, c in zip(rows, columns, strict=True) if not (top <= r <= bottom + 1))
        yield from ((r, c) for r, c in zip(rows, columns, strict=True) if not (left <= c <= right + 1))


@pytest.mark.parametrize("load", LOADS)
def test_no_part_is_drawn_outside_of_its_box(load: str) -> None:
    assert list(nowhere_outside(cells(scene(load)))) == []


@pytest.mark.parametrize("size", [*SIZES, (40, 12), (20, 5)], ids=str)
@pytest.mark.parametrize("owner", [0, 5, 23])
def test_the_selected_part_is_marked_without_any_colour(size: tuple[int, int], owner: int) -> None:
    drawn = cells(scene("valve-blocks-24"), *size)
    plain, marked = lines(drawn), lines(drawn, owner)
    assert not any("[" in line for line in plain)
    row = next(line for line in marked if "[" in line)
    assert "]" in row[row.index("[") :]
    left, top, right, bottom = drawn.box_of(owner)
    assert left - 1 <= row.index("[") <= row.index("]") <= right + 1
    assert top <= marked.index(row) <= bottom


def test_the_selected_part_is_marked_by_ink_and_all_changes_lie_in_the_box_given() -> None:
    drawn = cells(scene("valve-blocks-24"))
    codes, inks, box = drawn.with_selected(7)
    assert box is not None
    left, top, right, bottom = box
    assert (inks == Ink.SELECTED).any()
    assert (inks == Ink.SELECTED_NUMBER).any()
    changed = (codes != drawn.codes) | (inks != drawn.inks)
    changed[top:bottom, left:right] = False
    assert not changed.any()


def test_the_selected_part_keeps_its_ink_where_it_shares_a_cell() -> None:
    shown = scene("valve-blocks-24").moved(1, -0.158, 0.0)  # nearly on part 1
    drawn = cells(shown)
    for owner in (0, 1):
        inks = drawn.with_selected(owner)[1]
        left, top, right, _ = drawn.box_of(owner)
        assert (inks[top, left : right + 1] == Ink.SELECTED).all()


def test_dry_parts_say_so_where_there_is_room_and_are_dotted() -> None:
    wet, dry = cells(scene("vent-panels-24"), 158, 50), cells(scene("vent-panels-24", 1.05), 158, 50)
    assert not any("dry" in line for line in lines(wet))
    assert any("dry" in line for line in lines(dry))

    def dots(drawn: Cells) -> int:
        braille = drawn.codes[(drawn.outlined != NOBODY) & (drawn.codes >= 0x2800)] - 0x2800
        return sum(int(bits).bit_count() for bits in braille)

    assert dots(dry) < 0.7 * dots(wet)
    assert (dry.inks == Ink.DRY).any()


def test_in_ascii_dry_parts_are_drawn_with_points_and_wet_ones_not() -> None:
    wet = "".join(lines(cells(scene("lug-mix"), ascii_only=True)))
    dry = "".join(lines(cells(scene("lug-mix", 0.55), ascii_only=True)))  # rows A and B
    assert "." not in wet
    assert "." in dry
    assert "#" in dry


@pytest.mark.parametrize("ascii_only", [False, True], ids=["braille", "ascii"])
@pytest.mark.parametrize("size", SIZES, ids=str)
@pytest.mark.parametrize("load", ["pistons-16-masked", "guide-pins-flash", "seal-plates-4"])
def test_every_stopped_off_part_has_a_mark_and_the_key_says_what_it_means(
    load: str, size: tuple[int, int], *, ascii_only: bool
) -> None:
    drawn = cells(scene(load), *size, ascii_only=ascii_only)
    text = lines(drawn)
    for owner in range(len(drawn.scene.parts)):
        left, top, right, bottom = drawn.box_of(owner)
        near = "".join(line[left : right + 2] for line in text[top : bottom + 2])
        assert "x" in near or "/" in near
    assert any("x stopped off" in line for line in text)


def test_stop_off_that_faces_away_is_hatched_otherwise() -> None:
    shown = scene("seal-plates-4")
    seen_only = replace(shown, zone_seen=np.ones_like(shown.zone_seen))
    hidden_only = replace(shown, zone_seen=np.zeros_like(shown.zone_seen))
    for one, mark, other in ((seen_only, "x", "/"), (hidden_only, "/", "x")):
        drawn = cells(one)
        marks = {chr(code) for code in drawn.codes[drawn.inks == Ink.MASKED]}
        assert marks == {mark}
        assert other not in marks


def test_stop_off_on_both_faces_is_hatched_as_seen() -> None:
    case = LIBRARY.case("seal-plates-4")
    plate = case.parts["seal-plate"]
    both = replace(plate, masks=(Mask(face="front"), Mask(face="back")))
    drawn = cells(scene_of(plan(replace(case, parts={**case.parts, "seal-plate": both}))))
    assert {chr(code) for code in drawn.codes[drawn.inks == Ink.MASKED]} == {"x"}


def test_loads_without_stop_off_show_none() -> None:
    for ascii_only in (False, True):
        drawn = cells(scene("lugs-2024"), ascii_only=ascii_only)
        assert not (drawn.inks == Ink.MASKED).any()


def test_parts_on_the_back_are_marked() -> None:
    text = "\n".join(lines(cells(scene("vent-panels-24"))))
    assert "1 2b" in text
    assert "b on the back" in text
    assert "b on the back" not in "\n".join(lines(cells(scene("valve-blocks-24"))))
    alone = scene("vent-panels-24")
    back = replace(alone, parts=tuple(h._replace(side="back", twin=None) for h in alone.parts))
    assert re.search(r"\b24b\b", "\n".join(lines(cells(back))))


def test_free_tips_are_shown_and_taken_ones_are_not() -> None:
    free, full = cells(scene("pistons-16-masked")), cells(scene("valve-blocks-24"))
    assert (free.codes[free.inks == Ink.TIP] == ord("o")).sum() == 8  # rows E and F, four tips each
    assert not ((full.inks == Ink.TIP) & (full.codes == ord("o"))).any()


def test_the_rack_does_not_show_through_parts_on_its_front() -> None:
    drawn = cells(scene("valve-blocks-24"))
    inside = (drawn.filled[::2] != NOBODY) & (drawn.filled[1::2] != NOBODY)
    assert not (inside & (drawn.inks == Ink.RACK)).any()
    assert (drawn.inks == Ink.RACK).any()


def test_a_load_without_a_place_shows_the_rack_alone() -> None:
    text = "\n".join(lines(cells(scene("relay-lids-20")), 0))
    assert "only counted: 20 x relay lid" in text
    assert "[" not in text
    assert "x stopped off" not in text
    assert "o free tip" in text


def test_typed_names_cannot_shift_the_picture() -> None:
    shown = replace(scene("relay-lids-20"), counted=("only counted: 3 x 蓋\u0301\x1b[31m",))
    for ascii_only in (False, True):
        text = lines(cells(shown, 78, 16, ascii_only=ascii_only))
        assert "\x1b" not in "".join(text)
        assert any("only counted: 3 x ?" in line for line in text)
        assert {len(line) for line in text} == {78}


@given(
    size=st.tuples(st.integers(1, 90), st.integers(1, 40)),
    load=st.sampled_from(LOADS),
    ascii_only=st.booleans(),
    factor=st.floats(0.05, 40.0),
    pan=st.tuples(st.integers(-80, 80), st.integers(-40, 40)),
)
def test_no_size_and_no_view_breaks_it(
    *, size: tuple[int, int], load: str, ascii_only: bool, factor: float, pan: tuple[int, int]
) -> None:
    columns, rows = size
    shown = scene(load)
    view = View.fitted(shown.extent, columns, rows).zoomed(factor).panned(*pan)
    drawn = Cells(shown, view, ascii_only=ascii_only)
    for selected in (None, 0, len(shown.parts) - 1):
        text = lines(drawn, selected)
        assert [len(line) for line in text] == [columns] * rows


def test_parts_too_close_carry_a_sign_and_the_key_says_what_it_is() -> None:
    case = LIBRARY.case("valve-blocks-24")  # 75 mm between rows
    near = plan(replace(case, recipe=replace(case.recipe, spacing=0.078)))
    shown = scene_of(near)
    assert all(hung.close for hung in shown.parts)
    wide = "\n".join(lines(cells(shown, 160, 48)))
    assert "13!" in wide
    assert "! overlaps or too near" in wide
    assert "overlaps" not in "\n".join(lines(cells(scene_of(plan(case)), 160, 48)))
