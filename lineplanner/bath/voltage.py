"""Voltage at the tank: film, drop in the bath, chrome cell."""

import math

from lineplanner.errors import InputError, Quantity
from lineplanner.inputs.tables import CellVoltage, GrowthLaw
from lineplanner.quantities import (
    ICE_POINT,
    TEMPERATURE,
    Conductivity,
    CurrentDensity,
    FilmGradient,
    Length,
    Ratio,
    Temperature,
    Thickness,
    Voltage,
)
from lineplanner.sources import Constant, Source, Status

_FILM = Source("definition of the film voltage law", Status.DERIVED)
_ASF = 1.0 / 0.3048**2  # A/m^2 for each A/ft2, exact
FILM_DENSITY = Constant("current density of the stated film voltage", 12.0 * _ASF, "A/m^2", _FILM)
FILM_TEMPERATURE = Constant("temperature of the stated film voltage", ICE_POINT.value + 20.0, "K", _FILM)
GRADIENT_DENSITY = Constant("current density of the stated film gradient", 36.0 * _ASF, "A/m^2", _FILM)
COLD_BATH = Constant("temperature of the film gradient in a cold bath", ICE_POINT.value, "K", _FILM)

_SPREAD = Source(
    "J. Metal Finishing Society of Japan 23 (10), abstract: cell voltage of chromium baths", Status.PUBLISHED
)
SPREADING_POWER = Constant("power of the gap in open-tank spreading", 1.0 / 3.0, "1", _SPREAD)
SPREADING_GAP = Constant("gap of the stated spreading factor", 0.01, "m", _SPREAD)
CELL_DENSITY = Constant(
    "current density of the stated electrode voltage",
    3100.0,
    "A/m^2",
    Source("definition of the cell voltage law", Status.DERIVED),
)


def film_gradient_in_bath(
    *, temperature: Temperature, film_gradient: FilmGradient, law: GrowthLaw
) -> FilmGradient:
    """How many volts each thickness of film takes at this bath temperature, at 36 A/ft2.

        s(T) = s_cold + (s_warm - s_cold) (T - 0 degC) / 20 K, held outside 0 to 20 degC

    Parameters
        temperature: T, of the bath [K]
        film_gradient: s_cold, of the alloy family, cold bath [V/m]
        law: s_warm of the growth table; never taken above s_cold
    Returns
        s, at 36 A/ft2 [V/m]
    Valid
        sulfuric baths; between the two stated temperatures a straight line
    Source
        model of this program (assumption)
    Example
        >>> from types import SimpleNamespace as N
        >>> law = N(warm_gradient=N(value=0.15e6))
        >>> round(film_gradient_in_bath(temperature=283.15, film_gradient=0.40e6, law=law) / 1e6, 3)
        0.275
    """
    share = (temperature - COLD_BATH.value) / (FILM_TEMPERATURE.value - COLD_BATH.value)
    warm = min(law.warm_gradient.value, film_gradient)
    return film_gradient + (warm - film_gradient) * min(1.0, max(0.0, share))


def film_voltage(
    *,
    current_density: CurrentDensity,
    thickness: Thickness,
    temperature: Temperature,
    voltage_factor: Ratio,
    film_gradient: FilmGradient,
    law: GrowthLaw,
) -> Voltage:
    """What volts the growing film takes; the bath and the bus come on top.

        V = a V12 (j / 12 A/ft2)^n (1 + b (20 degC - T)) + s(T) (j / 36 A/ft2) h

    Parameters
        current_density: j, per carrying area; 0 or less takes no volts [A/m^2]
        thickness: h, total, per side [m]
        temperature: T, of the bath [K]
        voltage_factor: a, of the alloy family [1]
        film_gradient: s, of the alloy family at 36 A/ft2 in a cold bath [V/m]
        law: V12, n, b and the warm gradient of the growth table
    Returns
        V, across the film and its interface [V]
    Raises
        InputError film-voltage.temperature where the law gives no volts at all (far above any sulfuric bath)
    Valid
        sulfuric baths of 150 to 240 g/L, -5 to 25 degC, 3 to 40 A/ft2; not for films run by voltage
    Source
        model of this program (assumption); to be fitted to the shop's own voltage log
    Example
        >>> from types import SimpleNamespace as N
        >>> law = N(film_voltage=N(value=13.0), voltage_power=N(value=0.4),
        ...         voltage_cooling=N(value=0.02), warm_gradient=N(value=0.15e6))
        >>> volts = film_voltage(current_density=36 / 0.3048**2, thickness=0.0, temperature=273.15,
        ...                      voltage_factor=1.0, film_gradient=0.4e6, law=law)
        >>> round(volts, 2)
        28.24
    """
    if current_density <= 0.0:
        return 0.0
    cold = 1.0 + law.voltage_cooling.value * (FILM_TEMPERATURE.value - temperature)
    if cold <= 0.0:
        raise InputError("film-voltage.temperature", temperature=Quantity(temperature, TEMPERATURE))
    start = law.film_voltage.value * (current_density / FILM_DENSITY.value) ** law.voltage_power.value * cold
    slope = film_gradient_in_bath(temperature=temperature, film_gradient=film_gradient, law=law)
    return float(voltage_factor * start + slope * current_density / GRADIENT_DENSITY.value * thickness)


def bath_drop(*, current_density: CurrentDensity, gap: Length, conductivity: Conductivity) -> Voltage:
    """What volts the solution takes between parallel faces.

        V = j d / kappa

    Parameters
        current_density: j, per facing area [A/m^2]
        gap: d, from work to counter-electrode [m]
        conductivity: kappa, of the bath [S/m]
    Returns
        V [V]
    Valid
        fully confined current: in an open tank this is the most it can be
    Source
        Ohm's law
    Example
        12 A/ft2 over 20 cm of 15 % sulfuric acid at 20 degC:

        >>> round(bath_drop(current_density=12 / 0.3048**2, gap=0.20, conductivity=55.8), 3)
        0.463
    """
    return current_density * gap / conductivity


def electrode_voltage(*, current_density: CurrentDensity, cell: CellVoltage) -> Voltage:
    """What volts the electrodes of a chrome cell take before any drop in the bath.

        U = U0 + b log10(i / 31 A/dm2), not below 0

    Parameters
        current_density: i, per carrying area; 0 or less takes no volts [A/m^2]
        cell: U0 and b of the cell voltage table
    Returns
        U [V]
    Valid
        about 2 to 100 A/dm2 with anodes under a working film
    Source
        model of this program (assumption)
    Example
        >>> from types import SimpleNamespace as N
        >>> cell = N(base=N(value=2.9), per_decade=N(value=0.3))
        >>> round(electrode_voltage(current_density=3100.0, cell=cell), 2)
        2.9
    """
    if current_density <= 0.0:
        return 0.0
    return max(
        0.0, cell.base.value + cell.per_decade.value * math.log10(current_density / CELL_DENSITY.value)
    )


def chrome_cell_voltage(
    *, current_density: CurrentDensity, gap: Length, conductivity: Conductivity, cell: CellVoltage
) -> Voltage:
    """What volts a chrome cell takes where the current spreads in an open tank.

        V = U0 + b log10(i / 31 A/dm2) + i d / (kappa s),  s = s1 (d / 1 cm)^(1/3), at least 1

    Parameters
        current_density: i, per carrying area of the work [A/m^2]
        gap: d, from work to anode [m]
        conductivity: kappa, of the bath [S/m]
        cell: U0, b and s1 of the cell voltage table
    Returns
        V, at the tank, without bus, rack and contacts [V]
    Valid
        work small against the anodes; spreading was measured in beakers: large tanks are an extrapolation
    Source
        electrodes: model of this program (assumption); spreading: J. Metal Finishing Society of
        Japan 23 (10), abstract; the rest is Ohm's law
    Example
        31 A/dm2 at 15 cm in 250 g/L at 55 degC:

        >>> from types import SimpleNamespace as N
        >>> cell = N(base=N(value=2.9), per_decade=N(value=0.3), spreading=N(value=2.4))
        >>> round(chrome_cell_voltage(current_density=3100.0, gap=0.15, conductivity=56.0, cell=cell), 1)
        4.3
    """
    confined = bath_drop(current_density=current_density, gap=gap, conductivity=conductivity)
    spread = max(1.0, cell.spreading.value * (gap / SPREADING_GAP.value) ** SPREADING_POWER.value)
    return float(electrode_voltage(current_density=current_density, cell=cell) + confined / spread)


def chrome_coaxial_voltage(
    *,
    current_density: CurrentDensity,
    work_radius: Length,
    anode_radius: Length,
    conductivity: Conductivity,
    cell: CellVoltage,
) -> Voltage:
    """What volts a chrome cell takes with work and anode on one axis: a rod in a ring, an anode in a bore.

        V = U0 + b log10(i / 31 A/dm2) + i r |ln(R / r)| / kappa

    Parameters
        current_density: i, on the work [A/m^2]
        work_radius: r, of the plated rod or bore [m]
        anode_radius: R, of the anode's facing side [m]
        conductivity: kappa, of the bath [S/m]
        cell: U0 and b of the cell voltage table
    Returns
        V, at the cell, without bus, rack, contacts and drop along the anode [V]
    Valid
        long against the gap, on centre
    Source
        electrodes: model of this program (assumption); bath: Ohm's law between cylinders
    Example
        31 A/dm2 on a 100 mm bore with a 50 mm anode in 250 g/L at 55 degC:

        >>> from types import SimpleNamespace as N
        >>> cell = N(base=N(value=2.9), per_decade=N(value=0.3))
        >>> volts = chrome_coaxial_voltage(current_density=3100.0, work_radius=0.05, anode_radius=0.025,
        ...                                conductivity=56.0, cell=cell)
        >>> round(volts - 2.9, 2)
        1.92
    """
    ohmic = current_density * work_radius * abs(math.log(anode_radius / work_radius)) / conductivity
    return electrode_voltage(current_density=current_density, cell=cell) + ohmic
