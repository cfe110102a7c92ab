"""Film growth: the 720 rule, growth with loss, weights, build-up."""

import tomllib
from dataclasses import replace
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.growth import (
    GROWTH_720,
    aluminium_consumed,
    build_up_of_growth,
    build_up_share,
    coating_weight,
    dissolution_rate,
    film_rate,
    film_thickness,
    growth_ceiling,
    retained_yield,
    soft_share,
    thickness_of_weight,
)

PUBLISHED = Path(__file__).parents[1] / "published"
ASF = 1 / 0.3048**2  # A/m^2
MIL = 25.4e-6
UM = 1e-6
MINUTE = 60.0


def published(stem: str) -> dict:
    return tomllib.loads((PUBLISHED / f"{stem}.toml").read_text(encoding="utf-8"))


def by_rule(current_density: float, time: float, alloy_factor: float = 1.0) -> float:
    return film_thickness(
        charge_density=current_density * time,
        time=time,
        growth=GROWTH_720.value,
        alloy_factor=alloy_factor,
        dissolution=0.0,
    )


def by_law(law, current_density: float, minutes: float, celsius: float, alloy_factor: float = 1.0) -> float:
    """The growth law at 165 g/L."""
    return film_thickness(
        charge_density=current_density * minutes * MINUTE,
        time=minutes * MINUTE,
        growth=law.gross_growth.value,
        alloy_factor=alloy_factor,
        dissolution=dissolution_rate(temperature=celsius + 273.15, acid=165.0, law=law),
    )


# --- the 720 rule ----------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    "row", published("rule-720")["row"], ids=lambda row: f"{row['current_density_A_ft2']}"
)
def test_the_720_rule_gives_its_published_minutes(row) -> None:
    assert by_rule(row["current_density_A_ft2"] * ASF, row["minutes"] * MINUTE) == pytest.approx(
        MIL, rel=1e-12
    )


def test_the_720_rule_in_metric_units() -> None:
    # Hand-worked: 720 A min/ft2/mil = 43200 C / 929.0304 cm2 / 25.4 um = 1.83071 C/(cm2 um)
    # = 3.05119 A min/(dm2 um) = 5.08531 A h/(m2 um); 25 um at 1.5 A/dm2: 3.05119 x 25 / 1.5 = 50.853 min.
    assert 1 / GROWTH_720.value * UM / 3600 == pytest.approx(5.08531, abs=1e-4)
    assert 25 * UM / (GROWTH_720.value * 150.0) / MINUTE == pytest.approx(50.853, abs=0.01)


def test_the_rule_lies_above_a_published_least_thickness() -> None:
    finish = published("anodize-designations")
    grown = by_rule(finish["current_density_A_ft2"] * ASF, finish["minutes"] * MINUTE)
    assert grown > finish["least_thickness_um"] * UM


def test_a_ramp_counts_by_its_charge() -> None:
    # Hand-worked: 2 mil at 36 A/ft2 are 720 x 2 / 36 = 40 min; 5 min from zero count half: 42.5 min in all.
    charge = 36 * ASF * (42.5 - 2.5) * MINUTE
    thickness = film_thickness(
        charge_density=charge, time=42.5 * MINUTE, growth=GROWTH_720.value, alloy_factor=1.0, dissolution=0.0
    )
    assert thickness == pytest.approx(2 * MIL)


def test_a_published_hard_run_brackets_the_rule() -> None:
    # Hand-worked: 2.5 A/dm2 = 23.226 A/ft2 over 65 + 15/2 = 72.5 min are 1683.9 A min/ft2: 842 at 2.0 mil,
    # 748 in the middle, 674 at 2.5 mil.
    run = published("hard-film-runs")["ramped"]
    charge = run["current_density_A_dm2"] * 100 * (run["hold_minutes"] + run["ramp_minutes"] / 2) * MINUTE
    assert charge / ASF / MINUTE == pytest.approx(1683.9, abs=0.5)
    thin, thick = (charge / ASF / MINUTE / mil for mil in run["thickness_mil"])
    assert thick < 720 < thin
    assert charge / ASF / MINUTE / 2.25 == pytest.approx(748.4, abs=0.5)


def test_published_cold_runs_of_one_mil_bracket_the_rule() -> None:
    run = published("hard-film-runs")["cold"]
    currents, minutes = run["current_density_A_ft2"], run["minutes"]
    assert (
        by_rule(currents[0] * ASF, minutes[0] * MINUTE)
        < MIL
        < by_rule(currents[1] * ASF, minutes[1] * MINUTE)
    )


# --- growth with loss ------------------------------------------------------------------------------------


def test_the_law_was_chosen_to_give_the_rule_at_its_reference(law) -> None:
    """Regression: the gross growth was fitted to this point."""
    # q = 12 x 0.1076391 x 60 = 77.500 A min/dm2; 0.350967 x 77.500 - 0.03 x 60 = 25.40 um
    assert by_law(law, 12 * ASF, 60, 20) == pytest.approx(25.40 * UM, abs=0.02 * UM)


@pytest.mark.parametrize(
    ("amperes", "minutes", "celsius", "factor", "microns"),
    [
        (24, 30, 20, 1.0, 26.30),  # 27.20 - 0.03 x 30
        (6, 120, 20, 1.0, 23.60),  # 27.20 - 0.03 x 120
        (3, 240, 20, 1.0, 20.00),  # 27.20 - 0.03 x 240
        (12, 60, 25, 1.0, 24.65),  # 27.20 - 0.03 x 2^0.5 x 60 = 27.20 - 2.546
        (36, 40, 0, 1.0, 54.10),  # 54.40 - 0.03 / 4 x 40
        (24, 80, 0, 0.70, 50.17),  # 0.70 x 72.533 - 0.03 / 4 x 80
    ],
)
def test_hand_worked_films_of_the_law(law, amperes, minutes, celsius, factor, microns) -> None:
    assert by_law(law, amperes * ASF, minutes, celsius, factor) == pytest.approx(microns * UM, abs=0.02 * UM)


def test_the_loss_doubles_over_its_interval_and_goes_with_the_acid(law) -> None:
    at_20 = dissolution_rate(temperature=293.15, acid=165.0, law=law)
    assert at_20 == pytest.approx(0.03 * UM / MINUTE)
    assert dissolution_rate(temperature=303.15, acid=165.0, law=law) == pytest.approx(2 * at_20)
    assert dissolution_rate(temperature=293.15, acid=330.0, law=law) == pytest.approx(2 * at_20)


@pytest.mark.parametrize("power", [0.0, 0.5, 1.0])
def test_a_bath_without_sulfuric_acid_takes_no_film_back(law, power) -> None:
    flat = replace(law, acid_power=replace(law.acid_power, value=power))
    assert dissolution_rate(temperature=310.0, acid=0.0, law=flat) == 0.0


def test_a_film_never_gets_thinner_than_nothing_while_its_rate_says_so(law) -> None:
    assert by_law(law, 0.01 * ASF, 600, 30) == 0.0
    loss = dissolution_rate(temperature=303.15, acid=165.0, law=law)
    rate = film_rate(
        current_density=0.01 * ASF, growth=law.gross_growth.value, alloy_factor=1.0, dissolution=loss
    )
    assert rate < 0.0


def test_a_long_weak_run_is_known_by_its_soft_share(law) -> None:
    # Hand-worked: 0.03 x 120 / 23.60 = 0.1525 after two hours at 6 A/ft2; 0.03 x 60 / 25.40 = 0.0709.
    loss = dissolution_rate(temperature=293.15, acid=165.0, law=law)
    assert soft_share(thickness=23.60 * UM, time=7200, dissolution=loss) == pytest.approx(0.1525, abs=1e-4)
    assert soft_share(thickness=25.40 * UM, time=3600, dissolution=loss) < law.soft_share.value
    assert soft_share(thickness=0.0, time=3600, dissolution=loss) == float("inf")
    assert soft_share(thickness=0.0, time=3600, dissolution=0.0) == 0.0


charges = st.floats(0.0, 1e7)
factors = st.floats(0.3, 1.1)


@given(charges, charges, st.floats(0.0, 1e5), factors, st.floats(0.0, 1e-8))
def test_more_charge_never_makes_less_film(one, other, time, factor, loss) -> None:
    low, high = sorted((one, other))
    film = {"time": time, "growth": GROWTH_720.value, "alloy_factor": factor, "dissolution": loss}
    assert film_thickness(charge_density=low, **film) <= film_thickness(charge_density=high, **film)


@given(st.floats(10.0, 1000.0), st.floats(60.0, 1e5), st.floats(0.1, 10.0))
def test_by_the_rule_thickness_goes_straight_with_amperes_and_with_minutes(current, time, scale) -> None:
    assert by_rule(scale * current, time) == pytest.approx(scale * by_rule(current, time))
    assert by_rule(current, scale * time) == pytest.approx(scale * by_rule(current, time))


@given(st.floats(10.0, 1000.0), st.floats(60.0, 1e4), st.floats(0.0, 1e-9))
def test_thickness_is_rate_times_time_at_steady_current(current, time, loss) -> None:
    rate = film_rate(current_density=current, growth=GROWTH_720.value, alloy_factor=0.9, dissolution=loss)
    thickness = film_thickness(
        charge_density=current * time,
        time=time,
        growth=GROWTH_720.value,
        alloy_factor=0.9,
        dissolution=loss,
    )
    assert thickness == pytest.approx(max(0.0, rate * time), abs=1e-15)


# --- what the film is made of ----------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("density", "share"),
    # Hand-worked: 0.634046 g/Ah over 5.08531 Ah/(m2 um) is 3.2243 g/cm3, and rho / 3.2243:
    [(1.83, 0.568), (2.20, 0.682), (2.32, 0.7195), (2.40, 0.744), (2.50, 0.775), (2.70, 0.837)],
)
def test_the_yield_that_the_rule_implies(density, share) -> None:
    assert retained_yield(density * 1000) == pytest.approx(share, abs=6e-4)


def test_the_coating_ratio_at_the_architectural_density() -> None:
    # Hand-worked: 0.71952 x 1.88946 = 1.3595 g of film for each gram of aluminium.
    metal = aluminium_consumed(1 / GROWTH_720.value) * 2700.0  # under one metre of film
    assert 2320.0 / metal == pytest.approx(1.3595, abs=1e-3)


@pytest.mark.parametrize(
    ("density", "ceiling"),
    # Hand-worked: 0.20714 um Al per A min/dm2 x 5.1016 / (0.86 rho)
    [(2.325, 0.529), (2.6, 0.473), (3.1, 0.396)],
)
def test_the_growth_ceiling_when_all_aluminium_is_kept(density, ceiling) -> None:
    growth = growth_ceiling(oxide_share=0.86, apparent_density=density * 1000)
    assert growth * 6000 / UM == pytest.approx(ceiling, abs=1e-3)  # 6000 C/m^2 are one A min/dm2


def test_the_default_growth_lies_under_its_ceiling(law, processes) -> None:
    for process in processes.values():
        if process.name != "chrome-hard":
            ceiling = growth_ceiling(
                oxide_share=law.oxide_share.value, apparent_density=process.apparent_density.value
            )
            assert law.gross_growth.value * process.growth_scale.value < ceiling, process.name


@pytest.mark.parametrize(
    ("minutes", "share"),
    # Hand-worked: 12.4286 um Al per Ah/dm2 x 0.0508531 Ah/(dm2 um) = 0.6320 at 720; in proportion at others.
    [(720, 0.3680), (650, 0.4294), (570, 0.4996)],
)
def test_build_up_from_the_charge_of_one_mil(minutes, share) -> None:
    growth = MIL / (minutes * MINUTE * ASF)
    assert build_up_of_growth(growth) == pytest.approx(share, abs=1e-3)


@pytest.mark.parametrize(
    ("kept", "density", "share"),
    # Hand-worked: 1 - 0.86 rho / (5.1016 kept)
    [(0.62, 2.32, 0.369), (0.774, 2.50, 0.456), (0.877, 2.60, 0.500)],
)
def test_build_up_from_what_the_film_is_made_of(kept, density, share) -> None:
    found = build_up_share(apparent_density=density * 1000, oxide_share=0.86, aluminium_kept=kept)
    assert found == pytest.approx(share, abs=1e-3)


@given(st.floats(1800, 3200), st.floats(0.8, 0.95), st.floats(0.3, 1.0))
def test_build_up_is_a_share_wherever_the_mass_balance_allows(density, oxide, kept) -> None:
    share = build_up_share(apparent_density=density, oxide_share=oxide, aluminium_kept=kept)
    assert share < 1.0
    assert (share > 0.0) == (oxide * density < 5101.6 * kept) or abs(share) < 1e-3


def test_build_up_both_ways_is_one_balance() -> None:
    # The charge that leaves this film, told by its yield, gives the same share as its make-up.
    growth, oxide, density = GROWTH_720.value, 0.86, 2320.0
    kept = oxide * retained_yield(density, growth)
    from_balance = build_up_share(apparent_density=density, oxide_share=oxide, aluminium_kept=kept)
    assert build_up_of_growth(growth) == pytest.approx(from_balance)


# --- weights ---------------------------------------------------------------------------------------------


@pytest.mark.parametrize("row", published("coating-weights")["row"], ids=lambda row: row["class"])
def test_architectural_coating_weights(row) -> None:
    weight = coating_weight(thickness=row["thickness_um"] * UM, apparent_density=row["density_g_cm3"] * 1000)
    assert weight * 100 == pytest.approx(row["weight_mg_cm2"], abs=row["tolerance_mg_cm2"])


def test_hard_coating_weight_is_a_density() -> None:
    row = published("hard-coating-weight")
    weight = row["weight_mg_ft2_for_one_mil"] * 1e-6 * ASF
    assert weight / MIL / 1000 == pytest.approx(row["density_g_cm3"], abs=1e-3)


@pytest.mark.parametrize(
    ("weight", "microns"),
    # Hand-worked: mg/ft2 / (92.903 x 2.32)
    [(200, 0.93), (500, 2.32), (700, 3.25), (1000, 4.64), (2500, 11.60)],
)
def test_weights_of_the_trade_as_thickness(weight, microns) -> None:
    found = thickness_of_weight(weight=weight * 1e-6 * ASF, apparent_density=2320.0)
    assert found == pytest.approx(microns * UM, abs=0.01 * UM)


@given(st.floats(1e-7, 1e-3), st.floats(1500, 3500))
def test_weight_and_thickness_are_each_others_way_back(thickness, density) -> None:
    weight = coating_weight(thickness=thickness, apparent_density=density)
    assert thickness_of_weight(weight=weight, apparent_density=density) == pytest.approx(thickness)
