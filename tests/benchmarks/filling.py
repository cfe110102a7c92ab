"""How long it takes to find room for more than 500 parts at free positions, and what the line carries of them."""

from dataclasses import replace
from pathlib import Path

from timing import measured, show_times

from lineplanner.advice import how_many_more
from lineplanner.files.library import Library
from lineplanner.inputs.case import Case
from lineplanner.inputs.load import Hang
from lineplanner.racking import room_for

_SHOP = Path(__file__).parents[2]
_RUNS, _GAP = 7, 0.01
TARGET = 1.0  # seconds


def run() -> None:
    """Room alone, then with the plans that it takes."""
    case = the_case()
    count = len(room_for(case, (0, 0), _GAP))
    times = measured(
        {
            f"room for {count} lugs": lambda: lambda: room_for(case, (0, 0), _GAP),
            "how many more, all told": lambda: lambda: how_many_more(case, (0, 0)),
        },
        runs=_RUNS,
    )
    show_times("filling a large frame", times, dict.fromkeys(times, TARGET))


def the_case() -> Case:
    """One lug on a frame of 2.4 m by 2.6 m."""
    library = Library(_SHOP)
    case = library.case("valve-blocks-24")
    rack = replace(case.rack, hanging="free", tips=(), members=(), width=2.4, height=2.75, grid=0.005)
    lug = library.record("part", "lug")
    load = replace(case.load, hangs=(Hang(part="lug", at=((1.2, 1.2),)),))
    recipe = replace(case.recipe, spacing=_GAP)
    materials = {**case.materials, lug.material: library.record("material", lug.material)}
    return replace(case, rack=rack, load=load, recipe=recipe, parts={"lug": lug}, materials=materials)


if __name__ == "__main__":
    run()
