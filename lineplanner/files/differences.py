"""What differs between the values of two files: the changes that make one of the other, leaf by leaf."""

from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from difflib import SequenceMatcher
from typing import Any

from lineplanner.inputs.declared import Path


@dataclass(frozen=True, slots=True)
class Change:
    """One value that is another; None stands for a value that is not there, which no file can hold."""

    path: Path
    old: Any
    new: Any


def differences(old: Any, new: Any, path: Path = (), *, by_word: bool = True) -> Iterator[Change]:
    """The changes from old to new, in an order in which they can be made one after the other.

    by_word: whether a list of plain values is changed entry by entry, or as one value.
    """
    if old is new:  # what an edit leaves alone is the same object before and after
        return
    if isinstance(old, dict) and isinstance(new, dict):
        for key in [*old, *(key for key in new if key not in old)]:
            yield from differences(old.get(key), new.get(key), (*path, key), by_word=by_word)
    elif isinstance(old, list) and isinstance(new, list) and (by_word or _of_tables(old) or _of_tables(new)):
        yield from _of_lists(old, new, path, by_word=by_word)
    elif not same(old, new):
        yield Change(path, old, new)


def same(one: Any, other: Any) -> bool:
    """Whether two values would be written alike; the order of keys does not count, `2` is not `2.0`."""
    if one is other:
        return True
    if isinstance(one, dict) and isinstance(other, dict):
        return one.keys() == other.keys() and all(same(one[key], other[key]) for key in one)
    if isinstance(one, list) and isinstance(other, list):
        return len(one) == len(other) and all(same(a, b) for a, b in zip(one, other, strict=True))
    return type(one) is type(other) and bool(one == other)


def applied(value: Any, changes: Iterable[Change]) -> Any:
    """The values with the changes made; what was given stays as it was. LookupError if there is no such place."""
    for change in changes:
        value = _put(value, change.path, change.new)
    return value


def _put(value: Any, path: Path, new: Any) -> Any:
    if not path:
        return new
    step, rest = path[0], path[1:]
    if isinstance(value, dict):
        table = dict(value)
        inside = _put(table.get(str(step)), rest, new)
        if inside is None:
            table.pop(str(step), None)
        else:
            table[str(step)] = inside
        return table
    if not isinstance(value, list) or not isinstance(step, int) or not 0 <= step <= len(value):
        raise LookupError(path)
    items = list(value)
    inside = _put(items[step] if step < len(items) else None, rest, new)
    items[step : step + 1] = [] if inside is None else [inside]
    return items


def _of_tables(values: list[Any]) -> bool:
    return any(isinstance(one, dict) for one in values)


def _of_lists(old: list[Any], new: list[Any], path: Path, *, by_word: bool) -> Iterator[Change]:
    """Changed entries, then entries taken out from the last to the first, then entries added at the end."""
    pairs, cut, added = _matched(old, new)
    for before, after in pairs:
        yield from differences(old[before], new[after], (*path, before), by_word=by_word)
    for before in reversed(cut):
        yield Change((*path, before), old[before], None)
    for after in added:
        yield Change((*path, after), None, new[after])


def _matched(old: list[Any], new: list[Any]) -> tuple[list[tuple[int, int]], list[int], list[int]]:
    """Entries that go together, entries of old to take out, entries of new to add at the end."""
    if len(old) != len(new):
        pairs: list[tuple[int, int]] = []
        cut: list[int] = []
        added: list[int] = []
        matcher = SequenceMatcher(None, [repr(one) for one in old], [repr(one) for one in new], False)
        for _, start, end, first, last in matcher.get_opcodes():
            both = min(end - start, last - first)
            pairs += zip(range(start, start + both), range(first, first + both), strict=True)
            cut += range(start + both, end)
            added += range(first + both, last)
        if added == list(range(len(new) - len(added), len(new))):
            return pairs, cut, added
    both = min(len(old), len(new))  # something is added in between: each entry takes the place of the next
    return [(i, i) for i in range(both)], list(range(both, len(old))), list(range(both, len(new)))
