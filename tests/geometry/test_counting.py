"""What of a face counts, and why: hole rules, promise, masks, contact marks, surface factors, significant faces.

The hole and promise ratios are arguments here; the tests check the rule's geometry, worked by hand, not the
ratios themselves. Sizes in mm, areas in mm2.
"""

import dataclasses
import math
from typing import Any

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from lineplanner.geometry import FaceRow, Ledger, Pose, problems
from lineplanner.inputs.part import Bore, ContactMark, Hole, Mask, Outline, Part, Plate, Slot, Texture
from tests.geometry.parts import (
    MM,
    MM2,
    NAMED,
    ONE_OF_EACH,
    PARTS,
    POSES,
    SHARES,
    areas,
    between,
    hole,
    plate,
    rectangle,
    row,
    section,
    stated,
    tube,
    turned,
)


def three(face: FaceRow) -> tuple[float, float, float]:
    """Wet, carrying and significant area in mm2."""
    return face.wet_area / MM2, face.carrying_area / MM2, face.significant_area / MM2


def why(book: Ledger, face: str) -> dict[str, dict[str, Any]]:
    """Reasons with their facts as plain numbers."""
    return {
        reason.key: {name: getattr(fact, "value", fact) for name, fact in reason.facts.items()}
        for reason in row(book, face).why
    }


# --- holes, slots, bores, hollows ------------------------------------------------------------------------


def test_a_through_hole_counts_to_k_diameters_from_both_ends() -> None:
    # diameter 5 through 60; current to 2 D = 10 from each end, thickness promised to 1 D = 5 from each end
    book = areas(plate(thickness=60, holes=(hole(0, 0, 5),)))
    assert three(row(book, "hole-1")) == pytest.approx((math.pi * 5 * 60, math.pi * 5 * 20, math.pi * 5 * 10))
    facts = {"depth": 0.06, "diameter": 0.005, "reach": 0.01, "ends": 2}
    assert why(book, "hole-1")["hole-deeper-than-counted"] == pytest.approx(facts)
    assert why(book, "hole-1")["deeper-than-promised"]["reach"] == pytest.approx(0.005)


def test_a_through_hole_never_counts_for_more_than_its_wall() -> None:
    # 6 deep with 2 x 10 counted from each end: the wall once, not twice
    book = areas(plate(holes=(hole(0, 0, 5),)))
    assert three(row(book, "hole-1")) == pytest.approx((math.pi * 30,) * 3)
    assert row(book, "hole-1").why == ()


def test_a_blind_hole_counts_from_its_mouth_and_its_floor_only_if_reached() -> None:
    book = areas(plate(thickness=60, holes=(hole(-20, 0, 5, 9), hole(20, 0, 5, 11))))
    floor = math.pi * 6.25
    assert three(row(book, "hole-1")) == pytest.approx((math.pi * 45, math.pi * 45, math.pi * 25))
    assert three(row(book, "hole-1-floor")) == pytest.approx((floor, floor, 0))
    assert three(row(book, "hole-2")) == pytest.approx((math.pi * 55, math.pi * 50, math.pi * 25))
    assert three(row(book, "hole-2-floor")) == pytest.approx((floor, 0, 0))
    assert set(why(book, "hole-1-floor")) == {"deeper-than-promised"}
    assert set(why(book, "hole-2-floor")) == {"floor-not-reached"}


def test_the_counted_wall_of_a_blind_hole_is_at_its_mouth() -> None:
    # edge-on, front to the right; turned a quarter the front looks up. Hole 30 deep from w = +30 down to 0,
    # of which the top 10 count. Level at height 25: the wet part of the counted stretch is 20 to 25.
    part = plate(thickness=60, holes=(hole(0, 0, 5, 30),))
    book = areas(part, Pose(turn=math.pi / 2, edge_on=True), 25 * MM)
    assert three(row(book, "hole-1"))[:2] == pytest.approx((math.pi * 5 * 25, math.pi * 5 * 5))


@pytest.mark.parametrize(("rule", "share"), [("all", 1.0), ("none", 0.0)])
def test_a_rule_of_the_hole_overrides_the_process(rule: Any, share: float) -> None:
    holes = (hole(0, 0, 5, 40, rule=rule),)
    book = areas(plate(thickness=60, holes=holes))
    wall, floor = math.pi * 200, math.pi * 6.25
    assert three(row(book, "hole-1"))[:2] == pytest.approx((wall, wall * share))
    assert three(row(book, "hole-1-floor"))[:2] == pytest.approx((floor, floor * share))
    assert f"hole-rule-{rule}" in why(book, "hole-1")
    # what is promised stays the process's own rule, and is never more than what carries
    assert row(book, "hole-1").significant_area == pytest.approx(math.pi * 25 * MM2 * share)


def test_a_plugged_hole_is_drawn_but_not_wet() -> None:
    book = areas(plate(holes=(hole(0, 0, 5, 4, plugged=True),)))
    assert three(row(book, "hole-1")) == three(row(book, "hole-1-floor")) == (0, 0, 0)
    assert row(book, "hole-1").area == pytest.approx(math.pi * 20 * MM2)
    assert why(book, "hole-1") == {"plugged": {"area": pytest.approx(math.pi * 20 * MM2)}}


def test_a_tapped_hole_has_more_wall_but_no_more_floor() -> None:
    book = areas(plate(holes=(hole(0, 0, 5, 4, threaded=True),)), thread_factor=1.5)
    assert row(book, "hole-1").wet_area == pytest.approx(1.5 * math.pi * 20 * MM2)
    assert row(book, "hole-1").factor == 1.5
    assert row(book, "hole-1-floor").factor == 1.0
    assert why(book, "hole-1")["thread-factor"] == {"factor": 1.5}


def test_a_slot_counts_by_its_width() -> None:
    slot = Slot(at=(0.0, 0.0), length=30 * MM, width=5 * MM)
    book = areas(plate(thickness=60, slots=(slot,)))
    around = 2 * 25 + math.pi * 5
    assert three(row(book, "slot-1")) == pytest.approx((around * 60, around * 20, around * 10))


def test_a_tube_counts_from_both_ends_by_its_bore() -> None:
    book = areas(tube(12, 10, 100))
    assert three(row(book, "bore")) == pytest.approx((math.pi * 1000, math.pi * 400, math.pi * 200))
    plugged = areas(tube(12, 10, 100, plugged=True))
    assert three(row(plugged, "bore")) == (0, 0, 0)


def test_a_hollow_counts_by_four_areas_over_its_edge() -> None:
    # 20 x 10: 4 * 200 / 60 = 13.33; counted 26.67, promised 13.33 from each end of 120
    book = areas(section(rectangle(60, 40), 120, hollows=(rectangle(20, 10),)))
    assert three(row(book, "bore")) == pytest.approx((60 * 120, 60 * 160 / 3, 60 * 80 / 3))


def test_the_bore_of_a_ring_shaped_plate_counts_like_a_hole() -> None:
    outline = Outline(shape="ring", diameter=0.02, inner_diameter=0.005)
    book = areas(Plate(form="plate", outline=outline, thickness=0.06, **NAMED))
    assert three(row(book, "bore"))[:2] == pytest.approx((math.pi * 300, math.pi * 100))


def test_a_bore_counts_from_its_open_end() -> None:
    low, high = Bore(diameter=5 * MM, depth=30 * MM), Bore(diameter=5 * MM, depth=30 * MM, mouth="top")
    part = turned((0, 10), (100, 10), bores=(low, high))
    # upright, level at 20: of bore-1 (0 to 30) the counted 0 to 10 are wet; of bore-2 (70 to 100) nothing
    book = areas(part, Pose(), 20 * MM)
    assert three(row(book, "bore-1"))[:2] == pytest.approx((math.pi * 5 * 20, math.pi * 5 * 10))
    assert three(row(book, "bore-2")) == (0, 0, 0)
    # level at 95: the counted stretch of bore-2 is 90 to 100
    book = areas(part, Pose(), 95 * MM)
    assert three(row(book, "bore-2"))[:2] == pytest.approx((math.pi * 5 * 25, math.pi * 5 * 5))


# --- masks -----------------------------------------------------------------------------------------------


def test_a_masked_face_is_neither_wet_nor_carrying() -> None:
    book = areas(plate(masks=(Mask(face="back"),)))
    assert three(row(book, "back")) == (0, 0, 0)
    assert why(book, "back") == {"masked": {"area": pytest.approx(6000 * MM2)}}
    assert book.wet == pytest.approx((6000 + 1920) * MM2)


def test_a_zone_covers_what_it_shares_with_the_face() -> None:
    # a 40 x 40 square around (50, 0) covers 20 x 40 of a 100 x 60 face, less half of a hole of 10 in it
    mask = Mask(face="front", outline=rectangle(40, 40), at=(50 * MM, 0.0))
    part = plate(holes=(hole(30, 0, 10),), masks=(mask,))
    book = areas(part)
    covered = 20 * 40 - math.pi * 25 / 2
    assert three(row(book, "front"))[0] == pytest.approx(6000 - math.pi * 25 - covered, rel=1e-6)
    assert why(book, "front")["masked"]["area"] == pytest.approx(covered * MM2, rel=1e-5)
    assert "chords" in why(book, "front")
    assert why(book, "back") == {}


def test_a_zone_is_cut_by_the_level_with_its_face() -> None:
    mask = Mask(face="front", outline=rectangle(40, 40))
    book = areas(plate(masks=(mask,)), Pose(), 10 * MM)
    # 100 wide, 40 up to the level; the zone from -20 to 20 has 30 below it
    assert three(row(book, "front"))[0] == pytest.approx(100 * 40 - 40 * 30)


def test_zones_that_overlap_cover_once() -> None:
    masks = (
        Mask(face="front", outline=rectangle(40, 40)),
        Mask(face="front", outline=Outline(shape="ring", diameter=0.03, inner_diameter=0.01)),
    )
    assert three(row(areas(plate(masks=masks)), "front"))[0] == pytest.approx(6000 - 1600)


def test_a_ring_zone_leaves_its_middle_free() -> None:
    mask = Mask(face="front", outline=Outline(shape="ring", diameter=0.03, inner_diameter=0.01))
    free = 6000 - math.pi * (225 - 25)
    assert three(row(areas(plate(masks=(mask,))), "front"))[0] == pytest.approx(free, rel=1e-5)


def test_a_band_covers_a_stretch_of_the_axis_and_no_shoulder_at_its_ends() -> None:
    part = turned((0, 10), (30, 10), (30, 20), (60, 20), masks=(Mask(face="side", start=0.03, end=0.05),))
    shoulder = math.pi * 300
    book = areas(part)
    assert three(row(book, "side"))[0] == pytest.approx(math.tau * 300 + shoulder + math.tau * 20 * 10)
    over = turned((0, 10), (30, 10), (30, 20), (60, 20), masks=(Mask(face="side", start=0.02, end=0.05),))
    assert three(row(areas(over), "side"))[0] == pytest.approx(math.tau * 200 + math.tau * 20 * 10)


def test_a_band_without_an_end_goes_to_the_end() -> None:
    book = areas(tube(50, 40, 100, masks=(Mask(face="side", start=0.0),)))
    assert three(row(book, "side"))[0] == pytest.approx(math.pi * 2500)
    book = areas(section(rectangle(60, 40), 120, masks=(Mask(face="side", end=0.03),)))
    assert three(row(book, "side"))[0] == pytest.approx(200 * 30)


# --- contact marks, factors, significant faces -----------------------------------------------------------


def test_contact_marks_come_off_their_face() -> None:
    part = plate(contacts=(ContactMark(face="edge", count=4, area=5 * MM2),))
    book = areas(part)
    assert three(row(book, "edge")) == pytest.approx((1900,) * 3)
    assert why(book, "edge")["contact-mark"] == pytest.approx({"count": 4, "area": 20 * MM2})


def test_contact_marks_come_off_in_proportion_to_what_is_wet() -> None:
    part = plate(contacts=(ContactMark(face="front", area=60 * MM2),))
    # 40 of 60 up: 4000 wet, two thirds of the mark
    assert three(row(areas(part, Pose(), 10 * MM), "front"))[0] == pytest.approx(4000 - 40)


def test_a_contact_on_a_masked_face_changes_nothing() -> None:
    part = plate(masks=(Mask(face="front"),), contacts=(ContactMark(face="front", area=60 * MM2),))
    assert three(row(areas(part), "front")) == (0, 0, 0)


def test_surface_factors_multiply() -> None:
    knurl = Texture(face="side", factor=1.4, start=0.0, end=0.025, why="knurl")
    book = areas(tube(50, 40, 100, surface_factor=1.1, textures=(knurl, Texture(face="top", factor=2.0))))
    around = math.pi * 50
    assert three(row(book, "side"))[0] == pytest.approx(around * 1.1 * (75 + 1.4 * 25))
    assert row(book, "side").factor == pytest.approx(1.1 * (0.75 + 1.4 * 0.25))
    assert row(book, "side").area == pytest.approx(around * 100 * MM2)
    assert row(book, "top").factor == pytest.approx(2.2)
    assert row(book, "bore").factor == pytest.approx(1.1)
    assert why(book, "side")["surface-factor"] == {"factor": 1.4, "because": "knurl"}
    assert why(book, "bore")["part-surface-factor"] == {"factor": 1.1}


def test_only_the_named_faces_are_significant() -> None:
    book = areas(plate(significant=("front", "edge")))
    assert book.significant == pytest.approx((6000 + 1920) * MM2)
    assert book.carrying == pytest.approx((12000 + 1920) * MM2)
    assert why(book, "back") == {"not-significant": {}}


def test_the_significant_area_of_a_stated_part_is_the_stated_one() -> None:
    book = areas(stated(significant_area=0.05))
    assert (book.wet, book.carrying, book.significant) == pytest.approx((0.08, 0.08, 0.05))
    half = areas(stated(significant_area=0.05), Pose(), 0.0)
    assert (half.carrying, half.significant) == pytest.approx((0.04, 0.025))
    # never more than what carries
    assert areas(stated(significant_area=0.09)).significant == pytest.approx(0.08)


def test_chords_are_named_where_a_level_cuts_an_arc_and_only_there() -> None:
    part = ONE_OF_EACH["bracket"]
    assert "chords" not in why(areas(part), "front")
    cut = areas(part, Pose(), between(part, Pose(), 0.5))
    assert why(cut, "front")["chords"] == {"within": 1e-5}
    assert "chords" not in why(areas(plate(), Pose(), 0.0), "front")
    # full circles are cut as circles
    assert "chords" not in why(areas(tube(), Pose(turn=0.2), 0.0), "side")


def test_the_dry_area_is_named() -> None:
    book = areas(plate(), Pose(), 10 * MM)
    assert why(book, "front")["dry-above-level"]["area"] == pytest.approx(2000 * MM2)


# --- properties ------------------------------------------------------------------------------------------

COVERED = {
    "plate": ("front", "back", "edge", "hole-1", "bore"),
    "section": ("side", "top", "bore"),
    "turned": ("side", "bottom", "bore"),
    "tube": ("side", "bore", "top"),
    "stated": ("all",),
}


@given(part=PARTS, pose=POSES, share=SHARES, which=st.integers(0, 9))
@settings(deadline=None)
def test_a_mask_or_a_contact_raises_nothing(part: Part, pose: Pose, share: float, which: int) -> None:
    names = [r.face for r in areas(part).rows if r.face in COVERED[part.form]]
    face = names[which % len(names)]
    level = between(part, pose, share)
    bare = areas(part, pose, level)
    for added in ({"masks": (Mask(face=face),)}, {"contacts": (ContactMark(face=face, area=1e-6),)}):
        less = areas(dataclasses.replace(part, **added), pose, level)
        for before, after in zip(bare.rows, less.rows, strict=True):
            for less_area, area in zip(three(after), three(before), strict=True):
                assert less_area <= area


@given(
    pose=POSES,
    share=SHARES,
    width=st.floats(1, 150),
    height=st.floats(1, 150),
    u=st.floats(-45, 45),
    v=st.floats(-25, 25),
)
@settings(deadline=None, max_examples=60)
def test_a_zone_raises_nothing_and_covers_at_most_itself(
    pose: Pose, share: float, width: float, height: float, u: float, v: float
) -> None:
    bare = plate(holes=(hole(10, 5, 12), hole(-20, -10, 8, 3)))
    mask = Mask(face="front", outline=rectangle(width, height), at=(u * MM, v * MM))
    part = plate(holes=bare.holes, masks=(mask,))
    assume(not problems(part))  # a zone wholly inside a hole covers nothing and is refused
    level = between(part, pose, share)
    before, after = row(areas(bare, pose, level), "front"), row(areas(part, pose, level), "front")
    assert after.wet_area <= before.wet_area * (1 + 1e-9)
    assert after.wet_area >= before.wet_area - width * height * MM2 * (1 + 1e-9)


@given(
    diameter=st.floats(1, 20),
    depth=st.floats(0.5, 59),
    hole_ratio=st.floats(0, 10),
    promise_ratio=st.floats(0, 10),
)
@settings(deadline=None, max_examples=60)
def test_a_blind_hole_counts_by_the_smaller_of_reach_and_depth(
    diameter: float, depth: float, hole_ratio: float, promise_ratio: float
) -> None:
    part = plate(thickness=60, holes=(Hole(at=(0.0, 0.0), diameter=diameter * MM, depth=depth * MM),))
    book = areas(part, hole_ratio=hole_ratio, promise_ratio=promise_ratio)
    counted, promised = min(depth, hole_ratio * diameter), min(depth, promise_ratio * diameter)
    wall = math.pi * diameter
    assert three(row(book, "hole-1")) == pytest.approx(
        (wall * depth, wall * counted, wall * min(counted, promised)), abs=1e-9
    )
