"""A bath: what is in the solution, its temperature, and the shop's own coupons."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import (
    CONCENTRATION,
    CURRENT_DENSITY,
    RATIO,
    TEMPERATURE,
    THICKNESS,
    TIME,
    Concentration,
    CurrentDensity,
    Field,
    Temperature,
    Thickness,
    Time,
)

BathKind = Literal["sulfuric", "chromic", "boric-sulfuric", "tartaric-sulfuric", "chrome"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Coupon:
    """A measured run in this bath: what calibrates growth or efficiency."""

    base: Annotated[str, Field(None, "alloy family or substrate")]
    current_density: Annotated[CurrentDensity, Field(CURRENT_DENSITY, "current density", above=0.0)]
    time: Annotated[Time, Field(TIME, "time at it", above=0.0)]
    temperature: Annotated[Temperature, Field(TEMPERATURE, "bath temperature")]
    thickness: Annotated[Thickness, Field(THICKNESS, "measured thickness per side", above=0.0)]
    measured_by: Annotated[str, Field(None, "measured by", "who, when, with what")]


@dataclass(frozen=True, slots=True, kw_only=True)
class Bath:
    """A process solution."""

    name: Annotated[str, Field(None, "name")]
    kind: Annotated[BathKind, Field(None, "kind")]
    family: Annotated[
        Literal["conventional", "mixed-catalyst", "high-speed"] | None, Field(None, "family of a chrome bath")
    ] = None
    temperature: Annotated[Temperature, Field(TEMPERATURE, "temperature", low=253.15, high=373.15)]
    sulfuric_acid: Annotated[
        Concentration | None, Field(CONCENTRATION, "free sulfuric acid", low=0.0, high=600.0)
    ] = None
    chromic_acid: Annotated[
        Concentration | None, Field(CONCENTRATION, "chromic acid", low=0.0, high=600.0)
    ] = None
    sulfate: Annotated[Concentration | None, Field(CONCENTRATION, "sulfate", low=0.0, high=60.0)] = None
    boric_acid: Annotated[Concentration | None, Field(CONCENTRATION, "boric acid", low=0.0, high=60.0)] = None
    dissolved_aluminium: Annotated[
        Concentration | None, Field(CONCENTRATION, "dissolved aluminium", low=0.0, high=60.0)
    ] = None
    trivalent_chromium: Annotated[
        Concentration | None, Field(CONCENTRATION, "trivalent chromium", low=0.0, high=60.0)
    ] = None
    iron: Annotated[Concentration | None, Field(CONCENTRATION, "iron", low=0.0, high=60.0)] = None
    fluoride: Annotated[bool, Field(None, "holds fluoride")] = False
    conductivity_factor: Annotated[
        float, Field(RATIO, "conductivity, measured over table", above=0.0, high=3.0)
    ] = 1.0
    growth: Annotated[
        Literal["720", "growth-dissolution"] | None,
        Field(None, "growth law", "left out: 720 until coupons calibrate the other"),
    ] = None
    coupons: Annotated[tuple[Coupon, ...], Field(None, "coupons", key="coupon")] = ()
