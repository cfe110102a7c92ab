"""A material as the shop buys it: alloy, temper, form, strength."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import (
    DENSITY,
    RATIO,
    SPECIFIC_HEAT,
    STRESS,
    TEMPERATURE,
    Density,
    Field,
    SpecificHeat,
    Stress,
    Temperature,
)


@dataclass(frozen=True, slots=True, kw_only=True)
class Material:
    """What a part is made of. `family` is a row of the alloys table, `substrate` one of the substrates table."""

    name: Annotated[str, Field(None, "name")]
    metal: Annotated[
        Literal["aluminium", "steel", "cast-iron", "stainless", "nickel", "copper"], Field(None, "metal")
    ]
    alloy: Annotated[str, Field(None, "alloy", "designation")]
    family: Annotated[str | None, Field(None, "alloy family", "row of the alloys table")] = None
    substrate: Annotated[str | None, Field(None, "substrate", "row of the substrates table")] = None
    temper: Annotated[str, Field(None, "temper or heat treatment")] = ""
    made: Annotated[Literal["wrought", "sand cast", "die cast"], Field(None, "form")] = "wrought"
    density: Annotated[Density, Field(DENSITY, "density", above=0.0)]
    specific_heat: Annotated[SpecificHeat, Field(SPECIFIC_HEAT, "specific heat", above=0.0)]
    tensile_strength: Annotated[
        Stress | None,
        Field(STRESS, "tensile strength", "unknown: treated as the worst case", above=0.0, unknown=True),
    ] = None
    hardness: Annotated[
        float | None, Field(RATIO, "hardness HRC", "plain number", low=0.0, high=70.0, unknown=True)
    ] = None
    case_hardened: Annotated[
        Literal["yes", "no", "unknown"],
        Field(None, "case-hardened", "carburised, nitrided, induction-hardened"),
    ] = "unknown"
    tempering_temperature: Annotated[
        Temperature | None, Field(TEMPERATURE, "tempering temperature", unknown=True)
    ] = None
    worked_after_hardening: Annotated[
        Literal["yes", "no", "unknown"], Field(None, "ground or cold-worked after hardening")
    ] = "unknown"
    source: Annotated[str, Field(None, "source")] = ""
