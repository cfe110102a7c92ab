"""Half-widths combine as the GUM says."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.uncertainty import band, combined_half_width, sensitivity

half_widths = st.dictionaries(st.text(min_size=1), st.floats(0.0, 1.0), max_size=6)


def test_hand_worked_parts() -> None:
    # sqrt(0.03^2 + 0.04^2) = 0.05
    assert combined_half_width({"area": 0.03, "yield": 0.04}) == pytest.approx(0.05)
    assert combined_half_width({}) == 0.0
    assert combined_half_width({"area": -0.03}) == pytest.approx(0.03)  # a falling effect widens as much


def test_combination_is_the_spread_of_independent_normal_factors() -> None:
    """Closed form: the variance of a product of small independent relative errors is the sum of theirs."""
    ours = combined_half_width({"a": 1.96 * 0.01, "b": 1.96 * 0.02})
    exact = 1.96 * math.sqrt((1 + 0.01**2) * (1 + 0.02**2) - 1)
    assert ours == pytest.approx(exact, rel=1e-3)


@given(half_widths, st.floats(0.0, 1.0))
def test_one_more_uncertainty_never_narrows(parts, more) -> None:
    assert combined_half_width({**parts, "": more}) >= combined_half_width(parts) * (1 - 1e-12)


@given(half_widths, half_widths)
def test_the_band_is_no_narrower_than_either_of_its_parts(between, within) -> None:
    found = band(between, within)
    assert found.total >= max(found.between, found.within) * (1 - 1e-12)
    assert found.total <= (found.between + found.within) * (1 + 1e-12)
    assert found.between == combined_half_width(between)
    assert found.within == combined_half_width(within)


@given(st.floats(-3.0, 3.0), st.floats(0.1, 1e4))
def test_the_sensitivity_of_a_power_is_its_exponent(power, value) -> None:
    assert sensitivity(lambda x: x**power, value) == pytest.approx(power, abs=1e-4)


def test_the_error_of_the_sensitivity_falls_with_the_square_of_the_step() -> None:
    coarse, fine = (abs(sensitivity(math.exp, 1.0, step) - 1.0) for step in (1e-2, 1e-3))
    assert coarse / fine == pytest.approx(100.0, rel=0.02)


def test_a_result_of_nothing_has_no_sensitivity() -> None:
    assert sensitivity(lambda x: x - 1.0, 1.0) == 0.0
