"""The site, the units and the letters that a command works with."""

from __future__ import annotations

from dataclasses import dataclass, replace
from itertools import pairwise
from typing import TYPE_CHECKING, Literal

from lineplanner.cli.output import Output, signs_printable

if TYPE_CHECKING:
    from lineplanner.files.library import Library
    from lineplanner.report.style import Style

System = Literal["metric", "us"]


@dataclass(frozen=True, slots=True)
class Options:
    """The common options as typed."""

    units: System | None = None
    site: str | None = None
    ascii: bool = False


@dataclass(frozen=True, slots=True)
class Opened:
    """A library with the style of its site, or of the options."""

    library: Library
    style: Style

    @property
    def plain(self) -> Style:
        """The style of JSON: the same unit system, plain letters."""
        return replace(self.style, ascii=True)

    def output(self, text: str, code: int = 0, said: str = "") -> Output:
        """Data of a command in this style."""
        return Output(text, code, said, colour=True, ascii=self.style.ascii)


def opened(options: Options) -> Opened:
    """The site that the options name, else the nearest. Raises FilesError."""
    from lineplanner.files.library import open_library
    from lineplanner.report.style import Style

    library = open_library(options.site)
    system = options.units or library.site().units
    return Opened(library, Style(system, ascii=plain_letters(options)))


def plain_letters(options: Options) -> bool:
    """Plain letters where asked for, or where the terminal has no others."""
    return options.ascii or not signs_printable()


def error_style(arguments: list[str]) -> Style:
    """The style of a message while the site may not be readable: as typed, else metric, in plain letters."""
    from lineplanner.report.style import Style

    us = "--units=us" in arguments or ("--units", "us") in pairwise(arguments)
    return Style("us" if us else "metric", ascii=True)
