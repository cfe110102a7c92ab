"""The units the engine thinks in: kinds, annotated float types, field declarations, physical constants."""

from dataclasses import dataclass
from typing import Annotated

from lineplanner.sources import Constant, Source, Status


@dataclass(frozen=True, slots=True)
class Kind:
    """A kind of quantity: its name in messages and the SI unit that the engine holds it in."""

    name: str
    unit: str


def _kind(name: str, unit: str) -> Kind:
    return Kind(name, unit)


LENGTH = _kind("length", "m")
THICKNESS = _kind("thickness", "m")
AREA = _kind("area", "m^2")
VOLUME = _kind("volume", "m^3")
ANGLE = _kind("angle", "rad")
TIME = _kind("time", "s")
MASS = _kind("mass", "kg")
CURRENT = _kind("current", "A")
CURRENT_DENSITY = _kind("current density", "A/m^2")
CHARGE = _kind("charge", "C")
CHARGE_DENSITY = _kind("charge per area", "C/m^2")
VOLTAGE = _kind("voltage", "V")
VOLTAGE_RATE = _kind("voltage ramp rate", "V/s")
FILM_GRADIENT = _kind("voltage per film thickness", "V/m")
RESISTANCE = _kind("resistance", "ohm")
RESISTIVITY = _kind("resistivity", "ohm m")
CONDUCTIVITY = _kind("conductivity", "S/m")
TEMPERATURE = _kind("temperature", "K")
TEMPERATURE_DIFFERENCE = _kind("temperature difference", "K")
PER_KELVIN = _kind("temperature coefficient", "1/K")
CONCENTRATION = _kind("concentration", "kg/m^3")
DENSITY = _kind("density", "kg/m^3")
MOLAR_MASS = _kind("molar mass", "kg/mol")
SURFACE_MASS = _kind("coating weight", "kg/m^2")
GROWTH = _kind("growth per charge", "m^3/C")
EQUIVALENT = _kind("mass per charge", "kg/C")
RATE = _kind("thickness rate", "m/s")
SPEED = _kind("speed", "m/s")
FLOW = _kind("flow", "m^3/s")
POWER = _kind("power", "W")
FORCE = _kind("force", "N")
STRESS = _kind("tensile strength", "Pa")
PRESSURE = _kind("pressure", "Pa")
SURFACE_TENSION = _kind("surface tension", "N/m")
HEAT_TRANSFER = _kind("heat transfer coefficient", "W/(m^2 K)")
SPECIFIC_HEAT = _kind("specific heat", "J/(kg K)")
RATIO = _kind("ratio", "1")
COUNT = _kind("count", "1")

KINDS = {kind.name: kind for kind in list(globals().values()) if isinstance(kind, Kind)}

Length = Annotated[float, LENGTH]
Thickness = Annotated[float, THICKNESS]
Area = Annotated[float, AREA]
Volume = Annotated[float, VOLUME]
Angle = Annotated[float, ANGLE]
Time = Annotated[float, TIME]
Mass = Annotated[float, MASS]
Current = Annotated[float, CURRENT]
CurrentDensity = Annotated[float, CURRENT_DENSITY]
Charge = Annotated[float, CHARGE]
ChargeDensity = Annotated[float, CHARGE_DENSITY]
Voltage = Annotated[float, VOLTAGE]
VoltageRate = Annotated[float, VOLTAGE_RATE]
FilmGradient = Annotated[float, FILM_GRADIENT]
Resistance = Annotated[float, RESISTANCE]
Resistivity = Annotated[float, RESISTIVITY]
Conductivity = Annotated[float, CONDUCTIVITY]
Temperature = Annotated[float, TEMPERATURE]
TemperatureDifference = Annotated[float, TEMPERATURE_DIFFERENCE]
PerKelvin = Annotated[float, PER_KELVIN]
Concentration = Annotated[float, CONCENTRATION]
Density = Annotated[float, DENSITY]
MolarMass = Annotated[float, MOLAR_MASS]
SurfaceMass = Annotated[float, SURFACE_MASS]
Growth = Annotated[float, GROWTH]
Equivalent = Annotated[float, EQUIVALENT]
Rate = Annotated[float, RATE]
Speed = Annotated[float, SPEED]
Flow = Annotated[float, FLOW]
Power = Annotated[float, POWER]
Force = Annotated[float, FORCE]
Stress = Annotated[float, STRESS]
Pressure = Annotated[float, PRESSURE]
SurfaceTension = Annotated[float, SURFACE_TENSION]
HeatTransfer = Annotated[float, HEAT_TRANSFER]
SpecificHeat = Annotated[float, SPECIFIC_HEAT]
Ratio = Annotated[float, RATIO]


@dataclass(frozen=True, slots=True)
class Field:
    """What a file, a form, a schema and a card row need to know of one input, declared once.

    kind is None for words (names, references, choices). low and high are SI bounds; a bound with
    `above` is itself not allowed. `ref` names the record kind that the word refers to. `unknown` lets a
    file say the word "unknown", which is read as None: not known is not the same as none. `key` is the
    key in a file where it is not the field's name (singular for `[[hole]]` tables).
    """

    kind: Kind | None
    label: str
    help: str = ""
    low: float | None = None
    high: float | None = None
    above: float | None = None
    below: float | None = None
    ref: str | None = None
    unknown: bool = False
    key: str | None = None


_SI = Source("SI Brochure, 9th edition, 2019, section 2.2: defining constants", Status.PUBLISHED)

ELEMENTARY_CHARGE = Constant("elementary charge", 1.602176634e-19, "C", _SI)
AVOGADRO = Constant("Avogadro constant", 6.02214076e23, "1/mol", _SI)
BOLTZMANN = Constant("Boltzmann constant", 1.380649e-23, "J/K", _SI)
_FROM_SI = Source("product of SI defining constants", Status.DERIVED)
FARADAY = Constant("Faraday constant", ELEMENTARY_CHARGE.value * AVOGADRO.value, "C/mol", _FROM_SI)
GAS_CONSTANT = Constant("molar gas constant", BOLTZMANN.value * AVOGADRO.value, "J/(mol K)", _FROM_SI)
ICE_POINT = Constant(
    "0 degC", 273.15, "K", Source("SI Brochure, 9th edition, section 2.3.1", Status.PUBLISHED)
)
ATMOSPHERE = Constant(
    "standard atmosphere", 101325.0, "Pa", Source("CGPM 1954, resolution 4", Status.PUBLISHED)
)
