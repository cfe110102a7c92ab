"""Standards tables: numbers of the trade that a site may edit, each with source and status."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.inputs.values import Sourced
from lineplanner.quantities import (
    CONCENTRATION,
    CONDUCTIVITY,
    COUNT,
    CURRENT,
    CURRENT_DENSITY,
    DENSITY,
    FILM_GRADIENT,
    FORCE,
    GROWTH,
    HEAT_TRANSFER,
    LENGTH,
    PER_KELVIN,
    RATE,
    RATIO,
    RESISTIVITY,
    STRESS,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    THICKNESS,
    TIME,
    VOLTAGE,
    Conductivity,
    Field,
    Ratio,
    Temperature,
)
from lineplanner.sources import Status

Process = Literal[
    "anodize-sulfuric",
    "anodize-hard",
    "anodize-chromic",
    "anodize-boric-sulfuric",
    "anodize-tartaric-sulfuric",
    "chrome-hard",
]


@dataclass(frozen=True, slots=True, kw_only=True)
class AlloyFamily:
    """How an aluminium family grows, what volts it takes and how it must be started."""

    name: Annotated[str, Field(None, "family")]
    alloys: Annotated[tuple[str, ...], Field(None, "alloys", "designations of this family")]
    growth_factor: Annotated[
        Sourced, Field(RATIO, "alloy factor", "growth against the rule", above=0.0, high=1.2)
    ]
    voltage_factor: Annotated[Sourced, Field(RATIO, "voltage factor a", above=0.0)]
    film_gradient: Annotated[
        Sourced, Field(FILM_GRADIENT, "film gradient s", "at 36 A/ft2, cold bath", low=0.0)
    ]
    most_sulfuric: Annotated[Sourced, Field(CURRENT_DENSITY, "most current density, sulfuric", above=0.0)]
    most_hard: Annotated[Sourced, Field(CURRENT_DENSITY, "most current density, hard", above=0.0)]
    soft_start: Annotated[Sourced, Field(TIME, "soft start, hard", low=0.0)]
    soft_start_steps: Annotated[int, Field(COUNT, "steps of the soft start", "0: linear")]
    start_density: Annotated[Sourced, Field(CURRENT_DENSITY, "current density at the start", low=0.0)]
    hard_ceiling: Annotated[Sourced, Field(THICKNESS, "practical ceiling of hard film", above=0.0)]
    delicate: Annotated[bool, Field(None, "burns first", "never lengthened or raised by itself")]
    mix: Annotated[str, Field(None, "mixing group", "families of unlike groups are not run together")]


@dataclass(frozen=True, slots=True, kw_only=True)
class Substrate:
    """How hard chrome is started on a base metal."""

    name: Annotated[str, Field(None, "substrate")]
    reverse_density: Annotated[
        Sourced, Field(CURRENT_DENSITY, "reverse etch current density", "0: none", low=0.0)
    ]
    reverse_time: Annotated[Sourced, Field(TIME, "reverse etch time", low=0.0)]
    start: Annotated[Literal["step", "ramp", "live"], Field(None, "start")]
    start_hold: Annotated[Sourced, Field(TIME, "hold below the threshold", low=0.0)]
    start_ramp: Annotated[Sourced, Field(TIME, "ramp to full current", low=0.0)]
    strike_ratio: Annotated[Sourced, Field(RATIO, "strike", "times the plating current; 1: none", low=1.0)]
    strike_time: Annotated[Sourced, Field(TIME, "strike time", low=0.0)]
    soak_in_bath: Annotated[bool, Field(None, "soak in the plating bath", "false: pre-heat in hot water")]
    ferrous: Annotated[bool, Field(None, "steel or iron")]


@dataclass(frozen=True, slots=True, kw_only=True)
class ProcessDefaults:
    """What a process does unless recipe, part or bath say otherwise."""

    name: Annotated[Process, Field(None, "process")]
    hole_ratio: Annotated[Sourced, Field(RATIO, "wall counted from each open end", "in diameters", low=0.0)]
    promise_ratio: Annotated[
        Sourced, Field(RATIO, "depth promised from each open end", "in diameters", low=0.0)
    ]
    thread_factor: Annotated[Sourced, Field(RATIO, "tapped wall", "times the drawn cylinder", low=1.0)]
    tip_factor: Annotated[Sourced, Field(RATIO, "bare tips and thieves", "current against the part", low=0.0)]
    position_band: Annotated[Sourced, Field(RATIO, "position", "95 % half-width of local thickness", low=0.0)]
    apparent_density: Annotated[Sourced, Field(DENSITY, "apparent density of the coating", above=0.0)]
    build_up_share: Annotated[Sourced, Field(RATIO, "build-up share of thickness", low=0.0, high=1.0)]
    contacts_each: Annotated[Sourced, Field(RATIO, "contacts at least, each part", low=1.0)]
    growth_scale: Annotated[Sourced, Field(RATIO, "growth against the default gross growth", above=0.0)]
    peak_density: Annotated[Sourced, Field(CURRENT_DENSITY, "planning peak under voltage control", low=0.0)]
    mean_density: Annotated[
        Sourced, Field(CURRENT_DENSITY, "mean in the hold under voltage control", low=0.0)
    ]
    ripple_limit: Annotated[
        Sourced, Field(RATIO, "ripple limit", "rms of mean at the working point", above=0.0)
    ]
    thickness_ceiling: Annotated[Sourced, Field(THICKNESS, "practical ceiling", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class GrowthLaw:
    """Constants of the growth-and-dissolution law and of the film voltage."""

    gross_growth: Annotated[Sourced, Field(GROWTH, "gross growth per charge", above=0.0)]
    dissolution: Annotated[Sourced, Field(RATE, "effective loss at 20 degC", low=0.0)]
    doubling: Annotated[Sourced, Field(TEMPERATURE_DIFFERENCE, "doubling interval of the loss", above=0.0)]
    acid_reference: Annotated[Sourced, Field(CONCENTRATION, "acid of the reference", above=0.0)]
    acid_power: Annotated[Sourced, Field(RATIO, "power of acid in the loss", low=0.0)]
    film_voltage: Annotated[Sourced, Field(VOLTAGE, "film voltage at 12 A/ft2, 20 degC", above=0.0)]
    voltage_power: Annotated[Sourced, Field(RATIO, "power of current density in the film voltage", above=0.0)]
    voltage_cooling: Annotated[Sourced, Field(PER_KELVIN, "rise of film voltage per kelvin colder", low=0.0)]
    warm_gradient: Annotated[
        Sourced, Field(FILM_GRADIENT, "film gradient in a 20 degC bath, at 36 A/ft2", low=0.0)
    ]
    oxide_share: Annotated[Sourced, Field(RATIO, "oxide mass fraction of the film", above=0.0, high=1.0)]
    heat_transfer: Annotated[Sourced, Field(HEAT_TRANSFER, "heat transfer to a soaking part", above=0.0)]
    soft_share: Annotated[
        Sourced, Field(RATIO, "loss over thickness from which the outer film is soft", above=0.0)
    ]


@dataclass(frozen=True, slots=True, kw_only=True)
class ChromeFamily:
    """Current efficiency of a family of hard chrome baths: a fitted model with its range."""

    name: Annotated[Literal["conventional", "mixed-catalyst", "high-speed"], Field(None, "bath family")]
    reference_efficiency: Annotated[
        Sourced, Field(RATIO, "efficiency at 31 A/dm2, 55 degC, 250 g/L", above=0.0)
    ]
    cap: Annotated[Sourced, Field(RATIO, "ceiling of the efficiency", above=0.0, high=1.0)]
    threshold: Annotated[Sourced, Field(CURRENT_DENSITY, "onset of deposition at 55 degC", above=0.0)]
    threshold_rise: Annotated[Sourced, Field(PER_KELVIN, "rise of the onset per kelvin", low=0.0)]
    onset_power: Annotated[Sourced, Field(RATIO, "power of onset over current density", above=0.0)]
    acid_slope: Annotated[
        Sourced, Field(RATIO, "relative loss per g/L chromic acid over 250", "0: none", low=0.0)
    ]
    lowest_density: Annotated[Sourced, Field(CURRENT_DENSITY, "range from", above=0.0)]
    highest_density: Annotated[Sourced, Field(CURRENT_DENSITY, "range to", above=0.0)]
    lowest_temperature: Annotated[Sourced, Field(TEMPERATURE, "range from", above=0.0)]
    highest_temperature: Annotated[Sourced, Field(TEMPERATURE, "range to", above=0.0)]
    deposit_density: Annotated[Sourced, Field(DENSITY, "density of the deposit", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Conductor:
    """A conductor material at 20 degC: the one resistivity table."""

    name: Annotated[str, Field(None, "material")]
    metal: Annotated[
        Literal["copper", "aluminium", "titanium", "steel", "lead", "other"], Field(None, "metal")
    ]
    resistivity: Annotated[Sourced, Field(RESISTIVITY, "resistivity at 20 degC", above=0.0)]
    temperature_coefficient: Annotated[Sourced, Field(PER_KELVIN, "temperature coefficient", low=0.0)]
    drop_tier: Annotated[Sourced, Field(CURRENT_DENSITY, "voltage-drop tier", above=0.0)]
    contact_current: Annotated[Sourced, Field(CURRENT, "current of one contact", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Limits:
    """Default limits of rectifiers, conductors, cooling and exhaust; a site may adopt them as its own."""

    continuous_share: Annotated[Sourced, Field(RATIO, "continuous current of rating", above=0.0, high=1.0)]
    short_share: Annotated[Sourced, Field(RATIO, "short-time current of rating", above=0.0)]
    overload_time: Annotated[Sourced, Field(TIME, "longest short time", low=0.0)]
    least_share: Annotated[Sourced, Field(RATIO, "least output that can be controlled", low=0.0)]
    metering_share: Annotated[Sourced, Field(RATIO, "output below which the meter misleads", low=0.0)]
    ripple_voltage_warn: Annotated[Sourced, Field(RATIO, "volts of rating below which ripple warns", low=0.0)]
    ripple_voltage_fail: Annotated[Sourced, Field(RATIO, "volts of rating below which ripple fails", low=0.0)]
    derate_from: Annotated[Sourced, Field(TEMPERATURE, "ambient from which to derate")]
    derate_per_kelvin: Annotated[Sourced, Field(PER_KELVIN, "derating per kelvin", low=0.0)]
    hottest_ambient: Annotated[Sourced, Field(TEMPERATURE, "ambient not to be exceeded")]
    derate_altitude_from: Annotated[Sourced, Field(LENGTH, "altitude from which to derate")]
    derate_per_altitude: Annotated[Sourced, Field(RATIO, "derating per 100 m", low=0.0)]
    joint_watch: Annotated[Sourced, Field(VOLTAGE, "bolted joint: watch", low=0.0)]
    joint_fail: Annotated[Sourced, Field(VOLTAGE, "bolted joint: too high", low=0.0)]
    saddle_watch: Annotated[Sourced, Field(VOLTAGE, "saddle or hook: watch", low=0.0)]
    saddle_fail: Annotated[Sourced, Field(VOLTAGE, "saddle or hook: too high", low=0.0)]
    bus_drop: Annotated[Sourced, Field(VOLTAGE, "drop of bus and joints", low=0.0)]
    bus_drop_chrome: Annotated[Sourced, Field(VOLTAGE, "drop of bus and joints, chrome", low=0.0)]
    air_rise: Annotated[Sourced, Field(TEMPERATURE_DIFFERENCE, "rise of a rack conductor in air", above=0.0)]
    air_transfer: Annotated[Sourced, Field(HEAT_TRANSFER, "heat transfer in still air", above=0.0)]
    bath_rise: Annotated[
        Sourced, Field(TEMPERATURE_DIFFERENCE, "rise of a rack conductor in the bath", above=0.0)
    ]
    bath_transfer: Annotated[Sourced, Field(HEAT_TRANSFER, "heat transfer in the bath", above=0.0)]
    cooling_margin: Annotated[Sourced, Field(RATIO, "margin on cooling", low=1.0)]
    hydrogen_warn: Annotated[Sourced, Field(RATIO, "hydrogen in the exhaust: near", above=0.0)]
    hydrogen_limit: Annotated[Sourced, Field(RATIO, "hydrogen in the exhaust: limit", above=0.0)]
    stretch: Annotated[Sourced, Field(RATIO, "longest stretch at the voltage limit", low=0.0)]
    titanium_voltage: Annotated[Sourced, Field(VOLTAGE, "volts on titanium racks", above=0.0)]
    area_difference: Annotated[Sourced, Field(RATIO, "stated against drawn area", above=0.0)]
    law_difference: Annotated[Sourced, Field(RATIO, "growth laws apart", above=0.0)]
    titanium_rack_factor: Annotated[Sourced, Field(RATIO, "titanium rack metal counted", low=0.0)]
    strong_steel: Annotated[
        Sourced, Field(STRESS, "steel that needs the design owner's authority", above=0.0)
    ]
    strong_hardness: Annotated[Sourced, Field(RATIO, "hardness HRC that needs that authority", above=0.0)]
    bake_steel: Annotated[Sourced, Field(STRESS, "steel that needs a bake", above=0.0)]
    contact_force: Annotated[Sourced, Field(FORCE, "force of one contact", above=0.0)]
    contact_hardness: Annotated[Sourced, Field(STRESS, "hardness of the softer contact metal", above=0.0)]
    below_threshold: Annotated[
        Sourced, Field(RATIO, "hold below the onset of deposition", "share of it", above=0.0)
    ]
    oven_within: Annotated[Sourced, Field(TIME, "oven within", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Uncertainty:
    """Relative 95 % half-widths of what a thickness depends on."""

    drawn_area: Annotated[Sourced, Field(RATIO, "drawn area", low=0.0)]
    stated_area: Annotated[Sourced, Field(RATIO, "stated area", low=0.0)]
    ammeter: Annotated[Sourced, Field(RATIO, "ammeter, of full scale", low=0.0)]
    film_yield: Annotated[Sourced, Field(RATIO, "retained yield without a coupon", low=0.0)]
    film_yield_coupon: Annotated[Sourced, Field(RATIO, "retained yield with a coupon", low=0.0)]
    efficiency: Annotated[Sourced, Field(RATIO, "chrome efficiency without a coupon", low=0.0)]
    efficiency_coupon: Annotated[Sourced, Field(RATIO, "chrome efficiency with a coupon", low=0.0)]
    voltage_run: Annotated[Sourced, Field(RATIO, "films run by voltage", low=0.0)]
    temperature: Annotated[Sourced, Field(TEMPERATURE_DIFFERENCE, "bath temperature", low=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class ConductivityPoint:
    """One cell of a bath conductivity table."""

    temperature: Annotated[Temperature, Field(TEMPERATURE, "temperature")]
    conductivity: Annotated[Conductivity, Field(CONDUCTIVITY, "conductivity", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class ConductivityRow:
    """Bath conductivity at one strength: value at a base temperature with its linear coefficient."""

    strength: Annotated[float, Field(CONCENTRATION, "acid", above=0.0)]
    base: Annotated[ConductivityPoint, Field(None, "at the base temperature")]
    coefficient: Annotated[float, Field(PER_KELVIN, "linear coefficient of the base value", low=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class ConductivityTable:
    """Conductivity of one acid over strength and temperature."""

    acid: Annotated[Literal["sulfuric", "chromic"], Field(None, "acid")]
    rows: Annotated[tuple[ConductivityRow, ...], Field(None, "rows, by rising strength", key="row")]
    uncertainty: Annotated[Ratio, Field(RATIO, "uncertainty")]
    aluminium_loss: Annotated[
        Ratio, Field(RATIO, "relative loss for each g/L of dissolved aluminium", low=0.0, high=0.1)
    ] = 0.0
    source: Annotated[str, Field(None, "source")]
    status: Annotated[Status, Field(None, "status")]


@dataclass(frozen=True, slots=True, kw_only=True)
class CellVoltage:
    """Constants of the chrome cell voltage."""

    base: Annotated[Sourced, Field(VOLTAGE, "electrode voltage at 31 A/dm2", above=0.0)]
    per_decade: Annotated[Sourced, Field(VOLTAGE, "rise per decade of current density", low=0.0)]
    spreading: Annotated[Sourced, Field(RATIO, "open-tank factor at 1 cm gap", above=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Tables:
    """All standards tables of a site."""

    alloys: Annotated[tuple[AlloyFamily, ...], Field(None, "alloy families", key="family")]
    substrates: Annotated[tuple[Substrate, ...], Field(None, "substrates", key="substrate")]
    processes: Annotated[tuple[ProcessDefaults, ...], Field(None, "processes", key="process")]
    growth: Annotated[GrowthLaw, Field(None, "growth law")]
    chrome: Annotated[tuple[ChromeFamily, ...], Field(None, "chrome bath families", key="bath")]
    cell: Annotated[CellVoltage, Field(None, "chrome cell voltage")]
    conductors: Annotated[tuple[Conductor, ...], Field(None, "conductors", key="conductor")]
    limits: Annotated[Limits, Field(None, "limits")]
    uncertainty: Annotated[Uncertainty, Field(None, "uncertainty")]
    conductivity: Annotated[tuple[ConductivityTable, ...], Field(None, "bath conductivity", key="table")]
