"""How long a program stays above a current, and what it holds for good."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.capacity.demand import fitting_density, longest_above, peak_current, sustained_current


def test_a_hold_is_held_for_good_and_a_strike_is_not(make_stage) -> None:
    stages = (make_stage("strike", 0.0, 45.0, 1500.0), make_stage("plate", 45.0, 3645.0, 600.0))
    assert sustained_current(stages, 120.0) == 600.0
    assert sustained_current(stages, 40.0) == 1500.0
    assert longest_above(stages, 1500.0) == 45.0
    assert longest_above(stages, 600.0) == 3645.0


def test_a_ramp_counts_by_how_long_it_stays_above(make_stage) -> None:
    # 0 to 1000 A in 600 s: the last 120 s lie above 1000 x (1 - 120/600) = 800 A
    assert sustained_current((make_stage("ramp", 0.0, 600.0, (0.0, 1000.0)),), 120.0) == pytest.approx(800.0)


def test_short_steps_one_after_another_count_together(make_stage) -> None:
    steps = tuple(make_stage("step", 60.0 * k, 60.0 * (k + 1), 700.0 + k) for k in range(5))
    assert sustained_current(steps, 120.0) == 702.0  # 702, 703 and 704 A: 180 s


def test_a_pause_breaks_a_spell(make_stage) -> None:
    stages = (
        make_stage("plate", 0.0, 100.0, 900.0),
        make_stage("wait", 100.0, 160.0, 0.0),
        make_stage("plate", 160.0, 260.0, 900.0),
    )
    assert longest_above(stages, 900.0) == 100.0
    assert sustained_current(stages, 120.0) < 900.0


def test_a_program_shorter_than_the_short_time_holds_nothing(make_stage) -> None:
    assert sustained_current((make_stage("plate", 0.0, 60.0, 900.0),), 120.0) == 0.0
    assert sustained_current((), 120.0) == 0.0


def test_the_current_density_that_fits_keeps_the_area(make_run) -> None:
    # 500 A at 500 A/m2: 1 m2; 400 A fit 400 A/m2
    assert fitting_density(make_run(500.0), 400.0) == pytest.approx(400.0)


def test_a_run_without_stages_has_the_peak_it_says(make_run) -> None:
    from dataclasses import replace

    assert peak_current(replace(make_run(500.0), stages=(), peak_current=700.0)) == 700.0


ends = st.tuples(st.floats(0.0, 1000.0), st.floats(0.0, 1000.0))


@given(st.lists(ends, min_size=1, max_size=6), st.floats(1.0, 300.0), st.floats(1.0, 3.0))
def test_more_current_never_asks_for_less(make_stage, pairs, seconds, more) -> None:
    def program(factor: float):
        return tuple(
            make_stage("step", 60.0 * k, 60.0 * (k + 1), (a * factor, b * factor))
            for k, (a, b) in enumerate(pairs)
        )

    small, large = sustained_current(program(1.0), seconds), sustained_current(program(more), seconds)
    assert large >= small * (1.0 - 1e-9)
    assert small <= max(max(pair) for pair in pairs)
