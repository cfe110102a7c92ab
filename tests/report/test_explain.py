"""Any figure can be asked why: every number of the JSON has its story, and the story is told in full."""

import math
import re
from collections.abc import Callable
from dataclasses import replace

import pytest

from lineplanner.errors import InputError
from lineplanner.plan import Plan
from lineplanner.quantities import AREA, CURRENT, CURRENT_DENSITY
from lineplanner.report.explain import asked, explanation, rests_on, status_counts, stories, why_record
from lineplanner.report.plan_json import numeric_leaves, plan_record
from lineplanner.report.style import Style
from lineplanner.report.words import error_text
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

METRIC = Style("metric", ascii=True)
Demo = Callable[[str], Plan]


def scale(path: str) -> float:
    """From the SI value of a story to the unit that the key names."""
    if path.startswith("charge_Ah."):
        return 1 / 3600.0
    if path == "deposit.rate_um_per_h":
        return 3600e6
    return 3600.0 if path.startswith("gas.") else 1.0


def untold(made: Plan) -> list[str]:
    """Numbers of the JSON that have no story, or one with another value."""
    told = stories(made)
    found = []
    for path, number in numeric_leaves(plan_record(made, METRIC)).items():
        value = told[path].value if path in told else None
        if not isinstance(value, float | int) or not math.isclose(value * scale(path), number, rel_tol=1e-9):
            found.append(path)
    return found


def test_every_number_of_the_json_has_a_story_of_the_same_value(each_load: Plan) -> None:
    assert untold(each_load) == []


def test_every_number_of_a_stopped_plan_has_a_story(
    each_load: Plan, with_a_stop: Callable[[Plan], Plan]
) -> None:
    assert untold(with_a_stop(each_load)) == []


def test_a_number_without_a_story_is_seen(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    fewer = {path: f for path, f in made.figures.items() if path != "current.set_A"}
    assert untold(replace(made, figures=fewer)) == ["current.set_A"]


def test_all_tells_every_figure(each_load: Plan) -> None:
    told = [path for path, _ in asked(each_load, ["all"])]
    assert told == list(numeric_leaves(plan_record(each_load, METRIC)))
    lines = explanation(each_load, ["all"], METRIC)
    assert all(len(line) <= 90 for line in lines)


def test_every_given_number_names_its_source(each_load: Plan) -> None:
    for path, figure in asked(each_load, ["all"]):
        for leaf in figure.leaves():
            assert leaf.source.title.strip(), (path, leaf.label)
            assert leaf.label.strip(), path


# --- how it reads -----------------------------------------------------------------------------------------

RECIPE = Source("recipe hard coat rev C", Status.ENTERED)
ARITHMETIC = Source("arithmetic", Status.DERIVED)
USUAL = Source("usual", Status.PRACTICE)


def small(made: Plan) -> Plan:
    """A plan whose set current has a short story."""
    metal = given("tip factor", 2.0, None, USUAL)
    area = result("carrying area", 0.617, AREA, "parts and metal", "A = sum f A", ARITHMETIC, metal)
    density = given("current density", 240.0, CURRENT_DENSITY, RECIPE)
    words, formula = "current density x carrying area", "I = i A"
    current = result("set current", 148.08, CURRENT, words, formula, ARITHMETIC, density, area)
    return replace(made, figures={"current.set_A": current})


def test_a_figure_is_told_with_value_formula_inputs_sources_and_statuses(demo: Demo) -> None:
    assert explanation(small(demo("valve-blocks-24")), ["current.set_A"], METRIC) == [
        "current.set_A",
        "  set current: 148 A  [derived]",
        "    = current density x carrying area",
        "    I = i A   (arithmetic)",
        "    current density: 2.4 A/dm2  [entered here] recipe hard coat rev C",
        "    carrying area: 61.7 dm2  [derived]",
        "      = parts and metal",
        "      A = sum f A   (arithmetic)",
        "      tip factor: 2.0  [common practice] usual",
        "  rests on: 1 entered here, 1 derived, 1 of common practice",
    ]


def test_a_figure_told_already_is_only_named(demo: Demo) -> None:
    made = small(demo("valve-blocks-24"))
    again = {**made.figures, "current.panel_set_A": made.figures["current.set_A"]}
    lines = explanation(replace(made, figures=again), ["current.set_A", "current.panel_set_A"], METRIC)
    assert lines.count("  set current: 148 A  [derived] (told above)") == 1


def test_a_check_is_told_by_its_name(demo: Demo) -> None:
    lines = explanation(demo("valve-blocks-24"), ["check:contacts"], METRIC)
    assert lines[0] == "check:contacts"
    assert lines[1].startswith("  ok: valve block: ")
    assert any("m = 1 - demand / limit" in line for line in lines)


def test_a_part_of_a_key_path_tells_all_below_it(demo: Demo) -> None:
    told = [path for path, _ in asked(demo("valve-blocks-24"), ["time", "voltage.end_V"])]
    assert told == ["time.total_s", "time.at_set_current_s", "voltage.end_V"]


@pytest.mark.parametrize(
    ("typed", "nearest"),
    [("current.sett_A", "`current.set_A`"), ("tim", "`time`"), ("check:contact", "`check:contacts`")],
)
def test_an_unknown_figure_is_answered_with_the_nearest(demo: Demo, typed: str, nearest: str) -> None:
    with pytest.raises(InputError) as raised:
        asked(demo("valve-blocks-24"), [typed])
    text = error_text(raised.value, "metric")
    assert text.startswith(f"`{typed}` is not a figure of this plan. The nearest: {nearest}")


def test_a_figure_that_a_stop_prevents_is_not_told(demo: Demo, with_a_stop: Callable[[Plan], Plan]) -> None:
    with pytest.raises(InputError) as raised:
        asked(with_a_stop(demo("valve-blocks-24")), ["current.set_A"])
    assert raised.value.key == "figure.none"


def test_a_figure_as_json_holds_the_same_story(demo: Demo) -> None:
    record = why_record(small(demo("valve-blocks-24")), ["current.set_A"])["current.set_A"]
    assert record["value"] == 148.08
    assert record["unit"] == "A"
    assert [one["label"] for one in record["inputs"]] == ["current density", "carrying area"]


# --- statuses ---------------------------------------------------------------------------------------------


def test_each_source_is_counted_once() -> None:
    guess = given("yield", 0.1, None, Source("a choice", Status.ASSUMPTION))
    both: list[Figure] = [
        result("a", 1.0, None, "w", "f", ARITHMETIC, guess),
        result("b", 2.0, None, "w", "f", ARITHMETIC, guess),
    ]
    assert status_counts(both) == {"derived": 1, "assumption": 1}


def test_what_is_not_firm_is_counted_and_an_assumption_is_never_called_published(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    assert re.fullmatch(r"rests on \d+ assumptions, \d+ from memory, \d+ of common practice", rests_on(made))
    firm = {"current.set_A": given("density", 1.0, CURRENT_DENSITY, RECIPE)}
    assert rests_on(replace(made, figures=firm)) == "rests on nothing assumed or remembered"
