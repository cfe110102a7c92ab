"""The scene of a load: hand-worked places, shapely's own areas, the engine's own counts."""

import math
from collections.abc import Callable
from dataclasses import replace

import numpy as np
import pytest
import shapely

from lineplanner.geometry import enclosed_area
from lineplanner.inputs.hanging import parts_hung
from lineplanner.inputs.part import Plate, Turned
from lineplanner.plan import Plan, plan
from lineplanner.report.picture import Scene, scene_of

Demo = Callable[[str], Plan]


def rings_of(edges: np.ndarray) -> list[np.ndarray]:
    """Closed lines out of edges that follow on each other."""
    ends = np.flatnonzero(np.abs(edges[:-1, 2:] - edges[1:, :2]).max(axis=1) > 1e-12) + 1
    return [edge[:, :2] for edge in np.split(edges, ends)]


def area_of(edges: np.ndarray) -> float:
    """Even-odd area of closed edges, by shapely."""
    total = shapely.Polygon()
    for ring in rings_of(edges):
        total = shapely.symmetric_difference(total, shapely.Polygon(ring))
    return float(total.area)


def changed(made: Plan, **load: object) -> Plan:
    return plan(replace(made.case, load=replace(made.case.load, **load)))  # type: ignore[arg-type]


def test_every_part_with_a_place_is_drawn_and_counted_ones_are_named_aside(each_load: Plan) -> None:
    scene = scene_of(each_load)
    hangs = each_load.case.load.hangs
    assert len(scene.parts) == sum(parts_hung(hang) for hang in hangs if hang.count is None)
    assert len(scene.counted) == sum(hang.count is not None for hang in hangs)
    assert [hung.number for hung in scene.parts] == list(range(1, len(scene.parts) + 1))
    assert [hung.owner for hung in scene.parts] == list(range(len(scene.parts)))
    assert [(h.hang, h.position) for h in scene.parts] == sorted((h.hang, h.position) for h in scene.parts)


def test_as_many_are_dry_as_the_areas_say(each_load: Plan) -> None:
    scene = scene_of(each_load)
    counted_dry = sum(item.dry for item in each_load.areas.items)
    assert sum(hung.wetness == "dry" for hung in scene.parts) == counted_dry


def test_edges_belong_to_their_part_and_lie_in_its_box(each_load: Plan) -> None:
    scene = scene_of(each_load)
    assert scene.starts[-1] == len(scene.edges) == len(scene.owners)
    for hung in scene.parts:
        own = scene.edges[scene.slice_of(hung.owner)]
        assert (scene.owners[scene.slice_of(hung.owner)] == hung.owner).all()
        left, low, right, high = hung.box
        assert np.allclose(
            [own[:, ::2].min(), own[:, 1::2].min(), own[:, ::2].max(), own[:, 1::2].max()],
            [left, low, right, high],
            atol=3e-4,  # chords of the drawing stay within 0.2 mm of their arc
        )


def test_the_picture_holds_all_that_is_in_it(each_load: Plan) -> None:
    scene = scene_of(each_load)
    left, low, right, high = scene.extent
    everything = np.concatenate([a.reshape(-1, 2) for a in (scene.edges, scene.tips, scene.contacts)])
    for points in (everything, np.array([[0.0, scene.level]])):
        if len(points):
            assert points[:, 0].min() >= left - 3e-4
            assert points[:, 0].max() <= right + 3e-4
            assert points[:, 1].min() >= low - 3e-4
            assert points[:, 1].max() <= high + 3e-4


def test_the_outline_of_a_flat_plate_encloses_its_face_without_its_holes(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    block = made.case.parts["valve-block"]
    assert isinstance(block, Plate)
    holes = sum(math.pi * hole.diameter**2 / 4 for hole in block.holes if hole.depth is None)
    slots = sum(
        (slot.length - slot.width) * slot.width + math.pi * slot.width**2 / 4
        for slot in block.slots
        if slot.depth is None
    )
    face = enclosed_area(block.outline) - holes - slots
    scene = scene_of(made)
    for owner in (0, 23):
        drawn = area_of(scene.edges[scene.slice_of(owner)])
        assert drawn == pytest.approx(face, rel=0.02)  # chords


def test_a_part_hangs_below_its_tip_by_what_its_drawing_says(demo: Demo) -> None:
    # Rack: row A starts at x 80 mm, drop 320 mm, tips 160 mm apart. Piston: 72 mm long, 58 mm across, hung at
    # its top (axis 72 mm). So the second one spans x 240 -+ 29 mm and y -320 - 72 = -392 mm to -320 mm.
    second = scene_of(demo("pistons-16-masked")).parts[1]
    assert second.tip == "A2"
    assert np.allclose(second.box, (0.211, -0.392, 0.269, -0.320))
    assert np.allclose(second.at, (0.240, -0.320))
    assert second.item == "damper piston"


def test_the_solution_level_lies_below_the_bar_by_its_drop(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    assert scene_of(made).level == -made.case.tank.solution_drop
    assert scene_of(changed(made, solution_drop=0.6)).level == -0.6


def test_a_lower_level_leaves_the_upper_rows_dry_and_cuts_the_next(demo: Demo) -> None:
    # Tips of rows A, B, C lie 320, 460 and 600 mm down; pistons hang 72 mm below them. At 500 mm row A
    # (320 to 392) is dry, row B (460 to 532) is cut, row C and below are wet.
    scene = scene_of(changed(demo("pistons-16-masked"), solution_drop=0.5))
    by_row = {hung.tip[0]: hung.wetness for hung in scene.parts}
    assert by_row == {"A": "dry", "B": "partly wet", "C": "wet", "D": "wet"}


def test_a_part_whose_lowest_point_is_at_the_level_is_dry(demo: Demo) -> None:
    scene = scene_of(changed(demo("pistons-16-masked"), solution_drop=0.392))
    assert {hung.tip[0]: hung.wetness for hung in scene.parts}["A"] == "dry"


def test_both_sides_are_two_parts_in_one_place(demo: Demo) -> None:
    scene = scene_of(demo("vent-panels-24"))
    assert len(scene.parts) == 24
    front, back = scene.parts[:2]
    assert (front.side, back.side) == ("front", "back")
    assert (front.twin, back.twin) == (1, 0)
    assert front.box == back.box
    assert front.labels == ("1 2b", "1+b", "1")
    assert back.labels == ("2b",)
    assert {scene.parts[i].side for i in scene.back_first[:12]} == {"back"}


def test_taken_tips_are_those_of_the_hangs(demo: Demo) -> None:
    scene = scene_of(demo("pistons-16-masked"))
    taken = {name for name, one in zip(scene.tip_names, scene.tip_taken, strict=True) if one}
    assert taken == {f"{row}{n}" for row in "ABCD" for n in range(1, 5)}
    assert len(scene.tips) == 24


def test_a_part_on_two_tips_names_both_and_hangs_between(demo: Demo) -> None:
    scene = scene_of(demo("castings-a356-12"))
    first = scene.parts[0]
    assert first.tip == "A1 A2"
    tips = dict(zip(scene.tip_names, scene.tips, strict=True))
    assert np.allclose(first.at, (tips["A1"] + tips["A2"]) / 2)


def test_a_masked_band_is_a_zone_across_the_part_at_its_height(demo: Demo) -> None:
    # Piston: band 20 to 28 mm along the axis, 29 mm radius there, hung at 72 mm: 0.058 x 0.008 m^2, its lower
    # edge 72 - 20 = 52 mm below the tip.
    scene = scene_of(demo("pistons-16-masked"))
    own = scene.zones[scene.zone_owner[scene.zone_ids] == 0]
    assert area_of(own) == pytest.approx(0.058 * 0.008)
    assert own[:, 1].min() == pytest.approx(-0.320 - 0.052)
    assert own[:, 1].max() == pytest.approx(-0.320 - 0.044)
    assert scene.zone_seen.all()
    assert all(hung.masked for hung in scene.parts)


def test_a_masked_band_turns_with_its_part(demo: Demo) -> None:
    made = demo("pistons-16-masked")
    hang = replace(made.case.load.hangs[0], turn=math.pi / 2)
    scene = scene_of(changed(made, hangs=(hang,)))
    own = scene.zones[scene.zone_owner[scene.zone_ids] == 0]
    # A quarter turn counter-clockwise: what hung 44 to 52 mm below the tip now lies that far to its right.
    assert own[:, ::2].min() == pytest.approx(0.080 + 0.044)
    assert own[:, ::2].max() == pytest.approx(0.080 + 0.052)


def test_a_masked_back_is_a_zone_that_is_not_seen_and_a_plug_is_seen(demo: Demo) -> None:
    scene = scene_of(demo("seal-plates-4"))
    of_first = scene.zone_seen[scene.zone_owner == 0]
    assert of_first.any()
    assert not of_first.all()
    plate = scene.edges[scene.slice_of(0)]
    hidden = np.flatnonzero((scene.zone_owner == 0) & ~scene.zone_seen)[0]
    assert area_of(scene.zones[scene.zone_ids == hidden]) == pytest.approx(area_of(plate), rel=0.01)


def test_a_round_part_shows_its_profile(demo: Demo) -> None:
    made = demo("pistons-16-masked")
    piston = made.case.parts["piston"]
    assert isinstance(piston, Turned)
    # Box of 58 x 72 mm less four corners of 1 x 1 mm cut at 45 degrees: 4176 - 4 x 0.5 = 4174 mm^2.
    assert area_of(scene_of(made).edges[:8]) == pytest.approx(4174e-6)


def test_a_member_is_as_wide_as_the_rack_says(demo: Demo) -> None:
    scene = scene_of(demo("valve-blocks-24"))
    spline = scene.members[scene.member_ids == scene.member_names.index("spline 1")]
    assert area_of(spline) == pytest.approx(0.030 * 0.940)
    assert spline[:, ::2].min() == pytest.approx(0.065)


def test_thieves_have_no_place_and_are_named(demo: Demo) -> None:
    assert scene_of(demo("rod-40x900")).aside == ("thief: two wire rings at the lower ends",)


def test_a_moved_part_takes_its_outline_its_stop_off_and_its_contact_along(demo: Demo) -> None:
    scene = scene_of(demo("pistons-16-masked"))
    moved = scene.moved(2, 0.05, -0.01)
    by = np.array([0.05, -0.01, 0.05, -0.01])
    own = scene.slice_of(2)
    assert np.allclose(moved.edges[own], scene.edges[own] + by)
    mine = scene.zone_owner[scene.zone_ids] == 2
    assert np.allclose(moved.zones[mine], scene.zones[mine] + by)
    assert np.allclose(moved.contacts[2], scene.contacts[2] + by[:2])
    assert np.allclose(moved.parts[2].box, np.array(scene.parts[2].box) + by)
    others = np.ones(len(scene.edges), dtype=bool)
    others[own] = False
    assert (moved.edges[others] == scene.edges[others]).all()
    assert (moved.zones[~mine] == scene.zones[~mine]).all()


def test_moving_there_and_back_gives_the_same_picture(demo: Demo) -> None:
    scene = scene_of(demo("valve-blocks-24"))
    back = scene.moved(5, 0.25, 0.5).moved(5, -0.25, -0.5)
    assert np.allclose(back.edges, scene.edges, atol=1e-12)


def test_neighbours_on_a_grid_are_those_next_door(demo: Demo) -> None:
    scene = scene_of(demo("valve-blocks-24"))  # six rows of four
    assert scene.neighbour(5, "left") == 4
    assert scene.neighbour(5, "right") == 6
    assert scene.neighbour(5, "up") == 1
    assert scene.neighbour(5, "down") == 9
    assert scene.neighbour(0, "left") is None
    assert scene.neighbour(0, "up") is None
    assert scene.neighbour(23, "down") is None
    assert scene.neighbour(None, "down") == 0


def test_a_neighbour_of_a_front_part_hangs_on_the_front(demo: Demo) -> None:
    scene = scene_of(demo("vent-panels-24"))
    for start, side in ((0, "front"), (1, "back")):
        found = scene.neighbour(start, "right")
        assert found is not None
        assert scene.parts[found].side == side


def reached(scene: Scene) -> set[int]:
    seen, open_ = {0}, [0]
    while open_:
        here = open_.pop()
        for direction in ("left", "right", "up", "down"):
            found = scene.neighbour(here, direction)  # type: ignore[arg-type]
            if found is not None and found not in seen:
                seen.add(found)
                open_.append(found)
    return seen


def test_arrows_reach_every_place(each_load: Plan) -> None:
    scene = scene_of(each_load)
    if scene.parts:
        places = {scene.parts[i].centre for i in reached(scene)}
        assert places == {hung.centre for hung in scene.parts}


def test_a_load_without_any_place_has_an_empty_picture(demo: Demo) -> None:
    scene = scene_of(demo("relay-lids-20"))
    assert scene.parts == ()
    assert scene.edges.shape == (0, 4)
    assert scene.aside == ("only counted: 20 x relay lid, die casting",)
    assert scene.neighbour(None, "left") is None
    assert len(scene.members) > 0
