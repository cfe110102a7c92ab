"""Free positions: parts that are bolted, wired or clipped anywhere move by steps of the rack's grid."""

from collections.abc import Sequence
from dataclasses import replace
from typing import Literal

from lineplanner.errors import InputError
from lineplanner.inputs.load import Load
from lineplanner.inputs.rack import Rack, Spot
from lineplanner.quantities import Length
from lineplanner.racking.places import Key, Place, Racked, in_hand, places_of, racked

_DIGITS = 9  # decimals of a position in m: what is smaller is noise of the sum


def shifted(load: Load, rack: Rack, keys: Sequence[Key], way: tuple[int, int], steps: int) -> Racked:
    """The parts in hand moved by steps of the grid along x and drop; they stay on the rack."""
    places = places_of(load)
    changed = dict(places)
    for key in keys:
        spot = places[key].at
        if spot is None:
            raise InputError("racking.mixed")
        x, drop = (
            round(value + sign * steps * rack.grid, _DIGITS) for value, sign in zip(spot, way, strict=True)
        )
        if not (0.0 <= x <= rack.width and 0.0 <= drop <= rack.height):
            raise InputError("racking.off_the_rack", rack=load.rack)
        changed[key] = replace(places[key], at=(x, drop))
    return racked(load, list(changed.values()), [changed[key] for key in keys])


def spot_again(load: Load, rack: Rack, key: Key, times: int) -> list[Spot]:
    """The next positions of a part: by the step from the part before it in its entry, else a tenth of the width.

    Those that would leave the rack are left out.
    """
    places = places_of(load)
    here = places[key].at
    before = places.get((key[0], key[1] - 1))
    assert here is not None
    if before is not None and before.at is not None:
        step = (here[0] - before.at[0], here[1] - before.at[1])
    else:
        step = (max(round(rack.width / 10 / rack.grid), 1) * rack.grid, 0.0)
    spots = [
        (round(here[0] + n * step[0], _DIGITS), round(here[1] + n * step[1], _DIGITS))
        for n in range(1, times + 1)
    ]
    return [(x, drop) for x, drop in spots if 0.0 <= x <= rack.width and 0.0 <= drop <= rack.height]


def aligned(load: Load, keys: Sequence[Key], along: Literal["row", "column"]) -> Racked:
    """The parts in hand at the drop of the first of them (a row) or at its x (a column)."""
    places = places_of(load)
    hand = _free(places, keys)
    first = _spot(places[hand[0]])
    changed = dict(places)
    for key in hand:
        x, drop = _spot(places[key])
        changed[key] = replace(places[key], at=(x, first[1]) if along == "row" else (first[0], drop))
    return racked(load, list(changed.values()), [changed[key] for key in hand])


def spaced(load: Load, rack: Rack, keys: Sequence[Key]) -> Racked:
    """The parts in hand evenly between the outer two, along the longer way, to the nearest step of the grid."""
    places = places_of(load)
    hand = _free(places, keys)
    if len(hand) < 3:
        raise InputError("racking.three")
    spots = [_spot(places[key]) for key in hand]
    axis = max((0, 1), key=lambda n: max(s[n] for s in spots) - min(s[n] for s in spots))
    order = sorted(hand, key=lambda key: _spot(places[key])[axis])
    low, high = _spot(places[order[0]])[axis], _spot(places[order[-1]])[axis]
    changed = dict(places)
    for number, key in enumerate(order[1:-1], 1):
        along = _on_grid(low + (high - low) * number / (len(order) - 1), low, rack.grid)
        x, drop = _spot(places[key])
        changed[key] = replace(places[key], at=(along, drop) if axis == 0 else (x, along))
    return racked(load, list(changed.values()), [changed[key] for key in hand])


def _on_grid(value: Length, start: Length, grid: Length) -> Length:
    return round(start + round((value - start) / grid) * grid, _DIGITS)


def _free(places: dict[Key, Place], keys: Sequence[Key]) -> list[Key]:
    """The keys in hand. Raises InputError where one of them hangs on a tip."""
    hand = in_hand(places, keys)
    if any(places[key].at is None for key in hand):
        raise InputError("racking.not_free")
    return hand


def _spot(place: Place) -> Spot:
    assert place.at is not None
    return place.at
