"""Moves of parts in hand: to the next tip, once more, off, turned, to the other side, another part.

Every move takes the keys of the places in hand and raises InputError with why it is not possible.
"""

import math
from collections.abc import Callable, Sequence
from dataclasses import replace

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import tip_places
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack, Spot
from lineplanner.quantities import Angle
from lineplanner.racking.places import Key, Place, Racked, in_hand, places_of, racked
from lineplanner.racking.spots import shifted, spot_again
from lineplanner.racking.tips import (
    HIT,
    WAYS,
    Direction,
    Taken,
    free_groups,
    groups_after,
    middle,
    next_group,
    sides_of,
    taken_of,
)

_SIDES = ("front", "back", "both")


def moved(load: Load, rack: Rack, keys: Sequence[Key], direction: Direction, steps: int = 1) -> Racked:
    """The parts in hand on the next free tips in a direction, all by the same way; free ones by steps of the grid."""
    places = places_of(load)
    hand = in_hand(places, keys)
    if any(places[key].at is not None for key in hand):
        return shifted(load, rack, hand, WAYS[direction], steps)
    changed = dict(places)
    for _ in range(steps):
        _to_next(load, rack, changed, hand, direction)
    return racked(load, list(changed.values()), [changed[key] for key in hand])


def _to_next(
    load: Load, rack: Rack, places: dict[Key, Place], hand: Sequence[Key], direction: Direction
) -> None:
    """One step of the first part in hand to its next free tip, the others by the same way."""
    taken = _taken_by([place for key, place in places.items() if key not in set(hand)])
    first = places[hand[0]]
    group = next_group(rack, first.how, first.tips, taken, direction)
    if group is None:
        raise InputError("racking.no_tip_there", direction=direction, rack=load.rack)
    _to_tips(rack, places, hand, group, taken)


def put(load: Load, rack: Rack, keys: Sequence[Key], spot: Spot) -> Racked:
    """The first part in hand on the free tips nearest to a spot, or at that spot, the others by the same way."""
    places = places_of(load)
    hand = in_hand(places, keys)
    first = places[hand[0]]
    if first.at is not None:
        steps = [round((to - at) / rack.grid) for to, at in zip(spot, first.at, strict=True)]
        return shifted(load, rack, hand, (steps[0], steps[1]), 1)
    taken = _taken_by([place for key, place in places.items() if key not in set(hand)])
    tips = tip_places(rack)
    groups = list(free_groups(rack, first.how, taken))
    group = min(groups, key=lambda one: math.dist(middle(tips, one), spot), default=None)
    if group is None:
        raise InputError("racking.no_tip", rack=load.rack)
    changed = dict(places)
    _to_tips(rack, changed, hand, group, taken)
    return racked(load, list(changed.values()), [changed[key] for key in hand])


def _to_tips(
    rack: Rack, places: dict[Key, Place], hand: Sequence[Key], group: tuple[str, ...], taken: Taken
) -> None:
    """The first part in hand on some tips, the others by the same way."""
    first, spots = places[hand[0]], tip_places(rack)
    here, there = middle(spots, first.tips), middle(spots, group)
    places[hand[0]] = replace(first, tips=group)
    used = taken | _taken_by([places[hand[0]]])
    for key in hand[1:]:
        x, drop = middle(spots, places[key].tips)
        aim = (x + there[0] - here[0], drop + there[1] - here[1])
        found = next(
            (g for g in free_groups(rack, places[key].how, used) if math.dist(middle(spots, g), aim) < HIT),
            None,
        )
        if found is None:
            raise InputError("racking.not_all_there", count=len(hand))
        places[key] = replace(places[key], tips=found)
        used |= _taken_by([places[key]])


def _taken_by(places: Sequence[Place]) -> Taken:
    return frozenset((name, side) for place in places for name in place.tips for side in sides_of(place.how))


def again(load: Load, rack: Rack, key: Key, times: int = 1) -> Racked:
    """The part in hand so many times more, on the next free tips or at the next free positions.

    In hand is the last of the new ones. Where room ends before, short says how many found none.
    """
    places = places_of(load)
    (key,) = in_hand(places, [key])
    place = places[key]
    if place.at is not None:
        new = [replace(place, at=spot) for spot in spot_again(load, rack, key, times)]
    else:
        groups = groups_after(rack, place.how, place.tips, taken_of(load))[:times]
        new = [replace(place, tips=group) for group in groups]
    if not new:
        raise InputError("racking.no_tip", rack=load.rack)
    return racked(load, [*places.values(), *new], new[-1:], times - len(new))


def added(load: Load, rack: Rack, part: str, side: str = "front") -> Racked:
    """A part out of the library on the first free tip; on a rack without tips at the middle of its width."""
    how = Hang(part=part, side="back" if side == "back" else "front")
    places = list(places_of(load).values())
    if rack.hanging == "free":
        new = Place(how, None, at=(rack.width / 2, rack.height / 2))
    else:
        group = next(free_groups(rack, how, taken_of(load)), None)
        if group is None:
            raise InputError("racking.no_tip", rack=load.rack)
        new = Place(how, None, tips=group)
    return racked(load, [*places, new], [new])


def taken_off(load: Load, keys: Sequence[Key]) -> Racked:
    """Without the parts in hand; in hand is then what hung before them."""
    places = places_of(load)
    hand = set(in_hand(places, keys))
    order = list(places)
    left = [place for key, place in places.items() if key not in hand]
    first = min(order.index(key) for key in hand)
    before = [place for key, place in places.items() if key not in hand and order.index(key) < first]
    return racked(load, left, before[-1:] or left[:1])


def turned(load: Load, keys: Sequence[Key], angle: Angle) -> Racked:
    """The parts in hand turned by an angle in rad, counter-clockwise in the rack plane."""

    def more(how: Hang) -> Hang:
        turn = math.remainder(how.turn + angle, math.tau)
        return replace(how, turn=0.0 if abs(turn) < 1e-9 else turn)

    return _each(load, keys, more)


def faced(load: Load, keys: Sequence[Key]) -> Racked:
    """The parts in hand flat where the first of them is edge-on, else edge-on."""
    places = places_of(load)
    facing = "flat" if places[in_hand(places, keys)[0]].how.facing == "edge-on" else "edge-on"
    return _each(load, keys, lambda how: replace(how, facing=facing))  # type: ignore[arg-type]


def sided(load: Load, rack: Rack, keys: Sequence[Key]) -> Racked:
    """The parts in hand on the next side that their tips have free: front, back, both, front again."""
    places = places_of(load)
    hand = in_hand(places, keys)
    others = _taken_by([place for key, place in places.items() if key not in set(hand)])
    rows = tip_places(rack)
    now = _SIDES.index(places[hand[0]].how.side)
    for step in (1, 2):
        side = _SIDES[(now + step) % 3]
        wanted = ("front", "back") if side == "both" else (side,)
        tips = [name for key in hand for name in places[key].tips]
        reached = all(rows[name].row.side in ("both", side) for name in tips if name in rows)
        alone = len(set(tips)) == len(tips)  # no two in hand share a tip
        if reached and alone and all((name, one) not in others for name in tips for one in wanted):
            return _each(load, hand, lambda how, to=side: replace(how, side=to))  # type: ignore[misc]
    raise InputError("racking.no_side", rack=load.rack)


def swapped(load: Load, keys: Sequence[Key], part: str) -> Racked:
    """Another part at the places in hand, of its own material."""
    return _each(load, keys, lambda how: replace(how, part=part, material=None))


def _each(load: Load, keys: Sequence[Key], change: Callable[[Hang], Hang]) -> Racked:
    """The places in hand with another way to hang."""
    places = places_of(load)
    hand = in_hand(places, keys)
    changed = places | {key: replace(places[key], how=change(places[key].how)) for key in hand}
    return racked(load, list(changed.values()), [changed[key] for key in hand])


def reracked(load: Load, old: Rack, new: Rack, name: str) -> Racked:
    """Every part on another rack: on tips of the same names where it has them all, else on its tips in order.

    Raises InputError where it holds fewer parts, or hangs otherwise.
    """
    places = places_of(load)
    if old.hanging != new.hanging:
        raise InputError("racking.hangs_otherwise", rack=name)
    there = replace(load, rack=name)
    if new.hanging == "free":
        return racked(there, list(places.values()), list(places.values())[:1])
    names = tip_places(new)
    if not all(tip in names for place in places.values() for tip in place.tips):
        places = _in_order(places, new, name)
    return racked(there, list(places.values()), list(places.values())[:1])


def _in_order(places: dict[Key, Place], rack: Rack, name: str) -> dict[Key, Place]:
    """The places one after the other on the tips of a rack."""
    found: dict[Key, Place] = {}
    taken: Taken = frozenset()
    for key, place in places.items():
        group = next(free_groups(rack, place.how, taken), None)
        if group is None:
            raise InputError("racking.too_few", rack=name, count=len(found), parts=len(places))
        found[key] = replace(place, tips=group)
        taken |= _taken_by([found[key]])
    return found
