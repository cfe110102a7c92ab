"""What a program asks of the line: how long it stays above a current, and what it asks for good."""

from collections.abc import Iterator

from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import Current, CurrentDensity, Time, Voltage

_HALVINGS = 60  # a bisection this deep ends at float accuracy
_EVEN = 1e-9  # s; stages this close follow on one another


def _piece_above(stage: Stage, level: Current) -> tuple[Time, Time]:
    """From when to when a stage lies at or above a current; linear between its ends."""
    first, last = stage.from_current, stage.to_current
    if first >= level and last >= level:
        return stage.start, stage.end
    if first < level and last < level:
        return stage.end, stage.end
    crossing = stage.start + (level - first) / (last - first) * stage.duration
    return (stage.start, crossing) if first >= level else (crossing, stage.end)


def _spells(stages: tuple[Stage, ...], level: Current) -> Iterator[Time]:
    """Lengths of the unbroken times at or above a current."""
    begun = ended = None
    for stage in stages:
        start, end = _piece_above(stage, level)
        if end <= start:
            continue
        if begun is None or ended is None or start - ended > _EVEN:
            if begun is not None and ended is not None:
                yield ended - begun
            begun = start
        ended = end
    if begun is not None and ended is not None:
        yield ended - begun


def longest_above(stages: tuple[Stage, ...], level: Current) -> Time:
    """Longest unbroken time that a program runs at or above a current.

        t = max over spells of (t_end - t_start), I(t) >= I_level

    Parameters
        stages: of the program, in order
        level: I_level [A]
    Returns
        t, 0 where the current is never reached [s]
    Valid
        currents linear within each stage
    Source
        arithmetic
    Example
        >>> longest_above((), 100.0)
        0.0
    """
    return max(_spells(stages, level), default=0.0)


def sustained_current(stages: tuple[Stage, ...], seconds: Time) -> Current:
    """Highest current that a program holds without a break for longer than a given time.

        I = sup { I : t(I) > t_short }

    Parameters
        stages: of the program, in order
        seconds: t_short, what still counts as short [s]
    Returns
        I, 0 where no current lasts that long [A]
    Valid
        currents linear within each stage
    Source
        arithmetic
    Example
        >>> sustained_current((), 120.0)
        0.0
    """
    levels = sorted({c for s in stages for c in (s.from_current, s.to_current) if c > 0.0}, reverse=True)
    above = None
    for level in levels:
        if longest_above(stages, level) > seconds:
            return level if above is None else _between(stages, seconds, level, above)
        above = level
    return 0.0 if above is None else _between(stages, seconds, 0.0, above)


def _between(stages: tuple[Stage, ...], seconds: Time, low: Current, high: Current) -> Current:
    """The current between two levels from which on a program no longer lasts."""
    if longest_above(stages, low * (1.0 + 1e-12)) <= seconds:
        return low
    for _ in range(_HALVINGS):
        middle = 0.5 * (low + high)
        low, high = (middle, high) if longest_above(stages, middle) > seconds else (low, middle)
    return low


def steady_current(run: Run, seconds: Time) -> Current:
    """Current that warms what carries it: held longer than a short time; without stages what was asked for.

        I = sustained current, else set current, else peak

    Parameters
        run: the program on its rectifier
        seconds: what still counts as short [s]
    Returns
        I [A]
    Valid
        any program
    Source
        arithmetic
    Example
        >>> from types import SimpleNamespace as Record
        >>> steady_current(Record(stages=(), set_current=800.0, peak_current=900.0), 120.0)
        800.0
    """
    if run.stages:
        return sustained_current(run.stages, seconds)
    return run.set_current if run.set_current is not None else run.peak_current


def peak_current(run: Run) -> Current:
    """Highest current of a program, over all its stages.

        I = max I(t)

    Parameters
        run: the program on its rectifier
    Returns
        I [A]
    Valid
        any program
    Source
        arithmetic
    Example
        >>> from types import SimpleNamespace as Record
        >>> peak_current(Record(stages=(), peak_current=900.0))
        900.0
    """
    return max((stage.peak for stage in run.stages), default=run.peak_current)


def peak_stage(run: Run) -> Stage | None:
    """The stage with the highest current, the first of equals."""
    return max(run.stages, key=lambda stage: stage.peak, default=None)


def stage_volts(stage: Stage) -> Voltage:
    """Highest terminal volts of a stage.

        V = max(V_from, V_to)

    Parameters
        stage: with its volts at both ends
    Returns
        V [V]
    Valid
        volts linear within the stage
    Source
        arithmetic
    Example
        >>> from types import SimpleNamespace as Record
        >>> stage_volts(Record(from_voltage=12.0, to_voltage=16.0))
        16.0
    """
    return max(stage.from_voltage, stage.to_voltage)


def fitting_density(run: Run, allowed: Current, *, step: Current = 0.0) -> CurrentDensity | None:
    """Current density to set so that the peak of the program just fits.

        J_fit = J_set (I_allowed / I_peak - step / (2 I_set))

    Parameters
        run: the program on its rectifier; where its volts cut it, I_peak is what the recipe asks for
        allowed: I_allowed, of the whole load [A]
        step: of the panel, whose setting may come out half a step higher [A]
    Returns
        J_fit; None where density is no setting, or the peak does not follow it (a reverse etch) [A/m^2]
    Valid
        same parts and racks; strike and soft start go with the set current
    Source
        current is current density times carrying area
    Example
        >>> from types import SimpleNamespace as Record
        >>> plate = Record(stage="plate", density=150.0, to_current=1200.0, peak=1200.0)
        >>> fitting_density(Record(stages=(plate,), panel_current=1200.0, asked=()), 1000.0)
        125.0
    """
    stage = peak_stage(run)
    if run.panel_current is None or stage is None or stage.stage == "reverse" or stage.peak <= 0.0:
        return None
    last = run.stages[-1]
    set_density = last.density * run.panel_current / last.to_current
    asked = max(stage.peak, run.panel_current, *(one.peak for one in run.asked if one.stage != "reverse"))
    return max(set_density * (allowed / asked - step / (2.0 * run.panel_current)), 0.0)


def asked_current(run: Run, value: Current) -> Current:
    """A demand as the recipe asks for it, where the volts leave less of it.

        I_asked = max(I, I_set, peaks of the lead-in as asked)

    Parameters
        run: the program on its rectifier
        value: I, the demand as it flows [A]
    Returns
        I_asked; I itself where no volts cut it [A]
    Valid
        a set current
    Source
        arithmetic
    Example
        >>> from types import SimpleNamespace as Record
        >>> asked_current(Record(limit_reached=60.0, panel_current=926.0, asked=()), 904.0)
        926.0
    """
    if run.limit_reached is None or run.panel_current is None:
        return value
    return max(value, run.panel_current, *(stage.peak for stage in run.asked))


def firm_current(run: Run) -> bool:
    """Whether the current is set by hand; under voltage control it is only planned from a usual peak."""
    return run.set_current is not None
