"""The standards tables of the checkout as records, read without the program's own file room."""

import tomllib
from dataclasses import MISSING, fields
from pathlib import Path
from typing import Any, get_args, get_type_hints

import pytest

from lineplanner.inputs import tables
from lineplanner.inputs.values import Sourced
from lineplanner.quantities import Field
from lineplanner.sources import Status

STANDARDS = Path(__file__).parents[2] / "configs" / "standards"
FOOT = 0.3048  # m, exact
UNITS = {
    "": (1.0, 0.0),
    "%": (0.01, 0.0),
    "A/ft2": (1 / FOOT**2, 0.0),
    "A/in2": (144 / FOOT**2, 0.0),
    "A/dm2": (100.0, 0.0),
    "V": (1.0, 0.0),
    "V/um": (1e6, 0.0),
    "s": (1.0, 0.0),
    "min": (60.0, 0.0),
    "um": (1e-6, 0.0),
    "um/min": (1e-6 / 60, 0.0),
    "um dm2/(A min)": (1e-6 * 0.01 / 60, 0.0),
    "g/L": (1.0, 0.0),
    "g/cm3": (1000.0, 0.0),
    "S/cm": (100.0, 0.0),
    "degC": (1.0, 273.15),
    "delta_degC": (1.0, 0.0),
    "1/K": (1.0, 0.0),
    "%/K": (0.01, 0.0),
    "W/(m2 K)": (1.0, 0.0),
}


def si(text: str) -> float:
    number, _, unit = text.partition(" ")
    scale, zero = UNITS[unit]
    return float(number) * scale + zero


def _value(kind: Any, given: Any) -> Any:
    if kind is Sourced:
        numbers = {key: si(text) for key, text in given.items() if key in {"value", "low", "high"}}
        return Sourced(**numbers, source=given["source"], status=Status(given["status"]))
    if isinstance(given, list):
        return tuple(_value(get_args(kind)[0], item) for item in given)
    if isinstance(given, dict):
        return build(kind, given)
    if kind is float:
        return si(given)
    return Status(given) if kind is Status else given


def build(record: Any, given: dict[str, Any]) -> Any:
    hints = get_type_hints(record)
    annotated = get_type_hints(record, include_extras=True)
    keys = {}
    for name in hints:
        declared = next(item for item in annotated[name].__metadata__ if isinstance(item, Field))
        keys[name] = declared.key or name
    optional = {keys[one.name] for one in fields(record) if one.default is not MISSING}
    assert set(keys.values()) - optional <= set(given) <= set(keys.values())
    return record(**{name: _value(hints[name], given[key]) for name, key in keys.items() if key in given})


def read(stem: str) -> dict[str, Any]:
    document = tomllib.loads((STANDARDS / f"{stem}.toml").read_text(encoding="utf-8"))
    assert document.pop("format") == f"lineplanner {stem} 1"
    return document


def many(stem: str, key: str, record: Any, name: str = "name") -> dict[str, Any]:
    rows = [build(record, row) for row in read(stem)[key]]
    assert len({getattr(row, name) for row in rows}) == len(rows)
    return {getattr(row, name): row for row in rows}


@pytest.fixture(scope="session")
def law() -> tables.GrowthLaw:
    return build(tables.GrowthLaw, read("growth"))


@pytest.fixture(scope="session")
def alloys() -> dict[str, tables.AlloyFamily]:
    return many("alloys", "family", tables.AlloyFamily)


@pytest.fixture(scope="session")
def processes() -> dict[str, tables.ProcessDefaults]:
    return many("processes", "process", tables.ProcessDefaults)


@pytest.fixture(scope="session")
def substrates() -> dict[str, tables.Substrate]:
    return many("substrates", "substrate", tables.Substrate)


@pytest.fixture(scope="session")
def families() -> dict[str, tables.ChromeFamily]:
    return many("chrome-baths", "bath", tables.ChromeFamily)


@pytest.fixture(scope="session")
def cell() -> tables.CellVoltage:
    return build(tables.CellVoltage, read("cell-voltage"))


@pytest.fixture(scope="session")
def uncertainty() -> tables.Uncertainty:
    return build(tables.Uncertainty, read("uncertainty"))


@pytest.fixture(scope="session")
def conductivity() -> dict[str, tables.ConductivityTable]:
    return many("conductivity", "table", tables.ConductivityTable, "acid")
