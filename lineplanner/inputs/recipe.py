"""A recipe: controlled settings with their allowed ranges, and what a load may change."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.inputs.tables import Process
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import (
    COUNT,
    CURRENT_DENSITY,
    LENGTH,
    RATIO,
    SURFACE_MASS,
    TEMPERATURE,
    THICKNESS,
    TIME,
    VOLTAGE,
    CurrentDensity,
    Field,
    Length,
    Ratio,
    SurfaceMass,
    Temperature,
    Thickness,
    Time,
    Voltage,
)

Content = Literal[
    "rinse",
    "clean",
    "caustic-etch",
    "nitric-desmut",
    "fluoride-desmut",
    "chromic-desmut",
    "hydrochloric-strip",
    "hot-water-seal",
    "dichromate-seal",
    "nickel-acetate-seal",
    "nickel-seal",
    "dye",
    "grind",
    "oven",
    "other",
]


@dataclass(frozen=True, slots=True, kw_only=True)
class SideStep:
    """A step before or after: printed, added up, not otherwise modelled."""

    name: Annotated[str, Field(None, "step")]
    tank: Annotated[str, Field(None, "tank")] = ""
    time: Annotated[Time, Field(TIME, "time", low=0.0)] = 0.0
    content: Annotated[Content, Field(None, "what it holds", "decides the cautions")] = "other"
    removed: Annotated[Thickness, Field(THICKNESS, "metal removed per side", low=0.0)] = 0.0
    temperature: Annotated[Temperature | None, Field(TEMPERATURE, "temperature")] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class VoltageStage:
    """One stage of a voltage program: up to a voltage, then held."""

    to: Annotated[Ranged, Field(VOLTAGE, "voltage", above=0.0)]
    ramp: Annotated[Time, Field(TIME, "ramp", low=0.0)]
    hold: Annotated[
        Time | None, Field(TIME, "hold", "the last stage is held until the aim if left out", low=0.0)
    ] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Recipe:
    """What to aim for, and the settings that get there; thickness is total per side unless it says otherwise."""

    name: Annotated[str, Field(None, "name")]
    revision: Annotated[str, Field(None, "revision")]
    status: Annotated[Literal["draft", "approved"], Field(None, "status")] = "draft"
    approved_by: Annotated[str, Field(None, "approved by")] = ""
    approved_on: Annotated[str, Field(None, "approved on")] = ""
    approved_content: Annotated[
        str, Field(None, "approved content", "hash of the values that were approved")
    ] = ""
    follows: Annotated[str, Field(None, "follows", "specification and revision")] = ""
    process: Annotated[Process, Field(None, "process")]
    bases: Annotated[tuple[str, ...], Field(None, "for", "alloy families or substrates")]

    aim: Annotated[Ranged | None, Field(THICKNESS, "aim", above=0.0)] = None
    aim_weight: Annotated[SurfaceMass | None, Field(SURFACE_MASS, "aim as coating weight", above=0.0)] = None
    minimum: Annotated[Thickness | None, Field(THICKNESS, "minimum", above=0.0)] = None
    maximum: Annotated[Thickness | None, Field(THICKNESS, "maximum", above=0.0)] = None
    measured: Annotated[Literal["per side", "on diameter"], Field(None, "measured")] = "per side"
    counted: Annotated[Literal["total", "build-up"], Field(None, "counted")] = "total"
    stock: Annotated[
        Thickness, Field(THICKNESS, "grinding stock per side", "comes on top of the aim", low=0.0)
    ] = 0.0

    current_density: Annotated[Ranged | None, Field(CURRENT_DENSITY, "current density", above=0.0)] = None
    temperature: Annotated[Ranged | None, Field(TEMPERATURE, "bath temperature")] = None
    soft_start: Annotated[Ranged | None, Field(TIME, "soft start", "left out: by alloy family", low=0.0)] = (
        None
    )
    soft_start_steps: Annotated[
        int | None,
        Field(COUNT, "steps of the soft start", "0: linear; left out: by alloy family", low=0, high=50),
    ] = None
    soft_start_from: Annotated[
        CurrentDensity | None, Field(CURRENT_DENSITY, "current density at the start", low=0.0)
    ] = None
    voltages: Annotated[tuple[VoltageStage, ...], Field(None, "voltage program", key="voltage")] = ()
    peak_density: Annotated[
        CurrentDensity | None, Field(CURRENT_DENSITY, "peak current density under voltage control", above=0.0)
    ] = None
    mean_density: Annotated[
        CurrentDensity | None, Field(CURRENT_DENSITY, "mean current density in the hold", above=0.0)
    ] = None

    spacing: Annotated[
        Length | None, Field(LENGTH, "least gap between parts", "by outlines in the rack plane", above=0.0)
    ] = None
    soak: Annotated[Time | None, Field(TIME, "soak", "left out: by part mass", low=0.0)] = None
    reverse: Annotated[
        Literal["preset", "none", "own"], Field(None, "reverse etch", "own: density and time below")
    ] = "preset"
    reverse_density: Annotated[
        Ranged | None, Field(CURRENT_DENSITY, "reverse etch current density", above=0.0)
    ] = None
    reverse_time: Annotated[Ranged | None, Field(TIME, "reverse etch time", above=0.0)] = None
    reverse_tank: Annotated[str, Field(None, "reverse etch in another tank", "name of it")] = ""
    strike_ratio: Annotated[Ranged | None, Field(RATIO, "strike", "times the plating current", low=1.0)] = (
        None
    )
    strike_time: Annotated[Ranged | None, Field(TIME, "strike time", low=0.0)] = None
    live_entry: Annotated[bool, Field(None, "live entry", "a named exception")] = False

    before: Annotated[tuple[SideStep, ...], Field(None, "steps before")] = ()
    after: Annotated[tuple[SideStep, ...], Field(None, "steps after")] = ()
    bake_rule: Annotated[str, Field(None, "bake rule", "the standard that governs the bake")] = ""
    oven_within: Annotated[Time | None, Field(TIME, "oven within", "by the named rule", above=0.0)] = None
    owner_authority: Annotated[
        str, Field(None, "authority of the design owner", "for steel of 1641 MPa or more: document and date")
    ] = ""
    note: Annotated[str, Field(None, "note")] = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Change:
    """What a load changes of its recipe; never written into the recipe."""

    aim: Annotated[Thickness | None, Field(THICKNESS, "aim", above=0.0)] = None
    current_density: Annotated[
        CurrentDensity | None, Field(CURRENT_DENSITY, "current density", above=0.0)
    ] = None
    temperature: Annotated[Temperature | None, Field(TEMPERATURE, "bath temperature")] = None
    soft_start: Annotated[Time | None, Field(TIME, "soft start", low=0.0)] = None
    hold_voltage: Annotated[Voltage | None, Field(VOLTAGE, "voltage of the last stage", above=0.0)] = None
    reverse_density: Annotated[
        CurrentDensity | None, Field(CURRENT_DENSITY, "reverse etch current density", above=0.0)
    ] = None
    reverse_time: Annotated[Time | None, Field(TIME, "reverse etch time", above=0.0)] = None
    strike_ratio: Annotated[Ratio | None, Field(RATIO, "strike", "times the plating current", low=1.0)] = None
    strike_time: Annotated[Time | None, Field(TIME, "strike time", low=0.0)] = None
    why: Annotated[str, Field(None, "reason", "who changed it, and why")] = ""
