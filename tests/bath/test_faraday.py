"""Faraday's law against package data, a handbook, textbooks and the trade's rounded constants."""

import tomllib
from pathlib import Path

import periodictable
import pytest
import scipy.constants

from lineplanner.bath import faraday
from lineplanner.bath.faraday import (
    ALUMINIUM_OXIDISED,
    CHROMIUM_DEPOSIT,
    OXIDE_FORMED,
    mass_per_charge,
    thickness_per_charge,
)
from lineplanner.quantities import ATMOSPHERE, FARADAY, GAS_CONSTANT, ICE_POINT

PUBLISHED = Path(__file__).parents[1] / "published"
AMPERE_HOUR = 3600.0
SQUARE_FOOT = 0.3048**2
MIL = 25.4e-6


def published(stem: str) -> dict:
    return tomllib.loads((PUBLISHED / f"{stem}.toml").read_text(encoding="utf-8"))


@pytest.mark.parametrize(
    ("ours", "formula"),
    [
        (faraday.HYDROGEN, "H"),
        (faraday.OXYGEN, "O"),
        (faraday.ALUMINIUM, "Al"),
        (faraday.SULFUR, "S"),
        (faraday.CHROMIUM, "Cr"),
        (faraday.IRON, "Fe"),
        (faraday.ALUMINA, "Al2O3"),
        (faraday.CHROMIC_ACID, "CrO3"),
        (faraday.SULFURIC_ACID, "H2SO4"),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)
def test_molar_masses_are_those_of_periodictable(ours, formula) -> None:
    # Both are IUPAC weights; editions differ in the last figures of oxygen, hydrogen and sulfur: 1e-4.
    assert ours.value * 1000 == pytest.approx(periodictable.formula(formula).mass, rel=1e-4)


def test_aluminium_density_is_that_of_periodictable_rounded() -> None:
    assert faraday.ALUMINIUM_DENSITY.value / 1000 == pytest.approx(periodictable.Al.density, abs=0.005)


def test_constants_of_nature_are_those_of_codata() -> None:
    assert pytest.approx(scipy.constants.physical_constants["Faraday constant"][0], rel=1e-9) == FARADAY.value
    assert pytest.approx(scipy.constants.R, rel=1e-9) == GAS_CONSTANT.value


def test_the_trades_rounded_constants_are_ours_within_their_rounding() -> None:
    rounded = published("rounded-constants")
    assert pytest.approx(rounded["coulombs_per_mole"], abs=rounded["coulombs_tolerance"]) == FARADAY.value
    litres = GAS_CONSTANT.value * ICE_POINT.value / ATMOSPHERE.value * 1000
    assert litres == pytest.approx(rounded["litres_per_mole"], abs=rounded["litres_tolerance"])


def test_chromium_takes_323_milligrams_for_each_ampere_hour() -> None:
    # Hand-worked: 51.9961 x 3600 / (6 x 96485.332) = 0.323341 g.
    assert CHROMIUM_DEPOSIT.equivalent * AMPERE_HOUR * 1000 == pytest.approx(0.323341, rel=1e-5)
    book = published("chromium-repair-text")
    assert CHROMIUM_DEPOSIT.equivalent * AMPERE_HOUR * 1000 == pytest.approx(
        book["grams_per_ampere_hour"], rel=book["tolerance_relative"]
    )


def test_aluminium_and_its_oxide_have_their_equivalents() -> None:
    # Hand-worked: 26.98154 x 3600 / (3 x 96485.332) = 0.335573 g;
    # 101.9601 x 3600 / (6 x 96485.332) = 0.634046 g, of which 0.634053 with the weight 101.9613: 2e-5 apart.
    aluminium = ALUMINIUM_OXIDISED.equivalent * AMPERE_HOUR * 1000
    oxide = OXIDE_FORMED.equivalent * AMPERE_HOUR * 1000
    assert aluminium == pytest.approx(0.335573, rel=1e-5)
    assert oxide == pytest.approx(0.634053, rel=2e-5)
    assert oxide / aluminium == pytest.approx(1.88946, rel=2e-5)


def test_chromium_at_one_ampere_a_square_decimetre_grows_4_55_um_an_hour_at_full_efficiency() -> None:
    # Hand-worked: 0.323341 g/dm2 / 7.1 g/cm3 = 0.045541 cm3 over 100 cm2 = 4.5541 um.
    assert CHROMIUM_DEPOSIT.growth(7100.0) * 100 * AMPERE_HOUR * 1e6 == pytest.approx(4.5541, abs=0.001)


def test_the_handbook_charge_of_one_mil_of_chromium_on_a_square_foot() -> None:
    # Recalled, so a second support beside the hand-worked equivalent above.
    book = published("handbook-chromium-charge")
    charge = SQUARE_FOOT * MIL / CHROMIUM_DEPOSIT.growth(book["density_g_cm3"] * 1000) / AMPERE_HOUR
    assert charge == pytest.approx(book["ampere_hours_per_ft2_mil"], rel=book["tolerance_relative"])


def test_thickness_per_charge_is_mass_per_charge_over_density() -> None:
    mass = mass_per_charge(electrons=3, molar_mass=faraday.ALUMINIUM.value)
    thickness = thickness_per_charge(electrons=3, molar_mass=faraday.ALUMINIUM.value, density=2700.0)
    assert thickness * 2700.0 == pytest.approx(mass)
    assert ALUMINIUM_OXIDISED.growth() == pytest.approx(thickness)


def test_a_couple_without_density_asks_for_one() -> None:
    with pytest.raises(ValueError, match="aluminium oxide has no density"):
        OXIDE_FORMED.growth()
