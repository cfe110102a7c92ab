"""Ripple of a rectifier at the running volts against what the process bears."""

from collections.abc import Iterator
from dataclasses import replace

from lineplanner.capacity.demand import stage_volts
from lineplanner.capacity.ripple import measured_ripple, phase_control_ripple
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Rectifier
from lineplanner.inputs.tables import ProcessDefaults
from lineplanner.program.recipe_for import process_of
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import RATIO, VOLTAGE, Ratio, Voltage
from lineplanner.sources import Source, Status

_IDEAL = Source("ideal bridge without filter, resistive load: closed-form integral", Status.DERIVED)
# A line-frequency unit reaches its rated volts with this much in hand when its file does not say.
FULL_ON = 1.1
_PULSES = 6  # of a phase-controlled unit whose file does not say
# Stages whose deposit or film the ripple gets into; ramps pass through low volts in any case.
_PLATING = frozenset({"plate", "strike"})
_FILM = frozenset({"hold", "plate"})


def check_ripple(rectifier: Rectifier, run: Run, case: Case) -> Iterator[Finding]:
    """Ripple in the stage with the lowest volts: a limit for chrome, a notice for anodizing."""
    chrome = case.recipe.process == "chrome-hard"
    stages = [s for s in run.stages if s.stage in (_PLATING if chrome else _FILM) and s.peak > 0.0]
    if not stages:
        return
    entered = Source(f"line file {case.line.name}, rectifier {rectifier.name}", Status.ENTERED)
    facts: dict[str, Fact] = {"rectifier": rectifier.name}
    if rectifier.type == "switch-mode":
        yield Finding("ripple", Level.OK, "ripple.switch-mode", entered, facts=facts)
        return
    volts = min(_lowest_volts(s) for s in stages)
    facts["volts"] = Quantity(volts, VOLTAGE)
    facts["pulses"] = rectifier.pulses or _PULSES
    if rectifier.ripple_curve:
        yield from _by_curve(rectifier, volts, case, entered, facts)
    elif rectifier.filtered == "yes":
        yield note("ripple", "ripple.filtered", entered, "ripple.measure", **facts)
    elif chrome:
        yield _by_volts(rectifier, volts, case, facts)
    else:
        ripple = _ideal(rectifier, volts)
        yield _notice(ripple, process_of(case), facts, "ripple.ideal")


def _lowest_volts(stage: Stage) -> Voltage:
    lowest = min(stage.from_voltage, stage.to_voltage)
    return lowest if lowest > 0.0 else stage_volts(stage)


def _ideal(rectifier: Rectifier, volts: Voltage) -> Ratio:
    full = rectifier.full_on_voltage or FULL_ON * rectifier.max_voltage
    share = min(1.0, max(0.01, volts / full))
    return phase_control_ripple(share, rectifier.pulses or _PULSES)


def _by_curve(
    rectifier: Rectifier, volts: Voltage, case: Case, entered: Source, facts: dict[str, Fact]
) -> Iterator[Finding]:
    """The unit's own curve decides; outside of it nothing is concluded."""
    share = volts / rectifier.max_voltage
    ripple = measured_ripple(rectifier.ripple_curve, share)
    facts["share"] = Quantity(share, RATIO)
    process = process_of(case)
    if ripple is None:
        yield note("ripple", "ripple.outside", entered, "ripple.measure", **facts)
    elif process.name != "chrome-hard":
        yield _notice(ripple, process, facts, "ripple")
    else:
        finding = upper(
            "ripple",
            value=ripple,
            limit=process.ripple_limit.value,
            kind=RATIO,
            source=process.ripple_limit.origin,
            key="ripple",
            fix="ripple.smoother",
            demand_firm=False,  # the running volts are an estimate
        )
        yield replace(finding, facts=facts)


def _by_volts(rectifier: Rectifier, volts: Voltage, case: Case, facts: dict[str, Fact]) -> Finding:
    """No curve: what share of the rated volts the unit runs at, with the ideal ripple as a fact."""
    limits = case.tables.limits
    share = volts / rectifier.max_voltage
    failed = share < limits.ripple_voltage_fail.value
    limit = limits.ripple_voltage_fail if failed else limits.ripple_voltage_warn
    facts["ideal"] = Quantity(_ideal(rectifier, volts), RATIO)
    finding = lower(
        "ripple",
        value=share,
        limit=limit.value,
        kind=RATIO,
        source=limit.origin,
        key="ripple.phased-far-back" if failed else "ripple.phased-back",
        fix="ripple.smoother",
        demand_firm=False,  # the running volts are an estimate
    )
    return replace(finding, facts=facts)


def _notice(ripple: Ratio, process: ProcessDefaults, facts: dict[str, Fact], key: str) -> Finding:
    """Anodizing bears ripple: never more than a note."""
    limit = process.ripple_limit
    over = ripple > limit.value
    source = limit.origin if key == "ripple" else _IDEAL
    return Finding(
        "ripple",
        Level.NOTE if over else Level.OK,
        f"{key}.notice" if over else key,
        source,
        RATIO,
        ripple,
        limit.value,
        1.0 - ripple / limit.value,
        "ripple.measure" if over else None,
        facts,
    )
