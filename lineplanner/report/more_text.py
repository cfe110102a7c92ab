"""How many more of a part: what fits, what the line carries, what stops one more; as lines and as JSON."""

import json
from typing import Any

from lineplanner.advice import More
from lineplanner.quantities import LENGTH
from lineplanner.report.layout import wrapped
from lineplanner.report.places import places_said
from lineplanner.report.plan_json import plan_record
from lineplanner.report.setpoints import fix_of, setpoint_lines, text_of, verdict_line
from lineplanner.report.style import Style
from lineplanner.report.words.names import check_name

FORMAT = "lineplanner fill 1"


def more_lines(more: More, style: Style) -> list[str]:
    """What fits, what is carried, what stops one more; then the setpoints with those carried."""
    name = more.made.case.parts[more.part].name
    lines = [f"{name}: {more.fits} {'' if more.begun else 'more '}fit {_gaps(more, style)}"]
    if more.stop is not None and more.made.stopped:
        as_is = "even one of them" if more.begun else "the load as it hangs"
        lines.append(f"{as_is} is stopped by {_stopped(more, style)}")
    elif more.stop is None:
        lines.append(
            f"the line carries {'all of them' if more.fits else 'the load as it hangs'}: only the room ends"
        )
    else:
        lines.append(
            f"the line carries {more.carried} of them; one more is stopped by {_stopped(more, style)}"
        )
    lines.append("the least gap to tank walls and floor is not checked by this version")
    return [text for line in lines for text in wrapped(line, rest="  ")]


def more_text(more: More, style: Style) -> str:
    """The lines, and the load with those that are carried: where it hangs, what to set, whether it may run."""
    count = more.carried or int(more.begun)
    head = f"with {count} {'of them' if more.begun else 'more'}" if count else "as it hangs"
    hung = [f"{head}: {place}" for place in places_said(more.made, style)]
    below = [text for line in hung for text in wrapped(line, rest="  ")]
    shown = [*setpoint_lines(more.made, style), verdict_line(more.made, style)]
    return "\n".join([*more_lines(more, style), "", *below, "", *shown])


def more_json(more: More, style: Style) -> str:
    """The same as JSON, with the whole plan of the load with those that are carried."""
    stop: dict[str, Any] | None = None
    if more.stop is not None:
        stop = {"check": more.stop.check, "text": text_of(more.stop, style), "fix": fix_of(more.stop, style)}
    record = {
        "format": FORMAT,
        "part": more.part,
        "fits": more.fits,
        "carried": more.carried,
        "spacing_m": more.spacing,
        "spacing_from": "recipe" if more.asked else "load",
        "stop": stop,
        "hang": [
            {"part": hang.part, "tips": list(hang.tips), "at_m": [list(spot) for spot in hang.at]}
            for hang in more.racked.load.hangs
        ],
        "plan": plan_record(more.made, style),
    }
    return json.dumps(record, indent=2, ensure_ascii=True, allow_nan=False)


def _gaps(more: More, style: Style) -> str:
    if more.asked:
        return f"at the recipe's gap of {style.show(more.spacing, LENGTH)}"
    if more.spacing > 0.0:
        return f"at the gap of {style.show(more.spacing, LENGTH)} that hangs there; the recipe names none"
    return "without overlapping; the recipe names no gap"


def _stopped(more: More, style: Style) -> str:
    assert more.stop is not None
    return f"{check_name(more.stop.check)}: {text_of(more.stop, style)}"
