"""One value of a file: text, number, date or choice, read as its field declares it, or refused with a reason."""

import math
from collections.abc import Callable
from datetime import date, datetime
from difflib import get_close_matches
from functools import partial
from typing import Any

from pydantic_core import PydanticCustomError

from lineplanner.errors import Fact
from lineplanner.files.problems import listed, token
from lineplanner.inputs.declared import Shape
from lineplanner.quantities import COUNT, RATIO, Field, Kind
from lineplanner.units import UnitTextError, example, parse, show
from lineplanner.units.grammar import SPLIT


def reader(shape: Shape, inside: tuple[Any, ...], field: Field, *, blank: bool) -> Callable[[Any], Any]:
    """The function that reads one value of a plain shape."""
    if shape is Shape.NUMBER:
        return partial(_unknown_or, field, partial(_number, field))
    if shape is Shape.COUNT:
        return partial(_unknown_or, field, partial(_count, field))
    if shape is Shape.WORDS:
        return partial(_words, field, blank=blank)
    if shape is Shape.YES_NO:
        return _yes_no
    if shape is Shape.DATE:
        return _date
    return partial(_choice, inside)


def _no(key: str, **facts: Fact) -> PydanticCustomError:
    return PydanticCustomError(key, key, facts)


def typed(value: object) -> str:
    """A value of a file as a message repeats it."""
    if isinstance(value, bool):
        return str(value).lower()
    if isinstance(value, dict | list):
        return "{...}" if isinstance(value, dict) else "[...]"
    try:
        return token(value)
    except ValueError:  # an integer of more digits than can be written
        return "a number of thousands of digits"


def _unknown_or(field: Field, read: Callable[[Any], Any], value: Any) -> Any:
    if value == "unknown" and isinstance(value, str):
        if field.unknown:
            return None
        raise _no("value.unknown")
    return read(value)


def _number(field: Field, value: Any) -> float:
    """A quantity: text with a unit; a plain number where the kind is a ratio."""
    kind = field.kind or RATIO
    plain = isinstance(value, int | float) and not isinstance(value, bool)
    if plain and kind in (RATIO, COUNT):
        number = _finite(value)
    elif plain:
        raise _no("value.no_unit", token=typed(value), kind=kind.name, example=example(kind))
    elif isinstance(value, str):
        try:
            number = _ordinary(parse(value, kind), value)
        except UnitTextError as error:
            raise PydanticCustomError(error.key, error.key, dict(error.facts)) from error
    else:
        raise _no("value.not_text", token=typed(value), kind=kind.name, example=example(kind))
    _bounded(field, number, value)
    return number


def _finite(value: float) -> float:
    try:
        number = float(value)
    except OverflowError:
        number = math.inf
    return _ordinary(number, value)


_LEAST, _MOST = 1e-30, 1e15  # in SI: nothing in a shop is beyond, and what is computed from it stays finite


def _ordinary(number: float, value: object) -> float:
    if number != 0.0 and not _LEAST <= abs(number) <= _MOST:
        raise _no("value.not_finite", token=typed(value))
    return number


_NOISE = 1e-12  # relative; what the conversion of a unit may add to a number that was typed as the limit


def _bounded(field: Field, number: float, value: object) -> None:
    bounds = (
        ("value.low", field.low, number < (field.low or 0.0) - abs(field.low or 0.0) * _NOISE),
        ("value.above", field.above, number <= (field.above or 0.0)),
        ("value.high", field.high, number > (field.high or 0.0) + abs(field.high or 0.0) * _NOISE),
        ("value.below", field.below, number >= (field.below or 0.0)),
    )
    for key, limit, passed in bounds:
        if limit is not None and passed:
            text = typed(value)
            raise _no(key, token=text, limit=_in_its_unit(limit, field.kind or RATIO, text))


def _in_its_unit(limit: float, kind: Kind, text: str) -> str:
    """A limit in the unit that the person typed."""
    split = SPLIT.fullmatch(text.strip())
    return show(limit, kind, "metric", digits=6, unit=(split[2] if split else "") or "1")


def _count(field: Field, value: Any) -> int:
    if isinstance(value, bool) or not isinstance(value, int):
        raise _no("value.not_count", token=typed(value))
    _ordinary(min(abs(value), 10**16), value)
    _bounded(field, value, value)
    return value


def _words(field: Field, value: Any, *, blank: bool) -> str:
    if isinstance(value, date) and not isinstance(value, datetime):
        return value.isoformat()
    if not isinstance(value, str):
        raise _no("value.not_words", token=typed(value))
    if not value.replace("\n", "").replace("\t", "").isprintable():
        raise _no("value.characters", token=token(value))
    if not blank and not value.strip():
        raise _no("value.empty", label=field.label)
    return value


def _yes_no(value: Any) -> bool:
    if not isinstance(value, bool):
        raise _no("value.not_yes_no", token=typed(value))
    return value


def _date(value: Any) -> date:
    try:
        if isinstance(value, str):
            return date.fromisoformat(value)
    except ValueError:
        pass
    if not isinstance(value, date) or isinstance(value, datetime):
        raise _no("value.not_date", token=typed(value))
    return value


def _choice(choices: tuple[Any, ...], value: Any) -> Any:
    for one in choices:
        if type(value) is type(one) and value == one:
            return one
        if isinstance(one, str) and value == str(one):
            return one
    near = get_close_matches(typed(value), [str(one) for one in choices], 1)
    if near:
        raise _no("value.choice_near", token=typed(value), choices=listed(choices), nearest=near[0])
    raise _no("value.choice", token=typed(value), choices=listed(choices))


def pair(value: Any) -> Any:
    """Two lengths in a list."""
    if not isinstance(value, list) or len(value) != 2:
        raise _no("value.not_pair", token=typed(value))
    return tuple(value)


def bare_value(value: Any, *, alone: bool) -> Any:
    """A setting may be given without its range; a number of a table never without its source."""
    if isinstance(value, dict):
        return value
    if not alone or isinstance(value, list):
        raise _no("value.no_source" if not alone else "value.not_setting", token=typed(value))
    return {"value": value}
