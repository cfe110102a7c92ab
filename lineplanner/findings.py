"""What a check found: level, demand, limit, margin, source and the way out."""

import math
from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import StrEnum

from lineplanner.errors import Fact
from lineplanner.quantities import Kind
from lineplanner.sources import Source

_DUST = 1e-12  # what float arithmetic leaves at an exact share
CAUTION_AT = 0.9  # share of a limit from which a check is a caution (design rule of this program)


class Level(StrEnum):
    """How grave a finding is."""

    OK = "ok"
    NOTE = "note"
    CAUTION = "caution"
    STOP = "stop"

    @property
    def rank(self) -> int:
        return ("ok", "note", "caution", "stop").index(self.value)


@dataclass(frozen=True, slots=True)
class Finding:
    """One check of a plan. value and limit are SI of `kind`; `key` chooses the sentence, `fix` the way out.

    source is that of the limit. margin is 1 - demand/limit for upper limits, demand/limit - 1 for lower ones.
    """

    check: str
    level: Level
    key: str
    source: Source
    kind: Kind | None = None
    value: float | None = None
    limit: float | None = None
    margin: float | None = None
    fix: str | None = None
    facts: Mapping[str, Fact] = field(default_factory=dict)


def level_of(
    margin: float, *, source: Source, demand_firm: bool = True, caution_at: float = CAUTION_AT
) -> Level:
    """The level of a margin: a stop only where the limit may decide it alone and the demand is no mere estimate."""
    if not math.isfinite(margin):
        raise ValueError("a margin is a number")
    if margin < 0.0:
        return Level.STOP if source.status.may_stop and demand_firm else Level.CAUTION
    near = margin <= 1.0 - caution_at + _DUST and caution_at < 1.0
    return Level.CAUTION if near else Level.OK


def upper(
    check: str,
    *,
    value: float,
    limit: float,
    kind: Kind,
    source: Source,
    key: str,
    fix: str | None = None,
    demand_firm: bool = True,
    caution_at: float | None = None,
    **facts: Fact,
) -> Finding:
    """A finding for a demand that must not exceed a limit. Unrounded values are compared."""
    margin = 1.0 - value / limit if limit > 0.0 else (0.0 if value <= 0.0 else -1.0)
    level = level_of(
        margin,
        source=source,
        demand_firm=demand_firm,
        caution_at=CAUTION_AT if caution_at is None else caution_at,
    )
    return Finding(
        check, level, key, source, kind, value, limit, margin, fix if level is not Level.OK else None, facts
    )


def lower(
    check: str,
    *,
    value: float,
    limit: float,
    kind: Kind,
    source: Source,
    key: str,
    fix: str | None = None,
    demand_firm: bool = True,
    **facts: Fact,
) -> Finding:
    """A finding for a demand that must not fall below a limit. Nearness alone is no caution."""
    margin = value / limit - 1.0 if limit > 0.0 else 1.0
    level = level_of(margin, source=source, demand_firm=demand_firm, caution_at=1.0)
    return Finding(
        check, level, key, source, kind, value, limit, margin, fix if level is not Level.OK else None, facts
    )


def note(check: str, key: str, source: Source, fix: str | None = None, **facts: Fact) -> Finding:
    """A finding without a comparison: something to know, or a limit whose input is missing."""
    return Finding(check, Level.NOTE, key, source, fix=fix, facts=facts)
