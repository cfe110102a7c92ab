"""What a form shows of a record: a row per value, headings over lists and groups, from the declarations alone."""

from collections.abc import Iterator
from dataclasses import dataclass, replace
from typing import Any

from lineplanner.files.problems import key_text
from lineplanner.inputs.approval import effective_status
from lineplanner.inputs.declared import (
    Declared,
    Path,
    Shape,
    declared,
    described,
    file_path,
    forms_of,
    shape_of,
)
from lineplanner.inputs.load import Load
from lineplanner.inputs.part import Part
from lineplanner.inputs.recipe import Change, Recipe
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import RATIO, Field
from lineplanner.report.form_deviations import beside_change
from lineplanner.report.form_rows import NO, UNKNOWN, YES, Form, Heading, Known, Row, Takes, value_text

__all__ = [
    "Form",
    "Heading",
    "Known",
    "Row",
    "Takes",
    "blank_rows",
    "form_of",
    "label_of",
    "singular",
    "where_in_file",
]


@dataclass(frozen=True, slots=True)
class _Place:
    """Where the walk is: path, indent, and the entry and list around it."""

    path: Path = ()
    level: int = 0
    entry: Path | None = None
    list_at: Path | None = None

    def at(self, *steps: str | int, deeper: int = 0) -> "_Place":
        return replace(self, path=(*self.path, *steps), level=self.level + deeper)


def form_of(record: Any, *, known: Known | None = None, title: str = "") -> Form:
    """The form of a record of any kind."""
    known = known or Known()
    rows = tuple(_record(type(record), record, _Place(), known))
    if isinstance(record, Load):
        rows = tuple(_with_change(one, record, known) for one in rows)
    if isinstance(record, Recipe):
        rows = tuple(_with_approval(one, record) for one in rows)
    return Form(title or getattr(record, "name", ""), rows)


def blank_rows(record: Any, path: Path, known: Known, *, level: int = 0) -> tuple[Row | Heading, ...]:
    """The rows of an entry that is not there yet, all of them empty."""
    place, known = _Place(path, level, path, path[:-1]), replace(known, text_of=None)
    shape, inside = shape_of(record)
    if shape is Shape.PAIR:
        return tuple(_pair(inside, None, place, known, "new", optional=False))
    return tuple(
        replace(one, text="") if isinstance(one, Row) else one for one in _record(record, None, place, known)
    )


# --- the walk --------------------------------------------------------------------------------------------


def _record(kind: type, record: Any, place: _Place, known: Known) -> Iterator[Row | Heading]:
    """Plain values first, then lists and groups, each under its heading."""
    fields = list(declared(kind).values())
    for headed in (False, True):
        for one in fields:
            if _is_headed(one.type) is headed:
                value = None if record is None else getattr(record, one.name)
                yield from _field(one, value, place.at(one.name), known)


def _is_headed(bare: Any) -> bool:
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD:
        return bare is not Ranged
    return shape is Shape.MANY and shape_of(described(inside[0])[0])[0] in (Shape.RECORD, Shape.PAIR)


def _field(one: Declared, value: Any, place: _Place, known: Known) -> Iterator[Row | Heading]:
    shape, inside = shape_of(one.type)
    if shape is Shape.RECORD and one.type is Ranged:
        yield from _ranged(one, value, place, known)
    elif shape is Shape.RECORD:
        yield from _group(one, value, place, known)
    elif shape is Shape.PAIR:
        yield from _pair(inside, value, place, known, label_of(one), optional=not one.required)
    elif _is_headed(one.type):
        yield from _list(one, inside[0], value or (), place, known)
    else:
        yield _plain(one, value, place, known)


def _ranged(one: Declared, value: Ranged | None, place: _Place, known: Known) -> Iterator[Row]:
    """Value, low and high; the ends of a range only where there is a value."""
    names = {"value": "", "low": ", lowest allowed", "high": ", highest allowed"}
    for name, after in names.items():
        if name == "value" or value is not None:
            inner = replace(one, name=name, type=float, required=one.required and name == "value")
            row = _plain(inner, None if value is None else getattr(value, name), place.at(name), known)
            yield replace(row, label=label_of(one) + after)


def _pair(
    inside: tuple[Any, ...], value: Any, place: _Place, known: Known, label: str, *, optional: bool
) -> Iterator[Row]:
    for index, item in enumerate(inside):
        bare, own = described(item)
        assert own is not None
        inner = Declared(str(index), str(index), bare, own, required=not optional)
        row = _plain(inner, None if value is None else value[index], place.at(index), known)
        yield replace(row, label=f"{label}, {own.label}")


def _group(one: Declared, value: Any, place: _Place, known: Known) -> Iterator[Row | Heading]:
    """A record inside a record. One that may be missing and has fields to fill is added as a whole."""
    missing = value is None and not one.required
    whole = not one.required and any(inner.required for inner in declared(one.type).values())
    yield Heading(
        place.path,
        label_of(one),
        one.field.help if one.field else "",
        place.level,
        adds=missing and whole,
        removes=whole and not missing,
    )
    if not (missing and whole):
        inside = replace(place, entry=place.path) if whole else place
        yield from _record(one.type, value, replace(inside, level=place.level + 1), known)


def _list(
    one: Declared, item: Any, value: tuple[Any, ...], place: _Place, known: Known
) -> Iterator[Row | Heading]:
    label, help_text = label_of(one), one.field.help if one.field else ""
    yield Heading(place.path, label, help_text, place.level, count=len(value), adds=True)
    bare, _ = described(item)
    for index, entry in enumerate(value):
        inside = replace(place.at(index, deeper=1), entry=(*place.path, index), list_at=place.path)
        name = f"{singular(one)} {index + 1} of {len(value)}{_called(entry)}"
        if shape_of(bare)[0] is Shape.PAIR:
            yield from _pair(shape_of(bare)[1], entry, inside, known, str(index + 1), optional=False)
        else:
            yield Heading(inside.path, name, "", inside.level, removes=True)
            yield from _record(bare, entry, replace(inside, level=inside.level + 1), known)


# --- one value -------------------------------------------------------------------------------------------


def _plain(one: Declared, value: Any, place: _Place, known: Known) -> Row:
    own = one.field or Field(None, one.name)
    takes, choices = _takes(one, own, known)
    if one.name == "form" and one.field is None:  # the word that tells the forms of a part apart
        own, choices = Field(None, "form of the part"), tuple(forms_of(Part))
    kind = own.kind or RATIO if takes is Takes.QUANTITY else None
    text = value_text(value, kind, known.style.system)
    if value is None and own.unknown:
        text = UNKNOWN if one.required else ""
    if known.text_of is not None and takes is not Takes.YES_NO:
        text = known.text_of(place.path) or text
    return Row(
        path=place.path,
        label=own.label,
        help=own.help,
        takes=takes,
        value=value,
        text=text,
        optional=not one.required,
        kind=kind,
        field=own,
        choices=choices,
        level=place.level,
        entry=place.entry,
        list_at=place.list_at,
        locked="has several lines: change it in the file" if "\n" in text else "",
    )


def _takes(one: Declared, own: Field, known: Known) -> tuple[Takes, tuple[str, ...]]:
    """What a plain field takes, and what it can be chosen from."""
    shape, inside = shape_of(one.type)
    if shape is Shape.MANY:
        return Takes.NAMES, tuple(known.names.get(one.name, ()))
    if shape is Shape.CHOICE:
        return Takes.CHOICE, tuple(str(choice) for choice in inside)
    if shape is Shape.YES_NO:
        return Takes.YES_NO, (YES, NO)
    if shape is Shape.WORDS and own.ref is not None:
        return Takes.REFERENCE, tuple(known.stems(own.ref))
    if shape is Shape.WORDS:
        return Takes.WORDS, tuple(known.names.get(one.name, ()))
    plain = {Shape.NUMBER: Takes.QUANTITY, Shape.COUNT: Takes.COUNT, Shape.DATE: Takes.DATE}
    return plain[shape], ()


def label_of(one: Declared) -> str:
    """What a field is called."""
    return one.field.label if one.field else one.name


def singular(one: Declared) -> str:
    """What one entry of a list is called: its table in a file where that is a word of its own."""
    return one.key.replace("_", " ") if one.key != one.name else label_of(one)


def _called(entry: object) -> str:
    """The name of an entry, as its heading repeats it."""
    name = getattr(entry, "name", None) or getattr(entry, "part", None)
    return f": {name}" if isinstance(name, str) else ""


def where_in_file(record: Any, path: Path) -> str:
    """The key of a value in its file: `hang[1].part`."""
    return key_text(file_path(type(record), path))


# --- what a row means for the recipe ---------------------------------------------------------------------


def _with_change(one: Row | Heading, load: Load, known: Known) -> Row | Heading:
    """A setting that the load may change, with what the recipe says beside it."""
    if not isinstance(one, Row) or one.path[:1] != ("change",) or known.recipe is None or one.kind is None:
        return one
    beside, mark = beside_change(known.recipe, load.change or Change(), str(one.path[1]), known.style)
    return replace(one, beside=beside, mark=mark)


_BY_APPROVING = ("status", "approved_by", "approved_on", "approved_content")


def _with_approval(one: Row | Heading, recipe: Recipe) -> Row | Heading:
    """The approval is given by approving, never typed."""
    if not isinstance(one, Row) or one.path[0] not in _BY_APPROVING:
        return one
    counts = effective_status(recipe)
    beside = "counts as a draft: these are not the values approved" if recipe.status != counts else ""
    return replace(
        one,
        locked="is set by approving the recipe",
        beside=beside if one.path == ("status",) else "",
        mark="DRAFT" if beside and one.path == ("status",) else "",
    )
