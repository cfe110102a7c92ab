"""What the panel should show at five moments of a run, read off its stages."""

from collections.abc import Mapping
from dataclasses import dataclass

from lineplanner.plan import Plan
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import Charge, Current, Ratio, Time, Voltage
from lineplanner.report.setpoints import lead_in, main_stages

# Shares of the main stage that fill five moments with what the lead-in leaves.
_SHARES: Mapping[int, tuple[Ratio, ...]] = {
    0: (0.0, 0.25, 0.5, 0.75, 1.0),
    1: (0.25, 0.5, 0.75, 1.0),
    2: (0.0, 0.5, 1.0),
}
_MOST_LEAD_IN = 2
_TELLING = ("strike", "reverse", "ramp", "hold", "restart")  # which lead-in stages tell most


@dataclass(frozen=True, slots=True, kw_only=True)
class Moment:
    """One look at the panel: time, current and volts expected, and what the counter shows."""

    name: str
    time: Time
    current: Current
    voltage: Voltage
    counter: Charge


def moments(plan: Plan) -> tuple[Moment, ...]:
    """Five looks: the end of the telling lead-in stages, then the main stage in even parts."""
    run, main = plan.run, main_stages(plan)
    if run is None or not run.stages:
        return ()
    before = _telling(plan)
    found = [_at(run, stage, stage.end, f"end of {stage.stage}") for stage in before]
    if not main:
        return tuple(found)
    begin, end = main[0].start, main[-1].end
    for share in _SHARES[len(before)]:
        time = begin + share * (end - begin)
        stage = next(s for s in main if time <= s.end or s is main[-1])
        found.append(_at(run, stage, time, _named(share, stage)))
    return tuple(found)


def _telling(plan: Plan) -> tuple[Stage, ...]:
    """The lead-in stages worth a look at their end. Under current control a ramp ends where full current begins."""
    live = [s for s in lead_in(plan) if s.control != "off" and s.stage in _TELLING]
    if plan.control == "current":
        live = [s for s in live if s.stage != "ramp"]
    chosen = sorted(live, key=lambda s: _TELLING.index(s.stage))[:_MOST_LEAD_IN]
    return tuple(s for s in live if s in chosen)


def _named(share: Ratio, stage: Stage) -> str:
    full = "full volts" if stage.control == "voltage" else "full current"
    return {0.0: full, 1.0: "end"}.get(share, f"{share * 100:.0f} % of {stage.stage}")


def _at(run: Run, stage: Stage, time: Time, name: str) -> Moment:
    """A moment inside a stage: its current runs straight between its ends, by the stage's own definition."""
    share = (time - stage.start) / stage.duration if stage.duration > 0.0 else 1.0
    passed = sum(s.charge for s in run.stages if s.end <= stage.start)
    return Moment(
        name=name,
        time=time,
        current=stage.current_at(time),
        voltage=stage.from_voltage + share * (stage.to_voltage - stage.from_voltage),
        counter=passed + stage.charge_until(time),
    )
