"""Ripple at the running volts: a limit for chrome, a notice for anodizing."""

import pytest

from lineplanner.capacity import check_rectifier
from lineplanner.findings import Level
from lineplanner.inputs.line import RipplePoint
from lineplanner.sources import Status

CURVE = tuple(RipplePoint(voltage_share=s, ripple=r) for s, r in ((0.4, 0.09), (0.7, 0.036), (0.9, 0.018)))


@pytest.fixture
def ripple(make_case, make_rectifier, make_run, make_stage, named):
    """The ripple finding of a run at some volts on a phase-controlled unit of 12 V."""

    def check(volts: float, process: str = "chrome-hard", stage: str = "", **nameplate):
        stage = stage or ("plate" if process == "chrome-hard" else "hold")
        run = make_run(
            500.0,
            make_stage("ramp", 0.0, 60.0, (0.0, 500.0), 0.5),
            make_stage(stage, 60.0, 3600.0, 500.0, volts),
        )
        plate = {"type": "phase-controlled", "pulses": 6, "max_voltage": 12.0, "filtered": "no"} | nameplate
        return named(check_rectifier(make_rectifier(**plate), run, make_case(process=process))).get("ripple")

    return check


def test_switch_mode_does_not_mind_low_volts(ripple) -> None:
    found = ripple(2.0, type="switch-mode", pulses=None)
    assert (found.level, found.key) == (Level.OK, "ripple.switch-mode")


@pytest.mark.parametrize(
    ("volts", "level", "key"),
    [
        (9.0, Level.OK, "ripple.phased-back"),  # three quarters exactly
        (8.9, Level.CAUTION, "ripple.phased-back"),
        (6.0, Level.CAUTION, "ripple.phased-back"),
        (5.9, Level.CAUTION, "ripple.phased-far-back"),
    ],
)
def test_chrome_on_an_unmeasured_unit_wants_three_quarters_of_its_volts(ripple, volts, level, key) -> None:
    # common practice: platers' three quarters; below half the ideal bridge stops between pulses (derived)
    found = ripple(volts)
    assert (found.level, found.key) == (level, key)
    assert found.value == pytest.approx(volts / 12.0)


def test_the_volts_are_an_estimate_so_ripple_never_stops(ripple) -> None:
    found = ripple(3.0)
    assert found.source.status is Status.DERIVED
    assert found.level is Level.CAUTION


def test_a_measured_curve_decides_instead_of_the_volts(ripple) -> None:
    # 6.6 V of 12 V is 0.55: halfway from 9 % to 3.6 % is 6.3 %, limit 5 % (common practice)
    found = ripple(6.6, ripple_curve=CURVE)
    assert (found.level, found.value) == (Level.CAUTION, pytest.approx(0.063))
    assert ripple(9.6, ripple_curve=CURVE).level is Level.OK


def test_outside_the_measured_curve_nothing_is_concluded(ripple) -> None:
    found = ripple(3.6, ripple_curve=CURVE)
    assert (found.level, found.key, found.margin) == (Level.NOTE, "ripple.outside", None)


def test_a_filter_without_a_curve_is_asked_for_one(ripple) -> None:
    found = ripple(4.0, filtered="yes")
    assert (found.level, found.key, found.fix) == (Level.NOTE, "ripple.filtered", "ripple.measure")


def test_anodizing_gets_a_notice_and_never_more(ripple) -> None:
    # ideal six pulses far turned down: tens of percent
    found = ripple(3.0, "anodize-sulfuric")
    assert (found.level, found.key) == (Level.NOTE, "ripple.ideal.notice")
    assert found.value > found.limit
    assert ripple(12.0, "anodize-sulfuric", full_on_voltage=12.0).level is Level.OK


def test_anodizing_by_a_measured_curve_is_a_notice_too(ripple) -> None:
    rough = tuple(RipplePoint(voltage_share=s, ripple=0.2) for s in (0.2, 1.0))
    assert ripple(6.0, "anodize-sulfuric", ripple_curve=rough).level is Level.NOTE
    assert ripple(9.6, "anodize-sulfuric", ripple_curve=CURVE).level is Level.OK


def test_ramps_are_not_judged_by_ripple(ripple) -> None:
    assert ripple(6.0, stage="ramp") is None
