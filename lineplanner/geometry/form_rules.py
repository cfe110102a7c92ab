"""What makes a form of part unusable: depths, the profile, bores; openings by opening_rules."""

from collections.abc import Iterator
from itertools import pairwise

import numpy as np
import shapely

from lineplanner.errors import Fact, Problem, Quantity
from lineplanner.geometry.opening_rules import Cutout, cutout_problems, spine_of
from lineplanner.geometry.outline_rules import SLACK
from lineplanner.geometry.values import Path
from lineplanner.geometry.zones import outline_region
from lineplanner.inputs.part import Bore, Hole, Plate, ProfilePoint, Section, Slot, Tube, Turned
from lineplanner.quantities import COUNT, LENGTH


def plate_problems(part: Plate) -> Iterator[Problem]:
    """slot-shorter-than-wide {slot, length, width}; blind-too-deep {opening, depth, limit}; cutouts."""
    cutouts = [
        Cutout(f"hole-{n}", ("holes", n - 1), shapely.Point(hole.at), hole.diameter / 2)
        for n, hole in enumerate(part.holes, 1)
    ]
    for number, slot in enumerate(part.slots, 1):
        path: Path = ("slots", number - 1)
        if slot.length < slot.width * (1 - SLACK):
            facts: dict[str, Fact] = {"slot": f"slot-{number}", "length": _length(slot.length)}
            yield Problem((*path, "length"), "slot-shorter-than-wide", facts | {"width": _length(slot.width)})
        else:
            cutouts.append(Cutout(f"slot-{number}", path, spine_of(slot), slot.width / 2))
    kinds: list[tuple[str, tuple[Hole | Slot, ...]]] = [("hole", part.holes), ("slot", part.slots)]
    for kind, openings in kinds:
        for number, opening in enumerate(openings, 1):
            if opening.depth is not None and opening.depth >= part.thickness:
                yield _too_deep(f"{kind}-{number}", (f"{kind}s", number - 1), opening.depth, part.thickness)
    yield from cutout_problems(outline_region(part.outline), cutouts)


def section_problems(part: Section) -> Iterator[Problem]:
    """hollow-not-simple {hollow}; cutout problems."""
    cutouts = []
    for number, hollow in enumerate(part.hollows, 1):
        path: Path = ("hollows", number - 1)
        if hollow.shape == "ring":
            yield Problem(path, "hollow-not-simple", {"hollow": f"hollow-{number}"})
        else:
            cutouts.append(Cutout(f"hollow-{number}", path, outline_region(hollow), 0.0))
    yield from cutout_problems(outline_region(part.outline), cutouts)


def tube_problems(part: Tube) -> Iterator[Problem]:
    """tube-inner-not-smaller {inner, outer}."""
    if part.inner_diameter >= part.diameter:
        facts = {"inner": _length(part.inner_diameter), "outer": _length(part.diameter)}
        yield Problem(("inner_diameter",), "tube-inner-not-smaller", facts)


def turned_problems(part: Turned) -> Iterator[Problem]:
    """Of the profile, then of the bores in a sound profile."""
    profile = list(_profile_problems(part.profile))
    yield from profile
    if not profile:
        yield from _bore_problems(part)


def _profile_problems(profile: tuple[ProfilePoint, ...]) -> Iterator[Problem]:
    """What a profile must not do.

    profile-too-short {count}; profile-goes-back {axis, before}; profile-point-repeated {axis, radius};
    profile-shoulder-twice {axis}; profile-flange-without-thickness {axis}; profile-without-body {axis}.
    """
    if len(profile) < 2 or profile[-1].axis == profile[0].axis:
        yield Problem(("profile",), "profile-too-short", {"count": Quantity(len(profile), COUNT)})
        return
    for number, (before, point) in enumerate(pairwise(profile), 1):
        path: Path = ("profile", number)
        if point.axis < before.axis:
            facts = {"axis": _length(point.axis), "before": _length(before.axis)}
            yield Problem((*path, "axis"), "profile-goes-back", facts)
        elif point == before:
            facts = {"axis": _length(point.axis), "radius": _length(point.radius)}
            yield Problem(path, "profile-point-repeated", facts)
        elif number > 1 and point.axis == before.axis == profile[number - 2].axis:
            yield Problem(path, "profile-shoulder-twice", {"axis": _length(point.axis)})
    yield from _body_problems(profile)


def _body_problems(profile: tuple[ProfilePoint, ...]) -> Iterator[Problem]:
    first, last = profile[0].axis, profile[-1].axis
    for number, (before, point) in enumerate(pairwise(profile), 1):
        axis = {"axis": _length(point.axis)}
        at_start, at_end = point.axis == before.axis == first, point.axis == before.axis == last
        if (at_start and point.radius < before.radius) or (at_end and point.radius > before.radius):
            yield Problem(("profile", number), "profile-flange-without-thickness", axis)
    for number, point in enumerate(profile):
        ends = number in (0, len(profile) - 1)
        lone = number > 0 and point.radius == profile[number - 1].radius == 0.0
        if point.radius == 0.0 and (not ends or lone):
            yield Problem(
                ("profile", number, "radius"), "profile-without-body", {"axis": _length(point.axis)}
            )


def _bore_problems(part: Turned) -> Iterator[Problem]:
    """What bores must not do.

    bores-share-mouth {mouth}; blind-too-deep {opening, depth, limit}; bores-meet {depth, limit};
    bore-too-large {diameter, axis, part_diameter}, where the part is thinnest along the bore.
    """
    low, high = part.profile[0].axis, part.profile[-1].axis
    blind = []
    for number, bore in enumerate(part.bores):
        path: Path = ("bores", number)
        if bore.depth is not None and bore.depth >= high - low:
            yield _too_deep(f"bore-{number + 1}", path, bore.depth, high - low)
            continue
        yield from _bore_fits(part.profile, bore, path)
        others = [other for other in part.bores[:number] if _same_mouth(bore, other)]
        if others:
            yield Problem(path, "bores-share-mouth", {"mouth": bore.mouth})
        elif bore.depth is not None:
            blind.append(bore.depth)
    if len(blind) == 2 and sum(blind) >= high - low:
        yield Problem(("bores",), "bores-meet", {"depth": _length(sum(blind)), "limit": _length(high - low)})


def _bore_fits(profile: tuple[ProfilePoint, ...], bore: Bore, path: Path) -> Iterator[Problem]:
    low, high = profile[0].axis, profile[-1].axis
    depth = high - low if bore.depth is None else bore.depth
    begin, end = (low, low + depth) if bore.mouth == "bottom" or bore.depth is None else (high - depth, high)
    stations = [(p.axis, p.radius) for p in profile if begin <= p.axis <= end]
    axes, radii = [p.axis for p in profile], [p.radius for p in profile]
    inner = end if begin == low else begin
    stations.append((inner, float(np.interp(inner, axes, radii))))
    axis, radius = min(_reached(stations, profile, begin, end), key=lambda station: station[1])
    if radius <= bore.diameter / 2:
        facts = {
            "diameter": _length(bore.diameter),
            "axis": _length(axis),
            "part_diameter": _length(2 * radius),
        }
        yield Problem((*path, "diameter"), "bore-too-large", facts)


def _reached(
    stations: list[tuple[float, float]], profile: tuple[ProfilePoint, ...], begin: float, end: float
) -> list[tuple[float, float]]:
    """Without the inner radius of a step at the very end face, where the wider one closes the part."""
    closing = {p.axis: max(q.radius for q in profile if q.axis == p.axis) for p in (profile[0], profile[-1])}
    return [(axis, closing.get(axis, radius)) for axis, radius in stations if begin <= axis <= end]


def _same_mouth(bore: Bore, other: Bore) -> bool:
    return bore.depth is None or other.depth is None or bore.mouth == other.mouth


def _too_deep(opening: str, path: Path, depth: float, limit: float) -> Problem:
    facts: dict[str, Fact] = {"opening": opening, "depth": _length(depth), "limit": _length(limit)}
    return Problem((*path, "depth"), "blind-too-deep", facts)


def _length(value: float) -> Quantity:
    return Quantity(value, LENGTH)
