"""The rasteriser against a slow one that asks every dot, and against shapely."""

import math

import numpy as np
import pytest
import scipy.ndimage
import shapely
from hypothesis import example, given
from hypothesis import strategies as st

from lineplanner.tui.widgets import raster
from lineplanner.tui.widgets.raster import NOBODY, View

WIDE, HIGH = 12, 8
WHOSE = np.zeros(1, dtype=np.int32)


def ring(*corners: tuple[float, float]) -> np.ndarray:
    points = np.array(corners, dtype=float)
    return np.hstack((points, np.roll(points, -1, axis=0)))


def owners(*lengths: int) -> np.ndarray:
    return np.repeat(np.arange(len(lengths), dtype=np.int32), lengths)


def inside(edges: np.ndarray, x: float, y: float) -> bool:
    """Even-odd by counting crossings to the left of one point."""
    crossings = 0
    for x0, y0, x1, y1 in edges:
        if (y0 <= y) != (y1 <= y):
            crossings += x0 + (y - y0) / (y1 - y0) * (x1 - x0) <= x
    return crossings % 2 == 1


def asked_dot_by_dot(edges: np.ndarray) -> np.ndarray:
    return np.array([[inside(edges, x + 0.5, y + 0.5) for x in range(WIDE)] for y in range(HIGH)])


# Corners on a grid of 1/4 that no dot's middle lies on in x or y: no point is a matter of taste.
GRID = st.integers(-16, 64).map(lambda n: n / 4 + 1 / 8)
CORNERS = st.lists(st.tuples(GRID, GRID), min_size=3, max_size=8)


@given(CORNERS)
def test_an_area_is_what_asking_every_dot_finds(corners: list[tuple[float, float]]) -> None:
    edges = ring(*corners)
    filled = raster.fill(edges, np.zeros(len(edges), dtype=np.int32), WIDE, HIGH)
    np.testing.assert_array_equal(filled == 0, asked_dot_by_dot(edges))


@given(st.tuples(GRID, GRID), st.tuples(GRID, GRID))
def test_a_line_lights_no_dot_that_it_does_not_pass(
    start: tuple[float, float], end: tuple[float, float]
) -> None:
    edges = np.array([[*start, *end]])
    dots, _ = raster.outline(edges, WHOSE, WIDE // 2, HIGH // 4)
    line = shapely.LineString([start, end])
    for y, x in np.argwhere(dots):
        assert shapely.box(x, y, x + 1, y + 1).distance(line) < 1e-9


@given(st.tuples(GRID, GRID), st.tuples(GRID, GRID))
@example((-3.875, 0.125), (15.625, 0.125))  # as long as the window: a whole number of dots
def test_a_line_has_no_gap(start: tuple[float, float], end: tuple[float, float]) -> None:
    dots, _ = raster.outline(np.array([[*start, *end]]), WHOSE, WIDE // 2, HIGH // 4)
    _, parts = scipy.ndimage.label(dots, structure=np.ones((3, 3)))  # corners touch
    assert parts <= 1


@given(st.tuples(GRID, GRID), st.tuples(GRID, GRID))
@example((2.625, 8.625), (16.125, 7.625))  # through the last dot only, from edge to edge
def test_a_line_through_the_window_is_lit_somewhere(
    start: tuple[float, float], end: tuple[float, float]
) -> None:
    dots, owned = raster.outline(np.array([[*start, *end]]), WHOSE, WIDE // 2, HIGH // 4)
    inner = shapely.box(0.0, 0.0, WIDE, HIGH).buffer(-1e-6)
    if shapely.LineString([start, end]).intersects(inner):
        assert dots.any()
    np.testing.assert_array_equal(owned == 0, dots.reshape(2, 4, 6, 2).any(axis=(1, 3)))


def test_a_hole_stays_a_hole() -> None:
    edges = np.concatenate((ring((1, 1), (11, 1), (11, 7), (1, 7)), ring((4, 3), (8, 3), (8, 5), (4, 5))))
    filled = raster.fill(edges, np.zeros(len(edges), dtype=np.int32), WIDE, HIGH)
    assert (filled[3:5, 4:8] == NOBODY).all()
    assert (filled == 0).sum() == 10 * 6 - 4 * 2


def test_of_two_areas_the_later_owner_lies_on_top() -> None:
    edges = np.concatenate((ring((0, 0), (6, 0), (6, 6), (0, 6)), ring((3, 3), (9, 3), (9, 8), (3, 8))))
    filled = raster.fill(edges, owners(4, 4), WIDE, HIGH)
    assert filled[1, 1] == 0
    assert filled[4, 4] == 1
    assert filled[7, 8] == 1


def test_of_two_lines_in_one_cell_the_last_owns_it_and_both_are_seen() -> None:
    edges = np.array([[0.5, 0.5, 3.5, 0.5], [0.5, 3.5, 3.5, 3.5]])
    dots, owned = raster.outline(edges, np.array([7, 3], dtype=np.int32), 2, 1)
    assert owned.tolist() == [[3, 3]]
    assert raster.text_of(raster.packed(dots)[0]) == "⣉⣉"


@pytest.mark.parametrize(("x", "y"), [(x, y) for x in range(2) for y in range(4)], ids=str)
def test_each_dot_of_a_cell_is_its_own_braille_dot(x: int, y: int) -> None:
    # Unicode 16.0, chapter 21.1, braille patterns: dots 1 2 3 7 down the left, 4 5 6 8 down the right; dot n is
    # bit n - 1 over U+2800.
    number = ((1, 2, 3, 7), (4, 5, 6, 8))[x][y]
    dots = np.zeros((4, 2), dtype=bool)
    dots[y, x] = True
    assert raster.packed(dots)[0, 0] == 0x2800 + 2 ** (number - 1)


def test_a_line_far_longer_than_the_window_costs_no_more_dots_than_the_window_has() -> None:
    edges = np.array([[-1e9, 4.5, 1e9, 4.5], [1e8, 1e8, 2e8, 2e8]])
    dots, _ = raster.outline(edges, owners(1, 1), WIDE // 2, HIGH // 4)
    assert dots.sum() == WIDE
    assert dots[4].all()


@pytest.mark.parametrize(
    "edges", [np.empty((0, 4)), ring((50, 50), (60, 50), (60, 60))], ids=["none", "outside"]
)
def test_nothing_is_drawn_of_nothing_and_of_what_lies_outside(edges: np.ndarray) -> None:
    whose = np.zeros(len(edges), dtype=np.int32)
    dots, owned = raster.outline(edges, whose, 6, 2)
    assert not dots.any()
    assert (owned == NOBODY).all()
    assert (raster.fill(edges, whose, WIDE, HIGH) == NOBODY).all()


def test_with_one_dot_to_a_cell_a_line_is_drawn_in_whole_cells() -> None:
    dots, owned = raster.outline(np.array([[0.5, 0.5, 5.5, 0.5]]), WHOSE, 6, 2, 1, 1)
    assert dots.tolist() == [[True] * 6, [False] * 6]
    assert owned[0].tolist() == [0] * 6


SIZES = st.tuples(st.integers(1, 200), st.integers(1, 60))
BOXES = st.tuples(st.floats(-5, 5), st.floats(-5, 5), st.floats(0.01, 9), st.floats(0.01, 9)).map(
    lambda b: (b[0], b[1], b[0] + b[2], b[1] + b[3])
)


@given(BOXES, SIZES)
def test_what_is_fitted_lies_inside_and_touches_two_sides(
    box: tuple[float, float, float, float], size: tuple[int, int]
) -> None:
    left, top, right, bottom = View.fitted(box, *size).edges(np.array([[box[0], box[3], box[2], box[1]]]))[0]
    width, height = 2 * size[0], 4 * size[1]
    assert left >= 0.0
    assert right <= width
    assert top >= 0.0
    assert bottom <= height
    assert math.isclose(right - left, width - 1) or math.isclose(bottom - top, height - 1)


@given(BOXES, SIZES)
def test_a_square_stays_a_square_of_dots(
    box: tuple[float, float, float, float], size: tuple[int, int]
) -> None:
    view = View.fitted(box, *size)
    left, top, right, bottom = view.edges(np.array([[0.0, 1.0, 1.0, 0.0]]))[0]
    assert math.isclose(right - left, bottom - top, rel_tol=1e-9)


@given(BOXES, SIZES, st.floats(0.1, 10.0), st.floats(-50, 50), st.floats(-50, 50))
def test_a_place_and_its_cell_lead_to_each_other(
    box: tuple[float, float, float, float], size: tuple[int, int], factor: float, right: float, down: float
) -> None:
    view = View.fitted(box, *size).panned(right, down).zoomed(factor)
    place = view.place(3.25, 1.5)
    assert np.allclose(view.points(np.array([place])), [[3.25, 1.5]], atol=1e-6)


@given(BOXES, SIZES, st.floats(0.1, 10.0))
def test_zooming_about_a_place_leaves_it_where_it_is(
    box: tuple[float, float, float, float], size: tuple[int, int], factor: float
) -> None:
    view = View.fitted(box, *size)
    about = (box[0], box[1])
    before, after = (v.points(np.array([about])) for v in (view, view.zoomed(factor, about)))
    assert np.allclose(before, after, atol=1e-6)


def test_panning_moves_the_picture_the_other_way_by_whole_cells() -> None:
    view = View.fitted((0.0, 0.0, 1.0, 1.0), 40, 20)
    here = np.array([[0.5, 0.5]])
    assert np.allclose(view.panned(3, -2).points(here) - view.points(here), [[-3.0, 2.0]])
