"""Bars, splines and bus bars: against the copper standard, a guidebook's chart and a published bus-bar table."""

import math
import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.circuit.busbar import ampacity, group_factor
from lineplanner.circuit.conductors import (
    bar_perimeter,
    bar_resistance,
    bar_rise,
    bar_section,
    drop_tier_current,
    resistivity_at,
    thermal_current,
)

PUBLISHED = Path(__file__).parents[1] / "published"
COPPER = 1.0 / 58e6  # ohm m, IEC 60028: 58 MS/m at 20 degC
INCH = 0.0254
C0 = 273.15
TITANIUM = {"resistivity": 0.56e-6, "coefficient": 0.0036}
SPLINE = {"section": 150e-6, "perimeter": 0.062}  # 6 x 25 mm


def published(stem: str) -> dict:
    return tomllib.loads((PUBLISHED / f"{stem}.toml").read_text(encoding="utf-8"))


def bus_bar(width_in: float, thickness_in: float, rise: float = 30.0) -> float:
    """Copper of 99 % IACS, dull, in air of 40 degC."""
    return ampacity(
        width=width_in * INCH,
        thickness=thickness_in * INCH,
        resistivity=COPPER / 0.99,
        coefficient=0.00393,
        emissivity=0.4,
        surroundings=40.0 + C0,
        rise=rise,
    )


# --- published -------------------------------------------------------------------------------------------


@pytest.mark.parametrize("row", published("rack-capacity-chart")["row"], ids=lambda row: row["conductor"])
def test_the_drop_tier_gives_the_amperes_of_a_guidebooks_rack_chart(library, row) -> None:
    conductor = next(c for c in library.tables().conductors if c.name == row["conductor"])
    section = bar_section(width=None, thickness=None, diameter=row["diameter_in"] * INCH)
    assert drop_tier_current(section, conductor.drop_tier.value) == pytest.approx(row["amperes"], rel=0.05)


@pytest.mark.parametrize(
    "row", published("bus-bar-direct-current")["row"], ids=lambda row: str(row["amperes"])
)
def test_the_heat_balance_gives_published_direct_currents(row) -> None:
    assert bus_bar(row["width_in"], row["thickness_in"]) == pytest.approx(row["amperes"], rel=0.02)


def test_regression_the_heat_balance_gives_the_value_its_coefficient_was_fitted_to() -> None:
    table = published("bus-bar-direct-current")
    model = bus_bar(table["fitted_width_in"], table["fitted_thickness_in"])
    assert model == pytest.approx(table["fitted_amperes"], rel=0.002)


@pytest.mark.parametrize(
    "row", published("bus-bar-alternating-current")["row"], ids=lambda row: f"{row['rise_K']} K"
)
def test_a_bar_carries_a_little_more_direct_than_alternating_current(row) -> None:
    table = published("bus-bar-alternating-current")
    model = bus_bar(table["width_in"], table["thickness_in"], row["rise_K"])
    assert 1.0 <= model / row["amperes"] <= 1.09


# --- hand-worked -----------------------------------------------------------------------------------------


@pytest.mark.parametrize(("celsius", "millivolts"), [(20.0, 8.145), (65.0, 9.586)])
def test_a_thousand_amperes_a_square_inch_of_copper_drop_eight_millivolts_a_foot(celsius, millivolts) -> None:
    # 0.3048 m / 58e6 S/m / 645.16e-6 m2 x 1000 A = 8.1455 mV; x (1 + 0.00393 x 45) = 9.586 mV
    rho = resistivity_at(resistivity=COPPER, coefficient=0.00393, temperature=celsius + C0)
    drop = 1000.0 * bar_resistance(resistivity=rho, length=0.3048, section=INCH * INCH)
    assert drop * 1e3 == pytest.approx(millivolts, rel=1e-3)


def test_a_titanium_spline_at_100_a() -> None:
    # 0.56e-6 x 1.2 / 150e-6 = 4.48 mohm; x 100 A = 0.448 V; x 100 A = 44.8 W
    # 44.8 W / (4510 kg/m3 x 1.8e-4 m3 x 520 J/kgK) = 0.1061 K/s = 6.37 K/min without cooling
    resistance = bar_resistance(resistivity=0.56e-6, length=1.2, section=150e-6)
    assert resistance == pytest.approx(4.48e-3, rel=1e-12)
    watts = 100.0**2 * resistance
    assert watts == pytest.approx(44.8, rel=1e-12)
    assert 60.0 * watts / (4510.0 * 150e-6 * 1.2 * 520.0) == pytest.approx(6.37, rel=0.002)


def test_a_titanium_spline_in_the_bath_carries_nearly_three_times_what_it_does_in_air() -> None:
    # air 25 degC, 30 K: rho(55) = 0.56 x 1.126 = 0.6306; sqrt(12 x 0.062 x 150e-6 x 30 / 0.6306e-6) = 72.9 A
    # bath 20 degC, 5 K: rho(25) = 0.56 x 1.018 = 0.5701; sqrt(500 x 0.062 x 150e-6 x 5 / 0.5701e-6) = 201.9 A
    air = thermal_current(**SPLINE, **TITANIUM, rise=30.0, surroundings=25.0 + C0, transfer=12.0)
    bath = thermal_current(**SPLINE, **TITANIUM, rise=5.0, surroundings=20.0 + C0, transfer=500.0)
    assert air == pytest.approx(72.9, abs=0.1)
    assert bath == pytest.approx(201.9, abs=0.1)


def test_a_round_bar_of_an_inch() -> None:
    # pi x 25.4^2 / 4 = 506.7 mm2, pi x 25.4 = 79.80 mm
    size = {"width": None, "thickness": None, "diameter": INCH}
    assert bar_section(**size) * 1e6 == pytest.approx(506.7075, abs=1e-3)
    assert bar_perimeter(**size) * 1e3 == pytest.approx(79.796, abs=1e-3)


def test_a_bar_of_no_length_has_no_resistance() -> None:
    assert bar_resistance(resistivity=COPPER, length=0.0, section=1e-4) == 0.0


def test_more_than_four_bars_are_counted_as_four() -> None:
    assert [group_factor(n) for n in (1, 2, 4, 5, 20)] == [1.0, 1.64, 2.64, 2.64, 2.64]


# --- closed form and property ----------------------------------------------------------------------------

currents = st.floats(1.0, 100.0)
rises = st.floats(1.0, 80.0)


@given(rises, st.floats(273.15, 333.15))
def test_the_rise_of_a_bar_and_the_current_for_a_rise_undo_each_other(rise: float, air: float) -> None:
    current = thermal_current(**SPLINE, **TITANIUM, rise=rise, surroundings=air, transfer=12.0)
    back = bar_rise(current=current, **SPLINE, **TITANIUM, surroundings=air, transfer=12.0)
    assert back == pytest.approx(rise, rel=1e-9)


def test_a_bar_that_heats_faster_than_it_cools_rises_without_end() -> None:
    assert bar_rise(current=1e4, **SPLINE, **TITANIUM, surroundings=C0 + 20, transfer=12.0) == math.inf


@given(st.floats(273.15, 400.0), st.floats(0.1, 50.0))
def test_a_warmer_bar_resists_more(temperature: float, more: float) -> None:
    cold = resistivity_at(resistivity=COPPER, coefficient=0.00393, temperature=temperature)
    assert resistivity_at(resistivity=COPPER, coefficient=0.00393, temperature=temperature + more) > cold


@given(rises, st.floats(0.1, 30.0))
def test_a_bar_allowed_to_get_hotter_carries_more(rise: float, more: float) -> None:
    assert bus_bar(4.0, 0.25, rise + more) > bus_bar(4.0, 0.25, rise)


def test_aluminium_of_61_percent_carries_the_root_of_the_conductivity_ratio() -> None:
    # sqrt(0.61 / 0.99) = 0.785 of copper, at equal temperature coefficients
    aluminium = ampacity(
        width=0.1,
        thickness=0.01,
        resistivity=COPPER / 0.61,
        coefficient=0.00393,
        emissivity=0.4,
        surroundings=40.0 + C0,
        rise=30.0,
    )
    assert aluminium / bus_bar(0.1 / INCH, 0.01 / INCH) == pytest.approx(0.785, abs=0.001)
