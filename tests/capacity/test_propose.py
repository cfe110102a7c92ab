"""What binds first, and which rectifier to take."""

import pytest

from lineplanner.capacity import binding, check_rectifier, propose
from lineplanner.errors import InputError
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.quantities import CURRENT
from lineplanner.sources import Source, Status

ENTERED = Source("nameplate", Status.ENTERED)
PRACTICE = Source("shop", Status.PRACTICE)


def compared(check: str, share: float, source: Source = ENTERED) -> Finding:
    return upper(check, value=share, limit=1.0, kind=CURRENT, source=source, key=check)


def test_the_smallest_margin_binds() -> None:
    found = binding([compared("a", 0.5), compared("b", 0.8), note("n", "n", ENTERED)])
    assert found is not None
    assert found.check == "b"


def test_a_stop_binds_before_a_caution_that_is_further_over() -> None:
    found = binding([compared("far over", 3.0, PRACTICE), compared("stop", 1.1)])
    assert found is not None
    assert found.check == "stop"


def test_notes_and_nothing_do_not_bind() -> None:
    assert binding([]) is None
    mild = Finding("rack-drop", Level.NOTE, "k", ENTERED, CURRENT, 5.0, 1.0, -4.0)
    assert binding([mild]) is None


@pytest.fixture
def offer(make_case, make_rectifier, make_run):
    """A current on each of several ratings."""

    def make(current: float, *ratings: float, **nameplate):
        case = make_case()
        tried = []
        for rating in ratings:
            rectifier = make_rectifier(name=f"R{rating:g}", max_current=rating, **nameplate)
            run = make_run(current, rectifier=rectifier)
            tried.append((run, check_rectifier(rectifier, run, case)))
        return tried

    return make


def test_the_smallest_that_passes_everything_is_taken(offer) -> None:
    # 500 A: 500 A is its rating (85 % for good fails), 600 A just carries 510 A for good, 2000 A is too large to meter
    proposal = propose(offer(500.0, 3000.0, 600.0, 500.0, 800.0))
    assert proposal.run.rectifier.name == "R600"
    fails = {name: finding.check if finding else None for name, finding in proposal.others}
    assert fails == {"R3000": "rectifier-meter", "R500": "rectifier-continuous", "R800": None}


def test_where_none_passes_the_one_with_the_best_worst_check_is_taken(offer) -> None:
    proposal = propose(offer(1000.0, 300.0, 900.0, 700.0))
    assert proposal.run.rectifier.name == "R900"
    assert {finding.check for _, finding in proposal.others} == {"rectifier-rating"}


def test_a_stop_that_compares_nothing_counts_as_the_worst(offer) -> None:
    gear = Finding("reversing", Level.STOP, "reversing.none", ENTERED)
    (fit, fine), (small, short) = offer(500.0, 1000.0, 400.0)
    proposal = propose([(fit, (*fine, gear)), (small, short)])
    assert proposal.run is small
    assert proposal.others == (("R1000", gear),)


def test_the_rectifier_that_the_load_names_is_taken_as_it_is(offer) -> None:
    proposal = propose(offer(500.0, 1000.0, 400.0), named="R400")
    assert proposal.run.rectifier.name == "R400"
    assert proposal.others == (("R1000", None),)


def test_an_unreachable_lower_limit_speaks_against_a_rectifier(offer) -> None:
    (run, found), *_ = offer(500.0, 1000.0)
    least = lower(
        "rectifier-least", value=1.0, limit=2.0, kind=CURRENT, source=PRACTICE, key="rectifier-least"
    )
    assert propose([(run, (*found, least))]).run is run


def test_there_must_be_something_to_choose_from() -> None:
    with pytest.raises(InputError) as caught:
        propose([])
    assert caught.value.key == "rectifier.nothing-checked"
