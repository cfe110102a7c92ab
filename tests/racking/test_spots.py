"""Parts at free positions, moved by steps of the grid; positions reckoned by hand."""

import pytest

from lineplanner.errors import InputError
from lineplanner.inputs.load import Hang
from lineplanner.racking import again, aligned, moved, spaced
from tests.racking.samples import FREE, TIPS, load

HERE = load(Hang(part="bar", at=((0.1, 0.2), (0.15, 0.25), (0.4, 0.2))), rack="frame")


def test_a_part_moves_by_steps_of_the_grid_and_stays_on_the_rack() -> None:
    assert moved(HERE, FREE, [(0, 0)], "right").load.hangs[0].at[0] == (0.11, 0.2)
    assert moved(HERE, FREE, [(0, 0)], "down", steps=10).load.hangs[0].at[0] == (0.1, 0.3)
    assert moved(HERE, FREE, [(0, 0), (0, 2)], "up").load.hangs[0].at == (
        (0.1, 0.19),
        (0.15, 0.25),
        (0.4, 0.19),
    )
    with pytest.raises(InputError, match=r"racking\.off_the_rack"):
        moved(HERE, FREE, [(0, 2)], "right", steps=11)


def test_once_more_goes_on_by_the_step_before() -> None:
    two = load(Hang(part="bar", at=((0.1, 0.2), (0.2, 0.2))))
    after = again(two, FREE, (0, 1), 9)
    assert after.load.hangs[0].at == ((0.1, 0.2), (0.2, 0.2), (0.3, 0.2), (0.4, 0.2), (0.5, 0.2))
    assert after.short == 6
    assert again(load(Hang(part="bar", at=((0.1, 0.2),))), FREE, (0, 0)).load.hangs[0].at[1] == (0.15, 0.2)


def test_parts_are_aligned_with_the_first_in_hand() -> None:
    every = [(0, 1), (0, 0), (0, 2)]
    assert aligned(HERE, every, "row").load.hangs[0].at == ((0.1, 0.25), (0.15, 0.25), (0.4, 0.25))
    assert aligned(HERE, every, "column").load.hangs[0].at == ((0.15, 0.2), (0.15, 0.25), (0.15, 0.2))


def test_parts_are_spaced_evenly_between_the_outer_two_on_the_grid() -> None:
    assert spaced(HERE, FREE, [(0, 0), (0, 1), (0, 2)]).load.hangs[0].at[1] == (0.25, 0.25)
    four = load(Hang(part="bar", at=((0.1, 0.2), (0.11, 0.2), (0.12, 0.2), (0.2, 0.2))))
    assert [x for x, _ in spaced(four, FREE, [(0, n) for n in range(4)]).load.hangs[0].at] == [
        0.1,
        0.13,
        0.17,
        0.2,
    ]
    with pytest.raises(InputError, match=r"racking\.three"):
        spaced(HERE, FREE, [(0, 0), (0, 1)])
    on_tips = load(Hang(part="bar", tips=("A1-A3",)))
    with pytest.raises(InputError, match=r"racking\.not_free"):
        spaced(on_tips, TIPS, [(0, 0), (0, 1), (0, 2)])
