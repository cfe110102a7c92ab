"""Lines of plain text: wrapping, columns, cutting."""

from lineplanner.report.layout import columns, filled, shortened, wrapped


def test_a_number_is_never_parted_from_its_unit() -> None:
    assert wrapped("expected is a film of 50.2 um per side", 27) == [
        "expected is a film of",
        "50.2 um per side",
    ]


def test_a_box_to_tick_is_kept_whole() -> None:
    assert "[ ]" in "\n".join(wrapped("first; [ ] second", 12))


def test_later_lines_are_indented_by_the_length_of_the_first_mark() -> None:
    assert wrapped("one two three", 11, first="- ") == ["- one two", "  three"]
    assert wrapped("one two three", 11, first="- ", rest="") == ["- one two", "three"]


def test_a_text_that_is_cut_ends_at_a_word() -> None:
    assert shortened("hang the parts lower", 14) == "hang the ..."
    assert shortened("hang the parts lower", 40) == "hang the parts lower"


def test_columns_stand_under_each_other() -> None:
    assert columns([("a", "1"), ("bcd",)], right=(1,)) == ["  a    1", "  bcd"]
    assert columns([]) == []


def test_items_fill_lines_and_none_is_broken() -> None:
    assert filled(["stop at 96 Ah", "work +"], 10) == ["stop at 96 Ah", "work +"]
