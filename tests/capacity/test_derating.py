"""Derating, rectifiers side by side, meters."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.capacity.derating import derated_current, derating_factor, meter_error, parallel_current
from lineplanner.errors import InputError

C0 = 273.15


def test_air_of_46_degrees_at_1800_m_leaves_86_percent(limits) -> None:
    # (1 - 0.01 x 6) x (1 - 0.01 x 8) = 0.94 x 0.92 = 0.8648; x 5000 A = 4324 A
    factor = derating_factor(ambient=46.0 + C0, altitude=1800.0, limits=limits)
    assert factor == pytest.approx(0.8648, rel=1e-9)
    current = derated_current(rated=5000.0, ambient=46.0 + C0, altitude=1800.0, limits=limits)
    assert current == pytest.approx(4324.0, rel=1e-9)


@pytest.mark.parametrize("altitude", [-50.0, 0.0, 999.9, 1000.0])
@pytest.mark.parametrize("celsius", [-10.0, 25.0, 40.0])
def test_up_to_40_degrees_and_1000_m_nothing_is_taken_off(limits, celsius, altitude) -> None:
    assert derating_factor(ambient=celsius + C0, altitude=altitude, limits=limits) == 1.0


@pytest.mark.parametrize(("ambient", "altitude"), [(math.nan, 0.0), (300.0, math.nan), (math.inf, 0.0)])
def test_air_that_is_no_number_is_refused(limits, ambient, altitude) -> None:
    with pytest.raises(InputError) as caught:
        derating_factor(ambient=ambient, altitude=altitude, limits=limits)
    assert caught.value.key == "derating.not-a-number"


@given(st.floats(250.0, 500.0), st.floats(0.0, 20000.0), st.floats(0.0, 50.0), st.floats(0.0, 2000.0))
def test_hotter_and_thinner_air_never_gives_more(limits, ambient, altitude, hotter, higher) -> None:
    here = derating_factor(ambient=ambient, altitude=altitude, limits=limits)
    there = derating_factor(ambient=ambient + hotter, altitude=altitude + higher, limits=limits)
    assert 0.0 <= there <= here <= 1.0


def test_three_units_that_share_within_5_percent() -> None:
    # 3 x 2000 / 1.05 = 5714.3 A
    assert parallel_current(rated=2000.0, units=3, imbalance=0.05) == pytest.approx(5714.29, abs=0.01)


def test_a_one_percent_meter_at_a_tenth_of_its_scale_reads_within_ten_percent() -> None:
    assert meter_error(accuracy=0.01, share=0.1) == pytest.approx(0.1, rel=1e-12)
