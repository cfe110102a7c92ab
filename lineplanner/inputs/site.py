"""A site: unit system, place, and the default limits it has adopted as its own."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import LENGTH, TEMPERATURE, Field, Length, Temperature


@dataclass(frozen=True, slots=True, kw_only=True)
class Adopted:
    """A default limit that the site made its own: it may stop a plan from then on."""

    limit: Annotated[str, Field(None, "limit", "key of the limits table")]
    adopted_by: Annotated[str, Field(None, "adopted by")]
    adopted_on: Annotated[str, Field(None, "adopted on")]


@dataclass(frozen=True, slots=True, kw_only=True)
class Site:
    """The shop."""

    name: Annotated[str, Field(None, "name")]
    units: Annotated[Literal["metric", "us"], Field(None, "unit system")] = "metric"
    region: Annotated[Literal["us", "eu", "other"], Field(None, "region", "whose limits are quoted")] = (
        "other"
    )
    mist_basis: Annotated[
        Literal["osha", "acgih", "eu"],
        Field(None, "basis of the acid mist limit", "decides the exhaust class"),
    ] = "eu"
    altitude: Annotated[Length, Field(LENGTH, "altitude")]
    ambient: Annotated[Temperature, Field(TEMPERATURE, "hottest air at the rectifiers")]
    first_load: Annotated[str | None, Field(None, "first load", "shown first", ref="load")] = None
    adopted: Annotated[tuple[Adopted, ...], Field(None, "adopted limits", key="adopted")] = ()
