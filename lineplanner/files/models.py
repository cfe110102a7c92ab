"""A validation model from each declared record: all problems of a file at once, then the frozen record."""

from collections.abc import Mapping
from functools import cache, partial
from typing import Any

from pydantic_core import CoreSchema, SchemaValidator, ValidationError
from pydantic_core import core_schema as cs

from lineplanner.errors import Problem
from lineplanner.files.model_problems import model_problems
from lineplanner.files.values import bare_value, pair, reader
from lineplanner.inputs.declared import Shape, declared, described, forms_of, shape_of
from lineplanner.quantities import Field


def build(record: Any, raw: Mapping[str, Any]) -> tuple[Any, list[Problem]]:
    """The record that a table describes, or None and every problem; problem paths hold file keys."""
    try:
        return validator(record).validate_python(dict(raw)), []
    except ValidationError as error:
        found = error.errors(include_url=False)
    if shape_of(record)[0] is Shape.FORMS:
        form = raw.get("form")
        found = [one | {"loc": one["loc"][1:]} if one["loc"][:1] == (form,) else one for one in found]
        return None, model_problems(record, raw, found, form)
    return None, model_problems(record, raw, found)


@cache
def validator(record: Any) -> SchemaValidator:
    """The model of a record, built at first use."""
    return SchemaValidator(_schema(record, None))


# --- from declaration to model ---------------------------------------------------------------------------


def _schema(annotation: Any, outer: Field | None, *, blank: bool = False) -> CoreSchema:
    """The schema of a type. A bare float of a record without its own Field takes the outer one.

    blank: whether a text may be empty.
    """
    bare, field = described(annotation)
    field = field or outer
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD:
        return _record(bare, outer=field)
    if shape is Shape.FORMS:
        return cs.tagged_union_schema({form: _record(one) for form, one in forms_of(bare).items()}, "form")
    if shape is Shape.MANY:
        return cs.no_info_after_validator_function(
            tuple, cs.list_schema(_schema(inside[0], field), strict=True)
        )
    if shape is Shape.PAIR:
        two = cs.tuple_schema([_schema(one, None) for one in inside], strict=True)
        return cs.no_info_before_validator_function(pair, two)
    return cs.no_info_plain_validator_function(
        reader(shape, inside, field or Field(None, "text"), blank=blank)
    )


def _record(record: type, outer: Field | None = None) -> CoreSchema:
    fields = {
        key: cs.typed_dict_field(
            _schema(one.type, one.field or outer, blank=one.default == ""), required=one.required
        )
        for key, one in declared(record).items()
    }
    names = {key: one.name for key, one in declared(record).items()}
    table: CoreSchema = cs.typed_dict_schema(fields, extra_behavior="forbid", strict=True)
    if ("status" in fields and "value" in fields) or set(fields) == {"value", "low", "high"}:
        table = cs.no_info_before_validator_function(partial(bare_value, alone="status" not in fields), table)
    return cs.no_info_after_validator_function(partial(_construct, record, names), table)


def _construct(record: type, names: Mapping[str, str], values: dict[str, Any]) -> Any:
    return record(**{names[key]: value for key, value in values.items()})
