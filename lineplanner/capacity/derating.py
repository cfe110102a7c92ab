"""What a rectifier may deliver in hot air, at height, or beside others."""

import math

from lineplanner.errors import InputError, Quantity
from lineplanner.inputs.tables import Limits
from lineplanner.quantities import LENGTH, TEMPERATURE, Current, Length, Ratio, Temperature

STEP = 100.0  # m of height that the altitude rule counts in


def derating_factor(*, ambient: Temperature, altitude: Length, limits: Limits) -> Ratio:
    """Share of the rated current that hot and thin air leave.

        k = (1 - a (T - T1)) (1 - b (h - h1) / 100 m), each at most 1

    Parameters
        ambient: T, air at the rectifier [K]
        altitude: h, of the shop [m]
        limits: a, T1, b and h1 of the limits table
    Returns
        k, exactly 1 up to T1 and h1, never below 0 [1]
    Raises
        InputError derating.not-a-number where air or height is not a finite number
    Valid
        forced or free air up to the hottest air of the limits table; beyond it a finding says so
    Source
        manuals of industrial power converters (read), taken over for rectifiers; the nameplate comes first
    Example
        Air of 46 degC at 1800 m:

        >>> from types import SimpleNamespace as Row
        >>> limits = Row(derate_from=Row(value=313.15), derate_per_kelvin=Row(value=0.01),
        ...     derate_altitude_from=Row(value=1000.0), derate_per_altitude=Row(value=0.01))
        >>> round(derating_factor(ambient=319.15, altitude=1800.0, limits=limits), 4)
        0.8648
    """
    if not math.isfinite(ambient) or not math.isfinite(altitude):
        facts = {"ambient": Quantity(ambient, TEMPERATURE), "altitude": Quantity(altitude, LENGTH)}
        raise InputError("derating.not-a-number", **facts)
    hot = max(0.0, ambient - limits.derate_from.value) * limits.derate_per_kelvin.value
    high = max(0.0, altitude - limits.derate_altitude_from.value) / STEP * limits.derate_per_altitude.value
    return max(0.0, 1.0 - hot) * max(0.0, 1.0 - high)


def derated_current(*, rated: Current, ambient: Temperature, altitude: Length, limits: Limits) -> Current:
    """Current that a rectifier may deliver in this air at this height.

        I = k I_rated

    Parameters
        rated: I_rated, of the nameplate [A]
        ambient: air at the rectifier [K]
        altitude: of the shop [m]
        limits: the limits table
    Returns
        I [A]
    Raises
        InputError derating.not-a-number where air or height is not a finite number
    Valid
        as derating_factor
    Source
        manuals of industrial power converters (read): the two rules multiplied
    Example
        A unit of 5000 A in air of 46 degC at 1800 m:

        >>> from types import SimpleNamespace as Row
        >>> limits = Row(derate_from=Row(value=313.15), derate_per_kelvin=Row(value=0.01),
        ...     derate_altitude_from=Row(value=1000.0), derate_per_altitude=Row(value=0.01))
        >>> round(derated_current(rated=5000.0, ambient=319.15, altitude=1800.0, limits=limits))
        4324
    """
    return rated * derating_factor(ambient=ambient, altitude=altitude, limits=limits)


def parallel_current(*, rated: Current, units: int, imbalance: Ratio) -> Current:
    """Current of equal rectifiers side by side before the most loaded one reaches its rating.

        I = N I_rated / (1 + u)

    Parameters
        rated: I_rated, of one unit [A]
        units: N, number of units
        imbalance: u, how far the most loaded unit lies above the mean [1]
    Returns
        I, of all units together [A]
    Valid
        equal units on one bus
    Source
        arithmetic
    Example
        Three units of 2000 A that share within 5 %:

        >>> round(parallel_current(rated=2000.0, units=3, imbalance=0.05))
        5714
    """
    return units * rated / (1.0 + imbalance)


def meter_error(*, accuracy: Ratio, share: Ratio) -> Ratio:
    """Error of the reading when the ammeter runs at a share of its full scale.

        e = a / s

    Parameters
        accuracy: a, of full scale [1]
        share: s, reading over full scale, above 0 [1]
    Returns
        e, of the reading [1]
    Valid
        meters whose accuracy is given of full scale
    Source
        definition of accuracy of full scale
    Example
        A 1 % meter at a tenth of its scale:

        >>> round(meter_error(accuracy=0.01, share=0.1), 9)
        0.1
    """
    return accuracy / share
