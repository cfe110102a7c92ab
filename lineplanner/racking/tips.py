"""Which tips of a rack are free, and which is the next one."""

import re
from collections.abc import Iterable, Iterator, Mapping, Sequence
from itertools import groupby
from typing import Literal

from lineplanner.inputs.hanging import Tip, tip_names, tip_places
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack, Spot

Direction = Literal["left", "right", "up", "down"]
Taken = frozenset[tuple[str, str]]
"""Tips with the side on which a part hangs there."""

WAYS: Mapping[str, tuple[int, int]] = {"left": (-1, 0), "right": (1, 0), "up": (0, -1), "down": (0, 1)}
"""Directions as x and drop."""
_ASIDE = 2.0  # how much farther off a tip to the side counts than one straight ahead
_EVEN = 1e-6  # m; what is not farther than this is not ahead
HIT = 1e-3  # m; a tip this near to where a part would come is the tip it comes to
_TIP = re.compile(r"(?P<row>.*?)(?P<number>\d+)")


def sides_of(hang: Hang) -> tuple[str, ...]:
    """The sides of a tip that a part takes."""
    return ("front", "back") if hang.side == "both" else (hang.side,)


def taken_of(load: Load) -> Taken:
    """Every tip of a load with the side that is taken."""
    return frozenset(
        (name, side) for hang in load.hangs for name in tip_names(hang) for side in sides_of(hang)
    )


def free_groups(rack: Rack, how: Hang, taken: Taken) -> Iterator[tuple[str, ...]]:
    """Where one more part may hang so, in the order of the rack: as many tips of one row as it needs, side by side."""
    sides, each = sides_of(how), how.tips_each
    for row in rack.tips:
        if row.side not in ("both", how.side):
            continue
        names = [f"{row.name}{number + 1}" for number in range(row.count)]
        free = [all((name, side) not in taken for side in sides) for name in names]
        for first in range(row.count - each + 1):
            if all(free[first : first + each]):
                yield tuple(names[first : first + each])


def middle(places: Mapping[str, Tip], tips: Sequence[str]) -> Spot:
    """Where a part on these tips hangs."""
    held = [places[name] for name in tips]
    return sum(tip.x for tip in held) / len(held), sum(tip.drop for tip in held) / len(held)


def next_group(
    rack: Rack, how: Hang, tips: tuple[str, ...], taken: Taken, direction: Direction
) -> tuple[str, ...] | None:
    """The nearest free tips in a direction: straight ahead if there are any, else aside."""
    places = tip_places(rack)
    here, way = middle(places, tips), WAYS[direction]
    best: tuple[tuple[bool, float], tuple[str, ...]] | None = None
    for group in free_groups(rack, how, taken):
        there = middle(places, group)
        across, down = there[0] - here[0], there[1] - here[1]
        ahead = across * way[0] + down * way[1]
        beside = abs(across * way[1]) + abs(down * way[0])
        if ahead <= max(beside, _EVEN):  # within an eighth of a turn to either side
            continue
        far = (beside > HIT, round(ahead + _ASIDE * beside, 6))
        if best is None or far < best[0]:
            best = far, group
    return None if best is None else best[1]


def groups_after(rack: Rack, how: Hang, tips: tuple[str, ...], taken: Taken) -> list[tuple[str, ...]]:
    """Free tips in the order of the rack, those after some tips first; no two of them share a tip."""
    order = {name: place for place, name in enumerate(tip_places(rack))}
    last = max((order[name] for name in tips if name in order), default=-1)
    groups = sorted(
        free_groups(rack, how, taken), key=lambda group: (order[group[0]] < last, order[group[0]])
    )
    return list(_apart(groups))


def _apart(groups: Iterable[tuple[str, ...]]) -> Iterator[tuple[str, ...]]:
    used: set[str] = set()
    for group in groups:
        if used.isdisjoint(group):
            used.update(group)
            yield group


def runs_of(names: Iterable[str]) -> tuple[str, ...]:
    """Tips as a person writes them: numbers of one row that follow each other as a run.

    >>> runs_of(("A1", "A2", "A3", "B2", "C1"))
    ('A1-A3', 'B2', 'C1')
    """
    runs = []
    for _, group in groupby(enumerate(names), key=lambda pair: _place_in_row(*pair)):
        run = [name for _, name in group]
        runs.append(run[0] if len(run) == 1 else f"{run[0]}-{run[-1]}")
    return tuple(runs)


def _place_in_row(index: int, name: str) -> tuple[str, int]:
    """The same for neighbours in one row: its name, and the number less the place in the list."""
    found = _TIP.fullmatch(name)
    return (name, index) if found is None else (found["row"], int(found["number"]) - index)
