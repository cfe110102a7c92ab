"""How fast each item of an anodizing load grows, and what volts it takes."""

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from lineplanner.bath.coupons import one_coupon_growth, two_coupon_fit
from lineplanner.bath.growth import GROWTH_720, dissolution_rate
from lineplanner.bath.voltage import film_gradient_in_bath
from lineplanner.inputs.bath import Bath, Coupon
from lineplanner.inputs.material import Material
from lineplanner.inputs.tables import AlloyFamily, GrowthLaw, ProcessDefaults, Tables
from lineplanner.quantities import (
    CURRENT_DENSITY,
    GROWTH,
    RATIO,
    THICKNESS,
    TIME,
    FilmGradient,
    Growth,
    Rate,
    Ratio,
    Temperature,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

SAME_CHARGE = (
    0.02  # relative difference up to which two coupons had the same charge (design rule of this program)
)


@dataclass(frozen=True, slots=True, kw_only=True)
class FilmLaw:
    """Growth of one family in one bath: h = alloy_factor growth q - dissolution t; growth holds the coupons' factor."""

    family: AlloyFamily
    law: str
    growth: Growth
    alloy_factor: Ratio
    dissolution: Rate
    weight: Ratio
    gradient: FilmGradient
    calibrated: bool
    figure: Figure


def family_of(material: Material, alloys: Sequence[AlloyFamily]) -> AlloyFamily:
    """The alloys-table row of a material; reading a site has checked that it exists."""
    return next(row for row in alloys if row.name == material.family)


def law_of(bath: Bath) -> str:
    """The growth law in use: as the bath says, else the 720 rule until coupons calibrate the other."""
    if bath.growth is not None:
        return bath.growth
    return "growth-dissolution" if bath.kind == "sulfuric" and bath.coupons else "720"


def film_law(
    family: AlloyFamily, *, bath: Bath, process: ProcessDefaults, tables: Tables, law: str | None = None
) -> FilmLaw:
    """The law of one family in a bath, with the shop's coupons of that family in it."""
    law = law or law_of(bath)
    factor, scale = family.growth_factor, process.growth_scale
    base = tables.growth.gross_growth.value if law == "growth-dissolution" else GROWTH_720.value
    fits = law == "growth-dissolution"
    loss = _loss(bath, tables.growth, bath.temperature) if fits else 0.0
    coupons = [c for c in bath.coupons if c.base == family.name]
    shown, loss = _shown_by_coupons(
        coupons, loss, lambda at: _loss(bath, tables.growth, at) if fits else 0.0, fit_loss=fits
    )
    coupon = 1.0 if shown is None else shown / (base * scale.value * factor.value)
    growth = base * scale.value * coupon
    return FilmLaw(
        family=family,
        law=law,
        growth=growth,
        alloy_factor=factor.value,
        dissolution=loss,
        weight=family.voltage_factor.value ** (-1.0 / tables.growth.voltage_power.value),
        gradient=film_gradient_in_bath(
            temperature=bath.temperature, film_gradient=family.film_gradient.value, law=tables.growth
        ),
        calibrated=bool(coupons),
        figure=_story(family, process, tables, law, growth * factor.value, coupon, coupons),
    )


def _loss(bath: Bath, law: GrowthLaw, temperature: Temperature) -> Rate:
    if bath.sulfuric_acid is None:
        return 0.0
    return dissolution_rate(temperature=temperature, acid=bath.sulfuric_acid, law=law)


def _shown_by_coupons(
    coupons: Sequence[Coupon], loss: Rate, loss_at: Callable[[Temperature], Rate], *, fit_loss: bool
) -> tuple[Growth | None, Rate]:
    """Growth (alloy factor included) and loss as the coupons show them; None without any.

    Fitted from a pair run with one charge at unlike densities, else the mean of single coupons, each with the law's
    loss at its own temperature.
    """
    if not coupons:
        return None, loss
    pair = _pair(coupons) if fit_loss else None
    if pair is not None:
        first, second = pair
        fit = two_coupon_fit(
            charge_density=first.current_density * first.time,
            first_thickness=first.thickness,
            first_time=first.time,
            second_thickness=second.thickness,
            second_time=second.time,
        )
        there = loss_at(first.temperature)
        return fit.growth, fit.dissolution * (loss / there if there > 0.0 else 1.0)
    shown = [
        one_coupon_growth(
            thickness=c.thickness,
            charge_density=c.current_density * c.time,
            time=c.time,
            dissolution=loss_at(c.temperature),
        )
        for c in coupons
    ]
    return sum(shown) / len(shown), loss


def _pair(coupons: Sequence[Coupon]) -> tuple[Coupon, Coupon] | None:
    """The first two coupons of equal charge and unlike times whose longer run came out no thicker."""
    for i, first in enumerate(coupons):
        for second in coupons[i + 1 :]:
            short, long = sorted((first, second), key=lambda c: c.time)
            charges = short.current_density * short.time, long.current_density * long.time
            alike = abs(charges[1] / charges[0] - 1.0) <= SAME_CHARGE
            if alike and long.time > short.time and long.thickness <= short.thickness:
                return short, long
    return None


def _story(
    family: AlloyFamily,
    process: ProcessDefaults,
    tables: Tables,
    law: str,
    growth: Growth,
    coupon: Ratio,
    coupons: Sequence[Coupon],
) -> Figure:
    if law == "growth-dissolution":
        base = given(
            "gross growth", tables.growth.gross_growth.value, GROWTH, tables.growth.gross_growth.origin
        )
    else:
        base = given("growth of the 720 rule", GROWTH_720.value, GROWTH, GROWTH_720.source)
    parts = [
        base,
        given(f"alloy factor {family.name}", family.growth_factor.value, RATIO, family.growth_factor.origin),
        given("process scale", process.growth_scale.value, RATIO, process.growth_scale.origin),
    ]
    if coupons:
        parts.append(_coupon_story(coupon, coupons))
    words = "growth of the law x alloy factor x process scale" + (" x coupons" if coupons else "")
    return result(f"growth {family.name}", growth, GROWTH, words, "K' = K f s", _LAW_SOURCE[law], *parts)


def _coupon_story(factor: Ratio, coupons: Sequence[Coupon]) -> Figure:
    inputs = [
        figure
        for coupon in coupons
        for source in [Source(f"coupon, {coupon.measured_by}", Status.MEASURED)]
        for figure in (
            given("coupon thickness", coupon.thickness, THICKNESS, source),
            given("coupon current density", coupon.current_density, CURRENT_DENSITY, source),
            given("coupon time", coupon.time, TIME, source),
        )
    ]
    source = Source("measured over predicted growth, mean of the coupons", Status.MEASURED)
    return result(
        "coupon factor",
        factor,
        RATIO,
        "measured growth / predicted growth",
        "c = (h + v t)/(K f q)",
        source,
        *inputs,
    )


_LAW_SOURCE = {
    "720": Source(
        "720 rule: minutes = 720 x mil / (A/ft2), trade article on current density anodizing",
        Status.PUBLISHED,
    ),
    "growth-dissolution": Source("growth minus effective loss, calibrated by coupons", Status.ASSUMPTION),
}
