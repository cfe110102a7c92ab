"""What differs between the values of two files, and making one of the other."""

from typing import Any

from hypothesis import given
from hypothesis import strategies as st

from lineplanner.files.differences import Change, applied, differences, same

LEAVES = st.one_of(st.booleans(), st.integers(0, 3), st.sampled_from([0.5, 2.0]), st.sampled_from("abc"))
VALUES = st.recursive(
    LEAVES,
    lambda inside: st.lists(inside, max_size=5) | st.dictionaries(st.sampled_from("xyz"), inside, max_size=3),
    max_leaves=12,
)
TABLES = st.dictionaries(st.sampled_from("pqr"), VALUES, max_size=3)


@given(TABLES, TABLES)
def test_the_changes_of_two_files_make_the_second_of_the_first(
    old: dict[str, Any], new: dict[str, Any]
) -> None:
    assert same(applied(old, differences(old, new)), new)
    assert same(applied(old, differences(old, new, by_word=False)), new)


@given(TABLES)
def test_a_file_does_not_differ_from_itself(values: dict[str, Any]) -> None:
    assert list(differences(values, values)) == []


def test_what_changes_are_made_on_stays_as_it_was() -> None:
    old = {"hang": [{"tips": ["A1"]}]}
    assert applied(old, [Change(("hang", 0, "tips", 0), "A1", "B1")]) == {"hang": [{"tips": ["B1"]}]}
    assert old == {"hang": [{"tips": ["A1"]}]}


def test_an_entry_taken_out_is_one_change() -> None:
    old, new = (
        {"hang": [{"part": "a"}, {"part": "b"}, {"part": "c"}]},
        {"hang": [{"part": "a"}, {"part": "c"}]},
    )
    assert list(differences(old, new)) == [Change(("hang", 1), {"part": "b"}, None)]


def test_a_number_written_otherwise_differs_and_the_order_of_keys_does_not() -> None:
    assert not same({"a": 2}, {"a": 2.0})
    assert not same({"a": 1}, {"a": True})
    assert same({"a": 1, "b": 2}, {"b": 2, "a": 1})
