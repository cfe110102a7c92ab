"""Room for more: where else on the rack a part may hang as it does, by the outlines of what hangs there already."""

import math
from collections.abc import Iterable, Iterator
from dataclasses import dataclass, field, replace

import numpy as np
from numpy.typing import NDArray

from lineplanner.errors import InputError
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import tip_places
from lineplanner.inputs.load import Hang
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Spot
from lineplanner.quantities import Length
from lineplanner.racking.gaps import Kind, box_of, gap, kind_of
from lineplanner.racking.places import Key, Place, Racked, in_hand, places_of, racked
from lineplanner.racking.tips import free_groups, groups_after, middle, sides_of, taken_of

_DUST: Length = 1e-9
_ROWS = 1000  # no rack has more rows or columns of parts
_SHIFTS = 12  # shifts of every second row that are tried, besides none


@dataclass(slots=True)
class _Crowd:
    """What hangs on one side: boxes (n, 4) in m, kinds and hanging points beside them."""

    wanted: Length
    boxes: list[tuple[float, float, float, float]] = field(default_factory=list)
    held: list[tuple[Kind, float, float]] = field(default_factory=list)

    def add(self, kind: Kind, spot: Spot) -> None:
        """One more part hangs at a spot (x, drop)."""
        self.boxes.append(_box_at(kind, spot))
        self.held.append((kind, spot[0], spot[1]))

    def leaves_room(self, kind: Kind, spot: Spot) -> bool:
        """Whether a part at a spot overlaps nothing and keeps the wanted gap."""
        if not self.boxes:
            return True
        left, low, right, high = _box_at(kind, spot)
        boxes: NDArray[np.float64] = np.array(self.boxes)
        across = np.maximum(np.maximum(boxes[:, 0] - right, left - boxes[:, 2]), 0.0)
        up = np.maximum(np.maximum(boxes[:, 1] - high, low - boxes[:, 3]), 0.0)
        near = np.flatnonzero(np.hypot(across, up) <= self.wanted + _DUST)
        return all(self._clear(kind, spot, *self.held[index]) for index in near.tolist())

    def _clear(self, kind: Kind, spot: Spot, other: Kind, x: Length, drop: Length) -> bool:
        apart = gap(kind, other, x - spot[0], spot[1] - drop)
        return apart >= 0.0 and apart >= self.wanted - _DUST


def _box_at(kind: Kind, spot: Spot) -> tuple[Length, Length, Length, Length]:
    left, low, right, high = box_of(kind)
    return spot[0] + left, low - spot[1], spot[0] + right, high - spot[1]


def _crowds(case: Case, places: Iterable[Place], wanted: Length) -> dict[str, _Crowd]:
    """What hangs on either side."""
    crowds = {side: _Crowd(wanted) for side in ("front", "back")}
    tips = tip_places(case.rack)
    for place in places:
        spot = place.at if place.at is not None else middle(tips, place.tips)
        for side in sides_of(place.how):
            crowds[side].add(kind_of(case, place.how), spot)
    return crowds


def room_for(case: Case, key: Key, wanted: Length = 0.0) -> list[Place]:
    """Every further place of the part in hand, all of them at once, in the order in which they would be hung.

    wanted is the least gap in m; without one, parts may touch and not overlap. On tips these are the free ones;
    elsewhere rows by the grid of the rack, straight or with every second one shifted, whichever holds most.
    """
    places = places_of(case.load)
    (key,) = in_hand(places, [key])
    place = places[key]
    if place.at is None:
        return _on_tips(case, place, list(places.values()), wanted)
    return _anywhere(case, place, list(places.values()), wanted)


def with_first(case: Case, part: str, record: Part, material: Material) -> tuple[Case, Key]:
    """The case with one part that does not hang there yet on the first place that leaves room for it.

    Raises InputError where there is none.
    """
    parts, materials = {**case.parts, part: record}, {**case.materials, record.material: material}
    case = replace(case, parts=parts, materials=materials)
    hanging, how = list(places_of(case.load).values()), Hang(part=part)
    wanted = case.recipe.spacing or 0.0
    if case.rack.hanging == "free":
        found = _anywhere(case, Place(how, None, at=(0.0, 0.0)), hanging, wanted)
    else:
        found = _on_tips(case, Place(how, None), hanging, wanted)
    if not found:
        tips_left = any(free_groups(case.rack, how, taken_of(case.load)))
        free = case.rack.hanging == "free" or tips_left
        raise InputError("racking.no_room" if free else "racking.no_tip", rack=case.load.rack)
    new = racked(case.load, [*hanging, found[0]], found[:1])
    return replace(case, load=new.load), new.keys[0]


def hung(case: Case, key: Key, more: list[Place]) -> Racked:
    """The load with more places of the part in hand."""
    places = places_of(case.load)
    new = [replace(one, entry=places[key].entry) for one in more]
    return racked(case.load, [*places.values(), *new], new[-1:] or [places[key]])


def _on_tips(case: Case, place: Place, hanging: list[Place], wanted: Length) -> list[Place]:
    crowds, tips = _crowds(case, hanging, wanted), tip_places(case.rack)
    kind, sides = kind_of(case, place.how), sides_of(place.how)
    found = []
    for group in groups_after(case.rack, place.how, place.tips, taken_of(case.load)):
        spot = middle(tips, group)
        if all(crowds[side].leaves_room(kind, spot) for side in sides):
            found.append(replace(place, tips=group))
            for side in sides:
                crowds[side].add(kind, spot)
    return found


# --- free positions --------------------------------------------------------------------------------------


def _anywhere(case: Case, place: Place, hanging: list[Place], wanted: Length) -> list[Place]:
    """The rows that hold most beside what hangs there."""
    kind, sides = kind_of(case, place.how), sides_of(place.how)
    best: list[Spot] = []
    for spots in _patterns(case, kind, wanted):
        crowds = _crowds(case, hanging, wanted)
        free = [spot for spot in spots if all(crowds[side].leaves_room(kind, spot) for side in sides)]
        if len(free) > len(best):
            best = free
    return [replace(place, at=spot) for spot in best]


def _patterns(case: Case, kind: Kind, wanted: Length) -> Iterator[list[Spot]]:
    """Rows of the part on the rack under the solution: a plain grid of boxes, then closer rows by the outline."""
    grid = case.rack.grid
    left, low, right, high = box_of(kind)
    level = case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop
    first = (_up(-left, grid), _up(level + high, grid))
    last = (case.rack.width - right, case.rack.height + low)
    width, height = right - left + wanted, high - low + wanted
    step = _up(width, grid), _up(height, grid)
    yield list(_rows(first, last, step, 0.0))
    across = _pitch(kind, wanted, step[0], grid)
    shifts = sorted({_up(across * n / _SHIFTS, grid) for n in range(_SHIFTS)})
    for shift in shifts:
        down = _row_pitch(kind, wanted, (across, step[1]), shift, grid)
        yield list(_rows(first, last, (across, down), shift))


def _rows(first: Spot, last: Spot, step: Spot, shift: Length) -> Iterator[Spot]:
    """Spots (x, drop) from the first to the last, every second row shifted."""
    for row in range(_ROWS):
        drop = first[1] + row * step[1]
        if drop > last[1] + _DUST:
            return
        for column in range(_ROWS):
            x = first[0] + column * step[0] + (row % 2) * shift
            if x > last[0] + _DUST:
                break
            yield round(x, 9), round(drop, 9)


def _pitch(kind: Kind, wanted: Length, most: Length, grid: Length) -> Length:
    """The closest step of the grid at which parts stand beside each other, the next but one included."""
    count = round(most / grid)
    clear = [_clear(kind, wanted, n * grid, 0.0) for n in range(count + 1)]
    for n in range(1, count):
        if all(clear[n * m] for m in range(1, count // n + 1)):
            return n * grid
    return most


def _row_pitch(kind: Kind, wanted: Length, step: Spot, shift: Length, grid: Length) -> Length:
    """The closest step of the grid at which a row stands below another, shifted or not, and the row after that."""
    across, most = step
    reach = math.ceil((most + across) / across) + 1
    offsets = [shift + n * across for n in range(-reach, reach + 1)]
    straight = [n * across for n in range(-reach, reach + 1)]
    for n in range(1, round(most / grid)):
        down = n * grid
        odd = all(
            _clear(kind, wanted, x, -down * m) for m in (1, 3) for x in (*offsets, *(-o for o in offsets))
        )
        if odd and all(_clear(kind, wanted, x, -2 * down) for x in straight):
            return down
    return most


def _clear(kind: Kind, wanted: Length, across: Length, up: Length) -> bool:
    left, low, right, high = box_of(kind)
    if abs(across) >= right - left + wanted or abs(up) >= high - low + wanted:
        return True
    apart = gap(kind, kind, across, up)
    return apart >= 0.0 and apart >= wanted - _DUST


def _up(value: Length, grid: Length) -> Length:
    """The next multiple of the grid that is not less."""
    return max(math.ceil(value / grid - 1e-9), 0) * grid
