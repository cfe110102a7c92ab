"""Anodizing programs: time, charge, sharing, the law in use."""

from collections.abc import Callable
from dataclasses import replace

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from lineplanner.findings import Level
from lineplanner.inputs.bath import Coupon
from lineplanner.inputs.case import Case
from lineplanner.inputs.recipe import VoltageStage
from lineplanner.inputs.values import Ranged
from lineplanner.plan import plan
from lineplanner.program.aims import Aims
from lineplanner.program.anodizing import films_of, grown, hold_for
from lineplanner.program.checks import check_aim
from lineplanner.program.controlled import run_anodizing
from lineplanner.program.growth import law_of
from lineplanner.program.job import Job
from lineplanner.program.runner import runner_of
from lineplanner.program.softstart import Segment, SoftStart
from lineplanner.sources import Source, Status

from .conftest import ALUMINIUM, ASF, FT2, SULFURIC, stated

MIL = 25.4e-6


def run(job: Job):
    return runner_of(job).run(job.case.line.rectifiers[0])


@pytest.mark.parametrize(("asf", "minutes"), [(12, 60), (18, 40), (24, 30), (30, 24), (40, 18)])
def test_the_720_rule_sets_the_minutes_for_one_mil(make_job, asf: float, minutes: float) -> None:
    """Table of S. Westre, How to Apply the 720 Rule, Products Finishing (read): minutes per mil."""
    planned = run(make_job(current_density=Ranged(value=asf * ASF), soft_start=Ranged(value=0.0)))
    assert planned.total_time == pytest.approx(60.0 * minutes)
    assert planned.panel_current == pytest.approx(asf, rel=1e-6)


def test_a_linear_soft_start_from_nothing_adds_half_its_length(make_job) -> None:
    """Hand-worked: 2 mil at 36 A/ft2 is 40 min; a 5 min ramp from 0 loses 2.5 min of charge: 42.5 min in all."""
    planned = run(
        make_job(
            process="anodize-hard",
            aim=Ranged(value=2 * MIL),
            current_density=Ranged(value=36 * ASF),
            soft_start=Ranged(value=300.0),
            soft_start_steps=0,
            soft_start_from=0.0,
        )
    )
    assert planned.total_time == pytest.approx(42.5 * 60.0)
    assert planned.forward == pytest.approx(36.0 * 40.0 * 60.0)
    assert planned.thickness == pytest.approx(2 * MIL, rel=1e-6)


def test_minutes_are_rounded_up_to_the_half(make_job) -> None:
    """Hand-worked: 25 um at 1.5 A/dm2 is 50.853 min by the rule (3.051187 x 25/1.5): 51.0 on the clock."""
    planned = run(
        make_job(
            area=0.01,
            aim=Ranged(value=25e-6),
            current_density=Ranged(value=150.0),
            soft_start=Ranged(value=0.0),
        )
    )
    assert planned.total_time == 51.0 * 60.0
    assert planned.thickness == pytest.approx(25e-6 * 51.0 / 50.853, rel=1e-4)


def test_alloys_on_one_rack_share_the_current_by_the_volts_they_take(make_job) -> None:
    """Hand-worked: 10 ft2 of a = 1.0 and 10 ft2 of a = 1.2 at 240 A: weights 1 and 1.2^-2.5 = 0.634;
    14.69 and 9.31 A/ft2.
    """
    copper = replace(ALUMINIUM, family="2xxx")
    job = make_job(
        parts={"a": stated(10 * FT2, "m"), "b": stated(10 * FT2, "n")},
        materials={"m": replace(ALUMINIUM, family="6061"), "n": copper},
        current_density=Ranged(value=12 * ASF),
        soft_start=Ranged(value=0.0),
    )
    densities = [i.density / ASF for i in run(job).items]
    assert densities == pytest.approx([14.69, 9.31], abs=0.01)
    assert sum(i.current for i in run(job).items) == pytest.approx(240.0, rel=1e-6)


def test_the_slowest_alloy_sets_the_time(make_job) -> None:
    job = make_job(
        parts={"a": stated(FT2, "m"), "b": stated(FT2, "n")},
        materials={"m": ALUMINIUM, "n": replace(ALUMINIUM, family="2xxx")},
        current_density=Ranged(value=12 * ASF),
    )
    planned = run(job)
    thin, thick = sorted(i.thickness for i in planned.items)
    assert planned.thickness == thin >= job.aims.aim
    assert thick > thin


def test_the_law_is_the_rule_until_coupons_calibrate_the_other() -> None:
    coupon = Coupon(
        base="6063",
        current_density=12 * ASF,
        time=3600.0,
        temperature=293.15,
        thickness=MIL,
        measured_by="a test",
    )
    assert law_of(SULFURIC) == "720"
    assert law_of(replace(SULFURIC, coupons=(coupon,))) == "growth-dissolution"
    assert law_of(replace(SULFURIC, coupons=(coupon,), growth="720")) == "720"


def test_one_coupon_scales_the_growth(make_job) -> None:
    """Hand-worked: a coupon that came out at 90 % of the rule makes every run of this alloy 1/0.9 as long."""
    coupon = Coupon(
        base="6063",
        current_density=12 * ASF,
        time=3600.0,
        temperature=293.15,
        thickness=0.9 * MIL,
        measured_by="a test",
    )
    bath = replace(SULFURIC, coupons=(coupon,), growth="720")
    planned = run(make_job(bath=bath, current_density=Ranged(value=18 * ASF), soft_start=Ranged(value=0.0)))
    assert planned.total_time == pytest.approx(44.5 * 60.0)  # 40 / 0.9 = 44.44, up to the half minute


def test_two_coupons_of_one_charge_give_growth_and_loss(make_job) -> None:
    """Hand-worked: 12 A/ft2 x 60 min -> 25.4 um, 6 x 120 -> 23.6 um: loss 0.03 um/min, f K 0.3510 um dm2/(A min)."""
    coupons = tuple(
        Coupon(
            base="6063",
            current_density=j * ASF,
            time=t * 60.0,
            temperature=293.15,
            thickness=h,
            measured_by="a test",
        )
        for j, t, h in ((12, 60, 25.4e-6), (6, 120, 23.6e-6))
    )
    job = make_job(bath=replace(SULFURIC, coupons=coupons), current_density=Ranged(value=12 * ASF))
    film = films_of(job).items[0][1]
    assert film.dissolution * 60e6 == pytest.approx(0.03, rel=1e-6)
    assert film.growth * film.alloy_factor * 6000e6 == pytest.approx(0.35097, rel=1e-4)


def test_a_density_that_dissolves_as_fast_as_it_grows_has_no_time(make_job) -> None:
    """0.05 A/dm2 in a warm bath under the loss law: f K j = 0.0175 um/min, loss 0.03 um/min and more."""
    bath = replace(SULFURIC, growth="growth-dissolution", temperature=298.15)
    planned = run(make_job(bath=bath, current_density=Ranged(value=5.0)))
    assert planned.total_time is None
    assert planned.panel_current is None
    assert planned.reachable is not None
    assert planned.reachable >= 0.0


def test_the_voltage_limit_stretches_the_time_and_keeps_the_aim(make_job) -> None:
    """On a 40 V supply a hard run starts by current and ends by volts; charge goes by the film, not by minutes."""
    hard = {
        "process": "anodize-hard",
        "aim": Ranged(value=50e-6),
        "current_density": Ranged(value=30 * ASF),
        "bath": replace(SULFURIC, temperature=273.15),
        "soft_start": Ranged(value=300.0),
    }
    free, limited = run(make_job(volts=100.0, **hard)), run(make_job(volts=40.0, **hard))
    assert free.limit_reached is None
    assert limited.limit_reached is not None
    assert limited.limit_reached < free.total_time <= limited.total_time
    assert limited.stages[-1].control == "voltage"
    assert limited.stages[-1].to_current < limited.stages[-1].from_current
    assert limited.thickness >= 50e-6 * (1 - 1e-9)
    assert limited.forward == pytest.approx(sum(s.charge for s in limited.stages), rel=1e-9)


def test_an_alloy_that_burns_first_is_not_stretched_without_a_coupon(make_job) -> None:
    hard = {
        "process": "anodize-hard",
        "aim": Ranged(value=50e-6),
        "current_density": Ranged(value=20 * ASF),
        "bath": replace(SULFURIC, temperature=273.15),
        "material": replace(ALUMINIUM, family="2xxx"),
    }
    free, limited = run(make_job(volts=120.0, **hard)), run(make_job(volts=40.0, **hard))
    assert limited.total_time == pytest.approx(free.total_time)
    assert limited.thickness < 50e-6


def test_a_voltage_program_is_planned_from_peak_and_mean(make_job) -> None:
    """Hand-worked: chromic film, K 0.7 of the rule: 0.7 x 0.32774 = 0.22942 um per A min/dm2. 8 min ramp to a peak of
    0.8 A/dm2 counts 3.2 A min/dm2, then 0.3 A/dm2: (2 um / 0.22942 - 3.2)/0.3 = 18.39 min, 26.39 in all: 26.5.
    """
    job = make_job(
        process="anodize-chromic",
        area=0.01,
        bath=replace(SULFURIC, kind="chromic", sulfuric_acid=None, chromic_acid=50.0),
        aim=Ranged(value=2e-6),
        voltages=(VoltageStage(to=Ranged(value=40.0), ramp=480.0),),
        peak_density=80.0,
        mean_density=30.0,
    )
    planned = run(job)
    assert planned.total_time == 26.5 * 60.0
    assert planned.set_current is None
    assert planned.peak_current == pytest.approx(0.8)
    assert [s.control for s in planned.stages] == ["voltage", "voltage"]


film_cases = st.tuples(
    st.floats(50.0, 500.0), st.floats(1e-6, 100e-6), st.floats(0.0, 1200.0), st.floats(0.0, 1.0)
)


@given(film_cases)
@settings(suppress_health_check=[HealthCheck.function_scoped_fixture])
def test_solving_for_time_and_planning_forward_agree(make_job: Callable[..., Job], drawn) -> None:
    density, aim, ramp, first = drawn
    job = make_job(bath=replace(SULFURIC, growth="growth-dissolution"), current_density=Ranged(value=density))
    film = films_of(job).items[0][1]
    start = SoftStart(segments=(Segment(duration=ramp, start=first, end=1.0),), stepped=False)
    hold = hold_for(film, aim, density=density, start=start)
    if hold is None:
        return
    reached = grown(film, density=density, equivalent=start.equivalent + hold, time=start.duration + hold)
    assert reached == pytest.approx(aim, rel=1e-9) or hold == 0.0


@given(st.floats(0.0, 1e6), st.floats(0.0, 1e6))
@settings(suppress_health_check=[HealthCheck.function_scoped_fixture])
def test_thickness_rises_with_charge(make_job: Callable[..., Job], first: float, second: float) -> None:
    film = films_of(make_job(current_density=Ranged(value=120.0))).items[0][1]
    low, high = sorted((first, second))
    at = [grown(film, density=1.0, equivalent=q, time=3600.0) for q in (low, high)]
    assert at[0] <= at[1]


def test_a_case_is_not_changed_by_running_it(make_case: Callable[..., Case], make_job) -> None:
    assert make_case(current_density=Ranged(value=120.0)) == make_case(current_density=Ranged(value=120.0))
    job = make_job(current_density=Ranged(value=120.0))
    first, second = (run_anodizing(job, job.case.line.rectifiers[0], films_of(job)) for _ in range(2))
    assert first == second


HARD = {
    "process": "anodize-hard",
    "aim": Ranged(value=50e-6),
    "current_density": Ranged(value=30 * ASF),
    "bath": replace(SULFURIC, temperature=273.15),
    "soft_start": Ranged(value=300.0),
    "soft_start_steps": 0,
    "soft_start_from": 0.0,
}


@pytest.mark.parametrize("volts", [15.0, 20.0, 30.0, 40.0])
def test_a_run_at_the_voltage_limit_never_passes_it_and_its_counter_is_that_of_its_stages(
    make_job, volts: float
) -> None:
    planned = run(make_job(volts=volts, **HARD))
    assert planned.limit_reached is not None
    assert planned.peak_voltage <= volts * (1 + 1e-9)
    assert planned.start_voltage <= volts * (1 + 1e-9)
    assert planned.forward == pytest.approx(sum(s.charge for s in planned.stages), rel=1e-9)
    for before, after in zip(planned.stages, planned.stages[1:], strict=False):
        assert after.start == pytest.approx(before.end)
        assert after.from_current == pytest.approx(before.to_current, rel=1e-4)


def test_a_limit_met_in_the_ramp_cuts_the_ramp_and_leaves_no_time_at_set_current(make_job) -> None:
    planned = run(make_job(volts=20.0, **HARD))
    assert planned.stages[0].stage == "ramp"
    assert planned.stages[0].end == pytest.approx(planned.limit_reached)
    assert 0.0 < planned.limit_reached < 300.0
    assert planned.time_at_set == 0.0
    assert {s.control for s in planned.stages[1:]} == {"voltage"}


def test_a_film_left_short_of_its_minimum_by_the_volts_is_a_stop(make_job) -> None:
    """Without a minimum the recipe is served by nine tenths of the aim; above that it is a caution."""
    planned = run(make_job(volts=20.0, **HARD))
    aim = 50e-6
    assert planned.thickness is not None
    assert planned.thickness < 0.9 * aim

    def said(minimum: float | None, aim: float = aim) -> Level:
        aims = Aims(aim=aim, minimum=minimum, maximum=None)
        return next(check_aim(planned, aims, Source("test", Status.ENTERED))).level

    assert said(None) is Level.STOP
    assert said(None, aim=planned.thickness / 0.95) is Level.CAUTION
    assert said(1.01 * planned.thickness) is Level.STOP
    assert said(0.99 * planned.thickness) is Level.CAUTION


def test_a_limit_over_the_rating_is_not_believed(make_job) -> None:
    job = make_job(volts=20.0, **HARD)
    unit = replace(job.case.line.rectifiers[0], voltage_limit=75.0)
    assert runner_of(job).run(unit).voltage_limit == 20.0


def test_a_coupon_speaks_for_the_temperature_it_was_run_at(make_job) -> None:
    """Hand-worked: a coupon as the law says at 20 degC leaves the law as it is, so a colder bath still grows more."""
    law = films_of(
        make_job(bath=replace(SULFURIC, growth="growth-dissolution"), current_density=Ranged(value=120.0))
    )
    film = law.items[0][1]
    thickness = film.alloy_factor * film.growth * 120.0 * 3600.0 - film.dissolution * 3600.0
    coupon = Coupon(
        base="6063",
        current_density=120.0,
        time=3600.0,
        temperature=293.15,
        thickness=thickness,
        measured_by="a test",
    )
    cold = replace(SULFURIC, coupons=(coupon,), temperature=273.15)
    calibrated = films_of(make_job(bath=cold, current_density=Ranged(value=120.0))).items[0][1]
    assert calibrated.growth == pytest.approx(film.growth)
    assert calibrated.dissolution == pytest.approx(film.dissolution / 4.0)  # two doublings of 10 K colder


def test_an_alloy_that_burns_first_is_said_to_take_longer_without_a_coupon(make_case) -> None:
    slow = make_case(material=replace(ALUMINIUM, family="2xxx"), current_density=Ranged(value=12 * ASF))
    assert [f.key for f in plan(slow).findings if f.check == "alloy-time"] == ["alloy-time"]
    usual = make_case(current_density=Ranged(value=12 * ASF))
    assert not [f for f in plan(usual).findings if f.check == "alloy-time"]


def test_a_panel_step_that_leaves_the_range_of_the_recipe_is_a_caution(make_case) -> None:
    """Hand-worked: 12 A wanted on 1 ft2, panel steps of 20 A: 20 A/ft2 against 10 to 14."""
    coarse = make_case(current_density=Ranged(value=12 * ASF, low=10 * ASF, high=14 * ASF), step=20.0)
    (found,) = [f for f in plan(coarse).findings if f.check == "panel"]
    assert (found.level, found.key) == (Level.CAUTION, "panel.outside")


def test_an_alloy_that_the_recipe_does_not_name_stops_the_plan(make_case) -> None:
    stranger = make_case(
        material=replace(ALUMINIUM, family="die-cast"), current_density=Ranged(value=12 * ASF)
    )
    planned = plan(stranger)
    assert planned.stopped
    assert planned.findings[0].check == "recipe-base"


def test_a_longer_hold_cures_a_thin_film_run_by_voltage(make_case) -> None:
    case = make_case(
        process="anodize-chromic",
        bath=replace(SULFURIC, kind="chromic", sulfuric_acid=None, chromic_acid=50.0),
        aim=Ranged(value=2.5e-6),
        minimum=2.2e-6,
        voltages=(VoltageStage(to=Ranged(value=40.0), ramp=480.0),),
    )
    (found,) = [f for f in plan(case).findings if f.check == "band-minimum"]
    assert found.fix == "band.longer"


def test_a_setting_at_the_end_of_its_range_is_rounded_to_the_inside(make_case) -> None:
    """Hand-worked: 28 A/ft2 at most on 6.642 ft2 is 185.98 A; a panel in whole amperes takes 185, not 186."""
    case = make_case(
        area=6.642 * FT2, current_density=Ranged(value=28 * ASF, low=22 * ASF, high=28 * ASF), step=1.0
    )
    planned = plan(case)
    assert planned.run is not None
    assert planned.run.panel_current == 185.0
    assert not [f for f in planned.findings if f.check == "panel"]
