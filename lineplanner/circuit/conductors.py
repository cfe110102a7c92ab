"""Bars and splines: resistance at temperature, and the current that drop or heat allows."""

import math

from lineplanner.quantities import (
    ICE_POINT,
    Area,
    Current,
    CurrentDensity,
    HeatTransfer,
    Length,
    PerKelvin,
    Resistance,
    Resistivity,
    Temperature,
    TemperatureDifference,
)
from lineplanner.sources import Constant, Source, Status

BASE = Constant(
    "base temperature of the conductors table",
    ICE_POINT.value + 20.0,
    "K",
    Source("IEC 60028, standard annealed copper, by a summary of the standard", Status.PUBLISHED),
)


def resistivity_at(
    *, resistivity: Resistivity, coefficient: PerKelvin, temperature: Temperature
) -> Resistivity:
    """Resistivity of a conductor at its own temperature.

        rho(T) = rho20 (1 + alpha (T - T20))

    Parameters
        resistivity: rho20, at 20 degC [ohm m]
        coefficient: alpha, of the value at 20 degC [1/K]
        temperature: T, of the metal, not of the air [K]
    Returns
        rho(T) [ohm m]
    Valid
        metals near room temperature, roughly 0 to 150 degC
    Source
        IEC 60028, linear law of standard annealed copper
    Example
        Copper at 65 degC against 20 degC:

        >>> warm = resistivity_at(resistivity=1 / 58e6, coefficient=0.00393, temperature=338.15)
        >>> round(warm * 58e6, 3)
        1.177
    """
    return resistivity * (1.0 + coefficient * (temperature - BASE.value))


def bar_resistance(*, resistivity: Resistivity, length: Length, section: Area) -> Resistance:
    """Resistance of a straight bar from end to end.

        R = rho L / A

    Parameters
        resistivity: rho, at working temperature [ohm m]
        length: L, along the current [m]
        section: A, across the current, bars side by side added [m^2]
    Returns
        R [ohm]
    Valid
        direct current, uniform section; a bar of no length has no resistance
    Source
        Ohm's law
    Example
        Titanium spline 6 x 25 mm, 1.2 m, in milliohm:

        >>> round(bar_resistance(resistivity=0.56e-6, length=1.2, section=150e-6) * 1e3, 2)
        4.48
    """
    return resistivity * length / section


def bar_section(*, width: Length | None, thickness: Length | None, diameter: Length | None) -> Area:
    """Section of a flat bar or of a round.

        A = w t, or pi d^2 / 4

    Parameters
        width: w, of a flat bar; None for a round [m]
        thickness: t, of a flat bar; None for a round [m]
        diameter: d, of a round; None for a flat bar [m]
    Returns
        A [m^2]
    Valid
        solid bars with square corners
    Source
        geometry
    Example
        >>> round(bar_section(width=0.025, thickness=0.006, diameter=None) * 1e6, 6)
        150.0
    """
    if diameter is not None:
        return 0.25 * math.pi * diameter * diameter
    return (width or 0.0) * (thickness or 0.0)  # the rack's rules ask for both


def bar_perimeter(*, width: Length | None, thickness: Length | None, diameter: Length | None) -> Length:
    """Girth of a flat bar or of a round: what gives off heat for each metre.

        P = 2 (w + t), or pi d

    Parameters
        width: w, of a flat bar; None for a round [m]
        thickness: t, of a flat bar; None for a round [m]
        diameter: d, of a round; None for a flat bar [m]
    Returns
        P [m]
    Valid
        solid bars, free on all sides
    Source
        geometry
    Example
        >>> round(bar_perimeter(width=0.025, thickness=0.006, diameter=None) * 1e3, 6)
        62.0
    """
    if diameter is not None:
        return math.pi * diameter
    return 2.0 * ((width or 0.0) + (thickness or 0.0))  # the rack's rules ask for both


def drop_tier_current(section: Area, tier: CurrentDensity) -> Current:
    """Current at which a bar loses the volts per length that copper loses at 1000 A/in2.

        I = J A

    Parameters
        section: A [m^2]
        tier: J, of the alloy in use [A/m^2]
    Returns
        I [A]
    Valid
        a rule on volts; it says nothing about heat
    Source
        surface-finishing guidebook 2011-12, plating racks, table II (read)
    Example
        Titanium round of 1/2 in at 31 A/in2:

        >>> round(drop_tier_current(126.68e-6, 31 / 645.16e-6), 1)
        6.1
    """
    return tier * section


def thermal_current(
    *,
    section: Area,
    perimeter: Length,
    resistivity: Resistivity,
    coefficient: PerKelvin,
    rise: TemperatureDifference,
    surroundings: Temperature,
    transfer: HeatTransfer,
) -> Current:
    """Current that warms a rack bar by a given rise, in air or in the bath.

        I = sqrt(h P A theta / rho(T0 + theta))

    Parameters
        section: A [m^2]
        perimeter: P, girth that gives off heat [m]
        resistivity: rho20, at 20 degC [ohm m]
        coefficient: alpha [1/K]
        rise: theta, of the bar over its surroundings [K]
        surroundings: T0, of the air or the bath [K]
        transfer: h, radiation included [W/(m^2 K)]
    Returns
        I [A]
    Valid
        long bars without heat flow to their ends
    Source
        heat balance of a bar for each metre of length
    Example
        Titanium spline 6 x 25 mm in air of 40 degC:

        >>> round(thermal_current(section=150e-6, perimeter=0.062, resistivity=0.56e-6,
        ...     coefficient=0.0036, rise=30.0, surroundings=313.15, transfer=12.0), 1)
        71.2
    """
    warm = resistivity_at(resistivity=resistivity, coefficient=coefficient, temperature=surroundings + rise)
    return math.sqrt(transfer * perimeter * section * rise / warm)


def bar_rise(
    *,
    current: Current,
    section: Area,
    perimeter: Length,
    resistivity: Resistivity,
    coefficient: PerKelvin,
    surroundings: Temperature,
    transfer: HeatTransfer,
) -> TemperatureDifference:
    """How much a rack bar warms over its surroundings at a current, its own warming included.

        theta = q (1 + alpha (T0 - T20)) / (1 - q alpha), q = I^2 rho20 / (A P h)

    Parameters
        current: I [A]
        section: A [m^2]
        perimeter: P [m]
        resistivity: rho20, at 20 degC [ohm m]
        coefficient: alpha [1/K]
        surroundings: T0 [K]
        transfer: h, radiation included [W/(m^2 K)]
    Returns
        theta; infinite where heat grows faster than it leaves [K]
    Valid
        long bars without heat flow to their ends
    Source
        heat balance of a bar for each metre of length, solved for the rise
    Example
        Titanium spline 6 x 25 mm at 100 A in air of 25 degC:

        >>> round(bar_rise(current=100.0, section=150e-6, perimeter=0.062, resistivity=0.56e-6,
        ...     coefficient=0.0036, surroundings=298.15, transfer=12.0))
        62
    """
    q = current * current * resistivity / (section * perimeter * transfer)
    runaway = q * coefficient >= 1.0
    base = 1.0 + coefficient * (surroundings - BASE.value)
    return float("inf") if runaway else q * base / (1.0 - q * coefficient)
