"""The quantities that a trigger compares, and how it compares them."""

import math

from lineplanner.cautions.facts import NOT_KNOWN
from lineplanner.errors import Fact, Quantity
from lineplanner.quantities import Charge, Current, Kind, Length, Ratio, Time, Voltage
from lineplanner.sources import Constant, Source, Status

CREST_FULL_ON = Constant(
    "crest over mean of a six-pulse bridge fully on",
    math.pi / 3.0,
    "1",
    Source("mean of a sine's top 60 degrees over its crest, 3/pi", Status.DERIVED),
)
# Room for the last digits that a unit conversion leaves (40 dyn/cm is not exactly 0.04 N/m in floats).
_NOISE = 1e-9


def exceeds(value: float, limit: float) -> bool:
    """Whether a value lies above a limit; the limit itself does not."""
    return value > limit * (1.0 + _NOISE)


def reaches(value: float, limit: float) -> bool:
    """Whether a value lies at or above a limit."""
    return value >= limit * (1.0 - _NOISE)


def stated(value: float | None, kind: Kind) -> Fact:
    """A value for a text, or the words that it is not known."""
    return NOT_KNOWN if value is None else Quantity(value, kind)


def full_on_crest(full_on_voltage: Voltage) -> Voltage:
    """Highest instant of an unfiltered phase-controlled supply when its bridge is fully on.

        U_crest = (pi / 3) U_do

    Parameters
        full_on_voltage: U_do, mean output with the bridge fully on; above the rated volts [V]
    Returns
        U_crest, reached when a lost contact drives the supply to its ceiling [V]
    Valid
        Six-pulse bridge, no filter, supply voltage in balance. With a filter the mean counts instead.
    Source
        Derived: a six-pulse output is the top 60 degrees of a sine, with mean 3/pi of its crest.
    Example
        A 60 V supply that gives 60 V fully on touches 62.8 V:

        >>> round(full_on_crest(60.0), 1)
        62.8
    """
    return CREST_FULL_ON.value * full_on_voltage


def implant_distance(*, current: Current, limit_current: Current, limit_distance: Length) -> Length:
    """How far a person with an implant stays from a single bar while current flows.

        r = r_0 I / I_0        (B = mu_0 I / (2 pi r) held constant)

    Parameters
        current: I, in the bar [A]
        limit_current: I_0, that makes the limit field at r_0 [A]
        limit_distance: r_0 [m]
    Returns
        r, where the field has fallen to the limit [m]
    Valid
        One long straight bar; the return bar beside it makes the true field smaller.
    Source
        Derived: Ampere's law for a straight conductor.
    Example
        1250 A make 0.5 mT at 0.5 m, so 10 000 A make it at

        >>> implant_distance(current=10_000.0, limit_current=1250.0, limit_distance=0.5)
        4.0
    """
    return limit_distance * current / limit_current


def potential_charge(*, installed_current: Current, time: Time, share: Ratio) -> Charge:
    """Charge a year that the installed chrome rectifiers could pass, for the size of the site.

        Q = I t s

    Parameters
        installed_current: I, sum of the ratings over all hard chrome tanks [A]
        time: t, hours of operation a year that the rule assumes [s]
        share: s, share of that time with current on [1]
    Returns
        Q, potential of a year [C]
    Valid
        A figure for the permit: it counts ratings, never what a load draws.
    Source
        40 CFR 63.341 (from memory: 8400 h, 0.7); the numbers come from the cautions file.
    Example
        Two 6000 A rectifiers, in million ampere-hours:

        >>> round(potential_charge(installed_current=12_000.0, time=8400 * 3600.0, share=0.7) / 3600e6, 2)
        70.56
    """
    return installed_current * time * share
