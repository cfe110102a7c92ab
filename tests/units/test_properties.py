"""Properties: any text gives a finite float or one kind of error; what is printed is read back."""

import math
from decimal import Decimal

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner import quantities as q
from lineplanner.quantities import KINDS, Kind
from lineplanner.units import UnitTextError, echo, parse, show, to_unit
from lineplanner.units.grammar import spellings
from lineplanner.units.trade import STEPS, TRADE, System

kinds = st.sampled_from(list(KINDS.values()))
systems = st.sampled_from(["metric", "us"])
names = st.sampled_from(sorted(spellings()))
marks = st.sampled_from(["*", "/", " ", "", "(", ")", "^2", "2", "-1", "**-3", "²", "4"])
unit_texts = st.lists(st.one_of(names, marks), max_size=12).map("".join)
numbers = st.one_of(
    st.floats().map(repr), st.integers().map(str), st.from_regex(r"[+-]?[0-9.,e]{0,8}", fullmatch=True)
)


def read_or_refused(text: str, kind: Kind) -> None:
    try:
        value = parse(text, kind)
    except UnitTextError:
        return
    assert isinstance(value, float)
    assert math.isfinite(value)


@given(st.text(), kinds)
def test_any_text_is_a_finite_amount_or_refused(text: str, kind: Kind) -> None:
    read_or_refused(text, kind)


@given(st.text(alphabet="0123456789.,:/*^+-eE %()[]_'\"\\AmftdinVhs²µ°\u00a0", max_size=70), kinds)
@settings(max_examples=500)
def test_any_text_of_the_marks_of_quantities_is_a_finite_amount_or_refused(text: str, kind: Kind) -> None:
    read_or_refused(text, kind)


@given(numbers, unit_texts, kinds)
@settings(max_examples=500, deadline=None)
def test_any_combination_of_units_is_a_finite_amount_or_refused(number: str, unit: str, kind: Kind) -> None:
    read_or_refused(f"{number} {unit}", kind)


@pytest.mark.parametrize(
    "text", ["9" * 10**6, "(" * 10**6, " " * 10**6, "5 " + "m" * 10**6, "1,1" * 20, "1 " * 30]
)
def test_a_very_long_text_is_refused_at_once(text: str) -> None:
    with pytest.raises(UnitTextError):
        parse(text, q.LENGTH)


def half_of_last_digit(text: str, kind: Kind, unit: str) -> float:
    """Half of the last place of a printed number, in its unit; more where a step is coarser."""
    number = Decimal(text.split(" ", maxsplit=1)[0])
    exponent = number.normalize().as_tuple().exponent if number else 0
    assert isinstance(exponent, int)
    step = 1.0 if kind == q.COUNT else float(STEPS.get(unit, "0"))
    return max(0.5 * 10.0**exponent, 0.5 * step)


sizes = st.floats(min_value=1e-3, max_value=1e5).flatmap(lambda x: st.sampled_from([x, -x]))


@given(sizes, kinds, systems)
@settings(max_examples=1000)
def test_what_is_printed_is_read_back_within_its_last_digit(size: float, kind: Kind, system: System) -> None:
    main = TRADE[kind].metric if system == "metric" else TRADE[kind].us
    number = float(round(size)) if kind == q.COUNT else abs(size) if kind == q.TEMPERATURE else size
    value = parse(repr(number) if main == "1" else f"{number!r} {main}", kind)
    text = show(value, kind, system)
    again = parse(text, kind)
    unit = text.partition(" ")[2] or "1"
    error = abs(to_unit(again, kind, unit) - to_unit(value, kind, unit))
    assert error <= half_of_last_digit(text, kind, unit) * (1 + 1e-9) + 1e-9 * abs(to_unit(value, kind, unit))


@given(st.integers(1, 999), st.integers(-2, 2), kinds, systems)
@settings(max_examples=500)
def test_three_digits_survive_the_way_through_si_and_back(
    digits: int, place: int, kind: Kind, system: System
) -> None:
    main = TRADE[kind].metric if system == "metric" else TRADE[kind].us
    number = format(Decimal(digits).scaleb(max(place, 0) if kind == q.COUNT else place), "f")
    text = number if main == "1" else f"{number} {main}"
    value = parse(text, kind)
    assert to_unit(parse(show(value, kind, system, unit=main, digits=3), kind), kind, main) == pytest.approx(
        float(number), rel=1e-9
    )
    parts = echo(value, kind).split(" = ")
    assert min(abs(parse(part, kind) - value) for part in parts) <= 1e-9 * abs(value)
