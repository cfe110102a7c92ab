"""The rows of an entry under way: what has to be filled, and what may be filled at once."""

from typing import Any

from lineplanner.inputs.declared import Path, Shape, declared, described, shape_of
from lineplanner.report.form_rows import Heading, Known, Row
from lineplanner.report.forms import blank_rows

_FIRST = 2  # entries that a list which must not be empty begins with: two corners make a profile


def draft_rows(
    record: Any, place: Path, known: Known, *, level: int, leave_out: frozenset[str] = frozenset()
) -> tuple[Row | Heading, ...]:
    """Plain rows and needed groups. Lists and groups that may be missing come when the entry is there."""
    if shape_of(record)[0] is Shape.PAIR:
        return blank_rows(record, place, known, level=level)
    found: list[Row | Heading] = []
    skipped: set[Path] = set()
    for one in blank_rows(record, place, known, level=level):
        name = str(one.path[len(place)])
        if name in leave_out or any(one.path[: len(path)] == path for path in skipped):
            continue
        if isinstance(one, Heading) and (one.count is not None or one.adds):
            skipped.add(one.path)
            found += _first_entries(record, one, known)
        else:
            found.append(one)
    return tuple(found)


def _first_entries(record: type, heading: Heading, known: Known) -> list[Row | Heading]:
    """Blank entries of a list of the record itself that must not be empty."""
    own = next((one for one in declared(record).values() if one.name == heading.path[-1]), None)
    if own is None or not own.required or heading.count is None:
        return []
    item, _ = described(shape_of(own.type)[1][0])
    found: list[Row | Heading] = [heading]
    for index in range(_FIRST):
        path = (*heading.path, index)
        found.append(Heading(path, f"{heading.label} {index + 1}", level=heading.level + 1))
        found += blank_rows(item, path, known, level=heading.level + 2)
    return found
