"""Whatever stands under a file's name: text, or a problem with a clear sentence, never another exception."""

import os
import sys
from pathlib import Path

import pytest

from lineplanner.files.content import LARGEST
from lineplanner.files.problems import word
from lineplanner.files.reading import check, read
from tests.files.samples import BATH, RACK


@pytest.fixture(autouse=True)
def in_folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)


def told(content: bytes) -> list[str]:
    Path("demo.toml").write_bytes(content)
    found = [word(problem) for problem in check("demo.toml")]
    assert Path("demo.toml").read_bytes() == content
    return found


FILES = [
    (b"", 'demo.toml: is empty. Its first line must be such as `format = "lineplanner part 1"`'),
    (b" \n\t\n", 'demo.toml: is empty. Its first line must be such as `format = "lineplanner part 1"`'),
    (b"\xef\xbb\xbf\n", 'demo.toml: is empty. Its first line must be such as `format = "lineplanner part 1"`'),
    (b"\x7fELF\x02\x01\x00", "demo.toml: is a binary file, not text. Name a .toml file"),
    (b"a = 1\nb = '\xe9'\n", "demo.toml:2: holds a character that is not UTF-8. Save the file again as UTF-8"),
    (BATH.encode("utf-16"), "demo.toml: is UTF-16 text. Save it again as UTF-8"),
    (
        b"a" * (LARGEST + 1),
        "demo.toml: has 2000001 bytes; at most 2000000 are read. Files of this kind are small: check what it is",
    ),
    (b"a = " + b"[" * 100_000, ("demo.toml: has tables or lists nested far too deeply. "
     "No file of lineplanner needs more than six levels")),
    (b"a = " + b"{a=" * 100_000, ("demo.toml: has tables or lists nested far too deeply. "
     "No file of lineplanner needs more than six levels")),
]  # fmt: skip


@pytest.mark.parametrize(
    ("content", "said"),
    FILES,
    ids=["empty", "blank", "mark", "binary", "latin", "utf-16", "large", "lists", "tables"],
)
def test_a_file_that_is_no_text_of_ours_is_told_in_a_sentence(content: bytes, said: str) -> None:
    assert told(content) == [said]


SYNTAX = [
    (
        "max_current = 3000 A",
        ':2: `max_current = 3000 A` has something behind the value. Put a value with its unit in quotes: `"24 A/ft2"`',
    ),
    ("w = 5mm", ':2: `w = 5mm` has something behind the value. Put a value with its unit in quotes: `"24 A/ft2"`'),
    ("a = 0,5", ':2: `a = 0,5` has something behind the value. Put a value with its unit in quotes: `"24 A/ft2"`'),
    ("a = copper", ":2: `a = copper` has no value that TOML knows. Put words and values with a unit in quotes"),
    ("a =", ":2: `a =` has no value that TOML knows. Put words and values with a unit in quotes"),
    ("a", ":2: `a` has no equals sign behind its key. Write `key = value`"),
    ("a b = 1", ":2: `a b = 1` has no equals sign behind its key. Write `key = value`"),
    ("= 1", ":2: `= 1` is not written as TOML. Compare the line with those around it"),
    ("[a", ":2: `[a` has a table name that is not closed. Write `[name]` or `[[name]]`"),
    ("[[a]", ":2: `[[a]` has a table name that is not closed. Write `[name]` or `[[name]]`"),
    ('a = "x', ":2: a text in quotes is not closed. Add the closing quote on the line where it begins"),
    ('a = "x\n"', ":2: a text in quotes is not closed. Add the closing quote on the line where it begins"),
    ('a = """x', ":2: a text in quotes is not closed. Add the closing quote on the line where it begins"),
    ("a = '''x", ":2: a text in quotes is not closed. Add the closing quote on the line where it begins"),
    ("a = [1", ":2: a list is not closed, or a comma is missing in it. Check the `[`, `,` and `]` up to here"),
    ("a = [1 2]", ":2: a list is not closed, or a comma is missing in it. Check the `[`, `,` and `]` up to here"),
    ("a = {b=1", ":2: a table in braces is not closed, or a comma is missing in it. Check the braces up to here"),
    ('a = "\\d"', ':2: `a = "\\d"` holds a backslash that stands for nothing. Write it twice, or use single quotes'),
    ('a = "\x01"', ':2: `a = "\\x01"` holds a control character. Take it out'),
    ("a = 1\n\na = 2", ":4: a: is given twice, first on line 2. Take one of the two out"),
    ("[a]\n[b]\n[a]", ":4: a: is given twice, first on line 2. Take one of the two out"),
    ("[[r]]\nx = 1\n[[r]]\nx = 1\nx = 2", ":6: r[2].x: is given twice, first on line 5. Take one of the two out"),
    ("a = { b = 1, b = 2 }", ":2: a.b: is given twice, first on line 2. Take one of the two out"),
    ("a = 1" + "0" * 5000, ": holds a number of thousands of digits. Give a number that an instrument can show"),
]  # fmt: skip


@pytest.mark.skipif(sys.version_info >= (3, 15), reason="TOML 1.1 lets some of these pass")
@pytest.mark.parametrize(("line", "said"), SYNTAX, ids=[f"{n}" for n in range(len(SYNTAX))])
def test_text_that_is_not_toml_is_told_at_its_line_in_our_words(line: str, said: str) -> None:
    assert told(f'format = "lineplanner line 1"\n{line}\n'.encode()) == [f"demo.toml{said}"]


def test_no_sentence_on_syntax_uses_the_parsers_own_words() -> None:
    for line, _ in SYNTAX:
        (found,) = told(f"{line}\n".encode())
        assert "nvalid" not in found
        assert "rror" not in found


def test_windows_line_ends_and_a_byte_order_mark_are_read_as_text() -> None:
    content = b"\xef\xbb\xbf" + RACK.replace("\n", "\r\n").encode()
    assert told(content) == []
    assert told(content.replace(b"count = 6", b"count = true")) == [
        "demo.toml:17: tip_row[1].count: `true` is not a whole number. Write it without quotes and without a point"
    ]


def test_a_folder_is_no_file(tmp_path: Path) -> None:
    Path("folder.toml").mkdir()
    (found,) = check("folder.toml")
    assert word(found) == "folder.toml: is a folder, not a file. Name a .toml file in it"
    (found,) = check(tmp_path.parent)
    assert word(found) == f"{tmp_path.parent}: is a folder, not a file. Name a .toml file in it"


@pytest.mark.parametrize("name", ["none.toml", "none/none.toml", "demo.toml/inside.toml", "a\0b.toml"])
def test_a_file_that_is_not_there_is_told(name: str) -> None:
    Path("demo.toml").touch()
    (found,) = check(name)
    assert word(found).endswith(": there is no such file. Check the name and the folder")


def test_a_name_too_long_for_the_disk_is_told() -> None:
    (found,) = check("x" * 5000 + ".toml")
    assert found.key in {"file.unreadable", "file.missing"}


@pytest.mark.skipif(sys.platform == "win32", reason="has no named pipes on disk")
def test_a_pipe_is_not_waited_for() -> None:
    os.mkfifo("pipe.toml")
    (found,) = check("pipe.toml")
    assert word(found) == "pipe.toml: is not an ordinary file but a pipe or a device. Name a .toml file"


def test_a_file_that_may_not_be_read_is_told(monkeypatch: pytest.MonkeyPatch) -> None:
    Path("demo.toml").write_text(BATH, encoding="utf-8")

    def refuse(*_: object, **__: object) -> None:
        raise PermissionError(13, "Permission denied")

    monkeypatch.setattr(Path, "open", refuse)
    (found,) = check("demo.toml")
    assert word(found) == (
        "demo.toml: may not be read by this user. Ask the owner of the file for the right to read it"
    )


def test_a_disk_that_fails_is_told(monkeypatch: pytest.MonkeyPatch) -> None:
    Path("demo.toml").write_text(BATH, encoding="utf-8")

    def fail(*_: object, **__: object) -> None:
        raise OSError(5, "Input/output error")

    monkeypatch.setattr(Path, "open", fail)
    (found,) = check("demo.toml")
    assert word(found) == "demo.toml: cannot be read: Input/output error. Check the disk or the network share"


def test_a_file_is_read_from_anywhere_below_or_outside_the_working_folder(tmp_path: Path) -> None:
    inside = tmp_path / "a" / "demo.toml"
    inside.parent.mkdir()
    inside.write_text(BATH, encoding="utf-8")
    assert read(inside) == read("a/demo.toml")
    inside.write_text("", encoding="utf-8")
    assert word(check(inside)[0]).startswith(f"{Path('a') / 'demo.toml'}: is empty")
