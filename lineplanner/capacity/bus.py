"""A program against bus, flight bar and joints: section, heat, drop, and millivolts of each joint."""

from collections.abc import Iterator
from dataclasses import dataclass, replace

from lineplanner.capacity.demand import steady_current
from lineplanner.capacity.tiers import between_marks
from lineplanner.circuit import Circuit
from lineplanner.circuit.busbar import (
    BUS_AIR,
    BUS_RISE,
    DULL_BAR,
    GROUP,
    GROUP_SOURCE,
    ampacity,
    group_factor,
)
from lineplanner.circuit.conductors import drop_tier_current
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Joint
from lineplanner.load import conductor_named
from lineplanner.program.stages import Run
from lineplanner.quantities import CURRENT, POWER, TEMPERATURE_DIFFERENCE, VOLTAGE, Current, Length
from lineplanner.sources import Source, Status

_HEAT = Source(
    "heat balance of dull bars on edge in still air, air and rise by ANSI C37.20; site, mounting and paint not known",
    Status.ASSUMPTION,
)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Bar:
    """A bar with the current that enters it."""

    name: str
    conductor: str
    width: Length
    thickness: Length
    bars: int
    current: Current


def check_bus(circuit: Circuit, run: Run, case: Case) -> tuple[Finding, ...]:
    """Bus and flight bar: section by the drop tier, heat, and the drop from rectifier to flight bar."""
    steady = steady_current(run, case.tables.limits.overload_time.value)
    findings = [f for bar in _bars(case, steady) for f in (*_heat(bar, case), _tier(bar, case))]
    line = Source(f"line file {case.line.name}, tank {case.tank.name}", Status.ENTERED)
    findings += [
        note(name.replace(" ", "-"), "conductor.unknown", line, "conductor.enter", conductor=name)
        for name in ("bus", "joints", "flight bar")
        if name in circuit.missing
    ]
    if circuit.of("bus", "joint", "saddle"):
        findings.append(_drop(circuit, steady, case))
    return tuple(findings)


def _bars(case: Case, steady: Current) -> Iterator[_Bar]:
    for bus in case.tank.bus:
        yield _Bar(
            name=bus.name,
            conductor=bus.conductor,
            width=bus.width,
            thickness=bus.thickness,
            bars=bus.bars,
            current=steady,
        )
    bar = case.tank.flight_bar
    if bar is not None:
        ends = 2.0 if bar.fed == "both ends" else 1.0
        yield _Bar(
            name="flight bar",
            conductor=bar.conductor,
            width=bar.width,
            thickness=bar.thickness,
            bars=1,
            current=steady / ends,
        )


def _heat(bar: _Bar, case: Case) -> Iterator[Finding]:
    """The bar may get as hot as 30 K over air of 40 degC; hotter air leaves less of that rise."""
    air = max(BUS_AIR.value, case.site.ambient)
    rise = max(0.0, BUS_AIR.value + BUS_RISE.value - air)
    row = conductor_named(case.tables.conductors, bar.conductor)
    one = ampacity(
        width=max(bar.width, bar.thickness),
        thickness=min(bar.width, bar.thickness),
        resistivity=row.resistivity.value,
        coefficient=row.temperature_coefficient.value,
        emissivity=DULL_BAR.value,
        surroundings=air,
        rise=rise,
    )
    allowed = group_factor(bar.bars) * one
    yield upper(
        "bus-heat",
        value=bar.current,
        limit=allowed,
        kind=CURRENT,
        source=_HEAT,
        key="bus-heat",
        fix="bus-heat.thicker",
        bar=bar.name,
        demand=Quantity(bar.current, CURRENT),
        allowed=Quantity(allowed, CURRENT),
        rise=Quantity(rise, TEMPERATURE_DIFFERENCE),
    )
    if bar.bars > len(GROUP):
        yield note("bus-heat", "bus-heat.group", GROUP_SOURCE, bar=bar.name, bars=bar.bars, most=len(GROUP))


def _tier(bar: _Bar, case: Case) -> Finding:
    """The drop tier is a rule on volts: never a stop."""
    row = conductor_named(case.tables.conductors, bar.conductor)
    allowed = drop_tier_current(bar.width * bar.thickness * bar.bars, row.drop_tier.value)
    return upper(
        "bus-section",
        value=bar.current,
        limit=allowed,
        kind=CURRENT,
        source=row.drop_tier.origin,
        key="bus-section",
        fix="bus-section.thicker",
        demand_firm=False,
        bar=bar.name,
        material=row.name,
        demand=Quantity(bar.current, CURRENT),
        allowed=Quantity(allowed, CURRENT),
    )


def _drop(circuit: Circuit, steady: Current, case: Case) -> Finding:
    """Volts lost from rectifier to flight bar against the budget; of hard anodizing's volts it is a note."""
    limits, process = case.tables.limits, case.recipe.process
    budget = limits.bus_drop_chrome if process == "chrome-hard" else limits.bus_drop
    drop = steady * sum(e.resistance for e in circuit.of("bus", "joint", "saddle"))
    finding = upper(
        "bus-drop",
        value=drop,
        limit=budget.value,
        kind=VOLTAGE,
        source=budget.origin,
        key="bus-drop",
        fix="bus-drop.shorter",
        current=Quantity(steady, CURRENT),
        watts=Quantity(drop * steady, POWER),
    )
    if process == "anodize-hard" and finding.level is not Level.OK:
        return replace(finding, level=Level.NOTE)
    return finding


def check_joints(run: Run, case: Case) -> tuple[Finding, ...]:
    """Millivolts over each joint and saddle at the steady current, with the watts in one."""
    steady = steady_current(run, case.tables.limits.overload_time.value)
    return tuple(_joint(joint, steady, case) for joint in case.tank.joints)


def _joint(joint: Joint, steady: Current, case: Case) -> Finding:
    limits, current = case.tables.limits, steady / joint.parallel
    volts = joint.resistance * current
    saddle = joint.type == "saddle"
    facts: dict[str, Fact] = {
        "joint": joint.name,
        "current": Quantity(current, CURRENT),
        "watts": Quantity(volts * current, POWER),
    }
    return between_marks(
        "saddle" if saddle else "joint",
        value=volts,
        watch=limits.saddle_watch if saddle else limits.joint_watch,
        fail=limits.saddle_fail if saddle else limits.joint_fail,
        kind=VOLTAGE,
        facts=facts,
        demand_firm=True,
    )
