"""A program against a rectifier: amperes, least amperes, volts, polarity. Limits by their status."""

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.capacity import check_rectifier
from lineplanner.errors import Quantity
from lineplanner.findings import Level
from lineplanner.inputs.load import Hang
from lineplanner.quantities import CURRENT, CURRENT_DENSITY
from lineplanner.sources import Status


@pytest.fixture
def checked(make_case, make_rectifier, make_run, named):
    """Findings by check of a run on a rectifier."""

    def check(run=None, case=None, **nameplate):
        return named(check_rectifier(make_rectifier(**nameplate), run or make_run(), case or make_case()))

    return check


def test_a_modest_load_is_ok_all_over(checked) -> None:
    assert {f.level for f in checked().values()} == {Level.OK}


# --- rating ----------------------------------------------------------------------------------------------


def test_more_than_the_nameplate_is_a_stop_that_says_how_many_parts_to_take_off(checked, make_run) -> None:
    # 1100 A on 1000 A: 10 parts of 110 A each, one off is 990 A; 1100 A/m2 x 1000/1100 = 1000 A/m2
    found = checked(make_run(1100.0), max_current=1000.0)["rectifier-rating"]
    assert (found.level, found.fix) == (Level.STOP, "rectifier-rating.fewer")
    assert found.source.status is Status.ENTERED
    assert found.margin == pytest.approx(-0.1)
    assert found.facts["parts_off"] == 1
    density = found.facts["density"]
    assert isinstance(density, Quantity)
    assert (density.kind, density.value) == (CURRENT_DENSITY, pytest.approx(1000.0))
    assert found.facts["allowed"] == Quantity(1000.0, CURRENT)


def test_parts_off_is_enough_and_never_the_whole_load(checked, make_run, make_case) -> None:
    # 1500 A of 10 parts: 150 A each; 1500 - 1000 = 500 A needs 4 off (3.33 counted up)
    assert checked(make_run(1500.0))["rectifier-rating"].facts["parts_off"] == 4
    one = make_case(hang=Hang(part="plate", tips=("A1",)))
    found = checked(make_run(1500.0), one)["rectifier-rating"]
    assert "parts_off" not in found.facts
    assert found.fix == "rectifier-rating.less"


def test_at_the_rating_exactly_is_no_stop_but_close(checked, make_run) -> None:
    found = checked(make_run(1000.0))["rectifier-rating"]
    assert (found.level, found.margin, found.fix) == (Level.CAUTION, 0.0, "rectifier-rating.near")


def test_hot_air_takes_off_the_rating(checked, make_run, make_case) -> None:
    # 46 degC at 1800 m: 864.8 A of 1000 A
    case = make_case(ambient=319.15, altitude=1800.0)
    found = checked(make_run(870.0), case)["rectifier-rating"]
    assert found.limit == pytest.approx(864.8)
    assert found.level is Level.STOP
    assert checked(make_run(870.0), case, ambient=303.15)["rectifier-rating"].limit == pytest.approx(920.0)


def test_derating_that_is_only_remembered_cautions(checked, make_run, make_case, limits) -> None:
    memory = {"derate_per_kelvin": replace(limits.derate_per_kelvin, status=Status.MEMORY)}
    case = make_case(ambient=319.15, limits=memory)
    assert checked(make_run(960.0), case)["rectifier-rating"].level is Level.CAUTION
    assert checked(make_run(1010.0), case)["rectifier-rating"].level is Level.STOP  # the nameplate itself


def test_air_over_50_degrees_is_said(checked, make_case) -> None:
    found = checked(case=make_case(ambient=325.0))["rectifier-air"]
    assert found.level is Level.CAUTION  # common practice
    assert "rectifier-air" not in checked(case=make_case(ambient=323.0))


def strike(make_run, make_stage, seconds: float, amperes: float = 1400.0):
    return make_run(
        600.0,
        make_stage("strike", 0.0, seconds, amperes),
        make_stage("plate", seconds, 3600.0, 600.0),
    )


def test_a_strike_within_the_nameplate_overload_passes(checked, make_run, make_stage) -> None:
    overload = {"overload_current": 1500.0, "overload_time": 60.0}
    found = checked(strike(make_run, make_stage, 45.0), **overload)
    assert found["rectifier-rating"].key == "rectifier-rating.overload"
    assert found["rectifier-rating"].limit == 1500.0
    assert found["rectifier-rating"].level is Level.CAUTION  # 1400 of 1500: over nine tenths
    assert found["rectifier-continuous"].value == 600.0


def test_a_strike_longer_than_the_overload_is_held_to_the_rating(checked, make_run, make_stage) -> None:
    overload = {"overload_current": 1500.0, "overload_time": 60.0}
    found = checked(strike(make_run, make_stage, 61.0), **overload)["rectifier-rating"]
    assert (found.level, found.limit) == (Level.STOP, 1000.0)
    assert checked(strike(make_run, make_stage, 45.0))["rectifier-rating"].level is Level.STOP


def test_a_peak_under_the_rating_is_measured_by_the_overload_too(checked, make_run, make_stage) -> None:
    overload = {"overload_current": 1500.0, "overload_time": 60.0}
    below = checked(strike(make_run, make_stage, 45.0, 999.0), **overload)["rectifier-rating"]
    above = checked(strike(make_run, make_stage, 45.0, 1001.0), **overload)["rectifier-rating"]
    assert (below.limit, below.level) == (1500.0, Level.OK)
    assert above.margin < below.margin
    long = checked(make_run(990.0), **overload)["rectifier-rating"]
    assert (long.value, long.limit, long.level) == (990.0, 1000.0, Level.CAUTION)


def test_an_overload_has_an_end_too(checked, make_run, make_stage) -> None:
    overload = {"overload_current": 1500.0, "overload_time": 60.0}
    found = checked(strike(make_run, make_stage, 45.0, 1501.0), **overload)["rectifier-rating"]
    assert (found.level, found.limit) == (Level.STOP, 1500.0)


def test_a_run_without_stages_is_still_held_to_the_rating(checked, make_run) -> None:
    run = replace(make_run(), stages=(), peak_current=1200.0)
    found = checked(run)
    assert found["rectifier-rating"].level is Level.STOP
    assert found["rectifier-rating"].fix == "rectifier-rating.larger"
    assert set(found) == {"rectifier-rating"}


# --- for good --------------------------------------------------------------------------------------------


def test_more_than_85_percent_for_good_is_a_caution_and_never_a_stop(checked, make_run) -> None:
    # common practice: platers' 80 to 85 %
    found = checked(make_run(860.0))["rectifier-continuous"]
    assert (found.level, found.limit) == (Level.CAUTION, 850.0)
    assert checked(make_run(850.0))["rectifier-continuous"].level is Level.OK


def test_a_limit_that_the_site_adopted_stops(checked, make_run, make_case, limits) -> None:
    own = {"continuous_share": replace(limits.continuous_share, status=Status.ENTERED)}
    assert checked(make_run(860.0), make_case(limits=own))["rectifier-continuous"].level is Level.STOP


# --- least current ---------------------------------------------------------------------------------------


def test_five_percent_of_the_rating_is_too_little_to_hold(checked, make_run, make_case, limits) -> None:
    run = make_run(50.0)
    assert checked(run)["rectifier-least"].level is Level.CAUTION  # common practice
    firm = {"least_share": replace(limits.least_share, status=Status.DERIVED)}
    assert checked(run, make_case(limits=firm))["rectifier-least"].level is Level.STOP


def test_an_entered_least_current_stops(checked, make_run) -> None:
    found = checked(make_run(150.0), least_current=200.0)["rectifier-least"]
    assert (found.level, found.limit, found.source.status) == (Level.STOP, 200.0, Status.ENTERED)


def test_a_meter_of_one_percent_is_trusted_from_a_fifth_of_its_scale(checked, make_run, library) -> None:
    usual = library.tables().uncertainty.ammeter.value
    found = checked(make_run(150.0))["rectifier-meter"]
    assert (found.level, found.limit) == (Level.CAUTION, pytest.approx(200.0))
    fine = checked(make_run(150.0), ammeter=usual / 2.0)["rectifier-meter"]
    assert (fine.level, fine.limit) == (Level.OK, pytest.approx(100.0))


def test_ramps_and_voltage_control_need_no_least_current(checked, make_run, make_stage) -> None:
    run = make_run(
        500.0,
        make_stage("ramp", 0.0, 60.0, (0.0, 500.0)),
        make_stage("hold", 60.0, 600.0, (500.0, 10.0), control="voltage"),
    )
    assert "rectifier-least" not in checked(run)


def test_the_hold_before_a_chrome_deposit_counts_as_held(checked, make_run, make_stage) -> None:
    run = make_run(
        500.0,
        make_stage("hold", 0.0, 60.0, 30.0, 3.0),
        make_stage("plate", 60.0, 3600.0, 500.0, 6.0),
    )
    assert checked(run)["rectifier-least"].value == 30.0


# --- volts -----------------------------------------------------------------------------------------------


def test_estimated_volts_over_the_rating_caution_and_set_volts_stop(checked, make_run, make_stage) -> None:
    estimate = checked(make_run(500.0, volts=25.0))["rectifier-volts"]
    assert (estimate.level, estimate.fix) == (Level.CAUTION, "rectifier-volts.anodize")
    setting = make_run(500.0, make_stage("hold", 0.0, 600.0, 500.0, 25.0, control="voltage"))
    assert checked(setting)["rectifier-volts"].level is Level.STOP


def test_the_limit_set_on_the_panel_counts_where_it_is_lower(checked, make_run) -> None:
    assert checked(make_run(volts=16.0), voltage_limit=15.0)["rectifier-volts"].limit == 15.0
    assert checked(make_run(volts=16.0), voltage_limit=30.0)["rectifier-volts"].limit == 24.0


def test_chrome_has_its_own_way_out_of_too_few_volts(checked, make_run, make_stage, make_case) -> None:
    run = make_run(500.0, make_stage("plate", 0.0, 3600.0, 500.0, 13.0))
    found = checked(run, make_case(process="chrome-hard"), max_voltage=12.0)["rectifier-volts"]
    assert found.fix == "rectifier-volts.chrome"


# --- polarity --------------------------------------------------------------------------------------------


def test_a_reverse_etch_without_reversing_gear_is_a_stop(checked, make_run, make_stage, make_case) -> None:
    run = make_run(
        500.0,
        make_stage("reverse", 0.0, 60.0, 700.0, 5.0),
        make_stage("plate", 60.0, 3600.0, 500.0, 6.0),
    )
    case = make_case(process="chrome-hard")
    assert checked(run, case, reversing="no")["reversing"].level is Level.STOP
    assert checked(run, case)["reversing"].level is Level.CAUTION  # not known is not none
    assert "reversing" not in checked(run, case, reversing="yes")
    elsewhere = make_case(process="chrome-hard", recipe={"reverse_tank": "etch tank"})
    assert checked(run, elsewhere)["reversing"].level is Level.NOTE


# --- property --------------------------------------------------------------------------------------------


@given(st.floats(10.0, 2000.0), st.floats(1.0, 5.0))
def test_more_current_never_raises_a_margin(
    make_case, make_rectifier, make_run, current: float, more: float
) -> None:
    rectifier, case = make_rectifier(), make_case()

    def margins(amperes: float) -> dict[str, float | None]:
        return {f.check: f.margin for f in check_rectifier(rectifier, make_run(amperes), case)}

    small, large = margins(current), margins(current * more)
    for check in ("rectifier-rating", "rectifier-continuous", "rectifier-volts"):
        assert large[check] <= small[check]
