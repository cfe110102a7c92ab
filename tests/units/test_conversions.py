"""Conversions against arithmetic of their own and against scipy's constants.

The exact definitions used here: international yard and pound agreement of 1959 (1 yd = 0.9144 m, so 1 in =
25.4 mm; 1 lb = 0.45359237 kg), US gallon of 231 in3 (NIST Handbook 44, appendix C), standard gravity 9.80665 m/s2
(CGPM 1901), International Table calorie 4.1868 J and the BTU that follows from it (NIST SP 811, appendix B).
Status: published, from memory; the independent support is scipy.constants, which carries the same definitions.
"""

import math

import pytest

from lineplanner import quantities as q
from lineplanner.quantities import Kind
from lineplanner.units import parse
from lineplanner.units.grammar import definition_lines, spellings
from lineplanner.units.registry import registry

INCH = 0.9144 / 36
FOOT = 12 * INCH
POUND = 0.45359237
GALLON = 231 * INCH**3
BTU = 4.1868 * POUND * 1000 * 5 / 9  # heats a pound of water by a degree Fahrenheit: J
HOUR = 3600.0

HAND_WORKED = [
    (q.THICKNESS, "1 mil", 25.4e-6),
    (q.THICKNESS, "2 thou", 50.8e-6),
    (q.THICKNESS, "50 micron", 50e-6),
    (q.CURRENT_DENSITY, "24 A/ft2", 24 / FOOT**2),  # 24 / 0.09290304 = 258.33385 A/m2
    (q.CURRENT_DENSITY, "24 ASF", 24 / FOOT**2),
    (q.CURRENT_DENSITY, "1 ASI", 144 / FOOT**2),
    (q.CURRENT_DENSITY, "1 A/in2", 144 / FOOT**2),
    (q.CURRENT_DENSITY, "1 ASD", 100.0),
    (q.CURRENT_DENSITY, "31 mA/cm2", 310.0),
    (q.AREA, "1 ft2", 0.09290304),
    (q.AREA, "1 sqin", 6.4516e-4),
    (q.VOLUME, "1 gal", GALLON),
    (q.VOLUME, "100 US_gallon", 0.3785411784),
    (q.CONCENTRATION, "1 oz/gal", POUND / 16 / GALLON),  # avoirdupois, 7.489 g/L
    (q.CONCENTRATION, "180 g/L", 180.0),
    (q.DENSITY, "2.7 g/cm3", 2700.0),
    (q.MASS, "16 oz", POUND),
    (q.TIME, "1.5 h", 5400.0),
    (q.CHARGE, "1 Ah", 3600.0),
    (q.CHARGE, "60 A min", 3600.0),
    (q.CHARGE, "2 coulomb", 2.0),
    (q.POWER, "1 TR", 12000 * BTU / HOUR),  # 3516.85 W
    (q.POWER, "12000 BTU/h", 3516.8528420667),
    (q.FLOW, "2000 cfm", 2000 * FOOT**3 / 60),
    (q.FLOW, "1 gpm", GALLON / 60),
    (q.STRESS, "180 ksi", 180e3 * POUND * 9.80665 / INCH**2),
    (q.PRESSURE, "14.7 psi", 14.7 * POUND * 9.80665 / INCH**2),
    (q.FORCE, "1 lbf", POUND * 9.80665),
    (q.SURFACE_TENSION, "40 dyn/cm", 0.040),
    (q.ANGLE, "180 deg", math.pi),
    (q.ANGLE, "180°", math.pi),
    (q.TEMPERATURE, "20 degC", 293.15),
    (q.TEMPERATURE, "68 degF", 293.15),
    (q.TEMPERATURE, "-40 degF", 233.15),  # where both scales meet
    (q.TEMPERATURE, "-40 degC", 233.15),
    (q.TEMPERATURE, "25.7 degF", 269.65),  # -3.5 degC
    (q.TEMPERATURE, "212 degF", 373.15),
    (q.TEMPERATURE, "300 K", 300.0),
    (q.TEMPERATURE_DIFFERENCE, "5 K", 5.0),
    (q.TEMPERATURE_DIFFERENCE, "5 delta_degC", 5.0),
    (q.TEMPERATURE_DIFFERENCE, "9 delta_degF", 5.0),
    (q.TEMPERATURE_DIFFERENCE, "-5 K", -5.0),
    (q.PER_KELVIN, "0.393 %/K", 0.00393),
    (q.PER_KELVIN, "0.00393 1/K", 0.00393),
    (q.PER_KELVIN, "0.00393/K", 0.00393),
    (q.PER_KELVIN, "0.00393 K^-1", 0.00393),
    (q.PER_KELVIN, "1 1/degF", 1.8),
    (q.SPECIFIC_HEAT, "1 BTU/(lb degF)", 4186.8),
    (q.HEAT_TRANSFER, "1 BTU/(h ft2 degF)", BTU / (HOUR * FOOT**2 * 5 / 9)),
    (q.GROWTH, "1 mil ft2/(A min)", 25.4e-6 * 0.09290304 / 60),
    (q.EQUIVALENT, "0.3234 g/Ah", 0.3234e-3 / 3600),
    (q.RATE, "1 um/min", 1e-6 / 60),
    (q.RESISTIVITY, "1.7241 uohm cm", 1.7241e-8),
    (q.CONDUCTIVITY, "0.543 S/cm", 54.3),
    (q.FILM_GRADIENT, "1 V/um", 1e6),
    (q.SURFACE_MASS, "1000 mg/ft2", 1e-3 / 0.09290304),
    (q.RATIO, "0.5", 0.5),
    (q.RATIO, "50 %", 0.5),
    (q.RATIO, "50%", 0.5),
    (q.RATIO, "-5 percent", -0.05),
    (q.COUNT, "24", 24.0),
]


@pytest.mark.parametrize(("kind", "text", "expected"), HAND_WORKED)
def test_a_text_with_a_unit_becomes_the_si_value_of_the_definitions(
    kind: Kind, text: str, expected: float
) -> None:
    assert parse(text, kind) == pytest.approx(expected, rel=1e-12)


def test_one_foot_holds_144_square_inches_of_current_density() -> None:
    assert parse("1 A/in2", q.CURRENT_DENSITY) == pytest.approx(
        parse("144 A/ft2", q.CURRENT_DENSITY), rel=1e-14
    )


@pytest.mark.parametrize(
    ("text", "kind", "name"),
    [
        ("1 in", q.LENGTH, "inch"),
        ("1 ft", q.LENGTH, "foot"),
        ("1 mil", q.LENGTH, "mil"),
        ("1 lb", q.MASS, "pound"),
        ("1 oz", q.MASS, "oz"),
        ("1 gal", q.VOLUME, "gallon"),
        ("1 psi", q.PRESSURE, "psi"),
        ("1 lbf", q.FORCE, "lbf"),
        ("1 deg", q.ANGLE, "degree"),
        ("1 bar", q.PRESSURE, "bar"),
        ("1 dyn", q.FORCE, "dyn"),
        ("1 L", q.VOLUME, "liter"),
        ("1 h", q.TIME, "hour"),
        ("1 day", q.TIME, "day"),
    ],
)
def test_the_definitions_agree_with_scipy(text: str, kind: Kind, name: str) -> None:
    constants = pytest.importorskip("scipy.constants")
    assert parse(text, kind) == pytest.approx(getattr(constants, name), rel=1e-14)


def test_the_btu_and_fahrenheit_agree_with_scipy() -> None:
    constants = pytest.importorskip("scipy.constants")
    assert parse("3600 BTU/h", q.POWER) == pytest.approx(constants.Btu_IT, rel=1e-12)
    for degrees in (-40.0, 32.0, 68.0, 131.0):
        expected = float(constants.convert_temperature(degrees, "F", "K"))
        assert parse(f"{degrees} degF", q.TEMPERATURE) == pytest.approx(expected, rel=1e-14)


SAME = [
    (q.AREA, ["5 dm2", "5 dm^2", "5 dm**2", "5 dm²", "5dm2", "5 dm ^ 2", "5 dm dm", "5 dm*dm", "+5 dm2", "5.0e0 dm2"]),
    (q.THICKNESS, ["5 um", "5 \u00b5m", "5 \u03bcm", "5 micron", "5 microns", "5\u00a0um", "5\u202fum", "  5 um  "]),
    (q.TEMPERATURE, ["20.5 degC", "20.5 °C", "20.5°C", "20.5 celsius"]),
    (q.CURRENT_DENSITY, ["18 A/ft^2", "18 A/ft²", "18 A*ft^-2", "18 A·ft⁻²", "18 A / ft2", "18 asf", "18 A ft-2"]),
    (q.CURRENT_DENSITY, ["18 A/sqft", "18 A/(ft ft)", "18 A/ft/ft", "18 A/(ft*ft)"]),
    (q.HEAT_TRANSFER, ["9 W/(m2 K)", "9 W/m2/K", "9 W/(m²·K)", "9 W/(m2*degC)", "9 W m-2 K-1", "9 W/( m2  K )"]),
    (q.CHARGE, ["7 Ah", "7 A h", "7 A*h", "7 A·h", "7 amp hour", "7000 mAh"]),
    (q.RESISTANCE, ["2 mohm", "2 m\u03a9", "2 m\u2126", "0.002 ohm", ".002 ohms"]),
    (q.TIME, ["30 min", "30 minutes", "0.5 h", "0.5 hr", "1800 s"]),
]  # fmt: skip


@pytest.mark.parametrize(("kind", "texts"), SAME)
def test_spellings_of_one_amount_are_read_alike(kind: Kind, texts: list[str]) -> None:
    first, *others = (parse(text, kind) for text in texts)
    assert others == pytest.approx([first] * len(others), rel=1e-14)


def test_every_spelling_of_the_grammar_is_the_same_unit_for_the_library() -> None:
    units = registry()
    for spelling, name in spellings().items():
        if spelling not in ("%", "in") and not spelling.startswith(
            "delta_"
        ):  # no names to the library's own parser
            assert units.parse_units(spelling) == units.parse_units(name), spelling


def test_no_spelling_is_defined_twice() -> None:
    lines = [line for line in definition_lines() if "=" in line and not line.startswith("#")]
    defined = [item.strip() for line in lines for n, item in enumerate(line.split("=")) if n != 1]
    assert len(defined) == len(set(defined))


@pytest.mark.parametrize("spelling", ["C", "F", "farad", "rad_per_s", "cd", "c", "e", "g_0", "R", "ton"])
def test_units_that_could_be_mistaken_are_not_defined(spelling: str) -> None:
    assert spelling not in spellings()
