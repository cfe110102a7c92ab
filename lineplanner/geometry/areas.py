"""The three areas of a part, face by face, with the reasons."""

import math
from collections.abc import Iterable
from dataclasses import dataclass
from typing import Annotated

from lineplanner.errors import Quantity
from lineplanner.geometry.counting import Count, Reason, Rules, count
from lineplanner.geometry.faces import Shape
from lineplanner.geometry.outline import CHORD_SAGITTA
from lineplanner.geometry.pose import UPRIGHT, Pose, Slope, height
from lineplanner.geometry.shape import heights, shape_of
from lineplanner.geometry.surface import BoxShare, Flat, StraightWall
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part
from lineplanner.quantities import AREA, LENGTH, RATIO, Area, Field, Ratio


@dataclass(frozen=True, slots=True)
class FaceRow:
    """One face: drawn area and what of it counts, in m^2; factor: true over drawn area; why, in order."""

    face: str
    area: Annotated[Area, Field(AREA, "drawn area")]
    wet_area: Annotated[Area, Field(AREA, "wet area")]
    carrying_area: Annotated[Area, Field(AREA, "carrying area")]
    significant_area: Annotated[Area, Field(AREA, "significant area")]
    factor: Annotated[Ratio, Field(RATIO, "surface factor")]
    why: tuple[Reason, ...] = ()


@dataclass(frozen=True, slots=True)
class Ledger:
    """The faces of a part and their sums in m^2."""

    rows: tuple[FaceRow, ...]
    wet: Annotated[Area, Field(AREA, "wet area")]
    carrying: Annotated[Area, Field(AREA, "carrying area")]
    significant: Annotated[Area, Field(AREA, "significant area")]


@dataclass(frozen=True, slots=True)
class _Counted:
    """A part under the rules: its counts, and its ledger with all of it below the level."""

    shape: Shape
    counts: tuple[Count, ...]
    full: Ledger


_COUNTED: Memo[Part, _Counted] = Memo(1024)
_PARTLY: Memo[Part, Ledger] = Memo(4096)


def ledger(
    part: Part,
    *,
    hole_ratio: float,
    promise_ratio: float,
    thread_factor: float,
    pose: Pose | None = None,
    level: float | None = None,
) -> Ledger:
    """The wet, carrying and significant area of a part, face by face.

    hole_ratio and promise_ratio: depth of a hole that carries current and that thickness is promised for, in
    diameters from each open end; thread_factor: true over drawn wall of a tapped hole. level: height of the
    solution in m, pose.y on the same scale; without a level all of the part is wet. Raises ProblemsError.
    """
    rules = Rules(hole_ratio, promise_ratio, thread_factor)
    counted = _COUNTED.get(part, rules, lambda: _count_all(shape_of(part), rules))
    if level is None:
        return counted.full
    pose = UPRIGHT if pose is None else pose
    depth = level - pose.y
    if heights(counted.shape, pose.turn, edge_on=pose.edge_on)[1] < depth:
        return counted.full
    key = (rules, pose.turn, pose.edge_on, depth)
    return _PARTLY.get(part, key, lambda: _partly(counted, pose, depth))


def _count_all(shape: Shape, rules: Rules) -> _Counted:
    counts = tuple(count(shape, face, rules) for face in shape.faces)
    return _Counted(shape, counts, _summed(_full_row(counted) for counted in counts))


def _summed(rows: Iterable[FaceRow]) -> Ledger:
    listed = tuple(rows)
    return Ledger(
        listed,
        math.fsum(row.wet_area for row in listed),
        math.fsum(row.carrying_area for row in listed),
        math.fsum(row.significant_area for row in listed),
    )


def _full_row(counted: Count) -> FaceRow:
    wet, carrying, significant = (counted.weights @ counted.areas).tolist()
    area = float(counted.areas.sum())
    why = counted.why
    if isinstance(counted.face.surface, Flat) and counted.face.surface.covered is not None:
        why = (*why, _CHORDS)
    return FaceRow(counted.face.name, area, wet, carrying, significant, counted.factor, why)


def _partly(counted: _Counted, pose: Pose, depth: float) -> Ledger:
    shape = counted.shape
    slope = height(shape.part.hang, pose.turn, edge_on=pose.edge_on, axis=shape.axis)
    full = counted.full.rows
    return _summed(_cut_row(c, row, slope, depth) for c, row in zip(counted.counts, full, strict=True))


def _cut_row(counted: Count, full: FaceRow, slope: Slope, depth: float) -> FaceRow:
    surface = counted.face.surface
    below = surface.below(counted.cuts, slope, depth)
    if (below >= counted.areas * _ALL).all():
        return full
    wet, carrying, significant = (counted.weights @ below).tolist()
    under = float(below.sum())
    dry = Reason("dry-above-level", {"area": Quantity(full.area - under, AREA)})
    why = [dry, *full.why]
    if isinstance(surface, BoxShare):
        why.append(Reason("box-share", {"share": Quantity(under / full.area, RATIO)}))
    elif _has_chords(surface) and under > 0.0 and _CHORDS not in full.why:
        why.append(_CHORDS)
    return FaceRow(full.face, full.area, wet, carrying, significant, full.factor, tuple(why))


def _has_chords(surface: object) -> bool:
    """Whether a level cuts chords of this face instead of its arcs."""
    if isinstance(surface, Flat):
        return surface.covered is not None or surface.curved
    return isinstance(surface, StraightWall) and surface.curved


_ALL = 1 - 1e-12  # what a sum of rounded parts may fall short of the whole
_CHORDS = Reason("chords", {"within": Quantity(CHORD_SAGITTA, LENGTH)})
