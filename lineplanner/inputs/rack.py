"""A rack: metal members, tips, thieves, and what of its surface is bare.

Rack plane: x to the right, drop downwards from the underside of the flight bar.
"""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import (
    AREA,
    COUNT,
    CURRENT,
    LENGTH,
    MASS,
    RATIO,
    Area,
    Current,
    Field,
    Length,
    Mass,
    Ratio,
)

Spot = tuple[
    Annotated[float, Field(LENGTH, "x", "to the right")],
    Annotated[float, Field(LENGTH, "drop", "down from the flight bar")],
]
Surface = Literal["stripped", "coated", "titanium", "stopped-off", "bare"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Member:
    """A straight piece of the rack: flat bar (width, thickness) or round (diameter)."""

    name: Annotated[str, Field(None, "name")]
    role: Annotated[
        Literal["hook", "spline", "crossbar", "frame"],
        Field(None, "role", "hooks and splines carry the current; hooks in series with splines"),
    ]
    start: Annotated[Spot, Field(None, "from")]
    end: Annotated[Spot, Field(None, "to")]
    width: Annotated[Length | None, Field(LENGTH, "width", above=0.0)] = None
    thickness: Annotated[Length | None, Field(LENGTH, "thickness", above=0.0)] = None
    diameter: Annotated[Length | None, Field(LENGTH, "diameter", above=0.0)] = None
    surface: Annotated[Surface | None, Field(None, "surface", "if other than the rack's")] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class TipRow:
    """Tips in a row; the first is NAME1. One part hangs on one tip, or on several if it needs them."""

    name: Annotated[str, Field(None, "row")]
    count: Annotated[int, Field(COUNT, "tips", low=1, high=500)]
    start: Annotated[Spot, Field(None, "first tip")]
    step: Annotated[Spot, Field(None, "step to the next tip")] = (0.0, 0.0)
    kind: Annotated[Literal["spring", "clamp", "bolt", "hook", "wire"], Field(None, "kind")]
    conductor: Annotated[str, Field(None, "tip material", "row of the conductors table")]
    contacts: Annotated[int, Field(COUNT, "contact points of one tip", low=1, high=20)] = 1
    rated_current: Annotated[Current | None, Field(CURRENT, "rated current of one contact", above=0.0)] = None
    bare_area: Annotated[Area, Field(AREA, "bare area of one tip in the solution", low=0.0)] = 0.0
    side: Annotated[Literal["front", "back", "both"], Field(None, "side")] = "front"


@dataclass(frozen=True, slots=True, kw_only=True)
class Thief:
    """Metal hung to take current from edges (thief, robber, dummy end)."""

    name: Annotated[str, Field(None, "name")]
    area: Annotated[Area, Field(AREA, "area in the solution", above=0.0)]
    factor: Annotated[
        Ratio | None,
        Field(RATIO, "current factor", "against the part; left out: that of the process", above=0.0),
    ] = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Rack:
    """A rack as it hangs on the flight bar."""

    name: Annotated[str, Field(None, "name")]
    conductor: Annotated[str, Field(None, "rack material", "row of the conductors table")]
    surface: Annotated[
        Surface | None,
        Field(None, "surface of the rack metal", "an aluminium rack must say: stripped or coated by film"),
    ] = None
    width: Annotated[Length, Field(LENGTH, "width", above=0.0)]
    height: Annotated[Length, Field(LENGTH, "height", above=0.0)]
    mass: Annotated[Mass | None, Field(MASS, "mass", above=0.0)] = None
    hanging: Annotated[Literal["tips", "free"], Field(None, "hanging", "free: bolted or wired anywhere")] = (
        "tips"
    )
    grid: Annotated[Length, Field(LENGTH, "grid step of free positions", above=0.0)] = 0.005
    members: Annotated[tuple[Member, ...], Field(None, "members", key="member")] = ()
    tips: Annotated[tuple[TipRow, ...], Field(None, "rows of tips", key="tip_row")] = ()
    thieves: Annotated[tuple[Thief, ...], Field(None, "thieves", key="thief")] = ()
    rated_current: Annotated[Current | None, Field(CURRENT, "rated current of the rack", above=0.0)] = None
    contact_current: Annotated[
        Current | None, Field(CURRENT, "rated current of one contact at a free position", above=0.0)
    ] = None
