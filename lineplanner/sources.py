"""Where a number comes from: its status and its source."""

from dataclasses import dataclass
from enum import StrEnum


class Status(StrEnum):
    """How far a number can be trusted; travels with it to the screen."""

    PUBLISHED = "published (read)"
    MEMORY = "published (from memory)"
    DERIVED = "derived"
    PRACTICE = "common practice"
    ASSUMPTION = "assumption"
    ENTERED = "entered here"
    MEASURED = "measured here"

    @property
    def may_stop(self) -> bool:
        """Whether a number of this status may decide a stop alone."""
        return self in _MAY_STOP


_MAY_STOP = frozenset({Status.PUBLISHED, Status.DERIVED, Status.ENTERED, Status.MEASURED})

# From firm to weak: the weakest input decides what a result rests on.
_WEAKNESS = (
    Status.MEASURED,
    Status.ENTERED,
    Status.DERIVED,
    Status.PUBLISHED,
    Status.MEMORY,
    Status.PRACTICE,
    Status.ASSUMPTION,
)


def weakest(*statuses: Status) -> Status:
    """The status a result takes from several inputs.

    >>> weakest(Status.ENTERED, Status.ASSUMPTION, Status.PUBLISHED)
    <Status.ASSUMPTION: 'assumption'>
    """
    return max(statuses, key=_WEAKNESS.index)


@dataclass(frozen=True, slots=True)
class Source:
    """A title with the place in it, and the status of what was taken from it."""

    title: str
    status: Status

    def __str__(self) -> str:
        return self.title


@dataclass(frozen=True, slots=True)
class Constant:
    """A number of nature or of the model that lives in code, with unit and source."""

    name: str
    value: float
    unit: str
    source: Source
