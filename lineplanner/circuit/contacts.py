"""Contacts: constriction resistance, contact heat, and how many contacts a current needs."""

import math

from lineplanner.quantities import (
    BOLTZMANN,
    ELEMENTARY_CHARGE,
    Current,
    Force,
    Length,
    Ratio,
    Resistance,
    Resistivity,
    Stress,
    Temperature,
    Voltage,
)
from lineplanner.sources import Constant, Source, Status

LORENZ = Constant(
    "Lorenz number",
    (math.pi * BOLTZMANN.value / ELEMENTARY_CHARGE.value) ** 2 / 3.0,
    "V^2/K^2",
    Source("Sommerfeld's value from the SI defining constants", Status.DERIVED),
)


def spot_radius(force: Force, hardness: Stress) -> Length:
    """Radius of the metal spot that a contact force presses flat.

        a = sqrt(F / (pi H))

    Parameters
        force: F, of one contact [N]
        hardness: H, of the softer metal [Pa]
    Returns
        a [m]
    Valid
        one clean spot, fully plastic; oxide and wear make it smaller
    Source
        R. Holm, Electric Contacts (from memory); plastic indentation
    Example
        20 N on aluminium, in micrometres:

        >>> round(spot_radius(20.0, 1.05e9) * 1e6, 1)
        77.9
    """
    return math.sqrt(force / (math.pi * hardness))


def contact_resistance(
    *, force: Force, hardness: Stress, first_resistivity: Resistivity, second_resistivity: Resistivity
) -> Resistance:
    """Resistance of one contact where the current is pinched into the metal spot.

        R = (rho1 + rho2) / (4 a), a = sqrt(F / (pi H))

    Parameters
        force: F, of one contact [N]
        hardness: H, of the softer metal [Pa]
        first_resistivity: rho1, of the tip [ohm m]
        second_resistivity: rho2, of the part [ohm m]
    Returns
        R [ohm]
    Valid
        one clean metal spot: a lower bound, real tips with film and wear have two to three times as much
    Source
        R. Holm, Electric Contacts (from memory); spreading resistance of a disc on a half space
    Example
        Titanium tip on 6061 at 20 N, in milliohm:

        >>> round(1e3 * contact_resistance(force=20.0, hardness=1.05e9,
        ...     first_resistivity=0.56e-6, second_resistivity=0.0401e-6), 3)
        1.927
    """
    return (first_resistivity + second_resistivity) / (4.0 * spot_radius(force, hardness))


def contact_temperature(voltage: Voltage, surroundings: Temperature) -> Temperature:
    """Hottest point of a contact from the volts across it.

        T^2 = T0^2 + U^2 / (4 L)

    Parameters
        voltage: U, across the contact [V]
        surroundings: T0, of the metal around it [K]
    Returns
        T [K]
    Valid
        metal to metal, heat leaving only through the metal; not in moving solution
    Source
        Kohlrausch's relation with the Wiedemann-Franz law; R. Holm, Electric Contacts (from memory)
    Example
        Degrees Celsius at a tenth of a volt:

        >>> round(contact_temperature(0.1, 293.15) - 273.15)
        161
    """
    return math.sqrt(surroundings**2 + voltage**2 / (4.0 * LORENZ.value))


def contact_voltage(temperature: Temperature, surroundings: Temperature) -> Voltage:
    """Volts across a contact at which its hottest point reaches a temperature.

        U = sqrt(4 L (T^2 - T0^2))

    Parameters
        temperature: T, of the hottest point, at least the surroundings [K]
        surroundings: T0, of the metal around it [K]
    Returns
        U [V]
    Valid
        as contact_temperature
    Source
        Kohlrausch's relation with the Wiedemann-Franz law; R. Holm, Electric Contacts (from memory)
    Example
        Where aluminium softens, 150 degC:

        >>> round(contact_voltage(423.15, 293.15), 3)
        0.095
    """
    return math.sqrt(4.0 * LORENZ.value * (temperature**2 - surroundings**2))


def contacts_needed(current: Current, each: Current) -> int:
    """Whole contacts that carry a current; never rounded towards fewer.

    >>> contacts_needed(50.0, 20.0)
    3
    """
    return max(1, math.ceil(current / each))


def lost_contact_factor(contacts: int, lost: int) -> Ratio:
    """How much more each remaining contact carries at the same set current.

        n / (n - k)

    Parameters
        contacts: n, contacts that share the current
        lost: k, of them open, fewer than n
    Returns
        current of one contact against before [1]
    Valid
        equal contacts, current control
    Source
        arithmetic
    Example
        3 of 20 lost:

        >>> round(lost_contact_factor(20, 3), 4)
        1.1765
    """
    return contacts / (contacts - lost)
