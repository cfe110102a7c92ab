"""Current control to voltage control, against a model with a closed form."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.program.crossover import Supply, hold_at_voltage, root
from lineplanner.program.softstart import Segment, SoftStart

# V = E0 + R I + r x I, x = k I t: a linear model with a closed form (derived; it tests the integrator only).
E0, R, R_FILM, V_MAX, CURRENT, K = 12.0, 3e-3, 0.1e-3, 18.0, 1000.0, 4.5e-4  # r in ohm/um, k in um/(A min)
MINUTE = 60.0


def volts(share: float, equivalent: float, _time: float) -> float:
    current = share * CURRENT
    return E0 + (R + R_FILM * K * CURRENT * equivalent / MINUTE) * current


def thickness(equivalent: float, _time: float) -> float:
    return K * CURRENT * equivalent / MINUTE


NO_START = SoftStart(segments=(), stepped=False)


def test_the_crossover_meets_its_closed_form() -> None:
    """Hand-worked, step by step.

    x_c = ((18-12)/1000 - 0.003)/0.0001 = 30 um, t1 = 30/(4.5e-4 x 1000) = 66.67 min;
    t2 = [R (x2-x_c) + r (x2^2 - x_c^2)/2]/(k (Vmax-E0)) = [0.06 + 0.08]/0.0027 = 51.85 min; end current 750 A.
    """
    naive = 50.0 / (K * CURRENT) * MINUTE
    held = hold_at_voltage(
        Supply(volts=volts, limit=V_MAX),
        start=NO_START,
        total=naive,
        most_stretch=0.25,
        thickness=thickness,
        aim=50.0,
        clock=1e-6,
    )
    assert held.reached / MINUTE == pytest.approx(200.0 / 3.0, rel=1e-9)
    assert held.total / MINUTE == pytest.approx(118.5185, rel=1e-5)
    assert held.share_at_end * CURRENT == pytest.approx(750.0, rel=1e-5)
    assert CURRENT * held.equivalent / 3600.0 == pytest.approx(1851.85, rel=1e-5)


def test_an_aim_that_needs_more_than_the_stretch_ends_at_the_cap() -> None:
    naive = 50.0 / (K * CURRENT) * MINUTE
    held = hold_at_voltage(
        Supply(volts=volts, limit=V_MAX),
        start=NO_START,
        total=naive,
        most_stretch=0.02,
        thickness=thickness,
        aim=50.0,
    )
    assert held.total / 30.0 == 226.0  # naive 6666.7 s and 2 %: 6800 s, on half minutes 6780 s
    assert thickness(held.equivalent, held.total) < 50.0


def test_a_limit_met_in_the_soft_start_is_found_there() -> None:
    """0 to 1000 A in 10 min at 12 + 3e-3 I + film: 14 V is met while the current still rises."""
    start = SoftStart(segments=(Segment(duration=600.0, start=0.0, end=1.0),), stepped=False)
    supply = Supply(volts=volts, limit=14.0)
    time, equivalent = supply.crossing(start, 6000.0)
    share = time / 600.0
    assert 0.0 < time < 600.0
    assert equivalent == pytest.approx(0.5 * share * time)
    assert volts(share, equivalent, time) == pytest.approx(14.0, rel=1e-9)


def test_a_limit_below_the_back_voltage_passes_no_current() -> None:
    assert Supply(volts=volts, limit=11.0).share(0.0, 0.0) == 0.0


@given(st.floats(0.05, 0.95), st.floats(0.3, 4.0))
def test_a_root_is_found_to_float_precision(where: float, power: float) -> None:
    found = root(lambda x: x**power - where**power, 0.0, 1.0)
    assert math.isclose(found, where, rel_tol=1e-9)
