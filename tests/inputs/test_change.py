"""A change made at the load: the recipe as run, and what differs from the recipe as filed."""

from dataclasses import replace

import pytest

from lineplanner.inputs.change import apply_change, change_problems, deviations
from lineplanner.inputs.recipe import Change, Recipe, VoltageStage
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import CURRENT_DENSITY, THICKNESS, VOLTAGE
from lineplanner.units import parse

RECIPE = Recipe(
    name="Clear",
    revision="3",
    process="anodize-sulfuric",
    bases=("6xxx",),
    aim=Ranged(value=10e-6, low=8e-6, high=12e-6),
    current_density=Ranged(value=130.0, low=110.0, high=160.0),
)
BY_VOLTAGE = replace(
    RECIPE,
    process="anodize-chromic",
    current_density=None,
    voltages=(
        VoltageStage(to=Ranged(value=20.0), ramp=300.0, hold=600.0),
        VoltageStage(to=Ranged(value=40.0, low=38.0, high=42.0), ramp=300.0),
    ),
)


def test_without_a_change_the_recipe_runs_as_filed() -> None:
    for change in (None, Change(), Change(why="nothing")):
        assert apply_change(RECIPE, change) == RECIPE
        assert deviations(RECIPE, change) == ()


def test_a_change_inside_and_outside_the_range_is_told_apart() -> None:
    inside, outside = deviations(RECIPE, Change(aim=11e-6, current_density=170.0))
    assert (inside.field, inside.kind, inside.recipe, inside.load) == ("aim", THICKNESS, 10e-6, 11e-6)
    assert inside.inside_range
    assert (outside.field, outside.kind, outside.recipe, outside.load) == (
        "current_density",
        CURRENT_DENSITY,
        130.0,
        170.0,
    )
    assert not outside.inside_range


def test_the_recipe_as_run_has_the_new_values_and_the_old_ranges() -> None:
    run = apply_change(RECIPE, Change(aim=11e-6, current_density=170.0))
    assert run.aim == Ranged(value=11e-6, low=8e-6, high=12e-6)
    assert run.current_density == Ranged(value=170.0, low=110.0, high=160.0)
    assert replace(run, aim=RECIPE.aim, current_density=RECIPE.current_density) == RECIPE


def test_the_ends_of_a_range_belong_to_it_in_whatever_unit_they_are_typed() -> None:
    recipe = replace(RECIPE, aim=Ranged(value=20e-6, low=15e-6, high=parse("1 mil", THICKNESS)))
    (found,) = deviations(recipe, Change(aim=parse("25.4 um", THICKNESS)))
    assert found.inside_range
    (found,) = deviations(recipe, Change(aim=parse("25.41 um", THICKNESS)))
    assert not found.inside_range


def test_the_recipes_own_value_in_another_unit_is_no_deviation() -> None:
    recipe = replace(RECIPE, aim=Ranged(value=parse("1 mil", THICKNESS)))
    assert deviations(recipe, Change(aim=parse("25.4 um", THICKNESS))) == ()


def test_a_setting_that_the_recipe_leaves_open_has_no_range_to_be_in() -> None:
    (found,) = deviations(RECIPE, Change(soft_start=60.0))
    assert (found.recipe, found.inside_range) == (None, False)
    assert apply_change(RECIPE, Change(soft_start=60.0)).soft_start == Ranged(value=60.0)


def test_the_hold_voltage_is_that_of_the_last_stage() -> None:
    (found,) = deviations(BY_VOLTAGE, Change(hold_voltage=41.0))
    assert (found.kind, found.recipe, found.inside_range) == (VOLTAGE, 40.0, True)
    run = apply_change(BY_VOLTAGE, Change(hold_voltage=41.0))
    assert run.voltages[0] == BY_VOLTAGE.voltages[0]
    assert run.voltages[1].to == Ranged(value=41.0, low=38.0, high=42.0)


def test_an_own_reverse_etch_at_the_load_needs_density_and_time() -> None:
    recipe = replace(RECIPE, process="chrome-hard", reverse="none")
    both = Change(reverse_density=2500.0, reverse_time=60.0)
    assert change_problems(recipe, both) == []
    assert apply_change(recipe, both).reverse == "own"
    (found,) = change_problems(recipe, Change(reverse_density=2500.0))
    assert (found.path, found.key) == (("change", "reverse_time"), "recipe.own_reverse_time")


@pytest.mark.parametrize(
    ("recipe", "change", "key"),
    [
        (RECIPE, Change(hold_voltage=18.0), "load.no_voltages"),
        (BY_VOLTAGE, Change(current_density=100.0), "load.no_density"),
        (replace(RECIPE, aim=None, aim_weight=0.005), Change(aim=10e-6), "load.aim_weight"),
    ],
)
def test_a_change_that_the_recipe_has_no_place_for_is_a_problem(
    recipe: Recipe, change: Change, key: str
) -> None:
    assert [problem.key for problem in change_problems(recipe, change)] == [key]


def test_a_change_outside_its_range_is_a_deviation_and_no_problem() -> None:
    assert change_problems(RECIPE, Change(aim=50e-6, current_density=400.0)) == []
    assert change_problems(RECIPE, None) == []
