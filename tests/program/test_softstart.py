"""Soft starts: charge and steps."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.program.softstart import Segment, SoftStart, stepped


def test_a_linear_ramp_from_nothing_counts_half() -> None:
    """Hand-worked: 10 min from 0 passes what 5 min at full current pass; with 60 min hold 65 min in all."""
    ramp = SoftStart(segments=(Segment(duration=600.0, start=0.0, end=1.0),), stepped=False)
    assert ramp.equivalent == 300.0


def test_four_steps_from_a_fifth() -> None:
    """Hand-worked: 0.2, 0.4, 0.6, 0.8 of full current, 75 s each: equivalent 75 x 2.0 = 150 s."""
    start = SoftStart(segments=stepped(300.0, 4, 0.2), stepped=True)
    assert [round(s.end, 9) for s in start.segments] == [0.2, 0.4, 0.6, 0.8]
    assert start.equivalent == pytest.approx(150.0)
    assert start.duration == pytest.approx(300.0)


def test_steps_from_nothing_begin_one_step_up() -> None:
    assert [round(s.start, 9) for s in stepped(300.0, 4, 0.0)] == [0.2, 0.4, 0.6, 0.8]


@given(st.floats(1.0, 3600.0), st.integers(1, 30), st.floats(0.0, 1.0))
def test_steps_rise_and_never_pass_full_current(duration: float, steps: int, first: float) -> None:
    shares = [s.start for s in stepped(duration, steps, first)]
    assert shares == sorted(shares)
    assert all(0.0 <= s <= 1.0 for s in shares)
