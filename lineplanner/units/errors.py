"""The error of a text that is not one number with one fitting unit."""

from lineplanner.errors import InputError

_SHOWN = 40  # characters of a token that a message repeats


class UnitTextError(InputError):
    """A text that cannot be read as the quantity asked for; facts: token, kind, a_kind, example and more."""


def shown(text: str) -> str:
    """A token as a message may repeat it: shortened, on one line, without control characters.

    >>> shown("5\\x1b[31m mm")
    '5\\\\x1b[31m mm'
    """
    cut = text if len(text) <= _SHOWN else text[: _SHOWN - 3] + "..."
    return "".join(c if c.isprintable() else c.encode("unicode_escape").decode("ascii") for c in cut)
