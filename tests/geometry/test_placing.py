"""Where a placed part is, how it is drawn, and what it keeps: extent, silhouette, pockets. Sizes in mm."""

import math

import numpy as np
import pytest
import shapely
from hypothesis import given, settings

from lineplanner.geometry import Pose, extent, shape_of, silhouette, traps_gas, traps_liquid
from lineplanner.inputs.part import Bore, Part, Slot
from tests.geometry.parts import (
    MM,
    ONE_OF_EACH,
    PARTS,
    POSES,
    areas,
    hole,
    plate,
    section,
    stated,
    tube,
    turned,
)

LYING = math.pi / 2


def test_the_hanging_point_sits_at_the_place() -> None:
    part = plate(100, 60, 6, hang=(-0.04, 0.02))
    # 40 left and 20 up of the middle: the part reaches 10 left, 90 right, 50 down, 10 up
    assert extent(shape_of(part), Pose(1.0, -0.5)) == pytest.approx((0.99, -0.55, 1.09, -0.49))
    # turned a quarter counter-clockwise what was right points up
    assert extent(shape_of(part), Pose(1.0, -0.5, LYING)) == pytest.approx((0.99, -0.51, 1.05, -0.41))


def test_edge_on_a_plate_shows_its_thickness_and_its_front_looks_right() -> None:
    part = plate(100, 60, 6, hang=(-0.04, 0.02))
    assert extent(shape_of(part), Pose(edge_on=True)) == pytest.approx((-0.003, -0.05, 0.003, 0.01))
    # turned a quarter more, the front looks up: a level through the middle leaves it dry and the back wet
    book = areas(part, Pose(turn=LYING, edge_on=True), 0.0)
    wet = {face.face: face.wet_area for face in book.rows}
    assert wet["front"] == 0.0
    assert wet["back"] == pytest.approx(0.006)


def test_a_leaning_cylinder_reaches_as_far_as_its_rims() -> None:
    # 100 long, radius 20, leaning 30 degrees: the lowest point is a rim, 20 sin 30 under the end of the axis
    part = turned((0, 20), (100, 20))
    left, low, right, high = extent(shape_of(part), Pose(turn=math.radians(30)))
    assert (low, high) == pytest.approx((-10 * MM, (100 * math.cos(math.radians(30)) + 10) * MM))
    assert right == pytest.approx(20 * math.cos(math.radians(30)) * MM)
    assert left == pytest.approx((-50 - 20 * math.cos(math.radians(30))) * MM)


@given(part=PARTS, pose=POSES)
@settings(deadline=None)
def test_the_silhouette_fills_the_extent(part: Part, pose: Pose) -> None:
    outer = silhouette(part, pose, 0.02 * MM)[0]
    drawn = np.concatenate((outer.min(axis=0), outer.max(axis=0)))
    # within the tolerance of drawing and of chords
    assert drawn == pytest.approx(np.array(extent(shape_of(part), pose)), abs=2.5e-5)


def test_a_flat_plate_is_drawn_with_what_one_sees_through() -> None:
    holes = (hole(-30, 0, 8), hole(30, 0, 8, 3))
    part = plate(holes=holes, slots=(Slot(at=(0.0, 0.0), length=0.02, width=0.006),))
    rings = silhouette(part, Pose(0.1, -0.2, 0.5), 0.1 * MM)
    assert len(rings) == 3
    outer, through, slot = (shapely.Polygon(ring) for ring in rings)
    assert outer.area == pytest.approx(0.006)
    assert outer.contains(through)
    assert outer.contains(slot)
    centre = np.array((0.1 - 0.03 * math.cos(0.5), -0.2 - 0.03 * math.sin(0.5)))
    assert shapely.get_coordinates(through.centroid)[0] == pytest.approx(centre, abs=1e-6)


def test_edge_on_and_round_parts_are_drawn_from_the_side() -> None:
    (box,) = silhouette(plate(), Pose(edge_on=True), 1e-4)
    assert shapely.Polygon(box).area == pytest.approx(0.006 * 0.06)
    (profile,) = silhouette(turned((0, 20), (20, 5)), Pose(), 1e-4)
    assert shapely.Polygon(profile).area == pytest.approx((40 + 10) / 2 * 20 * MM**2)
    (side,) = silhouette(stated(), Pose(edge_on=True), 1e-4)
    assert shapely.Polygon(side).area == pytest.approx(0.05 * 0.1)
    (bar,) = silhouette(ONE_OF_EACH["manifold"], Pose(edge_on=True), 1e-4)
    assert shapely.Polygon(bar).area == pytest.approx(0.04 * 0.12)
    (pipe,) = silhouette(tube(50, 40, 100), Pose(), 1e-4)
    assert shapely.Polygon(pipe).area == pytest.approx(0.05 * 0.1)


DOWN, UP, NEITHER = (True, False), (False, True), (False, False)
BORED = turned((0, 9), (50, 9), bores=(Bore(diameter=0.005, depth=0.02),))
POCKETS: dict[str, tuple[Part, Pose, tuple[bool, bool]]] = {
    "blind bore from below": (BORED, Pose(), DOWN),
    "the same upside down": (BORED, Pose(turn=math.pi), UP),
    "the same lying": (BORED, Pose(turn=LYING), NEITHER),
    "the same edge-on": (BORED, Pose(edge_on=True), DOWN),
    "from above": (turned((0, 9), (50, 9), bores=(Bore(diameter=0.005, depth=0.02, mouth="top"),)), Pose(), UP),
    "through bore": (turned((0, 9), (50, 9), bores=(Bore(diameter=0.005),)), Pose(), NEITHER),
    "plugged bore": (turned((0, 9), (50, 9), bores=(Bore(diameter=0.005, depth=0.02, plugged=True),)), Pose(), NEITHER),
    "blind hole facing the viewer": (plate(holes=(hole(0, 0, 5, 3),)), Pose(turn=0.3), NEITHER),
    "blind hole, front leaning down": (plate(holes=(hole(0, 0, 5, 3),)), Pose(turn=-0.1, edge_on=True), DOWN),
    "blind hole, front leaning up": (plate(holes=(hole(0, 0, 5, 3),)), Pose(turn=0.1, edge_on=True), UP),
    "through hole": (plate(holes=(hole(0, 0, 5),)), Pose(turn=0.1, edge_on=True), NEITHER),
    "cup as drawn": (stated(cup="down"), Pose(), DOWN),
    "cup leaning": (stated(cup="down"), Pose(turn=1.0, edge_on=True), DOWN),
    "cup turned over": (stated(cup="down"), Pose(turn=3.0), UP),
    "cup on its side": (stated(cup="up"), Pose(turn=LYING), NEITHER),
    "open tube": (tube(), Pose(), NEITHER),
    "open section": (section(ONE_OF_EACH["manifold"].outline), Pose(), NEITHER),
}  # fmt: skip


@pytest.mark.parametrize("name", POCKETS)
def test_a_pocket_keeps_gas_when_it_opens_down_and_solution_when_it_opens_up(name: str) -> None:
    part, pose, expected = POCKETS[name]
    assert (traps_gas(part, pose), traps_liquid(part, pose)) == expected


def test_the_same_part_is_built_once_and_an_equal_one_gives_equal_areas() -> None:
    part, twin = plate(), plate()
    assert shape_of(part) is shape_of(part)
    assert shape_of(part) is not shape_of(twin)
    assert areas(part) is areas(part)
    assert areas(part) == areas(twin)
    pose = Pose(y=-0.4, turn=0.2)
    assert areas(part, pose, -0.4) is areas(part, pose, -0.4)
