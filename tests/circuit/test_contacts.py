"""Contacts: Holm's relations against handbook volts, a numerical disc and worked cases."""

import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.circuit.contacts import (
    LORENZ,
    contact_resistance,
    contact_temperature,
    contact_voltage,
    contacts_needed,
    lost_contact_factor,
    spot_radius,
)

PUBLISHED = Path(__file__).parents[1] / "published"
VOLTS = tomllib.loads((PUBLISHED / "contact-volts.toml").read_text(encoding="utf-8"))
AIR = 293.15


@pytest.mark.parametrize("row", VOLTS["row"], ids=lambda row: row["metal"])
def test_contact_volts_at_which_metals_soften_and_melt(row) -> None:
    # from memory, so beside the derivation below and not alone
    assert contact_voltage(row["celsius"] + 273.15, AIR) == pytest.approx(row["volts"], rel=0.08)


def test_the_lorenz_number_is_sommerfelds() -> None:
    scipy_constants = pytest.importorskip("scipy.constants")
    pi, k, e = scipy_constants.pi, scipy_constants.k, scipy_constants.e
    assert LORENZ.value == pytest.approx(pi**2 / 3.0 * (k / e) ** 2, rel=1e-12)
    assert pytest.approx(2.443e-8, rel=1e-3) == LORENZ.value


def test_titanium_on_6061_at_20_newton() -> None:
    # a = sqrt(20 / (pi x 1.05e9)) = 77.87 um; R = (0.56 + 0.0401) uohm m / (4 x 77.87 um) = 1.9267 mohm
    assert spot_radius(20.0, 1.05e9) * 1e6 == pytest.approx(77.9, rel=0.005)
    resistance = contact_resistance(
        force=20.0, hardness=1.05e9, first_resistivity=0.56e-6, second_resistivity=0.0401e-6
    )
    assert resistance * 1e3 == pytest.approx(1.926, rel=0.005)


def test_a_disc_pressed_on_a_half_space_resists_as_its_charge_spreads() -> None:
    # Independent: potential of the disc's known charge density, integrated numerically, gives rho / (4 a) a side.
    quad = pytest.importorskip("scipy.integrate").quad
    radius, rho = 77.9e-6, 0.56e-6
    density = lambda r: 1.0 / (2.0 * 3.141592653589793 * radius * (radius**2 - r**2) ** 0.5)  # noqa: E731
    # potential in the middle for unit current into the half space: rho/(2 pi) int i(r)/r dA
    middle, _ = quad(lambda s: density(radius * s) * radius, 0.0, 1.0)
    assert rho * middle == pytest.approx(rho / (4.0 * radius), rel=1e-6)


def test_twice_the_force_lowers_the_resistance_by_the_root_of_two() -> None:
    pair = {"hardness": 1.05e9, "first_resistivity": 0.56e-6, "second_resistivity": 0.04e-6}
    ratio = contact_resistance(force=20.0, **pair) / contact_resistance(force=40.0, **pair)
    assert ratio == pytest.approx(2**0.5, rel=1e-12)


@given(st.floats(0.0, 0.5), st.floats(250.0, 400.0))
def test_contact_volts_and_temperature_undo_each_other(volts: float, surroundings: float) -> None:
    hottest = contact_temperature(volts, surroundings)
    assert hottest >= surroundings * (1.0 - 1e-12)
    assert contact_voltage(max(hottest, surroundings), surroundings) == pytest.approx(volts, abs=1e-6)


@pytest.mark.parametrize(("current", "each", "needed"), [(40.0, 20.0, 2), (40.1, 20.0, 3), (3.0, 8.0, 1)])
def test_contacts_are_counted_up_and_never_down(current, each, needed) -> None:
    assert contacts_needed(current, each) == needed


@given(st.floats(0.1, 1000.0), st.floats(1.0, 100.0))
def test_the_contacts_that_are_needed_carry_the_current(current: float, each: float) -> None:
    assert contacts_needed(current, each) * each >= current * (1.0 - 1e-12)


def test_three_of_twenty_contacts_lost_load_the_rest_by_a_sixth_more() -> None:
    # 20 / 17 = 1.17647
    assert lost_contact_factor(20, 3) == pytest.approx(1.0 + 0.1764706, rel=1e-6)
