"""What each move of the hand does to a load; places counted by hand on a rack of three rows of four tips."""

import math
import re

import pytest

from lineplanner.errors import InputError
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack
from lineplanner.racking import (
    added,
    again,
    faced,
    field_between,
    filled,
    moved,
    places_of,
    put,
    reracked,
    sided,
    swapped,
    taken_off,
    turned,
)
from tests.racking.samples import FREE, TIPS, load, rows


def tips(of: Load) -> list[tuple[str, ...]]:
    return [hang.tips for hang in of.hangs]


def test_a_part_goes_to_the_next_free_tip_straight_ahead() -> None:
    here = load(Hang(part="lug", tips=("A1", "B1")))
    assert tips(moved(here, TIPS, [(0, 0)], "right").load) == [("A2", "B1")]
    assert tips(moved(here, TIPS, [(0, 0)], "down").load) == [("C1", "B1")]  # B1 is taken
    assert tips(moved(here, TIPS, [(0, 0)], "right", steps=3).load) == [("A4", "B1")]
    assert moved(here, TIPS, [(0, 1)], "right").keys == ((0, 1),)


def test_where_no_tip_is_free_that_way_the_part_stays() -> None:
    with pytest.raises(InputError) as told:
        moved(load(Hang(part="lug", tips=("A1",))), TIPS, [(0, 0)], "left")
    assert told.value.key == "racking.no_tip_there"


def test_parts_in_hand_move_by_the_same_way_or_not_at_all() -> None:
    here = load(Hang(part="lug", tips=("A1-A2",)), Hang(part="pin", tips=("B2",)))
    assert tips(moved(here, TIPS, [(0, 1), (0, 0)], "right").load) == [("A2-A3",), ("B2",)]
    assert tips(moved(here, TIPS, [(0, 0), (1, 0)], "down", steps=1).load) == [("B1", "A2"), ("C2",)]
    with pytest.raises(InputError, match=r"racking\.not_all_there"):
        moved(here, TIPS, [(0, 0), (0, 1)], "down")  # the second would come to B2


def test_once_more_takes_the_tips_that_follow_and_says_how_many_found_none() -> None:
    here = load(Hang(part="lug", tips=("B2",)), Hang(part="pin", tips=("B3",)))
    after = again(here, TIPS, (0, 0), 3)
    assert tips(after.load) == [("B2", "B4", "C1-C2"), ("B3",)]
    assert (after.keys, after.short) == (((0, 3),), 0)
    every = again(here, TIPS, (0, 0), 20)
    assert len(places_of(every.load)) == 12
    assert every.short == 10
    with pytest.raises(InputError, match=r"racking\.no_tip"):
        again(every.load, TIPS, (0, 0))


def test_a_part_on_two_tips_takes_two_that_are_side_by_side() -> None:
    wide = load(Hang(part="bar", tips=("A1-A2",), tips_each=2), Hang(part="lug", tips=("A4", "B2")))
    assert tips(again(wide, TIPS, (0, 0), 2).load)[0] == ("A1-A2", "B3-B4", "C1-C2")
    assert tips(moved(wide, TIPS, [(0, 0)], "right").load)[0] == ("A2-A3",)


def test_tips_that_do_not_reach_the_side_are_passed_over() -> None:
    front = Rack(
        name="one side",
        conductor="copper",
        width=1.0,
        height=1.0,
        tips=(*rows("A"), *rows("B", side="front")),
    )
    behind = load(Hang(part="lug", tips=("A3",), side="back"))
    assert tips(again(behind, front, (0, 0), 5).load) == [("A3-A4", "A1-A2")]
    with pytest.raises(InputError, match=r"racking\.no_side"):
        sided(load(Hang(part="lug", tips=("B1",))), front, [(0, 0)])


def test_the_sides_of_one_tip_are_two_places() -> None:
    here = load(Hang(part="lug", tips=("A1",)))
    behind = sided(here, TIPS, [(0, 0)]).load
    assert behind.hangs[0].side == "back"
    assert sided(behind, TIPS, [(0, 0)]).load.hangs[0].side == "both"
    assert sided(sided(behind, TIPS, [(0, 0)]).load, TIPS, [(0, 0)]).load == here
    shared = load(Hang(part="lug", tips=("A1",)), Hang(part="pin", tips=("A1",), side="back"))
    with pytest.raises(InputError, match=r"racking\.no_side"):
        sided(shared, TIPS, [(0, 0)])


def test_what_hangs_otherwise_goes_to_an_entry_of_its_like() -> None:
    here = load(Hang(part="lug", tips=("A1-A3",)))
    one = turned(here, [(0, 1)], math.pi / 2)
    assert tips(one.load) == [("A1", "A3"), ("A2",)]
    assert one.keys == ((1, 0),)
    two = turned(one.load, [(0, 0)], math.pi / 2)
    assert (tips(two.load), two.keys) == ([("A3",), ("A1-A2",)], ((1, 0),))
    assert tips(turned(two.load, [(1, 0), (1, 1)], -math.pi / 2).load) == [("A3", "A1-A2")]
    assert faced(here, [(0, 0), (0, 1), (0, 2)]).load.hangs == (
        Hang(part="lug", tips=("A1-A3",), facing="edge-on"),
    )


def test_four_quarter_turns_are_none() -> None:
    here = load(Hang(part="lug", tips=("A1",)))
    after = here
    for _ in range(4):
        after = turned(after, [(0, 0)], math.pi / 2).load
    assert after == here


def test_parts_in_hand_are_swapped_and_the_others_stay() -> None:
    here = load(Hang(part="lug", tips=("A1-A3",), material="6061-t6"))
    after = swapped(here, [(0, 2)], "pin").load
    assert after.hangs == (
        Hang(part="lug", tips=("A1-A2",), material="6061-t6"),
        Hang(part="pin", tips=("A3",)),
    )


def test_a_new_part_takes_the_first_free_tip_and_joins_its_like() -> None:
    here = load(Hang(part="lug", tips=("A2",)))
    assert added(here, TIPS, "lug").load.hangs == (Hang(part="lug", tips=("A2", "A1")),)
    other = added(here, TIPS, "pin")
    assert other.load.hangs[1] == Hang(part="pin", tips=("A1",))
    assert other.keys == ((1, 0),)
    assert added(load(Hang(part="lug", at=((0.1, 0.1),))), FREE, "pin").load.hangs[1].at == ((0.25, 0.5),)


def test_taking_off_leaves_the_one_before_in_hand_and_never_an_empty_load() -> None:
    here = load(Hang(part="lug", tips=("A1-A3",)), Hang(part="pin", count=4))
    after = taken_off(here, [(0, 1)])
    assert (tips(after.load)[0], after.keys) == (("A1", "A3"), ((0, 0),))
    assert taken_off(here, [(0, 0)]).keys == ((0, 0),)
    assert taken_off(here, [(0, 0), (0, 1), (0, 2)]).load.hangs == (Hang(part="pin", count=4),)
    with pytest.raises(InputError, match=r"racking\.last"):
        taken_off(load(Hang(part="lug", tips=("A1",))), [(0, 0)])
    with pytest.raises(InputError, match=r"racking\.none"):
        taken_off(here, [(5, 5)])


@pytest.mark.parametrize(
    ("pattern", "field", "found"),
    [
        ("every tip", "", ("A1-A4", "B1-B4", "C1-C4")),
        ("every second", "", ("A1", "A3", "B1", "B3", "C1", "C3")),
        ("checkerboard", "", ("A1", "A3", "B2", "B4", "C1", "C3")),
        ("every tip", "A1-B2", ("A1-A2", "B1-B2")),
        ("every tip", "B2 - A1", ("A1-A2", "B1-B2")),
        ("every tip", "B", ("A1", "B1-B4")),
        ("every second", "B-C", ("A1", "B1", "B3", "C1", "C3")),
        ("checkerboard", "A2-C4", ("A1-A2", "A4", "B3", "C2", "C4")),
    ],
)
def test_a_field_of_tips_is_filled_in_a_pattern(pattern: str, field: str, found: tuple[str, ...]) -> None:
    after = filled(load(Hang(part="lug", tips=("A1",))), TIPS, (0, 0), pattern, field)  # type: ignore[arg-type]
    assert after.load.hangs[0].tips == found


def test_a_field_that_is_none_or_full_is_refused() -> None:
    here = load(Hang(part="lug", tips=("A1-A4",)))
    for field, key in (("A", "racking.field_full"), ("Z9", "racking.no_field"), ("A1-Z", "racking.no_field")):
        with pytest.raises(InputError, match=re.escape(key)):
            filled(here, TIPS, (0, 0), "every tip", field)


def test_another_rack_takes_the_same_tips_or_its_own_in_order() -> None:
    here = load(Hang(part="lug", tips=("A2", "B3")), Hang(part="pin", tips=("C1",)))
    assert reracked(here, TIPS, TIPS, "other").load.hangs == here.hangs
    two = Rack(name="two", conductor="copper", width=1.0, height=1.0, tips=rows("X", "Y"))
    assert tips(reracked(here, TIPS, two, "two").load) == [("X1-X2",), ("X3",)]
    small = Rack(name="small", conductor="copper", width=1.0, height=1.0, tips=rows("X", count=2))
    with pytest.raises(InputError) as told:
        reracked(here, TIPS, small, "small")
    assert told.value.facts == {"rack": "small", "count": 2, "parts": 3}
    with pytest.raises(InputError, match=r"racking\.hangs_otherwise"):
        reracked(here, TIPS, FREE, "frame")


def test_a_part_let_go_of_takes_the_nearest_free_tips() -> None:
    here = load(Hang(part="lug", tips=("A1", "B2")))
    assert tips(put(here, TIPS, [(0, 0)], (0.19, 0.39)).load) == [("B1-B2",)]  # B2 is taken
    assert tips(put(here, TIPS, [(0, 0)], (0.39, 0.7)).load) == [("C4", "B2")]
    assert put(here, TIPS, [(0, 0)], (0.0, 0.0)).load == here
    both = load(Hang(part="lug", tips=("A1-A2",)))
    assert tips(put(both, TIPS, [(0, 0), (0, 1)], (0.3, 0.4)).load) == [("B3-B4",)]
    with pytest.raises(InputError, match=r"racking\.not_all_there"):
        put(both, TIPS, [(0, 0), (0, 1)], (0.4, 0.4))
    free = load(Hang(part="bar", at=((0.1, 0.2),)))
    assert put(free, FREE, [(0, 0)], (0.314, 0.451)).load.hangs[0].at == ((0.31, 0.45),)


def test_a_field_is_named_by_its_corners() -> None:
    assert field_between(TIPS, (0.35, 0.65), (0.15, 0.35)) == "B2-C3"
    assert field_between(TIPS, (0.0, 0.0), (1.0, 1.0)) == "A1-C4"
    assert field_between(TIPS, (0.0, 0.0), (0.05, 0.05)) == ""
