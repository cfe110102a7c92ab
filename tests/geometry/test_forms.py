"""One part of each form, worked by hand: faces, sums and volume. Sizes in mm, areas in mm2."""

import math

import pytest

from lineplanner.geometry import drawn_total, shape_of, volume
from lineplanner.inputs.part import Bore, Outline, Part, Plate, Slot
from tests.geometry.parts import (
    MM,
    MM2,
    MM3,
    NAMED,
    ONE_OF_EACH,
    areas,
    hole,
    plate,
    points,
    rectangle,
    section,
    stated,
    tube,
    turned,
)


def faces(part: Part) -> dict[str, float]:
    """Drawn areas by face in mm2."""
    return {row.face: row.area / MM2 for row in areas(part).rows}


def test_a_plate_has_two_sides_less_its_holes_an_edge_and_the_walls_of_its_holes() -> None:
    part = plate(100, 60, 6, holes=(hole(-30, 0, 8), hole(30, 0, 10, 4)))
    through, blind = math.pi * 16, math.pi * 25
    assert faces(part) == pytest.approx(
        {
            "front": 6000 - through - blind,
            "back": 6000 - through,
            "edge": 2 * (100 + 60) * 6,
            "hole-1": math.pi * 8 * 6,
            "hole-2": math.pi * 10 * 4,
            "hole-2-floor": blind,
        }
    )
    assert volume(part) == pytest.approx((6000 * 6 - through * 6 - blind * 4) * MM3)


def test_a_slot_is_two_straight_sides_and_two_half_circles() -> None:
    part = plate(slots=(Slot(at=(0.0, 0.0), length=30 * MM, width=10 * MM, turn=0.7, depth=2 * MM),))
    # 20 x 10 between the middles of the round ends, and one circle of 10
    around, opening = 2 * 20 + math.pi * 10, 200 + math.pi * 25
    assert faces(part) == pytest.approx(
        {
            "front": 6000 - opening,
            "back": 6000,
            "edge": 320 * 6,
            "slot-1": around * 2,
            "slot-1-floor": opening,
        }
    )
    assert volume(part) == pytest.approx((36000 - opening * 2) * MM3)


def test_the_inner_wall_of_a_plate_ring_is_its_bore() -> None:
    outline = Outline(shape="ring", diameter=50 * MM, inner_diameter=20 * MM)
    part = Plate(form="plate", outline=outline, thickness=30 * MM, **NAMED)
    side = math.pi * (625 - 100)
    assert faces(part) == pytest.approx(
        {"front": side, "back": side, "edge": math.pi * 50 * 30, "bore": math.pi * 20 * 30}
    )
    assert volume(part) == pytest.approx(side * 30 * MM3)


def test_a_section_is_its_outline_times_its_length_and_two_ends() -> None:
    part = section(rectangle(60, 40), 120, hollows=(rectangle(20, 10),))
    end = 60 * 40 - 20 * 10
    assert faces(part) == pytest.approx({"side": 200 * 120, "bore": 60 * 120, "bottom": end, "top": end})
    assert volume(part) == pytest.approx(end * 120 * MM3)


def test_the_hollows_of_a_section_are_numbered() -> None:
    hollows = (points((-25, -5), (-5, -5), (-5, 5), (-25, 5)), points((5, -5), (25, -5), (25, 5), (5, 5)))
    part = section(rectangle(60, 40), 120, hollows=hollows)
    assert shape_of(part).names == ("side", "bore-1", "bore-2", "bottom", "top")
    assert faces(part)["bore-2"] == pytest.approx(60 * 120)


def test_a_tube_is_two_cylinders_and_two_rings() -> None:
    end = math.pi * (25**2 - 20**2)
    assert faces(tube(50, 40, 100)) == pytest.approx(
        {"side": math.pi * 5000, "bore": math.pi * 4000, "bottom": end, "top": end}
    )
    assert volume(tube(50, 40, 100)) == pytest.approx(end * 100 * MM3)


def test_a_turned_part_is_cones_cylinders_and_shoulders() -> None:
    # radius 10 for 30; shoulder out to 20; cone from 20 to 5 over 20 (slant 25); ends at radius 5
    part = turned((0, 10), (30, 10), (30, 20), (50, 5))
    side = math.tau * 10 * 30 + math.pi * (400 - 100) + math.pi * (20 + 5) * 25
    assert faces(part) == pytest.approx({"side": side, "bottom": math.pi * 100, "top": math.pi * 25})
    # cylinder, and frustum pi h / 3 (R^2 + R r + r^2)
    solid = math.pi * 100 * 30 + math.pi * 20 / 3 * (400 + 100 + 25)
    assert volume(part) == pytest.approx(solid * MM3)


def test_bores_of_a_turned_part_have_walls_and_floors_and_open_its_ends() -> None:
    bores = (
        Bore(diameter=8 * MM, depth=15 * MM),
        Bore(diameter=6 * MM, depth=20 * MM, mouth="top", threaded=True),
    )
    part = turned((0, 10), (50, 10), bores=bores)
    assert faces(part) == pytest.approx(
        {
            "side": math.tau * 500,
            "bore-1": math.pi * 8 * 15,
            "bore-1-floor": math.pi * 16,
            "bore-2": math.pi * 6 * 20,
            "bore-2-floor": math.pi * 9,
            "bottom": math.pi * (100 - 16),
            "top": math.pi * (100 - 9),
        }
    )
    assert volume(part) == pytest.approx(math.pi * (5000 - 16 * 15 - 9 * 20) * MM3)


def test_a_point_has_no_end_face_and_a_step_at_an_end_belongs_to_the_end_face() -> None:
    assert shape_of(turned((0, 10), (10, 10), (30, 0))).names == ("side", "bottom")
    stepped = turned((0, 4), (0, 10), (30, 10), (30, 0))
    assert faces(stepped) == pytest.approx(
        {"side": math.tau * 300, "bottom": math.pi * 100, "top": math.pi * 100}
    )


def test_a_stated_part_is_one_face_and_its_box() -> None:
    assert faces(stated()) == pytest.approx({"all": 80000})
    assert volume(stated()) == pytest.approx(0.2 * 0.1 * 0.05)  # the most its metal can be


@pytest.mark.parametrize("name", ONE_OF_EACH)
def test_the_drawn_total_is_the_sum_of_the_faces(name: str) -> None:
    part = ONE_OF_EACH[name]
    assert drawn_total(part) == pytest.approx(sum(row.area for row in areas(part).rows), rel=1e-12)


def test_the_drawn_total_knows_no_rules_masks_or_factors() -> None:
    part = plate(surface_factor=1.3, holes=(hole(0, 0, 1, plugged=True),))
    assert drawn_total(part) == pytest.approx((2 * (6000 - math.pi / 4) + 1920 + math.pi * 6) * MM2)
