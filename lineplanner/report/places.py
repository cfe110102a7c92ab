"""Where each part hangs: tips by row, or free places, with how many parts."""

from collections.abc import Iterator

from lineplanner.inputs.hanging import parts_hung
from lineplanner.inputs.load import Hang
from lineplanner.plan import Plan
from lineplanner.quantities import ANGLE, LENGTH, Length
from lineplanner.report.style import Style


def places_said(plan: Plan, style: Style) -> Iterator[str]:
    """One line of text for each hang."""
    for hang in plan.case.load.hangs:
        part = plan.case.parts[hang.part]
        yield f"{parts_hung(hang)} x {part.name}: {_where(hang, style)}{_how(hang, style)}"
    for thief in (*plan.case.rack.thieves, *plan.case.load.thieves):
        yield f"thief: {thief.name}"


def _where(hang: Hang, style: Style) -> str:
    if hang.tips:
        each = f", {hang.tips_each} tips each" if hang.tips_each > 1 else ""
        return f"tips {', '.join(hang.tips)}{each}"
    if hang.at:
        across, down = _spread([x for x, _ in hang.at], style), _spread([d for _, d in hang.at], style)
        return f"free, {across} across, {down} below the bar"
    return "counted only, places not named"


def _spread(values: list[Length], style: Style) -> str:
    """Two or three places by name, more by their ends."""
    different = sorted(set(values))
    shown = [style.show(value, LENGTH) for value in different]
    if len(shown) <= 3:
        return " / ".join(shown)
    return f"{len(shown)} places from {shown[0]} to {shown[-1]}"


def _how(hang: Hang, style: Style) -> str:
    said: list[str] = [] if hang.facing == "flat" else [hang.facing]
    if hang.turn:
        said.append(f"turned {style.show(hang.turn, ANGLE)}")
    if hang.side != "front":
        said.append("one on each side" if hang.side == "both" else "on the back")
    return "".join(f", {one}" for one in said)
