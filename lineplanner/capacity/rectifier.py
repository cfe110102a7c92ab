"""A program against a rectifier: amperes, least amperes, volts, polarity."""

import math
from collections.abc import Iterator, Mapping
from dataclasses import replace

from lineplanner.capacity.demand import (
    asked_current,
    firm_current,
    fitting_density,
    peak_current,
    peak_stage,
    stage_volts,
    sustained_current,
)
from lineplanner.capacity.derating import derated_current
from lineplanner.capacity.smoothness import check_ripple
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import parts_hung
from lineplanner.inputs.line import Rectifier
from lineplanner.program.panel import panel_step
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import (
    CURRENT,
    CURRENT_DENSITY,
    RATIO,
    TEMPERATURE,
    TIME,
    VOLTAGE,
    Current,
    Ratio,
    Temperature,
)
from lineplanner.sources import Source, Status, weakest

# Stages that the rectifier must hold steady; ramps and steps only pass through.
_HELD = frozenset({"hold", "plate", "strike", "reverse"})


def check_rectifier(rectifier: Rectifier, run: Run, case: Case) -> tuple[Finding, ...]:
    """Every check of one program on one rectifier."""
    return (
        *_ambient(rectifier, case),
        *_rating(rectifier, run, case),
        *_continuous(rectifier, run, case),
        *_least(rectifier, run, case),
        *_volts(rectifier, run, case),
        *check_ripple(rectifier, run, case),
        *_reversing(rectifier, run, case),
    )


def nameplate(rectifier: Rectifier) -> Source:
    """The nameplate as a source: entered for this line."""
    who = f" ({rectifier.entered_by})" if rectifier.entered_by else ""
    return Source(f"nameplate of {rectifier.name}{who}", Status.ENTERED)


def _air(rectifier: Rectifier, case: Case) -> Temperature:
    return rectifier.ambient if rectifier.ambient is not None else case.site.ambient


def _available(rectifier: Rectifier, case: Case, rated: Current | None = None) -> Current:
    """What a rectifier may deliver where it stands, of its rating or of an overload."""
    return derated_current(
        rated=rectifier.max_current if rated is None else rated,
        ambient=_air(rectifier, case),
        altitude=case.site.altitude,
        limits=case.tables.limits,
    )


def _ambient(rectifier: Rectifier, case: Case) -> Iterator[Finding]:
    """Air too hot to run a rectifier in at all; silent below."""
    hottest = case.tables.limits.hottest_ambient
    air = _air(rectifier, case)
    if air > hottest.value:
        level = Level.STOP if hottest.status.may_stop else Level.CAUTION
        facts: dict[str, Fact] = {
            "rectifier": rectifier.name,
            "limit_air": Quantity(hottest.value, TEMPERATURE),
        }
        yield Finding(
            "rectifier-air",
            level,
            "rectifier-air.hot",
            hottest.origin,
            TEMPERATURE,
            air,
            hottest.value,
            None,
            "rectifier-air.cool",
            facts,
        )


def _rating(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """The highest current against the derated rating; a short one against the overload, if one is entered."""
    limits = case.tables.limits
    value, limit = peak_current(run), _available(rectifier, case) * limits.short_share.value
    key, plate = "rectifier-rating", rectifier.max_current
    over, seconds = rectifier.overload_current, rectifier.overload_time
    if over is not None and seconds is not None and over > plate and run.stages:
        # what outlasts the overload is held to the rating, the peak to the overload: the tighter one is shown
        held, most = sustained_current(run.stages, seconds), _available(rectifier, case, over)
        if held * most <= value * limit:
            key, plate, limit = "rectifier-rating.overload", over, most
        else:
            value = held
    status = weakest(Status.ENTERED, limits.derate_per_kelvin.status, limits.derate_per_altitude.status)
    source = nameplate(rectifier)
    if value <= plate and limit < plate:  # only derating makes it too much
        source = Source(f"{source.title}, derated", weakest(status, limits.short_share.status))
    stage = peak_stage(run)
    facts = _ways_out(run, case, value, limit)
    facts |= {
        "rectifier": rectifier.name,
        "rated": Quantity(plate, CURRENT),
        "share": Quantity(limit / plate, RATIO),
        "stage": "" if stage is None else stage.stage,
    }
    finding = upper(
        "rectifier-rating",
        value=value,
        limit=limit,
        kind=CURRENT,
        source=source,
        key=key,
        fix=_way(value, limit, facts, "rectifier-rating"),
        demand_firm=firm_current(run),
    )
    yield replace(finding, facts=facts)


def _way(value: float, limit: float, facts: Mapping[str, Fact], name: str) -> str:
    """Which way out is worded: nothing to take off where the limit is only near."""
    if value <= limit:
        return f"{name}.near"
    if "parts_off" in facts and "density" in facts:
        return f"{name}.fewer"
    return f"{name}.less" if "density" in facts else f"{name}.larger"


def _ways_out(run: Run, case: Case, value: Current, limit: Current) -> dict[str, Fact]:
    """The current density that fits, and how many parts to take off, where a load is over a limit."""
    facts: dict[str, Fact] = {"demand": Quantity(value, CURRENT), "allowed": Quantity(limit, CURRENT)}
    step = panel_step(run.rectifier) if run.rectifier is not None else 0.0
    density = fitting_density(run, limit, step=step)
    if density is not None:
        facts["density"] = Quantity(density, CURRENT_DENSITY, at_most=True)
    if value <= limit:
        return facts
    share = _part_share(run, case)
    if share is not None:
        asked = asked_current(run, value) + step / 2.0  # the panel may be set half a step higher
        off = math.ceil((asked - limit) / (share * asked))
        if off < sum(parts_hung(h) for h in case.load.hangs):
            facts["parts_off"] = off
    return facts


def _part_share(run: Run, case: Case) -> Ratio | None:
    """Share of the load's current that the smallest part takes: taking that many off is always enough."""
    counts: dict[str, int] = {}
    for hang in case.load.hangs:
        counts[hang.part] = counts.get(hang.part, 0) + parts_hung(hang)
    whole = run.set_current or sum(i.current for i in run.items)
    each = [i.current / counts[i.part] / whole for i in run.items if counts.get(i.part) and i.current > 0.0]
    return min(each) if each and whole > 0.0 else None


def _continuous(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """What is held longer than a short time against the share of the rating that holds for good."""
    limits = case.tables.limits
    if not run.stages:
        return
    short = rectifier.overload_time if rectifier.overload_time is not None else limits.overload_time.value
    value = sustained_current(run.stages, short)
    limit = limits.continuous_share.value * _available(rectifier, case)
    facts = _ways_out(run, case, value, limit)
    facts |= {
        "rectifier": rectifier.name,
        "share": Quantity(limits.continuous_share.value, RATIO),
        "seconds": Quantity(short, TIME),
    }
    finding = upper(
        "rectifier-continuous",
        value=value,
        limit=limit,
        kind=CURRENT,
        source=limits.continuous_share.origin,
        key="rectifier-continuous",
        fix=_way(value, limit, facts, "rectifier-continuous"),
        demand_firm=firm_current(run),
        caution_at=limits.continuous_share.caution_at,
    )
    yield replace(finding, facts=facts)


def _held(run: Run) -> list[Stage]:
    return [
        s
        for s in run.stages
        if s.stage in _HELD and s.control == "current" and min(s.from_current, s.to_current) > 0.0
    ]


def _least(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """The lowest current to be held against what the unit can hold, and against what its meter can read."""
    held = _held(run)
    if not held:
        return
    limits = case.tables.limits
    stage = min(held, key=lambda s: min(s.from_current, s.to_current))
    value = min(stage.from_current, stage.to_current)
    least, source = limits.least_share.value * rectifier.max_current, limits.least_share.origin
    if rectifier.least_current is not None and rectifier.least_current >= least:
        least, source = rectifier.least_current, nameplate(rectifier)
    meter, meter_source = _metered(rectifier, case)
    for name, limit, origin, firm in (
        ("rectifier-least", least, source, True),
        ("rectifier-meter", meter, meter_source, False),
    ):
        yield lower(
            name,
            value=value,
            limit=limit,
            kind=CURRENT,
            source=origin,
            key=name,
            fix=f"{name}.smaller",
            demand_firm=firm,
            rectifier=rectifier.name,
            stage=stage.stage,
            allowed=Quantity(limit, CURRENT),
            demand=Quantity(value, CURRENT),
        )


def _metered(rectifier: Rectifier, case: Case) -> tuple[Current, Source]:
    """Current from which the ammeter can be believed: the table's share, by the accuracy of this one."""
    share, usual = case.tables.limits.metering_share, case.tables.uncertainty.ammeter
    if rectifier.ammeter is None or usual.value <= 0.0:
        return share.value * rectifier.max_current, share.origin
    return share.value * rectifier.ammeter / usual.value * rectifier.max_current, share.origin


def _volts(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """Terminal volts against the limit set on the panel, or the rating. Only a setting is a firm demand.

    Of a run that is held at the limit it is what the set current would take.
    """
    if not run.stages:
        return
    plate, limit = rectifier.max_voltage, rectifier.most_voltage
    stage = max(run.stages, key=lambda s: (stage_volts(s), s.control == "voltage"))
    limited = run.wanted_voltage is not None
    set_by_hand = stage.control == "voltage" and not limited
    yield upper(
        "rectifier-volts",
        value=stage_volts(stage) if run.wanted_voltage is None else run.wanted_voltage,
        limit=limit,
        kind=VOLTAGE,
        source=_of_volts(rectifier),
        key="rectifier-volts.set" if set_by_hand else "rectifier-volts",
        fix="rectifier-volts.setting" if set_by_hand else _volts_way(case),
        demand_firm=set_by_hand,
        rectifier=rectifier.name,
        stage=stage.stage,
        rated=Quantity(plate, VOLTAGE),
    )


def _of_volts(rectifier: Rectifier) -> Source:
    """Who says how far the volts go: the panel's own limit where it is lower than the rating."""
    if rectifier.most_voltage < rectifier.max_voltage:
        return Source(f"voltage limit set on {rectifier.name}", Status.ENTERED)
    return nameplate(rectifier)


def _volts_way(case: Case) -> str:
    return "rectifier-volts.chrome" if case.recipe.process == "chrome-hard" else "rectifier-volts.anodize"


def _reversing(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """A reverse etch needs reversing gear, or another tank."""
    if case.recipe.reverse_tank:
        yield note("reversing", "reversing.elsewhere", nameplate(rectifier), tank=case.recipe.reverse_tank)
        return
    if rectifier.reversing == "yes" or not any(s.stage == "reverse" for s in run.stages):
        return
    facts: dict[str, Fact] = {"rectifier": rectifier.name}
    if rectifier.reversing == "unknown":
        yield Finding(
            "reversing",
            Level.CAUTION,
            "reversing.unknown",
            nameplate(rectifier),
            fix="reversing.enter",
            facts=facts,
        )
        return
    yield Finding(
        "reversing",
        Level.STOP,
        "reversing.none",
        nameplate(rectifier),
        fix="reversing.elsewhere-or-gear",
        facts=facts,
    )
