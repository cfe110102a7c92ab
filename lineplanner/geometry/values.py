"""Single values of a record against what their Field declares: finite, and within its bounds."""

import math
from collections.abc import Hashable, Iterator
from dataclasses import fields, is_dataclass
from functools import cache
from typing import Any, get_type_hints

from lineplanner.errors import Problem, Quantity
from lineplanner.quantities import RATIO, Field

Path = tuple[str | int, ...]


def value_problems(record: object, path: Path = ()) -> Iterator[Problem]:
    """not-finite {field}; not-above, not-below, too-low, too-high {field, value, limit}."""
    kind: Any = type(record)
    for name, declared in _declared(kind):
        yield from _checked(getattr(record, name), declared, (*path, name))


@cache
def _declared(kind: Hashable) -> tuple[tuple[str, Field], ...]:
    if not (isinstance(kind, type) and is_dataclass(kind)):
        return ()
    hints: dict[str, Any] = get_type_hints(kind, include_extras=True)
    found = []
    for entry in fields(kind):
        notes = getattr(hints[entry.name], "__metadata__", ())
        found.append((entry.name, next((n for n in notes if isinstance(n, Field)), Field(None, entry.name))))
    return tuple(found)


def _checked(value: object, declared: Field, path: Path) -> Iterator[Problem]:
    if is_dataclass(value):
        yield from value_problems(value, path)
    elif isinstance(value, tuple):
        for place, each in enumerate(value):
            yield from _checked(each, declared, (*path, place))
    elif isinstance(value, int | float) and not isinstance(value, bool):
        yield from _number(value, declared, path)


def _number(value: float, declared: Field, path: Path) -> Iterator[Problem]:
    if not math.isfinite(value):
        yield Problem(path, "not-finite", {"field": declared.label})
        return
    bounds = (
        ("not-above", declared.above, declared.above is not None and value <= declared.above),
        ("not-below", declared.below, declared.below is not None and value >= declared.below),
        ("too-low", declared.low, declared.low is not None and value < declared.low),
        ("too-high", declared.high, declared.high is not None and value > declared.high),
    )
    kind = declared.kind or RATIO
    for key, limit, broken in bounds:
        if broken and limit is not None:
            numbers = {"value": Quantity(value, kind), "limit": Quantity(limit, kind)}
            yield Problem(path, key, {"field": declared.label, **numbers})
