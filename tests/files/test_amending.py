"""A person's file with other values in it: what was not changed stays to the byte."""

import tomllib
from pathlib import Path
from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.files.amending import amended, read_back
from lineplanner.files.differences import Change, applied, same
from lineplanner.files.document import Document, Stamp
from lineplanner.files.library import Library
from lineplanner.files.reading import Entry, read_entry

SHOP = Path(__file__).parents[2]
TEXT = """\
format = "lineplanner load 1" # first
name = "x"   # the name
rack = 'spline'
# of the rack

# about the first hang
[[hang]] # heading
part = "a" # p
tips = [
  "A1", # one
  "A2",
]

# about the second hang
# in two lines
[[hang]]
part = "b"
count = 3
# of the count

# about the third hang
[[hang]]
part = "c"
count = 4
note = \"\"\"
[hang]
# no comment
\"\"\"
"""


def document(text: str) -> Document:
    content = text.encode("utf-8")
    return Document(
        Path("x.toml"), text, tomllib.loads(text.removeprefix("\ufeff")), Stamp(0, len(content), "")
    )


def changed(*changes: Change, text: str = TEXT) -> str:
    found = document(text)
    raw = applied(found.raw, changes)
    new = amended(found, raw)
    assert same(tomllib.loads(new.removeprefix("\ufeff")), raw)
    return new


def put(*path: str | int, value: Any = None) -> Change:
    return Change(path, None, value)


def test_without_a_change_the_text_is_the_same() -> None:
    assert changed() == TEXT


def test_a_changed_value_leaves_the_rest_of_its_line() -> None:
    assert changed(put("name", value="y")) == TEXT.replace('"x"   # the name', '"y"   # the name')
    assert changed(put("hang", 0, "tips", 0, value="B1")) == TEXT.replace('"A1", # one', '"B1", # one')


def test_a_new_value_stands_with_its_table_and_not_with_the_comment_of_the_next() -> None:
    assert changed(put("tank", value="H1")) == TEXT.replace("# of the rack\n", '# of the rack\ntank = "H1"\n')
    new = changed(put("hang", 0, "side", value="both"))
    assert new == TEXT.replace('  "A2",\n]\n', '  "A2",\n]\nside = "both"\n')


def test_an_entry_goes_with_its_own_comments_and_with_no_others() -> None:
    gone = TEXT[TEXT.index("\n# about the second") : TEXT.index("\n# about the third")]
    assert changed(put("hang", 1)) == TEXT.replace(gone, "")
    gone = TEXT[TEXT.index("\n# about the first") : TEXT.index("\n# about the second")]
    assert changed(put("hang", 0)) == TEXT.replace(gone, "")


def test_a_new_entry_stands_under_a_heading_of_its_own_at_the_end_of_its_list() -> None:
    assert (
        changed(put("hang", 3, value={"part": "d", "count": 5}))
        == TEXT + '\n[[hang]]\npart = "d"\ncount = 5\n'
    )
    assert changed(put("thief", value=[{"name": "t"}])) == TEXT + '\n[[thief]]\nname = "t"\n'
    assert changed(put("change", value={"aim": "5 um"})) == TEXT + '\n[change]\naim = "5 um"\n'


def test_a_setting_with_its_range_stands_in_braces() -> None:
    new = changed(put("aim", value={"value": "5 um", "low": "4 um"}))
    assert 'aim = { value = "5 um", low = "4 um" }\n' in new


def test_a_table_in_braces_stays_in_braces() -> None:
    text = 'exhaust = { flow = "1 m3/h" } # measured\n'
    assert changed(put("exhaust", "lid", value=True), text=text) == (
        'exhaust = { flow = "1 m3/h", lid = true } # measured\n'
    )
    many = 'hang = [{ part = "a" }]\n'
    assert (
        changed(put("hang", 1, value={"part": "b"}), text=many) == 'hang = [{ part = "a" }, { part = "b" }]\n'
    )


def test_line_ends_and_byte_order_mark_stay() -> None:
    text = "\ufeff" + TEXT.replace("\n", "\r\n")
    new = changed(put("tank", value="H1"), put("hang", 3, value={"part": "d"}), text=text)
    assert new == "\ufeff" + (
        TEXT.replace("# of the rack\n", '# of the rack\ntank = "H1"\n') + '\n[[hang]]\npart = "d"\n'
    ).replace("\n", "\r\n")


def test_a_file_that_does_not_end_with_a_line_end_takes_values() -> None:
    changed(
        put("hang", 3, value={"part": "d"}),
        text='[[hang]]\npart = "a"\n[[hang]]\npart = "b"\n[[hang]]\nx = 1',
    )
    changed(put("b", value="d"), text="a = 1")


KINDS = ("site", "line", "bath", "recipe", "material", "rack", "part", "load")
FILES = [path for kind in KINDS for path in Library(SHOP).paths(kind)]


@pytest.mark.parametrize("path", FILES, ids=lambda path: f"{path.parent.name}-{path.stem}")
def test_every_file_of_the_demo_shop_reads_back_with_any_value_taken_out(path: Path) -> None:
    entry = read_entry(path)
    for change in _removals(entry.document.raw, ()):
        raw = applied(entry.document.raw, [change])
        assert same(tomllib.loads(amended(entry.document, raw)), raw), change.path


def _removals(value: Any, path: tuple[str | int, ...]) -> list[Change]:
    """Taking out each key and each entry of a list that is not the last of its list, of a few entries of each."""
    found = []
    if isinstance(value, dict):
        for key, inside in value.items():
            found += [Change((*path, key), inside, None), *_removals(inside, (*path, key))]
    if isinstance(value, list) and len(value) > 1:
        for i in {0, len(value) // 2, len(value) - 1}:
            found += [Change((*path, i), value[i], None), *_removals(value[i], (*path, i))]
    return found


LOADS = [Library(SHOP).open(path) for path in sorted((SHOP / "rack_library/loads").glob("*.toml"))]


@settings(max_examples=60, deadline=None)
@given(st.sampled_from(LOADS), st.sampled_from(LOADS))
def test_any_load_can_be_made_of_any_other_and_reads_as_that(one: Entry, other: Entry) -> None:
    text = amended(one.document, other.document.raw)
    assert same(tomllib.loads(text), other.document.raw)
    assert read_back(one.document, other) == text


def test_the_comments_of_what_stays_are_all_there_after_any_change_of_a_value() -> None:
    for entry in LOADS:
        text = amended(entry.document, {**entry.document.raw, "name": "another", "note": "new"})
        old = [line for line in entry.document.text.splitlines() if "#" in line]
        assert [line for line in text.splitlines() if "#" in line] == old
