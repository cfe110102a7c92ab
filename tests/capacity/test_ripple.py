"""Ripple of an ideal bridge: closed form against numerical integration and against a three-phase wave form."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.capacity.ripple import (
    firing_angle,
    full_on_ripple,
    lost_line_voltage,
    measured_ripple,
    open_arm_ripple,
    open_arm_voltage,
    phase_control_ripple,
    rms_overreading,
)
from lineplanner.inputs.line import RipplePoint


@pytest.mark.parametrize(("pulses", "percent"), [(2, 48.34), (3, 18.27), (6, 4.197), (12, 1.028)])
def test_full_on_ripple_by_its_textbook_formula(pulses: int, percent: float) -> None:
    # V/Vm = (p/pi) sin(pi/p); (Vrms/Vm)^2 = 1/2 + (p/4pi) sin(2pi/p)
    p = pulses
    mean = p / math.pi * math.sin(math.pi / p)
    square = 0.5 + p / (4.0 * math.pi) * math.sin(2.0 * math.pi / p)
    assert full_on_ripple(p) == pytest.approx(math.sqrt(square / mean**2 - 1.0), rel=1e-9)
    assert 100.0 * full_on_ripple(p) == pytest.approx(percent, abs=0.005)


def test_six_pulse_ripple_is_the_root_sum_of_its_harmonics() -> None:
    # harmonic h of the mean: sqrt(2) / (h^2 - 1), h = 6, 12, 18, ...
    harmonics = math.sqrt(sum(2.0 / (h * h - 1.0) ** 2 for h in range(6, 6000, 6)))
    assert full_on_ripple(6) == pytest.approx(harmonics, rel=1e-6)


# Derived by numerical integration, to the digits kept there.
TURNED_DOWN = {
    1.00: (4.2, 1.0),
    0.95: (11.0, 5.1),
    0.90: (15.5, 7.4),
    0.80: (23.5, 11.4),
    0.75: (27.5, 13.4),
    0.70: (31.7, 15.5),
    0.60: (41.3, 20.3),
    0.50: (53.5, 26.3),
    0.40: (68.1, 34.8),
    0.30: (84.8, 48.3),
}


@pytest.mark.parametrize("share", TURNED_DOWN)
def test_ripple_of_six_and_twelve_pulses_turned_down(share: float) -> None:
    six, twelve = TURNED_DOWN[share]
    assert 100.0 * phase_control_ripple(share, 6) == pytest.approx(six, abs=0.2)
    assert 100.0 * phase_control_ripple(share, 12) == pytest.approx(twelve, abs=0.2)


@pytest.mark.parametrize("pulses", [2, 3, 6, 12])
@pytest.mark.parametrize("share", [0.98, 0.8, 0.5, 0.3, 0.1])
def test_the_closed_form_agrees_with_scipys_integral(share: float, pulses: int) -> None:
    quad = pytest.importorskip("scipy.integrate").quad
    half, angle = math.pi / pulses, firing_angle(share, pulses)
    span = (angle - half, min(angle + half, 0.5 * math.pi))
    mean = quad(math.cos, *span)[0] / (2.0 * half)
    square = quad(lambda x: math.cos(x) ** 2, *span)[0] / (2.0 * half)
    assert mean / (math.sin(half) / half) == pytest.approx(share, rel=1e-9)
    assert phase_control_ripple(share, pulses) == pytest.approx(math.sqrt(square / mean**2 - 1.0), rel=1e-7)


def test_six_pulses_stop_between_pulses_below_half_of_the_volts() -> None:
    assert math.degrees(firing_angle(0.5, 6)) == pytest.approx(60.0, abs=1e-9)
    assert math.degrees(firing_angle(0.8, 6)) == pytest.approx(36.87, abs=0.01)
    # a trade report of a chrome rectifier at 40.4 % of its volts: current down to nothing every 3 ms
    assert firing_angle(0.404, 6) + math.pi / 6.0 > 0.5 * math.pi


@given(st.floats(0.02, 1.0), st.floats(0.0, 0.5), st.sampled_from([3, 6, 12]))
def test_fewer_volts_never_ripple_less(share: float, less: float, pulses: int) -> None:
    lower = max(0.01, share - less)
    assert phase_control_ripple(lower, pulses) >= phase_control_ripple(share, pulses) - 1e-9


def bridge(*, open_valve: bool, lines: tuple[int, ...] = (0, 1, 2)) -> np.ndarray:
    """One period of a three-phase diode bridge on a resistor; phase 0 may have lost its upper valve."""
    t = np.linspace(0.0, 2.0 * math.pi, 360001)[:-1]
    phases = np.array([np.cos(t - 2.0 * math.pi * k / 3.0) for k in lines])
    return (phases[1:] if open_valve else phases).max(axis=0) - phases.min(axis=0)


@pytest.mark.parametrize(
    ("wave", "volts", "ripple"),
    [
        (bridge(open_valve=False), 1.0, full_on_ripple(6)),
        (bridge(open_valve=False, lines=(0, 1)), lost_line_voltage(), full_on_ripple(2)),
        (bridge(open_valve=True), open_arm_voltage(), open_arm_ripple()),
    ],
    ids=["sound", "line lost", "valve open"],
)
def test_faults_of_a_bridge_against_its_wave_form(wave: np.ndarray, volts: float, ripple: float) -> None:
    sound = bridge(open_valve=False).mean()
    assert wave.mean() / sound == pytest.approx(volts, abs=1e-6)
    assert wave.std() / wave.mean() == pytest.approx(ripple, abs=1e-6)


def test_faults_of_a_bridge_in_figures() -> None:
    assert lost_line_voltage() == pytest.approx(2.0 / 3.0, abs=1e-12)
    assert open_arm_voltage() == pytest.approx(5.0 / 6.0, abs=1e-12)
    assert 100.0 * full_on_ripple(2) == pytest.approx(48.34, abs=0.05)
    assert 100.0 * open_arm_ripple() == pytest.approx(34.07, abs=0.05)


def test_an_rms_meter_reads_a_rippled_current_high() -> None:
    # sqrt(1 + 0.483^2) - 1 = 0.1105
    assert 100.0 * rms_overreading(0.483) == pytest.approx(11.05, abs=0.05)


CURVE = tuple(RipplePoint(voltage_share=s, ripple=r) for s, r in ((0.9, 0.018), (0.4, 0.09), (0.7, 0.036)))


def test_a_measured_curve_is_straight_between_its_points_in_any_order() -> None:
    # halfway between 0.4 (9 %) and 0.7 (3.6 %): 6.3 %
    assert measured_ripple(CURVE, 0.55) == pytest.approx(0.063, rel=1e-9)
    assert measured_ripple(CURVE, 0.9) == 0.018


@pytest.mark.parametrize("share", [0.39, 0.91, 0.0])
def test_nothing_is_read_outside_a_measured_curve(share: float) -> None:
    assert measured_ripple(CURVE, share) is None


def test_a_curve_of_one_point_holds_there_only() -> None:
    assert measured_ripple(CURVE[:1], 0.9) == 0.018
    assert measured_ripple(CURVE[:1], 0.8) is None
    assert measured_ripple((), 0.8) is None
