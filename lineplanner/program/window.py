"""The band against minimum and maximum, and the time that would cure a miss."""

from collections.abc import Callable
from dataclasses import dataclass

from lineplanner.bath.uncertainty import Band
from lineplanner.errors import Quantity
from lineplanner.findings import Finding, Level
from lineplanner.program.aims import Aims
from lineplanner.program.panel import rounded_down, rounded_up
from lineplanner.quantities import THICKNESS, TIME, Ratio, Thickness, Time
from lineplanner.sources import Source, Status

SolveTime = Callable[[Thickness], Time | None]  # total time for an expected thickness
_RECIPE = Source("window of the recipe", Status.ENTERED)


def check_window(
    aims: Aims,
    *,
    low: Thickness,
    high: Thickness,
    band: Band,
    solve: SolveTime,
    clock: Time,
    limited: bool = False,
) -> tuple[Finding, ...]:
    """Cautions where an end of the band leaves the window, with the time that cures it, if one does."""
    spread = high / low * (1.0 - band.total) / (1.0 + band.total) if low > 0.0 else 1.0
    window = _Window(aims=aims, band=band, solve=solve, clock=clock, spread=max(1.0, spread), limited=limited)
    found = []
    if aims.minimum is not None:
        found.append(window.check(low, aims.minimum, below=True))
    if aims.maximum is not None:
        found.append(window.check(high, aims.maximum, below=False))
    return tuple(found)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Window:
    aims: Aims
    band: Band
    solve: SolveTime
    clock: Time
    limited: bool  # the volts run out: minutes do not follow from the set current
    spread: Ratio  # fastest over slowest part: the high end is that of the fastest

    def check(self, end: Thickness, limit: Thickness, *, below: bool) -> Finding:
        """One end of the band against its limit."""
        name = "band-minimum" if below else "band-maximum"
        margin = end / limit - 1.0 if below else 1.0 - end / limit
        if margin >= 0.0:
            return Finding(name, Level.OK, f"{name}.ok", _RECIPE, THICKNESS, end, limit, margin)
        if self.limited:
            fix = "band.voltage-limited"
            return Finding(name, Level.CAUTION, f"{name}.out", _RECIPE, THICKNESS, end, limit, margin, fix)
        wanted = self._wanted(limit, below=below)
        time = None if wanted is None else self.solve(wanted)
        if time is None or wanted is None:
            fix, facts = "band.none-cures", {}
        else:
            rounded = rounded_up(time, self.clock) if below else rounded_down(time, self.clock)
            fix = "band.longer" if below else "band.shorter"
            facts = {"time": Quantity(rounded, TIME), "thickness": Quantity(wanted, THICKNESS)}
        return Finding(name, Level.CAUTION, f"{name}.out", _RECIPE, THICKNESS, end, limit, margin, fix, facts)

    def _wanted(self, limit: Thickness, *, below: bool) -> Thickness | None:
        """The expected thickness that brings this end in and keeps the other one in; None if none does."""
        least, most = self.aims.minimum, self.aims.maximum
        if below:
            wanted = limit / (1.0 - self.band.total) if self.band.total < 1.0 else None
            fits = wanted is not None and (
                most is None or wanted * self.spread * (1.0 + self.band.total) <= most
            )
        else:
            wanted = limit / (1.0 + self.band.total) / self.spread
            fits = least is None or wanted * (1.0 - self.band.total) >= least
        return wanted if fits else None
