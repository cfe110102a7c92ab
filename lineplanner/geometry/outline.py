"""Outlines as closed lines: exact area and length, and chords where a level or a zone has to cut them."""

import math
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from lineplanner.errors import InputError
from lineplanner.inputs.part import Outline, Slot
from lineplanner.quantities import Area, Length

Array = NDArray[np.float64]

# Chords stay this close to their arc, and are at least 800 to the turn, so that a part drawn
# twice as large has four times the area to the last digit that counts.
CHORD_SAGITTA = 1e-5
CHORD_STEP = math.tau / 800


@dataclass(frozen=True, slots=True)
class Ring:
    """A closed line of chords: points (n, 2) in m, none repeated.

    Of each side lengths (n,), that of its arc in m, and slivers (n,), the area between chord and arc in m^2.
    """

    points: Array
    lengths: Array
    slivers: Array


@dataclass(frozen=True, slots=True)
class Circle:
    """A full circle: centre and radius in m."""

    centre: tuple[float, float]
    radius: float

    @property
    def area(self) -> float:
        return math.pi * self.radius**2

    @property
    def length(self) -> float:
        return math.tau * self.radius

    def ring(self, sagitta: float = CHORD_SAGITTA, step: float = CHORD_STEP) -> Ring:
        """Chords, counter-clockwise from the right."""
        count = max(3, _chord_count(math.tau, self.radius, sagitta, step))
        angles = np.arange(count) * (math.tau / count)
        points = self.radius * np.column_stack((np.cos(angles), np.sin(angles))) + self.centre
        sliver = (self.area - _signed_area(points, np.zeros(count))) / count
        return Ring(points, np.full(count, self.length / count), np.full(count, sliver))


@dataclass(frozen=True, slots=True)
class Loop:
    """A closed line, counter-clockwise: corners (n, 2) and bulges (n,) in m, positive outwards."""

    corners: Array
    bulges: Array

    @property
    def area(self) -> float:
        return _signed_area(self.corners, self.bulges)

    @property
    def curved(self) -> bool:
        return bool(self.bulges.any())

    @property
    def length(self) -> float:
        return math.fsum(_side_length(*side) for side in self._sides())

    def ring(self, sagitta: float = CHORD_SAGITTA, step: float = CHORD_STEP) -> Ring:
        """Chords for the bulging sides, straight sides as they are."""
        points: list[Array] = []
        lengths: list[Array] = []
        slivers: list[Array] = []
        for start, end, bulge in self._sides():
            part = _arc_points(start, end, bulge, sagitta, step)
            count = len(part)
            points.append(part)
            lengths.append(np.full(count, _side_length(start, end, bulge) / count))
            slivers.append(np.full(count, _segment_area(math.dist(start, end), bulge, count)))
        return Ring(np.concatenate(points), np.concatenate(lengths), np.concatenate(slivers))

    def _sides(self) -> list[tuple[Array, Array, float]]:
        ends = np.roll(self.corners, -1, axis=0)
        return list(zip(self.corners, ends, self.bulges.tolist(), strict=True))


Line = Circle | Loop


def lines(outline: Outline) -> tuple[Line, ...]:
    """The closed lines of an outline without problems: the outer one, then the inner one of a ring.

    A slot lies along its longer side; a regular polygon stands on a side.
    """
    match outline.shape:
        case "circle":
            return (Circle((0.0, 0.0), _given(outline.diameter) / 2),)
        case "ring":
            return tuple(
                Circle((0.0, 0.0), _given(d) / 2) for d in (outline.diameter, outline.inner_diameter)
            )
        case "slot":
            width, height = _given(outline.width), _given(outline.height)
            turn = 0.0 if width >= height else math.pi / 2
            return (stadium((0.0, 0.0), max(width, height), min(width, height), turn),)
        case "rectangle":
            return (_rectangle(_given(outline.width), _given(outline.height)),)
        case "rounded-rectangle":
            return (_rounded(_given(outline.width), _given(outline.height), _given(outline.radius)),)
        case "polygon":
            return (_regular(_given(outline.diameter) / 2, int(_given(outline.sides))),)
        case "points":
            return (_loop([v.at for v in outline.points], [v.bulge for v in outline.points]),)


def slot_line(slot: Slot) -> Line:
    """The closed line of a slot in a plate."""
    return stadium(slot.at, slot.length, slot.width, slot.turn)


def stadium(centre: tuple[float, float], length: float, width: float, turn: float) -> Line:
    """Straight sides with round ends; a circle when it is as long as wide. Lengths in m, turn in rad."""
    if length <= width:
        return Circle(centre, width / 2)
    half, radius = (length - width) / 2, width / 2
    corners = np.array([(-half, -radius), (half, -radius), (half, radius), (-half, radius)])
    spin = np.array([(math.cos(turn), math.sin(turn)), (-math.sin(turn), math.cos(turn))])
    return Loop(corners @ spin + centre, np.array([0.0, radius, 0.0, radius]))


def moved(line: Line, by: tuple[float, float]) -> Line:
    """The same line elsewhere; by in m."""
    if isinstance(line, Circle):
        return Circle((line.centre[0] + by[0], line.centre[1] + by[1]), line.radius)
    return Loop(line.corners + np.array(by), line.bulges)


def enclosed_area(outline: Outline) -> Area:
    """Area inside an outline, from its arcs themselves, less the inner circle of a ring.

        A = 1/2 sum (u_i v_j - u_j v_i) + sum of +- r^2/2 (theta - sin theta)

    Parameters
        outline: an outline without problems
    Returns
        A [m^2]
    Valid
        Any outline that does not cross itself; a bulge up to the half circle.
    Source
        Derived: Green's theorem over straight sides and circular segments.
    Example
        >>> from lineplanner.inputs.part import Outline
        >>> cover = Outline(shape="rounded-rectangle", width=0.1, height=0.06, radius=0.01)
        >>> round(enclosed_area(cover) * 1e4, 3)
        59.142
    """
    outer, *inner = lines(outline)
    return outer.area - sum(line.area for line in inner)


def edge_length(outline: Outline) -> Length:
    """Length of an outline, from its arcs themselves, with the inner circle of a ring.

        P = sum of c, or r theta where the side bulges

    Parameters
        outline: an outline without problems
    Returns
        P [m]
    Valid
        Any outline that does not cross itself; a bulge up to the half circle.
    Source
        Derived: arc length of a circle through a chord and its sagitta.
    Example
        >>> from lineplanner.inputs.part import Outline
        >>> round(edge_length(Outline(shape="ring", diameter=0.05, inner_diameter=0.03)), 5)
        0.25133
    """
    return sum(line.length for line in lines(outline))


def drawing_rings(outline: Outline, tolerance: float) -> list[Array]:
    """Points (n, 2) in m of each closed line, coarse enough to draw: chords within the tolerance in m."""
    return [line.ring(tolerance, math.tau / 8).points for line in lines(outline)]


def _given(value: float | None) -> float:
    if value is None:
        raise InputError("dimension-missing")
    return value


def _loop(corners: list[tuple[float, float]], bulges: list[float]) -> Loop:
    """Bring corners to counter-clockwise; the side between two corners keeps its bulge."""
    points, sides = np.array(corners, dtype=float), np.array(bulges, dtype=float)
    if _signed_area(points, sides) < 0.0:
        points, sides = points[::-1].copy(), -np.roll(sides[::-1], -1)
    return Loop(points, sides)


def _rectangle(width: float, height: float) -> Loop:
    u, v = width / 2, height / 2
    return Loop(np.array([(-u, -v), (u, -v), (u, v), (-u, v)]), np.zeros(4))


def _rounded(width: float, height: float, radius: float) -> Loop:
    u, v = width / 2 - radius, height / 2 - radius
    centres = ((u, -v, -1), (u, v, 0), (-u, v, 1), (-u, -v, 2))  # with the quarter turn where its arc begins
    steps = ((1.0, 0.0), (0.0, 1.0), (-1.0, 0.0), (0.0, -1.0))
    corners = [
        (a + radius * steps[(q + k) % 4][0], b + radius * steps[(q + k) % 4][1])
        for a, b, q in centres
        for k in (0, 1)
    ]
    bulges = np.tile([radius * (1 - math.sqrt(0.5)), 0.0], 4)
    points = np.array(corners)
    keep = (
        np.hypot(*(np.roll(points, -1, axis=0) - points).T) > 1e-12 * radius
    )  # no side left between two arcs
    return Loop(points[keep], bulges[keep])


def _regular(radius: float, sides: int) -> Loop:
    angles = -math.pi / 2 + math.pi / sides + np.arange(sides) * (math.tau / sides)
    return Loop(radius * np.column_stack((np.cos(angles), np.sin(angles))), np.zeros(sides))


def _chord_count(angle: float, radius: float, sagitta: float, step: float) -> int:
    widest = 2 * math.acos(1 - sagitta / radius) if sagitta < radius else math.pi
    return max(1, math.ceil(angle / min(step, widest) - 1e-9))


def _arc(chord: float, bulge: float) -> tuple[float, float]:
    """Angle and radius of the arc over a chord with this sagitta."""
    angle = 4 * math.atan2(2 * abs(bulge), chord)
    return angle, (chord**2 / 4 + bulge**2) / (2 * abs(bulge))


def _side_length(start: Array, end: Array, bulge: float) -> float:
    chord = math.dist(start, end)
    if bulge == 0.0:
        return chord
    angle, radius = _arc(chord, bulge)
    return angle * radius


def _signed_area(corners: Array, bulges: Array) -> float:
    ends = np.roll(corners, -1, axis=0)
    start = corners - corners[0]  # near its own corner nothing cancels
    end = ends - corners[0]
    area = float(np.sum(start[:, 0] * end[:, 1] - end[:, 0] * start[:, 1]) / 2)
    for side in np.flatnonzero(bulges):
        area += _segment_area(math.dist(corners[side], ends[side]), float(bulges[side]), 1)
    return area


def _segment_area(chord: float, bulge: float, count: int) -> float:
    """Area between an arc and its chords, with its sign, for one of `count` equal chords of it.

    theta - sin theta, by its series where the difference would lose its digits.
    """
    if bulge == 0.0:
        return 0.0
    whole, radius = _arc(chord, bulge)
    angle = whole / count
    if angle > 0.02:
        segment = angle - math.sin(angle)
    else:
        segment = angle**3 / 6 * (1 - angle**2 / 20 * (1 - angle**2 / 42))
    return math.copysign(segment * radius**2 / 2, bulge)


def _arc_points(start: Array, end: Array, bulge: float, sagitta: float, step: float) -> Array:
    """Points of a side from its first corner on, without the last corner: shape (k, 2)."""
    if bulge == 0.0:
        return start[None, :]
    chord = end - start
    length = math.hypot(*chord)
    angle, radius = _arc(length, bulge)
    count = _chord_count(angle, radius, sagitta, step)
    right = np.array([chord[1], -chord[0]]) / length
    centre = (start + end) / 2 + right * (bulge - math.copysign(radius, bulge))
    turn = math.copysign(angle / count, bulge) * np.arange(count)
    spoke = start - centre
    return np.column_stack(
        (
            centre[0] + spoke[0] * np.cos(turn) - spoke[1] * np.sin(turn),
            centre[1] + spoke[0] * np.sin(turn) + spoke[1] * np.cos(turn),
        )
    )
