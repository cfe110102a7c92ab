"""Values with company: a setting with its allowed range, a number with its source."""

from dataclasses import dataclass
from typing import Annotated

from lineplanner.quantities import RATIO, Field
from lineplanner.sources import Source, Status


@dataclass(frozen=True, slots=True, kw_only=True)
class Ranged:
    """A recipe setting: the value and the range it may be run in (None: no range given)."""

    value: float
    low: float | None = None
    high: float | None = None

    def holds(self, value: float) -> bool:
        """Whether a value lies inside the allowed range. Without a range only the value itself does."""
        if self.low is None and self.high is None:
            return value == self.value
        return (self.low is None or value >= self.low) and (self.high is None or value <= self.high)


@dataclass(frozen=True, slots=True, kw_only=True)
class Sourced:
    """A number of a data table with its source; the file's Field gives its kind."""

    value: float
    low: float | None = None
    high: float | None = None
    source: Annotated[str, Field(None, "source", "title, year and place, or who measured it")]
    status: Annotated[Status, Field(None, "status", "how far the number can be trusted")]
    caution_at: Annotated[
        float | None, Field(RATIO, "caution from", "share of a limit; left out: 90 %", above=0.0, high=1.0)
    ] = None

    @property
    def origin(self) -> Source:
        return Source(self.source, self.status)
