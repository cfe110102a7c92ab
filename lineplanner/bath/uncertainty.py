"""How far a thickness can be off: combination of relative half-widths, between and within loads."""

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass

from lineplanner.quantities import Ratio


def combined_half_width(parts: Mapping[str, Ratio]) -> Ratio:
    """What several independent uncertainties come to.

        U = sqrt(sum (s_i u_i)^2)

    Parameters
        parts: name of each input and s_i u_i, its relative 95 % half-width times its sensitivity [1]
    Returns
        U, relative 95 % half-width of the result; 0 without parts [1]
    Valid
        independent inputs, nearly normal, effects nearly straight over their width
    Source
        JCGM 100:2008 (GUM), clause 5.1.2 (from memory), in relative form
    Example
        Area 3 %, yield 10 %:

        >>> round(combined_half_width({"area": 0.03, "yield": 0.10}), 4)
        0.1044
    """
    return math.hypot(*parts.values())


def sensitivity(function: Callable[[float], float], value: float, relative_step: float = 1e-3) -> Ratio:
    """By how many percent a result changes when an input changes by one percent.

        s = d ln f / d ln x, by central difference: (f(x + d) - f(x - d)) / (2 d) x / f(x),  d = step x

    Parameters
        function: f, of the one input
        value: x, where it is worked out; not zero
        relative_step: step, relative to x
    Returns
        s; 0 where the result itself is zero [1]
    Valid
        smooth functions; an absolute half-width (kelvin) goes in divided by x
    Source
        central difference, error of the order of the step squared
    Example
        >>> round(sensitivity(lambda i: 5.0 * i**1.34, 3100.0), 3)
        1.34
    """
    middle = function(value)
    if middle == 0.0:
        return 0.0
    step = relative_step * value
    return (function(value + step) - function(value - step)) / (2.0 * step) * value / middle


@dataclass(frozen=True, slots=True)
class Band:
    """Relative 95 % half-widths: between loads (all parts together), within one load, both combined."""

    between: Ratio
    within: Ratio
    total: Ratio


def band(between: Mapping[str, Ratio], within: Mapping[str, Ratio]) -> Band:
    """Both kinds of uncertainty, kept apart: a coupon narrows the first, racking the second."""
    apart = combined_half_width(between), combined_half_width(within)
    return Band(*apart, math.hypot(*apart))
