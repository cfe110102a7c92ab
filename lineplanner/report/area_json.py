"""The areas of a part, a rack or a load as JSON."""

from typing import Any

from lineplanner.report.area_ledger import Areas, Row
from lineplanner.report.style import Style
from lineplanner.report.words import sentence

FORMAT = "lineplanner area 1"


def area_record(areas: Areas, style: Style) -> dict[str, Any]:
    """The areas as the values that JSON holds, SI."""
    return {
        "format": FORMAT,
        "name": areas.name,
        "wet_m2": areas.wet,
        "carrying_m2": areas.carrying,
        "significant_m2": areas.significant,
        "faces": [_face(row, style) for row in areas.rows],
        "kind": areas.kind,
        "taken": areas.taken,
    }


def _face(row: Row, style: Style) -> dict[str, Any]:
    return {
        "face": row.face,
        "m2": row.area,
        "wet": row.wet > 0.0,
        "factor": row.factor,
        "significant": row.significant > 0.0,
        "why": why_text(row, style),
        "count": row.count,
        "wet_m2": row.wet,
        "carrying_m2": row.carrying,
        "significant_m2": row.significant,
    }


def why_text(row: Row, style: Style) -> str:
    """The reasons of a face in one line."""
    return "; ".join(sentence(key, facts, style) for key, facts in row.why)
