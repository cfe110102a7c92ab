"""One part more, one less, another part: what a key does to the load."""

import pytest

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import parts_hung, tip_names
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.rack import Rack, TipRow
from lineplanner.racking import exchanged, one_less, one_more, runs_of

RACK = Rack(
    name="two rows of four",
    conductor="titanium-2",
    width=1.0,
    height=1.0,
    tips=tuple(
        TipRow(name=row, count=4, start=(0.1, drop), step=(0.1, 0.0), kind="spring", conductor="titanium-2")
        for row, drop in (("A", 0.2), ("B", 0.4))
    ),
)


def load(*hangs: Hang) -> Load:
    return Load(name="x", recipe="r", rack="two-rows", line="l", tank="t", hangs=hangs)


def test_one_more_takes_the_next_free_tip_and_one_less_frees_the_last() -> None:
    first = load(Hang(part="lug", tips=("A1-A3",)))
    more = one_more(first, RACK, 0)
    assert more.hangs[0].tips == ("A1-A4",)
    assert one_more(more, RACK, 0).hangs[0].tips == ("A1-A4", "B1")
    assert one_less(more, 0) == first


def test_a_tip_that_another_entry_holds_is_passed_over() -> None:
    both = load(Hang(part="lug", tips=("A1",)), Hang(part="pin", tips=("A2-A4",)))
    assert one_more(both, RACK, 0).hangs[0].tips == ("A1", "B1")
    assert one_more(load(Hang(part="lug", tips=("B4",))), RACK, 0).hangs[0].tips == ("B4", "A1")


def test_a_part_on_two_tips_takes_and_frees_two() -> None:
    wide = load(Hang(part="lug", tips=("A1-A2",), tips_each=2))
    more = one_more(wide, RACK, 0)
    assert tip_names(more.hangs[0]) == ("A1", "A2", "A3", "A4")
    assert parts_hung(more.hangs[0]) == 2
    assert one_less(more, 0) == wide


def test_a_counted_entry_changes_its_count() -> None:
    counted = load(Hang(part="lug", count=5))
    assert one_more(counted, RACK, 0).hangs[0].count == 6
    assert one_less(counted, 0).hangs[0].count == 4


def test_what_is_not_possible_is_refused_in_words() -> None:
    full = load(Hang(part="lug", tips=("A1-A4", "B1-B4")))
    with pytest.raises(InputError, match=r"racking\.no_tip"):
        one_more(full, RACK, 0)
    with pytest.raises(InputError, match=r"racking\.next_place"):
        one_more(load(Hang(part="lug", at=((0.1, 0.2),))), RACK, 0)
    for last in (
        Hang(part="lug", count=1),
        Hang(part="lug", tips=("A1",)),
        Hang(part="lug", at=((0.1, 0.2),)),
    ):
        with pytest.raises(InputError, match=r"racking\.last_of_entry"):
            one_less(load(last), 0)


def test_another_part_keeps_the_places_and_brings_its_own_material() -> None:
    first = load(Hang(part="lug", tips=("A1-A3",), material="6061-t6", turn=0.5))
    after = exchanged(first, 0, "pin").hangs[0]
    assert (after.part, after.tips, after.turn, after.material) == ("pin", ("A1-A3",), 0.5, None)


def test_tips_are_written_as_runs_that_read_back_as_the_same_tips() -> None:
    names = ("A1", "A2", "B2", "B3", "B1", "C10", "C11", "left")
    assert runs_of(names) == ("A1-A2", "B2-B3", "B1", "C10-C11", "left")
    assert tip_names(Hang(part="lug", tips=runs_of(names))) == names
