"""Cooling, hydrogen in the exhaust, and volts on titanium."""

from dataclasses import replace

import pytest

from lineplanner.capacity import check_cooling, check_hydrogen, check_titanium_volts
from lineplanner.findings import Level
from lineplanner.inputs.line import Exhaust
from lineplanner.sources import Status


def one(findings, said):
    (finding,) = findings
    said(finding)
    return finding


def test_heat_with_its_margin_against_the_cooling(make_case, said) -> None:
    # 10 kW x 1.2 = 12 kW
    assert one(check_cooling(10e3, make_case(cooling=14e3)), said).level is Level.OK
    close = one(check_cooling(10e3, make_case(cooling=13e3)), said)
    assert (close.level, close.value) == (Level.CAUTION, pytest.approx(12e3))
    over = one(check_cooling(10e3, make_case(cooling=11e3)), said)
    assert (over.level, over.margin) == (Level.CAUTION, pytest.approx(1.0 - 12.0 / 11.0))


def test_cooling_that_is_not_known_is_asked_for_and_none_is_something_else(make_case, said) -> None:
    unknown = one(check_cooling(10e3, make_case(cooling=None)), said)
    assert (unknown.level, unknown.key, unknown.fix) == (Level.NOTE, "cooling.unknown", "cooling.fill")
    none = one(check_cooling(10e3, make_case(cooling=0.0)), said)
    assert (none.level, none.key) == (Level.CAUTION, "cooling.none")
    chrome = one(check_cooling(10e3, make_case(process="chrome-hard", cooling=0.0)), said)
    assert chrome.level is Level.NOTE


def exhaust(share: float, *, proven: bool = True) -> Exhaust:
    """An exhaust in which 1 L/s of hydrogen makes a share."""
    return Exhaust(flow=1e-3 / share, proven=proven)


@pytest.mark.parametrize(
    ("share", "level", "key"),
    [
        (0.003, Level.OK, "hydrogen"),
        (0.005, Level.CAUTION, "hydrogen.watch"),
        (0.011, Level.STOP, "hydrogen.fail"),
    ],
)
def test_hydrogen_in_the_exhaust_by_its_two_marks(make_run, make_case, said, share, level, key) -> None:
    # a quarter of the lower flammable limit, 29 CFR 1910.124(b)(3) (read); a tenth of it by common practice
    found = one(check_hydrogen(1e-3, make_run(), make_case(exhaust=exhaust(share))), said)
    assert (found.level, found.key, found.value) == (level, key, pytest.approx(share))


def test_a_flow_that_is_not_proven_does_not_count(make_run, make_case, said) -> None:
    quiet = one(check_hydrogen(1e-3, make_run(), make_case(exhaust=exhaust(0.001, proven=False))), said)
    assert (quiet.level, quiet.key, quiet.margin) == (Level.NOTE, "hydrogen.unproven", None)
    too_much = check_hydrogen(1e-3, make_run(), make_case(exhaust=exhaust(0.02, proven=False)))
    assert [f.level for f in too_much] == [Level.NOTE, Level.STOP]


@pytest.mark.parametrize(
    ("fan", "key"),
    [(None, "hydrogen.no-exhaust"), (Exhaust(flow=None), "hydrogen.unknown")],
    ids=["none", "unknown"],
)
def test_an_exhaust_that_is_not_known_is_asked_for(make_run, make_case, said, fan, key) -> None:
    found = one(check_hydrogen(1e-3, make_run(), make_case(exhaust=fan)), said)
    assert (found.level, found.key) == (Level.NOTE, key)


def test_no_flow_at_all_is_all_hydrogen(make_run, make_case, said) -> None:
    found = one(check_hydrogen(1e-3, make_run(), make_case(exhaust=Exhaust(flow=0.0, proven=True))), said)
    assert (found.level, found.value) == (Level.STOP, 1.0)


def test_titanium_is_not_taken_over_80_volts(make_case, make_run, said, limits) -> None:
    # common practice: reports of breakdown from 80 to 100 V
    own = {"titanium_voltage": replace(limits.titanium_voltage, status=Status.PRACTICE)}
    case = make_case(process="anodize-hard", conductor="titanium-2", limits=own)
    found = one(check_titanium_volts(make_run(volts=90.0), case), said)
    assert (found.level, found.limit, found.source.status) == (Level.CAUTION, 80.0, Status.PRACTICE)
    assert one(check_titanium_volts(make_run(volts=60.0), case), said).level is Level.OK


def test_a_volt_limit_for_titanium_that_the_site_adopted_stops_a_setting(
    make_case, make_run, make_stage, limits
) -> None:
    own = {"titanium_voltage": replace(limits.titanium_voltage, status=Status.ENTERED)}
    case = make_case(process="anodize-hard", conductor="titanium-2", limits=own)
    setting = make_run(500.0, make_stage("hold", 0.0, 600.0, 500.0, 90.0, control="voltage"))
    assert check_titanium_volts(setting, case)[0].level is Level.STOP
    assert check_titanium_volts(make_run(volts=90.0), case)[0].level is Level.CAUTION  # an estimate


def test_titanium_tips_on_another_rack_count_too(make_case, make_run) -> None:
    case = make_case(process="anodize-hard", tip="titanium-2")
    assert check_titanium_volts(make_run(volts=60.0), case)[0].facts["where"] == "tips"
    assert check_titanium_volts(make_run(volts=60.0), make_case()) == ()
