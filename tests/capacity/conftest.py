"""Small cases, runs and rectifiers built by hand on the packaged tables."""

from collections.abc import Callable, Iterable
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest

from lineplanner.circuit import Circuit, circuit_of
from lineplanner.files.library import Library
from lineplanner.findings import Finding
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Line, Rectifier, Tank
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Stated
from lineplanner.inputs.rack import Member, Rack, TipRow
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.site import Site
from lineplanner.load import LoadAreas, load_areas
from lineplanner.program.recipe_for import process_of
from lineplanner.program.stages import ItemRun, Run, Stage
from lineplanner.report.words import sentence

ROOT = Path(__file__).parents[2]


@pytest.fixture(scope="session")
def library() -> Library:
    return Library(ROOT)


@pytest.fixture(scope="session")
def limits(library: Library) -> Any:
    return library.tables().limits


@pytest.fixture(scope="session")
def make_case(library: Library) -> Callable[..., Case]:
    """Plates of 0.1 m2 on tips, in a sulfuric or a chrome tank."""

    def make(
        *,
        process: str = "anodize-sulfuric",
        area: float = 0.1,
        count: int = 10,
        contacts: int = 2,
        rated_contact: float | None = None,
        conductor: str = "aluminium-6063-t6",
        tip: str | None = None,
        members: tuple[Member, ...] = (),
        rated_rack: float | None = None,
        hang: Hang | None = None,
        altitude: float = 0.0,
        ambient: float = 298.15,
        limits: dict[str, Any] | None = None,
        recipe: dict[str, Any] | None = None,
        **tank: Any,
    ) -> Case:
        chrome = process == "chrome-hard"
        row = TipRow(
            name="A",
            count=count,
            start=(0.0, 0.5),
            step=(0.1, 0.0),
            kind="clamp",
            conductor=tip or conductor,
            contacts=contacts,
            rated_current=rated_contact,
        )
        metal = "steel" if chrome else "aluminium"
        part = Stated(
            form="stated",
            name="plate",
            material="m",
            area=area,
            width=0.1,
            height=0.1,
            depth=0.01,
            measured_by="a test",
        )
        bath = Bath(
            name="b", kind="chrome" if chrome else "sulfuric", temperature=328.15 if chrome else 293.15
        )
        settings = {"bath": "b", "volume": 1.0, "solution_drop": 0.2, "gap": 0.2, "counter_electrode": "lead"}
        tables = library.tables()
        return Case(
            name="test",
            load=Load(
                name="load",
                recipe="r",
                rack="rack",
                line="line",
                tank="T",
                hangs=(hang or Hang(part="plate", tips=(f"A1-A{count}",)),),
            ),
            recipe=Recipe(name="r", revision="A", process=process, bases=("6061",), **(recipe or {})),
            rack=Rack(
                name="rack",
                conductor=conductor,
                surface="coated",
                width=1.0,
                height=1.5,
                members=members,
                tips=(row,),
                rated_current=rated_rack,
            ),
            line=Line(name="line", rectifiers=(), tanks=()),
            tank=Tank(name="T", **{**settings, **tank}),
            bath=bath,
            baths={"b": bath},
            parts={"plate": part},
            materials={
                "m": Material(
                    name="m", metal=metal, alloy="x", family="6061", density=2700.0, specific_heat=900.0
                )
            },
            site=Site(name="shop", ambient=ambient, altitude=altitude),
            tables=replace(tables, limits=replace(tables.limits, **(limits or {}))),
            cautions=library.cautions(),
        )

    return make


@pytest.fixture(scope="session")
def make_rectifier() -> Callable[..., Rectifier]:
    """A switch-mode unit of 1000 A and 24 V."""

    def make(**nameplate: Any) -> Rectifier:
        plain = {
            "name": "R",
            "max_current": 1000.0,
            "max_voltage": 24.0,
            "tanks": ("T",),
            "type": "switch-mode",
        }
        return Rectifier(**{**plain, **nameplate})

    return make


def stage(
    name: str,
    start: float,
    end: float,
    current: float | tuple[float, float],
    volts: float = 16.0,
    **more: Any,
) -> Stage:
    """A stage of one current, or of two ends; 100 A are 100 A/m2 (a carrying area of 1 m2)."""
    first, last = current if isinstance(current, tuple) else (current, current)
    plain: dict[str, Any] = {
        "control": "current",
        "polarity": "work anodic",
        "from_voltage": volts,
        "to_voltage": volts,
    }
    plain |= {"density": last} | more
    return Stage(stage=name, start=start, end=end, from_current=first, to_current=last, **plain)


@pytest.fixture(scope="session")
def make_run() -> Callable[..., Run]:
    """A run of stages; without any a ramp of 2 min and a hold of 30 min at a current."""

    def make(
        current: float = 500.0,
        *stages: Stage,
        volts: float = 16.0,
        rectifier: Rectifier | None = None,
        **more: Any,
    ) -> Run:
        stages = stages or (
            stage("ramp", 0.0, 120.0, (0.0, current), volts),
            stage("hold", 120.0, 1920.0, current, volts),
        )
        plain: dict[str, Any] = {
            "set_current": current,
            "panel_current": current,
            "peak_current": max(s.peak for s in stages),
            "total_time": stages[-1].end,
            "time_at_set": 1800.0,
            "forward": sum(s.charge for s in stages),
            "reverse": 0.0,
            "thickness": 10e-6,
            "reachable": None,
            "items": (ItemRun(part="plate", current=current, density=current, thickness=10e-6),),
            "start_voltage": volts,
            "end_voltage": volts,
            "peak_voltage": volts,
            "voltage_limit": None,
            "limit_reached": None,
            "stretch": 0.0,
        }
        return Run(rectifier=rectifier, stages=stages, **{**plain, **more})

    return make


@pytest.fixture(scope="session")
def areas_of() -> Callable[[Case], LoadAreas]:
    return lambda case: load_areas(case, process_of(case))


@pytest.fixture(scope="session")
def circuit_for() -> Callable[[Case], Circuit]:
    return lambda case: circuit_of(case, load_areas(case, process_of(case)), process_of(case))


@pytest.fixture(scope="session")
def named() -> Callable[[Iterable[Finding]], dict[str, Finding]]:
    """Findings by check, each of which can be worded with the facts it carries."""

    def by_name(findings: Iterable[Finding]) -> dict[str, Finding]:
        found = {}
        for finding in findings:
            words(finding)
            found[finding.check] = finding
        return found

    return by_name


def words(finding: Finding) -> tuple[str, str]:
    """A finding's sentence and its way out, in metric units."""
    from lineplanner.report.setpoints import facts_of

    facts = facts_of(finding)
    return sentence(finding.key, facts, "metric"), sentence(
        finding.fix, facts, "metric"
    ) if finding.fix else ""


@pytest.fixture(scope="session")
def said() -> Callable[[Finding], tuple[str, str]]:
    return words


@pytest.fixture(scope="session")
def make_stage() -> Callable[..., Stage]:
    return stage
