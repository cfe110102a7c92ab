"""The checked shape of a part, remembered, and how much room it takes in the rack plane."""

import numpy as np
from numpy.typing import NDArray

from lineplanner.errors import ProblemsError
from lineplanner.geometry.faces import Shape, build_shape
from lineplanner.geometry.pose import Pose, Slope, height, sideways
from lineplanner.geometry.refusals import problems
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part

Array = NDArray[np.float64]

_SHAPES: Memo[Part, Shape] = Memo(512)
_HEIGHTS: Memo[Part, tuple[float, float]] = Memo(4096)
_WIDTHS: Memo[Part, tuple[float, float]] = Memo(4096)


def shape_of(part: Part) -> Shape:
    """The faces of a part. Raises ProblemsError with everything that is wrong with it."""
    return _SHAPES.get(part, None, lambda: _checked_shape(part))


def heights(shape: Shape, turn: float, *, edge_on: bool) -> tuple[float, float]:
    """Lowest and highest point over the hanging point in m; turn in rad."""
    part = shape.part
    return _HEIGHTS.get(
        part,
        (turn, edge_on),
        lambda: _range(shape.hull, height(part.hang, turn, edge_on=edge_on, axis=shape.axis)),
    )


def widths(shape: Shape, turn: float, *, edge_on: bool) -> tuple[float, float]:
    """Leftmost and rightmost point beside the hanging point in m; turn in rad."""
    part = shape.part
    return _WIDTHS.get(
        part,
        (turn, edge_on),
        lambda: _range(shape.hull, sideways(part.hang, turn, edge_on=edge_on, axis=shape.axis)),
    )


def extent(shape: Shape, pose: Pose) -> tuple[float, float, float, float]:
    """Left, lowest, right and highest coordinate of a placed part in the rack plane, in m."""
    low, high = heights(shape, pose.turn, edge_on=pose.edge_on)
    left, right = widths(shape, pose.turn, edge_on=pose.edge_on)
    return pose.x + left, pose.y + low, pose.x + right, pose.y + high


def _checked_shape(part: Part) -> Shape:
    wrong = problems(part)
    if wrong:
        raise ProblemsError(wrong)
    return build_shape(part)


def _range(hull: Array, slope: Slope) -> tuple[float, float]:
    middle = slope.base + hull[:, :3] @ (slope.a, slope.b, slope.c)
    reach = slope.across * hull[:, 3]
    return float((middle - reach).min()), float((middle + reach).max())
