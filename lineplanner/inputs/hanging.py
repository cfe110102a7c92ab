"""Where the tips of a rack are, and which of them a hang takes."""

import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from lineplanner.inputs.load import Hang
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.rack import Rack, TipRow
from lineplanner.quantities import Length

_RUN = re.compile(r"^(?P<row>.*?)(?P<first>\d+)\s*-\s*(?P=row)?(?P<last>\d+)$")


@dataclass(frozen=True, slots=True)
class Tip:
    """One tip: its place in the rack plane and the row it belongs to."""

    name: str
    x: Length
    drop: Length
    row: TipRow


_PLACES: Memo[Rack, Mapping[str, Tip]] = Memo(64)
_NAMES: Memo[Hang, tuple[str, ...]] = Memo(4096)


def tip_places(rack: Rack) -> Mapping[str, Tip]:
    """Every tip of a rack by name: row name and number from 1, in the order of the rows."""
    return _PLACES.get(rack, None, lambda: _placed(rack))


def _placed(rack: Rack) -> Mapping[str, Tip]:
    places: dict[str, Tip] = {}
    for row in rack.tips:
        for index in range(row.count):
            name = f"{row.name}{index + 1}"
            places[name] = Tip(
                name, row.start[0] + index * row.step[0], row.start[1] + index * row.step[1], row
            )
    return places


def tip_names(hang: Hang) -> tuple[str, ...]:
    """The tips a hang takes, runs such as A1-A6 spelled out.

    >>> tip_names(Hang(part="lug", tips=("A1-A3", "B2")))
    ('A1', 'A2', 'A3', 'B2')
    """
    return _NAMES.get(hang, None, lambda: tuple(name for entry in hang.tips for name in _expanded(entry)))


def _expanded(entry: str) -> Iterator[str]:
    match = _RUN.match(entry.strip())
    if match is None:
        yield entry.strip()
        return
    first, last = int(match["first"]), int(match["last"])
    for number in range(first, last + 1) if last >= first else range(first, last - 1, -1):
        yield f"{match['row']}{number}"


def spots_of(hang: Hang, places: Mapping[str, Tip]) -> tuple[tuple[Length, Length], ...]:
    """(x, drop) of the hanging point of each part; empty where parts are merely counted.

    A part on several tips hangs at their middle.
    """
    if hang.at:
        return hang.at
    names, each = tip_names(hang), hang.tips_each
    if each == 1:
        return tuple((places[name].x, places[name].drop) for name in names)
    groups = [[places[name] for name in names[i : i + each]] for i in range(0, len(names), each)]
    return tuple((sum(t.x for t in g) / len(g), sum(t.drop for t in g) / len(g)) for g in groups)


def parts_hung(hang: Hang) -> int:
    """How many parts a hang holds; side = "both" hangs one on each side of every tip."""
    sides = 2 if hang.side == "both" else 1
    if hang.count is not None:
        return hang.count
    return sides * (len(hang.at) if hang.at else len(tip_names(hang)) // hang.tips_each)
