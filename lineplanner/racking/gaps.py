"""Gaps between the parts of a load, by their outlines in the rack plane, one side of the rack at a time."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, NamedTuple

import numpy as np
import shapely
from numpy.typing import NDArray
from shapely import Polygon, STRtree
from shapely.affinity import translate

from lineplanner.geometry import Pose, extent, shape_of, silhouette
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import spots_of, tip_places
from lineplanner.inputs.load import Hang
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Rack
from lineplanner.quantities import Angle, Length

Array = NDArray[np.float64]
Indices = NDArray[np.int64]
Pair = tuple[int, int]
"""Two parts by their numbers as the picture and the card count them, from 1."""

_FINE: Length = 5e-5  # chords stay within this of their arc: a gap is not wider than so much more
_TOUCH: Length = 1e-6  # outlines that meet by less than this do not overlap
_DIGITS = 7  # decimals of an offset or a gap in m: what is smaller is noise
_SOME = 24  # pairs that are measured first, to know how far to look
_OUTLINES: Memo[Part, Polygon] = Memo(1024)
_DISTANCES: Memo[Part, tuple[Part, Length]] = Memo(8192)


class Kind(NamedTuple):
    """How a part hangs, apart from where."""

    part: Part
    turn: Angle
    edge_on: bool

    @property
    def key(self) -> tuple[int, Angle, bool]:
        """Equal for kinds of the same record; the record has to be kept beside it."""
        return id(self.part), self.turn, self.edge_on


class _Side(NamedTuple):
    """The parts on one side of the rack: their numbers, kinds by index, hanging points (n, 2) in m, y up."""

    numbers: Indices
    kinds: Indices
    points: Array


@dataclass(frozen=True, slots=True, kw_only=True)
class Gaps:
    """The least gap in m between two parts of one side, and which they are; None where no two hang there.

    overlapping and near are the pairs whose outlines overlap, and those closer than what was asked for.
    """

    least: Length | None = None
    between: Pair | None = None
    overlapping: tuple[Pair, ...] = ()
    near: tuple[Pair, ...] = ()


class _Kept(NamedTuple):
    """Gaps with the records that they were measured on, besides the entries of the load."""

    rack: Rack
    parts: tuple[Part, ...]
    gaps: Gaps


_GAPS: Memo[tuple[Hang, ...], _Kept] = Memo(256)


def gaps_of(case: Case, wanted: Length = 0.0) -> Gaps:
    """The gaps of a load; wanted is the least gap in m that the recipe asks for.

    A part is taken as its outer outline: what hangs inside the opening of another counts as overlapping.
    """
    hangs = case.load.hangs
    parts = tuple(case.parts[hang.part] for hang in hangs)
    kept = _GAPS.get(hangs, wanted, lambda: _Kept(case.rack, parts, _measured(case, wanted)))
    same = kept.rack is case.rack and all(one is other for one, other in zip(kept.parts, parts, strict=True))
    return kept.gaps if same else _measured(case, wanted)


def _measured(case: Case, wanted: Length) -> Gaps:
    kinds, sides = _sides(case)
    least: tuple[Length, Pair] | None = None
    overlapping: list[Pair] = []
    near: list[Pair] = []
    for side in sides:
        pairs, gaps = _pairs(side, kinds, wanted)
        if not len(gaps):
            continue
        first = int(np.argmin(gaps))
        if least is None or gaps[first] < least[0]:
            least = float(gaps[first]), _pair(pairs[first])
        overlapping += [_pair(pair) for pair in pairs[gaps < 0.0]]
        near += [_pair(pair) for pair in pairs[(gaps >= 0.0) & (gaps < wanted)]]
    if least is None:
        return Gaps()
    return Gaps(
        least=max(least[0], 0.0),
        between=least[1],
        overlapping=tuple(sorted(overlapping)),
        near=tuple(sorted(near)),
    )


def _pair(numbers: Indices) -> Pair:
    return int(numbers[0]), int(numbers[1])


def _sides(case: Case) -> tuple[list[Kind], list[_Side]]:
    """Every part that has a place, numbered as in the picture: the kinds, and the parts side by side."""
    places, number = tip_places(case.rack), 0
    kinds: dict[tuple[int, Angle, bool], int] = {}
    known: list[Kind] = []
    columns: dict[str, list[Array]] = {"front": [], "back": []}
    for hang in case.load.hangs:
        if hang.count is not None:
            continue
        kind = kind_of(case, hang)
        if kind.key not in kinds:
            kinds[kind.key] = len(known)
            known.append(kind)
        sides = ("front", "back") if hang.side == "both" else (hang.side,)
        spots = np.array(spots_of(hang, places)).reshape(-1, 2)
        for place, side in enumerate(sides):
            numbers = number + 1 + place + len(sides) * np.arange(len(spots))
            index = np.full(len(spots), kinds[kind.key])
            columns[side].append(np.column_stack((numbers, index, spots[:, 0], -spots[:, 1])))
        number += len(sides) * len(spots)
    found = []
    for held in columns.values():
        rows = np.concatenate(held) if held else np.empty((0, 4))
        found.append(_Side(rows[:, 0].astype(np.int64), rows[:, 1].astype(np.int64), rows[:, 2:]))
    return known, found


def _pairs(side: _Side, kinds: Sequence[Kind], wanted: Length) -> tuple[Indices, Array]:
    """Numbers (m, 2) and gaps (m) of all pairs that may have the least gap, or one below what is wanted.

    Boxes are never farther apart than the outlines in them: the least gap is among boxes that are as near as
    the nearest outlines of some parts that follow each other. A gap below 0 is an overlap.
    """
    if len(side.numbers) < 2:
        return np.empty((0, 2), dtype=np.int64), np.empty(0)
    at_origin = np.array([box_of(kind) for kind in kinds])
    edges = at_origin[side.kinds] + np.hstack((side.points, side.points))
    some = np.arange(0, len(side.numbers) - 1, max(len(side.numbers) // _SOME, 1))
    bound = max(float(_gaps(side, kinds, some, some + 1).min()), wanted, 0.0) + _TOUCH
    boxes: Any = shapely.box(*edges.T)
    around: Any = shapely.box(*(edges + bound * np.array((-1.0, -1.0, 1.0, 1.0))).T)
    one, other = STRtree(boxes).query(around)
    one, other = one[one < other], other[one < other]
    return np.column_stack((side.numbers[one], side.numbers[other])), _gaps(side, kinds, one, other)


def _gaps(side: _Side, kinds: Sequence[Kind], one: Indices, other: Indices) -> Array:
    """The gap of each pair; neighbours of one kind at one offset are measured once."""
    steps = np.round((side.points[other] - side.points[one]) * 10**_DIGITS).astype(np.int64)
    alike = np.column_stack((side.kinds[one], side.kinds[other], steps))
    order = np.lexsort(alike.T)
    first = np.ones(len(order), dtype=bool)
    first[1:] = (np.diff(alike[order], axis=0) != 0).any(axis=1)
    found = [_gap(kinds[i], kinds[j], across, up) for i, j, across, up in alike[order[first]].tolist()]
    gaps = np.empty(len(order))
    gaps[order] = np.array(found)[np.cumsum(first) - 1]
    return gaps


def kind_of(case: Case, hang: Hang) -> Kind:
    """The kind of the parts of an entry."""
    return Kind(case.parts[hang.part], hang.turn, hang.facing == "edge-on")


def box_of(kind: Kind) -> tuple[Length, Length, Length, Length]:
    """Left, low, right, high of a part hung at the origin, in m."""
    return extent(shape_of(kind.part), _pose(kind))


def gap(one: Kind, other: Kind, across: Length, up: Length) -> Length:
    """The distance in m of two outlines, the second hung so far off the first; -1 where they overlap."""
    return _gap(one, other, round(across * 10**_DIGITS), round(up * 10**_DIGITS))


def _gap(one: Kind, other: Kind, across: int, up: int) -> Length:
    """The same with offsets in steps of the last decimal; each is measured once."""
    key = (*one.key, *other.key, across, up)
    step = 10.0**-_DIGITS
    return _DISTANCES.get(one.part, key, lambda: _apart(one, other, across * step, up * step))[1]


def _pose(kind: Kind) -> Pose:
    return Pose(0.0, 0.0, kind.turn, kind.edge_on)


def _outline(kind: Kind) -> Polygon:
    """The outer outline of a part hung at the origin."""
    return _OUTLINES.get(
        kind.part, (kind.turn, kind.edge_on), lambda: Polygon(silhouette(kind.part, _pose(kind), _FINE)[0])
    )


def _apart(one: Kind, other: Kind, across: Length, up: Length) -> tuple[Part, Length]:
    """The distance, and the other part: as long as it is kept its identity is no other's."""
    first, second = _outline(one), translate(_outline(other), across, up)
    if first.intersects(second) and first.intersection(second).area > _TOUCH**2:
        return other.part, -1.0
    return other.part, round(float(first.distance(second)), _DIGITS)
