"""What lies below the solution level: closed forms, and properties that hold for any part and pose."""

import dataclasses
import math
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import example, given, settings
from hypothesis import strategies as st
from scipy.integrate import quad

from lineplanner.geometry import Pose, extent, shape_of
from lineplanner.inputs.part import Outline, Part, Plate
from tests.geometry.parts import (
    MM,
    MM2,
    NAMED,
    ONE_OF_EACH,
    PARTS,
    POSES,
    SHARES,
    TURNS,
    areas,
    between,
    hole,
    plate,
    rectangle,
    row,
    scaled,
    section,
    stated,
    tube,
    turned,
)

EDGE_ON = Pose(edge_on=True)
LYING = Pose(turn=math.pi / 2)


def wet(part: Part, pose: Pose, level_mm: float, face: str) -> float:
    """Wet area of a face in mm2."""
    return float(row(areas(part, pose, level_mm * MM), face).wet_area / MM2)


# --- closed forms ----------------------------------------------------------------------------------------


def test_a_flat_plate_is_cut_across() -> None:
    part = plate(100, 60, 6)
    assert wet(part, Pose(), -10, "front") == pytest.approx(100 * 20)
    # the lower edge, and 20 of each upright one
    assert wet(part, Pose(), -10, "edge") == pytest.approx((100 + 2 * 20) * 6)


def test_a_plate_turned_by_45_degrees_is_cut_to_a_triangle() -> None:
    # a square standing on its corner: 20 above the corner the cut is a right triangle of height 20, area 20^2
    part, corner = plate(60, 60, 6), -30 * math.sqrt(2)
    pose = Pose(turn=math.pi / 4)
    assert wet(part, pose, corner + 20, "back") == pytest.approx(400)
    assert wet(part, pose, corner + 20, "edge") == pytest.approx(2 * 20 * math.sqrt(2) * 6)


def test_an_edge_on_plate_that_leans_is_cut_obliquely_through_its_thickness() -> None:
    # 60 high, 20 thick, 100 wide, leaning by 0.3: the level through the hanging point halves it. The front looks
    # to the right and up, so its middle is higher by 10 sin 0.3 and it is wet over 30 - 10 tan 0.3.
    part, pose = plate(100, 60, 20), Pose(turn=0.3, edge_on=True)
    assert wet(part, pose, 0, "front") == pytest.approx(100 * (30 - 10 * math.tan(0.3)))
    assert wet(part, pose, 0, "back") == pytest.approx(100 * (30 + 10 * math.tan(0.3)))
    # lower edge whole, two ends halved
    assert wet(part, pose, 0, "edge") == pytest.approx(100 * 20 + 2 * 60 * 20 / 2)


def test_a_hole_is_cut_at_its_chord() -> None:
    # level 2.5 over the middle of a hole of radius 5: a third of the wall stays dry, the chord cuts 60 degrees
    part = plate(holes=(hole(0, 0, 10),))
    assert wet(part, Pose(), 2.5, "hole-1") == pytest.approx(math.pi * 10 * 6 * 2 / 3)
    above = 25 * (math.pi / 3 - math.sqrt(3) / 4)
    assert wet(part, Pose(), 2.5, "front") == pytest.approx(100 * 32.5 - (math.pi * 25 - above))


def test_a_lying_cylinder_is_wet_over_its_arc() -> None:
    # r = 20, level 10 below the axis: the arc below spans 120 degrees
    part = turned((0, 20), (80, 20))
    assert wet(part, LYING, -10, "side") == pytest.approx(math.tau * 20 * 80 / 3)
    assert wet(part, LYING, -10, "top") == pytest.approx(400 * (math.pi / 3 - math.sqrt(3) / 4))


def test_an_upright_cone_is_wet_by_its_slant() -> None:
    # radius 20 to 5 over 20, slant 25; 8 up: radius 14, slant 10
    part = turned((0, 20), (20, 5))
    assert wet(part, Pose(), 8, "side") == pytest.approx(math.pi * (20 + 14) * 10)
    assert wet(part, Pose(), 8, "top") == 0.0


@given(lean=st.floats(-1.0, 1.0), along=st.floats(0.35, 0.65))
@settings(deadline=None)
def test_a_leaning_cylinder_cut_clear_of_its_ends_is_wet_to_its_mean_height(
    lean: float, along: float
) -> None:
    part, length, radius = turned((0, 10), (200, 10)), 200, 10
    level = along * length * math.cos(lean)
    assert wet(part, Pose(turn=lean), level, "side") == pytest.approx(
        math.tau * radius * along * length, rel=1e-9
    )


@pytest.mark.parametrize("lean", [0.05, 0.4, 0.9, 1.3, 1.55])
@pytest.mark.parametrize("share", [0.03, 0.2, 0.5, 0.9])
def test_a_leaning_cone_agrees_with_an_adaptive_integral(lean: float, share: float) -> None:
    part, pose = turned((0, 30), (90, 6)), Pose(turn=lean)
    level = between(part, pose, share) / MM
    rate, sine, cosine = (6 - 30) / 90, math.sin(lean), math.cos(lean)

    def width(v: float) -> float:
        radius = 30 + rate * v
        x = min(max((level - v * cosine) / (radius * sine), -1.0), 1.0)
        return 2 * radius * (math.pi - math.acos(x)) * math.hypot(1, rate)

    kinks = [(level - s * sine * 30) / (cosine + s * sine * rate) for s in (-1, 1)]
    marks = [0.0, *sorted(k for k in kinks if 0 < k < 90), 90.0]
    expected = sum(quad(width, a, b, epsabs=1e-10, epsrel=1e-10, limit=400)[0] for a, b in pairwise(marks))
    assert wet(part, pose, level, "side") == pytest.approx(expected, rel=1e-8)


def test_a_shoulder_and_an_end_are_wet_as_soon_as_the_level_stands_above_them() -> None:
    part = turned((0, 10), (30, 10), (30, 20), (50, 20))
    below = math.tau * 10 * 30
    assert wet(part, Pose(), 30, "side") == pytest.approx(below)
    assert wet(part, Pose(), 30.001, "side") == pytest.approx(below + math.pi * 300 + math.tau * 20 * 0.001)


def test_what_lies_exactly_at_the_level_is_dry() -> None:
    part = plate(100, 60, 6)
    assert wet(part, Pose(), 30, "edge") == pytest.approx((100 + 2 * 60) * 6)
    assert wet(part, Pose(), 30, "front") == 6000
    assert wet(part, LYING, 50, "edge") == pytest.approx((2 * 100 + 60) * 6)


def test_a_stated_part_is_wet_by_the_share_of_its_box_and_says_so() -> None:
    book = areas(stated(), Pose(y=-0.3), -0.32)  # box from -0.35 to -0.25
    assert book.wet == pytest.approx(0.08 * 0.3)
    keys = [reason.key for reason in book.rows[0].why]
    assert keys == ["dry-above-level", "box-share"]
    assert book.rows[0].why[1].facts["share"].value == pytest.approx(0.3)


def test_a_section_edge_on_shows_its_depth_and_lies_across_when_turned() -> None:
    part = section(rectangle(60, 40), 200)
    assert extent(shape_of(part), EDGE_ON) == pytest.approx((-0.02, -0.1, 0.02, 0.1))
    flat_on = Pose(turn=math.pi / 2, edge_on=True)
    # lying with its 40 upright, level 10 below the axis: the lower 60 face and 10 of both 40 faces
    assert wet(part, flat_on, -10, "side") == pytest.approx(200 * (60 + 2 * 10))


# --- properties ------------------------------------------------------------------------------------------


@given(part=PARTS, pose=POSES)
@settings(deadline=None)
def test_a_part_below_the_level_has_its_dry_areas_to_the_last_digit(part: Part, pose: Pose) -> None:
    _, low, _, high = extent(shape_of(part), pose)
    assert areas(part, pose, high + 1e-9) == areas(part)
    drained = areas(part, pose, low - 1e-9)
    assert (drained.wet, drained.carrying, drained.significant) == (0.0, 0.0, 0.0)


@given(part=PARTS, pose=POSES, shares=st.lists(SHARES, min_size=2, max_size=12))
@settings(deadline=None)
@example(ONE_OF_EACH["cover"], Pose(0, 0, 1e-7), [0.0, 0.5, 1.0])
def test_no_face_gets_less_wet_as_the_level_rises(part: Part, pose: Pose, shares: list[float]) -> None:
    books = [areas(part, pose, between(part, pose, share)) for share in sorted(shares)]
    books.append(areas(part))
    for lower, higher in pairwise(books):
        for before, after in zip(lower.rows, higher.rows, strict=True):
            for kind in ("wet_area", "carrying_area", "significant_area"):
                assert getattr(before, kind) <= getattr(after, kind) + 1e-12 * after.area


@given(part=PARTS, pose=POSES, share=SHARES)
@settings(deadline=None)
def test_what_is_dry_is_what_is_wet_upside_down(part: Part, pose: Pose, share: float) -> None:
    level = between(part, pose, share)
    over = level - pose.y
    up, down = (
        areas(part, Pose(0, 0, pose.turn, pose.edge_on), over),
        areas(part, Pose(0, 0, pose.turn + math.pi, pose.edge_on), -over),
    )
    full = areas(part)
    for one, other, whole in zip(up.rows, down.rows, full.rows, strict=True):
        # a face that lies flat at the level is dry both ways; else the two make up the whole
        both = one.wet_area + other.wet_area
        assert both == pytest.approx(whole.wet_area, rel=1e-7, abs=1e-12) or both < whole.wet_area
        if not _level_in_a_face(part, pose, over):
            assert both == pytest.approx(whole.wet_area, rel=1e-7, abs=1e-12)


def _level_in_a_face(part: Part, pose: Pose, over: float) -> bool:
    """Whether a level face or edge of the part lies at the level."""
    slightly = [areas(part, Pose(0, 0, pose.turn, pose.edge_on), over + d).wet for d in (-1e-9, 1e-9)]
    return slightly[1] - slightly[0] > 1e-7 * areas(part).wet


@given(part=PARTS, pose=POSES, share=SHARES, by=st.floats(-3, 3))
@settings(deadline=None)
def test_areas_do_not_change_when_part_and_level_move_together(
    part: Part, pose: Pose, share: float, by: float
) -> None:
    here = areas(part, pose, between(part, pose, share))
    moved = dataclasses.replace(pose, x=pose.x + by, y=pose.y + by)
    there = areas(part, moved, between(part, moved, share))
    if not _level_in_a_face(part, pose, between(part, pose, share) - pose.y):
        assert there.wet == pytest.approx(here.wet, rel=1e-6, abs=1e-12)


@given(part=PARTS, pose=POSES, share=SHARES)
@settings(deadline=None)
def test_areas_add_up_over_the_faces_and_each_is_at_most_the_one_before(
    part: Part, pose: Pose, share: float
) -> None:
    for book in (areas(part), areas(part, pose, between(part, pose, share))):
        assert book.wet == pytest.approx(sum(r.wet_area for r in book.rows), rel=1e-12)
        assert book.carrying == pytest.approx(sum(r.carrying_area for r in book.rows), rel=1e-12)
        assert book.significant == pytest.approx(sum(r.significant_area for r in book.rows), rel=1e-12)
        for face in book.rows:
            assert 0.0 <= face.significant_area <= face.carrying_area <= face.wet_area
            assert face.wet_area <= face.area * face.factor * (1 + 1e-12)


@given(part=PARTS, by=st.floats(0.05, 15.0))
@settings(deadline=None)
def test_lengths_times_s_give_areas_times_s_squared(part: Part, by: float) -> None:
    small, large = areas(part), areas(scaled(part, by))
    for kind in ("wet", "carrying", "significant"):
        assert getattr(large, kind) == pytest.approx(getattr(small, kind) * by**2, rel=1e-9)


@given(part=PARTS, pose=POSES, share=st.floats(0.1, 0.9), by=st.floats(0.2, 4.0))
@settings(deadline=None)
def test_a_cut_part_scales_too(part: Part, pose: Pose, share: float, by: float) -> None:
    larger, at = scaled(part, by), Pose(0, 0, pose.turn, pose.edge_on)
    level = between(part, at, share)
    if not _level_in_a_face(part, at, level):
        small, large = areas(part, at, level).wet, areas(larger, at, level * by).wet
        assert large == pytest.approx(small * by**2, rel=1e-8, abs=1e-12)


@given(
    outline=st.builds(
        Outline,
        shape=st.just("polygon"),
        diameter=st.floats(0.01, 1.0),
        sides=st.integers(3, 40),
    ),
    thickness=st.floats(0.0005, 0.1),
    turn=TURNS,
    share=SHARES,
)
@settings(deadline=None, max_examples=60)
def test_a_flat_prism_has_the_same_share_wet_on_front_and_back(
    outline: Outline, thickness: float, turn: float, share: float
) -> None:
    part = Plate(form="plate", outline=outline, thickness=thickness, **NAMED)
    pose = Pose(turn=turn)
    book = areas(part, pose, between(part, pose, share))
    assert row(book, "front").wet_area == row(book, "back").wet_area


def test_a_tube_lying_at_half_its_height_is_half_wet_inside_and_out() -> None:
    book = areas(tube(50, 40, 100, rule="all"), LYING, 0.0)
    for face in book.rows:
        assert face.wet_area == pytest.approx(face.area / 2, rel=1e-12)
    assert np.isclose(book.wet, areas(tube()).wet / 2)
