"""The areas of a part, a rack or a load as text, face by face with the reasons."""

from lineplanner.quantities import AREA, RATIO
from lineplanner.report.area_json import why_text
from lineplanner.report.area_ledger import Areas, Row
from lineplanner.report.layout import columns, wrapped
from lineplanner.report.program_text import area_number, area_unit
from lineplanner.report.style import Style


def area_text(areas: Areas, style: Style) -> str:
    """The three areas, then each face."""
    lines = [areas.name, *wrapped(areas.taken, first="  ")]
    for label, area in (("wet", areas.wet), ("carrying", areas.carrying), ("significant", areas.significant)):
        lines.append(f"  {label:<12}{style.show(area, AREA):>12}")
    heads = ("count", "drawn", "factor", "wet", "carrying", "significant")
    rows: list[tuple[str, ...]] = [(f"face, in {area_unit(style)}", *heads)]
    rows += [_row(row, style) for row in areas.rows]
    lines += ["", *columns(rows, right=(1, 2, 3, 4, 5, 6)), ""]
    for row in areas.rows:
        if row.why:
            lines += wrapped(f"{row.face}: {why_text(row, style)}", first="  ", rest="    ")
    return "\n".join(lines).rstrip("\n")


def _row(row: Row, style: Style) -> tuple[str, ...]:
    areas = (row.wet, row.carrying, row.significant)
    return (
        row.face,
        str(row.count),
        area_number(row.area, style),
        style.show(row.factor, RATIO),
        *(area_number(area, style) for area in areas),
    )
