"""One part more or less of an entry: the moves that need no part in hand."""

from dataclasses import replace

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import tip_names
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack
from lineplanner.racking.moves import again
from lineplanner.racking.tips import runs_of


def one_more(load: Load, rack: Rack, entry: int) -> Load:
    """One part more in an entry: its count, or the next free tips of the rack. Raises InputError."""
    hang = load.hangs[entry]
    if hang.count is not None:
        return _with(load, entry, replace(hang, count=hang.count + 1))
    if not hang.tips:
        raise InputError("racking.next_place")
    return again(load, rack, (entry, len(tip_names(hang)) // hang.tips_each - 1)).load


def one_less(load: Load, entry: int) -> Load:
    """One part less in an entry: its count, its last tips or its last place. Raises InputError."""
    hang = load.hangs[entry]
    if hang.count is not None and hang.count > 1:
        return _with(load, entry, replace(hang, count=hang.count - 1))
    names = tip_names(hang)
    if len(names) > hang.tips_each:
        return _with(load, entry, replace(hang, tips=runs_of(names[: -hang.tips_each])))
    if len(hang.at) > 1:
        return _with(load, entry, replace(hang, at=hang.at[:-1]))
    raise InputError("racking.last_of_entry")


def exchanged(load: Load, entry: int, part: str) -> Load:
    """Another part in an entry, on the same places, of its own material."""
    return _with(load, entry, replace(load.hangs[entry], part=part, material=None))


def _with(load: Load, entry: int, hang: Hang) -> Load:
    return replace(load, hangs=(*load.hangs[:entry], hang, *load.hangs[entry + 1 :]))
