"""A record as the values of its file, and back."""

import math
import tomllib
from dataclasses import fields, is_dataclass, replace
from pathlib import Path
from typing import Any

import pytest

from lineplanner.files.differences import same
from lineplanner.files.library import Library
from lineplanner.files.models import build
from lineplanner.files.reading import Entry
from lineplanner.files.writing import dump
from lineplanner.tui.filed import filed, refiled

SHOP = Path(__file__).parents[2]
KINDS = ("site", "line", "bath", "recipe", "material", "rack", "part", "load")
ENTRIES = [Library(SHOP).open(path, kind) for kind in KINDS for path in Library(SHOP).paths(kind)]


def close(one: Any, other: Any) -> bool:
    """Whether two records are the same up to the twelfth digit of their numbers."""
    if is_dataclass(one) and type(one) is type(other):
        return all(close(getattr(one, each.name), getattr(other, each.name)) for each in fields(one))
    if isinstance(one, tuple) and isinstance(other, tuple):
        return len(one) == len(other) and all(map(close, one, other))
    if isinstance(one, float) and isinstance(other, float):
        return math.isclose(one, other, rel_tol=1e-11)
    return bool(one == other)


def built(entry: Entry, raw: dict[str, Any]) -> Any:
    record, problems = build(entry.kind.record, raw)
    assert problems == []
    return record


def values(raw: Any) -> dict[str, Any]:
    return {key: value for key, value in raw.items() if key != "format"}


@pytest.mark.parametrize("entry", ENTRIES, ids=lambda one: f"{one.kind.name}-{one.document.path.stem}")
def test_a_record_of_the_demo_shop_has_the_values_that_a_new_file_of_it_has(entry: Entry) -> None:
    for system in ("metric", "us"):
        found = filed(entry.record, system)
        assert close(built(entry, found), entry.record)
        dumped = values(tomllib.loads(dump(entry.record, entry.kind.name, system)))
        assert found.keys() == dumped.keys()
    assert len(str(filed(entry.record, "us"))) < 1.1 * len(str(values(entry.document.raw))) + 100


@pytest.mark.parametrize("entry", ENTRIES, ids=lambda one: f"{one.kind.name}-{one.document.path.stem}")
def test_a_record_put_in_its_own_place_changes_no_value_as_typed(entry: Entry) -> None:
    raw = refiled(entry.document.raw, entry.record, entry.record, "us")
    assert same(raw, entry.document.raw)
    renamed = refiled(entry.document.raw, entry.record, replace(entry.record, name="another"), "us")
    assert same(renamed, {**entry.document.raw, "name": "another"})


def test_any_load_put_in_the_place_of_any_other_reads_as_itself() -> None:
    loads = [one for one in ENTRIES if one.kind.name == "load"]
    for old in loads:
        for new in loads:
            raw = refiled(old.document.raw, old.record, new.record, "metric")
            assert close(built(new, values(raw)), new.record)


def test_a_part_of_another_form_keeps_what_both_forms_say_alike() -> None:
    parts = [one for one in ENTRIES if one.kind.name == "part"]
    for old in parts:
        for new in parts:
            raw = refiled(old.document.raw, old.record, new.record, "metric")
            assert close(built(new, values(raw)), new.record)
            assert raw["format"] == old.document.raw["format"]


def test_a_quantity_that_was_computed_is_written_without_the_noise_of_computing() -> None:
    load = next(one for one in ENTRIES if one.document.path.stem == "valve-blocks-24").record
    assert filed(replace(load, solution_drop=0.1 + 0.005), "metric")["solution_drop"] == "105 mm"
    assert filed(replace(load, solution_drop=0.254), "us")["solution_drop"] == "10 in"
    assert filed(replace(load, solution_drop=0.254), "metric")["solution_drop"] == "254 mm"
    assert filed(replace(load, solution_drop=0.105), "us")["solution_drop"] == "105 mm"
    assert (
        filed(replace(load, solution_drop=0.1234567890123456), "metric")["solution_drop"]
        == "123.456789012 mm"
    )
