"""The trade's units: what a kind is shown in, metric and US, with how many digits, and what to type."""

from math import inf
from typing import Literal, NamedTuple

from lineplanner.quantities import (
    ANGLE,
    AREA,
    CHARGE,
    CHARGE_DENSITY,
    CONCENTRATION,
    CONDUCTIVITY,
    COUNT,
    CURRENT,
    CURRENT_DENSITY,
    DENSITY,
    EQUIVALENT,
    FILM_GRADIENT,
    FLOW,
    FORCE,
    GROWTH,
    HEAT_TRANSFER,
    LENGTH,
    MASS,
    MOLAR_MASS,
    PER_KELVIN,
    POWER,
    PRESSURE,
    RATE,
    RATIO,
    RESISTANCE,
    RESISTIVITY,
    SPECIFIC_HEAT,
    SPEED,
    STRESS,
    SURFACE_MASS,
    SURFACE_TENSION,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    THICKNESS,
    TIME,
    VOLTAGE,
    VOLTAGE_RATE,
    VOLUME,
    Kind,
)

System = Literal["metric", "us"]


class Row(NamedTuple):
    """One kind: display unit and example of each system, and more units that are accepted."""

    metric: str
    us: str
    metric_example: str
    us_example: str
    also: tuple[str, ...] = ()


TRADE: dict[Kind, Row] = {
    LENGTH: Row("mm", "in", "120 mm", "4.75 in", ("cm", "dm", "m", "ft", "um", "mil")),
    THICKNESS: Row("um", "mil", "50 um", "2 mil", ("micron", "mm", "in", "thou", "nm")),
    AREA: Row("dm2", "ft2", "85 dm2", "9 ft2", ("cm2", "mm2", "m2", "in2")),
    VOLUME: Row("L", "gal", "4000 L", "1000 gal", ("m3", "mL", "ft3", "in3")),
    ANGLE: Row("deg", "deg", "30 deg", "30 deg", ("rad",)),
    TIME: Row("min", "min", "80 min", "80 min", ("s", "h", "day")),
    MASS: Row("g", "lb", "250 g", "0.5 lb", ("mg", "kg", "oz", "tonne")),
    CURRENT: Row("A", "A", "3000 A", "3000 A", ("kA", "mA")),
    CURRENT_DENSITY: Row(
        "A/dm2", "A/ft2", "2.5 A/dm2", "24 A/ft2", ("ASD", "ASF", "ASI", "A/in2", "mA/cm2", "A/m2")
    ),
    CHARGE: Row("Ah", "Ah", "650 Ah", "650 Ah", ("A min", "A s", "kAh", "coulomb")),
    CHARGE_DENSITY: Row(
        "Ah/dm2", "Ah/ft2", "2.2 Ah/dm2", "20 Ah/ft2", ("A min/ft2", "A min/dm2", "coulomb/m2")
    ),
    VOLTAGE: Row("V", "V", "18 V", "18 V", ("mV", "kV")),
    VOLTAGE_RATE: Row("V/min", "V/min", "5 V/min", "5 V/min", ("V/s",)),
    FILM_GRADIENT: Row("V/um", "V/mil", "0.5 V/um", "13 V/mil", ("V/mm", "V/m")),
    RESISTANCE: Row("mohm", "mohm", "0.2 mohm", "0.2 mohm", ("uohm", "ohm")),
    RESISTIVITY: Row("uohm cm", "uohm in", "1.72 uohm cm", "0.68 uohm in", ("nohm m", "uohm m", "ohm m")),
    CONDUCTIVITY: Row("S/m", "S/m", "60 S/m", "60 S/m", ("S/cm", "mS/cm", "MS/m")),
    TEMPERATURE: Row("degC", "degF", "20 degC", "68 degF", ("K",)),
    TEMPERATURE_DIFFERENCE: Row("K", "delta_degF", "5 K", "9 delta_degF", ("delta_degC",)),
    PER_KELVIN: Row("%/K", "%/K", "0.4 %/K", "0.4 %/K", ("1/K", "1/degC", "1/degF")),
    CONCENTRATION: Row("g/L", "oz/gal", "180 g/L", "24 oz/gal", ("mg/L", "kg/m3", "lb/gal")),
    DENSITY: Row("g/cm3", "g/cm3", "2.7 g/cm3", "2.7 g/cm3", ("kg/m3", "kg/L", "lb/in3", "lb/ft3", "lb/gal")),
    MOLAR_MASS: Row("g/mol", "g/mol", "26.98 g/mol", "26.98 g/mol", ("kg/mol",)),
    SURFACE_MASS: Row("g/m2", "mg/ft2", "12 g/m2", "1100 mg/ft2", ("mg/dm2", "mg/cm2", "mg/in2")),
    GROWTH: Row(
        "um dm2/(A min)",
        "mil ft2/(A min)",
        "0.3 um dm2/(A min)",
        "0.00139 mil ft2/(A min)",
        ("um dm2/Ah", "m3/coulomb"),
    ),
    EQUIVALENT: Row("g/Ah", "g/Ah", "0.323 g/Ah", "0.323 g/Ah", ("g/(A h)", "oz/Ah", "mg/coulomb")),
    RATE: Row("um/h", "mil/h", "25 um/h", "1 mil/h", ("um/min", "nm/s", "mil/min")),
    SPEED: Row("m/s", "ft/min", "0.5 m/s", "100 ft/min", ("m/min", "fpm", "ft/s")),
    FLOW: Row("m3/h", "cfm", "3400 m3/h", "2000 cfm", ("L/s", "L/min", "m3/s", "ft3/min", "gpm")),
    POWER: Row("kW", "kW", "35 kW", "35 kW", ("W", "TR", "BTU/h")),
    FORCE: Row("N", "lbf", "40 N", "9 lbf", ("kN",)),
    STRESS: Row("MPa", "ksi", "1240 MPa", "180 ksi", ("N/mm2", "GPa", "psi")),
    PRESSURE: Row("kPa", "psi", "101 kPa", "14.7 psi", ("Pa", "mbar", "bar")),
    SURFACE_TENSION: Row("mN/m", "dyn/cm", "40 mN/m", "40 dyn/cm", ("N/m",)),
    HEAT_TRANSFER: Row(
        "W/(m2 K)", "BTU/(h ft2 degF)", "500 W/(m2 K)", "88 BTU/(h ft2 degF)", ("W/(m2 degC)", "kW/(m2 K)")
    ),
    SPECIFIC_HEAT: Row(
        "kJ/(kg K)", "BTU/(lb degF)", "3.7 kJ/(kg K)", "0.88 BTU/(lb degF)", ("J/(kg K)", "J/(g K)")
    ),
    RATIO: Row("%", "%", "0.5", "0.5", ("1",)),
    COUNT: Row("1", "1", "24", "24"),
}

# The unit below or above which another one reads better: main unit -> (unit, from, below), SI magnitudes.
LADDERS: dict[str, tuple[tuple[str, float, float], ...]] = {
    "mm": (("m", 10.0, inf),),
    "in": (("ft", 6.096, inf),),
    "min": (("s", 1e-3, 120.0),),
    "V": (("mV", 1e-6, 1.0),),
    "kW": (("W", 1e-3, 1000.0),),
    "g": (("kg", 1.0, inf),),
    "lb": (("oz", 1e-6, 0.45359237),),
    "mohm": (("uohm", 0.0, 1e-3), ("ohm", 1.0, inf)),
}

# Digits: a step of the unit where the trade reads one, else three significant.
STEPS = {"V": "0.1", "min": "0.5", "degC": "0.1", "degF": "0.1", "K": "0.1", "delta_degF": "0.1", "%": "1"}
TRAILING_ZEROS = frozenset({"V"})  # 18.0 V: the digit says how fine the meter reads
SIGNIFICANT = 3
# Here digits beyond the third are not printed even before the point; elsewhere whole numbers stay whole.
THREE_DIGITS_ONLY = frozenset({THICKNESS, AREA})


def example(kind: Kind, system: System | None = None) -> str:
    """An amount to type for a kind. Current density is quoted per square foot unless a system is asked for.

    >>> example(THICKNESS), example(THICKNESS, "us")
    ('50 um', '2 mil')
    """
    if system is None:
        system = "us" if kind == CURRENT_DENSITY else "metric"
    row = TRADE[kind]
    return row.metric_example if system == "metric" else row.us_example


def main_unit(kind: Kind, system: System) -> str:
    """The display unit of a kind; `1` stands for a plain number."""
    return TRADE[kind].metric if system == "metric" else TRADE[kind].us


def fitting_unit(kind: Kind, system: System, value: float) -> str:
    """The display unit of a kind for an SI value: seconds for a short time, millivolts for a joint."""
    main = main_unit(kind, system)
    for unit, low, high in LADDERS.get(main, ()):
        if value and low <= abs(value) < high:
            return unit
    return main


def units_of(kind: Kind) -> tuple[str, ...]:
    """The usual units of a kind, those shown first; more spellings are read.

    >>> units_of(CURRENT)
    ('A', 'kA', 'mA')
    """
    row = TRADE[kind]
    return tuple(dict.fromkeys((row.metric, row.us, *row.also)))
