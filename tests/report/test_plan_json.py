"""The JSON of a plan: the keys of the interface in their order, nulls where there is no figure, no NaN."""

import json
import math
from collections.abc import Callable, Iterator
from dataclasses import replace
from typing import Any

import pytest

from lineplanner.files.library import Library
from lineplanner.plan import Plan
from lineplanner.report.plan_id import plan_id
from lineplanner.report.plan_json import number, numeric_leaves, plan_json, plan_record
from lineplanner.report.style import Style

METRIC = Style("metric", ascii=True)
# As the interface of the program states them, in this order; later ones may be added behind.
KEYS = {
    "": "format plan_id made_with load rectifier process control recipe area current program time charge_Ah "
    "thickness voltage heat gas binding findings cautions",
    "recipe": "name revision status deviations",
    "recipe.deviations": "field recipe load inside_range",
    "area": "parts_m2 rack_m2 thieves_m2 total_m2 carrying_m2 significant_m2 items",
    "area.items": "part material count each_m2 total_m2 carrying_m2 current_A thickness_m",
    "current": "density_A_per_m2 set_A panel_set_A peak_A",
    "program": "stage control from_s to_s from_A to_A from_V to_V polarity",
    "time": "total_s at_set_current_s",
    "charge_Ah": "counter forward reverse",
    "thickness": "target_m expected_m low_m high_m coverage minimum_m maximum_m",
    "voltage": "start_V end_V peak_V limit_V limit_reached_s",
    "heat": "into_bath_peak_W into_bath_mean_W electrical_peak_W",
    "gas": "hydrogen_m3_per_h oxygen_m3_per_h at",
    "binding": "check margin",
    "findings": "check level value limit unit margin text fix source status",
    "cautions": "id word moment text source",
}
# What a stop takes away, and what it leaves.
TAKEN = [
    "current.set_A",
    "current.panel_set_A",
    "time.total_s",
    "time.at_set_current_s",
    "charge_Ah.counter",
    "charge_Ah.forward",
    "charge_Ah.reverse",
    "thickness.expected_m",
    "thickness.low_m",
    "thickness.high_m",
    "voltage.start_V",
    "voltage.end_V",
    "voltage.peak_V",
    "voltage.limit_reached_s",
]
LEFT = ["area.carrying_m2", "current.peak_A", "thickness.target_m", "thickness.coverage"]


def at(record: Any, path: str) -> Any:
    for key in path.split(".") if path else ():
        record = record[key]
    return record


def tables(record: Any) -> Iterator[tuple[str, dict[str, Any]]]:
    """Every table of a record with its path; rows of a list are met one by one."""
    for path in KEYS:
        found = at(record, path)
        for one in found if isinstance(found, list) else [found]:
            if one is not None:
                yield path, one


def test_every_key_is_there_in_the_order_of_the_interface(each_load: Plan) -> None:
    for path, table in tables(plan_record(each_load, METRIC)):
        wanted = KEYS[path].split()
        assert list(table)[: len(wanted)] == wanted, path


def test_every_key_is_there_in_a_stopped_plan_too(
    each_load: Plan, with_a_stop: Callable[[Plan], Plan]
) -> None:
    record = plan_record(with_a_stop(each_load), METRIC)
    for path, table in tables(record):
        assert list(table)[: len(KEYS[path].split())] == KEYS[path].split(), path
    assert record["program"] == []
    assert [path for path in TAKEN if at(record, path) is not None] == []
    assert [path for path in LEFT if at(record, path) is None] == []
    assert [item for item in record["area"]["items"] if item["thickness_m"] is not None] == []
    assert len(record["findings"]) > 1
    assert record["cautions"]


def test_the_demo_loads_show_every_process_control_and_verdict(
    demo: Callable[[str], Plan], library: Library
) -> None:
    records = [plan_record(demo(load), METRIC) for load in library.stems("load")]
    assert {r["process"] for r in records} >= {
        "anodize-sulfuric",
        "anodize-hard",
        "anodize-chromic",
        "chrome-hard",
    }
    assert {r["control"] for r in records} >= {"current", "voltage"}
    assert any(r["findings"][0]["level"] == "stop" for r in records)


def test_the_text_is_json_without_nan_or_infinity(each_load: Plan) -> None:
    def refuse(name: str) -> None:
        raise AssertionError(name)

    record = json.loads(plan_json(each_load, METRIC), parse_constant=refuse)
    assert record == json.loads(json.dumps(plan_record(each_load, METRIC)))


@pytest.mark.parametrize("value", [math.nan, math.inf, -math.inf])
def test_a_number_that_is_none_becomes_null(value: float) -> None:
    assert number(value) is None


def test_amperes_are_never_negative_and_polarity_carries_the_sign(each_load: Plan) -> None:
    for stage in plan_record(each_load, METRIC)["program"]:
        assert stage["from_A"] >= 0.0
        assert stage["to_A"] >= 0.0
        assert stage["polarity"] in ("work anodic", "work cathodic", "off")


def test_the_set_current_is_density_times_carrying_area(each_load: Plan) -> None:
    record = plan_record(each_load, METRIC)
    density, current = record["current"]["density_A_per_m2"], record["current"]["set_A"]
    if current is not None:
        assert current == pytest.approx(density * record["area"]["carrying_m2"], rel=1e-12)


def test_the_counter_is_forward_and_reverse_in_ampere_hours(each_load: Plan) -> None:
    charge = plan_record(each_load, METRIC)["charge_Ah"]
    if charge["counter"] is not None:
        assert each_load.run is not None
        assert each_load.run.counter is not None
        assert charge["counter"] == pytest.approx(each_load.run.counter / 3600.0)  # 1 Ah = 3600 C
        assert charge["counter"] == pytest.approx(charge["forward"] + charge["reverse"])


def test_gas_is_in_cubic_metres_an_hour(demo: Callable[[str], Plan]) -> None:
    made = demo("valve-blocks-24")
    assert made.emissions is not None
    gas = plan_record(made, METRIC)["gas"]
    assert gas["hydrogen_m3_per_h"] == pytest.approx(made.emissions.hydrogen * 3600.0)
    assert gas["at"] == "25 degC, 101325 Pa, peak stage"


def test_numbers_do_not_follow_the_unit_system_but_sentences_do(demo: Callable[[str], Plan]) -> None:
    made = demo("valve-blocks-24")
    metric, us = plan_record(made, METRIC), plan_record(made, Style("us", ascii=True))
    assert numeric_leaves(metric) == numeric_leaves(us)
    assert [f["text"] for f in metric["findings"]] != [f["text"] for f in us["findings"]]


# --- plan_id ----------------------------------------------------------------------------------------------


def test_a_plan_has_the_same_id_each_time(demo: Callable[[str], Plan]) -> None:
    made = demo("valve-blocks-24")
    turned = replace(made, case=replace(made.case, materials=dict(reversed(made.case.materials.items()))))
    assert plan_id(made) == plan_id(turned)
    assert len(plan_id(made)) == 12


def test_every_input_changes_the_id(demo: Callable[[str], Plan]) -> None:
    made = demo("valve-blocks-24")
    case = made.case
    warmer = replace(case.bath, temperature=case.bath.temperature + 0.1)
    least = replace(case.tables.limits.stretch, value=0.2)
    changed = [
        replace(case, bath=warmer),
        replace(case, load=replace(case.load, lot="B")),
        replace(case, tables=replace(case.tables, limits=replace(case.tables.limits, stretch=least))),
        replace(case, parts={}),
    ]
    ids = {plan_id(made), *(plan_id(replace(made, case=one)) for one in changed)}
    ids.add(plan_id(replace(made, position="map")))
    assert len(ids) == 6


def test_the_version_changes_the_id(demo: Callable[[str], Plan], monkeypatch: pytest.MonkeyPatch) -> None:
    made = demo("valve-blocks-24")
    before = plan_id(made)
    monkeypatch.setattr("lineplanner.report.plan_id.__version__", "9.9")
    assert plan_id(made) != before
