"""A wall around an axis: cylinder, cones and shoulders, and how much of it lies below a level.

At each place on the axis the wet share of the circle is closed, 1 - arccos(x)/pi with x the depth of the
level over the axis in radii; along the axis it is integrated between the kinks where the level leaves the
wall.
"""

import math
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry.outline import Circle, Line
from lineplanner.geometry.pose import Slope
from lineplanner.geometry.surface import StraightWall, disc_below, stretches
from lineplanner.inputs.memo import Memo

Array = NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class RoundWall:
    """Wall around an axis at (a, b) = centre, in m.

    pieces (n, 4): c and radius of their low end, c and radius of their high end; shoulders (k, 3): c, inner
    and outer radius.
    """

    centre: tuple[float, float]
    pieces: Array
    shoulders: Array

    @property
    def span(self) -> tuple[float, float]:
        return float(self.pieces[0, 0]), float(self.pieces[-1, 2])

    @property
    def _plain(self) -> bool:
        """Whether it is a single cylinder."""
        return len(self.pieces) == 1 and bool(self.pieces[0, 1] == self.pieces[0, 3])

    def stations(self, cuts: tuple[float, ...]) -> Array:
        lows, highs = stretches(*self.span, cuts)
        return np.concatenate(((lows + highs) / 2, self.shoulders[:, 0]))

    def areas(self, cuts: tuple[float, ...]) -> Array:
        return _AREAS.get(self, cuts, lambda: self._areas(cuts))

    def _areas(self, cuts: tuple[float, ...]) -> Array:
        low, low_radius, high, high_radius = self._cut(cuts)
        slant = np.hypot(high - low, high_radius - low_radius)
        walls = np.sum(math.pi * (low_radius + high_radius) * slant, axis=1)
        return np.concatenate((walls, math.pi * (self.shoulders[:, 2] ** 2 - self.shoulders[:, 1] ** 2)))

    def below(self, cuts: tuple[float, ...], slope: Slope, level: float) -> Array:
        depth = level - slope.base - self.centre[0] * slope.a - self.centre[1] * slope.b
        if slope.c == 0.0 and self._plain:  # the axis lies level: one share for all of the wall
            return self.areas(cuts) * _circle_share(depth / (slope.across * float(self.pieces[0, 1])))
        low, high = self._heights(slope)
        if depth > high or depth < low:
            return self.areas(cuts) * float(depth > high)
        walls = np.sum(_cones_below(self._cut(cuts), slope, depth), axis=1)
        shoulders = [_annulus_below(row, slope, depth) for row in self.shoulders.tolist()]
        return np.clip(np.concatenate((walls, shoulders)), 0.0, self.areas(cuts))

    def _heights(self, slope: Slope) -> tuple[float, float]:
        """Lowest and highest point over the axis at c = 0."""
        c, reach = self.pieces[:, ::2] * slope.c, self.pieces[:, 1::2] * slope.across
        return float((c - reach).min()), float((c + reach).max())

    def _cut(self, cuts: tuple[float, ...]) -> tuple[Array, Array, Array, Array]:
        """Low end, its radius, high end, its radius of each piece within each stretch: (stretches, n)."""
        lows, highs = stretches(*self.span, cuts)
        c0, r0, c1, r1 = self.pieces.T
        low, high = np.clip(lows[:, None], c0, c1), np.clip(highs[:, None], c0, c1)
        rate = (r1 - r0) / (c1 - c0)
        return low, r0 + rate * (low - c0), high, r0 + rate * (high - c0)


_AREAS: Memo[RoundWall, Array] = Memo(4096)


def _circle_share(x: float) -> float:
    """Share of a circle's line below a level x radii over its centre."""
    return 1 - math.acos(min(max(x, -1.0), 1.0)) / math.pi


# Nodes on [0, 1] and weights: Gauss-Legendre in an angle, which takes the root out of both ends of a panel.
_X, _W = np.polynomial.legendre.leggauss(20)
_ANGLE = math.pi / 2 * (_X + 1)
_NODES = (1 - np.cos(_ANGLE)) / 2
_WEIGHTS = _W * np.sin(_ANGLE) * math.pi / 4
_FLAT_AS_NOTHING = 1e-290  # stands in for no radius or no slope: the share is then 0 or 1


def _cones_below(pieces: tuple[Array, Array, Array, Array], slope: Slope, depth: float) -> Array:
    """Wall of cones below the level in m^2; depth of the level over the axis at c = 0."""
    low, low_radius, high, high_radius = pieces
    length = high - low
    rate = np.divide(high_radius - low_radius, length, out=np.zeros_like(length), where=length > 0.0)
    foot = low_radius - rate * low
    kinks = [_kink(depth, slope, sign, (foot, rate, low, high)) for sign in (-1.0, 1.0)]
    marks = np.sort(np.stack((low, *kinks, high)), axis=0)
    begin, size = marks[:-1, ..., None], np.diff(marks, axis=0)[..., None]
    c = begin + size * _NODES
    radius = np.maximum(foot[..., None] + rate[..., None] * c, 0.0)
    x = (depth - slope.c * c) / np.maximum(slope.across * radius, _FLAT_AS_NOTHING)
    share = 1 - np.arccos(np.clip(x, -1.0, 1.0)) / math.pi
    turns = np.sum((radius * share * size) @ _WEIGHTS, axis=0)
    wall: Array = math.tau * turns * np.hypot(1.0, rate)
    return wall


def _kink(depth: float, slope: Slope, sign: float, cone: tuple[Array, Array, Array, Array]) -> Array:
    """Where the level leaves the lowest (sign -1) or the highest (+1) line of a cone, kept within it.

    cone: radius at c = 0, its rate, low and high end.
    """
    foot, rate, low, high = cone
    fall = slope.c + sign * slope.across * rate
    place = np.divide(depth - sign * slope.across * foot, fall, out=low.copy(), where=np.abs(fall) > 1e-12)
    return np.clip(place, low, high)


def _annulus_below(shoulder: list[float], slope: Slope, depth: float) -> float:
    at, inner, outer = shoulder
    level = depth - slope.c * at
    if slope.across == 0.0:
        return math.pi * (outer**2 - inner**2) * float(level > 0.0)
    rim = disc_below(Circle((0.0, 0.0), outer), slope, level)
    return rim - (disc_below(Circle((0.0, 0.0), inner), slope, level) if inner > 0.0 else 0.0)


def wall_of(line: Line, low: float, high: float) -> StraightWall | RoundWall:
    """The wall over a closed line, from low to high along the axis in m."""
    if isinstance(line, Circle):
        pieces = np.array([(low, line.radius, high, line.radius)])
        return RoundWall(line.centre, pieces, np.empty((0, 3)))
    ring = line.ring()
    return StraightWall(ring.points, np.roll(ring.points, -1, axis=0), ring.lengths, low, high, line.curved)
