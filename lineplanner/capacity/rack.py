"""A program against the rack: heat in air, heat in the bath, drop, and the rating entered for it."""

from collections.abc import Iterator
from dataclasses import dataclass, replace
from typing import Literal

from lineplanner.capacity.demand import firm_current, peak_current, steady_current
from lineplanner.circuit.conductors import (
    bar_perimeter,
    bar_rise,
    bar_section,
    drop_tier_current,
    thermal_current,
)
from lineplanner.circuit.rack import solution_drop
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.inputs.case import Case
from lineplanner.inputs.rack import Member
from lineplanner.inputs.tables import Conductor
from lineplanner.load import conductor_named
from lineplanner.program.stages import Run
from lineplanner.quantities import (
    CURRENT,
    CURRENT_DENSITY,
    TEMPERATURE_DIFFERENCE,
    Area,
    Current,
    HeatTransfer,
    Temperature,
    TemperatureDifference,
)
from lineplanner.sources import Source, Status, weakest


@dataclass(frozen=True, slots=True, kw_only=True)
class _Place:
    """Where a piece of rack gives off its heat, and what it may warm there."""

    name: Literal["air", "bath"]
    surroundings: Temperature
    transfer: HeatTransfer
    rise: TemperatureDifference
    source: Source


def check_rack(run: Run, case: Case) -> tuple[Finding, ...]:
    """Both tiers, always both: what warms the metal in air and in the bath, and what drops in it."""
    entered = Source(f"rack file {case.rack.name}", Status.ENTERED)
    findings = [*_rating(run, case, entered)]
    carriers = [m for m in case.rack.members if m.role in ("hook", "spline")]
    if not carriers:
        return (*findings, note("rack", "rack.unknown", entered, "rack.enter", rack=case.rack.name))
    for role in ("hook", "spline"):
        members = [m for m in carriers if m.role == role]
        if members:
            findings += [*_heat(role, members, run, case), _drop(role, members, run, case)]
    return tuple(findings)


def _rating(run: Run, case: Case, entered: Source) -> Iterator[Finding]:
    rated = case.rack.rated_current
    if rated is None:
        return
    demand = peak_current(run)
    yield upper(
        "rack-rating",
        value=demand,
        limit=rated,
        kind=CURRENT,
        source=entered,
        key="rack-rating",
        fix="rack-rating.fewer",
        demand_firm=firm_current(run),
        rack=case.rack.name,
        demand=Quantity(demand, CURRENT),
        allowed=Quantity(rated, CURRENT),
    )


def _section(member: Member) -> Area:
    return bar_section(width=member.width, thickness=member.thickness, diameter=member.diameter)


def _places(members: list[Member], case: Case) -> Iterator[_Place]:
    """Air for what stands out of the solution, the bath for what reaches into it."""
    limits, drop = case.tables.limits, solution_drop(case)
    if any(min(m.start[1], m.end[1]) < drop or m.role == "hook" for m in members):
        yield _Place(
            name="air",
            surroundings=case.site.ambient,
            transfer=limits.air_transfer.value,
            rise=limits.air_rise.value,
            source=_weaker(limits.air_rise.origin, limits.air_transfer.origin),
        )
    if any(max(m.start[1], m.end[1]) > drop for m in members):
        yield _Place(
            name="bath",
            surroundings=case.bath.temperature,
            transfer=limits.bath_transfer.value,
            rise=limits.bath_rise.value,
            source=_weaker(limits.bath_rise.origin, limits.bath_transfer.origin),
        )


def _weaker(first: Source, second: Source) -> Source:
    return first if weakest(first.status, second.status) == first.status else second


def _heat(role: str, members: list[Member], run: Run, case: Case) -> Iterator[Finding]:
    """The whole current enters at the top: the member that is worst off decides, in air and in the bath."""
    steady = steady_current(run, case.tables.limits.overload_time.value)
    conductor = conductor_named(case.tables.conductors, case.rack.conductor)
    sections = [_section(m) for m in members]
    for place in _places(members, case):
        limits = [_thermal(m, conductor, place) for m in members]
        worst = min(range(len(members)), key=lambda k: limits[k] / sections[k])
        demand = steady * sections[worst] / sum(sections)
        facts: dict[str, Fact] = {
            "role": role,
            "member": members[worst].name,
            "material": conductor.name,
            "demand": Quantity(demand, CURRENT),
            "allowed": Quantity(limits[worst], CURRENT),
            "rise": Quantity(place.rise, TEMPERATURE_DIFFERENCE),
        }
        warms = _rise(members[worst], conductor, place, demand)
        if warms != float("inf"):
            facts["warms"] = Quantity(warms, TEMPERATURE_DIFFERENCE)
        finding = upper(
            f"rack-{place.name}",
            value=demand,
            limit=limits[worst],
            kind=CURRENT,
            source=place.source,
            key=f"rack-{place.name}",
            fix=f"rack-{place.name}.thicker",
        )
        yield replace(finding, facts=facts)


def _thermal(member: Member, conductor: Conductor, place: _Place) -> Current:
    return thermal_current(
        section=_section(member),
        perimeter=bar_perimeter(width=member.width, thickness=member.thickness, diameter=member.diameter),
        resistivity=conductor.resistivity.value,
        coefficient=conductor.temperature_coefficient.value,
        rise=place.rise,
        surroundings=place.surroundings,
        transfer=place.transfer,
    )


def _rise(member: Member, conductor: Conductor, place: _Place, current: Current) -> TemperatureDifference:
    return bar_rise(
        current=current,
        section=_section(member),
        perimeter=bar_perimeter(width=member.width, thickness=member.thickness, diameter=member.diameter),
        resistivity=conductor.resistivity.value,
        coefficient=conductor.temperature_coefficient.value,
        surroundings=place.surroundings,
        transfer=place.transfer,
    )


def _drop(role: str, members: list[Member], run: Run, case: Case) -> Finding:
    """The voltage-drop tier: a rule on volts, so never a stop; a mere note where volts are no matter."""
    steady = steady_current(run, case.tables.limits.overload_time.value)
    conductor = conductor_named(case.tables.conductors, case.rack.conductor)
    section = sum(_section(m) for m in members)
    allowed = drop_tier_current(section, conductor.drop_tier.value)
    finding = upper(
        "rack-drop",
        value=steady,
        limit=allowed,
        kind=CURRENT,
        source=conductor.drop_tier.origin,
        key="rack-drop",
        fix="rack-drop.thicker",
        demand_firm=False,
        role=role,
        material=conductor.name,
        demand=Quantity(steady, CURRENT),
        allowed=Quantity(allowed, CURRENT),
        density=Quantity(steady / section, CURRENT_DENSITY),
    )
    mild = case.recipe.process != "chrome-hard" and _poor(conductor)
    if mild and finding.level is not Level.OK:
        return replace(finding, level=Level.NOTE, key="rack-drop.mild", fix=None)
    return finding


def _poor(conductor: Conductor) -> bool:
    """Titanium and stainless racks always run over the drop tier in anodizing, whose volts bear it."""
    return conductor.metal == "titanium" or conductor.name.startswith("stainless")
