"""How many more of a part: the places for it, what the line carries of them, and what stops one more."""

from dataclasses import dataclass, replace

from lineplanner.findings import Finding, Level
from lineplanner.inputs.case import Case
from lineplanner.plan import Plan, plan
from lineplanner.quantities import Length
from lineplanner.racking import Key, Racked
from lineplanner.racking.places import Place, places_of
from lineplanner.racking.room import hung, room_for


@dataclass(frozen=True, slots=True, kw_only=True)
class More:
    """How many more of the part of an entry of the load: part is its name.

    fits places are free with gaps of at least spacing in m; asked says that the recipe names that gap. carried
    of them the line carries without a stop; stop is what forbids one more, None where only the room ends.
    racked is the load with those carried hung, made its plan. begun says that none hung before: the first one
    counts among them, and hangs in racked even if it is not carried.
    """

    part: str
    fits: int
    spacing: Length
    asked: bool
    carried: int
    stop: Finding | None
    racked: Racked
    made: Plan
    begun: bool = False


def how_many_more(case: Case, key: Key, *, begun: bool = False) -> More:
    """How many more of the part at a place of the load. Raises InputError where there is no such place.

    Amperes rise with every part, so what the line carries is found by halving; a load that a stop forbids as
    it hangs takes no more. Where the recipe names no gap, free positions keep the least gap that hangs there,
    and on tips parts are only kept from overlapping. begun: the part at the place was hung only to ask.
    """
    low, made = 0, plan(case)
    stop = _stop(made)
    place = places_of(case.load).get(key)
    usual = 0.0 if place is None or place.at is None else made.gaps.least or 0.0
    wanted = usual if case.recipe.spacing is None else case.recipe.spacing
    places = room_for(case, key, wanted)
    if stop is None and places:
        everything = _with(case, key, places)
        stop = _stop(everything[1])
        if stop is None:
            low, made = len(places), everything[1]
        else:
            low, made, stop = _most(case, key, places, made, stop)
    return More(
        part=case.load.hangs[key[0]].part,
        fits=len(places) + begun,
        spacing=wanted,
        asked=case.recipe.spacing is not None,
        carried=0 if stop is not None and made.stopped else low + begun,
        stop=stop,
        begun=begun,
        racked=hung(case, key, places[:low]),
        made=made,
    )


def _most(case: Case, key: Key, places: list[Place], made: Plan, stop: Finding) -> tuple[int, Plan, Finding]:
    """The most that are carried, their plan, and the stop of one more."""
    low, high = 0, len(places)
    while high - low > 1:
        middle = (low + high) // 2
        tried = _with(case, key, places[:middle])[1]
        found = _stop(tried)
        if found is None:
            low, made = middle, tried
        else:
            high, stop = middle, found
    return low, made, stop


def _with(case: Case, key: Key, places: list[Place]) -> tuple[Racked, Plan]:
    racked = hung(case, key, places)
    return racked, plan(replace(case, load=racked.load))


def _stop(made: Plan) -> Finding | None:
    return next((finding for finding in made.findings if finding.level is Level.STOP), None)
