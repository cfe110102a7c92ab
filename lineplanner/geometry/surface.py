"""What a face can be, and how much of it lies below a level.

Each surface lives in the axes a, b, c of its part (c along the part's axis). It is made of elements that
masks, textures and hole rules tell apart: the stretches of a wall between cuts, its shoulders, the free and
the covered zone of a flat face. `areas` is the whole of each element, `below` what of it is lower than
`level`, a height over the hanging point in metres. What lies exactly at the level is dry.
"""

import math
from dataclasses import dataclass, field
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry.outline import Circle, Line, Loop
from lineplanner.geometry.pose import Slope

Array = NDArray[np.float64]
NO_CUTS: tuple[float, ...] = ()


class Surface(Protocol):
    """What counting and ledger need of a face."""

    @property
    def span(self) -> tuple[float, float]:
        """Where it begins and ends along the axis, in m."""
        ...

    def stations(self, cuts: tuple[float, ...]) -> Array:
        """One place on the axis inside each element, in m: shape (elements,)."""
        ...

    def areas(self, cuts: tuple[float, ...]) -> Array:
        """Area of each element in m^2: shape (elements,)."""
        ...

    def below(self, cuts: tuple[float, ...], slope: Slope, level: float) -> Array:
        """Area of each element below the level in m^2: shape (elements,)."""
        ...


@dataclass(frozen=True, slots=True)
class Edges:
    """Sides of flat regions: starts and ends (n, 2) in m, around material counter-clockwise.

    slivers (n,): area in m^2 between each chord and its arc, negative where the arc lies within the chord.
    """

    starts: Array
    ends: Array
    slivers: Array
    area: float

    def below(self, slope: Slope, depth: float) -> float:
        """Area in m^2 within the sides and below the level; depth of the level over the slope's origin in m.

        Green's theorem: each side carries the strip between itself and the level, so no polygon is cut.
        """
        steep = slope.across
        start = (depth - self.starts @ (slope.a, slope.b)) / steep
        end = (depth - self.ends @ (slope.a, slope.b)) / steep
        if start.min() >= 0.0:
            return self.area
        if start.max() <= 0.0:
            return 0.0
        along = ((self.ends - self.starts) @ (slope.b, -slope.a)) / steep
        depths, share = _depths(start, end)
        return float(depths @ along + share @ self.slivers)


def _depths(start: Array, end: Array) -> tuple[Array, Array]:
    """Mean depth of straight sides, counting only what is below the level, and the share of each that is."""
    high, low = np.maximum(start, end), np.minimum(start, end)
    crossing = (high > 0.0) & (low < 0.0)
    share = np.where(crossing, high / np.where(crossing, high - low, 1.0), high > 0.0)
    mean = np.where(crossing, share * high / 2, np.maximum((high + low) / 2, 0.0))
    return mean, share


def edges_of(*signed: tuple[Line, int]) -> Edges | None:
    """The sides of lines of chords; sign +1 around material, -1 around an opening. Circles are left out."""
    chords = [(line, sign, line.ring()) for line, sign in signed if isinstance(line, Loop)]
    if not chords:
        return None
    starts = [ring.points for _, _, ring in chords]
    ends = [np.roll(ring.points, -1, axis=0) for _, _, ring in chords]
    facing = [
        pair if sign > 0 else pair[::-1]
        for pair, (_, sign, _) in zip(zip(starts, ends, strict=True), chords, strict=True)
    ]
    return Edges(
        np.concatenate([start for start, _ in facing]),
        np.concatenate([end for _, end in facing]),
        np.concatenate([sign * ring.slivers for _, sign, ring in chords]),
        math.fsum(sign * line.area for line, sign, _ in chords),
    )


@dataclass(frozen=True, slots=True)
class Flat:
    """A flat face square to the axis: lines with +1 around material and -1 around openings, at c in m."""

    at: float
    lines: tuple[tuple[Line, int], ...]
    covered: Edges | None = None
    covered_area: float = 0.0
    edges: Edges | None = field(init=False)
    area: float = field(init=False)

    def __post_init__(self) -> None:
        object.__setattr__(self, "edges", edges_of(*self.lines))
        object.__setattr__(self, "area", math.fsum(sign * line.area for line, sign in self.lines))

    @property
    def span(self) -> tuple[float, float]:
        return self.at, self.at

    @property
    def curved(self) -> bool:
        return any(isinstance(line, Loop) and line.curved for line, _ in self.lines)

    def stations(self, cuts: tuple[float, ...]) -> Array:  # noqa: ARG002
        return np.full(1 if self.covered is None else 2, self.at)

    def areas(self, cuts: tuple[float, ...]) -> Array:  # noqa: ARG002
        return self._split(self.area, self.covered_area)

    def below(self, cuts: tuple[float, ...], slope: Slope, level: float) -> Array:
        depth = level - slope.base - slope.c * self.at
        if slope.across == 0.0:
            return self.areas(cuts) * float(depth > 0.0)
        whole = sum(
            sign * disc_below(line, slope, depth) for line, sign in self.lines if isinstance(line, Circle)
        )
        if self.edges is not None:
            whole += self.edges.below(slope, depth)
        covered = 0.0 if self.covered is None else self.covered.below(slope, depth)
        return self._split(min(max(whole, 0.0), self.area), min(max(covered, 0.0), self.covered_area))

    def _split(self, whole: float, covered: float) -> Array:
        return np.array([whole] if self.covered is None else [max(whole - covered, 0.0), covered])


def disc_below(circle: Circle, slope: Slope, depth: float) -> float:
    """Circular segment below the level, in m^2."""
    centre = depth - circle.centre[0] * slope.a - circle.centre[1] * slope.b
    x = min(max(centre / (slope.across * circle.radius), -1.0), 1.0)
    return circle.radius**2 * (math.pi - math.acos(x) + x * math.sqrt(1 - x * x))


@dataclass(frozen=True, slots=True)
class StraightWall:
    """Side wall of a prism: sides (n, 2) and true lengths (n,) in m, from low to high along the axis."""

    starts: Array
    ends: Array
    lengths: Array
    low: float
    high: float
    curved: bool = False

    @property
    def span(self) -> tuple[float, float]:
        return self.low, self.high

    def stations(self, cuts: tuple[float, ...]) -> Array:
        lows, highs = stretches(self.low, self.high, cuts)
        return (lows + highs) / 2

    def areas(self, cuts: tuple[float, ...]) -> Array:
        lows, highs = stretches(self.low, self.high, cuts)
        return (highs - lows) * math.fsum(self.lengths)

    def below(self, cuts: tuple[float, ...], slope: Slope, level: float) -> Array:
        lows, highs = stretches(self.low, self.high, cuts)
        start = self.starts @ (slope.a, slope.b)
        along = np.abs((self.ends - self.starts) @ (slope.a, slope.b))
        lowest = np.minimum(start, self.ends @ (slope.a, slope.b))
        rises = np.abs(slope.c) * (highs - lows)
        feet = slope.base + np.minimum(slope.c * lows, slope.c * highs)
        depth = level - feet[:, None] - lowest
        if (depth > 0.0).all() and (depth >= along + rises[:, None]).all():
            return self.areas(cuts)
        share = parallelogram_share(depth, along, rises[:, None])
        return np.minimum((share @ self.lengths) * (highs - lows), self.areas(cuts))


def parallelogram_share(depth: Array, one: Array, other: Array) -> Array:
    """Share of parallelograms below the level; depth of the lowest corner, rises along both sides, in m.

    The height over a parallelogram is the sum of two even spreads; written piece by piece, nothing cancels.
    """
    more, less = np.maximum(one, other), np.minimum(one, other)
    full = more + less
    some = np.where(more > 0.0, more, 1.0)
    small = 2 * some * np.where(less > 0.0, less, 1.0)
    share = np.where(depth <= less, np.maximum(depth, 0.0) ** 2 / small, (depth - less / 2) / some)
    share = np.where(depth > more, 1 - np.maximum(full - depth, 0.0) ** 2 / small, share)
    return np.where(depth <= 0.0, 0.0, np.where(depth >= full, 1.0, share))


@dataclass(frozen=True, slots=True)
class BoxShare:
    """An area somebody stated, spread evenly over the height of its box; corners (8, 3) in m."""

    area: float
    corners: Array

    @property
    def span(self) -> tuple[float, float]:
        return float(self.corners[:, 2].min()), float(self.corners[:, 2].max())

    def stations(self, cuts: tuple[float, ...]) -> Array:  # noqa: ARG002
        return np.zeros(1)

    def areas(self, cuts: tuple[float, ...]) -> Array:  # noqa: ARG002
        return np.array([self.area])

    def below(self, cuts: tuple[float, ...], slope: Slope, level: float) -> Array:  # noqa: ARG002
        heights = slope.base + self.corners @ (slope.a, slope.b, slope.c)
        low, high = float(heights.min()), float(heights.max())
        return np.array([self.area * min(max((level - low) / (high - low), 0.0), 1.0)])


def stretches(low: float, high: float, cuts: tuple[float, ...]) -> tuple[Array, Array]:
    """Begins and ends of the stretches of an axis between cuts, in m."""
    marks = np.array([low, *sorted({cut for cut in cuts if low < cut < high}), high])
    return marks[:-1], marks[1:]
