"""Current efficiency of hard chrome: onset, efficiency, rate, consumption, bright window."""

import math

from lineplanner.bath.faraday import CHROMIC_ACID, CHROMIUM_DEPOSIT
from lineplanner.inputs.tables import ChromeFamily
from lineplanner.quantities import (
    FARADAY,
    ICE_POINT,
    Charge,
    Concentration,
    CurrentDensity,
    Density,
    Mass,
    Rate,
    Ratio,
    Temperature,
    Thickness,
    Time,
)
from lineplanner.sources import Constant, Source, Status

_REFERENCE = Source("reference point of the efficiency model", Status.DERIVED)
REFERENCE_DENSITY = Constant("reference current density", 3100.0, "A/m^2", _REFERENCE)
REFERENCE_TEMPERATURE = Constant("reference temperature", ICE_POINT.value + 55.0, "K", _REFERENCE)
REFERENCE_ACID = Constant("reference chromic acid", 250.0, "kg/m^3", _REFERENCE)

_ACID_RANGE = Source(
    "Modern Electroplating, chromium chapter (in translation): efficiency against chromic acid at 55 degC",
    Status.PUBLISHED,
)
LOWEST_ACID = Constant("least chromic acid of the model", 75.0, "kg/m^3", _ACID_RANGE)
HIGHEST_ACID = Constant("most chromic acid of the model", 400.0, "kg/m^3", _ACID_RANGE)

_BRIGHT = Source(
    "Modern Electroplating, chromium chapter (in translation): bright range at 40 and 45 degC, 250 g/L",
    Status.PUBLISHED,
)
BRIGHT_LOW = Constant("bright from, 40 degC", 310.0, "A/m^2", _BRIGHT)
BRIGHT_HIGH = Constant("bright to, 40 degC", 1550.0, "A/m^2", _BRIGHT)
BRIGHT_TEMPERATURE = Constant("temperature of the bright range", ICE_POINT.value + 40.0, "K", _BRIGHT)
BRIGHT_RISE = Constant("rise of the bright range over 5 K", 1.5, "1", _BRIGHT)
BRIGHT_STEP = Constant("step of that rise", 5.0, "K", _BRIGHT)
_EQUIVALENT = CHROMIUM_DEPOSIT.equivalent


def deposition_threshold(temperature: Temperature, family: ChromeFamily) -> CurrentDensity:
    """Below what current density only hydrogen comes, no chromium.

        i0 = i55 exp(b (T - 55 degC))

    Parameters
        temperature: T, of the bath [K]
        family: i55 and b of the bath family
    Returns
        i0, onset of deposition [A/m^2]
    Valid
        45 to 65 degC; a fitted model, not a printed curve
    Source
        model of this program (assumption); the constants come from the table of bath families
    Example
        >>> from types import SimpleNamespace as N
        >>> bath = N(threshold=N(value=400.0), threshold_rise=N(value=0.06))
        >>> round(deposition_threshold(273.15 + 60, bath) / 100, 2)
        5.4
    """
    return float(
        family.threshold.value
        * math.exp(family.threshold_rise.value * (temperature - REFERENCE_TEMPERATURE.value))
    )


def _rise(current_density: float, threshold: float, power: float) -> float:
    """How far deposition has come up from its onset: 0 at the onset, towards 1 far above it."""
    return 1.0 - (threshold / current_density) ** power if current_density > threshold else 0.0


def _uncapped(
    current_density: CurrentDensity,
    temperature: Temperature,
    chromic_acid: Concentration,
    family: ChromeFamily,
) -> Ratio:
    power = family.onset_power.value
    here = _rise(current_density, deposition_threshold(temperature, family), power)
    reference = _rise(REFERENCE_DENSITY.value, family.threshold.value, power)
    acid = max(0.0, 1.0 - family.acid_slope.value * (chromic_acid - REFERENCE_ACID.value))
    return family.reference_efficiency.value * here / reference * acid


def current_efficiency(
    *,
    current_density: CurrentDensity,
    temperature: Temperature,
    chromic_acid: Concentration,
    family: ChromeFamily,
    calibration: Ratio,
) -> Ratio:
    """What share of the current makes chromium; the rest makes hydrogen.

        eta = k min(cap, eta0 g(i, T) / g(i0, T0) (1 - a (c - c0)))
        g = 1 - (i_onset / i)^p, 0 below the onset

    Parameters
        current_density: i, per carrying area [A/m^2]
        temperature: T, of the bath [K]
        chromic_acid: c, in the bath [kg/m^3]
        family: eta0, cap, onset, a and p of the bath family
        calibration: k, measured over predicted thickness of the last coupon; 1 without one; acts
            after the cap [1]
    Returns
        eta, current efficiency [1]
    Valid
        the range of the family and 75 to 400 g/L; see outside_range. Elsewhere the model is extrapolated
    Source
        model of this program (assumption), fitted to Modern Electroplating, chromium chapter; the constants
        come from the table of bath families
    Example
        >>> from types import SimpleNamespace as N
        >>> bath = N(reference_efficiency=N(value=0.14), cap=N(value=0.20), threshold=N(value=400.0),
        ...          threshold_rise=N(value=0.06), onset_power=N(value=1 / 3), acid_slope=N(value=0.00147))
        >>> eta = current_efficiency(current_density=4650.0, temperature=328.15, chromic_acid=250.0,
        ...                          family=bath, calibration=1.0)
        >>> round(eta * 100, 1)
        15.8
    """
    return calibration * min(family.cap.value, _uncapped(current_density, temperature, chromic_acid, family))


def at_cap(
    *,
    current_density: CurrentDensity,
    temperature: Temperature,
    chromic_acid: Concentration,
    family: ChromeFamily,
) -> bool:
    """Whether the ceiling of the family holds: the efficiency no longer rises with current density."""
    return _uncapped(current_density, temperature, chromic_acid, family) >= family.cap.value


def thickness_exponent(
    *,
    current_density: CurrentDensity,
    temperature: Temperature,
    chromic_acid: Concentration,
    family: ChromeFamily,
) -> Ratio:
    """How much stronger thickness varies over a part than current density does.

        n = 1 + d ln eta / d ln i = 1 + p x / (1 - x)        x = (i_onset / i)^p

    Parameters
        current_density: i, per carrying area [A/m^2]
        temperature: T, of the bath [K]
        chromic_acid: c, in the bath [kg/m^3]
        family: onset and p of the bath family
    Returns
        n, thickness ratio = (current ratio)^n for small differences; 1 at the cap, infinite at the onset [1]
    Valid
        as the efficiency model
    Source
        logarithmic derivative of the efficiency model
    Example
        >>> from types import SimpleNamespace as N
        >>> bath = N(reference_efficiency=N(value=0.14), cap=N(value=0.20), threshold=N(value=400.0),
        ...          threshold_rise=N(value=0.06), onset_power=N(value=1 / 3), acid_slope=N(value=0.00147))
        >>> n = thickness_exponent(
        ...     current_density=3100.0, temperature=328.15, chromic_acid=250.0, family=bath)
        >>> round(n, 2)
        1.34
    """
    onset, power = deposition_threshold(temperature, family), family.onset_power.value
    if current_density <= onset:
        return math.inf
    if at_cap(
        current_density=current_density, temperature=temperature, chromic_acid=chromic_acid, family=family
    ):
        return 1.0
    x = (onset / current_density) ** power
    return float(1.0 + power * x / (1.0 - x))


def outside_range(
    *,
    current_density: CurrentDensity,
    temperature: Temperature,
    chromic_acid: Concentration,
    family: ChromeFamily,
) -> tuple[str, ...]:
    """Which conditions lie outside the range of the family: current_density, temperature, chromic_acid."""
    checks = (
        ("current_density", current_density, family.lowest_density.value, family.highest_density.value),
        ("temperature", temperature, family.lowest_temperature.value, family.highest_temperature.value),
        ("chromic_acid", chromic_acid, LOWEST_ACID.value, HIGHEST_ACID.value),
    )
    return tuple(name for name, value, low, high in checks if not low <= value <= high)


def deposit_rate(*, current_density: CurrentDensity, efficiency: Ratio, deposit_density: Density) -> Rate:
    """How fast chromium thickens.

        r = eta E i / rho        E = M(Cr) / (6 F)

    Parameters
        current_density: i, per carrying area [A/m^2]
        efficiency: eta, current efficiency [1]
        deposit_density: rho, of the deposit [kg/m^3]
    Returns
        r, per side [m/s]
    Valid
        six electrons for each chromium atom
    Source
        Faraday's law of electrolysis
    Example
        20 A/dm2 at 13 % and 7.0 g/cm3, minutes for 10 um:

        >>> r = deposit_rate(current_density=2000.0, efficiency=0.13, deposit_density=7000.0)
        >>> round(10e-6 / r / 60, 1)
        50.0
    """
    return efficiency * _EQUIVALENT * current_density / deposit_density


def chromic_acid_consumption(*, charge: Charge, efficiency: Ratio) -> Mass:
    """How much chromium trioxide the deposit takes from the bath; drag-out and mist come on top.

        m = eta M(CrO3) Q / (6 F)

    Parameters
        charge: Q, through the work [C]
        efficiency: eta, current efficiency [1]
    Returns
        m, chromium trioxide [kg]
    Valid
        insoluble anodes
    Source
        Faraday's law of electrolysis
    Example
        1000 ampere-hours at 15 %, in grams:

        >>> round(chromic_acid_consumption(charge=3.6e6, efficiency=0.15) * 1000, 1)
        93.3
    """
    return efficiency * CHROMIC_ACID.value * charge / (CHROMIUM_DEPOSIT.electrons * FARADAY.value)


def _bright(at_40: Constant, temperature: Temperature) -> CurrentDensity:
    steps = (temperature - BRIGHT_TEMPERATURE.value) / BRIGHT_STEP.value
    return float(at_40.value * BRIGHT_RISE.value**steps)


def bright_window_low(temperature: Temperature) -> CurrentDensity:
    """From what current density chromium comes bright; below it is milky and softer.

        i = 3.1 A/dm2 x 1.5^((T - 40 degC) / 5 K)

    Parameters
        temperature: T, of the bath [K]
    Returns
        i, lower end of the bright range [A/m^2]
    Valid
        printed for 40 and 45 degC; extrapolated above: fair to 55 degC, weak beyond. Warns, never stops
    Source
        Modern Electroplating, chromium chapter (in translation), 250 g/L with 2.5 g/L sulfate
    Example
        >>> round(bright_window_low(273.15 + 55) / 100, 1)
        10.5
    """
    return _bright(BRIGHT_LOW, temperature)


def bright_window_high(temperature: Temperature) -> CurrentDensity:
    """To what current density chromium comes bright; above it is grey, nodular, burnt at edges.

        i = 15.5 A/dm2 x 1.5^((T - 40 degC) / 5 K)

    Parameters
        temperature: T, of the bath [K]
    Returns
        i, upper end of the bright range [A/m^2]
    Valid
        printed for 40 and 45 degC; extrapolated above: fair to 55 degC, weak beyond. Warns, never stops
    Source
        Modern Electroplating, chromium chapter (in translation), 250 g/L with 2.5 g/L sulfate
    Example
        >>> round(bright_window_high(273.15 + 55) / 100, 1)
        52.3
    """
    return _bright(BRIGHT_HIGH, temperature)


def anodic_loss(*, current_density: CurrentDensity, time: Time, deposit_density: Density) -> Thickness:
    """How much chromium a reverse current takes off.

        d = E i t / rho        E = M(Cr) / (6 F)

    Parameters
        current_density: i, on the chromium [A/m^2]
        time: t, reversed [s]
        deposit_density: rho, of the deposit [kg/m^3]
    Returns
        d, per side [m]
    Valid
        chromium dissolves as chromate with all of the current: the most it can lose
    Source
        Faraday's law of electrolysis, six electrons
    Example
        Half a minute at 31 A/dm2, in um:

        >>> round(anodic_loss(current_density=3100.0, time=30, deposit_density=7100.0) * 1e6, 2)
        1.18
    """
    return _EQUIVALENT * current_density * time / deposit_density
