"""What the model of a record refused, as problems of ours: path of file keys, message key, facts."""

from difflib import get_close_matches
from typing import Any

from pydantic_core import ErrorDetails

from lineplanner.errors import Problem
from lineplanner.files.problems import listed, token
from lineplanner.files.values import typed
from lineplanner.inputs.declared import (
    Declared,
    Path,
    Shape,
    declared,
    described,
    forms_of,
    record_at,
    shape_of,
)
from lineplanner.quantities import COUNT, RATIO
from lineplanner.units import example

MOST_PROBLEMS = 100  # of one file; what follows is counted


def model_problems(record: Any, raw: Any, errors: list[ErrorDetails], form: Any = None) -> list[Problem]:
    """The refusals of a model as problems; a misspelt key is told once, not also as missing."""
    form = form if isinstance(form, str) else None
    misspelt = _misspelt(record, errors, form)
    found: list[Problem] = []
    for one in errors:
        loc = one["loc"]
        if one["type"] == "missing" and loc in misspelt.values():
            continue  # named as the nearest key of one that is misspelt
        if len(found) == MOST_PROBLEMS:
            found.append(Problem((), "file.more", {"count": len(errors) - MOST_PROBLEMS}))
            break
        path = loc if one["type"] in ("missing", "extra_forbidden") else _as_typed(raw, loc)
        found.append(_problem(record, path, one, form, misspelt))
    return found


def _as_typed(raw: Any, loc: Path) -> Path:
    """The part of a path that stands in the file: a setting given as plain text has no inside."""
    for depth, step in enumerate(loc):
        inside = raw.get(step) if isinstance(raw, dict) else raw[step] if _has(raw, step) else None
        if inside is None:
            return loc[:depth]
        raw = inside
    return loc


def _has(raw: Any, step: str | int) -> bool:
    return isinstance(raw, list) and isinstance(step, int) and step < len(raw)


def _misspelt(record: Any, errors: list[ErrorDetails], form: str | None) -> dict[Path, Path]:
    """Unknown keys, and the missing or other known key that each is nearest to."""
    found: dict[Path, Path] = {}
    missing = {one["loc"] for one in errors if one["type"] == "missing"}
    for loc in [one["loc"] for one in errors if one["type"] == "extra_forbidden"][: MOST_PROBLEMS + 1]:
        table = record_at(record, loc[:-1], form)
        keys = list(declared(table)) if table else []
        wanted = [str(path[-1]) for path in missing if path[:-1] == loc[:-1]]
        near = get_close_matches(str(loc[-1]), wanted, 1, 0.6) or get_close_matches(
            str(loc[-1]), keys, 1, 0.6
        )
        if near:
            found[loc] = (*loc[:-1], near[0])
    return found


def _problem(
    record: Any, path: Path, error: ErrorDetails, form: str | None, near: dict[Path, Path]
) -> Problem:
    """One error of the model as a problem of ours."""
    key, loc = error["type"], error["loc"]
    if key == "missing":
        table = record_at(record, loc[:-1], form)
        one = declared(table)[str(loc[-1])] if table else Declared("", str(loc[-1]), str, None, required=True)
        return Problem(
            path, "key.missing", {"label": one.field.label if one.field else one.key, "line": line_for(one)}
        )
    if key == "extra_forbidden":
        if loc in near:
            return Problem(path, "key.unknown_near", {"key": token(loc[-1]), "nearest": str(near[loc][-1])})
        table = record_at(record, loc[:-1], form)
        return Problem(
            path, "key.unknown", {"key": token(loc[-1]), "keys": listed(declared(table) if table else ())}
        )
    if key in ("union_tag_invalid", "union_tag_not_found"):
        forms = listed(forms_of(record))
        given = isinstance(form, str) and bool(form)
        return Problem(
            ("form",),
            "form.unknown" if given else "form.missing",
            {"forms": forms, "token": token(form or "")},
        )
    if key == "list_type":
        many_tables = isinstance(error["input"], dict)
        name = next((str(step) for step in reversed(path) if isinstance(step, str)), "")
        return Problem(
            path,
            "value.one_table" if many_tables else "value.not_list",
            {"key": name, "token": typed(error["input"])},
        )
    if key == "dict_type":
        return Problem(path, "value.not_table", {"token": typed(error["input"])})
    return Problem(path, key, error.get("ctx", {}))


def line_for(one: Declared) -> str:
    """A line of a file that would give a field: what a message about a missing key shows."""
    shape, inside = shape_of(one.type)
    kind = one.field.kind if one.field else None
    if shape is Shape.MANY:
        item, _ = described(inside[0])
        return f"[[{one.key}]]" if shape_of(item)[0] is Shape.RECORD else f'{one.key} = ["..."]'
    if shape is Shape.RECORD and "value" not in declared(inside[0]):
        return f"[{one.key}]"
    value = {
        Shape.COUNT: "1",
        Shape.YES_NO: "true",
        Shape.DATE: "2026-03-14",
        Shape.CHOICE: f'"{inside[0]}"' if inside and isinstance(inside[0], str) else str(*inside[:1]),
        Shape.PAIR: '["10 mm", "20 mm"]',
    }.get(shape, '"..."')
    if kind is not None and shape in (Shape.NUMBER, Shape.RECORD):
        value = f'"{example(kind)}"' if kind not in (RATIO, COUNT) else "1.0"
        if shape is Shape.RECORD and "source" in declared(inside[0]):
            value = f'{{ value = {value}, source = "...", status = "common practice" }}'
    return f"{one.key} = {value}"
