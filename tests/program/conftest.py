"""Small cases built by hand on the packaged tables."""

from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest

from lineplanner.files.library import Library
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Line, Rectifier, Tank
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Stated
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.values import Ranged
from lineplanner.load import load_areas
from lineplanner.program.job import Job
from lineplanner.program.recipe_for import as_run, job_of, process_of

ROOT = Path(__file__).parents[2]
FT2 = 0.09290304  # m^2, exact
ASF = 1.0 / FT2  # A/m^2

ALUMINIUM = Material(
    name="6063", metal="aluminium", alloy="6063", family="6063", density=2700.0, specific_heat=900.0
)
STEEL = Material(
    name="1045",
    metal="steel",
    alloy="1045",
    substrate="steel",
    density=7850.0,
    specific_heat=480.0,
    tensile_strength=700e6,
)
SULFURIC = Bath(name="sulfuric", kind="sulfuric", temperature=293.15, sulfuric_acid=165.0)
CHROME = Bath(
    name="chrome", kind="chrome", family="conventional", temperature=328.15, chromic_acid=250.0, sulfate=2.5
)


def stated(area: float, material: str = "6063") -> Stated:
    """A part of a stated area."""
    return Stated(
        form="stated",
        name="panel",
        material=material,
        area=area,
        width=0.1,
        height=0.1,
        depth=0.01,
        measured_by="a test",
    )


@pytest.fixture(scope="session")
def library() -> Library:
    return Library(ROOT)


@pytest.fixture(scope="session")
def make_case(library: Library) -> Callable[..., Case]:
    """A case of one part of a stated area, unless other parts are given."""

    def make(
        *,
        area: float = FT2,
        bath: Bath = SULFURIC,
        material: Material = ALUMINIUM,
        parts: dict[str, Any] | None = None,
        materials: dict[str, Material] | None = None,
        rating: float = 1000.0,
        volts: float = 100.0,
        step: float | None = 1e-6,
        **settings: Any,
    ) -> Case:
        recipe = Recipe(
            name="test",
            revision="A",
            bases=("6063", "6061", "2xxx", "low-alloy-steel"),
            **{"process": "anodize-sulfuric", "aim": Ranged(value=25.4e-6), **settings},
        )
        parts = parts or {"panel": stated(area, "m")}
        return Case(
            name="test",
            load=Load(
                name="test",
                recipe="test",
                rack="rack",
                line="line",
                tank="T",
                hangs=tuple(Hang(part=name, count=1) for name in parts),
            ),
            recipe=recipe,
            rack=Rack(name="rack", conductor="titanium-2", width=1.0, height=1.0),
            line=Line(
                name="line",
                rectifiers=(
                    Rectifier(
                        name="R",
                        max_current=rating,
                        max_voltage=volts,
                        tanks=("T",),
                        type="switch-mode",
                        panel_step=step,
                        reversing="yes",
                    ),
                ),
                tanks=(),
            ),
            tank=Tank(
                name="T", bath="b", volume=1.0, solution_drop=0.1, gap=0.2, counter_electrode="aluminium"
            ),
            bath=bath,
            baths={"b": bath},
            parts=parts,
            materials=materials or {"m": material},
            site=library.site(),
            tables=library.tables(),
            cautions=library.cautions(),
        )

    return make


@pytest.fixture(scope="session")
def make_job(make_case: Callable[..., Case]) -> Callable[..., Job]:
    """A job without circuit resistance."""

    def make(**settings: Any) -> Job:
        case = as_run(make_case(**settings))
        process = process_of(case)
        return job_of(case, process, load_areas(case, process), 0.0)

    return make
