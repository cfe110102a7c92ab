"""The faces of a part, form by form."""

from dataclasses import dataclass, replace
from typing import Literal

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry.outline import Circle, Line, lines, slot_line
from lineplanner.geometry.pose import Axis
from lineplanner.geometry.round import RoundWall, wall_of
from lineplanner.geometry.surface import BoxShare, Flat, Surface
from lineplanner.geometry.zones import with_zones
from lineplanner.inputs.part import Bore, Hole, HoleRule, Part, Plate, Section, Slot, Stated, Tube, Turned

Array = NDArray[np.float64]


@dataclass(frozen=True, slots=True)
class Opening:
    """A hole, slot, bore or hollow that a face belongs to: diameter and depth in m, and where it is open."""

    diameter: float
    depth: float
    open_low: bool
    open_high: bool
    rule: HoleRule
    plugged: bool = False
    threaded: bool = False
    floor: bool = False

    @property
    def blind(self) -> bool:
        return not (self.open_low and self.open_high)


@dataclass(frozen=True, slots=True)
class Face:
    """A named face; kind says which zones it takes: a flat one polygons, a wall along the axis bands."""

    name: str
    surface: Surface
    kind: Literal["flat", "wall", "edge", "all"]
    opening: Opening | None = None


@dataclass(frozen=True, slots=True)
class Shape:
    """A part as faces. hull (n, 4): points a, b, c and a radius around each square to the axis, in m."""

    part: Part
    axis: Axis
    faces: tuple[Face, ...]
    hull: Array
    volume: float

    @property
    def names(self) -> tuple[str, ...]:
        return tuple(face.name for face in self.faces)

    @property
    def openings(self) -> tuple[Opening, ...]:
        return tuple(f.opening for f in self.faces if f.opening is not None and not f.opening.floor)


def build_shape(part: Part, *, zones: bool = True) -> Shape:
    """The faces of a part whose form is sound; zones: with its stop-off polygons cut out."""
    shape = _build(part)
    return _zoned(shape) if zones else shape


def _build(part: Part) -> Shape:
    match part:
        case Plate():
            return _plate(part)
        case Section():
            return _section(part)
        case Turned():
            return _turned(part)
        case Tube():
            return _tube(part)
        case Stated():
            return _stated(part)


def _zoned(shape: Shape) -> Shape:
    """Cut the stop-off polygons into the flat faces."""
    zoned = {mask.face for mask in shape.part.masks if mask.outline is not None}
    if not zoned:
        return shape
    faces = [
        replace(f, surface=with_zones(f.surface, [m for m in shape.part.masks if m.face == f.name]))
        if f.name in zoned and isinstance(f.surface, Flat)
        else f
        for f in shape.faces
    ]
    return replace(shape, faces=tuple(faces))


def _plate(part: Plate) -> Shape:
    half = part.thickness / 2
    outer, *inner = lines(part.outline)
    faces: list[Face] = []
    front: list[tuple[Line, int]] = [(outer, 1), *((line, -1) for line in inner)]
    back = list(front)
    volume = (outer.area - sum(line.area for line in inner)) * part.thickness
    faces += [Face("edge", wall_of(outer, -half, half), "edge")]
    for line in inner:
        faces.append(
            Face("bore", wall_of(line, -half, half), "edge", _through(line, part.thickness, "process"))
        )
    for name, line, opening in _plate_openings(part):
        floor = half - opening.depth
        front.append((line, -1))
        faces.append(Face(name, wall_of(line, floor, half), "edge", opening))
        if opening.blind:
            faces.append(
                Face(f"{name}-floor", Flat(floor, ((line, 1),)), "flat", replace(opening, floor=True))
            )
        else:
            back.append((line, -1))
        volume -= line.area * opening.depth
    flat = [Face("front", Flat(half, tuple(front)), "flat"), Face("back", Flat(-half, tuple(back)), "flat")]
    return Shape(part, "w", (*flat, *faces), _prism_hull(outer, -half, half), volume)


def _plate_openings(part: Plate) -> list[tuple[str, Line, Opening]]:
    found: list[tuple[str, Line, Opening]] = []
    for number, hole in enumerate(part.holes, 1):
        line = Circle(hole.at, hole.diameter / 2)
        found.append(
            (f"hole-{number}", line, _opening(hole, hole.diameter, part.thickness, threaded=hole.threaded))
        )
    for number, slot in enumerate(part.slots, 1):
        found.append((f"slot-{number}", slot_line(slot), _opening(slot, slot.width, part.thickness)))
    return found


def _opening(hole: Hole | Slot, diameter: float, thickness: float, *, threaded: bool = False) -> Opening:
    through = hole.depth is None
    depth = thickness if hole.depth is None else hole.depth
    return Opening(diameter, depth, through, True, hole.rule, hole.plugged, threaded)


def _through(line: Line, depth: float, rule: HoleRule, *, plugged: bool = False) -> Opening:
    """A hollow open at both ends; of its width counts that of the circle with the same area to edge."""
    return Opening(4 * line.area / line.length, depth, True, True, rule, plugged)


def _section(part: Section) -> Shape:
    half = part.length / 2
    outer, *inner = lines(part.outline)
    inner += [line for hollow in part.hollows for line in lines(hollow)]
    ends = ((outer, 1), *((line, -1) for line in inner))
    walls = [Face("side", wall_of(outer, -half, half), "wall")]
    for name, line in zip(_numbered("bore", len(inner)), inner, strict=True):
        walls.append(Face(name, wall_of(line, -half, half), "wall", _through(line, part.length, part.rule)))
    flat = [Face("bottom", Flat(-half, ends), "flat"), Face("top", Flat(half, ends), "flat")]
    volume = (outer.area - sum(line.area for line in inner)) * part.length
    return Shape(part, "v", (*walls, *flat), _prism_hull(outer, -half, half), volume)


def _tube(part: Tube) -> Shape:
    half = part.length / 2
    outer, inner = Circle((0.0, 0.0), part.diameter / 2), Circle((0.0, 0.0), part.inner_diameter / 2)
    ends = ((outer, 1), (inner, -1))
    bore = _through(inner, part.length, part.rule, plugged=part.plugged)
    faces = (
        Face("side", wall_of(outer, -half, half), "wall"),
        Face("bore", wall_of(inner, -half, half), "wall", bore),
        Face("bottom", Flat(-half, ends), "flat"),
        Face("top", Flat(half, ends), "flat"),
    )
    return Shape(part, "v", faces, _prism_hull(outer, -half, half), (outer.area - inner.area) * part.length)


def _turned(part: Turned) -> Shape:
    axis, radius = np.array([(p.axis, p.radius) for p in part.profile], dtype=float).T
    low, high = float(axis[0]), float(axis[-1])
    rises = np.diff(axis) > 0.0
    pieces = np.column_stack((axis[:-1], radius[:-1], axis[1:], radius[1:]))
    steps = pieces[~rises]
    inside = (steps[:, 0] > low) & (steps[:, 0] < high)  # a step at an end belongs to the end face
    shoulders = np.column_stack(
        (steps[:, 0], np.minimum(steps[:, 1], steps[:, 3]), np.maximum(steps[:, 1], steps[:, 3]))
    )
    walls = [Face("side", RoundWall((0.0, 0.0), pieces[rises], shoulders[inside]), "wall")]
    ends: dict[str, list[tuple[Line, int]]] = {
        "bottom": [(Circle((0.0, 0.0), float(radius[axis == low].max())), 1)],
        "top": [(Circle((0.0, 0.0), float(radius[axis == high].max())), 1)],
    }
    c0, r0, c1, r1 = pieces.T
    volume = float(np.sum(np.pi / 3 * (c1 - c0) * (r0**2 + r0 * r1 + r1**2)))
    for name, bore in zip(_numbered("bore", len(part.bores)), part.bores, strict=True):
        found, mouths, removed = _bore(name, bore, low, high)
        walls += found
        volume -= removed
        for mouth in mouths:
            ends[mouth].append((Circle((0.0, 0.0), bore.diameter / 2), -1))
    flat = [
        Face(name, Flat(at, tuple(ends[name])), "flat")
        for name, at in (("bottom", low), ("top", high))
        if ends[name][0][0].area > 0.0
    ]
    hull = np.column_stack((np.zeros((len(axis), 2)), axis, radius))
    return Shape(part, "v", (*walls, *flat), hull, volume)


def _bore(name: str, bore: Bore, low: float, high: float) -> tuple[list[Face], tuple[str, ...], float]:
    """The faces of a bore, the ends it opens, and the volume it takes."""
    line = Circle((0.0, 0.0), bore.diameter / 2)
    depth = high - low if bore.depth is None else bore.depth
    through, bottom = bore.depth is None, bore.mouth == "bottom"
    opening = Opening(
        bore.diameter, depth, through or bottom, through or not bottom, bore.rule, bore.plugged, bore.threaded
    )
    begin, end = (low, low + depth) if bottom or through else (high - depth, high)
    faces = [Face(name, wall_of(line, begin, end), "wall", opening)]
    if not through:
        floor = end if bottom else begin
        faces.append(Face(f"{name}-floor", Flat(floor, ((line, 1),)), "flat", replace(opening, floor=True)))
    return faces, ("bottom", "top") if through else (bore.mouth,), line.area * depth


def _stated(part: Stated) -> Shape:
    sides = (part.width / 2, part.depth / 2, part.height / 2)
    corners = np.array([(a, b, c) for a in (-1, 1) for b in (-1, 1) for c in (-1, 1)]) * sides
    hull = np.column_stack((corners, np.zeros(8)))
    volume = part.width * part.height * part.depth
    return Shape(part, "v", (Face("all", BoxShare(part.area, corners), "all"),), hull, volume)


def _numbered(word: str, count: int) -> list[str]:
    """`bore` if there is one, `bore-1`, `bore-2` ... if there are more."""
    return [word] if count == 1 else [f"{word}-{number}" for number in range(1, count + 1)]


def _prism_hull(outer: Line, low: float, high: float) -> Array:
    if isinstance(outer, Circle):
        return np.array([(*outer.centre, c, outer.radius) for c in (low, high)])
    points = outer.ring().points
    ends = [np.column_stack((points, np.full(len(points), c), np.zeros(len(points)))) for c in (low, high)]
    return np.concatenate(ends)
