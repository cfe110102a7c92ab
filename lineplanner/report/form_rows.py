"""The lines that a form is made of: a value with all that is to be said of it, a heading, what has to be known."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field
from datetime import date
from enum import StrEnum
from functools import lru_cache

from lineplanner import units
from lineplanner.files.writing import amount
from lineplanner.inputs.declared import Path
from lineplanner.inputs.recipe import Recipe
from lineplanner.quantities import COUNT, RATIO, Field, Kind
from lineplanner.report.style import Style
from lineplanner.units import System

YES, NO, UNKNOWN = "yes", "no", "unknown"
_AS_PERCENT = 10.0  # plain numbers above are no shares: a hardness, a count
_ROUND = 4  # characters that an amount may be longer in the unit system of the screen than in the other
TextOf = Callable[[Path], str]
"""The text of a value as it was typed or stands in the file, by its path."""


class Takes(StrEnum):
    """What a row wants to be given."""

    QUANTITY = "a number with its unit"
    COUNT = "a whole number"
    WORDS = "words"
    YES_NO = "yes or no"
    DATE = "a date such as 2026-03-14"
    CHOICE = "one of the choices"
    REFERENCE = "the name of a file"
    NAMES = "names with commas between them"

    @property
    def turns(self) -> bool:
        """Whether the choices of it can be turned through: all but a list of several names."""
        return self is not Takes.NAMES


@dataclass(frozen=True, slots=True)
class Row:
    """One value of a record: what it is called, what it takes, what it holds.

    text is what stands there, "" where nothing is set. entry is the innermost list entry or optional group
    around it, list_at the innermost list. locked says in words why it is not typed here. beside and mark say
    what a changed setting means for the recipe.
    """

    path: Path
    label: str
    help: str
    takes: Takes
    value: object
    text: str
    optional: bool
    kind: Kind | None = None
    field: Field | None = None
    choices: tuple[str, ...] = ()
    level: int = 0
    entry: Path | None = None
    list_at: Path | None = None
    locked: str = ""
    beside: str = ""
    mark: str = ""

    @property
    def echo(self) -> str:
        """What the value is, in both unit systems; empty for what is no quantity."""
        if self.kind is None or not isinstance(self.value, float):
            return ""
        return echoed(self.value, self.kind)

    @property
    def elsewise(self) -> str:
        """The echo without what the text says already."""
        said = {self.text, self.text.removesuffix(".0")}
        return " = ".join(one for one in self.echo.split(" = ") if one and one not in said)


@dataclass(frozen=True, slots=True)
class Heading:
    """A line over a list, over one entry of it, or over a group.

    adds: an entry can be added here, or the group as a whole; removes: this one can be taken out.
    """

    path: Path
    label: str
    help: str = ""
    level: int = 0
    count: int | None = None
    adds: bool = False
    removes: bool = False

    @property
    def how(self) -> str:
        """How many there are, and what can be done."""
        if self.count is None:
            return "none" if self.adds else ""
        return str(self.count) if self.count else "none"


@dataclass(frozen=True, slots=True)
class Form:
    """All lines of a form, top to bottom, with what stands over it."""

    title: str
    rows: tuple[Row | Heading, ...]

    @property
    def values(self) -> tuple[Row, ...]:
        """The rows that hold a value."""
        return tuple(one for one in self.rows if isinstance(one, Row))

    def row(self, path: Path) -> Row:
        """The row of a path. Raises KeyError."""
        for one in self.values:
            if one.path == path:
                return one
        raise KeyError(path)


@dataclass(frozen=True, slots=True)
class Known:
    """What a form has to know beside the record.

    stems: names of the files of a kind, for references. names: other names that fit a field, by its name. recipe:
    that of the load, to show what a change means.
    """

    style: Style = field(default_factory=Style)
    stems: Callable[[str], Sequence[str]] = lambda _: ()
    names: Mapping[str, Sequence[str]] = field(default_factory=dict)
    recipe: Recipe | None = None
    text_of: TextOf | None = None


def echoed(value: float, kind: Kind) -> str:
    """A quantity in both unit systems; a plain number as percent too, where people say it so.

    >>> from lineplanner.quantities import LENGTH
    >>> echoed(0.0254, LENGTH), echoed(1.5, RATIO), echoed(58.0, RATIO)
    ('25.4 mm = 1 in', '1.5 = 150 %', '58')
    """
    text = units.echo(value, kind)
    return text if kind != RATIO or abs(value) <= _AS_PERCENT else text.partition(" = ")[0]


def value_text(value: object, kind: Kind | None, system: System) -> str:
    """A value as text that reads back as exactly this value.

    >>> value_text(("A1-A4", "B1"), None, "metric"), value_text(True, None, "metric")
    ('A1-A4, B1', 'yes')
    """
    if value is None:
        return ""
    if isinstance(value, bool):
        return YES if value else NO
    if isinstance(value, float):
        return _amount(value, kind or RATIO, system)
    if isinstance(value, tuple):
        return ", ".join(str(one) for one in value)
    return value.isoformat() if isinstance(value, date) else str(value)


@lru_cache(maxsize=8192)
def _amount(value: float, kind: Kind, system: System) -> str:
    """An amount in the unit system, but in the other one where only that one is round: nobody typed 17 digits."""
    if kind in (RATIO, COUNT):
        return repr(value).removesuffix(".0")
    own, other = (amount(value, kind, one) for one in (system, "us" if system == "metric" else "metric"))
    return other if len(own) > len(other) + _ROUND else own
