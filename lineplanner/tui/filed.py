"""A record as the values that its file would hold; what was typed before stays as it was typed."""

from collections.abc import Mapping
from typing import Any

from lineplanner.files.problems import UnitSystem
from lineplanner.files.writing import amount
from lineplanner.inputs.declared import Declared, Shape, declared, described, shape_of
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import COUNT, RATIO, Field, Kind
from lineplanner.units import show

_DIGITS = 12  # significant; what is computed from quantities is noise beyond
_SHORT = 6  # digits of a number that somebody may well have typed


def filed(record: Any, system: UnitSystem) -> dict[str, Any]:
    """The values of a new file: those at their default are left out."""
    return {
        one.key: filed_value(getattr(record, one.name), one.type, one.field, system)
        for one in _fields(record)
        if _given(record, one)
    }


def filed_value(value: Any, bare: Any, field: Field | None, system: UnitSystem) -> Any:
    """One value as a file holds it."""
    if value is None:
        return "unknown"
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD:
        found = {
            one.key: filed_value(getattr(value, one.name), one.type, one.field or field, system)
            for one in _fields(value)
            if _given(value, one)
        }
        return found["value"] if isinstance(value, Ranged) and found.keys() == {"value"} else found
    if shape in (Shape.MANY, Shape.PAIR):
        types = [described(inside[0 if shape is Shape.MANY else index]) for index in range(len(value))]
        return [filed_value(v, t, f or field, system) for v, (t, f) in zip(value, types, strict=True)]
    if shape is Shape.NUMBER:
        kind = field.kind if field and field.kind else RATIO
        return float(value) if kind in (RATIO, COUNT) else _amount(value, kind, system)
    return str(value) if shape in (Shape.WORDS, Shape.CHOICE) and isinstance(value, str) else value


def refiled(raw: Any, old: Any, new: Any, system: UnitSystem) -> dict[str, Any]:
    """The values of a file whose record is another: what is equal in both stays as typed."""
    if type(old) is type(new):
        return _record(raw, old, new, None, system)
    found = filed(new, system)  # a part of another form: what both forms have and say alike stays
    same = {one.key for one in _fields(new) if getattr(old, one.name, None) == getattr(new, one.name)}
    kept = {key: value for key, value in raw.items() if key == "format" or (key in found and key in same)}
    return {**kept, **{key: value for key, value in found.items() if key not in kept}}


def _amount(value: float, kind: Kind, system: UnitSystem) -> str:
    """A quantity as a person would write it: short in the own units, else as it was typed, else to twelve digits."""
    rounded = show(value, kind, system, digits=_DIGITS)
    if _digits(rounded) <= _SHORT:
        return rounded
    others: tuple[UnitSystem, ...] = ("metric", "us")
    exact = (amount(value, kind, one) for one in (system, *others))
    return next((text for text in exact if _digits(text) <= _DIGITS), rounded)


def _digits(text: str) -> int:
    number = text.split(" ", 1)[0].split("e", 1)[0]
    return len(number.replace(".", "").strip("-0"))


def _fields(record: Any) -> tuple[Declared, ...]:
    kind: type = type(record)
    return tuple(declared(kind).values())


def _given(record: Any, one: Declared) -> bool:
    return one.required or getattr(record, one.name) != one.default


def _record(raw: Any, old: Any, new: Any, outer: Field | None, system: UnitSystem) -> dict[str, Any]:
    table = dict(raw) if isinstance(raw, Mapping) else {} if raw is None else {"value": raw}
    for one in _fields(new):
        before, after = getattr(old, one.name), getattr(new, one.name)
        if before == after:
            continue
        if _given(new, one):
            field = one.field or outer
            table[one.key] = _refiled(table.get(one.key), before, after, (one.type, field), system)
        else:
            table.pop(one.key, None)
    return table


def _refiled(raw: Any, old: Any, new: Any, declaration: tuple[Any, Field | None], system: UnitSystem) -> Any:
    bare, field = declaration
    if raw is not None and old == new:
        return raw
    shape, inside = shape_of(bare)
    if raw is None or old is None or new is None or type(old) is not type(new):
        return filed_value(new, bare, field, system)
    if shape is Shape.RECORD:
        table = _record(raw, old, new, field, system)
        plain = not isinstance(raw, Mapping) and table.keys() == {"value"}
        return table["value"] if plain else table
    if shape is Shape.MANY:
        item, own = described(inside[0])
        return [
            _refiled(raw[i], old[i], one, (item, own or field), system)
            if i is not None
            else filed_value(one, item, own or field, system)
            for one, i in zip(new, _origins(old, new), strict=True)
        ]
    return filed_value(new, bare, field, system)


def _origins(old: tuple[Any, ...], new: tuple[Any, ...]) -> list[int | None]:
    """For each new entry the old one it was made from: an equal one, else the first that is left over."""
    if len(old) == len(new):
        return list(range(len(new)))
    free = list(range(len(old)))
    found: list[int | None] = []
    for one in new:
        same = next((i for i in free if old[i] == one), None)
        found.append(same)
        if same is not None:
            free.remove(same)
    return [free.pop(0) if i is None and free else i for i in found]
