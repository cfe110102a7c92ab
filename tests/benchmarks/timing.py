"""Times of several things in one run, their turns interleaved, and how they are printed."""

import gc
import statistics
import time
from collections.abc import Callable, Mapping
from dataclasses import dataclass

Turn = Callable[[], Callable[[], object]]
"""Makes the next turn ready, untimed, and returns what is to be timed."""


@dataclass(frozen=True, slots=True)
class Times:
    """Seconds of every turn of one thing."""

    each: tuple[float, ...]

    @property
    def median(self) -> float:
        return statistics.median(self.each)

    @property
    def least(self) -> float:
        return min(self.each)


def measured(turns: Mapping[str, Turn], *, runs: int, warm: int = 2, calls: int = 1) -> dict[str, Times]:
    """Times by name, per call. Each round gives every thing one turn, so that a slow spell hits them all.

    The collector is off inside a turn, as in timeit: a turn pays for its own work only.
    """
    found: dict[str, list[float]] = {name: [] for name in turns}
    for round_ in range(warm + runs):
        for name, turn in turns.items():
            timed = turn()
            gc.collect(0)
            gc.disable()
            begin = time.perf_counter()
            for _ in range(calls):
                timed()
            took = (time.perf_counter() - begin) / calls
            gc.enable()
            if round_ >= warm:
                found[name].append(took)
    return {name: Times(tuple(times)) for name, times in found.items()}


def show_times(title: str, times: Mapping[str, Times], targets: Mapping[str, float]) -> None:
    """Median, least and target of each; targets in seconds."""
    runs = max(len(t.each) for t in times.values())
    print(f"\n{title}  ({runs} turns each)")
    print(f"  {'':48}{'median':>11}{'least':>11}{'target':>11}  median/target")
    for name, taken in times.items():
        target = targets.get(name)
        line = f"  {name:48}{_seconds(taken.median):>11}{_seconds(taken.least):>11}"
        if target is not None:
            line += f"{_seconds(target):>11}  {taken.median / target:.2f}"
        print(line)


def show_ratios(title: str, times: Mapping[str, Times], base: str, targets: Mapping[str, float]) -> None:
    """Median of each as so many times the base; targets as ratios."""
    runs = len(times[base].each)
    print(f"\n{title}  ({runs} turns each)")
    print(f"  {'':48}{'median':>11}{'least':>11}{'ratio':>8}{'target':>9}")
    for name, taken in times.items():
        ratio = taken.median / times[base].median
        line = f"  {name:48}{_seconds(taken.median):>11}{_seconds(taken.least):>11}{ratio:8.1f}"
        print(line + (f"{'<= ' + format(targets[name], 'g'):>9}" if name in targets else ""))


def _seconds(value: float) -> str:
    for unit, size in (("s", 1.0), ("ms", 1e-3), ("us", 1e-6)):
        if value >= size:
            return f"{value / size:.2f} {unit}"
    return f"{value / 1e-9:.0f} ns"
