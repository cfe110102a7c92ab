"""Program, checks, areas, card and cautions as rows that a screen can point at."""

from collections.abc import Iterator

from lineplanner.findings import Finding, Level
from lineplanner.plan import Plan
from lineplanner.quantities import AREA, RATIO, THICKNESS, Current
from lineplanner.report.card import card_lines
from lineplanner.report.cautions_text import by_moment
from lineplanner.report.checks_text import HEADING, check_rows, said
from lineplanner.report.digits import (
    NONE,
    amperes,
    is_lower_limit,
    use,
)
from lineplanner.report.layout import WIDTH, wrapped
from lineplanner.report.plan_text import steps_lines
from lineplanner.report.program_text import alike, item_names, program_notes, stage_rows, thickness_lines
from lineplanner.report.rows import Row, Table
from lineplanner.report.setpoints import caution_lines, rectifier_of
from lineplanner.report.style import Style
from lineplanner.report.views import CAUTION, check_path, item_paths
from lineplanner.report.words.names import check_name, short_status
from lineplanner.report.words.reasons import surface_word

BAR = 10  # characters of a full bar


# --- program ---------------------------------------------------------------------------------------------


def program_table(plan: Plan, style: Style) -> Table:
    """The stages as the report prints them, each cell with its figure."""
    heading, *listed = stage_rows(plan, style) or [()]
    rows = [_stage(cells, n, last=n == len(listed) - 1) for n, cells in enumerate(listed)]
    return Table(heading, frozenset(range(1, 7)) if rows else frozenset(), tuple(rows))


def _stage(cells: tuple[str, ...], place: int, *, last: bool) -> Row:
    path = f"program[{place}]"
    counter = "charge_Ah.counter" if last else None
    begin, end = f"{path}.from_s", "time.total_s" if last else f"{path}.to_s"  # the last end is solved for
    paths = (None, begin, end, end, f"{path}.to_A", f"{path}.to_V", counter, None)
    return Row(cells, end if last else f"{path}.to_A", paths=paths)


def program_said(plan: Plan, style: Style) -> list[str]:
    """What stands below the stages: what the panel holds, the thickness with its band, the side steps."""
    return [
        *program_notes(plan),
        "",
        *thickness_lines(plan, style),
        *([""] if plan.recipe.before else []),
        *steps_lines(plan, style),
    ]


# --- checks ----------------------------------------------------------------------------------------------

_MARK = {Level.STOP: "STOP", Level.CAUTION: "CAUTION", Level.NOTE: "note", Level.OK: "ok"}
_USE = 3  # the column that the bar stands behind


def checks_table(plan: Plan, style: Style) -> Table:
    """Every check, gravest and tightest first, notes last; comparisons as the report prints them."""
    cells = check_rows(plan, style)
    order = sorted(range(len(plan.findings)), key=lambda n: plan.findings[n].level is Level.NOTE)
    rows = tuple(_check(plan, n, cells.get(n) or _uncompared(plan.findings[n]), style) for n in order)
    return Table(_with_bar(HEADING, ""), frozenset({1, 2, 3}), rows)


def _is_compared(finding: Finding) -> bool:
    return finding.value is not None and finding.limit is not None


def _uncompared(finding: Finding) -> tuple[str, ...]:
    """The cells of a check that compares no two numbers."""
    status = short_status(finding.source.status.value)
    return (check_name(finding.check), NONE, NONE, NONE, _MARK[finding.level], status)


def _with_bar(cells: tuple[str, ...], bar: str) -> tuple[str, ...]:
    return (*cells[: _USE + 1], bar, *cells[_USE + 1 :])


def _check(plan: Plan, place: int, cells: tuple[str, ...], style: Style) -> Row:
    finding, front = plan.findings[place], f"findings[{place}]"
    numbers = [f"{front}.{key}" if _is_compared(finding) else None for key in ("value", "limit")]
    return Row(
        _with_bar(cells, bar(finding, style)), check_path(place), finding.level.value, (None, *numbers)
    )


def bar(finding: Finding, style: Style) -> str:
    """How far an upper limit is used up, in tenths; nothing where it is no such limit."""
    if use(finding, style) == NONE or is_lower_limit(finding) or finding.margin is None:
        return ""
    full = min(BAR, max(0, int((1.0 - finding.margin) * BAR)))
    return "#" * full + "-" * (BAR - full)


def check_said(plan: Plan, path: str, style: Style, width: int = WIDTH) -> list[str]:
    """A check in words with its way out."""
    finding = next((f for n, f in enumerate(plan.findings) if check_path(n) == path), None)
    return [] if finding is None else [line.strip() for line in said(finding, style, width)]


# --- areas -----------------------------------------------------------------------------------------------


def areas_table(plan: Plan, style: Style) -> Table:
    """Item by item, what of the rack is counted, the sums; with the share of the current that each takes."""
    columns = ("", "count", "carrying", "share", "current", "thickness", "wet", "each wet", "significant")
    areas = plan.areas
    whole = (areas.carrying, areas.wet, areas.significant)
    carrying, wet, significant = (style.show(area, AREA) for area in whole)
    current, current_path = whole_current(plan)
    shown = amperes(current, rectifier_of(plan), style)
    together = ("together", "", carrying, "", shown, "", wet, "", significant)
    paths = (None, None, "area.carrying_m2", None, current_path, None, "area.total_m2", None)
    rows = [*_items(plan, style), *_metals(plan, style)]
    rows.append(Row(together, "area.carrying_m2", paths=(*paths, "area.significant_m2")))
    return Table(columns, frozenset(range(1, 9)), tuple(rows))


def whole_current(plan: Plan) -> tuple[Current | None, str]:
    """What the items share: the panel's setting, the peak under voltage control; with its key path."""
    run = None if plan.stopped else plan.run
    if plan.control == "voltage":
        return None if run is None else run.peak_current, "current.peak_A"
    return None if run is None else run.panel_current, "current.panel_set_A"


def _share(part: float, whole: float | None, style: Style) -> str:
    return style.show(part / whole, RATIO, unit="%") if whole else NONE


def _items(plan: Plan, style: Style) -> Iterator[Row]:
    runs = () if plan.run is None or plan.stopped else plan.run.items
    whole, _ = whole_current(plan)
    names = item_names(plan.areas.items)
    for place, item in enumerate(plan.areas.items):
        run = runs[place] if place < len(runs) else None
        wet, each, significant = (style.show(a, AREA) for a in (item.wet, item.wet_each, item.significant))
        cells = (
            names[place],
            str(item.count),
            style.show(item.carrying, AREA),
            _share(
                item.carrying if run is None else run.current,
                plan.areas.carrying if run is None else whole,
                style,
            ),
            amperes(None if run is None else run.current, rectifier_of(plan), style),
            NONE if run is None else style.show(run.thickness, THICKNESS),
            wet,
            each,
            significant,
        )
        front = f"area.items[{place}]"
        keys = ("count", "carrying_m2", "", "current_A", "thickness_m", "total_m2", "each_m2")
        paths = (None, *(f"{front}.{key}" if key else None for key in keys))
        yield Row(cells, f"{front}.carrying_m2", paths=paths)


def _metals(plan: Plan, style: Style) -> Iterator[Row]:
    for group, path in ((plan.areas.rack, "area.rack_m2"), (plan.areas.thieves, "area.thieves_m2")):
        for metals in alike(group):
            to = f" to {metals[-1].name}" if len(metals) > 1 else ""
            wet, carrying = sum(m.area for m in metals), sum(m.carrying for m in metals)
            shown, share = style.show(carrying, AREA), _share(carrying, plan.areas.carrying, style)
            name = f"{metals[0].name}{to} ({surface_word(metals[0].why)})"
            each = style.show(metals[0].area, AREA)
            yield Row((name, str(len(metals)), shown, share, "", "", style.show(wet, AREA), each, ""), path)


# --- card and cautions -----------------------------------------------------------------------------------


def card_rows(plan: Plan, style: Style) -> tuple[Row, ...]:
    """The card line by line, each with a figure that it prints."""
    paths = {text: path for text, path in item_paths(plan, style).items() if text}
    known = sorted(paths, key=len, reverse=True)
    rows = []
    for line in card_lines(plan, style):
        found = next((text for text in known if text in line), None)
        rows.append(Row((line,), None if found is None else paths[found]))
    return tuple(rows)


def caution_rows(plan: Plan, style: Style, width: int = WIDTH) -> tuple[Row, ...]:
    """All cautions moment by moment, line by line, each line with its caution."""
    rows: list[Row] = []
    for when, new, again in by_moment(plan.cautions):
        rows.append(Row((f"  {when}",), mark="heading"))
        for one in new:
            lines = caution_lines(one, style, width, "    ")
            rows += [Row((line,), f"{CAUTION}{one.id}", one.word) for line in lines]
        named = ", ".join(f"{c.id} [{c.word}]" for c in again)
        lines = wrapped(f"again: {named}", width, first="    ") if again else []
        rows += [Row((line,), f"{CAUTION}{again[0].id}") for line in lines]
    return tuple(rows)
