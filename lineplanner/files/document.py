"""A file as it stands on disk: its text, its TOML, its stamp; whatever keeps it from being read is a problem."""

import re
import stat
import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.errors import Fact
from lineplanner.files.content import LARGEST, digest_of
from lineplanner.files.positions import Positions, positions
from lineplanner.files.problems import FileProblem, FilesError
from lineplanner.inputs.declared import Path

BYTE_ORDER_MARK = "\ufeff"


@dataclass(frozen=True, slots=True)
class Stamp:
    """What tells whether a file is still the one that was read."""

    modified: int
    size: int
    digest: str


@dataclass(frozen=True)
class Document:
    """A file that is TOML. text is as on disk, with its line ends and byte order mark."""

    path: DiskPath
    text: str
    raw: Mapping[str, Any]
    stamp: Stamp

    @cached_property
    def positions(self) -> Positions:
        return positions(self.text.removeprefix(BYTE_ORDER_MARK))

    def problem(self, key_path: Path, key: str, /, **facts: Fact) -> FileProblem:
        """A problem of this file at the line where its key stands."""
        return FileProblem(self.path, self.positions.line(key_path), key_path, key, facts)


def open_document(path: DiskPath) -> Document:
    """Read a file as TOML. Raises FilesError, and nothing else, if that cannot be done."""
    content, modified = _content(path)
    text = _decoded(path, content)
    stamp = Stamp(modified, len(content), digest_of(content))
    return Document(path, text, _parsed(path, text.removeprefix(BYTE_ORDER_MARK)), stamp)


def failed(path: DiskPath, key: str, line: int | None = None, **facts: Fact) -> FilesError:
    """The error of a file that has one problem as a whole."""
    return FilesError([FileProblem(path, line, (), key, facts)])


def _content(path: DiskPath) -> tuple[bytes, int]:
    """The bytes of an ordinary file of a bearable size, and when they were written."""
    try:
        found = path.stat()
        if stat.S_ISDIR(found.st_mode):
            raise failed(path, "file.folder")
        if not stat.S_ISREG(found.st_mode):  # a pipe or a device may never end
            raise failed(path, "file.not_ordinary")
        with path.open("rb") as file:
            content = file.read(LARGEST + 1)
    except (
        FileNotFoundError,
        NotADirectoryError,
        ValueError,
    ) as error:  # ValueError: a null character in the name
        raise failed(path, "file.missing") from error
    except PermissionError as error:
        raise failed(path, "file.permission") from error
    except OSError as error:
        raise failed(path, "file.unreadable", why=error.strerror or type(error).__name__) from error
    if len(content) > LARGEST:
        raise failed(path, "file.too_large", size=max(found.st_size, len(content)), most=LARGEST)
    return content, found.st_mtime_ns


def _decoded(path: DiskPath, content: bytes) -> str:
    if content.startswith((b"\xff\xfe", b"\xfe\xff")):
        raise failed(path, "file.utf16")
    if b"\0" in content:
        raise failed(path, "file.binary")
    try:
        text = content.decode("utf-8")
    except UnicodeDecodeError as error:
        raise failed(path, "file.not_utf8", content[: error.start].count(b"\n") + 1) from error
    if not text.removeprefix(BYTE_ORDER_MARK).strip():
        raise failed(path, "file.empty")
    return text


# A key of more parts than any file has; the parser's time grows with their square.
_LONG_KEY = re.compile(r"(?<![^.\s={}\[\],])(?:[^.\s={}\[\],]++[ \t]*+\.[ \t]*+){50}")


def _parsed(path: DiskPath, text: str) -> dict[str, Any]:
    if _LONG_KEY.search(text):
        raise failed(path, "toml.too_deep")
    try:
        return tomllib.loads(text)
    except RecursionError as error:
        raise failed(path, "toml.too_deep") from error
    except ValueError as error:  # TOMLDecodeError, and int() for a number of thousands of digits
        raise FilesError([_syntax_problem(path, text, str(error))]) from error


# What the parser says -> what we say. The first that fits; texts of all supported Python versions.
_SYNTAX = (
    (r"overwrite a value|declare .* twice|redefine|immutable|uplicate", "toml.twice"),
    (r"newline or end of document after a statement", "toml.after_value"),
    (r"[Uu]nclosed array", "toml.open_list"),
    (r"[Uu]nclosed inline table", "toml.open_table"),
    (r"Unterminated string|Expected ['\"]{1,2}'|Illegal character '\\n'", "toml.open_text"),
    (r"Expected '='", "toml.no_equals"),
    (r"initial character for a key", "toml.key"),
    (r"\]", "toml.header"),
    (r"Unescaped|backslash|'\\\\'|hex|scalar", "toml.backslash"),
    (r"Illegal character|Found invalid character", "toml.character"),
    (r"Invalid value|date", "toml.value"),
    (r"digits", "toml.number"),
)


def _syntax_problem(path: DiskPath, text: str, said: str) -> FileProblem:
    """The parser's complaint in our words, at its line."""
    key = next((key for pattern, key in _SYNTAX if re.search(pattern, said)), "toml.other")
    if key == "toml.twice":
        for key_path, first, second in positions(text).twice:
            return FileProblem(path, second, key_path, key, {"first": first})
        key = "toml.other"
    found = re.search(r"at line (\d+)", said)
    line = int(found[1]) if found else text.rstrip().count("\n") + 1 if "end of document" in said else None
    lines = text.splitlines()
    shown = lines[line - 1].strip() if line and line <= len(lines) else ""
    return FileProblem(path, line, (), key, {"text": shown})
