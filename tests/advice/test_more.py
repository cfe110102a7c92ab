"""How many more the line carries, against plans of every count one by one."""

from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.advice import how_many_more
from lineplanner.errors import InputError
from lineplanner.files.library import Library
from lineplanner.findings import Level
from lineplanner.inputs.case import Case
from lineplanner.inputs.load import Hang
from lineplanner.plan import plan
from lineplanner.racking import with_first
from lineplanner.racking.room import hung, room_for

LIBRARY = Library(Path(__file__).parents[2])


def weak(amperes: float, *tips: str) -> Case:
    """Valve blocks on some tips, with one rectifier of so many amperes."""
    case = LIBRARY.case("valve-blocks-24")
    (one,) = (r for r in case.line.rectifiers if r.name == "R3")
    line = replace(case.line, rectifiers=(replace(one, max_current=amperes),))
    return replace(case, line=line, load=replace(case.load, hangs=(Hang(part="valve-block", tips=tips),)))


@pytest.mark.parametrize("amperes", [60.0, 100.0, 142.0, 400.0])
def test_the_count_is_that_of_plans_made_one_by_one(amperes: float) -> None:
    case = weak(amperes, "A1")
    places = room_for(case, (0, 0))
    stopped = [
        plan(replace(case, load=hung(case, (0, 0), places[:n]).load)).stopped for n in range(len(places) + 1)
    ]
    carried = next((n - 1 for n, stop in enumerate(stopped) if stop), len(places))
    more = how_many_more(case, (0, 0))
    assert (more.fits, more.carried) == (23, carried)
    assert not more.made.stopped
    if carried < 23:
        assert more.stop is not None
        assert more.stop.level is Level.STOP
        assert more.stop.check.startswith("rectifier")
    else:
        assert more.stop is None


def test_a_load_that_is_stopped_takes_no_more() -> None:
    more = how_many_more(weak(1.0, "A1"), (0, 0))
    assert (more.carried, more.stop is not None) == (0, True)


def test_the_recipes_gap_counts_and_is_said_to() -> None:
    case = weak(400.0, "A1")
    asked = how_many_more(replace(case, recipe=replace(case.recipe, spacing=0.078)), (0, 0))
    assert (asked.fits, asked.spacing, asked.asked) == (11, 0.078, True)
    assert asked.made.gaps.near == ()


def test_free_positions_keep_the_gap_that_hangs_there() -> None:
    case = LIBRARY.case("guide-pins-flash")
    more = how_many_more(case, (0, 0))
    assert more.spacing == pytest.approx(plan(case).gaps.least)
    assert more.made.gaps.least == pytest.approx(more.spacing, abs=1e-6)


def test_a_part_that_does_not_hang_yet_begins_at_the_first_free_place() -> None:
    case = weak(400.0, "A1")
    record = LIBRARY.record("part", "test-coupon")
    begun, key = with_first(case, "test-coupon", record, LIBRARY.record("material", record.material))
    assert begun.load.hangs[key[0]].tips == ("A2",)
    asked = how_many_more(begun, key, begun=True)
    assert (asked.fits, asked.carried) == (23, 23)  # every free tip, the first among them
    assert asked.made.areas.items[1].count == 23
    refused, key = with_first(weak(1.0, "A1"), "test-coupon", record, begun.materials[record.material])
    assert how_many_more(refused, key, begun=True).carried == 0
    full = weak(400.0, "A1-A4", "B1-B4", "C1-C4", "D1-D4", "E1-E4", "F1-F4")
    with pytest.raises(InputError, match=r"racking\.no_tip"):
        with_first(full, "test-coupon", record, LIBRARY.record("material", record.material))
    with pytest.raises(InputError, match=r"racking\.none"):
        how_many_more(case, (7, 0))
