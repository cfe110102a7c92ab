"""The digits of the interface: amperes to the panel step, volts 0.1, minutes 0.5, h:min, three significant, 1 %."""

import json
import re
from collections.abc import Callable
from dataclasses import replace

import pytest

from lineplanner.errors import Quantity
from lineplanner.findings import Finding, Level, lower, upper
from lineplanner.plan import Plan
from lineplanner.quantities import (
    AREA,
    CURRENT,
    KINDS,
    RATIO,
    STRESS,
    TEMPERATURE,
    THICKNESS,
    TIME,
    Kind,
)
from lineplanner.report.digits import (
    amperes,
    charge,
    duration,
    hours,
    is_lower_limit,
    moment,
    run_time,
    told_apart,
    use,
    volts,
)
from lineplanner.report.plan_json import plan_json
from lineplanner.report.plan_text import plan_text
from lineplanner.report.program_text import area_notes, areas_lines, thickness_lines
from lineplanner.report.setpoints import setpoint_lines
from lineplanner.report.style import Style, plain, signed
from lineplanner.sources import Source, Status

METRIC = Style("metric", ascii=True)
US = Style("us", ascii=True)
NAMEPLATE = Source("nameplate", Status.ENTERED)


def test_amperes_are_printed_to_the_panel_step(demo: Callable[[str], Plan]) -> None:
    run = demo("valve-blocks-24").run
    assert run is not None
    assert run.rectifier is not None
    fives = replace(run.rectifier, panel_step=5.0)
    halves = replace(run.rectifier, panel_step=0.5)
    assert amperes(147.6, fives, METRIC) == "150 A"
    assert amperes(147.6, halves, METRIC) == "147.5 A"
    assert amperes(None, fives, METRIC) == "-"


def test_volts_are_printed_to_a_tenth() -> None:
    assert volts(23.96, METRIC) == "24.0 V"
    assert volts(0.0, METRIC) == "0.0 V"


def test_minutes_are_printed_to_a_half_and_hard_chrome_in_hours_and_minutes() -> None:
    assert run_time(2490.0, "anodize-hard", METRIC) == "41.5 min"
    assert run_time(19_560.0, "chrome-hard", METRIC) == "5:26"
    assert hours(3_599.0) == "1:00"
    assert moment(2490.0, "anodize-hard") == "41.5"
    assert duration(45.0, METRIC) == "45 s"


def test_areas_and_thicknesses_have_three_digits_in_both_systems() -> None:
    assert METRIC.show(0.61742, AREA) == "61.7 dm2"
    assert US.show(0.61742, AREA) == "6.65 ft2"
    assert METRIC.show(5.0166e-5, THICKNESS) == "50.2 um"
    assert US.show(5.0166e-5, THICKNESS) == "1.98 mil"


def test_ampere_hours_keep_their_whole_digits() -> None:
    assert charge(96.14 * 3600.0, METRIC) == "96.1 Ah"
    assert charge(4101.4 * 3600.0, METRIC) == "4101 Ah"


def test_use_is_demand_against_limit_in_whole_percent() -> None:
    finding = upper("contacts", value=6.57, limit=16.0, kind=CURRENT, source=NAMEPLATE, key="contacts")
    assert use(finding, METRIC) == "41 %"


def test_a_demand_past_its_limit_is_never_printed_as_the_limit() -> None:
    finding = upper("contacts", value=100.1, limit=100.0, kind=CURRENT, source=NAMEPLATE, key="contacts")
    assert finding.level is Level.STOP
    assert use(finding, METRIC) == "over 100 %"
    least = lower("rectifier-least", value=99.9, limit=100.0, kind=CURRENT, source=NAMEPLATE, key="x")
    assert use(least, METRIC) == "under 100 %"


def test_a_lower_limit_is_told_from_an_upper_one() -> None:
    least = lower("rectifier-least", value=159.0, limit=30.0, kind=CURRENT, source=NAMEPLATE, key="x")
    assert is_lower_limit(least)
    assert use(least, METRIC) == "530 %"
    most = upper("contacts", value=159.0, limit=30.0, kind=CURRENT, source=NAMEPLATE, key="x")
    assert not is_lower_limit(most)


def test_a_finding_without_a_margin_has_no_percent() -> None:
    finding = Finding("design-authority", Level.STOP, "x", NAMEPLATE, STRESS, 1.8e9, 1.641e9)
    assert use(finding, METRIC) == "-"


# value, limit, kind, style and what is printed: two numbers that differ are never printed alike
APART = [
    (0.053, 0.05, RATIO, METRIC, ("5.3 %", "5 %")),
    (0.0014, 0.01, RATIO, METRIC, ("0.14 %", "1 %")),
    (0.05, 0.05, RATIO, METRIC, ("5 %", "5 %")),
    (0.0500003, 0.05, RATIO, METRIC, ("5.00003 %", "5 %")),
    (0.62, 0.9, RATIO, METRIC, ("62 %", "90 %")),
    (1234.6, 1235.4, CURRENT, METRIC, ("1234.6 A", "1235.4 A")),
    (5.009e-5, 5.0e-5, THICKNESS, METRIC, ("50.1 um", "50 um")),
    (5.009e-5, 5.0e-5, THICKNESS, US, ("1.972 mil", "1.969 mil")),
    (328.152, 328.15, TEMPERATURE, METRIC, ("55.002 degC", "55 degC")),
    (400.0 * (1.0 + 1e-12), 400.0, CURRENT, METRIC, ("400 A", "400 A")),  # noise of a conversion
]


@pytest.mark.parametrize(("value", "limit", "kind", "style", "said"), APART, ids=lambda one: str(one)[:20])
def test_numbers_that_are_compared_are_told_apart(
    value: float, limit: float, kind: Kind, style: Style, said: tuple[str, str]
) -> None:
    assert told_apart(value, limit, kind, style) == said


def test_no_finding_of_a_demo_load_prints_demand_and_limit_alike_while_they_differ(each_load: Plan) -> None:
    for style in (METRIC, US):
        for finding in each_load.findings:
            if finding.value is None or finding.limit is None or finding.kind is None:
                continue
            one, other = told_apart(finding.value, finding.limit, finding.kind, style)
            assert (one == other) == (finding.value == pytest.approx(finding.limit, rel=1e-9)), finding.check


# --- times in sentences -----------------------------------------------------------------------------------


def test_a_time_of_two_hours_and_more_is_said_in_hours() -> None:
    assert METRIC.fact(Quantity(10_800.0, TIME)) == "3 h"
    assert METRIC.fact(Quantity(19_560.0, TIME)) == "5.43 h"
    assert METRIC.fact(Quantity(7200.0, TIME)) == "2 h"
    assert METRIC.fact(Quantity(7140.0, TIME)) == "119 min"


def test_a_temperature_has_no_percent() -> None:
    finding = Finding("rectifier-air", Level.OK, "x", NAMEPLATE, TEMPERATURE, 310.0, 323.0, 0.04)
    assert use(finding, METRIC) == "-"


# --- signs ------------------------------------------------------------------------------------------------


def test_plain_letters_take_the_place_of_signs() -> None:
    assert (
        plain("50 µm, 20 °C, 61.7 dm², 3 m³/h, 5 × 2 · 1 – é")
        == "50 um, 20 degC, 61.7 dm2, 3 m3/h, 5 x 2   1 - ?"
    )
    assert plain(signed("um dm2/(A min)")) == "um dm2/(A min)"


@pytest.mark.parametrize("kind", sorted(KINDS))
@pytest.mark.parametrize("system", ["metric", "us"])
def test_a_unit_with_signs_and_a_unit_in_plain_letters_are_the_same(kind: str, system: str) -> None:
    value = 293.15 if kind == "temperature" else 12.0
    marked, letters = (Style(system, ascii=a).show(value, KINDS[kind]) for a in (False, True))  # type: ignore[arg-type]
    assert plain(marked) == letters
    assert letters.isascii()
    assert "delta" not in letters


# --- text and JSON ----------------------------------------------------------------------------------------


@pytest.mark.parametrize("load", ["valve-blocks-24", "rod-40x900", "brackets-chromic-24"])
def test_text_and_json_agree_to_the_digits_printed(demo: Callable[[str], Plan], load: str) -> None:
    made = demo(load)
    record = json.loads(plan_json(made, METRIC))
    text = plan_text(made, METRIC)
    assert made.run is not None
    rectifier = made.run.rectifier
    set_by = record["current"]["panel_set_A"]
    expected = [
        volts(record["voltage"]["end_V"], METRIC),
        charge(record["charge_Ah"]["counter"] * 3600.0, METRIC),
        METRIC.show(record["area"]["carrying_m2"], AREA),
        METRIC.show(record["thickness"]["expected_m"], THICKNESS),
        METRIC.show(record["thickness"]["low_m"], THICKNESS),
        METRIC.show(record["thickness"]["high_m"], THICKNESS),
        run_time(record["time"]["total_s"], record["process"], METRIC),
        amperes(set_by if set_by is not None else record["current"]["peak_A"], rectifier, METRIC),
    ]
    assert [figure for figure in expected if figure not in text] == []


def figures(text: str, unit: str) -> list[float]:
    return [float(found) for found in re.findall(rf"(-?[\d.]+) {re.escape(unit)}(?![\w/])", text)]


# US unit in metric ones: exact, by definition of the international inch (25.4 mm) and foot (304.8 mm)
PAIRS = [("dm2", "ft2", 9.290304), ("um", "mil", 25.4), ("A/dm2", "A/ft2", 1 / 9.290304)]
ROUNDED = 0.011  # two numbers of three digits each, rounded apart: half a unit in 100, twice


@pytest.mark.parametrize(("metric", "us", "factor"), PAIRS, ids=[pair[1] for pair in PAIRS])
def test_both_systems_print_the_same_figures(each_load: Plan, metric: str, us: str, factor: float) -> None:
    def printed(style: Style, unit: str) -> str:
        lines = [*setpoint_lines(each_load, style), *thickness_lines(each_load, style)]
        head, *rows = areas_lines(each_load, style)[: -len(area_notes(each_load, style))]
        if f"in {unit} " in head:  # the unit of the whole table: put behind each number right of the count
            lines += [
                re.sub(r" ([\d.]+)(?= |$)", rf" \1 {unit}", row[head.index("count") + 5 :]) for row in rows
            ]
        return "\n".join(lines)

    first, second = figures(printed(METRIC, metric), metric), figures(printed(US, us), us)
    assert len(first) == len(second)
    assert first or metric == "A/dm2"
    for one, other in zip(first, second, strict=True):
        assert one == pytest.approx(other * factor, rel=ROUNDED)
