"""The invented shop that comes with the program: every file reads, every name resolves, every rack can hang."""

import itertools
from collections import Counter
from collections.abc import Iterator
from dataclasses import fields, is_dataclass
from functools import cache
from pathlib import Path
from typing import Any, get_type_hints

import pytest

from lineplanner.files.cases import open_case
from lineplanner.files.kinds import kinds
from lineplanner.files.library import Library
from lineplanner.files.reading import check, read
from lineplanner.geometry import Pose, extent, shape_of
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import parts_hung, spots_of, tip_places
from lineplanner.inputs.load import Hang
from lineplanner.quantities import Field

SHOP = Path(__file__).parent.parent
FILES = sorted(file for half in ("configs", "rack_library") for file in (SHOP / half).rglob("*.toml"))
LOADS = sorted(file.stem for file in (SHOP / "rack_library" / "loads").glob("*.toml"))
RACKS = sorted(file.stem for file in (SHOP / "rack_library" / "racks").glob("*.toml"))
PARTLY_DRY = {"rod-40x900"}  # long rods, cut by the solution on purpose


@cache
def library() -> Library:
    return Library(SHOP)


@cache
def case_of(load: str) -> Case:
    return open_case(library(), load)


def records(kind: str) -> dict[str, Any]:
    return {stem: library().record(kind, stem) for stem in library().stems(kind)}


# --- files -----------------------------------------------------------------------------------------------


@pytest.mark.parametrize("file", FILES, ids=lambda file: f"{file.parent.name}/{file.name}")
def test_every_file_of_the_shop_reads_without_a_problem(file: Path) -> None:
    assert check(file) == []


@pytest.mark.parametrize("kind", [kind for kind in kinds() if kinds()[kind].table is None])
def test_every_file_has_a_name_that_can_be_referred_to(kind: str) -> None:
    assert library().listing_problems(kind) == []


def references(record: Any) -> Iterator[tuple[str, str]]:
    """Kind and name of everything that a record refers to, at any depth."""
    if isinstance(record, tuple):
        for item in record:
            yield from references(item)
    if not is_dataclass(record):
        return
    hints = get_type_hints(type(record), include_extras=True)
    for one in fields(record):
        value = getattr(record, one.name)
        notes = getattr(hints[one.name], "__metadata__", ())
        kind = next((note.ref for note in notes if isinstance(note, Field) and note.ref), None)
        if kind and value is not None:
            yield kind, value
        else:
            yield from references(value)


def test_references_are_found_at_any_depth() -> None:
    assert set(references(library().record("load", "lug-mix"))) == {
        ("recipe", "hardcoat-50-2024"),
        ("rack", "spline-24"),
        ("line", "kestrel-yard"),
        ("part", "lug"),
        ("material", "6061-t6"),
    }


@pytest.mark.parametrize("file", FILES, ids=lambda file: f"{file.parent.name}/{file.name}")
def test_every_reference_names_a_file_of_the_shop(file: Path) -> None:
    assert [(kind, name) for kind, name in references(read(file)) if name not in library().stems(kind)] == []


def test_standards_tables_and_cautions_are_complete() -> None:
    assert library().tables() is not None
    assert library().cautions() is not None


# --- what is there ---------------------------------------------------------------------------------------


def test_the_shop_is_large_enough_to_try_everything() -> None:
    parts, line = records("part"), records("line")["kestrel-yard"]
    assert len(parts) >= 12
    assert {part.form for part in parts.values()} == {"plate", "section", "turned", "tube", "stated"}
    assert len(records("rack")) >= 5
    assert len(records("recipe")) >= 8
    assert len(LOADS) >= 8
    assert {tank.name for tank in line.tanks} == {"S1", "H1", "C1", "K1", "T1"}


def test_every_process_of_the_line_has_a_load_and_drafts_stand_beside_approved_recipes() -> None:
    run = {case_of(load).recipe.process for load in LOADS}
    assert {"anodize-sulfuric", "anodize-hard", "anodize-chromic", "anodize-tartaric-sulfuric"} < run
    assert "chrome-hard" in run
    assert {recipe.status for recipe in records("recipe").values()} == {"draft", "approved"}


def test_the_two_chrome_rectifiers_differ_in_reversing_gear_and_one_may_be_overloaded_for_a_strike() -> None:
    feeding = [one for one in records("line")["kestrel-yard"].rectifiers if "C1" in one.tanks]
    assert sorted(one.reversing for one in feeding) == ["no", "yes"]
    assert any(one.reversing == "yes" and one.overload_current for one in feeding)


def test_the_first_load_is_a_load_of_the_shop() -> None:
    assert library().site().first_load in LOADS


# --- loads -----------------------------------------------------------------------------------------------


@pytest.mark.parametrize("load", LOADS)
def test_every_load_makes_a_case(load: str) -> None:
    case = case_of(load)
    assert case.name == load
    assert all(parts_hung(hang) > 0 for hang in case.load.hangs)


Box = tuple[float, float, float, float]  # left, right, upper, lower; drops count downwards


def boxes(case: Case) -> Iterator[Box]:
    """Where each hung part is; parts back to back on one tip share a box."""
    for hang in case.load.hangs:
        if hang.count is not None:
            continue
        left, low, right, high = part_extent(case, hang)
        for x, drop in spots_of(hang, tip_places(case.rack)):
            yield x + left, x + right, drop - high, drop - low


def part_extent(case: Case, hang: Hang) -> tuple[float, ...]:
    pose = Pose(0.0, 0.0, hang.turn, hang.facing == "edge-on")
    return tuple(extent(shape_of(case.parts[hang.part]), pose))


@pytest.mark.parametrize("load", LOADS)
def test_parts_hang_inside_the_rack_and_under_the_solution(load: str) -> None:
    case = case_of(load)
    drop = case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop
    for left, right, upper, lower in boxes(case):
        assert 0.0 <= left < right <= case.rack.width
        assert 0.0 <= upper < lower <= case.rack.height
        assert (upper < drop) == (load in PARTLY_DRY)


@pytest.mark.parametrize("load", LOADS)
def test_parts_hang_clear_of_each_other(load: str) -> None:
    least = 0.025  # m, between the boxes of two neighbours
    for one, other in itertools.combinations(boxes(case_of(load)), 2):
        sideways = max(one[0] - other[1], other[0] - one[1])
        along = max(one[2] - other[3], other[2] - one[3])
        assert max(sideways, along) >= least


@pytest.mark.parametrize("rack", RACKS)
def test_metal_and_tips_of_a_rack_lie_inside_it(rack: str) -> None:
    record = records("rack")[rack]
    ends = [spot for member in record.members for spot in (member.start, member.end)]
    ends += [(tip.x, tip.drop) for tip in tip_places(record).values()]
    assert all(0.0 <= x <= record.width and 0.0 <= drop <= record.height for x, drop in ends)


def test_changes_of_loads_lie_inside_and_outside_the_range_of_their_recipe() -> None:
    inside: Counter[bool] = Counter()
    for load in LOADS:
        case = case_of(load)
        for name in ("aim", "current_density", "strike_time"):
            changed = getattr(case.load.change, name, None)
            if changed is not None:
                inside[getattr(case.recipe, name).holds(changed)] += 1
    assert inside[True] >= 2
    assert inside[False] >= 1
