"""The order of cautions: word, then what kills first, then the id. A DANGER is never hidden."""

from collections.abc import Callable
from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.cautions.facts import Applied, Situation
from lineplanner.cautions.ranking import Caution, at_moment, capped, graver, gravest, merged, ranked
from lineplanner.cautions.rules import applicable
from lineplanner.errors import InputError
from lineplanner.inputs.cautions import DECLARED, MOMENTS, WORDS, CautionTexts

Make = Callable[..., Situation]


@pytest.fixture
def chrome(unknown: Make, texts: CautionTexts) -> tuple[Caution, ...]:
    return ranked(applicable(unknown("chrome-hard", steps=frozenset({"caustic-etch"}))), texts)


def everything(texts: CautionTexts) -> tuple[Caution, ...]:
    return ranked((Applied(id=id_, facts={}) for id_ in DECLARED), texts)


def test_cautions_are_sorted_by_word_then_rank_then_id(chrome: tuple[Caution, ...]) -> None:
    keys = [(WORDS.index(one.word), one.rank, one.id) for one in chrome]
    assert keys == sorted(keys)
    assert {one.word for one in chrome} == set(WORDS)


def test_the_id_decides_between_equal_ranks(chrome: tuple[Caution, ...]) -> None:
    same = [replace(chrome[0], id=id_, rank=5) for id_ in ("b", "c", "a")]
    assert [one.id for one in merged(same)] == ["a", "b", "c"]


def test_what_kills_at_once_comes_before_what_kills_slowly(texts: CautionTexts) -> None:
    dangers = [one.id for one in everything(texts) if one.word == "DANGER"]
    # our own judgement: entry, shock and gas kill in seconds, HF in hours; then the bath, then the rest of the line
    for quick, slow in [
        ("tank-entry", "acid-burn"),
        ("dc-60", "acid-burn"),
        ("h2-rich", "acid-burn"),
        ("h2-foam", "acid-burn"),
        ("fluoride-hf", "acid-burn"),
        ("cr6-core", "acid-burn"),
        ("acid-burn", "no-mix"),
    ]:
        assert dangers.index(quick) < dangers.index(slow)


def test_the_gravest_of_a_moment_belongs_to_that_moment(texts: CautionTexts) -> None:
    for moment in MOMENTS:
        found = gravest(everything(texts), moment)
        assert found is not None
        assert moment in found.moments
        assert found == at_moment(everything(texts), moment)[0]


def test_a_notice_never_takes_the_line_from_a_graver_word(texts: CautionTexts) -> None:
    cautions = everything(texts)
    for moment in MOMENTS:
        found = gravest(cautions, moment)
        assert found is not None
        assert found.word in {"DANGER", "WARNING"}


def test_without_a_moment_the_gravest_of_all_is_given_and_of_none_nothing(texts: CautionTexts) -> None:
    assert gravest(everything(texts)) == everything(texts)[0]
    assert gravest(()) is None


def test_the_same_hazard_twice_keeps_the_graver_word_and_the_moments_of_both(texts: CautionTexts) -> None:
    weak = Applied(id="acid-burn", facts={}, word="WARNING", moments=("after",))
    strong = Applied(id="acid-burn", facts={}, word="DANGER", moments=("before loading",))
    for order in ((weak, strong), (strong, weak)):
        (one,) = ranked(order, texts)
        assert (one.word, one.moments) == ("DANGER", ("before loading", "after"))


def test_a_rule_decides_the_word_and_the_moments_where_it_says_so(texts: CautionTexts) -> None:
    (one,) = ranked([Applied(id="acid-burn", facts={}, word="WARNING", moments=("after",))], texts)
    assert (one.word, one.moments) == ("WARNING", ("after",))
    (one,) = ranked([Applied(id="acid-burn", facts={})], texts)
    assert one.word == "DANGER"
    assert len(one.moments) > 1


def test_a_file_that_lowers_a_word_does_not_lower_what_is_shown(texts: CautionTexts) -> None:
    lowered = replace(texts, cautions=tuple(replace(c, word="NOTICE") for c in texts.cautions))
    assert [one.word for one in everything(lowered)] == [one.word for one in everything(texts)]


def test_a_file_that_raises_a_word_raises_what_is_shown(texts: CautionTexts) -> None:
    raised = replace(texts, cautions=tuple(replace(c, word="DANGER") for c in texts.cautions))
    assert {one.word for one in everything(raised)} == {"DANGER"}


def test_a_demanded_caution_without_a_text_is_an_error_not_silence(texts: CautionTexts) -> None:
    without = replace(texts, cautions=tuple(c for c in texts.cautions if c.id != "hot"))
    with pytest.raises(InputError) as caught:
        ranked([Applied(id="hot", facts={})], without)
    assert (caught.value.key, caught.value.facts) == ("caution.missing", {"id": "hot"})


@given(most=st.integers(min_value=0, max_value=60))
def test_a_short_list_hides_no_danger_and_counts_what_it_leaves_out(most: int, texts: CautionTexts) -> None:
    cautions = everything(texts)
    shown, left = capped(cautions, most)
    assert [one for one in cautions if one.word == "DANGER" and one not in shown] == []
    assert len(shown) + left == len(cautions)
    assert shown == cautions[: len(shown)]


def test_graver_takes_any_number_of_words() -> None:
    assert graver("NOTICE") == "NOTICE"
    assert graver(*reversed(WORDS)) == "DANGER"
