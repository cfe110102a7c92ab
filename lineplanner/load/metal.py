"""Rack metal, tips and thieves in the solution: what is bare, and what of it is counted."""

import math
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from lineplanner.inputs.memo import Memo
from lineplanner.inputs.rack import Member, Rack, Surface, Thief
from lineplanner.inputs.tables import Conductor, Limits, ProcessDefaults
from lineplanner.quantities import Area, Length, Ratio
from lineplanner.sources import Source, Status

_SURFACE = Source(
    "surface state of the rack file: bare metal counts, film and stop-off do not", Status.ENTERED
)


@dataclass(frozen=True, slots=True, kw_only=True)
class Metal:
    """Rack metal, tips or thieves in the solution: bare area there, and what of it is counted."""

    name: str
    area: Area
    factor: Ratio
    why: str
    source: Source

    @property
    def carrying(self) -> Area:
        return self.area * self.factor


_BY_NAME: Memo[tuple[Conductor, ...], Mapping[str, Conductor]] = Memo(16)


def conductor_named(conductors: tuple[Conductor, ...], name: str) -> Conductor:
    """The row of the conductors table; reading a site has checked that it exists."""
    return _BY_NAME.get(conductors, None, lambda: {c.name: c for c in conductors})[name]


def rack_metal(
    rack: Rack, conductors: tuple[Conductor, ...], limits: Limits, process: ProcessDefaults, drop: Length
) -> Iterator[Metal]:
    """The bare metal of a rack below the solution level, with the share of it that carries current."""
    for member in rack.members:
        area = _perimeter(member) * _length_below(member, drop)
        if area > 0.0:
            surface = member.surface or rack.surface or _own_surface(rack.conductor, conductors)
            factor, source = _factor(surface, limits)
            yield Metal(name=member.name, area=area, factor=factor, why=surface, source=source)
    for row in rack.tips:
        count = sum(1 for i in range(row.count) if row.start[1] + i * row.step[1] > drop)
        if row.bare_area > 0.0 and count:
            metal = conductor_named(conductors, row.conductor).metal
            surface = "titanium" if metal == "titanium" else _tip_surface(rack)
            factor, _ = _factor(surface, limits)
            yield Metal(
                name=f"tips {row.name}",
                area=row.bare_area * count,
                factor=factor * process.tip_factor.value,
                why=surface,
                source=process.tip_factor.origin,
            )


def _tip_surface(rack: Rack) -> Surface:
    """Tips of a stopped-off rack are bare at the point; those of a filmed rack keep their film."""
    return "bare" if rack.surface in (None, "stopped-off", "titanium") else rack.surface


def _own_surface(conductor: str, conductors: tuple[Conductor, ...]) -> Surface:
    return "titanium" if conductor_named(conductors, conductor).metal == "titanium" else "bare"


def _factor(surface: Surface, limits: Limits) -> tuple[Ratio, Source]:
    """What of a surface carries current, and who says so."""
    if surface == "titanium":
        return limits.titanium_rack_factor.value, limits.titanium_rack_factor.origin
    return (1.0 if surface in ("stripped", "bare") else 0.0), _SURFACE


def _perimeter(member: Member) -> Length:
    if member.diameter is not None:
        return math.pi * member.diameter
    return 2.0 * ((member.width or 0.0) + (member.thickness or 0.0))  # the rack's rules ask for both


def _length_below(member: Member, drop: Length) -> Length:
    """Length of a straight member below the solution level."""
    (x0, d0), (x1, d1) = member.start, member.end
    length: float = ((x1 - x0) ** 2 + (d1 - d0) ** 2) ** 0.5
    if d0 <= drop and d1 <= drop:
        return 0.0
    if d0 >= drop and d1 >= drop:
        return length
    return length * (max(d0, d1) - drop) / abs(d1 - d0)


def thief_metal(thief: Thief, process: ProcessDefaults) -> Metal:
    """A thief with the current factor of its file, else of the process."""
    factor = thief.factor if thief.factor is not None else process.tip_factor.value
    source = process.tip_factor.origin if thief.factor is None else _SURFACE
    return Metal(name=thief.name, area=thief.area, factor=factor, why="thief", source=source)
