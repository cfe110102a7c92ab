"""On which line each key of a TOML text stands."""

import re
import tomllib
from bisect import bisect_right
from collections.abc import Mapping
from contextlib import suppress
from dataclasses import dataclass, field

from lineplanner.inputs.declared import Path

_BLANK = re.compile(r"(?:[ \t\r\n]|#[^\n]*)*")
_SPACE = re.compile(r"[ \t]*")
_BARE_KEY = re.compile(r"[A-Za-z0-9_-]+")
_QUOTED_KEY = re.compile(r'"(?:[^"\\\n]|\\.)*"' + r"|'[^'\n]*'")
_VALUE = re.compile(
    r'"""(?:\\.|[^\\])*?"{3,5}(?!")'  # up to two quotes may stand before the closing three
    r"|'''.*?'{3,5}(?!')"
    r'|"(?:[^"\\\n]|\\.)*"'
    r"|'[^'\n]*'"
    r"|[^,\]}\n#]+",
    re.DOTALL,
)


@dataclass(frozen=True, slots=True)
class Positions:
    """Lines by key path, and the keys that stand there twice: (path, first line, second line)."""

    lines: Mapping[Path, int]
    twice: tuple[tuple[Path, int, int], ...]

    def line(self, path: Path) -> int | None:
        """The line of a key, or of the nearest thing around it that is there."""
        for end in range(len(path), 0, -1):
            if path[:end] in self.lines:
                return self.lines[path[:end]]
        return 1


def positions(text: str) -> Positions:
    """Where the keys of a text stand. Of a text that is no TOML, as far as it could be followed."""
    scanner = _Scanner(text)
    with suppress(_LostError, RecursionError, ValueError):
        scanner.scan()
    return Positions(scanner.lines, tuple(scanner.twice))


class _LostError(Exception):
    """The text is not TOML from here on."""


@dataclass
class _Scanner:
    """One pass over a text; knows the grammar only as far as keys and the ends of values."""

    text: str
    at: int = 0
    lines: dict[Path, int] = field(default_factory=dict)
    twice: list[tuple[Path, int, int]] = field(default_factory=list)
    arrays: dict[Path, int] = field(default_factory=dict)  # position of the last [[table]] of each name
    given: dict[Path, int] = field(default_factory=dict)  # values and [tables], each to be given once
    breaks: list[int] = field(default_factory=list)

    def scan(self) -> None:
        self.breaks = [found.end() for found in re.finditer("\n", self.text)]
        base: Path = ()
        while True:
            self.skip(_BLANK)
            if self.at >= len(self.text):
                return
            if self.text.startswith("[", self.at):
                base = self.header()
            else:
                self.pair(base)

    @property
    def line(self) -> int:
        return bisect_right(self.breaks, self.at) + 1

    def skip(self, pattern: re.Pattern[str]) -> None:
        found = pattern.match(self.text, self.at)
        self.at = found.end() if found else self.at

    def take(self, literal: str) -> bool:
        if not self.text.startswith(literal, self.at):
            return False
        self.at += len(literal)
        return True

    def expect(self, literal: str) -> None:
        if not self.take(literal):
            raise _LostError

    def give(self, path: Path) -> None:
        if path in self.given:
            self.twice.append((path, self.given[path], self.line))
        self.given.setdefault(path, self.line)

    def header(self) -> Path:
        line, many = self.line, self.text.startswith("[[", self.at)
        self.expect("[[" if many else "[")
        *parents, last = self.keys()
        self.expect("]]" if many else "]")
        path: Path = ()
        for key in parents:
            path = (*path, key)
            self.lines.setdefault(path, line)
            path = (*path, self.arrays[path]) if path in self.arrays else path
        path = (*path, last)
        self.lines.setdefault(path, line)
        if many:
            self.arrays[path] = self.arrays.get(path, -1) + 1
            path = (*path, self.arrays[path])
            self.lines[path] = line
        else:
            self.give(path)
        return path

    def keys(self) -> tuple[str, ...]:
        found = []
        while True:
            self.skip(_SPACE)
            if bare := _BARE_KEY.match(self.text, self.at):
                found.append(bare[0])
                self.at = bare.end()
            elif quoted := _QUOTED_KEY.match(self.text, self.at):
                found.append(next(iter(tomllib.loads(f"{quoted[0]} = 0"))))
                self.at = quoted.end()
            else:
                raise _LostError
            self.skip(_SPACE)
            if not self.take("."):
                return tuple(found)

    def pair(self, base: Path) -> None:
        line, keys = self.line, self.keys()
        path = base
        for key in keys:
            path = (*path, key)
            self.lines.setdefault(path, line)
        self.give(path)
        self.expect("=")
        self.skip(_SPACE)
        self.value(path)

    def value(self, path: Path) -> None:
        if self.take("["):
            self.array(path)
        elif self.take("{"):
            self.inline_table(path)
        elif found := _VALUE.match(self.text, self.at):
            self.at = found.end()
        else:
            raise _LostError

    def array(self, path: Path) -> None:
        index = 0
        while True:
            self.skip(_BLANK)
            if self.take("]"):
                return
            self.lines[(*path, index)] = self.line
            self.value((*path, index))
            self.skip(_BLANK)
            index += 1
            if not self.take(","):
                self.expect("]")
                return

    def inline_table(self, path: Path) -> None:
        while True:
            self.skip(_BLANK)
            if self.take("}"):
                return
            self.pair(path)
            self.skip(_BLANK)
            if not self.take(","):
                self.expect("}")
                return
