"""The volts run out: from current control to voltage control, integrated to the aim."""

from collections.abc import Callable
from dataclasses import dataclass

from lineplanner.program.job import HALF_MINUTE
from lineplanner.program.panel import rounded_down, rounded_up
from lineplanner.program.softstart import Segment, SoftStart
from lineplanner.quantities import Ratio, Thickness, Time, Voltage

PIECE = 4  # Runge-Kutta steps that one drawn piece takes
_EVEN = 1e-6  # s
STEPS = 24  # Runge-Kutta steps from the crossover to the latest end
_TURNS = 80  # of the root search, at most
_CLOSE = 1e-12  # relative width at which a root is found


@dataclass(frozen=True, slots=True, kw_only=True)
class Held:
    """How a run goes on at the voltage limit; shares are of the set current.

    points are (time, equivalent time, share) from the crossover to the end, close enough to draw straight lines.
    """

    reached: Time
    points: tuple[tuple[Time, Time, Ratio], ...]
    share_at_start: Ratio
    share_at_end: Ratio
    equivalent: Time
    total: Time


@dataclass(frozen=True, slots=True, kw_only=True)
class Supply:
    """A supply at its voltage limit. volts is of (share of set current, equivalent time, time), rising with the share.

    Equivalent time is the time at set current that passes the same charge.
    """

    volts: Callable[[Ratio, Time, Time], Voltage]
    limit: Voltage

    def over(self, share: Ratio, equivalent: Time, time: Time) -> Voltage:
        return self.volts(share, equivalent, time) - self.limit

    def share(self, equivalent: Time, time: Time) -> Ratio:
        """The share of the set current that takes just the limit: 1 where all of it fits, 0 where none does."""
        if self.over(1.0, equivalent, time) <= 0.0:
            return 1.0
        if self.over(_CLOSE, equivalent, time) >= 0.0:
            return 0.0
        return root(lambda share: self.over(share, equivalent, time), _CLOSE, 1.0)

    def step(self, equivalent: Time, time: Time, step: Time) -> Time:
        """Equivalent time one Runge-Kutta step later, from d(equivalent)/dt = share."""
        k1 = self.share(equivalent, time)
        k2 = self.share(equivalent + 0.5 * step * k1, time + 0.5 * step)
        k3 = self.share(equivalent + 0.5 * step * k2, time + 0.5 * step)
        k4 = self.share(equivalent + step * k3, time + step)
        return equivalent + step * (k1 + 2.0 * k2 + 2.0 * k3 + k4) / 6.0

    def crossing(self, start: SoftStart, total: Time) -> tuple[Time, Time]:
        """(time, equivalent time) at which the limit is first met: in the soft start or in the hold."""
        time = equivalent = 0.0
        for segment in start.segments:
            if self.over(*_inside(segment, 1.0, equivalent, time)) > 0.0:
                part = self._within(segment, equivalent, time)
                _, e, t = _inside(segment, part, equivalent, time)
                return t, e
            _, equivalent, time = _inside(segment, 1.0, equivalent, time)
        if self.over(1.0, equivalent, time) >= 0.0:
            return time, equivalent
        rest = root(lambda x: self.over(1.0, equivalent + x, time + x), 0.0, total - time)
        return time + rest, equivalent + rest

    def _within(self, segment: Segment, equivalent: Time, time: Time) -> Ratio:
        """The part of a segment after which the limit is met; 0 where it starts above it."""
        if self.over(*_inside(segment, 0.0, equivalent, time)) >= 0.0:
            return 0.0
        return root(lambda part: self.over(*_inside(segment, part, equivalent, time)), 0.0, 1.0)


def hold_at_voltage(
    supply: Supply,
    *,
    start: SoftStart,
    total: Time,
    most_stretch: Ratio,
    thickness: Callable[[Time, Time], Thickness],
    aim: Thickness,
    clock: Time = HALF_MINUTE,
) -> Held:
    """Run at the voltage limit from where it is met until the aim, at most `most_stretch` over the planned total.

    `thickness` is of (equivalent time, time). The end is rounded up to the clock, but not past the cap.
    """
    time, equivalent = reached = supply.crossing(start, total)
    cap = max(total, rounded_down(total * (1.0 + most_stretch), clock))
    step = (cap - time) / STEPS
    points = [(time, equivalent)]
    for number in range(STEPS):
        later = supply.step(equivalent, time, step)
        if thickness(later, time + step) >= aim:
            break
        time, equivalent = time + step, later
        if number % PIECE == PIECE - 1:
            points.append((time, equivalent))
    end = cap
    if time < cap - 0.5 * step:
        part = _part_to_aim(supply, equivalent, time, step, thickness, aim)
        end = min(rounded_up(time + part, clock), cap)
        equivalent = supply.step(equivalent, time, end - time)
    points = [point for point in points if point[0] < end - _EVEN] + [(end, equivalent)]
    return Held(
        reached=reached[0],
        points=tuple((t, e, supply.share(e, t)) for t, e in points),
        share_at_start=supply.share(reached[1], reached[0]),
        share_at_end=supply.share(equivalent, end),
        equivalent=equivalent,
        total=end,
    )


def _part_to_aim(
    supply: Supply,
    equivalent: Time,
    time: Time,
    step: Time,
    thickness: Callable[[Time, Time], Thickness],
    aim: Thickness,
) -> Time:
    """The time into a step at which the aim is met."""

    def missing(part: Time) -> float:
        return thickness(supply.step(equivalent, time, part), time + part) / aim - 1.0

    return 0.0 if missing(0.0) >= 0.0 else root(missing, 0.0, step)


def _inside(segment: Segment, part: Ratio, equivalent: Time, time: Time) -> tuple[Ratio, Time, Time]:
    """(share, equivalent time, time) after a part of a segment of the soft start."""
    share = segment.start + (segment.end - segment.start) * part
    passed = segment.duration * part
    return share, equivalent + 0.5 * (segment.start + share) * passed, time + passed


def root(function: Callable[[float], float], low: float, high: float) -> float:
    """Where a rising function passes 0 between low and high (regula falsi, Illinois variant)."""
    below, above = function(low), function(high)
    kept = 0
    for _ in range(_TURNS):
        if high - low <= _CLOSE * max(abs(low), abs(high)) or above == below:
            break
        middle = high - above * (high - low) / (above - below)
        value = function(middle)
        if value == 0.0:
            return middle
        if value > 0.0:
            if abs(high - middle) <= _CLOSE * abs(middle):
                return middle
            high, above = middle, value
            below *= 0.5 if kept > 0 else 1.0
            kept = 1
        else:
            if abs(middle - low) <= _CLOSE * abs(middle):
                return middle
            low, below = middle, value
            above *= 0.5 if kept < 0 else 1.0
            kept = -1
    return 0.5 * (low + high)
