"""Hard chrome: efficiency, rate, consumption, bright window."""

import math
import tomllib
from dataclasses import replace
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.efficiency import (
    anodic_loss,
    at_cap,
    bright_window_high,
    bright_window_low,
    chromic_acid_consumption,
    current_efficiency,
    deposit_rate,
    deposition_threshold,
    outside_range,
    thickness_exponent,
)
from lineplanner.bath.faraday import CHROMIUM_DEPOSIT

PUBLISHED = Path(__file__).parents[1] / "published"
DM2 = 100.0  # A/m^2 for each A/dm2
UM = 1e-6


def published(stem: str) -> dict:
    return tomllib.loads((PUBLISHED / f"{stem}.toml").read_text(encoding="utf-8"))


BOOK = published("modern-electroplating-chromium")
TIMES = published("chromium-time-table")


def efficiency(family, amperes: float, celsius: float = 55.0, acid: float = 250.0, k: float = 1.0) -> float:
    return current_efficiency(
        current_density=amperes * DM2,
        temperature=celsius + 273.15,
        chromic_acid=acid,
        family=family,
        calibration=k,
    )


def rate(family, amperes: float, celsius: float = 55.0, density: float = 7100.0) -> float:
    """um/h"""
    share = efficiency(family, amperes, celsius)
    return deposit_rate(current_density=amperes * DM2, efficiency=share, deposit_density=density) * 3600 / UM


@pytest.fixture
def laboratory(families):
    """The conventional bath on the laboratory curve: 17 % and its ceiling at the reference point."""
    shop = families["conventional"]
    return replace(
        shop,
        reference_efficiency=replace(shop.reference_efficiency, value=0.17),
        cap=replace(shop.cap, value=0.24),
    )


# --- published -------------------------------------------------------------------------------------------


@pytest.mark.parametrize("row", TIMES["row"], ids=lambda row: f"{row['current_density_A_dm2']} A/dm2")
def test_a_published_table_of_minutes_for_10_um(row) -> None:
    found = deposit_rate(
        current_density=row["current_density_A_dm2"] * DM2,
        efficiency=TIMES["efficiency"],
        deposit_density=TIMES["density_g_cm3"] * 1000,
    )
    minutes = TIMES["thickness_um"] * UM / found / 60
    assert minutes == pytest.approx(row["minutes"], abs=TIMES["tolerance_minutes"])


def test_the_books_rate_is_18_percent_by_faradays_law() -> None:
    row = BOOK["rate"]
    full = deposit_rate(
        current_density=row["current_density_A_dm2"] * DM2,
        efficiency=1.0,
        deposit_density=row["density_g_cm3"] * 1000,
    )
    share = row["rate_um_h"] * UM / 3600 / full
    assert share * 100 == pytest.approx(row["efficiency_percent"], abs=row["tolerance_percent"])


def test_the_laboratory_curve_plates_almost_what_the_book_says(laboratory) -> None:
    """Regression: the level of the curve was fitted to this book."""
    row = BOOK["rate"]
    found = rate(
        laboratory, row["current_density_A_dm2"], row["temperature_degC"], row["density_g_cm3"] * 1000
    )
    assert 22.0 < found < row["rate_um_h"]


def test_the_laboratory_curve_falls_with_acid_as_the_book_says(laboratory) -> None:
    """Regression: the slope was taken from this book. 400 against 250 g/L: 15 x 0.25 = 3.75 points."""
    row = BOOK["acid"]
    fall = efficiency(laboratory, 31, acid=row["from_g_L"]) - efficiency(laboratory, 31, acid=400)
    assert fall * 100 == pytest.approx(15 * row["points_per_10_g_L"], abs=0.1)


@pytest.mark.parametrize("row", BOOK["bright"], ids=lambda row: f"{row['temperature_degC']} degC")
def test_the_bright_window_is_that_of_the_book(row) -> None:
    """The 40 degC row is the anchor; 45 degC tests the rise, printed to two figures."""
    temperature = row["temperature_degC"] + 273.15
    assert bright_window_low(temperature) / DM2 == pytest.approx(row["from_A_dm2"], rel=0.02)
    assert bright_window_high(temperature) / DM2 == pytest.approx(row["to_A_dm2"], rel=0.02)


def test_the_bright_window_reaches_into_the_qualified_window() -> None:
    window = published("qualified-chromium-window")
    low, high = (amperes * DM2 for amperes in window["current_density_A_dm2"])
    for celsius in window["temperature_degC"]:
        assert bright_window_low(celsius + 273.15) < high
        assert bright_window_high(celsius + 273.15) > low


# --- the model -------------------------------------------------------------------------------------------


def test_the_reference_point_is_the_reference(families) -> None:
    """Regression: so defined. g = 1 - (4/31)^(1/3) = 0.494680."""
    for family in families.values():
        assert efficiency(family, 31) == pytest.approx(family.reference_efficiency.value)


def test_below_the_onset_no_chromium_comes(families) -> None:
    conventional = families["conventional"]
    assert deposition_threshold(328.15, conventional) == pytest.approx(4.0 * DM2)
    for amperes in (3.0, 4.0, 0.0, -5.0):
        assert efficiency(conventional, amperes) == 0.0


GRID = [  # hand-worked with the model's own equation; regression, the book prints curves only
    (45, 15.5, 13.5),
    (45, 93, 20.0),  # the ceiling
    (50, 31, 15.4),
    (52, 46.5, 16.5),
    (55, 10, 7.4),
    (55, 46.5, 15.8),
    (55, 93, 18.4),
    (60, 31, 12.5),
    (65, 10, 2.8),
    (65, 77.5, 15.4),
]


@pytest.mark.parametrize(("celsius", "amperes", "percent"), GRID)
def test_the_conventional_grid(families, celsius, amperes, percent) -> None:
    """Regression."""
    assert efficiency(families["conventional"], amperes, celsius) * 100 == pytest.approx(percent, abs=0.06)


@pytest.mark.parametrize(
    ("name", "celsius", "amperes", "percent"),
    [
        ("mixed-catalyst", 55, 46.5, 23.7),
        ("mixed-catalyst", 60, 62, 23.6),
        ("high-speed", 55, 62, 26.6),
        ("high-speed", 60, 31, 19.6),
    ],
)
def test_the_other_families(families, name, celsius, amperes, percent) -> None:
    """Regression."""
    assert efficiency(families[name], amperes, celsius) * 100 == pytest.approx(percent, abs=0.06)


def test_a_worked_rod(families) -> None:
    # 40 A/dm2, 55 degC: g = 1 - 0.1^(1/3) = 0.53584; 14 x 0.53584 / 0.49468 = 15.165 %;
    # 0.15165 x 4.5541 x 40 = 27.62 um/h, so 150 um take 5.43 h.
    assert rate(families["conventional"], 40) == pytest.approx(27.62, abs=0.02)
    assert 150 / rate(families["conventional"], 40) == pytest.approx(5.43, abs=0.005)


@pytest.mark.parametrize(("over", "factor"), [(1.2, 1.272), (0.8, 0.737)])
def test_an_area_counted_wrong_costs_more_than_its_share(families, over, factor) -> None:
    """Hand-worked at 31 A/dm2: 1.2 x g(37.2) / g(31) = 1.2 x 0.52447 / 0.49468 = 1.272; likewise 0.8."""
    conventional = families["conventional"]
    assert rate(conventional, 31 * over) / rate(conventional, 31) == pytest.approx(factor, rel=0.005)


def test_the_ceiling_acts_before_the_calibration(families) -> None:
    conventional = families["conventional"]
    assert efficiency(conventional, 93, 45, k=1.25) == pytest.approx(0.20 * 1.25)
    at_45 = {"temperature": 318.15, "chromic_acid": 250.0, "family": conventional}
    assert at_cap(current_density=93 * DM2, **at_45)
    assert not at_cap(current_density=80 * DM2, **at_45)  # the ceiling is met at 87 A/dm2
    assert thickness_exponent(current_density=93 * DM2, **at_45) == 1.0


def test_a_calibrated_shop_agrees_with_the_laboratory_curve(families, laboratory) -> None:
    # 14 % x 1.214 = 17 %: both say 21.6 % at 77.5 A/dm2.
    shop = efficiency(families["conventional"], 77.5, k=0.17 / 0.14)
    assert shop * 100 == pytest.approx(21.6, abs=0.1)
    assert shop == pytest.approx(efficiency(laboratory, 77.5))


@pytest.mark.parametrize(
    ("amperes", "power"), [(15.5, 1.58), (20, 1.47), (31, 1.34), (46.5, 1.26), (62, 1.22)]
)
def test_thickness_varies_more_than_current(families, amperes, power) -> None:
    """Hand-worked: 1 + x / (3 (1 - x)) with x = (4/i)^(1/3)."""
    where = {"temperature": 328.15, "chromic_acid": 250.0, "family": families["conventional"]}
    found = thickness_exponent(current_density=amperes * DM2, **where)
    assert found == pytest.approx(power, abs=0.006)


def test_at_the_onset_the_exponent_has_no_end(families) -> None:
    where = {"temperature": 328.15, "chromic_acid": 250.0, "family": families["conventional"]}
    assert thickness_exponent(current_density=400.0, **where) == math.inf


def test_conditions_outside_the_range_are_named(families) -> None:
    conventional = families["conventional"]
    inside = {
        "current_density": 31 * DM2,
        "temperature": 328.15,
        "chromic_acid": 250.0,
        "family": conventional,
    }
    assert outside_range(**inside) == ()
    assert outside_range(**inside | {"temperature": 313.15}) == ("temperature",)
    assert outside_range(**inside | {"current_density": 10 * DM2, "chromic_acid": 450.0}) == (
        "current_density",
        "chromic_acid",
    )


amperes = st.floats(1.0, 120.0)
celsius = st.floats(40.0, 70.0)


@given(amperes, amperes, celsius)
def test_more_current_never_plates_less(families, one, other, temperature) -> None:
    low, high = sorted((one, other))
    for family in families.values():
        assert rate(family, low, temperature) <= rate(family, high, temperature)


@given(amperes, celsius, celsius)
def test_a_warmer_bath_never_plates_more(families, current, one, other) -> None:
    cold, warm = sorted((one, other))
    for family in families.values():
        assert efficiency(family, current, warm) <= efficiency(family, current, cold)


@given(amperes, celsius, st.floats(50.0, 800.0), st.floats(0.75, 1.35))
def test_the_efficiency_stays_between_nothing_and_its_calibrated_ceiling(
    families, i, temperature, acid, k
) -> None:
    for family in families.values():
        assert 0.0 <= efficiency(family, i, temperature, acid, k) <= family.cap.value * k


@given(st.floats(8.0, 60.0), celsius)
def test_the_exponent_is_the_slope_of_the_rate(families, current, temperature) -> None:
    family = families["conventional"]
    where = {"temperature": temperature + 273.15, "chromic_acid": 250.0, "family": family}
    onset = deposition_threshold(temperature + 273.15, family) / DM2
    if current < 1.05 * onset or at_cap(current_density=1.01 * current * DM2, **where):
        return
    step = 1e-5
    slope = math.log(
        rate(family, current * (1 + step), temperature) / rate(family, current * (1 - step), temperature)
    )
    expected = thickness_exponent(current_density=current * DM2, **where)
    assert slope / math.log((1 + step) / (1 - step)) == pytest.approx(expected, rel=1e-5)


# --- chemicals and reverse -------------------------------------------------------------------------------


def test_chromic_acid_of_1000_ampere_hours() -> None:
    # Hand-worked: 1000 x 0.323341 g x 0.15 x 99.994 / 51.996 = 93.27 g
    assert chromic_acid_consumption(charge=3.6e6, efficiency=0.15) * 1000 == pytest.approx(93.27, abs=0.05)


@pytest.mark.parametrize(("density", "grams"), [(7100.0, 13.654), (7150.0, 13.750)])
def test_chromic_acid_of_one_micron_on_a_square_metre(density, grams) -> None:
    # Hand-worked: 7.1 g x 99.994 / 51.996 = 13.654 g, whatever the efficiency.
    charge = UM / (CHROMIUM_DEPOSIT.growth(density) * 0.14)
    assert chromic_acid_consumption(charge=charge, efficiency=0.14) * 1000 == pytest.approx(grams, abs=0.01)


def test_a_reverse_etch_on_chromium() -> None:
    # Hand-worked: 4.5541 um/h per A/dm2 x 31 / 120 = 1.176 um in half a minute, 2.35 um/min.
    loss = anodic_loss(current_density=31 * DM2, time=30, deposit_density=7100.0)
    assert loss == pytest.approx(1.18 * UM, rel=0.01)


@pytest.mark.parametrize(
    ("celsius", "low", "high"),
    # Hand-worked: 3.1 and 15.5 A/dm2 x 1.5^((T - 40) / 5); an extrapolation above 45 degC
    [(50, 7.0, 34.9), (55, 10.5, 52.3), (60, 15.7, 78.5), (65, 23.5, 117.7)],
)
def test_the_bright_window_further_up(celsius, low, high) -> None:
    assert bright_window_low(celsius + 273.15) / DM2 == pytest.approx(low, abs=0.06)
    assert bright_window_high(celsius + 273.15) / DM2 == pytest.approx(high, abs=0.06)
