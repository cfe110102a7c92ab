"""The identity of a plan: a hash of everything it was made from, and of the program's version."""

import hashlib
from collections.abc import Mapping
from dataclasses import fields, is_dataclass
from enum import Enum
from functools import cache
from typing import Any

from lineplanner import __version__
from lineplanner.plan import Plan

LENGTH = 12  # hexadecimal digits: no two plans of a shop share them by chance
_BY_REPR = frozenset({str, float, bool, type(None)})


def plan_id(plan: Plan) -> str:
    """The hash of a plan's inputs: the case as run, the recipe as filed, default or map, the version."""
    pieces: list[str] = []
    _write((__version__, plan.case, plan.filed, plan.position), pieces)
    return hashlib.sha256("".join(pieces).encode("utf-8")).hexdigest()[:LENGTH]


def _write(value: Any, pieces: list[str]) -> None:
    """A value as one text whatever the order of its keys: type, then what it holds, each with its end."""
    if type(value) in _BY_REPR:
        pieces.append(f"{value!r};")
    elif isinstance(value, Mapping):
        pieces.append("{")
        for key in sorted(value, key=str):
            _write(key, pieces)
            _write(value[key], pieces)
        pieces.append("}")
    elif isinstance(value, tuple | list):
        pieces.append("[")
        for one in value:
            _write(one, pieces)
        pieces.append("]")
    elif is_dataclass(value) and not isinstance(value, type):
        pieces.append(f"{type(value).__name__}(")
        for name in _names(type(value)):
            pieces.append(f"{name!r};")
            _write(getattr(value, name), pieces)
        pieces.append(")")
    elif isinstance(value, Enum):
        pieces.append(f"{value.value!r};")
    elif isinstance(value, int | float):
        pieces.append(f"{float(value)!r};")
    else:
        pieces.append(f"{value!r};")


@cache
def _names(record: type) -> tuple[str, ...]:
    """The fields of a record in the order of the alphabet."""
    return tuple(sorted(field.name for field in fields(record)))
