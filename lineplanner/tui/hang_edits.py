"""One part more, one less, another part in its place: the edits of a load that take one key."""

import re
from collections.abc import Iterable
from dataclasses import replace
from itertools import groupby

from lineplanner.inputs.hanging import tip_names, tip_places
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack

_TIP = re.compile(r"(?P<row>.*?)(?P<number>\d+)")


class CannotError(Exception):
    """Why an edit is not possible, in words."""


def one_more(load: Load, rack: Rack, place: int) -> Load:
    """One part more in an entry: its count, or the next free tips of the rack. Raises CannotError."""
    hang = load.hangs[place]
    if hang.count is not None:
        return _with(load, place, replace(hang, count=hang.count + 1))
    if not hang.tips:
        raise CannotError("free places have no next one: add a place in the records")
    taken = {name for one in load.hangs for name in tip_names(one)}
    names, order = tip_names(hang), list(tip_places(rack))
    after = order.index(names[-1]) + 1
    free = [name for name in order[after:] + order[:after] if name not in taken]
    if len(free) < hang.tips_each:
        raise CannotError(f"no free tip is left on rack {load.rack}")
    return _with(load, place, replace(hang, tips=runs_of((*names, *free[: hang.tips_each]))))


def one_less(load: Load, place: int) -> Load:
    """One part less in an entry: its count, its last tips or its last place. Raises CannotError."""
    hang = load.hangs[place]
    if hang.count is not None and hang.count > 1:
        return _with(load, place, replace(hang, count=hang.count - 1))
    names = tip_names(hang)
    if len(names) > hang.tips_each:
        return _with(load, place, replace(hang, tips=runs_of(names[: -hang.tips_each])))
    if len(hang.at) > 1:
        return _with(load, place, replace(hang, at=hang.at[:-1]))
    raise CannotError("one part is left here: take the whole entry out in the records")


def swapped(load: Load, place: int, part: str) -> Load:
    """Another part in an entry, on the same places."""
    return _with(load, place, replace(load.hangs[place], part=part, material=None))


def _with(load: Load, place: int, hang: Hang) -> Load:
    return replace(load, hangs=(*load.hangs[:place], hang, *load.hangs[place + 1 :]))


def runs_of(names: Iterable[str]) -> tuple[str, ...]:
    """Tips as a person writes them: numbers of one row that follow each other as a run.

    >>> runs_of(("A1", "A2", "A3", "B2", "C1"))
    ('A1-A3', 'B2', 'C1')
    """
    listed = list(enumerate(names))
    runs = []
    for _, group in groupby(listed, key=lambda pair: _place_in_row(*pair)):
        run = [name for _, name in group]
        runs.append(run[0] if len(run) == 1 else f"{run[0]}-{run[-1]}")
    return tuple(runs)


def _place_in_row(index: int, name: str) -> tuple[str, int]:
    """The same for neighbours in one row: its name, and the number less the place in the list."""
    found = _TIP.fullmatch(name)
    return (name, index) if found is None else (found["row"], int(found["number"]) - index)
