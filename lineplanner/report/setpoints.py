"""What to set, whether it may run, what can hurt now: the three lines that come first everywhere."""

from collections.abc import Iterator

from lineplanner.cautions.ranking import Caution, gravest
from lineplanner.errors import Facts, Quantity
from lineplanner.findings import Finding, Level
from lineplanner.inputs.cautions import Moment
from lineplanner.inputs.line import Rectifier
from lineplanner.plan import Plan
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import AREA, CURRENT_DENSITY, Voltage
from lineplanner.report.digits import (
    CHROME,
    NONE,
    amperes,
    charge,
    duration,
    is_lower_limit,
    run_time_said,
    told_apart,
    use,
    volts,
)
from lineplanner.report.layout import WIDTH, filled, shortened, shortened_verdict, wrapped
from lineplanner.report.style import Style
from lineplanner.report.words import sentence
from lineplanner.report.words.names import check_name, its, number_of, work

SET = "SET  "
NO_SETTING = "nothing to set"
_LEAD_IN = {"wait": "soak", "reverse": "reverse", "hold": "hold low", "strike": "strike"}


def rectifier_of(plan: Plan) -> Rectifier | None:
    """The rectifier proposed, if any feeds the tank."""
    return None if plan.run is None else plan.run.rectifier


def main_stages(plan: Plan) -> tuple[Stage, ...]:
    """The stages at full current or at the last voltage, for which the rest prepares."""
    name = "plate" if plan.recipe.process == CHROME else "hold"
    stages = () if plan.run is None else plan.run.stages
    last = tuple(s for s in stages if s.stage == name)
    return last[-1:] if plan.control == "voltage" or plan.recipe.process == CHROME else last


def lead_in(plan: Plan) -> tuple[Stage, ...]:
    """The stages before the main ones, in their order."""
    stages = () if plan.run is None else plan.run.stages
    return stages[: len(stages) - len(main_stages(plan))]


def keyed_in(plan: Plan) -> tuple[Stage, ...]:
    """The stages before the main ones as they are set on the panel, whatever a voltage limit leaves of them."""
    run = plan.run
    return lead_in(plan) if run is None or run.limit_reached is None else run.asked


def setpoint_lines(plan: Plan, style: Style, width: int = WIDTH) -> list[str]:
    """What to set on the panel; the second and later lines say on what it rests and what to expect."""
    run = plan.run
    if run is None or plan.stopped or run.total_time is None:
        rectifier = f", rectifier {run.rectifier.name}" if run is not None and run.rectifier else ""
        return [f"{SET}{NO_SETTING}: a stop forbids this plan{rectifier}"]
    items = (
        [*_by_voltage(plan, run, style)] if plan.control == "voltage" else [*_by_current(plan, run, style)]
    )
    first = filled(items, width - len(SET))
    below = filled(_expected(plan, run, style), width - len(SET))
    lines = [*first, *_before_plating(plan, run, style, width - len(SET)), *below]
    return [(SET if number == 0 else " " * len(SET)) + line for number, line in enumerate(lines)]


def _by_current(plan: Plan, run: Run, style: Style) -> Iterator[str]:
    rectifier, process = run.rectifier, plan.recipe.process
    yield amperes(run.panel_current, rectifier, style)
    if process == CHROME:
        yield f"plate {run_time_said(run.time_at_set, process, style)}"
    else:
        yield from lead_in_items(plan, style)
        yield run_time_said(run.total_time, process, style)
    if run.limit_reached is not None and run.stages[-1].control == "voltage":
        at = run_time_said(run.limit_reached, process, style)
        yield f"held at {volts(run.voltage_limit, style)} from {at}"
    yield f"stop at {charge(run.counter, style)}"
    yield from _where(run, plan)


def _before_plating(plan: Plan, run: Run, style: Style, width: int) -> list[str]:
    """Hard chrome: what comes before the plating, on a line of its own."""
    if plan.recipe.process != CHROME:
        return []
    items = ["first", *lead_in_items(plan, style)] if keyed_in(plan) else []
    return filled([*items, f"total {run_time_said(run.total_time, CHROME, style)}"], width)


def _by_voltage(plan: Plan, run: Run, style: Style) -> Iterator[str]:
    yield " then ".join(volts(stage.to.value, style) for stage in plan.recipe.voltages)
    yield from lead_in_items(plan, style)
    yield run_time_said(run.total_time, plan.recipe.process, style)
    yield f"about {charge(run.counter, style)}"
    yield from _where(run, plan)


def _where(run: Run, plan: Plan) -> Iterator[str]:
    if run.rectifier is not None:
        yield f"rectifier {run.rectifier.name}"
    main = main_stages(plan)
    yield work((main or run.stages)[-1].polarity)


def lead_in_items(plan: Plan, style: Style) -> Iterator[str]:
    """The stages before the main one: ramp 5 min, reverse 60 s at 500 A, ..."""
    rectifier = rectifier_of(plan)
    stages = keyed_in(plan)
    steps = [s for s in stages if s.stage == "step"]
    if steps:
        time = sum(s.duration for s in steps)
        yield f"{number_of(len(steps), 'step')} in {duration(time, style)}"
    for stage in stages:
        if stage.stage == "step":
            continue
        text = f"{_LEAD_IN.get(stage.stage, stage.stage)} {duration(stage.duration, style)}"
        if stage.stage in ("reverse", "strike") or (stage.stage == "hold" and stage.control == "current"):
            text += f" at {amperes(stage.peak, rectifier, style)}"
            text += f" {work(stage.polarity)}" if stage.stage == "reverse" else ""
        elif stage.stage == "ramp" and stage.control == "voltage" and len(plan.recipe.voltages) > 1:
            text += f" to {volts(stage.to_voltage, style)}"
        yield text


def _expected(plan: Plan, run: Run, style: Style) -> Iterator[str]:
    density = plan.recipe.current_density
    area = style.show(plan.areas.carrying, AREA)
    if plan.control == "voltage":
        yield f"on {area}"
        yield f"expect up to {amperes(run.peak_current, run.rectifier, style)}"
    else:
        if density is not None:
            yield f"{style.show(density.value, CURRENT_DENSITY)} on {area}"
        yield expected_volts(run, style)
    yield f"position: {plan.position}"


def expected_volts(run: Run, style: Style) -> str:
    """The volts to expect, from the start of full current to the end, and those of a stage that takes more."""
    start, end = volts(run.start_voltage, style), volts(run.end_voltage, style)
    text = f"expect {end}" if start == end else f"expect {start.partition(' ')[0]} to {end}"
    highest = max(run.stages, key=_highest, default=None)
    if highest is None or _highest(highest) <= max(run.start_voltage or 0.0, run.end_voltage or 0.0):
        return text
    peak = volts(_highest(highest), style)
    return text if peak in (start, end) else f"{text}, {highest.stage} {peak}"


def _highest(stage: Stage) -> Voltage:
    return max(stage.from_voltage, stage.to_voltage)


# --- verdict ---------------------------------------------------------------------------------------------


def verdict_line(plan: Plan, style: Style, width: int | None = None) -> str:
    """The verdict in words, naming what is tightest; cut to a width if one is given."""
    text = f"{verdict_word(plan)}  {_verdict(plan, style)}"
    return text if width is None else shortened_verdict(text, width)


def worst(plan: Plan) -> Level:
    """The gravest level of the findings."""
    return max((f.level for f in plan.findings), key=lambda level: level.rank, default=Level.OK)


def verdict_word(plan: Plan) -> str:
    """STOP, CAUTION or CHECKS MET."""
    return {Level.STOP: "STOP", Level.CAUTION: "CAUTION"}.get(worst(plan), "CHECKS MET")


def _verdict(plan: Plan, style: Style) -> str:
    level = worst(plan)
    notes = sum(f.level is Level.NOTE for f in plan.findings)
    if level in (Level.STOP, Level.CAUTION):
        grave = [f for f in plan.findings if f.level is level]
        text, left = in_words(grave[0], style), len(grave) - 1
        second = next((f for f in grave[1:] if use(f, style) == NONE), None)
        if second is not None:
            text, left = f"{text}; also: {text_of(second, style)}", left - 1
        text += f"; {number_of(left, f'more {level.value}')}" if left else ""
        if level is Level.STOP:
            cautions = sum(f.level is Level.CAUTION for f in plan.findings)
            text += f"; {number_of(cautions, 'caution')}" if cautions else ""
    else:
        text = _tightest(plan, style)
    return text + (f"; {number_of(notes, 'note')}" if notes else "")


# A band inside its window binds nothing: nothing more can be hung or set by it.
_INSIDE = ("band-minimum", "band-maximum")


def _tightest(plan: Plan, style: Style) -> str:
    compared = [
        f for f in plan.findings if f.level is Level.OK and f.margin is not None and use(f, style) != NONE
    ]
    first = plan.binding
    if first is None or not compared:
        return "nothing to compare"
    text = f"tightest: {in_words(first, style)}"
    second = next((f for f in compared if f.check not in (first.check, *_INSIDE)), None)
    return f"{text}, then {check_name(second.check)} {use(second, style)}" if second is not None else text


def in_words(finding: Finding, style: Style) -> str:
    """A finding in a few words: `contacts 71 % of their limit`, else its sentence."""
    share, name = use(finding, style), check_name(finding.check)
    if share == NONE or (finding.margin is not None and finding.value == finding.limit):
        return text_of(finding, style)
    return f"{name} {share} of {its(name)} {'least' if is_lower_limit(finding) else 'limit'}"


def text_of(finding: Finding, style: Style) -> str:
    """The sentence of a finding, its value and limit among the facts."""
    return sentence(finding.key, _told(finding, style), style)


# Facts of a sentence that stand against each other.
_COMPARED = (
    ("value", "limit"),
    ("here", "filed"),
    ("stated", "drawn"),
    ("bath", "recipe"),
    ("density", "recipe"),
)


def _told(finding: Finding, style: Style) -> Facts:
    """The facts of a finding; two that are compared are never printed alike while they differ."""
    facts = dict(facts_of(finding))
    for names in _COMPARED:
        first, second = (facts.get(name) for name in names)
        if isinstance(first, Quantity) and isinstance(second, Quantity) and first.kind == second.kind:
            facts |= zip(names, told_apart(first.value, second.value, first.kind, style), strict=True)
    return facts


def facts_of(finding: Finding) -> Facts:
    """The facts of a finding with its demand and limit among them."""
    facts = dict(finding.facts)
    for name, number in (("value", finding.value), ("limit", finding.limit)):
        if number is not None and finding.kind is not None:
            facts.setdefault(name, Quantity(number, finding.kind))
    return facts


def fix_of(finding: Finding, style: Style) -> str:
    """The way out of a finding, if it has one."""
    return "" if finding.fix is None else sentence(finding.fix, _told(finding, style), style)


# --- caution ---------------------------------------------------------------------------------------------


def caution_text(caution: Caution, style: Style) -> str:
    """The words of a caution with its values filled in."""
    return caution.text.format_map({name: style.fact(fact) for name, fact in caution.facts.items()})


def caution_short(caution: Caution, plan: Plan, style: Style) -> str:
    """What to do, in the few words that the site has for a caution."""
    short = next((text.short for text in plan.case.cautions.cautions if text.id == caution.id), caution.id)
    return short.format_map({name: style.fact(fact) for name, fact in caution.facts.items()})


def caution_line(plan: Plan, style: Style, moment: Moment | None = None, width: int = WIDTH) -> str:
    """The gravest caution of a moment (or of all) on one line, with how many more there are."""
    first = gravest(plan.cautions, moment)
    if first is None:
        return ""
    shown = [c for c in plan.cautions if moment is None or moment in c.moments]
    more = f" + {len(shown) - 1} more" if len(shown) > 1 else ""
    text = shortened(caution_text(first, style), width - len(first.word) - 1 - len(more))
    return f"{first.word} {text}{more}"


def caution_lines(caution: Caution, style: Style, width: int = WIDTH, indent: str = "") -> list[str]:
    """A caution in full: its word first, its sentence wrapped."""
    return wrapped(
        f"[{caution.word}] {caution_text(caution, style)}", width, first=indent, rest=f"{indent}  "
    )
