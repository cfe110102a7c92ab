"""Conductivity of the baths, metals in them, strength by weight."""

import math
import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.conductivity import (
    acid_bound,
    acid_wt_fraction,
    bath_conductivity,
    conductivity_with_aluminium,
    conductivity_with_metals,
    outside_table,
)
from lineplanner.bath.faraday import SULFURIC_ACID
from lineplanner.errors import InputError

PUBLISHED = Path(__file__).parents[1] / "published"
FIT = tomllib.loads((PUBLISHED / "sulfuric-acid-conductivity.toml").read_text(encoding="utf-8"))
MAKE_UP = tomllib.loads((PUBLISHED / "acid-make-up.toml").read_text(encoding="utf-8"))
STRENGTHS = {10: 106.6, 15: 165.3, 20: 227.9, 25: 294.6}  # g/L at 20 degC


def kappa(table, strength: float, celsius: float) -> float:
    return bath_conductivity(strength=strength, temperature=celsius + 273.15, table=table)


@pytest.mark.parametrize("row", FIT["row"], ids=lambda row: f"{row['weight_percent']} %")
def test_the_table_agrees_with_a_published_fit_within_its_uncertainty(conductivity, row) -> None:
    table = conductivity["sulfuric"]
    found = kappa(table, STRENGTHS[row["weight_percent"]], 25) / 100
    assert found == pytest.approx(row["conductivity_S_cm"], rel=FIT["tolerance_relative"])
    assert table.uncertainty == pytest.approx(0.10)


@pytest.mark.parametrize("row", FIT["row"], ids=lambda row: f"{row['weight_percent']} %")
def test_the_published_fit_is_what_its_formula_gives(row) -> None:
    c = STRENGTHS[row["weight_percent"]] / SULFURIC_ACID.value  # mol/m3
    fit = c * math.exp(6.23 - 1.34e-4 * c - 1.61e-8 * c**2) * 1e-4 / 100
    assert fit == pytest.approx(row["conductivity_S_cm"], rel=0.01)


def test_the_temperature_coefficient_of_10_percent_acid_is_the_meter_makers(conductivity) -> None:
    row = next(row for row in conductivity["sulfuric"].rows if row.strength == pytest.approx(106.6))
    assert row.coefficient * 100 == pytest.approx(FIT["coefficient_percent"])


@pytest.mark.parametrize(
    ("strength", "celsius", "siemens"),
    [
        (165.3, 20, 0.5580),  # 0.5432 (1 + 0.0136 x 2)
        (227.9, 0, 0.4823),  # 0.6527 (1 - 0.0145 x 18)
        (106.6, 25, 0.4266),  # 0.3915 (1 + 0.0128 x 7)
        (165.0, 20, 0.557),
        (200.0, 20, 0.621),  # 0.5580 + (200 - 165.3) / 62.6 x (0.6716 - 0.5580)
    ],
)
def test_hand_worked_sulfuric_baths(conductivity, strength, celsius, siemens) -> None:
    assert kappa(conductivity["sulfuric"], strength, celsius) / 100 == pytest.approx(siemens, abs=6e-4)


@pytest.mark.parametrize(("strength", "siemens"), [(100, 0.27), (200, 0.48), (250, 0.56), (400, 0.72)])
def test_hand_worked_chromic_baths_at_55_degrees(conductivity, strength, siemens) -> None:
    """The 25 degC value times 1 + 0.011 x 30 = 1.33, two figures."""
    assert kappa(conductivity["chromic"], strength, 55) / 100 == pytest.approx(siemens, abs=0.006)


def test_strengths_outside_the_table_are_told(conductivity) -> None:
    table = conductivity["sulfuric"]
    assert [outside_table(c, table) for c in (40.0, 51.6, 165.0, 521.1, 600.0)] == [
        True,
        False,
        False,
        False,
        True,
    ]
    assert kappa(table, 25.8, 18) == pytest.approx(20.85 / 2)  # in proportion from zero
    assert kappa(table, 600.0, 18) == pytest.approx(68.0)  # the last row
    assert kappa(table, 0.0, 18) == 0.0


@given(st.floats(1.0, 520.0), st.floats(-5.0, 60.0), st.floats(-5.0, 60.0))
def test_a_warmer_bath_conducts_better(conductivity, strength, one, other) -> None:
    cold, warm = sorted((one, other))
    for table in conductivity.values():
        assert kappa(table, strength, cold) <= kappa(table, strength, warm) * (1 + 1e-12)


@given(st.floats(0.0, 520.0), st.floats(-5.0, 60.0))
def test_the_conductivity_has_no_jumps_between_rows(conductivity, strength, celsius) -> None:
    table = conductivity["sulfuric"]
    assert kappa(table, strength + 1e-6, celsius) == pytest.approx(kappa(table, strength, celsius), abs=1e-5)


# --- metals ----------------------------------------------------------------------------------------------


def test_aluminium_binds_five_times_its_mass_of_acid() -> None:
    # Hand-worked: 1.5 x 98.079 / 26.98154 = 5.453 g for each gram
    assert acid_bound(1.0) == pytest.approx(5.453, abs=1e-3)


def test_aluminium_lowers_the_conductivity_by_its_share() -> None:
    found = conductivity_with_aluminium(conductivity=55.8, aluminium=10.0, relative_loss=0.012)
    assert found == pytest.approx(55.8 * 0.88)
    with pytest.raises(InputError) as caught:
        conductivity_with_aluminium(conductivity=55.8, aluminium=100.0, relative_loss=0.012)
    assert caught.value.key == "conductivity.aluminium"


@pytest.mark.parametrize(
    ("chromium", "iron", "share"),
    # Hand-worked: 10 g/L are 0.1923 mol/L chromium or 0.1791 mol/L iron; times 3 over 2.500 mol/L of acid.
    [(10.0, 0.0, 0.769), (0.0, 10.0, 0.785), (0.0, 0.0, 1.0), (5.0, 5.0, 0.777)],
)
def test_metals_tie_up_the_acid_of_a_chrome_bath(chromium, iron, share) -> None:
    found = conductivity_with_metals(
        conductivity=56.0, chromic_acid=250.0, trivalent_chromium=chromium, iron=iron
    )
    assert found / 56.0 == pytest.approx(share, abs=1e-3)


def test_a_bath_whose_metals_tie_up_all_acid_is_refused() -> None:
    with pytest.raises(InputError) as caught:
        conductivity_with_metals(conductivity=56.0, chromic_acid=250.0, trivalent_chromium=40.0, iron=10.0)
    assert caught.value.key == "conductivity.metals"


# --- strength by weight ----------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("strength", "percent"),
    # From a density table (recalled) that the sulfuric conductivity table was made with: 1 % of the value.
    [(165, 15.0), (180, 16.2), (200, 17.8), (220, 19.4), (240, 20.9), (300, 25.4)],
)
def test_grams_per_litre_as_weight_percent(strength, percent) -> None:
    assert acid_wt_fraction(strength) * 100 == pytest.approx(percent, rel=0.01)


def test_the_rows_of_the_conductivity_table_are_whole_weight_percents(conductivity) -> None:
    # Two density tables of different origin: 0.2 %.
    found = [acid_wt_fraction(row.strength) * 100 for row in conductivity["sulfuric"].rows]
    assert found == pytest.approx([5, 10, 15, 20, 25, 30, 35, 40], rel=0.002)


def test_a_published_make_up_by_weight() -> None:
    # Hand-worked: 500 L hold 165.46 g/L = 82.7 kg of acid; 66 Baume is 145 / (145 - 66) = 1.835 kg/L with 93 %.
    low, high = 0.0, 600.0
    for _ in range(60):
        middle = (low + high) / 2
        low, high = (
            (middle, high) if acid_wt_fraction(middle) < MAKE_UP["weight_percent"] / 100 else (low, middle)
        )
    litres = MAKE_UP["bath_litres"] * low / 1000 / (0.93 * 145 / (145 - 66))
    assert litres == pytest.approx(MAKE_UP["acid_litres"], rel=MAKE_UP["tolerance_relative"])


def test_a_strength_beyond_the_density_table_is_refused() -> None:
    for strength in (-1.0, 700.0):
        with pytest.raises(InputError) as caught:
            acid_wt_fraction(strength)
        assert caught.value.key == "acid.strength"


@given(st.floats(0.0, 698.0), st.floats(0.0, 698.0))
def test_stronger_acid_is_more_by_weight(one, other) -> None:
    low, high = sorted((one, other))
    assert acid_wt_fraction(low) <= acid_wt_fraction(high)
