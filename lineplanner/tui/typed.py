"""What is typed at a field as the value that a file would hold, and such a value as text."""

import re
from collections.abc import Mapping, Sequence
from datetime import date
from typing import Any

from lineplanner.files.problems import UnitSystem
from lineplanner.inputs.declared import Path, Shape, described, shape_of
from lineplanner.quantities import COUNT, RATIO
from lineplanner.tui.filed import filed_value
from lineplanner.tui.places import Place, place_of

_WHOLE = re.compile(r"0|-?[1-9][0-9]{0,15}")
_PLAIN = re.compile(r"-?[0-9]{1,12}(?:\.[0-9]{1,12})?")
_YES_NO = {"true": True, "yes": True, "false": False, "no": False}


def value_at(raw: Any, keys: Path) -> Any:
    """The value at a path of file keys; None if there is none. A setting without its range is its value."""
    for step in keys:
        if isinstance(raw, Mapping):
            raw = raw.get(str(step))
        elif isinstance(raw, list) and isinstance(step, int) and step < len(raw):
            raw = raw[step]
        else:
            return raw if step == "value" and not isinstance(raw, list) else None
    return raw


def as_text(value: Any) -> str:
    """A value of a file as a person would type it."""
    if isinstance(value, bool):
        return str(value).lower()
    if isinstance(value, list):
        return ("; " if any(isinstance(one, list) for one in value) else ", ").join(map(as_text, value))
    if isinstance(value, Mapping):
        return as_text(value.get("value"))
    return "" if value is None else value.isoformat() if isinstance(value, date) else str(value)


def shown_at(record: Any, raw: Any, path: Path, system: UnitSystem) -> str:
    """The text of a field: as typed, or as the file would write what counts where it is left out."""
    place = place_of(type(record), path)
    value = value_at(raw, place.keys)
    if value is None and place.default is not None and place.shape is not Shape.RECORD:
        value = filed_value(place.default, place.type, place.field, system)
    return as_text(value)


def with_text(record: type, raw: Any, path: Path, text: str, kept: Any) -> Any:
    """The values with a text at a path; an empty one takes an optional value out.

    A table that is left without a value goes too, unless it stands so in kept, the values of the file on disk.
    """
    place = place_of(record, path)
    text = text.strip()
    keys = place.keys
    value = None if not text and place.optional else _value(place, text, value_at(raw, keys))
    if place.is_setting and value is not None:
        keys = (*keys, "value")
    return _put(raw, keys, value, kept)


def _value(place: Place, text: str, old: Any) -> Any:
    """A text as the file would hold it; what the reader will refuse is handed on as it is."""
    shape, parts = shape_of(place.type)
    if shape is Shape.COUNT and _WHOLE.fullmatch(text):
        return int(text)
    if shape is Shape.NUMBER and (place.field.kind or RATIO) in (RATIO, COUNT):
        return text if isinstance(old, str) else _number(text)
    if shape is Shape.YES_NO:
        return _YES_NO.get(text, text)
    if shape is Shape.CHOICE:
        return next((one for one in parts if not isinstance(one, str) and str(one) == text), text)
    if shape is Shape.PAIR:
        return [one.strip() for one in text.split(",")]
    if shape is Shape.MANY:
        return _many(place, text)
    return text


def _number(text: str) -> int | float | str:
    """A plain number where writing it down again gives the same text."""
    if _PLAIN.fullmatch(text):
        number = float(text) if "." in text else int(text)
        return number if str(number) == text else text
    return text


def _many(place: Place, text: str) -> Any:
    """A list on one line: commas between words, semicolons between pairs."""
    bare, _ = described(shape_of(place.type)[1][0])
    shape = shape_of(bare)[0]
    if shape is Shape.RECORD:
        return text or []
    pieces = [one.strip() for one in text.split(";" if shape is Shape.PAIR else ",")]
    return [_value(place.inside(i), one, None) for i, one in enumerate(pieces) if one]


def _put(raw: Any, keys: Path, value: Any, kept: Any) -> Any:
    if not keys:
        return value
    step, rest = keys[0], keys[1:]
    below = value_at(kept, (step,))
    if isinstance(step, int):
        items = list(raw) if isinstance(raw, Sequence) and not isinstance(raw, str) else []
        if not 0 <= step <= len(items):
            raise LookupError(keys)
        inside = _put(items[step] if step < len(items) else None, rest, value, below)
        items[step : step + 1] = [] if inside is None else [inside]
        return items
    plain = raw is not None and not isinstance(raw, Mapping)  # a setting without its range
    table = {"value": raw} if plain else dict(raw or {})
    inside = _put(table.get(step), rest, value, below)
    if inside is None:
        table.pop(step, None)
    else:
        table[step] = inside
    if table.keys() == {"value"} and not isinstance(raw, Mapping):
        return table["value"]
    return table if table or isinstance(kept, Mapping) else None
