"""A part as it is drawn: form, outline, holes, masks, contact marks, significant faces.

Local frame: u to the right, v up, w towards the viewer. A plate lies in u and v with its thickness along w;
a section, a tube and a turned part have their axis along v. The middle of the thickness and of the length is 0;
a turned part's axis starts at v = 0. Faces are named front, back, edge (plate); side, bore, top, bottom
(section, turned, tube); hole-1 ... and slot-1 ... with -floor for the floor of a blind one; all (stated).
"""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.quantities import (
    ANGLE,
    AREA,
    COUNT,
    LENGTH,
    MASS,
    RATIO,
    Angle,
    Area,
    Field,
    Length,
    Mass,
    Ratio,
)

Point = tuple[
    Annotated[float, Field(LENGTH, "across", "u, to the right")],
    Annotated[float, Field(LENGTH, "up", "v, upwards")],
]
HoleRule = Literal["process", "all", "none"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Vertex:
    """A corner of an outline; the side to the next corner may bulge (sagitta, positive to the right of travel)."""

    at: Annotated[Point, Field(None, "corner")]
    bulge: Annotated[
        Length, Field(LENGTH, "bulge", "height of the arc over the chord to the next corner")
    ] = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Outline:
    """A closed line: corners, or one of the named shapes. Named shapes are centred on the origin."""

    shape: Annotated[
        Literal["points", "rectangle", "rounded-rectangle", "circle", "ring", "slot", "polygon"],
        Field(None, "shape", "points, or a named shape"),
    ]
    points: Annotated[tuple[Vertex, ...], Field(None, "corners", "in order, either way round")] = ()
    width: Annotated[Length | None, Field(LENGTH, "width", "along u", above=0.0)] = None
    height: Annotated[Length | None, Field(LENGTH, "height", "along v", above=0.0)] = None
    radius: Annotated[Length | None, Field(LENGTH, "corner radius", above=0.0)] = None
    diameter: Annotated[
        Length | None, Field(LENGTH, "outer diameter", "of a polygon: over corners", above=0.0)
    ] = None
    inner_diameter: Annotated[Length | None, Field(LENGTH, "inner diameter", "of a ring", above=0.0)] = None
    sides: Annotated[int | None, Field(COUNT, "number of sides", "of a regular polygon", low=3, high=360)] = (
        None
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Hole:
    """A round hole through or into a plate from its front."""

    at: Annotated[Point, Field(None, "centre")]
    diameter: Annotated[Length, Field(LENGTH, "diameter", above=0.0)]
    depth: Annotated[
        Length | None, Field(LENGTH, "depth", "blind; leave out for a through hole", above=0.0)
    ] = None
    threaded: Annotated[bool, Field(None, "tapped", "a 60 degree thread: wall area by its factor")] = False
    plugged: Annotated[bool, Field(None, "plugged or masked", "no solution gets in")] = False
    rule: Annotated[HoleRule, Field(None, "hole rule", "which of its wall carries current")] = "process"


@dataclass(frozen=True, slots=True, kw_only=True)
class Slot:
    """A long hole through or into a plate from its front: straight sides with round ends."""

    at: Annotated[Point, Field(None, "centre")]
    length: Annotated[Length, Field(LENGTH, "overall length", above=0.0)]
    width: Annotated[Length, Field(LENGTH, "width", above=0.0)]
    turn: Annotated[Angle, Field(ANGLE, "turn", "counter-clockwise")] = 0.0
    depth: Annotated[Length | None, Field(LENGTH, "depth", "blind; leave out for through", above=0.0)] = None
    plugged: Annotated[bool, Field(None, "plugged or masked", "no solution gets in")] = False
    rule: Annotated[HoleRule, Field(None, "hole rule", "which of its wall carries current")] = "process"


@dataclass(frozen=True, slots=True, kw_only=True)
class Mask:
    """A stop-off zone: a whole face, a polygon on a flat face, or a band along the axis."""

    face: Annotated[str, Field(None, "face")]
    outline: Annotated[Outline | None, Field(None, "zone on a flat face")] = None
    at: Annotated[Point, Field(None, "centre of the zone")] = (0.0, 0.0)
    start: Annotated[Length | None, Field(LENGTH, "band from", "along the axis")] = None
    end: Annotated[Length | None, Field(LENGTH, "band to", "along the axis")] = None
    kind: Annotated[
        Literal["tape", "lacquer", "wax", "plastisol", "plug", "lead-tape"], Field(None, "stop-off")
    ] = "tape"


@dataclass(frozen=True, slots=True, kw_only=True)
class ContactMark:
    """Where the rack touches: bare after the run, and the way the current comes in."""

    face: Annotated[str, Field(None, "face")]
    count: Annotated[int, Field(COUNT, "number of contacts", low=1, high=1000)] = 1
    area: Annotated[Area, Field(AREA, "area covered by each", low=0.0)] = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Texture:
    """A face, or a band of it, whose true surface is more than the drawn one (thread, knurl, cast skin)."""

    face: Annotated[str, Field(None, "face")]
    factor: Annotated[Ratio, Field(RATIO, "surface factor", "true over drawn area", low=1.0, high=10.0)]
    start: Annotated[Length | None, Field(LENGTH, "band from", "along the axis")] = None
    end: Annotated[Length | None, Field(LENGTH, "band to", "along the axis")] = None
    why: Annotated[str, Field(None, "reason")] = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Common:
    """What every form of part says."""

    name: Annotated[str, Field(None, "name")]
    material: Annotated[str, Field(None, "material", ref="material")]
    mass: Annotated[Mass | None, Field(MASS, "mass", "computed from the drawing if left out", above=0.0)] = (
        None
    )
    surface_factor: Annotated[
        Ratio, Field(RATIO, "surface factor", "of the whole part", low=1.0, high=10.0)
    ] = 1.0
    textures: Annotated[tuple[Texture, ...], Field(None, "rough or threaded faces", key="texture")] = ()
    masks: Annotated[tuple[Mask, ...], Field(None, "stop-off", key="mask")] = ()
    contacts: Annotated[tuple[ContactMark, ...], Field(None, "contact marks", key="contact")] = ()
    significant: Annotated[
        tuple[str, ...], Field(None, "significant faces", "where the thickness is promised; none: all")
    ] = ()
    hang: Annotated[Point, Field(None, "hanging point", "the point of the part that sits on the tip")] = (
        0.0,
        0.0,
    )
    stated_area: Annotated[
        Area | None, Field(AREA, "stated area", "to compare with the drawn one", above=0.0)
    ] = None
    cup: Annotated[
        Literal["none", "down", "up"], Field(None, "cup or closed end", "a hollow that faces down traps gas")
    ] = "none"
    drawing: Annotated[str, Field(None, "drawing number")] = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Plate(Common):
    """A flat part: an outline with thickness, holes and slots."""

    form: Literal["plate"]
    outline: Annotated[Outline, Field(None, "outline")]
    thickness: Annotated[Length, Field(LENGTH, "thickness", above=0.0)]
    holes: Annotated[tuple[Hole, ...], Field(None, "holes", key="hole")] = ()
    slots: Annotated[tuple[Slot, ...], Field(None, "slots", key="slot")] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Section(Common):
    """A bar or profile: an outline in u and w times a length along v; hollows are inner outlines."""

    form: Literal["section"]
    outline: Annotated[Outline, Field(None, "outline")]
    hollows: Annotated[tuple[Outline, ...], Field(None, "hollows", "open at both ends", key="hollow")] = ()
    length: Annotated[Length, Field(LENGTH, "length", above=0.0)]
    rule: Annotated[HoleRule, Field(None, "rule for hollows", "which of the inner wall carries current")] = (
        "process"
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class ProfilePoint:
    """A corner of a turned part's profile."""

    axis: Annotated[Length, Field(LENGTH, "along the axis", "v, from 0 upwards", low=0.0)]
    radius: Annotated[Length, Field(LENGTH, "radius", low=0.0)]


@dataclass(frozen=True, slots=True, kw_only=True)
class Bore:
    """A round bore along the axis of a turned part, from its bottom or its top."""

    diameter: Annotated[Length, Field(LENGTH, "diameter", above=0.0)]
    depth: Annotated[
        Length | None, Field(LENGTH, "depth", "blind; leave out for a through bore", above=0.0)
    ] = None
    mouth: Annotated[Literal["bottom", "top"], Field(None, "open end", "of a blind bore")] = "bottom"
    threaded: Annotated[bool, Field(None, "tapped")] = False
    plugged: Annotated[bool, Field(None, "plugged or masked")] = False
    rule: Annotated[HoleRule, Field(None, "bore rule", "which of its wall carries current")] = "process"


@dataclass(frozen=True, slots=True, kw_only=True)
class Turned(Common):
    """A turned part: radius over axis from bottom to top, straight between the corners, with bores."""

    form: Literal["turned"]
    profile: Annotated[tuple[ProfilePoint, ...], Field(None, "profile", "from bottom to top")]
    bores: Annotated[
        tuple[Bore, ...], Field(None, "bores", "one through, or one from each end", key="bore")
    ] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Tube(Common):
    """A straight round tube."""

    form: Literal["tube"]
    diameter: Annotated[Length, Field(LENGTH, "outer diameter", above=0.0)]
    inner_diameter: Annotated[Length, Field(LENGTH, "inner diameter", above=0.0)]
    length: Annotated[Length, Field(LENGTH, "length", above=0.0)]
    plugged: Annotated[bool, Field(None, "ends plugged", "no solution gets in")] = False
    rule: Annotated[HoleRule, Field(None, "bore rule", "which of the inner wall carries current")] = "process"


@dataclass(frozen=True, slots=True, kw_only=True)
class Stated(Common):
    """A part whose area somebody measured or took from a model; drawn as its box."""

    form: Literal["stated"]
    area: Annotated[Area, Field(AREA, "area", "all of it that gets wet", above=0.0)]
    significant_area: Annotated[Area | None, Field(AREA, "significant area", above=0.0)] = None
    width: Annotated[Length, Field(LENGTH, "width of the box", above=0.0)]
    height: Annotated[Length, Field(LENGTH, "height of the box", above=0.0)]
    depth: Annotated[Length, Field(LENGTH, "depth of the box", above=0.0)]
    measured_by: Annotated[str, Field(None, "measured by", "who gave the area, and how")]


Part = Plate | Section | Turned | Tube | Stated
