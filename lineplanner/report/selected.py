"""The selected part of a load in words: which it is, where it hangs, what it has in the solution, what it takes."""

from lineplanner.inputs.hanging import parts_hung
from lineplanner.plan import Plan
from lineplanner.quantities import ANGLE, AREA, CURRENT_DENSITY, LENGTH, THICKNESS, Length
from lineplanner.report.digits import amperes
from lineplanner.report.picture import Hung
from lineplanner.report.rows import Row
from lineplanner.report.setpoints import rectifier_of
from lineplanner.report.style import Style
from lineplanner.report.words.names import number_of


def selected_lines(plan: Plan, style: Style, hang: int, hung: Hung | None) -> tuple[str, str]:
    """The selected part on two lines: which it is and how it hangs; what it has in the solution and takes."""
    rows = selected_rows(plan, style, hang, hung)
    which, how, item, wet, carrying = (row.cells[0] for row in rows[:5])
    current, expected = (
        next((row.cells[0] for row in rows if row.path and row.path.endswith(key)), "")
        for key in (".current_A", ".thickness_m")
    )
    taken = f"{carrying}, {current.partition(': ')[2]}" if current else carrying
    return f"{which}   {how}   {item}", "   ".join((wet, taken, *([expected] if expected else [])))


def selected_rows(plan: Plan, style: Style, hang: int, hung: Hung | None) -> tuple[Row, ...]:
    """The same line by line, each with its figure. All areas and currents are those of the item it belongs to."""
    place = item_of(plan, hang)
    item, front = plan.areas.items[place], f"area.items[{place}]"
    each, carrying = style.show(item.wet_each, AREA), style.show(item.carrying, AREA)
    all_said = f"all {item.count}" if item.count > 1 else "it"
    rows = [
        Row((_which(plan, hang, hung),), f"{front}.count"),
        Row((_how(plan, style, hang, hung),), f"{front}.count"),
        Row((f"{item.name}, {item.material.name}",), f"{front}.count"),
        Row((_one(each, hung),), f"{front}.each_m2"),
        Row((f"{all_said}: carrying {carrying}",), f"{front}.carrying_m2"),
    ]
    run = None if plan.run is None or plan.stopped or place >= len(plan.run.items) else plan.run.items[place]
    if run is not None:
        current = amperes(run.current, rectifier_of(plan), style)
        density = style.show(run.density, CURRENT_DENSITY)
        rows.append(Row((f"{all_said}: {current}",), f"{front}.current_A"))
        rows.append(Row((f"expected {style.show(run.thickness, THICKNESS)}",), f"{front}.thickness_m"))
        rows.append(Row((f"at {density}",), f"{front}.current_A"))
    if hung is not None:
        across, down = style.show(hung.at[0], LENGTH), style.show(-hung.at[1], LENGTH)
        rows.append(Row((f"hung {across} across, {down} down",)))
    return tuple(rows)


def scale_bar(cell: Length, most: int, style: Style) -> tuple[int, str]:
    """A round length for a bar of at most so many cells of a width in m: how many cells it takes, and its text.

    >>> scale_bar(0.012, 20, Style("metric")), scale_bar(0.012, 20, Style("us"))
    ((17, '200 mm'), (11, '5 in'))
    """
    unit = 0.0254 if style.system == "us" else 0.001
    lengths = [n * 10**power * unit for power in range(-2, 5) for n in (1, 2, 5)]
    fitting = max((length for length in lengths if length <= most * cell), default=lengths[0])
    return max(round(fitting / cell), 1), style.show(fitting, LENGTH)


def _one(each: str, hung: Hung | None) -> str:
    """What one part has in the solution: the item's own figure is that of a part wholly in it."""
    if hung is not None and hung.wetness == "dry":
        return "this one: none in the solution"
    if hung is not None and hung.wetness == "partly wet":
        return f"one in full: wet {each}"
    return f"one: wet {each}"


def item_of(plan: Plan, hang: int) -> int:
    """The item of the areas that an entry of the load belongs to: parts of one drawing and one metal together."""
    kinds = [(h.part, h.material or plan.case.parts[h.part].material) for h in plan.case.load.hangs]
    return list(dict.fromkeys(kinds)).index(kinds[hang])


def _which(plan: Plan, hang: int, hung: Hung | None) -> str:
    total = sum(parts_hung(one) for one in plan.case.load.hangs)
    if hung is not None:
        return f"part {hung.number} of {total}"
    return f"{number_of(parts_hung(plan.case.load.hangs[hang]), 'part')} of {total}, only counted"


def _how(plan: Plan, style: Style, hang: int, hung: Hung | None) -> str:
    entry = plan.case.load.hangs[hang]
    said: list[str] = [entry.facing]
    if hung is not None:
        said = [f"tip {hung.tip}" if hung.tip else "free", entry.facing, hung.wetness]
        said += [f"on the {hung.side}"] if entry.side != "front" else []
        said += ["with stop-off"] if hung.masked else []
    if entry.turn:
        said.append(f"turned {style.show(entry.turn, ANGLE)}")
    return ", ".join(said)
