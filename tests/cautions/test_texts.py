"""The shipped texts: readable anywhere, short, promising nothing; and what a site may not do to them."""

import re
from dataclasses import fields, replace
from datetime import date
from typing import Any, get_args, get_type_hints

import pytest

from lineplanner.inputs.cautions import (
    DECLARED,
    FILLED_VALUE,
    LONGEST_FILLED,
    LONGEST_RAW,
    LONGEST_SHORT,
    MOMENTS,
    WORDS,
    CautionText,
    CautionTexts,
    CautionThresholds,
    Moment,
    Word,
    shown_values,
    text_problems,
)
from lineplanner.quantities import Field
from lineplanner.sources import Status


def changed(texts: CautionTexts, id_: str, **changes: Any) -> CautionTexts:
    return replace(texts, cautions=tuple(replace(c, **changes) if c.id == id_ else c for c in texts.cautions))


def keys(texts: CautionTexts) -> list[tuple[str | int, str]]:
    return [(problem.path[-1], problem.key) for problem in text_problems(texts)]


def test_the_shipped_texts_have_no_problem(texts: CautionTexts) -> None:
    assert text_problems(texts) == []


def test_there_are_51_cautions_each_once(texts: CautionTexts) -> None:
    ids = [caution.id for caution in texts.cautions]
    assert len(ids) == len(set(ids)) == 51
    assert set(ids) == DECLARED.keys()


def test_every_text_is_ascii_and_short_even_when_filled(texts: CautionTexts) -> None:
    for caution in texts.cautions:
        assert caution.text.isascii()
        assert caution.text.isprintable()
        assert len(caution.text) <= LONGEST_RAW == 200
        filled = re.sub(r"\{\w+\}", "9" * FILLED_VALUE, caution.text)
        assert len(filled) <= LONGEST_FILLED == 240, caution.id
        assert caution.text == " ".join(caution.text.split())
        assert caution.text.endswith(".")


def test_every_short_text_says_what_to_do_in_44_characters(texts: CautionTexts) -> None:
    for caution in texts.cautions:
        filled = re.sub(r"\{\w+\}", "9" * FILLED_VALUE, caution.short)
        assert len(filled) <= LONGEST_SHORT == 44, caution.id
        assert caution.short.isascii()
        assert set(shown_values(caution.short)) <= DECLARED[caution.id][1]
        assert not caution.short.endswith(".")
    assert len({caution.short for caution in texts.cautions}) == len(texts.cautions)


def test_a_value_that_is_not_known_reads_well_in_its_text(texts: CautionTexts) -> None:
    for caution in texts.cautions:
        if caution.id == "he-bake":  # its rule has words of its own for what is not known
            continue
        for text in (caution.text, caution.short):
            said = re.sub(r"\{\w+\}", "not known", text)
            assert not re.search(r"\b(by|takes|reaches|allows|keep|within|for|at|a) not known", said), (
                caution.id
            )


def test_no_text_promises_anything(texts: CautionTexts) -> None:
    promise = re.compile(r"\b(safe|safely|compliant|compliance|harmless|guarantee\w*)\b", re.IGNORECASE)
    assert [caution.id for caution in texts.cautions if promise.search(caution.text)] == []


def test_every_text_shows_exactly_the_values_of_its_rule(texts: CautionTexts) -> None:
    # that the rules provide them is checked with every trigger
    for caution in texts.cautions:
        shown = shown_values(caution.text)
        assert set(shown) == DECLARED[caution.id][1]
        assert len(shown) == len(set(shown))


def test_every_text_has_source_date_status_moment_and_a_rank_of_its_own(texts: CautionTexts) -> None:
    for caution in texts.cautions:
        assert caution.source
        assert caution.as_of == date(2026, 12, 1)
        assert caution.status in Status
        assert caution.moment
        assert set(caution.moment) <= set(MOMENTS)
    ranks = [(caution.word, caution.rank) for caution in texts.cautions]
    assert len(ranks) == len(set(ranks))


def test_the_words_and_moments_are_those_of_the_types() -> None:
    assert get_args(Word) == WORDS
    assert get_args(Moment) == MOMENTS


def test_every_moment_has_a_danger_or_a_warning(texts: CautionTexts) -> None:
    for moment in MOMENTS:
        assert any(moment in c.moment for c in texts.cautions if c.word in {"DANGER", "WARNING"})


def test_the_last_line_defers_to_the_data_sheet_and_to_people(texts: CautionTexts) -> None:
    estimate = next(caution.text for caution in texts.cautions if caution.id == "estimate")
    for phrase in ("estimate", "afety data sheet", "qualified people", "local code", "permit"):
        assert phrase in estimate


# --- a site's own file -----------------------------------------------------------------------------------


def test_a_caution_cannot_be_left_out(texts: CautionTexts) -> None:
    without = replace(texts, cautions=tuple(c for c in texts.cautions if c.id != "h2-foam"))
    (problem,) = text_problems(without)
    assert (problem.key, problem.facts) == ("caution.missing", {"id": "h2-foam"})


def test_a_caution_of_unknown_id_and_one_that_comes_twice_are_refused(texts: CautionTexts) -> None:
    assert ("id", "caution.unknown") in keys(changed(texts, "hot", id="warm"))
    twice = replace(texts, cautions=(*texts.cautions, texts.cautions[0]))
    assert keys(twice) == [("id", "caution.twice")] * 2


@pytest.mark.parametrize(
    ("id_", "word", "allowed"),
    [("dc-50", "DANGER", True), ("dc-50", "CAUTION", False), ("cr6-core", "WARNING", False)],
)
def test_a_word_may_be_raised_and_never_lowered(
    *, id_: str, word: Word, allowed: bool, texts: CautionTexts
) -> None:
    assert keys(changed(texts, id_, word=word)) == ([] if allowed else [("word", "caution.word_lowered")])


@pytest.mark.parametrize(
    ("change", "problem"),
    [
        ({"text": "Hei\u00df: {hottest}."}, ("text", "caution.not_ascii")),
        ({"text": "Hot."}, ("text", "caution.values")),
        ({"text": "Hot: {hottest}, {how_hot}."}, ("text", "caution.values")),
        ({"text": "Hot: {hottest} and {hottest."}, ("text", "caution.values")),
        ({"text": "Hot: {hottest}, but safe."}, ("text", "caution.promise")),
        ({"text": "Hot: {hottest}." + " x" * 93}, ("text", "caution.too_long")),
        ({"moment": ()}, ("moment", "caution.no_moment")),
        ({"short": "x" * 45}, ("short", "caution.too_long")),
        ({"short": "hot: {how_hot}"}, ("short", "caution.values")),
        ({"short": "hei\u00df"}, ("short", "caution.not_ascii")),
        ({"short": "safe"}, ("short", "caution.promise")),
    ],
    ids=[
        "letters",
        "no-value",
        "strange-value",
        "open-brace",
        "promise",
        "long",
        "no-moment",
        "short-long",
        "short-value",
        "short-letters",
        "short-promise",
    ],
)
def test_a_text_that_cannot_be_shown_is_refused(
    change: dict[str, Any], problem: tuple[str, str], texts: CautionTexts
) -> None:
    assert keys(changed(texts, "hot", **change)) == [problem]


def test_a_text_may_have_200_characters_as_written_and_240_when_filled(texts: CautionTexts) -> None:
    assert keys(changed(texts, "estimate", text="x" * 200)) == []
    # 20 values of 12 characters are 240; one letter more is too much, though only 181 are written
    assert keys(changed(texts, "hot", text="{hottest}" * 20)) == []
    assert keys(changed(texts, "hot", text="{hottest}" * 20 + "x")) == [("text", "caution.too_long")]
    assert keys(changed(texts, "estimate", text="x" * 201)) == [("text", "caution.too_long")]


def bounds(name: str) -> Field:
    hint = get_type_hints(CautionThresholds, include_extras=True)[name]
    return next(item for item in hint.__metadata__ if isinstance(item, Field))


def test_a_threshold_as_shipped_is_the_loosest_that_a_file_may_hold(texts: CautionTexts) -> None:
    for declared in fields(CautionThresholds):
        value = getattr(texts.thresholds, declared.name).value
        field = bounds(declared.name)
        loosest = [
            edge for edge in (field.low, field.high) if edge is not None and edge == pytest.approx(value)
        ]
        assert loosest, declared.name
        assert field.low is None or value >= field.low
        assert field.high is None or value <= field.high


def test_a_caution_text_is_a_frozen_record(texts: CautionTexts) -> None:
    assert isinstance(texts.cautions[0], CautionText)
    with pytest.raises(AttributeError):
        texts.cautions[0].word = "NOTICE"  # type: ignore[misc]
