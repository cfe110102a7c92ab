"""A program against what serves the tank: cooling, exhaust, and the volts its racks hold."""

from collections.abc import Iterator
from dataclasses import replace

from lineplanner.bath.gas import hydrogen_share
from lineplanner.capacity.demand import firm_current, stage_volts
from lineplanner.capacity.tiers import between_marks
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.inputs.case import Case
from lineplanner.load import conductor_named
from lineplanner.program.stages import Run
from lineplanner.quantities import FLOW, POWER, RATIO, VOLTAGE, Flow, Power
from lineplanner.sources import Source, Status, weakest


def _line(case: Case) -> Source:
    return Source(f"line file {case.line.name}, tank {case.tank.name}", Status.ENTERED)


def check_cooling(heat_peak: Power, case: Case) -> tuple[Finding, ...]:
    """Highest heat into the bath, with a margin, against the cooling. Heat rests on estimated volts."""
    capacity, margin = case.tank.cooling, case.tables.limits.cooling_margin
    facts: dict[str, Fact] = {
        "heat": Quantity(heat_peak, POWER),
        "factor": Quantity(margin.value, RATIO),
        "tank": case.tank.name,
    }
    if capacity is None:
        return (note("cooling", "cooling.unknown", _line(case), "cooling.fill", **facts),)
    if capacity <= 0.0:
        level = Level.NOTE if case.recipe.process == "chrome-hard" else Level.CAUTION
        return (Finding("cooling", level, "cooling.none", _line(case), fix="cooling.watch", facts=facts),)
    finding = upper(
        "cooling",
        value=margin.value * heat_peak,
        limit=capacity,
        kind=POWER,
        source=Source(f"{_line(case).title}; {margin.source}", weakest(Status.ENTERED, margin.status)),
        key="cooling",
        fix="cooling.less",
        demand_firm=False,
    )
    return (replace(finding, facts=facts),)


def check_hydrogen(hydrogen: Flow, run: Run, case: Case) -> tuple[Finding, ...]:
    """Hydrogen in the exhaust at the peak stage. A flow that is not proven does not count yet."""
    exhaust = case.tank.exhaust
    facts: dict[str, Fact] = {"hydrogen": Quantity(hydrogen, FLOW), "tank": case.tank.name}
    if exhaust is None:
        return (note("hydrogen", "hydrogen.no-exhaust", _line(case), "hydrogen.fill", **facts),)
    if exhaust.flow is None:
        return (note("hydrogen", "hydrogen.unknown", _line(case), "hydrogen.fill", **facts),)
    limits = case.tables.limits
    share = hydrogen_share(hydrogen=hydrogen, exhaust=exhaust.flow)
    facts |= {"exhaust": Quantity(exhaust.flow, FLOW), "mixed": Quantity(share, RATIO)}
    finding = between_marks(
        "hydrogen",
        value=share,
        watch=limits.hydrogen_warn,
        fail=limits.hydrogen_limit,
        kind=RATIO,
        facts=facts,
        demand_firm=firm_current(run),
    )
    if exhaust.proven:
        return (finding,)
    unproven = note("hydrogen", "hydrogen.unproven", _line(case), "hydrogen.prove", **facts)
    return (unproven,) if finding.level is Level.OK else (unproven, finding)


def check_titanium_volts(run: Run, case: Case) -> tuple[Finding, ...]:
    """Volts on titanium racks or tips in an anodizing bath. Only a setting is a firm demand."""
    where = next(_titanium(case), "")
    if case.recipe.process == "chrome-hard" or not where or not run.stages:
        return ()
    limit = case.tables.limits.titanium_voltage
    stage = max(run.stages, key=lambda s: (stage_volts(s), s.control == "voltage"))
    return (
        upper(
            "titanium-volts",
            value=stage_volts(stage),
            limit=limit.value,
            kind=VOLTAGE,
            source=limit.origin,
            key="titanium-volts",
            fix="titanium-volts.aluminium",
            demand_firm=stage.control == "voltage" and run.limit_reached is None,
            where=where,
        ),
    )


def _titanium(case: Case) -> Iterator[str]:
    """What of the rack is titanium, in the trade's word for it."""
    conductors = case.tables.conductors
    if conductor_named(conductors, case.rack.conductor).metal == "titanium":
        yield "rack"
    if any(conductor_named(conductors, row.conductor).metal == "titanium" for row in case.rack.tips):
        yield "tips"
