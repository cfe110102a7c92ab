"""Openings and hollows against the outline and against each other."""

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np
import shapely
from numpy.typing import NDArray
from shapely.geometry.base import BaseGeometry

from lineplanner.errors import Fact, Problem, Quantity
from lineplanner.geometry.outline_rules import place
from lineplanner.geometry.values import Path
from lineplanner.inputs.part import Slot
from lineplanner.quantities import LENGTH

_TOUCH = 1e-9  # metres: openings this near are touching


@dataclass(frozen=True, slots=True)
class Cutout:
    """An opening as a spine widened by a radius, exact for holes and slots; a hollow is its own spine."""

    name: str
    path: Path
    spine: BaseGeometry
    radius: float


def cutout_problems(material: BaseGeometry, cutouts: list[Cutout]) -> Iterator[Problem]:
    """What an opening must not do.

    opening-outside-outline {opening, u, v}; opening-breaks-edge {opening, distance, needed}: distance of its
    middle, and what that must exceed; openings-overlap {opening, other, distance, needed}.
    """
    if not cutouts:
        return
    spines = np.array([cutout.spine for cutout in cutouts])
    radii = np.array([cutout.radius for cutout in cutouts])
    to_edge = shapely.distance(spines, shapely.boundary(material)).tolist()
    inside = shapely.contains_properly(material, spines).tolist()
    for cutout, distance, within in zip(cutouts, to_edge, inside, strict=True):
        facts: dict[str, Fact] = {"opening": cutout.name}
        if not within and not shapely.intersects(material, cutout.spine):
            u, v = shapely.get_coordinates(shapely.centroid(cutout.spine))[0].tolist()
            yield Problem(cutout.path, "opening-outside-outline", facts | place((u, v)))
        elif not within or distance <= cutout.radius + _TOUCH:
            facts |= {"distance": _length(distance if within else 0.0), "needed": _length(cutout.radius)}
            yield Problem(cutout.path, "opening-breaks-edge", facts)
    for first, second in _near_pairs(spines, radii):
        distance = float(shapely.distance(spines[first], spines[second]))
        needed = float(radii[first] + radii[second])
        if distance <= needed + _TOUCH:
            facts = {"opening": cutouts[second].name, "other": cutouts[first].name}
            facts |= {"distance": _length(distance), "needed": _length(needed)}
            yield Problem(cutouts[second].path, "openings-overlap", facts)


def _near_pairs(spines: NDArray[np.object_], radii: NDArray[np.float64]) -> list[tuple[int, int]]:
    reach = float(2 * radii.max()) + 2 * _TOUCH
    one, other = shapely.STRtree(spines).query(spines, predicate="dwithin", distance=reach)
    return sorted((a, b) for a, b in zip(one.tolist(), other.tolist(), strict=True) if a < b)


def spine_of(slot: Slot) -> BaseGeometry:
    """The middle line of a slot, in m."""
    half = max(slot.length - slot.width, 0.0) / 2
    if half == 0.0:
        return shapely.Point(slot.at)
    reach = half * np.array((np.cos(slot.turn), np.sin(slot.turn)))
    return shapely.LineString([slot.at - reach, slot.at + reach])


def _length(value: float) -> Quantity:
    return Quantity(value, LENGTH)
