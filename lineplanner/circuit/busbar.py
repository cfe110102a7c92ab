"""Bus bar in still air: the current that a heat balance allows."""

import math

from lineplanner.circuit.conductors import resistivity_at
from lineplanner.quantities import (
    ICE_POINT,
    Current,
    Length,
    PerKelvin,
    Ratio,
    Resistivity,
    Temperature,
    TemperatureDifference,
)
from lineplanner.sources import Constant, Source, Status

STEFAN_BOLTZMANN = Constant(
    "Stefan-Boltzmann constant",
    5.670374419e-8,
    "W/(m^2 K^4)",
    Source("CODATA 2018, from memory; follows from the SI defining constants", Status.DERIVED),
)
FREE_CONVECTION = Constant(
    "free convection of a bar on edge",
    1.32,
    "W/(m^1.75 K^1.25)",
    Source(
        "own fit of the laminar law to one read value: ANSI T1.311 table 5, copper bar 1/4 x 4 in, 1342 A DC",
        Status.DERIVED,
    ),
)
DULL_BAR = Constant(
    "emissivity of bare bar in industrial air",
    0.4,
    "1",
    Source("copper bus-bar pages: 60 days of industrial exposure", Status.PUBLISHED),
)
BUS_RISE = Constant(
    "temperature rise of bare-jointed bus",
    30.0,
    "K",
    Source(
        "ANSI C37.20 by a bus-bar design page: 30 K over 40 degC without silvered joints", Status.PUBLISHED
    ),
)
BUS_AIR = Constant("air around bus", ICE_POINT.value + 40.0, "K", BUS_RISE.source)
GROUP = (
    1.0,
    1.64,
    2.16,
    2.64,
)  # bars one bar apart, 60 Hz, 30 K: a copper trade association's bus-bar page (read)
GROUP_SOURCE = Source(
    "a copper trade association's bus-bar page: 1/4 in bars, 1/4 in apart, 60 Hz, 30 K", Status.PUBLISHED
)


def ampacity(
    *,
    width: Length,
    thickness: Length,
    resistivity: Resistivity,
    coefficient: PerKelvin,
    emissivity: Ratio,
    surroundings: Temperature,
    rise: TemperatureDifference,
) -> Current:
    """Direct current that one bus bar on edge in still air carries at a given rise.

        I^2 rho(T)/(w t) = 2 c theta^1.25 (w^0.75 + t^0.75) + 2 (w + t) eps sigma (T^4 - T0^4)

    Parameters
        width: w, the upright face [m]
        thickness: t [m]
        resistivity: rho20, at 20 degC [ohm m]
        coefficient: alpha [1/K]
        emissivity: eps, 0.1 bright, 0.4 dull, 0.9 painted [1]
        surroundings: T0, still air [K]
        rise: theta, T = T0 + theta [K]
    Returns
        I [A]
    Valid
        one bar, free on all sides, 12 to 200 mm wide, rises of 20 to 65 K
    Source
        laminar free convection and grey radiation; c fitted to one value of ANSI T1.311, table 5
    Example
        Copper bar of 100 x 10 mm, dull, in air of 40 degC:

        >>> round(ampacity(width=0.1, thickness=0.01, resistivity=1 / 58e6 / 0.99, coefficient=0.00393,
        ...     emissivity=0.4, surroundings=313.15, rise=30.0))
        1697
    """
    hot = surroundings + rise
    warm = resistivity_at(resistivity=resistivity, coefficient=coefficient, temperature=hot)
    convection = 2.0 * FREE_CONVECTION.value * rise**1.25 * (width**0.75 + thickness**0.75)
    grey = emissivity * STEFAN_BOLTZMANN.value * (hot**4 - surroundings**4)
    radiation = 2.0 * (width + thickness) * grey
    return math.sqrt((convection + radiation) * width * thickness / warm)


def group_factor(bars: int) -> Ratio:
    """How many bars' worth of current bars side by side carry: they warm each other.

        k = 1, 1.64, 2.16, 2.64 for 1 to 4 bars

    Parameters
        bars: number of bars, one bar's thickness apart
    Returns
        k, times the current of one bar; from 4 bars on that of 4 [1]
    Valid
        1 to 4 bars; more gain little without forced air and are held at 4
    Source
        a copper trade association's bus-bar page, 60 Hz, 30 K (read); cautious for direct current
    Example
        >>> group_factor(2)
        1.64
    """
    return GROUP[min(bars, len(GROUP)) - 1]
