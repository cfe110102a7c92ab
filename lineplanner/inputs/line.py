"""A line: rectifiers, tanks, bus, cooling, exhaust. Maintenance owns it."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import (
    COUNT,
    CURRENT,
    FLOW,
    LENGTH,
    POWER,
    RATIO,
    RESISTANCE,
    SURFACE_TENSION,
    TEMPERATURE,
    TIME,
    VOLTAGE,
    VOLUME,
    Current,
    Field,
    Flow,
    Length,
    Power,
    Ratio,
    Resistance,
    SurfaceTension,
    Temperature,
    Time,
    Voltage,
    Volume,
)

YesNo = Literal["yes", "no", "unknown"]


@dataclass(frozen=True, slots=True, kw_only=True)
class RipplePoint:
    """One measured point of a rectifier's ripple."""

    voltage_share: Annotated[Ratio, Field(RATIO, "volts of full volts", above=0.0, high=1.2)]
    ripple: Annotated[Ratio, Field(RATIO, "ripple", "rms of mean", low=0.0, high=2.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Rectifier:
    """A rectifier as its nameplate says."""

    name: Annotated[str, Field(None, "name")]
    max_current: Annotated[Current, Field(CURRENT, "rated current", above=0.0)]
    max_voltage: Annotated[Voltage, Field(VOLTAGE, "rated voltage", above=0.0)]
    tanks: Annotated[tuple[str, ...], Field(None, "tanks it can feed")]
    type: Annotated[Literal["phase-controlled", "switch-mode"], Field(None, "type")]
    pulses: Annotated[Literal[3, 6, 12] | None, Field(None, "pulses", "of a phase-controlled unit")] = None
    filtered: Annotated[YesNo, Field(None, "output filter")] = "unknown"
    full_on_voltage: Annotated[
        Voltage | None, Field(VOLTAGE, "voltage at full phase-on", "left out: 1.1 x rated", above=0.0)
    ] = None
    ripple_curve: Annotated[tuple[RipplePoint, ...], Field(None, "measured ripple")] = ()
    reversing: Annotated[YesNo, Field(None, "reversing gear")] = "unknown"
    can_ramp: Annotated[bool, Field(None, "ramps by itself")] = True
    panel_step: Annotated[Current | None, Field(CURRENT, "panel step, current", above=0.0)] = None
    voltage_step: Annotated[Voltage | None, Field(VOLTAGE, "panel step, voltage", above=0.0)] = None
    least_current: Annotated[Current | None, Field(CURRENT, "least current it can hold", low=0.0)] = None
    ammeter: Annotated[Ratio | None, Field(RATIO, "ammeter accuracy", "of full scale", low=0.0, high=0.2)] = (
        None
    )
    overload_current: Annotated[Current | None, Field(CURRENT, "nameplate overload", above=0.0)] = None
    overload_time: Annotated[Time | None, Field(TIME, "longest overload", above=0.0)] = None
    voltage_limit: Annotated[Voltage | None, Field(VOLTAGE, "voltage limit set on the panel", above=0.0)] = (
        None
    )
    ambient: Annotated[Temperature | None, Field(TEMPERATURE, "air at the rectifier")] = None
    entered_by: Annotated[str, Field(None, "entered by", "who read the nameplate, and when")] = ""

    @property
    def most_voltage(self) -> Voltage:
        """What the unit goes up to: the limit set on its panel, but never above its rating."""
        return self.max_voltage if self.voltage_limit is None else min(self.max_voltage, self.voltage_limit)


@dataclass(frozen=True, slots=True, kw_only=True)
class Bus:
    """A run of bus bar or cable; length of both poles together, bars side by side."""

    name: Annotated[str, Field(None, "name")]
    conductor: Annotated[str, Field(None, "material", "row of the conductors table")]
    length: Annotated[Length, Field(LENGTH, "length of conductor, both poles together", above=0.0)]
    width: Annotated[Length, Field(LENGTH, "width of one bar", above=0.0)]
    thickness: Annotated[Length, Field(LENGTH, "thickness of one bar", above=0.0)]
    bars: Annotated[int, Field(COUNT, "bars side by side", low=1, high=20)] = 1
    temperature: Annotated[
        Temperature | None,
        Field(TEMPERATURE, "working temperature", "left out: taken as warm as in hot shop air"),
    ] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Joint:
    """Joints alike in series: bolted, or saddles and hooks that part at every lift."""

    name: Annotated[str, Field(None, "name")]
    type: Annotated[Literal["bolted", "saddle"], Field(None, "type")]
    count: Annotated[int, Field(COUNT, "in series", low=1, high=200)] = 1
    parallel: Annotated[int, Field(COUNT, "side by side", low=1, high=20)] = 1
    resistance: Annotated[Resistance, Field(RESISTANCE, "resistance of one", low=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class FlightBar:
    """The bar that the racks hang on."""

    conductor: Annotated[str, Field(None, "material", "row of the conductors table")]
    length: Annotated[Length, Field(LENGTH, "length between saddles", above=0.0)]
    width: Annotated[Length, Field(LENGTH, "width", above=0.0)]
    thickness: Annotated[Length, Field(LENGTH, "thickness", above=0.0)]
    fed: Annotated[Literal["one end", "both ends"], Field(None, "fed at")]


@dataclass(frozen=True, slots=True, kw_only=True)
class Exhaust:
    """What draws the mist off."""

    flow: Annotated[
        Flow | None,
        Field(FLOW, "exhaust flow", "of this tank; unknown if not measured", low=0.0, unknown=True),
    ]
    required: Annotated[
        Flow | None, Field(FLOW, "exhaust flow that the ventilation design asks for", low=0.0, unknown=True)
    ] = None
    proven: Annotated[bool, Field(None, "flow proven this shift")] = False
    supply: Annotated[Flow | None, Field(FLOW, "supply air of the room", low=0.0, unknown=True)] = None
    lid: Annotated[bool, Field(None, "tank lid in use")] = False
    foam: Annotated[bool, Field(None, "foam blanket in use")] = False
    wetting_agent: Annotated[bool, Field(None, "wetting agent is the declared control")] = False
    surface_tension: Annotated[
        SurfaceTension | None, Field(SURFACE_TENSION, "surface tension", unknown=True)
    ] = None
    tension_meter: Annotated[Literal["stalagmometer", "tensiometer"] | None, Field(None, "read with")] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Tank:
    """A process tank with all that feeds and serves it."""

    name: Annotated[str, Field(None, "name")]
    bath: Annotated[str, Field(None, "bath", ref="bath")]
    volume: Annotated[Volume, Field(VOLUME, "solution volume", above=0.0)]
    solution_drop: Annotated[
        Length, Field(LENGTH, "solution surface below the flight bar", "with the bar in its saddles", low=0.0)
    ]
    gap: Annotated[Length, Field(LENGTH, "work to counter-electrode", above=0.0)]
    counter_electrode: Annotated[
        Literal["lead", "aluminium", "stainless", "steel", "graphite", "titanium"],
        Field(None, "counter-electrode"),
    ]
    heater: Annotated[Literal["none", "electric immersion", "steam or hot water"], Field(None, "heater")] = (
        "none"
    )
    heater_guards: Annotated[
        bool, Field(None, "low-level and over-temperature cutoffs confirmed this month")
    ] = False
    cooling: Annotated[
        Power | None, Field(POWER, "cooling capacity", "at bath temperature", low=0.0, unknown=True)
    ] = None
    bus: Annotated[tuple[Bus, ...], Field(None, "bus")] = ()
    joints: Annotated[tuple[Joint, ...], Field(None, "joints", key="joint")] = ()
    flight_bar: Annotated[FlightBar | None, Field(None, "flight bar")] = None
    exhaust: Annotated[Exhaust | None, Field(None, "exhaust")] = None
    shower: Annotated[bool, Field(None, "shower and eyewash confirmed this shift")] = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Line:
    """A finishing line."""

    name: Annotated[str, Field(None, "name")]
    rectifiers: Annotated[tuple[Rectifier, ...], Field(None, "rectifiers", key="rectifier")]
    tanks: Annotated[tuple[Tank, ...], Field(None, "tanks", key="tank")]
