"""Room for more: never an overlap, gaps kept by shapely's own distance, never fewer than a plain grid."""

import math
from dataclasses import replace
from functools import cache
from itertools import combinations
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from shapely import Polygon, box

from lineplanner.files.library import Library
from lineplanner.geometry import Pose, silhouette
from lineplanner.inputs.case import Case
from lineplanner.inputs.load import Hang
from lineplanner.inputs.part import Outline, Part, Plate
from lineplanner.racking import places_of, room_for
from lineplanner.racking.places import Place
from lineplanner.racking.room import hung
from lineplanner.racking.tips import sides_of

LIBRARY = Library(Path(__file__).parents[2])
CASE = LIBRARY.case("valve-blocks-24")
LEVEL = CASE.tank.solution_drop


def plate(width: float, height: float) -> Plate:
    """A rectangle hung by the middle of its upper edge."""
    outline = Outline(shape="rectangle", width=width, height=height)
    return Plate(
        form="plate",
        name="plate",
        material="6061-t6",
        outline=outline,
        thickness=0.005,
        hang=(0.0, height / 2),
    )


def frame(part: Part, width: float, height: float, *hangs: Hang, grid: float = 0.01) -> Case:
    """A rack of free positions, so high below the solution level, and what hangs there."""
    rack = replace(
        CASE.rack, hanging="free", tips=(), members=(), width=width, height=LEVEL + height, grid=grid
    )
    hangs = hangs or (Hang(part="part", at=((-5.0, 0.0),)),)  # far off, out of the way
    load = replace(CASE.load, hangs=hangs)
    return replace(CASE, rack=rack, load=load, parts={"part": part})


def outlines(case: Case, places: list[Place]) -> list[tuple[str, Polygon]]:
    found = []
    for place in places:
        assert place.at is not None
        x, drop = place.at
        pose = Pose(x, -drop, place.how.turn, place.how.facing == "edge-on")
        ring = silhouette(case.parts[place.how.part], pose, 5e-5)[0]
        found += [(side, Polygon(ring)) for side in sides_of(place.how)]
    return found


@settings(max_examples=60, deadline=None)
@given(
    st.sampled_from(["lug", "seal-plate", "test-coupon"]),
    st.sampled_from([0.0, 0.4, math.pi / 2]),
    st.floats(0.0, 0.06),
    st.floats(0.2, 0.7),
    st.floats(0.2, 0.7),
)
def test_parts_never_overlap_keep_their_gap_and_stay_on_the_rack(
    name: str, turn: float, wanted: float, width: float, height: float
) -> None:
    first = Hang(part="part", at=((width / 2, LEVEL + height / 2),), turn=turn)
    case = frame(LIBRARY.record("part", name), width, height, first)
    more = room_for(case, (0, 0), wanted)
    everything = [*places_of(case.load).values(), *more]
    for (_, one), (_, other) in combinations(outlines(case, everything), 2):
        assert one.distance(other) >= wanted - 2e-7
        assert one.intersection(other).area < 1e-10
    rack = box(0.0, -case.rack.height, case.rack.width, -LEVEL).buffer(1e-7)
    assert all(rack.contains(outline) for _, outline in outlines(case, more))
    assert len(places_of(hung(case, (0, 0), more).load)) == 1 + len(more)


SIZE = st.integers(3, 20)  # in steps of the grid of 10 mm


@settings(max_examples=80, deadline=None)
@given(SIZE, SIZE, st.integers(20, 80), st.integers(20, 80), st.integers(0, 4))
def test_never_fewer_than_a_plain_grid(w: int, h: int, width: int, height: int, gap: int) -> None:
    case = frame(plate(w / 100, h / 100), width / 100, height / 100 + 1e-6)
    found = len(room_for(case, (0, 0), gap / 100))
    plain = ((width + gap) // (w + gap)) * ((height + gap) // (h + gap))
    # a part hangs by a point: half a width may lie between two steps of the grid
    assert found >= plain - (w % 2) * ((height + gap) // (h + gap))


@pytest.mark.parametrize(("w", "h"), [(2, 2), (2, 3), (4, 2), (4, 3)])
@pytest.mark.parametrize(("width", "height"), [(5, 5), (6, 7), (8, 4), (7, 9)])
def test_equal_rectangles_on_a_small_rack_reach_the_best_of_every_arrangement(
    w: int, h: int, width: int, height: int
) -> None:
    case = frame(plate(w / 100, h / 100), width / 100, height / 100 + 1e-6)
    assert len(room_for(case, (0, 0))) == best(w, h, width, height)


def best(w: int, h: int, width: int, height: int) -> int:
    """The most rectangles, not turned, by trying every arrangement on whole steps: row heights column by column."""

    @cache
    def most(tops: tuple[int, ...]) -> int:
        low = min(tops)
        if low + h > height:
            return 0
        at = tops.index(low)
        raised = most((*tops[:at], low + 1, *tops[at + 1 :]))  # the place stays empty
        span = tops[at : at + w]
        if len(span) < w or max(span) > low:
            return raised
        return max(raised, 1 + most((*tops[:at], *([low + h] * w), *tops[at + w :])))

    return most((0,) * width)


def test_on_tips_only_free_ones_that_leave_the_gap_are_room() -> None:
    few = replace(CASE, load=replace(CASE.load, hangs=(Hang(part="valve-block", tips=("A1",)),)))
    assert len(room_for(few, (0, 0))) == 23
    # 75 mm between rows, 80 mm between columns: at 78 mm every second row is left out, reckoned by hand
    assert [p.tips[0] for p in room_for(few, (0, 0), 0.078)] == [
        "A2", "A3", "A4", *(f"{row}{n}" for row in "CE" for n in range(1, 5))
    ]  # fmt: skip
    assert room_for(few, (0, 0), 1.0) == []


def test_what_hangs_in_the_way_is_hung_around() -> None:
    square = plate(0.1, 0.1)
    in_the_middle = Hang(part="part", at=((0.15, LEVEL + 0.1),))
    case = frame(square, 0.3, 0.3 + 1e-6, in_the_middle)
    assert len(room_for(case, (0, 0))) == 8
