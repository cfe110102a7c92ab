"""A small case built by hand on the packaged tables: bus, joints, flight bar, a rack of one spline."""

from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest

from lineplanner.files.library import Library
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Line, Tank
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Stated
from lineplanner.inputs.rack import Member, Rack, TipRow
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.site import Site

ROOT = Path(__file__).parents[2]


@pytest.fixture(scope="session")
def library() -> Library:
    return Library(ROOT)


@pytest.fixture
def make_case(library: Library) -> Callable[..., Case]:
    """A case of stated plates on tips; line, rack and part can be replaced."""

    def make(
        *,
        area: float = 0.1,
        count: int = 4,
        conductor: str = "aluminium-6061-t6",
        members: tuple[Member, ...] = (),
        temperature: float = 293.15,
        metal: str = "aluminium",
        ambient: float = 293.15,
        hang: Hang | None = None,
        **tank: Any,
    ) -> Case:
        row = TipRow(
            name="A",
            count=count,
            start=(0.0, 0.5),
            step=(0.1, 0.0),
            kind="clamp",
            conductor=conductor,
            contacts=2,
        )
        material = Material(
            name="m", metal=metal, alloy="x", family="6061", density=2700.0, specific_heat=900.0
        )
        bath = Bath(name="b", kind="sulfuric", temperature=temperature, sulfuric_acid=165.0)
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
        settings = {
            "bath": "b",
            "volume": 1.0,
            "solution_drop": 0.2,
            "gap": 0.2,
            "counter_electrode": "aluminium",
        }
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
            recipe=Recipe(name="r", revision="A", process="anodize-sulfuric", bases=("6061",)),
            rack=Rack(
                name="rack",
                conductor=conductor,
                surface="coated",
                width=1.0,
                height=1.5,
                members=members,
                tips=(row,),
            ),
            line=Line(name="line", rectifiers=(), tanks=()),
            tank=Tank(name="T", **{**settings, **tank}),
            bath=bath,
            baths={"b": bath},
            parts={"plate": part},
            materials={"m": material},
            site=Site(name="shop", ambient=ambient, altitude=0.0),
            tables=library.tables(),
            cautions=library.cautions(),
        )

    return make
