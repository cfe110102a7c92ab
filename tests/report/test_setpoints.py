"""The three lines that come first: what to set, whether it may run, what can hurt now."""

from collections.abc import Callable
from dataclasses import replace

import pytest

from lineplanner.findings import Finding, Level, note, upper
from lineplanner.plan import Plan, plan
from lineplanner.quantities import CURRENT, RATIO, VOLTAGE
from lineplanner.report.card import card_lines
from lineplanner.report.setpoints import (
    caution_line,
    in_words,
    lead_in_items,
    setpoint_lines,
    text_of,
    verdict_line,
)
from lineplanner.report.style import Style
from lineplanner.report.views import head_of
from lineplanner.sources import Source, Status

METRIC = Style("metric", ascii=True)
NAMEPLATE = Source("nameplate", Status.ENTERED)
PRACTICE = Source("usual", Status.PRACTICE)

Demo = Callable[[str], Plan]


@pytest.fixture
def sketch(demo: Demo) -> Plan:
    """A hard anodize load with round figures: 148 A, ramp of 5 min, 41.5 min, 24 to 51 V."""
    made = demo("valve-blocks-24")
    assert made.run is not None
    run = replace(
        made.run,
        panel_current=148.0,
        total_time=2490.0,
        forward=96.1 * 3600.0,
        start_voltage=24.0,
        end_voltage=51.0,
        limit_reached=None,
    )
    areas = replace(made.areas, carrying=0.617)
    return replace(made, run=run, areas=areas, findings=(OK, OTHER), binding=OK)


OK = upper("contacts", value=7.1, limit=10.0, kind=CURRENT, source=NAMEPLATE, key="contacts", part="lug")
OTHER = upper(
    "rectifier-volts", value=51.0, limit=75.0, kind=VOLTAGE, source=NAMEPLATE, key="rectifier-volts"
)
NEAR = upper("contacts", value=9.4, limit=10.0, kind=CURRENT, source=PRACTICE, key="contacts", part="lug")
OVER = upper(
    "rectifier-rating", value=448.0, limit=400.0, kind=CURRENT, source=NAMEPLATE, key="rectifier-rating"
)
NOTE = note("places", "places.counted", PRACTICE, "places.hang")
BASE = Finding(
    "recipe-base",
    Level.CAUTION,
    "recipe-base",
    PRACTICE,
    facts={"part": "lug", "base": "6061", "bases": "2xxx"},
)


def test_the_setpoint_line_says_what_to_set_first(sketch: Plan) -> None:
    assert setpoint_lines(sketch, METRIC) == [
        "SET  148 A   ramp 5 min   41.5 min   stop at 96.1 Ah   rectifier R3   work +",
        "     2.58 A/dm2 on 61.7 dm2   expect 24.0 to 51.0 V   position: default",
    ]


def test_the_us_line_holds_the_same_plan(sketch: Plan) -> None:
    assert setpoint_lines(sketch, Style("us", ascii=True))[1] == (
        "     24 A/ft2 on 6.64 ft2   expect 24.0 to 51.0 V   position: default"
    )


def test_hard_chrome_is_set_by_its_plating_time_and_told_what_comes_first(demo: Demo) -> None:
    lines = setpoint_lines(demo("rod-40x900"), METRIC)
    assert lines[0].startswith("SET  ")
    assert "h:min" in lines[0]
    assert "work -" in lines[0]
    assert lines[1].startswith("     first   soak ")
    assert "reverse 60 s at " in lines[1]
    assert " A work +" in lines[1]


def test_hard_chrome_is_told_the_volts_of_the_strike_beside_those_of_plating(demo: Demo) -> None:
    made = demo("rod-40x900")
    assert made.run is not None
    strike = next(s for s in made.run.stages if s.stage == "strike")
    assert f"expect 5.2 V, strike {strike.to_voltage:.1f} V" in setpoint_lines(made, METRIC)[-1]
    assert strike.to_voltage > made.run.end_voltage + 1.0


def test_a_run_by_voltage_sets_volts_and_expects_amperes(demo: Demo) -> None:
    lines = setpoint_lines(demo("brackets-chromic-24"), METRIC)
    assert lines[0].startswith("SET  40.0 V   ramp 8 min   ")
    assert "   about " in lines[0]
    assert "expect up to " in lines[1]


def test_a_voltage_limit_on_the_way_is_part_of_the_setpoint(sketch: Plan) -> None:
    assert sketch.run is not None
    limited = replace(sketch.run, limit_reached=1800.0, voltage_limit=75.0)
    by_volts = replace(limited.stages[-1], control="voltage")
    held = replace(sketch, run=replace(limited, stages=(*limited.stages[:-1], by_volts)))
    assert "held at 75.0 V from 30 min" in " ".join(setpoint_lines(held, METRIC))
    strike_only = replace(sketch, run=limited)  # the volts leave their limit again: nothing is held
    assert "held at" not in " ".join(setpoint_lines(strike_only, METRIC))


def test_a_stopped_plan_has_nothing_to_set(sketch: Plan) -> None:
    made = replace(sketch, findings=(OVER,), binding=OVER)
    assert setpoint_lines(made, METRIC) == ["SET  nothing to set: a stop forbids this plan, rectifier R3"]


# --- verdict ---------------------------------------------------------------------------------------------


def test_checks_met_names_what_is_tightest_and_what_comes_next(sketch: Plan) -> None:
    assert verdict_line(sketch, METRIC) == (
        "CHECKS MET  tightest: contacts 71 % of their limit, then rectifier volts 68 %"
    )


def test_notes_are_counted_in_the_verdict(sketch: Plan) -> None:
    made = replace(sketch, findings=(OK, OTHER, NOTE))
    assert verdict_line(made, METRIC).endswith("rectifier volts 68 %; 1 note")


def test_a_caution_names_the_gravest_and_counts_the_others(sketch: Plan) -> None:
    made = replace(sketch, findings=(NEAR, BASE, OK, NOTE, NOTE), binding=NEAR)
    assert verdict_line(made, METRIC) == (
        "CAUTION  contacts 94 % of their limit; also: lug is of 6061; the recipe is for 2xxx; 2 notes"
    )


def test_one_more_finding_is_named_and_only_if_it_has_no_percentage(sketch: Plan) -> None:
    again = replace(NEAR, check="rack-rating")
    made = replace(sketch, findings=(NEAR, again, BASE, BASE, OK), binding=NEAR)
    assert verdict_line(made, METRIC) == (
        "CAUTION  contacts 94 % of their limit; also: lug is of 6061; the recipe is for 2xxx; 2 more cautions"
    )
    alone = replace(sketch, findings=(NEAR, again, OK), binding=NEAR)
    assert verdict_line(alone, METRIC) == "CAUTION  contacts 94 % of their limit; 1 more caution"


def test_a_finding_without_a_margin_is_said_in_words_and_without_a_percentage(sketch: Plan) -> None:
    stop = Finding("burning", Level.STOP, "burning", NAMEPLATE, CURRENT, 18.0, 16.4, facts={"family": "2xxx"})
    assert "%" not in verdict_line(replace(sketch, findings=(stop,), binding=stop), METRIC)


def test_a_ripple_over_its_limit_is_printed_over_its_limit() -> None:
    facts = {"rectifier": "R5", "volts": "5.1 V"}
    over = Finding("ripple", Level.CAUTION, "ripple", PRACTICE, RATIO, 0.053, 0.05, -0.06, facts=facts)
    assert text_of(over, METRIC) == "R5: ripple 5.3 % at 5.1 V, limit 5 %"
    assert in_words(over, METRIC) == "ripple 106 % of its limit"


def test_a_caution_that_compares_nothing_is_said_in_words(sketch: Plan) -> None:
    made = replace(sketch, findings=(BASE, OK), binding=OK)
    assert verdict_line(made, METRIC) == "CAUTION  lug is of 6061; the recipe is for 2xxx"


def test_a_stop_is_said_with_its_share_and_the_cautions_behind_it(sketch: Plan) -> None:
    made = replace(sketch, findings=(OVER, NEAR, OK), binding=OVER)
    assert verdict_line(made, METRIC) == "STOP  rectifier rating 112 % of its limit; 1 caution"


def test_a_plan_without_any_comparison_says_so(sketch: Plan) -> None:
    made = replace(sketch, findings=(NOTE,), binding=None)
    assert verdict_line(made, METRIC) == "CHECKS MET  nothing to compare; 1 note"


def test_a_verdict_that_is_too_long_ends_at_a_word(sketch: Plan) -> None:
    line = verdict_line(sketch, METRIC, width=50)
    assert line == "CHECKS MET  tightest: contacts 71 % of their ..."
    assert len(line) <= 50


# --- caution ---------------------------------------------------------------------------------------------


def test_the_gravest_caution_stands_on_one_line_with_the_number_of_others(each_load: Plan) -> None:
    line = caution_line(each_load, METRIC)
    words = [c.word for c in each_load.cautions]
    assert line.startswith("DANGER " if "DANGER" in words else f"{words[0]} ")
    assert line.endswith(f"+ {len(words) - 1} more")
    assert len(line) <= 76


def test_a_notice_never_takes_the_line_from_a_graver_word(each_load: Plan) -> None:
    for moment in ("before loading", "before current", "while current flows", "unloading", "after"):
        here = [c.word for c in each_load.cautions if moment in c.moments]
        line = caution_line(each_load, METRIC, moment)  # type: ignore[arg-type]
        assert line.startswith("NOTICE") == (bool(here) and set(here) == {"NOTICE"})


def test_without_a_caution_the_line_is_empty(sketch: Plan) -> None:
    assert caution_line(replace(sketch, cautions=()), METRIC) == ""


def limited(made: Plan, limit: float, **rectifier: bool) -> Plan:
    """The plan on rectifiers that give no more than so many volts."""
    units = tuple(replace(u, voltage_limit=limit, **rectifier) for u in made.case.line.rectifiers)
    return plan(replace(made.case, line=replace(made.case.line, rectifiers=units)))


@pytest.mark.parametrize("limit", [30.0, 26.4, 25.0, 19.0, 16.0, 4.0])
def test_a_ramp_cut_by_the_volts_is_set_as_the_recipe_has_it(demo: Demo, limit: float) -> None:
    """Wherever the limit lies, in the hold, in the ramp or below the first volt, the whole ramp is set."""
    made = demo("valve-blocks-24")
    held = limited(made, limit, can_ramp=False)
    assert list(lead_in_items(held, METRIC)) == list(lead_in_items(made, METRIC))
    head_of(held, METRIC)
    if held.stopped:
        return
    assert held.run is not None
    assert held.run.panel_current is not None
    table = next(line for line in card_lines(held, METRIC) if line.strip().startswith("at min"))
    assert f"{held.run.panel_current:.0f} A" in " ".join(card_lines(held, METRIC)).split(table)[1]


def test_a_film_the_volts_leave_short_stops_the_plan(demo: Demo) -> None:
    held = limited(demo("valve-blocks-24"), 19.0)
    assert [f.level for f in held.findings if f.check == "voltage-limit"] == [Level.STOP]


def test_a_strike_held_by_its_volts_is_set_as_asked(demo: Demo) -> None:
    """What flows is in the program; what is set on the panel is what the recipe asks for."""
    made = demo("rod-40x900")
    assert made.run is not None
    held = limited(made, 0.5 * (made.run.end_voltage + made.run.peak_voltage))
    assert held.run is not None
    assert held.run.limit_reached is not None
    assert list(lead_in_items(held, METRIC)) == list(lead_in_items(made, METRIC))
    assert max(s.peak for s in held.run.stages) < max(s.peak for s in made.run.stages)
    head_of(held, METRIC)
