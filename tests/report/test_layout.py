"""Lines of plain text: wrapping, columns, cutting."""

from lineplanner.report.layout import TERMINAL, columns, filled, shortened, squeezed, typed, wrapped


def test_a_number_is_never_parted_from_its_unit() -> None:
    assert wrapped("expected is a film of 50.2 um per side", 27) == [
        "expected is a film of",
        "50.2 um per side",
    ]


def test_a_box_to_tick_is_kept_whole() -> None:
    assert "[ ]" in "\n".join(wrapped("first; [ ] second", 12))
    assert wrapped("plugs in; [ ] polarity", 14) == ["plugs in;", "[ ] polarity"]


def test_later_lines_are_indented_by_the_length_of_the_first_mark() -> None:
    assert wrapped("one two three", 11, first="- ") == ["- one two", "  three"]
    assert wrapped("one two three", 11, first="- ", rest="") == ["- one two", "three"]


def test_a_text_that_is_cut_ends_at_a_word() -> None:
    assert shortened("hang the parts lower", 14) == "hang the ..."
    assert shortened("hang the parts lower", 40) == "hang the parts lower"


def test_columns_stand_under_each_other() -> None:
    assert columns([("a", "1"), ("bcd",)], right=(1,)) == ["  a    1", "  bcd"]
    assert columns([]) == []


def test_a_table_is_never_wider_than_a_terminal_and_cuts_names_in_their_middle() -> None:
    name = "grip rail with two stand-offs, hole[12] wall"
    lines = columns([(name, "x" * 30, "y" * 20), ("edge", "1", "2")], right=(1, 2))
    assert max(map(len, lines)) == TERMINAL
    assert lines[0].startswith("  grip rail ")
    assert "12] wall  xx" in lines[0]
    assert squeezed("edge", 12) == "edge"


def test_a_word_with_blanks_is_typed_in_quotes() -> None:
    assert typed("rack_library/loads/lug-mix.toml") == "rack_library/loads/lug-mix.toml"
    assert typed("my shop") == '"my shop"'
    assert typed("C:\\shops\\ours") == "C:\\shops\\ours"


def test_items_fill_lines_and_none_is_broken() -> None:
    assert filled(["stop at 96 Ah", "work +"], 10) == ["stop at 96 Ah", "work +"]
