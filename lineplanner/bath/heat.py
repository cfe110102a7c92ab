"""Heat in the bath: reaction voltages, heat of anodizing and chrome, soak of a cold part."""

from lineplanner.quantities import (
    FARADAY,
    Area,
    Current,
    HeatTransfer,
    Mass,
    Power,
    Ratio,
    SpecificHeat,
    Time,
    Voltage,
)
from lineplanner.sources import Constant, Source, Status

_CODATA = "CODATA key values for thermodynamics, 1989"
_AQUEOUS = "LLNL thermodynamic data base for aqueous species"


def _formation(species: str, value: float, source: str) -> Constant:
    return Constant(f"enthalpy of formation of {species}", value, "J/mol", Source(source, Status.PUBLISHED))


FORMATION_ALUMINA = _formation("corundum", -1675.7e3, f"{_CODATA}, read in open tables that carry it")
FORMATION_WATER = _formation(
    "liquid water", -285.83e3, "NIST-JANAF value carried by the chemicals package 1.5"
)
FORMATION_ALUMINIUM_ION = _formation(
    "dissolved aluminium", -538.4e3, f"{_CODATA}; the same in the {_AQUEOUS}"
)
FORMATION_DICHROMATE = _formation("dichromate in water", -356.2 * 4184.0, f"{_AQUEOUS}: -356.2 kcal/mol")


def _voltage(name: str, enthalpy: float, electrons: float, reaction: str) -> Constant:
    return Constant(name, enthalpy / (electrons * FARADAY.value), "V", Source(reaction, Status.DERIVED))


REACTION_VOLTAGE = _voltage(
    "reaction heat of anodizing, per charge",
    3.0 * FORMATION_WATER.value - FORMATION_ALUMINA.value,
    6.0,
    "2 Al + 3 H2O -> Al2O3 + 3 H2, enthalpies of formation at 25 degC",
)
DISSOLUTION_VOLTAGE = _voltage(
    "reaction heat of aluminium that dissolves, per charge",
    -2.0 * FORMATION_ALUMINIUM_ION.value,
    6.0,
    "2 Al + 6 H+ -> 2 Al3+ + 3 H2, enthalpies of formation at 25 degC",
)
WATER_VOLTAGE = _voltage(
    "thermoneutral voltage of water splitting",
    -FORMATION_WATER.value,
    2.0,
    "H2O -> H2 + O2/2, enthalpy of formation at 25 degC",
)
DICHROMATE_VOLTAGE = _voltage(
    "thermoneutral voltage of chromium from dichromate",
    FORMATION_WATER.value - FORMATION_DICHROMATE.value,
    12.0,
    "Cr2O7-- + 2 H+ -> 2 Cr + H2O + 3 O2, enthalpies of formation at 25 degC",
)
SOAK_CONSTANTS = Constant(
    "time constants of a soak",
    3.0,
    "1",
    Source("first-order warming: 3 time constants reach 95 %", Status.DERIVED),
)


def bath_heat_anodizing(*, current: Current, voltage: Voltage) -> Power:
    """How much heat anodizing puts into the bath.

        P = I (V + E)        E = 1.413 V

    Parameters
        current: I, of the load [A]
        voltage: V, at the tank, not at the rectifier [V]
    Returns
        P, heat into the bath [W]
    Valid
        oxide kept as corundum, hydrogen at the cathode. Aluminium that dissolves gives more, up to 1.860 V;
        oxygen instead of oxide gives less
    Source
        enthalpy balance of the cell, enthalpies of formation at 25 degC
    Example
        6000 A at 20 V, in kW:

        >>> round(bath_heat_anodizing(current=6000.0, voltage=20.0) / 1000, 2)
        128.48
    """
    return current * (voltage + REACTION_VOLTAGE.value)


def bath_heat_chrome(*, current: Current, voltage: Voltage, efficiency: Ratio) -> Power:
    """How much heat hard chrome puts into the bath.

        P = I (V - 1.481 V (1 - eta) - 1.040 V eta)

    Parameters
        current: I, of the load [A]
        voltage: V, at the tank, not at the rectifier [V]
        efficiency: eta, current efficiency [1]
    Returns
        P, heat into the bath; what a heater need not give [W]
    Valid
        trivalent chromium steady; gas leaves at bath temperature
    Source
        enthalpy balance of the cell, enthalpies of formation at 25 degC
    Example
        10 kA at 5.5 V and 15 %, in kW:

        >>> round(bath_heat_chrome(current=10_000.0, voltage=5.5, efficiency=0.15) / 1000, 2)
        40.85
    """
    reaction = WATER_VOLTAGE.value * (1.0 - efficiency) + DICHROMATE_VOLTAGE.value * efficiency
    return current * (voltage - reaction)


def cooling_heat_chrome(*, current: Current, voltage: Voltage) -> Power:
    """What heat to size the cooling of a chrome tank for: no credit for the reaction.

        P = I V

    Parameters
        current: I, of the load [A]
        voltage: V, at the tank [V]
    Returns
        P, the most the current can put into the bath [W]
    Valid
        always an upper bound in chrome
    Source
        electrical power; leaving out the reaction is a design rule of this program
    Example
        >>> cooling_heat_chrome(current=10_000.0, voltage=5.5)
        55000.0
    """
    return current * voltage


def soak_time(*, mass: Mass, area: Area, specific_heat: SpecificHeat, heat_transfer: HeatTransfer) -> Time:
    """How long a cold part hangs in a warm solution before it is at temperature.

        t = 3 m c / (h A)

    Parameters
        mass: m, of the part [kg]
        area: A, wetted [m^2]
        specific_heat: c, of its metal [J/(kg K)]
        heat_transfer: h, from the solution to the part [W/(m^2 K)]
    Returns
        t, until 95 % of the difference is gone [s]
    Valid
        parts that warm evenly: h times the thickness small against the conductivity of the metal
    Source
        lumped heat balance, three time constants
    Example
        A steel rod 50 mm across, one metre long, in minutes:

        >>> from math import pi
        >>> rod = {"mass": 7850 * pi * 0.025**2, "area": pi * 0.05}
        >>> round(soak_time(**rod, specific_heat=480.0, heat_transfer=500.0) / 60, 1)
        4.7
    """
    return SOAK_CONSTANTS.value * mass * specific_heat / (heat_transfer * area)
