"""Reaction voltages, heat of the baths, soak of a part."""

import math
import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.growth import GROWTH_720
from lineplanner.bath.heat import (
    DICHROMATE_VOLTAGE,
    DISSOLUTION_VOLTAGE,
    REACTION_VOLTAGE,
    WATER_VOLTAGE,
    bath_heat_anodizing,
    bath_heat_chrome,
    cooling_heat_chrome,
    soak_time,
)

TONS = tomllib.loads(
    (Path(__file__).parents[1] / "published" / "cooling-tons.toml").read_text(encoding="utf-8")
)
TON = 3516.85  # W, ton of refrigeration: 12000 BTU/h


def test_reaction_voltages_from_enthalpies_of_formation() -> None:
    # Hand-worked, kJ/mol, F = 96.485332 kC/mol:
    # anodizing -1675.7 + 3 x 285.83 = -818.21 over 6 F; dissolving 2 x 538.4 = 1076.8 over 6 F;
    # water 285.83 over 2 F; dichromate 1490.34 - 285.83 = 1204.51 over 12 F.
    assert REACTION_VOLTAGE.value == pytest.approx(818.21 / (6 * 96.485332), abs=1e-5)
    assert REACTION_VOLTAGE.value == pytest.approx(1.41336, abs=1e-4)
    assert DISSOLUTION_VOLTAGE.value == pytest.approx(1.860, abs=5e-4)
    assert WATER_VOLTAGE.value == pytest.approx(1.481, abs=5e-4)
    assert DICHROMATE_VOLTAGE.value == pytest.approx(1.040, abs=5e-4)


@pytest.mark.parametrize(
    ("amperes", "volts", "kilowatts"),
    # Hand-worked: I (V + 1.4134)
    [(1000, 18, 19.41), (5000, 16, 87.07), (6000, 20, 128.48), (1800, 30, 56.54), (1800, 65, 119.54)],
)
def test_heat_of_anodizing(amperes, volts, kilowatts) -> None:
    assert bath_heat_anodizing(current=amperes, voltage=volts) / 1000 == pytest.approx(kilowatts, abs=0.006)


def test_tons_of_refrigeration_and_the_published_shortcut() -> None:
    heat = bath_heat_anodizing(current=TONS["amperes"], voltage=TONS["volts"])
    assert heat / TON == pytest.approx(36.53, abs=0.02)
    electrical = heat - REACTION_VOLTAGE.value * TONS["amperes"]  # what the shortcut counts
    assert electrical / TON == pytest.approx(TONS["tons"], rel=TONS["tolerance_relative"])


def test_a_tank_without_cooling_warms() -> None:
    # Hand-worked: 1800 A x 51.413 V = 92.54 kW into 2000 L x 3.96 kJ/(L K) = 7920 kJ/K: 0.701 K/min
    warming = bath_heat_anodizing(current=1800, voltage=50) / (2000 * 3960) * 60
    assert warming == pytest.approx(0.701, abs=0.002)


def test_reaction_heat_of_a_film_is_its_charge_times_its_voltage() -> None:
    # Hand-worked: 3.0512 A min/(dm2 um) x 60 x 1.4134 V = 258.7 J/(dm2 um)
    heat = bath_heat_anodizing(current=1.0, voltage=0.0) * 0.01 * 1e-6 / GROWTH_720.value
    assert heat == pytest.approx(258.7, abs=0.1)


def test_heat_of_chrome() -> None:
    # Hand-worked: 10 kA x (5.5 - 1.481 x 0.85 - 1.040 x 0.15) = 10 kA x 4.085 V = 40.85 kW
    heat = bath_heat_chrome(current=10_000, voltage=5.5, efficiency=0.15)
    assert heat / 1000 == pytest.approx(40.85, abs=0.02)
    assert heat < cooling_heat_chrome(current=10_000, voltage=5.5) == 55_000.0
    # 6 V: 76.4 % of the electrical power is heat
    share = bath_heat_chrome(current=1.0, voltage=6.0, efficiency=0.15) / 6.0
    assert share == pytest.approx(0.764, abs=5e-4)


@given(st.floats(1.0, 2e4), st.floats(2.0, 100.0), st.floats(0.0, 0.3))
def test_anodizing_heats_more_than_its_power_and_chrome_less(current, voltage, efficiency) -> None:
    assert bath_heat_anodizing(current=current, voltage=voltage) > current * voltage
    chrome = bath_heat_chrome(current=current, voltage=voltage, efficiency=efficiency)
    assert chrome < cooling_heat_chrome(current=current, voltage=voltage)


@pytest.mark.parametrize(
    ("diameter", "minutes"),
    # Hand-worked: 3 x 7850 x 480 x (D/4) / 500 s
    [(0.025, 2.4), (0.050, 4.7), (0.100, 9.4), (0.200, 19), (0.300, 28)],
)
def test_soak_of_a_steel_rod(diameter, minutes) -> None:
    found = soak_time(
        mass=7850 * math.pi / 4 * diameter**2,
        area=math.pi * diameter,
        specific_heat=480.0,
        heat_transfer=500.0,
    )
    assert found / 60 == pytest.approx(minutes, rel=0.02)


def test_a_soak_leaves_five_percent_of_the_difference() -> None:
    """Closed form: exp(-3) = 0.0498; integrated here with small steps."""
    mass, area, heat, transfer = 10.0, 0.3, 480.0, 500.0
    end = soak_time(mass=mass, area=area, specific_heat=heat, heat_transfer=transfer)
    left, step = 1.0, end / 20_000
    for _ in range(20_000):
        left -= step * transfer * area / (mass * heat) * left
    assert left == pytest.approx(math.exp(-3), rel=1e-3)
