"""Gaps between parts, held against shapely's own distance over every pair of the load."""

import math
from dataclasses import replace
from itertools import combinations
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from shapely import Polygon

from lineplanner.files.library import Library
from lineplanner.geometry import Pose, silhouette
from lineplanner.inputs.case import Case
from lineplanner.inputs.load import Hang
from lineplanner.inputs.part import Part
from lineplanner.racking.gaps import gaps_of

LIBRARY = Library(Path(__file__).parents[2])
PARTS: dict[str, Part] = {
    name: LIBRARY.record("part", name) for name in ("lug", "test-coupon", "seal-plate", "rod-40x900")
}
FREE = LIBRARY.record("rack", "spline-24")


def case_of(*hangs: Hang) -> Case:
    """Parts at free positions, wherever they are put."""
    case = LIBRARY.case("valve-blocks-24")
    rack = replace(case.rack, hanging="free", tips=())
    return replace(case, load=replace(case.load, hangs=hangs), rack=rack, parts=PARTS)


def by_hand(case: Case) -> tuple[float, set[tuple[int, int]]]:
    """The least distance and the overlapping pairs, every pair looked at."""
    outlines: list[tuple[str, Polygon]] = []
    for hang in case.load.hangs:
        for x, drop in hang.at:
            for side in ("front", "back") if hang.side == "both" else (hang.side,):
                pose = Pose(x, -drop, hang.turn, hang.facing == "edge-on")
                outlines.append((side, Polygon(silhouette(PARTS[hang.part], pose, 5e-5)[0])))
    least, overlap = math.inf, set()
    for (i, (side, one)), (j, (other_side, other)) in combinations(enumerate(outlines, 1), 2):
        if side != other_side:
            continue
        if one.intersects(other) and one.intersection(other).area > 1e-12:
            overlap.add((i, j))
        least = min(least, one.distance(other))
    return least, overlap


SPOT = st.tuples(st.floats(0.0, 1.2), st.floats(0.1, 1.5))
HANGS = st.builds(
    Hang,
    part=st.sampled_from(sorted(PARTS)),
    at=st.lists(SPOT, min_size=1, max_size=6).map(tuple),
    turn=st.sampled_from([0.0, 0.3, math.pi / 2, 2.0]),
    facing=st.sampled_from(["flat", "edge-on"]),
    side=st.sampled_from(["front", "back", "both"]),
)


@settings(max_examples=120, deadline=None)
@given(st.lists(HANGS, min_size=1, max_size=4), st.floats(0.0, 0.2))
def test_least_gap_overlaps_and_near_pairs_are_those_of_every_pair(hangs: list[Hang], wanted: float) -> None:
    case = case_of(*hangs)
    found, (least, overlap) = gaps_of(case, wanted), by_hand(case)
    if math.isinf(least):
        assert found.least is None
        return
    assert found.least == pytest.approx(least, abs=3e-7)  # offsets agree to a tenth of a micrometre
    assert set(found.overlapping) == overlap
    assert (least < wanted - 1e-6) <= bool(found.near or found.overlapping)


def test_two_coupons_160_mm_apart_leave_what_their_width_leaves() -> None:
    # 3 x 5 in coupons, 76.2 mm wide, on tips 160 mm apart: 83.8 mm between them, reckoned by hand.
    case = LIBRARY.case("coupons-24")
    found = gaps_of(case, 0.09)
    assert found.least == pytest.approx(0.160 - 0.0762, abs=1e-9)
    assert found.between == (1, 3)  # each tip holds two, one on each side
    assert len(found.near) == 18  # three gaps in each of three rows, on both sides
    assert not found.overlapping


def test_sides_of_the_rack_do_not_meet() -> None:
    front, back = (Hang(part="lug", at=((0.2, 0.3),), side=side) for side in ("front", "back"))  # type: ignore[arg-type]
    assert gaps_of(case_of(front, back)).least is None
    assert gaps_of(case_of(front, front)).overlapping == ((1, 2),)
    assert gaps_of(case_of(front, front)).least == 0.0


def test_parts_that_are_only_counted_have_no_gaps() -> None:
    case = LIBRARY.case("relay-lids-20")
    assert gaps_of(case).least is None
