"""Hydrogen, oxygen and the air over them."""

import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.gas import dilution_flow, gas_volume, hydrogen_flow, hydrogen_share, oxygen_flow
from lineplanner.errors import InputError
from lineplanner.quantities import ATMOSPHERE

ROOM = tomllib.loads(
    (Path(__file__).parents[1] / "published" / "battery-room-hydrogen.toml").read_text(encoding="utf-8")
)
CFM = 0.3048**3 / 60  # m^3/s
AIR = {"pressure": ATMOSPHERE.value}


@pytest.mark.parametrize(("celsius", "litres"), [(0, 0.4181), (20, 0.4488), (25, 0.4564), (55, 0.5023)])
def test_hydrogen_of_one_ampere_hour(celsius, litres) -> None:
    """Hand-worked at 0 degC: 3600 / (2 x 96485.33) mol x 22.414 L/mol = 0.41815 L."""
    found = gas_volume(charge=3600, electrons=2, temperature=celsius + 273.15, **AIR)
    assert found * 1000 == pytest.approx(litres, abs=1e-4)


def test_hydrogen_is_that_of_battery_rooms() -> None:
    flow = hydrogen_flow(current=1.0, share=1.0, temperature=ROOM["cfm_temperature_degC"] + 273.15, **AIR)
    assert flow / CFM == pytest.approx(ROOM["cfm_per_ampere"], rel=ROOM["cfm_tolerance"])
    volume = gas_volume(charge=3600, electrons=2, temperature=ROOM["m3_temperature_degC"] + 273.15, **AIR)
    assert volume == pytest.approx(ROOM["m3_per_ampere_hour"], rel=ROOM["m3_tolerance"])


def test_hydrogen_and_oxygen_of_chrome_at_15_percent() -> None:
    # Hand-worked: 0.41815 x 0.85 = 0.3554 L/Ah; oxygen 0.41815 / 2 = 0.2091 L/Ah (0 degC, 1 atm)
    hydrogen = hydrogen_flow(current=1.0, share=0.85, temperature=273.15, **AIR) * 3600 * 1000
    oxygen = oxygen_flow(current=1.0, share=1.0, temperature=273.15, **AIR) * 3600 * 1000
    assert hydrogen == pytest.approx(0.3554, rel=1e-3)
    assert oxygen == pytest.approx(0.2091, rel=1e-3)


def test_the_air_for_a_thousand_amperes_of_anodizing() -> None:
    # Hand-worked: 0.4564 m3/h at 25 degC; 100 times that for 1 %: 45.64 m3/h = 26.86 cfm
    hydrogen = hydrogen_flow(current=1000.0, share=1.0, temperature=298.15, **AIR)
    assert hydrogen * 3600 == pytest.approx(0.4564, abs=1e-4)
    assert dilution_flow(hydrogen=hydrogen, share=0.01) / CFM == pytest.approx(26.86, abs=0.01)
    # at 15 % efficiency 0.85 of it: 38.8 m3/h
    assert dilution_flow(hydrogen=0.85 * hydrogen, share=0.01) * 3600 == pytest.approx(38.8, abs=0.05)


def test_a_large_hood_leaves_little_hydrogen() -> None:
    # Hand-worked: 10 kA, 25 degC: 4.564 m3/h in 7000 cfm (11893 m3/h) is 0.0384 %
    hydrogen = hydrogen_flow(current=10_000.0, share=1.0, temperature=298.15, **AIR)
    assert hydrogen_share(hydrogen=hydrogen, exhaust=7000 * CFM) * 100 == pytest.approx(0.0384, abs=1e-4)


def test_a_room_that_mixes_badly_takes_more_air() -> None:
    assert dilution_flow(hydrogen=1.0, share=0.01, mixing=5.0) == pytest.approx(500.0)


def test_without_exhaust_it_is_all_hydrogen() -> None:
    assert hydrogen_share(hydrogen=1e-4, exhaust=0.0) == 1.0
    assert hydrogen_share(hydrogen=2.0, exhaust=1.0) == 1.0
    assert hydrogen_share(hydrogen=0.0, exhaust=0.0) == 0.0


def test_flows_below_zero_and_a_share_of_nothing_are_refused() -> None:
    with pytest.raises(InputError) as caught:
        hydrogen_share(hydrogen=1.0, exhaust=-1.0)
    assert caught.value.key == "exhaust.negative"
    with pytest.raises(InputError) as caught:
        dilution_flow(hydrogen=1.0, share=0.0)
    assert caught.value.key == "dilution.share"


@given(st.floats(1.0, 1e5), st.floats(270.0, 380.0), st.floats(5e4, 1.1e5))
def test_oxygen_at_full_share_is_half_the_hydrogen(current, temperature, pressure) -> None:
    where = {"current": current, "share": 1.0, "temperature": temperature, "pressure": pressure}
    assert 2 * oxygen_flow(**where) == pytest.approx(hydrogen_flow(**where))


@given(st.floats(1e-6, 1.0), st.floats(1e-4, 0.5))
def test_the_dilution_flow_brings_the_share_it_was_asked_for(hydrogen, share) -> None:
    exhaust = dilution_flow(hydrogen=hydrogen, share=share)
    assert hydrogen_share(hydrogen=hydrogen, exhaust=exhaust) == pytest.approx(share)
