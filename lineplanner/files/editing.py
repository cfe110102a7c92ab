"""Changing values in a person's file: comments, order and line ends stay."""

from collections.abc import MutableMapping, MutableSequence
from dataclasses import dataclass
from typing import Any

import tomlkit
from tomlkit import TOMLDocument

from lineplanner.files.document import BYTE_ORDER_MARK, Document
from lineplanner.inputs.declared import Path

Value = str | int | float | bool | list["Value"] | dict[str, "Value"]


@dataclass
class Edit:
    """A file's text being changed. Paths hold file keys, list positions from 0."""

    toml: TOMLDocument
    windows_lines: bool
    marked: bool

    def set_value(self, path: Path, value: Value) -> None:
        """Put a value at a path, into tables and lists that are there; a table that is missing is added."""
        *parents, last = path
        inside: Any = self.toml
        for step in parents:
            if isinstance(inside, MutableMapping) and step not in inside:
                inside[str(step)] = tomlkit.table()
            inside = inside[step]
        if isinstance(inside, MutableSequence) and last == len(inside):
            inside.append(_item(value))
        else:
            inside[last] = _item(value)

    def remove_value(self, path: Path) -> None:
        """Take a key, a table or an entry of a list out; nothing happens if it is not there."""
        *parents, last = path
        inside: Any = self.toml
        for step in parents:
            if isinstance(inside, MutableMapping) and step not in inside:
                return
            inside = inside[step]
        if isinstance(inside, MutableMapping) and last not in inside:
            return
        del inside[last]

    @property
    def text(self) -> str:
        """The whole text as it is to be saved."""
        text = tomlkit.dumps(self.toml)
        if self.windows_lines:
            text = text.replace("\r\n", "\n").replace("\n", "\r\n")
        return (BYTE_ORDER_MARK if self.marked else "") + text


def edit(document: Document) -> Edit:
    """Begin to change a file that was read."""
    text = document.text.removeprefix(BYTE_ORDER_MARK)
    return Edit(tomlkit.parse(text), "\r\n" in text, document.text.startswith(BYTE_ORDER_MARK))


def _item(value: Value) -> Any:
    """A table in a list or under a key is written in braces; whoever wants a heading sets its keys one by one."""
    if isinstance(value, dict):
        table = tomlkit.inline_table()
        table.update({key: _item(one) for key, one in value.items()})
        return table
    return tomlkit.item(value)
