"""Position shares: how local current density spreads over a part."""

from dataclasses import dataclass

from lineplanner.sources import Source


@dataclass(frozen=True, slots=True, kw_only=True)
class PositionShares:
    """Per part the low, mean and high ratio of local to mean current density over a stated band."""

    low: float
    mean: float
    high: float
    source: Source
