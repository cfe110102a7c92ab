"""How a part hangs in the rack plane, and the height of each of its points."""

import math
from dataclasses import dataclass
from typing import Annotated, Literal, NamedTuple

from lineplanner.quantities import ANGLE, LENGTH, Angle, Field, Length

Axis = Literal["v", "w"]

# A turn this close to a right angle is taken as one: a cut along a face must not hang on rounding.
_SQUARE = 1e-9


@dataclass(frozen=True, slots=True)
class Pose:
    """Where a part hangs: its hanging point in the rack plane, y up from the flight bar, and its turn.

    edge_on turns it a quarter about v before the turn, so that its front looks to the right.
    """

    x: Annotated[Length, Field(LENGTH, "across", "of the hanging point")] = 0.0
    y: Annotated[Length, Field(LENGTH, "up", "of the hanging point; 0 at the flight bar")] = 0.0
    turn: Annotated[Angle, Field(ANGLE, "turn", "counter-clockwise in the rack plane")] = 0.0
    edge_on: Annotated[bool, Field(None, "edge-on")] = False


UPRIGHT = Pose()


class Slope(NamedTuple):
    """A coordinate of the rack plane over a part's own a, b, c: base + a*ga + b*gb + c*gc, in metres.

    c is the axis (w of a plate, v of a section, tube or turned part); a and b are the other two.
    """

    base: float
    a: float
    b: float
    c: float

    @property
    def across(self) -> float:
        """How steep it is over a plane square to the axis."""
        return math.hypot(self.a, self.b)


def height(hang: tuple[float, float], turn: float, *, edge_on: bool, axis: Axis) -> Slope:
    """Height over the hanging point."""
    sine, cosine = _sine_cosine(turn)
    return _slope(hang, (sine, cosine), edge_on=edge_on, axis=axis)


def sideways(hang: tuple[float, float], turn: float, *, edge_on: bool, axis: Axis) -> Slope:
    """Distance to the right of the hanging point."""
    sine, cosine = _sine_cosine(turn)
    return _slope(hang, (cosine, -sine), edge_on=edge_on, axis=axis)


def _sine_cosine(turn: float) -> tuple[float, float]:
    sine, cosine = math.sin(turn), math.cos(turn)
    return (0.0 if abs(sine) < _SQUARE else sine), (0.0 if abs(cosine) < _SQUARE else cosine)


def _slope(hang: tuple[float, float], gradient: tuple[float, float], *, edge_on: bool, axis: Axis) -> Slope:
    """gradient: over the drawing's right and up as they show in the rack plane before the turn."""
    right, up = gradient
    u, w = (0.0, right) if edge_on else (right, 0.0)
    base = -u * hang[0] - up * hang[1]
    return Slope(base, u, up, w) if axis == "w" else Slope(base, u, w, up)
