"""The program stage by stage, the thickness with its band, the areas."""

from collections.abc import Iterable, Iterator

from lineplanner.load import Item, Metal
from lineplanner.plan import Plan
from lineplanner.program.stages import Run
from lineplanner.quantities import AREA, LENGTH, MASS, RATE, RATIO, THICKNESS, Area
from lineplanner.report.digits import CHROME, amperes, charge, duration, hours, moment, volts
from lineplanner.report.layout import columns, shortened, squeezed, wrapped
from lineplanner.report.plan_json import COVERAGE
from lineplanner.report.setpoints import rectifier_of
from lineplanner.report.style import Style
from lineplanner.report.words.names import work
from lineplanner.report.words.reasons import surface_word

NAME = 30  # characters of a name in a table
NOT_CHECKED = "not checked by this version: room to the tank's walls and floor"


def program_lines(plan: Plan, style: Style) -> list[str]:
    """The stages in columns, and what the panel holds."""
    return [*columns(stage_rows(plan, style), right=(1, 2, 3, 4, 5, 6)), *program_notes(plan)]


def program_notes(plan: Plan) -> list[str]:
    """What the panel holds and when; without a program, why there is none."""
    if plan.run is None or plan.stopped or not plan.run.stages:
        return ["  none: a stop forbids this plan"]
    return [f"  {text}" for text in _control_notes(plan, plan.run)]


def stage_rows(plan: Plan, style: Style) -> list[tuple[str, ...]]:
    """Stage, from, to, how long, amperes, volts, counter at its end, sign of the work, under a heading.

    Nothing where a stop forbids the plan.
    """
    run, process = plan.run, plan.recipe.process
    if run is None or plan.stopped or not run.stages:
        return []
    clock = "h:min" if process == CHROME else "min"
    rows: list[tuple[str, ...]] = [
        ("stage", "from", f"to {clock}", "lasts", "amperes", "volts", "counter", "work")
    ]
    counted = 0.0
    rectifier = rectifier_of(plan)
    for stage in run.stages:
        counted += stage.charge
        lasts = hours(stage.duration) if process == CHROME and stage.duration >= 3600.0 else ""
        first, last = (
            amperes(stage.from_current, rectifier, style),
            amperes(stage.to_current, rectifier, style),
        )
        low, high = volts(stage.from_voltage, style), volts(stage.to_voltage, style)
        rows.append(
            (
                stage.stage,
                moment(stage.start, process),
                moment(stage.end, process),
                lasts or duration(stage.duration, style),
                _span(first, last),
                _span(low, high),
                charge(counted, style),
                work(stage.polarity),
            )
        )
    return rows


def _span(first: str, last: str) -> str:
    """Two ends of one figure; its unit stands in the heading."""
    numbers = dict.fromkeys(text.partition(" ")[0] for text in (first, last))
    return " to ".join(numbers)


def _control_notes(plan: Plan, run: Run) -> Iterator[str]:
    controls = {s.control for s in run.stages if s.control != "off"}
    if controls == {"current"}:
        yield "volts are estimates; the panel holds the current"
    elif controls == {"voltage"}:
        yield "amperes and counter are estimates; the panel holds the volts"
    else:
        yield "the panel holds the current until the volts meet their limit, then the volts"
    if plan.start is not None and plan.start.preheat > 0.0:
        yield "before: warm the parts in hot water, not in the plating bath"


def thickness_lines(plan: Plan, style: Style) -> list[str]:
    """Aim, what to expect, the band, and what makes it wide."""
    aims, found = plan.aims, plan.thickness
    window = [
        f"{name} {style.show(value, THICKNESS)}"
        for name, value in (("minimum", aims.minimum), ("maximum", aims.maximum))
        if value is not None
    ]
    stock = plan.recipe.stock
    aim = f"aim {style.show(aims.aim, THICKNESS)} per side, total coating"
    if stock > 0.0:
        aim += f", {style.show(stock, THICKNESS)} of it to grind off"
    lines = wrapped("; ".join([aim, *window]), first="  ")
    if (
        plan.stopped
        or found.expected is None
        or found.low is None
        or found.high is None
        or found.band is None
    ):
        return lines
    expected, low, high = (style.show(value, THICKNESS) for value in (found.expected, found.low, found.high))
    lines += wrapped(
        f"expected {expected}; {style.show(COVERAGE.value, RATIO)} between {low} and {high}", first="  "
    )
    apart, inside = style.show(found.band.between, RATIO), style.show(found.band.within, RATIO)
    lines += wrapped(f"half-width between loads {apart}, within a load {inside}:", first="  ")
    rows = [
        (i.name, style.show(i.half_width, RATIO), "within" if i.within else "between", i.figure.status.value)
        for i in found.inputs
    ]
    return lines + columns(rows, right=(1,), indent="    ") + outcome_lines(plan, style)


def outcome_lines(plan: Plan, style: Style) -> list[str]:
    """Growth rate, for chrome efficiency and chromic acid used, and the change of size."""
    outcome = plan.outcome
    if outcome is None:
        return []
    said = [f"grows {style.show(outcome.rate, RATE)} at the end"]
    if outcome.efficiency is not None and outcome.chromic_acid is not None:
        said.append(f"current efficiency {style.show(outcome.efficiency, RATIO)}")
        said.append(f"takes {style.show(outcome.chromic_acid, MASS)} of chromic acid from the bath")
    lines = wrapped("; ".join(said), first="  ", rest="    ")
    side, across = (style.show(value, THICKNESS) for value in (outcome.grown, 2.0 * outcome.grown))
    text = f"size: {side} per side, {across} on diameter, out of the tank"
    if outcome.removed > 0.0:
        text += f"; {style.show(outcome.removed, THICKNESS)} per side removed by the steps counted in"
    return lines + wrapped(text, first="  ", rest="    ")


def areas_lines(plan: Plan, style: Style) -> list[str]:
    """Item by item, what of the rack is counted, and the three sums."""
    areas = plan.areas
    heads = ("each wet", "wet", "carrying", "significant")
    rows: list[tuple[str, ...]] = [(f"in {area_unit(style)}", "count", *heads)]
    for item, name in zip(areas.items, item_names(areas.items), strict=True):
        wanted = (item.wet_each, item.wet, item.carrying, item.significant)
        rows.append((squeezed(name, NAME), str(item.count), *(area_number(a, style) for a in wanted)))
    for metals in alike((*areas.rack, *areas.thieves)):
        name = metals[0].name + (f" to {metals[-1].name}" if len(metals) > 1 else "")
        wet, carrying = sum(m.area for m in metals), sum(m.carrying for m in metals)
        each, *shown = (area_number(a, style) for a in (metals[0].area, wet, carrying))
        name = shortened(f"{name} ({surface_word(metals[0].why)})", NAME)
        rows.append((name, str(len(metals)), each, *shown, ""))
    sums = (area_number(a, style) for a in (areas.wet, areas.carrying, areas.significant))
    rows.append(("together", "", "", *sums))
    return [*columns(rows, right=(1, 2, 3, 4, 5)), *area_notes(plan, style)]


def area_notes(plan: Plan, style: Style) -> list[str]:
    """The least gap between parts, and what is not checked."""
    gap = gap_said(plan, style)
    return [f"  {text}" for text in (*([gap] if gap else []), NOT_CHECKED)]


def gap_said(plan: Plan, style: Style) -> str:
    """The least gap between parts and where it is; nothing where no two hang side by side."""
    least, between = plan.gaps.least, plan.gaps.between
    if least is None or between is None:
        return ""
    return f"least gap between parts {style.show(least, LENGTH)}, part {between[0]} to part {between[1]}"


def area_unit(style: Style) -> str:
    """The unit that all areas of a table are in: it stands in the heading."""
    return style.show(1.0, AREA).partition(" ")[2]


def area_number(area: Area, style: Style) -> str:
    """An area of a table, without its unit."""
    return style.show(area, AREA).partition(" ")[0]


def item_names(items: Iterable[Item]) -> list[str]:
    """The parts by name; two of one name with the material that tells them apart."""
    listed = list(items)
    names = [item.name for item in listed]
    return [
        item.name if names.count(item.name) == 1 else f"{item.name}, {item.material.name}" for item in listed
    ]


def alike(metals: Iterable[Metal]) -> list[list[Metal]]:
    """Rack metal in groups of one surface and one size, in the order of the rack."""
    groups: dict[tuple[str, float, float], list[Metal]] = {}
    for metal in metals:
        groups.setdefault((metal.why, metal.factor, round(metal.area, 9)), []).append(metal)
    return list(groups.values())
