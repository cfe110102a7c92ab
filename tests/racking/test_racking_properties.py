"""Whatever is done by hand: no tip holds two parts, no part is lost that was not taken off, refusals change nothing."""

from collections import Counter

from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.errors import InputError
from lineplanner.inputs.hanging import parts_hung, tip_names
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.load_rules import hang_problems, rack_fit_problems
from lineplanner.racking import (
    again,
    faced,
    filled,
    moved,
    places_of,
    runs_of,
    sided,
    swapped,
    taken_off,
    turned,
)
from lineplanner.racking.tips import sides_of
from tests.racking.samples import TIPS, load

START = load(
    Hang(part="lug", tips=("A1", "B2")),
    Hang(part="bar", tips=("C1-C2",), tips_each=2),
    Hang(part="pin", tips=("A4",), side="back"),
    Hang(part="nut", count=3),
)
MOVES = {
    "left": lambda one, keys: moved(one, TIPS, keys, "left"),
    "right": lambda one, keys: moved(one, TIPS, keys, "right"),
    "up": lambda one, keys: moved(one, TIPS, keys, "up"),
    "down": lambda one, keys: moved(one, TIPS, keys, "down", 2),
    "again": lambda one, keys: again(one, TIPS, keys[0], 2),
    "off": taken_off,
    "turned": lambda one, keys: turned(one, keys, 0.5),
    "faced": faced,
    "sided": lambda one, keys: sided(one, TIPS, keys),
    "swapped": lambda one, keys: swapped(one, keys, "pin"),
    "filled": lambda one, keys: filled(one, TIPS, keys[0], "every second"),
}


def held(of: Load) -> Counter[tuple[str, str]]:
    return Counter((name, side) for h in of.hangs for name in tip_names(h) for side in sides_of(h))


@settings(max_examples=150, deadline=None)
@given(
    st.lists(st.tuples(st.sampled_from(sorted(MOVES)), st.lists(st.integers(0, 40), min_size=1, max_size=3)))
)
def test_every_load_that_is_made_by_hand_fits_its_rack(steps: list[tuple[str, list[int]]]) -> None:
    now = START
    for name, numbers in steps:
        keys = list(places_of(now))
        if not keys:
            break
        hand = list(dict.fromkeys(keys[number % len(keys)] for number in numbers))
        before = sum(parts_hung(hang) for hang in now.hangs)
        try:
            after = MOVES[name](now, hand)
        except InputError:
            continue
        now = after.load
        assert hang_problems(now) == []
        assert rack_fit_problems(now, TIPS) == []
        assert max(held(now).values(), default=1) == 1
        assert set(after.keys) <= set(places_of(now))
        assert len(set(after.keys)) == len(after.keys)
        count = sum(parts_hung(hang) for hang in now.hangs)
        if name in ("left", "right", "up", "down", "turned", "faced", "swapped"):
            assert count == before
            assert len(after.keys) == len(hand)
        elif name in ("again", "filled"):
            assert count > before
        elif name == "off":
            assert count < before
        assert now.hangs[-1].count == 3 or any(hang.count == 3 for hang in now.hangs)


@given(st.lists(st.sampled_from([f"{row}{n}" for row in "ABC" for n in range(1, 15)]), unique=True))
def test_runs_read_back_as_the_same_tips(names: list[str]) -> None:
    assert tip_names(Hang(part="lug", tips=runs_of(names))) == tuple(names)
