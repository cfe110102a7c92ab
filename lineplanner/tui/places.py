"""The place that a path points at: its keys in a file, what it holds, and what a person calls it."""

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from lineplanner.files.kinds import kinds
from lineplanner.inputs.declared import Declared, Path, Shape, declared, described, forms_of, shape_of
from lineplanner.inputs.recipe import Change
from lineplanner.quantities import Field


@dataclass(frozen=True, slots=True, kw_only=True)
class Place:
    """One field of a record, or an entry of a list in it. optional: whether it may be left out."""

    keys: Path = ()
    type: Any
    field: Field
    optional: bool = False
    default: object = None
    labels: tuple[str, ...] = ()

    @property
    def shape(self) -> Shape:
        return shape_of(self.type)[0]

    @property
    def is_setting(self) -> bool:
        """A value with a range: written as the value alone where it has none."""
        return self.shape is Shape.RECORD and "value" in declared(self.type)

    @property
    def label(self) -> str:
        """What a person calls it: `hang 2, tips`."""
        return ", ".join(self.labels)

    def inside(self, step: str | int) -> "Place":
        """The place one step further in, by field name, key of a file or list position. LookupError if none."""
        shape, parts = shape_of(self.type)
        if shape is Shape.RECORD:
            one = next((one for one in _fields(self.type) if step in (one.name, one.key)), None)
            if one is not None:
                return self._of_field(one)
        elif shape in (Shape.MANY, Shape.PAIR) and isinstance(step, int):
            many = shape is Shape.MANY
            bare, field = described(parts[0 if many else step])
            labels = (*self.labels, field.label) if field and not many else self.labels
            if shape_of(bare)[0] is Shape.RECORD:
                labels = (*self.labels[:-1], f"{(self.field.key or labels[-1]).replace('_', ' ')} {step + 1}")
            return Place(
                keys=(*self.keys, step), type=bare, field=field or self.field, optional=many, labels=labels
            )
        raise LookupError((*self.keys, step))

    def _of_field(self, one: Declared) -> "Place":
        labels = self.labels[:-1] if self.type is Change else self.labels
        if not (self.is_setting and one.name == "value"):
            labels = (*labels, one.field.label if one.field else one.name)
        return Place(
            keys=(*self.keys, one.key),
            type=one.type,
            field=one.field or self.field,
            optional=not one.required,
            default=one.default,
            labels=labels,
        )


def place_of(record: type, path: Path) -> Place:
    """The place at a path of field names (or keys of a file) and list positions. LookupError if there is none."""
    place = Place(type=record, field=Field(None, ""))
    for step in path:
        place = place.inside(step)
    return place


def records_of(kind: str) -> Iterator[type]:
    """The record of a kind of file; of a part one for each form."""
    record = kinds()[kind].record
    if shape_of(record)[0] is Shape.FORMS:
        yield from forms_of(record).values()
    else:
        yield record


def _fields(record: type) -> tuple[Declared, ...]:
    return tuple(declared(record).values())
