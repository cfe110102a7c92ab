"""The soft start of an anodizing run: linear or stepped, its length by alloy family."""

from dataclasses import dataclass

from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.tables import AlloyFamily
from lineplanner.quantities import CurrentDensity, Ratio, Time


@dataclass(frozen=True, slots=True, kw_only=True)
class Segment:
    """A piece of the soft start: duration and the share of the set current at its ends."""

    duration: Time
    start: Ratio
    end: Ratio


@dataclass(frozen=True, slots=True, kw_only=True)
class SoftStart:
    """The segments before the hold, none if it starts at full current."""

    segments: tuple[Segment, ...]
    stepped: bool

    @property
    def duration(self) -> Time:
        return sum(s.duration for s in self.segments)

    @property
    def equivalent(self) -> Time:
        """Time at full current that passes the same charge."""
        return sum(0.5 * (s.start + s.end) * s.duration for s in self.segments)


def soft_start_of(recipe: Recipe, families: tuple[AlloyFamily, ...], density: CurrentDensity) -> SoftStart:
    """The soft start of a recipe; what it leaves out comes from the slowest alloy family of the load."""
    slowest = max(families, key=lambda f: (f.soft_start.value, f.soft_start_steps))
    duration = recipe.soft_start.value if recipe.soft_start is not None else slowest.soft_start.value
    steps = recipe.soft_start_steps if recipe.soft_start_steps is not None else slowest.soft_start_steps
    lowest = recipe.soft_start_from
    if lowest is None:
        lowest = min(f.start_density.value for f in families)
    if duration <= 0.0:
        return SoftStart(segments=(), stepped=False)
    start = min(lowest / density, 1.0)
    if steps <= 0:
        return SoftStart(segments=(Segment(duration=duration, start=start, end=1.0),), stepped=False)
    return SoftStart(segments=stepped(duration, steps, start), stepped=True)


def stepped(duration: Time, steps: int, start: Ratio) -> tuple[Segment, ...]:
    """Equal steps below full current: from the start share up, or from one step up if that share is 0.

    >>> [round(s.start, 2) for s in stepped(300.0, 4, 0.2)]
    [0.2, 0.4, 0.6, 0.8]
    """
    first, count = (0, steps) if start > 0.0 else (1, steps + 1)
    shares = [start + (1.0 - start) * (k + first) / count for k in range(steps)]
    return tuple(Segment(duration=duration / steps, start=share, end=share) for share in shares)
