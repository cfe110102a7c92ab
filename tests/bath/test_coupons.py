"""Calibration by coupons gives back what made the coupons."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.coupons import one_coupon_growth, two_coupon_fit
from lineplanner.bath.growth import GROWTH_720, film_thickness
from lineplanner.errors import InputError

UM = 1e-6
TWELVE_FOR_AN_HOUR = 12 / 0.3048**2 * 3600  # C/m^2, 77.50 A min/dm2


def test_two_hand_worked_coupons() -> None:
    # v = (25.4 - 23.6) um / 60 min = 0.0300 um/min; f K = (25.4 + 0.03 x 60) / 77.50 = 0.35097 um dm2/(A min)
    fit = two_coupon_fit(
        charge_density=TWELVE_FOR_AN_HOUR,
        first_thickness=25.4 * UM,
        first_time=3600,
        second_thickness=23.6 * UM,
        second_time=7200,
    )
    assert fit.dissolution * 60 / UM == pytest.approx(0.0300, abs=1e-6)
    assert fit.growth * 6000 / UM == pytest.approx(0.35097, abs=1e-5)


def test_two_coupons_of_the_same_time_tell_nothing() -> None:
    with pytest.raises(InputError) as caught:
        two_coupon_fit(
            charge_density=1e5,
            first_thickness=UM,
            first_time=3600,
            second_thickness=2 * UM,
            second_time=3600,
        )
    assert caught.value.key == "coupons.same-time"


def test_a_coupon_that_follows_the_rule_gives_the_rule() -> None:
    growth = one_coupon_growth(
        thickness=25.4 * UM, charge_density=TWELVE_FOR_AN_HOUR, time=3600, dissolution=0.0
    )
    assert growth == pytest.approx(GROWTH_720.value)


growths = st.floats(2e-11, 9e-11)
losses = st.floats(0.0, 1e-9)


@given(growths, losses, st.floats(600, 7200), st.floats(1.2, 4.0), st.floats(2e5, 3e6))
def test_two_coupons_give_back_the_law_that_made_them(growth, loss, first, ratio, charge) -> None:
    def film(time: float) -> float:
        return film_thickness(
            charge_density=charge, time=time, growth=growth, alloy_factor=1.0, dissolution=loss
        )

    second = first * ratio
    if film(second) == 0.0:
        return
    fit = two_coupon_fit(
        charge_density=charge,
        first_thickness=film(first),
        first_time=first,
        second_thickness=film(second),
        second_time=second,
    )
    assert fit.growth == pytest.approx(growth, rel=1e-6)
    assert fit.dissolution == pytest.approx(loss, rel=1e-6, abs=1e-15)
