"""The areas of a part, a rack or a load as text, face by face with the reasons."""

from lineplanner.quantities import AREA, RATIO
from lineplanner.report.area_json import why_text
from lineplanner.report.area_ledger import Areas, Row
from lineplanner.report.layout import columns, wrapped
from lineplanner.report.style import Style


def area_text(areas: Areas, style: Style) -> str:
    """The three areas, then each face."""
    lines = [areas.name, *wrapped(areas.taken, first="  ")]
    for label, area in (("wet", areas.wet), ("carrying", areas.carrying), ("significant", areas.significant)):
        lines.append(f"  {label:<12}{style.show(area, AREA):>12}")
    rows: list[tuple[str, ...]] = [("face", "count", "drawn", "factor", "wet", "carrying", "significant")]
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
        style.show(row.area, AREA),
        style.show(row.factor, RATIO),
        *(style.show(area, AREA) for area in areas),
    )
