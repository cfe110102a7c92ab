"""A person's file with other values: only what changed is written, comments stay with what they are about."""

import re
import tempfile
from collections.abc import Mapping, MutableSequence, Sequence
from contextlib import suppress
from pathlib import Path as DiskPath
from typing import Any

import tomlkit
from tomlkit.exceptions import TOMLKitError
from tomlkit.items import AoT, InlineTable, Table, Whitespace

from lineplanner.files.differences import Change, differences
from lineplanner.files.document import BYTE_ORDER_MARK, Document
from lineplanner.files.editing import Edit
from lineplanner.files.positions import positions
from lineplanner.files.problems import FilesError
from lineplanner.files.reading import Entry, read_entry
from lineplanner.files.writing import dump

_HEADING = re.compile(r"\s*\[{1,2}\s*[A-Za-z0-9_-]+(?:\s*\.\s*[A-Za-z0-9_-]+)*\s*\]{1,2}\s*(?:#.*)?")
_NOTHING = re.compile(r"\s*(?:#.*)?")
_MARK, _NEW = "# @lineplanner-{}@", "@lineplanner-new@"
_MARKED = re.compile(r"[ \t]*# @lineplanner-(\d+|new)@")


def read_back(document: Document, entry: Entry) -> str:
    """The document's text with the values of an entry, seen to read as the entry's record.

    Should the text defy every change, the record is written anew: its comments are lost then, its values never.
    """
    with suppress(TOMLKitError, LookupError, ValueError):
        text = amended(document, entry.document.raw)
        if _reads_as(text, entry):
            return text
    return dump(entry.record, entry.kind.name)


def _reads_as(text: str, entry: Entry) -> bool:
    with tempfile.TemporaryDirectory() as folder:
        trial = DiskPath(folder) / entry.document.path.name
        trial.write_bytes(text.encode("utf-8"))
        try:
            return bool(read_entry(trial, entry.kind.name).record == entry.record)
        except FilesError:
            return False


def amended(document: Document, raw: Mapping[str, Any]) -> str:
    """The document's text with the values of raw in it."""
    changes = list(differences(document.raw, raw))
    if not changes:
        return document.text
    text = document.text.removeprefix(BYTE_ORDER_MARK)
    lines, above = _parted(text.replace("\r\n", "\n"))
    open_end = bool(lines[-1])
    lines += [""] * open_end
    edit = Edit(
        tomlkit.parse("\n".join(lines)), "\r\n" in text, marked=document.text.startswith(BYTE_ORDER_MARK)
    )
    for change in changes:
        _make(edit, change)
    made = _joined(tomlkit.dumps(edit.toml), above)
    made = made.removesuffix("\n") if open_end else made
    if edit.windows_lines:
        made = made.replace("\n", "\r\n")
    return (BYTE_ORDER_MARK if edit.marked else "") + made


# --- comments above headings -----------------------------------------------------------------------------


def _parted(text: str) -> tuple[list[str], list[list[str]]]:
    """The lines without what stands above each heading, which a mark on the heading stands for."""
    starts = set(positions(text).lines.values())
    lines: list[str] = []
    above: list[list[str]] = []
    for number, line in enumerate(text.split("\n"), 1):
        if number in starts and _HEADING.fullmatch(line) and _MARKED.search(line) is None:
            block = _taken_from(lines)
            heading, sign, comment = line.partition("#")
            lines.append(f"{heading.rstrip()} {_MARK.format(len(above))}{_gap(heading)}{sign}{comment}")
            above.append(block)
        else:
            lines.append(line)
    return lines, above


def _gap(heading: str) -> str:
    return heading[len(heading.rstrip()) :]


def _taken_from(lines: list[str]) -> list[str]:
    """Take the blank lines and comments off the end that belong to the heading to come."""
    begin = len(lines)
    while begin and _NOTHING.fullmatch(lines[begin - 1]):
        begin -= 1
    blank = next((i for i in range(begin, len(lines)) if not lines[i].strip()), begin)
    if begin:  # what follows a value without a blank line is about the value
        begin = blank
    block = lines[begin:]
    del lines[begin:]
    return block


def _joined(text: str, above: Sequence[Sequence[str]]) -> str:
    """The text with what stood above each heading back in its place; a new heading has a blank line above."""
    lines: list[str] = []
    for line in text.split("\n"):
        found = _MARKED.search(line)
        if found is None:
            lines.append(line)
            continue
        if found[1] != "new":
            lines += above[int(found[1])]
        elif lines and lines[-1].strip():
            lines.append("")
        lines.append(line[: found.start()] + line[found.end() :])
    return "\n".join(lines)


# --- changes ---------------------------------------------------------------------------------------------


def _make(edit: Edit, change: Change) -> None:
    """One change in the document: whole tables under headings of their own where their place has headings."""
    if change.new is None:
        edit.remove_value(change.path)
        return
    *parents, last = change.path
    inside: Any = edit.toml
    for step in parents:
        inside = inside[step]
    headed = isinstance(inside, Table | tomlkit.TOMLDocument) and change.old is None
    new = _item(change.new, headed=headed or isinstance(inside, AoT))
    if isinstance(inside, MutableSequence) and last == len(inside):
        inside.append(new)
    elif isinstance(inside, InlineTable) and change.old is None:
        body = inside.value.body
        blank = body[-1:]  # what stands before the closing brace comes to stand before the new key
        inside[str(last)] = new
        body += [one for one in blank if isinstance(one[1], Whitespace)]
    else:
        inside[last] = new


def _item(value: Any, *, headed: bool) -> Any:
    """A value as an item of the document: under a heading, or on one line with tables in braces."""
    if not headed or not _wants_heading(value):
        return tomlkit.value(_text(value))
    if isinstance(value, list):
        tables = tomlkit.aot()
        for one in value:
            tables.append(_item(one, headed=True))
        return tables
    table = tomlkit.table()
    table.comment(_NEW)
    for key, one in sorted(value.items(), key=lambda pair: _wants_heading(pair[1])):
        table[key] = _item(one, headed=True)  # plain values first: what follows a heading belongs to it
    return table


def _wants_heading(value: Any) -> bool:
    """A record, or a list of them; a setting with its range stands in braces."""
    if isinstance(value, list):
        return bool(value) and all(_wants_heading(one) for one in value)
    return isinstance(value, Mapping) and "value" not in value


def _text(value: Any) -> str:
    if isinstance(value, Mapping):
        return f"{{ {', '.join(f'{key} = {_text(one)}' for key, one in value.items())} }}"
    if isinstance(value, list):
        return f"[{', '.join(_text(one) for one in value)}]"
    text: str = tomlkit.item(value).as_string()
    return text
