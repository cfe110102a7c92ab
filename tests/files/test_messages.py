"""Every message key of a problem has a sentence with its facts, in the one form of this house."""

import ast
import re
import string
from collections.abc import Iterator
from pathlib import Path

import pytest

import lineplanner
from lineplanner.errors import Problem, Quantity
from lineplanner.files.messages import MESSAGES
from lineplanner.files.part_messages import PART_MESSAGES
from lineplanner.files.problems import FileProblem, key_text, templates, text_of, token, word
from lineplanner.quantities import VOLTAGE

PACKAGE = Path(lineplanner.__file__).parent
OURS = {**PART_MESSAGES, **MESSAGES}


def strings_in(rooms: tuple[str, ...]) -> set[str]:
    """All plain texts in the code of some rooms, message tables aside."""
    files = [file for room in rooms for file in (PACKAGE / room).glob("*.py") if "messages" not in file.name]
    trees = [ast.parse(file.read_text(encoding="utf-8")) for file in files]
    return {
        node.value
        for tree in trees
        for node in ast.walk(tree)
        if isinstance(node, ast.Constant) and isinstance(node.value, str)
    }


def problem_keys() -> Iterator[str]:
    """Message keys that stand in the code beside Problem(...)."""
    for file in PACKAGE.rglob("*.py"):
        for node in ast.walk(ast.parse(file.read_text(encoding="utf-8"))):
            called = (
                isinstance(node, ast.Call) and isinstance(node.func, ast.Name) and node.func.id == "Problem"
            )
            if called and isinstance(node.args[1], ast.Constant):
                yield str(node.args[1].value)


def test_every_key_in_the_code_has_a_sentence() -> None:
    keys = set(problem_keys())
    assert len(keys) > 50
    assert keys - set(templates()) == set()


def test_every_sentence_is_used() -> None:
    used = strings_in(("files", "inputs", "geometry"))
    composed = ("recipe.own_", "recipe.base_of_", "bath.needs_", "material.needs_")
    unused = [key for key in OURS if key not in used and not key.startswith(composed)]
    assert unused == []


@pytest.mark.parametrize("key", OURS)
def test_a_sentence_says_what_is_wrong_and_what_to_do(key: str) -> None:
    text = OURS[key]
    assert not re.search(r"invalid|error|please|\bsafe\b|compliant|!", text, re.IGNORECASE)
    assert not text.endswith((".", " "))
    assert text[0] in "`{" or text[0].islower()
    assert ". " in text or ": " in text  # the second half is the way out
    assert "  " not in text
    assert text.count("`") % 2 == 0


@pytest.mark.parametrize("key", OURS)
def test_a_sentence_takes_its_facts(key: str) -> None:
    names = [name for _, name, _, _ in string.Formatter().parse(OURS[key]) if name]
    text = text_of(key, dict.fromkeys(names, "FACT"))
    assert text.count("FACT") == len(names)


def test_quantities_are_shown_in_the_unit_system_asked_for() -> None:
    problem = Problem(
        ("rectifiers", 0), "line.full_on", {"full": Quantity(10.0, VOLTAGE), "rated": Quantity(12.0, VOLTAGE)}
    )
    assert word(problem) == (
        "rectifiers[1]: full phase-on gives 10.0 V, less than the rated 12.0 V. Check both voltages"
    )


def test_a_place_is_shown_as_far_as_it_is_known() -> None:
    for path, line, keys, front in (
        (Path("a.toml"), 3, ("hang", 1, "at", 0), "a.toml:3: hang[2].at[1]: "),
        (Path("a.toml"), None, (), "a.toml: "),
        (None, None, ("name",), "name: "),
        (None, None, (), ""),
    ):
        assert word(FileProblem(path, line, keys, "file.folder")) == f"{front}{OURS['file.folder']}"


def test_odd_keys_are_quoted_and_cannot_break_the_line() -> None:
    assert key_text(("a b", "c\nd", 0)) == '"a b"."c\\nd"[1]'
    assert token("\x1b[31m\u202e") == "\\x1b[31m\\u202e"


def test_a_rule_without_a_sentence_still_says_which_rule_it_is() -> None:
    assert text_of("some-new-rule", {"limit": Quantity(12.0, VOLTAGE)}) == "some new rule (limit 12.0 V)"
