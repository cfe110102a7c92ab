"""Gas at the electrodes: hydrogen, oxygen, the air that thins hydrogen out."""

from lineplanner.errors import InputError, Quantity
from lineplanner.quantities import (
    FARADAY,
    FLOW,
    GAS_CONSTANT,
    Charge,
    Current,
    Flow,
    Pressure,
    Ratio,
    Temperature,
    Volume,
)
from lineplanner.sources import Constant, Source, Status

_REACTION = Source("electrode reaction in acid solution", Status.DERIVED)
HYDROGEN_ELECTRONS = Constant("electrons for each hydrogen molecule", 2.0, "1", _REACTION)
OXYGEN_ELECTRONS = Constant("electrons for each oxygen molecule", 4.0, "1", _REACTION)


def gas_volume(*, charge: Charge, electrons: Ratio, temperature: Temperature, pressure: Pressure) -> Volume:
    """What volume of dry gas a charge makes.

        V = Q R T / (z F p)

    Parameters
        charge: Q, that goes into this gas [C]
        electrons: z, for each molecule: hydrogen 2, oxygen 4 [1]
        temperature: T, of the gas [K]
        pressure: p, absolute [Pa]
    Returns
        V, dry gas [m^3]
    Valid
        ideal gas; over a hot bath water vapour comes on top
    Source
        Faraday's law and the ideal gas law
    Example
        Hydrogen of one ampere-hour at 0 degC and 1 atm, in litres:

        >>> round(gas_volume(charge=3600, electrons=2, temperature=273.15, pressure=101325.0) * 1000, 4)
        0.4181
    """
    return charge * GAS_CONSTANT.value * temperature / (electrons * FARADAY.value * pressure)


def hydrogen_flow(*, current: Current, share: Ratio, temperature: Temperature, pressure: Pressure) -> Flow:
    """How much hydrogen a load gives off.

        dV/dt = x I R T / (2 F p)

    Parameters
        current: I, of the load [A]
        share: x, of the current that makes hydrogen: 1 in anodizing, 1 less the efficiency in chrome [1]
        temperature: T, of the gas [K]
        pressure: p, absolute [Pa]
    Returns
        dV/dt, dry hydrogen [m^3/s]
    Valid
        steady current; a reverse etch makes it at the other electrode with a share of 1
    Source
        Faraday's law and the ideal gas law
    Example
        1000 A in an anodizing tank, 25 degC, in m3/h:

        >>> flow = hydrogen_flow(current=1000.0, share=1.0, temperature=298.15, pressure=101325.0)
        >>> round(flow * 3600, 4)
        0.4564
    """
    return gas_volume(
        charge=share * current,  # the charge of one second
        electrons=HYDROGEN_ELECTRONS.value,
        temperature=temperature,
        pressure=pressure,
    )


def oxygen_flow(*, current: Current, share: Ratio, temperature: Temperature, pressure: Pressure) -> Flow:
    """How much oxygen an insoluble anode gives off.

        dV/dt = x I R T / (4 F p)

    Parameters
        current: I, of the load [A]
        share: x, of the current that makes oxygen: up to 1 at lead anodes in chrome [1]
        temperature: T, of the gas [K]
        pressure: p, absolute [Pa]
    Returns
        dV/dt, dry oxygen [m^3/s]
    Valid
        steady current
    Source
        Faraday's law and the ideal gas law
    Example
        1000 A in a chrome tank, 0 degC, in m3/h:

        >>> flow = oxygen_flow(current=1000.0, share=1.0, temperature=273.15, pressure=101325.0)
        >>> round(flow * 3600, 4)
        0.2091
    """
    return gas_volume(
        charge=share * current,  # the charge of one second
        electrons=OXYGEN_ELECTRONS.value,
        temperature=temperature,
        pressure=pressure,
    )


def dilution_flow(*, hydrogen: Flow, share: Ratio, mixing: Ratio = 1.0) -> Flow:
    """What exhaust brings hydrogen down to a share by volume.

        Q = K V / x

    Parameters
        hydrogen: V, given off [m^3/s]
        share: x, of hydrogen in the exhaust, by volume [1]
        mixing: K, 1 where a hood catches all of it, more where it mixes into the room [1]
    Returns
        Q, exhaust at the temperature and pressure of V [m^3/s]
    Raises
        InputError dilution.share where x is not above zero
    Valid
        no closed pockets: bores, lids, foam
    Source
        mass balance of hydrogen; the mixing factor is common practice
    Example
        1 % over 0.4564 m3/h of hydrogen, in m3/h:

        >>> round(dilution_flow(hydrogen=0.4564 / 3600, share=0.01) * 3600, 2)
        45.64
    """
    if share <= 0.0:
        raise InputError("dilution.share")
    return mixing * hydrogen / share


def hydrogen_share(*, hydrogen: Flow, exhaust: Flow) -> Ratio:
    """What share of the exhaust is hydrogen, by volume.

        x = V / Q, at most 1

    Parameters
        hydrogen: V, given off [m^3/s]
        exhaust: Q, proven flow of the exhaust, hydrogen included [m^3/s]
    Returns
        x, by volume; 1 where no air comes along [1]
    Raises
        InputError exhaust.negative where a flow is below zero
    Valid
        all hydrogen goes into this exhaust and mixes with it
    Source
        mass balance of hydrogen
    Example
        4.564 m3/h in 7000 cfm, in percent:

        >>> round(hydrogen_share(hydrogen=4.564 / 3600, exhaust=7000 * 0.3048**3 / 60) * 100, 4)
        0.0384
    """
    if hydrogen < 0.0 or exhaust < 0.0:
        raise InputError("exhaust.negative", exhaust=Quantity(min(hydrogen, exhaust), FLOW))
    if hydrogen == 0.0:
        return 0.0
    return min(1.0, hydrogen / exhaust) if exhaust > 0.0 else 1.0
