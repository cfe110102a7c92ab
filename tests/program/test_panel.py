"""What a panel can be set to."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.program.panel import nice_step, panel_current, rounded_up


@pytest.mark.parametrize(
    ("one_percent", "step"),
    [
        (30.0, 20.0),
        (32.0, 50.0),
        (10.0, 10.0),
        (50.0, 50.0),
        (2.5, 2.0),
        (75.0, 100.0),
        (1.3, 1.0),
        (0.2, 0.2),
    ],
)
def test_a_panel_step_is_one_two_or_five_times_a_power_of_ten(one_percent: float, step: float) -> None:
    """Hand-worked: nearest on a ratio scale; the border between 2 and 5 is sqrt(10) = 3.162."""
    assert nice_step(one_percent) == pytest.approx(step)


@pytest.mark.parametrize(("wanted", "set_to"), [(148.4, 148.0), (148.6, 149.0), (0.2, 1.0), (1000.0, 1000.0)])
def test_a_panel_is_set_to_its_nearest_step_but_not_to_nothing(wanted: float, set_to: float) -> None:
    assert panel_current(wanted, 1.0) == set_to


@given(st.floats(1.0, 1e5), st.sampled_from([1.0, 2.0, 5.0, 10.0, 20.0, 50.0]))
def test_a_panel_setting_is_never_further_than_half_a_step_off(wanted: float, step: float) -> None:
    setting = panel_current(wanted, step)
    assert abs(setting - wanted) <= 0.5 * step + 1e-9 or setting == step


@given(st.floats(0.0, 1e6))
def test_time_is_rounded_up_and_by_less_than_a_step(time: float) -> None:
    up = rounded_up(time, 30.0)
    assert up - time < 30.0
    assert up >= time or math.isclose(up, time, rel_tol=1e-6, abs_tol=1e-6)


def test_a_whole_number_of_half_minutes_stays() -> None:
    assert rounded_up(41.5 * 60.0 + 1e-9, 30.0) == 41.5 * 60.0
