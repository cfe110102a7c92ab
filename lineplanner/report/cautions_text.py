"""Cautions grouped by moment, gravest first: each in full at its first moment, by its id at later ones."""

from collections.abc import Iterator

from lineplanner.cautions.ranking import Caution, at_moment
from lineplanner.inputs.cautions import MOMENTS, Moment
from lineplanner.report.layout import WIDTH, wrapped
from lineplanner.report.setpoints import caution_lines
from lineplanner.report.style import Style


def by_moment(
    cautions: tuple[Caution, ...],
) -> Iterator[tuple[Moment, tuple[Caution, ...], tuple[Caution, ...]]]:
    """Moment by moment: the cautions said there first, and those said before."""
    said: set[str] = set()
    for moment in MOMENTS:
        here = at_moment(cautions, moment)
        if here:
            yield moment, tuple(c for c in here if c.id not in said), tuple(c for c in here if c.id in said)
            said |= {c.id for c in here}


def cautions_in_full(cautions: tuple[Caution, ...], style: Style, width: int = WIDTH) -> list[str]:
    """All cautions."""
    lines: list[str] = []
    for moment, new, again in by_moment(cautions):
        lines.append(f"  {moment}")
        for caution in new:
            lines += caution_lines(caution, style, width, "    ")
        if again:
            named = ", ".join(f"{c.id} [{c.word}]" for c in again)
            lines += wrapped(f"again: {named}", width, first="    ")
    return lines
