"""Rules between fields: each one broken alone, told at the field that is to be changed."""

from dataclasses import replace
from typing import Any

import pytest

from lineplanner.errors import Problem
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.line import Bus, Line, Rectifier, Tank
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.load_rules import (
    bath_fit_problems,
    hang_problems,
    line_fit_problems,
    rack_fit_problems,
)
from lineplanner.inputs.material import Material
from lineplanner.inputs.rack import Member, Rack, Thief, TipRow
from lineplanner.inputs.recipe import Recipe, VoltageStage
from lineplanner.inputs.recipe_rules import recipe_problems
from lineplanner.inputs.rules import bath_problems, line_problems, material_problems, rack_problems
from lineplanner.inputs.values import Ranged

MEMBER = Member(name="spine", role="spline", start=(0.0, 0.0), end=(0.0, 0.9), width=0.025, thickness=0.006)
ROW = TipRow(name="A", count=6, start=(0.0, 0.2), step=(0.0, 0.1), kind="spring", conductor="titanium")
RACK = Rack(name="r", conductor="titanium", width=0.6, height=0.9, members=(MEMBER,), tips=(ROW,))
RECTIFIER = Rectifier(
    name="R1", max_current=3000.0, max_voltage=24.0, tanks=("T1",), type="phase-controlled", pulses=6
)
TANK = Tank(name="T1", bath="b", volume=4.0, solution_drop=0.1, gap=0.3, counter_electrode="lead")
LINE = Line(name="l", rectifiers=(RECTIFIER,), tanks=(TANK,))
BATH = Bath(name="b", kind="sulfuric", temperature=293.15, sulfuric_acid=180.0)
CHROME = Bath(name="c", kind="chrome", temperature=328.15, family="conventional", chromic_acid=250.0)
MATERIAL = Material(
    name="m", metal="aluminium", alloy="6061", family="6xxx", density=2700.0, specific_heat=900.0
)
RECIPE = Recipe(
    name="r",
    revision="1",
    process="anodize-sulfuric",
    bases=("6xxx",),
    aim=Ranged(value=10e-6, low=8e-6, high=12e-6),
    current_density=Ranged(value=130.0),
)
STAGE = VoltageStage(to=Ranged(value=20.0), ramp=300.0, hold=600.0)
LOAD = Load(name="x", recipe="r", rack="k", line="l", tank="T1", hangs=(Hang(part="p", tips=("A1-A6",)),))


def named(cases: list[tuple[Any, tuple[Any, ...]]]) -> list[str]:
    return [".".join(map(str, key)) for _, key in cases]


def told(problems: list[Problem]) -> list[tuple[Any, ...]]:
    return [(problem.key, *problem.path) for problem in problems]


def test_sound_records_have_no_problems() -> None:
    found = [rack_problems(RACK), line_problems(LINE), bath_problems(BATH), bath_problems(CHROME)]
    found += [
        material_problems(MATERIAL),
        recipe_problems(RECIPE),
        hang_problems(LOAD),
        rack_fit_problems(LOAD, RACK),
    ]
    found += [line_fit_problems(LOAD, LINE), bath_fit_problems(LOAD, RECIPE, "b", BATH)]
    assert found == [[]] * len(found)


RACKS = [
    ({"conductor": "aluminium 6061"}, ("rack.surface", "surface")),
    ({"members": (replace(MEMBER, width=None),)}, ("rack.member_size", "members", 0)),
    ({"members": (replace(MEMBER, diameter=0.01),)}, ("rack.member_two_sizes", "members", 0, "diameter")),
    ({"members": (replace(MEMBER, end=(0.0, 0.0)),)}, ("rack.member_length", "members", 0, "end")),
    ({"members": (MEMBER, MEMBER)}, ("name.twice", "members", 1, "name")),
    ({"thieves": (Thief(name="t", area=0.01),) * 2}, ("name.twice", "thieves", 1, "name")),
    ({"tips": (ROW, ROW)}, ("name.twice", "tips", 1, "name")),
    ({"tips": (replace(ROW, step=(0.0, 0.0)),)}, ("rack.tip_step", "tips", 0, "step")),
    (
        {"height": 9.0, "tips": (replace(ROW, count=12), replace(ROW, name="A1"))},
        ("rack.tip_name", "tips", 1, "name"),
    ),
    ({"tips": (ROW, replace(ROW, name="B", count=40))}, ("rack.tip_outside", "tips", 1)),
    ({"tips": (replace(ROW, start=(0.01, 9.0)),)}, ("rack.tip_outside", "tips", 0)),
]


@pytest.mark.parametrize(("change", "key"), RACKS, ids=named(RACKS))
def test_a_rack_that_does_not_fit_together_is_told(change: dict[str, Any], key: tuple[Any, ...]) -> None:
    assert told(rack_problems(replace(RACK, **change))) == [key]


def test_an_aluminium_rack_that_says_its_surface_is_taken() -> None:
    rack = replace(RACK, conductor="aluminium 6061")
    assert rack_problems(replace(rack, surface="stripped")) == []
    assert rack_problems(replace(rack, members=(replace(MEMBER, surface="coated"),))) == []
    round_bar = replace(MEMBER, width=None, thickness=None, diameter=0.01)
    assert rack_problems(replace(RACK, members=(round_bar,))) == []


LINES = [
    ({"rectifiers": ()}, ("line.none",)),
    ({"rectifiers": (RECTIFIER, RECTIFIER)}, ("name.twice", "rectifiers", 1, "name")),
    ({"tanks": (TANK, TANK)}, ("name.twice", "tanks", 1, "name")),
    ({"rectifiers": (replace(RECTIFIER, tanks=("T1", "T2")),)}, ("line.tank", "rectifiers", 0, "tanks", 1)),
    ({"rectifiers": (replace(RECTIFIER, tanks=()),)}, ("line.feeds_nothing", "rectifiers", 0, "tanks")),
    ({"rectifiers": (replace(RECTIFIER, pulses=None),)}, ("line.pulses", "rectifiers", 0, "pulses")),
    (
        {"rectifiers": (replace(RECTIFIER, type="switch-mode"),)},
        ("line.no_pulses", "rectifiers", 0, "pulses"),
    ),
    (
        {"rectifiers": (replace(RECTIFIER, full_on_voltage=20.0),)},
        ("line.full_on", "rectifiers", 0, "full_on_voltage"),
    ),
    (
        {
            "tanks": (
                replace(
                    TANK, bus=(Bus(name="b", conductor="copper", length=1.0, width=0.1, thickness=0.01),) * 2
                ),
            )
        },
        ("name.twice", "tanks", 0, "bus", 1, "name"),
    ),
]


@pytest.mark.parametrize(("change", "key"), LINES, ids=named(LINES))
def test_a_line_that_does_not_fit_together_is_told(change: dict[str, Any], key: tuple[Any, ...]) -> None:
    assert told(line_problems(replace(LINE, **change))) == [key]


BATHS = [
    (replace(BATH, sulfuric_acid=None), ("bath.needs_sulfuric_acid", "sulfuric_acid")),
    (replace(BATH, family="conventional"), ("bath.family_of_chrome", "family")),
    (replace(CHROME, family=None), ("bath.needs_family", "family")),
    (replace(CHROME, chromic_acid=None), ("bath.needs_chromic_acid", "chromic_acid")),
    (replace(CHROME, growth="720"), ("bath.growth_of_chrome", "growth")),
    (replace(CHROME, family="high-speed", fluoride=True), ("bath.high_speed_fluoride", "fluoride")),
]


@pytest.mark.parametrize(("bath", "key"), BATHS, ids=named(BATHS))
def test_a_bath_that_does_not_fit_together_is_told(bath: Bath, key: tuple[Any, ...]) -> None:
    assert told(bath_problems(bath)) == [key]


MATERIALS = [
    (replace(MATERIAL, family=None), ("material.needs_family", "family")),
    (replace(MATERIAL, metal="steel", family=None), ("material.needs_substrate", "substrate")),
    (replace(MATERIAL, metal="steel", substrate="steel"), ("material.family_of_aluminium", "family")),
]


@pytest.mark.parametrize(("material", "key"), MATERIALS, ids=named(MATERIALS))
def test_a_material_that_does_not_fit_together_is_told(material: Material, key: tuple[Any, ...]) -> None:
    assert told(material_problems(material)) == [key]


RECIPES = [
    ({"bases": ()}, ("recipe.no_bases", "bases")),
    ({"aim": None}, ("recipe.no_aim", "aim")),
    ({"aim_weight": 0.005}, ("recipe.two_aims", "aim_weight")),
    ({"minimum": 11e-6}, ("recipe.minimum", "minimum")),
    ({"maximum": 9e-6}, ("recipe.maximum", "maximum")),
    ({"aim": None, "aim_weight": 0.005, "minimum": 2e-6, "maximum": 1e-6}, ("recipe.min_max", "minimum")),
    ({"temperature": Ranged(value=293.0, low=294.0)}, ("recipe.range_low", "temperature", "low")),
    ({"temperature": Ranged(value=293.0, high=292.0)}, ("recipe.range_high", "temperature", "high")),
    ({"current_density": None}, ("recipe.no_control", "current_density")),
    ({"process": "anodize-chromic"}, ("recipe.no_voltages", "voltages")),
    ({"process": "chrome-hard", "current_density": None}, ("recipe.no_density", "current_density")),
    ({"process": "chrome-hard", "voltages": (STAGE,)}, ("recipe.by_current_only", "voltages")),
    ({"voltages": (replace(STAGE, hold=None), STAGE)}, ("recipe.hold", "voltages", 0, "hold")),
    (
        {"voltages": (replace(STAGE, to=Ranged(value=20.0, low=21.0)),)},
        ("recipe.range_low", "voltages", 0, "to", "low"),
    ),
    (
        {"reverse": "own", "reverse_time": Ranged(value=9.0)},
        ("recipe.own_reverse_density", "reverse_density"),
    ),
    ({"reverse": "own", "reverse_density": Ranged(value=9.0)}, ("recipe.own_reverse_time", "reverse_time")),
    ({"reverse": "none", "reverse_time": Ranged(value=9.0)}, ("recipe.reverse_unused", "reverse_time")),
]


@pytest.mark.parametrize(("change", "key"), RECIPES, ids=named(RECIPES))
def test_a_recipe_that_does_not_fit_together_is_told(change: dict[str, Any], key: tuple[Any, ...]) -> None:
    assert told(recipe_problems(replace(RECIPE, **change))) == [key]


def test_two_spellings_of_one_thickness_do_not_contradict_each_other() -> None:
    recipe = replace(
        RECIPE, aim=Ranged(value=25.4e-6, low=0.0254 / 1000), minimum=25.4 * 1e-6, maximum=0.001 * 0.0254
    )
    assert recipe_problems(recipe) == []


HANGS = [
    ((), [("load.nothing",)]),
    ((Hang(part="p"),), [("load.hang_none", "hangs", 0)]),
    ((Hang(part="p", count=2, tips=("A1",)),), [("load.hang_one", "hangs", 0, "count")]),
    ((Hang(part="p", tips=("A1-A5",), tips_each=2),), [("load.tips_each", "hangs", 0, "tips")]),
    ((Hang(part="p", tips=("A1-A99999999",)),), [("load.tip_number", "hangs", 0, "tips")]),
]


@pytest.mark.parametrize(("hangs", "keys"), HANGS, ids=[str(number) for number in range(len(HANGS))])
def test_a_hang_that_does_not_fit_together_is_told(
    hangs: tuple[Hang, ...], keys: list[tuple[Any, ...]]
) -> None:
    assert told(hang_problems(replace(LOAD, hangs=hangs))) == keys


ON_RACK = [
    ((Hang(part="p", tips=("A1-A7", "B1")),), [("load.tip_unknown", "hangs", 0, "tips")]),
    ((Hang(part="p", tips=("A1", "A1")),), [("load.tip_repeated", "hangs", 0, "tips")]),
    (
        (Hang(part="p", tips=("A1-A3",)), Hang(part="q", tips=("A3-A6",))),
        [("load.tip_twice", "hangs", 1, "tips")],
    ),
    ((Hang(part="p", tips=("A1",), side="back"),), [("load.tip_side", "hangs", 0, "side")]),
    ((Hang(part="p", at=((0.0, 0.1),)),), [("load.not_free", "hangs", 0, "at")]),
    ((Hang(part="p", count=3),), []),
]


@pytest.mark.parametrize(("hangs", "keys"), ON_RACK, ids=[str(number) for number in range(len(ON_RACK))])
def test_a_hang_that_the_rack_cannot_take_is_told(
    hangs: tuple[Hang, ...], keys: list[tuple[Any, ...]]
) -> None:
    assert told(rack_fit_problems(replace(LOAD, hangs=hangs), RACK)) == keys


def test_a_tip_of_both_sides_holds_a_part_on_each() -> None:
    rack = replace(RACK, tips=(replace(ROW, side="both"),))
    front, back, both = (Hang(part="p", tips=("A1",), side=side) for side in ("front", "back", "both"))  # type: ignore[arg-type]
    assert rack_fit_problems(replace(LOAD, hangs=(front, back)), rack) == []
    assert rack_fit_problems(replace(LOAD, hangs=(both,)), rack) == []
    (found,) = rack_fit_problems(replace(LOAD, hangs=(front, both)), rack)
    assert (found.key, found.facts) == ("load.tip_twice", {"tip": "A1", "side": "front", "other": 1})
    (found,) = rack_fit_problems(replace(LOAD, hangs=(both, back)), rack)
    assert found.facts == {"tip": "A1", "side": "back", "other": 1}


def test_free_positions_go_on_a_free_rack() -> None:
    hangs = (Hang(part="p", at=((0.0, 0.1),)),)
    assert rack_fit_problems(replace(LOAD, hangs=hangs), replace(RACK, hanging="free")) == []


def test_a_rectifier_must_feed_the_tank() -> None:
    line = replace(LINE, tanks=(TANK, replace(TANK, name="T2")))
    load = replace(LOAD, tank="T2", rectifier="R1")
    (found,) = line_fit_problems(load, line)
    assert (found.key, found.path, found.facts["known"]) == ("load.feeds", ("rectifier",), "none")
    assert line_fit_problems(replace(load, tank="T1"), line) == []


def test_each_process_runs_in_its_own_bath_only() -> None:
    hard = replace(RECIPE, process="anodize-hard")
    chrome = replace(RECIPE, process="chrome-hard")
    assert bath_fit_problems(LOAD, hard, "b", BATH) == []
    assert bath_fit_problems(LOAD, chrome, "c", CHROME) == []
    assert told(bath_fit_problems(LOAD, chrome, "b", BATH)) == [("load.bath", "recipe")]
    assert told(bath_fit_problems(LOAD, hard, "c", CHROME)) == [("load.bath", "recipe")]
