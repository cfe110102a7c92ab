"""The parts of a load place by place, and a load made of places again."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, replace

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import tip_names
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.rack import Spot
from lineplanner.racking.tips import runs_of

_HOWS: Memo[Hang, Hang] = Memo(1024)

Key = tuple[int, int]
"""A place of a load: the number of its entry, and which place of that entry it is; both from 0."""


@dataclass(frozen=True, slots=True)
class Place:
    """What hangs at one place: how it hangs (an entry without places), and its tips or its free position.

    entry is the entry of the load that it came from; None for one that is new.
    """

    how: Hang
    entry: int | None
    tips: tuple[str, ...] = ()
    at: Spot | None = None


@dataclass(frozen=True, slots=True)
class Racked:
    """A load after a move, and where in it the parts are that were in hand; short is how many found no place."""

    load: Load
    keys: tuple[Key, ...]
    short: int = 0


def places_of(load: Load) -> dict[Key, Place]:
    """Every place of a load by its key, in the order of the file. Entries that are only counted have none."""
    found: dict[Key, Place] = {}
    for entry, hang in enumerate(load.hangs):
        how = how_of(hang)
        names, each = tip_names(hang), hang.tips_each
        for number in range(len(names) // each):
            found[entry, number] = Place(how, entry, tips=names[number * each : (number + 1) * each])
        for number, spot in enumerate(hang.at):
            found[entry, number] = Place(how, entry, at=spot)
    return found


def changed_places(before: Load, after: Load) -> tuple[Key, ...]:
    """The places of a load that another one does not have alike: what a step of undo put back."""
    there = {(place.how, place.tips, place.at) for place in places_of(before).values()}
    return tuple(
        key for key, place in places_of(after).items() if (place.how, place.tips, place.at) not in there
    )


def how_of(hang: Hang) -> Hang:
    """An entry without its places: how its parts hang."""
    return _HOWS.get(hang, None, lambda: replace(hang, tips=(), at=(), count=None))


def in_hand(places: dict[Key, Place], keys: Iterable[Key]) -> list[Key]:
    """The keys that are places of a load, each once. Raises InputError where none is."""
    found = [key for key in dict.fromkeys(keys) if key in places]
    if not found:
        raise InputError("racking.none")
    return found


def racked(load: Load, places: Sequence[Place], hands: Iterable[Place], short: int = 0) -> Racked:
    """The load of these places; hands are those of them that stay in hand (by identity).

    A place stays in its entry as long as it hangs as that entry says; else it goes to an entry of its like,
    or to a new one at the end. Entries left empty go. Raises InputError where nothing would hang.
    """
    lists = _by_entry(load, places)
    hangs: list[Hang] = []
    keys: dict[int, Key] = {}
    for entry, (how, held) in enumerate(lists):
        old = load.hangs[entry] if entry < len(load.hangs) else how
        if old.count is not None:
            hangs.append(old)
            continue
        if not held:
            continue
        keys |= {id(place): (len(hangs), number) for number, place in enumerate(held)}
        hangs.append(_entry(old, held))
    if not hangs:
        raise InputError("racking.last")
    return Racked(replace(load, hangs=tuple(hangs)), tuple(keys[id(place)] for place in hands), short)


def _by_entry(load: Load, places: Sequence[Place]) -> list[tuple[Hang, list[Place]]]:
    """The places entry by entry, those of the load first."""
    lists: list[tuple[Hang, list[Place]]] = [(how_of(hang), []) for hang in load.hangs]
    for place in places:
        if place.entry is not None and _belongs(load, place.entry, lists, place):
            lists[place.entry][1].append(place)
            continue
        alike = next((n for n in range(len(lists)) if _belongs(load, n, lists, place)), None)
        if alike is None:
            lists.append((place.how, []))
            alike = len(lists) - 1
        lists[alike][1].append(place)
    return lists


def _belongs(load: Load, entry: int, lists: list[tuple[Hang, list[Place]]], place: Place) -> bool:
    """Whether an entry holds parts that hang so: alike, and on tips or at free positions as they do."""
    if lists[entry][0] is not place.how and lists[entry][0] != place.how:
        return False
    if entry < len(load.hangs):
        hang = load.hangs[entry]
        return hang.count is None and bool(hang.at) == (place.at is not None)
    return (lists[entry][1][0].at is None) == (place.at is None)


def _entry(old: Hang, held: list[Place]) -> Hang:
    """An entry with its places; the same one where they are the same, so that it stays as typed."""
    names = tuple(name for place in held for name in place.tips)
    at = tuple(place.at for place in held if place.at is not None)
    if names == tip_names(old) and at == old.at:
        return old
    return replace(old, tips=runs_of(names), at=at)
