"""A load as a picture in the rack plane: all that is to be drawn, in metres, y up from the flight bar."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace
from typing import Literal, NamedTuple

import numpy as np
from numpy.typing import NDArray

from lineplanner.geometry import Pose, extent, shape_of, silhouette
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import Tip, parts_hung, spots_of, tip_names, tip_places
from lineplanner.inputs.load import Hang
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Member, Rack
from lineplanner.plan import Plan
from lineplanner.quantities import Length
from lineplanner.report.picture_zones import FINE, Zone, edges_of, zones_of

Array = NDArray[np.float64]
Indices = NDArray[np.int32]
Flags = NDArray[np.bool_]
Box = tuple[Length, Length, Length, Length]
Wetness = Literal["wet", "partly wet", "dry"]
Direction = Literal["left", "right", "up", "down"]

LEVEL_LABEL = "solution level"
BAR_LABEL = "flight bar"
_DIRECTIONS: dict[str, tuple[int, int]] = {"left": (-1, 0), "right": (1, 0), "up": (0, 1), "down": (0, -1)}
_EVEN: Length = 1e-9  # the level is taken to this
_ASIDE = 2.0  # how much farther off a neighbour to the side counts than one straight ahead


_MEMBERS: Memo[Rack, "list[Array]"] = Memo(64)


class Hung(NamedTuple):
    """One part as it hangs; owner is its row in the picture, number its label, twin what hangs behind or before it.

    box is left, low, right and high of its outline, at its hanging point; both in m. close says that it overlaps
    another part, or is nearer to one than the recipe allows.
    """

    owner: int
    number: int
    item: str
    part: str
    tip: str
    hang: int
    position: int
    wetness: Wetness
    side: Literal["front", "back"]
    masked: bool
    at: tuple[Length, Length]
    box: Box
    twin: int | None = None
    close: bool = False

    @property
    def centre(self) -> tuple[Length, Length]:
        return (self.box[0] + self.box[2]) / 2, (self.box[1] + self.box[3]) / 2

    @property
    def labels(self) -> tuple[str, ...]:
        """What may stand on the part, fullest first: its number, b for the back, whether it is dry."""
        short = f"{self.number}{'b' if self.side == 'back' else ''}{'!' if self.close else ''}"
        full = [f"{short} dry"] if self.wetness == "dry" else []
        if self.twin is not None and self.side == "front":
            behind = f"{short} {self.twin + 1}b"
            full = [f"{behind} dry", behind] if full else [behind]
            full += [f"{short}+b"]
        return (*full, short, *(["!"] if self.close else []))


@dataclass(frozen=True, slots=True, kw_only=True)
class Scene:
    """A load as drawn. Edges are x, y to x, y: shape (n, 4) in m; those of one part lie between two starts.

    zones are stop-off, zone_ids say which of them an edge bounds; of each zone zone_owner tells the part and
    zone_seen whether it faces the viewer. Tips are points (n, 2); contacts are where parts are held.
    """

    parts: tuple[Hung, ...]
    edges: Array
    owners: Indices
    starts: Indices
    zones: Array
    zone_ids: Indices
    zone_owner: Indices
    zone_seen: Flags
    members: Array
    member_ids: Indices
    member_names: tuple[str, ...]
    tips: Array
    tip_names: tuple[str, ...]
    tip_taken: Flags
    contacts: Array
    thieves: tuple[str, ...]
    counted: tuple[str, ...]
    level: Length
    frame: Box
    extent: Box

    @property
    def aside(self) -> tuple[str, ...]:
        """What belongs to the load and has no place in the picture."""
        return (*self.counted, *self.thieves)

    @property
    def back_first(self) -> Indices:
        """Owners in the order of drawing."""
        front = np.array([hung.side == "front" for hung in self.parts], dtype=bool)
        return np.argsort(front, kind="stable").astype(np.int32)

    def slice_of(self, owner: int) -> slice:
        """Where the edges of a part lie."""
        return slice(int(self.starts[owner]), int(self.starts[owner + 1]))

    def moved(self, owner: int, across: Length, up: Length) -> "Scene":
        """The picture with one part moved by a distance in m; what is wet is for a new plan to say."""
        by, hung = np.array([across, up, across, up]), self.parts[owner]
        edges, zones, contacts = self.edges.copy(), self.zones.copy(), self.contacts.copy()
        edges[self.slice_of(owner)] += by
        if len(zones):
            zones[self.zone_owner[self.zone_ids] == owner] += by
        contacts[owner] += by[:2]
        left, low, right, high = (float(value) for value in np.array(hung.box) + by)
        shifted = hung._replace(
            at=(hung.at[0] + across, hung.at[1] + up), box=(left, low, right, high), twin=None
        )
        parts = [one._replace(twin=None) if one.owner == hung.twin else one for one in self.parts]
        parts[owner] = shifted
        room = _around([self.extent, shifted.box])
        return replace(self, parts=tuple(parts), edges=edges, zones=zones, contacts=contacts, extent=room)

    def neighbour(self, owner: int | None, direction: Direction) -> int | None:
        """The nearest part in a direction; the first part where none is chosen, None where there is none."""
        if owner is None or not 0 <= owner < len(self.parts):
            return 0 if self.parts else None
        here, right_up = self.parts[owner], _DIRECTIONS[direction]
        offsets = np.array([one.centre for one in self.parts]) - here.centre
        ahead = offsets @ right_up
        beside = np.abs(offsets @ (right_up[1], right_up[0]))
        far = np.round(ahead + _ASIDE * beside, 6)
        far[ahead <= np.maximum(beside / 2, 1e-6)] = np.inf
        if np.isinf(far).all():
            return None
        near = [int(i) for i in np.flatnonzero(far == far.min())]
        return min(near, key=lambda i: (self.parts[i].side != here.side, i))


def scene_of(plan: Plan) -> Scene:
    """The picture of a plan's load."""
    case = plan.case
    drop = case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop
    places = tip_places(case.rack)
    hangs = _hangings(case, places, drop)
    parts: list[Hung] = []
    for hanging in hangs:
        parts += hanging.parts(len(parts))
    for number in {number for pair in (*plan.gaps.overlapping, *plan.gaps.near) for number in pair}:
        parts[number - 1] = parts[number - 1]._replace(close=True)
    edges = _joined([_tiled(hanging.drawn.outline, hanging.shifts) for hanging in hangs])
    lengths = [n for hanging in hangs for n in [len(hanging.drawn.outline)] * hanging.count]
    owners = np.repeat(np.arange(len(parts), dtype=np.int32), lengths)
    members = _MEMBERS.get(case.rack, "", lambda: [_member_edges(member) for member in case.rack.members])
    tips, taken = tuple(places.values()), _taken(case.load.hangs)
    frame = (0.0, -case.rack.height, case.rack.width, 0.0)
    zones, zone_ids, zone_owner, zone_seen = _zones(hangs)
    return Scene(
        parts=tuple(parts),
        edges=edges,
        owners=owners,
        starts=np.concatenate(([0], np.cumsum(lengths))).astype(np.int32),
        zones=zones,
        zone_ids=zone_ids,
        zone_owner=zone_owner,
        zone_seen=zone_seen,
        members=_joined(members),
        member_ids=np.repeat(np.arange(len(members), dtype=np.int32), [len(m) for m in members]),
        member_names=tuple(member.name for member in case.rack.members),
        tips=np.array([(tip.x, -tip.drop) for tip in tips], dtype=float).reshape(-1, 2),
        tip_names=tuple(tip.name for tip in tips),
        tip_taken=np.array([tip.name in taken for tip in tips], dtype=bool),
        contacts=np.array([hung.at for hung in parts], dtype=float).reshape(-1, 2),
        thieves=tuple(f"thief: {t.name}" for t in (*case.rack.thieves, *case.load.thieves)),
        counted=tuple(
            f"only counted: {parts_hung(hang)} x {case.parts[hang.part].name}"
            for hang in case.load.hangs
            if hang.count is not None
        ),
        level=-drop,
        frame=frame,
        extent=_around(
            [
                frame,
                (0.0, -drop, 0.0, -drop),
                *(hung.box for hung in parts),
                *((tip.x, -tip.drop, tip.x, -tip.drop) for tip in tips),
            ]
        ),
    )


@dataclass(frozen=True, slots=True)
class _Drawn:
    """A part as it hangs at the origin: its outline (n, 4) and extent in m, its stop-off."""

    outline: Array
    box: Box
    zones: list[Zone]
    masked: bool


def _drawn(part: Part, hang: Hang) -> _Drawn:
    pose, shape = Pose(0.0, 0.0, hang.turn, hang.facing == "edge-on"), shape_of(part)
    return _Drawn(
        outline=edges_of(silhouette(part, pose, FINE)),
        box=extent(shape, pose),
        zones=zones_of(part, pose),
        masked=bool(part.masks) or any(opening.plugged for opening in shape.openings),
    )


@dataclass(frozen=True, slots=True)
class _Hanging:
    """One hang with the places of its parts: spots (x, drop) and solution drop in m."""

    number: int
    hang: Hang
    item: str
    drawn: _Drawn
    spots: tuple[tuple[Length, Length], ...]
    drop: Length

    @property
    def sides(self) -> tuple[Literal["front", "back"], ...]:
        return ("front", "back") if self.hang.side == "both" else (self.hang.side,)

    @property
    def count(self) -> int:
        return len(self.spots) * len(self.sides)

    @property
    def shifts(self) -> Array:
        """What brings a part from the origin to each of its places, side by side: shape (count, 4)."""
        at = [(x, -down, x, -down) for x, down in self.spots for _ in self.sides]
        return np.array(at).reshape(-1, 4)

    def parts(self, first: int) -> list[Hung]:
        """Its parts, numbered on from an owner."""
        left, low, right, high = self.drawn.box
        names, each, sides = tip_names(self.hang), self.hang.tips_each, self.sides
        item, part, hang, masked = self.item, self.hang.part, self.number, self.drawn.masked
        tips = names if each == 1 else [" ".join(names[at : at + each]) for at in range(0, len(names), each)]
        found: list[Hung] = []
        owner = first
        for position, (x, down) in enumerate(self.spots):
            # of the solution above the hanging point, as the areas take it
            level = round(down - self.drop, 9)
            wetness: Wetness = "wet" if high <= level else "dry" if low >= level - _EVEN else "partly wet"
            at, box = (x, -down), (x + left, low - down, x + right, high - down)
            tip = tips[position] if position < len(tips) else ""
            for place, side in enumerate(sides):
                found.append(
                    Hung(
                        owner=owner + place,
                        number=owner + place + 1,
                        item=item,
                        part=part,
                        tip=tip,
                        hang=hang,
                        position=position,
                        wetness=wetness,
                        side=side,
                        masked=masked,
                        at=at,
                        box=box,
                        twin=None if len(sides) == 1 else owner + 1 - place,
                    )
                )
            owner += len(sides)
        return found


def _hangings(case: Case, places: Mapping[str, Tip], drop: Length) -> list[_Hanging]:
    """The hangs whose parts have places; parts of one drawing hung alike are drawn once."""
    drawn: dict[tuple[str, float, str], _Drawn] = {}
    found: list[_Hanging] = []
    for number, hang in enumerate(case.load.hangs):
        if hang.count is not None:
            continue
        part, kind = case.parts[hang.part], (hang.part, hang.turn, hang.facing)
        if kind not in drawn:
            drawn[kind] = _drawn(part, hang)
        found.append(_Hanging(number, hang, part.name, drawn[kind], spots_of(hang, places), drop))
    return found


def _zones(hangs: list[_Hanging]) -> tuple[Array, Indices, Indices, Flags]:
    """The stop-off of all parts: edges, their zones, and of each zone its part and whether it is seen."""
    edges: list[Array] = []
    sizes: list[int] = []
    owners: list[int] = []
    seen: list[bool] = []
    owner = 0
    for hanging in hangs:
        for zone in hanging.drawn.zones:
            edges.append(_tiled(zone.edges, hanging.shifts))
            sizes += [len(zone.edges)] * hanging.count
            owners += range(owner, owner + hanging.count)
            seen += [zone.seen] * hanging.count
        owner += hanging.count
    ids = np.repeat(np.arange(len(sizes), dtype=np.int32), sizes)
    return _joined(edges), ids, np.array(owners, dtype=np.int32), np.array(seen, dtype=bool)


def _taken(hangs: tuple[Hang, ...]) -> set[str]:
    return {name for hang in hangs for name in tip_names(hang)}


def _member_edges(member: Member) -> Array:
    """A straight piece as a rectangle, its width in the rack plane."""
    (x0, d0), (x1, d1) = member.start, member.end
    half = (member.diameter if member.diameter is not None else member.width or 0.0) / 2
    along = np.array([x1 - x0, d0 - d1])
    length = float(np.hypot(*along))
    aside = half * np.array([-along[1], along[0]]) / length if length > 0.0 else np.array([half, 0.0])
    start, end = np.array([x0, -d0]), np.array([x1, -d1])
    return edges_of([np.array([start - aside, end - aside, end + aside, start + aside])])


def _tiled(edges: Array, shifts: Array) -> Array:
    """The same edges at each place, place by place."""
    return (edges[None, :, :] + shifts[:, None, :]).reshape(-1, 4)


def _joined(edges: list[Array]) -> Array:
    return np.concatenate(edges) if edges else np.empty((0, 4))


def _around(boxes: Iterable[Box]) -> Box:
    """The box around all boxes."""
    lefts, lows, rights, highs = zip(*boxes, strict=True)
    return min(lefts), min(lows), max(rights), max(highs)
