"""The views of a plan in pieces that a screen can point at: every text worded, with the key path of its figure."""

from collections.abc import Iterator, Mapping

from lineplanner.plan import Plan
from lineplanner.quantities import AREA, CURRENT_DENSITY
from lineplanner.report.digits import amperes, charge, run_time_said, volts
from lineplanner.report.explain import explanation, stories
from lineplanner.report.layout import WIDTH, shortened, shortened_verdict, wrapped
from lineplanner.report.plan_text import recipe_said
from lineplanner.report.rows import Head, Line, Piece, Row, Table
from lineplanner.report.setpoints import (
    SET,
    caution_line,
    caution_text,
    expected_volts,
    keyed_in,
    lead_in_items,
    setpoint_lines,
    verdict_line,
    verdict_word,
    worst,
)
from lineplanner.report.style import Style

CAUTION = "caution:"
_GAP = "   "  # between the items of a setpoint line
_ON = " on "
_LEAST_NAME = 12  # letters of a recipe's name before its status is said shorter


__all__ = ["Head", "Line", "Piece", "Row", "Table", "head_of", "title_text", "why_lines", "why_title"]


def title_text(plan: Plan, width: int = WIDTH) -> str:
    """The load, its recipe with revision, status and deviations, its tank; the recipe's name gives way if need be."""
    name = plan.filed.name
    before = f"{plan.case.name}{_GAP}"
    said = recipe_said(plan).removeprefix(name)
    after = f"{said}{_GAP}tank {plan.case.tank.name}"
    room = width - len(before) - len(after)
    if room < _LEAST_NAME:  # the status must not be cut: why it is a draft is in the records
        after = after.replace("DRAFT RECIPE (changed since it was approved)", "DRAFT, changed")
        room = width - len(before) - len(after)
    return f"{before}{name if len(name) <= room else shortened(name, room)}{after}"


def head_of(plan: Plan, style: Style, width: int = WIDTH) -> Head:
    """The head of a load in a given width; the verdict on one line."""
    caution = caution_line(plan, style, width=width)
    return Head(
        setpoints=setpoint_pieces(plan, style, width),
        verdict=Piece(shortened_verdict(verdict_line(plan, style), width), verdict_path(plan)),
        level=worst(plan).value,
        caution=caution,
        caution_word=caution.partition(" ")[0],
    )


# --- setpoints -------------------------------------------------------------------------------------------


def setpoint_pieces(plan: Plan, style: Style, width: int = WIDTH) -> tuple[Line, ...]:
    """The setpoint lines in pieces; joined they are the lines themselves."""
    paths = item_paths(plan, style)
    return tuple(_pieces(line, paths) for line in setpoint_lines(plan, style, width))


def _pieces(line: str, paths: Mapping[str, str]) -> Line:
    found: list[Piece] = [Piece(line[: len(SET)])]
    for place, item in enumerate(line[len(SET) :].split(_GAP)):
        if place:
            found.append(Piece(_GAP))
        first, on, second = item.partition(_ON)
        if item not in paths and first in paths and second in paths:  # current density on its area
            found += [Piece(first, paths[first]), Piece(on), Piece(second, paths[second])]
        else:
            found.append(Piece(item, paths.get(item)))
    return tuple(found)


def item_paths(plan: Plan, style: Style) -> dict[str, str]:
    """The items of the setpoint lines with the figure that each prints."""
    run = plan.run
    if run is None or plan.stopped or run.total_time is None:
        return {}
    process, rectifier = plan.recipe.process, run.rectifier
    at_set, total = (
        run_time_said(run.time_at_set, process, style),
        run_time_said(run.total_time, process, style),
    )
    limit = run.limit_reached
    held = "" if limit is None else run_time_said(limit, process, style)
    found = {
        f"on {style.show(plan.areas.carrying, AREA)}": "area.carrying_m2",
        style.show(plan.areas.carrying, AREA): "area.carrying_m2",
        f"plate {at_set}": "time.at_set_current_s",
        f"total {total}": "time.total_s",
        total: "time.total_s",
        f"held at {volts(run.voltage_limit, style)} from {held}": "voltage.limit_reached_s",
        f"stop at {charge(run.counter, style)}": "charge_Ah.counter",
        f"about {charge(run.counter, style)}": "charge_Ah.counter",
        f"expect up to {amperes(run.peak_current, rectifier, style)}": "current.peak_A",
        expected_volts(run, style): "voltage.end_V",
        **dict(_lead_in_paths(plan, style)),
    }
    if plan.control == "voltage":
        found[" then ".join(volts(s.to.value, style) for s in plan.recipe.voltages)] = "voltage.end_V"
    else:
        found[amperes(run.panel_current, rectifier, style)] = "current.panel_set_A"
    if plan.recipe.current_density is not None:
        found[style.show(plan.recipe.current_density.value, CURRENT_DENSITY)] = "current.density_A_per_m2"
    return {text: path for text, path in found.items() if path in plan.figures}


def _lead_in_paths(plan: Plan, style: Style) -> Iterator[tuple[str, str]]:
    """What comes before the main stage, each with the end of its stage; steps are said first, as one.

    What a voltage limit cuts short goes to the time of the limit: there the set figures end.
    """
    stages = keyed_in(plan)
    steps = [n for n in range(len(stages)) if stages[n].stage == "step"]
    order = steps[-1:] + [n for n in range(len(stages)) if n not in steps]
    run = () if plan.run is None else plan.run.stages
    for text, place in zip(lead_in_items(plan, style), order, strict=True):
        whole = place < len(run) and run[place].end == stages[place].end
        yield text, f"program[{place}].to_s" if whole else "voltage.limit_reached_s"


def verdict_path(plan: Plan) -> str | None:
    """The check that a verdict names first."""
    named = plan.binding if verdict_word(plan) == "CHECKS MET" else plan.findings[0]
    return next((check_path(n) for n, f in enumerate(plan.findings) if f is named), None)


def check_path(place: int) -> str:
    """The key path of the margin of a finding."""
    return f"findings[{place}].margin"


# --- why -------------------------------------------------------------------------------------------------


def why_title(plan: Plan, path: str) -> str:
    """What a story is about."""
    if path.startswith(CAUTION):
        return f"caution {path.removeprefix(CAUTION)}"
    told = stories(plan).get(path)
    return path if told is None else told.label


def why_lines(plan: Plan, path: str, style: Style) -> list[str]:
    """The story of a figure, of a check or of a caution. Raises InputError where the plan has no such figure."""
    if path.startswith(CAUTION):
        return _why_caution(plan, path.removeprefix(CAUTION), style)
    place = _place_of(path)
    if place is not None and plan.findings[place].margin is None:
        return _why_unmeasured(plan, place, style)
    return explanation(plan, [path], style)


def _place_of(path: str) -> int | None:
    """Which finding a path is the margin of."""
    inside = path.removeprefix("findings[").removesuffix("].margin")
    return int(inside) if path == f"findings[{inside}].margin" and inside.isdigit() else None


def _why_unmeasured(plan: Plan, place: int, style: Style) -> list[str]:
    """A finding that compares no two numbers: what it says, and on whose word."""
    from lineplanner.report.checks_text import said

    finding = plan.findings[place]
    source = f"{finding.source}  [{finding.source.status.value}]"
    return [
        f"check:{finding.check}",
        *said(finding, style),
        *wrapped(source, first="  source: ", rest="    "),
    ]


def _why_caution(plan: Plan, name: str, style: Style) -> list[str]:
    """A caution in full: when it holds, and on whose word."""
    one = next(c for c in plan.cautions if c.id == name)
    return [
        *wrapped(f"[{one.word}] {caution_text(one, style)}"),
        "",
        *wrapped(", ".join(one.moments), first="  when: ", rest="    "),
        *wrapped(str(one.source), first="  source: ", rest="    "),
        f"  status: {one.source.status.value}, looked at {one.as_of.isoformat()}",
    ]
