"""Calibration by coupons: growth and loss of one alloy in one bath, from measured thickness."""

from dataclasses import dataclass

from lineplanner.errors import InputError
from lineplanner.quantities import ChargeDensity, Growth, Rate, Thickness, Time


def one_coupon_growth(
    *, thickness: Thickness, charge_density: ChargeDensity, time: Time, dissolution: Rate
) -> Growth:
    """What growth a measured coupon shows, the alloy factor included.

        f K = (h + v t) / q

    Parameters
        thickness: h, measured, per side [m]
        charge_density: q, charge per area of the coupon [C/m^2]
        time: t, time in the acid with current on [s]
        dissolution: v, effective loss to the acid; 0 for the 720 rule [m/s]
    Returns
        f K, thickness per charge before loss [m^3/C]
    Valid
        one alloy in one bath; its own area and charge, not those of the load beside it
    Source
        film thickness law, solved for the growth
    Example
        24 um after 60 minutes at 12 A/ft2; the shop's own minutes for one mil at 1 A/ft2:

        >>> q = 12 / 0.3048**2 * 3600
        >>> k = one_coupon_growth(thickness=24e-6, charge_density=q, time=3600, dissolution=0.0)
        >>> round(25.4e-6 / k * 0.3048**2 / 60, 3)
        762.0
    """
    return (thickness + dissolution * time) / charge_density


@dataclass(frozen=True, slots=True)
class CouponFit:
    """Growth and loss that two coupons agree on."""

    growth: Growth
    dissolution: Rate


def two_coupon_fit(
    *,
    charge_density: ChargeDensity,
    first_thickness: Thickness,
    first_time: Time,
    second_thickness: Thickness,
    second_time: Time,
) -> CouponFit:
    """Growth and loss from two coupons that had the same charge in unlike times.

        v = (h1 - h2) / (t2 - t1)        f K = (h1 + v t1) / q

    Parameters
        charge_density: q, charge per area, the same on both [C/m^2]
        first_thickness, second_thickness: h1 and h2, measured, per side [m]
        first_time, second_time: t1 and t2, time in the acid with current on [s]
    Returns
        f K [m^3/C], the alloy factor included, and v [m/s]; v below zero: the coupons contradict the law
    Raises
        InputError coupons.same-time where both times are the same
    Valid
        one alloy, one bath, one temperature
    Source
        film thickness law, written twice
    Example
        12 A/ft2 for 60 minutes and 6 A/ft2 for 120 minutes, loss in um/min:

        >>> fit = two_coupon_fit(
        ...     charge_density=12 / 0.3048**2 * 3600,
        ...     first_thickness=25.4e-6, first_time=3600, second_thickness=23.6e-6, second_time=7200,
        ... )
        >>> round(fit.dissolution * 1e6 * 60, 4)
        0.03
    """
    if second_time == first_time:
        raise InputError("coupons.same-time")
    loss = (first_thickness - second_thickness) / (second_time - first_time)
    gross = one_coupon_growth(
        thickness=first_thickness, charge_density=charge_density, time=first_time, dissolution=loss
    )
    return CouponFit(gross, loss)
