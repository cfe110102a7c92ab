"""The JSON schema of a kind of file, from the same declarations that the reader uses."""

from typing import Any

from lineplanner.files.kinds import format_line, kinds
from lineplanner.inputs.declared import Declared, Shape, declared, described, forms_of, shape_of
from lineplanner.quantities import COUNT, RATIO, Field
from lineplanner.units import example

Schema = dict[str, Any]
_DRAFT = "https://json-schema.org/draft/2020-12/schema"


def schema(kind: str) -> Schema:
    """What a file of a kind may hold; quantities are texts with a unit, bounds are checked by the reader."""
    record = kinds()[kind].record
    if shape_of(record)[0] is Shape.FORMS:
        forms = [_record(one, kind) for one in forms_of(record).values()]
        return {"$schema": _DRAFT, "title": format_line(kind), "oneOf": forms}
    return {"$schema": _DRAFT, "title": format_line(kind), **_record(record, kind)}


def _record(record: type, kind: str | None = None, outer: Field | None = None) -> Schema:
    """A table; that of a whole file has a format line."""
    fields = declared(record)
    front: Schema = {"format": {"const": format_line(kind)}} if kind else {}
    return {
        "type": "object",
        "description": (record.__doc__ or "").strip(),
        "properties": front | {key: _field(one, outer) for key, one in fields.items()},
        "required": [*front, *(key for key, one in fields.items() if one.required)],
        "additionalProperties": False,
    }


def _field(one: Declared, outer: Field | None) -> Schema:
    """A key with its label, its help and what it takes."""
    field = one.field or outer
    found = _value(one.type, field)
    label = one.field.label if one.field else one.key
    help_text = one.field.help if one.field else ""
    front = {"title": label} | ({"description": help_text} if help_text else {})
    if one.field is not None and one.field.unknown:
        found = {"anyOf": [found, {"const": "unknown"}]}
    return front | {key: value for key, value in found.items() if key not in front}


def _value(bare: Any, field: Field | None) -> Schema:
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD:
        table = _record(inside[0], outer=field)
        alone = set(declared(inside[0])) == {
            "value",
            "low",
            "high",
        }  # a setting may be given without its range
        return {"anyOf": [_quantity(field), table]} if alone else table
    if shape is Shape.MANY:
        item, own = described(inside[0])
        return {"type": "array", "items": _value(item, own or field)}
    if shape is Shape.PAIR:
        items = [_value(*described(one)) for one in inside]
        return {"type": "array", "prefixItems": items, "minItems": len(items), "maxItems": len(items)}
    if shape is Shape.CHOICE:
        return {"enum": [one if isinstance(one, int) else str(one) for one in inside]}
    if shape is Shape.NUMBER:
        return _quantity(field)
    return _PLAIN[shape]


_PLAIN: dict[Shape, Schema] = {
    Shape.COUNT: {"type": "integer"},
    Shape.YES_NO: {"type": "boolean"},
    Shape.WORDS: {"type": "string"},
    Shape.DATE: {"type": "string", "format": "date"},
}


def _quantity(field: Field | None) -> Schema:
    """A quantity: text with a unit; a ratio may be a plain number."""
    kind = field.kind if field and field.kind else RATIO
    text: Schema = {"type": "string", "examples": [example(kind, "metric"), example(kind, "us")]}
    if kind in (RATIO, COUNT):
        return {"anyOf": [{"type": "number"}, text]}
    return text | {"description": f"{kind.name} with its unit"}
