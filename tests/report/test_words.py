"""Every message key has one sentence, in plain words; each sentence is held to its exact text."""

import re
import tomllib
from fnmatch import fnmatch
from pathlib import Path
from typing import Any

import pytest

from lineplanner.errors import Fact, InputError, Problem, ProblemsError, Quantity
from lineplanner.files.problems import templates
from lineplanner.geometry.counting import ReasonKey
from lineplanner.plan import Plan
from lineplanner.quantities import KINDS
from lineplanner.report.setpoints import caution_text, fix_of, text_of
from lineplanner.report.style import Style
from lineplanner.report.words import checks, error_text, errors, messages, racking, reasons, sentence
from lineplanner.report.words.names import check_name, counted_statuses
from tests.report import keys

HERE = Path(__file__).parent
PACKAGE = HERE.parents[1] / "lineplanner"
ROOMS = ("plan.py", "program", "capacity", "circuit", "load", "racking", "bath", "cautions", "geometry")
EXPECTED: dict[str, Any] = tomllib.loads((HERE / "sentences.toml").read_text(encoding="utf-8"))


def known(key: str) -> bool:
    return any(fnmatch(one, key) for one in (*messages(), *templates()))


def test_every_key_of_the_engine_has_a_sentence() -> None:
    used, lost = keys.all_keys(PACKAGE, ROOMS)
    assert len(used) > 100
    assert lost == []
    assert {key: file for key, file in used.items() if not known(key)} == {}


def test_a_key_without_a_sentence_is_seen() -> None:
    source = """
def check(x):
    key = "contacts" if x else "nobody.said"
    yield Finding("contacts", Level.OK, key, source, fix=f"{x}.way")
    raise InputError("not.worded")
"""
    found, lost = keys.keys_in(source)
    assert (found, lost) == ({"contacts", "nobody.said", "*.way", "not.worded"}, [])
    assert not known("nobody.said")
    assert not known("*.way")


def test_every_reason_of_an_area_has_a_sentence() -> None:
    assert [key for key in ReasonKey.__args__ if key not in reasons.MESSAGES] == []  # type: ignore[attr-defined]


def test_no_sentence_is_left_over() -> None:
    used, _ = keys.all_keys(PACKAGE, ROOMS)
    shell = {key for key in errors.MESSAGES if key in _asked_for_by_commands()}
    unused = {key for module in (checks, errors, racking) for key in module.MESSAGES} - used.keys() - shell
    assert unused == set()


def _asked_for_by_commands() -> set[str]:
    used, _ = keys.all_keys(PACKAGE, ("report", "cli", "tui"))
    return set(used)


FORBIDDEN = re.compile(r"\b(safe|compliant|invalid|error occurred)\b", re.IGNORECASE)


@pytest.mark.parametrize("key", sorted(messages()))
def test_a_sentence_promises_nothing_and_blames_nobody(key: str) -> None:
    text = messages()[key]
    assert not FORBIDDEN.search(text)
    assert not text.endswith(".")
    assert text.isascii()


# --- exact texts ------------------------------------------------------------------------------------------


def fact(value: Any) -> Fact:
    """A fact from the table: [number, kind] is a quantity in SI."""
    if isinstance(value, list):
        return Quantity(float(value[0]), KINDS[value[1]])
    assert isinstance(value, str | int)
    return value


FACTS = {name: fact(value) for name, value in EXPECTED["facts"].items()}
OWN = {**checks.MESSAGES, **errors.MESSAGES, **reasons.MESSAGES}


def test_every_sentence_of_this_room_is_held_to_its_text() -> None:
    assert EXPECTED["metric"].keys() == OWN.keys()


@pytest.mark.parametrize("key", sorted(OWN))
def test_a_sentence_reads_exactly_so(key: str) -> None:
    facts = FACTS | {name: fact(value) for name, value in EXPECTED.get("own", {}).get(key, {}).items()}
    assert sentence(key, facts, "metric") == EXPECTED["metric"][key]


@pytest.mark.parametrize("key", sorted(EXPECTED["us"]))
def test_a_sentence_follows_the_unit_system(key: str) -> None:
    facts = FACTS | {name: fact(value) for name, value in EXPECTED.get("own", {}).get(key, {}).items()}
    assert sentence(key, facts, "us") == EXPECTED["us"][key]


def test_quantities_carry_the_signs_of_the_trade_unless_plain_letters_are_asked_for() -> None:
    facts = {"limit": Quantity(323.0, KINDS["current density"])}
    assert (
        sentence("burning.lower", facts, Style("metric")) == "Lower the current density to 3.23 A/dm² or less"
    )
    assert sentence("burning.lower", facts, Style("us", ascii=True)).endswith("30 A/ft2 or less")


# --- in plans and errors ----------------------------------------------------------------------------------


@pytest.mark.parametrize("system", ["metric", "us"])
def test_every_finding_and_caution_of_the_demo_loads_can_be_said(each_load: Plan, system: Any) -> None:
    style = Style(system)
    for finding in each_load.findings:
        said = f"{text_of(finding, style)} {fix_of(finding, style)}"
        assert "{" not in said
        assert not FORBIDDEN.search(said)
        assert check_name(finding.check)
    for caution in each_load.cautions:
        assert "{" not in caution_text(caution, style)


def test_an_error_with_several_problems_says_each_on_a_line_of_its_own() -> None:
    error = ProblemsError([Problem((), "load.nothing"), Problem(("aim",), "recipe.no_aim")])
    assert error_text(error, "metric").splitlines() == [
        "nothing hangs on this rack. Add `[[hang]]` with a part",
        'aim: the recipe has no aim. Add `aim = "25 um"` or `aim_weight = "..."`',
    ]


def test_an_error_of_a_command_says_what_is_near() -> None:
    error = InputError("figure.unknown", figure="curent", nearest="`current`")
    assert error_text(error, "metric") == "`curent` is not a figure of this plan. The nearest: `current`"


def test_an_error_that_the_reader_of_files_words_is_worded_here_too() -> None:
    assert error_text(InputError("caution.missing", id="estimate"), "metric").startswith(
        "the caution `estimate`"
    )


def test_statuses_are_counted_with_their_words() -> None:
    counts = {"assumption": 1, "published (from memory)": 2, "entered here": 3}
    assert counted_statuses(counts) == "3 entered here, 2 from memory, 1 assumption"
