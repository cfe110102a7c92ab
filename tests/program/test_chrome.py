"""Hard chrome programs."""

import math
from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.inputs.bath import Coupon
from lineplanner.inputs.values import Ranged
from lineplanner.program.chrome import start_of
from lineplanner.program.deposition import deposition_of
from lineplanner.program.runner import runner_of

from .conftest import CHROME, STEEL, stated

ROD = math.pi * 0.05 * 1.0  # m^2, 50 mm x 1 m: 15.708 dm2


@pytest.fixture
def rod(make_job):
    """A plated-and-ground rod: 75 um finish and 75 um stock at 40 A/dm2."""

    def make(**settings):
        part = replace(stated(ROD, "m"), mass=math.pi * 0.025**2 * 7850.0)
        return make_job(
            parts={"rod": part},
            material=STEEL,
            bath=settings.pop("bath", CHROME),
            rating=3000.0,
            **{
                "process": "chrome-hard",
                "aim": Ranged(value=75e-6),
                "stock": 75e-6,
                "current_density": Ranged(value=4000.0),
                **settings,
            },
        )

    return make


def planned(job):
    return runner_of(job).run(job.case.line.rectifiers[0])


def test_a_plate_and_grind_rod_takes_five_and_a_half_hours(rod) -> None:
    """Hand-worked: 40 A/dm2 x 15.708 dm2 = 628.3 A; eta 15.16 %; rate 4.5541 x 40 x 0.1516 = 27.62 um/h;
    150 um: 5.431 h = 325.9 min, 326 on the clock; 628.3 A x 5.431 h = 3412 Ah.
    """
    run = planned(rod(reverse="none", strike_ratio=Ranged(value=1.0)))
    assert run.panel_current == pytest.approx(628.3, abs=0.1)
    assert run.time_at_set == 326.0 * 60.0
    assert run.forward / 3600.0 == pytest.approx(3412.0 * 326.0 / 325.86, rel=1e-3)
    assert run.thickness == pytest.approx(150e-6 * 326.0 / 325.86, rel=1e-3)


def test_the_deposit_of_the_strike_is_counted(rod) -> None:
    plain = planned(rod(reverse="none", strike_ratio=Ranged(value=1.0)))
    struck = planned(rod(reverse="none", strike_ratio=Ranged(value=2.5), strike_time=Ranged(value=600.0)))
    assert struck.time_at_set < plain.time_at_set
    assert struck.peak_current == pytest.approx(2.5 * 628.3, abs=0.5)


def test_the_preset_of_low_alloy_steel(rod) -> None:
    """MIL-STD-1501F 5.2.3 and 5.2.4 (read): reverse 31 to 62 A/dm2 for 30 to 120 s; strike 2 to 3 x for 30 to 60 s."""
    run = planned(rod())
    names = [s.stage for s in run.stages]
    assert names == ["wait", "reverse", "strike", "plate"]
    reverse, strike = run.stages[1], run.stages[2]
    assert 3100.0 <= reverse.density <= 6200.0
    assert 30.0 <= reverse.duration <= 120.0
    assert reverse.polarity == "work anodic"
    assert 2.0 <= strike.to_current / run.panel_current <= 3.0
    assert 30.0 <= strike.duration <= 60.0
    assert run.reverse == pytest.approx(reverse.charge)


def test_the_soak_goes_by_the_mass_of_the_part(rod) -> None:
    """Hand-worked: solid steel rod of 50 mm: tau = 7850 x 480 x 0.0125/500 = 94.2 s, three of them 282.6 s: 5.0 min."""
    assert start_of(rod()).soak == 300.0


def test_parts_of_a_fluoride_bath_are_preheated_elsewhere(rod) -> None:
    start = start_of(rod(bath=replace(CHROME, family="mixed-catalyst", fluoride=True)))
    assert start.soak == 0.0
    assert start.preheat == 300.0


def test_below_the_onset_of_deposition_no_time_reaches_the_aim(rod) -> None:
    """3 A/dm2 at 55 degC lies below the onset of the model, 4.0 A/dm2: hydrogen only."""
    run = planned(rod(current_density=Ranged(value=300.0), reverse="none", strike_ratio=Ranged(value=1.0)))
    assert run.total_time is None
    assert run.reachable == 0.0


def test_an_etch_in_another_tank_is_not_in_this_program(rod) -> None:
    assert "reverse" not in [s.stage for s in planned(rod(reverse_tank="E2")).stages]


def test_counting_a_masked_fifth_as_plated_makes_the_deposit_a_quarter_too_thick() -> None:
    """Derived from the efficiency model: area over-counted by 20 % at 31 A/dm2, 55 degC: thickness x 1.272."""
    job_rate = _deposition().rate
    assert job_rate(1.2 * 3100.0) / job_rate(3100.0) == pytest.approx(1.272, rel=5e-3)
    assert job_rate(0.8 * 3100.0) / job_rate(3100.0) == pytest.approx(0.737, rel=5e-3)


def test_a_coupon_scales_the_efficiency() -> None:
    plain = _deposition()
    coupon = Coupon(
        base="any",
        current_density=3100.0,
        time=3600.0,
        temperature=328.15,
        thickness=1.1 * plain.rate(3100.0) * 3600.0,
        measured_by="a test",
    )
    assert _deposition(replace(CHROME, coupons=(coupon,))).rate(3100.0) == pytest.approx(
        1.1 * plain.rate(3100.0)
    )


def _deposition(bath=CHROME):
    from pathlib import Path

    from lineplanner.files.library import Library

    return deposition_of(bath, Library(Path(__file__).parents[2]).tables().chrome)


@given(st.floats(0.0, 5000.0), st.floats(10.0, 9000.0))
@settings(max_examples=40)
def test_a_ramp_deposits_what_many_small_steps_do(start: float, end: float) -> None:
    deposition = _DEPOSITION
    n = 4000
    stepped = sum(deposition.rate(start + (end - start) * (k + 0.5) / n) for k in range(n)) * 600.0 / n
    assert deposition.over_ramp(start, end, 600.0) == pytest.approx(stepped, rel=1e-4, abs=1e-12)


_DEPOSITION = _deposition()


def test_a_rod_held_by_its_volts_plates_with_what_they_leave(rod) -> None:
    """Current as the volts allow, deposit as that current lays down, time until the aim is met."""
    plain = {"reverse": "none", "strike_ratio": Ranged(value=1.0)}
    free = planned(rod(**plain))
    limit = 0.8 * free.end_voltage
    held = planned(rod(volts=limit, **plain))
    assert held.limit_reached is not None
    assert held.wanted_voltage == pytest.approx(free.end_voltage)
    assert held.panel_current == free.panel_current  # what is set; the rectifier holds the volts
    assert held.end_voltage == pytest.approx(limit, rel=1e-9)
    plate = held.stages[-1]
    assert plate.control == "voltage"
    assert plate.to_current < free.panel_current
    assert held.time_at_set > free.time_at_set
    assert held.thickness >= 150e-6
    job = rod(**plain)
    deposition = deposition_of(job.bath, job.tables.chrome)
    assert held.thickness == pytest.approx(deposition.rate(plate.to_current / ROD) * plate.duration, rel=1e-9)
    assert held.stretch == pytest.approx(held.time_at_set / free.time_at_set - 1.0, abs=0.005)
    assert free.limit_reached is free.wanted_voltage is None
    assert free.stretch == pytest.approx(0.0, abs=1e-12)


def test_a_strike_held_by_its_volts_lays_down_less_and_the_plating_makes_up_for_it(rod) -> None:
    hard = {"reverse": "none", "strike_ratio": Ranged(value=2.5), "strike_time": Ranged(value=600.0)}
    free = planned(rod(**hard))
    held = planned(rod(volts=0.5 * (free.peak_voltage + free.end_voltage), **hard))
    strike, plate = held.stages[-2:]
    assert (strike.stage, strike.control) == ("strike", "voltage")
    assert (plate.stage, plate.control) == ("plate", "current")
    assert held.limit_reached == strike.start
    assert plate.to_current < strike.peak < free.peak_current
    assert held.time_at_set >= free.time_at_set
    assert held.thickness >= 150e-6
