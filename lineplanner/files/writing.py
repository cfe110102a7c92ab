"""A record as the text of a new file: stable key order, quantities with units that read back exactly."""

import json
from collections.abc import Iterator
from contextlib import suppress
from datetime import date
from decimal import Decimal
from typing import Any

from lineplanner.files.kinds import format_line
from lineplanner.files.problems import UnitSystem
from lineplanner.inputs.declared import Declared, Shape, declared, described, shape_of
from lineplanner.inputs.values import Ranged, Sourced
from lineplanner.quantities import COUNT, RATIO, Field, Kind
from lineplanner.units import UnitTextError, parse, to_unit, units_of
from lineplanner.units.trade import fitting_unit

_SMALL_RECORD = 2  # a record of so few fields is written in braces, a larger one under a heading
_WIDEST = 100  # characters of a list on one line


def dump(record: Any, kind: str, system: UnitSystem = "metric") -> str:
    """The text of a new file: read(dump(record)) equals record. Values at their default are left out."""
    lines = [f'format = "{format_line(kind)}"', *_table(record, (), system)]
    return "\n".join(lines) + "\n"


def amount(value: float, kind: Kind, system: UnitSystem = "metric") -> str:
    """A quantity as text that reads back as exactly this number: the shortest in the trade's unit if there is one.

    >>> from lineplanner.quantities import CURRENT_DENSITY
    >>> amount(258.33385000103334, CURRENT_DENSITY, "us")
    '24 A/ft2'
    """
    units = (fitting_unit(kind, system, value), *units_of(kind))
    for unit in dict.fromkeys(unit for unit in units if unit != "%"):
        number = to_unit(value, kind, unit)
        for digits in (3, 6, 9, 12, 15, 16, 17):
            text = f"{_plain(f'{number:.{digits}g}')} {unit}".removesuffix(" 1")
            with suppress(UnitTextError):  # rounded to few digits, a temperature may fall below absolute zero
                if parse(text, kind) == value:
                    return text
    raise ValueError(value, kind.name)


def _plain(number: str) -> str:
    """A number without exponent as long as that stays readable."""
    exact = Decimal(number)
    return format(exact, "f") if -7 <= exact.adjusted() < 12 else number


def _table(record: Any, heading: tuple[str, ...], system: UnitSystem) -> Iterator[str]:
    """The lines of a record: plain keys first, then its tables under headings of their own."""
    fields = [one for one in _fields(record) if _given(record, one)]
    for one in fields:
        if _has_heading(one) and one.required and getattr(record, one.name) == ():
            yield f"{one.key} = []"
        if not _has_heading(one):
            yield f"{one.key} = {_value(getattr(record, one.name), one.type, one.field, system)}"
    for one in fields:
        if _has_heading(one):
            yield from _headed(getattr(record, one.name), (*heading, one.key), system)


def _headed(value: Any, heading: tuple[str, ...], system: UnitSystem) -> Iterator[str]:
    many = isinstance(value, tuple)
    for one in value if many else (value,):
        yield ""
        yield f"[[{'.'.join(heading)}]]" if many else f"[{'.'.join(heading)}]"
        yield from _table(one, heading, system)


def _fields(record: Any) -> tuple[Declared, ...]:
    kind: type = type(record)
    return tuple(declared(kind).values())


def _given(record: Any, one: Declared) -> bool:
    """Whether a value has to be written."""
    return one.required or getattr(record, one.name) != one.default


def _has_heading(one: Declared) -> bool:
    shape, inside = shape_of(one.type)
    bare = described(inside[0])[0] if shape is Shape.MANY else one.type
    return (
        shape_of(bare)[0] is Shape.RECORD
        and bare not in (Ranged, Sourced)
        and len(declared(bare)) > _SMALL_RECORD
    )


def _value(value: Any, bare: Any, field: Field | None, system: UnitSystem) -> str:
    """One value as TOML."""
    if value is None:
        return '"unknown"'
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD:
        return _braces(value, field, system)
    if shape in (Shape.MANY, Shape.PAIR):
        types = [described(inside[0 if shape is Shape.MANY else index]) for index in range(len(value))]
        return _list([_value(v, t, f or field, system) for v, (t, f) in zip(value, types, strict=True)])
    if shape is Shape.NUMBER:
        kind = field.kind if field and field.kind else RATIO
        return repr(float(value)) if kind in (RATIO, COUNT) else f'"{amount(value, kind, system)}"'
    if isinstance(value, bool):
        return str(value).lower()
    if isinstance(value, int):
        return str(value)
    return value.isoformat() if isinstance(value, date) else json.dumps(str(value), ensure_ascii=False)


def _braces(record: Any, outer: Field | None, system: UnitSystem) -> str:
    """A small record in braces; a setting without a range as its value alone."""
    if isinstance(record, Ranged) and record.low is None and record.high is None:
        return _value(record.value, float, outer, system)
    given = [one for one in _fields(record) if _given(record, one)]
    pairs = [
        f"{one.key} = {_value(getattr(record, one.name), one.type, one.field or outer, system)}"
        for one in given
    ]
    return f"{{ {', '.join(pairs)} }}"


def _list(items: list[str]) -> str:
    line = f"[{', '.join(items)}]"
    return line if len(line) <= _WIDEST else "[\n" + "".join(f"    {item},\n" for item in items) + "]"
