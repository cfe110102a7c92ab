"""Entries of lists and optional groups: adding one while it is being typed, taking one out, another form of part."""

import re
from collections.abc import Mapping
from dataclasses import dataclass, fields, replace
from typing import Any

from lineplanner.errors import Facts
from lineplanner.files.models import build
from lineplanner.files.problems import text_of
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
from lineplanner.inputs.part import Common, Part
from lineplanner.report.form_draft_rows import draft_rows
from lineplanner.report.form_rows import YES, Heading, Known, Row, Takes
from lineplanner.report.forms import label_of, singular
from lineplanner.units import System, UnitTextError, parse

_WHOLE = re.compile(r"[+-]?[0-9]{1,15}")
# Sentences of the file reader that speak of quotes and lines, worded for a form.
_WORDS = {
    "key.missing": "Nothing is entered. This one is needed",
    "value.empty": "Nothing is entered. Give a name or a few words",
    "value.not_count": "`{token}` is not a whole number. Give one such as `4`",
}


@dataclass(frozen=True, slots=True)
class Draft:
    """An entry, a group or another form of part under way: nothing of it counts before it is complete.

    place is where it will stand; record its declared type. form is the new form of a part.
    """

    place: Path
    record: Any
    label: str
    form: str = ""

    def rows(self, known: Known | None = None, level: int = 0) -> tuple[Row | Heading, ...]:
        """The rows to fill."""
        shared = _SHARED if self.form else frozenset()
        return draft_rows(self.record, self.place, known or Known(), level=level, leave_out=shared)


@dataclass(frozen=True, slots=True)
class Completed:
    """What a draft has come to: the record with it, or what is missing and what is refused, by path."""

    record: Any
    missing: tuple[str, ...] = ()
    refused: Mapping[Path, str] | None = None


_SHARED = frozenset(one.name for one in fields(Common)) | {"form"}


def draft_for(record: Any, path: Path) -> Draft | None:
    """What is begun at the heading of a list or of a missing group; None where nothing can be added."""
    bare: Any = type(record)
    value: Any = record
    one = Declared("", "", bare, None, required=True)
    for step in path:
        shape, inside = shape_of(bare)
        if shape is Shape.RECORD:
            one = next(one for one in declared(bare).values() if one.name == step)
            bare, value = one.type, None if value is None else getattr(value, one.name)
        else:
            bare, _ = described(inside[0] if shape is Shape.MANY else inside[int(step)])
            value = value[step]
    shape, inside = shape_of(bare)
    if shape is Shape.RECORD and value is None:
        return Draft(path, bare, label_of(one))
    if shape is not Shape.MANY:
        return None
    item, _ = described(inside[0])
    plain = shape_of(item)[0] not in (Shape.RECORD, Shape.PAIR)
    return None if plain else Draft((*path, len(value or ())), item, singular(one))


def draft_of_form(part: Any, form: str) -> Draft | None:
    """Another form of a part: what both have stays, the fields of its own are to be filled."""
    new = forms_of(Part).get(form)
    if new is None or isinstance(part, new):
        return None
    return Draft((), new, f"the part as {form}", form)


def completed(record: Any, draft: Draft, texts: Mapping[Path, str], system: System = "metric") -> Completed:
    """The record with the draft in its place, once all that is needed is there and can be read."""
    rows = [row for row in draft.rows() if isinstance(row, Row)]
    missing = tuple(row.label for row in rows if not row.optional and not texts.get(row.path, "").strip())
    if missing:
        return Completed(None, missing, {})
    if shape_of(draft.record)[0] is Shape.PAIR:
        return _completed_pair(record, draft, rows, texts, system)
    raw = _raw_of(draft, rows, texts)
    if draft.form:
        raw |= {"form": draft.form, "name": record.name, "material": record.material}
    made, problems = build(draft.record, raw)
    if problems:
        return Completed(
            None, (), {_row_path(draft, rows, p.path): _word(p.key, p.facts, system) for p in problems}
        )
    if draft.form:
        return Completed(replace(made, **{n: getattr(record, n) for n in _SHARED - {"form"}}))
    return Completed(added(record, draft.place, made))


def still_fits(record: Any, draft: Draft) -> bool:
    """Whether the place of a draft is still there: an undo may have taken away what it would stand in."""
    try:
        if draft.form:
            return draft_of_form(record, draft.form) is not None
        last = draft.place[-1]
        return draft_for(record, draft.place[:-1] if isinstance(last, int) else draft.place) is not None
    except (IndexError, AttributeError, TypeError, StopIteration):
        return False


def added(record: Any, place: Path, value: Any) -> Any:
    """The record with a new entry at the end of the list that the place lies in, or with a new group."""
    *parents, last = place
    if not isinstance(last, int):
        return put(record, place, value)
    inside = record
    for step in parents:
        inside = inside[step] if isinstance(step, int) else getattr(inside, step)
    return put(record, tuple(parents), (*inside, value))


def put(record: Any, path: Path, value: Any) -> Any:
    """The record with a value at a path."""
    if not path:
        return value
    step, rest = path[0], path[1:]
    if isinstance(step, int):
        return (*record[:step], put(record[step], rest, value), *record[step + 1 :])
    return replace(record, **{step: put(getattr(record, step), rest, value)})


def without(record: Any, path: Path) -> Any:
    """The record without the entry of a list, or without the optional group, at a path."""
    *parents, last = path
    inside = record
    for step in parents:
        inside = inside[step] if isinstance(step, int) else getattr(inside, step)
    if isinstance(last, int):
        return put(record, tuple(parents), (*inside[:last], *inside[last + 1 :]))
    return put(record, path, None)


def names_in(text: str) -> tuple[str, ...]:
    """The names of a text with commas between them.

    >>> names_in("A1-A4, B1-B4")
    ('A1-A4', 'B1-B4')
    """
    return tuple(one.strip() for one in text.split(",") if one.strip())


# --- from texts to a record ------------------------------------------------------------------------------


def _completed_pair(
    record: Any, draft: Draft, rows: list[Row], texts: Mapping[Path, str], system: System
) -> Completed:
    numbers, refused = [], {}
    for row in rows:
        assert row.kind is not None
        try:
            numbers.append(parse(texts[row.path], row.kind, system=system))
        except UnitTextError as error:
            refused[row.path] = _word(error.key, error.facts, system)
    if refused:
        return Completed(None, (), refused)
    return Completed(added(record, draft.place, tuple(numbers)))


def _raw_of(draft: Draft, rows: list[Row], texts: Mapping[Path, str]) -> dict[str, Any]:
    """The table of a file that says what was typed."""
    raw: dict[str, Any] = {}
    for row in rows:
        text = texts.get(row.path, "").strip()
        if not text:
            continue
        *parents, last = file_path(draft.record, row.path[len(draft.place) :])
        inside: dict[Any, Any] = raw
        for step in parents:
            inside = inside.setdefault(step, {})
        inside[last] = _raw(row, text)
    return {key: _with_lists(value) for key, value in raw.items()}


def _with_lists(value: Any) -> Any:
    """Tables counted by position as lists."""
    if not isinstance(value, dict):
        return value
    inside = {key: _with_lists(one) for key, one in value.items()}
    return list(inside.values()) if all(isinstance(key, int) for key in inside) else inside


def _raw(row: Row, text: str) -> Any:
    """A text as the value that a file would hold."""
    if row.takes is Takes.YES_NO and text in row.choices:
        return text == YES
    if row.takes is Takes.NAMES:
        return list(names_in(text))
    whole = row.takes is Takes.COUNT or (row.takes is Takes.CHOICE and text in row.choices)
    return int(text) if whole and _WHOLE.fullmatch(text) else text


def _row_path(draft: Draft, rows: list[Row], keys: Path) -> Path:
    """The row that a problem belongs to; the first one where it belongs to the whole."""
    for row in rows:
        if file_path(draft.record, row.path[len(draft.place) :])[: len(keys)] == keys:
            return row.path
    return rows[0].path


def _word(key: str, facts: Facts, system: System) -> str:
    return _WORDS[key].format_map(facts) if key in _WORDS else text_of(key, facts, system)
