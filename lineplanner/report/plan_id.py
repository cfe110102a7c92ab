"""The identity of a plan: a hash of everything it was made from, and of the program's version."""

import hashlib
from collections.abc import Iterator, Mapping
from dataclasses import fields, is_dataclass
from enum import Enum

from lineplanner import __version__
from lineplanner.plan import Plan

LENGTH = 12  # hexadecimal digits: no two plans of a shop share them by chance


def plan_id(plan: Plan) -> str:
    """The hash of a plan's inputs: the case as run, the recipe as filed, default or map, the version."""
    digest = hashlib.sha256()
    for piece in _canonical((__version__, plan.case, plan.filed, plan.position)):
        digest.update(piece.encode("utf-8"))
    return digest.hexdigest()[:LENGTH]


def _canonical(value: object) -> Iterator[str]:
    """A value as one text whatever the order of its keys: type, then what it holds, each with its end."""
    if isinstance(value, Mapping):
        yield "{"
        for key in sorted(value, key=str):
            yield from _canonical(key)
            yield from _canonical(value[key])
        yield "}"
    elif isinstance(value, tuple | list):
        yield "["
        for one in value:
            yield from _canonical(one)
        yield "]"
    elif is_dataclass(value) and not isinstance(value, type):
        yield f"{type(value).__name__}("
        for one in sorted(fields(value), key=lambda field: field.name):
            yield from _canonical(one.name)
            yield from _canonical(getattr(value, one.name))
        yield ")"
    elif isinstance(value, Enum):
        yield f"{value.value!r};"
    elif isinstance(value, int | float) and not isinstance(value, bool):
        yield f"{float(value)!r};"
    else:
        yield f"{value!r};"
