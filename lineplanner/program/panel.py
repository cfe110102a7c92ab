"""What a panel can be set to, and to what the minutes are rounded."""

import math

from lineplanner.inputs.line import Rectifier
from lineplanner.quantities import Current, Time

# A panel without an entry: 1 % of the rating, taken to the nearest 1, 2 or 5 (design rule of this program).
PANEL_SHARE = 0.01
_ROUND = (1.0, 2.0, 5.0, 10.0)
_TOLERANCE = 1e-9  # a whole number of steps, but for the rounding of floats


def panel_step(rectifier: Rectifier) -> Current:
    """The step the panel's current can be set in.

        step = entered, or 0.01 x rating to the nearest 1, 2 or 5 times a power of ten

    Parameters
        rectifier: the unit, with its nameplate
    Returns
        step [A]
    Valid
        any rating above 0
    Source
        the line file; without an entry a design rule of this program
    Example
        >>> from lineplanner.program.panel import nice_step
        >>> nice_step(30.0)
        20.0
    """
    return (
        rectifier.panel_step
        if rectifier.panel_step is not None
        else nice_step(PANEL_SHARE * rectifier.max_current)
    )


def nice_step(value: float) -> float:
    """The number among 1, 2, 5 times powers of ten that is nearest on a ratio scale."""
    power = 10.0 ** math.floor(math.log10(value))
    return min(_ROUND, key=lambda step: abs(math.log(value / (step * power)))) * power


def panel_current(
    wanted: Current, step: Current, *, low: Current | None = None, high: Current | None = None
) -> Current:
    """The setting nearest to a wanted current, at least one step, on the allowed side of a range if one is.

        I_panel = max(1, round(I / step)) step, one step back if that leaves low..high and one step back does not

    Parameters
        wanted: I, current wanted [A]
        step: of the panel [A]
        low: of the recipe's range; None: open [A]
        high: of the recipe's range; None: open [A]
    Returns
        I_panel [A]
    Valid
        step above 0
    Source
        arithmetic
    Example
        >>> panel_current(148.4, 1.0)
        148.0
        >>> panel_current(185.98, 1.0, high=185.98)
        185.0
    """
    steps = max(1.0, float(round(wanted / step)))
    low, high = (0.0 if low is None else low), (math.inf if high is None else high)
    back = steps - 1.0 if steps * step > high else steps + 1.0
    inside = low <= steps * step <= high
    return (back if not inside and back >= 1.0 and low <= back * step <= high else steps) * step


def rounded_up(time: Time, step: Time) -> Time:
    """A time rounded up to whole steps.

        t_up = ceil(t / step) step

    Parameters
        time: t [s]
        step: of the clock [s]
    Returns
        t_up [s]
    Valid
        step above 0; a time that is a whole number of steps but for float rounding stays
    Source
        arithmetic
    Example
        >>> rounded_up(2461.0, 30.0)
        2490.0
    """
    return math.ceil(time / step - _TOLERANCE) * step


def rounded_down(time: Time, step: Time) -> Time:
    """A time rounded down to whole steps.

        t_down = floor(t / step) step

    Parameters
        time: t [s]
        step: of the clock [s]
    Returns
        t_down [s]
    Valid
        step above 0; a time that is a whole number of steps but for float rounding stays
    Source
        arithmetic
    Example
        >>> rounded_down(2461.0, 30.0)
        2460.0
    """
    return math.floor(time / step + _TOLERANCE) * step
