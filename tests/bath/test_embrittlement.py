"""Hours of baking against strength and hardness."""

import tomllib
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.bath.embrittlement import bake_time, bake_time_of_hardness
from lineplanner.errors import InputError

CHART = tomllib.loads(
    (Path(__file__).parents[1] / "published" / "bake-chart.toml").read_text(encoding="utf-8")
)["row"]
MPA = 1e6
KSI = 6.894757293168361e6
HOUR = 3600.0


@pytest.mark.parametrize("row", CHART, ids=lambda row: f"{row['hours']} h")
def test_every_row_of_the_chart(row) -> None:
    for strength in (row["from_MPa"], (row["from_MPa"] + row["to_MPa"]) / 2, row["to_MPa"]):
        assert bake_time(strength * MPA) == row["hours"] * HOUR
    # an edge that two classes share takes the longer bake, so the upper edge belongs to the next row
    assert bake_time_of_hardness(row["from_HRC"]) == row["hours"] * HOUR
    assert bake_time_of_hardness((row["from_HRC"] + row["to_HRC"]) / 2) == row["hours"] * HOUR


@pytest.mark.parametrize(
    ("strength", "hours"),
    # Hand-worked: between the whole numbers of the chart the higher class holds.
    [
        (1000 * MPA, 8),
        (1100 * MPA, 8),
        (1100.5 * MPA, 10),
        (1200.5 * MPA, 12),
        (160 * KSI, 10),
        (145.1 * KSI, 8),
    ],
)
def test_gaps_between_the_rows_go_to_the_longer_bake(strength, hours) -> None:
    assert bake_time(strength) == hours * HOUR


def test_softer_steel_has_no_bake_by_this_chart() -> None:
    assert bake_time(999.9 * MPA) is None
    assert bake_time_of_hardness(30.9) is None


def test_stronger_steel_is_the_design_owners() -> None:
    with pytest.raises(InputError) as caught:
        bake_time(1800.5 * MPA)
    assert caught.value.key == "bake.refer"
    with pytest.raises(InputError) as caught:
        bake_time_of_hardness(51)
    assert caught.value.key == "bake.refer-hardness"
    assert bake_time_of_hardness(50) == 22 * HOUR


def test_unit_conversion_dust_does_not_lengthen_a_bake() -> None:
    assert bake_time(1600 * MPA * (1 + 1e-15)) == bake_time(1600 * MPA) == 18 * HOUR
    assert bake_time(1601 * MPA) == 20 * HOUR


@given(st.floats(1000.0, 1800.0), st.floats(1000.0, 1800.0))
def test_stronger_steel_is_never_baked_shorter(one, other) -> None:
    low, high = sorted((one, other))
    assert (bake_time(low * MPA) or 0.0) <= (bake_time(high * MPA) or 0.0)
