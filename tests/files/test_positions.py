"""The line of every key: against the standard library's parser, on texts made by other packages and by hand."""

import tomllib
from collections.abc import Iterator
from typing import Any

import pytest
import tomli_w
import tomlkit
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.files.positions import positions
from lineplanner.inputs.declared import Path


def paths_in(value: Any, path: Path = ()) -> Iterator[Path]:
    """Every path of a parsed text."""
    if path:
        yield path
    pairs = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, inside in pairs:
        yield from paths_in(inside, (*path, key))


TEXT = '''\
format = "lineplanner line 1"   # a comment = with ] signs
title = """two
lines"""
raw = \'\'\'
"]}'
\'\'\'

quoted."a.b" = 1
'single key' = "x # y"
date = 1979-05-27 07:32:00

[plain]
list = [
    # inside
    "a", [1,
    2],
    { x = 1, y = [
        3,
    ] },
]

[[many]]
x = 1
[many.inside]
y = 2
[[many.deep]]
z = 3
[[many]]
x = 4
[[many.deep]]
z = 5
[[many.deep]]
z = 6
'''
LINES: dict[Path, int] = {
    ("format",): 1,
    ("title",): 2,
    ("raw",): 4,
    ("quoted",): 8,
    ("quoted", "a.b"): 8,
    ("single key",): 9,
    ("date",): 10,
    ("plain",): 12,
    ("plain", "list"): 13,
    ("plain", "list", 0): 15,
    ("plain", "list", 1): 15,
    ("plain", "list", 1, 1): 16,
    ("plain", "list", 2, "x"): 17,
    ("plain", "list", 2, "y"): 17,
    ("plain", "list", 2, "y", 0): 18,
    ("many",): 22,
    ("many", 0): 22,
    ("many", 0, "inside", "y"): 25,
    ("many", 0, "deep", 0, "z"): 27,
    ("many", 1): 28,
    ("many", 1, "x"): 29,
    ("many", 1, "deep", 1): 32,
    ("many", 1, "deep", 1, "z"): 33,
}


def test_every_way_to_write_a_key_has_its_line() -> None:
    found = positions(TEXT)
    assert {path: found.lines.get(path) for path in LINES} == LINES
    assert set(paths_in(tomllib.loads(TEXT))) <= set(found.lines)
    assert found.twice == ()


def test_what_is_not_there_has_the_line_of_what_is_around_it() -> None:
    found = positions(TEXT)
    assert found.line(("many", 1, "deep", 1, "none")) == 32
    assert found.line(("none",)) == 1
    assert found.line(()) == 1


@pytest.mark.parametrize(
    "text",
    [
        'a = """"quotes at both ends"""""',
        "a = ''''x''''",
        'a = """"""',
        "a = ''",
        'a = "\\""',
        r'a = """\""""',
        "a = []",
    ],
)
def test_quotes_beside_quotes_do_not_hide_the_next_key(text: str) -> None:
    tomllib.loads(text)
    assert positions(f"{text}\nb = 1\n").lines[("b",)] == 2


@pytest.mark.parametrize(
    "text", ["a", "a = ", "[a", "a = [", "a = {b", "]", '"', "a = [1 2]", "a = " + "[" * 50_000]
)
def test_a_text_that_is_no_toml_is_followed_as_far_as_it_goes(text: str) -> None:
    assert positions(f"x = 1\n{text}").lines[("x",)] == 1


keys = st.one_of(
    st.text("abc-_1", min_size=1, max_size=3), st.text(max_size=4).filter(lambda t: t.isprintable())
)
plain = st.one_of(st.integers(-9, 9), st.booleans(), st.dates(), st.text("ab\"'\\#[]{}=\n\u00b5", max_size=8))
tables = st.recursive(
    st.dictionaries(keys, plain, max_size=4),
    lambda inner: st.dictionaries(
        keys, st.one_of(plain, inner, st.lists(inner, max_size=3), st.lists(plain)), max_size=4
    ),
    max_leaves=20,
)


@settings(deadline=None)
@given(tables)
def test_every_path_of_a_text_written_by_tomli_w_has_a_line_that_holds_its_key(table: dict[str, Any]) -> None:
    for text in (tomli_w.dumps(table), tomli_w.dumps(table, multiline_strings=True), tomlkit.dumps(table)):
        found, lines = positions(text), text.split("\n")
        for path in paths_in(tomllib.loads(text)):
            line = lines[found.lines[path] - 1]
            if isinstance(path[-1], str) and path[-1].isascii() and path[-1].isalnum():
                assert path[-1] in line
