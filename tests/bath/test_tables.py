"""The standards tables of the bath room: complete, in range, honest about their status."""

from dataclasses import fields
from typing import get_args, get_type_hints

import pytest

from lineplanner.inputs import tables
from lineplanner.inputs.values import Sourced
from lineplanner.sources import Status

ESTIMATES = {Status.ASSUMPTION, Status.PRACTICE, Status.MEMORY}


def every_record(*groups) -> list:
    return [record for group in groups for record in (group.values() if isinstance(group, dict) else [group])]


@pytest.fixture(scope="session")
def records(law, alloys, processes, substrates, families, cell, uncertainty) -> list:
    return every_record(law, alloys, processes, substrates, families, cell, uncertainty)


def numbers(records):
    for record in records:
        hints = get_type_hints(type(record), include_extras=True)
        for field in fields(record):
            value = getattr(record, field.name)
            if isinstance(value, Sourced):
                yield (
                    f"{getattr(record, 'name', type(record).__name__)}.{field.name}",
                    value,
                    hints[field.name].__metadata__[0],
                )


def test_every_number_lies_within_what_its_field_allows(records) -> None:
    for name, number, field in numbers(records):
        for value in (number.value, number.low, number.high):
            if value is not None:
                assert field.low is None or value >= field.low, name
                assert field.high is None or value <= field.high, name
                assert field.above is None or value > field.above, name


def test_every_number_lies_within_its_own_band(records) -> None:
    for name, number, _ in numbers(records):
        assert number.low is None or number.low <= number.value * (1 + 1e-12), name
        assert number.high is None or number.value <= number.high * (1 + 1e-12), name


def test_every_number_has_a_source(records) -> None:
    assert [name for name, number, _ in numbers(records) if not number.source.strip()] == []


def test_every_process_and_bath_family_has_its_row(processes, families) -> None:
    assert tuple(processes) == get_args(tables.Process)
    assert set(families) == {"conventional", "mixed-catalyst", "high-speed"}


def test_an_alloy_belongs_to_one_family(alloys) -> None:
    designations = [alloy for family in alloys.values() for alloy in family.alloys]
    assert len(designations) == len(set(designations))


def test_the_constants_of_our_own_models_may_not_stop_a_plan(law, families) -> None:
    model = [law.gross_growth, law.dissolution, law.doubling, law.film_voltage, law.voltage_power]
    model += [number for family in families.values() for number in (family.reference_efficiency, family.cap)]
    assert {number.status for number in model} <= ESTIMATES


def test_alloys_that_burn_first_are_delicate_and_start_slowly(alloys) -> None:
    for name in ("2xxx", "2011", "cast-low-si", "cast-7-si", "die-cast"):
        family = alloys[name]
        assert family.delicate
        assert family.soft_start.value > alloys["6061"].soft_start.value
        assert family.most_hard.value < alloys["6061"].most_hard.value
        assert family.mix != alloys["6061"].mix


def test_the_voltage_factors_are_named_where_metals_other_than_6063_take_more(alloys) -> None:
    assert alloys["6063"].voltage_factor.value == 1.0
    assert all(family.voltage_factor.value >= 1.0 for family in alloys.values())


def test_no_reverse_etch_has_neither_amperes_nor_time(substrates) -> None:
    for substrate in substrates.values():
        assert (substrate.reverse_density.value == 0.0) == (substrate.reverse_time.value == 0.0), (
            substrate.name
        )
        assert (substrate.strike_ratio.value == 1.0) == (substrate.strike_time.value == 0.0), substrate.name


def test_what_dissolves_or_passivates_does_not_soak_in_the_bath(substrates) -> None:
    for name in ("copper", "zincated-aluminium", "nickel"):
        assert not substrates[name].soak_in_bath
        assert not substrates[name].ferrous
        assert substrates[name].reverse_density.value == 0.0
    assert substrates["cast-iron"].reverse_density.value == 0.0


def test_conductivity_rows_rise_in_strength(conductivity) -> None:
    for table in conductivity.values():
        strengths = [row.strength for row in table.rows]
        assert strengths == sorted(set(strengths))
