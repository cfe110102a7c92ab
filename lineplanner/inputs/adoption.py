"""Limits that a site adopted as its own: from then on they count as entered here."""

from collections.abc import Iterable
from dataclasses import replace
from difflib import get_close_matches

from lineplanner.errors import Problem
from lineplanner.inputs.declared import declared
from lineplanner.inputs.rules import known
from lineplanner.inputs.site import Adopted, Site
from lineplanner.inputs.tables import Limits
from lineplanner.sources import Status


def with_adopted(limits: Limits, adopted: Iterable[Adopted]) -> Limits:
    """The limits with those that the site adopted: same values, entered here, by whom and when in the source."""
    changed = {}
    for one in adopted:
        number = getattr(limits, one.limit)
        who = f"adopted by {one.adopted_by}, {one.adopted_on}; {number.source}"
        changed[one.limit] = replace(number, source=who, status=Status.ENTERED)
    return replace(limits, **changed)


def adopted_problems(site: Site) -> list[Problem]:
    """Adopted limits that do not exist, or that are adopted twice."""
    names, seen = list(declared(Limits)), set()
    found = []
    for index, one in enumerate(site.adopted):
        path = ("adopted", index, "limit")
        near = get_close_matches(one.limit, names, 1)
        if one.limit in seen:
            found.append(Problem(path, "site.limit_twice", {"name": one.limit}))
        elif one.limit not in names and near:
            found.append(Problem(path, "site.limit_near", {"name": one.limit, "nearest": near[0]}))
        elif one.limit not in names:
            found.append(Problem(path, "site.limit", {"name": one.limit, "known": known(names)}))
        seen.add(one.limit)
    return found
