"""Dimensions and consumption."""

import pytest

from lineplanner.inputs.recipe import SideStep
from lineplanner.inputs.values import Ranged
from lineplanner.plan import plan

from .conftest import ASF, CHROME, STEEL, SULFURIC


def test_a_hard_film_builds_up_by_half_and_the_etch_takes_its_part(make_case) -> None:
    """ISO 10074:2021, summary (read): about half of a hard film is growth. 50 um - 3 um etched: +22 um per side."""
    case = make_case(
        process="anodize-hard",
        aim=Ranged(value=50e-6),
        current_density=Ranged(value=24 * ASF),
        soft_start=Ranged(value=0.0),
        before=(SideStep(name="etch", removed=3e-6),),
    )
    planned = plan(case)
    outcome = planned.outcome
    assert outcome is not None
    expected = planned.thickness.expected
    assert outcome.build_up == pytest.approx(0.5 * expected)
    assert outcome.grown == pytest.approx(0.5 * expected - 3e-6)
    assert planned.figures["dimensions.on_diameter_m"].value == pytest.approx(expected - 6e-6)
    assert outcome.chromic_acid is None


def test_a_chrome_deposit_takes_its_chromic_acid(make_case) -> None:
    """Derived: CrO3/Cr = 1.9231 by molar masses; 13.654 g for each um and m2 at 7.1 g/cm3."""
    case = make_case(
        area=1.0,
        material=STEEL,
        bath=CHROME,
        rating=10000.0,
        process="chrome-hard",
        aim=Ranged(value=20e-6),
        current_density=Ranged(value=4000.0),
        reverse="none",
        strike_ratio=Ranged(value=1.0),
        soak=0.0,
    )
    planned = plan(case)
    assert planned.outcome is not None
    grams_per_um = 1000.0 * planned.outcome.chromic_acid / (planned.thickness.expected * 1e6)
    assert grams_per_um == pytest.approx(13.654, rel=1e-3)


def test_without_a_run_there_is_no_outcome(make_case) -> None:
    assert (
        plan(make_case(bath=SULFURIC, current_density=Ranged(value=0.001 * ASF), step=1e-9)).outcome
        is not None
    )
    tiny = make_case(
        material=STEEL,
        bath=CHROME,
        process="chrome-hard",
        current_density=Ranged(value=100.0),
        reverse="none",
    )
    assert plan(tiny).outcome is None
    assert plan(tiny).stopped
