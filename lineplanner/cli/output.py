"""What a command hands back, and how it is printed: letters the terminal has, colour only where it may be."""

import contextlib
import os
import re
import sys
from collections.abc import Mapping
from dataclasses import dataclass

# Foreground colours of the sixteen; the word itself is always printed.
_COLOURS: Mapping[str, str] = {
    "DANGER": "bright_red",
    "STOP": "bright_red",
    "WARNING": "yellow",
    "CAUTION": "bright_yellow",
    "NOTICE": "bright_blue",
}
_WORD = re.compile(rf"^(\s*\[?)({'|'.join(_COLOURS)})\b", re.MULTILINE)
_SIGNS = "µ²°"


@dataclass(frozen=True, slots=True)
class Output:
    """Data for stdout, narration for stderr, and the exit code."""

    text: str
    code: int = 0
    said: str = ""
    colour: bool = False
    ascii: bool = False


def write(output: Output) -> None:
    """Print what a command handed back. Raises BrokenPipeError where the reader has gone."""
    import click

    _forgiving()
    if output.said:
        click.echo(output.said, err=True)
    text = output.text
    if output.ascii:
        from lineplanner.report.style import plain

        text = plain(text)
    if output.colour and colour_wanted():
        text = _WORD.sub(lambda m: f"{m[1]}{click.style(m[2], fg=_COLOURS[m[2]], bold=True)}", text)
    if text:
        click.echo(text)


def unwritable(error: OSError) -> bool:
    """Whether printing failed: an error of a file names it, one of stdout does not.

    What is still buffered is dropped then, so that it cannot fail again at exit.
    """
    if error.filename is not None:
        return False
    with contextlib.suppress(OSError):
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
    return True


def told(text: str, code: int) -> int:
    """Say something on stderr; hand the exit code on."""
    import click

    _forgiving()
    click.echo("\n".join(f"lineplanner: {line}" for line in text.splitlines()), err=True)
    return code


def colour_wanted() -> bool:
    """Colour only on a terminal that has it and where nobody declined it."""
    return sys.stdout.isatty() and not os.environ.get("NO_COLOR") and os.environ.get("TERM") != "dumb"


def signs_printable() -> bool:
    """Whether stdout can print the trade's signs."""
    try:
        _SIGNS.encode(sys.stdout.encoding or "ascii")
    except (UnicodeEncodeError, LookupError):
        return False
    return True


def _forgiving() -> None:
    """A letter that the terminal does not have is replaced; it never ends the program."""
    for stream in (sys.stdout, sys.stderr):
        reconfigure = getattr(stream, "reconfigure", None)
        if reconfigure is not None:
            reconfigure(errors="replace")
