"""Every text that must be refused, with the exact words of the refusal; the table is in refusals.toml."""

import tomllib
from pathlib import Path

import pytest

from lineplanner.quantities import (
    CURRENT,
    CURRENT_DENSITY,
    KINDS,
    RATIO,
    TEMPERATURE,
    THICKNESS,
    VOLTAGE,
    Kind,
)
from lineplanner.units import MESSAGES, UnitTextError, parse, show

TABLE = tomllib.loads((Path(__file__).parent / "refusals.toml").read_text(encoding="utf-8"))


def refusal(text: str, kind: Kind) -> tuple[str, str]:
    """The key and the words of a refusal."""
    with pytest.raises(UnitTextError) as caught:
        parse(text, kind)
    return caught.value.key, MESSAGES[caught.value.key].format_map(caught.value.facts)


@pytest.mark.usefixtures("no_library")
@pytest.mark.parametrize(("kind", "text", "key", "words"), TABLE["by_grammar"])
def test_a_text_that_is_not_one_number_with_one_unit_is_refused_before_the_unit_library_is_asked(
    kind: str, text: str, key: str, words: str
) -> None:
    assert refusal(text, KINDS[kind]) == (key, words)


@pytest.mark.parametrize(("kind", "text", "key", "words"), TABLE["by_registry"])
def test_a_unit_of_another_kind_is_refused_with_an_example_to_type(
    kind: str, text: str, key: str, words: str
) -> None:
    assert refusal(text, KINDS[kind]) == (key, words)


def test_every_message_is_tested() -> None:
    assert {key for rows in TABLE.values() for _, _, key, _ in rows} == set(MESSAGES)


def test_no_message_says_invalid_or_error() -> None:
    for words in MESSAGES.values():
        assert "nvalid" not in words
        assert "error" not in words.lower()


def test_a_refusal_shows_the_example_of_the_system_asked_for() -> None:
    with pytest.raises(UnitTextError) as caught:
        parse("5", THICKNESS, system="us")
    assert caught.value.facts["example"] == "2 mil"
    with pytest.raises(UnitTextError) as caught:
        parse("200 A", CURRENT_DENSITY, system="metric")
    assert caught.value.facts["example"] == "2.5 A/dm2"


def test_a_known_unit_still_refuses_what_its_kind_does_not_allow() -> None:
    parse("20 degC", TEMPERATURE)
    assert refusal("-300 degC", TEMPERATURE)[0] == "unit.below_absolute_zero"
    parse("20 A", CURRENT)
    assert refusal("1e400 A", CURRENT)[0] == "unit.size"
    assert refusal("1e-400 A", CURRENT)[0] == "unit.size"
    assert parse("0 A", CURRENT) == 0.0
    assert parse("0e5 A", CURRENT) == 0.0


def test_showing_a_plain_number_teaches_the_reader_no_second_number() -> None:
    show(0.5, RATIO, "metric", unit="1")
    assert refusal("5 1", RATIO)[0] == "unit.two_numbers"


def test_a_unit_is_remembered_for_its_own_kind_only() -> None:
    parse("5 A", CURRENT)
    assert refusal("5 A", VOLTAGE)[0] == "unit.wrong_kind"
    assert refusal("5", CURRENT)[0] == "unit.missing"
