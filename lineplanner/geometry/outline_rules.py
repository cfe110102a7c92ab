"""What makes an outline unusable."""

import math
from collections.abc import Iterator

import numpy as np
import shapely
from numpy.typing import NDArray

from lineplanner.errors import Problem, Quantity
from lineplanner.geometry.outline import lines
from lineplanner.geometry.values import Path
from lineplanner.inputs.part import Outline
from lineplanner.quantities import COUNT, LENGTH

Array = NDArray[np.float64]

NEEDS = {
    "points": ("points",),
    "rectangle": ("width", "height"),
    "rounded-rectangle": ("width", "height", "radius"),
    "circle": ("diameter",),
    "ring": ("diameter", "inner_diameter"),
    "slot": ("width", "height"),
    "polygon": ("diameter", "sides"),
}
_ALL = ("points", "width", "height", "radius", "diameter", "inner_diameter", "sides")
_LEAST_CORNERS = 3
SLACK = 1e-9  # relative: what unit conversion may add to two numbers that were meant to be equal


def outline_problems(outline: Outline, path: Path) -> list[Problem]:
    """Everything that is wrong with an outline whose single values are in their ranges.

    dimension-missing, dimension-not-used {shape, dimension}; corners-too-few {count, least};
    corner-repeated {corner, u, v}; bulge-too-large {bulge, limit}; corner-radius-too-large {radius, limit};
    ring-inner-not-smaller {inner, outer}; outline-crosses-itself {u, v}. No side bulges over a half circle.
    """
    found = list(_dimension_problems(outline, path))
    if not found:
        found += (
            _corner_problems(outline, path) if outline.shape == "points" else _size_problems(outline, path)
        )
    if not found and outline.shape == "points":
        crossing = crossing_point(lines(outline)[0].ring().points)
        if crossing is not None:
            found.append(Problem((*path, "points"), "outline-crosses-itself", place(crossing)))
    return found


def place(point: tuple[float, float]) -> dict[str, Quantity]:
    """The coordinates of a point as facts."""
    return {"u": Quantity(point[0], LENGTH), "v": Quantity(point[1], LENGTH)}


def crossing_point(points: Array) -> tuple[float, float] | None:
    """Where a closed line of points (n, 2) first meets itself, or None."""
    if shapely.LinearRing(points).is_simple:
        return None
    following = np.roll(points, -1, axis=0)
    sides = [shapely.LineString(pair) for pair in np.stack((points, following), axis=1)]
    one, other = shapely.STRtree(sides).query(sides, predicate="intersects")
    count = len(sides)
    for first, second in sorted((a, b) for a, b in zip(one.tolist(), other.tolist(), strict=True) if a < b):
        meeting = shapely.intersection(sides[first], sides[second])
        beside = second - first == 1 or (first == 0 and second == count - 1)
        if not beside or meeting.geom_type != "Point":
            u, v = shapely.get_coordinates(meeting)[0].tolist()
            return u, v
    u, v = points[0].tolist()
    return u, v


def _dimension_problems(outline: Outline, path: Path) -> Iterator[Problem]:
    needed = NEEDS[outline.shape]
    for name in _ALL:
        given = getattr(outline, name) not in (None, ())
        if given != (name in needed):
            key = "dimension-not-used" if given else "dimension-missing"
            yield Problem((*path, name), key, {"shape": outline.shape, "dimension": name})


def _corner_problems(outline: Outline, path: Path) -> Iterator[Problem]:
    corners = outline.points
    if len(corners) < _LEAST_CORNERS:
        facts = {"count": Quantity(len(corners), COUNT), "least": Quantity(_LEAST_CORNERS, COUNT)}
        yield Problem((*path, "points"), "corners-too-few", facts)
        return
    for number, (corner, following) in enumerate(zip(corners, (*corners[1:], corners[0]), strict=True)):
        chord = math.dist(corner.at, following.at)
        repeated = (number + 1) % len(corners)
        if chord == 0.0:
            facts = {"corner": Quantity(repeated + 1, COUNT), **place(following.at)}
            yield Problem((*path, "points", repeated), "corner-repeated", facts)
        elif abs(corner.bulge) > chord / 2 * (1 + SLACK):
            facts = {"bulge": Quantity(corner.bulge, LENGTH), "limit": Quantity(chord / 2, LENGTH)}
            yield Problem((*path, "points", number, "bulge"), "bulge-too-large", facts)


def _size_problems(outline: Outline, path: Path) -> Iterator[Problem]:
    if outline.radius is not None and outline.width is not None and outline.height is not None:
        limit = min(outline.width, outline.height) / 2
        if outline.radius > limit * (1 + SLACK):
            facts = {"radius": Quantity(outline.radius, LENGTH), "limit": Quantity(limit, LENGTH)}
            yield Problem((*path, "radius"), "corner-radius-too-large", facts)
    inner, outer = outline.inner_diameter, outline.diameter
    if inner is not None and outer is not None and inner >= outer:
        facts = {"inner": Quantity(inner, LENGTH), "outer": Quantity(outer, LENGTH)}
        yield Problem((*path, "inner_diameter"), "ring-inner-not-smaller", facts)
