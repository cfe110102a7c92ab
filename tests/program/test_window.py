"""The band against the recipe's window."""

import pytest

from lineplanner.bath.uncertainty import Band
from lineplanner.findings import Finding, Level
from lineplanner.program.aims import Aims
from lineplanner.program.window import check_window

RATE = 1e-6 / 60.0  # 1 um a minute


def window(minimum: float | None, maximum: float | None, expected: float, half: float) -> tuple[Finding, ...]:
    aims = Aims(aim=50e-6, minimum=minimum, maximum=maximum)
    return check_window(
        aims,
        low=expected * (1 - half),
        high=expected * (1 + half),
        band=Band(half, 0.0, half),
        solve=lambda wanted: wanted / RATE,
        clock=30.0,
    )


def test_a_low_end_below_the_minimum_names_the_time_that_cures_it() -> None:
    """Hand-worked: 45 um / (1 - 0.2) = 56.25 um, at 1 um/min 56.25 min, up to half minutes 56.5."""
    (finding,) = window(45e-6, None, 50e-6, 0.2)
    assert (finding.level, finding.key, finding.fix) == (Level.CAUTION, "band-minimum.out", "band.longer")
    assert finding.margin == pytest.approx(40.0 / 45.0 - 1.0)
    time = finding.facts["time"]
    assert not isinstance(time, (str, int))
    assert time.value == pytest.approx(56.5 * 60.0)


def test_a_window_narrower_than_the_band_is_cured_by_no_time() -> None:
    """Hand-worked: 45..55 um is a ratio of 1.22; a band of 20 % needs 1.2/0.8 = 1.5."""
    findings = window(45e-6, 55e-6, 50e-6, 0.2)
    assert [f.fix for f in findings] == ["band.none-cures", "band.none-cures"]


def test_a_high_end_over_the_maximum_is_cured_by_a_shorter_time() -> None:
    """Hand-worked: 55/(1.1) = 50 um -> 50 min; its low end 45 um stays over 40 um."""
    findings = window(40e-6, 55e-6, 52e-6, 0.1)
    assert [f.level for f in findings] == [Level.OK, Level.CAUTION]
    assert findings[1].fix == "band.shorter"
    time = findings[1].facts["time"]
    assert not isinstance(time, (str, int))
    assert time.value == pytest.approx(50.0 * 60.0)


def test_without_a_window_nothing_is_checked() -> None:
    assert window(None, None, 50e-6, 0.2) == ()
