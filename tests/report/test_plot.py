"""The curves of a program against the plan's own figures."""

from collections.abc import Callable
from dataclasses import replace

import pytest

from lineplanner.plan import Plan, plan
from lineplanner.quantities import THICKNESS
from lineplanner.report.digits import amperes, charge, volts
from lineplanner.report.plot import NOTHING, charge_by, course_of, plot_of, reading_at
from lineplanner.report.style import Style
from lineplanner.report.watch import moments

Demo = Callable[[str], Plan]
STYLES = [Style("metric"), Style("us", ascii=True)]


def test_the_curve_of_thickness_ends_at_the_expected_thickness(each_load: Plan) -> None:
    course = course_of(each_load)
    if course is None:
        assert each_load.stopped
        return
    assert each_load.thickness.expected is not None
    assert course.thickness(course.total) == pytest.approx(each_load.thickness.expected, rel=1e-9)
    assert course.thickness(0.0) == 0.0


def test_thickness_never_falls_during_a_run_of_the_demo_shop(each_load: Plan) -> None:
    course = course_of(each_load)
    if course is not None:
        grown = [course.thickness(share / 50 * course.total) for share in range(51)]
        assert grown == sorted(grown)


def test_the_counter_ends_at_the_stop_of_the_setpoint_line(each_load: Plan) -> None:
    course = course_of(each_load)
    if course is not None:
        assert charge_by(course.run, course.total) == pytest.approx(course.run.counter, rel=1e-9)


def with_voltage_limit(made: Plan, limit: float) -> Plan:
    rectifiers = tuple(replace(r, voltage_limit=limit) for r in made.case.line.rectifiers)
    return plan(replace(made.case, line=replace(made.case.line, rectifiers=rectifiers)))


def test_where_the_volts_run_out_counter_and_thickness_still_end_as_planned(demo: Demo) -> None:
    made = with_voltage_limit(demo("valve-blocks-24"), 36.0)
    assert made.run is not None
    assert made.run.limit_reached is not None
    made = replace(made, findings=())  # a stop would forbid the run
    course = course_of(made)
    assert course is not None
    assert charge_by(course.run, course.total) == pytest.approx(course.run.counter, rel=1e-9)
    assert course.thickness(course.total) == pytest.approx(made.thickness.expected, rel=1e-9)
    volts_curve = plot_of(made, Style()).series[1]
    assert volts_curve.limit == 1.0
    assert volts_curve.points[-1] == (1.0, 1.0)


@pytest.mark.parametrize("style", STYLES, ids=["metric", "us"])
def test_the_reading_at_each_moment_to_watch_is_that_of_the_card(each_load: Plan, style: Style) -> None:
    course = course_of(each_load)
    if course is None:
        return
    rectifier = course.run.rectifier
    for look in moments(each_load):
        # A hair before: at a boundary the card looks back on the stage that ends, the cursor ahead.
        hair = min(1e-7, look.time / course.total)
        reading = reading_at(each_load, look.time / course.total - hair, style)
        assert reading is not None
        if look.name not in ("full current", "full volts"):
            assert reading.current == amperes(look.current, rectifier, style)
            assert reading.voltage == volts(look.voltage, style)
        there = reading_at(each_load, look.time / course.total, style)
        assert there is not None
        assert there.counter == charge(look.counter, style)


def test_the_reading_at_the_end_is_the_expected_thickness(each_load: Plan) -> None:
    reading = reading_at(each_load, 1.0, Style())
    if reading is not None and each_load.thickness.expected is not None:
        assert reading.thickness == Style().show(each_load.thickness.expected, THICKNESS)


def test_a_reading_in_the_middle_of_a_ramp_is_half_of_its_end(demo: Demo) -> None:
    # Valve blocks: 0 to 159 A in 5 min of 63.5 min; after 2.5 min 79.5 A, which the panel shows as 80 A, and
    # 0.5 x 79.5 A x 150 s = 5963 As = 1.66 Ah.
    reading = reading_at(demo("valve-blocks-24"), 2.5 / 63.5, Style())
    assert reading is not None
    assert (reading.stage, reading.time, reading.current) == ("ramp", "2.5 min", "80 A")
    assert reading.counter == "1.66 Ah"
    assert reading.work == "work +"


def test_points_lie_on_their_axes_in_order_of_time(each_load: Plan) -> None:
    for series in plot_of(each_load, Style()).series:
        times = [time for time, _ in series.points]
        assert times == sorted(times)
        assert (times[0], times[-1]) == (0.0, pytest.approx(1.0))
        assert all(0.0 <= value <= 1.0 + 1e-12 for _, value in series.points)
        assert max(value for _, value in series.points) == pytest.approx(1.0) or series.limit == 1.0
        assert series.limit is None or 0.0 < series.limit <= 1.0


def test_axes_are_labelled_in_the_digits_of_the_plan(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    assert made.run is not None
    current, voltage, thickness = plot_of(made, Style()).series
    assert (current.top, current.bottom, current.unit) == ("159 A", "0 A", "A")
    assert current.limit is None
    assert current.limit_text == "rated 300 A"
    assert (voltage.top, voltage.limit_text) == (
        volts(made.run.peak_voltage, Style()),
        "limit 75.0 V",
    )
    assert (thickness.top, thickness.limit_text, thickness.unit) == ("50.2 µm", "aim 50 µm", "µm")


def test_units_follow_the_style(demo: Demo) -> None:
    thickness = plot_of(demo("valve-blocks-24"), Style("us", ascii=True)).series[2]
    assert thickness.limit_text == "aim 1.97 mil"
    assert thickness.top.endswith(" mil")


def test_current_that_the_panel_does_not_hold_is_called_about(demo: Demo) -> None:
    assert plot_of(demo("brackets-chromic-24"), Style()).series[0].name == "current, about"


def test_marks_are_the_moments_of_the_card_in_their_order(each_load: Plan) -> None:
    plot = plot_of(each_load, Style())
    if plot.series:
        assert [mark.name for mark in plot.marks] == [look.name for look in moments(each_load)]
        assert [mark.number for mark in plot.marks] == ["1", "2", "3", "4", "5"][: len(plot.marks)]


def test_the_clock_runs_from_nothing_to_the_end(demo: Demo) -> None:
    assert [text for _, text in plot_of(demo("valve-blocks-24"), Style()).times][::4] == ["0", "63.5"]
    chrome = plot_of(demo("rod-40x900"), Style())
    assert (chrome.clock, chrome.times[-1]) == ("h:min", (1.0, "5:32"))


def test_a_stop_leaves_nothing_to_plot_and_says_so(demo: Demo, with_a_stop: Callable[[Plan], Plan]) -> None:
    made = with_a_stop(demo("valve-blocks-24"))
    assert plot_of(made, Style()).series == ()
    assert plot_of(made, Style()).why == NOTHING
    assert reading_at(made, 0.5, Style()) is None
