"""Every outline and form that is refused: message key, place and facts. Facts in SI."""

import math
from typing import Any

import pytest

from lineplanner.errors import ProblemsError
from lineplanner.geometry import problems, shape_of
from lineplanner.inputs.part import (
    Bore,
    ContactMark,
    Mask,
    Outline,
    Plate,
    ProfilePoint,
    Slot,
    Turned,
)
from tests.geometry.parts import (
    NAMED,
    ONE_OF_EACH,
    Case,
    expect_refused,
    hole,
    plate,
    points,
    rectangle,
    section,
    tube,
    turned,
)


def drawn(outline: Outline, **more: Any) -> Plate:
    return Plate(form="plate", outline=outline, thickness=0.01, **{**NAMED, **more})


def slot(u: float, v: float, length: float, width: float, depth: float | None = None) -> Slot:
    sizes = {"length": length / 1e3, "width": width / 1e3}
    return Slot(at=(u / 1e3, v / 1e3), depth=None if depth is None else depth / 1e3, **sizes)


def bore(diameter: float, depth: float | None = None, mouth: Any = "bottom") -> Bore:
    return Bore(diameter=diameter / 1e3, depth=None if depth is None else depth / 1e3, mouth=mouth)


SHAFT = ((0, 10), (30, 10), (30, 5), (60, 5))

OUTLINES: dict[str, Case] = {
    # the sides (0,0)-(20,20) and (20,0)-(0,20) meet in the middle
    "crossing": (
        drawn(points((0, 0), (20, 20), (20, 0), (0, 20))),
        ("outline", "points"),
        "outline-crosses-itself",
        {"u": 0.01, "v": 0.01},
    ),
    # a half circle of radius 10 on the side u = 0 to 20 at v = 8 reaches v = -2, through the side at v = 0
    "crossing by a bulge": (
        drawn(points((-20, 0), (40, 0), (40, 8), (20, 8, -10), (0, 8), (-20, 8))),
        ("outline", "points"),
        "outline-crosses-itself",
        {"v": 0.0},
    ),
    "touching": (
        drawn(points((0, 0), (20, 0), (20, 20), (10, 0), (0, 20))),
        ("outline", "points"),
        "outline-crosses-itself",
        {"u": 0.01, "v": 0.0},
    ),
    "going back on itself": (
        drawn(points((0, 0), (20, 0), (10, 0), (10, 20))),
        ("outline", "points"),
        "outline-crosses-itself",
        {"v": 0.0},
    ),
    "two corners": (
        drawn(points((0, 0, 10), (20, 0))),
        ("outline", "points"),
        "corners-too-few",
        {"count": 2, "least": 3},
    ),
    "repeated corner": (
        drawn(points((0, 0), (20, 0), (20, 0), (0, 20))),
        ("outline", "points", 2),
        "corner-repeated",
        {"corner": 3, "u": 0.02, "v": 0.0},
    ),
    "closed by hand": (
        drawn(points((0, 0), (20, 0), (0, 20), (0, 0))),
        ("outline", "points", 0),
        "corner-repeated",
        {"corner": 1, "u": 0.0, "v": 0.0},
    ),
    "bulge over the half circle": (
        drawn(points((0, 0, -10.1), (20, 0), (20, 50), (0, 50))),
        ("outline", "points", 0, "bulge"),
        "bulge-too-large",
        {"bulge": -0.0101, "limit": 0.01},
    ),
    "missing dimension": (
        drawn(Outline(shape="rounded-rectangle", width=0.1, height=0.1)),
        ("outline", "radius"),
        "dimension-missing",
        {"shape": "rounded-rectangle", "dimension": "radius"},
    ),
    "no corners": (
        drawn(Outline(shape="points")),
        ("outline", "points"),
        "dimension-missing",
        {"shape": "points", "dimension": "points"},
    ),
    "foreign dimension": (
        drawn(Outline(shape="circle", diameter=0.1, width=0.1)),
        ("outline", "width"),
        "dimension-not-used",
        {"shape": "circle", "dimension": "width"},
    ),
    "corner radius": (
        drawn(Outline(shape="rounded-rectangle", width=0.1, height=0.04, radius=0.021)),
        ("outline", "radius"),
        "corner-radius-too-large",
        {"radius": 0.021, "limit": 0.02},
    ),
    "ring": (
        drawn(Outline(shape="ring", diameter=0.05, inner_diameter=0.05)),
        ("outline", "inner_diameter"),
        "ring-inner-not-smaller",
        {"inner": 0.05, "outer": 0.05},
    ),
    "polygon of two sides": (
        drawn(Outline(shape="polygon", diameter=0.05, sides=2)),
        ("outline", "sides"),
        "too-low",
        {"field": "number of sides", "value": 2, "limit": 3},
    ),
    "mask outline": (
        plate(masks=(Mask(face="front", outline=Outline(shape="circle")),)),
        ("masks", 0, "outline", "diameter"),
        "dimension-missing",
        {"dimension": "diameter"},
    ),
    "hollow outline": (
        section(rectangle(50, 50), hollows=(rectangle(20, 20), Outline(shape="rectangle", width=0.01))),
        ("hollows", 1, "height"),
        "dimension-missing",
        {"dimension": "height"},
    ),
}

FORMS: dict[str, Case] = {
    "no thickness": (
        plate(thickness=0),
        ("thickness",),
        "not-above",
        {"field": "thickness", "value": 0.0, "limit": 0.0},
    ),
    "negative thickness": (
        plate(thickness=-1),
        ("thickness",),
        "not-above",
        {"field": "thickness", "value": -0.001, "limit": 0.0},
    ),
    "endless length": (section(rectangle(5, 5), math.inf), ("length",), "not-finite", {"field": "length"}),
    "hole at no place": (
        plate(holes=(hole(math.nan, 0, 5),)),
        ("holes", 0, "at", 0),
        "not-finite",
        {"field": "centre"},
    ),
    "hole outside": (
        plate(holes=(hole(0, 0, 5), hole(60, 0, 5))),
        ("holes", 1),
        "opening-outside-outline",
        {"opening": "hole-2", "u": 0.06, "v": 0.0},
    ),
    "hole in the hole of a ring": (
        drawn(Outline(shape="ring", diameter=0.05, inner_diameter=0.03), holes=(hole(0, 0, 5),)),
        ("holes", 0),
        "opening-outside-outline",
        {"opening": "hole-1", "u": 0.0, "v": 0.0},
    ),
    "hole over the edge": (
        plate(holes=(hole(48, 0, 5),)),
        ("holes", 0),
        "opening-breaks-edge",
        {"opening": "hole-1", "distance": 0.002, "needed": 0.0025},
    ),
    "hole touching the edge": (
        plate(holes=(hole(47.5, 0, 5),)),
        ("holes", 0),
        "opening-breaks-edge",
        {"opening": "hole-1", "distance": 0.0025, "needed": 0.0025},
    ),
    "holes overlapping": (
        plate(holes=(hole(0, 0, 10), hole(30, 0, 4), hole(6, 0, 4))),
        ("holes", 2),
        "openings-overlap",
        {"opening": "hole-3", "other": "hole-1", "distance": 0.006, "needed": 0.007},
    ),
    "slot over a hole": (
        plate(holes=(hole(0, 7, 10),), slots=(slot(0, 0, 40, 6),)),
        ("slots", 0),
        "openings-overlap",
        {"opening": "slot-1", "other": "hole-1", "distance": 0.007, "needed": 0.008},
    ),
    "slot over the edge": (
        plate(slots=(slot(40, 0, 40, 6),)),
        ("slots", 0),
        "opening-breaks-edge",
        {"opening": "slot-1", "distance": 0.0, "needed": 0.003},
    ),
    "slot wider than long": (
        plate(slots=(slot(0, 0, 5, 6),)),
        ("slots", 0, "length"),
        "slot-shorter-than-wide",
        {"slot": "slot-1", "length": 0.005, "width": 0.006},
    ),
    "blind hole through": (
        plate(holes=(hole(0, 0, 5, 6),)),
        ("holes", 0, "depth"),
        "blind-too-deep",
        {"opening": "hole-1", "depth": 0.006, "limit": 0.006},
    ),
    "blind slot through": (
        plate(slots=(slot(0, 0, 9, 5, 7),)),
        ("slots", 0, "depth"),
        "blind-too-deep",
        {"opening": "slot-1", "depth": 0.007, "limit": 0.006},
    ),
    "hollow outside": (
        section(rectangle(40, 40), hollows=(points((50, 0), (60, 0), (60, 10), (50, 10)),)),
        ("hollows", 0),
        "opening-outside-outline",
        {"opening": "hollow-1", "u": 0.055, "v": 0.005},
    ),
    "hollow as wide as the section": (
        section(rectangle(40, 40), hollows=(rectangle(40, 20),)),
        ("hollows", 0),
        "opening-breaks-edge",
        {"opening": "hollow-1", "distance": 0.0, "needed": 0.0},
    ),
    "hollow in a hollow": (
        section(rectangle(40, 40), hollows=(rectangle(30, 30), rectangle(10, 10))),
        ("hollows", 1),
        "openings-overlap",
        {"opening": "hollow-2", "other": "hollow-1", "distance": 0.0, "needed": 0.0},
    ),
    "hollow with a core": (
        section(rectangle(40, 40), hollows=(Outline(shape="ring", diameter=0.03, inner_diameter=0.01),)),
        ("hollows", 0),
        "hollow-not-simple",
        {"hollow": "hollow-1"},
    ),
    "tube": (
        tube(50, 50),
        ("inner_diameter",),
        "tube-inner-not-smaller",
        {"inner": 0.05, "outer": 0.05},
    ),
    "one profile point": (turned((0, 5)), ("profile",), "profile-too-short", {"count": 1}),
    "a disc without height": (turned((0, 5), (0, 8)), ("profile",), "profile-too-short", {"count": 2}),
    "profile going back": (
        turned((0, 5), (20, 5), (15, 8), (30, 8)),
        ("profile", 2, "axis"),
        "profile-goes-back",
        {"axis": 0.015, "before": 0.02},
    ),
    "profile point twice": (
        turned((0, 5), (20, 5), (20, 5), (30, 8)),
        ("profile", 2),
        "profile-point-repeated",
        {"axis": 0.02, "radius": 0.005},
    ),
    "three radii at one place": (
        turned((0, 5), (20, 5), (20, 8), (20, 6), (30, 6)),
        ("profile", 3),
        "profile-shoulder-twice",
        {"axis": 0.02},
    ),
    "flange without thickness": (
        turned((0, 8), (0, 5), (30, 5)),
        ("profile", 1),
        "profile-flange-without-thickness",
        {"axis": 0.0},
    ),
    "flange without thickness at the top": (
        turned((0, 5), (30, 5), (30, 8)),
        ("profile", 2),
        "profile-flange-without-thickness",
        {"axis": 0.03},
    ),
    "pinched to nothing": (
        turned((0, 5), (10, 0), (20, 5)),
        ("profile", 1, "radius"),
        "profile-without-body",
        {"axis": 0.01},
    ),
    "negative radius": (
        Turned(
            form="turned",
            profile=(ProfilePoint(axis=0.0, radius=-0.001), ProfilePoint(axis=0.01, radius=0.01)),
            **NAMED,
        ),
        ("profile", 0, "radius"),
        "too-low",
        {"field": "radius", "value": -0.001, "limit": 0.0},
    ),
    "bore through the thin end": (
        turned(*SHAFT, bores=(bore(12),)),
        ("bores", 0, "diameter"),
        "bore-too-large",
        {"diameter": 0.012, "axis": 0.03, "part_diameter": 0.01},
    ),
    "bore to the shoulder": (
        turned(*SHAFT, bores=(bore(12, 30),)),
        ("bores", 0, "diameter"),
        "bore-too-large",
        {"diameter": 0.012, "axis": 0.03, "part_diameter": 0.01},
    ),
    # a cone from radius 10 to 0 over 50: at depth 30 its radius is 4
    "bore out of a cone": (
        turned((0, 10), (50, 0), bores=(bore(9, 30),)),
        ("bores", 0, "diameter"),
        "bore-too-large",
        {"diameter": 0.009, "axis": 0.03, "part_diameter": 0.008},
    ),
    "blind bore through": (
        turned(*SHAFT, bores=(bore(4, 60),)),
        ("bores", 0, "depth"),
        "blind-too-deep",
        {"opening": "bore-1", "depth": 0.06, "limit": 0.06},
    ),
    "bores meeting": (
        turned(*SHAFT, bores=(bore(4, 30), bore(4, 30, "top"))),
        ("bores",),
        "bores-meet",
        {"depth": 0.06, "limit": 0.06},
    ),
    "two bores from one end": (
        turned(*SHAFT, bores=(bore(4, 30), bore(2, 40))),
        ("bores", 1),
        "bores-share-mouth",
        {"mouth": "bottom"},
    ),
    "a bore beside a through bore": (
        turned(*SHAFT, bores=(bore(4), bore(6, 10, "top"))),
        ("bores", 1),
        "bores-share-mouth",
        {"mouth": "top"},
    ),
}

REFUSED = OUTLINES | FORMS


@pytest.mark.parametrize("name", REFUSED)
def test_a_part_that_cannot_be_is_refused_with_place_and_facts(name: str) -> None:
    expect_refused(*REFUSED[name])


@pytest.mark.parametrize("name", ONE_OF_EACH)
def test_a_sound_part_has_no_problems(name: str) -> None:
    assert problems(ONE_OF_EACH[name]) == []


def test_the_point_where_an_outline_crosses_itself_is_on_both_sides() -> None:
    # a half circle about (10, 8) with radius 10 meets v = 0 at u = 10 +- 6
    part, *_ = OUTLINES["crossing by a bulge"]
    facts = problems(part)[0].facts
    assert abs(facts["u"].value - 0.01) == pytest.approx(0.006, abs=1e-5)  # type: ignore[union-attr]


def test_all_problems_of_a_kind_come_at_once() -> None:
    part = plate(
        holes=(hole(60, 0, 5), hole(0, 0, 5, 9), hole(1, 0, 5)), contacts=(ContactMark(face="nowhere"),)
    )
    assert {problem.key for problem in problems(part)} == {
        "opening-outside-outline",
        "blind-too-deep",
        "openings-overlap",
    }


def test_a_half_circle_typed_in_inches_is_no_larger_than_its_chord() -> None:
    # 1.1 in and half of it, converted one by one, differ in the last digit
    side, half = 1.1 * 0.0254 * 1e3, 0.55 * 0.0254 * 1e3 * (1 + 2e-16)
    assert problems(drawn(points((0, 0, half), (side, 0), (side, 50), (0, 50)))) == []


def test_bores_and_masks_that_just_fit_are_taken() -> None:
    assert problems(turned(*SHAFT, bores=(bore(12, 29), bore(8, 30, "top")))) == []
    assert problems(tube(masks=(Mask(face="side", start=-0.05, end=0.05),))) == []
    assert problems(turned((0, 4), (0, 10), (30, 10), bores=(bore(15, 20),))) == []


def test_no_shape_is_made_of_a_part_with_problems() -> None:
    with pytest.raises(ProblemsError) as refused:
        shape_of(tube(50, 60))
    assert [problem.key for problem in refused.value.problems] == ["tube-inner-not-smaller"]
