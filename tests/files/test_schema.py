"""The JSON schema of a kind accepts the files of that kind and refuses what the reader refuses."""

import copy
import json
import tomllib
from datetime import date
from typing import Any

import pytest

from lineplanner.files.kinds import kinds
from lineplanner.files.models import build
from lineplanner.files.schema import schema
from lineplanner.files.site import packaged_site
from tests.files.samples import text_of

TYPES = {
    "object": dict,
    "array": list,
    "string": str,
    "integer": int,
    "number": (int, float),
    "boolean": bool,
}


def fits(value: Any, rule: dict[str, Any]) -> bool:
    """The keywords of JSON Schema 2020-12 that the schemas use (json-schema.org, core and validation)."""
    known = {
        "type",
        "properties",
        "required",
        "additionalProperties",
        "items",
        "prefixItems",
        "minItems",
        "maxItems",
    }
    known |= {"enum", "const", "anyOf", "oneOf", "title", "description", "examples", "format", "$schema"}
    assert set(rule) <= known, set(rule) - known
    wanted = TYPES[rule["type"]] if "type" in rule else object
    if not isinstance(value, wanted) or (isinstance(value, bool) and wanted not in (bool, object)):  # type: ignore[arg-type]
        return False
    if ("enum" in rule and value not in rule["enum"]) or ("const" in rule and value != rule["const"]):
        return False
    if "anyOf" in rule and not any(fits(value, one) for one in rule["anyOf"]):
        return False
    if "oneOf" in rule and sum(fits(value, one) for one in rule["oneOf"]) != 1:
        return False
    if isinstance(value, dict) and "properties" in rule:
        return set(rule["required"]) <= set(value) <= set(rule["properties"]) and all(
            fits(one, rule["properties"][key]) for key, one in value.items()
        )
    if isinstance(value, list) and "prefixItems" in rule:
        pairs = zip(value, rule["prefixItems"], strict=False)
        return rule["minItems"] <= len(value) <= rule["maxItems"] and all(
            fits(one, each) for one, each in pairs
        )
    return not isinstance(value, list) or all(fits(one, rule["items"]) for one in value)


def as_json(value: Any) -> Any:
    """A parsed TOML text as JSON has it: dates as text."""
    return json.loads(
        json.dumps(value, default=lambda one: one.isoformat() if isinstance(one, date) else None)
    )


@pytest.mark.parametrize("kind", kinds())
def test_a_file_of_every_kind_fits_its_schema(kind: str) -> None:
    assert fits(as_json(tomllib.loads(text_of(kind))), json.loads(json.dumps(schema(kind))))


def test_every_file_of_the_demo_shop_fits_the_schema_of_its_kind() -> None:
    for name in ("configs", "rack_library"):
        for path in (packaged_site() / name).rglob("*.toml"):
            raw = as_json(tomllib.loads(path.read_text(encoding="utf-8")))
            assert fits(raw, schema(raw["format"].split()[1])), path


def places(value: Any, path: tuple[Any, ...] = ()) -> list[tuple[Any, ...]]:
    pairs = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    return [path, *(one for key, inside in pairs for one in places(inside, (*path, key)))]


@pytest.mark.parametrize("kind", ["line", "recipe", "rack", "part", "load", "conductors"])
def test_what_the_schema_refuses_the_reader_refuses(kind: str) -> None:
    rule, raw = schema(kind), tomllib.loads(text_of(kind))
    tried = 0
    for path in places(raw):
        for other in (5, "words", True, [], {}, {"a": 1}, ["x"]):
            if not path or path == ("format",):
                continue
            changed = copy.deepcopy(raw)
            inside = changed
            for step in path[:-1]:
                inside = inside[step]
            inside[path[-1]] = other
            front = changed.pop("format")
            _, problems = build(kinds()[kind].record, changed)
            if not fits(as_json({"format": front, **changed}), rule):
                tried += 1
                assert problems, (path, other)
    assert tried > 50


def test_a_schema_says_what_a_field_is_in_the_words_of_its_declaration() -> None:
    tank = schema("line")["properties"]["tank"]["items"]["properties"]
    assert tank["gap"] == {
        "title": "work to counter-electrode",
        "type": "string",
        "description": "length with its unit",
        "examples": ["120 mm", "4.75 in"],
    }
    assert tank["cooling"]["anyOf"][1] == {"const": "unknown"}
    assert schema("line")["properties"]["format"] == {"const": "lineplanner line 1"}
