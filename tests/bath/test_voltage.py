"""Film voltage, drop in the bath, chrome cell."""

import math
import tomllib
from dataclasses import replace
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.conductivity import bath_conductivity
from lineplanner.bath.growth import film_rate
from lineplanner.bath.voltage import (
    bath_drop,
    chrome_cell_voltage,
    chrome_coaxial_voltage,
    electrode_voltage,
    film_gradient_in_bath,
    film_voltage,
)
from lineplanner.errors import InputError

PUBLISHED = Path(__file__).parents[1] / "published"
ASF = 1 / 0.3048**2
DM2 = 100.0
UM = 1e-6
RUNS = tomllib.loads((PUBLISHED / "hard-film-runs.toml").read_text(encoding="utf-8"))


def film(law, amperes: float, celsius: float, microns: float = 0.0, a: float = 1.0, s: float = 0.4) -> float:
    return film_voltage(
        current_density=amperes * ASF,
        thickness=microns * UM,
        temperature=celsius + 273.15,
        voltage_factor=a,
        film_gradient=s / UM,
        law=law,
    )


# --- film ------------------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("amperes", "celsius", "volts"),
    # Hand-worked: 13 (j/12)^0.4 (1 + 0.02 (20 - T)); the first row is the definition
    [
        (12, 20, 13.00),
        (18, 20, 15.29),
        (24, 20, 17.15),
        (36, 20, 20.17),
        (12, 0, 18.20),
        (24, 0, 24.02),
        (36, 0, 28.24),
    ],
)
def test_bare_metal_takes_its_starting_volts(law, amperes, celsius, volts) -> None:
    assert film(law, amperes, celsius) == pytest.approx(volts, abs=0.02)


def test_a_hard_film_at_its_end(law) -> None:
    # Hand-worked: 28.24 + 0.4 x 50.8 = 48.56 V; with 2.41 V of 30 cm bath (0.4823 S/cm) 50.97 V.
    bath = bath_drop(current_density=36 * ASF, gap=0.30, conductivity=48.23)
    assert bath == pytest.approx(2.41, abs=0.005)
    assert film(law, 36, 0, 50.8) + bath == pytest.approx(50.97, abs=0.05)


def test_a_copper_alloy_takes_far_more(law, alloys) -> None:
    # Hand-worked: 1.2 x 24.02 + 1.0 x 24/36 x 50.8 = 28.82 + 33.87 = 62.69 V
    family = alloys["2xxx"]
    volts = film(law, 24, 0, 50.8, family.voltage_factor.value, family.film_gradient.value * UM)
    assert volts == pytest.approx(62.7, abs=0.05)


def test_lost_contacts_raise_the_volts_at_constant_current(law) -> None:
    # Hand-worked: a tenth of the area lost gives the rest 1/0.9 of the current density: (1/0.9)^0.4 = 1.0430.
    assert film(law, 12 / 0.9, 20) / film(law, 12, 20) == pytest.approx(1.0430, abs=2e-4)


def test_the_gradient_goes_from_cold_to_warm_on_a_straight_line(law) -> None:
    def at(celsius: float, cold: float = 0.40) -> float:
        temperature = celsius + 273.15
        return film_gradient_in_bath(temperature=temperature, film_gradient=cold / UM, law=law) * UM

    assert [at(t) for t in (-5, 0, 10, 20, 25)] == pytest.approx([0.40, 0.40, 0.275, 0.15, 0.15])
    assert at(20, cold=0.10) == pytest.approx(0.10)  # warmth never raises it


def test_no_current_takes_no_volts(law, cell) -> None:
    assert film(law, 0.0, 20, 10) == 0.0
    assert electrode_voltage(current_density=0.0, cell=cell) == 0.0


def test_a_bath_far_too_warm_for_the_law_is_refused(law) -> None:
    with pytest.raises(InputError) as caught:
        film(law, 12, 71)
    assert caught.value.key == "film-voltage.temperature"


def test_an_hour_at_28_volts_comes_near_its_published_thickness(law, alloys) -> None:
    """Integrates growth at constant volts. Hand-worked by steps of 0.05 min: 45.1 um, mean 21.15, end 15.57 A/ft2.

    The published run says about 50.8 um: the default set is 11 % below it, so 15 % is asked of it.
    """
    run, family = RUNS["constant_voltage"], alloys["6061"]
    step, grown, charge, current = 3.0, 0.0, 0.0, 0.0
    for _ in range(int(run["minutes"] * 60 / step)):
        low, high = 0.0, 60.0  # the current is held to 60 A/ft2 at the start
        for _ in range(50):
            current = (low + high) / 2
            volts = film(
                law, current, 0, grown / UM, family.voltage_factor.value, family.film_gradient.value * UM
            )
            low, high = (current, high) if volts < run["volts"] else (low, current)
        grown += step * film_rate(
            current_density=current * ASF,
            growth=law.gross_growth.value,
            alloy_factor=family.growth_factor.value,
            dissolution=law.dissolution.value / 4,  # 0 degC
        )
        charge += current * step
    assert grown / UM == pytest.approx(45.1, abs=0.5)
    assert charge / run["minutes"] / 60 == pytest.approx(21.15, abs=0.2)
    assert current == pytest.approx(15.57, abs=0.2)
    assert grown == pytest.approx(run["thickness_mil"] * 25.4 * UM, rel=0.15)


currents = st.floats(0.1, 60.0)
thicknesses = st.floats(0.0, 120.0)
temperatures = st.floats(-6.0, 30.0)


@given(currents, currents, thicknesses, temperatures)
def test_more_current_takes_more_volts(law, one, other, microns, celsius) -> None:
    low, high = sorted((one, other))
    assert film(law, low, celsius, microns) <= film(law, high, celsius, microns)


@given(currents, thicknesses, thicknesses, temperatures)
def test_a_thicker_film_takes_more_volts(law, amperes, one, other, celsius) -> None:
    low, high = sorted((one, other))
    assert film(law, amperes, celsius, low) <= film(law, amperes, celsius, high)


@given(currents, thicknesses, temperatures, temperatures)
def test_a_warmer_bath_takes_fewer_volts(law, amperes, microns, one, other) -> None:
    cold, warm = sorted((one, other))
    assert film(law, amperes, warm, microns) <= film(law, amperes, cold, microns) * (1 + 1e-12)


# --- bath and chrome cell --------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("amperes", "gap", "kappa", "volts"),
    # Hand-worked: 129.17 A/m2 x 0.20 m / 55.80 S/m; 387.50 x 0.30 / 48.23
    [(12, 0.20, 55.80, 0.463), (36, 0.30, 48.23, 2.410)],
)
def test_the_drop_in_the_bath(amperes, gap, kappa, volts) -> None:
    found = bath_drop(current_density=amperes * ASF, gap=gap, conductivity=kappa)
    assert found == pytest.approx(volts, abs=1e-3)


@pytest.mark.parametrize(("amperes", "volts"), [(15.5, 3.5), (31, 4.3), (46.5, 5.1), (62, 5.8)])
def test_an_open_chrome_tank_at_15_cm(cell, amperes, volts) -> None:
    """Hand-worked at 31 A/dm2: 0.31 A/cm2 x 15 cm / 0.56 S/cm = 8.30 V, over 2.4 x 15^(1/3) = 5.92: 1.40 V."""
    found = chrome_cell_voltage(current_density=amperes * DM2, gap=0.15, conductivity=56.0, cell=cell)
    assert found == pytest.approx(volts, abs=0.06)


def test_a_chrome_tank_takes_the_volts_that_are_usual(cell, conductivity) -> None:
    """Common practice: 3 to 8 V at the tank."""
    kappa = bath_conductivity(strength=250.0, temperature=328.15, table=conductivity["chromic"])
    for amperes in (20, 31, 60):
        for gap in (0.10, 0.20):
            found = chrome_cell_voltage(current_density=amperes * DM2, gap=gap, conductivity=kappa, cell=cell)
            assert 3.0 < found < 8.0


@pytest.mark.parametrize(
    ("work", "anode", "ohmic"),
    # Hand-worked: 0.31 A/cm2 x r x ln / 0.56 S/cm: rod 2.5 cm in a ring of 17.5 cm; bore 5 cm, anodes 3, 5, 7 cm
    [(0.025, 0.175, 2.69), (0.05, 0.015, 3.33), (0.05, 0.025, 1.92), (0.05, 0.035, 0.99)],
)
def test_volts_between_cylinders(cell, work, anode, ohmic) -> None:
    found = chrome_coaxial_voltage(
        current_density=31 * DM2, work_radius=work, anode_radius=anode, conductivity=56.0, cell=cell
    )
    assert found - 2.9 == pytest.approx(ohmic, abs=0.006)


def test_wide_cylinders_come_to_parallel_plates(cell) -> None:
    """Closed form: r ln((r + d) / r) goes to d for r far above d."""
    found = chrome_coaxial_voltage(
        current_density=31 * DM2, work_radius=100.0, anode_radius=100.05, conductivity=56.0, cell=cell
    )
    plates = bath_drop(current_density=31 * DM2, gap=0.05, conductivity=56.0)
    assert found - 2.9 == pytest.approx(plates, rel=1e-3)


def test_a_decade_of_current_adds_its_volts(cell) -> None:
    ten = electrode_voltage(current_density=31000.0, cell=cell)
    assert ten - electrode_voltage(current_density=3100.0, cell=cell) == pytest.approx(0.3)


@given(st.floats(0.5, 200.0), st.floats(1e-4, 1.0))
def test_an_open_tank_never_takes_more_than_plates(cell, amperes, gap) -> None:
    where = {"current_density": amperes * DM2, "gap": gap, "conductivity": 56.0}
    plates = electrode_voltage(current_density=amperes * DM2, cell=cell) + bath_drop(**where)
    assert chrome_cell_voltage(**where, cell=cell) <= plates * (1 + 1e-12)


@given(st.floats(0.5, 200.0), st.floats(0.5, 200.0))
def test_chrome_volts_rise_with_current(cell, one, other) -> None:
    low, high = (
        chrome_cell_voltage(current_density=i * DM2, gap=0.15, conductivity=56.0, cell=cell)
        for i in sorted((one, other))
    )
    assert low <= high


def test_the_spreading_exponent_is_a_cube_root(cell) -> None:
    free = replace(cell, spreading=replace(cell.spreading, value=10.0))
    near, far = (
        chrome_cell_voltage(current_density=3100.0, gap=gap, conductivity=56.0, cell=free) - 2.9
        for gap in (0.01, 0.08)
    )
    assert far / near == pytest.approx(8 / math.cbrt(8))
