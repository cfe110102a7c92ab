"""The outline of a placed part in the rack plane, for drawing."""

import math

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry.outline import Circle, drawing_rings, lines, slot_line
from lineplanner.geometry.pose import Pose, height, sideways
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part, Plate, Section, Stated, Tube, Turned

Array = NDArray[np.float64]

_DRAWN: Memo[Part, list[Array]] = Memo(1024)


def silhouette(part: Part, pose: Pose, tolerance: float) -> list[Array]:
    """Closed lines (n, 2) of x, y in m: the outer one, then what one sees through; chords within tolerance.

    A flat plate shows its outline with through holes and slots, all else the box or profile of its side.
    """
    key = (pose.edge_on, tolerance)
    drawn = _DRAWN.get(part, key, lambda: _lines(part, tolerance, edge_on=pose.edge_on))
    return [_placed(ring, part, pose) for ring in drawn]


def _lines(part: Part, tolerance: float, *, edge_on: bool) -> list[Array]:
    """Points (n, 2) across and up in the part's own frame."""
    if isinstance(part, Plate) and not edge_on:
        return _plate_lines(part, tolerance)
    return [_side_view(part, edge_on=edge_on)]


def _plate_lines(part: Plate, tolerance: float) -> list[Array]:
    holes = [Circle(hole.at, hole.diameter / 2) for hole in part.holes if hole.depth is None]
    slots = [slot_line(slot) for slot in part.slots if slot.depth is None]
    return drawing_rings(part.outline, tolerance) + [
        line.ring(tolerance, math.tau / 8).points for line in (*holes, *slots)
    ]


def _side_view(part: Part, *, edge_on: bool) -> Array:
    """Points (n, 2) across and up in the part's own frame, after the quarter turn of edge-on."""
    match part:
        case Plate():
            half = part.thickness / 2
            points = lines(part.outline)[0].ring().points
            return _box(-half, half, float(points[:, 1].min()), float(points[:, 1].max()))
        case Section():
            across = lines(part.outline)[0].ring().points[:, 1 if edge_on else 0]
            return _box(float(across.min()), float(across.max()), -part.length / 2, part.length / 2)
        case Tube():
            return _box(-part.diameter / 2, part.diameter / 2, -part.length / 2, part.length / 2)
        case Turned():
            right = [(point.radius, point.axis) for point in part.profile]
            return np.array(right + [(-radius, axis) for radius, axis in reversed(right)])
        case Stated():
            half = (part.depth if edge_on else part.width) / 2
            return _box(-half, half, -part.height / 2, part.height / 2)


def _box(left: float, right: float, low: float, high: float) -> Array:
    return np.array([(left, low), (right, low), (right, high), (left, high)])


def _placed(ring: Array, part: Part, pose: Pose) -> Array:
    """Points across and up in the part's frame brought to the rack plane."""
    x = sideways(part.hang, pose.turn, edge_on=pose.edge_on, axis="w")
    y = height(part.hang, pose.turn, edge_on=pose.edge_on, axis="w")
    across = ((x.c, x.b), (y.c, y.b)) if pose.edge_on else ((x.a, x.b), (y.a, y.b))
    placed: Array = ring @ np.array(across).T + (pose.x + x.base, pose.y + y.base)
    return placed
