"""The demo shop's loads, planned once, and plans made by hand from them."""

from collections.abc import Callable
from dataclasses import replace
from functools import cache
from pathlib import Path

import pytest

from lineplanner.files.library import Library
from lineplanner.findings import Finding, Level
from lineplanner.plan import Plan, plan
from lineplanner.sources import Source, Status

CHECKOUT = Path(__file__).parents[2]
LIBRARY = Library(CHECKOUT)
LOADS = sorted(LIBRARY.stems("load"))


@cache
def planned(load: str) -> Plan:
    return plan(LIBRARY.case(load))


def stopped(made: Plan) -> Plan:
    """The plan with a stop in front of what was found."""
    nameplate = Source("nameplate of R9", Status.ENTERED)
    stop = Finding("level", Level.STOP, "level.nothing-wet", nameplate, fix="level.raise")
    return replace(made, findings=(stop, *made.findings))


@pytest.fixture(params=LOADS)
def each_load(request: pytest.FixtureRequest) -> Plan:
    return planned(request.param)


@pytest.fixture
def demo() -> Callable[[str], Plan]:
    return planned


@pytest.fixture
def with_a_stop() -> Callable[[Plan], Plan]:
    return stopped


@pytest.fixture
def library() -> Library:
    return LIBRARY
