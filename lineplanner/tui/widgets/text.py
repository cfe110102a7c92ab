"""Text fitted to cells of a terminal: what people typed can neither move the cursor nor break a line."""

from rich.cells import cell_len, set_cell_size

from lineplanner.report.style import plain

MORE = "..."


def tidy(text: str, *, ascii_only: bool = False) -> str:
    """The text without control characters, in plain letters where the terminal has no others.

    >>> tidy("lug\\x1b[2J"), tidy("50 µm", ascii_only=True)
    ('lug?[2J', '50 um')
    """
    shown = text if text.isprintable() else "".join(c if c.isprintable() else "?" for c in text)
    return plain(shown) if ascii_only else shown


def fitted(text: str, width: int, *, right: bool = False) -> str:
    """The text in exactly so many cells, cut with dots where it is too long.

    >>> fitted("valve-blocks-24", 10), fitted("148 A", 8, right=True)
    ('valve-b...', '   148 A')
    """
    size = cell_len(text)
    if size > width:
        return set_cell_size(text, max(width - len(MORE), 0)) + MORE[: max(width, 0)]
    blanks = " " * (width - size)
    return blanks + text if right else text + blanks
