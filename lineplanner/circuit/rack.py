"""The rack in the circuit: hooks side by side, in series with splines side by side."""

from dataclasses import dataclass
from typing import Literal

from lineplanner.circuit.conductors import bar_resistance, bar_section, resistivity_at
from lineplanner.inputs.case import Case
from lineplanner.inputs.rack import Member
from lineplanner.load import conductor_named
from lineplanner.quantities import (
    AREA,
    LENGTH,
    RESISTANCE,
    RESISTIVITY,
    TEMPERATURE,
    Area,
    Length,
    Resistance,
    Resistivity,
    Temperature,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_PARALLEL = Source("members of one role side by side", Status.DERIVED)
_EVEN = Source("even take-off along the wetted length: half of its resistance counts", Status.DERIVED)
_WARMEST = Source(
    "rack metal taken at bath temperature; hooks at the hotter of bath and shop air", Status.ASSUMPTION
)


@dataclass(frozen=True, slots=True, kw_only=True)
class RackPath:
    """All members of one role, side by side."""

    name: str
    resistance: Resistance
    section: Area
    paths: int
    figure: Figure


def solution_drop(case: Case) -> Length:
    """How far the solution surface lies below the flight bar for this load.

        the load's own entry, else the tank's

    Parameters
        case: load and tank
    Returns
        drop of the solution surface [m]
    Valid
        bar in its saddles
    Source
        load file, line file
    Example
        >>> from types import SimpleNamespace as Record
        >>> solution_drop(Record(load=Record(solution_drop=None), tank=Record(solution_drop=0.15)))
        0.15
    """
    return case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop


def member_length(member: Member) -> Length:
    """Length of a straight rack member.

        L = sqrt(dx^2 + dd^2)

    Parameters
        member: with its two ends in the rack plane
    Returns
        L [m]
    Valid
        straight members
    Source
        geometry
    Example
        >>> hook = Member(name="hook", role="hook", start=(0.0, 0.0), end=(0.0, 1.2), diameter=0.01)
        >>> member_length(hook)
        1.2
    """
    (x0, d0), (x1, d1) = member.start, member.end
    return float(((x1 - x0) ** 2 + (d1 - d0) ** 2) ** 0.5)


def effective_length(member: Member, drop: Length) -> Length:
    """Length of a rack member that counts for the drop to its far end.

        L_eff = L                    hook: carries all of its current from end to end
        L_eff = L_dry + L_wet / 2    spline: gives current off evenly below the surface

    Parameters
        member: hook or spline
        drop: of the solution surface below the flight bar [m]
    Returns
        L_eff [m]
    Valid
        parts hung evenly along the wetted length
    Source
        derived: mean current of an evenly loaded length is half of what enters it
    Example
        Spline of 1.2 m, 0.2 m of it above the surface:

        >>> spline = Member(name="spline", role="spline", start=(0.0, 0.0), end=(0.0, 1.2), diameter=0.01)
        >>> round(effective_length(spline, 0.2), 9)
        0.7
    """
    whole = member_length(member)
    if member.role != "spline" or whole <= 0.0:
        return whole
    top, bottom = sorted((member.start[1], member.end[1]))
    if bottom - top <= 0.0:
        return 0.5 * whole if top > drop else whole
    wet = whole * min(1.0, max(0.0, (bottom - drop) / (bottom - top)))
    return whole - 0.5 * wet


def rack_paths(case: Case, role: Literal["hook", "spline"]) -> RackPath | None:
    """The members of a role as one element; None where the rack names none."""
    members = [m for m in case.rack.members if m.role == role and member_length(m) > 0.0]
    if not members:
        return None
    bath = case.bath.temperature
    rho, story = _resistivity(case, max(bath, case.site.ambient) if role == "hook" else bath)
    drop = solution_drop(case)
    sections = [bar_section(width=m.width, thickness=m.thickness, diameter=m.diameter) for m in members]
    each = [
        bar_resistance(resistivity=rho, length=effective_length(m, drop), section=a)
        for m, a in zip(members, sections, strict=True)
    ]
    resistance = 0.0 if min(each) <= 0.0 else 1.0 / sum(1.0 / r for r in each)
    formula = "1/R = sum A / (rho L)" if role == "hook" else "1/R = sum A / (rho (L_dry + L_wet/2))"
    figure = result(
        f"rack {role}s",
        resistance,
        RESISTANCE,
        f"{role}s side by side",
        formula,
        _PARALLEL if role == "hook" else _EVEN,
        story,
        *_sizes(case, members, sections, drop),
    )
    return RackPath(
        name=f"rack {role}s", resistance=resistance, section=sum(sections), paths=len(members), figure=figure
    )


def _sizes(case: Case, members: list[Member], sections: list[Area], drop: Length) -> list[Figure]:
    entered = Source(f"rack file {case.rack.name}", Status.ENTERED)
    figures = []
    for member, section in zip(members, sections, strict=True):
        figures.append(
            given(f"{member.name}, length that counts", effective_length(member, drop), LENGTH, entered)
        )
        figures.append(given(f"{member.name}, section", section, AREA, entered))
    return figures


def _resistivity(case: Case, temperature: Temperature) -> tuple[Resistivity, Figure]:
    row = conductor_named(case.tables.conductors, case.rack.conductor)
    rho = resistivity_at(
        resistivity=row.resistivity.value,
        coefficient=row.temperature_coefficient.value,
        temperature=temperature,
    )
    figure = result(
        f"resistivity of {row.name}, warm",
        rho,
        RESISTIVITY,
        "resistivity at the metal's temperature",
        "rho = rho20 (1 + alpha (T - T20))",
        Source("IEC 60028, linear law", row.resistivity.status),
        given(
            f"resistivity of {row.name} at 20 degC",
            row.resistivity.value,
            RESISTIVITY,
            row.resistivity.origin,
        ),
        given("working temperature", temperature, TEMPERATURE, _WARMEST),
    )
    return rho, figure
