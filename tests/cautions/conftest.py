"""The shipped texts, read here without the program's own reader, and a load on which nothing is amiss."""

import tomllib
from collections.abc import Callable
from dataclasses import fields
from pathlib import Path
from typing import Any

import pytest

from lineplanner.cautions.facts import Situation
from lineplanner.inputs.cautions import CautionText, CautionTexts, CautionThresholds
from lineplanner.inputs.values import Sourced
from lineplanner.sources import Status

FILE = Path(__file__).parents[2] / "configs" / "cautions" / "cautions.toml"
UNITS = {"": 1.0, "A": 1.0, "m": 1.0, "%": 0.01, "h": 3600.0, "Ah": 3600.0}

# A sulfuric anodize load of 80 A, all of it known, checked and small.
QUIET: dict[str, Any] = {
    "process": "anodize-sulfuric",
    "holds_hexavalent_chromium": False,
    "sulfuric_share": 0.162,
    "holds_fluoride": False,
    "boric_share": 0.0,
    "ph": 0.5,
    "bath_temperature": 293.15,
    "heater": "none",
    "shower_confirmed": True,
    "planned_peak_current": 80.0,
    "planned_peak_voltage": 15.0,
    "voltage_limit": 18.0,
    "rated_voltage": 24.0,
    "phase_controlled_unfiltered": False,
    "rated_current": 90.0,
    "family_changed": False,
    "hydrogen_share": 0.001,
    "exhaust": 3.0,
    "exhaust_proven": True,
    "exhaust_needed": 2.0,
    "exhaust_class": "B-1",
    "exhaust_sum": 5.0,
    "supply_air": 5.0,
    "foam": False,
    "lid": False,
    "lead": False,
    "steel": False,
    "exposure_result": 1e-9,
    "exposed_thirty_days": False,
    "suppressant_pfos": False,
    "installed_chrome_current": 0.0,
    "permit_by_charge": False,
    "drag_out_chromium": 0.0,
    "region_eu": False,
}


def si(text: str) -> float:
    number, _, unit = text.partition(" ")
    return float(number) + 273.15 if unit == "degC" else float(number) * UNITS[unit]


@pytest.fixture(scope="session")
def texts() -> CautionTexts:
    """The shipped file as records."""
    content = tomllib.loads(FILE.read_text(encoding="ascii"))
    assert content.pop("format") == "lineplanner cautions 1"
    assert content.keys() == {"caution", "threshold"}
    return CautionTexts(
        cautions=tuple(
            CautionText(**caution | {"moment": tuple(caution["moment"]), "status": Status(caution["status"])})
            for caution in content["caution"]
        ),
        thresholds=CautionThresholds(
            **{
                name: Sourced(value=si(row["value"]), source=row["source"], status=Status(row["status"]))
                for name, row in content["threshold"].items()
            }
        ),
    )


@pytest.fixture(scope="session")
def quiet(texts: CautionTexts) -> Callable[..., Situation]:
    """The quiet load with some of it changed."""

    def make(**changes: Any) -> Situation:
        return Situation(thresholds=texts.thresholds, **QUIET | changes)

    return make


@pytest.fixture(scope="session")
def unknown(texts: CautionTexts) -> Callable[..., Situation]:
    """A load of which nobody has said anything but the process."""

    def make(process: Any, **changes: Any) -> Situation:
        return Situation(thresholds=texts.thresholds, process=process, **changes)

    return make


def pytest_configure() -> None:
    assert QUIET.keys() <= {field.name for field in fields(Situation)}
