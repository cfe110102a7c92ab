"""Outlines: exact areas and lengths, and chords that keep to their arcs."""

import math

import numpy as np
import pytest
import shapely
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.geometry.outline import (
    CHORD_SAGITTA,
    CHORD_STEP,
    drawing_rings,
    edge_length,
    enclosed_area,
    lines,
)
from lineplanner.inputs.part import Outline
from tests.geometry.parts import L_SHAPE, MM, MM2, points, rectangle

# Closed forms of plane geometry: area in mm2, length of the edge in mm.
CLOSED_FORMS = {
    "rectangle": (rectangle(100, 60), 6000, 320),
    # corners: 4 r^2 - pi r^2 is lost of 100 x 60; edge: two straight runs each way and one full circle
    "rounded-rectangle": (
        Outline(shape="rounded-rectangle", width=0.1, height=0.06, radius=0.01),
        6000 - (4 - math.pi) * 100,
        2 * 80 + 2 * 40 + math.tau * 10,
    ),
    "rounded to a circle": (
        Outline(shape="rounded-rectangle", width=0.06, height=0.06, radius=0.03),
        math.pi * 900,
        math.tau * 30,
    ),
    "circle": (Outline(shape="circle", diameter=0.05), math.pi * 625, math.tau * 25),
    "ring": (
        Outline(shape="ring", diameter=0.05, inner_diameter=0.03),
        math.pi * (625 - 225),
        math.tau * (25 + 15),
    ),
    # 30 long, 10 wide: a 20 x 10 rectangle and a circle of 10
    "slot": (Outline(shape="slot", width=0.03, height=0.01), 200 + math.pi * 25, 40 + math.tau * 5),
    "upright slot": (Outline(shape="slot", width=0.01, height=0.03), 200 + math.pi * 25, 40 + math.tau * 5),
    "slot as long as wide": (Outline(shape="slot", width=0.01, height=0.01), math.pi * 25, math.tau * 5),
    # hexagon over corners 40: 3/2 sqrt(3) 20^2, six sides of 20
    "polygon": (Outline(shape="polygon", diameter=0.04, sides=6), 1.5 * math.sqrt(3) * 400, 120),
    # half circle of radius 10 on a 20 x 30 rectangle
    "arch": (points((0, 0), (20, 0), (20, 30, 10), (0, 30)), 600 + math.pi * 50, 80 + math.pi * 10),
    # the same half circle taken out
    "bite": (points((0, 0), (20, 0), (20, 30, -10), (0, 30)), 600 - math.pi * 50, 80 + math.pi * 10),
}


@pytest.mark.parametrize("name", CLOSED_FORMS)
def test_area_and_length_are_those_of_the_closed_form(name: str) -> None:
    outline, area, length = CLOSED_FORMS[name]
    assert enclosed_area(outline) == pytest.approx(area * MM2, rel=1e-12)
    assert edge_length(outline) == pytest.approx(length * MM, rel=1e-12)


@pytest.mark.parametrize("name", CLOSED_FORMS)
def test_chords_have_the_area_of_the_arcs_to_one_in_100_000_and_run_counter_clockwise(name: str) -> None:
    for line in lines(CLOSED_FORMS[name][0]):
        ring = shapely.LinearRing(line.ring().points)
        assert ring.is_ccw
        assert shapely.Polygon(ring).area == pytest.approx(line.area, rel=1.1e-5)
        assert line.ring().lengths.sum() == pytest.approx(line.length, rel=1e-12)


def test_corners_may_run_either_way_round() -> None:
    corners = [(0, 0), (80, 0, 6), (80, 40, -5), (0, 40, 3)]
    # the other way round each side starts at its other corner and bulges to the other hand
    back = [(0, 0, -3), (0, 40, 5), (80, 40, -6), (80, 0, 0)]
    assert enclosed_area(points(*corners)) == pytest.approx(enclosed_area(points(*back)), rel=1e-13)
    assert edge_length(points(*corners)) == pytest.approx(edge_length(points(*back)), rel=1e-13)


def test_a_positive_bulge_lies_to_the_right_of_travel() -> None:
    ring = lines(points((0, 0), (20, 0, 5), (20, 30), (0, 30)))[0].ring().points
    assert ring[:, 0].max() == pytest.approx(25 * MM)
    ring = lines(points((0, 30), (20, 30, 5), (20, 0), (0, 0)))[0].ring().points
    assert ring[:, 0].max() == pytest.approx(20 * MM)


@pytest.mark.parametrize("diameter", [0.01, 0.5, 2.0, 10.0])
def test_chords_keep_within_a_hundredth_of_a_millimetre(diameter: float) -> None:
    points_ = lines(Outline(shape="circle", diameter=diameter))[0].ring().points
    middles = (points_ + np.roll(points_, -1, axis=0)) / 2
    off = diameter / 2 - np.hypot(*middles.T)
    assert off.max() <= CHORD_SAGITTA * (1 + 1e-6)
    assert len(points_) >= math.tau / CHORD_STEP - 1e-6


@given(
    radius=st.floats(0.5, 3000.0),
    chord=st.floats(0.5, 1.9),
)
@settings(deadline=None)
def test_the_area_over_a_chord_is_the_circular_segment(radius: float, chord: float) -> None:
    # A circle through a chord c = k r: sagitta r - sqrt(r^2 - c^2/4); segment r^2 (asin(k/2) - k/4 sqrt(4 - k^2))
    sagitta = radius - math.sqrt(radius**2 - (chord * radius) ** 2 / 4)
    width, deep = chord * radius, 4 * radius
    outline = points((0, 0), (width, 0), (width, deep, sagitta), (0, deep))
    segment = radius**2 * (math.asin(chord / 2) - chord / 4 * math.sqrt(4 - chord**2))
    assert enclosed_area(outline) / MM2 == pytest.approx(width * deep + segment, rel=1e-9)


def test_a_bulge_of_a_micrometre_keeps_its_digits() -> None:
    # flat arc: area 2/3 c b (1 + (2 b / c)^2 / 5 + ...), here 2/3 * 1000 * 0.001 = 0.6667 mm2
    flat = enclosed_area(points((0, 0), (1000, 0), (1000, 1000, 0.001), (0, 1000)))
    assert flat / MM2 - 1e6 == pytest.approx(2 / 3, rel=1e-6)


@pytest.mark.parametrize("outline", [L_SHAPE, CLOSED_FORMS["ring"][0], CLOSED_FORMS["rounded-rectangle"][0]])
def test_a_drawing_ring_is_coarser_and_keeps_to_its_tolerance(outline: Outline) -> None:
    tolerance = 0.5 * MM
    for coarse, line in zip(drawing_rings(outline, tolerance), lines(outline), strict=True):
        fine = line.ring().points
        assert len(coarse) < len(fine)
        off = shapely.hausdorff_distance(shapely.LinearRing(coarse), shapely.LinearRing(fine), densify=0.02)
        assert off <= tolerance * 1.01
