"""The way out that is offered leads out: a current density said to fit is set and the check is met."""

import re
from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.files.library import Library
from lineplanner.findings import Finding, Level
from lineplanner.inputs.case import Case
from lineplanner.inputs.change import Change
from lineplanner.plan import plan
from lineplanner.quantities import CURRENT_DENSITY
from lineplanner.racking import one_less
from lineplanner.report.setpoints import fix_of
from lineplanner.report.style import Style
from lineplanner.units import parse

LIBRARY = Library(Path(__file__).parents[2])
STYLES = [Style("metric", ascii=True), Style("us", ascii=True)]


def at(load: str, density: float) -> Case:
    case = LIBRARY.case(load)
    change = replace(case.load.change or Change(), current_density=density)
    return replace(case, load=replace(case.load, change=change))


def fitting(finding: Finding, style: Style) -> float | None:
    """The current density that a way out names, as it is printed."""
    found = re.search(r"at ([\d.]+ A/(?:dm2|ft2)) at most", fix_of(finding, style) or "")
    return None if found is None else parse(found[1], CURRENT_DENSITY)


@pytest.mark.parametrize("style", STYLES, ids=lambda style: style.system)
@pytest.mark.parametrize("load", ["pump-covers-12", "valve-blocks-24", "vent-panels-24", "rod-40x900"])
def test_the_density_that_is_offered_fits(load: str, style: Style) -> None:
    seen = 0
    for density in (200.0, 258.0, 400.0, 700.0, 1500.0, 4000.0, 9000.0):
        for finding in plan(at(load, density)).findings:
            offered = fitting(finding, style) if finding.level is Level.STOP else None
            if offered is None:
                continue
            seen += 1
            after = plan(at(load, offered))
            this = finding.check, finding.facts.get("part")
            same = [one for one in after.findings if (one.check, one.facts.get("part")) == this]
            assert all(one.level is not Level.STOP for one in same), (finding.check, density, offered)
    assert seen


@pytest.mark.parametrize(
    ("authority", "level"),
    [
        ("", Level.STOP),
        ("x", Level.STOP),
        ("2025-03-01", Level.STOP),
        ("letter of 2025-02-30", Level.STOP),
        ("letter of March", Level.STOP),
        ("letter of 2025-03-01", Level.NOTE),
    ],
)
def test_only_a_document_with_its_date_lifts_the_stop_of_high_strength_steel(
    authority: str, level: Level
) -> None:
    case = LIBRARY.case("strut-pins-4340")
    made = plan(replace(case, recipe=replace(case.recipe, owner_authority=authority)))
    assert {f.level for f in made.findings if f.check == "design-authority"} == {level}


def test_with_as_many_parts_less_as_are_said_the_rectifier_carries_the_rest() -> None:
    seen = 0
    for density in (450.0, 500.0, 700.0, 1500.0, 4000.0):  # from 700 on the volts hold the amperes back
        case = at("valve-blocks-24", density)
        for finding in plan(case).findings:
            off = finding.facts.get("parts_off")
            if not isinstance(off, int) or finding.level is not Level.STOP:
                continue
            seen += 1
            less = case.load
            for _ in range(off):
                less = one_less(less, 0)
            after = plan(replace(case, load=less))
            same = [one for one in after.findings if one.check == finding.check]
            assert all(one.level is not Level.STOP for one in same), (finding.check, density, off)
    assert seen
