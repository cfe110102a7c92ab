"""A field of tips filled in a pattern."""

import re
from collections.abc import Mapping
from dataclasses import replace
from typing import Literal

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import Tip, tip_places
from lineplanner.inputs.load import Load
from lineplanner.inputs.rack import Rack, Spot
from lineplanner.racking.places import Key, Racked, in_hand, places_of, racked
from lineplanner.racking.tips import free_groups, sides_of, taken_of

Pattern = Literal["every tip", "every second", "checkerboard"]
PATTERNS: tuple[Pattern, ...] = ("every tip", "every second", "checkerboard")
_CORNERS = re.compile(r"\s*(?P<first>\S+?)\s*(?:-\s*(?P<last>\S+))?\s*")
_EVEN = 1e-6  # m


def filled(load: Load, rack: Rack, key: Key, pattern: Pattern, field: str = "") -> Racked:
    """More of the part in hand on the free tips of a field.

    field names two tips at opposite corners (A1-C4), one row (A) or rows (A-C); nothing means the whole rack.
    The pattern counts from the first tip of the field, row by row. Raises InputError for a field that is none.
    """
    places = places_of(load)
    (key,) = in_hand(places, [key])
    place = places[key]
    if place.at is not None:
        raise InputError("racking.no_tips", rack=load.rack)
    inside, taken = _field(rack, field), taken_of(load)
    wanted = set(_in_pattern(inside, pattern))
    new = []
    for group in free_groups(rack, place.how, taken):
        sides = sides_of(place.how)
        if wanted.issuperset(group) and all((name, side) not in taken for name in group for side in sides):
            new.append(replace(place, tips=group))
            taken |= {(name, side) for name in group for side in sides}
    if not new:
        raise InputError("racking.field_full")
    return racked(load, [*places.values(), *new], new[-1:])


def field_between(rack: Rack, one: Spot, other: Spot) -> str:
    """The field of tips between two spots, by its corners; empty where no tip lies there."""
    (left, right), (high, low) = (sorted(pair) for pair in zip(one, other, strict=True))
    inside = [tip for tip in tip_places(rack).values() if left <= tip.x <= right and high <= tip.drop <= low]
    if not inside:
        return ""
    first = min(inside, key=lambda tip: (tip.drop + tip.x, tip.drop))
    last = max(inside, key=lambda tip: (tip.drop + tip.x, tip.drop))
    return f"{first.name}-{last.name}"


def _field(rack: Rack, field: str) -> list[Tip]:
    """The tips of a field in the order of the rack."""
    places = tip_places(rack)
    match = _CORNERS.fullmatch(field)
    if match is None:
        return list(places.values())
    first, last = match["first"], match["last"] or match["first"]
    if first in places and last in places:
        (x0, x1), (d0, d1) = (
            sorted((getattr(places[first], of), getattr(places[last], of))) for of in ("x", "drop")
        )
        return [
            tip
            for tip in places.values()
            if x0 - _EVEN <= tip.x <= x1 + _EVEN and d0 - _EVEN <= tip.drop <= d1 + _EVEN
        ]
    rows = [row.name for row in rack.tips]
    if first not in rows or last not in rows:
        raise InputError("racking.no_field", field=field[:40])
    low, high = sorted((rows.index(first), rows.index(last)))
    return [tip for tip in places.values() if tip.row.name in rows[low : high + 1]]


def _in_pattern(tips: list[Tip], pattern: Pattern) -> list[str]:
    """The names of those tips that a pattern takes."""
    rows: Mapping[str, list[str]] = {}
    for tip in tips:
        rows = {**rows, tip.row.name: [*rows.get(tip.row.name, []), tip.name]}
    step, shift = (1, 0) if pattern == "every tip" else (2, pattern == "checkerboard")
    return [
        name
        for number, names in enumerate(rows.values())
        for place, name in enumerate(names)
        if (place + number * shift) % step == 0
    ]
