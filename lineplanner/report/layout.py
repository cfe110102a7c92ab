"""Columns, wrapped lines and headings of plain text."""

import re
import textwrap
from collections.abc import Iterable, Sequence

WIDTH = 76
TERMINAL = 80  # columns of the narrowest terminal: no table is wider
_LEAST = 12  # letters that a name keeps


def wrapped(text: str, width: int = WIDTH, *, first: str = "", rest: str | None = None) -> list[str]:
    """A text in lines; `first` stands before the first line, `rest` (else blanks) before the others.

    A number and its unit are never parted.

    >>> wrapped("hang the parts lower", 15, first="- ")
    ['- hang the', '  parts lower']
    """
    rest = " " * len(first) if rest is None else rest
    lines = textwrap.wrap(
        _glued(text), width, initial_indent=first, subsequent_indent=rest, break_on_hyphens=False
    )
    return [line.replace(_GLUE, " ") for line in lines] or [first.rstrip()]


_GLUE = "\N{NO-BREAK SPACE}"
_TOGETHER = re.compile(r"(?<=\d) (?=[^\W\d]|%)|(?<=\[) (?=\])|(?<=\[ \]) ")


def _glued(text: str) -> str:
    """The text with numbers tied to their units, and boxes to tick kept whole."""
    return _TOGETHER.sub(_GLUE, text)


def shortened(text: str, width: int) -> str:
    """A text on one line, cut at a word where it is too long.

    >>> shortened("strong acid: burns skin", 16)
    'strong acid: ...'
    """
    return textwrap.shorten(_glued(text), max(width, 5), placeholder=" ...").replace(_GLUE, " ")


def squeezed(text: str, width: int) -> str:
    """A name cut in its middle where it is too long: beginnings and ends tell names apart.

    >>> squeezed("grip-rail hole[2] wall", 16)
    'grip-ra..2] wall'
    """
    if len(text) <= width:
        return text
    tail = (width - 2) // 2
    return f"{text[: width - 2 - tail]}..{text[-tail:]}"


def typed(word: str) -> str:
    """A word as a person types it into a command line: in quotes where it has blanks or signs.

    >>> typed("lug-mix"), typed("my shop")
    ('lug-mix', '"my shop"')
    """
    return word if re.fullmatch(r"[\w./\\:~+-]+", word) else f'"{word}"'


def columns(rows: Iterable[Sequence[str]], *, right: Iterable[int] = (), indent: str = "  ") -> list[str]:
    """Rows as columns, two blanks apart; those in `right` flush right.

    Where a row would be wider than a terminal, the names of the first column are cut in their middle.

    >>> columns([("hold", "36.5"), ("ramp", "5")], right=(1,))
    ['  hold  36.5', '  ramp     5']
    """
    listed = [tuple(row) for row in rows]
    if not listed:
        return []
    count = max(len(row) for row in listed)
    filled = [(*row, *[""] * (count - len(row))) for row in listed]
    widths = [max(len(row[place]) for row in filled) for place in range(count)]
    over = len(indent) + sum(widths) + 2 * (count - 1) - TERMINAL
    if over > 0:
        widths[0] = min(widths[0], max(_LEAST, widths[0] - over))
        filled = [(squeezed(row[0], widths[0]), *row[1:]) for row in filled]
    flush = frozenset(right)
    return [
        indent
        + "  ".join(
            cell.rjust(wide) if place in flush else cell.ljust(wide)
            for place, (cell, wide) in enumerate(zip(row, widths, strict=True))
        ).rstrip()
        for row in filled
    ]


def filled(items: Iterable[str], width: int = WIDTH, *, gap: str = "   ", indent: str = "") -> list[str]:
    """Short items on as few lines as they fit, none of them broken.

    >>> filled(["148 A", "ramp 5 min", "41.5 min"], 20)
    ['148 A   ramp 5 min', '41.5 min']
    """
    lines: list[str] = []
    for item in items:
        if lines and len(lines[-1]) + len(gap) + len(item) <= width:
            lines[-1] += gap + item
        else:
            lines.append(indent + item)
    return lines


def shortened_verdict(text: str, width: int) -> str:
    """A verdict cut at a word; its two blanks after the word stay."""
    word, gap, rest = text.partition("  ")
    return f"{word}{gap}{shortened(rest, width - len(word) - len(gap))}" if len(text) > width else text
