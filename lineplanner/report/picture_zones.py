"""Stop-off of a part as zones in the rack plane, about its hanging point."""

import math
from collections.abc import Iterable, Iterator
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry import Pose, drawing_rings, shape_of, silhouette
from lineplanner.geometry.outline import Circle, Line, slot_line
from lineplanner.geometry.surface import Flat
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Mask, Part, Plate
from lineplanner.quantities import Length

Array = NDArray[np.float64]

# Chords of a drawing stay within this of their arc, in m: less than a dot of a terminal shows (design rule).
FINE: Length = 2e-4
_TURN_STEP = math.tau / 8

_ZONES: Memo[Part, "list[tuple[Array, bool]]"] = Memo(1024)


@dataclass(frozen=True, slots=True)
class Zone:
    """A stop-off zone: closed edges (n, 4) in m, and whether it is on what faces the viewer."""

    edges: Array
    seen: bool


def edges_of(rings: Iterable[Array]) -> Array:
    """Closed lines of points (n, 2) as edges (n, 4)."""
    sides = [np.hstack((ring, np.roll(ring, -1, axis=0))) for ring in rings if len(ring)]
    return np.concatenate(sides) if sides else np.empty((0, 4))


def zones_of(part: Part, pose: Pose) -> list[Zone]:
    """What of a part is stopped off as the viewer sees it, hung at the origin; ends and bores do not show."""
    upright = _ZONES.get(part, pose.edge_on, lambda: list(_upright(part, edge_on=pose.edge_on)))
    sine, cosine = math.sin(pose.turn), math.cos(pose.turn)
    spin = np.array([(cosine, sine), (-sine, cosine)])
    return [Zone((edges.reshape(-1, 2) @ spin).reshape(-1, 4), seen) for edges, seen in upright]


def _upright(part: Part, *, edge_on: bool) -> Iterator[tuple[Array, bool]]:
    """Zones about the hanging point before any turn in the rack plane."""
    if isinstance(part, Plate) and not edge_on:
        yield from _on_plate(part)
        return
    outline = silhouette(part, Pose(edge_on=edge_on), FINE)
    for mask in part.masks:
        if mask.face in ("side", "edge", "all"):
            yield edges_of(_banded(outline, mask, part.hang[1])), True


def _banded(outline: list[Array], mask: Mask, hang: Length) -> list[Array]:
    """What of a side view lies in a band along the axis, or all of it."""
    if mask.start is None or mask.end is None:
        return outline
    low, high = mask.start - hang, mask.end - hang
    return [_below(_below(ring, high, 1.0), low, -1.0) for ring in outline]


def _below(ring: Array, level: Length, sign: float) -> Array:
    """A closed line cut at a level: what is below it (sign 1) or above it (sign -1)."""
    points: list[Array] = []
    depths = sign * (level - ring[:, 1])
    for here, there, d0, d1 in zip(ring, np.roll(ring, -1, axis=0), depths, np.roll(depths, -1), strict=True):
        if d0 >= 0.0:
            points.append(here)
        if d0 * d1 < 0.0:
            points.append(here + (there - here) * d0 / (d0 - d1))
    return np.array(points).reshape(-1, 2)


def _on_plate(part: Plate) -> Iterator[tuple[Array, bool]]:
    """Zones on the faces of a flat plate, and openings that are plugged or masked."""
    openings = _openings(part)
    masked = {mask.face for mask in part.masks if mask.outline is None}
    for face in shape_of(part).faces:
        if not isinstance(face.surface, Flat):
            continue
        if face.name in masked:
            yield _about(part, edges_of(_rings(line for line, _ in face.surface.lines))), face.name != "back"
        elif face.surface.covered is not None:
            covered = face.surface.covered
            yield _about(part, np.hstack((covered.starts, covered.ends))), face.name != "back"
    for name, (line, plugged) in openings.items():
        if plugged or name in masked:
            yield _about(part, edges_of(_rings([line]))), True
    if "bore" in masked:
        yield _about(part, edges_of(drawing_rings(part.outline, FINE)[1:])), True


def _openings(part: Plate) -> dict[str, tuple[Line, bool]]:
    holes = {
        f"hole-{number}": (Circle(hole.at, hole.diameter / 2), hole.plugged)
        for number, hole in enumerate(part.holes, 1)
    }
    slots = {f"slot-{number}": (slot_line(slot), slot.plugged) for number, slot in enumerate(part.slots, 1)}
    return {**holes, **slots}


def _rings(lines: Iterable[Line]) -> list[Array]:
    return [line.ring(FINE, _TURN_STEP).points for line in lines]


def _about(part: Part, edges: Array) -> Array:
    """Edges in the part's own frame brought to its hanging point."""
    moved: Array = edges - np.array([*part.hang, *part.hang])
    return moved
