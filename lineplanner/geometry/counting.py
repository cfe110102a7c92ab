"""Which part of a face is wet, carries current and is significant: masks, contact marks, hole rules."""

import math
from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Literal, NamedTuple

import numpy as np
from numpy.typing import NDArray

from lineplanner.errors import Fact, Quantity
from lineplanner.geometry.faces import Face, Opening, Shape
from lineplanner.geometry.surface import Flat
from lineplanner.inputs.part import Common, Mask, Stated, Texture
from lineplanner.quantities import AREA, COUNT, LENGTH, RATIO

Array = NDArray[np.float64]
Flags = NDArray[np.bool_]

ReasonKey = Literal[
    "dry-above-level", "masked", "plugged", "contact-mark", "part-surface-factor", "surface-factor",
    "thread-factor", "hole-deeper-than-counted", "floor-not-reached", "hole-rule-all", "hole-rule-none",
    "deeper-than-promised", "not-significant", "significant-stated", "chords", "box-share",
]  # fmt: skip


@dataclass(frozen=True, slots=True)
class Reason:
    """Why an area of a face is what it is: a message key and named facts."""

    key: ReasonKey
    facts: Mapping[str, Fact] = field(default_factory=dict)


class Rules(NamedTuple):
    """The process's numbers.

    Depth of a hole that carries current and depth that is promised, both in diameters from each open end;
    true over drawn wall of a tapped hole.
    """

    hole_ratio: float
    promise_ratio: float
    thread_factor: float


@dataclass(frozen=True, slots=True)
class Count:
    """A face under the rules.

    cuts in m; of each element the whole area in m^2, shape (elements,), and the weights that turn an area
    into its wet, carrying and significant share, shape (3, elements).
    """

    face: Face
    cuts: tuple[float, ...]
    areas: Array
    weights: Array
    factor: float
    why: tuple[Reason, ...]


def count(shape: Shape, face: Face, rules: Rules) -> Count:
    """What counts of one face, whatever the level."""
    part = shape.part
    masks = [mask for mask in part.masks if mask.face == face.name]
    textures = [texture for texture in part.textures if texture.face == face.name]
    cuts = _cuts(face, masks, textures, rules)
    stations, areas = face.surface.stations(cuts), face.surface.areas(cuts)
    opening = face.opening
    free = ~_covered(face, masks, stations)
    if opening is not None and opening.plugged:
        free &= False
    factors, factor_why = _factors(part, opening, textures, stations, rules)
    marked, mark_why = _contact_share(part, face, float(areas @ free))
    counted, counted_why = _counted(face, stations, rules)
    promised, promised_why = _promised(face, stations, rules)
    significant, significant_why = _significant(part, face, float(areas @ (free * factors)))
    wet = free * factors * (1 - marked)
    carrying = wet * counted
    weights = np.stack((wet, carrying, carrying * promised * significant))
    why = [*_covered_why(opening, float(areas @ ~free)), *mark_why, *factor_why]
    if free.any():
        why += [*counted_why, *significant_why]
        why += promised_why if significant > 0.0 and (promised < counted).any() else ()
    whole = float(areas @ free) or 1.0
    factor = float(areas @ (free * factors)) / whole if free.any() else float(factors.max())
    return Count(face, cuts, areas, weights, factor, tuple(why))


def _cuts(face: Face, masks: list[Mask], textures: list[Texture], rules: Rules) -> tuple[float, ...]:
    if isinstance(face.surface, Flat):
        return ()
    bands: list[Mask | Texture] = [*masks, *textures]
    cuts = [end for band in bands for end in (band.start, band.end) if end is not None]
    low, high = face.surface.span
    for opening in (face.opening,) if face.opening is not None else ():
        for ratio in (rules.hole_ratio, rules.promise_ratio):
            cuts += [low + ratio * opening.diameter] if opening.open_low else []
            cuts += [high - ratio * opening.diameter] if opening.open_high else []
    return tuple(sorted(set(cuts)))


def _within(stations: Array, band: Mask | Texture) -> Flags:
    """A shoulder where a band ends is not in it."""
    start = -math.inf if band.start is None else band.start
    end = math.inf if band.end is None else band.end
    return (stations > start) & (stations < end)


def _covered(face: Face, masks: list[Mask], stations: Array) -> Flags:
    covered = np.zeros(len(stations), dtype=bool)
    if isinstance(face.surface, Flat) and face.surface.covered is not None:
        covered[1] = True
    for mask in masks:
        if mask.outline is None:
            covered |= _within(stations, mask)
    return covered


def _covered_why(opening: Opening | None, area: float) -> list[Reason]:
    if area <= 0.0:
        return []
    key: ReasonKey = "plugged" if opening is not None and opening.plugged else "masked"
    return [Reason(key, {"area": Quantity(area, AREA)})]


def _factors(
    part: Common, opening: Opening | None, textures: list[Texture], stations: Array, rules: Rules
) -> tuple[Array, list[Reason]]:
    factors, why = np.full(len(stations), part.surface_factor), []
    if part.surface_factor != 1.0:
        why.append(Reason("part-surface-factor", {"factor": Quantity(part.surface_factor, RATIO)}))
    for texture in textures:
        factors[_within(stations, texture)] *= texture.factor
        why.append(
            Reason("surface-factor", {"factor": Quantity(texture.factor, RATIO), "because": texture.why})
        )
    if opening is not None and opening.threaded and not opening.floor:
        factors *= rules.thread_factor
        why.append(Reason("thread-factor", {"factor": Quantity(rules.thread_factor, RATIO)}))
    return factors, why


def _contact_share(part: Common, face: Face, free: float) -> tuple[float, list[Reason]]:
    """The share of a face's free area that its contact marks take."""
    marks = [contact for contact in part.contacts if contact.face == face.name]
    taken = math.fsum(contact.count * contact.area for contact in marks)
    if taken <= 0.0 or free <= 0.0:
        return 0.0, []
    number = Quantity(sum(contact.count for contact in marks), COUNT)
    return min(taken / free, 1.0), [Reason("contact-mark", {"count": number, "area": Quantity(taken, AREA)})]


def _counted(face: Face, stations: Array, rules: Rules) -> tuple[Flags, list[Reason]]:
    """Whether each element carries current, by the rule for holes and bores."""
    everything, opening = np.ones(len(stations), dtype=bool), face.opening
    if opening is None or opening.plugged:
        return everything, []
    if opening.rule == "all":
        return everything, [Reason("hole-rule-all")]
    if opening.rule == "none":
        return ~everything, [Reason("hole-rule-none")]
    counted = _reached(face, opening, stations, rules.hole_ratio)
    if counted.all():
        return counted, []
    key: ReasonKey = "floor-not-reached" if opening.floor else "hole-deeper-than-counted"
    return counted, [_depth_reason(key, opening, rules.hole_ratio)]


def _promised(face: Face, stations: Array, rules: Rules) -> tuple[Flags, list[Reason]]:
    """Whether the thickness of each element is promised."""
    opening = face.opening
    if opening is None:
        return np.ones(len(stations), dtype=bool), []
    promised = _reached(face, opening, stations, rules.promise_ratio)
    return promised, [_depth_reason("deeper-than-promised", opening, rules.promise_ratio)]


def _reached(face: Face, opening: Opening, stations: Array, ratio: float) -> Flags:
    reach = ratio * opening.diameter
    if opening.floor:
        return np.full(len(stations), reach >= opening.depth)
    low, high = face.surface.span
    from_low = stations < low + reach if opening.open_low else np.zeros(len(stations), dtype=bool)
    from_high = stations > high - reach if opening.open_high else np.zeros(len(stations), dtype=bool)
    return from_low | from_high


def _depth_reason(key: ReasonKey, opening: Opening, ratio: float) -> Reason:
    """depth: of the opening; reach: how deep from each of its open ends the rule goes."""
    ends = int(opening.open_low) + int(opening.open_high)
    facts: dict[str, Fact] = {
        "depth": Quantity(opening.depth, LENGTH),
        "diameter": Quantity(opening.diameter, LENGTH),
        "reach": Quantity(ratio * opening.diameter, LENGTH),
        "ends": Quantity(ends, COUNT),
    }
    return Reason(key, facts)


def _significant(part: Common, face: Face, carrying: float) -> tuple[float, list[Reason]]:
    """The share of a face's carrying area where the thickness is promised."""
    if part.significant and face.name not in part.significant:
        return 0.0, [Reason("not-significant")]
    if isinstance(part, Stated) and part.significant_area is not None and carrying > 0.0:
        share = min(part.significant_area / carrying, 1.0)
        return share, [Reason("significant-stated", {"area": Quantity(part.significant_area, AREA)})]
    return 1.0, []
