"""What the gaps of a load are held against, and what is said of them."""

from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.files.library import Library
from lineplanner.findings import Finding, Level
from lineplanner.inputs.load import Hang
from lineplanner.plan import Plan, plan
from lineplanner.report.setpoints import fix_of, text_of
from lineplanner.report.style import Style

CASE = Library(Path(__file__).parents[2]).case("valve-blocks-24")  # 75 mm between parts 1 and 5
METRIC = Style("metric")


def asked(spacing: float | None) -> Plan:
    return plan(replace(CASE, recipe=replace(CASE.recipe, spacing=spacing)))


def found(made: Plan, check: str) -> list[Finding]:
    return [finding for finding in made.findings if finding.check == check]


def test_a_recipe_that_asks_for_nothing_checks_no_gap() -> None:
    made = asked(None)
    assert found(made, "gaps") == []
    assert made.gaps.least == pytest.approx(0.075)
    assert made.figures["gaps.least_m"].value == made.gaps.least


def test_enough_room_is_ok_and_too_little_a_caution_that_says_where() -> None:
    (enough,) = found(asked(0.06), "gaps")
    assert enough.level is Level.OK
    (short,) = found(asked(0.08), "gaps")
    assert short.level is Level.CAUTION  # never a stop: a hand can part them
    assert (short.value, short.limit) == (pytest.approx(0.075), 0.08)
    assert text_of(short, METRIC) == (
        "75 mm between parts 1 and 5, the recipe asks for 80 mm (pairs closer: 20)"
    )
    assert fix_of(short, METRIC) == "Hang them wider, or leave tips free between them"


def test_parts_that_overlap_are_named() -> None:
    rack = replace(CASE.rack, hanging="free")
    two = Hang(part="valve-block", at=((0.1, 0.3), (0.12, 0.3), (0.5, 0.3)))
    made = plan(replace(CASE, rack=rack, load=replace(CASE.load, hangs=(two,))))
    (finding,) = found(made, "overlap")
    assert finding.level is Level.CAUTION
    assert text_of(finding, METRIC).startswith("parts 1 and 2 overlap (pairs that do: 1)")
    assert not made.stopped
