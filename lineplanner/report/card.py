"""The run card: plain text, 76 columns, at most 60 lines, to clip on the flight bar."""

from collections.abc import Iterator

from lineplanner.findings import Level
from lineplanner.plan import Plan
from lineplanner.program.stages import Stage
from lineplanner.quantities import AREA, LENGTH, TEMPERATURE, TIME
from lineplanner.report.card_cautions import card_cautions
from lineplanner.report.checks_text import said
from lineplanner.report.digits import CHROME, amperes, charge, moment, volts
from lineplanner.report.explain import rests_on
from lineplanner.report.layout import WIDTH, columns, filled, typed, wrapped
from lineplanner.report.places import places_said
from lineplanner.report.plan_id import plan_id
from lineplanner.report.plan_text import LAST_LINE, deviation_lines, recipe_said
from lineplanner.report.setpoints import (
    caution_line,
    keyed_in,
    lead_in,
    rectifier_of,
    setpoint_lines,
    verdict_line,
)
from lineplanner.report.style import Style
from lineplanner.report.watch import moments
from lineplanner.report.words.names import process_name
from lineplanner.report.words.reasons import surface_word

LINES = 60
NOTE_LINES = 3  # of a note on the card
_NOT_CHECKED = "tank fit unchecked"
NO_CURRENT = "the current stays off: a stop forbids this plan"
RAMP_ROWS = 10
THICKNESS_BLANKS = 5
_OUTSIDE = {
    "current": "Volts are estimates: a jump tells most. Volts jump or amperes drop: current off, look for a "
    "lost contact or a burning part.",
    "voltage": "Amperes are an estimate. They stay high at the end or rise by themselves: current off, look "
    "for a short or a burning part. None at all: look for a lost contact.",
}
_OUTAGE = "Outage: log when and how long; the recipe has no restart, so a person decides on it."


def card_text(plan: Plan, style: Style) -> str:
    """The card as text."""
    return "\n".join(card_lines(plan, style))


def card_lines(plan: Plan, style: Style) -> list[str]:
    """The card line by line; cautions take what room the rest leaves, the graver in full."""
    top = [*_head(plan, style), *_middle(plan, style), *_below(plan, style)]
    bottom = [*_blanks(), LAST_LINE]
    dangers = sum(c.word == "DANGER" for c in plan.cautions)
    shown = card_cautions(plan, style, LINES - len(top) - len(bottom))
    if shown.full < dangers:  # blank lines go before a danger is shortened
        top, bottom = [line for line in top if line], [line for line in bottom if line]
        shown = card_cautions(plan, style, LINES - len(top) - len(bottom))
    return [*top, *shown.lines, *bottom]


def _head(plan: Plan, style: Style) -> list[str]:
    load = plan.case.load
    typed = [f"{name} {text}" for name, text in (("order", load.order), ("lot", load.lot)) if text]
    lines = filled([f"RUN CARD  {plan.case.name}", *typed, f"plan {plan_id(plan)}"])
    approved = [f"{plan.filed.approved_by} {plan.filed.approved_on}"] if plan.status == "approved" else []
    where = f"{process_name(plan.recipe.process)} in tank {plan.case.tank.name}"
    for line in filled([load.name, where, recipe_said(plan), *approved]):
        lines += wrapped(line, rest="  ")
    lines += deviation_lines(plan, style)
    lines += wrapped(verdict_line(plan, style), rest="  ")
    caution = caution_line(plan, style)
    return lines + ([caution] if caution else [])


# --- SET and WATCH ----------------------------------------------------------------------------------------


def _middle(plan: Plan, style: Style) -> list[str]:
    """SET and WATCH, or in their place why there is nothing to set."""
    if plan.stopped:
        stops = [f for f in plan.findings if f.level is Level.STOP]
        lines = ["", "NOTHING TO SET: a stop forbids this plan"]
        return lines + [line for finding in stops for line in said(finding, style)]
    return ["", *setpoint_lines(plan, style), *_ramp_table(plan, style), "", *_watch(plan, style)]


def _ramp_table(plan: Plan, style: Style) -> list[str]:
    """By hand: when to set what, where the rectifier does not ramp by itself."""
    rectifier = rectifier_of(plan)
    ramps = [s for s in keyed_in(plan) if s.stage in ("ramp", "step")]
    if not ramps or (rectifier is not None and rectifier.can_ramp and all(s.stage == "ramp" for s in ramps)):
        return []
    process = plan.recipe.process
    said = [
        f"{moment(time, process)}  {_setting(stage, share, plan, style)}"
        for time, stage, share in ramp_rows(ramps)
    ]
    unit = "h:min" if process == CHROME else "min"
    return [f"     {line}" for line in filled([f"at {unit}", *said], WIDTH - 5, gap=" | ")]


def ramp_rows(ramps: list[Stage]) -> list[tuple[float, Stage, float]]:
    """When, in which stage and how far along it the panel is set.

    A ramp becomes even steps of the same charge, each at the middle of its part; the last row is its end.
    """
    last = ramps[-1]
    if last.stage == "step":
        every = -(-len(ramps) // (RAMP_ROWS - 1))
        groups = [ramps[n : n + every] for n in range(0, len(ramps), every)]
        return [(group[0].start, group[len(group) // 2], 0.5) for group in groups]
    parts = max(1, (RAMP_ROWS - 1) // len(ramps))
    rows = [(s.start + k / parts * s.duration, s, (k + 0.5) / parts) for s in ramps for k in range(parts)]
    return [*rows, (last.end, last, 1.0)]


def _setting(stage: Stage, share: float, plan: Plan, style: Style) -> str:
    if stage.control == "voltage":
        return volts(stage.from_voltage + share * (stage.to_voltage - stage.from_voltage), style)
    current = stage.from_current + share * (stage.to_current - stage.from_current)
    return amperes(current, rectifier_of(plan), style)


def _watch(plan: Plan, style: Style) -> list[str]:
    process = plan.recipe.process
    unit = "h:min" if process == CHROME else "min"
    rows = [("WATCH", unit, "amperes", "volts", "counter", "seen")]
    rows += [
        (
            m.name,
            moment(m.time, process),
            amperes(m.current, rectifier_of(plan), style),
            volts(m.voltage, style),
            charge(m.counter, style),
            "________________",
        )
        for m in moments(plan)
    ]
    return [
        *columns(rows, right=(1, 2, 3, 4), indent=""),
        *wrapped(_OUTSIDE[plan.control] + (f" {_OUTAGE}" if process == CHROME else ""), first="  "),
    ]


# --- before, after, places, areas -------------------------------------------------------------------------


def _below(plan: Plan, style: Style) -> list[str]:
    before = NO_CURRENT if plan.stopped else "; ".join(_before(plan, style))
    least = plan.gaps.least
    gap = [] if least is None else [f"gaps from {style.show(least, LENGTH)}"]
    hung = "; ".join([*places_said(plan, style), *gap, _NOT_CHECKED])
    lines = ["", *_notes(plan)]
    for head, text in (
        ("BEFORE CURRENT", before),
        ("AFTER CURRENT", "; ".join(_after(plan, style))),
        ("HANG", hung),
        ("AREA", "; ".join(_areas(plan, style))),
    ):
        lines += wrapped(text, first=f"{head}  ", rest="  ")
    return [*lines, *wrapped(f"This plan {rests_on(plan)}.", rest="  ")]


def _notes(plan: Plan) -> list[str]:
    """What recipe and load say in their own words."""
    lines = []
    for whose, text in (("recipe", plan.recipe.note), ("load", plan.case.load.note)):
        found = wrapped(f"NOTE of the {whose}  {text}", rest="  ") if text else []
        if len(found) > NOTE_LINES:
            found = [*found[: NOTE_LINES - 1], f"  ... (in full: lineplanner plan {typed(plan.case.name)})"]
        lines += found
    return lines


def _before(plan: Plan, style: Style) -> Iterator[str]:
    case = plan.case
    drop = case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop
    soak = next((s.duration for s in lead_in(plan) if s.stage == "wait"), 0.0)
    yield f"[ ] {bath_said(plan, style)}"
    if plan.start is not None and plan.start.preheat > 0.0:
        yield f"[ ] warm {style.show(plan.start.preheat, TIME)} in hot water"
    elif soak > 0.0:
        yield f"[ ] soak {style.show(soak, TIME)}, current off"
    yield f"[ ] solution {style.show(drop, LENGTH)} below bar"
    yield "[ ] contacts tight, parts hold"
    if any(_plugged(part) for part in case.parts.values()):
        yield "[ ] plugs, stop-off in"
    yield "[ ] exhaust proven"
    yield "[ ] polarity"


def bath_said(plan: Plan, style: Style) -> str:
    """The bath's temperature and the range that the recipe as filed allows: `bath 55 degC (54 to 57)`."""
    filed = plan.filed.temperature
    shown = f"bath {style.show(plan.case.bath.temperature, TEMPERATURE)}"
    if filed is None:
        return shown
    low, high = (
        None if edge is None else style.show(edge, TEMPERATURE).partition(" ")[0]
        for edge in (filed.low, filed.high)
    )
    if low is not None and high is not None:
        return f"{shown} ({low} to {high})"
    if low is not None or high is not None:
        return f"{shown} (at least {low})" if high is None else f"{shown} (at most {high})"
    return f"{shown} (recipe {style.show(filed.value, TEMPERATURE)})"


def _plugged(part: object) -> bool:
    """Whether a part carries masks, or plugs in holes, slots or bores."""
    openings = [one for name in ("holes", "slots", "bores") for one in getattr(part, name, ())]
    return bool(getattr(part, "masks", ())) or any(
        one.plugged for one in (*openings, part) if hasattr(one, "plugged")
    )


def _after(plan: Plan, style: Style) -> Iterator[str]:
    yield "zero amperes, then hands on rack or bar"
    if plan.recipe.after:
        yield ", ".join(step.name for step in plan.recipe.after)
    if _bakes(plan) and plan.recipe.oven_within is not None:
        yield f"oven within {style.time_said(plan.recipe.oven_within)}: oven by ______"


def _bakes(plan: Plan) -> bool:
    """Whether the plan says that these parts are baked."""
    return any(c.id in ("he-bake", "he-uhs") for c in plan.cautions)


def _areas(plan: Plan, style: Style) -> Iterator[str]:
    areas = plan.areas
    parts, carrying = style.show(areas.parts_wet, AREA), style.show(areas.carrying, AREA)
    yield f"carrying {carrying}, of parts {style.show(areas.parts_carrying, AREA)} (wet {parts})"
    for surface in dict.fromkeys(m.why for m in areas.rack):
        metals = [m for m in areas.rack if m.why == surface]
        wet, counted = sum(m.area for m in metals), sum(m.carrying for m in metals)
        yield f"rack {surface_word(surface)} {style.show(wet, AREA)}, counts as {style.show(counted, AREA)}"
    for thief in areas.thieves:
        yield f"{thief.name} {style.show(thief.area, AREA)}, counts as {style.show(thief.carrying, AREA)}"


# --- actuals ----------------------------------------------------------------------------------------------


def _blanks() -> list[str]:
    places = " ".join(f"{n}____" for n in range(1, THICKNESS_BLANKS + 1))
    return [
        "",
        "ACTUAL  start ______ end ______ amperes ______ volts ______ bath temp ______",
        f"        counter ______ thickness {places} initials ____",
    ]
