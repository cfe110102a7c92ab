"""How amounts are printed: the trade's units and digits (design rule of this program, no outside source)."""

import pytest

from lineplanner import quantities as q
from lineplanner.quantities import KINDS, Kind
from lineplanner.units import UnitTextError, echo, example, parse, show, to_unit, units_of
from lineplanner.units.trade import TRADE, System

FOOT = 0.3048

PRINTED = [
    # thickness and area: three significant digits
    (50e-6, q.THICKNESS, "metric", "50 um"),
    (50e-6, q.THICKNESS, "us", "1.97 mil"),
    (52.37e-6, q.THICKNESS, "metric", "52.4 um"),
    (1.2345, q.AREA, "metric", "123 dm2"),
    (12.345, q.AREA, "metric", "1230 dm2"),
    (1.0, q.AREA, "us", "10.8 ft2"),
    # amperes keep their whole number where no panel step is known
    (1234.4, q.CURRENT, "metric", "1234 A"),
    (12.345, q.CURRENT, "metric", "12.3 A"),
    (0.345, q.CURRENT, "metric", "0.345 A"),
    # volts 0.1; a joint in millivolts
    (18.0, q.VOLTAGE, "metric", "18.0 V"),
    (18.25, q.VOLTAGE, "metric", "18.3 V"),
    (0.0123, q.VOLTAGE, "metric", "12.3 mV"),
    (-0.3, q.VOLTAGE, "metric", "-300 mV"),
    (0.0, q.VOLTAGE, "metric", "0.0 V"),
    # minutes 0.5; seconds where minutes would hide the amount
    (4800.0, q.TIME, "metric", "80 min"),
    (2317.0, q.TIME, "metric", "38.5 min"),
    (135.0, q.TIME, "metric", "2.5 min"),
    (45.0, q.TIME, "us", "45 s"),
    (119.0, q.TIME, "us", "119 s"),
    (0.0, q.TIME, "metric", "0 min"),
    # percent 1
    (0.714, q.RATIO, "metric", "71 %"),
    (1.12, q.RATIO, "metric", "112 %"),
    (0.995, q.RATIO, "metric", "100 %"),
    (0.004, q.RATIO, "metric", "0.4 %"),
    (-1e-17, q.RATIO, "metric", "0 %"),
    (-0.034, q.RATIO, "us", "-3 %"),
    # temperatures 0.1
    (293.15, q.TEMPERATURE, "metric", "20 degC"),
    (293.65, q.TEMPERATURE, "metric", "20.5 degC"),
    (293.15, q.TEMPERATURE, "us", "68 degF"),
    (273.15, q.TEMPERATURE, "metric", "0 degC"),
    (273.15 - 1e-9, q.TEMPERATURE, "metric", "0 degC"),
    (271.15, q.TEMPERATURE, "metric", "-2 degC"),
    (5.0, q.TEMPERATURE_DIFFERENCE, "us", "9 delta_degF"),
    # the rest
    (258.33385, q.CURRENT_DENSITY, "us", "24 A/ft2"),
    (258.33385, q.CURRENT_DENSITY, "metric", "2.58 A/dm2"),
    (0.32, q.LENGTH, "metric", "320 mm"),
    (1500.0, q.LENGTH, "metric", "1500 m"),
    (3.6e6, q.CHARGE, "metric", "1000 Ah"),
    (35e3, q.POWER, "us", "35 kW"),
    (350.0, q.POWER, "us", "350 W"),
    (1.0, q.FLOW, "metric", "3600 m3/h"),
    (2000 * FOOT**3 / 60, q.FLOW, "us", "2000 cfm"),
    (180.0, q.CONCENTRATION, "metric", "180 g/L"),
    (24.0, q.COUNT, "us", "24"),
    (50e-6, q.RESISTANCE, "metric", "50 uohm"),
]


@pytest.mark.parametrize(("value", "kind", "system", "text"), PRINTED)
def test_an_amount_is_printed_in_the_unit_and_the_digits_of_the_trade(
    value: float, kind: Kind, system: System, text: str
) -> None:
    assert show(value, kind, system) == text


@pytest.mark.parametrize(
    ("value", "step", "text"),
    [
        (1234.4, 1.0, "1234 A"),
        (1234.4, 5.0, "1235 A"),
        (1234.4, 10.0, "1230 A"),
        (1235.0, 10.0, "1240 A"),
        (12.34, 0.5, "12.5 A"),
        (12.0, 0.5, "12.0 A"),
        (12.34, 0.1, "12.3 A"),
        (3.0, 10.0, "0 A"),
    ],
)
def test_amperes_are_printed_in_steps_of_the_panel(value: float, step: float, text: str) -> None:
    assert show(value, q.CURRENT, "metric", step=step) == text


def test_a_panel_step_holds_in_another_unit_too() -> None:
    assert show(1234.4, q.CURRENT, "metric", unit="kA", step=10.0) == "1.23 kA"


def test_a_unit_of_the_kind_may_be_asked_for() -> None:
    assert show(3100.0, q.CURRENT_DENSITY, "us", unit="A/in2") == "2 A/in2"
    assert show(35168.528420667, q.POWER, "us", unit="TR") == "10 TR"
    assert show(1.5, q.RATIO, "metric", unit="1") == "1.5"
    assert show(4800.0, q.TIME, "metric", unit="s") == "4800 s"
    assert show(293.15, q.TEMPERATURE, "metric", unit="K") == "293.2 K"


def test_a_unit_of_another_kind_is_refused_in_printing_too() -> None:
    with pytest.raises(UnitTextError) as caught:
        show(5.0, q.CURRENT, "metric", unit="V")
    assert caught.value.key == "unit.wrong_kind"


def test_digits_may_be_asked_for() -> None:
    assert show(1234.5, q.CURRENT, "metric", digits=2) == "1200 A"
    assert show(52.37e-6, q.THICKNESS, "metric", digits=4) == "52.37 um"
    assert show(0.0345, q.RATIO, "metric", digits=2) == "3.5 %"


@pytest.mark.parametrize("kind", KINDS.values(), ids=lambda kind: kind.name)
@pytest.mark.parametrize("system", ["metric", "us"])
def test_no_zero_carries_a_sign_and_no_ordinary_size_an_exponent(kind: Kind, system: System) -> None:
    main = TRADE[kind].metric if system == "metric" else TRADE[kind].us
    assert "-" not in show(parse(f"-0.0 {main}".replace(" 1", ""), kind), kind, system).split(" ")[0]
    for number in ("0.001", "0.5", "7", "123456"):
        text = number if main == "1" else f"{number} {main}"
        if kind == q.COUNT and "." in number:
            continue
        assert "e" not in show(parse(text, kind), kind, system).split(" ")[0]


def test_what_is_not_finite_is_never_printed() -> None:
    for value in (float("nan"), float("inf")):
        with pytest.raises(ValueError, match=r"nan|inf"):
            show(value, q.CURRENT, "metric")


def test_an_extreme_size_is_printed_with_exponent_and_read_back() -> None:
    assert show(1.5e-18, q.AREA, "metric") == "1.5e-16 dm2"
    assert show(2.5e15, q.CURRENT, "metric") == "2.5e+15 A"
    assert parse("1.5e-16 dm2", q.AREA) == pytest.approx(1.5e-18)


@pytest.mark.parametrize(
    ("text", "kind", "both"),
    [
        ("2.5 A/dm2", q.CURRENT_DENSITY, "2.5 A/dm2 = 23.2 A/ft2"),
        ("24 A/ft2", q.CURRENT_DENSITY, "2.58 A/dm2 = 24 A/ft2"),
        ("12.34 mm", q.LENGTH, "12.34 mm = 0.486 in"),
        ("2 mil", q.THICKNESS, "50.8 um = 2 mil"),
        ("20 degC", q.TEMPERATURE, "20 degC = 68 degF"),
        ("5 K", q.TEMPERATURE_DIFFERENCE, "5 K = 9 delta_degF"),
        ("18.25 V", q.VOLTAGE, "18.25 V"),
        ("90 s", q.TIME, "90 s"),
        ("25 %", q.RATIO, "0.25 = 25 %"),
        ("24", q.COUNT, "24"),
    ],
)
def test_an_entry_is_echoed_in_both_systems_as_typed(text: str, kind: Kind, both: str) -> None:
    assert echo(parse(text, kind), kind) == both


def test_every_kind_has_a_row_and_every_unit_of_a_row_is_read() -> None:
    assert set(TRADE) == set(KINDS.values())
    for kind in KINDS.values():
        for unit in units_of(kind):
            number = parse("5" if unit == "1" else f"5 {unit}", kind)
            assert to_unit(number, kind, unit) == pytest.approx(5.0)


@pytest.mark.parametrize("system", ["metric", "us", None])
def test_every_example_is_read(system: System | None) -> None:
    for kind in KINDS.values():
        assert parse(example(kind, system), kind) > 0.0
